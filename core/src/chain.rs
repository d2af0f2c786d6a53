//! One pass of a study down the flow, without uncertainty: what [`crate::plan`] runs once for the
//! plan and again for each shifted input.

use crate::judgement::balance::Balance;
use crate::math;
use crate::order::put_in_order;
use crate::outcome::Notice;
use crate::partition::distribution::{distribution_ratio, partition_at};
use crate::plan::{IngredientRow, Inverse, Level, StateShare};
use crate::process::acidity::{self, Acidity};
use crate::process::carbonate::{self, Recarbonation};
use crate::process::concentrate::{self, Liquor};
use crate::process::make_up::{self, LossRow, MadeUp, MakeUpPlan};
use crate::process::portions::{self, PortionIn, StageRow, StagesIn, StagesOut, removed, solve_rising};
use crate::process::settle::{PARTS_G_PER_ML, settling};
use crate::process::strip_plan::{self, StripPlan};
use crate::process::{counter_current, isolate};
use crate::solution::dose::{self, Buffer, Dose};
use crate::solution::ionisation::{Constant, constants_in_use, speciate};
use crate::study::{ConcentrateTo, LossPlace, Problem, Scheme, SiteKind, Study};

/// Slices in which continuous extraction is shown.
const CONTINUOUS_SLICES: usize = 10;

/// Most portions looked for when asked how many the goal takes.
const MOST_PORTIONS: usize = 200;
/// Largest portion looked for when asked how much the goal takes [mL].
const LARGEST_PORTION_ML: f64 = 1e6;

/// Everything one pass computes.
pub(crate) struct Chain {
    pub liquor: Liquor,
    pub acidity: Acidity,
    pub ph: f64,
    /// Index of the target among the ingredients.
    pub target: usize,
    pub rows: Vec<IngredientRow>,
    pub stages: StagesOut,
    pub charged_ml: f64,
    pub charged_mg: Vec<f64>,
    pub balance: Balance,
    losses: Vec<LossRow>,
    raffinate_ml: f64,
    make_up_ml: f64,
    retained: f64,
    constants: Vec<Vec<Constant>>,
}

/// Fraction left after all of `rows` one after another.
fn left_after(rows: &[(usize, f64, f64)]) -> f64 {
    rows.iter().fold(1.0, |left, (_, _, f)| left * (1.0 - f))
}

impl Chain {
    /// Runs `study`, which has passed [`crate::study::check`] or is within a step of one that has.
    pub fn run(study: &Study) -> Result<Self, Problem> {
        Self::run_with(study, None)
    }

    /// Runs `study`, which is `of` with other numbers; what has not changed is not worked out anew.
    pub fn run_near(study: &Study, of: &Study, chain: &Self) -> Result<Self, Problem> {
        let same = study.feed == of.feed && study.concentrate == of.concentrate && study.losses == of.losses;
        Self::run_with(study, same.then_some(&chain.acidity))
    }

