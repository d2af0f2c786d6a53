//! Partition coefficients of every ingredient in the solvent in use.

use super::bind::{Words, button, number, of_draft, text};
use crate::parts::{each_row, live, live_view};
use crate::state::draft::{Draft, RowId};
use crate::state::work::work;
use crate::view_model::solvent::{PublishedRow, published_rows};
use leptos::prelude::*;

/// One row per ingredient, and rows that belong to other solvents.
#[component]
pub fn PartitionFields() -> impl IntoView {
    let w = work();
    let chosen = of_draft(|d| (!d.solvent.id.is_empty(), d.solvent.name.clone()));
    let ids = of_draft(|d| d.ingredients.iter().map(|i| i.id).collect::<Vec<_>>());
    let others = of_draft(Draft::other_partition_rows);
    view! {
        <div hidden=live(move || !chosen.get().0)>
            <h3>{live(move || format!("Partition into {}", chosen.get().1))}</h3>
            <p class="quiet">
                "K: concentration in the solvent over concentration in water, neutral form only. An ingredient of the company without K is taken to stay in the liquor."
            </p>
            {each_row(ids, |id| view! { <KFields id/> })}
            <details class="quiet" hidden=live(move || others.with(Vec::is_empty))>
                <summary>{live(move || format!("K kept for other solvents ({})", others.with(Vec::len)))}</summary>
                <ul>
                    {live_view(move || others.get().into_iter().map(|other| view! {
                        <li class="pick-row">
                            <span>{other.1.clone()}</span>
                            {button(
                                "Remove",
                                "quiet",
                                move || w.draft.update(|d| d.partition.retain(|p| p.id != other.0)),
                            )}
                        </li>
                    }).collect_view())}
                </ul>
            </details>
        </div>
    }
}

fn path(d: &Draft, id: RowId, last: &str) -> String {
    match d.partition_path(id) {
        // Where nothing is typed, what is missing is reported for K itself.
        at if at.is_empty() => String::new(),
        at if at == "partition" => {
            if last == "k_neutral" {
                at
            } else {
                String::new()
            }
        }
        at => format!("{at}.{last}"),
    }
}

/// K of one ingredient.
#[component]
fn KFields(
    /// Row of the ingredient.
    id: RowId,
) -> impl IntoView {
    let name = of_draft(move |d| d.name_of(id));
    let is_target = of_draft(move |d| d.feed.target == id);
    view! {
        <div class="row coefficient" class:target=is_target>
            <div class="row-head">
                <strong>{live(move || name.get())}</strong>
            </div>
            <div class="fields">
                {number(
                    Words { label: "K", unit: "", hint: "" },
                    move |d| path(d, id, "k_neutral"),
                    move |d| d.partition_of(id).map(|p| &p.k),
                    move |d| Some(&mut d.partition_mut(id).k),
                )}
                <details class="quiet">
                    <summary>"more about this K"</summary>
                    <div class="fields">
                        {number(
                            Words { label: "K of the ion pair", unit: "", hint: "0 if left empty" },
                            move |d| path(d, id, "k_ion_pair"),
                            move |d| d.partition_of(id).map(|p| &p.k_ion_pair),
                            move |d| Some(&mut d.partition_mut(id).k_ion_pair),
                        )}
                        {text(
                            Words { label: "temperature of K, °C", unit: "", hint: "25 if left empty" },
                            move |d| path(d, id, "k_temperature_c"),
                            move |d| d.partition_of(id).map(|p| &p.temperature),
                            move |d| Some(&mut d.partition_mut(id).temperature),
                        )}
                        {number(
                            Words { label: "enthalpy of transfer", unit: "kJ/mol", hint: "water to solvent, for other temperatures" },
                            move |d| path(d, id, "transfer_enthalpy_kj_per_mol"),
                            move |d| d.partition_of(id).map(|p| &p.enthalpy),
                            move |d| Some(&mut d.partition_mut(id).enthalpy),
                        )}
                    </div>
                </details>
            </div>
            <PublishedK id/>
        </div>
    }
}

/// Published values for the pair, each to be taken with one tap.
#[component]
fn PublishedK(
    /// Row of the ingredient.
    id: RowId,
) -> impl IntoView {
    let w = work();
    let pair = of_draft(move |d| (d.name_of(id), d.solvent.id.clone()));
    let list = Memo::new(move |_| pair.with(|(name, solvent)| published_rows(name, solvent)));
    let row = move |r: PublishedRow| {
        let take = move || w.draft.update(|d| d.partition_mut(id).k = r.text.clone());
        view! {
            <li class="pick-row">
                <span>{r.words}</span>
                <span class="quiet">{r.source}</span>
                {button("Use this value", "quiet", take)}
            </li>
        }
    };
    view! {
        <div class="pick" hidden=live(move || list.with(Vec::is_empty))>
            <p class="quiet">"Held for this pair:"</p>
            <ul>{live_view(move || list.get().into_iter().map(row).collect_view())}</ul>
        </div>
    }
}
