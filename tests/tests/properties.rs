//! What must hold for every study: conservation, monotonicity, limits, round trips, no panic.
#![cfg(not(target_arch = "wasm32"))]

use proptest::prelude::*;
use unstir_core::plan::plan;
use unstir_core::process::counter_current::fraction_left;
use unstir_core::process::portions::{portions_for, volume_for};
use unstir_core::solution::ionisation::{Constant, speciate};
use unstir_core::study::{
    Amount, Concentrate, ConcentrateTo, Disputed, EnteringSolvent, Extraction, Feed, Goal, Ingredient, Isolate, Loss,
    LossAmount, LossPlace, MakeUp, MeantAs, PartitionEntry, Portion, Quantity, Reading, Scheme, Site, SiteKind,
    SolventChoice, Study, check, parse, to_text,
};

/// Relative balance residual promised for every study.
const BALANCE_TOL: f64 = 1e-9;
/// Room for rounding in quantities of order one that pass through about a hundred operations.
const ROUNDING: f64 = 1e-12;

fn quantity(low: f64, high: f64) -> impl Strategy<Value = Quantity> {
    (low..high, prop::option::of(0.0..0.05), any::<bool>()).prop_map(
        move |(value, u, ranged): (f64, Option<f64>, bool)| match (u, ranged) {
            (None, _) => Quantity::exact(value),
            (Some(u), false) => Quantity::with_u(value, u * value.abs()),
            (Some(u), true) => Quantity::within(
                value,
                (value * (1.0 - u)).max(low).min(value),
                (value * (1.0 + u)).min(high).max(value),
            ),
        },
    )
}

fn kind() -> impl Strategy<Value = SiteKind> {
    prop_oneof![Just(SiteKind::Acid), Just(SiteKind::ConjugateAcidOfBase)]
}

fn meant_as() -> impl Strategy<Value = MeantAs> {
    prop_oneof![Just(MeantAs::Acid), Just(MeantAs::ConjugateAcidOfBase), Just(MeantAs::PkbWrittenAsPka)]
}

fn ingredient(i: usize) -> impl Strategy<Value = Ingredient> {
    (
        quantity(60.0, 900.0),
        quantity(0.1, 5000.0),
        prop::collection::vec((kind(), -2.0..14.0f64), 0..4),
        prop::option::of(prop::collection::vec((meant_as(), -1.0..15.0f64), 1..4)),
    )
        .prop_map(move |(m, mass, mut sites, disputed)| {
            sites.sort_by(|a, b| a.1.total_cmp(&b.1));
            Ingredient {
                name: format!("ingredient {i}"),
                molar_mass_g_per_mol: Some(m),
                amount: Amount::MassMg(mass),
                sites: sites
                    .into_iter()
                    .map(|(kind, pka)| Site {
                        kind,
                        pka: pka.into(),
                        enthalpy_kj_per_mol: None,
                        pka_temperature_c: 25.0,
                    })
                    .collect(),
                disputed: disputed.map(|r| Disputed {
                    readings: r
                        .into_iter()
                        .map(|(meant_as, v)| Reading { value: Quantity::with_u(v, 0.1), meant_as })
                        .collect(),
                    in_use: 0,
                }),
            }
        })
}

fn scheme() -> impl Strategy<Value = Scheme> {
    prop_oneof![
        3 => prop::collection::vec((quantity(5.0, 120.0), prop::option::of(quantity(0.1, 1.0))), 1..7).prop_map(|p| {
            Scheme::CrossCurrent {
                portions: p
                    .into_iter()
                    .map(|(volume_ml, stage_efficiency)| Portion { volume_ml, stage_efficiency })
                    .collect(),
            }
        }),
        1 => (1u32..30, quantity(10.0, 500.0)).prop_map(|(stages, solvent_ml)| Scheme::CounterCurrent { stages, solvent_ml }),
        1 => quantity(10.0, 500.0).prop_map(|solvent_ml| Scheme::Continuous { solvent_ml }),
    ]
}

fn losses() -> impl Strategy<Value = Vec<Loss>> {
    let place = prop_oneof![Just(LossPlace::Feed), Just(LossPlace::Liquor), Just(LossPlace::Raffinate)];
    let amount = prop_oneof![
        quantity(0.0, 0.2).prop_map(LossAmount::Fraction),
        quantity(0.0, 3.0).prop_map(LossAmount::VolumeMl)
    ];
    prop::collection::vec((place, amount).prop_map(|(at, amount)| Loss { what: "spill".into(), at, amount }), 0..4)
}

