//! Solutes with their ionisable sites, and the readings of their constants found in print.

use super::sources::Source;
use super::table::{Loaded, Row, load};
use crate::order::put_in_order;
use std::sync::OnceLock;

/// What a site does.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum SiteKind {
    /// The listed form loses a proton.
    Acid,
    /// The listed form takes a proton; the constant is that of the conjugate acid.
    Base,
}

/// One ionisable site.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Site {
    /// What it does.
    pub kind: SiteKind,
    /// pKa [-]; of the conjugate acid for a base.
    pub pka: f64,
}

/// One solute.
#[derive(Clone, Debug, PartialEq)]
pub struct Solute {
    /// Key used throughout the library, e.g. `caffeine`.
    pub id: String,
    /// Name as shown.
    pub name: String,
    /// CAS registry number.
    pub cas: String,
    /// Molecular formula.
    pub formula: String,
    /// Molar mass of the anhydrous form [g/mol].
    pub molar_mass_g_mol: f64,
    /// Source of name, number, formula and molar mass.
    pub identity_source: Source,
    /// Ionisable sites in order of rising pKa; none for a neutral solute.
    pub sites: Vec<Site>,
    /// Conditions of the constants, and others printed beside them.
    pub pka_note: String,
    /// Source of the constants.
    pub pka_source: Source,
    /// Known hydrates, in words.
    pub hydrate: String,
    /// Source of the hydrates.
    pub hydrate_source: Source,
    /// A remark; often blank.
    pub note: String,
}

/// What a printed constant really is.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum MeantAs {
    /// pKa of an acid.
    Acid,
    /// pKa of the conjugate acid of a base.
    ConjugateAcidOfBase,
    /// The pKb of a base, printed under the heading pKa or pK.
    PkbWrittenAsPka,
    /// Cannot be told.
    Unstated,
}

/// Whether to use a printed constant.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Advice {
    /// Fit for use under its conditions.
    Use,
    /// Shows how far published values spread; not a first choice.
    Spread,
    /// Misread, misprinted or of another equilibrium: do not use it as printed.
    DoNotUse,
}

/// One constant as found in print. Constants printed together, such as the three of citric
/// acid, share a [`PkaReading::set`] and are told apart by [`PkaReading::step`].
#[derive(Clone, Debug, PartialEq)]
pub struct PkaReading {
    /// The solute.
    pub solute_id: String,
    /// Which printed set of this solute, from 1.
    pub set: u32,
    /// Which constant of the set, from 1.
    pub step: u32,
    /// The constant on the scale given by [`PkaReading::meant_as`] [-]; a printed Ka or Kb is
    /// converted, a pKb printed as a pKa is left as printed.
    pub value: f64,
    /// What it really is.
    pub meant_as: MeantAs,
    /// The words and digits as printed.
    pub printed_as: String,
    /// Temperature [°C]; `None` when not stated.
    pub temperature_c: Option<f64>,
    /// Ionic strength or medium as stated; often blank.
    pub medium: String,
    /// Whether to use it.
    pub advice: Advice,
    /// Where it was printed.
    pub source: Source,
    /// Why; often blank.
    pub note: String,
}

impl PkaReading {
    /// pKa of the conjugate acid that this reading amounts to [-], with the ion product of
    /// water `pkw` [-] at its temperature. `None` for an acid or when it cannot be told.
    ///
    /// `pKa = pKw − pKb` for a pKb printed as a pKa.
    ///
    /// # Example: a pKb printed as a pKa
    ///
    /// ```
    /// use unstir_core::library::solutes::{MeantAs, readings_for};
    /// let misread = readings_for("caffeine").into_iter().find(|r| r.meant_as == MeantAs::PkbWrittenAsPka).unwrap();
    /// assert_eq!(misread.value, 10.4);
    /// assert!((misread.conjugate_acid_pka(14.0).unwrap() - 3.6).abs() < 1e-12);
    /// ```
    pub fn conjugate_acid_pka(&self, pkw: f64) -> Option<f64> {
        match self.meant_as {
            MeantAs::ConjugateAcidOfBase => Some(self.value),
            MeantAs::PkbWrittenAsPka => Some(pkw - self.value),
            MeantAs::Acid | MeantAs::Unstated => None,
        }
    }
}

/// All solutes, in the order of the file.
pub fn solutes() -> Vec<Solute> {
    table().items.clone()
}

/// The solute with this id.
pub fn solute(id: &str) -> Option<Solute> {
    table().items.iter().find(|solute| solute.id == id).cloned()
}

/// The solute that a name means: its own name or id, or the longest name within it.
pub fn solute_named(name: &str) -> Option<Solute> {
    let name = name.trim().to_lowercase();
    let all = &table().items;
    let exact = all.iter().find(|s| s.name.to_lowercase() == name || s.id == name);
    let within = || all.iter().filter(|s| name.contains(&s.name.to_lowercase())).max_by_key(|s| s.name.len());
    exact.or_else(within).cloned()
}

