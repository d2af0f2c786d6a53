//! Volatile ingredients lost with the water that is taken off.

use super::henry::{air_over_water, hcp_at, volatility};
use super::strip::left_after_boiling;
use crate::library::henry::SoluteHenry;
use crate::outcome::{Notice, Outcome};
use crate::study::Problem;
use serde::Serialize;

/// Temperature the constants are listed at [°C].
const LISTED_C: f64 = 25.0;

/// Loss of one ingredient with the water taken off.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct VolatileLoss {
    /// Volatility against water of all its forms together [-].
    pub alpha: f64,
    /// Concentration in air over that in water [-], neutral form, 25 °C.
    pub air_over_water_25c: f64,
    /// Fraction left in the liquor [-].
    pub fraction_left: f64,
}

/// What is left of an ingredient with the constant `henry` when the fraction `water_left` [-] of the water is left,
/// taken off at `t` [°C]; `neutral` [-] of it is in the neutral form, the only one that leaves.
///
/// `n/n₀ = (n_w/n_w₀)^α`, `α = f_N·α_N`. Without a slope `α_N` is that at 25 °C: the vapour pressures of solute and
/// water rise about alike, so the ratio stays where the constant does not.
/// Valid: 0–100 °C, dilute, vapour leaves as it forms; sugar and salt drive more out; the neutral fraction is taken as
/// constant though the pH moves.
/// Reference: Lord Rayleigh, Phil. Mag. 4 (1902) 521; [`volatility`], [`left_after_boiling`].
///
/// # Errors
/// A temperature outside 0–100 °C, water left not above 0 or above 1, a neutral fraction outside 0–1.
pub fn volatile_loss(
    henry: &SoluteHenry,
    t: f64,
    water_left: f64,
    neutral: f64,
) -> Result<Outcome<VolatileLoss>, Problem> {
    let refuse = |what: String| Err(Problem::new("concentrate", what));
    if !(0.0..=100.0).contains(&t) {
        return refuse(format!("the water is taken off at {t} °C; give 0 to 100"));
    }
    if !(water_left > 0.0 && water_left <= 1.0) {
        return refuse(format!("the fraction of the water left is {water_left}; it must be above 0 and at most 1"));
    }
    if !(0.0..=1.0).contains(&neutral) {
        return refuse(format!("the neutral fraction is {neutral}; it must be 0 to 1"));
    }
    let mut notices = Vec::new();
    let mut say = |message: String| notices.push(Notice::new("concentrate", message));
    let constant = &henry.constant;
    let at = if constant.slope_k.is_some() { t } else { LISTED_C };
    if constant.slope_k.is_none() && (t - LISTED_C).abs() > 5.0 {
        say(format!("No slope of the Henry constant is listed: the volatility at 25 °C is used at {t:.0} °C"));
    } else if t > 60.0 {
        say(format!("The Henry constant is stretched from 25 to {t:.0} °C: a rough loss"));
    }
    if let Some((low, high)) = constant.range_mol_m3_pa.filter(|(low, high)| *high > 3.0 * low) {
        say(format!(
            "Published Henry constants run from {low} to {high} mol/(m³ Pa): the volatility may differ by as much"
        ));
    }
    if henry.from_solubility {
        say("The Henry constant was worked out from vapour pressure and solubility, not measured".to_owned());
    }
    let alpha = neutral * volatility(hcp_at(constant, at), at);
    Ok(Outcome {
        value: VolatileLoss {
            alpha,
            air_over_water_25c: air_over_water(constant.hcp_25c_mol_m3_pa, LISTED_C),
            fraction_left: left_after_boiling(alpha, water_left),
        },
        notices,
    })
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::library::henry::solute_henry;

    /// Phenol leaves dilute water about twice as readily as the water does at 100 °C (from memory);
    /// by hand 16·exp(−4.045) = 0.280 mol/(m³ Pa), 53 200 (or 55 345 at 25 °C)/(0.280·101 325) = 1.9.
    #[test]
    fn losses_of_solutes() {
        let loss = |id, t, left, neutral| volatile_loss(&solute_henry(id).unwrap(), t, left, neutral).unwrap();
        let phenol = loss("phenol", 100.0, 0.5, 1.0);
        assert!((phenol.value.alpha - 1.9).abs() < 0.1, "{}", phenol.value.alpha);
        assert!((phenol.value.fraction_left - 0.27).abs() < 0.02);
        assert_eq!(phenol.notices.len(), 2);
        assert!(loss("caffeine", 25.0, 0.1, 1.0).value.fraction_left > 0.9999);
        assert!(loss("limonene", 40.0, 0.99, 1.0).value.fraction_left < 1e-9);
        assert_eq!(loss("acetic_acid", 40.0, 0.5, 0.0).value.fraction_left, 1.0);
        assert_eq!(loss("ibuprofen", 80.0, 0.5, 1.0).notices.len(), 2);
    }

    #[test]
    fn odd_input_is_refused_not_answered() {
        let h = solute_henry("phenol").unwrap();
        for x in [f64::NAN, f64::INFINITY, -0.1, 1000.0] {
            assert!(volatile_loss(&h, x, 0.5, 1.0).is_err() && volatile_loss(&h, 40.0, x, 1.0).is_err());
            assert!(volatile_loss(&h, 40.0, 0.5, x).is_err());
        }
        assert!(volatile_loss(&h, 40.0, 0.0, 1.0).is_err());
    }
}
