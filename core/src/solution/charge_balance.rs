//! pH of a liquid from what it is made of, and the ions that a measured pH gives away.

use super::activity::DAVIES_MAX_MOL_PER_L;
use super::composition::{Activities, Carbonate, Composition, MAX_MOL_PER_L, PH_RANGE, within};
use super::ionisation::{Speciation, speciate_with_activities};
use super::solver::{Solver, settle};
use crate::math;
use crate::outcome::{Notice, Outcome};
use crate::study::Problem;
use serde::Serialize;

/// A liquid whose charges balance.
#[derive(Clone, Copy, Debug, PartialEq, Serialize)]
pub struct Balanced {
    /// pH, activity scale.
    pub ph: f64,
    /// Ionic strength [mol/L].
    pub ionic_strength_mol_per_l: f64,
    /// Buffer capacity `β = dC_b/dpH` [mol/L]: strong base per unit of pH.
    pub beta_mol_per_l: f64,
    /// Charge left over by the solution [mol/L]; 0 but for rounding.
    pub residual_mol_per_l: f64,
    /// Hydrogen ions, as a concentration [mol/L].
    pub h_mol_per_l: f64,
    /// Hydroxide ions, as a concentration [mol/L].
    pub oh_mol_per_l: f64,
    /// `log10 γ` of a singly charged ion [-]; times `z²` for others.
    pub log_gamma_per_z2: f64,
}

/// Strong ions that a measured pH gives away.
#[derive(Clone, Copy, Debug, PartialEq, Serialize)]
pub struct StrongIonDifference {
    /// Cations less anions of fixed charge [mol/L], beyond those listed.
    pub mol_per_l: f64,
    /// The sign in words.
    pub words: &'static str,
    /// Ionic strength with them, each counted as singly charged [mol/L].
    pub ionic_strength_mol_per_l: f64,
    /// Buffer capacity at that pH [mol/L].
    pub beta_mol_per_l: f64,
}

/// pH of a liquid from its composition.
///
/// The pH at which `Σ z c = 0` over strong ions, every state of every weak ingredient, carbonate,
/// H⁺ and OH⁻. Equilibria hold between activities `a = γ c` (`pH = −log a_H`), `γ` by the Davies
/// equation at the ionic strength `I = ½ Σ c z²` of the very solution. At a given `I` the charge
/// falls with pH, so the root is one; it is bracketed between pH −2 and 16 (Newton steps, halving
/// where they fail). `I` is then bracketed between 0 and 0.5 mol/L, above which `γ` is held.
/// `β = ln 10·([H⁺] + [OH⁻] + Σ c·var z)`, at constant ionic strength and, for an open carbonate,
/// constant pressure.
/// Valid: I ≤ 0.5 mol/L (notice above), 0–60 °C (notice above), water activity 1, no complexes or
/// ion pairs (calcium or magnesium with citrate shift the pH), mol/kg taken as mol/L; sugar's effect
/// on activities not counted.
///
/// # Errors
/// What [`Composition::check`] refuses; strong ions that no pH from −2 to 16 can balance, with
/// the charge left over.
///
/// Reference: charge balance, D. Harvey, Modern Analytical Chemistry (2000), ch. 6; `β` after
/// D. D. Van Slyke, J. Biol. Chem. 52 (1922) 525. Primary standard, 0.05 mol/kg potassium hydrogen
/// phthalate at 25 °C: pH 4.005 (R. G. Bates, J. Res. NBS 66A (1962) 179).
pub fn balance(c: &Composition) -> Result<Outcome<Balanced>, Problem> {
    c.check()?;
    let solver = Solver::new(c);
    let mut ph = 7.0;
    let lg = settle(c, &mut |lg| {
        let (at, sums) = solver.solve(lg, ph);
        ph = at;
        sums.ionic_strength
    });
    let (ph, sums) = solver.solve(lg, ph);
    // A root outside the range leaves the search at its end.
    let left_over = sums.charge;
    if (ph <= PH_RANGE.0 + 1e-9 && left_over < -1e-9) || (ph >= PH_RANGE.1 - 1e-9 && left_over > 1e-9) {
        let sign = if left_over > 0.0 { "positive (cations)" } else { "negative (anions)" };
        return Err(Problem::new(
            "composition.strong",
            format!(
                "the strong ions leave {:.3} mol/L of {sign} charge that no pH from {} to {} balances; \
                 check their amounts and charges, or give the ions that go with them",
                left_over.abs(),
                PH_RANGE.0,
                PH_RANGE.1
            ),
        ));
    }
    let value = Balanced {
        ph,
        ionic_strength_mol_per_l: sums.ionic_strength,
        beta_mol_per_l: sums.beta,
        residual_mol_per_l: left_over,
        h_mol_per_l: sums.h,
        oh_mol_per_l: sums.oh,
        log_gamma_per_z2: lg,
    };
    Ok(Outcome { value, notices: notices(c, sums.ionic_strength) })
}

