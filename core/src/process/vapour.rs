//! Vapour over a liquid: pressure, boiling temperature, and what air holds at saturation.

use super::isolate::WATER_MOLAR_MASS;
use crate::library::solvents::{Antoine, AntoineKind, KPA_PER_MMHG, Solvent};
use crate::math;
use crate::outcome::{Notice, Outcome};
use crate::solution::ionisation::GAS_CONSTANT;
use crate::study::Problem;

/// Standard atmosphere [kPa].
pub const ATMOSPHERE_KPA: f64 = 101.325;
/// 0 °C [K].
pub const ZERO_C_K: f64 = 273.15;
/// How far beyond their range Antoine constants are still used, with a notice [K].
const BEYOND_K: f64 = 40.0;

/// Vapour pressure [kPa] at `t_c` [°C] by the Antoine equation, with a notice outside the range of
/// the constants and where they rest on an estimate.
///
/// `log10(p/mmHg) = A − B/(t + C)`.
/// Valid: within the range of the constants; up to 40 K beyond it with a notice.
/// Reference: G. W. Thomson, Chem. Rev. 38 (1946) 1; n-pentane boils at 36.07 °C.
///
/// # Errors
/// A temperature more than 40 K outside the range, or not a number.
pub fn vapour_pressure(antoine: &Antoine, t_c: f64) -> Result<Outcome<f64>, Problem> {
    let notices = within(antoine, t_c)?;
    Ok(Outcome { value: antoine_kpa(antoine, t_c), notices })
}

/// Boiling temperature [°C] of a pure liquid at `kpa` [kPa], with the same notices.
///
/// `t = B/(A − log10(p/mmHg)) − C`.
/// Valid: as [`vapour_pressure`].
/// Reference: ethyl acetate 77.1 °C at 101.325 kPa (CRC Handbook).
///
/// # Errors
/// A pressure that is not above 0, or one whose boiling temperature is out of range.
pub fn boiling_temperature(antoine: &Antoine, kpa: f64) -> Result<Outcome<f64>, Problem> {
    pressure(kpa)?;
    let rest = antoine.a - math::log10(kpa / KPA_PER_MMHG);
    if !(rest > 0.0) {
        return Err(Problem::new(
            "pressure_kpa",
            format!("pressure {kpa} kPa is beyond the equation; take a lower one"),
        ));
    }
    let value = antoine.b / rest - antoine.c;
    Ok(Outcome { value, notices: within(antoine, value)? })
}

/// The bare Antoine equation [kPa] at `t_c` [°C]; see [`vapour_pressure`]. 0 below the pole.
pub fn antoine_kpa(antoine: &Antoine, t_c: f64) -> f64 {
    let denominator = t_c + antoine.c;
    if denominator > 0.0 { KPA_PER_MMHG * math::exp10(antoine.a - antoine.b / denominator) } else { 0.0 }
}

fn within(antoine: &Antoine, t_c: f64) -> Result<Vec<Notice>, Problem> {
    let (low, high) = (antoine.low_c, antoine.high_c);
    let words = format!("temperature {t_c:.1} °C, constants hold from {low} to {high} °C");
    if !(low - BEYOND_K..=high + BEYOND_K).contains(&t_c) {
        return Err(Problem::new(
            "temperature_c",
            format!("{words}; take a temperature or pressure within {BEYOND_K} K of that"),
        ));
    }
    let mut notices = Vec::new();
    if !(low..=high).contains(&t_c) {
        notices.push(Notice::new("vapour", format!("Vapour pressure extrapolated: {words}.")));
    }
    if antoine.kind == AntoineKind::Estimate {
        notices.push(Notice::new("vapour", "No measured vapour pressure was found: it is an estimate, ± 40 %."));
    }
    Ok(notices)
}

fn pressure(kpa: f64) -> Result<(), Problem> {
    if kpa > 0.0 && kpa.is_finite() {
        Ok(())
    } else {
        Err(Problem::new("pressure_kpa", format!("pressure {kpa} kPa; it must be above 0, e.g. 101.325 for open air")))
    }
}

/// Coefficients of IAPWS-IF97, region 4 (R7-97, Table 34).
const N: [f64; 10] = [
    0.116_705_214_527_67e4,
    -0.724_213_167_032_06e6,
    -0.170_738_469_400_92e2,
    0.120_208_247_024_70e5,
    -0.323_255_503_223_33e7,
    0.149_151_086_135_30e2,
    -0.482_326_573_615_91e4,
    0.405_113_405_420_57e6,
    -0.238_555_575_678_49,
    0.650_175_348_447_98e3,
];

/// Vapour pressure of water [kPa] at `t_c` [°C].
///
/// IAPWS-IF97, region 4: a quadratic in `p^(1/4)` and `ϑ = T + n₉/(T − n₁₀)`.
/// Valid: 0–373.9 °C, within 0.03 %; below 0 °C it runs on as supercooled water.
/// Reference: IAPWS R7-97(2012), Table 35: 3.53658941 kPa at 300 K, 2638.89776 kPa at 500 K.
pub fn water_kpa(t_c: f64) -> f64 {
    let t = t_c + ZERO_C_K;
    let theta = t + N[8] / (t - N[9]);
    let a = theta * theta + N[0] * theta + N[1];
    let b = N[2] * theta * theta + N[3] * theta + N[4];
    let c = N[5] * theta * theta + N[6] * theta + N[7];
    let root = 2.0 * c / (-b + math::sqrt(b * b - 4.0 * a * c));
    1000.0 * root * root * root * root
}

