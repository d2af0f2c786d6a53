//! Protonation states, readings of a disputed constant, and their charts.

use super::format::{fixed, measured_percent, percent, ph_words, significant, stated};
use crate::charts::{LogDData, SpeciesData};
use unstir_core::plan::{Curves, IngredientRow, Plan};
use unstir_core::study::Study;

/// Head of the table of ingredients.
pub fn states_head() -> Vec<String> {
    ["ingredient", "constants in use", "neutral", "charge states", "D at this pH"].map(str::to_owned).to_vec()
}

/// Each ingredient: constants, fraction neutral, states, D.
pub fn states_rows(plan: &Plan) -> Vec<Vec<String>> {
    plan.ingredients
        .iter()
        .map(|i| {
            let constants: Vec<String> = i.pka.iter().map(|(v, kind)| format!("{} {kind}", fixed(*v, 2))).collect();
            let constants = if constants.is_empty() { "not ionised".to_owned() } else { constants.join("; ") };
            let name = if i.is_target { format!("{} (target)", i.name) } else { i.name.clone() };
            let neutral = format!("{}{}", percent(i.fraction_neutral), if i.zwitterion { ", zwitterion" } else { "" });
            vec![name, constants, neutral, states(i), significant(i.d, 3)]
        })
        .collect()
}

fn states(i: &IngredientRow) -> String {
    if i.states.len() < 2 {
        return "0: 100 %".to_owned();
    }
    i.states.iter().map(|s| format!("{}: {}", charge(s.charge), percent(s.fraction))).collect::<Vec<_>>().join(" · ")
}

/// A charge as chemists write it.
pub fn charge(z: i32) -> String {
    match z {
        0 => "0".to_owned(),
        1 => "+".to_owned(),
        -1 => "−".to_owned(),
        z if z > 0 => format!("{z}+"),
        z => format!("{}−", -z),
    }
}

/// How D of the target was computed, with the values put in.
pub fn d_working(plan: &Plan) -> Vec<String> {
    let Some(t) = plan.ingredients.iter().find(|i| i.is_target) else { return Vec::new() };
    let ph = ph_words(plan.extraction_ph);
    let mut lines: Vec<String> = t
        .pka
        .iter()
        .map(|(pka, kind)| {
            let ratio = significant(10f64.powf(plan.extraction_ph - pka), 3);
            format!(
                "{kind}, pKa {}: deprotonated/protonated = 10^(pH − pKa) = 10^({ph} − {}) = {ratio}",
                fixed(*pka, 2),
                fixed(*pka, 2)
            )
        })
        .collect();
    lines.push(format!("fraction with net charge 0 at pH {ph}: f = {}", significant(t.fraction_neutral, 4)));
    lines.push(format!(
        "D = K·f + K(ion pair)·(1 − f) = {}·{} + {}·{} = {}",
        significant(t.k_neutral, 4),
        significant(t.fraction_neutral, 4),
        significant(t.k_ion_pair, 3),
        significant(1.0 - t.fraction_neutral, 3),
        significant(t.d, 4)
    ));
    lines
}

/// Head of the table of readings.
pub fn readings_head() -> Vec<String> {
    ["printed", "taken as", "so pKa", "neutral", "D", "planned removal", "95 % interval", "verdict", "source"]
        .map(str::to_owned)
        .to_vec()
}

/// Each reading and what it would mean.
pub fn readings_rows(plan: &Plan) -> Vec<Vec<String>> {
    let Some(report) = &plan.readings else { return Vec::new() };
    report
        .rows
        .iter()
        .map(|r| {
            let mut taken = r.meant_as.to_owned();
            if !r.stated {
                taken.push_str(" (source does not say)");
            }
            let planned = measured_percent(&r.planned_removal);
            if r.in_use {
                taken.push_str(", in use");
            }
            vec![
                stated(r.printed),
                taken,
                fixed(r.pka, 2),
                percent(r.fraction_neutral),
                significant(r.d, 3),
                planned.value,
                planned.interval,
                r.verdict.words().to_owned(),
                r.source.clone(),
            ]
        })
        .collect()
}