prop_compose! {
    fn study()(
        n in 1usize..5,
    )(
        ingredients in (0..n).map(ingredient).collect::<Vec<_>>(),
        ks in prop::collection::vec((quantity(1e-3, 200.0), prop::option::of(quantity(0.0, 1.0))), n),
        volume_ml in quantity(200.0, 2000.0),
        ph in quantity(0.0, 14.0),
        brix in prop::option::of(quantity(0.0, 15.0)),
        keep in 0.4..1.0f64,
        scheme in scheme(),
        efficiency in quantity(0.05, 1.0),
        left in 0.0..4.0f64,
        carried in 0.0..2.0f64,
        load in 0.0..0.5f64,
        losses in losses(),
        crude in quantity(0.1, 500.0),
        purity in quantity(0.3, 1.0),
    ) -> Study {
        Study {
            unstir_study: 1,
            name: "any".into(),
            note: String::new(),
            goal: Goal { removal_fraction: 0.9.into(), purpose: Default::default() },
            strip: Default::default(),
            room: Default::default(),
            feed: Feed {
                volume_ml: volume_ml.clone(),
                ph: Some(ph),
                strong_ions: Vec::new(),
                co2_g_per_l: None,
                temperature_c: 20.0.into(),
                soluble_solids_brix: brix,
                target: "ingredient 0".into(),
                ingredients: ingredients.clone(),
            },
            concentrate: Concentrate { to: ConcentrateTo::VolumeMl((volume_ml.value * keep * 0.5).into()), ph_after: None },
            solvent: SolventChoice { id: "own".into(), name: "own".into(), density_g_per_ml: Some(0.8.into()) },
            partition: ingredients.iter().zip(ks).map(|(i, (k_neutral, k_ion_pair))| PartitionEntry {
                ingredient: i.name.clone(),
                solvent: "own".into(),
                k_neutral,
                k_ion_pair,
                transfer_enthalpy_kj_per_mol: None,
                k_temperature_c: 25.0,
            }).collect(),
            extraction: Extraction {
                scheme,
                stage_efficiency: efficiency,
                organic_left_behind_ml: left.into(),
                aqueous_carried_out_ml: carried.into(),
                entering_solvent: vec![EnteringSolvent { ingredient: "ingredient 0".into(), mg_per_ml: load.into() }],
                vessel_ml: None,
            },
            isolate: Some(Isolate {
                crude_mass_mg: crude,
                purity,
                hydrate_waters: 0.8.into(),
                residual_solvent_fraction: 0.01.into(),
            }),
            losses,
            make_up: MakeUp::default(),
        }
    }
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(400))]

    /// Every ingredient is accounted for, in every scheme, with every kind of loss.
    #[test]
    fn matter_is_conserved(s in study()) {
        prop_assume!(check(&s).is_empty());
        let p = plan(&s).expect("a plan").value;
        prop_assert!(p.headline.balance_residual.value <= BALANCE_TOL, "{:?} {:?}", p.balance, p.ingredients[0].d);
        for row in &p.balance.rows {
            prop_assert!(row.mg.iter().all(|m| m.is_finite() && *m >= -BALANCE_TOL), "{row:?}");
        }
    }

    /// Written and read again, a study is the same to the bit.
    #[test]
    fn a_study_survives_its_file(s in study()) {
        prop_assert_eq!(parse(&to_text(&s)).expect("a study"), s);
    }

    /// No headline number is NaN and each lies within its interval.
    #[test]
    fn headline_numbers_are_honest(s in study()) {
        prop_assume!(check(&s).is_empty());
        let h = plan(&s).expect("a plan").value.headline;
        let mut all = vec![h.removal_fraction, h.solvent_total_ml, h.make_up_volume_ml, h.balance_residual];
        all.extend(h.removal_fraction_found);
        all.extend(h.apparent_stage_efficiency);
        for i in all {
            prop_assert!(i.value.is_finite() && i.low <= i.value && i.value <= i.high, "{:?}", i);
        }
    }

    /// More K, or nearer equilibrium, never takes out less of a target that is not in the solvent.
    #[test]
    fn removal_rises_with_k_and_efficiency(mut s in study(), more in 1.0..5.0f64) {
        s.extraction.entering_solvent.clear();
        prop_assume!(check(&s).is_empty());
        let removal = |s: &Study| plan(s).expect("a plan").value.headline.removal_fraction.value;
        let before = removal(&s);
        let mut k = s.clone();
        k.partition[0].k_neutral = (s.partition[0].k_neutral.value * more).into();
        prop_assert!(removal(&k) >= before - ROUNDING);
        let mut e = s.clone();
        e.extraction.stage_efficiency = 1.0.into();
        if let Scheme::CrossCurrent { portions } = &mut e.extraction.scheme {
            portions.iter_mut().for_each(|p| p.stage_efficiency = None);
        }
        prop_assert!(removal(&e) >= before - ROUNDING);
        prop_assert!((0.0 - ROUNDING..=1.0 + ROUNDING).contains(&before));
    }

    /// All masses doubled at the same, measured pH: the same fractions, K and all else being ratios.
    #[test]
    fn removal_does_not_depend_on_scale(mut s in study()) {
        s.extraction.entering_solvent.clear();
        s.concentrate.ph_after = s.feed.ph.clone();
        prop_assume!(check(&s).is_empty());
        let one = plan(&s).expect("a plan").value;
        for i in &mut s.feed.ingredients {
            if let Amount::MassMg(q) = &mut i.amount {
                q.value *= 2.0;
                q.range = None;
            }
        }
        let two = plan(&s).expect("a plan").value;
        for (a, b) in one.ingredients.iter().zip(&two.ingredients) {
            prop_assert!((a.removed_fraction - b.removed_fraction).abs() < ROUNDING);
        }
    }

    /// The order in which ingredients are listed changes nothing.
    #[test]
    fn order_of_ingredients_does_not_matter(mut s in study()) {
        prop_assume!(check(&s).is_empty());
        let one = plan(&s).expect("a plan").value;
        s.feed.ingredients.reverse();
        s.partition.reverse();
        let two = plan(&s).expect("a plan").value;
        // The charges are summed in another order, so the last digits of the pH may differ.
        let (a, b) = (one.headline.removal_fraction.value, two.headline.removal_fraction.value);
        prop_assert!((a - b).abs() < 1e-9, "{a} {b}");
        prop_assert_eq!(one.headline.make_up_volume_ml.value, two.headline.make_up_volume_ml.value);
    }

    /// Fractions of the states sum to one and stay in range at any pH, however many sites.
    #[test]
    fn states_sum_to_one(
        sites in prop::collection::vec((kind(), -10.0..20.0f64), 0..12),
        ph in -2.0..16.0f64,
    ) {
        let c: Vec<Constant> = sites.into_iter().map(|(kind, pka)| Constant { kind, pka }).collect();
        let s = speciate(&c, ph);
        let sum: f64 = s.fractions.iter().sum();
        prop_assert!((sum - 1.0).abs() < ROUNDING);
        prop_assert!(s.fractions.iter().all(|f| (0.0..=1.0 + ROUNDING).contains(f)));
        prop_assert!(s.charges.contains(&0));
        // More acid, less negative: the mean charge never rises with pH.
        prop_assert!(speciate(&c, ph + 0.1).mean_charge <= s.mean_charge + ROUNDING);
    }

    /// Portions and volume are inverse to each other; counter-current needs no more than that.
    #[test]
    fn inverse_questions_agree(r in 0.05..0.999f64, d in 0.05..200.0f64, n in 1u32..8, va in 20.0..1000.0f64) {
        let v = volume_for(r, n, d, va, 1.0).expect("a volume");
        let back = portions_for(r, d, v, va, 1.0).expect("a number");
        prop_assert!((back - f64::from(n)).abs() < 1e-6 * f64::from(n));
        let total = v * f64::from(n);
        prop_assert!(fraction_left(d * total / va, f64::from(n)) <= 1.0 - r + 1e-9);
    }

    /// Any text at all is read or refused, never a panic.
    #[test]
    fn any_text_is_read_or_refused(text in ".{0,400}") {
        let _ = unstir_core::solve::solve_text(&text);
    }

    /// A study file damaged in one place is read or refused with a message, never a panic.
    #[test]
    fn a_damaged_file_is_read_or_refused(at in 0usize..6000, with in prop::sample::select(vec!["", "-", "1e999", "null", "\"x\"", "{", "[]", "-1", "0", "1e300", "NaN"])) {
        let text = std::fs::read_to_string(unstir_checks::data("studies/neutral-alkaloid.json")).expect("the study");
        let at = (at % text.len()..text.len()).find(|i| text.is_char_boundary(*i)).unwrap_or(0);
        let end = (at + 3..text.len()).find(|i| text.is_char_boundary(*i)).unwrap_or(text.len());
        let damaged = format!("{}{with}{}", &text[..at], &text[end..]);
        if let Err(problems) = unstir_core::solve::solve_text(&damaged) {
            prop_assert!(!problems.is_empty() && problems.iter().all(|p| !p.message.is_empty()));
        }
    }

    /// Any number in any field of a study gives a plan or a message at that field's path.
    #[test]
    fn absurd_numbers_are_refused_at_their_field(pick in 0usize..60, value in prop::sample::select(vec![-1.0, 0.0, 1e-300, 1e300, f64::INFINITY, f64::NAN, 15.9, 1e6])) {
        let text = std::fs::read_to_string(unstir_checks::data("studies/neutral-alkaloid.json")).expect("the study");
        let mut s = parse(&text).expect("a study");
        let mut paths = Vec::new();
        let mut walk = s.clone();
        unstir_core::study::for_each_quantity(&mut walk, &mut |p, _| paths.push(p.to_owned()));
        let path = paths[pick % paths.len()].clone();
        unstir_core::study::for_each_quantity(&mut s, &mut |p, q| if p == path { *q = Quantity::exact(value) });
        match plan(&s) {
            Ok(o) => prop_assert!(o.value.headline.balance_residual.value <= BALANCE_TOL),
            Err(problems) => prop_assert!(problems.iter().all(|p| !p.at.is_empty() && !p.message.is_empty())),
        }
        if !value.is_finite() {
            prop_assert!(check(&s).iter().any(|p| p.at == path), "{path}");
        }
    }
}
