//! Ionisation: sites, readings of a disputed constant, and what they mean at the liquor's pH.

use super::bind::{Words, button, choice, number, of_draft, of_plan, text, words};
use super::readings::Readings;
use super::step::{Cautions, Results, Step};
use crate::charts::{LogDChart, SpeciesChart};
use crate::parts::{DataTable, Working, each_row, live};
use crate::state::draft::{RowId, SiteDraft};
use crate::state::work::work;
use crate::state::{Draft, NumberText};
use crate::view_model::format::percent;
use crate::view_model::ionisation::{d_working, log_d_data, species_data, states_head, states_rows};
use crate::view_model::solvent::{cite, general_cautions_at};
use leptos::prelude::*;
use unstir_core::library::cautions::CautionStep;
use unstir_core::library::solutes;
use unstir_core::library::solutes::solute_named;
use unstir_core::study::SiteKind;

/// Kinds of sites with their words.
pub const KINDS: &[(SiteKind, &str)] =
    &[(SiteKind::Acid, "acid"), (SiteKind::ConjugateAcidOfBase, "conjugate acid of a base")];

/// The step.
#[component]
pub fn Ionisation() -> impl IntoView {
    let w = work();
    let ids = of_draft(|d| d.ingredients.iter().map(|i| i.id).collect::<Vec<_>>());
    let sum = of_plan(|g| {
        let target = g.plan.ingredients.iter().find(|i| i.is_target);
        target.map_or_else(String::new, |t| {
            format!(
                "{} of {} is neutral at pH {}",
                percent(t.fraction_neutral),
                t.name,
                crate::view_model::format::ph_words(g.plan.extraction_ph)
            )
        })
    });
    let there = Signal::derive(move || sum.with(|s| !s.is_empty()));
    let species = Memo::new(move |_| {
        let good = w.shown.with(|s| s.good.clone())?;
        w.curves.with(|c| species_data(&good.plan, c.as_ref()?))
    });
    let log_d = Memo::new(move |_| {
        let good = w.shown.with(|s| s.good.clone())?;
        w.curves.with(|c| log_d_data(&good.study, &good.plan, c.as_ref()?))
    });
    view! {
        <Step id="ionisation" name="Ionisation" sum=sum>
            <p class="quiet">
                "Macroscopic constants in rising order. A base is given by the pKa of its conjugate acid; an ingredient without sites does not ionise."
            </p>
            {each_row(ids, |id| view! { <Sites id/> })}
            <Results there=there>
                <DataTable
                    caption=Signal::stored("Each ingredient in the liquor".to_owned())
                    head=Signal::stored(states_head())
                    rows=of_plan(|g| states_rows(&g.plan))
                />
                <Working
                    title="D of the target"
                    lines=of_plan(|g| d_working(&g.plan))
                    reference="mass action; D. C. Harris, Quantitative Chemical Analysis, effect of pH on extraction"
                    validity="dilute; constants at the temperature and ionic strength of the liquor; K measured for the form that is neutral"
                />
                <div class="charts">
                    <SpeciesChart data=species.into()/>
                    <LogDChart data=log_d.into()/>
                </div>
            </Results>
            <Cautions list=Signal::stored(general_cautions_at(&[CautionStep::Ionisation]))/>
        </Step>
    }
}

/// Sites and readings of one ingredient.
#[component]
fn Sites(
    /// Row of the ingredient.
    id: RowId,
) -> impl IntoView {
    let w = work();
    let name = of_draft(move |d| d.name_of(id));
    let sites =
        of_draft(move |d| d.ingredient(id).map(|i| i.sites.iter().map(|s| s.id).collect()).unwrap_or_else(Vec::new));
    view! {
        <div class="row">
            <div class="row-head">
                <strong>{live(move || name.get())}</strong>
                <span class="quiet" hidden=live(move || sites.with(|s| !s.is_empty()))>"no site stated"</span>
            </div>
            {each_row(sites, move |site| view! { <SiteFields id site/> })}
            <div class="buttons">
                {button("Add a site", "quiet", move || w.draft.update(|d| d.add_site(id)))}
                <SitesFromLibrary id/>
            </div>
            <Readings id/>
        </div>
    }
}

