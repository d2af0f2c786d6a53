//! The hosted site, built by trunk.

use crate::tools::{self, run};
use crate::{Result, dist, root, say, target};
use std::process::Command;
use std::time::Instant;

/// trunk with the cached tools on its path.
fn trunk() -> Result<Command> {
    tools::wasm_target()?;
    let tool = tools::trunk()?;
    tools::wasm_bindgen()?;
    let mut c = Command::new(tool);
    c.current_dir(root()).env("PATH", tools::path_with_tools()).env("CARGO_TARGET_DIR", target());
    // trunk 0.21 takes NO_COLOR for an option of its own and stops.
    c.env_remove("NO_COLOR");
    if tools::wasm_opt().is_none() {
        c.env("TRUNK_SKIP_WASM_OPT", "1");
    }
    Ok(c)
}

/// The shell trunk builds: without the wish for wasm-opt where that is missing.
fn shell() -> Result<&'static str> {
    const FULL: &str = "public/index.html";
    const PLAIN: &str = "public/.index-plain.html";
    if tools::wasm_opt_or_notice().is_some() {
        return Ok(FULL);
    }
    let text = std::fs::read_to_string(root().join(FULL)).map_err(|e| format!("{FULL} could not be read: {e}."))?;
    std::fs::write(root().join(PLAIN), text.replace("data-wasm-opt=\"z\"", "data-wasm-opt=\"0\""))
        .map_err(|e| format!("{PLAIN} could not be written: {e}."))?;
    Ok(PLAIN)
}

/// Builds `dist/site/`.
pub fn build() -> Result {
    let start = Instant::now();
    let shell = shell()?;
    let mut c = trunk()?;
    say::step("Building the hosted site (about a minute)");
    run(c.args(["build", "--release", "--log", "warn", shell]))?;
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
    let shell = shell()?;
    let mut c = trunk()?;
    say::step("Serving; stop with Ctrl-C");
    run(c.args(["serve", "--open", shell]))
}
