//! Solvent: the one in use with its cautions, the partition coefficients, and the library.

use super::bind::{button, fixed_number, hinted, number, of_draft, of_plan, text, words};
use super::partition::PartitionFields;
use super::ranking::Ranking;
use super::step::{Cautions, Step};
use crate::parts::{Working, live, live_view};
use crate::state::NumberText;
use crate::state::work::work;
use crate::view_model::solvent::{cautions_at, spill_sentences};
use leptos::prelude::*;
use unstir_core::library::cautions::CautionStep;
use unstir_core::library::solvents::solvent;

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
    view! {
        <Step id="solvent" name="Solvent" sum=sum>
            <p class="quiet">
                "Nothing here says that a solvent may be used for your purpose: local rules and licensed practice decide, and the supplier's safety data sheet prevails over these rows."
            </p>
            <OwnSolvent/>
            <Cautions list=cautions/>
            <Spill/>
            <PartitionFields/>
            <Ranking/>
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

/// The air of the room if the solvent is spilled.
#[component]
fn Spill() -> impl IntoView {
    let sentences = of_plan(|g| spill_sentences(&g.plan));
    view! {
        <div hidden=live(move || sentences.with(Vec::is_empty))>
            <h3>"If it is spilled"</h3>
            <div class="fields">
                {fixed_number(
                    hinted("volume spilled", "mL", "all of the solvent if left empty"),
                    "room.spill_ml",
                    |d| &d.room.spill,
                    |d| &mut d.room.spill,
                )}
                {fixed_number(
                    hinted("room", "m³", "50 if left empty"),
                    "room.volume_m3",
                    |d| &d.room.volume,
                    |d| &mut d.room.volume,
                )}
                {fixed_number(
                    hinted("air changes", "1/h", "2 if left empty"),
                    "room.changes_per_h",
                    |d| &d.room.changes,
                    |d| &mut d.room.changes,
                )}
            </div>
            <ul class="words">
                {live_view(move || sentences.get().into_iter().map(|s| view! { <li>{s}</li> }).collect_view())}
            </ul>
            <Working
                title="the air of the room"
                lines=Signal::stored(
                    vec![
                        "c₀ = m/V_room; c = c₀·exp(−n·t/k), n air changes, k = 3 the mixing factor".to_owned(),
                        "ppm = (mg/m³)·24.055/M at 20 °C".to_owned(),
                    ],
                )
                reference="single-zone mass balance, J. Kuo, Practical Design Calculations; limits as listed in the row of the solvent"
                validity="an order of magnitude, for a warning; not a measurement, and not the air beside the spill"
            />
        </div>
    }
}
