//! Limits of the solvent that stays in a product, as listed.

use super::sources::Source;
use super::table::{Loaded, Row, load};
use serde::{Deserialize, Serialize};
use std::sync::OnceLock;

/// What the liquid is for.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
#[cfg_attr(feature = "schema", derive(schemars::JsonSchema))]
#[serde(rename_all = "snake_case")]
pub enum Purpose {
    /// To be drunk or eaten.
    #[default]
    DrinkOrFood,
    /// A flavouring, for use in food.
    Flavour,
    /// A medicine or part of one.
    Medicine,
    /// Neither: cleaning, analysis, trial.
    Technical,
}

/// A list of limits.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum LimitList {
    /// ICH Q3C, residual solvents in medicines.
    Ich,
    /// Directive 2009/32/EC, extraction solvents in food, European Union.
    Eu,
    /// 21 CFR part 173, solvents in food, United States.
    Us,
}

impl LimitList {
    /// Its name.
    pub fn name(self) -> &'static str {
        match self {
            Self::Ich => "ICH Q3C",
            Self::Eu => "EU 2009/32/EC",
            Self::Us => "21 CFR 173",
        }
    }

    /// Whether it speaks of this purpose.
    pub fn speaks_of(self, purpose: Purpose) -> bool {
        match purpose {
            Purpose::DrinkOrFood | Purpose::Flavour => matches!(self, Self::Eu | Self::Us),
            Purpose::Medicine => self == Self::Ich,
            Purpose::Technical => false,
        }
    }
}

/// What one list says of one solvent in one product.
#[derive(Clone, Debug, PartialEq)]
pub struct ResidualLimit {
    /// The solvent.
    pub solvent_id: String,
    /// The list.
    pub list: LimitList,
    /// Class within the list; `not listed` where no entry was found.
    pub class: String,
    /// Permitted daily exposure [mg/day].
    pub pde_mg_per_day: Option<f64>,
    /// Limit, in `unit`; none where the list gives no number.
    pub value: Option<f64>,
    /// Unit of the limit as listed, e.g. `mg/kg`.
    pub unit: String,
    /// The product it is for.
    pub product: String,
    /// Condition or use.
    pub condition: String,
    /// Where it was read.
    pub source: Source,
}

impl ResidualLimit {
    /// Whether the list has an entry at all.
    pub fn is_listed(&self) -> bool {
        self.class != "not listed"
    }

    /// The entry in words, never as a permission.
    pub fn words(&self) -> String {
        if !self.is_listed() {
            return "not found in it".to_owned();
        }
        let mut words = match self.value {
            Some(v) => format!("{v} {} in {}", self.unit, self.product),
            None => format!("no number for {}", self.product),
        };
        if let Some(pde) = self.pde_mg_per_day {
            words.push_str(&format!("; permitted daily exposure {pde} mg"));
        }
        if !self.condition.is_empty() {
            words.push_str(&format!(" ({})", self.condition));
        }
        words
    }
}

/// What the lists say of this solvent, for this purpose.
pub fn residual_limits(solvent_id: &str, purpose: Purpose) -> Vec<&'static ResidualLimit> {
    table().items.iter().filter(|l| l.solvent_id == solvent_id && l.list.speaks_of(purpose)).collect()
}

/// Permitted daily exposure of this solvent [mg/day], with its source; from ICH Q3C, which is for
/// medicines.
pub fn permitted_daily_exposure(solvent_id: &str) -> Option<(f64, &'static Source)> {
    table().items.iter().find(|l| l.solvent_id == solvent_id).and_then(|_| {
        let with = |l: &&ResidualLimit| l.solvent_id == solvent_id && l.pde_mg_per_day.is_some();
        table().items.iter().find(with).and_then(|l| l.pde_mg_per_day.map(|v| (v, &l.source)))
    })
}

fn table() -> &'static Loaded<ResidualLimit> {
    static TABLE: OnceLock<Loaded<ResidualLimit>> = OnceLock::new();
    TABLE.get_or_init(|| load(include_str!("../../data/residual_limits.csv"), parse))
}

fn parse(row: &Row) -> Result<ResidualLimit, String> {
    Ok(ResidualLimit {
        solvent_id: row.required("solvent_id")?,
        list: match row.text("list")? {
            "ich" => LimitList::Ich,
            "eu" => LimitList::Eu,
            "us" => LimitList::Us,
            other => return Err(format!("list is none of the known words: {other}")),
        },
        class: row.owned("class")?,
        pde_mg_per_day: row.optional_number("pde_mg_day")?,
        value: row.optional_number("value")?,
        unit: row.owned("unit")?,
        product: row.owned("product")?,
        condition: row.owned("condition")?,
        source: row.source("source")?,
    })
}

#[cfg(test)]
mod tests {
    use super::super::solvents::solvents;
    use super::*;

    #[test]
    fn every_solvent_is_in_every_list_or_said_not_to_be() {
        assert_eq!(table().defects, Vec::<String>::new());
        for s in solvents() {
            for purpose in [Purpose::DrinkOrFood, Purpose::Flavour, Purpose::Medicine] {
                assert!(!residual_limits(&s.id, purpose).is_empty(), "{} {purpose:?}", s.id);
            }
            assert!(residual_limits(&s.id, Purpose::Technical).is_empty());
            assert!(permitted_daily_exposure(&s.id).is_some(), "{}", s.id);
        }
    }

    /// ICH Q3C(R8), from memory: dichloromethane 6 mg/day and, in a dose of 10 g a day, 600 ppm.
    #[test]
    fn a_limit_is_the_daily_exposure_over_ten_grams() {
        let all = residual_limits("dichloromethane", Purpose::Medicine);
        assert_eq!((all[0].pde_mg_per_day, all[0].value), (Some(6.0), Some(600.0)));
        for l in table().items.iter().filter(|l| l.list == LimitList::Ich) {
            let (pde, ppm) = (l.pde_mg_per_day.unwrap(), l.value.unwrap());
            assert!((1000.0 * pde / 10.0 - ppm).abs() < 1e-9, "{}", l.solvent_id);
        }
    }

    #[test]
    fn words_do_not_permit() {
        for l in &table().items {
            let words = l.words().to_lowercase();
            assert!(!words.contains("safe") && !words.contains("allowed") && !words.contains("legal"), "{words}");
        }
    }
}
