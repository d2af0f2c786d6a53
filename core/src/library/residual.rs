//! Limits for what may be left of a solvent, as listed; none of it is legal advice.
//!
//! Three lists are held: ICH Q3C (medicines), Directive 2009/32/EC (extraction solvents for food
//! and its ingredients) and 21 CFR 173 with 172.560 (United States). A list says what it lists; it
//! does not say that a use is in order. The words made here keep to that.

use super::sources::Source;
use super::table::{Loaded, Row, load};
use serde::{Deserialize, Serialize};
use std::sync::OnceLock;

/// What the treated liquid is for; it picks the lists that speak about it.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
#[cfg_attr(feature = "schema", derive(schemars::JsonSchema))]
#[serde(rename_all = "snake_case")]
pub enum Purpose {
    /// A food or a drink.
    #[default]
    DrinkOrFood,
    /// A flavouring that goes into food.
    Flavour,
    /// A medicine.
    Medicine,
    /// Neither eaten nor taken.
    Technical,
}

/// A list of limits.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum List {
    /// ICH Q3C, residual solvents in medicines.
    IchQ3c,
    /// Directive 2009/32/EC, Annex I.
    Eu2009_32,
    /// 21 CFR 173, subpart C, and 172.560.
    Cfr21,
}

impl List {
    /// Name of the list.
    pub fn name(self) -> &'static str {
        match self {
            Self::IchQ3c => "ICH Q3C",
            Self::Eu2009_32 => "Directive 2009/32/EC",
            Self::Cfr21 => "21 CFR",
        }
    }
}

/// One entry of a list for one substance.
#[derive(Clone, Debug, PartialEq)]
pub struct ResidualLimit {
    /// Id of the solvent in this library, or the substance's name where it is none of them.
    pub substance: String,
    /// The list.
    pub list: List,
    /// `false` for an entry that says the list does not name the substance.
    pub listed: bool,
    /// Where in the list: class, annex and part, or section.
    pub place: String,
    /// Permitted daily exposure [mg/day], where the list gives one.
    pub pde_mg_per_day: Option<f64>,
    /// The limit, in `unit`; `None` where the list gives no number.
    pub value: Option<f64>,
    /// Unit as printed; blank where there is no number.
    pub unit: String,
    /// The same limit [mg/kg].
    pub mg_per_kg: Option<f64>,
    /// What the limit is for.
    pub scope: String,
    /// On what condition; often blank.
    pub condition: String,
    /// Document and edition, with how far it was checked.
    pub source: Source,
    /// A remark; often blank.
    pub note: String,
}

impl ResidualLimit {
    /// The entry in a sentence, which ends by asking for the current law.
    pub fn sentence(&self) -> String {
        let list = self.list.name();
        if !self.listed {
            return format!("Not listed in {list}, {}; check the current law.", self.place);
        }
        let mut words = match self.value {
            Some(value) => format!("{value} {}", self.unit),
            None => "No number".to_owned(),
        };
        if let Some(pde) = self.pde_mg_per_day {
            words.push_str(&format!(" (daily exposure {pde} mg)"));
        }
        words.push_str(&format!(" for {}", self.scope));
        for more in [&self.condition, &self.note] {
            if !more.is_empty() {
                words.push_str(&format!("; {more}"));
            }
        }
        words.push_str(&format!("; as listed in {list}, {}; check the current law.", self.place));
        words
    }
}

/// What the lists say about one solvent for one purpose.
#[derive(Clone, Debug, PartialEq)]
pub struct LimitsFor {
    /// Entries that list it, in the order of the file.
    pub listed: Vec<ResidualLimit>,
    /// Lists that do not name it for this purpose, and lists where nothing was found, in words.
    pub not_listed: Vec<String>,
}

/// Purity of technical hexane under which food law names it.
const HEXANE: &str = "hexane_technical";
/// Scope of the Q3C figures in ppm.
const Q3C_SCOPE: &str = "a medicine of which up to 10 g a day is taken";

