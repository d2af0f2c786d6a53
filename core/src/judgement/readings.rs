//! Readings of a disputed constant: what each would mean for this liquid, and whether it matters.

use crate::chain::{Chain, kind_words, percent, to_hundredths};
use crate::judgement::uncertainty::interval;
use crate::partition::distribution::{distribution_ratio, partition_at};
use crate::plan::{Interval, Verdict};
use crate::solution::ionisation::{Constant, constant_of, constants_of, speciate};
use crate::study::{Ingredient, MeantAs, Quantity, Study};
use serde::Serialize;

/// Every reading side by side.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct ReadingsReport {
    /// One row per reading; an unstated one gives three.
    pub rows: Vec<ReadingRow>,
    /// Whether the readings lead to different verdicts.
    pub decision_changes: bool,
    /// Whether it matters, and which readings would change the decision, in a sentence.
    pub sentence: String,
}

/// One reading and what it would mean.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct ReadingRow {
    /// Index in the study's list of readings.
    pub reading: usize,
    /// The number as printed.
    pub printed: f64,
    /// How it is taken here.
    pub meant_as: &'static str,
    /// Whether the source says so, or all ways are tried.
    pub stated: bool,
    /// The pKa it amounts to.
    pub pka: f64,
    /// `acid` or `conjugate acid of a base`.
    pub kind: &'static str,
    /// Where it was published.
    pub source: String,
    /// Whether the plan uses it.
    pub in_use: bool,
    /// Fraction with net charge 0 at the liquor's pH.
    pub fraction_neutral: f64,
    /// Distribution ratio at the liquor's pH.
    pub d: f64,
    /// Planned removal.
    pub planned_removal: Interval,
    /// Verdict against the goal.
    pub verdict: Verdict,
}

/// One way a published value may be meant, as a constant at the liquid's temperature.
#[derive(Clone, Debug, PartialEq)]
pub(crate) struct Way {
    pub reading: usize,
    pub printed: f64,
    pub meant_as: MeantAs,
    pub stated: bool,
    pub constant: Constant,
    pub u: f64,
    pub source: String,
    pub in_use: bool,
}

impl Way {
    /// e.g. "10.4 as a pKb".
    pub fn label(&self) -> String {
        format!("{} as {}", self.printed, words(self.meant_as))
    }
}

/// The way a value is taken, in words.
fn words(meant_as: MeantAs) -> &'static str {
    match meant_as {
        MeantAs::Acid => "an acid",
        MeantAs::ConjugateAcidOfBase => "the conjugate acid of a base",
        MeantAs::PkbWrittenAsPka => "a pKb written as a pKa",
        MeantAs::Unstated => "not stated",
    }
}

/// Every way the disputed constant of `ingredient` may be meant at `t` [°C].
pub(crate) fn ways(ingredient: &Ingredient, t: f64) -> Vec<Way> {
    const ALL: [MeantAs; 3] = [MeantAs::Acid, MeantAs::ConjugateAcidOfBase, MeantAs::PkbWrittenAsPka];
    let Some(disputed) = &ingredient.disputed else { return Vec::new() };
    let mut ways = Vec::new();
    for (i, r) in disputed.readings.iter().enumerate() {
        let stated = r.meant_as != MeantAs::Unstated;
        let one = [r.meant_as];
        for &meant_as in if stated { &one[..] } else { &ALL[..] } {
            if let Some(constant) = constant_of(r.value.value, meant_as, t) {
                ways.push(Way {
                    reading: i,
                    printed: r.value.value,
                    meant_as,
                    stated,
                    constant,
                    u: r.value.standard_uncertainty(),
                    source: r.value.source.clone(),
                    in_use: stated && i == disputed.in_use,
                });
            }
        }
    }
    ways
}

/// What each reading of the target's disputed constant would mean, or nothing if it is undisputed.
///
/// For each reading: fraction neutral and D at the liquor's pH, the planned removal with the
/// uncertainties of K and of the reading itself, and a verdict against the goal.
pub(crate) fn report(study: &Study, chain: &Chain) -> Option<ReadingsReport> {
    let target = study.target()?;
    let t = study.feed.temperature_c.value;
    let ways = ways(target, t);
    if ways.is_empty() {
        return None;
    }
    let goal = study.goal.removal_fraction.value;
    let entry = study.partition_of(&target.name);
    let k = partition_at(entry, t);
    let rel_u_k = entry.map_or(0.0, |p| relative_u(&p.k_neutral));
    let rows: Vec<ReadingRow> = ways
        .iter()
        .map(|way| {
            let mut constants = constants_of(&target.sites, t);
            constants.push(way.constant);
            let s = speciate(&constants, chain.ph);
            let d = distribution_ratio(k, &constants, chain.ph);
            let value = chain.removal_with_d(study, d);
            let u = reading_u(study, chain, &constants, d, value, rel_u_k, way.u);
            let planned_removal = interval(value, u, 0.0, 1.0, "1");
            let verdict = Verdict::of(&planned_removal, goal);
            ReadingRow {
                reading: way.reading,
                printed: way.printed,
                meant_as: words(way.meant_as),
                stated: way.stated,
                pka: way.constant.pka,
                kind: kind_words(way.constant.kind),
                source: way.source.clone(),
                in_use: way.in_use,
                fraction_neutral: s.neutral,
                d,
                planned_removal,
                verdict,
            }
        })
        .collect();
    let sentence = sentence(&target.name, to_hundredths(chain.ph), goal, &rows);
    let decision_changes = rows.iter().any(|r| r.verdict != rows[0].verdict);
    Some(ReadingsReport { rows, decision_changes, sentence })
}