/// Boiling temperature of water [°C] at `kpa` [kPa]: the same equation the other way round.
///
/// Valid: 0.6–22 064 kPa.
/// Reference: IAPWS R7-97(2012), Table 36: 372.755919 K at 0.1 MPa, 584.149488 K at 10 MPa.
pub fn water_boils_c(kpa: f64) -> f64 {
    let beta = math::sqrt(math::sqrt(kpa / 1000.0));
    let e = beta * beta + N[2] * beta + N[5];
    let f = N[0] * beta * beta + N[3] * beta + N[6];
    let g = N[1] * beta * beta + N[4] * beta + N[7];
    let d = 2.0 * g / (-f - math::sqrt(f * f - 4.0 * e * g));
    let s = N[9] + d;
    0.5 * (s - math::sqrt(s * s - 4.0 * (N[8] + N[9] * d))) - ZERO_C_K
}

/// Lowest and highest temperature [°C] between which a boiling liquid is looked for.
const SEARCH_C: (f64, f64) = (-60.0, 250.0);

/// Temperature [°C] at which the rising pressure `total` [kPa] reaches `kpa` [kPa], by bisection;
/// `None` outside −60 to 250 °C.
pub fn boils_where(kpa: f64, total: &dyn Fn(f64) -> f64) -> Option<f64> {
    let (mut low, mut high) = SEARCH_C;
    if !(total(low) <= kpa && kpa <= total(high)) {
        return None;
    }
    for _ in 0..100 {
        let mid = 0.5 * (low + high);
        if mid <= low || mid >= high {
            break;
        }
        if total(mid) < kpa { low = mid } else { high = mid }
    }
    Some(0.5 * (low + high))
}

/// Mole fraction [-] of a substance of molar mass `m` [g/mol] from its mass fraction `w` [-] in
/// another of molar mass `m_other` [g/mol].
///
/// `x = (w/M)/(w/M + (1 − w)/M')`.
/// Reference: definition; water 8.6e−4 in chloroform, x 0.00567 (IUPAC-NIST Solubility Database).
pub fn mole_fraction(w: f64, m: f64, m_other: f64) -> f64 {
    w / m / (w / m + (1.0 - w) / m_other)
}

/// Two layers of solvent and water, each saturated with the other: mole fraction of the solvent in
/// its own layer and of water in its own [-]. Where a solubility is not held the layer counts as pure.
///
/// Valid: solubilities near 25 °C; they shift with temperature.
/// Reference: [`mole_fraction`] of the library's mutual solubilities.
pub fn layer_purity(solvent: &Solvent) -> (f64, f64) {
    let m = solvent.molar_mass_g_mol;
    let share =
        |pct: Option<f64>, solute: f64, main: f64| 1.0 - pct.map_or(0.0, |w| mole_fraction(w / 100.0, solute, main));
    let solvent_x = share(solvent.water_in_solvent_mass_pct, WATER_MOLAR_MASS, m);
    let water_x = share(solvent.solubility_in_water_mass_pct, m, WATER_MOLAR_MASS);
    (solvent_x, water_x)
}

/// Boiling temperature [°C] at `kpa` [kPa] of water with a layer of solvent on or under it.
///
/// `x_w·p_water(t) + x_s·p_solvent(t) = P`, with `purity` = (x_s, x_w) by [`layer_purity`], or (1, 1)
/// for layers taken as pure, which gives the lowest temperature. It boils below either of them.
/// Valid: mutual solubility of a few per cent. Within 0.8 K of the tables for ethyl acetate,
/// dichloromethane, chloroform, toluene and the alkanes; 2 K too high for 1-butanol. Not for
/// 2-butanol (5 K too high) and MEK, whose layers hold too much water.
/// Reference: Lange's and CRC tables of azeotropes with water: ethyl acetate 70.4 °C, chloroform 56.1 °C.
pub fn two_layers_boil_c(solvent: &Antoine, purity: (f64, f64), kpa: f64) -> Option<f64> {
    boils_where(kpa, &|t| purity.1 * water_kpa(t) + purity.0 * antoine_kpa(solvent, t))
}

/// Mass fraction of solvent [-] in the vapour over two layers at the partial pressures given [kPa].
///
/// `w = p_o·M_o/(p_o·M_o + p_w·M_w)`; `molar_mass` of the solvent [g/mol].
/// Valid: ideal gas, both layers present.
/// Reference: W. F. Sheehan, Physical Chemistry, ch. 5, Example 7 (61.3 %).
pub fn two_layers_solvent_mass_fraction(solvent_kpa: f64, water_kpa: f64, molar_mass: f64) -> f64 {
    let solvent = solvent_kpa * molar_mass;
    solvent / (solvent + water_kpa * WATER_MOLAR_MASS)
}

