//! Finding the tools a command needs, and installing what is missing.

use crate::{Result, say};
use std::io::IsTerminal;
use std::path::{Path, PathBuf};
use std::process::{Command, Stdio};
use std::sync::OnceLock;
use std::time::Instant;

/// Version of trunk, which builds the hosted site.
pub const TRUNK: &str = "0.21.14";
/// Version of the wasm-bindgen tools; the workspace pins the library to the same.
pub const WASM_BINDGEN: &str = "0.2.129";
const TARGET: &str = "wasm32-unknown-unknown";

/// Runs a command, showing what it prints.
pub fn run(command: &mut Command) -> Result {
    let name = Path::new(command.get_program()).file_stem().unwrap_or_default().to_string_lossy().into_owned();
    let status = command.status().map_err(|e| format!("{name} could not be started: {e}."))?;
    if status.success() { Ok(()) } else { Err(format!("{name} did not succeed ({status}); see above.")) }
}

/// What a command prints, if it succeeds.
pub fn output_of(command: &mut Command) -> Option<String> {
    let out = command.stderr(Stdio::null()).stdin(Stdio::null()).output().ok()?;
    out.status.success().then(|| String::from_utf8_lossy(&out.stdout).into_owned())
}

/// cargo, as it runs us.
pub fn cargo() -> Command {
    let mut c = Command::new(std::env::var_os("CARGO").unwrap_or_else(|| "cargo".into()));
    c.current_dir(crate::root()).env("CARGO_TARGET_DIR", crate::target());
    // Set for xtask itself, not for what it builds.
    for name in ["CARGO_MANIFEST_DIR", "CARGO_MANIFEST_PATH", "CARGO_PKG_NAME", "NO_COLOR"] {
        c.env_remove(name);
    }
    c
}

/// How the page is compiled: as `.cargo/config.toml` says, and without the paths of this machine.
pub fn page_flags() -> (&'static str, std::ffi::OsString) {
    let mut flags = std::ffi::OsString::from("--cfg erase_components");
    let home = std::env::var_os("CARGO_HOME").map(PathBuf::from).or_else(|| {
        std::env::var_os("HOME").or_else(|| std::env::var_os("USERPROFILE")).map(|h| PathBuf::from(h).join(".cargo"))
    });
    // A path with a blank would be taken for two flags; such a page keeps its paths.
    for (path, name) in [(home, "crates"), (Some(crate::root()), "unstir")] {
        if let Some(path) = path.filter(|p| !p.to_string_lossy().contains(' ')) {
            flags.push(" --remap-path-prefix=");
            flags.push(path);
            flags.push(format!("={name}"));
        }
    }
    ("CARGO_TARGET_WASM32_UNKNOWN_UNKNOWN_RUSTFLAGS", flags)
}

/// Silence for cargo where nobody watches; on a terminal its progress bar stays.
pub fn quiet() -> &'static [&'static str] {
    if std::io::stderr().is_terminal() { &[] } else { &["--quiet"] }
}

/// Adds the wasm target to the toolchain if it is not there.
pub fn wasm_target() -> Result {
    let sysroot = output_of(Command::new("rustc").arg("--print").arg("sysroot").current_dir(crate::root()))
        .ok_or("rustc was not found. Install Rust with rustup (https://rustup.rs) and try again.")?;
    if Path::new(sysroot.trim()).join("lib/rustlib").join(TARGET).exists() {
        return Ok(());
    }
    say::step("Adding the wasm target to the toolchain (some seconds)");
    run(Command::new("rustup").args(["target", "add", TARGET]).current_dir(crate::root()))
        .map_err(|e| format!("{e} The page needs the target {TARGET}; install Rust with rustup (https://rustup.rs)."))
}

/// Where installed tools are kept: outside the build, so that `cargo clean` leaves them.
fn cache() -> PathBuf {
    let base = ["XDG_CACHE_HOME", "LOCALAPPDATA"]
        .iter()
        .find_map(std::env::var_os)
        .map(PathBuf::from)
        .or_else(|| {
            std::env::var_os("HOME")
                .or_else(|| std::env::var_os("USERPROFILE"))
                .map(|h| PathBuf::from(h).join(".cache"))
        })
        .unwrap_or_else(crate::target);
    base.join("unstir-tools")
}

/// A tool on the path or in the cache, in exactly this version.
fn found(name: &str, version: &str) -> Option<PathBuf> {
    let kept = cache().join("bin").join(name);
    [PathBuf::from(name), kept].into_iter().find(|tool| {
        output_of(Command::new(tool).arg("--version").env_remove("NO_COLOR"))
            .is_some_and(|text| text.split_whitespace().any(|w| w == version))
    })
}

