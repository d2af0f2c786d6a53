//! Judging what the user stated, field by field.

use super::{
    Amount, ConcentrateTo, Ingredient, LossAmount, MeantAs, Quantity, Scheme, Study, VERSION, for_each_quantity,
};
use serde::Serialize;
use std::fmt;

/// Something in the study that stops a plan, with the field it belongs to.
#[derive(Clone, Debug, PartialEq, Eq, Serialize)]
pub struct Problem {
    /// Path of the field in the file, e.g. `feed.ingredients[0].sites[1].pka`.
    pub at: String,
    /// Quantity, value, allowed range and what to try, in plain words.
    pub message: String,
}

impl Problem {
    /// A problem at the field named by `at`.
    pub fn new(at: impl Into<String>, message: impl Into<String>) -> Self {
        Self { at: at.into(), message: message.into() }
    }
}

impl fmt::Display for Problem {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        write!(f, "{}: {}", self.at, self.message)
    }
}

impl std::error::Error for Problem {}

/// Largest number of ingredients in a study.
pub const MAX_INGREDIENTS: usize = 64;
/// Largest number of portions or stages in a study.
pub const MAX_STAGES: usize = 100;
/// Largest number of readings of a strip.
pub const MAX_READINGS: usize = 200;
/// Largest partition coefficient accepted [-]; log K above 12 has not been measured.
pub const MAX_K: f64 = 1e12;

/// Every reason why `study` cannot be planned; empty when it can.
///
/// Values are judged one by one (sign, size, uncertainty) and together (target among the
/// ingredients, pKa in rising order, portions that fit the vessel).
pub fn check(study: &Study) -> Vec<Problem> {
    let mut found = Vec::new();
    let mut say = |at: &str, message: String| found.push(Problem::new(at, message));

    if study.unstir_study != VERSION {
        say("unstir_study", format!("version is {}; this program reads {VERSION}", study.unstir_study));
    }
    each_number(study, &mut say);
    feed(study, &mut say);
    concentrate(study, &mut say);
    partition(study, &mut say);
    extraction(study, &mut say);
    bench(study, &mut say);
    if study.strip.readings.len() > MAX_READINGS {
        let n = study.strip.readings.len();
        say("strip.readings", format!("{n} readings are listed; at most {MAX_READINGS} are handled"));
    }
    found
}

/// What a single number may be: by the last part of its path.
struct Allowed {
    what: &'static str,
    unit: &'static str,
    low: f64,
    /// Whether `low` itself is allowed.
    with_low: bool,
    high: f64,
    advice: &'static str,
}

