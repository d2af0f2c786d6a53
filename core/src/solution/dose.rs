//! How much acid or base would bring the liquid to another pH, and what stays behind.

use super::charge_balance::{balance, closed_at, strong_ion_difference};
use super::composition::{Composition, Weak};
use super::ionisation::{Constant, speciate};
use super::water;
use crate::math;
use crate::outcome::Outcome;
use crate::study::Problem;
use serde::Serialize;

/// Molar mass of sodium [g/mol]; IUPAC standard atomic weights (2021).
pub const SODIUM_MOLAR_MASS: f64 = 22.990;
/// Molar mass of chlorine [g/mol]; IUPAC standard atomic weights (2021).
pub const CHLORINE_MOLAR_MASS: f64 = 35.45;

/// Acid or base that takes a liquid from one pH to another.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct Dose {
    /// Strong base [mmol]; negative: strong acid.
    pub base_mmol: f64,
    /// What stays behind, counted as sodium (base) or chloride (acid) [mg].
    pub left_behind_mg: f64,
    /// `sodium` or `chloride`.
    pub left_behind: &'static str,
    /// pH it leads to.
    pub to_ph: f64,
    /// Ingredients counted as buffers.
    pub counted: usize,
}

/// One ingredient as a buffer: millimoles in the liquid and its constants.
#[derive(Clone, Debug, PartialEq)]
pub struct Buffer {
    /// Amount [mmol].
    pub mmol: f64,
    /// Constants at the temperature.
    pub constants: Vec<Constant>,
}

/// Strong base [mmol] that takes `volume_ml` [mL] holding `buffers` from `from` to `to` [pH].
///
/// From the charge balance at both ends, the other ions unchanged:
/// `b = Σ n_i (z̄_i(from) − z̄_i(to)) + V·(h_from − h_to + w_to − w_from)`, `z̄` mean charge,
/// `h = 10^−pH`, `w = 10^(pH − pKw)`.
/// Valid: activities ignored, so good to about a tenth; only the listed ingredients buffer; no
/// dilution. A lower bound where ingredients are missing from the list.
/// Reference: charge balance; 50 mL of 0.10 mol/L acetic acid (pKa 4.76) needs 2.5 mmol to pH 4.76.
pub fn dose(volume_ml: f64, buffers: &[Buffer], from: f64, to: f64, t: f64) -> Dose {
    let pkw = water::pkw(t);
    let free = |ph: f64| math::exp10(-ph) - math::exp10(ph - pkw);
    let mut base = volume_ml * (free(from) - free(to));
    for b in buffers {
        base += b.mmol * (speciate(&b.constants, from).mean_charge - speciate(&b.constants, to).mean_charge);
    }
    told(base, to, buffers.len())
}

fn told(base: f64, to: f64, counted: usize) -> Dose {
    let (left_behind, molar_mass) =
        if base >= 0.0 { ("sodium", SODIUM_MOLAR_MASS) } else { ("chloride", CHLORINE_MOLAR_MASS) };
    Dose { base_mmol: base, left_behind_mg: base.abs() * molar_mass, left_behind, to_ph: to, counted }
}

/// As [`dose`], with activities: the same arguments and the same answer, for constants that are
/// thermodynamic and a pH that was measured.
///
/// Strong ions that give the liquid its pH `from`, then the strong ions more that give it `to`;
/// ionic strength at each end that of the very solution, the dose included.
/// Valid: as [`super::charge_balance::balance`]; only the listed ingredients buffer; no dilution.
/// Salts that are not listed leave the ionic strength, and so the shift of the constants, too low.
///
/// # Errors
/// What [`Composition::check`] refuses; a volume that is not above 0; a pH outside −2 to 16.
///
/// Reference: charge balance with Davies coefficients; half-neutralising 0.1 mol/L acetic acid
/// (0.05 mol/L of base) leads to pH 4.67 (by hand: pKa 4.756, I 0.05), not 4.76.
pub fn dose_with_activities(
    volume_ml: f64,
    buffers: &[Buffer],
    from: f64,
    to: f64,
    t: f64,
) -> Result<Outcome<Dose>, Problem> {
    if !(volume_ml > 0.0) {
        return Err(Problem::new("volume_ml", format!("volume is {volume_ml} mL; it must be above 0. Give it")));
    }
    let weak = |b: &Buffer| Weak { constants: b.constants.clone(), mol_per_l: b.mmol / volume_ml };
    let c = Composition { weak: buffers.iter().map(weak).collect(), ..Composition::water(t) };
    let more = strong_ion_difference(&closed_at(&c, from)?, to)?;
    let value = told(more.value.mol_per_l * volume_ml, to, buffers.len());
    Ok(Outcome { value, notices: more.notices })
}

