//! pH after water has been taken off, or put on.

use super::charge_balance::{Balanced, balance, carbonate_species_mol_per_l, closed_at};
use super::composition::{Carbonate, Composition, within};
use crate::outcome::{Notice, Outcome};
use crate::study::Problem;
use serde::Serialize;

/// What becomes of dissolved carbon dioxide while water leaves.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum Co2After {
    /// A closed total is concentrated with the rest; an open one stays at its pressure.
    Kept,
    /// Boiled or pumped off entirely.
    Gone,
    /// In equilibrium with a gas afterwards.
    Open {
        /// Partial pressure of carbon dioxide [kPa]; outdoor air has about 0.042.
        co2_kpa: f64,
    },
}

/// A liquid before and after.
#[derive(Clone, Copy, Debug, PartialEq, Serialize)]
pub struct Concentrated {
    /// As it was.
    pub before: Balanced,
    /// At the new strength.
    pub after: Balanced,
    /// pH after less pH before.
    pub ph_change: f64,
}

/// pH of a liquid before and after everything dissolved in it is brought to `factor` [-] times its
/// concentration (4: a quarter of the volume is left; 0.5: diluted with as much water).
///
/// Charge balance at both ends; strong ions and weak totals × `factor`, carbonate by `co2`.
/// Continuous in the factor. With ideal activities also monotone: the pH moves away from that of
/// water, on one side of it. With real ones it may turn by some hundredths: ions shield each
/// other more the stronger the liquid is, whichever way the water took it.
/// Valid: as [`balance`]; nothing but water and carbon dioxide leaves (acetic and other volatile
/// acids do in part), nothing crystallises; factor 0.001 to 1000; same temperature.
///
/// # Errors
/// What [`balance`] refuses, before or after; a factor out of range.
///
/// Reference: charge balance. Dilution value of 0.05 mol/kg potassium hydrogen phthalate, factor
/// 0.5: +0.052 (R. G. Bates, Determination of pH, 2nd ed. 1973).
pub fn ph_after_concentrating(c: &Composition, factor: f64, co2: Co2After) -> Result<Outcome<Concentrated>, Problem> {
    within("composition.factor", "factor of concentration", factor, (0.001, 1000.0), "")?;
    let before = balance(c)?;
    let mut later = c.clone().scaled(factor);
    match co2 {
        Co2After::Kept => {}
        Co2After::Gone => later.carbonate = Carbonate::None,
        Co2After::Open { co2_kpa } => later.carbonate = Carbonate::Open { co2_kpa },
    }
    let after = balance(&later)?;
    let mut notices = before.notices;
    for notice in after.notices {
        if !notices.contains(&notice) {
            notices.push(notice);
        }
    }
    let [dissolved, bound, twice] = carbonate_species_mol_per_l(c, &before.value);
    if co2 == Co2After::Gone && bound + twice > 0.1 * dissolved {
        notices.push(Notice::new(
            "composition.carbonate",
            format!(
                "{:.0} % of the carbonate is bound as bicarbonate, which boils off slowly and never wholly; \
                 the pH after is a highest value. Give a partial pressure instead",
                100.0 * (bound + twice) / (dissolved + bound + twice)
            ),
        ));
    }
    let value = Concentrated { before: before.value, after: after.value, ph_change: after.value.ph - before.value.ph };
    Ok(Outcome { value, notices })
}

/// The same for a liquid whose pH was measured and whose salts are not known: the strong ions are
/// first worked out from `measured_ph` [-].
///
/// Valid, errors and reference: [`super::charge_balance::strong_ion_difference`] and
/// [`ph_after_concentrating`].
///
/// # Errors
/// Those of either.
pub fn ph_after_concentrating_measured(
    c: &Composition,
    measured_ph: f64,
    factor: f64,
    co2: Co2After,
) -> Result<Outcome<Concentrated>, Problem> {
    ph_after_concentrating(&closed_at(c, measured_ph)?, factor, co2)
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::solution::composition::Weak;
    use crate::solution::ionisation::Constant;
    use crate::study::SiteKind;

    fn phthalate() -> Composition {
        let constants = [2.950, 5.408].map(|pka| Constant { kind: SiteKind::Acid, pka }).to_vec();
        Composition { weak: vec![Weak { constants, mol_per_l: 0.05 }], ..Composition::water(25.0) }
    }

    /// Dilution value of 0.05 mol/kg potassium hydrogen phthalate, +0.052 (R. G. Bates,
    /// Determination of pH, 2nd ed. 1973, from memory), from its measured pH of 4.005.
    #[test]
    fn dilution_of_a_standard() {
        let half = ph_after_concentrating_measured(&phthalate(), 4.005, 0.5, Co2After::Kept).unwrap().value;
        assert!((half.before.ph - 4.005).abs() < 1e-9);
        assert!((half.ph_change - 0.052).abs() < 0.01, "{}", half.ph_change);
        for factor in [0.0, -1.0, f64::NAN, 1e9] {
            let refused = ph_after_concentrating(&phthalate(), factor, Co2After::Kept).unwrap_err();
            assert_eq!(refused.at, "composition.factor");
        }
    }

    /// Water under 0.036477 kPa of carbon dioxide has pH 5.6 (texts on rain, from memory); without
    /// it, that of water, 7.0.
    #[test]
    fn carbon_dioxide_leaves() {
        let rain = Composition { carbonate: Carbonate::Open { co2_kpa: 0.036_477 }, ..Composition::water(25.0) };
        let gone = ph_after_concentrating(&rain, 1.0, Co2After::Gone).unwrap();
        assert!((gone.value.before.ph - 5.6).abs() < 0.05 && (gone.value.after.ph - 7.0).abs() < 0.01);
        let spring = Composition { carbonate: Carbonate::Closed { mol_per_l: 0.01 }, ..Composition::water(25.0) };
        let boiled = ph_after_concentrating(&spring.clone().with_strong_ions(0.008), 1.0, Co2After::Gone).unwrap();
        assert!(boiled.notices[0].message.contains("80 % of the carbonate is bound"), "{:?}", boiled.notices);
        let sour = ph_after_concentrating(&spring, 1.0, Co2After::Gone).unwrap();
        assert!(sour.notices.is_empty());
    }
}
