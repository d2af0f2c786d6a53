//! Every ingredient in every stream, and what the uncertainty is made of.

use super::format::{fixed, percent, significant};
use unstir_core::plan::Plan;

/// Streams that hold anything, by index.
fn streams(plan: &Plan) -> Vec<usize> {
    let b = &plan.balance;
    (0..b.streams.len()).filter(|&s| s == 0 || b.rows.iter().any(|r| r.mg.get(s).is_some_and(|&v| v != 0.0))).collect()
}

/// Head of the balance: the streams, in mg.
pub fn balance_head(plan: &Plan) -> Vec<String> {
    let b = &plan.balance;
    let mut head = vec!["ingredient".to_owned()];
    head.extend(streams(plan).into_iter().map(|s| {
        let sign = if s < b.inputs { "in" } else { "out" };
        format!("{} mg ({sign})", b.streams[s])
    }));
    head.push("does not close by".to_owned());
    head
}

/// Ingredients by streams, with what does not close, relative.
pub fn balance_rows(plan: &Plan) -> Vec<Vec<String>> {
    let shown = streams(plan);
    plan.balance
        .rows
        .iter()
        .map(|r| {
            let mut row = vec![r.ingredient.clone()];
            row.extend(shown.iter().map(|&s| significant(r.mg.get(s).copied().unwrap_or(0.0), 4)));
            row.push(significant(r.residual, 2));
            row
        })
        .collect()
}

/// Head of the contributions.
pub fn contributions_head() -> Vec<String> {
    ["input", "standard uncertainty", "share of the doubt about the planned removal"].map(str::to_owned).to_vec()
}

/// What the uncertainty of the planned removal is made of.
pub fn contributions_rows(plan: &Plan) -> Vec<Vec<String>> {
    plan.contributions
        .iter()
        .map(|c| vec![c.what.clone(), significant(c.standard_uncertainty, 2), percent(c.share_of_variance)])
        .collect()
}

/// One line on the balance.
pub fn balance_line(plan: &Plan) -> String {
    let worst = plan.balance.worst_residual;
    if worst < 1e-9 {
        "everything that came in is accounted for".to_owned()
    } else {
        format!("up to {} of an ingredient is not accounted for", percent(worst))
    }
}

/// A volume or level of the column, in words.
pub fn level_words(volume_ml: f64, brix: Option<f64>) -> String {
    let mut words = format!("{} mL", significant(volume_ml, 3));
    if let Some(b) = brix {
        words.push_str(&format!(" · {} °Bx", fixed(b, 0)));
    }
    words
}

#[cfg(test)]
mod tests {
    use super::super::testing::good;
    use super::*;

    #[test]
    fn every_demo_closes() {
        for demo in 0..3 {
            let plan = good(demo).plan;
            let (head, rows) = (balance_head(&plan), balance_rows(&plan));
            assert!(rows.iter().all(|r| r.len() == head.len()));
            assert!(balance_line(&plan).contains("accounted for"));
            assert!(plan.balance.worst_residual < 1e-9);
            assert!(contributions_rows(&plan).iter().all(|r| r.len() == 3));
        }
    }
}
