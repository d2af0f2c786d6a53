//! Coefficients and descriptors of the linear free-energy estimate of K.

use super::sources::Source;
use super::table::{Loaded, Row, load};
use std::sync::OnceLock;

/// The solvent phase a set of coefficients was fitted for.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Phase {
    /// Solvent saturated with water.
    Wet,
    /// Solvent free of water; it meets water only in thought.
    Dry,
    /// Takes up so little water that one set serves both.
    Both,
}

/// Coefficients of one solvent against water.
#[derive(Clone, Debug, PartialEq)]
pub struct FreeEnergySystem {
    /// The solvent.
    pub solvent_id: String,
    /// The phase they hold for.
    pub phase: Phase,
    /// `c, e, s, a, b, v` [-].
    pub coefficients: [f64; 6],
    /// Standard error of the fit [log units], where reported.
    pub standard_error: Option<f64>,
    /// From memory, or for dry solvent only.
    pub weak: bool,
    /// Where they come from.
    pub source: Source,
}

/// Descriptors of one solute, neutral form.
#[derive(Clone, Debug, PartialEq)]
pub struct Descriptors {
    /// The solute.
    pub solute_id: String,
    /// Excess molar refraction.
    pub e: f64,
    /// Dipolarity and polarisability.
    pub s: f64,
    /// Hydrogen-bond acidity.
    pub a: f64,
    /// Hydrogen-bond basicity.
    pub b: f64,
    /// Hydrogen-bond basicity against solvents that hold water, where it differs.
    pub b0: Option<f64>,
    /// McGowan volume [100 mL/mol].
    pub v: f64,
    /// Known to fit its own measurements badly.
    pub weak: bool,
    /// Where they come from.
    pub source: Source,
}

/// Coefficients of this solvent, if held.
pub fn free_energy_system(solvent_id: &str) -> Option<&'static FreeEnergySystem> {
    systems().items.iter().find(|s| s.solvent_id == solvent_id)
}

/// Descriptors of this solute, if held.
pub fn descriptors(solute_id: &str) -> Option<&'static Descriptors> {
    solutes().items.iter().find(|d| d.solute_id == solute_id)
}

fn systems() -> &'static Loaded<FreeEnergySystem> {
    static TABLE: OnceLock<Loaded<FreeEnergySystem>> = OnceLock::new();
    TABLE.get_or_init(|| load(include_str!("../../data/free_energy_systems.csv"), parse_system))
}

fn solutes() -> &'static Loaded<Descriptors> {
    static TABLE: OnceLock<Loaded<Descriptors>> = OnceLock::new();
    TABLE.get_or_init(|| load(include_str!("../../data/descriptors.csv"), parse_descriptors))
}

fn parse_system(row: &Row) -> Result<FreeEnergySystem, String> {
    Ok(FreeEnergySystem {
        solvent_id: row.required("solvent_id")?,
        phase: match row.text("phase")? {
            "wet" => Phase::Wet,
            "dry" => Phase::Dry,
            "both" => Phase::Both,
            other => return Err(format!("phase is none of the known words: {other}")),
        },
        coefficients: [
            row.number("c")?,
            row.number("e")?,
            row.number("s")?,
            row.number("a")?,
            row.number("b")?,
            row.number("v")?,
        ],
        standard_error: row.optional_number("se")?,
        weak: row.yes("weak")?,
        source: row.source("source")?,
    })
}

fn parse_descriptors(row: &Row) -> Result<Descriptors, String> {
    Ok(Descriptors {
        solute_id: row.required("solute_id")?,
        e: row.number("E")?,
        s: row.number("S")?,
        a: row.number("A")?,
        b: row.number("B")?,
        b0: row.optional_number("B0")?,
        v: row.number("V")?,
        weak: row.yes("weak")?,
        source: row.source("source")?,
    })
}

#[cfg(test)]
mod tests {
    use super::super::solutes::solute;
    use super::*;

    #[test]
    fn every_row_parses_and_names_a_solute() {
        assert_eq!(systems().defects, Vec::<String>::new());
        assert_eq!(solutes().defects, Vec::<String>::new());
        for (i, s) in systems().items.iter().enumerate() {
            assert!(systems().items.iter().skip(i + 1).all(|o| o.solvent_id != s.solvent_id), "{}", s.solvent_id);
        }
        assert!(solutes().items.iter().all(|d| solute(&d.solute_id).is_some()));
    }
}