fn allowed(path: &str) -> Allowed {
    let a = |what, unit, low, with_low, high, advice| Allowed { what, unit, low, with_low, high, advice };
    let last = path.rsplit('.').next().unwrap_or(path);
    match last {
        "removal_fraction" => a("the removal to reach", "", 0.0, false, 1.0, "give a fraction such as 0.9 for 90 %"),
        "volume_ml" if path.starts_with("losses") => {
            a("the volume lost", "mL", 0.0, true, 1e6, "leave the row out if nothing was lost")
        }
        "volume_ml" if path.contains("portions") => {
            a("the portion", "mL", 0.0, false, 1e6, "leave the portion out instead")
        }
        "volume_ml" => a("the volume", "mL", 0.0, false, 1e6, "give the volume in millilitres"),
        "solvent_ml" => a("the solvent volume", "mL", 0.0, false, 1e6, "give the volume in millilitres"),
        "vessel_ml" => a("the largest vessel", "mL", 0.0, false, 1e6, "give its volume in millilitres"),
        "volume_m3" => a("the volume of the room", "m³", 1.0, true, 1e5, "length times width times height"),
        "changes_per_h" => a("the air changes", "1/h", 0.0, true, 100.0, "0 for a closed room"),
        "spill_ml" => a("the volume spilled", "mL", 0.0, false, 1e6, "leave it empty for all of the solvent"),
        "pressure_kpa" => a("the pressure", "kPa", 0.1, true, 1000.0, "the atmosphere has about 101 kPa"),
        "minutes" => a("the time", "min", 0.0, true, 1e5, "count from when stripping began"),
        "mg_per_l" if path.starts_with("strip") => {
            a("the content", "mg/L", 0.0, true, 1e6, "where nothing was found, enter the detection limit")
        }
        "limit_mg_per_l" => a("the residue to reach", "mg/L", 0.0, false, 1e6, "check the unit"),
        "serving_ml" => a("the serving", "mL", 0.0, false, 1e5, "give the volume on the label"),
        "carbonate_at_c" => a("the temperature of carbonating", "°C", 0.0, true, 40.0, "carbonate cold"),
        "made_up_to_ml" => a("the made-up volume", "mL", 0.0, false, 1e6, "leave it empty until it is done"),
        "ph" | "ph_after" => a("pH", "", -2.0, true, 16.0, "check the reading"),
        "temperature_c" => a("the temperature", "°C", 0.0, true, 100.0, "the liquid has to be liquid water"),
        "soluble_solids_brix" => a("soluble solids", "°Brix", 0.0, true, 85.0, "check the reading"),
        "brix" => a("soluble solids", "°Brix", 0.0, false, 85.0, "above this the liquor sets or crystallises"),
        "water_removed_g" => a("the water removed", "g", 0.0, true, 1e6, "give a mass in grams"),
        "molar_mass_g_per_mol" => a("the molar mass", "g/mol", 1.0, true, 1e6, "check the unit"),
        "mass_mg" | "mg" => a("the mass", "mg", 0.0, true, 1e9, "check the unit"),
        "mg_per_l" => a("the concentration", "mg/L", 0.0, true, 1e6, "check the unit"),
        "mmol_per_l" => a("the concentration of the ion", "mmol/L", 0.0, true, 2e4, "check the unit"),
        "co2_g_per_l" => a("dissolved carbon dioxide", "g/L", 0.0, true, 40.0, "a fizzy drink holds 4 to 9 g/L"),
        "mg_per_ml" => a("the concentration", "mg/mL", 0.0, true, 1e3, "check the unit"),
        "pka" => a("pKa", "", -10.0, true, 20.0, "check that it is not a Ka or Kb"),
        "value" => a("the published constant", "", -10.0, true, 25.0, "check that it is not a Ka or Kb"),
        "enthalpy_kj_per_mol" => a("the enthalpy", "kJ/mol", -300.0, true, 300.0, "check the unit"),
        "transfer_enthalpy_kj_per_mol" => {
            a("the enthalpy of transfer", "kJ/mol", -300.0, true, 300.0, "check the unit")
        }
        "density_g_per_ml" => a("the density", "g/mL", 0.3, true, 5.0, "check the unit"),
        "k_neutral" | "k_ion_pair" => a(
            "the partition coefficient",
            "",
            0.0,
            true,
            MAX_K,
            "K is a concentration ratio; if you hold log K, raise 10 to it",
        ),
        "stage_efficiency" => a("the stage efficiency", "", 0.0, false, 1.0, "1 means full equilibrium"),
        "organic_left_behind_ml" => a("the solvent left behind", "mL", 0.0, true, 1e6, "0 if it drains completely"),
        "aqueous_carried_out_ml" => a("the liquor carried out", "mL", 0.0, true, 1e6, "0 if it parts cleanly"),
        "crude_mass_mg" => a("the crude mass", "mg", 0.0, true, 1e9, "check the weighing"),
        "purity" => a("the purity", "", 0.0, false, 1.0, "give a fraction such as 0.9 for 90 %"),
        "hydrate_waters" => a("the water of the hydrate", "mol/mol", 0.0, true, 24.0, "give moles of water per mole"),
        "residual_solvent_fraction" => {
            a("the solvent in the isolate", "", 0.0, true, 0.999, "give a fraction such as 0.02")
        }
        "fraction" => a("the fraction lost", "", 0.0, true, 0.999, "give a fraction such as 0.04 for 4 %"),
        _ => a("the number", "", f64::MIN, true, f64::MAX, "check it"),
    }
}

