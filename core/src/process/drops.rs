//! One drop through a still liquid, and how long a layer takes to clear.

use crate::math;
use crate::outcome::{Notice, Outcome};
use crate::solution::sugar::rising;
use crate::study::Problem;
use serde::Serialize;

/// Standard acceleration of free fall [m/s²].
pub const GRAVITY: f64 = 9.806_65;
/// Reynolds number up to which Stokes' law is used [-]; there it overstates the speed by 13 %.
pub const REYNOLDS_STOKES_MAX: f64 = 1.0;
/// Reynolds number up to which the drag law beyond Stokes is used [-].
pub const REYNOLDS_MAX: f64 = 800.0;
/// Highest hold-up answered for [-]; above it drops touch and coalescing decides.
pub const HOLD_UP_MAX: f64 = 0.5;

/// Terminal speed of a rigid sphere in creeping flow [m/s] from `drop_um` [µm] across, the density
/// difference [g/mL] and the viscosity of the liquid around it [Pa s].
///
/// `v = g d² Δρ/(18 μ)`. The sign is that of the difference.
/// Valid: Reynolds number below 1, a single drop far from walls.
/// Reference: G. G. Stokes (1851); C. J. Geankoplis, Transport Processes and Unit Operations 3rd ed., Example
/// 14.3-1: a 20 µm oil drop in air falls at 0.0103 m/s.
pub fn stokes_m_per_s(drop_um: f64, density_difference_g_per_ml: f64, viscosity_pa_s: f64) -> f64 {
    let d = drop_um * 1e-6;
    GRAVITY * d * d * 1000.0 * density_difference_g_per_ml / (18.0 * viscosity_pa_s)
}

/// How much faster a clean drop that circulates inside moves than a rigid one [-], from
/// `viscosity_ratio` [-], that of the drop over that of the liquid around it.
///
/// `3(1 + κ)/(2 + 3κ)`: 3/2 for a bubble, 1 for a rigid sphere.
/// Valid: creeping flow, no surface-active matter: traces of it make drops rigid.
/// Reference: J. Hadamard (1911), W. Rybczynski (1911); κ = 1: 1.2.
pub fn circulation_factor(viscosity_ratio: f64) -> f64 {
    3.0 * (1.0 + viscosity_ratio) / (2.0 + 3.0 * viscosity_ratio)
}

/// Reynolds number of a drop [-]: `ρ v d/μ` with the density [g/mL] and viscosity [Pa s] of the liquid
/// around it. Reference: definition.
pub fn reynolds(drop_um: f64, m_per_s: f64, density_g_per_ml: f64, viscosity_pa_s: f64) -> f64 {
    1000.0 * density_g_per_ml * m_per_s.abs() * drop_um * 1e-6 / viscosity_pa_s
}

/// Terminal speed of a rigid sphere beyond Stokes [m/s], without sign.
///
/// `v (1 + 0.15 Re^0.687) = v_Stokes`, by bisection.
/// Valid: Reynolds number to 800; rigid spheres (a large drop also flattens and wobbles).
/// Reference: L. Schiller & A. Naumann (1933); Coulson & Richardson vol. 2, Example 3.1: 0.051 m/s, within 5 %.
pub fn terminal_m_per_s(
    drop_um: f64,
    density_difference_g_per_ml: f64,
    density_g_per_ml: f64,
    viscosity_pa_s: f64,
) -> f64 {
    let creeping = stokes_m_per_s(drop_um, density_difference_g_per_ml.abs(), viscosity_pa_s);
    let drag = |v: f64| 1.0 + 0.15 * math::pow(reynolds(drop_um, v, density_g_per_ml, viscosity_pa_s), 0.687);
    rising(0.0, creeping, &|v| v * drag(v) < creeping).unwrap_or(creeping)
}

