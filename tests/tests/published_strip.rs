//! Vapour, room air, stripping and working up: published numbers, each with its source in
//! `tests/data/checks/strip.csv`, and what must hold for every input.
#![cfg(not(target_arch = "wasm32"))]

use proptest::prelude::*;
use unstir_checks::{Case, cases};
use unstir_core::judgement::air::{RoomIn, concentration_mg_per_m3, dilution_air_m3_per_h, hours_to_limit, room_air};
use unstir_core::judgement::student::student_t;
use unstir_core::library::solvents::{Antoine, AntoineKind, Henry, KPA_PER_MMHG, solvent, solvents};
use unstir_core::process::extract_workup::{
    agent_needed_g, hydrate_capacity, kept_after_washes, recovered_by_rinses, rinse_volume_ml, water_in_extract_g,
};
use unstir_core::process::henry::{
    air_over_water, hcp_at, hcp_from_mol_per_l_atm, hcp_from_solubility, kpa_per_mole_fraction, left_after_gas,
    volatility_from_gamma,
};
use unstir_core::process::portions::solve_rising;
use unstir_core::process::strip::{left_after_boiling, ppm_from_pde, to_limit, water_off_for};
use unstir_core::process::strip_fit::{Assay, fit};
use unstir_core::process::vapour::{
    ATMOSPHERE_KPA, antoine_kpa, boiling_temperature, boils_at_other_pressure_c, boils_where, clausius_clapeyron,
    heat_of_vaporisation, layer_purity, mg_per_m3_to_ppm, molar_volume_l, mole_fraction, ppm_to_mg_per_m3, raoult,
    saturated_air, two_layers_boil_c, two_layers_solvent_mass_fraction, vapour_pressure, water_boils_c, water_kpa,
};

/// Constants of one check, without a range to speak of.
fn antoine(a: f64, b: f64, c: f64) -> Antoine {
    Antoine { a, b, c, low_c: -50.0, high_c: 250.0, kind: AntoineKind::Published }
}

/// Constants printed for log10 bar and K.
fn from_bar_kelvin(c: &Case) -> Antoine {
    antoine(c.num("A") + (100.0 / KPA_PER_MMHG).log10(), c.num("B"), c.num("C") + 273.15)
}

/// Constants printed for ln mmHg and K.
fn from_ln_kelvin(all: &[f64]) -> Antoine {
    antoine(all[0] / 10f64.ln(), all[1] / 10f64.ln(), all[2] + 273.15)
}

fn mmhg_c(c: &Case) -> Antoine {
    antoine(c.num("A"), c.num("B"), c.num("C"))
}

/// A room of one cubic metre fed one milligram an hour for a long time, or as stated.
fn room(changes_per_h: f64) -> RoomIn {
    RoomIn {
        volume_ml: 1000.0,
        density_g_per_ml: 1e-3,
        molar_mass_g_per_mol: 100.0,
        vapour_kpa: None,
        evaporates_over_h: 1000.0,
        room_m3: 1.0,
        changes_per_h,
        mixing_factor: 1.0,
        temperature_c: 25.0,
        pressure_kpa: ATMOSPHERE_KPA,
    }
}

fn readings(c: &Case, t: &str, y: &str, mg: &dyn Fn(f64) -> f64) -> Vec<Assay> {
    c.all(t).iter().zip(c.all(y)).map(|(&hours, &y)| Assay { hours, mg_per_l: mg(y) }).collect()
}

