//! Reading and writing study files.

use super::{Problem, Study, VERSION};

/// Largest study file read [bytes].
pub const MAX_FILE_BYTES: usize = 1_048_576;

/// The study in `text`, or what is wrong with the text.
///
/// Refused: text over [`MAX_FILE_BYTES`], text that is not JSON, JSON that is not a study, a
/// version this program does not know, and unknown fields. Values are not judged here: see
/// [`super::check`].
pub fn parse(text: &str) -> Result<Study, Problem> {
    if text.len() > MAX_FILE_BYTES {
        return Err(Problem::new(
            "file",
            format!(
                "the file holds {} bytes; a study file may hold at most {MAX_FILE_BYTES}. \
                 Check that it is a study and not something else",
                text.len()
            ),
        ));
    }
    let value: serde_json::Value =
        serde_json::from_str(text).map_err(|e| Problem::new("file", format!("this is not readable JSON: {e}")))?;
    match value.get("unstir_study").map(|v| v.as_u64()) {
        None => {
            return Err(Problem::new(
                "unstir_study",
                "this JSON is not a study: it has no field \"unstir_study\". Choose a file saved from this tool",
            ));
        }
        Some(Some(v)) if v == u64::from(VERSION) => {}
        Some(v) => {
            let found = v.map_or_else(|| "not a number".to_owned(), |v| v.to_string());
            return Err(Problem::new(
                "unstir_study",
                format!("the file's version is {found}; this program reads version {VERSION}"),
            ));
        }
    }
    // Read again from the text, so that a message can name line and column.
    serde_json::from_str(text).map_err(|e| Problem::new("file", format!("the study cannot be read: {e}")))
}

/// The study as the text of a file.
pub fn to_text(study: &Study) -> String {
    // Plain structs of numbers and strings: only a non-finite number could go wrong, and it is
    // written as null rather than failing.
    serde_json::to_string_pretty(study).unwrap_or_default()
}

/// The JSON Schema of a study file.
#[cfg(feature = "schema")]
pub fn schema_text() -> String {
    let mut schema = serde_json::to_value(schemars::schema_for!(Study)).unwrap_or_default();
    // Members keep their order only where some other crate asks serde_json for it.
    schema.sort_all_objects();
    let mut text = serde_json::to_string_pretty(&schema).unwrap_or_default();
    text.push('\n');
    text
}
