//! Layers and settling in words, and what concentrating saves and costs.

use super::format::{fixed, significant};
use unstir_core::plan::Plan;
use unstir_core::study::Study;

/// Layers and settling in sentences; none while soluble solids or the solvent's density are not known.
pub fn settling_sentences(study: &Study, plan: &Plan) -> Vec<String> {
    let Some(s) = &plan.settling else { return Vec::new() };
    let name = &study.solvent.name;
    let mut list = vec![format!(
        "{}: liquor {} g/mL, difference {} g/mL{}.",
        match s.layer {
            "solvent below" => format!("{name} lies below"),
            "solvent above" => format!("{name} lies above"),
            _ => "The layers are too close to tell: find them with a drop of water".to_owned(),
        },
        fixed(s.liquor_density_g_per_ml, 3),
        fixed(s.density_difference_g_per_ml.abs(), 3),
        if s.changed_places { ", the other way round than in plain water" } else { "" }
    )];
    if let Some(times) = s.times_slower {
        list.push(format!(
            "A drop settles about {} times as slowly as in plain water{}.",
            significant(times, 2),
            s.liquor_viscosity_mpa_s.map(|v| format!(" (viscosity {} mPa·s)", significant(v, 3))).unwrap_or_default()
        ));
    }
    if let Some(brix) = s.brix_where_layers_meet {
        list.push(format!("At {} °Bx the layers come within 0.05 g/mL: stop well before.", fixed(brix, 0)));
    }
    list.push(match s.interfacial_tension_mn_per_m {
        Some(t) => format!(
            "What else drives emulsions: interfacial tension, {} mN/m against water (low below about 10); surface-active ingredients such as proteins, gums and saponins; hard shaking.",
            significant(t, 2)
        ),
        None => "What else drives emulsions: a low interfacial tension, which is not held for this solvent; surface-active ingredients such as proteins, gums and saponins; hard shaking.".to_owned(),
    });
    list
}

/// Head of the trade.
pub fn trade_head() -> Vec<String> {
    ["times as concentrated", "°Bx", "solvent for the same removal", "settles slower, times"]
        .map(str::to_owned)
        .to_vec()
}

/// What concentrating saves and costs.
pub fn trade_rows(plan: &Plan) -> Vec<Vec<String>> {
    let Some(s) = &plan.settling else { return Vec::new() };
    s.trade
        .iter()
        .map(|t| {
            vec![
                significant(t.factor, 2),
                fixed(t.brix, 0),
                format!("{} %", fixed(100.0 * t.solvent_share, 0)),
                t.times_slower.map_or_else(|| "layers too close".to_owned(), |v| significant(v, 2)),
            ]
        })
        .collect()
}

/// How it was computed, with the values put in.
pub fn settling_working(study: &Study, plan: &Plan) -> Vec<String> {
    let (Some(s), Some(q)) = (&plan.settling, &study.solvent.density_g_per_ml) else { return Vec::new() };
    let Some((times, viscosity)) = s.times_slower.zip(s.liquor_viscosity_mpa_s) else { return Vec::new() };
    vec![
        "times slower = (μ_liquor/μ_water)·(|ρ_solvent − ρ_water|/|ρ_solvent − ρ_liquor|)".to_owned(),
        format!(
            "μ_liquor = {} mPa·s, ρ_solvent = {}, ρ_liquor = {} g/mL: {}",
            significant(viscosity, 3),
            q.value,
            fixed(s.liquor_density_g_per_ml, 4),
            significant(times, 3)
        ),
        "solvent for the same removal at constant D goes with the volume of the liquor".to_owned(),
    ]
}

#[cfg(test)]
mod tests {
    use super::super::testing::good;
    use super::*;

    #[test]
    fn settling_of_the_first_demo() {
        let g = good(0);
        let words = settling_sentences(&g.study, &g.plan).join(" ");
        assert!(words.contains("lies below") && words.contains("34 times as slowly"), "{words}");
        let rows = trade_rows(&g.plan);
        assert!(rows.len() > 5 && rows.iter().all(|r| r.len() == trade_head().len()));
        assert_eq!(rows[0][2], "100 %");
        assert_eq!(settling_working(&g.study, &g.plan).len(), 3);
    }
}
