//! Portions: cross-current stages with efficiency, entrainment and solvent that arrives loaded;
//! continuous extraction; and the questions asked the other way round.

use crate::math;
use serde::Serialize;

/// One portion as the stages see it.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct PortionIn {
    /// Fresh solvent added [mL].
    pub volume_ml: f64,
    /// Stage efficiency E, 0 to 1.
    pub efficiency: f64,
}

/// What is common to all portions.
#[derive(Clone, Debug, PartialEq)]
pub struct StagesIn<'a> {
    /// Liquor charged [mL].
    pub liquor_ml: f64,
    /// Amount of each ingredient in the liquor [mg].
    pub liquor_mg: &'a [f64],
    /// Distribution ratio of each ingredient [-].
    pub d: &'a [f64],
    /// Concentration of each ingredient in the entering solvent [mg/mL].
    pub entering_mg_per_ml: &'a [f64],
    /// Solvent left with the liquor at each draining [mL].
    pub left_behind_ml: f64,
    /// Liquor carried out with each extract [mL].
    pub carried_out_ml: f64,
}

/// One stage, or one pass, for every ingredient.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct StageRow {
    /// Counted from 1.
    pub stage: usize,
    /// Fresh solvent added [mL].
    pub solvent_ml: f64,
    /// Stage efficiency E [-].
    pub efficiency: f64,
    /// Liquor after draining [mL].
    pub liquor_ml: f64,
    /// Solvent left with it [mL].
    pub left_behind_ml: f64,
    /// Extract drained [mL].
    pub extract_ml: f64,
    /// Each ingredient in the extract drained, liquor carried out included [mg].
    pub extract_mg: Vec<f64>,
    /// Each ingredient still with the liquor, solvent left behind included [mg].
    pub raffinate_mg: Vec<f64>,
    /// Each ingredient taken out so far, at equal strength [-]; see [`removed`].
    pub removed_fraction: Vec<f64>,
}

/// Where everything is after the last stage.
#[derive(Clone, Debug, PartialEq)]
pub struct StagesOut {
    /// Stage by stage.
    pub rows: Vec<StageRow>,
    /// Liquor at the end [mL].
    pub liquor_ml: f64,
    /// Solvent left with it [mL].
    pub left_behind_ml: f64,
    /// Each ingredient with the liquor at the end [mg], solvent left behind included.
    pub raffinate_mg: Vec<f64>,
    /// Each ingredient brought by the entering solvent [mg].
    pub entered_mg: Vec<f64>,
}

/// Fraction of an ingredient taken out, at equal strength [-]: what its concentration falls by
/// when the rest of the liquor is brought back to its own strength.
///
/// `removed = 1 − (n/n₀)/(V/V₀)`; `n₀`, `n` [mg] with the liquor before and after, `V₀`, `V` [mL]
/// its volume. Liquor carried out takes its share of everything and so removes nothing.
/// 0 where nothing was there to remove.
pub fn removed(start_mg: f64, now_mg: f64, start_ml: f64, now_ml: f64) -> f64 {
    if start_mg <= 0.0 || now_ml <= 0.0 {
        return 0.0;
    }
    1.0 - (now_mg / start_mg) / (now_ml / start_ml)
}

/// Cross-current extraction of `feed` with `portions`, all ingredients at once.
///
/// In each stage, with `V_a` liquor, `V_o` all the solvent in contact (left behind + portion) and
/// `N` the amount in both: at equilibrium `n* = N·V_a/(V_a + D·V_o)` stays in the liquor; the stage
/// goes the fraction `E` of the way, `n' = n − E·(n − n*)`. Draining leaves `left_behind_ml` of
/// solvent with the liquor and carries `carried_out_ml` of liquor out.
/// Valid: D constant, phases immiscible, volumes unchanged by transfer. Solvent left at the end
/// counts with the raffinate: when it is stripped, what it holds stays.
/// Reference: stage efficiency as the fraction of the approach to equilibrium in the raffinate
/// phase (Murphree type), J. Benitez, Principles and Modern Applications of Mass Transfer
/// Operations; for one solute, E = 1 and clean draining this is the textbook product
/// `Π 1/(1 + D·V_i/V_a)`, IUPAC Gold Book F02503.
pub fn cross_current(feed: &StagesIn, portions: &[PortionIn]) -> StagesOut {
    let n = feed.liquor_mg.len();
    let mut v_a = feed.liquor_ml;
    let mut v_held = 0.0;
    let mut aq: Vec<f64> = feed.liquor_mg.to_vec();
    let mut held = vec![0.0; n];
    let mut entered = vec![0.0; n];
    let mut rows = Vec::with_capacity(portions.len());
    for (index, p) in portions.iter().enumerate() {
        let v_o = v_held + p.volume_ml;
        let left = feed.left_behind_ml.min(v_o);
        let carried = feed.carried_out_ml.min(v_a);
        let mut extract_mg = Vec::with_capacity(n);
        let mut raffinate_mg = Vec::with_capacity(n);
        let mut removed_fraction = Vec::with_capacity(n);
        for i in 0..n {
            let brought = feed.entering_mg_per_ml[i] * p.volume_ml;
            entered[i] += brought;
            let total = aq[i] + held[i] + brought;
            let equilibrium = total * v_a / (v_a + feed.d[i] * v_o);
            let stays = aq[i] - p.efficiency * (aq[i] - equilibrium);
            let organic = total - stays;
            let drained = if v_o > 0.0 { organic * ((v_o - left) / v_o) } else { 0.0 };
            let carried_mg = if v_a > 0.0 { stays * (carried / v_a) } else { 0.0 };
            aq[i] = stays - carried_mg;
            held[i] = organic - drained;
            extract_mg.push(drained + carried_mg);
            raffinate_mg.push(aq[i] + held[i]);
            removed_fraction.push(removed(feed.liquor_mg[i], aq[i] + held[i], feed.liquor_ml, v_a - carried));
        }
        v_a -= carried;
        v_held = left;
        rows.push(StageRow {
            stage: index + 1,
            solvent_ml: p.volume_ml,
            efficiency: p.efficiency,
            liquor_ml: v_a,
            left_behind_ml: v_held,
            extract_ml: v_o - left,
            extract_mg,
            raffinate_mg,
            removed_fraction,
        });
    }
    let raffinate_mg = (0..n).map(|i| aq[i] + held[i]).collect();
    StagesOut { rows, liquor_ml: v_a, left_behind_ml: v_held, raffinate_mg, entered_mg: entered }
}