/// How much slower a swarm settles than one drop [-], from `hold_up` [-], the volume fraction of
/// drops, and the Reynolds number of one drop.
///
/// `(1 − φ)ⁿ`; `n` = 4.65 to Re 0.2, `4.35 Re^−0.03` to 1, `4.45 Re^−0.1` to 500, then 2.39.
/// Valid: hold-up 0 to 0.5, drops of one size that neither coalesce nor clump, wide vessel.
/// Reference: J. F. Richardson & W. N. Zaki, Trans. Inst. Chem. Eng. 32 (1954) 35; 10 %, n = 4.65: 0.6127.
pub fn hindered_factor(hold_up: f64, reynolds: f64) -> f64 {
    let n = if reynolds <= 0.2 {
        4.65
    } else if reynolds <= 1.0 {
        4.35 * math::pow(reynolds, -0.03)
    } else if reynolds <= 500.0 {
        4.45 * math::pow(reynolds, -0.1)
    } else {
        2.39
    };
    math::pow(1.0 - hold_up, n)
}

/// Drops of one size in a layer.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct DropsIn {
    /// Drop diameter [µm].
    pub drop_um: f64,
    /// Height the drops have to cross [mm].
    pub layer_height_mm: f64,
    /// Density of the drops less that of the liquid around them [g/mL].
    pub density_difference_g_per_ml: f64,
    /// Density of the liquid around them [g/mL].
    pub continuous_density_g_per_ml: f64,
    /// Viscosity of the liquid around them [Pa s].
    pub continuous_viscosity_pa_s: f64,
    /// Viscosity of the drops [Pa s], if known.
    pub drop_viscosity_pa_s: Option<f64>,
    /// Volume fraction of drops [-].
    pub hold_up: f64,
}

/// How long they take.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct Clearing {
    /// Speed of one rigid drop [m/s]; down where the drops are the denser.
    pub rigid_m_per_s: f64,
    /// Reynolds number of that [-].
    pub reynolds: f64,
    /// Law the speed was taken from.
    pub law: &'static str,
    /// Factor for the drops' being many [-].
    pub hindered_factor: f64,
    /// Time for the layer to clear of rigid drops [s].
    pub time_s: f64,
    /// The same for clean, circulating drops [s], where their viscosity is known and Stokes holds.
    pub time_circulating_s: Option<f64>,
}

/// Time in which drops of one size cross a layer.
///
/// `t = h/(v·(1 − φ)ⁿ)`; `v` by Stokes to Re 1, by Schiller & Naumann to Re 800.
/// Valid: still liquid, no coalescence (which shortens it), no emulsion (which may hold for ever).
/// Reference: [`stokes_m_per_s`], [`terminal_m_per_s`], [`hindered_factor`].
///
/// # Errors
/// A size, height, density or viscosity that is not above 0, no density difference, hold-up outside
/// 0 to 0.5, or a Reynolds number above 800.
pub fn clearing(drops: &DropsIn) -> Result<Outcome<Clearing>, Problem> {
    let refuse = |what: String| Err(Problem::new("settling", what));
    for (what, value, unit) in [
        ("the drop size", drops.drop_um, "µm"),
        ("the layer height", drops.layer_height_mm, "mm"),
        ("the liquid's density", drops.continuous_density_g_per_ml, "g/mL"),
        ("the liquid's viscosity", drops.continuous_viscosity_pa_s, "Pa s"),
        ("the drops' viscosity", drops.drop_viscosity_pa_s.unwrap_or(1.0), "Pa s"),
    ] {
        if !(value > 0.0 && value.is_finite()) {
            return refuse(format!("{what} is {value} {unit}; it must be above 0"));
        }
    }
    let difference = drops.density_difference_g_per_ml;
    if !(difference != 0.0 && difference.is_finite()) {
        return refuse(format!(
            "the density difference is {difference} g/mL: such layers do not part; change solvent or °Brix"
        ));
    }
    if !(0.0..=HOLD_UP_MAX).contains(&drops.hold_up) {
        return refuse(format!(
            "the hold-up is {}; hindered settling is known from 0 to {HOLD_UP_MAX}, above it drops touch",
            drops.hold_up
        ));
    }
    let (density, viscosity) = (drops.continuous_density_g_per_ml, drops.continuous_viscosity_pa_s);
    let mut v = stokes_m_per_s(drops.drop_um, difference, viscosity);
    let mut re = reynolds(drops.drop_um, v, density, viscosity);
    let mut law = "Stokes";
    let mut notices = Vec::new();
    let creeping = re <= REYNOLDS_STOKES_MAX;
    if !creeping {
        notices.push(Notice::new(
            "settling",
            format!("Stokes' law ends at a Reynolds number of 1 and gives {re:.1}: the drag law of Schiller and Naumann is used"),
        ));
        v = terminal_m_per_s(drops.drop_um, difference, density, viscosity).copysign(difference);
        re = reynolds(drops.drop_um, v, density, viscosity);
        law = "Schiller–Naumann";
        if !(re <= REYNOLDS_MAX) {
            return refuse(format!(
                "drops of {} µm would have a Reynolds number of {re:.0}; the drag law ends at {REYNOLDS_MAX}. Such drops part at once",
                drops.drop_um
            ));
        }
    }
    let hindered = hindered_factor(drops.hold_up, re);
    let time_s = drops.layer_height_mm / 1000.0 / (v.abs() * hindered);
    if !time_s.is_finite() {
        return refuse(format!("drops of {} µm do not settle in any time that can be given", drops.drop_um));
    }
    let time_circulating_s =
        drops.drop_viscosity_pa_s.filter(|_| creeping).map(|m| time_s / circulation_factor(m / viscosity));
    Ok(Outcome {
        value: Clearing { rigid_m_per_s: v, reynolds: re, law, hindered_factor: hindered, time_s, time_circulating_s },
        notices,
    })
}

