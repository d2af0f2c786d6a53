//! A dissolved volatile between water and the vapour over it: Henry constants in every form, and
//! the volatility against water that stripping rests on.

use super::isolate::WATER_MOLAR_MASS;
use super::vapour::{ZERO_C_K, boils_where, water_kpa};
use crate::library::solvents::{Henry, KPA_PER_MMHG};
use crate::math;
use crate::solution::ionisation::GAS_CONSTANT;

/// Density of water [g/m³], 25 °C: Kell 1975.
const WATER_G_PER_M3: f64 = 997_047.0;
/// Temperature the constants stand for [K].
const REFERENCE_K: f64 = 298.15;
/// Pressure of one atmosphere [Pa].
const PA_PER_ATM: f64 = 760.0 * KPA_PER_MMHG * 1000.0;

/// Henry solubility constant [mol/(m³ Pa)] at `t_c` [°C].
///
/// `H(T) = H(25 °C)·exp[s·(1/T − 1/298.15 K)]`; without a slope the constant is taken as it is,
/// which overstates the solubility when warm.
/// Valid: pure water, dilute, a few tens of kelvin. Sugar and salt drive the volatile out; ethanol
/// keeps it in.
/// Reference: R. Sander, Atmos. Chem. Phys. 15 (2015) 4399.
pub fn hcp_at(henry: &Henry, t_c: f64) -> f64 {
    let slope = henry.slope_k.unwrap_or(0.0);
    henry.hcp_25c_mol_m3_pa * math::exp(slope * (1.0 / (t_c + ZERO_C_K) - 1.0 / REFERENCE_K))
}

/// Henry solubility constant [mol/(m³ Pa)] from one in mol/(L atm).
pub fn hcp_from_mol_per_l_atm(k: f64) -> f64 {
    k * 1000.0 / PA_PER_ATM
}

/// Henry solubility constant [mol/(m³ Pa)] from the solubility in water [mg/L], the vapour
/// pressure [kPa] and the molar mass [g/mol].
///
/// `H = (S/M)/p`. Valid: the saturated solution is dilute and the solvent layer nearly pure: not
/// for solvents that dissolve above a few per cent.
/// Reference: J. Kuo, Practical Design Calculations, 2nd ed., Example 2.29 (benzene 5.48 atm L/mol).
pub fn hcp_from_solubility(solubility_mg_per_l: f64, vapour_kpa: f64, molar_mass: f64) -> f64 {
    solubility_mg_per_l / molar_mass / (vapour_kpa * 1000.0)
}

/// Concentration in air over that in water [-] at `t_c` [°C]; `hcp` [mol/(m³ Pa)] at that temperature.
///
/// `K_aw = 1/(H·R·T)`.
/// Reference: definition; J. Kuo, Example 2.30 (tetrachloroethylene 1.08 at 20 °C).
pub fn air_over_water(hcp: f64, t_c: f64) -> f64 {
    1.0 / (hcp * GAS_CONSTANT * (t_c + ZERO_C_K))
}

/// Partial pressure per mole fraction in water [kPa]; `hcp` [mol/(m³ Pa)].
///
/// `K = (ρ_w/M_w)/H`. Valid: dilute.
/// Reference: conversion table after R. Sander: oxygen 42 590 atm at 25 °C.
pub fn kpa_per_mole_fraction(hcp: f64) -> f64 {
    WATER_G_PER_M3 / WATER_MOLAR_MASS / hcp / 1000.0
}

/// Volatility of a dilute volatile against water [-] at `t_c` [°C]; `hcp` [mol/(m³ Pa)] at that
/// temperature.
///
/// `α = (y/x)/(y_w/x_w) = K/p_w`, `K` partial pressure per mole fraction.
/// Valid: dilute; vapour in equilibrium with the liquid, which a still liquid never is: the
/// strongest stripping possible.
/// Reference: definition, C. J. Geankoplis, Transport Processes, 11.3.
pub fn volatility(hcp: f64, t_c: f64) -> f64 {
    kpa_per_mole_fraction(hcp) / water_kpa(t_c)
}

/// The same [-] from the activity coefficient at infinite dilution `gamma` [-] and the vapour
/// pressures of the pure liquids, in one unit.
///
/// `α = γ∞·p_sat/p_w`; γ = 1 is an ideal mixture.
/// Reference: C. J. Geankoplis, Example 11.3-1 (benzene over toluene 2.54 at 85 °C, γ = 1).
pub fn volatility_from_gamma(gamma: f64, p_sat: f64, p_water: f64) -> f64 {
    gamma * p_sat / p_water
}

