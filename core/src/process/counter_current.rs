//! Liquor and solvent passing through stages in opposite directions.

use super::portions::{StageRow, StagesIn, StagesOut, removed};
use crate::math;

/// Fraction of an ingredient left in the raffinate [-] after `n` ideal counter-current stages with
/// clean solvent, from the extraction factor `e = D·S/V_a` [-].
///
/// `φ = (e − 1)/(e^(n+1) − 1)`, and `1/(n + 1)` at `e = 1`; `n` need not be whole.
/// Valid: D constant, phases immiscible. Written with `expm1`-like care near `e = 1`.
/// Reference: A. Kremser (1930); checks: a stage-by-stage solve, and the values of
/// J. Benitez, Principles and Modern Applications of Mass Transfer Operations, Example 7.5.
pub fn fraction_left(e: f64, n: f64) -> f64 {
    if e <= 0.0 {
        return 1.0;
    }
    let l = math::ln(e);
    // (e − 1)/(e^(n+1) − 1) = x·f(l)/f((n+1)l)/(n+1), f(t) = (e^t − 1)/t, smooth through l = 0.
    let top = relative_growth(l);
    let bottom = relative_growth((n + 1.0) * l);
    if bottom.is_infinite() {
        return 0.0;
    }
    top / bottom / (n + 1.0)
}

/// `(e^t − 1)/t` [-], 1 at `t = 0`.
fn relative_growth(t: f64) -> f64 {
    if t.abs() < 1e-5 { 1.0 + t / 2.0 + t * t / 6.0 } else { (math::exp(t) - 1.0) / t }
}

/// Ideal counter-current stages [-], not rounded, that leave the fraction `left` [-] at the
/// extraction factor `e` [-]; `None` where no number suffices (`e < 1` has the limit `1 − e`).
///
/// `n = ln[(e − 1)/φ + 1]/ln e − 1`, and `1/φ − 1` at `e = 1`.
/// Valid: as [`fraction_left`].
/// Reference: inverse of the Kremser relation; E = 1.5, φ = 0.01 gives 8.697.
pub fn stages_for(left: f64, e: f64) -> Option<f64> {
    if !(left > 0.0) || !(e > 0.0) {
        return None;
    }
    if left >= 1.0 {
        return Some(0.0);
    }
    if (e - 1.0).abs() < 1e-9 {
        return Some(1.0 / left - 1.0);
    }
    let inside = (e - 1.0) / left + 1.0;
    if inside <= 0.0 { None } else { Some(math::ln(inside) / math::ln(e) - 1.0) }
}

/// Counter-current extraction stage by stage, with stage efficiency and loaded solvent.
///
/// In each stage `x₋ − x = E·(x₋ − y/D)` (`x₋`, `x` [mg/mL] liquor in and out, `y` extract out)
/// and `V_a(x₋ − x) = S(y − y₊)` (`y₊` extract in). Both are linear, so what the feed brings and
/// what the solvent brings are marched separately and added, each from the end where the other is
/// nothing; no iteration, no difference of large numbers, and each stage is rescaled, so no number
/// of stages overflows. With `D = 0` all that the solvent brings stays in the liquor.
/// Valid: D constant, phases immiscible, steady running, clean parting.
/// Reference: closed form [`fraction_left`] at E = 1.
pub fn counter_current(feed: &StagesIn, solvent_ml: f64, stages: usize, efficiency: f64) -> StagesOut {
    let n = feed.liquor_mg.len();
    let v_a = feed.liquor_ml;
    let mut liquor: Vec<Vec<f64>> = vec![vec![0.0; n]; stages];
    let mut extract: Vec<Vec<f64>> = vec![vec![0.0; n]; stages];
    let entered: Vec<f64> = feed.entering_mg_per_ml.iter().map(|c| c * solvent_ml).collect();
    for i in 0..n {
        let e = feed.d[i] * solvent_ml / v_a;
        let from_feed = feed_response(e, stages, efficiency);
        let from_load = load_response(e, stages, efficiency);
        for s in 0..stages {
            liquor[s][i] = feed.liquor_mg[i] * from_feed[s].0 + entered[i] * from_load[s].0;
            extract[s][i] = feed.liquor_mg[i] * from_feed[s].1 + entered[i] * from_load[s].1;
        }
    }
    let rows = (0..stages)
        .map(|s| StageRow {
            stage: s + 1,
            solvent_ml: if s + 1 == stages { solvent_ml } else { 0.0 },
            efficiency,
            liquor_ml: v_a,
            left_behind_ml: 0.0,
            extract_ml: if s == 0 { solvent_ml } else { 0.0 },
            extract_mg: extract[s].clone(),
            raffinate_mg: liquor[s].clone(),
            removed_fraction: (0..n).map(|i| removed(feed.liquor_mg[i], liquor[s][i], v_a, v_a)).collect(),
        })
        .collect();
    let raffinate_mg = liquor.last().cloned().unwrap_or_else(|| feed.liquor_mg.to_vec());
    StagesOut { rows, liquor_ml: v_a, left_behind_ml: 0.0, raffinate_mg, entered_mg: entered }
}

