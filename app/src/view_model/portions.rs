//! Stage by stage, and the questions asked the other way round.

use super::format::{fixed, percent, significant, stated};
use crate::charts::RemovalData;
use crate::state::work::Good;
use unstir_core::plan::Plan;
use unstir_core::process::portions::StageRow;
use unstir_core::study::Scheme;

/// Head of the stage table.
pub fn stages_head(good: &Good) -> Vec<String> {
    let target = &good.study.feed.target;
    vec![
        stage_word(&good.study.extraction.scheme).to_owned(),
        "solvent mL".into(),
        "E".into(),
        "liquor after mL".into(),
        "extract mL".into(),
        format!("{target} in extract mg"),
        format!("{target} left mg"),
        "removed so far".into(),
    ]
}

fn stage_word(scheme: &Scheme) -> &'static str {
    match scheme {
        Scheme::CrossCurrent { .. } => "portion",
        Scheme::CounterCurrent { .. } => "stage",
        Scheme::Continuous { .. } => "part",
    }
}

/// Each stage, for the target.
pub fn stages_rows(good: &Good) -> Vec<Vec<String>> {
    let i = target_index(good);
    let at = |v: &[f64]| v.get(i).copied().unwrap_or(f64::NAN);
    good.plan
        .stages
        .iter()
        .map(|s| {
            vec![
                s.stage.to_string(),
                fixed(s.solvent_ml, 1),
                stated(s.efficiency),
                fixed(s.liquor_ml, 1),
                fixed(s.extract_ml, 1),
                significant(at(&s.extract_mg), 3),
                significant(at(&s.raffinate_mg), 3),
                percent(at(&s.removed_fraction)),
            ]
        })
        .collect()
}

fn target_index(good: &Good) -> usize {
    let feed = &good.study.feed;
    feed.ingredients.iter().position(|i| i.name == feed.target).unwrap_or_default()
}

/// Removal against stages, for every ingredient.
pub fn removal_data(good: &Good) -> RemovalData {
    let plan = &good.plan;
    let series: Vec<(String, bool, Vec<f64>)> = good
        .study
        .feed
        .ingredients
        .iter()
        .enumerate()
        .map(|(i, g)| {
            let removed = |s: &StageRow| s.removed_fraction.get(i).copied().unwrap_or(0.0);
            (g.name.clone(), g.name == good.study.feed.target, plan.stages.iter().map(removed).collect())
        })
        .collect();
    let word = stage_word(&good.study.extraction.scheme);
    let target = &good.study.feed.target;
    let last = plan.headline.removal_fraction.value;
    let goal = plan.goal_fraction;
    let removed: &[f64] = series.iter().find(|s| s.1).map_or(&[], |s| &s.2);
    let reached = removed.iter().position(|&r| r >= goal);
    let title = match reached {
        Some(i) => format!("{target} passes the goal of {} at {word} {}", percent(goal), i + 1),
        None => format!("{target} stops at {}, short of the goal of {}", percent(last), percent(goal)),
    };
    let found = plan.headline.removal_fraction_found.as_ref().map(|f| f.value);
    let alt = format!(
        "Fraction removed after each {word}. {target}: {}. Goal {}{}.",
        removed.iter().map(|&r| percent(r)).collect::<Vec<_>>().join(", "),
        percent(goal),
        found.map(|f| format!("; found by the isolate {}", percent(f))).unwrap_or_default()
    );
    RemovalData { title, alt, series, goal, found }
}

