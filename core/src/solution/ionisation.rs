//! Protonation states from macroscopic constants.

use super::water;
use crate::math;
use crate::order::put_in_order;
use crate::study::{Ingredient, MeantAs, Site, SiteKind};

/// Gas constant [J/(mol K)]; CODATA 2018, exact.
pub const GAS_CONSTANT: f64 = 8.314_462_618;

/// A site at the temperature of the liquid.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Constant {
    /// What it is.
    pub kind: SiteKind,
    /// Macroscopic pKa.
    pub pka: f64,
}

/// Fractions of an ingredient's protonation states at one pH.
#[derive(Clone, Debug, PartialEq)]
pub struct Speciation {
    /// Net charge of each state, from the most protonated to the least.
    pub charges: Vec<i32>,
    /// Fraction in each state; they sum to 1.
    pub fractions: Vec<f64>,
    /// Fraction with net charge 0.
    pub neutral: f64,
    /// Mean net charge.
    pub mean_charge: f64,
    /// Whether the net-neutral state is mostly a zwitterion.
    pub zwitterion: bool,
}

/// pKa at `t` [°C] from its value at `t0` [°C] and the enthalpy of proton loss `h` [kJ/mol].
///
/// `pKa(T) = pKa(T₀) + ΔH/(R ln 10)·(1/T − 1/T₀)`.
/// Valid: ΔH constant, a few tens of kelvin from `t0`.
/// Reference: van 't Hoff; tris, pKa 8.072 at 25 °C, ΔH 47.45 kJ/mol (R. N. Goldberg,
/// N. Kishore & R. M. Lennen, J. Phys. Chem. Ref. Data 31 (2002) 231), falls 0.028 per kelvin.
pub fn pka_at(pka: f64, t0: f64, h: f64, t: f64) -> f64 {
    pka + h * 1000.0 / (GAS_CONSTANT * math::LN_10) * (1.0 / (t + 273.15) - 1.0 / (t0 + 273.15))
}

/// The constant a published value amounts to at `t` [°C], by the way it is meant.
///
/// A pKb becomes `pKa = pKw(t) − pKb`. `Unstated` gives nothing: try each way.
pub fn constant_of(value: f64, meant_as: MeantAs, t: f64) -> Option<Constant> {
    match meant_as {
        MeantAs::Acid => Some(Constant { kind: SiteKind::Acid, pka: value }),
        MeantAs::ConjugateAcidOfBase => Some(Constant { kind: SiteKind::ConjugateAcidOfBase, pka: value }),
        MeantAs::PkbWrittenAsPka => Some(Constant { kind: SiteKind::ConjugateAcidOfBase, pka: water::pkw(t) - value }),
        MeantAs::Unstated => None,
    }
}

/// The undisputed constants of `sites` at `t` [°C].
pub fn constants_of(sites: &[Site], t: f64) -> Vec<Constant> {
    sites
        .iter()
        .map(|s| {
            let h = s.enthalpy_kj_per_mol.as_ref().map_or(0.0, |q| q.value);
            Constant { kind: s.kind, pka: pka_at(s.pka.value, s.pka_temperature_c, h, t) }
        })
        .collect()
}

/// All constants the plan uses for `ingredient` at `t` [°C]: its sites and, where one is
/// disputed, the reading in use.
pub fn constants_in_use(ingredient: &Ingredient, t: f64) -> Vec<Constant> {
    let mut all = constants_of(&ingredient.sites, t);
    if let Some(r) = ingredient.disputed.as_ref().and_then(|d| d.readings.get(d.in_use)) {
        all.extend(constant_of(r.value.value, r.meant_as, t));
    }
    all
}

/// Fractions of every protonation state at `ph` [-], from macroscopic constants in any order.
///
/// With the constants sorted falling, the state holding `k` protons has the weight
/// `10^(pK₁ + … + pK_k − k·pH)` and the charge `k − n_acid`. Weights are divided by the largest, in
/// logarithms, so nothing overflows at any pH.
/// Valid: macroscopic constants on the same scale as the pH; activity effects are in the
/// constants. No sites: one neutral state.
/// Reference: definition of the species fractions; citric acid at pH 3.4 (pKa 3.128, 4.761,
/// 6.396): 0.3387, 0.6336, 0.0276, 2.79e−5.
pub fn speciate(constants: &[Constant], ph: f64) -> Speciation {
    speciate_with_activities(constants, ph, 0.0)
}

