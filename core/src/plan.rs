//! The whole chain: a [`Study`] in, a [`Plan`] out, in the words of the flow.

use crate::chain::{Chain, to_hundredths};
use crate::judgement::balance::Balance;
use crate::judgement::explain;
use crate::judgement::readings::{self, ReadingsReport};
use crate::judgement::spill::{SpillPlan, spill};
use crate::judgement::uncertainty::{Propagated, interval, propagate};
use crate::math;
use crate::order::put_in_order;
use crate::outcome::{Notice, Outcome};
use crate::partition::distribution::{distribution_ratio, partition_at};
use crate::process::acidity::Acidity;
use crate::process::carbonate::Recarbonation;
use crate::process::concentrate::Liquor;
use crate::process::isolate::{self, IsolateResult};
use crate::process::make_up::MakeUpPlan;
use crate::process::portions::StageRow;
use crate::process::settle::{Settling, settling};
use crate::process::strip_plan::StripPlan;
use crate::solution::dose::Dose;
use crate::solution::ionisation::{Constant, constants_in_use, constants_of, speciate};
use crate::study::{Problem, Study, check, words_of};
use serde::Serialize;

/// A number with its interval: about 95 % (coverage factor 2), held within what is possible.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct Interval {
    /// Best value.
    pub value: f64,
    /// Lower end.
    pub low: f64,
    /// Upper end.
    pub high: f64,
    /// Unit, UCUM where there is one; "1" for a fraction.
    pub unit: &'static str,
}

/// The figures that answer the question.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct Headline {
    /// Planned fraction of the target taken out.
    pub removal_fraction: Interval,
    /// Solvent used in all.
    pub solvent_total_ml: Interval,
    /// Volume that restores the strength of what is left.
    pub make_up_volume_ml: Interval,
    /// Largest relative mass-balance residual of any ingredient.
    pub balance_residual: Interval,
    /// Fraction in fact taken out, by the isolate, once it has been weighed.
    #[serde(skip_serializing_if = "Option::is_none")]
    pub removal_fraction_found: Option<Interval>,
    /// Stage efficiency that would explain what was found.
    #[serde(skip_serializing_if = "Option::is_none")]
    pub apparent_stage_efficiency: Option<Interval>,
}

/// One protonation state.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct StateShare {
    /// Net charge.
    pub charge: i32,
    /// Fraction of the ingredient in this state.
    pub fraction: f64,
}

/// One ingredient in the liquor and how it parts.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct IngredientRow {
    /// Name.
    pub name: String,
    /// Whether it is the ingredient to remove.
    pub is_target: bool,
    /// pKa values in use at the temperature, rising, with "acid" or "conjugate acid of a base".
    pub pka: Vec<(f64, &'static str)>,
    /// Protonation states from the most protonated to the least.
    pub states: Vec<StateShare>,
    /// Fraction with net charge 0.
    pub fraction_neutral: f64,
    /// Whether the net-neutral form is mostly a zwitterion, which hardly enters a solvent.
    pub zwitterion: bool,
    /// K of the neutral form at the temperature [-].
    pub k_neutral: f64,
    /// K of the ionised forms as ion pairs at the temperature [-].
    pub k_ion_pair: f64,
    /// Distribution ratio D at the liquor's pH [-].
    pub d: f64,
    /// Amount in the feed [mg].
    pub feed_mg: f64,
    /// Amount in the raffinate after the last stage [mg], with what the solvent left behind holds.
    pub raffinate_mg: f64,
    /// Fraction taken out of the liquor by the solvent.
    pub removed_fraction: f64,
    /// Concentration after make-up relative to the feed [-].
    pub strength_after_make_up: f64,
}

/// One level of the picture of the liquid.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct Level {
    /// Step of the flow: `feed`, `liquor`, `portion 1`…, `raffinate`, `made up`.
    pub step: String,
    /// Volume of the liquid then [mL].
    pub volume_ml: f64,
    /// Target in it [mg].
    pub target_mg: f64,
    /// Soluble solids [°Brix], if the feed's are known.
    pub brix: Option<f64>,
    /// Solvent left with it [mL].
    pub solvent_ml: f64,
    /// What left at this step, in words, e.g. "water 400 mL", "extract 30.0 mL"; empty if nothing.
    pub leaves: String,
}

