//! What must hold for the pH of every composition: charges cancel, acid lowers it, a measured pH
//! comes back, a factor of 1 changes nothing, nothing panics.
#![cfg(not(target_arch = "wasm32"))]

use proptest::prelude::*;
use unstir_core::solution::charge_balance::{balance, closed_at, strong_ion_difference};
use unstir_core::solution::composition::{Activities, Carbonate, Composition, StrongIon, Weak};
use unstir_core::solution::concentrated::{Co2After, ph_after_concentrating};
use unstir_core::solution::dose::dose_to_ph;
use unstir_core::solution::ionisation::Constant;
use unstir_core::study::SiteKind;

/// Charge left over [mol/L] promised for every liquid.
const CHARGE_TOL: f64 = 1e-12;
/// pH promised for the way there and back.
const ROUND_TRIP_TOL: f64 = 1e-9;

fn constant() -> impl Strategy<Value = Constant> {
    (prop_oneof![Just(SiteKind::Acid), Just(SiteKind::ConjugateAcidOfBase)], 0.0..14.0f64)
        .prop_map(|(kind, pka)| Constant { kind, pka })
}

fn weak() -> impl Strategy<Value = Weak> {
    (prop::collection::vec(constant(), 0..4), -6.0..-0.3f64)
        .prop_map(|(constants, log)| Weak { constants, mol_per_l: 10f64.powf(log) })
}

fn carbonate() -> impl Strategy<Value = Carbonate> {
    prop_oneof![
        Just(Carbonate::None),
        (-6.0..-1.0f64).prop_map(|log| Carbonate::Closed { mol_per_l: 10f64.powf(log) }),
        (0.0..400.0f64).prop_map(|co2_kpa| Carbonate::Open { co2_kpa }),
    ]
}

fn composition() -> impl Strategy<Value = Composition> {
    (
        prop::collection::vec((-2..3i32, 0.0..0.2f64), 0..4),
        prop::collection::vec(weak(), 0..4),
        carbonate(),
        0.0..60.0f64,
        prop_oneof![4 => Just(Activities::Davies), 1 => Just(Activities::Ideal)],
    )
        .prop_map(|(strong, weak, carbonate, temperature_c, activities)| Composition {
            strong: strong.into_iter().map(|(charge, mol_per_l)| StrongIon { charge, mol_per_l }).collect(),
            weak,
            carbonate,
            temperature_c,
            activities,
        })
}