/// Strong ions, beyond those listed in `c`, that give the liquid the measured `ph` [-].
///
/// The charge that everything else leaves open at that pH, `S = −Σ z c`, `I` including `½|S|`.
/// This is how the pH after concentrating follows from the feed's measured pH without a list of
/// its salts. Salts whose charges cancel (sodium chloride) do not show in `S` and are missing in
/// `I`: list them where they are known.
/// Valid: as [`balance`]; only the listed weak ingredients are counted, so an acid left out shows
/// as anions in excess.
///
/// # Errors
/// What [`Composition::check`] refuses; a pH outside −2 to 16, or one that takes more than
/// [`MAX_MOL_PER_L`] of strong ions.
///
/// Reference: strong ion difference, P. A. Stewart, Can. J. Physiol. Pharmacol. 61 (1983) 1444;
/// equimolal phosphate 0.025 + 0.025 mol/kg at its pH of 6.865 holds 0.075 mol/kg of potassium
/// and sodium.
pub fn strong_ion_difference(c: &Composition, ph: f64) -> Result<Outcome<StrongIonDifference>, Problem> {
    c.check()?;
    within("composition.ph", "pH", ph, PH_RANGE, "")?;
    let solver = Solver::new(c);
    let with_ions = |lg: f64| {
        let sums = solver.sums(ph, lg);
        (sums, sums.ionic_strength + 0.5 * sums.charge.abs())
    };
    let lg = settle(c, &mut |lg| with_ions(lg).1);
    let (sums, ionic_strength_mol_per_l) = with_ions(lg);
    let mol_per_l = -sums.charge;
    if !(mol_per_l.abs() <= MAX_MOL_PER_L) {
        return Err(Problem::new(
            "composition.ph",
            format!(
                "pH {ph} would take {:.0} mol/L of strong ions, more than {MAX_MOL_PER_L}: with these ingredients \
                 (carbon dioxide held at a pressure among them) it cannot be. Check the pH and the ingredients",
                mol_per_l.abs()
            ),
        ));
    }
    let value = StrongIonDifference {
        mol_per_l,
        words: in_words(mol_per_l),
        ionic_strength_mol_per_l,
        beta_mol_per_l: sums.beta,
    };
    Ok(Outcome { value, notices: notices(c, ionic_strength_mol_per_l) })
}

/// The composition with the strong ions that give it the measured `ph` [-].
///
/// Valid, errors and reference: as [`strong_ion_difference`].
///
/// # Errors
/// As [`strong_ion_difference`].
pub fn closed_at(c: &Composition, ph: f64) -> Result<Composition, Problem> {
    let s = strong_ion_difference(c, ph)?.value.mol_per_l;
    Ok(c.clone().with_strong_ions(s))
}

/// Protonation states of every weak ingredient of `c` in the liquid `at`, as fractions of its
/// concentration.
pub fn species(c: &Composition, at: &Balanced) -> Vec<Speciation> {
    c.weak.iter().map(|w| speciate_with_activities(&w.constants, at.ph, at.log_gamma_per_z2)).collect()
}

/// Carbon dioxide, bicarbonate and carbonate of `c` in the liquid `at` [mol/L].
pub fn carbonate_species_mol_per_l(c: &Composition, at: &Balanced) -> [f64; 3] {
    let (pk1, pk2) = (super::carbonate::pk1(c.temperature_c), super::carbonate::pk2(c.temperature_c));
    let first = math::exp10(at.ph - pk1 - at.log_gamma_per_z2);
    let second = first * math::exp10(at.ph - pk2 - 3.0 * at.log_gamma_per_z2);
    let co2 = match c.carbonate {
        Carbonate::None => 0.0,
        Carbonate::Closed { mol_per_l } => mol_per_l / (1.0 + first + second),
        Carbonate::Open { co2_kpa } => super::carbonate::dissolved_co2_mol_per_l(co2_kpa, c.temperature_c),
    };
    [co2, co2 * first, co2 * second]
}

fn in_words(mol_per_l: f64) -> &'static str {
    if mol_per_l > 0.0 {
        "cations such as sodium or potassium in excess"
    } else if mol_per_l < 0.0 {
        "anions such as chloride in excess"
    } else {
        "strong cations and anions in balance"
    }
}

