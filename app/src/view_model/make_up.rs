//! The ledger of losses, the volume that restores strength, and the company afterwards.

use super::format::{fixed, percent, significant, stated};
use unstir_core::plan::Plan;
use unstir_core::study::Study;

/// What giving back the carbon dioxide takes, in sentences; none if the feed states none.
pub fn carbonate_sentences(plan: &Plan) -> Vec<String> {
    let Some(r) = &plan.recarbonation else { return Vec::new() };
    let bar = |kpa: f64| fixed(kpa / 100.0, 1);
    vec![
        format!(
            "Carbon dioxide: {} g/L, {} volumes, as the feed had; {} g for the made-up liquid, if all of it left with the water.",
            significant(r.g_per_l, 2),
            significant(r.volumes, 2),
            significant(r.co2_g, 2)
        ),
        format!(
            "It stays dissolved at {} °C under {} bar of gauge pressure, carbon dioxide only; warmed to 25 °C a full vessel holds {} bar. Vessel, closure and regulator must be rated for more than that.",
            r.temperature_c,
            bar(r.gauge_kpa),
            bar(r.gauge_at_25c_kpa)
        ),
    ]
}

/// Head of the ledger.
pub fn ledger_head() -> Vec<String> {
    ["loss", "from", "mL", "of what was there", "as feed mL"].map(str::to_owned).to_vec()
}

/// The losses, in flow order.
pub fn ledger_rows(plan: &Plan) -> Vec<Vec<String>> {
    let rows = plan.make_up.losses.iter();
    rows.map(|l| {
        vec![
            l.what.clone(),
            l.at.to_owned(),
            fixed(l.volume_ml, 1),
            percent(l.fraction),
            fixed(l.feed_equivalent_ml, 1),
        ]
    })
    .collect()
}

/// Head of the strengths.
pub fn strength_head() -> Vec<String> {
    ["ingredient", "taken out by the solvent", "strength after make-up"].map(str::to_owned).to_vec()
}

/// Strength of each ingredient after make-up, relative to the feed.
pub fn strength_rows(plan: &Plan) -> Vec<Vec<String>> {
    plan.ingredients
        .iter()
        .filter(|i| i.feed_mg > 0.0)
        .map(|i| {
            let name = if i.is_target { format!("{} (target)", i.name) } else { i.name.clone() };
            vec![name, percent(i.removed_fraction), percent(i.strength_after_make_up)]
        })
        .collect()
}

/// How the volume was computed, with the values put in.
pub fn volume_working(study: &Study, plan: &Plan) -> Vec<String> {
    let v0 = study.feed.volume_ml.value;
    let factors: Vec<String> =
        plan.make_up.losses.iter().map(|l| format!("(1 − {})", significant(l.fraction, 3))).collect();
    let product = if factors.is_empty() { "1".to_owned() } else { factors.join("·") };
    let mut lines = vec![
        "V = V_feed·Π(1 − fᵢ): what is left of everything that was not to be removed, at its own strength".to_owned(),
        format!("{} mL·{product} = {} mL", stated(v0), significant(plan.make_up.volume_ml, 4)),
    ];
    if let Some(done) = &plan.make_up.made_up {
        lines.push(format!(
            "strength at {} mL = {} mL/{} mL = {}",
            stated(done.volume_ml),
            significant(plan.make_up.volume_ml, 4),
            stated(done.volume_ml),
            percent(done.strength)
        ));
    }
    lines
}

#[cfg(test)]
mod tests {
    use super::super::testing::good;
    use super::*;

    #[test]
    fn the_ledger_of_the_first_demo() {
        let g = good(0);
        let rows = ledger_rows(&g.plan);
        assert_eq!(rows.len(), 1);
        assert_eq!(rows[0][3], "4.0 %");
        assert!(volume_working(&g.study, &g.plan)[1].contains("480.0 mL"));
        assert!(strength_rows(&g.plan).iter().any(|r| r[0].contains("target")));
    }
}
