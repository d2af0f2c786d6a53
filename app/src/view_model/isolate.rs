//! Plan and isolate side by side.

use super::format::{measured, measured_percent, percent, significant, stated};
use unstir_core::plan::Plan;
use unstir_core::study::Study;

/// What the isolate amounts to, in a line; empty while nothing has been weighed.
pub fn isolate_in_a_line(plan: &Plan) -> String {
    let Some(i) = &plan.isolate else { return String::new() };
    format!(
        "{} anhydrous, {} of what was charged",
        measured(&i.anhydrous_mg).value,
        measured_percent(&i.found_removal).value
    )
}

/// Head of the comparison.
pub fn comparison_head() -> Vec<String> {
    ["", "by the plan", "by the isolate"].map(str::to_owned).to_vec()
}

/// Plan and isolate beside each other.
pub fn comparison_rows(plan: &Plan) -> Vec<Vec<String>> {
    let Some(i) = &plan.isolate else { return Vec::new() };
    let row = |what: &str, planned: String, found: String| vec![what.to_owned(), planned, found];
    let efficiency = match &i.apparent_efficiency {
        Some(e) => measured(e).line(),
        None => "none: more than full equilibrium gives".to_owned(),
    };
    let d = i.apparent_d.map_or_else(|| "none explains it".to_owned(), |d| significant(d, 3));
    let planned_e = plan.stages.first().map_or_else(String::new, |s| stated(s.efficiency));
    vec![
        row("target charged", format!("{} mg", significant(i.charged_mg, 4)), String::new()),
        row(
            "anhydrous target taken out",
            format!("{} mg", significant(i.planned_mg, 3)),
            measured(&i.anhydrous_mg).line(),
        ),
        row("removed", measured_percent(&i.planned_removal).line(), measured_percent(&i.found_removal).line()),
        row("stage efficiency that explains it", planned_e, efficiency),
        row("or D that explains it", significant(plan.inverse.d, 3), d),
    ]
}

/// How the anhydrous target was computed, with the values put in.
pub fn anhydrous_working(study: &Study, plan: &Plan) -> Vec<String> {
    let (Some(stated), Some(i)) = (&study.isolate, &plan.isolate) else { return Vec::new() };
    let m = study.target().and_then(|t| t.molar_mass_g_per_mol.as_ref()).map(|q| q.value);
    let mut lines = Vec::new();
    if let Some(m) = m {
        lines.push(format!(
            "hydrate factor = M/(M + n·18.015) = {m}/({m} + {}·18.015) = {}",
            stated.hydrate_waters.value,
            significant(i.hydrate_factor, 4)
        ));
    }
    lines.push(format!(
        "anhydrous target = crude·(1 − solvent)·purity·factor = {} mg·(1 − {})·{}·{} = {} mg",
        stated.crude_mass_mg.value,
        stated.residual_solvent_fraction.value,
        stated.purity.value,
        significant(i.hydrate_factor, 4),
        significant(i.anhydrous_mg.value, 4)
    ));
    lines.push(format!(
        "removed = {} mg/{} mg charged = {}",
        significant(i.anhydrous_mg.value, 4),
        significant(i.charged_mg, 4),
        percent(i.found_removal.value)
    ));
    lines
}

#[cfg(test)]
mod tests {
    use super::super::testing::good;
    use super::*;

    #[test]
    fn the_isolate_of_the_first_demo() {
        let g = good(0);
        let rows = comparison_rows(&g.plan);
        assert_eq!(rows.len(), 5);
        assert!(rows[1][2].starts_with("38.7") || rows[1][2].starts_with("39"), "{rows:?}");
        assert_eq!(anhydrous_working(&g.study, &g.plan).len(), 3);
        // 47 mg, 90 % pure, monohydrate: 47·0.9·194.19/(194.19 + 18.015) = 38.71 mg of 160 mg.
        assert_eq!(isolate_in_a_line(&g.plan), "38.7 mg anhydrous, 24.2 % of what was charged");
        assert!(comparison_rows(&good(1).plan).is_empty());
    }
}
