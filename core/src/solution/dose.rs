//! How much acid or base would bring the liquid to another pH, and what stays behind.

use super::ionisation::{Constant, speciate};
use super::water;
use crate::math;
use serde::Serialize;

/// Molar mass of sodium [g/mol]; IUPAC standard atomic weights (2021).
pub const SODIUM_MOLAR_MASS: f64 = 22.990;
/// Molar mass of chlorine [g/mol]; IUPAC standard atomic weights (2021).
pub const CHLORINE_MOLAR_MASS: f64 = 35.45;

/// Acid or base that takes a liquid from one pH to another.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct Dose {
    /// Strong base [mmol]; negative: strong acid.
    pub base_mmol: f64,
    /// What stays behind, counted as sodium (base) or chloride (acid) [mg].
    pub left_behind_mg: f64,
    /// `sodium` or `chloride`.
    pub left_behind: &'static str,
    /// pH it leads to.
    pub to_ph: f64,
    /// Ingredients counted as buffers.
    pub counted: usize,
}

/// One ingredient as a buffer: millimoles in the liquid and its constants.
#[derive(Clone, Debug, PartialEq)]
pub struct Buffer {
    /// Amount [mmol].
    pub mmol: f64,
    /// Constants at the temperature.
    pub constants: Vec<Constant>,
}

/// Strong base [mmol] that takes `volume_ml` [mL] holding `buffers` from `from` to `to` [pH].
///
/// From the charge balance at both ends, the other ions unchanged:
/// `b = Σ n_i (z̄_i(from) − z̄_i(to)) + V·(h_from − h_to + w_to − w_from)`, `z̄` mean charge,
/// `h = 10^−pH`, `w = 10^(pH − pKw)`.
/// Valid: activities ignored, so good to about a tenth; only the listed ingredients buffer; no
/// dilution. A lower bound where ingredients are missing from the list.
/// Reference: charge balance; 50 mL of 0.10 mol/L acetic acid (pKa 4.76) needs 2.5 mmol to pH 4.76.
pub fn dose(volume_ml: f64, buffers: &[Buffer], from: f64, to: f64, t: f64) -> Dose {
    let pkw = water::pkw(t);
    let free = |ph: f64| math::exp10(-ph) - math::exp10(ph - pkw);
    let mut base = volume_ml * (free(from) - free(to));
    for b in buffers {
        base += b.mmol * (speciate(&b.constants, from).mean_charge - speciate(&b.constants, to).mean_charge);
    }
    let (left_behind, molar_mass) =
        if base >= 0.0 { ("sodium", SODIUM_MOLAR_MASS) } else { ("chloride", CHLORINE_MOLAR_MASS) };
    Dose { base_mmol: base, left_behind_mg: base.abs() * molar_mass, left_behind, to_ph: to, counted: buffers.len() }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::study::SiteKind;

    #[test]
    fn half_neutralised_acid() {
        let acetic = Buffer { mmol: 5.0, constants: vec![Constant { kind: SiteKind::Acid, pka: 4.76 }] };
        // From the pH of the acid alone, 2.88 (weak-acid titration start, Harris; Skoog).
        let d = dose(50.0, &[acetic], 2.88, 4.76, 25.0);
        assert!((d.base_mmol - 2.5).abs() < 0.01, "{}", d.base_mmol);
        assert_eq!(d.left_behind, "sodium");
    }

    #[test]
    fn going_back_takes_acid() {
        let d = dose(100.0, &[], 7.0, 2.0, 25.0);
        // 100 mL of 0.01 mol/L strong acid.
        assert!((d.base_mmol + 1.0).abs() < 1e-3);
        assert_eq!(d.left_behind, "chloride");
    }
}
