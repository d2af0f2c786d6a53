//! Published pH values, species, buffer values and doses, each with its source in
//! `tests/data/checks/ph.csv`, and what must hold for every composition.
//!
//! Inputs of a row: `weak1=c,b,pKa…` is c mol/L of an ingredient with those pKa, b of them of
//! conjugate acids of bases; `h1` the enthalpies of proton loss [kJ/mol] in the same order;
//! `strong=z,c,z,c…`; `carbonate=c` closed, `co2_kpa=p` open; `t` °C, 25 if not given; `ideal=1`
//! without activities; `pH` where it is measured.

use unstir_checks::{Case, cases};
use unstir_core::solution::activity::ionic_strength;
use unstir_core::solution::charge_balance::{balance, species, strong_ion_difference};
use unstir_core::solution::composition::{Activities, Carbonate, Composition, StrongIon, Weak};
use unstir_core::solution::concentrated::{Co2After, ph_after_concentrating};
use unstir_core::solution::ionisation::{Constant, pka_at};
use unstir_core::study::SiteKind;

fn composition(c: &Case) -> Composition {
    let t = c.get("t").map_or(25.0, |t| t[0]);
    let weak = [("weak1", "h1"), ("weak2", "h2")].iter().filter_map(|(key, enthalpy)| {
        let numbers = c.get(key)?;
        let bases = numbers[1] as usize;
        let constants = numbers[2..].iter().enumerate().map(|(i, &pka)| Constant {
            kind: if i < bases { SiteKind::ConjugateAcidOfBase } else { SiteKind::Acid },
            pka: c.get(enthalpy).map_or(pka, |h| pka_at(pka, 25.0, h[i], t)),
        });
        Some(Weak { constants: constants.collect(), mol_per_l: numbers[0] })
    });
    let strong = c.get("strong").unwrap_or_default();
    Composition {
        strong: strong.chunks(2).map(|p| StrongIon { charge: p[0] as i32, mol_per_l: p[1] }).collect(),
        weak: weak.collect(),
        carbonate: match (c.get("carbonate"), c.get("co2_kpa")) {
            (Some(total), _) => Carbonate::Closed { mol_per_l: total[0] },
            (_, Some(p)) => Carbonate::Open { co2_kpa: p[0] },
            _ => Carbonate::None,
        },
        temperature_c: t,
        activities: if c.get("ideal").is_some() { Activities::Ideal } else { Activities::Davies },
    }
}

/// One expected number of a row, worked out with the functions of the core.
fn work_out(c: &Case, key: &str) -> Option<f64> {
    let liquid = composition(c);
    let at = balance(&liquid).expect("a pH").value;
    let state = |k: usize| species(&liquid, &at)[0].fractions[k];
    let amount = liquid.weak.first().map_or(0.0, |w| w.mol_per_l);
    Some(match key {
        "pH" => at.ph,
        "H" => at.h_mol_per_l,
        "OH" => at.oh_mol_per_l,
        // The salts of this row as given do not balance, so no pH is asked of them.
        "I" => ionic_strength(&liquid.strong.iter().map(|ion| (ion.charge, ion.mol_per_l)).collect::<Vec<_>>()),
        "beta" => at.beta_mol_per_l,
        "c0" => amount * state(0),
        "c1" => amount * state(1),
        "c2" => amount * state(2),
        "percent0" => 100.0 * state(0),
        "percent1" => 100.0 * state(1),
        "SID" => strong_ion_difference(&liquid, c.num("pH")).expect("ions").value.mol_per_l,
        "dpH_half" => ph_after_concentrating(&liquid, 0.5, Co2After::Kept).expect("a pH").value.ph_change,
        _ => return None,
    })
}

#[test]
fn every_published_row_is_met() {
    let all = cases("checks/ph.csv");
    let (mut numbers, mut wrong) = (0, Vec::new());
    for case in &all {
        for (key, expected) in &case.expected {
            match work_out(case, key) {
                None => wrong.push(format!("{}: nobody works {key} out", case.id)),
                Some(value) => {
                    numbers += 1;
                    println!("{} {key} {value:.5} published {expected} off {:+.4}", case.id, value - expected);
                    wrong.extend(case.judge(key, value).err());
                }
            }
        }
    }
    println!("{} published rows, {numbers} numbers", all.len());
    assert!(wrong.is_empty(), "{}", wrong.join("\n"));
}

#[test]
fn a_wrong_number_is_caught() {
    let all = cases("checks/ph.csv");
    let case = all.iter().find(|c| c.id == "A-12").expect("the row");
    assert!(case.judge("pH", 4.184).is_err(), "the value without activities");
    assert!(case.judge("pH", 4.005).is_ok());
}
