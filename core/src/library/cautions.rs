//! Cautions for the bench, and what hazard codes mean.

use super::sources::Source;
use super::table::{Loaded, Row, load};
use std::sync::OnceLock;

/// How grave a caution or a hazard statement is.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum SignWord {
    /// Lesser injury, or harm that builds up.
    Warning,
    /// Serious injury, fire or death.
    Danger,
}

impl SignWord {
    /// The word as printed on labels.
    pub fn word(self) -> &'static str {
        match self {
            Self::Warning => "Warning",
            Self::Danger => "Danger",
        }
    }

    fn parse(text: &str) -> Result<Self, String> {
        match text {
            "Warning" => Ok(Self::Warning),
            "Danger" => Ok(Self::Danger),
            other => Err(format!("neither Warning nor Danger: {other}")),
        }
    }
}

/// The step of the flow beside which a caution belongs.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum CautionStep {
    /// Every step.
    Any,
    /// Receiving the liquid and taking water off.
    Feed,
    /// Adjusting pH.
    Ionisation,
    /// Choosing, opening and pouring the solvent.
    Solvent,
    /// Mixing, venting, settling and draining.
    Portions,
    /// Drying, evaporating and handling the isolate; solvent waste.
    Isolate,
    /// Removing dissolved solvent.
    Strip,
    /// Making up and re-carbonation.
    MakeUp,
    /// Melting range, plate, calibration.
    Evidence,
}

/// One caution: what can happen, and what to do about it.
#[derive(Clone, Debug, PartialEq)]
pub struct Caution {
    /// How grave it is.
    pub sign_word: SignWord,
    /// The step it belongs beside.
    pub step: CautionStep,
    /// What can happen, in one or two plain sentences.
    pub what_can_happen: String,
    /// What to do, in short plain sentences.
    pub what_to_do: String,
    /// Where it comes from.
    pub source: Source,
}

/// A hazard statement of the GHS, or a supplemental one of the EU.
#[derive(Clone, Debug, PartialEq)]
pub struct HazardStatement {
    /// Code, e.g. `H225` or `EUH066`.
    pub code: String,
    /// Wording.
    pub meaning: String,
    /// Signal word that goes with it; `None` when it has none.
    pub signal_word: Option<SignWord>,
    /// Where the wording comes from.
    pub source: Source,
}

/// Subject of the cautions that hold for every solvent.
const ANY: &str = "any";

/// Cautions of this solvent alone, in the order of the file. Those that hold for every
/// solvent come from [`general_cautions`]; show both.
pub fn cautions_for(solvent_id: &str) -> Vec<Caution> {
    cautions()
        .items
        .iter()
        .filter(|(subjects, _)| subjects.iter().any(|s| s == solvent_id))
        .map(|(_, caution)| caution.clone())
        .collect()
}

/// Cautions that hold whatever the solvent.
pub fn general_cautions() -> Vec<Caution> {
    cautions_for(ANY)
}

/// What a hazard code means.
pub fn hazard_statement(code: &str) -> Option<HazardStatement> {
    statements().items.iter().find(|statement| statement.code == code).cloned()
}

fn cautions() -> &'static Loaded<(Vec<String>, Caution)> {
    static TABLE: OnceLock<Loaded<(Vec<String>, Caution)>> = OnceLock::new();
    TABLE.get_or_init(|| load(include_str!("../../data/cautions.csv"), parse_caution))
}

fn statements() -> &'static Loaded<HazardStatement> {
    static TABLE: OnceLock<Loaded<HazardStatement>> = OnceLock::new();
    TABLE.get_or_init(|| load(include_str!("../../data/hazard_statements.csv"), parse_statement))
}

fn parse_caution(row: &Row) -> Result<(Vec<String>, Caution), String> {
    let caution = Caution {
        sign_word: SignWord::parse(row.text("sign_word")?)?,
        step: match row.text("step")? {
            "any" => CautionStep::Any,
            "feed" => CautionStep::Feed,
            "ionisation" => CautionStep::Ionisation,
            "solvent" => CautionStep::Solvent,
            "portions" => CautionStep::Portions,
            "isolate" => CautionStep::Isolate,
            "strip" => CautionStep::Strip,
            "make_up" => CautionStep::MakeUp,
            "evidence" => CautionStep::Evidence,
            other => return Err(format!("step is none of the known words: {other}")),
        },
        what_can_happen: row.required("what_can_happen")?,
        what_to_do: row.required("what_to_do")?,
        source: row.source("source")?,
    };
    row.required("subject")?;
    Ok((row.list("subject")?, caution))
}