    fn run_with(study: &Study, acidity_known: Option<&Acidity>) -> Result<Self, Problem> {
        let t = study.feed.temperature_c.value;
        let ingredients = &study.feed.ingredients;
        let target = ingredients.iter().position(|i| i.name == study.feed.target).ok_or_else(|| {
            Problem::new("feed.target", "the target is not among the ingredients; choose one that is")
        })?;

        // Feed, losses of feed, water off, losses of liquor.
        let v0 = study.feed.volume_ml.value;
        let at_feed = make_up::losses_at(&study.losses, LossPlace::Feed, v0)?;
        let kept_feed = left_after(&at_feed);
        let liquor = concentrate::liquor(study, v0 * kept_feed)?;
        let at_liquor = make_up::losses_at(&study.losses, LossPlace::Liquor, liquor.volume_ml)?;
        let kept_liquor = left_after(&at_liquor);
        let charged_ml = liquor.volume_ml * kept_liquor;
        let start_mg: Vec<f64> = ingredients.iter().map(|i| i.amount.mg_in(v0)).collect();
        let charged_mg: Vec<f64> = start_mg.iter().map(|m| m * kept_feed * kept_liquor).collect();

        // Ionisation and distribution at the liquor's own pH.
        let acidity = match acidity_known {
            Some(known) => known.clone(),
            None => acidity::acidity(study, &liquor)?,
        };
        let ph = acidity.liquor_ph;
        let constants: Vec<Vec<Constant>> = ingredients.iter().map(|i| constants_in_use(i, t)).collect();
        let d: Vec<f64> = ingredients
            .iter()
            .zip(&constants)
            .map(|(i, c)| distribution_ratio(partition_at(study.partition_of(&i.name), t), c, ph))
            .collect();

        // Portions.
        let stages = extract(study, charged_ml, &charged_mg, &d, None)?;

        // Losses of raffinate, make-up.
        let at_raffinate = make_up::losses_at(&study.losses, LossPlace::Raffinate, stages.liquor_ml)?;
        let kept_raffinate = left_after(&at_raffinate);
        let raffinate_ml = stages.liquor_ml * kept_raffinate;
        let kept_stages = stages.liquor_ml / charged_ml;
        let retained = kept_feed * kept_liquor * kept_stages * kept_raffinate;
        let make_up_ml = make_up::make_up_volume(v0, [1.0 - retained]);

        let final_ml = study.make_up.made_up_to_ml.as_ref().map_or(make_up_ml, |q| q.value);
        let mut rows = Vec::with_capacity(ingredients.len());
        for (i, ing) in ingredients.iter().enumerate() {
            let k = partition_at(study.partition_of(&ing.name), t);
            let s = speciate(&constants[i], ph);
            let mut pka: Vec<(f64, &'static str)> = constants[i].iter().map(|c| (c.pka, kind_words(c.kind))).collect();
            put_in_order(&mut pka, |a, b| a.0.total_cmp(&b.0));
            let end_mg = stages.raffinate_mg[i] * kept_raffinate;
            let strength = if start_mg[i] > 0.0 { (end_mg / final_ml) / (start_mg[i] / v0) } else { 0.0 };
            rows.push(IngredientRow {
                name: ing.name.clone(),
                is_target: i == target,
                pka,
                states: s
                    .charges
                    .iter()
                    .zip(&s.fractions)
                    .map(|(&charge, &fraction)| StateShare { charge, fraction })
                    .collect(),
                fraction_neutral: s.neutral,
                zwitterion: s.zwitterion,
                k_neutral: k.k_neutral,
                k_ion_pair: k.k_ion_pair,
                d: d[i],
                feed_mg: start_mg[i],
                raffinate_mg: stages.raffinate_mg[i],
                removed_fraction: removed(charged_mg[i], stages.raffinate_mg[i], charged_ml, stages.liquor_ml),
                strength_after_make_up: strength,
            });
        }

        let balance = balance(study, &start_mg, &charged_mg, kept_feed, kept_liquor, kept_raffinate, &stages);
        let losses = ledger(study, [&at_feed, &at_liquor, &at_raffinate], &stages, charged_ml, v0);
        Ok(Self {
            liquor,
            acidity,
            ph,
            target,
            rows,
            stages,
            charged_ml,
            charged_mg,
            balance,
            losses,
            raffinate_ml,
            make_up_ml,
            retained,
            constants,
        })
    }

    /// The outputs whose uncertainty is propagated, in the order [`crate::plan`] names them.
    pub fn outputs(&self, study: &Study) -> Vec<f64> {
        let removal = self.rows[self.target].removed_fraction;
        let solvent = solvent_total(study);
        let molar_mass = study.target().and_then(|t| t.molar_mass_g_per_mol.as_ref()).map(|q| q.value);
        let anhydrous =
            study.isolate.as_ref().and_then(|i| isolate::anhydrous_mg(i, molar_mass).ok()).unwrap_or(f64::NAN);
        let entered = self.stages.entered_mg[self.target];
        let found = (anhydrous - entered) / self.charged_mg[self.target];
        let apparent = if anhydrous.is_finite() { self.apparent_e(study, anhydrous) } else { None };
        vec![removal, solvent, self.make_up_ml, anhydrous, found, apparent.unwrap_or(f64::NAN)]
    }

    /// Amount of ingredient `i` in all extracts [mg].
    pub fn extracted_mg(&self, i: usize) -> f64 {
        self.charged_mg[i] + self.stages.entered_mg[i] - self.stages.raffinate_mg[i]
    }

    /// Target in the extracts [mg] with another D or another stage efficiency for every portion.
    fn extracted_with(&self, study: &Study, d: Option<f64>, efficiency: Option<f64>) -> f64 {
        let i = self.target;
        let d = [d.unwrap_or(self.rows[i].d)];
        let charged = [self.charged_mg[i]];
        match extract_some(study, self.charged_ml, &charged, &d, &[entering(study, i)], efficiency) {
            Ok(out) => charged[0] + out.entered_mg[0] - out.raffinate_mg[0],
            Err(_) => f64::NAN,
        }
    }

    /// Stage efficiency, the same in every stage, that puts `mg` [mg] of target in the extracts.
    fn apparent_e(&self, study: &Study, mg: f64) -> Option<f64> {
        solve_rising(1e-9, 1.0, mg, &|e| self.extracted_with(study, None, Some(e)))
    }

    /// D that puts `mg` [mg] of target in the extracts with the stage efficiency as planned.
    pub fn apparent_d(&self, study: &Study, mg: f64) -> Option<f64> {
        solve_rising(1e-9, 1e9, mg, &|d| self.extracted_with(study, Some(d), None))
    }

    /// Fraction of each ingredient taken out [-] with each D replaced, solvent entering clean.
    pub fn removed_with(&self, study: &Study, d: &[f64]) -> Option<Vec<f64>> {
        let clean = vec![0.0; d.len()];
        let out = extract_some(study, self.charged_ml, &self.charged_mg, d, &clean, None).ok()?;
        let taken = |i: usize| removed(self.charged_mg[i], out.raffinate_mg[i], self.charged_ml, out.liquor_ml);
        Some((0..d.len()).map(taken).collect())
    }

    /// Constants of ingredient `i` in use at the temperature.
    pub fn constants_of(&self, i: usize) -> &[Constant] {
        &self.constants[i]
    }

    /// Removal of the target [-] with its D replaced by `d`.
    pub fn removal_with_d(&self, study: &Study, d: f64) -> f64 {
        let i = self.target;
        let charged = [self.charged_mg[i]];
        match extract_some(study, self.charged_ml, &charged, &[d], &[entering(study, i)], None) {
            Ok(out) => removed(charged[0], out.raffinate_mg[0], self.charged_ml, out.liquor_ml),
            Err(_) => f64::NAN,
        }
    }

    /// Portions, volume, stages or pH needed for the goal.
    pub fn inverse(&self, study: &Study) -> Inverse {
        let goal = study.goal.removal_fraction.value;
        let d = self.rows[self.target].d;
        let total = solvent_total(study);
        let n = match &study.extraction.scheme {
            Scheme::CrossCurrent { portions } => portions.len(),
            Scheme::CounterCurrent { stages, .. } => *stages as usize,
            Scheme::Continuous { .. } => 1,
        }
        .max(1);
        let portion_ml = total / n as f64;
        let portions_needed = self
            .in_equal_portions(study, MOST_PORTIONS, portion_ml)
            .iter()
            // The last digit must not cost a portion.
            .position(|r| r.removed_fraction[0] >= goal - 1e-12)
            .map(|i| i as u32 + 1);
        let volume_for = |n: usize| {
            solve_rising(1e-3, LARGEST_PORTION_ML, goal, &|v| {
                self.in_equal_portions(study, n, v).last().map_or(0.0, |r| r.removed_fraction[0])
            })
        };
        let single_portion_ml = volume_for(1);
        let total_in_equal_portions_ml = volume_for(n).map(|v| v * n as f64);
        let counter_current_stages =
            if goal < 1.0 { counter_current::stages_for(1.0 - goal, d * total / self.charged_ml) } else { None };
        let ph_needed = self.ph_needed(study, goal);
        Inverse {
            d,
            portions_needed,
            portion_ml,
            single_portion_ml,
            total_in_equal_portions_ml,
            counter_current_stages,
            ph_dose: ph_needed.map(|to| self.dose(study, to)),
            ph_needed,
        }
    }

    /// The target alone through `n` equal portions of `volume_ml` [mL], with the draining and the
    /// stage efficiency of the study.
    fn in_equal_portions(&self, study: &Study, n: usize, volume_ml: f64) -> Vec<StageRow> {
        let x = &study.extraction;
        let i = self.target;
        let feed = StagesIn {
            liquor_ml: self.charged_ml,
            liquor_mg: &[self.charged_mg[i]],
            d: &[self.rows[i].d],
            entering_mg_per_ml: &[entering(study, i)],
            left_behind_ml: x.organic_left_behind_ml.value,
            carried_out_ml: x.aqueous_carried_out_ml.value,
        };
        let portion = PortionIn { volume_ml, efficiency: x.stage_efficiency.value };
        portions::cross_current(&feed, &vec![portion; n]).rows
    }

    /// pH nearest to the liquor's own at which the scheme reaches `goal`; none if it does already
    /// or nowhere from −2 to 16.
    fn ph_needed(&self, study: &Study, goal: f64) -> Option<f64> {
        const STEP: f64 = 0.05;
        let t = study.feed.temperature_c.value;
        let k = partition_at(study.partition_of(&self.rows[self.target].name), t);
        let reaches = |ph: f64| {
            let d = distribution_ratio(k, &self.constants[self.target], ph);
            self.removal_with_d(study, d) >= goal
        };
        if reaches(self.ph) {
            return None;
        }
        for i in 1..=360 {
            for side in [1.0, -1.0] {
                let ph = self.ph + side * STEP * f64::from(i);
                if (-2.0..=16.0).contains(&ph) && reaches(ph) {
                    // Narrow the last step.
                    let (mut a, mut b) = (ph - side * STEP, ph);
                    for _ in 0..20 {
                        let m = 0.5 * (a + b);
                        if reaches(m) { b = m } else { a = m }
                    }
                    return Some(b);
                }
            }
        }
        None
    }

    /// Acid or base that brings the liquor to `to`.
    fn dose(&self, study: &Study, to: f64) -> Dose {
        let buffers: Vec<Buffer> = study
            .feed
            .ingredients
            .iter()
            .enumerate()
            .filter(|(i, _)| !self.constants[*i].is_empty())
            .filter_map(|(i, ing)| {
                let m = ing.molar_mass_g_per_mol.as_ref()?.value;
                Some(Buffer { mmol: self.charged_mg[i] / m, constants: self.constants[i].clone() })
            })
            .collect();
        dose::dose(self.charged_ml, &buffers, self.ph, to, study.feed.temperature_c.value)
    }

    /// Giving back carbon dioxide.
    pub fn recarbonation(&self, study: &Study) -> Option<Recarbonation> {
        let made_up = study.make_up.made_up_to_ml.as_ref().map_or(self.make_up_ml, |q| q.value);
        carbonate::recarbonation(study, made_up)
    }

    /// Stripping the raffinate.
    pub fn strip(&self, study: &Study) -> Option<StripPlan> {
        let made_up = study.make_up.made_up_to_ml.as_ref().map_or(self.make_up_ml, |q| q.value);
        strip_plan::strip(study, self.liquor.brix.unwrap_or(0.0), self.raffinate_ml, made_up)
    }

    /// Bringing the raffinate to strength.
    pub fn make_up(&self, study: &Study) -> MakeUpPlan {
        let done = study.make_up.made_up_to_ml.as_ref().map(|q| q.value);
        MakeUpPlan {
            volume_ml: self.make_up_ml,
            retained_fraction: self.retained,
            losses: self.losses.clone(),
            raffinate_ml: self.raffinate_ml,
            water_to_add_ml: self.make_up_ml - self.raffinate_ml,
            made_up: done.map(|v| MadeUp { volume_ml: v, strength: self.make_up_ml / v }),
            advice: make_up::advice(self.make_up_ml, self.raffinate_ml, done),
        }
    }

    /// The liquid step by step.
    pub fn levels(&self, study: &Study) -> Vec<Level> {
        let target = &self.rows[self.target];
        let mut levels = Vec::new();
        let mut add = |step: String, volume_ml, target_mg, brix, solvent_ml, leaves: String| {
            levels.push(Level { step, volume_ml, target_mg, brix, solvent_ml, leaves });
        };
        let lost = |place: &str| {
            let v: f64 = self.losses.iter().filter(|l| l.at == place).map(|l| l.volume_ml).sum();
            if v > 0.0 { format!("lost {v:.1} mL") } else { String::new() }
        };
        let v0 = study.feed.volume_ml.value;
        add("feed".into(), v0, target.feed_mg, self.liquor.feed_brix, 0.0, lost("feed"));
        if study.concentrate.to != ConcentrateTo::Unchanged {
            let mut leaves = format!("water {:.0} mL", self.liquor.water_removed_g / concentrate::WATER_DENSITY_20C);
            let more = lost("liquor");
            if !more.is_empty() {
                leaves = format!("{leaves}, {more}");
            }
            add("liquor".into(), self.charged_ml, self.charged_mg[self.target], self.liquor.brix, 0.0, leaves);
        }
        for row in &self.stages.rows {
            let leaves = if row.extract_ml > 0.0 { format!("extract {:.1} mL", row.extract_ml) } else { String::new() };
            add(
                stage_words(&study.extraction.scheme, row.stage),
                row.liquor_ml,
                row.raffinate_mg[self.target],
                self.liquor.brix,
                row.left_behind_ml,
                leaves,
            );
        }
        let end_mg = self.balance.rows[self.target].mg.last().copied().unwrap_or(0.0);
        add(
            "raffinate".into(),
            self.raffinate_ml,
            end_mg,
            self.liquor.brix,
            self.stages.left_behind_ml,
            lost("raffinate"),
        );
        let made_up = study.make_up.made_up_to_ml.as_ref().map_or(self.make_up_ml, |q| q.value);
        let brix = self.liquor.feed_brix.map(|b| b * self.make_up_ml / made_up);
        add("made up".into(), made_up, end_mg, brix, 0.0, String::new());
        levels
    }

    /// What the reader should know.
    pub fn notices(&self, study: &Study) -> Vec<Notice> {
        let mut notices = self.acidity.notices.clone();
        let mut say = |at: &str, text: String| notices.push(Notice::new(at, text));
        let t = study.feed.temperature_c.value;
        for (i, row) in self.rows.iter().enumerate() {
            let at = format!("feed.ingredients[{i}]");
            if row.zwitterion && row.fraction_neutral > 0.01 {
                say(
                    &format!("{at}.sites"),
                    format!(
                        "The net-neutral form of {} is a zwitterion: net-neutral is not the same as extractable, and K must have been measured for that form.",
                        row.name
                    ),
                );
            }
            match study.partition_of(&row.name) {
                None if row.feed_mg > 0.0 => say(
                    "partition",
                    format!(
                        "No K of {} in {} is given; the plan takes it to stay in the liquor entirely.",
                        row.name, study.solvent.name
                    ),
                ),
                Some(p) if p.transfer_enthalpy_kj_per_mol.is_none() && (p.k_temperature_c - t).abs() > 5.0 => say(
                    "partition",
                    format!(
                        "K of {} holds for {} °C but the extraction is at {t} °C and no enthalpy of transfer is given; it is used unchanged.",
                        row.name, p.k_temperature_c
                    ),
                ),
                _ => {}
            }
            if !row.is_target && row.removed_fraction > 0.05 {
                say(
                    &at,
                    format!(
                        "The solvent also takes {:.0} % of {}; making up to strength does not bring that back.",
                        100.0 * row.removed_fraction,
                        row.name
                    ),
                );
            }
        }
        let e = &study.extraction;
        if !matches!(e.scheme, Scheme::CrossCurrent { .. })
            && (e.organic_left_behind_ml.value > 0.0 || e.aqueous_carried_out_ml.value > 0.0)
        {
            say("extraction", "Solvent left behind and liquor carried out are counted for portions only; this scheme is planned with clean parting.".to_owned());
        }
        // Where nothing is known of the soluble solids the liquor counts as water.
        if let Some(s) = settling(study, Some(self.liquor.brix.unwrap_or(0.0))) {
            let gap = s.density_difference_g_per_ml.abs();
            if gap < PARTS_G_PER_ML {
                say(
                    "solvent",
                    format!(
                        "The layers differ by only {gap:.3} g/mL (liquor {:.3}): they may not part, or may change places.",
                        s.liquor_density_g_per_ml
                    ),
                );
            } else if s.changed_places {
                say(
                    "solvent",
                    "In this liquor the layers lie the other way round than in plain water: mark them before you drain."
                        .to_owned(),
                );
            }
            if let Some(times) = s.times_slower.filter(|t| *t > 10.0) {
                say(
                    "concentrate.to",
                    format!(
                        "Drops settle about {times:.0} times slower in this liquor than in plain water, and emulsions hold. Leaving more water in costs solvent and saves waiting."
                    ),
                );
            }
        }
        notices
    }
}

/// A site's kind in words.
pub(crate) fn kind_words(kind: SiteKind) -> &'static str {
    match kind {
        SiteKind::Acid => "acid",
        SiteKind::ConjugateAcidOfBase => "conjugate acid of a base",
    }
}