/// Every printed constant held, in the order of the file.
pub fn pka_readings() -> Vec<PkaReading> {
    readings().items.clone()
}

/// The printed constants held for one solute.
pub fn readings_for(solute_id: &str) -> Vec<PkaReading> {
    readings().items.iter().filter(|reading| reading.solute_id == solute_id).cloned().collect()
}

fn table() -> &'static Loaded<Solute> {
    static TABLE: OnceLock<Loaded<Solute>> = OnceLock::new();
    TABLE.get_or_init(|| load(include_str!("../../data/solutes.csv"), parse_solute))
}

fn readings() -> &'static Loaded<PkaReading> {
    static TABLE: OnceLock<Loaded<PkaReading>> = OnceLock::new();
    TABLE.get_or_init(|| load(include_str!("../../data/pka_readings.csv"), parse_reading))
}

fn parse_solute(row: &Row) -> Result<Solute, String> {
    let mut sites: Vec<Site> = row.list("pka")?.iter().map(|text| parse_site(text)).collect::<Result<_, _>>()?;
    put_in_order(&mut sites, |a, b| a.pka.total_cmp(&b.pka));
    Ok(Solute {
        id: row.required("id")?,
        name: row.required("name")?,
        cas: row.required("cas")?,
        formula: row.required("formula")?,
        molar_mass_g_mol: row.number("molar_mass_g_mol")?,
        identity_source: row.source("source_identity")?,
        sites,
        pka_note: row.owned("pka_note")?,
        pka_source: row.source("source_pka")?,
        hydrate: row.owned("hydrate")?,
        hydrate_source: row.source("source_hydrate")?,
        note: row.owned("note")?,
    })
}

/// Reads a site written as `acid:10.05` or `base:0.35`.
fn parse_site(text: &str) -> Result<Site, String> {
    let unreadable = || format!("not a site: {text}");
    let (kind, value) = text.split_once(':').ok_or_else(unreadable)?;
    let kind = match kind {
        "acid" => SiteKind::Acid,
        "base" => SiteKind::Base,
        _ => return Err(unreadable()),
    };
    let pka = value.parse::<f64>().ok().filter(|pka| pka.is_finite()).ok_or_else(unreadable)?;
    Ok(Site { kind, pka })
}

fn parse_reading(row: &Row) -> Result<PkaReading, String> {
    Ok(PkaReading {
        solute_id: row.required("solute_id")?,
        set: row.ordinal("set")?,
        step: row.ordinal("step")?,
        value: row.number("value")?,
        meant_as: match row.text("meant_as")? {
            "acid" => MeantAs::Acid,
            "conjugate_acid_of_base" => MeantAs::ConjugateAcidOfBase,
            "pkb_written_as_pka" => MeantAs::PkbWrittenAsPka,
            "unstated" => MeantAs::Unstated,
            other => return Err(format!("meant_as is none of the known words: {other}")),
        },
        printed_as: row.required("printed_as")?,
        temperature_c: row.optional_number("T_C")?,
        medium: row.owned("medium")?,
        advice: match row.text("advice")? {
            "use" => Advice::Use,
            "spread" => Advice::Spread,
            "do_not_use" => Advice::DoNotUse,
            other => return Err(format!("advice is none of the known words: {other}")),
        },
        source: row.source("source")?,
        note: row.owned("note")?,
    })
}

#[cfg(test)]
mod tests {
    use super::super::sources::Checked;
    use super::*;

    #[test]
    fn every_row_parses_and_ids_are_unique() {
        assert_eq!(table().defects, Vec::<String>::new());
        assert_eq!(readings().defects, Vec::<String>::new());
        let all = solutes();
        assert_eq!(all.len(), 46);
        for (i, one) in all.iter().enumerate() {
            assert!(all.iter().skip(i + 1).all(|other| other.id != one.id && other.cas != one.cas), "{}", one.id);
        }
        assert_eq!(solute("water"), None);
    }

    #[test]
    fn every_solute_is_in_range() {
        for s in solutes() {
            assert!((50.0..420.0).contains(&s.molar_mass_g_mol), "{}", s.id);
            assert!(s.sites.iter().all(|site| (0.0..14.0).contains(&site.pka)), "{}", s.id);
            assert_eq!(s.sites.is_empty(), s.pka_source.checked == Checked::NotHeld, "{}", s.id);
            assert!(s.sites.iter().is_sorted_by(|a, b| a.pka < b.pka), "{}", s.id);
        }
    }

