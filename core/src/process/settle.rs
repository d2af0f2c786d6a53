//! Layers and settling: which phase lies below in this liquor, and how much slower drops settle in it
//! than in plain water.

use crate::library::solvents::{Solvent, solvent};
use crate::process::concentrate::density_g_per_ml;
use crate::solution::{sugar, water};
use crate::study::Study;
use serde::Serialize;

/// Density difference below which layers may not part, or may change places [g/mL]; common practice.
pub const PARTS_G_PER_ML: f64 = 0.05;
/// Factors of concentration shown in the trade.
const FACTORS: [f64; 8] = [1.0, 1.5, 2.0, 3.0, 4.0, 5.0, 6.0, 8.0];

/// Layers and settling of a liquor with a solvent.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct Settling {
    /// `solvent below`, `solvent above` or `too close to tell`.
    pub layer: &'static str,
    /// Density of the liquor [g/mL].
    pub liquor_density_g_per_ml: f64,
    /// Viscosity of the liquor [mPa s]; none outside the table.
    #[serde(skip_serializing_if = "Option::is_none")]
    pub liquor_viscosity_mpa_s: Option<f64>,
    /// Density of the solvent less that of the liquor [g/mL].
    pub density_difference_g_per_ml: f64,
    /// Whether the layers lie the other way round than in plain water.
    pub changed_places: bool,
    /// How many times slower a drop of solvent settles than in plain water [-]; none while the
    /// layers cannot be told, or the viscosity is not known.
    #[serde(skip_serializing_if = "Option::is_none")]
    pub times_slower: Option<f64>,
    /// Soluble solids at which the layers come within 0.05 g/mL [°Brix]; none if they do not up to
    /// 75 °Brix, or are already.
    #[serde(skip_serializing_if = "Option::is_none")]
    pub brix_where_layers_meet: Option<f64>,
    /// Interfacial tension against water [mN/m], if held.
    #[serde(skip_serializing_if = "Option::is_none")]
    pub interfacial_tension_mn_per_m: Option<f64>,
    /// What concentrating further or less would save and cost.
    pub trade: Vec<Trade>,
}

/// One factor of concentration.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct Trade {
    /// Feed volume over liquor volume [-].
    pub factor: f64,
    /// Soluble solids [°Brix].
    pub brix: f64,
    /// Solvent that takes out the same fraction, beside that at factor 1 [-].
    pub solvent_share: f64,
    /// Times slower than in plain water [-].
    #[serde(skip_serializing_if = "Option::is_none")]
    pub times_slower: Option<f64>,
}

/// How many times slower a drop of density `solvent` [g/mL] settles in a liquor of `brix` [°Brix] at
/// `t` [°C] than in plain water [-]; none within 0.05 g/mL, or where the viscosity is not known.
///
/// By Stokes, `v = Δρ·g·d²/(18 μ)`: `(μ_liquor/μ_water)·(Δρ_water/Δρ_liquor)`, the same drop.
/// Valid: drops small enough for Stokes (Reynolds number below 1), rigid; circulating drops gain a
/// little in both. Soluble solids as sucrose. Says nothing of emulsions held by surface-active
/// ingredients.
/// Reference: G. G. Stokes (1851). Dichloromethane in 46 °Brix at 20 °C, by hand from the tables:
/// viscosity 10.2/1.002, densities 1.3266 − 0.9982 over 1.3266 − 1.2084: 28.3.
pub fn times_slower(solvent: f64, brix: f64, t: f64) -> Option<f64> {
    let liquor = solvent - sugar::density_g_per_ml(brix, t);
    let plain = solvent - water::density_g_per_ml(t);
    if liquor.abs() < PARTS_G_PER_ML || plain == 0.0 {
        return None;
    }
    Some(sugar::viscosity_pa_s(brix, t)? / water::viscosity_pa_s(t) * (plain / liquor).abs())
}

/// °Brix at which the layers come within 0.05 g/mL, going up from `brix`; none if they do not up to
/// 75 °Brix or are already.
fn where_layers_meet(solvent: f64, brix: f64, t: f64) -> Option<f64> {
    let apart = |b: f64| (solvent - sugar::density_g_per_ml(b, t)).abs() >= PARTS_G_PER_ML;
    if !apart(brix) {
        return None;
    }
    let mut low = brix;
    while low < sugar::BRIX_TABLE_MAX {
        let high = (low + 1.0).min(sugar::BRIX_TABLE_MAX);
        if !apart(high) {
            let (mut a, mut b) = (low, high);
            for _ in 0..40 {
                let m = 0.5 * (a + b);
                if apart(m) { a = m } else { b = m }
            }
            return Some(b);
        }
        low = high;
    }
    None
}

