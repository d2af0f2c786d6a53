//! The answer in words: what comes out, what the limit is, and plan beside result.

use crate::chain::percent;
use crate::judgement::readings::ReadingsReport;
use crate::plan::{Answer, Contribution, IngredientRow, Interval, Inverse, Verdict};
use crate::process::isolate::IsolateResult;

/// What the answer rests on.
pub(crate) struct Facts<'a> {
    pub goal: f64,
    pub planned: &'a Interval,
    pub target: &'a IngredientRow,
    pub ph: f64,
    pub readings: Option<&'a ReadingsReport>,
    pub inverse: &'a Inverse,
    pub isolate: Option<&'a IsolateResult>,
    pub contributions: &'a [Contribution],
}

/// Share of the target in a charged form above which ionisation is named as the limit.
const MOSTLY_CHARGED: f64 = 0.5;

/// The answer to "can it be taken out", in a sentence or two.
pub(crate) fn answer(f: &Facts) -> Answer {
    let verdict = Verdict::of(f.planned, f.goal);
    let name = &f.target.name;
    if let Some(found) = f.isolate {
        let reached = match Verdict::of(&found.found_removal, f.goal) {
            Verdict::Reaches => "which reaches",
            Verdict::Borderline => "borderline against",
            Verdict::FallsShort => "short of",
        };
        return Answer {
            sentence: format!(
                "{} of {name} came out ({}), {reached} the goal of {}; the plan expected {}.",
                about(found.found_removal.value),
                span(&found.found_removal),
                percent(f.goal),
                percent(f.planned.value)
            ),
            detail: found.sentence.clone(),
            verdict,
        };
    }
    let mut sentence = format!("{} of {name} should come out ({}), ", about(f.planned.value), span(f.planned));
    sentence.push_str(&match verdict {
        Verdict::Reaches => format!("which reaches the goal of {}", percent(f.goal)),
        Verdict::Borderline => format!("borderline against the goal of {}", percent(f.goal)),
        Verdict::FallsShort => format!("short of the goal of {}", percent(f.goal)),
    });
    match f.readings {
        Some(r) if r.decision_changes => {
            sentence.push_str("; by another reading of its constant the decision changes.")
        }
        Some(_) => sentence.push_str(", whatever the reading of its constant."),
        None => sentence.push('.'),
    }
    let detail = if verdict == Verdict::Reaches { String::new() } else { way_out(f) };
    Answer { sentence, detail, verdict }
}

/// What would have to change for the goal.
fn way_out(f: &Facts) -> String {
    let charged = f.target.fraction_neutral < 1.0 - MOSTLY_CHARGED;
    let inv = f.inverse;
    let mut parts = Vec::new();
    if let (Verdict::Borderline, Some(first)) = (Verdict::of(f.planned, f.goal), f.contributions.first()) {
        parts.push(format!(
            "{} of the doubt comes from {}: know that better first.",
            percent(first.share_of_variance),
            first.what
        ));
    }
    if charged {
        parts.push(format!(
            "Ionisation is the limit: at pH {} only {} is neutral.",
            f.ph,
            percent(f.target.fraction_neutral)
        ));
        match (&inv.ph_needed, &inv.ph_dose) {
            (Some(ph), Some(dose)) => {
                let what = if dose.base_mmol >= 0.0 { "base" } else { "acid" };
                parts.push(format!(
                    "These portions would reach the goal at pH {ph:.1}, but the {what} for that (about {} mmol) leaves \
                     {} mg of {} in the liquor, and nothing may be added that stays behind.",
                    significant(dose.base_mmol.abs()),
                    significant(dose.left_behind_mg),
                    dose.left_behind
                ));
            }
            _ => parts.push("No pH makes these portions enough; more solvent or another solvent is needed.".to_owned()),
        }
    }
    match inv.portions_needed {
        Some(n) if n <= 20 => {
            parts.push(format!("At this pH it would take {n} portions of {:.0} mL.", inv.portion_ml));
        }
        _ if !charged => {
            parts.push(format!(
                "With D {} and this stage efficiency no sensible number of such portions is enough; choose a solvent with a larger K.",
                significant(inv.d)
            ));
        }
        _ => {}
    }
    parts.join(" ")
}

/// Plan beside isolate, in words that claim no more than one weighing can show.
pub(crate) fn plan_against_isolate(
    planned: &Interval,
    found: &Interval,
    apparent_e: Option<&Interval>,
    apparent_d: Option<f64>,
) -> String {
    let plan = format!("Planned was {} ({}).", percent(planned.value), span(planned));
    if found.low <= planned.high && planned.low <= found.high {
        return format!("{plan} Plan and isolate agree within their uncertainty.");
    }
    if found.value > planned.value {
        return format!(
            "{plan} More was isolated than planned: K may be higher, or the isolate may be wetter or less pure than stated."
        );
    }
    let by_e = apparent_e.map(|e| format!("a stage efficiency of {} with this K", significant(e.value)));
    let by_d = apparent_d.map(|d| format!("a D of {} with mixing as planned", significant(d)));
    let ways = match (by_e, by_d) {
        (Some(e), Some(d)) => format!("{e}, or {d}"),
        (Some(one), None) | (None, Some(one)) => one,
        (None, None) => return format!("{plan} Neither mixing nor K alone explains the difference: look for losses."),
    };
    format!(
        "{plan} The isolate would be explained by {ways}; one total cannot tell these apart, nor from losses on the way. \
         Assay the raffinate, or shake a small portion to equilibrium."
    )
}

fn about(fraction: f64) -> String {
    let p = percent(fraction);
    if p.starts_with("more") {
        "More than 99.9 %".to_owned()
    } else if p.starts_with("less") {
        "Less than 0.000001 %".to_owned()
    } else {
        format!("About {p}")
    }
}

fn span(i: &Interval) -> String {
    if i.low == i.high {
        return "no uncertainty stated".to_owned();
    }
    let digits = |x: f64| percent(x).trim_end_matches(" %").to_owned();
    format!("{} to {}", digits(i.low), percent(i.high))
}

/// Two significant figures, plain.
fn significant(x: f64) -> String {
    if x == 0.0 || !x.is_finite() {
        return format!("{x}");
    }
    let magnitude = crate::math::log10(x.abs()).floor() as i32;
    match magnitude {
        -4..=1 => format!("{x:.0$}", (1 - magnitude) as usize),
        2..=4 => {
            let unit = crate::math::exp10(f64::from(magnitude - 1));
            format!("{:.0}", (x / unit).round() * unit)
        }
        _ => format!("{x:.1e}"),
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn two_figures() {
        for (x, text) in [
            (0.106_9, "0.11"),
            (0.38, "0.38"),
            (0.001_234, "0.0012"),
            (9.47, "9.5"),
            (46.11, "46"),
            (1060.4, "1100"),
            (1.234e-6, "1.2e-6"),
            (0.0, "0"),
        ] {
            assert_eq!(significant(x), text);
        }
    }
}