/// The numbers of one row, worked out with the functions of the core.
fn work_out(c: &Case) -> Vec<(String, f64)> {
    let named = |list: &[(&str, f64)]| list.iter().map(|(k, v)| ((*k).to_owned(), *v)).collect::<Vec<_>>();
    let to_25 = |m: f64, ppm: f64| ppm_to_mg_per_m3(ppm, m, 25.0, ATMOSPHERE_KPA);
    let vm = |i: usize| molar_volume_l(c.all("t_C")[i], c.all("p_mmHg")[i] * KPA_PER_MMHG);
    match c.id.as_str() {
        "F-01" => {
            let (t, p) = (c.all("T"), c.all("p"));
            let h = heat_of_vaporisation(p[0], t[0], p[1], t[1]);
            named(&[("dH", 1000.0 * h), ("p3", clausius_clapeyron(p[0], t[0], h, c.num("T3")))])
        }
        "F-02" => named(&[("p2", clausius_clapeyron(c.num("p1"), c.num("T1"), c.num("dH") / 1e3, c.num("T2")))]),
        "F-03" => {
            let hexane = from_ln_kelvin(c.all("antoine_ln_mmHg_K_hexane"));
            let octane = from_ln_kelvin(c.all("antoine_octane"));
            let at = |t: f64| raoult(c.num("x"), antoine_kpa(&hexane, t), antoine_kpa(&octane, t));
            let t = boils_where(ATMOSPHERE_KPA, &|t| at(t).0).expect("a temperature");
            named(&[("T", t + 273.15), ("y", at(t).1)])
        }
        "F-04" => {
            let at = |x: f64| raoult(x, c.num("pA"), c.num("pB"));
            let x = solve_rising(1e-9, 1.0, c.num("P"), &|x| at(x).0).expect("a mole fraction");
            named(&[("x", x), ("y", at(x).1)])
        }
        "F-06" => named(&[
            ("psat_MPa", water_kpa(c.num("T") - 273.15) / 1e3),
            ("Tsat_K", water_boils_c(1e3 * c.num("p")) + 273.15),
        ]),
        "F-07" | "F-08" | "F-09" => {
            let at = |kpa| boiling_temperature(&from_bar_kelvin(c), kpa).expect("in range").value;
            named(&[("Tb_1atm_C", at(ATMOSPHERE_KPA)), ("Tb_200mbar_C", at(20.0))])
        }
        "F-10" => {
            let h = hcp_from_solubility(c.num("S"), c.num("pvap") * KPA_PER_MMHG, c.num("M"));
            named(&[("H_atm_per_M", 1e3 / (h * ATMOSPHERE_KPA * 1e3))])
        }
        "F-11" => {
            let h = hcp_from_mol_per_l_atm(1.0 / c.num("H"));
            let t = c.num("T") - 273.15;
            let air = ppm_to_mg_per_m3(c.num("y") * 1e6, c.num("M"), t, ATMOSPHERE_KPA);
            let haw = air_over_water(h, t);
            named(&[("Haw", haw), ("C_mg_L", air / haw / 1e3)])
        }
        "F-13" => {
            named(&[("percent", 100.0 * two_layers_solvent_mass_fraction(c.num("p_o"), c.num("p_w"), c.num("M_o")))])
        }
        "F-14" => named(&[("ratio", left_after_gas(c.num("Haw"), c.num("Vg/VL")))]),
        "F-15" => named(&[("y_t", raoult(c.num("x_t"), c.num("pt"), c.num("pb")).1)]),
        "F-16" => {
            let a = |p: &[f64]| volatility_from_gamma(1.0, p[0], p[1]);
            named(&[("a85", a(c.all("p85"))), ("a105", a(c.all("p105")))])
        }
        "F-17" => {
            let (m, p) = (c.all("M"), c.all("p"));
            let (total, y) = raoult(mole_fraction(0.5, m[0], m[1]), p[0], p[1]);
            named(&[("pa", total * y), ("pb", total * (1.0 - y)), ("pt", total)])
        }
        "F-18" => {
            let (p_o, p_w) = (c.num("p") - c.num("pw"), c.num("pw"));
            let m = solve_rising(1.0, 1e4, c.num("w"), &|m| two_layers_solvent_mass_fraction(p_o, p_w, m));
            named(&[("M", m.expect("a molar mass"))])
        }
        "F-19" => {
            let (total, y) = raoult(c.all("percent")[0] / 100.0, c.all("p")[0], c.all("p")[1]);
            named(&[("y", y), ("P", total)])
        }
        "H-01" | "H-02" | "H-03" | "P2-h-01" | "P2-h-02" | "P2-h-03" | "P2-h-04" | "P2-h-05" => {
            named(&[("g_per_g", hydrate_capacity(c.num("M"), c.num("n")))])
        }
        "H-04" => named(&[("x", mole_fraction(c.num("w"), c.num("Mw"), c.num("M")))]),
        "H-08" => named(&[("left", 1.0 - recovered_by_rinses(c.num("h"), c.all("v")))]),
        "H-13" | "P2-h-09" | "P2-h-10" => {
            let pct = if c.id == "H-13" { 100.0 * c.num("w") } else { c.num("w") };
            let water = water_in_extract_g(c.num("V"), c.num("rho"), pct);
            let agent = agent_needed_g(water, c.num("capacity"), 1.0).expect("a mass");
            named(&[("water_g", water), ("agent_g", agent)])
        }
        "J-11" => {
            let k = |dof| student_t(c.num("p"), dof).expect("a factor");
            named(&[("k5", k(5)), ("k10", k(10)), ("k20", k(20)), ("k50", k(50))])
        }
        "P2-k-04" => named(&[("k95", student_t(c.num("p"), c.num("nu") as u32).expect("a factor"))]),
        "K-01" => named(&[("v25_760", vm(0)), ("v20_760", vm(1)), ("v20_680", vm(2)), ("v30_720", vm(3))]),
        "K-07" => named(&[("a", vm(0)), ("b", vm(1)), ("c", vm(2)), ("d", vm(3))]),
        "K-02" => {
            let m = c.all("M");
            named(&[("dcm", to_25(m[0], 1.0)), ("etoac", to_25(m[1], 1.0)), ("toluene", to_25(m[2], 1.0))])
        }
        "K-03" => named(&[("mg_m3", ppm_to_mg_per_m3(c.num("y_ppm"), c.num("M"), 20.0, ATMOSPHERE_KPA))]),
        "K-04" => {
            let air = room_air(&RoomIn {
                volume_ml: c.num("V"),
                density_g_per_ml: c.num("rho"),
                molar_mass_g_per_mol: c.num("M"),
                evaporates_over_h: 0.0,
                room_m3: c.num("room"),
                temperature_c: 20.0,
                ..room(0.0)
            })
            .expect("a room");
            named(&[("mg_m3", air.peak_mg_per_m3), ("ppm", air.peak_ppm)])
        }
        "K-05" => {
            let at = |n: f64, min: f64| concentration_mg_per_m3(&room(n), min / 60.0);
            named(&[
                ("n1_10", at(1.0, 10.0)),
                ("n1_20", at(1.0, 20.0)),
                ("n1_40", at(1.0, 40.0)),
                ("n1_80", at(1.0, 80.0)),
                ("n4_10", at(4.0, 10.0)),
                ("n4_40", at(4.0, 40.0)),
            ])
        }
        "K-06" => {
            let at_once = RoomIn { evaporates_over_h: 0.0, ..room(1.0) };
            let left = |h: f64| concentration_mg_per_m3(&at_once, h) / concentration_mg_per_m3(&at_once, 0.0);
            named(&[("removed1", 1.0 - left(1.0)), ("left5", left(5.0))])
        }
        "K-08" => {
            let r = RoomIn {
                volume_ml: c.num("V"),
                density_g_per_ml: c.num("rho"),
                molar_mass_g_per_mol: c.num("M"),
                evaporates_over_h: c.num("t_source"),
                room_m3: c.num("room"),
                ..room(c.num("n"))
            };
            let ppm =
                |h| mg_per_m3_to_ppm(concentration_mg_per_m3(&r, h), r.molar_mass_g_per_mol, 25.0, ATMOSPHERE_KPA);
            named(&[("ppm30", ppm(0.5)), ("ppm60", ppm(1.0))])
        }
        "K-09" => {
            let air = saturated_air(c.num("p") * KPA_PER_MMHG, 78.11, 25.0, c.num("P") * KPA_PER_MMHG);
            named(&[("ppm", air.ppm)])
        }
        "P1-41" | "P1-66" => c
            .all("n")
            .iter()
            .map(|&n| {
                let each = vec![c.num("total") / n; n as usize];
                (format!("f{n}"), 1.0 - recovered_by_rinses(c.num("h"), &each))
            })
            .collect(),
        "P1-44" => named(&[("left", 1.0 - recovered_by_rinses(c.num("h"), c.all("rinses")))]),
        "P1-65" => {
            let v = rinse_volume_ml(c.num("h"), c.num("n") as u32, c.num("target"));
            named(&[("v", v.expect("a volume"))])
        }
        "P2-f-01" => named(&[("p_MPa", water_kpa(c.num("T") - 273.15) / 1e3)]),
        "P2-f-02" => named(&[("T_K", water_boils_c(1e3 * c.num("p")) + 273.15)]),
        "P2-f-03" => named(&[("T5", water_boils_c(c.all("p")[0])), ("T50", water_boils_c(c.all("p")[1]))]),
        "P2-f-04" | "P2-f-05" => c.all("t").iter().map(|&t| (format!("p{t}"), water_kpa(t))).collect(),
        "P2-f-06" | "P2-f-07" | "P2-f-08" | "P2-f-09" => {
            let t = boiling_temperature(&mmhg_c(c), c.num("p") * KPA_PER_MMHG).expect("in range");
            named(&[("Tb_C", t.value)])
        }
        "P2-f-10" | "P2-f-11" => named(&[("p_kPa", vapour_pressure(&mmhg_c(c), c.num("t")).expect("in range").value)]),
        "P2-f-12" => {
            let h = heat_of_vaporisation(c.num("p1"), c.num("t1"), c.num("p2"), c.num("t2"));
            named(&[("dH_J", 1e3 * h)])
        }
        "P2-f-13" => {
            let (t, p) = (c.all("Tb")[0], c.all("Tb")[1]);
            named(&[("Tb_C", boils_at_other_pressure_c(t, p, c.num("dH"), c.num("p")))])
        }
        "P2-f-14" => {
            let left = 1.0 - c.num("fraction_evaporated");
            let amount = left_after_boiling(c.num("K"), left);
            named(&[("amount_left", amount), ("x_ratio", amount / left)])
        }
        "P2-f-15" => {
            // The water fraction left that turns xF into xW; then what is left over what was there.
            let (alpha, f) = (c.num("alpha"), c.num("xF"));
            let x = |w: f64| {
                let (light, heavy) = (f * left_after_boiling(alpha, w), (1.0 - f) * w);
                (light / (light + heavy), light + heavy)
            };
            let w = solve_rising(1e-6, 1.0, c.num("xW"), &|w| x(w).0).expect("a fraction");
            named(&[("W_F", x(w).1)])
        }
        "P2-f-16" | "P2-f-17" | "P2-f-18" | "P2-f-19" => {
            let h = hcp_from_mol_per_l_atm(c.num("kH"));
            named(&[
                ("Hpx_atm", kpa_per_mole_fraction(h) / ATMOSPHERE_KPA),
                ("Hcc", 1.0 / air_over_water(h, c.num("T") - 273.15)),
            ])
        }
        "P2-f-20" | "P2-f-21" | "P2-f-22" => {
            let henry = Henry {
                hcp_25c_mol_m3_pa: hcp_from_mol_per_l_atm(c.num("kH298")),
                range_mol_m3_pa: None,
                slope_k: Some(c.num("dlnk_d1T")),
            };
            let haw = air_over_water(hcp_at(&henry, c.num("t")), c.num("t"));
            named(&[("Haw", haw), ("left", left_after_gas(haw, c.num("Vg/VL")))])
        }
        "P2-j-04" => {
            let f = fit(&readings(c, "x", "y", &|y| (-y).exp())).expect("a line").value;
            let (low, high) = f.rate_band_per_h.expect("a band");
            named(&[
                ("b", f.rate_per_h),
                ("a", -f.start_mg_per_l.ln()),
                ("s", f.residual_sd.expect("scatter")),
                ("ci_b", 0.5 * (high - low)),
            ])
        }
        "P2-j-07" => {
            let f = fit(&readings(c, "x", "y", &|y| (-y).exp())).expect("a line").value;
            let (low, high) = f.rate_band_per_h.expect("a band");
            named(&[
                ("b", f.rate_per_h),
                ("a", -f.start_mg_per_l.ln()),
                ("s", f.residual_sd.expect("scatter")),
                ("sb", 0.5 * (high - low) / student_t(0.95, 2).expect("a factor")),
            ])
        }
        "P2-m-01" => ["hexane", "chloroform", "ethanol", "diethyl_ether"]
            .iter()
            .map(|k| ((*k).to_owned(), to_25(c.num(&format!("M_{k}")), 1.0)))
            .collect(),
        "P2-m-02" | "P2-m-03" | "P2-m-04" | "P2-m-05" => named(&[("mg_m3", to_25(c.num("M"), c.num("ppm")))]),
        "P2-m-06" => {
            // US pint 473.176 mL; the rule's 403 stands for 70 °F, 21.1 °C; 1 cfm is 1.69901 m³/h.
            let g_per_h = c.num("ER") * 60.0 * 473.176 * c.num("SG");
            let limit = ppm_to_mg_per_m3(c.num("TLV"), c.num("M"), 21.1, ATMOSPHERE_KPA);
            let q = dilution_air_m3_per_h(g_per_h, limit, c.num("K")).expect("a flow");
            named(&[("Q_cfm", q / 1.699_01)])
        }
        "P2-m-07" => {
            let r = RoomIn {
                volume_ml: c.num("G"),
                evaporates_over_h: 1000.0,
                density_g_per_ml: 1.0,
                room_m3: c.num("V"),
                ..room(c.num("Q") / c.num("V"))
            };
            named(&[("C", concentration_mg_per_m3(&r, c.num("t"))), ("C_ss", concentration_mg_per_m3(&r, 500.0))])
        }
        "P2-m-08" => ["dichloromethane", "hexane", "chloroform", "methanol", "class3"]
            .iter()
            .map(|k| ((*k).to_owned(), ppm_from_pde(c.num(&format!("PDE_{k}")), c.num("dose"))))
            .collect(),
        "S-01" => solvents()
            .iter()
            .filter_map(|s| s.henry.map(|h| (s.id.clone(), air_over_water(hcp_at(&h, 25.0), 25.0))))
            .collect(),
        "S-02" => c
            .expected
            .keys()
            .map(|id| {
                let s = solvent(id).expect("the solvent");
                let boils = s.antoine.and_then(|a| two_layers_boil_c(&a, layer_purity(&s), ATMOSPHERE_KPA));
                (id.clone(), boils.expect("a temperature"))
            })
            .collect(),
        "S-03" => {
            let r = to_limit(c.num("start"), c.num("limit"), c.num("alpha"), c.all("company")).expect("a floor");
            named(&[("water", r.water_off_fraction), ("a", r.company_lost[0]), ("b", r.company_lost[1])])
        }
        "S-04" => {
            let f = fit(&readings(c, "t", "c", &|c| c)).expect("a line").value;
            let (low, high) = f.rate_band_per_h.expect("a band");
            let t = f.time_to(c.num("limit")).expect("a time").value;
            named(&[
                ("k", f.rate_per_h),
                ("half", 0.5 * (high - low)),
                ("mid", t.hours),
                ("early", t.early_h.expect("early")),
                ("late", t.late_h.expect("late")),
            ])
        }
        _ => Vec::new(),
    }
}

