//! Solvents as choices: facts, hazard codes with their meaning and cautions, all in the row.

use super::format::{fixed, significant};
use crate::parts::CautionText;
use crate::state::NumberText;
use unstir_core::library::cautions::{Caution, CautionStep, cautions_for, general_cautions, hazard_statement};
use unstir_core::library::limits::{ExposureLimits, exposure_limits_for};
use unstir_core::library::partition::{KBasis, published_k};
use unstir_core::library::solutes::solute_named;
use unstir_core::library::solvents::{Layer, PeroxideClass, Solvent};
use unstir_core::library::sources::Source;
use unstir_core::partition::estimate::estimated_k;
use unstir_core::plan::Plan;

/// A solvent of the library as a row.
#[derive(Clone, Debug, PartialEq)]
pub struct SolventRow {
    /// Id.
    pub id: String,
    /// Name.
    pub name: String,
    /// Density with its source, to take over.
    pub density: NumberText,
    /// What it is, value and source.
    pub facts: Vec<Fact>,
    /// What each list of limits says, and rules of its own.
    pub limits: Vec<Fact>,
    /// Hazard codes with their meaning.
    pub codes: Vec<(String, String)>,
    /// Cautions for choosing and opening it.
    pub cautions: Vec<CautionText>,
    /// A remark; often empty.
    pub note: String,
}

/// One property of a solvent.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Fact {
    /// What it is.
    pub what: String,
    /// Value with unit.
    pub value: String,
    /// Source, with how far it was checked.
    pub source: String,
}

/// A solvent of the library, its layer told against a liquor of this density [g/mL].
pub(super) fn solvent_row(s: &Solvent, liquor_density: Option<f64>) -> SolventRow {
    let statement = |code: &String| {
        let meaning = hazard_statement(code).map_or_else(|| "see the safety data sheet".to_owned(), |h| h.meaning);
        (code.clone(), meaning)
    };
    let mut codes: Vec<(String, String)> = s.h_codes.iter().chain(&s.euh_codes).map(statement).collect();
    if codes.is_empty() {
        codes.push(("No code held".to_owned(), "read the supplier's safety data sheet".to_owned()));
    }
    SolventRow {
        id: s.id.clone(),
        name: s.name.clone(),
        density: NumberText {
            value: s.density_20c_g_ml.to_string(),
            spread: String::new(),
            source: cite(&s.density_source),
        },
        facts: facts(s, liquor_density),
        limits: exposure_limits_for(&s.id).map(|l| limit_facts(&l)).unwrap_or_default(),
        codes,
        cautions: before_choosing(&cautions_for(&s.id)),
        note: s.note.clone(),
    }
}

fn facts(s: &Solvent, liquor_density: Option<f64>) -> Vec<Fact> {
    let fact = |what: &str, value: String, source: &Source| Fact { what: what.to_owned(), value, source: cite(source) };
    let mut list = Vec::new();
    if let Some(density) = liquor_density {
        let words = format!("{} (liquor about {} g/mL)", layer_words(s.layer_against(density)), fixed(density, 2));
        list.push(fact("against this liquor", words, &s.density_source));
    }
    list.push(fact(
        "against water",
        format!("{} ({} g/mL)", layer_words(s.layer_against_water()), fixed(s.density_20c_g_ml, 3)),
        &s.density_source,
    ));
    let boils = s.boiling_point_c.map_or_else(|| "does not boil undecomposed".to_owned(), |t| format!("{t} °C"));
    list.push(fact("boils at", boils, &s.boiling_point_source));
    let flash =
        s.flash_point_c.map_or_else(|| "none by the usual tests".to_owned(), |t| format!("{} °C", with_minus(t)));
    list.push(fact("flash point", flash, &s.flash_point_source));
    let explosive = match (s.lel_vol_pct, s.uel_vol_pct) {
        (Some(l), Some(u)) => format!("{l}–{u} % by volume in air"),
        (Some(l), None) => format!("from {l} % by volume in air"),
        _ => "none listed".to_owned(),
    };
    list.push(fact("explosive", explosive, &s.flammability_source));
    list.push(fact(
        "dissolves in water",
        s.solubility_in_water_mass_pct
            .map_or_else(|| "not known".to_owned(), |p| format!("{} g per 100 g", significant(p, 3))),
        &s.solubility_in_water_source,
    ));
    let peroxides = match s.peroxide_class {
        PeroxideClass::No => "not a peroxide former",
        PeroxideClass::Low => "low tendency: test old stock",
        PeroxideClass::OnConcentration => "dangerous on evaporating: test first",
    };
    list.push(fact("peroxides", peroxides.to_owned(), &s.peroxide_source));
    if let Some((limits, ppm)) = exposure_limits_for(&s.id).and_then(|l| l.strictest_twa_ppm.map(|v| (l, v))) {
        let words = format!("{ppm} ppm ({})", limits.strictest_basis);
        list.push(fact("lowest average listed", words, &limits.special_source));
    }
    list
}