fn stage_words(scheme: &Scheme, stage: usize) -> String {
    match scheme {
        Scheme::CrossCurrent { .. } => format!("portion {stage}"),
        Scheme::CounterCurrent { .. } => format!("stage {stage}"),
        Scheme::Continuous { .. } => format!("part {stage}"),
    }
}

/// Solvent used in all [mL].
fn solvent_total(study: &Study) -> f64 {
    match &study.extraction.scheme {
        Scheme::CrossCurrent { portions } => portions.iter().map(|p| p.volume_ml.value).sum(),
        Scheme::CounterCurrent { solvent_ml, .. } | Scheme::Continuous { solvent_ml } => solvent_ml.value,
    }
}

/// Concentration of ingredient `i` in the entering solvent [mg/mL].
fn entering(study: &Study, i: usize) -> f64 {
    let name = &study.feed.ingredients[i].name;
    study.extraction.entering_solvent.iter().filter(|s| &s.ingredient == name).map(|s| s.mg_per_ml.value).sum()
}

fn extract(study: &Study, ml: f64, mg: &[f64], d: &[f64], efficiency: Option<f64>) -> Result<StagesOut, Problem> {
    let load: Vec<f64> = (0..mg.len()).map(|i| entering(study, i)).collect();
    fits_vessel(study, ml)?;
    extract_some(study, ml, mg, d, &load, efficiency)
}

