//! A study file in, its plan as JSON out; and the schema of the file.

use crate::{Result, root, say};
use std::io::{ErrorKind, Write};
use std::path::{Path, PathBuf};
use unstir_core::study::{self, MAX_FILE_BYTES};

/// The text of a study file, if it is not too large.
fn read(file: &Path) -> Result<String> {
    let name = file.display();
    let size = std::fs::metadata(file).map_err(|e| format!("{name} could not be read: {e}."))?.len();
    if size > MAX_FILE_BYTES as u64 {
        return Err(format!("{name} holds {size} bytes; a study file may hold at most {MAX_FILE_BYTES}."));
    }
    let bytes = std::fs::read(file).map_err(|e| format!("{name} could not be read: {e}."))?;
    String::from_utf8(bytes).map_err(|_| format!("{name} is not a text file; a study is JSON in UTF-8."))
}

/// Prints the plan of `file`.
pub fn print(file: &Path) -> Result {
    match unstir_core::solve::solve_text(&read(file)?) {
        Ok(json) => match writeln!(std::io::stdout(), "{json}") {
            // A reader that has seen enough, like `head`, is no failure.
            Err(e) if e.kind() != ErrorKind::BrokenPipe => Err(format!("the plan could not be written: {e}.")),
            _ => Ok(()),
        },
        Err(problems) => {
            let lines: Vec<String> = problems.iter().map(|p| format!("  {p}")).collect();
            Err(format!("{} cannot be planned:\n{}", file.display(), lines.join("\n")))
        }
    }
}

/// Where the schema is kept.
fn schema_file() -> PathBuf {
    root().join("core/study.schema.json")
}

/// Says whether `core/study.schema.json` is what the code gives.
pub fn check_schema() -> Result {
    let path = schema_file();
    if std::fs::read_to_string(&path).is_ok_and(|text| text == study::schema_text()) {
        say::done(&format!("{} is current.", path.display()));
        return Ok(());
    }
    Err(format!("{} differs from the code; run `cargo xtask schema`.", path.display()))
}

/// Writes `core/study.schema.json`.
pub fn write_schema() -> Result {
    let path = schema_file();
    std::fs::write(&path, study::schema_text())
        .map_err(|e| format!("{} could not be written: {e}.", path.display()))?;
    say::done(&format!("{} is current.", path.display()));
    Ok(())
}