/// What the number at `path` is, in words, e.g. "the partition coefficient of caffeine".
pub fn words_of(study: &Study, path: &str) -> String {
    let what = allowed(path).what;
    let index =
        |head: &str| -> Option<usize> { path.strip_prefix(head)?.split_once(']').and_then(|(i, _)| i.parse().ok()) };
    if let Some(ing) = index("feed.ingredients[").and_then(|i| study.feed.ingredients.get(i)) {
        return format!("{what} of {}", ing.name);
    }
    if let Some(p) = index("partition[").and_then(|i| study.partition.get(i)) {
        return format!("{what} of {}", p.ingredient);
    }
    if let Some(i) = index("extraction.portions[") {
        let portion = format!("portion {}", i + 1);
        return if path.ends_with("volume_ml") { portion } else { format!("{what} of {portion}") };
    }
    if let Some(ion) = index("feed.strong_ions[").and_then(|i| study.feed.strong_ions.get(i)) {
        return format!("{what}, {}", ion.name);
    }
    if let Some(l) = index("losses[").and_then(|i| study.losses.get(i)) {
        return format!("{what} as “{}”", l.what);
    }
    match path {
        "feed.volume_ml" => "the volume of the feed".to_owned(),
        "concentrate.to.volume_ml" => "the volume of the liquor".to_owned(),
        "concentrate.ph_after" => "the pH of the liquor".to_owned(),
        "feed.ph" => "the pH of the feed".to_owned(),
        _ => what.to_owned(),
    }
}

/// The range, value and advice as a sentence.
fn refusal(a: &Allowed, value: f64) -> String {
    let unit = if a.unit.is_empty() { String::new() } else { format!(" {}", a.unit) };
    let from = if a.with_low { "from" } else { "more than" };
    let to = if a.with_low { "to" } else { "up to" };
    let range = format!("{value}{unit}; it can be {from} {} {to} {}{unit}", a.low, a.high).replace('-', "−");
    format!("{} is {range}. Try: {}", a.what, a.advice)
}

fn each_number(study: &Study, say: &mut dyn FnMut(&str, String)) {
    let mut walk = study.clone();
    for_each_quantity(&mut walk, &mut |path, q: &mut Quantity| {
        let a = allowed(path);
        let below = if a.with_low { q.value < a.low } else { q.value <= a.low };
        if !q.value.is_finite() || below || q.value > a.high {
            say(path, refusal(&a, q.value));
            return;
        }
        if let Some(u) = q.standard_uncertainty.filter(|u| !u.is_finite() || *u < 0.0) {
            say(path, format!("the standard uncertainty of {} is {u}; it can be 0 or more", a.what));
        }
        if let Some(r) = q.range {
            if !(r.low <= q.value && q.value <= r.high && r.low.is_finite() && r.high.is_finite()) {
                say(
                    path,
                    format!(
                        "the range of {} is {} to {}, which does not hold its value {}. \
                         Put the lower end first and the value between",
                        a.what, r.low, r.high, q.value
                    ),
                );
            } else if r.low < a.low || r.high > a.high {
                say(
                    path,
                    format!(
                        "the range of {} is {} to {}; it can lie within {} to {}. Try: {}",
                        a.what, r.low, r.high, a.low, a.high, a.advice
                    ),
                );
            }
        }
    });
}

fn feed(study: &Study, say: &mut dyn FnMut(&str, String)) {
    let list = &study.feed.ingredients;
    if list.is_empty() {
        say("feed.ingredients", "no ingredient is listed; add the one to remove".to_owned());
    }
    if list.len() > MAX_INGREDIENTS {
        say(
            "feed.ingredients",
            format!(
                "{} ingredients are listed; at most {MAX_INGREDIENTS} are handled. Group the minor ones",
                list.len()
            ),
        );
        return;
    }
    for (i, ing) in list.iter().enumerate() {
        let at = format!("feed.ingredients[{i}]");
        if ing.name.trim().is_empty() {
            say(&format!("{at}.name"), "the ingredient has no name; give it one".to_owned());
        } else if list[..i].iter().any(|o| o.name == ing.name) {
            say(&format!("{at}.name"), format!("“{}” is listed twice; names must differ", ing.name));
        }
        constants(&at, ing, say);
    }
    for (i, ion) in study.feed.strong_ions.iter().enumerate() {
        if ion.charge == 0 || ion.charge.abs() > 8 {
            say(
                &format!("feed.strong_ions[{i}].charge"),
                format!(
                    "the charge is {}; it can be −8 to −1 or 1 to 8, e.g. 1 for sodium, −1 for chloride",
                    ion.charge
                ),
            );
        }
    }
    if study.feed.strong_ions.len() > MAX_INGREDIENTS {
        say(
            "feed.strong_ions",
            format!("{} ions are listed; at most {MAX_INGREDIENTS} are handled", study.feed.strong_ions.len()),
        );
    }
    match study.target() {
        None if !list.is_empty() => say(
            "feed.target",
            format!("the target “{}” is not among the ingredients of the feed; choose one that is", study.feed.target),
        ),
        Some(t) => {
            let i = list.iter().position(|x| x.name == t.name).unwrap_or_default();
            let (value, at) = match &t.amount {
                Amount::MassMg(q) => (q.value, "mass_mg"),
                Amount::MgPerL(q) => (q.value, "mg_per_l"),
                Amount::PerServing { mg, .. } => (mg.value, "per_serving.mg"),
            };
            if value == 0.0 {
                say(
                    &format!("feed.ingredients[{i}].amount.{at}"),
                    format!("the feed holds no {}; nothing can be removed. Give the amount it holds", t.name),
                );
            }
        }
        None => {}
    }
}

