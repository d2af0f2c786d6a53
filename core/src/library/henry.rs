//! Henry constants of solutes in water: measured, or from two measured quantities. Estimates by
//! structure are not held: such a solute's volatility is unknown, not zero.

use super::solvents::Henry;
use super::sources::Source;
use super::table::{Loaded, Row, load};
use std::sync::OnceLock;

/// A Henry constant of the neutral form of a solute.
#[derive(Clone, Debug, PartialEq)]
pub struct SoluteHenry {
    /// The solute.
    pub solute_id: String,
    /// The constant, its spread and its slope.
    pub constant: Henry,
    /// Number of values the spread is of.
    pub readings: u32,
    /// Whether it was worked out from vapour pressure and solubility, not measured as such.
    pub from_solubility: bool,
    /// Its source.
    pub source: Source,
}

/// The constant held for one solute; `None` when unknown.
pub fn solute_henry(solute_id: &str) -> Option<SoluteHenry> {
    table().items.iter().find(|h| h.solute_id == solute_id).cloned()
}

fn table() -> &'static Loaded<SoluteHenry> {
    static TABLE: OnceLock<Loaded<SoluteHenry>> = OnceLock::new();
    TABLE.get_or_init(|| load(include_str!("../../data/henry.csv"), parse))
}

fn parse(row: &Row) -> Result<SoluteHenry, String> {
    Ok(SoluteHenry {
        solute_id: row.required("solute_id")?,
        constant: Henry {
            hcp_25c_mol_m3_pa: row.number("hcp_25C_mol_m3_Pa")?,
            range_mol_m3_pa: Some((row.number("low")?, row.number("high")?)),
            slope_k: row.optional_number("slope_K")?,
        },
        readings: row.ordinal("readings")?,
        // Letters of the compilation: literature review, measured, vapour pressure over solubility.
        from_solubility: match row.text("code")? {
            "L" | "M" => false,
            "V" => true,
            other => return Err(format!("code is none of L, M, V: {other}")),
        },
        source: row.source("source")?,
    })
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::library::solutes::solute;

    #[test]
    fn every_row_parses_and_names_a_solute() {
        assert_eq!(table().defects, Vec::<String>::new());
        for h in &table().items {
            assert!(solute(&h.solute_id).is_some(), "{}", h.solute_id);
            let (low, high) = h.constant.range_mol_m3_pa.unwrap();
            let x = h.constant.hcp_25c_mol_m3_pa;
            // The spread is printed to two digits.
            assert!(x > 0.0 && low <= x * 1.05 && x <= high * 1.05, "{}", h.solute_id);
        }
    }

    /// R. Sander (2015): phenol 16 with 6000 K, limonene 4.8e−4. Nicotine is an estimate there (code Q).
    #[test]
    fn published_values_are_carried_as_printed() {
        let phenol = solute_henry("phenol").unwrap();
        assert_eq!((phenol.constant.hcp_25c_mol_m3_pa, phenol.constant.slope_k), (16.0, Some(6000.0)));
        assert!(!phenol.from_solubility);
        assert_eq!(solute_henry("limonene").unwrap().constant.hcp_25c_mol_m3_pa, 4.8e-4);
        assert!(solute_henry("nicotine").is_none() && solute_henry("quinine").is_none());
    }
}