/// Installs a tool from its crate into the cache unless it is there; gives its path.
fn installed(name: &str, krate: &str, version: &str, about: &str, more: &[&str]) -> Result<PathBuf> {
    if let Some(tool) = found(name, version) {
        return Ok(tool);
    }
    say::step(&format!("Installing {krate} {version} into {} ({about} on two cores, once)", cache().display()));
    let start = Instant::now();
    let mut c = cargo();
    // Outside the workspace: its configuration and lock file do not concern the tool.
    c.current_dir(std::env::temp_dir()).env_remove("CARGO_TARGET_DIR");
    c.args(quiet()).args(["install", "--locked", krate, "--version", version, "--root"]).arg(cache()).args(more);
    run(&mut c)?;
    say::done(&format!("{krate} {version} installed in {}.", say::since(start)));
    found(name, version).ok_or_else(|| format!("{name} {version} was installed but does not run."))
}

/// trunk in the pinned version.
pub fn trunk() -> Result<PathBuf> {
    let lean = ["--debug", "--no-default-features", "--features", "rustls"];
    installed("trunk", "trunk", TRUNK, "about 4 minutes", &lean)
}

/// The wasm-bindgen tools in the pinned version: the folder that holds them.
pub fn wasm_bindgen() -> Result<PathBuf> {
    installed("wasm-bindgen", "wasm-bindgen-cli", WASM_BINDGEN, "about 3 minutes", &["--debug"])
}

/// The path with the cached tools in front.
pub fn path_with_tools() -> std::ffi::OsString {
    let mut all = vec![cache().join("bin")];
    all.extend(std::env::split_paths(&std::env::var_os("PATH").unwrap_or_default()));
    std::env::join_paths(all).unwrap_or_default()
}

/// wasm-opt, if the system has it.
fn wasm_opt() -> Option<PathBuf> {
    output_of(Command::new("wasm-opt").arg("--version")).map(|_| PathBuf::from("wasm-opt"))
}

/// Features that current Rust uses and wasm-opt has to be told of.
pub const WASM_OPT_FEATURES: [&str; 6] = [
    "--enable-bulk-memory",
    "--enable-nontrapping-float-to-int",
    "--enable-sign-ext",
    "--enable-mutable-globals",
    "--enable-reference-types",
    "--enable-multivalue",
];

/// Installs system packages where that is ours to do (root on a Debian system); says whether it
/// was done.
fn system_packages(packages: &[&str]) -> bool {
    let root = output_of(Command::new("id").arg("-u")).is_some_and(|u| u.trim() == "0");
    let debian = output_of(Command::new("apt-get").arg("--version")).is_some();
    if !(root && debian) {
        return false;
    }
    say::step(&format!("Installing {} from the system's packages (about a minute)", packages.join(", ")));
    let apt = |args: &[&str]| {
        run(Command::new("apt-get").args(args).env("DEBIAN_FRONTEND", "noninteractive").stdout(Stdio::null()))
    };
    apt(&["update", "-qq"]).is_ok()
        && apt(&[&["install", "-y", "-qq", "--no-install-recommends"][..], packages].concat()).is_ok()
}

/// wasm-opt, installed where that is ours to do; one notice where it is missing.
pub fn wasm_opt_or_notice() -> Option<PathBuf> {
    static TOOL: OnceLock<Option<PathBuf>> = OnceLock::new();
    TOOL.get_or_init(|| {
        let tool = wasm_opt().or_else(|| if system_packages(&["binaryen"]) { wasm_opt() } else { None });
        if tool.is_none() {
            say::done(
                "wasm-opt was not found: the page is built without it and is larger. \
                 Install the package “binaryen” for the small one.",
            );
        }
        tool
    })
    .clone()
}

/// A browser and its driver for the journeys.
pub struct Browser {
    /// chromium.
    pub chromium: PathBuf,
    /// chromedriver.
    pub driver: PathBuf,
}

/// Chromium and its driver, installed where that is ours to do.
pub fn browser() -> Result<Browser> {
    let find = || {
        let chromium = ["chromium", "chromium-browser", "google-chrome"]
            .into_iter()
            .find(|n| output_of(Command::new(n).arg("--version")).is_some())?;
        output_of(Command::new("chromedriver").arg("--version"))?;
        Some(Browser { chromium: which(chromium), driver: which("chromedriver") })
    };
    if let Some(b) = find() {
        return Ok(b);
    }
    system_packages(&["chromium", "chromium-driver", "fonts-dejavu-core"]);
    find().ok_or_else(|| {
        "The journeys on the page need Chromium and chromedriver, which were not found. \
         Install them from your system's packages (on Debian: chromium and chromium-driver) and try again."
            .to_owned()
    })
}

/// Where a program on the path lies.
fn which(name: &str) -> PathBuf {
    std::env::split_paths(&std::env::var_os("PATH").unwrap_or_default())
        .map(|dir| dir.join(name))
        .find(|p| p.is_file())
        .unwrap_or_else(|| PathBuf::from(name))
}