fn constants(at: &str, ing: &Ingredient, say: &mut dyn FnMut(&str, String)) {
    for (j, pair) in ing.sites.windows(2).enumerate() {
        if pair[1].pka.value < pair[0].pka.value {
            say(
                &format!("{at}.sites[{}].pka", j + 1),
                format!(
                    "pKa runs {} then {}; macroscopic constants are listed in rising order. \
                     Sort them, and check that neither is a pKb",
                    pair[0].pka.value, pair[1].pka.value
                ),
            );
        }
    }
    for (j, s) in ing.sites.iter().enumerate() {
        if !(0.0..=100.0).contains(&s.pka_temperature_c) {
            say(
                &format!("{at}.sites[{j}].pka_temperature_c"),
                format!("the temperature of the pKa is {} °C; it can be from 0 to 100 °C", s.pka_temperature_c),
            );
        }
    }
    if let Some(d) = &ing.disputed {
        if d.readings.is_empty() {
            say(
                &format!("{at}.disputed.readings"),
                "the disputed constant has no reading; add a published value".to_owned(),
            );
        } else if d.in_use >= d.readings.len() {
            say(
                &format!("{at}.disputed.in_use"),
                format!("reading {} is chosen of {}; choose one that is listed", d.in_use + 1, d.readings.len()),
            );
        } else if d.readings[d.in_use].meant_as == MeantAs::Unstated {
            say(
                &format!("{at}.disputed.readings[{}].meant_as", d.in_use),
                "the reading the plan uses must say how it is meant; choose acid, conjugate acid of a base, or a pKb"
                    .to_owned(),
            );
        }
    }
}

fn concentrate(study: &Study, say: &mut dyn FnMut(&str, String)) {
    let v0 = study.feed.volume_ml.value;
    match &study.concentrate.to {
        ConcentrateTo::Unchanged => {}
        ConcentrateTo::VolumeMl(q) => {
            if q.value > v0 {
                say(
                    "concentrate.to.volume_ml",
                    format!(
                        "the liquor is to be {} mL but the feed is {v0} mL; give at most the feed's volume",
                        q.value
                    ),
                );
            }
        }
        ConcentrateTo::WaterRemovedG(q) => {
            if q.value >= v0 {
                say(
                    "concentrate.to.water_removed_g",
                    format!("{} g of water cannot leave {v0} mL of feed; give less", q.value),
                );
            }
        }
        ConcentrateTo::Brix(q) => match &study.feed.soluble_solids_brix {
            None => say(
                "concentrate.to.brix",
                "concentrating to a °Brix needs the feed's soluble solids; enter them with the feed".to_owned(),
            ),
            Some(b) if b.value <= 0.0 => say(
                "concentrate.to.brix",
                "the feed has no soluble solids, so no °Brix can be reached; give a volume instead".to_owned(),
            ),
            Some(b) if q.value < b.value => say(
                "concentrate.to.brix",
                format!("the liquor is to reach {} °Brix but the feed has {} already; give more", q.value, b.value),
            ),
            Some(_) => {}
        },
    }
}