/// Protonation states of the target against pH.
pub fn species_data(plan: &Plan, curves: &Curves) -> Option<SpeciesData> {
    let target = plan.ingredients.iter().find(|i| i.is_target)?;
    if curves.states.len() < 2 {
        return None;
    }
    let ph = ph_words(plan.extraction_ph);
    let title = format!("{} of the {} is neutral at pH {ph}", capital(&percent(target.fraction_neutral)), target.name);
    let series: Vec<(String, Vec<f64>)> =
        curves.states.iter().map(|s| (format!("charge {}", charge(s.charge)), s.fraction.clone())).collect();
    let at: Vec<String> =
        target.states.iter().map(|s| format!("charge {} {}", charge(s.charge), percent(s.fraction))).collect();
    let alt = format!(
        "Fraction of each protonation state of {} against pH 0 to 14. At the liquor's pH {ph}: {}.",
        target.name,
        at.join(", ")
    );
    Some(SpeciesData { title, alt, ph: curves.ph.clone(), series, own_ph: plan.extraction_ph })
}

/// log D of the target against pH by each reading, and the log D the goal needs.
pub fn log_d_data(study: &Study, plan: &Plan, curves: &Curves) -> Option<LogDData> {
    let target = plan.ingredients.iter().find(|i| i.is_target)?;
    let ph = ph_words(plan.extraction_ph);
    let needed = needed_d(study, plan).map(f64::log10);
    let series: Vec<(String, bool, Vec<f64>)> =
        curves.log_d.iter().map(|c| (c.label.clone(), c.in_use, c.log_d.clone())).collect();
    let title = match (&plan.readings, needed) {
        (Some(r), _) if r.decision_changes => {
            format!("Which reading is right decides what enters the solvent at pH {ph}")
        }
        (Some(_), _) => format!("At pH {ph} every reading leads to the same decision"),
        (None, Some(n)) if target.d > 0.0 && target.d.log10() >= n => {
            format!("D is large enough for the goal at pH {ph}")
        }
        (None, Some(_)) => format!("D is too small for the goal at pH {ph}"),
        (None, None) => "No D reaches the goal with this scheme".to_owned(),
    };
    let alt = format!(
        "log D of {} against pH 0 to 14, {} curve{}. At the liquor's pH {ph} log D is {}{}.",
        target.name,
        series.len(),
        if series.len() == 1 { "" } else { "s" },
        if target.d > 0.0 { fixed(target.d.log10(), 2) } else { "without bound below".to_owned() },
        needed.map(|n| format!("; the goal needs {}", fixed(n, 2))).unwrap_or_default()
    );
    Some(LogDData { title, alt, ph: curves.ph.clone(), series, own_ph: plan.extraction_ph, needed_log_d: needed })
}

/// D with which the portions as they are would just reach the goal; clean solvent, clean draining.
fn needed_d(study: &Study, plan: &Plan) -> Option<f64> {
    use unstir_core::process::portions::solve_rising;
    let goal = plan.goal_fraction;
    let volume = plan.liquor.volume_ml;
    let removal = |d: f64| {
        let left: f64 =
            plan.stages.iter().map(|s| 1.0 - s.efficiency * d * s.solvent_ml / (volume + d * s.solvent_ml)).product();
        1.0 - left
    };
    // Only a series of fresh portions is this product.
    matches!(study.extraction.scheme, unstir_core::study::Scheme::CrossCurrent { .. })
        .then(|| solve_rising(1e-6, 1e9, goal, &removal))
        .flatten()
}

fn capital(text: &str) -> String {
    let mut c = text.chars();
    c.next().map(|first| first.to_uppercase().chain(c).collect()).unwrap_or_default()
}

#[cfg(test)]
mod tests {
    use super::super::testing::{curves_of, good};
    use super::*;

    #[test]
    fn the_readings_of_the_first_demo() {
        let g = good(0);
        let rows = readings_rows(&g.plan);
        assert_eq!(rows.len(), 4);
        assert!(rows.iter().all(|r| r.len() == readings_head().len()));
        assert!(rows[0][1].contains("in use"));
        assert!(rows[2][2].starts_with("3.7"), "a pKb of 10.4 at 20 °C: pKw − 10.4, not {}", rows[2][2]);
    }

    #[test]
    fn working_holds_the_values_put_in() {
        let lines = d_working(&good(0).plan);
        assert!(lines.last().is_some_and(|l| l.contains("D = K·f")), "{lines:?}");
    }

    #[test]
    fn charts_say_one_thing() {
        for i in 0..3 {
            let g = good(i);
            let c = curves_of(&g);
            let d = log_d_data(&g.study, &g.plan, &c).unwrap();
            assert!(d.series.iter().any(|s| s.1) && !d.alt.is_empty());
            let s = species_data(&g.plan, &c).unwrap();
            assert!(s.series.len() >= 2 && s.series[0].1.len() == s.ph.len());
        }
    }
}