#[cfg(test)]
mod tests {
    use super::*;

    /// 50 µm drops 0.0962 g/mL lighter than water, 80 mm: 611.6 s (Stokes, worked out apart).
    const DROPS: DropsIn = DropsIn {
        drop_um: 50.0,
        layer_height_mm: 80.0,
        density_difference_g_per_ml: -0.0962,
        continuous_density_g_per_ml: 0.9982,
        continuous_viscosity_pa_s: 1.002e-3,
        drop_viscosity_pa_s: Some(1.002e-3),
        hold_up: 0.0,
    };

    #[test]
    fn a_layer_clears() {
        let c = clearing(&DROPS).unwrap().value;
        assert!((c.time_s / 611.6 - 1.0).abs() < 0.002 && c.rigid_m_per_s < 0.0 && c.law == "Stokes");
        // κ = 1: 1.2 times as fast. 30 %, n = 4.65: 0.1904 (Richardson & Zaki).
        assert!((c.time_circulating_s.unwrap() * 1.2 / c.time_s - 1.0).abs() < 1e-12);
        let many = clearing(&DropsIn { hold_up: 0.3, ..DROPS }).unwrap().value;
        assert!((c.time_s / many.time_s - 0.1904).abs() < 1e-4);
    }

    #[test]
    fn odd_input_is_refused_not_answered() {
        for bad in [f64::NAN, f64::INFINITY, -1.0, 0.0] {
            for wrong in [
                DropsIn { drop_um: bad, ..DROPS },
                DropsIn { layer_height_mm: bad, ..DROPS },
                DropsIn { continuous_viscosity_pa_s: bad, ..DROPS },
                DropsIn { drop_viscosity_pa_s: Some(bad), ..DROPS },
                DropsIn { density_difference_g_per_ml: if bad < 0.0 { f64::NAN } else { bad }, ..DROPS },
                DropsIn { hold_up: if bad == 0.0 { 0.6 } else { bad }, ..DROPS },
            ] {
                assert!(clearing(&wrong).is_err(), "{wrong:?}");
            }
        }
        assert!(clearing(&DropsIn { drop_um: 1e300, ..DROPS }).is_err());
    }
}