/// Total pressure, and mole fraction of the first in the vapour [-], of an ideal liquid of two.
///
/// `P = x·p₁ + (1 − x)·p₂`, `y = x·p₁/P`.
/// Valid: ideal mixture (Raoult).
/// Reference: W. F. Sheehan, Physical Chemistry, ch. 5, Example 4 (P 247.8, y 0.659).
pub fn raoult(x: f64, p1: f64, p2: f64) -> (f64, f64) {
    let total = x * p1 + (1.0 - x) * p2;
    (total, if total > 0.0 { x * p1 / total } else { 0.0 })
}

/// Pressure at `t2_c` [°C] from `p1` at `t1_c` [°C] and a heat of vaporisation [kJ/mol], in the
/// unit of `p1`.
///
/// `ln(p₂/p₁) = ΔH/R·(1/T₁ − 1/T₂)`.
/// Valid: ΔH constant, a few tens of kelvin; ideal vapour.
/// Reference: Clausius–Clapeyron; R. Chang, Chemistry, Example 11.7 (401 to 656 mmHg).
pub fn clausius_clapeyron(p1: f64, t1_c: f64, heat_kj_per_mol: f64, t2_c: f64) -> f64 {
    let slope = heat_kj_per_mol * 1000.0 / GAS_CONSTANT;
    p1 * math::exp(slope * (1.0 / (t1_c + ZERO_C_K) - 1.0 / (t2_c + ZERO_C_K)))
}

/// Heat of vaporisation [kJ/mol] from two vapour pressures in one unit; the same equation.
///
/// Reference: Felder & Rousseau, Example 6.1-1 (35.02 kJ/mol).
pub fn heat_of_vaporisation(p1: f64, t1_c: f64, p2: f64, t2_c: f64) -> f64 {
    GAS_CONSTANT / 1000.0 * math::ln(p2 / p1) / (1.0 / (t1_c + ZERO_C_K) - 1.0 / (t2_c + ZERO_C_K))
}

/// Boiling temperature [°C] at `kpa` from one at another pressure in the same unit; the same equation.
///
/// Reference: OpenStax Chemistry 2e, 10.3 (benzene, 73.7 °C at 83.4 kPa).
pub fn boils_at_other_pressure_c(boils_c: f64, at_kpa: f64, heat_kj_per_mol: f64, kpa: f64) -> f64 {
    let slope = heat_kj_per_mol * 1000.0 / GAS_CONSTANT;
    1.0 / (1.0 / (boils_c + ZERO_C_K) - math::ln(kpa / at_kpa) / slope) - ZERO_C_K
}

/// Volume of a mole of gas [L/mol] at `t_c` [°C] and `kpa` [kPa].
///
/// `V = R·T/P`. Valid: ideal gas.
/// Reference: NIOSH Manual of Analytical Methods, Appendix A: 24.46 L/mol at 25 °C, 760 mmHg.
pub fn molar_volume_l(t_c: f64, kpa: f64) -> f64 {
    GAS_CONSTANT * (t_c + ZERO_C_K) / kpa
}

/// Mass of vapour in air [mg/m³] from its share [ppm by volume].
///
/// `c = ppm·M/V_m`; `molar_mass` [g/mol].
/// Reference: NIOSH Pocket Guide conversion factors at 25 °C, 1 atm: dichloromethane 3.47.
pub fn ppm_to_mg_per_m3(ppm: f64, molar_mass: f64, t_c: f64, kpa: f64) -> f64 {
    ppm * molar_mass / molar_volume_l(t_c, kpa)
}

/// Share of vapour in air [ppm by volume] from its mass [mg/m³]; see [`ppm_to_mg_per_m3`].
pub fn mg_per_m3_to_ppm(mg_per_m3: f64, molar_mass: f64, t_c: f64, kpa: f64) -> f64 {
    mg_per_m3 * molar_volume_l(t_c, kpa) / molar_mass
}

/// What air holds when it is saturated with the vapour.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct SaturatedAir {
    /// Share by volume [ppm].
    pub ppm: f64,
    /// Mass [g/m³].
    pub g_per_m3: f64,
}

/// Vapour in saturated air, from its pressure `vapour_kpa` [kPa] at `t_c` [°C], in air at `kpa` [kPa].
///
/// `ppm = 10⁶·p/P`, at most 10⁶; `c = p·M/(R·T)`, `molar_mass` [g/mol].
/// Valid: ideal gas, still air over the liquid: the most that air can hold.
/// Reference: definition; benzene 95.2 mmHg at 1 atm, 125 263 ppm.
pub fn saturated_air(vapour_kpa: f64, molar_mass: f64, t_c: f64, kpa: f64) -> SaturatedAir {
    let p = vapour_kpa.min(kpa);
    SaturatedAir { ppm: 1e6 * p / kpa, g_per_m3: p * molar_mass / (GAS_CONSTANT * (t_c + ZERO_C_K)) * 1000.0 }
}

#[cfg(test)]
mod tests;