/// The scheme of `study` on any set of ingredients, with one stage efficiency for all if given.
fn extract_some(
    study: &Study,
    liquor_ml: f64,
    liquor_mg: &[f64],
    d: &[f64],
    entering_mg_per_ml: &[f64],
    efficiency: Option<f64>,
) -> Result<StagesOut, Problem> {
    let x = &study.extraction;
    let feed = StagesIn {
        liquor_ml,
        liquor_mg,
        d,
        entering_mg_per_ml,
        left_behind_ml: x.organic_left_behind_ml.value.max(0.0),
        carried_out_ml: x.aqueous_carried_out_ml.value.max(0.0),
    };
    let common = efficiency.unwrap_or(x.stage_efficiency.value);
    let out = match &x.scheme {
        Scheme::CrossCurrent { portions } => {
            let list: Vec<PortionIn> = portions
                .iter()
                .map(|p| PortionIn {
                    volume_ml: p.volume_ml.value,
                    efficiency: efficiency.unwrap_or_else(|| p.stage_efficiency.as_ref().map_or(common, |q| q.value)),
                })
                .collect();
            portions::cross_current(&feed, &list)
        }
        Scheme::CounterCurrent { stages, solvent_ml } => {
            counter_current::counter_current(&feed, solvent_ml.value, *stages as usize, common)
        }
        Scheme::Continuous { solvent_ml } => portions::continuous(&feed, solvent_ml.value, common, CONTINUOUS_SLICES),
    };
    if out.liquor_ml <= 0.0 {
        return Err(Problem::new(
            "extraction.aqueous_carried_out_ml",
            format!(
                "{} mL of liquor carried out with each extract leaves nothing of {liquor_ml:.1} mL; give less",
                feed.carried_out_ml
            ),
        ));
    }
    Ok(out)
}