/// Every entry, in the order of the file, one for each substance.
pub fn residual_limits() -> Vec<ResidualLimit> {
    table().items.iter().flatten().cloned().collect()
}

/// What the lists say about the solvent `solvent_id` for `purpose`.
///
/// For n-hexane the food lists are read under technical hexane, the name they use. A technical
/// liquid has no list here: nothing is returned but a sentence that says so.
pub fn limits_for(solvent_id: &str, purpose: Purpose) -> LimitsFor {
    let mut out = LimitsFor { listed: Vec::new(), not_listed: Vec::new() };
    let lists: &[List] = match purpose {
        Purpose::Medicine => &[List::IchQ3c],
        Purpose::DrinkOrFood | Purpose::Flavour => &[List::Eu2009_32, List::Cfr21],
        Purpose::Technical => {
            out.not_listed.push("No list of residues is held for a technical liquid: set a limit of your own.".into());
            return out;
        }
    };
    // Part II names foods, Part III flavourings; Part I holds for both.
    let other_purpose = if purpose == Purpose::Flavour { "Annex I Part II" } else { "Annex I Part III" };
    for &list in lists {
        let mut other_part = String::new();
        let mut absent = None;
        let mut found = false;
        for entry in table().items.iter().flatten() {
            let named = entry.substance == solvent_id || (solvent_id == "n_hexane" && entry.substance == HEXANE);
            if entry.list != list || !named {
                continue;
            }
            if !entry.listed {
                absent = Some(entry.sentence());
            } else if entry.place == other_purpose {
                other_part = entry.place.clone();
            } else {
                found = true;
                out.listed.push(entry.clone());
            }
        }
        if found {
            continue;
        }
        out.not_listed.push(match absent {
            Some(sentence) => sentence,
            None if !other_part.is_empty() => format!(
                "Not listed in {} for this purpose (it is in {other_part} only); check the current law.",
                list.name()
            ),
            None => format!("No entry of {} is held for it: not looked up. Check the current law.", list.name()),
        });
    }
    out
}

fn table() -> &'static Loaded<Vec<ResidualLimit>> {
    static TABLE: OnceLock<Loaded<Vec<ResidualLimit>>> = OnceLock::new();
    TABLE.get_or_init(|| load(include_str!("../../data/residual_limits.csv"), parse))
}

fn parse(row: &Row) -> Result<Vec<ResidualLimit>, String> {
    let list = match row.text("list")? {
        "ich" => List::IchQ3c,
        "eu" => List::Eu2009_32,
        "us" => List::Cfr21,
        other => return Err(format!("list is none of the known words: {other}")),
    };
    let value = row.optional_number("value")?;
    let unit = row.owned("unit")?;
    let to_mg_per_kg = match unit.as_str() {
        "" | "ppm" | "mg/kg" => 1.0,
        "ppb" => 1e-3,
        "%" | "% by weight" => 1e4,
        other => return Err(format!("unit is none of the known words: {other}")),
    };
    let scope = match row.text("scope")? {
        "" if list == List::IchQ3c => Q3C_SCOPE.to_owned(),
        "" => return Err("scope is blank".to_owned()),
        text => text.to_owned(),
    };
    row.required("substances")?;
    let entry = ResidualLimit {
        substance: String::new(),
        list,
        listed: row.yes("listed")?,
        place: row.required("place")?,
        pde_mg_per_day: row.optional_number("pde_mg_day")?,
        value,
        unit,
        mg_per_kg: value.map(|v| v * to_mg_per_kg),
        scope,
        condition: row.owned("condition")?,
        source: row.source("source")?,
        note: row.owned("note")?,
    };
    let substances = row.list("substances")?;
    Ok(substances.into_iter().map(|substance| ResidualLimit { substance, ..entry.clone() }).collect())
}

#[cfg(test)]
mod tests {
    use super::super::solvents::solvents;
    use super::super::sources::Checked;
    use super::*;

