//! Solvent: the choice with its cautions in the row, and the partition coefficients.

use super::bind::{button, hinted, number, of_draft, of_plan, text, words};
use super::partition::PartitionFields;
use super::step::{Cautions, Step};
use crate::parts::{CautionBox, live, live_view};
use crate::state::NumberText;
use crate::state::work::work;
use crate::view_model::solvent::{Fact, SolventRow, cautions_at, solvent_rows};
use leptos::prelude::*;
use unstir_core::library::cautions::CautionStep;
use unstir_core::library::solvents::solvent;
use unstir_core::process::concentrate::density_g_per_ml;

/// Longest value that stands in the list of facts; longer ones get a line of their own.
const LONGEST_FACT: usize = 90;

/// The step.
#[component]
pub fn SolventStep() -> impl IntoView {
    let sum = of_plan(|g| {
        let target = g.plan.ingredients.iter().find(|i| i.is_target);
        target.map_or_else(String::new, |t| {
            let d = crate::view_model::format::significant(t.d, 3);
            format!(
                "{}: D of {} is {d} at pH {}",
                g.study.solvent.name,
                t.name,
                crate::view_model::format::ph_words(g.plan.extraction_ph)
            )
        })
    });
    let id = of_draft(|d| d.solvent.id.clone());
    let cautions = Memo::new(move |_| id.with(|s| cautions_at(&[CautionStep::Any, CautionStep::Solvent], s)));
    // To two decimals, so that the list is not built anew at each keystroke.
    let density = of_plan(|g| g.plan.liquor.brix.map(|b| (density_g_per_ml(b) * 100.0).round() / 100.0));
    view! {
        <Step id="solvent" name="Solvent" sum=sum>
            <p class="quiet">
                "Nothing here says that a solvent may be used for your purpose: local rules and licensed practice decide, and the supplier's safety data sheet prevails over these rows."
            </p>
            <OwnSolvent/>
            <Cautions list=cautions/>
            <PartitionFields/>
            <h3>"Solvents of the library"</h3>
            <div class="choices">
                {live_view(move || solvent_rows(density.get()).into_iter().map(|row| view! { <Choice row/> }).collect_view())}
            </div>
        </Step>
    }
}

/// The solvent in use: its name and density, which may be the user's own.
#[component]
fn OwnSolvent() -> impl IntoView {
    let w = work();
    let own = of_draft(|d| !d.solvent.id.is_empty() && solvent(&d.solvent.id).is_none());
    let take_own = move || w.draft.update(|d| d.choose_solvent("own", "own solvent", NumberText::default()));
    view! {
        <div class="fields">
            {text(
                words("solvent in use", ""),
                |_| "solvent.name".to_owned(),
                |d| Some(&d.solvent.name),
                |d| {
                    // A name typed before anything was chosen is a solvent of the user's own.
                    if d.solvent.id.is_empty() {
                        d.solvent.id = "own".to_owned();
                    }
                    Some(&mut d.solvent.name)
                },
            )}
            {number(
                hinted("density at 20 °C", "g/mL", "may be left empty"),
                |_| "solvent.density_g_per_ml".to_owned(),
                |d| Some(&d.solvent.density),
                |d| Some(&mut d.solvent.density),
            )}
            {button("Use a solvent of your own", "quiet", take_own)}
        </div>
        <p class="notice" hidden=live(move || !own.get())>
            "The library holds nothing about this solvent: find its hazards, limits and layer in its safety data sheet before opening it."
        </p>
    }
}

/// One solvent with everything that speaks for and against it.
#[component]
fn Choice(
    /// The solvent.
    row: SolventRow,
) -> impl IntoView {
    let w = work();
    let id = row.id.clone();
    let chosen = of_draft(move |d| d.solvent.id == id);
    let (id, name, density) = (row.id.clone(), row.name.clone(), row.density.clone());
    let choose = move || w.draft.update(|d| d.choose_solvent(&id, &name, density.clone()));
    let of_facts = row.facts.iter().map(|f| format!("{}: {}", f.what, f.source));
    let of_limits = row.limits.iter().map(|f| format!("{}: {}; {}", f.what, f.value, f.source));
    let of_cautions = row.cautions.iter().map(|c| format!("{}: {}", c.what_can_happen, c.source));
    let sources: Vec<String> = of_limits.chain(of_facts).chain(of_cautions).collect();
    let sources = sources.into_iter().map(|words| view! { <li>{words}</li> });
    let (long, limits): (Vec<Fact>, Vec<Fact>) = row.limits.into_iter().partition(|f| f.value.len() > LONGEST_FACT);
    let short = row.facts.into_iter().map(|f| (f, false)).chain(limits.into_iter().map(|f| (f, true)));
    let short = short.map(|(f, limit)| {
        view! {
            <div class="fact" class:limit=limit>
                <dt>{f.what}</dt>
                <dd>{f.value}</dd>
            </div>
        }
    });
    let long = long.into_iter().map(|f| view! { <p class="fact-long">{format!("{}: {}", f.what, f.value)}</p> });
    let codes = row.codes.into_iter().map(|(code, meaning)| view! { <li><strong>{code}</strong>" "{meaning}</li> });
    let cautions = row.cautions.into_iter().map(|caution| view! { <CautionBox caution/> });
    let note = (!row.note.is_empty()).then(|| view! { <p class="quiet">{row.note}</p> });
    view! {
        <div class="row choice" class:chosen=chosen>
            <div class="row-head">
                <strong>{row.name}</strong>
                <span class="role" hidden=live(move || !chosen.get())>"in use"</span>
                <span hidden=live(move || chosen.get())>{button("Use this solvent", "", choose)}</span>
            </div>
            <dl class="facts">{short.collect_view()}</dl>
            {long.collect_view()}
            <ul class="codes">{codes.collect_view()}</ul>
            <div class="cautions">{cautions.collect_view()}</div>
            {note}
            <details class="quiet">
                <summary>"limits of each list, and sources"</summary>
                <ul>{sources.collect_view()}</ul>
            </details>
        </div>
    }
}
