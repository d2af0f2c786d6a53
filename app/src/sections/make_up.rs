//! Make-up: losses, the volume that restores strength, what to do when overshot.

use super::bind::{button, choice, fixed_number, hinted, number, of_draft, of_plan, text, words};
use super::step::{Cautions, Results, Step};
use crate::parts::{DataTable, Working, each_row, live, live_view};
use crate::state::Draft;
use crate::state::draft::{LossAs, LossDraft, RowId};
use crate::state::work::work;
use crate::view_model::format::measured;
use crate::view_model::make_up::{
    carbonate_sentences, ledger_head, ledger_rows, strength_head, strength_rows, volume_working,
};
use crate::view_model::solvent::cautions_at;
use leptos::prelude::*;
use unstir_core::library::cautions::CautionStep;
use unstir_core::study::LossPlace;

const PLACES: &[(LossPlace, &str)] = &[
    (LossPlace::Feed, "from the feed"),
    (LossPlace::Liquor, "from the liquor, before the first portion"),
    (LossPlace::Raffinate, "from the raffinate"),
];
const AMOUNTS: &[(LossAs, &str)] =
    &[(LossAs::VolumeMl, "a volume"), (LossAs::Fraction, "a fraction of what was there")];

/// The step.
#[component]
pub fn MakeUpStep() -> impl IntoView {
    let w = work();
    let gas = of_plan(|g| carbonate_sentences(&g.plan));
    let losses = of_draft(|d| d.losses.iter().map(|l| l.id).collect::<Vec<_>>());
    let sum = of_plan(|g| format!("{} restores strength", measured(&g.plan.headline.make_up_volume_ml).line()));
    let advice = of_plan(|g| g.plan.make_up.advice.clone());
    let solvent = of_draft(|d| d.solvent.id.clone());
    let cautions = Memo::new(move |_| solvent.with(|s| cautions_at(&[CautionStep::MakeUp], s)));
    view! {
        <Step id="make-up" name="Make-up" sum=sum>
            <p class="quiet">
                "Strip the dissolved solvent before making up. What may be done with the liquid afterwards, local rules and licensed practice decide; nothing here says that it may be consumed."
            </p>
            {each_row(losses, |id| view! { <LossFields id/> })}
            <div class="buttons">
                {button("Add a loss", "", move || w.draft.update(Draft::add_loss))}
            </div>
            <div class="fields">
                {fixed_number(
                    hinted("made up to", "mL", "leave empty until it is done"),
                    "make_up.made_up_to_ml",
                    |d| &d.made_up_to,
                    |d| &mut d.made_up_to,
                )}
                {fixed_number(
                    hinted("carbonated at", "°C", "5 if left empty"),
                    "make_up.carbonate_at_c",
                    |d| &d.carbonate_at,
                    |d| &mut d.carbonate_at,
                )}
            </div>
            <Results there=Signal::derive(move || advice.with(|a| !a.is_empty()))>
                <p class="advice">{live(move || advice.get())}</p>
                <ul class="words">
                    {live_view(move || gas.get().into_iter().map(|s| view! { <li>{s}</li> }).collect_view())}
                </ul>
                <Working
                    title="the make-up volume"
                    lines=of_plan(|g| volume_working(&g.study, &g.plan))
                    reference="mass balance"
                    validity="each loss takes its share of everything present; what the solvent takes of the company shows as strength below"
                />
                <div class="side-by-side">
                    <DataTable
                        caption=Signal::stored("Losses in flow order".to_owned())
                        head=Signal::stored(ledger_head())
                        rows=of_plan(|g| ledger_rows(&g.plan))
                    />
                    <DataTable
                        caption=Signal::stored("Strength against the feed".to_owned())
                        head=Signal::stored(strength_head())
                        rows=of_plan(|g| strength_rows(&g.plan))
                    />
                </div>
            </Results>
            <Cautions list=cautions/>
        </Step>
    }
}

fn loss(d: &Draft, id: RowId) -> Option<&LossDraft> {
    d.losses.iter().find(|l| l.id == id)
}

fn loss_mut(d: &mut Draft, id: RowId) -> Option<&mut LossDraft> {
    d.losses.iter_mut().find(|l| l.id == id)
}

/// One loss.
#[component]
fn LossFields(
    /// Row of the loss.
    id: RowId,
) -> impl IntoView {
    let w = work();
    let at = move |d: &Draft, last: &str| {
        format!("losses[{}].{last}", d.losses.iter().position(|l| l.id == id).unwrap_or_default())
    };
    let place = of_draft(move |d| format!("loss {}", d.losses.iter().position(|l| l.id == id).map_or(0, |i| i + 1)));
    let unit = of_draft(move |d| match loss(d, id).map(|l| l.amount_as) {
        Some(LossAs::Fraction) => "fraction",
        _ => "mL",
    });
    let amount_path = move |d: &Draft| match loss(d, id).map(|l| l.amount_as) {
        Some(LossAs::Fraction) => at(d, "amount.fraction"),
        _ => at(d, "amount.volume_ml"),
    };
    view! {
        <div class="row loss">
            <div class="row-head">
                <strong>{live(move || place.get())}</strong>
                {button("Remove this loss", "quiet", move || w.draft.update(|d| d.losses.retain(|l| l.id != id)))}
            </div>
            <div class="fields">
                {text(
                    words("what happened", ""),
                    move |d| at(d, "what"),
                    move |d| loss(d, id).map(|l| &l.what),
                    move |d| loss_mut(d, id).map(|l| &mut l.what),
                )}
                {choice(
                    "where",
                    move |d| at(d, "at"),
                    PLACES,
                    move |d| loss(d, id).map(|l| l.at),
                    move |d, place| {
                        if let Some(l) = loss_mut(d, id) {
                            l.at = place;
                        }
                    },
                )}
                {choice(
                    "given as",
                    move |d| at(d, "amount"),
                    AMOUNTS,
                    move |d| loss(d, id).map(|l| l.amount_as),
                    move |d, kind| {
                        if let Some(l) = loss_mut(d, id) {
                            l.amount_as = kind;
                        }
                    },
                )}
                {live_view(move || {
                    number(
                        words("how much", unit.get()),
                        amount_path,
                        move |d| loss(d, id).map(|l| &l.amount),
                        move |d| loss_mut(d, id).map(|l| &mut l.amount),
                    )
                })}
            </div>
        </div>
    }
}