    #[test]
    fn every_row_parses_and_every_solvent_has_a_word() {
        assert_eq!(table().defects, Vec::<String>::new());
        // 36 substances in ICH Q3C, 51 entries of the EU, 41 of the US.
        let count = |list| residual_limits().iter().filter(|l| l.list == list).count();
        assert_eq!([count(List::IchQ3c), count(List::Eu2009_32), count(List::Cfr21)], [36, 51, 41]);
        for s in solvents() {
            for purpose in [Purpose::DrinkOrFood, Purpose::Flavour, Purpose::Medicine, Purpose::Technical] {
                let said = limits_for(&s.id, purpose);
                assert!(!said.listed.is_empty() || !said.not_listed.is_empty(), "{}", s.id);
            }
        }
    }

    #[test]
    fn numbers_go_with_units_and_class_2_is_100_times_the_exposure() {
        for l in residual_limits() {
            assert_eq!(l.value.is_some(), !l.unit.is_empty(), "{} {}", l.substance, l.place);
            assert!(l.listed || l.value.is_none(), "{} {}", l.substance, l.place);
            assert!(l.source.checked != Checked::NotHeld);
            if let (Some(pde), Some(ppm)) = (l.pde_mg_per_day, l.mg_per_kg) {
                // ICH Q3C, Option 1: 1000 × PDE over a dose of 10 g.
                assert!((ppm - 100.0 * pde).abs() < 1e-9, "{}", l.substance);
            }
        }
    }

    #[test]
    fn published_values_are_carried_as_printed() {
        let value = |id, purpose, place: &str| {
            let all = limits_for(id, purpose).listed;
            all.iter().filter(|l| l.place == place).filter_map(|l| l.value).collect::<Vec<_>>()
        };
        // Directive 2009/32/EC, Annex I Part II: roasted coffee 2, tea 5 mg/kg; Part III 0.02 mg/kg.
        assert_eq!(value("dichloromethane", Purpose::DrinkOrFood, "Annex I Part II"), [2.0, 5.0]);
        assert_eq!(value("dichloromethane", Purpose::Flavour, "Annex I Part III"), [0.02]);
        assert!(value("dichloromethane", Purpose::Flavour, "Annex I Part II").is_empty());
        // 21 CFR 173.255(c).
        assert_eq!(value("dichloromethane", Purpose::DrinkOrFood, "173.255(c)"), [10.0]);
        // ICH Q3C, Tables 2 and 3.
        assert_eq!(value("dichloromethane", Purpose::Medicine, "Class 2"), [600.0]);
        assert_eq!(value("ethyl_acetate", Purpose::Medicine, "Class 3"), [5000.0]);
        // Food law names technical hexane: 1, 10, 30, 5 mg/kg.
        assert_eq!(value("n_hexane", Purpose::DrinkOrFood, "Annex I Part II"), [1.0, 10.0, 30.0, 5.0]);
    }

    #[test]
    fn what_is_not_listed_is_said() {
        let said = limits_for("chloroform", Purpose::DrinkOrFood);
        assert!(said.listed.is_empty());
        assert!(said.not_listed[0].starts_with("Not listed in Directive 2009/32/EC"), "{:?}", said.not_listed);
        assert!(said.not_listed[1].contains("21 CFR"));
        let flavour_only = limits_for("cyclohexane", Purpose::DrinkOrFood);
        assert!(flavour_only.not_listed[0].contains("Part III only"), "{:?}", flavour_only.not_listed);
        let unknown = limits_for("2_butanol", Purpose::Flavour);
        assert!(unknown.not_listed[0].contains("not looked up"), "{:?}", unknown.not_listed);
        assert!(limits_for("toluene", Purpose::Technical).listed.is_empty());
    }

    #[test]
    fn no_sentence_says_that_a_use_is_in_order() {
        for l in residual_limits() {
            let sentence = l.sentence();
            assert!(sentence.ends_with("check the current law."), "{sentence}");
            let lower = sentence.to_lowercase();
            for word in ["legal", "allowed", "permitted", "authorised", "safe", "approved", "acceptable"] {
                assert!(!lower.contains(word), "{sentence}");
            }
        }
    }
}