/// Liquor and solvent together must fit the vessel, at every portion.
fn fits_vessel(study: &Study, liquor_ml: f64) -> Result<(), Problem> {
    let (Some(vessel), Scheme::CrossCurrent { portions }) = (&study.extraction.vessel_ml, &study.extraction.scheme)
    else {
        return Ok(());
    };
    let x = &study.extraction;
    for (i, p) in portions.iter().enumerate() {
        let held = if i == 0 { 0.0 } else { x.organic_left_behind_ml.value };
        let liquor = (liquor_ml - i as f64 * x.aqueous_carried_out_ml.value).max(0.0);
        let filled = liquor + held + p.volume_ml.value;
        if filled > vessel.value {
            return Err(Problem::new(
                format!("extraction.portions[{i}].volume_ml"),
                format!(
                    "portion {} would make {filled:.0} mL ({liquor:.0} mL of liquor, {:.0} mL of solvent), but the largest \
                     vessel holds {} mL; use at most {:.0} mL, and leave room to shake and vent",
                    i + 1,
                    held + p.volume_ml.value,
                    vessel.value,
                    (vessel.value - liquor - held).max(0.0)
                ),
            ));
        }
    }
    Ok(())
}

fn balance(
    study: &Study,
    start_mg: &[f64],
    charged_mg: &[f64],
    kept_feed: f64,
    kept_liquor: f64,
    kept_raffinate: f64,
    stages: &StagesOut,
) -> Balance {
    let mut streams = vec!["feed".to_owned(), "entering solvent".to_owned()];
    streams.push("lost from feed".to_owned());
    streams.push("lost from liquor".to_owned());
    let counter = matches!(study.extraction.scheme, Scheme::CounterCurrent { .. });
    // In counter-current all extract leaves at the first stage.
    let extracts = if counter { &stages.rows[..1.min(stages.rows.len())] } else { &stages.rows[..] };
    for row in extracts {
        streams.push(if counter { "extract".to_owned() } else { format!("extract {}", row.stage) });
    }
    streams.push("lost from raffinate".to_owned());
    streams.push("made-up liquid".to_owned());
    let rows = study
        .feed
        .ingredients
        .iter()
        .enumerate()
        .map(|(i, ing)| {
            let mut mg = vec![start_mg[i], stages.entered_mg[i]];
            mg.push(start_mg[i] * (1.0 - kept_feed));
            mg.push(start_mg[i] * kept_feed * (1.0 - kept_liquor));
            mg.extend(extracts.iter().map(|r| r.extract_mg[i]));
            mg.push(stages.raffinate_mg[i] * (1.0 - kept_raffinate));
            mg.push(stages.raffinate_mg[i] * kept_raffinate);
            debug_assert!(charged_mg[i] >= 0.0);
            (ing.name.clone(), mg)
        })
        .collect();
    Balance::close(streams, 2, rows)
}

