//! The study file: schema, demo studies, the real case, and what a wrong file is told.
#![cfg(not(target_arch = "wasm32"))]

use serde_json::{Value, json};
use unstir_core::solve::solve_text;
use unstir_core::study::{MAX_FILE_BYTES, Problem, check, parse, schema_text, to_text};

fn text(name: &str) -> String {
    std::fs::read_to_string(unstir_checks::data(&format!("studies/{name}.json"))).expect("a committed study")
}

fn solved(name: &str) -> Value {
    serde_json::from_str(&solve_text(&text(name)).expect("a plan")).expect("JSON")
}

const DEMOS: [&str; 3] = ["neutral-alkaloid", "charged-base", "weak-acid-preservative"];

#[test]
fn the_committed_schema_is_current() {
    let path = concat!(env!("CARGO_MANIFEST_DIR"), "/../core/study.schema.json");
    let committed = std::fs::read_to_string(path).expect("core/study.schema.json");
    assert_eq!(committed, schema_text(), "run `cargo xtask schema`");
}

#[test]
fn demo_studies_pass_and_say_that_they_are_invented() {
    for name in DEMOS {
        let study = parse(&text(name)).expect(name);
        assert_eq!(check(&study), Vec::<Problem>::new(), "{name}");
        assert!(study.note.starts_with("Invented scenario"), "{name}");
        assert_eq!(parse(&to_text(&study)).expect(name), study);
    }
}

/// Common practice, no source: 500 mL at pH 3.4 with 160 mg of a neutral alkaloid, to 100 mL;
/// 30 + 15 + 15 + 15 mL; 47 mg crude, 90 % pure, monohydrate of 194.19 g/mol → about 39 mg, about
/// 24 %; about 480 mL after 4 % lost; about 98 % expected at K 9.5.
#[test]
fn the_real_case() {
    let v = solved("neutral-alkaloid");
    let number = |path: &str| v.pointer(path).and_then(Value::as_f64).unwrap_or_else(|| panic!("{path}"));
    assert!((number("/headline/removal_fraction/value") - 0.98).abs() < 0.005);
    assert!((number("/headline/removal_fraction_found/value") - 0.24).abs() < 0.005);
    assert!((number("/isolate/anhydrous_mg/value") - 39.0).abs() < 0.5);
    assert!((number("/headline/make_up_volume_ml/value") - 480.0).abs() < 0.5);
    assert_eq!(number("/headline/solvent_total_ml/value"), 75.0);
    assert!(number("/headline/balance_residual/value") <= 1e-9);
    // The apparent stage efficiency, put back by hand into the stage formula, gives the isolate.
    let e = number("/headline/apparent_stage_efficiency/value");
    let left: f64 = [30.0, 15.0, 15.0, 15.0]
        .iter()
        .map(|v| {
            let d = number("/ingredients/0/d");
            1.0 - e * (1.0 - 100.0 / (100.0 + d * v))
        })
        .product();
    assert!((1.0 - left - number("/headline/removal_fraction_found/value")).abs() < 1e-9);
    let readings = v.pointer("/readings/rows").and_then(Value::as_array).expect("readings");
    let verdicts: Vec<&str> = readings.iter().map(|r| r["verdict"].as_str().expect("a verdict")).collect();
    // 10.4 as a pKb is a pKa of 3.76 at 20 °C: at the liquor's pH of 3.3 a quarter is neutral, D 2.5,
    // and 1.75·1.375³ leaves 22 % in; at the feed's 3.4 it would be borderline.
    assert_eq!(verdicts, ["reaches", "reaches", "falls_short", "falls_short"]);
    assert_eq!(v.pointer("/readings/decision_changes"), Some(&json!(true)));
}

#[test]
fn the_json_opens_with_the_headline() {
    let out = solve_text(&text("neutral-alkaloid")).expect("a plan");
    let at = |key: &str| out.find(&format!("\"{key}\"")).unwrap_or(usize::MAX);
    assert!(out.trim_start_matches(['{', '\n', ' ']).starts_with("\"headline\""));
    let order = ["removal_fraction", "solvent_total_ml", "make_up_volume_ml", "balance_residual"].map(at);
    assert!(order.is_sorted(), "{order:?}");
    for key in ["value", "low", "high", "unit"] {
        assert!(solved("charged-base").pointer(&format!("/headline/removal_fraction/{key}")).is_some());
    }
}

#[test]
fn a_charged_base_is_told_the_ph_it_needs_and_its_price() {
    let v = solved("charged-base");
    assert_eq!(v.pointer("/answer/verdict"), Some(&json!("falls_short")));
    let sentence = v.pointer("/answer/detail").and_then(Value::as_str).expect("a sentence");
    assert!(sentence.contains("Ionisation is the limit") && sentence.contains("sodium"), "{sentence}");
    let ph = v.pointer("/inverse/ph_needed").and_then(Value::as_f64).expect("a pH");
    // Put back as the liquor's pH, the plan reaches the goal, and just below it does not.
    for (at, reaches) in [(ph + 0.001, true), (ph - 0.01, false)] {
        let mut s = parse(&text("charged-base")).expect("a study");
        s.concentrate.ph_after = Some(at.into());
        let got = unstir_core::plan::plan(&s).expect("a plan").value.headline.removal_fraction.value;
        assert_eq!(got >= 0.95, reaches, "{at}: {got}");
    }
}

#[test]
fn a_weak_acid_near_its_pka_is_borderline() {
    assert_eq!(solved("weak-acid-preservative").pointer("/answer/verdict"), Some(&json!("borderline")));
}

