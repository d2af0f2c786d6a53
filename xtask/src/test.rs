//! Everything the continuous integration runs, in order; stops at the first failure.

use crate::tools::{self, cargo, run};
use crate::{Result, dist, page, say, site};
use std::process::Command;
use std::time::Instant;

/// Largest one-file page [kB].
const PAGE_BUDGET_KB: f64 = 900.0;
/// Largest hosted transfer, compressed [kB]. The aim is 350; this holds what has been reached.
const TRANSFER_BUDGET_KB: f64 = 545.0;

/// Runs everything.
pub fn all() -> Result {
    let start = Instant::now();
    tools::wasm_target()?;
    let browser = tools::browser()?;

    say::step("Formatting");
    run(cargo().args(["fmt", "--all", "--check"])).map_err(|e| format!("{e} Run `cargo fmt --all`."))?;

    say::step("Lints, natively and for the page (about 3 minutes the first time)");
    run(cargo().args(["clippy", "--quiet", "--workspace", "--all-targets", "--locked", "--", "-D", "warnings"]))?;
    run(cargo().args([
        "clippy",
        "--quiet",
        "--package",
        "unstir-app",
        "--target",
        "wasm32-unknown-unknown",
        "--locked",
        "--",
        "-D",
        "warnings",
    ]))?;

    page::build()?;
    site::build()?;
    sizes()?;

    say::step("Same digits in the page: the parity test in Chromium (about a minute the first time)");
    let driver = browser.driver.to_string_lossy().into_owned();
    run(cargo()
        // Not quiet: cargo would hand the word on to the runner, which does not know it.
        .args(["test", "--locked", "--package", "unstir-checks", "--target", "wasm32-unknown-unknown"])
        .args(["--test", "parity"])
        .env("CARGO_TARGET_WASM32_UNKNOWN_UNKNOWN_RUNNER", "wasm-bindgen-test-runner")
        .env("WASM_BINDGEN_USE_BROWSER", "1")
        .env("WASM_BINDGEN_TEST_TIMEOUT", "120")
        .env("PATH", tools::path_with_tools())
        .env("CHROMEDRIVER", &driver))?;

    say::step("Checks, properties and journeys on the built page (about 3 minutes the first time)");
    run(cargo()
        .args(["test", "--workspace", "--locked"])
        .env("UNSTIR_PAGE", dist().join("unstir.html"))
        .env("CHROMEDRIVER", &driver)
        .env("CHROMIUM", &browser.chromium))?;
    say::done(&format!("Every check passed, in {}.", say::since(start)));
    Ok(())
}

/// Holds the pages to their size.
fn sizes() -> Result {
    let one_file = say::kilobytes(&dist().join("unstir.html"));
    if one_file > PAGE_BUDGET_KB {
        return Err(format!("dist/unstir.html is {one_file:.0} kB; it may be {PAGE_BUDGET_KB:.0} kB."));
    }
    let mut transfer = 0.0;
    for entry in std::fs::read_dir(dist().join("site")).map_err(|e| format!("dist/site could not be read: {e}."))? {
        let path = entry.map_err(|e| e.to_string())?.path();
        let packed = Command::new("gzip").arg("-9c").arg(&path).output();
        transfer += match packed {
            Ok(out) if out.status.success() => out.stdout.len() as f64 / 1000.0,
            _ => {
                say::done("gzip was not found: the size of the hosted transfer is not checked.");
                return Ok(());
            }
        };
    }
    say::done(&format!("One file {one_file:.0} kB; hosted transfer {transfer:.0} kB compressed."));
    if transfer > TRANSFER_BUDGET_KB {
        return Err(format!("dist/site is {transfer:.0} kB compressed; it may be {TRANSFER_BUDGET_KB:.0} kB."));
    }
    Ok(())
}
