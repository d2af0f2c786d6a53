//! A stoppered funnel in which a liquid gives off its carbon dioxide.

use super::acidity::CO2_MOLAR_MASS;
use super::carbonate::dissolved_g_per_l;
use crate::outcome::{Notice, Outcome};
use crate::solution::ionisation::GAS_CONSTANT;
use crate::study::Problem;
use serde::Serialize;

/// Pressure of the atmosphere [kPa].
const ATMOSPHERE_KPA: f64 = 101.325;

/// Gas and pressure of a closed funnel.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct ClosedFunnel {
    /// Carbon dioxide in the liquid at the start [g].
    pub co2_g: f64,
    /// What all of it fills as gas at this temperature and 101.325 kPa [mL].
    pub gas_ml: f64,
    /// Gauge pressure once liquid and headspace are in balance [kPa].
    pub gauge_balanced_kpa: f64,
    /// Gauge pressure if all of it left the liquid [kPa]: the bound.
    pub gauge_all_kpa: f64,
}

/// Gas set free by `liquid_ml` [mL] that holds `co2_g_per_l` [g/L] of carbon dioxide, stoppered at `t` [°C] under
/// `headspace_ml` [mL] of air at 101.325 kPa.
///
/// All free: `p = nRT/V_head`. In balance: `p = m/(c₁V_liquid + M·V_head/(RT))`, `c₁` dissolved per kPa.
/// Valid: 0–40 °C, ideal gas, water; the solvent takes some up (less pressure) and adds its own vapour (more): not counted.
/// Reference: ideal gas, 24.465 L/mol at 25 °C; [`dissolved_g_per_l`].
///
/// # Errors
/// A temperature outside 0–40 °C, an amount below 0, or no headspace.
pub fn closed_funnel(
    liquid_ml: f64,
    co2_g_per_l: f64,
    headspace_ml: f64,
    t: f64,
) -> Result<Outcome<ClosedFunnel>, Problem> {
    let refuse = |what: String| Err(Problem::new("feed.co2_g_per_l", what));
    if !(0.0..=40.0).contains(&t) {
        return refuse(format!("the funnel is at {t} °C; carbon dioxide is known here from 0 to 40 °C"));
    }
    for (what, value, unit) in [("the liquid", liquid_ml, "mL"), ("the carbon dioxide", co2_g_per_l, "g/L")] {
        if !(value >= 0.0 && value.is_finite()) {
            return refuse(format!("{what} is {value} {unit}; give 0 or more"));
        }
    }
    if !(headspace_ml > 0.0 && headspace_ml.is_finite()) {
        return refuse(format!(
            "the headspace is {headspace_ml} mL: a funnel filled to the stopper bursts; leave room"
        ));
    }
    let co2_g = co2_g_per_l * liquid_ml / 1000.0;
    // Grams of gas in the headspace per kPa, and dissolved per kPa.
    let in_head = headspace_ml / 1000.0 * CO2_MOLAR_MASS / (GAS_CONSTANT * (t + 273.15));
    let in_liquid = dissolved_g_per_l(1.0, t) * liquid_ml / 1000.0;
    let balanced = co2_g / (in_liquid + in_head);
    let mut notices = Vec::new();
    if co2_g / in_head > 5.0 {
        notices.push(Notice::new(
            "feed.co2_g_per_l",
            format!(
                "Stoppered and shaken, this liquid raises {balanced:.0} kPa above the atmosphere. A separating funnel is no pressure vessel: \
                 degas in the open first, swirl unstoppered, then vent after every turn"
            ),
        ));
    }
    Ok(Outcome {
        value: ClosedFunnel {
            co2_g,
            gas_ml: 1000.0 * co2_g / CO2_MOLAR_MASS * GAS_CONSTANT * (t + 273.15) / ATMOSPHERE_KPA,
            gauge_balanced_kpa: balanced,
            gauge_all_kpa: co2_g / in_head,
        },
        notices,
    })
}

#[cfg(test)]
mod tests {
    use super::*;

    /// 1 mol at 25 °C and 101.325 kPa fills 24.465 L; with 0.0340 mol/(L atm) dissolved (Weiss 1974) in 10 L
    /// the balance is 1/(0.340 + 1) atm.
    #[test]
    fn one_mole() {
        let out = closed_funnel(10_000.0, 4.401, 24_465.0, 25.0).unwrap();
        let f = &out.value;
        assert!((f.gas_ml / 24_465.0 - 1.0).abs() < 2e-4 && (f.gauge_all_kpa / 101.325 - 1.0).abs() < 2e-4);
        assert!((f.gauge_balanced_kpa / (101.325 / 1.340) - 1.0).abs() < 0.003);
        assert_eq!(out.notices.len(), 1);
        assert!(closed_funnel(100.0, 0.0, 100.0, 20.0).unwrap().notices.is_empty());
    }

    #[test]
    fn odd_input_is_refused_not_answered() {
        for x in [f64::NAN, f64::INFINITY, -1.0] {
            assert!(closed_funnel(x, 1.0, 1.0, 20.0).is_err() && closed_funnel(1.0, x, 1.0, 20.0).is_err());
            assert!(closed_funnel(1.0, 1.0, x, 20.0).is_err() && closed_funnel(1.0, 1.0, 1.0, x).is_err());
        }
        assert!(closed_funnel(1.0, 1.0, 0.0, 20.0).is_err());
    }
}
