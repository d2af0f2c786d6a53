//! The liquid itself, running down the page.

use super::live::{each_row, live};
use leptos::prelude::*;

/// The liquid after one step.
#[derive(Clone, Debug, PartialEq)]
pub struct ColumnLevel {
    /// The name of the step.
    pub step: String,
    /// The element id of the step's section.
    pub anchor: String,
    /// Volume of the liquid, mL.
    pub volume_ml: f64,
    /// Share of the target still present, 0 to 1.
    pub target_share: f64,
    /// Soluble solids, °Brix, where they are known.
    pub brix: Option<f64>,
    /// Solvent dissolved or standing in the liquid, mL.
    pub solvent_ml: f64,
    /// What leaves here, e.g. `water 400 mL`; empty if nothing does.
    pub leaves: String,
    /// Volume and target in words.
    pub label: String,
}

/// Deepest tone of the liquid; reached at [`BRIX_OF_DEEPEST`].
const DEEPEST: f64 = 0.7;
/// Tone of water.
const PALEST: f64 = 0.12;
/// Soluble solids drawn in the deepest tone, °Brix: a syrup.
const BRIX_OF_DEEPEST: f64 = 65.0;
/// Smallest weight of a level beside the largest, so that a small volume is still a level.
const LEAST_WEIGHT: f64 = 0.02;

/// How one level is drawn.
#[derive(Clone, Debug, PartialEq)]
struct Drawn {
    /// Height against the other levels, 0 to 1.
    weight: f64,
    /// Depth of the tone, 0 to 1.
    tone: f64,
    /// Width of the band of target, percent of the vessel.
    target_percent: f64,
    /// Height of the band of solvent, percent of the level.
    solvent_percent: f64,
    /// Everything the drawing says, in words.
    spoken: String,
}

/// The liquid drawn to scale, one level for each step: height is volume, depth of tone soluble
/// solids, the inner band the target still present, the hatched band solvent. Each level leads to
/// its step. The style sheet lays it along the left edge, or along the top on a narrow screen.
#[component]
pub fn Column(
    /// The levels, from the feed down.
    levels: Signal<Vec<ColumnLevel>>,
) -> impl IntoView {
    // Levels are known by their place, so that an element stays while its level changes and the
    // change of height can be seen.
    let places = Memo::new(move |_| (0..levels.with(Vec::len) as u32).collect()).into();
    let largest = Memo::new(move |_| levels.with(|l| largest_volume(l)));
    view! {
        <nav class="column" aria-label="The liquid, step by step">
            <ol class="levels">
                {each_row(places, move |i| level_item(levels, largest, i as usize))}
            </ol>
        </nav>
    }
}

/// One level.
fn level_item(levels: Signal<Vec<ColumnLevel>>, largest: Memo<f64>, i: usize) -> impl IntoView {
    let text =
        move |of: fn(&ColumnLevel) -> &String| levels.with(|l| l.get(i).map_or_else(String::new, |l| of(l).clone()));
    let drawn = Memo::new(move |_| levels.with(|l| l.get(i).map(|l| drawn(l, largest.get()))));
    let part = move |of: fn(&Drawn) -> f64| drawn.with(|d| d.as_ref().map_or(0.0, of));
    let leaves = Memo::new(move |_| text(|l| &l.leaves));
    view! {
        <li class="level" style:flex-grow=live(move || format!("{:.4}", part(|d| d.weight)))>
            <a
                class="level-link"
                href=live(move || format!("#{}", text(|l| &l.anchor)))
                aria-label=live(move || drawn.with(|d| d.as_ref().map_or_else(String::new, |d| d.spoken.clone())))
            >
                <span class="vessel" aria-hidden="true">
                    <span class="tone" style:opacity=live(move || format!("{:.3}", part(|d| d.tone)))></span>
                    <span class="target-band" style:width=live(move || format!("{:.1}%", part(|d| d.target_percent)))></span>
                    <span
                        class="solvent-band"
                        style:height=live(move || format!("{:.1}%", part(|d| d.solvent_percent)))
                        class:none=live(move || part(|d| d.solvent_percent) <= 0.0)
                    ></span>
                </span>
                <span class="level-words" aria-hidden="true">
                    <span class="level-step">{live(move || text(|l| &l.step))}</span>
                    <span class="level-label">{live(move || text(|l| &l.label))}</span>
                    <span class="leaves" class:none=live(move || leaves.with(String::is_empty))>
                        {live(move || leaves.get())}
                    </span>
                </span>
            </a>
        </li>
    }
}

