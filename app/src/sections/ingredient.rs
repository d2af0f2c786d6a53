//! One ingredient of the feed.

use super::bind::{Words, button, choice, number, of_draft, text, words};
use crate::parts::{live, live_view};
use crate::state::draft::{AmountAs, RowId};
use crate::state::work::work;
use leptos::prelude::*;
use unstir_core::library::solutes::solute_named;

const AMOUNTS: &[(AmountAs, &str)] = &[
    (AmountAs::MgPerL, "mg per litre"),
    (AmountAs::MassMg, "mg in the whole feed"),
    (AmountAs::PerServing, "mg per serving, as on a label"),
];

/// Name, amount and molar mass of an ingredient.
#[component]
pub fn IngredientFields(
    /// Row of the ingredient.
    id: RowId,
) -> impl IntoView {
    let w = work();
    let name = of_draft(move |d| d.name_of(id));
    let is_target = of_draft(move |d| d.feed.target == id);
    let per_serving = of_draft(move |d| d.ingredient(id).is_some_and(|i| i.amount_as == AmountAs::PerServing));
    // The field is made anew with its unit when another way of stating the amount is chosen.
    let unit = of_draft(move |d| match d.ingredient(id).map(|i| i.amount_as) {
        Some(AmountAs::MassMg) => "mg",
        Some(AmountAs::PerServing) => "mg per serving",
        _ => "mg/L",
    });
    let at = move |d: &crate::state::Draft, rest: &str| format!("feed.ingredients[{}].{rest}", d.ingredient_index(id));
    let amount_path = move |d: &crate::state::Draft| {
        let rest = match d.ingredient(id).map(|i| i.amount_as) {
            Some(AmountAs::MassMg) => "amount.mass_mg",
            Some(AmountAs::PerServing) => "amount.per_serving.mg",
            _ => "amount.mg_per_l",
        };
        at(d, rest)
    };
    view! {
        <div class="row ingredient" class:target=is_target>
            <div class="row-head">
                <strong>{live(move || name.get())}</strong>
                <span class="role">{live(move || if is_target.get() { "target" } else { "company" })}</span>
                {button("Remove this ingredient", "quiet", move || w.draft.update(|d| d.remove_ingredient(id)))}
            </div>
            <div class="fields">
                {text(
                    words("name", ""),
                    move |d| at(d, "name"),
                    move |d| d.ingredient(id).map(|i| &i.name),
                    move |d| d.ingredient_mut(id).map(|i| &mut i.name),
                )}
                {choice(
                    "amount given as",
                    move |d| at(d, "amount"),
                    AMOUNTS,
                    move |d| d.ingredient(id).map(|i| i.amount_as),
                    move |d, kind| {
                        if let Some(i) = d.ingredient_mut(id) {
                            i.amount_as = kind;
                        }
                    },
                )}
                {live_view(move || {
                    number(
                        words("amount", unit.get()),
                        amount_path,
                        move |d| d.ingredient(id).map(|i| &i.amount),
                        move |d| d.ingredient_mut(id).map(|i| &mut i.amount),
                    )
                })}
                <div class="when" hidden=live(move || !per_serving.get())>
                    {number(
                        words("serving", "mL"),
                        move |d| at(d, "amount.per_serving.serving_ml"),
                        move |d| d.ingredient(id).map(|i| &i.serving),
                        move |d| d.ingredient_mut(id).map(|i| &mut i.serving),
                    )}
                </div>
                {number(
                    Words { label: "molar mass", unit: "g/mol", hint: "anhydrous; may be left empty" },
                    move |d| at(d, "molar_mass_g_per_mol"),
                    move |d| d.ingredient(id).map(|i| &i.molar_mass),
                    move |d| d.ingredient_mut(id).map(|i| &mut i.molar_mass),
                )}
            </div>
            <FromLibrary id/>
        </div>
    }
}

/// Offers molar mass and sites of a solute the library knows, while they are not typed.
#[component]
fn FromLibrary(
    /// Row of the ingredient.
    id: RowId,
) -> impl IntoView {
    let w = work();
    let known = of_draft(move |d| {
        let i = d.ingredient(id)?;
        if i.name.trim().is_empty() || !i.molar_mass.is_empty() { None } else { solute_named(&i.name) }
    });
    move || {
        known.get().map(|solute| {
            let words = format!("Take the library's molar mass of {} ({} g/mol)", solute.name, solute.molar_mass_g_mol);
            let text = crate::state::NumberText {
                value: solute.molar_mass_g_mol.to_string(),
                spread: String::new(),
                source: crate::view_model::solvent::cite(&solute.identity_source),
            };
            let take = move || {
                w.draft.update(|d| {
                    if let Some(i) = d.ingredient_mut(id) {
                        i.molar_mass = text.clone();
                    }
                });
            };
            view! { <div class="buttons">{button(words, "quiet", take)}</div> }
        })
    }
}