/// Liquor and extract leaving each stage, as fractions of what the feed brings, clean solvent.
///
/// March from the raffinate end: with `a` leaving in the liquor and `b` arriving in the extract
/// (both amounts), `a₋ − a = E(a − b/e)/[(1 − E) + E/e]`, written here times `e`.
fn feed_response(e: f64, stages: usize, efficiency: f64) -> Vec<(f64, f64)> {
    let mut shape = vec![(1.0, 0.0); stages];
    let mut arriving = 0.0;
    for s in (0..stages).rev() {
        let moved = efficiency * (e - arriving).max(0.0) / (e * (1.0 - efficiency) + efficiency);
        let coming = 1.0 + moved;
        // Relative to the liquor that comes in, which is what the stage above sends down.
        shape[s] = (1.0 / coming, (arriving + moved) / coming);
        arriving = (arriving + moved) / coming;
    }
    let mut brought = 1.0;
    for stage in &mut shape {
        let (down, up) = *stage;
        *stage = (brought * down, brought * up);
        brought *= down;
    }
    shape
}

/// Liquor and extract leaving each stage, as fractions of what the entering solvent brings, clean
/// liquor.
///
/// March from the feed end, `ρ` being what arrives in the liquor over what leaves in the extract:
/// `a' = (1 − E)a + E·b/e` leaves in the liquor and `b₊ = b + a' − a` came in the extract, so
/// `b/b₊ = e/[e + E(1 − eρ)]` and `a'/b₊ = [(1 − E)eρ + E]/[e + E(1 − eρ)]`.
fn load_response(e: f64, stages: usize, efficiency: f64) -> Vec<(f64, f64)> {
    let mut shape = vec![(0.0, 0.0); stages];
    let mut rho = 0.0;
    for stage in &mut shape {
        let below = e + efficiency * (1.0 - e * rho).max(0.0);
        let liquor = ((1.0 - efficiency) * e * rho + efficiency) / below;
        *stage = (liquor, e / below);
        rho = liquor;
    }
    let mut arriving = 1.0;
    for stage in shape.iter_mut().rev() {
        let (liquor, extract) = *stage;
        *stage = (arriving * liquor, arriving * extract);
        arriving *= extract;
    }
    shape
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Kremser relation against the arithmetic of its definition, and its limit at e = 1.
    #[test]
    fn closed_form() {
        for (e, n, expected) in [(1.5, 3.0, 0.123_08), (1.0, 4.0, 0.2), (0.6, 5.0, 0.419_58)] {
            assert!((fraction_left(e, n) - expected).abs() < 1e-5, "{e} {n}");
        }
        assert!(fraction_left(1e6, 100.0) < 1e-300);
        for (e, expected) in [(1.5, 8.697), (2.0, 5.658), (3.0, 3.827)] {
            assert!((stages_for(0.01, e).unwrap() - expected).abs() < 0.002);
        }
        assert_eq!(stages_for(0.01, 0.5), None);
    }

    fn left(e: f64, n: usize, efficiency: f64, load: f64) -> f64 {
        let feed = StagesIn {
            liquor_ml: 100.0,
            liquor_mg: &[100.0],
            d: &[e],
            entering_mg_per_ml: &[load],
            left_behind_ml: 0.0,
            carried_out_ml: 0.0,
        };
        let out = counter_current(&feed, 100.0, n, efficiency);
        let first = out.rows[0].extract_mg[0];
        let closure = 100.0 + out.entered_mg[0] - first - out.raffinate_mg[0];
        assert!(closure.abs() < 1e-9, "balance {closure}");
        out.raffinate_mg[0] / 100.0
    }

    #[test]
    fn stage_by_stage_meets_the_closed_form() {
        for e in [0.01, 0.6, 1.0, 1.5, 20.0] {
            for n in [1, 2, 5, 30] {
                let closed = fraction_left(e, n as f64);
                assert!((left(e, n, 1.0, 0.0) - closed).abs() < 1e-12 + 1e-9 * closed, "{e} {n}");
            }
        }
    }

    /// Loaded solvent: E = 1.6, 3 stages, y/m = 0.05, x0 = 1 gives 0.15264 (Kremser relation
    /// shifted by the pinch).
    #[test]
    fn loaded_solvent_stops_at_the_pinch() {
        assert!((left(1.6, 3, 1.0, 0.05 * 1.6) - 0.152_64).abs() < 2e-4);
        assert!((left(50.0, 60, 1.0, 0.05 * 50.0) - 0.05).abs() < 1e-9);
    }

    #[test]
    fn poor_stages_take_out_less() {
        assert!(left(1.5, 5, 0.5, 0.0) > left(1.5, 5, 0.9, 0.0));
    }
}