/// Continuous extraction: `solvent_ml` passed steadily through the standing liquor, shown in
/// `slices` equal parts.
///
/// `n = n₀·e^−t + E·c_in·V·(1 − e^−t)/t`, `t = E·D·V/V_a`; `V` [mL] solvent passed, `c_in` [mg/mL]
/// its load, `E` [-] how nearly the leaving solvent is at equilibrium.
/// Valid: liquor well mixed, solvent hold-up small against the liquor, clean parting.
/// Reference: limit of many small portions (C. J. Geankoplis, Transport Processes and Unit
/// Operations 3rd ed., ch. 12); for `c_in = 0`, `n/n₀ = exp(−D·V/V_a)`.
pub fn continuous(feed: &StagesIn, solvent_ml: f64, efficiency: f64, slices: usize) -> StagesOut {
    let n = feed.liquor_mg.len();
    let step = solvent_ml / slices.max(1) as f64;
    let mut aq: Vec<f64> = feed.liquor_mg.to_vec();
    let mut entered = vec![0.0; n];
    let mut rows = Vec::with_capacity(slices);
    for slice in 0..slices.max(1) {
        let mut extract_mg = Vec::with_capacity(n);
        let mut removed_fraction = Vec::with_capacity(n);
        for i in 0..n {
            let brought = feed.entering_mg_per_ml[i] * step;
            let d = feed.d[i];
            let before = aq[i];
            let t = efficiency * d * step / feed.liquor_ml;
            let gain = if t < 1e-8 { 1.0 - 0.5 * t } else { (1.0 - math::exp(-t)) / t };
            aq[i] = before * math::exp(-t) + efficiency * brought * gain;
            entered[i] += brought;
            extract_mg.push(before + brought - aq[i]);
            removed_fraction.push(removed(feed.liquor_mg[i], aq[i], feed.liquor_ml, feed.liquor_ml));
        }
        rows.push(StageRow {
            stage: slice + 1,
            solvent_ml: step,
            efficiency,
            liquor_ml: feed.liquor_ml,
            left_behind_ml: 0.0,
            extract_ml: step,
            extract_mg,
            raffinate_mg: aq.clone(),
            removed_fraction,
        });
    }
    StagesOut { rows, liquor_ml: feed.liquor_ml, left_behind_ml: 0.0, raffinate_mg: aq, entered_mg: entered }
}

/// Number of equal portions that reach a removal [-], not rounded.
///
/// `n = ln(1 − r)/ln(1 − E·x)`, `x = D·V/(V_a + D·V)`; `r` removal asked for, `v` [mL] one portion,
/// `v_a` [mL] liquor. `None` if nothing moves or `r` is not below 1.
/// Valid: clean solvent, clean draining, D constant.
/// Reference: D. Harvey, Modern Analytical Chemistry (2000), Example 7.15 (7.54 portions).
pub fn portions_for(r: f64, d: f64, v: f64, v_a: f64, efficiency: f64) -> Option<f64> {
    if r <= 0.0 {
        return Some(0.0);
    }
    let x = efficiency * d * v / (v_a + d * v);
    if !(x > 0.0) || r >= 1.0 {
        return None;
    }
    if x >= 1.0 {
        return Some(1.0);
    }
    Some(math::ln_1p(-r) / math::ln_1p(-x))
}

