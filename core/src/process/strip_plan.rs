//! Stripping the raffinate of a study: what it takes, how far it has come, and the residues to
//! reach.

use crate::library::residual::{Purpose, limits_for};
use crate::library::solvents::{Solvent, solvent};
use crate::plan::Interval;
use crate::process::concentrate::density_g_per_ml;
use crate::process::henry::{hcp_at, volatility, volatility_from_gamma};
use crate::process::strip::{limit_mg_per_l, water_off_for, water_off_per_decade};
use crate::process::strip_fit::{Assay, fit};
use crate::process::vapour::{mole_fraction, water_boils_c, water_kpa};
use crate::study::Study;
use serde::Serialize;

/// Molar mass of water [g/mol]; IUPAC (2021).
const WATER_MOLAR_MASS: f64 = 18.015;
/// Temperature of solubilities and Henry constants [°C].
const REFERENCE_C: f64 = 25.0;
/// Pressures at which water boils as a liquid and the equation holds [kPa].
const BOILS_KPA: (f64, f64) = (0.62, 1000.0);
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
    /// Solvent dissolved at the start [mg/L of raffinate]: saturation of its water at 25 °C; none
    /// if its solubility is not held.
    #[serde(skip_serializing_if = "Option::is_none")]
    pub start_mg_per_l: Option<f64>,
    /// Volatility of the solvent relative to water, dilute, 25 °C [-]; none if not held.
    #[serde(skip_serializing_if = "Option::is_none")]
    pub relative_volatility: Option<f64>,
    /// Fraction of the water that leaves while the solvent falls to a tenth, at equilibrium [-].
    #[serde(skip_serializing_if = "Option::is_none")]
    pub water_per_decade: Option<f64>,
    /// Fitted from the readings; none with fewer than three, or if they do not fall.
    #[serde(skip_serializing_if = "Option::is_none")]
    pub fit: Option<StripRate>,
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
pub struct StripRate {
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
    #[serde(skip_serializing_if = "Option::is_none")]
    pub water_fraction: Option<f64>,
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

/// Volatility of a dissolved solvent relative to water, dilute, at 25 °C [-]: by its measured Henry
/// constant, else by vapour pressure and solubility (`γ∞ = 1/x`); none if neither is held.
///
/// See [`volatility`] and [`volatility_from_gamma`].
pub fn relative_volatility(s: &Solvent) -> Option<f64> {
    s.henry.map(|h| volatility(hcp_at(&h, REFERENCE_C), REFERENCE_C)).or_else(|| volatility_by_saturation(s))
}

fn volatility_by_saturation(s: &Solvent) -> Option<f64> {
    let x = mole_fraction(s.solubility_in_water_mass_pct? / 100.0, s.molar_mass_g_mol, WATER_MOLAR_MASS);
    Some(volatility_from_gamma(1.0 / x, s.vapour_pressure_25c_kpa?, water_kpa(REFERENCE_C)))
}

/// Stripping of the raffinate of `study`; none for a solvent that the library does not hold.
///
/// The start is the solvent's saturation of the water of the liquor at 25 °C; the
/// readings are fitted by [`fit`]; a limit for the made-up liquid
/// is brought to the raffinate by `V_made_up/V_raffinate`.
/// Valid: as the parts; first order holds for a well-stirred liquid at constant conditions. Listed
/// limits in mg/kg are taken as mg/L times the density of the feed.
/// Reference: see [`super::strip`], [`super::strip_fit`] and [`super::vapour`].
pub fn strip(study: &Study, liquor_brix: f64, raffinate_ml: f64, made_up_ml: f64) -> Option<StripPlan> {
    let s = solvent(&study.solvent.id)?;
    let stated = &study.strip;
    let pressure_kpa = stated.pressure_kpa.as_ref().map_or(ATMOSPHERE_KPA, |q| q.value);
    let alpha = relative_volatility(&s);
    let water_g_per_l = 1000.0 * density_g_per_ml(liquor_brix) * (1.0 - liquor_brix / 100.0);
    let saturated = |pct: f64| 1000.0 * water_g_per_l * pct / (100.0 - pct);
    let start_mg_per_l = s.solubility_in_water_mass_pct.map(saturated);
    let dilution = raffinate_ml / made_up_ml;

    // Readings below detection say nothing to a logarithm.
    let assays: Vec<Assay> = stated
        .readings
        .iter()
        .filter(|r| r.mg_per_l.value > 0.0)
        .map(|r| Assay { hours: r.minutes.value / 60.0, mg_per_l: r.mg_per_l.value })
        .collect();
    let fitted = fit(&assays).ok().map(|o| o.value).filter(|f| f.readings >= 3 && f.rate_per_h > 0.0);
    let per_minute = fitted.as_ref().map(|f| {
        let (low, high) = f.rate_band_per_h.unwrap_or((f.rate_per_h, f.rate_per_h));
        StripRate {
            rate: Interval { value: f.rate_per_h / 60.0, low: low / 60.0, high: high / 60.0, unit: "/min" },
            minutes_per_decade: std::f64::consts::LN_10 / f.rate_per_h * 60.0,
            start_mg_per_l: f.start_mg_per_l,
            readings: f.readings,
        }
    });

    let made_up_density = density_g_per_ml(study.feed.soluble_solids_brix.as_ref().map_or(0.0, |b| b.value));
    let mut wanted: Vec<(String, f64)> = Vec::new();
    if let Some(q) = &stated.limit_mg_per_l {
        wanted.push(("as entered".to_owned(), q.value));
    }
    for l in limits_for(&s.id, study.goal.purpose).listed {
        if let Some(v) = l.mg_per_kg {
            wanted.push((format!("{}: {}", l.list.name(), l.scope), limit_mg_per_l(v, made_up_density)));
        }
    }
    let limits = wanted
        .into_iter()
        .map(|(what, limit_mg_per_l)| {
            let raffinate_mg_per_l = limit_mg_per_l / dilution;
            let minutes = fitted.as_ref().and_then(|f| f.time_to(raffinate_mg_per_l).ok()).map(|o| {
                let t = o.value;
                let (early, late) = (t.early_h.unwrap_or(0.0), t.late_h.unwrap_or(f64::INFINITY));
                Interval { value: t.hours * 60.0, low: early * 60.0, high: late * 60.0, unit: "min" }
            });
            let water_fraction = start_mg_per_l
                .zip(alpha)
                .and_then(|(start, a)| water_off_for((raffinate_mg_per_l / start).min(1.0), a));
            StripLimit { what, limit_mg_per_l, raffinate_mg_per_l, minutes, water_fraction }
        })
        .collect();
    let last = stated.readings.iter().max_by(|a, b| a.minutes.value.total_cmp(&b.minutes.value));
    let serving = stated.serving_ml.as_ref().zip(last).map(|(ml, r)| StripServing {
        mg: r.mg_per_l.value * dilution * ml.value / 1000.0,
        daily_exposure_mg: limits_for(&s.id, Purpose::Medicine).listed.iter().find_map(|l| l.pde_mg_per_day),
    });
    Some(StripPlan {
        pressure_kpa,
        boils_at_c: (pressure_kpa >= BOILS_KPA.0 && pressure_kpa <= BOILS_KPA.1).then(|| water_boils_c(pressure_kpa)),
        start_mg_per_l,
        relative_volatility: alpha,
        water_per_decade: alpha.and_then(water_off_per_decade),
        fit: per_minute,
        limits,
        serving,
        dilution,
    })
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::library::solvents::solvents;
    use crate::study::{StripReading, parse};

    const TEXT: &str = include_str!("../../../tests/data/studies/neutral-alkaloid.json");

    /// Volatility by a measured Henry constant (R. Sander 2015, as held in the library) and by vapour
    /// pressure and solubility: two routes, within a factor of 1.6 for the sparingly soluble.
    #[test]
    fn two_routes_to_the_volatility_agree() {
        let mut compared = 0;
        for s in solvents().iter().filter(|s| s.solubility_in_water_mass_pct.is_some_and(|p| p < 10.0)) {
            let (Some(_), Some(by_saturation)) = (s.henry, volatility_by_saturation(s)) else { continue };
            let ratio = by_saturation / relative_volatility(s).unwrap();
            assert!(ratio > 1.0 / 1.6 && ratio < 1.6, "{} {ratio}", s.id);
            compared += 1;
        }
        assert!(compared >= 8, "{compared}");
        // By hand: c_w/Hcp/p_w = 55 340/0.0036/3170 = 4850.
        let dcm = relative_volatility(&solvent("dichloromethane").unwrap()).unwrap();
        assert!((dcm - 4850.0).abs() < 20.0, "{dcm}");
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
