//! From a crude isolate to the anhydrous target in it.

use crate::study::{Isolate, Problem};
use serde::Serialize;

/// Molar mass of water [g/mol]; IUPAC standard atomic weights (2021).
pub const WATER_MOLAR_MASS: f64 = 18.015;

/// What the isolate says.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct IsolateResult {
    /// Crude mass as weighed [mg].
    pub crude_mg: f64,
    /// Anhydrous target in it [mg].
    pub anhydrous_mg: crate::plan::Interval,
    /// Factor from hydrate to anhydrous mass [-].
    pub hydrate_factor: f64,
    /// Target charged to the extraction [mg].
    pub charged_mg: f64,
    /// Target the plan expected in the extracts [mg].
    pub planned_mg: f64,
    /// Fraction removed by the plan [-].
    pub planned_removal: crate::plan::Interval,
    /// Fraction removed by the isolate [-].
    pub found_removal: crate::plan::Interval,
    /// The stage efficiency that would explain the isolate, with D as planned; none where the
    /// isolate holds more than full equilibrium could give.
    pub apparent_efficiency: Option<crate::plan::Interval>,
    /// D that would explain it with the stage efficiency as planned; none where no D does.
    pub apparent_d: Option<f64>,
    /// Plan and result in a sentence.
    pub sentence: String,
}

/// Anhydrous mass over hydrate mass [-], from the molar mass `m` [g/mol] of the anhydrous
/// substance and `waters` [mol/mol].
///
/// `M/(M + n·18.015)`; `n` need not be whole (0.8 is published for one alkaloid).
/// Reference: stoichiometry; quinine trihydrate 0.8572, citric acid monohydrate 0.9143.
pub fn hydrate_factor(m: f64, waters: f64) -> f64 {
    m / (m + waters * WATER_MOLAR_MASS)
}

/// Anhydrous target [mg] in a crude isolate.
///
/// `m = crude·(1 − s)·p·M/(M + n·18.015)`; `s` mass fraction of solvent still in it, `p` purity of
/// the solvent-free solid as the hydrate, `n` water per mole.
/// Valid: solvent and impurity hold no target of their own.
///
/// # Errors
/// A hydrate without the molar mass of the target.
pub fn anhydrous_mg(isolate: &Isolate, molar_mass: Option<f64>) -> Result<f64, Problem> {
    let n = isolate.hydrate_waters.value;
    let factor = match molar_mass {
        Some(m) => hydrate_factor(m, n),
        None if n == 0.0 => 1.0,
        None => {
            return Err(Problem::new(
                "isolate.hydrate_waters",
                "a hydrate needs the molar mass of the target; enter it with the ingredient",
            ));
        }
    };
    Ok(isolate.crude_mass_mg.value * (1.0 - isolate.residual_solvent_fraction.value) * isolate.purity.value * factor)
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Stoichiometry; citric acid monohydrate 8.57 % water (pharmacopoeia 7.5–9.0 %).
    #[test]
    fn hydrates() {
        assert!((hydrate_factor(324.42, 3.0) - 0.8572).abs() < 1e-4);
        assert!((hydrate_factor(192.12, 1.0) - 0.9143).abs() < 1e-4);
        assert_eq!(hydrate_factor(200.0, 0.0), 1.0);
    }

    /// 46.5 mg, 90 % pure, weighed as trihydrate of a base of 324.42 g/mol: 35.87 mg (product of
    /// purity and hydrate factor).
    #[test]
    fn crude_to_anhydrous() {
        let isolate = Isolate {
            crude_mass_mg: 46.5.into(),
            purity: 0.9.into(),
            hydrate_waters: 3.0.into(),
            residual_solvent_fraction: 0.0.into(),
        };
        assert!((anhydrous_mg(&isolate, Some(324.42)).unwrap() - 35.87).abs() < 0.01);
        assert!(anhydrous_mg(&isolate, None).is_err());
    }
}
