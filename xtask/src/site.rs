//! The hosted site, built by trunk.

use crate::tools::{self, run};
use crate::{Result, dist, root, say, target};
use std::path::PathBuf;
use std::process::Command;
use std::time::Instant;

/// trunk with the cached tools on its path.
fn trunk() -> Result<Command> {
    tools::wasm_target()?;
    let tool = tools::trunk()?;
    tools::wasm_bindgen()?;
    let mut c = Command::new(tool);
    c.current_dir(root()).env("PATH", tools::path_with_tools()).env("CARGO_TARGET_DIR", target());
    let (name, flags) = tools::page_flags();
    c.env(name, flags);
    // trunk 0.21 takes NO_COLOR for an option of its own and stops.
    c.env_remove("NO_COLOR");
    Ok(c)
}

/// A copy of the shell that does not ask for wasm-opt, beside the shell so that its links hold;
/// taken away again when it is dropped.
struct PlainShell(PathBuf);

impl PlainShell {
    fn write() -> Result<Self> {
        let public = root().join("public");
        let shell = std::fs::read_to_string(public.join("index.html"))
            .map_err(|e| format!("public/index.html could not be read: {e}."))?;
        let plain = Self(public.join(".index-plain.html"));
        std::fs::write(&plain.0, shell.replace("data-wasm-opt=\"z\"", "data-wasm-opt=\"0\""))
            .map_err(|e| format!("{} could not be written: {e}.", plain.0.display()))?;
        Ok(plain)
    }
}

impl Drop for PlainShell {
    fn drop(&mut self) {
        let _ = std::fs::remove_file(&self.0);
    }
}

/// Builds `dist/site/`.
pub fn build() -> Result {
    let start = Instant::now();
    let mut c = trunk()?;
    c.args(["build", "--release", "--log", "warn"]);
    let plain = if tools::wasm_opt_or_notice().is_none() { Some(PlainShell::write()?) } else { None };
    if let Some(shell) = &plain {
        c.arg(&shell.0);
    }
    say::step("Building the hosted site (seconds after the page, about 2 minutes without it)");
    run(&mut c)?;
    let folder = dist().join("site");
    let wasm = std::fs::read_dir(&folder)
        .into_iter()
        .flatten()
        .filter_map(|e| e.ok().map(|e| e.path()))
        .find(|p| p.extension().is_some_and(|e| e == "wasm"));
    let size = wasm.map_or(0.0, |w| say::kilobytes(&w));
    say::done(&format!(
        "{} can be put on any static server ({size:.0} kB of wasm), built in {}.",
        folder.display(),
        say::since(start)
    ));
    Ok(())
}

/// Serves the page and reloads it at every change.
pub fn serve() -> Result {
    let mut c = trunk()?;
    say::step("Building (about 2 minutes the first time) and serving; stop with Ctrl-C");
    run(c.args(["serve", "--open"]))
}