/// As [`speciate`], concentrations from thermodynamic constants: the weight of a state of charge
/// `z` is divided by its activity coefficient, `log10 γ = z²·log_gamma_per_z2`.
///
/// Valid and reference: `ph` on the activity scale; coefficients as in
/// [`super::activity::log_gamma_per_z2`].
pub fn speciate_with_activities(constants: &[Constant], ph: f64, log_gamma_per_z2: f64) -> Speciation {
    let mut sorted = constants.to_vec();
    put_in_order(&mut sorted, |a, b| b.pka.total_cmp(&a.pka));
    let n_acid = sorted.iter().filter(|c| c.kind == SiteKind::Acid).count();

    let mut log_weights = Vec::with_capacity(sorted.len() + 1);
    let mut sum = 0.0;
    log_weights.push(0.0);
    for c in &sorted {
        sum += c.pka - ph;
        log_weights.push(sum);
    }
    for (k, w) in log_weights.iter_mut().enumerate() {
        let z = k as f64 - n_acid as f64;
        *w -= z * z * log_gamma_per_z2;
    }
    let top = log_weights.iter().copied().fold(f64::NEG_INFINITY, f64::max);
    let weights: Vec<f64> = log_weights.iter().map(|w| math::exp10(w - top)).collect();
    let total: f64 = weights.iter().sum();

    let (mut charges, mut fractions) = (Vec::new(), Vec::new());
    for (k, w) in weights.iter().enumerate().rev() {
        charges.push(k as i32 - n_acid as i32);
        fractions.push(w / total);
    }
    let neutral = weights[n_acid] / total;
    let mean_charge = charges.iter().zip(&fractions).map(|(z, f)| f64::from(*z) * f).sum();
    // The net-neutral state holds its n_acid protons on the sites of highest pKa; where one of
    // those is a base, an acid site somewhere has lost its own.
    let zwitterion = sorted[..n_acid].iter().any(|c| c.kind == SiteKind::ConjugateAcidOfBase);
    Speciation { charges, fractions, neutral, mean_charge, zwitterion }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn acid(pka: f64) -> Constant {
        Constant { kind: SiteKind::Acid, pka }
    }
    fn base(pka: f64) -> Constant {
        Constant { kind: SiteKind::ConjugateAcidOfBase, pka }
    }

    /// Definition of the species fractions; citric acid at the pH of an acidic drink.
    #[test]
    fn triprotic_acid() {
        let s = speciate(&[acid(3.128), acid(4.761), acid(6.396)], 3.4);
        let expected = [0.3387, 0.6336, 0.0276, 2.79e-5];
        for (f, e) in s.fractions.iter().zip(expected) {
            assert!((f - e).abs() < 5e-5);
        }
        assert_eq!(s.charges, [0, -1, -2, -3]);
        assert_eq!(s.neutral, s.fractions[0]);
        assert!(!s.zwitterion);
    }

    /// A quinoline alkaloid, conjugate-acid pKa 4.34 and 8.58, at pH 3.4: 0.897, 0.103, 6.8e−7.
    #[test]
    fn diprotic_base() {
        let s = speciate(&[base(4.34), base(8.58)], 3.4);
        assert_eq!(s.charges, [2, 1, 0]);
        assert!((s.fractions[0] - 0.897).abs() < 5e-5);
        assert!((s.neutral / 6.8e-7 - 1.0).abs() < 0.01);
    }

    /// Lehninger, Principles of Biochemistry, amino-acid table (from memory): pI of glycine 5.97.
    #[test]
    fn an_amino_acid_is_a_zwitterion() {
        let glycine = [acid(2.34), base(9.60)];
        let s = speciate(&glycine, 5.97);
        assert!(s.zwitterion);
        assert!(s.mean_charge.abs() < 1e-4);
        assert!(s.neutral > 0.999);
        assert!(!speciate(&[base(2.34), acid(9.60)], 5.97).zwitterion);
    }

    #[test]
    fn no_overflow_at_the_ends_of_the_scale() {
        for ph in [-2.0, 7.0, 16.0] {
            let many: Vec<Constant> = (0..40).map(|i| acid(20.0 - f64::from(i) * 0.7)).collect();
            let s = speciate(&many, ph);
            let sum: f64 = s.fractions.iter().sum();
            assert!((sum - 1.0).abs() < 1e-12 && s.fractions.iter().all(|f| f.is_finite()));
        }
    }

    /// IARC Monograph 51 (1991) quoting Windholz: theobromine Kb 1.3e−14 at 18 °C, pKb 13.89;
    /// with pKw(18 °C) = 14.24 the conjugate acid has pKa 0.35.
    #[test]
    fn a_pkb_becomes_a_conjugate_acid_pka() {
        let c = constant_of(13.89, MeantAs::PkbWrittenAsPka, 18.0).unwrap();
        assert_eq!(c.kind, SiteKind::ConjugateAcidOfBase);
        assert!((c.pka - 0.35).abs() < 0.02, "{}", c.pka);
    }

    /// Tris: −0.028 per kelvin near 25 °C (from memory, common buffer tables).
    #[test]
    fn van_t_hoff() {
        let per_kelvin = pka_at(8.072, 25.0, 47.45, 26.0) - 8.072;
        assert!((per_kelvin + 0.028).abs() < 0.001);
    }
}
