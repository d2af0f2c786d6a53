//! Published numbers, each with its source in `tests/data/checks/published.csv`.
//!
//! A row is worked out by [`work_out`] with the functions of `unstir-core` and judged against the
//! published number within the row's tolerance. A row nobody works out fails.

use unstir_checks::{Case, cases};
use unstir_core::judgement::uncertainty::propagate;
use unstir_core::partition::distribution::{Partition, distribution_ratio};
use unstir_core::process::concentrate::{density_g_per_ml, liquor};
use unstir_core::process::counter_current::{counter_current, fraction_left, stages_for};
use unstir_core::process::isolate::hydrate_factor;
use unstir_core::process::portions::{
    PortionIn, StagesIn, continuous, cross_current, portions_for, solve_rising, volume_for,
};
use unstir_core::solution::ionisation::{Constant, speciate};
use unstir_core::study::{ConcentrateTo, Quantity, SiteKind, Study, parse};

/// Fraction left after portions `v` from `v_a` of liquor.
fn left(d: f64, v_a: f64, v: &[f64], efficiency: f64) -> f64 {
    let feed = StagesIn {
        liquor_ml: v_a,
        liquor_mg: &[1.0],
        d: &[d],
        entering_mg_per_ml: &[0.0],
        left_behind_ml: 0.0,
        carried_out_ml: 0.0,
    };
    let portions: Vec<PortionIn> = v.iter().map(|&volume_ml| PortionIn { volume_ml, efficiency }).collect();
    cross_current(&feed, &portions).raffinate_mg[0]
}

fn counter_left(e: f64, n: usize, load: f64) -> f64 {
    let feed = StagesIn {
        liquor_ml: 1.0,
        liquor_mg: &[1.0],
        d: &[e],
        entering_mg_per_ml: &[load],
        left_behind_ml: 0.0,
        carried_out_ml: 0.0,
    };
    counter_current(&feed, 1.0, n, 1.0).raffinate_mg[0]
}

fn acids(pka: &[f64]) -> Vec<Constant> {
    pka.iter().map(|&pka| Constant { kind: SiteKind::Acid, pka }).collect()
}

fn bases(pka: &[f64]) -> Vec<Constant> {
    pka.iter().map(|&pka| Constant { kind: SiteKind::ConjugateAcidOfBase, pka }).collect()
}

fn d(k: f64, constants: &[Constant], ph: f64) -> f64 {
    distribution_ratio(Partition { k_neutral: k, k_ion_pair: 0.0 }, constants, ph)
}

/// pH of zero net charge, by bisection on the mean charge.
fn isoelectric(constants: &[Constant]) -> f64 {
    let (mut a, mut b) = (0.0, 14.0);
    for _ in 0..60 {
        let m = 0.5 * (a + b);
        if speciate(constants, m).mean_charge > 0.0 { a = m } else { b = m }
    }
    a
}

fn study() -> Study {
    let path = unstir_checks::data("studies/neutral-alkaloid.json");
    parse(&std::fs::read_to_string(path).expect("the study")).expect("a study")
}

/// A study whose volume, pH and temperature carry the three numbers of a propagation example.
fn carrier(c: &Case, keys: [&str; 3]) -> Study {
    let mut s = bare(&study());
    let q = |key: &str| Quantity::with_u(c.all(key)[0], c.all(key)[1]);
    s.feed.volume_ml = q(keys[0]);
    s.feed.ph = Some(q(keys[1]));
    s.feed.temperature_c = q(keys[2]);
    s
}

/// The same study with every number exact.
fn bare(s: &Study) -> Study {
    let mut s = s.clone();
    unstir_core::study::for_each_quantity(&mut s, &mut |_, q| *q = Quantity::exact(q.value));
    s
}

