//! From the partition coefficient of the neutral form to the distribution ratio at a pH.

use crate::math;
use crate::solution::ionisation::{Constant, GAS_CONSTANT, speciate};
use crate::study::PartitionEntry;

/// K of the neutral form and of the ionised forms at one temperature.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Partition {
    /// Neutral form [-].
    pub k_neutral: f64,
    /// Ionised forms together, as ion pairs [-].
    pub k_ion_pair: f64,
}

/// K at `t` [°C] from its value at `t0` [°C] and the enthalpy of transfer from water to solvent
/// `h` [kJ/mol].
///
/// `ln K(T) = ln K(T₀) − ΔH/R·(1/T − 1/T₀)`.
/// Valid: ΔH constant, a few tens of kelvin from `t0`.
/// Reference: van 't Hoff. Check by hand: ΔH = 18.56 kJ/mol doubles K from 10 to 37.3 °C.
pub fn k_at(k: f64, t0: f64, h: f64, t: f64) -> f64 {
    k * math::exp(-h * 1000.0 / GAS_CONSTANT * (1.0 / (t + 273.15) - 1.0 / (t0 + 273.15)))
}

/// The constants of `entry` at `t` [°C]; nothing stated means nothing enters the solvent.
pub fn partition_at(entry: Option<&PartitionEntry>, t: f64) -> Partition {
    let Some(p) = entry else {
        return Partition { k_neutral: 0.0, k_ion_pair: 0.0 };
    };
    let h = p.transfer_enthalpy_kj_per_mol.as_ref().map_or(0.0, |q| q.value);
    Partition {
        k_neutral: k_at(p.k_neutral.value, p.k_temperature_c, h, t),
        k_ion_pair: p.k_ion_pair.as_ref().map_or(0.0, |q| q.value),
    }
}

/// Distribution ratio D [-] at `ph` [-].
///
/// `D = K_N·f_N + K_ip·(1 − f_N)`; `f_N` fraction with net charge 0, `K_ip` one constant for all
/// ionised forms (it depends on the counter-ion and its concentration).
/// Valid: dilute, ideal phases. Where the net-neutral form is a zwitterion, `K_N` must have been
/// measured for that form.
/// Reference: D. Harvey, Analytical Chemistry 2.1, Example 7.7.3 (60 % at pH 5); D. C. Harris,
/// Quantitative Chemical Analysis, effect of pH (amine, D 2.73 at pH 10).
pub fn distribution_ratio(p: Partition, constants: &[Constant], ph: f64) -> f64 {
    let neutral = speciate(constants, ph).neutral;
    p.k_neutral * neutral + p.k_ion_pair * (1.0 - neutral)
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::study::SiteKind;

    fn neutral_only(k: f64) -> Partition {
        Partition { k_neutral: k, k_ion_pair: 0.0 }
    }

    /// D. C. Harris, Quantitative Chemical Analysis, effect-of-pH example: K 3.0, pKa(BH+) 9.00;
    /// D 2.73 at pH 10 and 0.273 at pH 8.
    #[test]
    fn an_amine() {
        let c = [Constant { kind: SiteKind::ConjugateAcidOfBase, pka: 9.0 }];
        assert!((distribution_ratio(neutral_only(3.0), &c, 10.0) - 2.73).abs() < 0.005);
        assert!((distribution_ratio(neutral_only(3.0), &c, 8.0) - 0.273).abs() < 0.0005);
    }

    /// Definition: an acid's D halves at its pKa and falls tenfold per pH above.
    #[test]
    fn an_acid() {
        let c = [Constant { kind: SiteKind::Acid, pka: 4.2 }];
        assert!((distribution_ratio(neutral_only(50.0), &c, 4.2) - 25.0).abs() < 1e-6);
        assert!((distribution_ratio(neutral_only(50.0), &c, 6.2) - 0.495_05).abs() < 1e-5);
    }

    #[test]
    fn ion_pairs_set_a_floor() {
        let c = [Constant { kind: SiteKind::Acid, pka: 4.0 }];
        let p = Partition { k_neutral: 100.0, k_ion_pair: 0.5 };
        assert!((distribution_ratio(p, &c, 14.0) - 0.5).abs() < 1e-6);
    }

    /// By hand: ΔH/R·(1/283.15 − 1/310.45) = ln 2 for ΔH = 18.56 kJ/mol.
    #[test]
    fn temperature() {
        let h = core::f64::consts::LN_2 * 8.314_462_618 / (1.0 / 283.15 - 1.0 / 310.45) / 1000.0;
        assert!((k_at(5.0, 10.0, h, 37.3) - 10.0).abs() < 1e-9);
    }
}