fn ph(c: &Composition) -> f64 {
    balance(c).expect("a pH").value.ph
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(2000))]

    #[test]
    fn charges_cancel_and_acid_lowers_the_ph(c in composition(), log in -4.0..-1.0f64) {
        let at = balance(&c).expect("a pH").value;
        prop_assert!(at.residual_mol_per_l.abs() <= CHARGE_TOL, "{at:?}");
        prop_assert!(at.beta_mol_per_l > 0.0 && at.ionic_strength_mol_per_l > 0.0);
        let with_acid = c.with_strong_ions(-(10f64.powf(log)));
        prop_assert!(ph(&with_acid) < at.ph, "{} not below {}", ph(&with_acid), at.ph);
    }

    #[test]
    fn a_measured_ph_comes_back(c in composition(), measured in 1.0..13.0f64) {
        let closed = match closed_at(&c, measured) {
            Ok(closed) => closed,
            // Carbon dioxide at a pressure keeps a liquid from being very alkaline.
            Err(_) => {
                let gassed = matches!(c.carbonate, Carbonate::Open { .. });
                prop_assert!(gassed && measured > 7.0, "{c:?}");
                return Ok(());
            }
        };
        prop_assert!((ph(&closed) - measured).abs() < ROUND_TRIP_TOL, "{} {measured}", ph(&closed));
        // Nothing more is then missing, and a dose leads where it says.
        let more = strong_ion_difference(&closed, measured).expect("ions").value.mol_per_l;
        prop_assert!(more.abs() < CHARGE_TOL, "{more}");
        let dose = dose_to_ph(&closed, 7.0).expect("a dose").value;
        prop_assert_eq!(dose.base_mol_per_l > 0.0, dose.from_ph < 7.0);
        let dosed = closed.with_strong_ions(dose.base_mol_per_l);
        prop_assert!((ph(&dosed) - 7.0).abs() < ROUND_TRIP_TOL);
    }

    #[test]
    fn a_factor_of_one_changes_nothing_and_a_small_step_little(c in composition(), factor in 0.05..20.0f64) {
        let same = ph_after_concentrating(&c, 1.0, Co2After::Kept).expect("a pH").value;
        prop_assert_eq!(same.ph_change, 0.0);
        let a = ph_after_concentrating(&c, factor, Co2After::Kept).expect("a pH").value.after.ph;
        let b = ph_after_concentrating(&c, factor * (1.0 + 1e-7), Co2After::Kept).expect("a pH").value.after.ph;
        prop_assert!((a - b).abs() < 1e-5, "{a} {b}");
    }

    /// Without activities the pH moves one way, away from that of water.
    #[test]
    fn ideal_liquids_move_one_way(c in composition(), measured in 2.0..12.0f64) {
        let carbonate = if matches!(c.carbonate, Carbonate::Open { .. }) { Carbonate::None } else { c.carbonate };
        let c = Composition { activities: Activities::Ideal, carbonate, ..c };
        let c = closed_at(&c, measured).expect("a composition");
        let neutral = ph(&Composition { activities: Activities::Ideal, ..Composition::water(c.temperature_c) });
        let side = (measured - neutral).signum();
        let mut last = f64::NEG_INFINITY;
        for factor in [0.01, 0.1, 0.5, 1.0, 2.0, 5.0, 20.0] {
            let moved = side * ph_after_concentrating(&c, factor, Co2After::Kept).expect("a pH").value.after.ph;
            prop_assert!(moved >= last - 1e-9, "{moved} after {last}");
            last = moved;
        }
    }

    /// With activities an acid drink gets no less acid by losing water, but for the small turn that
    /// the Davies equation takes between 0.39 and 0.5 mol/L.
    #[test]
    fn an_acid_drink_gets_no_less_acid(log in -3.0..-0.7f64, measured in 2.0..4.5f64) {
        let constants = [3.128, 4.761, 6.396].map(|pka| Constant { kind: SiteKind::Acid, pka }).to_vec();
        let weak = vec![Weak { constants, mol_per_l: 10f64.powf(log) }];
        let c = closed_at(&Composition { weak, ..Composition::water(20.0) }, measured).expect("a composition");
        let mut last = f64::INFINITY;
        for factor in [1.0, 1.3, 2.0, 3.0, 5.0, 8.0, 15.0] {
            let now = ph_after_concentrating(&c, factor, Co2After::Kept).expect("a pH").value.after.ph;
            prop_assert!(now < last + 0.01, "{now} after {last}");
            last = now;
        }
    }

    #[test]
    fn nothing_panics(
        numbers in prop::collection::vec(prop_oneof![
            any::<f64>(), Just(f64::NAN), Just(f64::INFINITY), Just(0.0), -1.0..60.0f64,
        ], 7),
        charge in any::<i32>(),
    ) {
        let n = |i: usize| numbers[i];
        let c = Composition {
            strong: vec![StrongIon { charge, mol_per_l: n(0) }],
            weak: vec![Weak { constants: vec![Constant { kind: SiteKind::Acid, pka: n(1) }; 3], mol_per_l: n(2) }],
            carbonate: Carbonate::Open { co2_kpa: n(3) },
            temperature_c: n(4),
            activities: Activities::Davies,
        };
        for answer in [balance(&c).map(|o| o.value.ph), strong_ion_difference(&c, n(5)).map(|o| o.value.mol_per_l),
            ph_after_concentrating(&c, n(6), Co2After::Gone).map(|o| o.value.ph_change),
            dose_to_ph(&c, n(5)).map(|o| o.value.base_mol_per_l)]
        {
            match answer {
                Ok(value) => prop_assert!(value.is_finite()),
                Err(problem) => prop_assert!(!problem.message.is_empty()),
            }
        }
    }
}