/// Size of each of `n` equal portions that reach the removal `r` [mL].
///
/// `V = V_a·x/(D·(1 − x))` with `x = (1 − (1 − r)^(1/n))/E`. `None` where `x ≥ 1`: with that stage
/// efficiency no volume is enough.
/// Valid: as [`portions_for`].
/// Reference: D. Harvey, Modern Analytical Chemistry (2000), Example 7.14 (9990 mL for 99.9 %).
pub fn volume_for(r: f64, n: u32, d: f64, v_a: f64, efficiency: f64) -> Option<f64> {
    if n == 0 || !(d > 0.0) || !(efficiency > 0.0) {
        return None;
    }
    if r <= 0.0 {
        return Some(0.0);
    }
    let x = (1.0 - math::pow(1.0 - r, 1.0 / f64::from(n))) / efficiency;
    if x >= 1.0 { None } else { Some(v_a * x / (d * (1.0 - x))) }
}

/// Argument between `low` and `high` where the rising function `f` reaches `wanted`, by bisection
/// on the argument's logarithm; `None` where it lies outside.
///
/// Both ends must be above 0. 200 halvings at most; stops when the bracket cannot be split.
pub fn solve_rising(low: f64, high: f64, wanted: f64, f: &dyn Fn(f64) -> f64) -> Option<f64> {
    let (f_low, f_high) = (f(low), f(high));
    if !(f_low <= wanted && wanted <= f_high) {
        return None;
    }
    let (mut a, mut b) = (math::ln(low), math::ln(high));
    for _ in 0..200 {
        let m = 0.5 * (a + b);
        if m <= a || m >= b {
            break;
        }
        if f(math::exp(m)) < wanted { a = m } else { b = m }
    }
    Some(math::exp(0.5 * (a + b)))
}

#[cfg(test)]
mod tests {
    use super::*;

    fn alone<'a>(v_a: f64, mg: &'a [f64], d: &'a [f64]) -> StagesIn<'a> {
        StagesIn {
            liquor_ml: v_a,
            liquor_mg: mg,
            d,
            entering_mg_per_ml: &[0.0],
            left_behind_ml: 0.0,
            carried_out_ml: 0.0,
        }
    }

    fn run(v_a: f64, d: f64, efficiency: f64, volumes: &[f64]) -> f64 {
        let p: Vec<_> = volumes.iter().map(|&volume_ml| PortionIn { volume_ml, efficiency }).collect();
        let out = cross_current(&alone(v_a, &[1.0], &[d]), &p);
        out.rows.last().map_or(0.0, |r| r.removed_fraction[0])
    }

    /// D. Harvey, Modern Analytical Chemistry (2000), Examples 7.14 and 7.15, p. 219.
    #[test]
    fn repeated_portions_of_a_textbook() {
        assert!((run(50.0, 5.0, 1.0, &[15.0]) - 0.600).abs() < 0.0005);
        assert!((run(50.0, 5.0, 1.0, &[15.0; 2]) - 0.840).abs() < 0.0005);
        assert!((run(50.0, 5.0, 1.0, &[15.0; 3]) - 0.936).abs() < 0.0005);
        assert!((portions_for(0.999, 5.0, 15.0, 50.0, 1.0).unwrap() - 7.54).abs() < 0.005);
        assert!((volume_for(0.999, 1, 5.0, 50.0, 1.0).unwrap() - 9990.0).abs() < 5.0);
    }

    /// Washing worksheet: D that removes 96 % from 100 mL with two 50 mL portions is 8 (public
    /// page; recomputed).
    #[test]
    fn d_from_a_measured_removal() {
        let d = solve_rising(1e-9, 1e9, 0.96, &|d| run(100.0, d, 1.0, &[50.0, 50.0])).unwrap();
        assert!((d - 8.0).abs() < 1e-6, "{d}");
    }

    #[test]
    fn solvent_left_behind_keeps_its_load_with_the_liquor() {
        // One portion, 1 mL of 10 mL left behind: a tenth of what the solvent holds stays.
        let feed = StagesIn { left_behind_ml: 1.0, ..alone(100.0, &[100.0], &[10.0]) };
        let out = cross_current(&feed, &[PortionIn { volume_ml: 10.0, efficiency: 1.0 }]);
        // Equilibrium by hand: half in 10 mL of solvent (D·V_o = V_a), so 5 mg stay in the 1 mL.
        assert!((out.raffinate_mg[0] - 55.0).abs() < 1e-9);
    }

    #[test]
    fn nothing_is_removed_by_carrying_liquor_out() {
        let feed = StagesIn { carried_out_ml: 5.0, ..alone(100.0, &[100.0], &[0.0]) };
        let out = cross_current(&feed, &[PortionIn { volume_ml: 10.0, efficiency: 1.0 }]);
        assert!(out.rows[0].removed_fraction[0].abs() < 1e-12);
        assert!((out.raffinate_mg[0] - 95.0).abs() < 1e-9);
    }
}