fn notices(c: &Composition, ionic_strength: f64) -> Vec<Notice> {
    let mut list = Vec::new();
    if c.activities == Activities::Ideal {
        return list;
    }
    if ionic_strength > DAVIES_MAX_MOL_PER_L {
        list.push(Notice::new(
            "composition",
            format!(
                "the ionic strength is {ionic_strength:.2} mol/L; activity coefficients are good to \
                 {DAVIES_MAX_MOL_PER_L} mol/L and held there. Expect the pH to be out by 0.2 or more; measure it"
            ),
        ));
    }
    if c.temperature_c > 60.0 {
        list.push(Notice::new(
            "composition.temperature_c",
            format!(
                "temperature is {} °C; the activity constant is tabled from 0 to 60 °C and carried on from there",
                c.temperature_c
            ),
        ));
    }
    list
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::solution::composition::{StrongIon, Weak};
    use crate::solution::ionisation::Constant;
    use crate::study::SiteKind;

    fn acid(pka: &[f64], mol_per_l: f64, sodium: f64) -> Composition {
        let constants = pka.iter().map(|&pka| Constant { kind: SiteKind::Acid, pka }).collect();
        let weak = vec![Weak { constants, mol_per_l }];
        Composition { weak, ..Composition::water(25.0) }.with_strong_ions(sodium)
    }

    /// Primary standards: 0.05 mol/kg potassium hydrogen phthalate 4.005 (R. G. Bates, J. Res. NBS
    /// 66A (1962) 179) and dihydrogen citrate 3.776 (B. R. Staples & R. G. Bates, J. Res. NBS 73A
    /// (1969) 37); pKa from memory (R. N. Goldberg et al. 2002).
    #[test]
    fn primary_standards() {
        let phthalate = balance(&acid(&[2.950, 5.408], 0.05, 0.05)).unwrap();
        assert!((phthalate.value.ph - 4.005).abs() < 0.01 && phthalate.notices.is_empty());
        let citrate = balance(&acid(&[3.128, 4.761, 6.396], 0.05, 0.05)).unwrap().value;
        assert!((citrate.ph - 3.776).abs() < 0.01);
    }

    /// 0.025 + 0.025 mol/kg phosphate at its pH of 6.865 (Bates 1962) holds 0.075 mol/kg of cations.
    #[test]
    fn the_salts_of_a_measured_buffer() {
        let s = strong_ion_difference(&acid(&[2.148, 7.198, 12.35], 0.05, 0.0), 6.865).unwrap().value;
        assert!((s.mol_per_l - 0.075).abs() < 0.0005, "{}", s.mol_per_l);
        assert!(s.words.starts_with("cations"));
        let s = strong_ion_difference(&Composition::water(25.0), 2.0).unwrap().value;
        assert!(s.mol_per_l < 0.0 && s.words.starts_with("anions"));
    }

    /// Water is neutral at half its pKw: 6.998 at 25 °C (Marshall & Franck 1981), where
    /// β = 2 ln 10·10^−pH, 4.632e−7 mol/L by hand.
    #[test]
    fn plain_water() {
        let w = balance(&Composition::water(25.0)).unwrap().value;
        assert!((w.ph - 6.9975).abs() < 1e-3);
        assert!((w.beta_mol_per_l / 4.632e-7 - 1.0).abs() < 0.01);
        assert_eq!(w.h_mol_per_l, w.oh_mol_per_l);
    }

    #[test]
    fn ions_that_cannot_be_neutral_are_refused_with_the_imbalance() {
        let metal = StrongIon { charge: 4, mol_per_l: 50.0 };
        let refused = balance(&Composition { strong: vec![metal], ..Composition::water(25.0) }).unwrap_err();
        assert!(refused.message.contains("mol/L of positive (cations) charge"), "{refused}");
        let anion = StrongIon { charge: -4, mol_per_l: 50.0 };
        let refused = balance(&Composition { strong: vec![anion], ..Composition::water(25.0) }).unwrap_err();
        assert!(refused.message.contains("negative (anions)"), "{refused}");
        assert_eq!(strong_ion_difference(&Composition::water(25.0), 17.0).unwrap_err().at, "composition.ph");
        let gassed = Composition { carbonate: Carbonate::Open { co2_kpa: 200.0 }, ..Composition::water(25.0) };
        assert!(strong_ion_difference(&gassed, 10.0).unwrap_err().message.contains("cannot be"));
    }

    #[test]
    fn beyond_a_range_there_is_a_notice() {
        let strong = balance(&acid(&[4.756], 1.0, 0.8)).unwrap();
        assert!(strong.notices[0].message.contains("ionic strength is 0.80 mol/L"));
        let hot = balance(&Composition::water(70.0)).unwrap();
        assert!(hot.notices[0].message.contains("70 °C"));
    }

    /// The species of the solution add up to its charge.
    #[test]
    fn species_are_those_of_the_balance() {
        let mut c = acid(&[3.128, 4.761, 6.396], 0.05, 0.12);
        c.carbonate = Carbonate::Closed { mol_per_l: 0.02 };
        let at = balance(&c).unwrap().value;
        let [_, one, two] = carbonate_species_mol_per_l(&c, &at);
        let charge = 0.12 + at.h_mol_per_l - at.oh_mol_per_l + 0.05 * species(&c, &at)[0].mean_charge - one - 2.0 * two;
        assert!(charge.abs() < 1e-14, "{charge}");
    }
}