    /// Molar mass against the formula, with IUPAC standard atomic masses to 3 decimals.
    #[test]
    fn molar_mass_follows_from_the_formula() {
        const ABS_TOL_G_MOL: f64 = 0.02;
        for s in solutes() {
            let mut sum = 0.0;
            let mut rest = s.formula.as_str();
            while let Some(symbol) = rest.chars().next() {
                let mass = match symbol {
                    'C' => 12.011,
                    'H' => 1.008,
                    'N' => 14.007,
                    'O' => 15.999,
                    'P' => 30.974,
                    'S' => 32.06,
                    other => panic!("{}: element {other}", s.id),
                };
                let digits = rest[1..].find(|c: char| !c.is_ascii_digit()).map_or(rest.len(), |i| i + 1);
                sum += mass * rest[1..digits].parse::<f64>().unwrap_or(1.0);
                rest = &rest[digits..];
            }
            assert!((sum - s.molar_mass_g_mol).abs() < ABS_TOL_G_MOL, "{}: {sum}", s.id);
        }
    }

    #[test]
    fn every_reading_names_a_solute_and_is_in_range() {
        let all = pka_readings();
        for r in &all {
            assert!(solute(&r.solute_id).is_some(), "{}", r.solute_id);
            assert!((-7.0..=14.0).contains(&r.value), "{} {}", r.solute_id, r.value);
            assert!(r.temperature_c.is_none_or(|t| (0.0..=40.0).contains(&t)), "{}", r.solute_id);
            let same = |o: &&PkaReading| (&o.solute_id, o.set, o.step) == (&r.solute_id, r.set, r.step);
            assert_eq!(all.iter().filter(same).count(), 1, "{} {} {}", r.solute_id, r.set, r.step);
            assert!(r.meant_as != MeantAs::PkbWrittenAsPka || r.advice == Advice::DoNotUse, "{}", r.solute_id);
            assert!(r.advice != Advice::DoNotUse || !r.note.is_empty(), "{} {}", r.solute_id, r.value);
        }
    }

    /// A constant held for a solute is among the readings fit for use, where it has readings.
    #[test]
    fn sites_agree_with_the_readings_in_use() {
        /// The third decimal of acetic acid (4.756) is not in the tables read.
        const ABS_TOL: f64 = 0.01;
        for s in solutes() {
            let usable: Vec<PkaReading> =
                readings_for(&s.id).into_iter().filter(|r| r.advice != Advice::DoNotUse).collect();
            for site in s.sites.iter().filter(|_| !usable.is_empty()) {
                assert!(usable.iter().any(|r| (r.value - site.pka).abs() < ABS_TOL), "{} {}", s.id, site.pka);
            }
        }
    }

    #[test]
    fn refuses_what_is_not_a_site() {
        for text in ["", "acid", "acid:", "base:x", "salt:3", "acid:inf"] {
            assert!(parse_site(text).is_err(), "{text}");
        }
    }

    #[test]
    fn published_values_are_carried_as_printed() {
        // Windholz 1983 in IARC Monograph 51 (1991): Ka 0.9e-10; Kb 1.3e-14 with pKw(18 °C) 14.24.
        let theobromine = solute("theobromine").unwrap();
        let expected = [Site { kind: SiteKind::Base, pka: 0.35 }, Site { kind: SiteKind::Acid, pka: 10.05 }];
        assert_eq!(theobromine.sites, expected);
        assert!((-crate::math::log10(0.9e-10) - 10.05).abs() < 0.005);
        assert!((14.24 + crate::math::log10(1.3e-14) - 0.35).abs() < 0.005);
        assert_eq!(theobromine.pka_source.checked, Checked::Quoted);
        // Ka 0.25 mol/L of the conjugate acid, an exercise.
        let caffeine = readings_for("caffeine");
        assert!(caffeine.iter().any(|r| (r.value + crate::math::log10(0.25)).abs() < 0.0005));
        // Handbook pKb 5.07 and 9.7 of quinine at 18 °C; pKw 14.24 gives 9.17 and 4.54.
        let quinine: Vec<f64> =
            readings_for("quinine").iter().filter(|r| r.set == 2).filter_map(|r| r.conjugate_acid_pka(14.24)).collect();
        assert!(quinine.iter().zip([9.17, 4.54]).all(|(found, expected)| (found - expected).abs() < 1e-9));
        assert_eq!(quinine.len(), 2);
        assert_eq!(readings_for("vanillin")[0].conjugate_acid_pka(14.0), None);
    }

    #[test]
    fn names_are_known_by_what_they_hold() {
        assert_eq!(solute_named("Ethyl vanillin").unwrap().id, "ethyl_vanillin");
        assert_eq!(solute_named("alkaloid (caffeine constants)").unwrap().id, "caffeine");
        assert!(solute_named("nothing known").is_none());
    }
}
