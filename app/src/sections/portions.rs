//! Portions: scheme, portions, draining, and the removal stage by stage.

use super::bind::{button, choice, choice_of, fixed_number, hinted, number, of_draft, of_plan, text, words};
use super::step::{Cautions, Results, Step};
use crate::charts::RemovalChart;
use crate::parts::{DataTable, Working, each_row, live};
use crate::state::draft::{Draft, EnteringDraft, PortionDraft, RowId, SchemeKind};
use crate::state::work::work;
use crate::view_model::format::{measured, measured_percent};
use crate::view_model::portions::{inverse_sentences, removal_data, removal_working, stages_head, stages_rows};
use crate::view_model::solvent::cautions_at;
use leptos::prelude::*;
use unstir_core::library::cautions::CautionStep;

const SCHEMES: &[(SchemeKind, &str)] = &[
    (SchemeKind::CrossCurrent, "cross-current: fresh solvent in each portion"),
    (SchemeKind::CounterCurrent, "counter-current: in opposite directions"),
    (SchemeKind::Continuous, "continuous: solvent passed steadily"),
];

/// The step.
#[component]
pub fn Portions() -> impl IntoView {
    let sum = of_plan(|g| {
        let h = &g.plan.headline;
        format!(
            "{} removed with {} of solvent",
            measured_percent(&h.removal_fraction).line(),
            measured(&h.solvent_total_ml).value
        )
    });
    let solvent = of_draft(|d| d.solvent.id.clone());
    let cautions = Memo::new(move |_| solvent.with(|s| cautions_at(&[CautionStep::Portions], s)));
    view! {
        <Step id="portions" name="Portions" sum=sum>
            <SchemeFields/>
            <DrainingFields/>
            <Results there=Signal::derive(move || sum.with(|s| !s.is_empty()))>
                <RemovalChart data=of_plan(|g| Some(removal_data(g)))/>
                <DataTable
                    caption=Signal::stored("Stage by stage".to_owned())
                    head=of_plan(stages_head)
                    rows=of_plan(stages_rows)
                />
                <Working
                    title="the removal"
                    lines=of_plan(removal_working)
                    reference="stage efficiency as the fraction of the approach to equilibrium in the liquor (Murphree type); IUPAC Gold Book F02503; counter-current A. Kremser (1930)"
                    validity="D constant, phases that do not dissolve in each other, volumes unchanged by transfer; solvent left behind counts with the raffinate"
                />
                <h3>"Asked the other way round"</h3>
                <ul class="words">
                    {
                        let sentences = of_plan(|g| inverse_sentences(&g.plan));
                        move || sentences.get().into_iter().map(|s| view! { <li>{s}</li> }).collect_view()
                    }
                </ul>
            </Results>
            <Cautions list=cautions/>
        </Step>
    }
}

/// Scheme and its portions or stages.
#[component]
fn SchemeFields() -> impl IntoView {
    let w = work();
    let scheme = of_draft(|d| d.extraction.scheme);
    let portions = of_draft(|d| d.extraction.portions.iter().map(|p| p.id).collect::<Vec<_>>());
    view! {
        <div class="fields">
            {choice(
                "scheme",
                |_| "extraction.scheme".to_owned(),
                SCHEMES,
                |d| Some(d.extraction.scheme),
                |d, scheme| d.extraction.scheme = scheme,
            )}
            {fixed_number(
                hinted("stage efficiency E", "", "1 is full equilibrium; less for short or gentle mixing; a portion may have its own"),
                "extraction.stage_efficiency",
                |d| &d.extraction.efficiency,
                |d| &mut d.extraction.efficiency,
            )}
            <div class="when" hidden=live(move || scheme.get() != SchemeKind::CounterCurrent)>
                {text(
                    words("number of stages", ""),
                    |_| "extraction.stages".to_owned(),
                    |d| Some(&d.extraction.stages),
                    |d| Some(&mut d.extraction.stages),
                )}
            </div>
            <div class="when" hidden=live(move || scheme.get() == SchemeKind::CrossCurrent)>
                {fixed_number(
                    words("solvent in all", "mL"),
                    "extraction.solvent_ml",
                    |d| &d.extraction.solvent_total,
                    |d| &mut d.extraction.solvent_total,
                )}
            </div>
        </div>
        <div class="when" hidden=live(move || scheme.get() != SchemeKind::CrossCurrent)>
            {each_row(portions, |id| view! { <PortionFields id/> })}
            <div class="buttons">
                {button("Add a portion", "", move || w.draft.update(Draft::add_portion))}
            </div>
            <PortionsProblem/>
        </div>
    }
}

/// What is wrong with the list of portions as a whole.
#[component]
fn PortionsProblem() -> impl IntoView {
    let problem = work().problem_at(Signal::stored("extraction.portions".to_owned()));
    view! { <p class="problem" hidden=live(move || problem.with(Option::is_none))>{live(move || problem.get().unwrap_or_default())}</p> }
}