/// The numbers of one row, worked out with the functions of the core.
fn work_out(c: &Case) -> Vec<(&'static str, f64)> {
    match c.id.as_str() {
        "A-10" => {
            let s = speciate(&acids(c.all("pKa")), c.num("pH"));
            vec![("ratio", s.fractions[1] / s.fractions[0])]
        }
        "A-21" => {
            let f = speciate(&acids(c.all("pKa")), c.num("pH")).fractions;
            vec![("a0", f[0]), ("a1", f[1]), ("a2", f[2]), ("a3", f[3])]
        }
        "A-22" => {
            let f = speciate(&bases(c.all("pKa")), c.num("pH")).fractions;
            vec![("BH2", f[0]), ("BH", f[1]), ("B", f[2])]
        }
        "B-01" => {
            let (k, va) = (c.num("D"), c.num("Vaq"));
            vec![
                ("E", 1.0 - left(k, va, c.all("Vorg"), 1.0)),
                ("V_for_target_mL", volume_for(c.num("target"), 1, k, va, 1.0).expect("a volume")),
            ]
        }
        "B-02" => {
            let (k, va, v) = (c.num("D"), c.num("Vaq"), c.num("Vorg_each"));
            let n = portions_for(0.999, k, v, va, 1.0).expect("a number");
            vec![
                ("E2", 1.0 - left(k, va, &[v; 2], 1.0)),
                ("E3", 1.0 - left(k, va, &[v; 3], 1.0)),
                ("n_exact", n),
                ("n", n.ceil()),
            ]
        }
        "B-03" => {
            let a = acids(&[5.0]);
            let e = |ph| 1.0 - left(d(c.num("KD"), &a, ph), c.num("Vaq"), c.all("Vorg"), 1.0);
            vec![("E3", e(3.0)), ("E5", e(5.0)), ("E7", e(7.0))]
        }
        "B-04" => {
            let v = c.num("Vaq");
            let solve = |p: &[f64]| solve_rising(1e-6, 1e6, c.num("E"), &|k| 1.0 - left(k, v, p, 1.0)).expect("a D");
            vec![("D_single", solve(&[50.0])), ("D_double", solve(&[25.0; 2]))]
        }
        "B-05" => {
            let a = acids(&[5.0]);
            let v = 50.0;
            let d_min = solve_rising(1e-6, 1e6, c.num("E"), &|k| 1.0 - left(k, v, &[v], 1.0)).expect("a D");
            // H+ at which D of the acid is that: rising with H+.
            let h = solve_rising(1e-12, 1.0, d_min, &|h| d(c.num("KD"), &a, -h.log10())).expect("a pH");
            vec![("D_min", d_min), ("H", h), ("pH_max", -h.log10())]
        }
        "B-06" => {
            let k = d(c.num("KD"), &acids(&[5.0]), c.num("pH"));
            let n = portions_for(0.999, k, 50.0, 50.0, 1.0).expect("a number");
            vec![("D", k), ("n_exact", n), ("n", n.ceil())]
        }
        "B-07" => {
            let wash = |n: usize| left(1.0 / c.num("K"), c.num("V"), &vec![c.num("Vtot") / n as f64; n], 1.0);
            vec![("f10", wash(10)), ("f100", wash(100))]
        }
        "B-09" => vec![("recovered", 1.0 - left(c.num("K"), c.num("V0"), c.all("Vp"), 1.0))],
        "B-11" => vec![("E1", 1.0 - left(3.0, 100.0, &[500.0], 1.0)), ("E5", 1.0 - left(3.0, 100.0, &[100.0; 5], 1.0))],
        "B-12" | "B-13" => {
            let r = if c.id == "B-12" { 0.25 } else { 0.1 };
            let e = |n| 100.0 * (1.0 - left(c.num("D"), 1.0, &vec![r; n], 1.0));
            vec![("E1", e(1)), ("E2", e(2)), ("E3", e(3)), ("E4", e(4))]
        }
        "B-16" => vec![("E", 1.0 - left(c.num("D"), 1.0, &vec![c.num("r"); c.num("n") as usize], 1.0))],
        "B-17" | "P1-30" => vec![("E", 1.0 - left(c.num("D"), c.num("Vaq"), c.all("portions"), 1.0))],
        "B-21" => {
            let solve = |f, va, v: f64| solve_rising(1e-6, 1e6, f, &|k| 1.0 - left(k, va, &[v; 2], 1.0)).expect("a D");
            vec![("D1", solve(0.96, 100.0, 50.0)), ("D2", solve(0.99, 0.5, 0.2))]
        }
        "B-22" => {
            let f = left(c.num("D"), c.num("Vaq"), c.all("Vorg"), 1.0);
            vec![("left_g", f * c.num("m")), ("percent", 100.0 * (1.0 - f))]
        }
        "B-23" => {
            let a = acids(c.all("pKa"));
            let at = |i: usize| d(c.num("KD"), &a, c.all("pH")[i]);
            vec![("D1", at(0)), ("D2", at(1)), ("D3", at(2))]
        }
        "C-01" => {
            let s_min = c.num("water") * (1.0 - c.num("xN") / c.num("xF")) / c.num("m");
            let e = c.num("m") * c.num("S/Smin") * s_min / c.num("water");
            vec![("Smin", s_min), ("Nt", stages_for(0.1, e).expect("stages"))]
        }
        "C-03" => {
            let e = c.num("solvent") / c.num("feed") / c.num("m");
            vec![("N", stages_for(1.0 / c.num("reduction"), e).expect("stages"))]
        }
        "C-06" => {
            for (e, n) in c.all("E").iter().zip(c.all("N")) {
                let (closed, staged) = (fraction_left(*e, *n), counter_left(*e, *n as usize, 0.0));
                assert!((closed - staged).abs() < 1e-12, "{}: {closed} {staged}", c.id);
            }
            let f = |i: usize| counter_left(c.all("E")[i], c.all("N")[i] as usize, 0.0);
            vec![("f_a", f(0)), ("f_b", f(1)), ("f_c", f(2))]
        }
        "C-07" => vec![("removed", 1.0 - left(c.num("D"), c.num("Vaq"), c.all("portions"), c.num("E_stage")))],
        "C-08" => {
            let n = |i: usize| stages_for(c.num("f"), c.all("E")[i]).expect("stages");
            vec![("N15", n(0)), ("N2", n(1)), ("N3", n(2))]
        }
        "C-10" => {
            let f = |n: usize| left(c.num("E"), 1.0, &vec![1.0 / n as f64; n], 1.0);
            vec![("r1", f(1)), ("r2", f(2)), ("r4", f(4)), ("rinf", f(1000))]
        }
        "D-01" | "D-02" | "D-03" | "D-04" | "D-05" | "D-22" | "D-23" | "D-24" | "D-25" | "D-26" | "D-27" => {
            let rho = 1000.0 * density_g_per_ml(c.num("Brix"));
            vec![("rho_kg_m3", rho), ("c_g_L", rho * c.num("Brix") / 100.0)]
        }
        "D-21" => {
            let mut s = study();
            s.feed.volume_ml = c.num("V0").into();
            s.feed.soluble_solids_brix = Some(c.num("B0").into());
            s.concentrate.to = ConcentrateTo::VolumeMl(c.num("V1").into());
            let l = liquor(&s, c.num("V0")).expect("a liquor");
            vec![("Brix", l.brix.expect("°Brix")), ("water_g", l.water_removed_g)]
        }
        "I-06" | "I-07" => {
            let f = hydrate_factor(c.num("M_anhydrous"), c.num("n"));
            vec![("percent_water", 100.0 * (1.0 - f)), ("factor", f)]
        }
        "I-08" => vec![("m_anh", c.num("m") * c.num("purity") * hydrate_factor(c.num("M"), c.num("n")))],
        "J-01" => {
            let s = carrier(c, ["m", "P", "V"]);
            let p = propagate(&s, &|s| {
                Some(vec![
                    1000.0 * s.feed.volume_ml.value * s.feed.ph.as_ref().map_or(f64::NAN, |q| q.value)
                        / s.feed.temperature_c.value,
                ])
            })
            .expect("a result");
            vec![("c", p.values[0]), ("u", p.u[0])]
        }
        "J-02" => {
            let s = carrier(c, ["S", "S0", "k"]);
            let p = propagate(&s, &|s| {
                Some(vec![
                    (s.feed.volume_ml.value - s.feed.ph.as_ref().map_or(f64::NAN, |q| q.value))
                        / s.feed.temperature_c.value,
                ])
            })
            .expect("a result");
            vec![("c", p.values[0]), ("u", p.u[0])]
        }
        "J-10" => {
            let a = c.num("a_rect");
            vec![("u_rect", Quantity::within(0.0, -a, a).standard_uncertainty())]
        }
        "P1-18" => {
            let mixed = |acid: f64, base: &[f64]| {
                let mut all = acids(&[acid]);
                all.extend(bases(base));
                isoelectric(&all)
            };
            let (gly, lys) = (c.all("gly_pKa"), c.all("lys_pKa"));
            vec![("pI_gly", mixed(gly[0], &gly[1..])), ("pI_lys", mixed(lys[0], &lys[1..]))]
        }
        "P1-20" => {
            let a = acids(c.all("pKa"));
            let total = |ph| 1.0 / speciate(&a, ph).neutral;
            let (one, two) = (total(c.num("pH_1")), total(c.num("pH_2")));
            vec![("total1", one), ("total2", two), ("ratio", two / one)]
        }
        "P1-21" => {
            let a = acids(c.all("pKa"));
            let f = |i: usize| speciate(&a, c.all("pH")[i]).fractions;
            vec![("a0_1", f(0)[0]), ("a2_2", f(1)[2])]
        }
        "P1-22" => {
            let b = bases(c.all("pKa_BH"));
            let at = |i: usize| d(c.num("K"), &b, c.all("pH")[i]);
            let rest = |i| left(at(i), c.num("Vaq"), c.all("Vorg"), 1.0);
            vec![("D10", at(0)), ("D8", at(1)), ("left10", rest(0)), ("left8", rest(1))]
        }
        "P1-23" => {
            let rest = |n: usize| c.num("C0") * left(c.num("K"), c.num("Vaq"), &vec![50.0 / n as f64; n], 1.0);
            vec![("c1", rest(1)), ("c2", rest(2)), ("c5", rest(5))]
        }
        "P1-24" => {
            let out = |n: usize| c.num("m0") * (1.0 - left(c.num("K"), c.num("Vaq"), &vec![100.0 / n as f64; n], 1.0));
            vec![("removed1", out(1)), ("removed3", out(3))]
        }
        "P1-25" => {
            let k = d(c.num("K"), &acids(&[5.0]), c.num("pH"));
            let aq = c.num("C0") * left(k, c.num("Vaq"), c.all("Vorg"), 1.0);
            vec![("aq", aq), ("org", k * aq)]
        }
        "P1-26" => {
            let b = bases(c.all("pKa_BH"));
            let at = |i: usize| c.num("C0") * left(d(c.num("K"), &b, c.all("pH")[i]), c.num("Vaq"), c.all("Vorg"), 1.0);
            vec![("c1", at(0)), ("c2", at(1))]
        }
        "P1-29" => {
            let a = acids(c.all("pKa"));
            let h = solve_rising(1e-12, 1.0, 0.5, &|h| 1.0 - left(d(c.num("KD"), &a, -h.log10()), 1.0, &[1.0], 1.0))
                .expect("a pH");
            vec![("pH_half", -h.log10())]
        }
        "P1-31" => {
            let e = c.num("E");
            let two = left(e, 1.0, &[1.0; 2], 1.0);
            vec![
                ("rec1", 1.0 - left(e, 1.0, &[1.0], 1.0)),
                ("rec2x", 1.0 - two),
                ("N_counter", stages_for(two, e).expect("stages")),
            ]
        }
        "P1-32" | "P1-33" | "P1-34" | "P1-35" | "P1-63" => {
            vec![("f", counter_left(c.num("E"), c.num("N") as usize, 0.0))]
        }
        "P1-36" => {
            let (e, n) = (c.num("E_total"), c.num("N") as usize);
            vec![
                ("cocurrent", left(e, 1.0, &[1.0], 1.0)),
                ("cross", left(e, 1.0, &vec![1.0 / n as f64; n], 1.0)),
                ("counter", counter_left(e, n, 0.0)),
            ]
        }
        "P1-37" => {
            let e = solve_rising(1e-3, 1e3, 1.0 - c.num("loss"), &|e| 1.0 - fraction_left(e, c.num("N")));
            vec![("E", e.expect("a factor"))]
        }
        "P1-45" => vec![("kept", left(1.0 / c.num("D_org_over_aq"), c.num("Vorg"), c.all("washes"), 1.0))],
        "P1-57" => {
            let n = portions_for(c.num("target"), c.num("D"), c.num("Vorg_each"), c.num("Vaq"), 1.0).expect("n");
            vec![("n_exact", n), ("n", n.ceil())]
        }
        "P1-58" => {
            let acid = d(10f64.powf(c.num("acid_logP")), &acids(c.all("acid_pKa")), 7.4);
            let base = d(10f64.powf(c.num("base_logP")), &bases(c.all("base_pKa")), 7.4);
            vec![("logD_acid", acid.log10()), ("logD_base", base.log10())]
        }
        "P1-59" => {
            let a = d(c.num("KD_A"), &acids(&[3.0]), c.num("pH"));
            let b = d(c.num("KD_B"), &acids(&[8.0]), c.num("pH"));
            let e = |k| 1.0 - left(k, 1.0, &[1.0], 1.0);
            vec![("E_A", e(a)), ("E_B", e(b)), ("beta", b / a)]
        }
        "P1-60" => {
            let feed = StagesIn {
                liquor_ml: 1.0,
                liquor_mg: &[1.0],
                d: &[c.num("D")],
                entering_mg_per_ml: &[0.0],
                left_behind_ml: 0.0,
                carried_out_ml: 0.0,
            };
            vec![("left", continuous(&feed, c.num("Vorg_total_over_Vaq"), 1.0, 7).raffinate_mg[0])]
        }
        "P1-61" => {
            let e = c.num("E");
            vec![("xN", counter_left(e, c.num("N") as usize, c.num("yS_over_m") * e))]
        }
        "P1-62" => vec![("N", stages_for(c.num("loss"), c.num("E")).expect("stages"))],
        "P2-h-06" | "P2-h-07" | "P2-h-08" => {
            vec![("percent", 100.0 * (1.0 - hydrate_factor(c.num("M_anhydrous"), c.num("n"))))]
        }
        _ => Vec::new(),
    }
}

#[test]
fn every_published_row_is_met() {
    let all = cases("checks/published.csv");
    let mut numbers = 0;
    let mut wrong = Vec::new();
    for case in &all {
        let got = work_out(case);
        if got.is_empty() {
            wrong.push(format!("{}: nobody works this row out", case.id));
        }
        for (key, value) in got {
            numbers += 1;
            wrong.extend(case.judge(key, value).err());
        }
    }
    println!("{} published rows, {numbers} numbers", all.len());
    assert!(wrong.is_empty(), "{}", wrong.join("\n"));
}

#[test]
fn a_wrong_number_is_caught() {
    let all = cases("checks/published.csv");
    let case = all.iter().find(|c| c.id == "B-01").expect("the row");
    assert!(case.judge("E", 0.61).is_err());
    assert!(case.judge("E", 0.6).is_ok());
    assert!(case.judge("no such number", 0.6).is_err());
}