fn site(d: &Draft, id: RowId, site: RowId) -> Option<&SiteDraft> {
    d.ingredient(id)?.sites.iter().find(|s| s.id == site)
}

fn site_mut(d: &mut Draft, id: RowId, site: RowId) -> Option<&mut SiteDraft> {
    d.ingredient_mut(id)?.sites.iter_mut().find(|s| s.id == site)
}

fn site_path(d: &Draft, id: RowId, site: RowId, last: &str) -> String {
    let j = d.ingredient(id).and_then(|i| i.sites.iter().position(|s| s.id == site)).unwrap_or_default();
    format!("feed.ingredients[{}].sites[{j}].{last}", d.ingredient_index(id))
}

/// One site.
#[component]
fn SiteFields(
    /// Row of the ingredient.
    id: RowId,
    /// Row of the site.
    site: RowId,
) -> impl IntoView {
    let w = work();
    let row = site;
    let remove = move || {
        w.draft.update(|d| {
            if let Some(i) = d.ingredient_mut(id) {
                i.sites.retain(|s| s.id != row);
            }
        });
    };
    view! {
        <div class="fields">
            {choice(
                "kind",
                move |d| site_path(d, id, row, "kind"),
                KINDS,
                move |d| self::site(d, id, row).map(|s| s.kind),
                move |d, kind| {
                    if let Some(s) = site_mut(d, id, row) {
                        s.kind = kind;
                    }
                },
            )}
            {number(
                words("pKa", ""),
                move |d| site_path(d, id, row, "pka"),
                move |d| self::site(d, id, row).map(|s| &s.pka),
                move |d| site_mut(d, id, row).map(|s| &mut s.pka),
            )}
            <details class="quiet">
                <summary>"more about this site"</summary>
                <div class="fields">
                    {text(
                        Words { label: "temperature of the pKa, °C", unit: "", hint: "25 if left empty" },
                        move |d| site_path(d, id, row, "pka_temperature_c"),
                        move |d| self::site(d, id, row).map(|s| &s.temperature),
                        move |d| site_mut(d, id, row).map(|s| &mut s.temperature),
                    )}
                    {number(
                        Words { label: "enthalpy of proton loss", unit: "kJ/mol", hint: "for other temperatures; may be left empty" },
                        move |d| site_path(d, id, row, "enthalpy_kj_per_mol"),
                        move |d| self::site(d, id, row).map(|s| &s.enthalpy),
                        move |d| site_mut(d, id, row).map(|s| &mut s.enthalpy),
                    )}
                </div>
            </details>
            {button("Remove this site", "quiet", remove)}
        </div>
    }
}

/// Offers the sites of a solute the library knows, while none are typed.
#[component]
fn SitesFromLibrary(
    /// Row of the ingredient.
    id: RowId,
) -> impl IntoView {
    let w = work();
    let known = of_draft(move |d| {
        let i = d.ingredient(id)?;
        if i.sites.is_empty() && !i.disputed { solute_named(&i.name).filter(|s| !s.sites.is_empty()) } else { None }
    });
    move || {
        known.get().map(|solute| {
            let list: Vec<String> = solute.sites.iter().map(|s| s.pka.to_string()).collect();
            let words = format!("Take the library's pKa {} of {}", list.join(", "), solute.name);
            let take = move || {
                w.draft.update(|d| {
                    for s in &solute.sites {
                        let new = SiteDraft {
                            id: d.new_id(),
                            kind: match s.kind {
                                solutes::SiteKind::Acid => SiteKind::Acid,
                                solutes::SiteKind::Base => SiteKind::ConjugateAcidOfBase,
                            },
                            pka: NumberText {
                                value: s.pka.to_string(),
                                spread: String::new(),
                                source: cite(&solute.pka_source),
                            },
                            enthalpy: NumberText::default(),
                            temperature: String::new(),
                        };
                        if let Some(i) = d.ingredient_mut(id) {
                            i.sites.push(new);
                        }
                    }
                });
            };
            button(words, "quiet", take)
        })
    }
}