fn portion(d: &Draft, id: RowId) -> Option<&PortionDraft> {
    d.extraction.portions.iter().find(|p| p.id == id)
}

fn portion_mut(d: &mut Draft, id: RowId) -> Option<&mut PortionDraft> {
    d.extraction.portions.iter_mut().find(|p| p.id == id)
}

fn portion_index(d: &Draft, id: RowId) -> usize {
    d.extraction.portions.iter().position(|p| p.id == id).unwrap_or_default()
}

/// One portion.
#[component]
fn PortionFields(
    /// Row of the portion.
    id: RowId,
) -> impl IntoView {
    let w = work();
    let place = of_draft(move |d| format!("portion {}", portion_index(d, id) + 1));
    view! {
        <div class="row portion">
            <div class="row-head">
                <strong>{live(move || place.get())}</strong>
                {button(
                    "Remove this portion",
                    "quiet",
                    move || w.draft.update(|d| d.extraction.portions.retain(|p| p.id != id)),
                )}
            </div>
            <div class="fields">
                {number(
                    words("fresh solvent", "mL"),
                    move |d| format!("extraction.portions[{}].volume_ml", portion_index(d, id)),
                    move |d| portion(d, id).map(|p| &p.volume),
                    move |d| portion_mut(d, id).map(|p| &mut p.volume),
                )}
                {number(
                    words("its own E", ""),
                    move |d| format!("extraction.portions[{}].stage_efficiency", portion_index(d, id)),
                    move |d| portion(d, id).map(|p| &p.efficiency),
                    move |d| portion_mut(d, id).map(|p| &mut p.efficiency),
                )}
            </div>
        </div>
    }
}

/// Draining, vessel, and what the solvent holds when it arrives.
#[component]
fn DrainingFields() -> impl IntoView {
    let w = work();
    let entering = of_draft(|d| d.extraction.entering.iter().map(|e| e.id).collect::<Vec<_>>());
    view! {
        <div class="fields">
            {fixed_number(
                hinted("solvent left behind each time", "mL", "0 if it drains completely"),
                "extraction.organic_left_behind_ml",
                |d| &d.extraction.left_behind,
                |d| &mut d.extraction.left_behind,
            )}
            {fixed_number(
                hinted("liquor carried out each time", "mL", "0 if it parts cleanly"),
                "extraction.aqueous_carried_out_ml",
                |d| &d.extraction.carried_out,
                |d| &mut d.extraction.carried_out,
            )}
            {fixed_number(
                hinted("largest vessel", "mL", "may be left empty"),
                "extraction.vessel_ml",
                |d| &d.extraction.vessel,
                |d| &mut d.extraction.vessel,
            )}
        </div>
        <details class="quiet" open=live(move || entering.with_untracked(|e| !e.is_empty()))>
            <summary>"solvent that is not fresh (recycled or loaded)"</summary>
            {each_row(entering, |id| view! { <EnteringFields id/> })}
            <div class="buttons">
                {button("Add an ingredient of the entering solvent", "quiet", move || w.draft.update(Draft::add_entering))}
            </div>
        </details>
    }
}

fn entering_mut(d: &mut Draft, id: RowId) -> Option<&mut EnteringDraft> {
    d.extraction.entering.iter_mut().find(|e| e.id == id)
}

fn entering(d: &Draft, id: RowId) -> Option<&EnteringDraft> {
    d.extraction.entering.iter().find(|e| e.id == id)
}

/// One ingredient of the entering solvent.
#[component]
fn EnteringFields(
    /// Row.
    id: RowId,
) -> impl IntoView {
    let w = work();
    let index = move |d: &Draft| d.extraction.entering.iter().position(|e| e.id == id).unwrap_or_default();
    view! {
        <div class="fields">
            {choice_of(
                "ingredient",
                move |d| format!("extraction.entering_solvent[{}].ingredient", index(d)),
                |d| d.ingredients.iter().map(|i| (i.id.to_string(), d.name_of(i.id))).collect(),
                move |d| {
                    entering(d, id)
                        .map(|e| if e.ingredient == 0 { e.not_listed.clone() } else { e.ingredient.to_string() })
                        .unwrap_or_default()
                },
                move |d, chosen| {
                    if let (Some(e), Ok(ingredient)) = (entering_mut(d, id), chosen.parse()) {
                        e.ingredient = ingredient;
                        e.not_listed.clear();
                    }
                },
            )}
            {number(
                words("concentration", "mg/mL"),
                move |d| format!("extraction.entering_solvent[{}].mg_per_ml", index(d)),
                move |d| entering(d, id).map(|e| &e.concentration),
                move |d| entering_mut(d, id).map(|e| &mut e.concentration),
            )}
            {button(
                "Remove this row",
                "quiet",
                move || w.draft.update(|d| d.extraction.entering.retain(|e| e.id != id)),
            )}
        </div>
    }
}