/// Answers to the questions asked the other way round.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct Inverse {
    /// D of the target used [-].
    pub d: f64,
    /// Equal portions of the mean size needed for the goal; none if it cannot be reached so.
    pub portions_needed: Option<u32>,
    /// Size of those portions [mL].
    pub portion_ml: f64,
    /// Volume of one single portion that would reach the goal [mL]; none if no volume does.
    pub single_portion_ml: Option<f64>,
    /// Total solvent for the goal in the present number of equal portions [mL]; none if none does.
    pub total_in_equal_portions_ml: Option<f64>,
    /// Counter-current stages needed with the present total of solvent; none if none suffice.
    pub counter_current_stages: Option<f64>,
    /// pH at which the present scheme would reach the goal, nearest to the liquor's own; none if no
    /// pH from −2 to 16 does, or if it is reached already.
    pub ph_needed: Option<f64>,
    /// Acid or base that would bring the liquor there, and what would stay behind.
    pub ph_dose: Option<Dose>,
}

/// The verdict in words and what stands behind it.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct Answer {
    /// A sentence a manager could read.
    pub sentence: String,
    /// What the limit is and what would have to change, or plan beside isolate; may be empty.
    pub detail: String,
    /// Whether the plan reaches the goal.
    pub verdict: Verdict,
}

/// Whether the goal is reached.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Serialize)]
#[serde(rename_all = "snake_case")]
pub enum Verdict {
    /// The whole interval is at or above the goal.
    Reaches,
    /// The goal lies inside the interval.
    Borderline,
    /// The whole interval is below the goal.
    FallsShort,
}

impl Verdict {
    /// The verdict on `interval` against `goal`, both fractions [-].
    pub fn of(interval: &Interval, goal: f64) -> Self {
        if interval.low >= goal {
            Self::Reaches
        } else if interval.high < goal {
            Self::FallsShort
        } else {
            Self::Borderline
        }
    }

    /// In words, for a table.
    pub fn words(self) -> &'static str {
        match self {
            Self::Reaches => "reaches the goal",
            Self::Borderline => "borderline",
            Self::FallsShort => "falls short",
        }
    }
}

/// How much one input contributes to the uncertainty of the planned removal.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct Contribution {
    /// Path of the input in the file.
    pub at: String,
    /// What it is, in words.
    pub what: String,
    /// Its standard uncertainty, in its own unit.
    pub standard_uncertainty: f64,
    /// Its share of the variance of the planned removal, 0 to 1.
    pub share_of_variance: f64,
}

/// Everything the plan says.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct Plan {
    /// The figures that answer the question; first in the JSON.
    pub headline: Headline,
    /// The answer in words.
    pub answer: Answer,
    /// Least removal asked for, a fraction.
    pub goal_fraction: f64,
    /// pH at which the extraction happens.
    pub extraction_ph: f64,
    /// pH of feed and liquor and where each comes from.
    pub acidity: Acidity,
    /// The liquor after concentrating.
    pub liquor: Liquor,
    /// Each ingredient, target first.
    pub ingredients: Vec<IngredientRow>,
    /// Readings of the target's disputed constant.
    #[serde(skip_serializing_if = "Option::is_none")]
    pub readings: Option<ReadingsReport>,
    /// Removal by stage, for every ingredient.
    pub stages: Vec<StageRow>,
    /// The liquid step by step.
    pub levels: Vec<Level>,
    /// Portions, volume or pH needed for the goal.
    pub inverse: Inverse,
    /// What the isolate says, beside the plan.
    #[serde(skip_serializing_if = "Option::is_none")]
    pub isolate: Option<IsolateResult>,
    /// Bringing the raffinate to strength.
    pub make_up: MakeUpPlan,
    /// Carbon dioxide to give back; none if the feed states none.
    #[serde(skip_serializing_if = "Option::is_none")]
    pub recarbonation: Option<Recarbonation>,
    /// Layers and settling; none while the density of the solvent or the soluble solids are not
    /// known.
    #[serde(skip_serializing_if = "Option::is_none")]
    pub settling: Option<Settling>,
    /// Air of the room after a spill; none for a solvent that the library does not hold.
    #[serde(skip_serializing_if = "Option::is_none")]
    pub spill: Option<SpillPlan>,
    /// Stripping; none for a solvent that the library does not hold.
    #[serde(skip_serializing_if = "Option::is_none")]
    pub strip: Option<StripPlan>,
    /// Every ingredient in every stream.
    pub balance: Balance,
    /// What the uncertainty of the planned removal is made of, largest first.
    pub contributions: Vec<Contribution>,
}