/// Activity coefficient at infinite dilution in water [-] of a sparingly soluble liquid, from its
/// mole fraction in the saturated water.
///
/// `γ∞ ≈ 1/x`. Valid: solubility below about 1 %, and a solvent layer that is nearly pure.
/// Reference: equality of activities at saturation.
pub fn gamma_from_solubility(mole_fraction: f64) -> f64 {
    1.0 / mole_fraction
}

/// Fraction of a dissolved volatile left [-] when `gas_over_liquid` volumes of gas have passed
/// through one volume of liquid.
///
/// `c/c₀ = exp(−K_aw·V_g/V_l)`.
/// Valid: the gas leaves in equilibrium; K constant. A lower bound of what stays.
/// Reference: differential balance; no published number.
pub fn left_after_gas(air_over_water: f64, gas_over_liquid: f64) -> f64 {
    math::exp(-air_over_water * gas_over_liquid)
}

/// Boiling temperature [°C] at `kpa` [kPa] of water that holds `mol_per_m3` of the volatile.
///
/// `p_w(t) + c/H(t) = P`; `None` outside −60 to 250 °C.
/// Valid: dilute, one liquid. Where two layers lie, use
/// [`super::vapour::two_layers_boil_c`]: it is the lower one. Dissolved solids raise it.
/// Reference: Henry and Dalton; water alone boils at 99.97 °C at 101.325 kPa (IAPWS).
pub fn dissolved_boils_c(henry: &Henry, mol_per_m3: f64, kpa: f64) -> Option<f64> {
    boils_where(kpa, &|t| water_kpa(t) + mol_per_m3 / hcp_at(henry, t) / 1000.0)
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::library::solvents::solvents;
    use crate::process::vapour::{ATMOSPHERE_KPA, mole_fraction};

    /// Henry constants come from another compilation than solubility and vapour pressure. MEK is
    /// left out, and ethyl acetate and 2-methyltetrahydrofuran get more room: their saturated
    /// solutions are not dilute. Butanols are not dilute either, but agree.
    #[test]
    fn constants_agree_with_solubility_over_vapour_pressure() {
        for s in solvents() {
            let (Some(h), Some(w), Some(p)) = (s.henry, s.solubility_in_water_mass_pct, s.vapour_pressure_25c_kpa)
            else {
                continue;
            };
            let room = match s.id.as_str() {
                "mek" => continue,
                "ethyl_acetate" | "me_thf" | "cpme" => 0.30,
                _ => 0.15,
            };
            let found = hcp_from_solubility(w * 1e4, p, s.molar_mass_g_mol) / h.hcp_25c_mol_m3_pa;
            assert!((found - 1.0).abs() < room, "{}: {found}", s.id);
        }
    }

    /// Both ways to the volatility agree for sparingly soluble solvents.
    #[test]
    fn volatility_by_both_ways() {
        for s in solvents() {
            let (Some(h), Some(w), Some(p)) = (s.henry, s.solubility_in_water_mass_pct, s.vapour_pressure_25c_kpa)
            else {
                continue;
            };
            if w > 2.0 {
                continue;
            }
            let gamma = gamma_from_solubility(mole_fraction(w / 100.0, s.molar_mass_g_mol, WATER_MOLAR_MASS));
            let ratio = volatility_from_gamma(gamma, p, water_kpa(25.0)) / volatility(hcp_at(&h, 25.0), 25.0);
            let room = if s.id == "cpme" { 0.30 } else { 0.15 };
            assert!((ratio - 1.0).abs() < room, "{}: {ratio}", s.id);
        }
    }

    #[test]
    fn water_alone_boils_at_its_own_temperature() {
        let henry = Henry { hcp_25c_mol_m3_pa: 1e-3, range_mol_m3_pa: None, slope_k: Some(4000.0) };
        let t = dissolved_boils_c(&henry, 0.0, ATMOSPHERE_KPA).unwrap();
        assert!((t - 99.974).abs() < 0.002, "{t}");
        assert!(dissolved_boils_c(&henry, 5.0, ATMOSPHERE_KPA).unwrap() < t);
        assert_eq!(dissolved_boils_c(&henry, f64::NAN, ATMOSPHERE_KPA), None);
    }
}
