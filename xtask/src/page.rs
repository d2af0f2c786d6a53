//! The page as one file that opens from disk: everything inlined, no module script, no fetch.

use crate::tools::{self, run};
use crate::{Result, dist, root, say, target};
use base64::Engine;
use base64::engine::general_purpose::STANDARD;
use flate2::Compression;
use flate2::write::GzEncoder;
use std::io::Write;
use std::path::{Path, PathBuf};
use std::process::{Command, Stdio};
use std::time::{Duration, Instant};
use wasm_bindgen_cli_support::Bindgen;

/// Builds the one file and opens it.
pub fn open(in_browser: bool) -> Result {
    build()?;
    let page = dist().join("unstir.html");
    if in_browser && show(&page) {
        say::done("It was handed to your browser.");
    } else {
        say::done(&format!("Open it in a browser: {}", page.display()));
    }
    Ok(())
}

/// Builds `dist/unstir.html`.
pub fn build() -> Result {
    let start = Instant::now();
    tools::wasm_target()?;
    let wasm_opt = tools::wasm_opt_or_notice();
    say::step("Building the page (about 2 minutes the first time)");
    let (name, flags) = tools::page_flags();
    run(tools::cargo().env(name, flags).args(tools::quiet()).args([
        "build",
        "--release",
        "--locked",
        "--package",
        "unstir-app",
        "--target",
        "wasm32-unknown-unknown",
    ]))?;
    let built = target().join("wasm32-unknown-unknown/release/unstir-app.wasm");
    let bound = bind(&built)?;
    let wasm = optimise(&bound.join("unstir-app_bg.wasm"), wasm_opt.as_deref())?;
    let page = pack(&wasm, &bound.join("unstir-app.js"))?;
    say::done(&format!(
        "{} holds the whole page: {:.0} kB ({:.0} kB of it wasm), built in {}.",
        page.display(),
        say::kilobytes(&page),
        say::kilobytes(&wasm),
        say::since(start)
    ));
    Ok(())
}

/// Writes the JavaScript side for a classic script; gives its folder.
fn bind(wasm: &Path) -> Result<PathBuf> {
    let out = target().join("one-file");
    Bindgen::new()
        .input_path(wasm)
        .no_modules(true)
        .map_err(|e| e.to_string())?
        .typescript(false)
        .remove_producers_section(true)
        .generate(&out)
        .map_err(|e| format!("the JavaScript side of the page could not be written: {e:#}"))?;
    Ok(out)
}

/// The wasm made smaller where wasm-opt is there; otherwise, or if that fails, as it is.
fn optimise(wasm: &Path, wasm_opt: Option<&Path>) -> Result<PathBuf> {
    let Some(tool) = wasm_opt else {
        return Ok(wasm.to_path_buf());
    };
    let small = wasm.with_extension("opt.wasm");
    say::step("Making it smaller (some seconds)");
    let done = run(Command::new(tool).arg("-Oz").args(tools::WASM_OPT_FEATURES).arg(wasm).arg("-o").arg(&small));
    match done {
        Ok(()) => Ok(small),
        Err(e) => {
            say::done(&format!("{e} The page is packed as it was built, and is larger."));
            Ok(wasm.to_path_buf())
        }
    }
}

/// Puts shell, styles, icon, script and wasm into `dist/unstir.html`.
fn pack(wasm: &Path, script: &Path) -> Result<PathBuf> {
    let read =
        |path: &Path| std::fs::read_to_string(path).map_err(|e| format!("{} could not be read: {e}.", path.display()));
    let public = root().join("public");
    let shell = read(&public.join("index.html"))?;
    let style = read(&public.join("style.css"))?;
    let icon = read(&public.join("icon.svg"))?;
    // A literal end tag would close the script; in a string the escape is the same text.
    let script = read(script)?.replace("</script", "<\\/script");
    let wasm = std::fs::read(wasm).map_err(|e| format!("the wasm could not be read: {e}."))?;

    let mut head = String::new();
    for line in shell.lines() {
        // What trunk replaces on the hosted site is replaced here by hand.
        if line.contains("data-trunk") {
            if line.contains("rel=\"css\"") {
                head.push_str(&format!("<style>\n{style}</style>\n"));
            } else if line.contains("rel=\"icon\"") {
                let data = STANDARD.encode(icon.as_bytes());
                head.push_str(&format!("<link rel=\"icon\" href=\"data:image/svg+xml;base64,{data}\">\n"));
            }
        } else {
            head.push_str(line);
            head.push('\n');
        }
    }
    let start =
        format!("<script>\n{script}\n</script>\n<script>\n{}</script>\n", START.replace("WASM", &packed(&wasm)?));
    let Some(at) = head.rfind("</body>") else {
        return Err("public/index.html has no </body>.".to_owned());
    };
    head.insert_str(at, &start);
    let page = dist().join("unstir.html");
    std::fs::create_dir_all(dist()).map_err(|e| format!("dist could not be made: {e}."))?;
    std::fs::write(&page, head).map_err(|e| format!("{} could not be written: {e}.", page.display()))?;
    Ok(page)
}

/// Unpacks the wasm and starts it. Compressed, the page is a third of its size; browsers can
/// unpack since 2020 (Chromium), 2023 (Firefox, Safari).
const START: &str = r#"(async function () {
  try {
    if (!window.DecompressionStream) throw new Error("This browser is too old to open the page: it needs one from 2023 or later.");
    var text = atob("WASM"), packed = new Uint8Array(text.length);
    for (var i = 0; i < text.length; i++) packed[i] = text.charCodeAt(i);
    var stream = new Blob([packed]).stream().pipeThrough(new DecompressionStream("gzip"));
    await wasm_bindgen({ module_or_path: await new Response(stream).arrayBuffer() });
  } catch (e) { unstirTrouble(e); }
})();
"#;

/// `bytes` compressed, as text.
fn packed(bytes: &[u8]) -> Result<String> {
    let mut gzip = GzEncoder::new(Vec::new(), Compression::best());
    let packed = gzip.write_all(bytes).and_then(|()| gzip.finish());
    packed.map(|p| STANDARD.encode(p)).map_err(|e| format!("the wasm could not be compressed: {e}."))
}

/// Hands a file to the system's browser; says whether that seemed to work.
fn show(page: &Path) -> bool {
    let (program, args): (&str, &[&str]) = if cfg!(target_os = "macos") {
        ("open", &[])
    } else if cfg!(windows) {
        ("cmd", &["/C", "start", ""])
    } else if ["DISPLAY", "WAYLAND_DISPLAY"].iter().any(|screen| std::env::var_os(screen).is_some()) {
        ("xdg-open", &[])
    } else {
        return false;
    };
    let silent = Command::new(program)
        .args(args)
        .arg(page)
        .stdin(Stdio::null())
        .stdout(Stdio::null())
        .stderr(Stdio::null())
        .spawn();
    let Ok(mut opener) = silent else { return false };
    // Some openers stay as long as the browser does: one that still runs has found it.
    for _ in 0..30 {
        match opener.try_wait() {
            Ok(Some(status)) => return status.success(),
            Ok(None) => std::thread::sleep(Duration::from_millis(100)),
            Err(_) => return false,
        }
    }
    true
}