/// °Brix of a liquor that holds `factor` [-] times the solids per volume of a feed of `brix` [°Brix].
///
/// `10·B·ρ(B)` is what a litre holds; °Brix by halving. None above dry sugar.
fn brix_at(brix: f64, factor: f64) -> Option<f64> {
    let grams = 10.0 * brix * density_g_per_ml(brix) * factor;
    let holds = |b: f64| 10.0 * b * density_g_per_ml(b);
    if grams > holds(sugar::BRIX_TABLE_MAX) {
        return None;
    }
    let (mut a, mut b) = (0.0, sugar::BRIX_TABLE_MAX);
    for _ in 0..60 {
        let m = 0.5 * (a + b);
        if holds(m) < grams { a = m } else { b = m }
    }
    Some(0.5 * (a + b))
}

/// Layers and settling of the liquor of `study` at `liquor_brix` [°Brix] with its solvent; none while
/// the density of the solvent or the soluble solids are not known.
///
/// Density of the solvent at 20 °C, as stated in the study. At constant D and portions in proportion
/// to the liquor, the solvent for a removal goes with the volume of the liquor: `1/factor`.
/// Valid and reference: [`times_slower`].
pub fn settling(study: &Study, liquor_brix: Option<f64>) -> Option<Settling> {
    let density = study.solvent.density_g_per_ml.as_ref()?.value;
    let brix = liquor_brix?;
    let t = study.feed.temperature_c.value;
    let liquor = sugar::density_g_per_ml(brix, t);
    let difference = density - liquor;
    let feed_brix = study.feed.soluble_solids_brix.as_ref().map_or(brix, |q| q.value);
    let held: Option<Solvent> = solvent(&study.solvent.id);
    let trade = FACTORS
        .iter()
        .filter_map(|&factor| {
            let brix = brix_at(feed_brix, factor)?;
            Some(Trade { factor, brix, solvent_share: 1.0 / factor, times_slower: times_slower(density, brix, t) })
        })
        .collect();
    Some(Settling {
        layer: if difference.abs() < PARTS_G_PER_ML {
            "too close to tell"
        } else if difference > 0.0 {
            "solvent below"
        } else {
            "solvent above"
        },
        liquor_density_g_per_ml: liquor,
        liquor_viscosity_mpa_s: sugar::viscosity_pa_s(brix, t).map(|v| 1000.0 * v),
        density_difference_g_per_ml: difference,
        changed_places: (density > water::density_g_per_ml(t)) != (difference > 0.0),
        times_slower: times_slower(density, brix, t),
        brix_where_layers_meet: where_layers_meet(density, brix, t),
        interfacial_tension_mn_per_m: held.and_then(|s| s.interfacial_tension_20c_mn_m),
        trade,
    })
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::study::parse;

    /// By hand from printed tables (NBS Circular 440; Swindells 1958 at 45 and 50 °Brix, 9.36 and
    /// 15.4 mPa s, so about 10.2 at 46): 1.2084 g/mL, (10.2/1.002)·(0.3284/0.1182) = 28.3, within
    /// the reading of the viscosity between rows.
    #[test]
    fn dichloromethane_in_46_brix() {
        let slower = times_slower(1.3266, 46.0, 20.0).unwrap();
        assert!((slower - 28.3).abs() < 1.5, "{slower}");
        assert!((times_slower(0.9003, 0.0, 20.0).unwrap() - 1.0).abs() < 0.01);
        assert_eq!(times_slower(1.2084, 46.0, 20.0), None);
        assert_eq!(times_slower(f64::NAN, 46.0, 20.0).filter(|v| v.is_finite()), None);
    }

    #[test]
    fn layers_of_the_first_demo() {
        let study = parse(include_str!("../../../tests/data/studies/neutral-alkaloid.json")).unwrap();
        let s = settling(&study, Some(47.2)).unwrap();
        assert_eq!((s.layer, s.changed_places), ("solvent below", false));
        // 1.3266 − 0.05 = 1.2766 g/mL is reached at 58.3 °Brix (NBS Circular 440: 58 °Brix 1.27449,
        // 59 °Brix 1.28044, times 0.99997).
        assert!((s.brix_where_layers_meet.unwrap() - 58.35).abs() < 0.15, "{:?}", s.brix_where_layers_meet);
        let slower: Vec<f64> = s.trade.iter().filter_map(|t| t.times_slower).collect();
        assert!(slower.windows(2).all(|w| w[1] > w[0]) && s.trade[1].solvent_share < 1.0);
        assert_eq!(settling(&study, None), None);
    }
}
