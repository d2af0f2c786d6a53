//! Helpers shared by the checks.

use std::collections::BTreeMap;
use std::path::PathBuf;

/// A file under `tests/data`.
pub fn data(path: &str) -> PathBuf {
    PathBuf::from(env!("CARGO_MANIFEST_DIR")).join("data").join(path)
}

/// One published case: inputs and expected numbers by name, with tolerance and source.
#[derive(Debug)]
pub struct Case {
    /// Stable identifier.
    pub id: String,
    /// The problem in our own words.
    pub statement: String,
    inputs: BTreeMap<String, Vec<f64>>,
    /// Expected numbers by name.
    pub expected: BTreeMap<String, f64>,
    tolerance: BTreeMap<String, (bool, f64)>,
    /// Where the expected numbers were published, or why there is no published number.
    pub source: String,
}

impl Case {
    /// All numbers of an input.
    ///
    /// # Panics
    /// If the row has no such input: a mistake in the check itself.
    pub fn all(&self, key: &str) -> &[f64] {
        self.inputs.get(key).unwrap_or_else(|| panic!("{}: no input {key} in {:?}", self.id, self.inputs))
    }

    /// All numbers of an input, if the row has it.
    pub fn get(&self, key: &str) -> Option<&[f64]> {
        self.inputs.get(key).map(Vec::as_slice)
    }

    /// The single number of an input.
    pub fn num(&self, key: &str) -> f64 {
        self.all(key)[0]
    }

    /// Whether `value` is the expected number `key`, within the row's tolerance; else why not.
    pub fn judge(&self, key: &str, value: f64) -> Result<(), String> {
        let Some(&expected) = self.expected.get(key) else {
            return Err(format!("{}: the row has no number {key}", self.id));
        };
        let Some(&(relative, size)) = self.tolerance.get(key) else {
            return Err(format!("{}: no tolerance for {key}", self.id));
        };
        let room = if relative { size * expected.abs() } else { size };
        // A hair for the decimal tolerance itself.
        if (value - expected).abs() <= room * (1.0 + 1e-9) + 1e-15 {
            Ok(())
        } else {
            Err(format!("{} {key}: {value} against {expected} ± {room} ({})", self.id, self.source))
        }
    }
}

/// The rows of a table of published cases.
///
/// # Panics
/// If the table cannot be read: a mistake in the check itself.
pub fn cases(path: &str) -> Vec<Case> {
    let text = std::fs::read_to_string(data(path)).unwrap_or_else(|e| panic!("{path}: {e}"));
    let mut reader = csv::Reader::from_reader(text.as_bytes());
    let pairs = |text: &str| -> Vec<(String, String)> {
        text.split(';').filter_map(|p| p.split_once('=')).map(|(k, v)| (k.trim().into(), v.trim().into())).collect()
    };
    reader
        .records()
        .map(|r| r.expect("a readable row"))
        .map(|r| Case {
            id: r[0].to_owned(),
            statement: r[1].to_owned(),
            inputs: pairs(&r[2]).into_iter().map(|(k, v)| (k, numbers(&v))).collect(),
            expected: pairs(&r[3]).into_iter().map(|(k, v)| (k, v.parse().expect("a number"))).collect(),
            tolerance: pairs(&r[4])
                .into_iter()
                .filter_map(|(k, v)| {
                    let (kind, size) = v.split_once(':')?;
                    Some((k, (kind == "rel", size.parse().ok()?)))
                })
                .collect(),
            source: r[5].to_owned(),
        })
        .collect()
}

/// The numbers of an input: commas part a list, `u` parts a value from its uncertainty.
fn numbers(text: &str) -> Vec<f64> {
    text.split([',', ' ']).filter_map(|p| p.parse().ok()).collect()
}
