//! Stripping: what it takes, how far it has come, and the residues to reach.

use super::format::{fixed, measured, percent, significant};
use crate::state::work::Good;
use unstir_core::library::residual::limits_for;
use unstir_core::plan::Plan;
use unstir_core::process::strip_plan::StripPlan;
use unstir_core::study::Study;

/// Stripping in one line; empty for a solvent the library does not hold.
pub fn strip_line(plan: &Plan) -> String {
    let Some(s) = &plan.strip else { return String::new() };
    match (&s.fit, s.start_mg_per_l) {
        (Some(f), _) => {
            format!("a tenth every {} min by {} readings", significant(f.minutes_per_decade, 2), f.readings)
        }
        (None, Some(c)) => format!("up to {} mg/L to begin with", significant(c, 2)),
        (None, None) => "how much is dissolved to begin with is not known".to_owned(),
    }
}

/// What stripping takes, in sentences.
pub fn strip_sentences(g: &Good) -> Vec<String> {
    let Some(s) = &g.plan.strip else { return Vec::new() };
    let name = &g.study.solvent.name;
    let mut list = Vec::new();
    list.push(match s.start_mg_per_l {
        Some(c) => format!(
            "Saturated, the raffinate holds about {} mg/L of {name} dissolved (25 °C; sugar lowers it further), besides what was left behind on draining.",
            significant(c, 2)
        ),
        None => format!("How much {name} water takes up is not held: measure it."),
    });
    list.push(match s.boils_at_c {
        Some(t) => format!(
            "At {} kPa water boils at {} °C; dissolved solids raise that a little.",
            significant(s.pressure_kpa, 3),
            fixed(t, 0)
        ),
        None => format!("At {} kPa water does not boil as a liquid.", significant(s.pressure_kpa, 3)),
    });
    if let (Some(alpha), Some(water)) = (s.relative_volatility, s.water_per_decade) {
        list.push(format!(
            "From dilute solution {name} is about {} times as volatile as water: at equilibrium {} of the water, and the aroma as volatile as it, goes for each tenfold fall. That is a floor; practice takes more.",
            significant(alpha, 2),
            percent(water)
        ));
    }
    if let Some(f) = &s.fit {
        list.push(format!(
            "By the readings it falls to a tenth every {} min (rate {} per min), from {} mg/L.",
            significant(f.minutes_per_decade, 2),
            measured(&f.rate).line(),
            significant(f.start_mg_per_l, 2)
        ));
    } else if !g.study.strip.readings.is_empty() {
        list.push("A rate needs three readings or more that fall.".to_owned());
    }
    if let Some(serving) = &s.serving {
        let beside = serving.daily_exposure_mg.map_or_else(String::new, |d| {
            format!(
                "; the permitted daily exposure in ICH Q3C, which is for medicines, is {} mg. This compares two numbers and says nothing about drinking it",
                significant(d, 2)
            )
        });
        list.push(format!(
            "By the last reading a serving of the made-up liquid holds {} mg{beside}.",
            significant(serving.mg, 2)
        ));
    }
    list
}

/// Head of the table of residues to reach.
pub fn limits_head() -> Vec<String> {
    ["residue to reach", "made up, mg/L", "in the raffinate, mg/L", "reached after, min", "water that goes, at least"]
        .map(str::to_owned)
        .to_vec()
}

/// The residues to reach.
pub fn limits_rows(plan: &Plan) -> Vec<Vec<String>> {
    let Some(s) = &plan.strip else { return Vec::new() };
    s.limits
        .iter()
        .map(|l| {
            vec![
                l.what.clone(),
                significant(l.limit_mg_per_l, 3),
                significant(l.raffinate_mg_per_l, 3),
                l.minutes.as_ref().map_or_else(
                    || "–".to_owned(),
                    |m| format!("{} ({}–{})", fixed(m.value, 0), fixed(m.low, 0), fixed(m.high, 0)),
                ),
                l.water_fraction.map_or_else(|| "not known".to_owned(), percent),
            ]
        })
        .collect()
}

/// What the lists say for the purpose of the study, each with its source.
pub fn list_lines(study: &Study) -> Vec<String> {
    let said = limits_for(&study.solvent.id, study.goal.purpose);
    let listed = said.listed.iter().map(|l| format!("{} {}", l.sentence(), super::solvent::cite(&l.source)));
    listed.chain(said.not_listed.iter().cloned()).collect()
}

/// How it was computed, with the values put in.
pub fn strip_working(g: &Good) -> Vec<String> {
    let Some(s) = &g.plan.strip else { return Vec::new() };
    let mut lines = Vec::new();
    if let (Some(alpha), Some(water)) = (s.relative_volatility, s.water_per_decade) {
        lines.push(format!("volatility against water α = K_H/p_w, 25 °C = {}", significant(alpha, 3)));
        lines.push(format!(
            "Rayleigh: n/n₀ = (W/W₀)^α; a tenth left takes 1 − 0.1^(1/α) = {} of the water",
            percent(water)
        ));
    }
    lines.push(format!("limit in the raffinate = limit·V_made up/V_raffinate = limit/{}", significant(s.dilution, 3)));
    lines.extend(fit_line(s));
    lines
}

fn fit_line(s: &StripPlan) -> Option<String> {
    let f = s.fit.as_ref()?;
    Some(format!(
        "ln c = ln {} − {}·t, least squares over {} readings",
        significant(f.start_mg_per_l, 3),
        significant(f.rate.value, 3),
        f.readings
    ))
}

#[cfg(test)]
mod tests {
    use super::super::testing::good;
    use super::*;

    #[test]
    fn stripping_of_the_first_demo() {
        let g = good(0);
        assert!(strip_line(&g.plan).contains("mg/L to begin with"));
        let words = strip_sentences(&g).join(" ");
        assert!(words.contains("100 °C") && words.contains("floor"), "{words}");
        let rows = limits_rows(&g.plan);
        assert!(rows.iter().all(|r| r.len() == limits_head().len()) && !rows.is_empty());
        let lists = list_lines(&g.study).join(" ");
        assert!(lists.contains("check the current law") && lists.contains("2 mg/kg for roasted coffee"), "{lists}");
    }
}