#[test]
fn every_published_row_is_met() {
    let all = cases("checks/strip.csv");
    let (mut numbers, mut wrong) = (0, Vec::new());
    for case in &all {
        let got = work_out(case);
        for key in case.expected.keys() {
            if !got.iter().any(|(k, _)| k == key) {
                wrong.push(format!("{}: nobody works out {key}", case.id));
            }
        }
        for (key, value) in got {
            numbers += 1;
            let share = case.expected.get(&key).map_or(f64::NAN, |e| value / e - 1.0);
            println!("{} {key}: {value} ({share:+.1e})", case.id);
            wrong.extend(case.judge(&key, value).err());
        }
    }
    println!("{} rows, {numbers} numbers", all.len());
    assert!(wrong.is_empty(), "{}", wrong.join("\n"));
}

proptest! {
    /// Vapour pressure and boiling temperature undo each other, and more pressure boils hotter.
    #[test]
    fn boiling_undoes_vapour_pressure(i in 0usize..20, t in 21.0..90.0f64) {
        let all: Vec<Antoine> = solvents().into_iter().filter_map(|s| s.antoine).collect();
        let a = all[i % all.len()];
        let t = t.clamp(a.low_c, a.high_c);
        let p = vapour_pressure(&a, t).unwrap().value;
        prop_assert!((boiling_temperature(&a, p).unwrap().value - t).abs() < 1e-9);
        prop_assert!(two_layers_boil_c(&a, (1.0, 1.0), p).unwrap() < t);
        prop_assert!((water_boils_c(water_kpa(t)) - t).abs() < 1e-3);
    }

    /// Floor of stripping: more volatile leaves with less water, and a round trip comes back.
    #[test]
    fn the_floor_is_monotonic_and_turns_back(alpha in 0.5..5000.0f64, left in 1e-6..1.0f64) {
        let off = water_off_for(left, alpha).unwrap();
        prop_assert!((0.0..=1.0).contains(&off));
        prop_assert!(water_off_for(left, 2.0 * alpha).unwrap() <= off);
        prop_assert!((left_after_boiling(alpha, 1.0 - off) / left - 1.0).abs() < 1e-6);
        let r = to_limit(1.0, left, alpha, &[alpha, 0.0]).unwrap();
        prop_assert!((r.company_lost[0] - (1.0 - left)).abs() < 1e-9 && r.company_lost[1].abs() < 1e-12);
    }

    /// Room: what is in the air never exceeds what evaporated; more air gives less; after the time
    /// to a limit it is at or below it.
    #[test]
    fn the_air_holds_no_more_than_evaporated(
        ml in 1.0..5000.0f64, m3 in 5.0..500.0f64, n in 0.0..20.0f64, fed in 0.0..10.0f64, t in 0.0..24.0f64,
        limit in 1.0..500.0f64,
    ) {
        let r = RoomIn { volume_ml: ml, density_g_per_ml: 0.9, room_m3: m3, evaporates_over_h: fed, ..room(n) };
        let full = ml * 0.9 * 1000.0 / m3;
        let c = concentration_mg_per_m3(&r, t);
        prop_assert!(c >= 0.0 && c <= full * (1.0 + 1e-12));
        let more = concentration_mg_per_m3(&RoomIn { changes_per_h: n + 1.0, ..r }, t);
        prop_assert!(more <= c * (1.0 + 1e-9));
        let air = room_air(&r).unwrap();
        prop_assert!(air.mean_8h_ppm <= air.peak_ppm * (1.0 + 1e-9) && air.mean_8h_ppm >= 0.0);
        if let Some(h) = hours_to_limit(&r, limit) {
            let at = mg_per_m3_to_ppm(concentration_mg_per_m3(&r, h), 100.0, 25.0, ATMOSPHERE_KPA);
            prop_assert!(at <= limit * (1.0 + 1e-9));
        }
    }

    /// An exact first-order fall is found again, and the band lies around the line.
    #[test]
    fn a_fall_is_found_again(c0 in 1.0..1e5f64, k in 0.01..5.0f64, scatter in 0.0..0.2f64, n in 3usize..9) {
        let clean: Vec<Assay> =
            (0..n).map(|i| Assay { hours: i as f64 * 0.7, mg_per_l: c0 * (-k * i as f64 * 0.7).exp() }).collect();
        let f = fit(&clean).unwrap().value;
        prop_assert!((f.rate_per_h / k - 1.0).abs() < 1e-6 && (f.start_mg_per_l / c0 - 1.0).abs() < 1e-6);
        let rough: Vec<Assay> = clean.iter().enumerate()
            .map(|(i, a)| Assay { mg_per_l: a.mg_per_l * (1.0 + if i % 2 == 0 { scatter } else { -scatter }), ..*a })
            .collect();
        let f = fit(&rough).unwrap().value;
        if f.rate_per_h > 0.0 {
            let t = f.time_to(0.01).unwrap().value;
            prop_assert!(t.early_h.is_none_or(|e| e <= t.hours * (1.0 + 1e-9)));
            prop_assert!(t.late_h.is_none_or(|l| l * (1.0 + 1e-9) >= t.hours));
        }
    }

    /// Washing keeps between nothing and all, and splitting a rinse recovers more.
    #[test]
    fn splitting_a_rinse_recovers_more(h in 0.01..20.0f64, v in 0.1..100.0f64, d in 0.01..100.0f64, n in 1usize..6) {
        let once = recovered_by_rinses(h, &[v]);
        let parts = recovered_by_rinses(h, &vec![v / n as f64; n]);
        prop_assert!(parts >= once - 1e-12 && parts <= 1.0);
        let kept = kept_after_washes(d, h, &[v]);
        prop_assert!((0.0..=1.0).contains(&kept));
        prop_assert!(kept_after_washes(d, h, &[v, v]) <= kept);
    }

    /// No input, however odd, makes anything panic.
    #[test]
    fn nothing_panics(a in any::<f64>(), b in any::<f64>(), c in any::<f64>()) {
        let constants = Antoine { a, b, c, low_c: a, high_c: b, kind: AntoineKind::Fitted };
        let _ = (vapour_pressure(&constants, c), boiling_temperature(&constants, a), two_layers_boil_c(&constants, (1.0, 1.0), b));
        let _ = (to_limit(a, b, c, &[a]), student_t(a, 3), rinse_volume_ml(a, 2, b), agent_needed_g(a, b, c));
        let _ = fit(&[Assay { hours: a, mg_per_l: b }, Assay { hours: c, mg_per_l: a }, Assay { hours: b, mg_per_l: c }])
            .map(|f| (f.value.time_to(a), f.value.at(b)));
        let r = RoomIn { volume_ml: a, room_m3: b, evaporates_over_h: c, changes_per_h: a, ..room(b) };
        let _ = (room_air(&r), hours_to_limit(&r, c), water_kpa(a), water_boils_c(b));
    }
}
