//! The liquid, level by level.

use super::balance::level_words;
use crate::parts::ColumnLevel;
use unstir_core::plan::Plan;

/// The levels of the column.
pub fn levels(plan: &Plan) -> Vec<ColumnLevel> {
    let start = plan.levels.first().map_or(0.0, |l| l.target_mg);
    plan.levels
        .iter()
        .map(|l| ColumnLevel {
            step: l.step.clone(),
            anchor: anchor(&l.step).to_owned(),
            volume_ml: l.volume_ml,
            target_share: if start > 0.0 { (l.target_mg / start).clamp(0.0, 1.0) } else { 0.0 },
            brix: l.brix,
            solvent_ml: l.solvent_ml,
            leaves: l.leaves.clone(),
            label: level_words(l.volume_ml, l.brix),
        })
        .collect()
}

fn anchor(step: &str) -> &'static str {
    match step {
        "feed" => "feed",
        "liquor" => "concentrate",
        "raffinate" | "made up" => "make-up",
        _ => "portions",
    }
}

#[cfg(test)]
mod tests {
    use super::super::testing::good;
    use super::*;

    #[test]
    fn the_column_of_the_first_demo() {
        let l = levels(&good(0).plan);
        assert_eq!(l.len(), 8);
        assert_eq!(
            (l[0].anchor.as_str(), l[1].anchor.as_str(), l[2].anchor.as_str()),
            ("feed", "concentrate", "portions")
        );
        assert!(l.iter().all(|x| (0.0..=1.0).contains(&x.target_share)));
        assert!(l[1].label.contains("°Bx"));
    }
}