fn parse_statement(row: &Row) -> Result<HazardStatement, String> {
    Ok(HazardStatement {
        code: row.required("code")?,
        meaning: row.required("meaning")?,
        signal_word: match row.text("signal_word")? {
            "" => None,
            word => Some(SignWord::parse(word)?),
        },
        source: row.source("source")?,
    })
}

#[cfg(test)]
mod tests {
    use super::super::solvents::{PeroxideClass, solvents};
    use super::*;

    #[test]
    fn every_row_parses() {
        assert_eq!(cautions().defects, Vec::<String>::new());
        assert_eq!(statements().defects, Vec::<String>::new());
    }

    #[test]
    fn every_subject_is_a_solvent_or_any() {
        let ids: Vec<String> = solvents().into_iter().map(|s| s.id).collect();
        for subject in cautions().items.iter().flat_map(|(subjects, _)| subjects) {
            assert!(subject == ANY || ids.contains(subject), "{subject}");
        }
        assert!(cautions_for("water").is_empty());
    }

    #[test]
    fn every_solvent_says_how_to_vent_and_where_waste_goes() {
        for s in solvents() {
            let own = cautions_for(&s.id);
            assert!(own.iter().any(|c| c.step == CautionStep::Solvent), "{}", s.id);
            assert!(own.iter().any(|c| c.step == CautionStep::Portions), "{}", s.id);
            assert!(own.iter().any(|c| c.what_to_do.contains("waste stream")), "{}", s.id);
            assert!(!s.is_flammable() || own.iter().any(|c| c.what_to_do.contains("No flame")), "{}", s.id);
            let peroxides = own.iter().any(|c| c.what_can_happen.contains("peroxides"));
            assert_eq!(peroxides, s.peroxide_class != PeroxideClass::No, "{}", s.id);
            let aspiration = own.iter().any(|c| c.what_can_happen.contains("into the lungs"));
            assert_eq!(aspiration, s.h_codes.iter().any(|code| code == "H304"), "{}", s.id);
            let cancer = own.iter().any(|c| c.what_can_happen.contains("causing cancer"));
            assert_eq!(cancer, s.h_codes.iter().any(|code| code == "H351"), "{}", s.id);
        }
    }

    #[test]
    fn the_general_cautions_are_there() {
        let all = general_cautions();
        for phrase in ["local rules and licensed practice decide", "prevails", "Never heat a closed vessel"] {
            assert!(all.iter().any(|c| c.what_to_do.contains(phrase)), "{phrase}");
        }
        for phrase in ["implode", "gassy", "builds pressure", "peroxides"] {
            assert!(all.iter().any(|c| c.what_can_happen.contains(phrase)), "{phrase}");
        }
    }

    /// Sentences are read at the bench, at arm's length: keep them short, and promise nothing.
    #[test]
    fn cautions_are_short_and_promise_nothing() {
        for (subjects, caution) in &cautions().items {
            for text in [&caution.what_can_happen, &caution.what_to_do] {
                assert!(text.len() <= 200 && text.ends_with('.'), "{subjects:?}: {text}");
                let lower = text.to_lowercase();
                for word in ["is safe", "is legal", "harmless", "permitted"] {
                    assert!(!lower.contains(word), "{subjects:?}: {text}");
                }
            }
        }
    }

    #[test]
    fn wording_is_the_published_one() {
        // CLP Annex III and, for EUH066, Annex II 1.2.4.
        let statement = hazard_statement("H225").unwrap();
        assert_eq!(statement.meaning, "Highly flammable liquid and vapour");
        assert_eq!(statement.signal_word, Some(SignWord::Danger));
        let statement = hazard_statement("EUH066").unwrap();
        assert_eq!(statement.meaning, "Repeated exposure may cause skin dryness or cracking");
        assert_eq!(statement.signal_word, None);
        assert_eq!(hazard_statement("H999"), None);
    }
}
