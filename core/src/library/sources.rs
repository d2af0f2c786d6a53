//! Where a value was taken from, and how far that was checked.
//!
//! The tables name sources by short keys of `sources.csv`: `key`, `key+key`, or `key|detail`.

use super::table::{Loaded, load};
use std::sync::OnceLock;

/// How far a value was checked against the document named beside it.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Checked {
    /// The number was read in the document or data set itself.
    Read,
    /// The number was read in a text that quotes the document.
    Quoted,
    /// Computed by us from numbers that were read.
    Calculated,
    /// Part of it was read, part is from memory.
    Part,
    /// From memory: the document is believed to say so and was not at hand.
    Memory,
    /// No value is held.
    NotHeld,
}

impl Checked {
    /// The word shown beside the value.
    pub fn word(self) -> &'static str {
        match self {
            Self::Read => "read",
            Self::Quoted => "quoted",
            Self::Calculated => "calculated",
            Self::Part => "part memory",
            Self::Memory => "memory",
            Self::NotHeld => "not held",
        }
    }

    fn of_both(self, other: Self) -> Self {
        match (self, other) {
            (a, b) if a == b => a,
            (Self::NotHeld, a) | (a, Self::NotHeld) => a,
            (Self::Memory | Self::Part, _) | (_, Self::Memory | Self::Part) => Self::Part,
            (Self::Quoted, _) | (_, Self::Quoted) => Self::Quoted,
            _ => Self::Calculated,
        }
    }
}

/// The source of a value or a group of values.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Source {
    /// The document or data set; several are parted by semicolons.
    pub citation: String,
    /// What else was seen: other printed values, conversions. Often blank.
    pub detail: String,
    /// How far it was checked.
    pub checked: Checked,
}

struct Entry {
    key: String,
    citation: String,
    checked: Checked,
}

fn entries() -> &'static Loaded<Entry> {
    static ENTRIES: OnceLock<Loaded<Entry>> = OnceLock::new();
    ENTRIES.get_or_init(|| {
        load(include_str!("../../data/sources.csv"), |row| {
            Ok(Entry {
                key: row.required("key")?,
                citation: row.required("citation")?,
                checked: match row.text("checked")? {
                    "read" => Checked::Read,
                    "quoted" => Checked::Quoted,
                    "calculated" => Checked::Calculated,
                    "memory" => Checked::Memory,
                    "none" => Checked::NotHeld,
                    other => return Err(format!("checked is none of the known words: {other}")),
                },
            })
        })
    })
}

/// The source behind `cell`: keys joined by `+`, then a detail after `|` if there is one.
/// With several keys the tag is that of the least checked, or [`Checked::Part`] when some of
/// them were read and some not.
pub(crate) fn resolve(cell: &str) -> Result<Source, String> {
    let (keys, detail) = cell.split_once('|').unwrap_or((cell, ""));
    let mut citation = String::new();
    let mut checked = None;
    for key in keys.split('+') {
        let entry = entries().items.iter().find(|entry| entry.key == key).ok_or_else(|| format!("no source {key}"))?;
        if !citation.is_empty() {
            citation.push_str("; ");
        }
        citation.push_str(&entry.citation);
        checked = Some(checked.map_or(entry.checked, |so_far: Checked| so_far.of_both(entry.checked)));
    }
    let checked = checked.ok_or("no source named")?;
    Ok(Source { citation, detail: detail.to_owned(), checked })
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Every table that names sources.
    const TABLES: [&str; 13] = [
        include_str!("../../data/solvents.csv"),
        include_str!("../../data/exposure_limits.csv"),
        include_str!("../../data/residual_limits.csv"),
        include_str!("../../data/hazard_statements.csv"),
        include_str!("../../data/cautions.csv"),
        include_str!("../../data/partition.csv"),
        include_str!("../../data/solutes.csv"),
        include_str!("../../data/pka_readings.csv"),
        include_str!("../../data/activity_constants.csv"),
        include_str!("../../data/free_energy_systems.csv"),
        include_str!("../../data/descriptors.csv"),
        include_str!("../../data/sucrose.csv"),
        include_str!("../../data/henry.csv"),
    ];

    /// The whole library travels in the one-file page, whose size is bounded.
    const TOTAL_BYTES_MAX: usize = 90_000;

    #[test]
    fn every_row_parses_and_keys_are_unique() {
        let Loaded { items, defects } = entries();
        assert_eq!(defects, &Vec::<String>::new());
        for (i, entry) in items.iter().enumerate() {
            assert!(items.iter().skip(i + 1).all(|other| other.key != entry.key), "{}", entry.key);
            assert!(TABLES.iter().any(|table| table.contains(&entry.key)), "{} is not used", entry.key);
        }
    }

    #[test]
    fn the_library_stays_small() {
        let bytes: usize = TABLES.iter().map(|table| table.len()).sum();
        assert!(bytes + include_str!("../../data/sources.csv").len() < TOTAL_BYTES_MAX);
    }

    #[test]
    fn several_keys_keep_the_weakest_tag() {
        let both = resolve("aqsoldb+memory|26.0-31.9 g/L").unwrap();
        assert_eq!(both.checked, Checked::Part);
        assert_eq!(both.detail, "26.0-31.9 g/L");
        assert!(both.citation.contains("; "));
        assert_eq!(resolve("aqsoldb+sds88").unwrap().checked, Checked::Quoted);
        assert_eq!(resolve("crc_sol+riddick").unwrap().checked, Checked::Memory);
        assert!(resolve("nowhere").is_err());
        assert!(resolve("").is_err());
    }
}
