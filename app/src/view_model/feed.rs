//! The liquor after concentrating, in words and working.

use super::format::{fixed, ph_words, significant, stated};
use unstir_core::plan::Plan;
use unstir_core::process::acidity::PhFrom;
use unstir_core::process::concentrate::{Liquor, density_g_per_ml};
use unstir_core::study::{ConcentrateTo, Study};

/// The feed in one line.
pub fn feed_line(study: &Study, plan: &Plan) -> String {
    let f = &study.feed;
    let ph = match plan.acidity.feed_ph_from {
        PhFrom::Composition => format!("pH {} by composition", ph_words(plan.acidity.feed_ph)),
        _ => format!("pH {}", ph_words(plan.acidity.feed_ph)),
    };
    let mut parts = vec![format!("{} mL", stated(f.volume_ml.value)), ph];
    if let Some(b) = &f.soluble_solids_brix {
        parts.push(format!("{} °Bx", b.value));
    }
    parts.push(format!("{} °C", f.temperature_c.value));
    parts.join(" · ")
}

/// The liquor in one line.
pub fn liquor_line(plan: &Plan) -> String {
    let l = &plan.liquor;
    let mut parts = vec![format!("{} mL", stated(l.volume_ml))];
    if let Some(b) = l.brix {
        parts.push(format!("{} °Bx", fixed(b, 1)));
    }
    if l.water_removed_g > 0.0 {
        parts.push(format!("{} g of water taken off", significant(l.water_removed_g, 4)));
        parts.push(format!("{} times as concentrated", significant(l.factor, 3)));
    }
    let from = match plan.acidity.liquor_ph_from {
        PhFrom::Measured => "",
        PhFrom::Composition => " by composition",
        PhFrom::Feed => ", the feed's",
    };
    parts.push(format!("extracted at pH {}{from}", ph_words(plan.extraction_ph)));
    parts.join(" · ")
}

/// How the pH was come by, with the values put in.
pub fn acidity_working(study: &Study, plan: &Plan) -> Vec<String> {
    let a = &plan.acidity;
    let mut lines = vec![match a.feed_ph_from {
        PhFrom::Composition => {
            format!("pH of the feed {}: where Σ z·c = 0 over everything listed", fixed(a.feed_ph, 2))
        }
        _ => format!("pH of the feed {}: measured", ph_words(a.feed_ph)),
    }];
    if let Some(s) = a.strong_ions_mmol_per_l {
        lines.push(format!(
            "at that pH the listed ingredients leave a charge of {} mmol/L to balance: {}",
            significant(s.abs(), 3),
            a.strong_ions_words
        ));
    }
    if let Some(ph) = a.predicted_liquor_ph {
        let times = if study.concentrate.to == ConcentrateTo::Unchanged {
            String::new()
        } else {
            format!(" with everything × {}, carbon dioxide gone", significant(plan.liquor.factor, 3))
        };
        lines.push(format!("pH of the liquor {} by charge balance{times}", fixed(ph, 2)));
    }
    if let (Some(i), Some(beta)) = (a.ionic_strength_mol_per_l, a.buffer_capacity_mmol_per_l) {
        lines.push(format!(
            "ionic strength {} mol/L; buffer capacity {} mmol/L per unit of pH",
            significant(i, 2),
            significant(beta, 3)
        ));
    }
    lines
}

/// How the liquor was computed, with the values put in.
pub fn liquor_working(study: &Study, l: &Liquor) -> Vec<String> {
    if study.concentrate.to == ConcentrateTo::Unchanged {
        return vec!["No water is taken off: the liquor is the feed.".to_owned()];
    }
    let v0 = study.feed.volume_ml.value;
    let (Some(b0), Some(b1)) = (l.feed_brix, l.brix) else {
        return vec![
            "Without soluble solids the liquor counts as water: V₁ = V₀ − water/0.9982".to_owned(),
            format!(
                "{} mL = {} mL − {} g/(0.9982 g/mL)",
                stated(l.volume_ml),
                stated(v0),
                significant(l.water_removed_g, 4)
            ),
        ];
    };
    let (rho0, rho1) = (density_g_per_ml(b0), density_g_per_ml(b1));
    vec![
        format!("density of the feed at {} °Bx: {} g/mL", fixed(b0, 1), fixed(rho0, 4)),
        format!("density of the liquor at {} °Bx: {} g/mL", fixed(b1, 1), fixed(rho1, 4)),
        format!(
            "solids are conserved: {} mL × {} g/mL × {} % = {} mL × {} g/mL × {} % = {} g",
            stated(v0),
            fixed(rho0, 4),
            fixed(b0, 1),
            stated(l.volume_ml),
            fixed(rho1, 4),
            fixed(b1, 1),
            significant(v0 * rho0 * b0 / 100.0, 4)
        ),
        format!("water taken off: {} g", significant(l.water_removed_g, 4)),
    ]
}

#[cfg(test)]
mod tests {
    use super::super::testing::good;
    use super::*;

    #[test]
    fn the_liquor_of_the_first_demo() {
        let g = good(0);
        assert!(
            feed_line(&g.study, &g.plan).starts_with("500 mL · pH 3.4 · 11 °Bx"),
            "{}",
            feed_line(&g.study, &g.plan)
        );
        let line = liquor_line(&g.plan);
        assert!(line.contains("100 mL") && line.contains("5.00 times"), "{line}");
        assert!(line.contains("by composition"), "{line}");
        assert_eq!(acidity_working(&g.study, &g.plan).len(), 4);
        assert_eq!(liquor_working(&g.study, &g.plan.liquor).len(), 4);
    }
}
