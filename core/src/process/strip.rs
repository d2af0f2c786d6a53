//! Strip: removing dissolved solvent from the raffinate.

use crate::judgement::line::line;
use crate::library::residual::{permitted_daily_exposure, residual_limits};
use crate::library::solvents::{Solvent, solvent};
use crate::math;
use crate::plan::Interval;
use crate::process::concentrate::density_g_per_ml;
use crate::process::vapour::{water_boiling_point_c, water_vapour_pressure_kpa};
use crate::study::Study;
use serde::Serialize;

/// Molar mass of water [g/mol]; IUPAC (2021).
const WATER_MOLAR_MASS: f64 = 18.015;
/// Pressure of the standard atmosphere [kPa].
pub const ATMOSPHERE_KPA: f64 = 101.325;

/// What stripping takes, and how far it has come.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct StripPlan {
    /// Pressure [kPa].
    pub pressure_kpa: f64,
    /// Boiling point of water at it [°C]; none where water does not boil.
    #[serde(skip_serializing_if = "Option::is_none")]
    pub boils_at_c: Option<f64>,
    /// Solvent dissolved at the start [mg/L of raffinate]: saturation of its water at 25 °C.
    pub start_mg_per_l: f64,
    /// Volatility of the solvent relative to water, dilute, 25 °C [-].
    pub relative_volatility: f64,
    /// Fraction of the water that leaves while the solvent falls to a tenth, at equilibrium [-].
    pub water_per_decade: f64,
    /// Fitted from the readings; none with fewer than three, or if they do not fall.
    #[serde(skip_serializing_if = "Option::is_none")]
    pub fit: Option<StripFit>,
    /// Residues to reach.
    pub limits: Vec<StripLimit>,
    /// The last reading, brought to the made-up liquid, as a serving.
    #[serde(skip_serializing_if = "Option::is_none")]
    pub serving: Option<StripServing>,
    /// Raffinate over made-up volume [-]: making up dilutes the residue.
    pub dilution: f64,
}

/// First-order decay fitted to the readings.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct StripFit {
    /// Rate constant [1/min] with its 95 % interval.
    pub rate: Interval,
    /// Time to a tenth [min].
    pub minutes_per_decade: f64,
    /// Content at the beginning [mg/L].
    pub start_mg_per_l: f64,
    /// Readings used.
    pub readings: usize,
}

/// One residue to reach.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct StripLimit {
    /// Where it is from.
    pub what: String,
    /// As stated, in the made-up liquid [mg/L].
    pub limit_mg_per_l: f64,
    /// The same before making up [mg/L of raffinate].
    pub raffinate_mg_per_l: f64,
    /// Time to it from the start [min] with its 95 % interval, once there is a fit.
    #[serde(skip_serializing_if = "Option::is_none")]
    pub minutes: Option<Interval>,
    /// Fraction of the water that must leave for it at equilibrium, from saturation [-].
    pub water_fraction: f64,
}

/// One serving beside the permitted daily exposure.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct StripServing {
    /// Solvent in it by the last reading [mg].
    pub mg: f64,
    /// Permitted daily exposure [mg]; it is set for medicines.
    #[serde(skip_serializing_if = "Option::is_none")]
    pub daily_exposure_mg: Option<f64>,
}

/// Volatility of a sparingly soluble solvent relative to water, dilute, at 25 °C [-].
///
/// `α = (p°/x_s)/p_w`: the organic layer counts as pure, so that its vapour pressure over the mole
/// fraction `x_s` of a saturated solution is Henry's constant.
/// Valid: solubility below about 10 %; sugar and salt raise it further.
/// Reference: Henry constant from vapour pressure and solubility, J. Kuo, Practical Design
/// Calculations (2014). Dichloromethane: the gas/water ratio from it is 0.114, measured 0.112
/// (R. Sander, Atmos. Chem. Phys. 15 (2015) 4399, at 25 °C).
pub fn relative_volatility(s: &Solvent) -> f64 {
    s.vapour_pressure_25c_kpa / mole_fraction_at_saturation(s) / water_vapour_pressure_kpa(25.0)
}

