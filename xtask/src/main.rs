//! Tools of the project: `cargo xtask`.
#![forbid(unsafe_code)]

mod bench;
mod page;
mod say;
mod site;
mod solve;
mod test;
mod tools;

use std::path::{Path, PathBuf};
use std::process::ExitCode;

/// What a tool says when it cannot go on: a plain sentence.
type Result<T = ()> = std::result::Result<T, String>;

const HELP: &str = "cargo xtask COMMAND

  open [--no-browser]   build the page and open it from disk
  test                  every check, as the continuous integration runs it
  build                 dist/unstir.html (one file) and dist/site/ (for any static server)
  solve STUDY.json      the plan of a study file as JSON
  bench                 how long a plan takes
  schema [--check]      write the JSON Schema of the study file, or only say whether it is current
  serve                 live reload while working on the page";

fn main() -> ExitCode {
    let args: Vec<String> = std::env::args().skip(1).collect();
    let words: Vec<&str> = args.iter().map(String::as_str).collect();
    let done = match words.as_slice() {
        ["open"] => page::open(true),
        ["open", "--no-browser"] => page::open(false),
        ["test"] => test::all(),
        ["build"] => page::build().and_then(|()| site::build()),
        ["solve", file] => solve::print(Path::new(file)),
        ["bench"] => bench::print(),
        ["schema"] => solve::write_schema(),
        ["schema", "--check"] => solve::check_schema(),
        ["serve"] => site::serve(),
        [] | ["help" | "--help" | "-h"] => {
            println!("{HELP}");
            Ok(())
        }
        other => Err(format!("there is no command “{}”.\n\n{HELP}", other.join(" "))),
    };
    match done {
        Ok(()) => ExitCode::SUCCESS,
        Err(sentence) => {
            eprintln!("{sentence}");
            ExitCode::FAILURE
        }
    }
}

/// The folder that holds the workspace.
fn root() -> PathBuf {
    let here = PathBuf::from(env!("CARGO_MANIFEST_DIR"));
    here.parent().map(Path::to_path_buf).unwrap_or(here)
}

/// Where built pages go.
fn dist() -> PathBuf {
    root().join("dist")
}

/// Where cargo builds.
fn target() -> PathBuf {
    root().join(std::env::var_os("CARGO_TARGET_DIR").unwrap_or_else(|| "target".into()))
}
