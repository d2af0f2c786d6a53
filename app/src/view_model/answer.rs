//! The answer: its figures, and where a notice or problem belongs.

use super::format::{measured, measured_percent, significant};
use unstir_core::plan::Plan;

/// One of the figures under the answer.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Figure {
    /// What it is.
    pub label: String,
    /// Value with unit.
    pub value: String,
    /// Interval with unit; empty where there is none.
    pub interval: String,
    /// What else there is to know; often empty.
    pub note: String,
}

/// The four figures of the answer.
pub fn figures(plan: &Plan) -> [Figure; 4] {
    let h = &plan.headline;
    let planned = measured_percent(&h.removal_fraction);
    let goal = super::format::percent(plan.goal_fraction);
    let removed = match &h.removal_fraction_found {
        Some(found) => {
            let m = measured_percent(found);
            Figure {
                label: "removed, by the isolate".into(),
                value: m.value,
                interval: m.interval,
                note: format!("planned {}; goal {goal}", planned.line()),
            }
        }
        None => Figure {
            label: "removed, planned".into(),
            value: planned.value,
            interval: planned.interval,
            note: format!("goal {goal}"),
        },
    };
    let solvent = measured(&h.solvent_total_ml);
    let make_up = measured(&h.make_up_volume_ml);
    let company = plan.ingredients.iter().filter(|i| !i.is_target && i.feed_mg > 0.0);
    let weakest = company.min_by(|a, b| a.strength_after_make_up.total_cmp(&b.strength_after_make_up));
    [
        removed,
        Figure {
            label: "solvent in all".into(),
            value: solvent.value,
            interval: solvent.interval,
            note: String::new(),
        },
        Figure {
            label: "make up to".into(),
            value: make_up.value,
            interval: make_up.interval,
            note: weakest
                .map(|w| {
                    let strength = super::format::percent(w.strength_after_make_up);
                    format!("company kept: {} at {strength} of its strength", w.name)
                })
                .unwrap_or_default(),
        },
        Figure {
            label: "balance closes to".into(),
            value: significant(h.balance_residual.value, 2),
            interval: String::new(),
            note: "largest of any ingredient, relative".into(),
        },
    ]
}

/// The step of the flow, as the id of its section and its name, that a path of the file belongs to.
pub fn step_of(path: &str) -> (&'static str, &'static str) {
    let starts = |p: &str| path.starts_with(p);
    if path.contains(".sites") || path.contains(".disputed") {
        ("ionisation", "Ionisation")
    } else if starts("feed") || starts("concentrate") || starts("goal") {
        ("feed", "Feed")
    } else if starts("solvent") || starts("partition") || starts("room") {
        ("solvent", "Solvent")
    } else if starts("extraction") || starts("stages") {
        ("portions", "Portions")
    } else if starts("isolate") {
        ("isolate", "Isolate")
    } else if starts("strip") {
        ("strip", "Strip")
    } else if starts("losses") || starts("make_up") {
        ("make-up", "Make-up")
    } else if starts("ingredients") {
        ("ionisation", "Ionisation")
    } else {
        ("balance", "Balance")
    }
}

#[cfg(test)]
mod tests {
    use super::super::testing::good;
    use super::*;

    #[test]
    fn four_figures_of_the_first_demo() {
        let f = figures(&good(0).plan);
        assert!(f[0].label.contains("isolate") && f[0].value.ends_with('%') && !f[0].interval.is_empty());
        assert!(f[1].value.starts_with("75"), "{f:?}");
        assert!(f[2].value.starts_with("480"), "{f:?}");
    }

    #[test]
    fn every_path_has_a_step() {
        for (path, step) in [
            ("feed.ingredients[0].sites[1].pka", "ionisation"),
            ("feed.ph", "feed"),
            ("partition[2].k_neutral", "solvent"),
            ("losses[0].what", "make-up"),
            ("headline.removal_fraction", "balance"),
        ] {
            assert_eq!(step_of(path).0, step);
        }
    }
}
