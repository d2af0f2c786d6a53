//! Feed: the liquid as received, its ingredients, and taking water off.

use super::bind::{button, choice, choice_of, fixed_number, hinted, number, of_draft, of_plan, text, words};
use super::concentrate::ConcentrateFields;
use super::ingredient::IngredientFields;
use super::step::{Cautions, Step};
use crate::parts::{Working, each_row};
use crate::state::draft::{Draft, IonDraft, RowId};
use crate::state::work::work;
use crate::view_model::feed::{acidity_working, feed_line};
use crate::view_model::solvent::general_cautions_at;
use leptos::prelude::*;
use unstir_core::library::cautions::CautionStep;
use unstir_core::study::Purpose;

const PURPOSES: &[(Purpose, &str)] = &[
    (Purpose::DrinkOrFood, "drink or food"),
    (Purpose::Flavour, "flavour"),
    (Purpose::Medicine, "medicine"),
    (Purpose::Technical, "technical"),
];

/// The step.
#[component]
pub fn Feed() -> impl IntoView {
    let w = work();
    let ids = of_draft(|d| d.ingredients.iter().map(|i| i.id).collect::<Vec<_>>());
    let target = choice_of(
        "target: the ingredient to remove",
        |_| "feed.target".to_owned(),
        |d| d.ingredients.iter().map(|i| (i.id.to_string(), d.name_of(i.id))).collect(),
        |d| d.target().map_or_else(|| d.feed.target_not_listed.clone(), |t| t.id.to_string()),
        |d, chosen| {
            if let Ok(id) = chosen.parse() {
                d.feed.target = id;
            }
        },
    );
    view! {
        <Step id="feed" name="Feed" sum=of_plan(|g| feed_line(&g.study, &g.plan))>
            <div class="fields">
                {fixed_number(words("volume", "mL"), "feed.volume_ml", |d| &d.feed.volume, |d| &mut d.feed.volume)}
                {fixed_number(
                    hinted("pH, as measured", "", "left empty, it is worked out from what is listed"),
                    "feed.ph",
                    |d| &d.feed.ph,
                    |d| &mut d.feed.ph,
                )}
                {fixed_number(
                    words("temperature of the extraction", "°C"),
                    "feed.temperature_c",
                    |d| &d.feed.temperature,
                    |d| &mut d.feed.temperature,
                )}
                {fixed_number(
                    hinted("soluble solids", "°Bx", "leave empty if there are none or they are not known"),
                    "feed.soluble_solids_brix",
                    |d| &d.feed.brix,
                    |d| &mut d.feed.brix,
                )}
                {target}
                {choice(
                    "what it is for",
                    |_| "goal.purpose".to_owned(),
                    PURPOSES,
                    |d| Some(d.purpose),
                    |d, purpose| d.purpose = purpose,
                )}
                {fixed_number(
                    hinted("removal to reach", "", "a fraction, 0.9 for 90 %"),
                    "goal.removal_fraction",
                    |d| &d.goal,
                    |d| &mut d.goal,
                )}
            </div>
            <h3>"Ingredients"</h3>
            {each_row(ids, |id| view! { <IngredientFields id/> })}
            <div class="buttons">
                {button("Add an ingredient", "", move || w.draft.update(|d| { d.add_ingredient(); }))}
            </div>
            <Dissolved/>
            <ConcentrateFields/>
            <Cautions list=Signal::stored(general_cautions_at(&[CautionStep::Feed]))/>
        </Step>
    }
}

/// What else bears on the pH: carbon dioxide, ions of fixed charge, and how the pH was come by.
#[component]
fn Dissolved() -> impl IntoView {
    let w = work();
    let ions = of_draft(|d| d.feed.ions.iter().map(|i| i.id).collect::<Vec<_>>());
    let open = ions.with_untracked(|i| !i.is_empty()) || w.draft.with_untracked(|d| !d.feed.co2.is_empty());
    view! {
        <details class="quiet" open=open>
            <summary>"carbon dioxide and salts, as far as they are known"</summary>
            <div class="fields">
                {fixed_number(
                    hinted("dissolved carbon dioxide", "g/L", "leave empty for a still liquid"),
                    "feed.co2_g_per_l",
                    |d| &d.feed.co2,
                    |d| &mut d.feed.co2,
                )}
            </div>
            {each_row(ions, |id| view! { <IonFields id/> })}
            <div class="buttons">
                {button("Add an ion of fixed charge", "quiet", move || w.draft.update(Draft::add_ion))}
            </div>
        </details>
        <Working
            title="the pH of feed and liquor"
            lines=of_plan(|g| acidity_working(&g.study, &g.plan))
            reference="charge balance, D. Harvey, Modern Analytical Chemistry (2000), ch. 6; activities C. W. Davies (1962); buffer capacity D. D. Van Slyke (1922)"
            validity="ionic strength up to 0.5 mol/L; no ion pairs or complexes, and sugar's effect on activities not counted; only what is listed, with pKa and molar mass, buffers"
        />
    }
}

fn ion(d: &Draft, id: RowId) -> Option<&IonDraft> {
    d.feed.ions.iter().find(|i| i.id == id)
}

fn ion_mut(d: &mut Draft, id: RowId) -> Option<&mut IonDraft> {
    d.feed.ions.iter_mut().find(|i| i.id == id)
}

/// One ion of fixed charge.
#[component]
fn IonFields(
    /// Row of the ion.
    id: RowId,
) -> impl IntoView {
    let w = work();
    let at = move |d: &Draft, last: &str| {
        format!("feed.strong_ions[{}].{last}", d.feed.ions.iter().position(|i| i.id == id).unwrap_or_default())
    };
    view! {
        <div class="fields">
            {text(
                words("ion, e.g. sodium", ""),
                move |d| at(d, "name"),
                move |d| ion(d, id).map(|i| &i.name),
                move |d| ion_mut(d, id).map(|i| &mut i.name),
            )}
            {text(
                words("charge", ""),
                move |d| at(d, "charge"),
                move |d| ion(d, id).map(|i| &i.charge),
                move |d| ion_mut(d, id).map(|i| &mut i.charge),
            )}
            {number(
                words("concentration", "mmol/L"),
                move |d| at(d, "mmol_per_l"),
                move |d| ion(d, id).map(|i| &i.amount),
                move |d| ion_mut(d, id).map(|i| &mut i.amount),
            )}
            {button("Remove this ion", "quiet", move || w.draft.update(|d| d.feed.ions.retain(|i| i.id != id)))}
        </div>
    }
}
