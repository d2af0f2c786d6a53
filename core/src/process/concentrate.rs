//! Taking water off: a mass balance on solids and water.

use crate::solution::{sugar, water};
use crate::study::{ConcentrateTo, Problem, Study};
use serde::Serialize;

/// Temperature volumes are stated at [°C], as volumetric glass is marked.
const VOLUMETRIC_C: f64 = 20.0;
/// Density of water at 20 °C [g/mL]: the same as that of a liquor of 0 °Brix, to the bit.
pub const WATER_DENSITY_20C: f64 = water::density_g_per_ml(VOLUMETRIC_C);

/// The liquor after concentrating.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct Liquor {
    /// Volume [mL].
    pub volume_ml: f64,
    /// Water taken off [g].
    pub water_removed_g: f64,
    /// Volume of the feed over volume of the liquor [-].
    pub factor: f64,
    /// Soluble solids of the feed [°Brix], if stated.
    pub feed_brix: Option<f64>,
    /// Soluble solids of the liquor [°Brix], if those of the feed are stated.
    pub brix: Option<f64>,
}

/// Density of a sugar solution at 20 °C [g/mL] from `brix` [°Brix]; other soluble solids count as
/// sucrose, as a refractometer counts them.
///
/// See [`sugar::density_g_per_ml`].
pub fn density_g_per_ml(brix: f64) -> f64 {
    sugar::density_g_per_ml(brix, VOLUMETRIC_C)
}

/// The liquor of `study` after its water has been taken off `feed_ml` [mL] of feed (the feed less
/// what was lost of it before).
///
/// Solids are conserved: `m₀·B₀ = m₁·B₁`; `m₁ = m₀ − water`; the volume follows from the density
/// at each °Brix. Without soluble solids the liquor is taken as water: `V₁ = V₀ − water/ρ_water`.
/// Valid: dissolved solids counted as sucrose, 20 °C, nothing but water leaves.
///
/// # Errors
/// A target volume too small to hold the solids, or more water than the feed holds.
pub fn liquor(study: &Study, feed_ml: f64) -> Result<Liquor, Problem> {
    let v0 = feed_ml;
    let b0 = study.feed.soluble_solids_brix.as_ref().map(|b| b.value);
    let brix0 = b0.unwrap_or(0.0);
    let m0 = v0 * density_g_per_ml(brix0);
    let solids = m0 * brix0 / 100.0;
    let water0 = m0 - solids;
    let volume_at = |m: f64| m / density_g_per_ml(100.0 * solids / m);

    let (volume_ml, m1, at) = match &study.concentrate.to {
        ConcentrateTo::Unchanged => (v0, m0, "concentrate.to"),
        ConcentrateTo::VolumeMl(v) => {
            let at = "concentrate.to.volume_ml";
            // °Brix that holds the solids in that volume; 0 where there are none.
            let grams_per_l = if solids > 0.0 { 1000.0 * solids / v.value } else { 0.0 };
            let Some(b1) = sugar::brix_from_sucrose_g_per_l(grams_per_l, VOLUMETRIC_C).filter(|_| v.value > 0.0) else {
                let least = solids / density_g_per_ml(100.0);
                return Err(Problem::new(
                    at,
                    format!(
                        "the liquor is to be {} mL, but the feed's solids alone would fill {least:.1} mL; give more",
                        v.value
                    ),
                ));
            };
            if v.value > v0 {
                return Err(Problem::new(
                    at,
                    format!(
                        "the liquor is to be {} mL, but only {v0:.1} mL of feed are there; give at most that",
                        v.value
                    ),
                ));
            }
            (v.value, v.value * density_g_per_ml(if solids > 0.0 { b1 } else { 0.0 }), at)
        }
        ConcentrateTo::WaterRemovedG(w) => {
            let at = "concentrate.to.water_removed_g";
            if w.value >= water0 {
                return Err(Problem::new(
                    at,
                    format!("{} g of water cannot leave a feed that holds {water0:.1} g; give less", w.value),
                ));
            }
            (volume_at(m0 - w.value), m0 - w.value, at)
        }
        ConcentrateTo::Brix(b) => {
            let m1 = solids * 100.0 / b.value;
            (volume_at(m1), m1, "concentrate.to.brix")
        }
    };
    let removed = m0 - m1;
    let brix1 = 100.0 * solids / m1;
    if removed > water0 || brix1 > 85.0 {
        return Err(Problem::new(
            at,
            format!(
                "this would leave {brix1:.0} °Brix ({:.0} g of the feed's {water0:.0} g of water gone); \
                 above 85 °Brix the liquor sets or crystallises. Take less water off",
                removed
            ),
        ));
    }
    Ok(Liquor {
        volume_ml,
        water_removed_g: removed.max(0.0),
        factor: v0 / volume_ml,
        feed_brix: b0,
        brix: b0.map(|_| brix1),
    })
}