fn partition(study: &Study, say: &mut dyn FnMut(&str, String)) {
    for (i, p) in study.partition.iter().enumerate() {
        if !study.feed.ingredients.iter().any(|g| g.name == p.ingredient) {
            say(
                &format!("partition[{i}].ingredient"),
                format!("“{}” is not an ingredient of the feed; correct the name or remove the row", p.ingredient),
            );
        }
        if study.partition[..i].iter().any(|o| o.ingredient == p.ingredient && o.solvent == p.solvent) {
            say(
                &format!("partition[{i}].k_neutral"),
                format!("K of {} in {} is given twice; keep one", p.ingredient, p.solvent),
            );
        }
        if !(0.0..=100.0).contains(&p.k_temperature_c) {
            say(
                &format!("partition[{i}].k_temperature_c"),
                format!("the temperature of K is {} °C; it can be from 0 to 100 °C", p.k_temperature_c),
            );
        }
    }
    if study.solvent.id.is_empty() {
        say("solvent.name", "no solvent is chosen; pick one below, or type the name of your own".to_owned());
    } else if let Some(t) = study.target() {
        match study.partition.iter().position(|p| p.ingredient == t.name && p.solvent == study.solvent.id) {
            None => say(
                "partition",
                format!(
                    "no partition coefficient of {} in {} is given; enter one, or pick a solvent with a published value",
                    t.name, study.solvent.name
                ),
            ),
            Some(i) => {
                let p = &study.partition[i];
                if p.k_neutral.value == 0.0 && p.k_ion_pair.as_ref().is_none_or(|k| k.value == 0.0) {
                    say(
                        &format!("partition[{i}].k_neutral"),
                        "K of the target is 0, so nothing would enter the solvent; if it was below detection, \
                         enter the detection limit"
                            .to_owned(),
                    );
                }
            }
        }
    }
}

fn extraction(study: &Study, say: &mut dyn FnMut(&str, String)) {
    let e = &study.extraction;
    let left = e.organic_left_behind_ml.value;
    match &e.scheme {
        Scheme::CrossCurrent { portions } => {
            if portions.is_empty() {
                say("extraction.portions", "there are no portions; add at least one".to_owned());
            }
            if portions.len() > MAX_STAGES {
                say(
                    "extraction.portions",
                    format!(
                        "{} portions are listed; at most {MAX_STAGES} are handled. Use continuous extraction",
                        portions.len()
                    ),
                );
            }
            for (i, p) in portions.iter().enumerate() {
                if left > 0.0 && left >= p.volume_ml.value && p.volume_ml.value > 0.0 {
                    say(
                        &format!("extraction.portions[{i}].volume_ml"),
                        format!(
                            "{left} mL of solvent stay behind on draining, but the portion is only {} mL; \
                             use a larger portion or drain better",
                            p.volume_ml.value
                        ),
                    );
                }
            }
        }
        Scheme::CounterCurrent { stages, .. } => {
            if *stages == 0 || *stages as usize > MAX_STAGES {
                say("extraction.stages", format!("{stages} stages are asked for; it can be from 1 to {MAX_STAGES}"));
            }
        }
        Scheme::Continuous { .. } => {}
    }
    for (i, s) in e.entering_solvent.iter().enumerate() {
        if !study.feed.ingredients.iter().any(|g| g.name == s.ingredient) {
            say(
                &format!("extraction.entering_solvent[{i}].ingredient"),
                format!(
                    "“{}” is not an ingredient of the feed; list it there with the amount 0 or remove the row",
                    s.ingredient
                ),
            );
        }
    }
}

fn bench(study: &Study, say: &mut dyn FnMut(&str, String)) {
    if let Some(i) = &study.isolate {
        let m = study.target().and_then(|t| t.molar_mass_g_per_mol.as_ref());
        if i.hydrate_waters.value > 0.0 && m.is_none() {
            say(
                "isolate.hydrate_waters",
                "a hydrate needs the molar mass of the target; enter it with the ingredient".to_owned(),
            );
        }
    }
    for (i, l) in study.losses.iter().enumerate() {
        if l.what.trim().is_empty() {
            let part = match l.amount {
                LossAmount::Fraction(_) => "fraction",
                LossAmount::VolumeMl(_) => "volume_ml",
            };
            say(&format!("losses[{i}].what"), format!("the loss has no name (its {part} is kept); say what happened"));
        }
    }
}