/// Largest volume among `levels`, mL; 1 if none is usable.
fn largest_volume(levels: &[ColumnLevel]) -> f64 {
    let largest = levels.iter().map(|l| l.volume_ml).filter(|v| v.is_finite()).fold(0.0, f64::max);
    if largest > 0.0 { largest } else { 1.0 }
}

/// How `level` is drawn beside the largest volume, mL.
fn drawn(level: &ColumnLevel, largest_ml: f64) -> Drawn {
    let share_of = |part: f64, whole: f64| {
        let share = part / whole;
        if share.is_finite() { share.clamp(0.0, 1.0) } else { 0.0 }
    };
    let target = share_of(level.target_share, 1.0);
    let solvent = share_of(level.solvent_ml, level.solvent_ml + level.volume_ml);
    let mut spoken = format!("{}: {}", level.step, level.label);
    if let Some(brix) = level.brix.filter(|b| b.is_finite()) {
        spoken.push_str(&format!(", {brix:.1} degrees Brix"));
    }
    if level.solvent_ml > 0.0 {
        let digits = if level.solvent_ml < 10.0 { 2 } else { 0 };
        spoken.push_str(&format!(", with {:.digits$} mL of solvent", level.solvent_ml));
    }
    if !level.leaves.is_empty() {
        spoken.push_str(&format!("; leaves here: {}", level.leaves));
    }
    Drawn {
        weight: share_of(level.volume_ml, largest_ml).max(LEAST_WEIGHT),
        tone: PALEST + (DEEPEST - PALEST) * share_of(level.brix.unwrap_or(0.0), BRIX_OF_DEEPEST),
        // A quarter of the vessel at most: a fine band in the liquid.
        target_percent: if target > 0.0 { (25.0 * target).max(3.5) } else { 0.0 },
        solvent_percent: if solvent > 0.0 { (100.0 * solvent).max(6.0) } else { 0.0 },
        spoken,
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn level() -> ColumnLevel {
        ColumnLevel {
            step: "Strip".into(),
            anchor: "strip".into(),
            volume_ml: 100.0,
            target_share: 0.76,
            brix: Some(46.0),
            solvent_ml: 6.0,
            leaves: "solvent 6 mL".into(),
            label: "100 mL, 76 % of target".into(),
        }
    }

    #[test]
    fn drawn_to_scale_and_said_in_words() {
        let d = drawn(&level(), 500.0);
        assert!((d.weight - 0.2).abs() < 1e-12);
        assert!((d.target_percent - 19.0).abs() < 1e-9);
        assert!((d.solvent_percent - 600.0 / 106.0).abs() < 1.0);
        assert_eq!(
            d.spoken,
            "Strip: 100 mL, 76 % of target, 46.0 degrees Brix, with 6.00 mL of solvent; leaves here: solvent 6 mL"
        );
    }

    #[test]
    fn nothing_undrawable_reaches_the_page() {
        for bad in [f64::NAN, f64::INFINITY, -1.0, 0.0] {
            let l = ColumnLevel { volume_ml: bad, target_share: bad, brix: Some(bad), solvent_ml: bad, ..level() };
            let d = drawn(&l, largest_volume(std::slice::from_ref(&l)));
            for part in [d.weight, d.tone, d.target_percent, d.solvent_percent] {
                assert!(part.is_finite() && part >= 0.0, "{bad}: {d:?}");
            }
        }
    }
}