fn limit_facts(l: &ExposureLimits) -> Vec<Fact> {
    let mut list = Vec::new();
    let mut add = |what: &str, parts: Vec<String>, source: &Source| {
        if !parts.is_empty() {
            let value = parts.join(", ").replace("mg/m3", "mg/m³");
            list.push(Fact { what: what.to_owned(), value, source: cite(source) });
        }
    };
    let ppm = |value: Option<f64>, words: &str| value.map(|v| format!("{v} ppm {words}"));
    let parts = |items: [Option<String>; 3], note: &str| -> Vec<String> {
        items.into_iter().flatten().chain((!note.is_empty()).then(|| note.to_owned())).collect()
    };
    let osha =
        [ppm(l.osha_pel_twa_ppm, "over 8 h"), ppm(l.osha_stel_ppm, "short term"), ppm(l.osha_ceiling_ppm, "ceiling")];
    add("US OSHA", parts(osha, &l.osha_note), &l.osha_source);
    let niosh = [
        ppm(l.niosh_rel_twa_ppm, "over the shift"),
        ppm(l.niosh_stel_ppm, "short term"),
        ppm(l.niosh_ceiling_ppm, "ceiling"),
    ];
    add("US NIOSH", parts(niosh, &l.niosh_note), &l.niosh_source);
    let skin = if l.eu_skin { "taken up through the skin" } else { "" };
    add("EU", parts([ppm(l.eu_twa_ppm, "over 8 h"), ppm(l.eu_stel_ppm, "over 15 min"), None], skin), &l.eu_source);
    add("danger to life", parts([ppm(l.idlh_ppm, ""), None, None], ""), &l.idlh_source);
    if !l.special_rules.is_empty() {
        add("rules of its own", vec![l.special_rules.clone()], &l.special_source);
    }
    list
}

fn layer_words(layer: Layer) -> &'static str {
    match layer {
        Layer::Lower => "lower layer",
        Layer::Upper => "upper layer",
        Layer::Uncertain => "too close to tell: find the layers with a drop of water",
    }
}

fn with_minus(t: f64) -> String {
    t.to_string().replace('-', "−")
}

fn capital(text: &str) -> String {
    let mut c = text.chars();
    c.next().map(|first| first.to_uppercase().chain(c).collect()).unwrap_or_default()
}

/// A source in one line with how far it was checked.
pub fn cite(source: &Source) -> String {
    let detail = if source.detail.is_empty() { String::new() } else { format!("; {}", source.detail) };
    format!("{}{detail} [{}]", source.citation, source.checked.word())
}

/// What to know before choosing: the cautions for that step, or all where it has none of its own.
fn before_choosing(all: &[Caution]) -> Vec<CautionText> {
    let own = at_step(all, CautionStep::Solvent);
    if own.is_empty() { all.iter().flat_map(|c| at_step(std::slice::from_ref(c), c.step)).collect() } else { own }
}

/// The cautions of `all` that belong to `step`.
fn at_step(all: &[Caution], step: CautionStep) -> Vec<CautionText> {
    all.iter()
        .filter(|c| c.step == step)
        .map(|c| CautionText {
            sign_word: c.sign_word.word().to_owned(),
            what_can_happen: c.what_can_happen.clone(),
            what_to_do: c.what_to_do.clone(),
            source: cite(&c.source),
        })
        .collect()
}

/// Cautions beside a step: those that hold for any solvent, then those of the solvent chosen.
pub fn cautions_at(steps: &[CautionStep], solvent: &str) -> Vec<CautionText> {
    let (any, own) = (general_cautions(), cautions_for(solvent));
    steps.iter().flat_map(|&step| [at_step(&any, step), at_step(&own, step)].concat()).collect()
}

/// Cautions that hold for any solvent at these steps.
pub fn general_cautions_at(steps: &[CautionStep]) -> Vec<CautionText> {
    let any = general_cautions();
    steps.iter().flat_map(|&step| at_step(&any, step)).collect()
}

/// What a spill would make of the air of the room, in sentences.
pub fn spill_sentences(plan: &Plan) -> Vec<String> {
    let Some(s) = &plan.spill else { return Vec::new() };
    let times = |over: f64| format!("{} times", significant(over, 2));
    let mut list = vec![format!(
        "{} mL spilled in {} m³ with {} air changes an hour: up to {} ppm, {} ppm on average over 8 h, if it mixed well.",
        significant(s.spill_ml, 3),
        significant(s.room_m3, 3),
        significant(s.changes_per_h, 2),
        significant(s.peak_ppm, 2),
        significant(s.mean_8h_ppm, 2)
    )];
    let mut beside = Vec::new();
    if let Some(over) = s.peak_over_short_term {
        beside.push(format!("the peak is {} the lowest listed short-term limit", times(over)));
    }
    if let Some(over) = s.mean_over_average {
        beside.push(format!("the average {} the lowest listed average", times(over)));
    }
    if let Some(over) = s.peak_over_explosive {
        beside.push(format!("the peak {} the lower explosive limit", times(over)));
    }
    if !beside.is_empty() {
        list.push(format!("{}.", capital(&beside.join(", "))));
    }
    match s.hours_to_average {
        Some(t) if t > 0.0 => {
            list.push(format!("Below the lowest listed average again after about {} h.", significant(t, 2)))
        }
        Some(_) => {}
        None => list.push("By ventilation alone it does not fall below a listed average.".to_owned()),
    }
    list.extend(s.assumptions.iter().cloned());
    list
}