fn mole_fraction_at_saturation(s: &Solvent) -> f64 {
    let solvent = s.solubility_in_water_mass_pct / s.molar_mass_g_mol;
    solvent / (solvent + (100.0 - s.solubility_in_water_mass_pct) / WATER_MOLAR_MASS)
}

/// Fraction of the water that leaves while a dilute volatile falls to `left` of its amount [-].
///
/// Rayleigh at constant relative volatility α: `n/n₀ = (W/W₀)^α`.
/// Valid: vapour in equilibrium with a well-mixed liquid; nothing condenses back. A floor: boiling
/// in practice takes more.
/// Reference: Lord Rayleigh, Phil. Mag. 4 (1902) 521; α = 100, 2 % boiled off leaves 0.1326.
pub fn water_for(left: f64, alpha: f64) -> f64 {
    1.0 - math::exp(math::ln(left.clamp(1e-300, 1.0)) / alpha)
}

/// Stripping of the raffinate of `study`; none for a solvent that the library does not hold.
///
/// The start is the solvent's saturation of the water of the liquor at 25 °C; `ln c` of the
/// readings is fitted by a straight line in time, with Student's t; a limit for the made-up liquid
/// is brought to the raffinate by `V_made_up/V_raffinate`.
/// Valid: as the parts; first order holds for a well-stirred liquid at constant conditions. Listed
/// limits in mg/kg are taken as mg/L times the density of the feed.
/// Reference: first-order kinetics; regression as in [`crate::judgement::line`].
pub fn strip(study: &Study, liquor_brix: f64, raffinate_ml: f64, made_up_ml: f64) -> Option<StripPlan> {
    let s = solvent(&study.solvent.id)?;
    let stated = &study.strip;
    let pressure_kpa = stated.pressure_kpa.as_ref().map_or(ATMOSPHERE_KPA, |q| q.value);
    let alpha = relative_volatility(&s);
    let water_g_per_l = 1000.0 * density_g_per_ml(liquor_brix) * (1.0 - liquor_brix / 100.0);
    let pct = s.solubility_in_water_mass_pct;
    let start_mg_per_l = 1000.0 * water_g_per_l * pct / (100.0 - pct);
    let dilution = raffinate_ml / made_up_ml;

    let points: Vec<(f64, f64)> = stated
        .readings
        .iter()
        .filter(|r| r.mg_per_l.value > 0.0)
        .map(|r| (r.minutes.value, math::ln(r.mg_per_l.value)))
        .collect();
    let fitted = line(&points).filter(|l| l.slope < 0.0);
    let fit = fitted.map(|l| {
        let half = l.t95() * l.slope_error;
        StripFit {
            rate: Interval { value: -l.slope, low: -l.slope - half, high: -l.slope + half, unit: "/min" },
            minutes_per_decade: std::f64::consts::LN_10 / -l.slope,
            start_mg_per_l: math::exp(l.intercept),
            readings: points.len(),
        }
    });

    let made_up_density = density_g_per_ml(study.feed.soluble_solids_brix.as_ref().map_or(0.0, |b| b.value));
    let mut wanted: Vec<(String, f64)> = Vec::new();
    if let Some(q) = &stated.limit_mg_per_l {
        wanted.push(("as entered".to_owned(), q.value));
    }
    for l in residual_limits(&s.id, study.goal.purpose) {
        if let (Some(v), "mg/kg" | "ppm") = (l.value, l.unit.as_str()) {
            wanted.push((format!("{}: {}", l.list.name(), l.product), v * made_up_density));
        }
    }
    let limits = wanted
        .into_iter()
        .map(|(what, limit_mg_per_l)| {
            let raffinate_mg_per_l = limit_mg_per_l / dilution;
            let minutes = fitted.filter(|_| raffinate_mg_per_l > 0.0).map(|l| {
                let (t, error) = l.x_at(math::ln(raffinate_mg_per_l));
                let half = l.t95() * error;
                Interval { value: t.max(0.0), low: (t - half).max(0.0), high: (t + half).max(0.0), unit: "min" }
            });
            let water_fraction = water_for((raffinate_mg_per_l / start_mg_per_l).min(1.0), alpha);
            StripLimit { what, limit_mg_per_l, raffinate_mg_per_l, minutes, water_fraction }
        })
        .collect();
    let last = stated.readings.iter().max_by(|a, b| a.minutes.value.total_cmp(&b.minutes.value));
    let serving = stated.serving_ml.as_ref().zip(last).map(|(ml, r)| StripServing {
        mg: r.mg_per_l.value * dilution * ml.value / 1000.0,
        daily_exposure_mg: permitted_daily_exposure(&s.id).map(|p| p.0),
    });
    Some(StripPlan {
        pressure_kpa,
        boils_at_c: water_boiling_point_c(pressure_kpa),
        start_mg_per_l,
        relative_volatility: alpha,
        water_per_decade: water_for(0.1, alpha),
        fit,
        limits,
        serving,
        dilution,
    })
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::study::{StripReading, parse};

    const TEXT: &str = include_str!("../../../tests/data/studies/neutral-alkaloid.json");

    /// Gas/water concentration ratios at 25 °C measured (R. Sander 2015, from memory, converted):
    /// dichloromethane 0.112, chloroform 0.161, ethyl acetate 0.0068; within a quarter by
    /// vapour pressure and solubility (ethyl acetate, 8 % soluble, is the farthest off).
    #[test]
    fn volatilities_agree_with_henry_constants() {
        for (id, measured) in [("dichloromethane", 0.112), ("chloroform", 0.161), ("ethyl_acetate", 0.006_84)] {
            let henry_kpa = relative_volatility(&solvent(id).unwrap()) * water_vapour_pressure_kpa(25.0);
            let ratio = henry_kpa / (8.314_46 * 298.15 * 55.34);
            assert!((ratio / measured - 1.0).abs() < 0.25, "{id} {ratio}");
        }
    }

    /// Rayleigh, by hand: α = 100, 2 % of the water gone leaves 0.98^100 = 0.13262.
    #[test]
    fn rayleigh() {
        assert!((water_for(0.132_62, 100.0) - 0.02).abs() < 1e-6);
        assert_eq!(water_for(1.0, 50.0), 0.0);
    }

    /// By hand: 1000 mg/L falling tenfold every 10 min reaches 1 mg/L after 30 min, and the limit
    /// in the made-up liquid is five times as strong in a raffinate a fifth of its volume.
    #[test]
    fn readings_give_the_time_to_a_limit() {
        let mut study = parse(TEXT).unwrap();
        let reading = |minutes: f64, mg_per_l: f64| StripReading { minutes: minutes.into(), mg_per_l: mg_per_l.into() };
        study.strip.readings = vec![reading(0.0, 1000.0), reading(10.0, 100.0), reading(20.0, 10.0)];
        study.strip.limit_mg_per_l = Some(0.2.into());
        study.strip.serving_ml = Some(250.0.into());
        let plan = strip(&study, 47.0, 96.0, 480.0).unwrap();
        assert!((plan.fit.as_ref().unwrap().minutes_per_decade - 10.0).abs() < 1e-9);
        let limit = &plan.limits[0];
        assert!((limit.raffinate_mg_per_l - 1.0).abs() < 1e-12);
        assert!((limit.minutes.as_ref().unwrap().value - 30.0).abs() < 1e-6);
        // 10 mg/L in the raffinate is 2 mg/L made up: 0.5 mg in 250 mL.
        assert!((plan.serving.unwrap().mg - 0.5).abs() < 1e-12);
        // Rising readings are no decay.
        study.strip.readings.reverse();
        for (i, r) in study.strip.readings.iter_mut().enumerate() {
            r.minutes = (10.0 * i as f64).into();
        }
        assert_eq!(strip(&study, 47.0, 96.0, 480.0).unwrap().fit, None);
        study.solvent.id = "own".into();
        assert_eq!(strip(&study, 47.0, 96.0, 480.0), None);
    }
}
