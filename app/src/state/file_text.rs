//! Study files: what is written when a study is saved, and what may be opened.
//!
//! A study whose numbers can all be read is written in the format of the core. One with a text
//! that is no number yet is written as typed, so that nothing is lost.

use super::draft::{DRAFT_VERSION, Draft};
use unstir_core::study::{MAX_FILE_BYTES, parse, to_text};

/// Name and text of the file for `draft`.
pub fn file_of(draft: &Draft) -> (String, String) {
    let stem = file_stem(&draft.name);
    match draft.to_unjudged_study() {
        Ok(study) => (format!("{stem}.json"), to_text(&study)),
        Err(_) => (format!("{stem}-as-typed.json"), serde_json::to_string_pretty(draft).unwrap_or_default()),
    }
}

/// The study in a file.
///
/// # Errors
/// Why the text is no study, for the user.
pub fn draft_of(text: &str) -> Result<Draft, String> {
    if text.len() <= MAX_FILE_BYTES
        && let Ok(draft) = serde_json::from_str::<Draft>(text)
        && draft.unstir_draft == DRAFT_VERSION
    {
        return Ok(draft.repaired());
    }
    parse(text).map(|study| Draft::from_study(&study)).map_err(|p| p.message)
}

/// A file name from the name of a study: letters, digits and hyphens.
fn file_stem(name: &str) -> String {
    let mut stem = String::new();
    for c in name.trim().chars().take(60) {
        if c.is_alphanumeric() {
            stem.extend(c.to_lowercase());
        } else if !stem.ends_with('-') && !stem.is_empty() {
            stem.push('-');
        }
    }
    let stem = stem.trim_end_matches('-');
    if stem.is_empty() { "study".to_owned() } else { stem.to_owned() }
}

#[cfg(test)]
mod tests {
    use super::super::demos::DEMOS;
    use super::*;

    #[test]
    fn a_saved_file_opens_as_the_same_study() {
        for demo in DEMOS {
            let draft = draft_of(demo.text).unwrap();
            let (name, text) = file_of(&draft);
            assert!(name.ends_with(".json"), "{name}");
            assert_eq!(draft_of(&text).unwrap(), draft);
        }
    }

    #[test]
    fn a_half_typed_study_is_saved_as_typed() {
        let mut draft = Draft::blank();
        draft.feed.ph.value = "3.".into();
        draft.name = "Sirup / Öl 2".into();
        let (name, text) = file_of(&draft);
        assert_eq!(name, "sirup-öl-2-as-typed.json");
        assert_eq!(draft_of(&text).unwrap(), draft);
    }

    #[test]
    fn other_files_are_refused_in_words() {
        for text in ["", "hello", "[1]", "{\"a\": 1}", "{\"unstir_study\": 7}"] {
            assert!(!draft_of(text).unwrap_err().is_empty());
        }
        assert!(draft_of("{\"a\": 1}").unwrap_err().contains("not a study"));
    }
}