/// A published K, to be taken over with one tap.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct PublishedRow {
    /// Value, range, conditions.
    pub words: String,
    /// Source, with how far it was checked.
    pub source: String,
    /// What is put into the field.
    pub text: NumberText,
}

/// Published K of an ingredient, known by its name, in a solvent, and an estimate after them.
pub fn published_rows(ingredient: &str, solvent: &str) -> Vec<PublishedRow> {
    let Some(solute) = solute_named(ingredient) else { return Vec::new() };
    let estimate = estimated_k(&solute.id, solvent).map(|e| {
        let words = format!(
            "K {} ({}–{}), estimated, neutral form, 25 °C: measure it before you rely on it",
            significant(e.k, 2),
            significant(e.k_low, 2),
            significant(e.k_high, 2)
        );
        // As a standard uncertainty of K itself: the first term of the exponential.
        let u = e.k * std::f64::consts::LN_10 * e.standard_error;
        let text = NumberText { value: digits(e.k), spread: digits(u), source: e.source.clone() };
        PublishedRow { words, text, source: e.source }
    });
    let published = published_k(&solute.id, solvent).into_iter().map(|p| {
        let mut words = format!("K {}", significant(p.k, 3));
        let mut spread = String::new();
        if let (Some(low), Some(high)) = (p.k_low, p.k_high) {
            words.push_str(&format!(" ({}–{})", significant(low, 3), significant(high, 3)));
            spread = format!("{low} to {high}");
        }
        match (p.temperature_low_c, p.temperature_high_c) {
            (Some(a), Some(b)) if a == b => words.push_str(&format!(", {a} °C")),
            (Some(a), Some(b)) => words.push_str(&format!(", {a}–{b} °C")),
            _ => words.push_str(", temperature not stated"),
        }
        words.push_str(&format!(", {}", p.form));
        words.push_str(match p.basis {
            KBasis::Neutral => "",
            KBasis::Monomer => ", undimerised form",
            KBasis::SolubilityRatio => ", a ratio of two solubilities",
        });
        if p.weak {
            words.push_str(", weak");
        }
        if !p.note.is_empty() {
            words.push_str(&format!(". {}", capital(&p.note)));
        }
        let source = cite(&p.source);
        PublishedRow { words, text: NumberText { value: p.k.to_string(), spread, source: source.clone() }, source }
    });
    published.chain(estimate).collect()
}

/// A number with two digits, as it would be typed.
fn digits(value: f64) -> String {
    format!("{value:.1e}").parse::<f64>().unwrap_or(value).to_string()
}

#[cfg(test)]
mod tests {
    use super::*;
    use unstir_core::library::solvents::solvents;

    #[test]
    fn every_row_has_cautions_codes_and_facts() {
        let rows: Vec<SolventRow> = solvents().iter().map(|s| solvent_row(s, Some(1.2))).collect();
        assert_eq!(rows.len(), 22);
        for r in &rows {
            assert!(!r.cautions.is_empty() && !r.codes.is_empty(), "{}", r.name);
            for what in ["against this liquor", "against water", "boils at", "flash point", "explosive", "peroxides"] {
                assert!(r.facts.iter().any(|f| f.what == what && !f.source.is_empty()), "{} {what}", r.name);
            }
            assert!(r.codes.iter().all(|c| !c.1.is_empty()));
        }
    }

    #[test]
    fn published_values_are_offered_by_name() {
        let rows = published_rows("alkaloid (caffeine constants)", "dichloromethane");
        assert_eq!(rows[0].text.value, "9.5");
        assert_eq!(rows[0].text.spread, "4.6 to 10.2");
        assert!(rows[0].text.quantity("K").is_ok());
        // Estimated for dichloromethane: log K 0.628 (by hand from the coefficients), so 4.2.
        let last = rows.last().unwrap();
        assert_eq!(last.text.value, "4.2");
        assert!(last.words.contains("estimated") && last.text.quantity("K").is_ok());
        assert!(published_rows("nothing known", "dichloromethane").is_empty());
    }

    #[test]
    fn each_step_has_its_cautions() {
        use CautionStep::{Isolate, MakeUp, Portions, Strip};
        for step in [Portions, Isolate, Strip, MakeUp] {
            assert!(!cautions_at(&[step], "dichloromethane").is_empty());
        }
    }
}
