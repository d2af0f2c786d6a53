//! Readings of a disputed constant, side by side.

use super::bind::{button, choice, number, of_draft, of_plan, words};
use super::step::Results;
use crate::parts::{DataTable, Working, each_row, live, live_view};
use crate::state::draft::{ReadingDraft, RowId};
use crate::state::work::work;
use crate::state::{Draft, NumberText};
use crate::view_model::ionisation::{readings_head, readings_rows};
use crate::view_model::solvent::cite;
use leptos::prelude::*;
use unstir_core::library::solutes::solute_named;
use unstir_core::library::solutes::{self, Advice, readings_for};
use unstir_core::study::MeantAs;

const MEANT: &[(MeantAs, &str)] = &[
    (MeantAs::Acid, "pKa of the molecule as an acid"),
    (MeantAs::ConjugateAcidOfBase, "pKa of the conjugate acid of a base"),
    (MeantAs::PkbWrittenAsPka, "pKb of the base, printed as a pKa"),
    (MeantAs::Unstated, "the source does not say: try all three"),
];

/// The readings of one ingredient, with what each would mean where it is the target.
#[component]
pub fn Readings(
    /// Row of the ingredient.
    id: RowId,
) -> impl IntoView {
    let w = work();
    let rows =
        of_draft(move |d| d.ingredient(id).map(|i| i.readings.iter().map(|r| r.id).collect()).unwrap_or_else(Vec::new));
    let is_target = of_draft(move |d| d.feed.target == id);
    let disputed = Signal::derive(move || rows.with(|r| !r.is_empty()));
    let sentence = of_plan(|g| g.plan.readings.as_ref().map(|r| r.sentence.clone()).unwrap_or_default());
    let there = Signal::derive(move || is_target.get() && disputed.get() && sentence.with(|s| !s.is_empty()));
    let add = move || w.draft.update(|d| d.add_reading(id, NumberText::default(), MeantAs::Unstated));
    view! {
        <div class="readings">
            <h3 hidden=live(move || !disputed.get())>"Disputed constant"</h3>
            {each_row(rows, move |reading| view! { <ReadingFields id reading/> })}
            <div class="buttons">
                {button("Add a published reading", "quiet", add)}
            </div>
            <Published id/>
            <Results there=there>
                <p class="verdict-sentence">{live(move || sentence.get())}</p>
                <DataTable
                    caption=Signal::stored("What each reading would mean".to_owned())
                    head=Signal::stored(readings_head())
                    rows=of_plan(|g| readings_rows(&g.plan))
                />
                <Working
                    title="the readings"
                    lines=Signal::stored(vec![
                        "a pKb printed as a pKa: pKa = pKw − pKb".to_owned(),
                        "each reading joins the undisputed sites; fraction neutral, D and planned removal follow as for the plan".to_owned(),
                        "verdict: the whole interval at or above the goal, around it, or below it".to_owned(),
                    ])
                    reference="mass action; ion product of water at the temperature"
                    validity="the interval holds the uncertainty of K and of the reading itself"
                />
            </Results>
        </div>
    }
}

fn reading(d: &Draft, id: RowId, row: RowId) -> Option<&ReadingDraft> {
    d.ingredient(id)?.readings.iter().find(|r| r.id == row)
}

fn reading_mut(d: &mut Draft, id: RowId, row: RowId) -> Option<&mut ReadingDraft> {
    d.ingredient_mut(id)?.readings.iter_mut().find(|r| r.id == row)
}

fn reading_path(d: &Draft, id: RowId, row: RowId, last: &str) -> String {
    let j = d.ingredient(id).and_then(|i| i.readings.iter().position(|r| r.id == row)).unwrap_or_default();
    format!("feed.ingredients[{}].disputed.readings[{j}].{last}", d.ingredient_index(id))
}

/// One reading: number, meaning, source, and whether the plan uses it.
#[component]
fn ReadingFields(
    /// Row of the ingredient.
    id: RowId,
    /// Row of the reading.
    reading: RowId,
) -> impl IntoView {
    let w = work();
    let row = reading;
    let in_use = of_draft(move |d| d.ingredient(id).is_some_and(|i| i.reading_in_use == row));
    let use_it = move |_| {
        w.draft.update(|d| {
            if let Some(i) = d.ingredient_mut(id) {
                i.reading_in_use = row;
            }
        });
    };
    view! {
        <div class="row reading" class:in-use=in_use>
            <div class="fields">
                {number(
                    words("as printed", ""),
                    move |d| reading_path(d, id, row, "value"),
                    move |d| self::reading(d, id, row).map(|r| &r.value),
                    move |d| reading_mut(d, id, row).map(|r| &mut r.value),
                )}
                {choice(
                    "meant as",
                    move |d| reading_path(d, id, row, "meant_as"),
                    MEANT,
                    move |d| self::reading(d, id, row).map(|r| r.meant_as),
                    move |d, meant| {
                        if let Some(r) = reading_mut(d, id, row) {
                            r.meant_as = meant;
                        }
                    },
                )}
                <label class="check">
                    <input type="radio" name=format!("reading-in-use-{id}") prop:checked=in_use on:change=use_it/>
                    "the plan uses this reading"
                </label>
            </div>
            <div class="buttons">
                {button(
                    "Try every way this number could be meant",
                    "quiet",
                    move || w.draft.update(|d| d.try_every_way(id, row)),
                )}
                {button("Set this reading aside", "quiet", move || w.draft.update(|d| d.remove_reading(id, row)))}
            </div>
        </div>
    }
}

/// Published readings of a solute the library knows, each to be added with one tap.
#[component]
fn Published(
    /// Row of the ingredient.
    id: RowId,
) -> impl IntoView {
    let w = work();
    let solute = of_draft(move |d| {
        d.ingredient(id).and_then(|i| solute_named(&i.name)).map(|s| (s.id, s.name)).unwrap_or_default()
    });
    let list = Memo::new(move |_| solute.with(|s| if s.0.is_empty() { Vec::new() } else { readings_for(&s.0) }));
    let row = move |r: solutes::PkaReading| {
        let meant_as = match r.meant_as {
            solutes::MeantAs::Acid => MeantAs::Acid,
            solutes::MeantAs::ConjugateAcidOfBase => MeantAs::ConjugateAcidOfBase,
            solutes::MeantAs::PkbWrittenAsPka => MeantAs::PkbWrittenAsPka,
            solutes::MeantAs::Unstated => MeantAs::Unstated,
        };
        let advice = match r.advice {
            Advice::Use => "fit for use",
            Advice::Spread => "shows the spread",
            Advice::DoNotUse => "do not use as printed",
        };
        let at = r.temperature_c.map(|t| format!(", {t} °C")).unwrap_or_default();
        let note = if r.note.is_empty() { String::new() } else { format!(" {}", r.note) };
        let source = cite(&r.source);
        let text = NumberText { value: r.value.to_string(), spread: String::new(), source: source.clone() };
        let add = move || w.draft.update(|d| d.add_reading(id, text.clone(), meant_as));
        view! {
            <li class="pick-row">
                <span>{format!("“{}”{at}: {advice}.{note}", r.printed_as)}</span>
                <span class="quiet">{source}</span>
                {button("Add this reading", "quiet", add)}
            </li>
        }
    };
    view! {
        <details class="pick quiet" hidden=live(move || list.with(Vec::is_empty))>
            <summary>
                {live(move || format!("Published readings for {} ({})", solute.with(|s| s.1.clone()), list.with(Vec::len)))}
            </summary>
            <ul>{live_view(move || list.get().into_iter().map(row).collect_view())}</ul>
        </details>
    }
}