fn relative_u(q: &Quantity) -> f64 {
    if q.value > 0.0 { q.standard_uncertainty() / q.value } else { 0.0 }
}

/// Standard uncertainty of the removal from that of K and of the reading, by differences.
fn reading_u(
    study: &Study,
    chain: &Chain,
    constants: &[Constant],
    d: f64,
    value: f64,
    rel_u_k: f64,
    u_pka: f64,
) -> f64 {
    const STEP: f64 = 1e-3;
    let by_k = (chain.removal_with_d(study, d * (1.0 + STEP * rel_u_k)) - value) / STEP;
    let mut shifted = constants.to_vec();
    let by_pka = match shifted.last_mut() {
        Some(last) if u_pka > 0.0 => {
            last.pka += STEP * u_pka;
            let t = study.feed.temperature_c.value;
            let k = partition_at(study.partition_of(&study.feed.target), t);
            (chain.removal_with_d(study, distribution_ratio(k, &shifted, chain.ph)) - value) / STEP
        }
        _ => 0.0,
    };
    let u = (by_k * by_k + by_pka * by_pka).sqrt();
    if u.is_finite() { u } else { 0.0 }
}

/// Whether the disagreement matters for this liquid, and which readings change the decision.
fn sentence(name: &str, ph: f64, goal: f64, rows: &[ReadingRow]) -> String {
    let list = |v: Verdict| -> Vec<String> {
        rows.iter().filter(|r| r.verdict == v).map(|r| format!("{} as {}", r.printed, r.meant_as)).collect()
    };
    let all_same = rows.iter().all(|r| r.verdict == rows[0].verdict);
    let goal = percent(goal);
    if all_same {
        let (low, high) =
            rows.iter().fold((1.0_f64, 0.0_f64), |(l, h), r| (l.min(r.fraction_neutral), h.max(r.fraction_neutral)));
        let neutral = if high - low < 0.005 { percent(low) } else { format!("{} to {}", percent(low), percent(high)) };
        let outcome = match rows[0].verdict {
            Verdict::Reaches => format!("every one reaches the goal of {goal}"),
            Verdict::FallsShort => format!("not one reaches the goal of {goal}"),
            Verdict::Borderline => format!("every one is borderline at the goal of {goal}"),
        };
        return format!(
            "The disagreement does not matter for this liquid: at pH {ph} the readings leave {neutral} of {name} neutral, and {outcome}."
        );
    }
    let parts: Vec<String> = [
        (Verdict::Reaches, "reach the goal"),
        (Verdict::Borderline, "are borderline"),
        (Verdict::FallsShort, "fall short"),
    ]
    .into_iter()
    .filter_map(|(v, words)| {
        let l = list(v);
        let words = if l.len() == 1 { one_of(v) } else { words };
        (!l.is_empty()).then(|| format!("{} {words}", join(&l)))
    })
    .collect();
    let changing: Vec<String> = match rows.iter().find(|r| r.in_use) {
        Some(used) => rows
            .iter()
            .filter(|r| r.verdict != used.verdict)
            .map(|r| format!("{} as {}", r.printed, r.meant_as))
            .collect(),
        None => Vec::new(),
    };
    let last = if changing.is_empty() {
        String::new()
    } else {
        format!(
            " Against the reading the plan uses, the decision would change with {}: settle that first.",
            join(&changing)
        )
    };
    format!("The disagreement matters at pH {ph}: {}.{last}", parts.join("; "))
}

fn one_of(v: Verdict) -> &'static str {
    match v {
        Verdict::Reaches => "reaches the goal",
        Verdict::Borderline => "is borderline",
        Verdict::FallsShort => "falls short",
    }
}

fn join(list: &[String]) -> String {
    match list {
        [] => String::new(),
        [one] => one.clone(),
        [head @ .., last] => format!("{} and {last}", head.join(", ")),
    }
}
