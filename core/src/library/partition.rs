//! Published partition coefficients between a solvent of the library and water.

use super::sources::Source;
use super::table::{Loaded, Row, load};
use std::sync::OnceLock;

/// What the printed number stands for.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum KBasis {
    /// Concentration ratio of the neutral form.
    Neutral,
    /// Concentration ratio of the neutral, undimerised form.
    Monomer,
    /// Ratio of two solubilities, not a shaken measurement.
    SolubilityRatio,
}

/// One published value of a partition coefficient `K`: neutral form, organic over aqueous
/// concentration [-], both in mol/L.
#[derive(Clone, Debug, PartialEq)]
pub struct PublishedK {
    /// The solute; `iodine` and `propionic_acid` have no row among the solutes.
    pub solute_id: String,
    /// The solvent.
    pub solvent_id: String,
    /// Partition coefficient [-].
    pub k: f64,
    /// Lowest value the source or others give [-].
    pub k_low: Option<f64>,
    /// Highest value the source or others give [-].
    pub k_high: Option<f64>,
    /// Temperature, lower end [°C]; `None` when not stated.
    pub temperature_low_c: Option<f64>,
    /// Temperature, upper end [°C]; equal to the lower end for a single temperature.
    pub temperature_high_c: Option<f64>,
    /// What the number stands for.
    pub basis: KBasis,
    /// Form and pH as stated, e.g. `free base (pH >= 7)`.
    pub form: String,
    /// Dimerisation constant in the solvent [L/mol].
    pub dimer_l_mol: Option<f64>,
    /// Low confidence: coarse, of lesser grade, or a ratio of solubilities.
    pub weak: bool,
    /// A remark; often blank.
    pub note: String,
    /// Where it comes from.
    pub source: Source,
}

/// Every published value held for this pair, in the order of the file; none if there is none.
///
/// # Example: published values of one pair differ
///
/// ```
/// use unstir_core::library::partition::published_k;
/// let values: Vec<f64> = published_k("caffeine", "dichloromethane").iter().map(|row| row.k).collect();
/// assert_eq!(values, [9.5, 7.76, 4.57, 6.31]);
/// ```
pub fn published_k(solute_id: &str, solvent_id: &str) -> Vec<PublishedK> {
    let of_pair = |row: &&PublishedK| row.solute_id == solute_id && row.solvent_id == solvent_id;
    table().items.iter().filter(of_pair).cloned().collect()
}

/// Every published value held.
pub fn published_partition() -> Vec<PublishedK> {
    table().items.clone()
}

fn table() -> &'static Loaded<PublishedK> {
    static TABLE: OnceLock<Loaded<PublishedK>> = OnceLock::new();
    TABLE.get_or_init(|| load(include_str!("../../data/partition.csv"), parse))
}

fn parse(row: &Row) -> Result<PublishedK, String> {
    Ok(PublishedK {
        solute_id: row.required("solute_id")?,
        solvent_id: row.required("solvent_id")?,
        k: row.number("K")?,
        k_low: row.optional_number("K_low")?,
        k_high: row.optional_number("K_high")?,
        temperature_low_c: row.optional_number("T_low_C")?,
        temperature_high_c: row.optional_number("T_high_C")?,
        basis: match row.text("basis")? {
            "neutral" => KBasis::Neutral,
            "monomer" => KBasis::Monomer,
            "solubility_ratio" => KBasis::SolubilityRatio,
            other => return Err(format!("basis is none of the known words: {other}")),
        },
        form: row.required("form")?,
        dimer_l_mol: row.optional_number("K_dimer_L_mol")?,
        weak: row.yes("weak")?,
        note: row.owned("note")?,
        source: row.source("source")?,
    })
}

#[cfg(test)]
mod tests {
    use super::super::solutes::solute;
    use super::super::solvents::solvent;
    use super::super::sources::Checked;
    use super::*;

    #[test]
    fn every_row_parses() {
        assert_eq!(table().defects, Vec::<String>::new());
        assert_eq!(published_partition().len(), 45);
        assert!(published_k("caffeine", "water").is_empty());
    }

    #[test]
    fn every_row_is_in_range_and_names_what_the_library_holds() {
        const NO_SOLUTE_ROW: [&str; 2] = ["iodine", "propionic_acid"];
        for row in published_partition() {
            let pair = format!("{} {}", row.solute_id, row.solvent_id);
            assert!(solvent(&row.solvent_id).is_some(), "{pair}");
            assert_ne!(solute(&row.solute_id).is_some(), NO_SOLUTE_ROW.contains(&row.solute_id.as_str()), "{pair}");
            assert!((0.01..1000.0).contains(&row.k), "{pair}");
            assert!(row.k_low.is_none_or(|low| 0.0 < low && low <= row.k), "{pair}");
            assert!(row.k_high.is_none_or(|high| row.k <= high), "{pair}");
            assert_eq!(row.k_low.is_some(), row.k_high.is_some(), "{pair}");
            let (low, high) = (row.temperature_low_c, row.temperature_high_c);
            assert_eq!(low.is_some(), high.is_some(), "{pair}");
            assert!(low.zip(high).is_none_or(|(low, high)| 0.0 <= low && low <= high && high <= 30.0), "{pair}");
            assert!(row.dimer_l_mol.is_none_or(|k2| k2 > 0.0), "{pair}");
        }
    }

    #[test]
    fn published_values_are_carried_as_printed() {
        // Edwards et al., Int. J. Chem. Sci. 13(3) (2015) 1218: 9.2 to 9.9, midpoint 9.5.
        let caffeine = published_k("caffeine", "chloroform");
        assert_eq!(caffeine.len(), 2);
        assert_eq!((caffeine[0].k, caffeine[0].k_low, caffeine[0].k_high), (9.5, Some(8.3), Some(10.0)));
        assert_eq!(caffeine[0].source.checked, Checked::Read);
        assert_eq!(caffeine[1].basis, KBasis::SolubilityRatio);
        assert!(caffeine[1].weak);
        // Leo, Hansch & Elkins 1971: log P 1.64 for phenol in diethyl ether.
        let phenol = published_k("phenol", "diethyl_ether");
        assert!((crate::math::log10(phenol[0].k) - 1.64).abs() < 0.005);
        assert_eq!(phenol[0].source.checked, Checked::Memory);
        let benzoic = published_k("benzoic_acid", "toluene");
        assert_eq!((benzoic[0].basis, benzoic[0].dimer_l_mol), (KBasis::Monomer, Some(250.0)));
    }
}