/// What the readings say holds for any molecule: a constant near 0.7 as conjugate acid and one near
/// 14 as acid leave it neutral at pH 3 to 4; one near 9 as conjugate acid does not.
#[test]
fn readings_that_matter_are_named() {
    for ph in [3.0, 3.5, 4.0] {
        let mut s = parse(&text("neutral-alkaloid")).expect("a study");
        s.feed.ph = Some(ph.into());
        let r = unstir_core::plan::plan(&s).expect("a plan").value.readings.expect("readings");
        let neutral: Vec<f64> = r.rows.iter().map(|r| r.fraction_neutral).collect();
        assert!(neutral[0] > 0.99 && neutral[1] > 0.99 && neutral[2] > 0.1 && neutral[3] < 1e-5, "{neutral:?}");
        assert!(r.sentence.contains("10.4 as the conjugate acid of a base"), "{}", r.sentence);
        // Without the reading that changes the decision, the disagreement does not matter.
        let d = s.feed.ingredients[0].disputed.as_mut().expect("disputed");
        d.readings.truncate(2);
        let r = unstir_core::plan::plan(&s).expect("a plan").value.readings.expect("readings");
        assert!(!r.decision_changes && r.sentence.contains("does not matter"), "{}", r.sentence);
    }
}

/// Each wrong study with the field that must be named and a word of the message.
#[test]
fn wrong_input_is_told_where_and_what() {
    let cases: Vec<(&str, Value, &str, &str)> = vec![
        ("/feed/volume_ml", json!(-500), "feed.volume_ml", "more than 0"),
        ("/feed/volume_ml", json!(0), "feed.volume_ml", "volume"),
        ("/feed/ph", json!(34), "feed.ph", "pH"),
        ("/feed/target", json!("nothing"), "feed.target", "not among"),
        ("/feed/ingredients", json!([]), "feed.ingredients", "no ingredient"),
        ("/feed/ingredients/0/amount/mass_mg", json!(0), "feed.ingredients[0].amount.mass_mg", "holds no"),
        ("/feed/ingredients/1/sites/0/pka", json!(9.0), "feed.ingredients[1].sites[1].pka", "rising order"),
        ("/feed/ingredients/0/disputed/in_use", json!(9), "feed.ingredients[0].disputed.in_use", "chosen"),
        ("/concentrate/to/volume_ml", json!(900), "concentrate.to.volume_ml", "at most"),
        ("/concentrate/to/volume_ml", json!(20), "concentrate.to.volume_ml", "solids"),
        ("/partition/0/k_neutral", json!(0), "partition[0].k_neutral", "detection limit"),
        ("/partition/0/k_neutral", json!(1e300), "partition[0].k_neutral", "K is"),
        ("/partition", json!([]), "partition", "no partition coefficient"),
        ("/extraction/scheme/cross_current/portions", json!([]), "extraction.portions", "no portions"),
        (
            "/extraction/scheme/cross_current/portions/0/volume_ml",
            json!(400),
            "extraction.portions[0].volume_ml",
            "vessel",
        ),
        ("/extraction/stage_efficiency", json!(1.2), "extraction.stage_efficiency", "equilibrium"),
        ("/isolate/purity", json!(90), "isolate.purity", "fraction"),
        ("/isolate/crude_mass_mg", json!(-1), "isolate.crude_mass_mg", "crude mass"),
        ("/losses/0/amount/fraction", json!(1.5), "losses[0].amount.fraction", "fraction"),
        ("/goal/removal_fraction", json!(90), "goal.removal_fraction", "0.9"),
        ("/feed/volume_ml", json!({"value": 500, "range": {"low": 600, "high": 700}}), "feed.volume_ml", "range"),
        ("/feed/volume_ml", json!({"value": 500, "standard_uncertainty": -1}), "feed.volume_ml", "uncertainty"),
        ("/feed/volume_ml", json!("500"), "file", "line"),
        ("/feed/colour", json!("red"), "file", "colour"),
        ("/unstir_study", json!(2), "unstir_study", "version"),
    ];
    for (pointer, value, at, word) in cases {
        let mut v: Value = serde_json::from_str(&text("neutral-alkaloid")).expect("JSON");
        match v.pointer_mut(pointer) {
            Some(slot) => *slot = value,
            None => {
                let (parent, key) = pointer.rsplit_once('/').expect("a parent");
                v.pointer_mut(parent).expect("the parent")[key] = value;
            }
        }
        let problems = solve_text(&v.to_string()).expect_err(pointer);
        assert!(
            problems.iter().any(|p| p.at == at && p.message.contains(word)),
            "{pointer}: wanted {at} … {word}, got {problems:?}"
        );
    }
}

#[test]
fn foreign_files_are_refused_with_a_reason() {
    for (text, word) in [
        ("", "readable JSON"),
        ("volume,500", "readable JSON"),
        ("{\"a\": 1}", "not a study"),
        ("[1, 2]", "not a study"),
        ("{\"unstir_study\": \"one\"}", "version"),
        ("{\"unstir_study\": 1}", "missing field"),
    ] {
        let problems = solve_text(text).expect_err(text);
        assert!(problems[0].message.contains(word), "{text}: {problems:?}");
    }
    let long = format!("{{\"unstir_study\": 1, \"name\": \"{}\"}}", "x".repeat(MAX_FILE_BYTES));
    assert!(solve_text(&long).expect_err("too long")[0].message.contains("at most"));
}