/// Curves against pH for the target.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct Curves {
    /// pH of each point.
    pub ph: Vec<f64>,
    /// Fraction of each protonation state at each pH, from the most protonated.
    pub states: Vec<StateCurve>,
    /// log D at each pH: the plan's constant first, then each other reading.
    pub log_d: Vec<LogDCurve>,
}

/// One protonation state against pH.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct StateCurve {
    /// Net charge.
    pub charge: i32,
    /// Fraction at each pH.
    pub fraction: Vec<f64>,
}

/// log D against pH by one reading.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct LogDCurve {
    /// e.g. "0.6, conjugate acid of a base".
    pub label: String,
    /// Whether the plan uses it.
    pub in_use: bool,
    /// log10 D at each pH.
    pub log_d: Vec<f64>,
}

/// Runs `study` through the chain.
///
/// # Errors
/// Every reason why there is no honest number, each at its field.
///
/// # Example: a study with one portion
/// ```
/// let text = r#"{"unstir_study": 1, "name": "one portion", "goal": {"removal_fraction": 0.5},
///   "feed": {"volume_ml": 50, "ph": 7, "temperature_c": 25, "target": "a",
///            "ingredients": [{"name": "a", "amount": {"mass_mg": 10}}]},
///   "solvent": {"id": "own", "name": "own solvent"},
///   "partition": [{"ingredient": "a", "solvent": "own", "k_neutral": 5}],
///   "extraction": {"scheme": {"cross_current": {"portions": [{"volume_ml": 15}]}},
///                  "stage_efficiency": 1}}"#;
/// let study = unstir_core::study::parse(text).unwrap();
/// let plan = unstir_core::plan::plan(&study).unwrap().value;
/// assert!((plan.headline.removal_fraction.value - 0.6).abs() < 1e-12);
/// ```
pub fn plan(study: &Study) -> Result<Outcome<Plan>, Vec<Problem>> {
    let problems = check(study);
    if !problems.is_empty() {
        return Err(problems);
    }
    let chain = Chain::run(study).map_err(|p| vec![p])?;
    let spread = propagate(study, &|s| Chain::run_near(s, study, &chain).ok().map(|c| c.outputs(s)))
        .unwrap_or(Propagated { values: chain.outputs(study), u: vec![0.0; OUTPUTS], components: Vec::new() });
    let mut notices = chain.notices(study);
    let headline = headline(study, &chain, &spread);
    if headline.removal_fraction.value + 2.0 * spread.u[REMOVAL] > 1.0 {
        notices.push(Notice::new(
            "headline.removal_fraction",
            "The linear interval of the planned removal passes 100 % and is cut there; treat its upper end as “nearly all”.",
        ));
    }
    let readings = readings::report(study, &chain);
    let inverse = chain.inverse(study);
    let isolate = isolate_result(study, &chain, &spread, &headline);
    let goal = study.goal.removal_fraction.value;
    let contributions = contributions(study, &spread);
    let answer = explain::answer(&explain::Facts {
        contributions: &contributions,
        goal,
        planned: &headline.removal_fraction,
        target: &chain.rows[chain.target],
        ph: to_hundredths(chain.ph),
        readings: readings.as_ref(),
        inverse: &inverse,
        isolate: isolate.as_ref(),
    });
    let plan = Plan {
        answer,
        goal_fraction: goal,
        extraction_ph: chain.ph,
        acidity: chain.acidity.clone(),
        liquor: chain.liquor.clone(),
        ingredients: chain.rows.clone(),
        readings,
        stages: chain.stages.rows.clone(),
        levels: chain.levels(study),
        inverse,
        isolate,
        recarbonation: chain.recarbonation(study),
        settling: settling(study, chain.liquor.brix),
        spill: spill(study, headline.solvent_total_ml.value),
        strip: chain.strip(study),
        make_up: chain.make_up(study),
        balance: chain.balance.clone(),
        contributions,
        headline,
    };
    Ok(Outcome { value: plan, notices })
}

// Outputs propagated together; one run of the chain gives all.
const REMOVAL: usize = 0;
const SOLVENT: usize = 1;
const MAKE_UP: usize = 2;
const ANHYDROUS: usize = 3;
const FOUND: usize = 4;
const APPARENT_E: usize = 5;
const OUTPUTS: usize = 6;