/// The questions asked the other way round, answered in sentences.
pub fn inverse_sentences(plan: &Plan) -> Vec<String> {
    let inv = &plan.inverse;
    let goal = percent(plan.goal_fraction);
    let mut list = Vec::new();
    list.push(match inv.portions_needed {
        Some(n) => format!(
            "With portions of {} mL it takes {n} {} to reach {goal}.",
            significant(inv.portion_ml, 3),
            if n == 1 { "portion" } else { "portions" }
        ),
        None => format!("No practical number of portions of {} mL reaches {goal}.", significant(inv.portion_ml, 3)),
    });
    list.push(match inv.total_in_equal_portions_ml {
        Some(v) => format!("In the present number of equal portions it takes {} mL in all.", significant(v, 3)),
        None => "In the present number of equal portions no volume reaches it at this stage efficiency.".to_owned(),
    });
    list.push(match inv.single_portion_ml {
        Some(v) => format!("As one single portion it would take {} mL.", significant(v, 3)),
        None => "No single portion reaches it at this stage efficiency.".to_owned(),
    });
    list.push(match inv.counter_current_stages {
        Some(n) => {
            format!("Counter-current with the same solvent, it takes {} ideal stages.", significant(n.max(0.0), 2))
        }
        None => "Counter-current with the same solvent, no number of ideal stages reaches it.".to_owned(),
    });
    if let Some(ph) = inv.ph_needed {
        let dose = inv.ph_dose.as_ref().map(|d| {
            let what = if d.base_mmol >= 0.0 { "strong base" } else { "strong acid" };
            format!(
                " Getting there takes about {} mmol of {what}, which leaves {} mg of {} behind, against the rule that nothing stays.",
                significant(d.base_mmol.abs(), 2),
                significant(d.left_behind_mg, 2),
                d.left_behind
            )
        });
        list.push(format!("This scheme would reach it at pH {}.{}", fixed(ph, 1), dose.unwrap_or_default()));
    }
    list
}

/// How the removal of the first stage and of all was computed, with the values put in.
pub fn removal_working(good: &Good) -> Vec<String> {
    let i = target_index(good);
    let Some(t) = good.plan.ingredients.iter().find(|r| r.is_target) else { return Vec::new() };
    let (d, stages) = (t.d, &good.plan.stages);
    let v_a = good.plan.liquor.volume_ml;
    let removed = |s: &StageRow| percent(s.removed_fraction.get(i).copied().unwrap_or(f64::NAN));
    match &good.study.extraction.scheme {
        Scheme::CrossCurrent { .. } => {
            let mut lines =
                vec!["at equilibrium n* = N·V_liquor/(V_liquor + D·V_solvent) stays; n' = n − E·(n − n*)".to_owned()];
            lines.extend(stages.iter().take(12).map(|s| {
                format!(
                    "portion {}: D = {}, V_solvent = {} mL, V_liquor about {} mL, E = {}: removed so far {}",
                    s.stage,
                    significant(d, 4),
                    fixed(s.solvent_ml, 1),
                    fixed(s.liquor_ml, 1),
                    significant(s.efficiency, 3),
                    removed(s)
                )
            }));
            lines
        }
        Scheme::CounterCurrent { stages: n, solvent_ml } => vec![
            "at E = 1 what is left is (e − 1)/(e^(n+1) − 1), e = D·S/V_liquor".to_owned(),
            format!(
                "e = {}·{} mL/{} mL = {}, n = {n}: removed {}",
                significant(d, 4),
                significant(solvent_ml.value, 4),
                significant(v_a, 4),
                significant(d * solvent_ml.value / v_a, 4),
                stages.last().map(removed).unwrap_or_default()
            ),
        ],
        Scheme::Continuous { solvent_ml } => vec![
            "what is left is exp(−E·D·V/V_liquor), clean solvent".to_owned(),
            format!(
                "E·D·V/V_liquor = {}·{}·{} mL/{} mL: removed {}",
                significant(good.study.extraction.stage_efficiency.value, 3),
                significant(d, 4),
                significant(solvent_ml.value, 4),
                significant(v_a, 4),
                stages.last().map(removed).unwrap_or_default()
            ),
        ],
    }
}

#[cfg(test)]
mod tests {
    use super::super::testing::good;
    use super::*;

    #[test]
    fn stages_of_every_demo_are_in_words() {
        for demo in 0..3 {
            let g = good(demo);
            let (head, rows) = (stages_head(&g), stages_rows(&g));
            assert!(rows.iter().all(|r| r.len() == head.len()));
            let data = removal_data(&g);
            assert_eq!(data.series.iter().filter(|s| s.1).count(), 1);
            assert!(data.series.iter().all(|s| s.2.len() == rows.len()));
            assert!(inverse_sentences(&g.plan).len() >= 4);
            assert!(!removal_working(&g).is_empty());
        }
    }

    #[test]
    fn the_charged_base_is_told_which_ph_it_needs() {
        let words = inverse_sentences(&good(1).plan).join(" ");
        assert!(words.contains("would reach it at pH") && words.contains("behind"), "{words}");
    }
}