/// The losses as a ledger, in flow order, with the liquor carried out among them.
fn ledger(
    study: &Study,
    at: [&[(usize, f64, f64)]; 3],
    stages: &StagesOut,
    charged_ml: f64,
    feed_ml: f64,
) -> Vec<LossRow> {
    let mut rows = Vec::new();
    let mut left_ml = feed_ml;
    let mut add = |what: String, at, volume_ml: f64, fraction: f64| {
        let feed_equivalent_ml = left_ml * fraction;
        left_ml -= feed_equivalent_ml;
        rows.push(LossRow { what, at, volume_ml, fraction, feed_equivalent_ml });
    };
    let name = |i: usize| study.losses[i].what.clone();
    for (i, v, f) in at[0] {
        add(name(*i), "feed", *v, *f);
    }
    for (i, v, f) in at[1] {
        add(name(*i), "liquor", *v, *f);
    }
    let carried = charged_ml - stages.liquor_ml;
    if carried > 0.0 {
        add("carried out with the extracts".to_owned(), "extract", carried, carried / charged_ml);
    }
    for (i, v, f) in at[2] {
        add(name(*i), "raffinate", *v, *f);
    }
    rows
}

/// A fraction as per cent with as many digits as it bears, for sentences.
pub(crate) fn percent(fraction: f64) -> String {
    let p = 100.0 * fraction;
    let a = p.abs();
    if (99.95..100.0).contains(&a) {
        "more than 99.9 %".to_owned()
    } else if a >= 99.0 {
        format!("{p:.1} %")
    } else if a >= 10.0 || a == 0.0 {
        format!("{p:.0} %")
    } else if a >= 1.0 {
        format!("{p:.1} %")
    } else {
        let digits = (-math::log10(a)).ceil().clamp(1.0, 8.0) as usize;
        if a < 1e-6 { "less than 0.000001 %".to_owned() } else { format!("{p:.digits$} %") }
    }
}

/// A pH as it is told in words, to 0.01.
pub(crate) fn to_hundredths(ph: f64) -> f64 {
    (ph * 100.0).round() / 100.0
}