fn headline(study: &Study, chain: &Chain, spread: &Propagated) -> Headline {
    let v = &spread.values;
    let of = |i: usize, least: f64, most: f64, unit| interval(v[i], spread.u[i], least, most, unit);
    let exact = |value, unit| Interval { value, low: value, high: value, unit };
    let weighed = study.isolate.is_some();
    Headline {
        removal_fraction: of(REMOVAL, 0.0, 1.0, "1"),
        solvent_total_ml: of(SOLVENT, 0.0, f64::INFINITY, "mL"),
        make_up_volume_ml: of(MAKE_UP, 0.0, f64::INFINITY, "mL"),
        balance_residual: exact(chain.balance.worst_residual, "1"),
        removal_fraction_found: weighed.then(|| of(FOUND, 0.0, f64::INFINITY, "1")),
        apparent_stage_efficiency: (weighed && v[APPARENT_E].is_finite()).then(|| of(APPARENT_E, 0.0, 1.0, "1")),
    }
}

fn isolate_result(study: &Study, chain: &Chain, spread: &Propagated, headline: &Headline) -> Option<IsolateResult> {
    let isolate = study.isolate.as_ref()?;
    let molar_mass = study.target()?.molar_mass_g_per_mol.as_ref().map(|q| q.value);
    let n = isolate.hydrate_waters.value;
    let found = headline.removal_fraction_found.clone()?;
    let apparent_d = chain.apparent_d(study, spread.values[ANHYDROUS]);
    let sentence = explain::plan_against_isolate(
        &headline.removal_fraction,
        &found,
        headline.apparent_stage_efficiency.as_ref(),
        apparent_d,
    );
    Some(IsolateResult {
        crude_mg: isolate.crude_mass_mg.value,
        anhydrous_mg: interval(spread.values[ANHYDROUS], spread.u[ANHYDROUS], 0.0, f64::INFINITY, "mg"),
        hydrate_factor: molar_mass.map_or(1.0, |m| isolate::hydrate_factor(m, n)),
        charged_mg: chain.charged_mg[chain.target],
        planned_mg: chain.extracted_mg(chain.target),
        planned_removal: headline.removal_fraction.clone(),
        found_removal: found,
        apparent_efficiency: headline.apparent_stage_efficiency.clone(),
        apparent_d,
        sentence,
    })
}

fn contributions(study: &Study, spread: &Propagated) -> Vec<Contribution> {
    let variance = spread.u[REMOVAL] * spread.u[REMOVAL];
    if !(variance > 0.0) {
        return Vec::new();
    }
    let mut list: Vec<Contribution> = spread
        .components
        .iter()
        .map(|c| Contribution {
            at: c.at.clone(),
            what: words_of(study, &c.at),
            standard_uncertainty: c.u,
            share_of_variance: c.effect[REMOVAL] * c.effect[REMOVAL] / variance,
        })
        .filter(|c| c.share_of_variance > 1e-6)
        .collect();
    put_in_order(&mut list, |a, b| b.share_of_variance.total_cmp(&a.share_of_variance));
    list
}

/// Curves against pH from `low` to `high` in `points` points for the target of `study`.
///
/// # Errors
/// As [`plan`].
pub fn curves(study: &Study, low: f64, high: f64, points: usize) -> Result<Curves, Vec<Problem>> {
    let problems = check(study);
    let Some(target) = study.target().filter(|_| problems.is_empty()) else {
        return Err(problems);
    };
    let t = study.feed.temperature_c.value;
    let k = partition_at(study.partition_of(&target.name), t);
    let last = points.max(2) - 1;
    let ph: Vec<f64> = (0..=last).map(|i| low + (high - low) * i as f64 / last as f64).collect();
    let log_d = |constants: &[Constant]| -> Vec<f64> {
        ph.iter().map(|&p| math::log10(distribution_ratio(k, constants, p).max(1e-300))).collect()
    };
    let in_use = constants_in_use(target, t);
    let mut states: Vec<StateCurve> = speciate(&in_use, low)
        .charges
        .iter()
        .map(|&charge| StateCurve { charge, fraction: Vec::with_capacity(ph.len()) })
        .collect();
    for &p in &ph {
        for (state, f) in states.iter_mut().zip(speciate(&in_use, p).fractions) {
            state.fraction.push(f);
        }
    }
    let mut curves = vec![LogDCurve { label: "as planned".to_owned(), in_use: true, log_d: log_d(&in_use) }];
    if target.disputed.is_some() {
        curves.clear();
        for way in readings::ways(target, t) {
            let mut constants = constants_of(&target.sites, t);
            constants.push(way.constant);
            curves.push(LogDCurve { label: way.label(), in_use: way.in_use, log_d: log_d(&constants) });
        }
        put_in_order(&mut curves, |a, b| b.in_use.cmp(&a.in_use));
    }
    Ok(Curves { ph, states, log_d: curves })
}
