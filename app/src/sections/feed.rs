//! Feed: the liquid as received, its ingredients, and taking water off.

use super::bind::{button, choice_of, fixed_number, hinted, of_draft, of_plan, words};
use super::concentrate::ConcentrateFields;
use super::ingredient::IngredientFields;
use super::step::{Cautions, Step};
use crate::parts::each_row;
use crate::state::work::work;
use crate::view_model::feed::feed_line;
use crate::view_model::solvent::general_cautions_at;
use leptos::prelude::*;
use unstir_core::library::cautions::CautionStep;

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
        <Step id="feed" name="Feed" sum=of_plan(|g| feed_line(&g.study))>
            <div class="fields">
                {fixed_number(words("volume", "mL"), "feed.volume_ml", |d| &d.feed.volume, |d| &mut d.feed.volume)}
                {fixed_number(words("pH, as measured", ""), "feed.ph", |d| &d.feed.ph, |d| &mut d.feed.ph)}
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
            <ConcentrateFields/>
            <Cautions list=Signal::stored(general_cautions_at(&[CautionStep::Feed]))/>
        </Step>
    }
}
