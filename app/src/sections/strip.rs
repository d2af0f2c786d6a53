//! Strip: dissolved solvent out of the raffinate, to a limit.

use super::bind::{button, fixed_number, hinted, number, of_draft, of_plan, words};
use super::step::{Cautions, Results, Step};
use crate::parts::{DataTable, Working, each_row, live, live_view};
use crate::state::draft::{Draft, RowId, StripReadingDraft};
use crate::state::work::work;
use crate::view_model::solvent::cautions_at;
use crate::view_model::strip::{limits_head, limits_rows, list_lines, strip_line, strip_sentences, strip_working};
use leptos::prelude::*;
use unstir_core::library::cautions::CautionStep;

/// The step.
#[component]
pub fn StripStep() -> impl IntoView {
    let w = work();
    let sum = of_plan(|g| strip_line(&g.plan));
    let solvent = of_draft(|d| d.solvent.id.clone());
    let cautions = Memo::new(move |_| solvent.with(|s| cautions_at(&[CautionStep::Strip], s)));
    let readings = of_draft(|d| d.strip.readings.iter().map(|r| r.id).collect::<Vec<_>>());
    let sentences = of_plan(strip_sentences);
    let lists = of_plan(|g| list_lines(&g.study));
    let limits = of_plan(|g| limits_rows(&g.plan));
    view! {
        <Step id="strip" name="Strip" sum=sum>
            <p class="quiet">
                "No residue worked out or measured here says that the liquid may be consumed: local rules and licensed practice decide."
            </p>
            <Cautions list=cautions/>
            <div class="fields">
                {fixed_number(
                    hinted("pressure", "kPa", "101.3 if left empty"),
                    "strip.pressure_kpa",
                    |d| &d.strip.pressure,
                    |d| &mut d.strip.pressure,
                )}
                {fixed_number(
                    hinted("residue to reach, made up", "mg/L", "may be left empty"),
                    "strip.limit_mg_per_l",
                    |d| &d.strip.limit,
                    |d| &mut d.strip.limit,
                )}
                {fixed_number(
                    hinted("serving", "mL", "may be left empty"),
                    "strip.serving_ml",
                    |d| &d.strip.serving,
                    |d| &mut d.strip.serving,
                )}
            </div>
            <h3>"Assays while stripping"</h3>
            {each_row(readings, |id| view! { <ReadingFields id/> })}
            <div class="buttons">
                {button("Add an assay", "", move || w.draft.update(Draft::add_strip_reading))}
            </div>
            <Results there=Signal::derive(move || sum.with(|s| !s.is_empty()))>
                <ul class="words">
                    {live_view(move || sentences.get().into_iter().map(|s| view! { <li>{s}</li> }).collect_view())}
                </ul>
                <div hidden=live(move || limits.with(Vec::is_empty))>
                    <DataTable
                        caption=Signal::stored("Residues to reach".to_owned())
                        head=Signal::stored(limits_head())
                        rows=limits
                    />
                </div>
                <ul class="words quiet">
                    {live_view(move || lists.get().into_iter().map(|s| view! { <li>{s}</li> }).collect_view())}
                </ul>
                <Working
                    title="stripping"
                    lines=of_plan(strip_working)
                    reference="Henry constants R. Sander, Atmos. Chem. Phys. 15 (2015) 4399; Lord Rayleigh, Phil. Mag. 4 (1902) 521; vapour pressure of water W. Wagner & A. Pruß (1993); regression J. N. Miller & J. C. Miller"
                    validity="dilute solvent, well-mixed liquid, first order at constant conditions; a listed limit in mg/kg is taken as mg/L times the density of the feed"
                />
            </Results>
        </Step>
    }
}

fn reading(d: &Draft, id: RowId) -> Option<&StripReadingDraft> {
    d.strip.readings.iter().find(|r| r.id == id)
}

fn reading_mut(d: &mut Draft, id: RowId) -> Option<&mut StripReadingDraft> {
    d.strip.readings.iter_mut().find(|r| r.id == id)
}

/// One assay.
#[component]
fn ReadingFields(
    /// Row of the assay.
    id: RowId,
) -> impl IntoView {
    let w = work();
    let at = move |d: &Draft, last: &str| {
        format!("strip.readings[{}].{last}", d.strip.readings.iter().position(|r| r.id == id).unwrap_or_default())
    };
    view! {
        <div class="fields">
            {number(
                words("time since it began", "min"),
                move |d| at(d, "minutes"),
                move |d| reading(d, id).map(|r| &r.minutes),
                move |d| reading_mut(d, id).map(|r| &mut r.minutes),
            )}
            {number(
                words("solvent in the raffinate", "mg/L"),
                move |d| at(d, "mg_per_l"),
                move |d| reading(d, id).map(|r| &r.content),
                move |d| reading_mut(d, id).map(|r| &mut r.content),
            )}
            {button(
                "Remove this assay",
                "quiet",
                move || w.draft.update(|d| d.strip.readings.retain(|r| r.id != id)),
            )}
        </div>
    }
}