/// Strong acid or base that brings one litre to another pH.
#[derive(Clone, Copy, Debug, PartialEq, Serialize)]
pub struct DosePerLitre {
    /// Strong base [mol/L]; negative: strong acid.
    pub base_mol_per_l: f64,
    /// What stays behind, counted as sodium (base) or chloride (acid) [mg/L].
    pub left_behind_mg_per_l: f64,
    /// `sodium` or `chloride`.
    pub left_behind: &'static str,
    /// pH it starts from.
    pub from_ph: f64,
    /// pH it leads to.
    pub to_ph: f64,
}

/// Strong acid or base that brings the liquid `c` to `to` [pH], and what it leaves behind.
///
/// The strong ions, beyond those of `c`, that balance the charge at `to`: sodium for a base,
/// chloride for an acid, in mol/L of the liquid.
/// Valid: as [`super::charge_balance::balance`]; the dose itself adds no volume.
///
/// # Errors
/// What [`super::charge_balance::balance`] refuses; a pH outside −2 to 16.
///
/// Reference: charge balance; sodium 22.990 and chlorine 35.45 g/mol (IUPAC 2021).
pub fn dose_to_ph(c: &Composition, to: f64) -> Result<Outcome<DosePerLitre>, Problem> {
    let before = balance(c)?;
    let more = strong_ion_difference(c, to)?;
    let one = told(more.value.mol_per_l, to, c.weak.len());
    let value = DosePerLitre {
        base_mol_per_l: one.base_mmol,
        left_behind_mg_per_l: 1000.0 * one.left_behind_mg,
        left_behind: one.left_behind,
        from_ph: before.value.ph,
        to_ph: to,
    };
    Ok(Outcome { value, notices: more.notices })
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::study::SiteKind;

    #[test]
    fn half_neutralised_acid() {
        let acetic = Buffer { mmol: 5.0, constants: vec![Constant { kind: SiteKind::Acid, pka: 4.76 }] };
        // From the pH of the acid alone, 2.88 (weak-acid titration start, Harris; Skoog).
        let d = dose(50.0, &[acetic], 2.88, 4.76, 25.0);
        assert!((d.base_mmol - 2.5).abs() < 0.01, "{}", d.base_mmol);
        assert_eq!(d.left_behind, "sodium");
    }

    /// 0.1 mol/L acetic acid, pKa 4.756, half neutralised: pH = pKa − 0.51·f(I) at I = 0.05, by
    /// hand: √I 0.2236, f = 0.1828 − 0.0150, so 4.756 − 0.0856 = 4.670.
    #[test]
    fn activities_lower_the_midpoint() {
        let acetic = Buffer { mmol: 5.0, constants: vec![Constant { kind: SiteKind::Acid, pka: 4.756 }] };
        let d = dose_with_activities(50.0, std::slice::from_ref(&acetic), 2.88, 4.670, 25.0).unwrap().value;
        let start = dose_with_activities(50.0, &[acetic], 2.88, 2.88, 25.0).unwrap().value;
        assert!(start.base_mmol.abs() < 1e-12);
        // What is free or bound at pH 2.88 is within 0.01 mmol of nothing.
        assert!((d.base_mmol - 2.5).abs() < 0.02, "{}", d.base_mmol);
        assert!((d.left_behind_mg / 22.990 - d.base_mmol).abs() < 1e-12);
        assert!(dose_with_activities(0.0, &[], 7.0, 2.0, 25.0).is_err());
        assert!(dose_with_activities(f64::NAN, &[], 7.0, 2.0, 25.0).is_err());
    }

    /// 0.01 mol/L HCl + 0.09 mol/L KCl has pH 2.098 (R. G. Bates, 1973, from memory): from that pH
    /// back to neutral takes 0.01 mol/L of base, 229.9 mg/L of sodium.
    #[test]
    fn a_strong_acid_is_undone_by_as_much_base() {
        let mut c = Composition::water(25.0).with_strong_ions(-0.10);
        c = c.with_strong_ions(0.09);
        let d = dose_to_ph(&c, 7.0).unwrap().value;
        assert!((d.from_ph - 2.098).abs() < 0.02);
        assert!((d.base_mol_per_l - 0.01).abs() < 1e-6 && (d.left_behind_mg_per_l - 229.9).abs() < 0.01);
        assert_eq!(d.left_behind, "sodium");
    }

    #[test]
    fn going_back_takes_acid() {
        let d = dose(100.0, &[], 7.0, 2.0, 25.0);
        // 100 mL of 0.01 mol/L strong acid.
        assert!((d.base_mmol + 1.0).abs() < 1e-3);
        assert_eq!(d.left_behind, "chloride");
    }
}
