//! Taking water off before extraction.

use super::bind::{choice, fixed_number, hinted, number, of_draft, of_plan, words};
use super::step::Results;
use crate::parts::{DataTable, Working, live, live_view};
use crate::state::draft::ConcentrateBy;
use crate::view_model::feed::{liquor_line, liquor_working};
use crate::view_model::settle::{settling_sentences, settling_working, trade_head, trade_rows};
use leptos::prelude::*;

const WAYS: &[(ConcentrateBy, &str)] = &[
    (ConcentrateBy::Unchanged, "no water is taken off"),
    (ConcentrateBy::VolumeMl, "to a volume"),
    (ConcentrateBy::WaterRemovedG, "by a mass of water"),
    (ConcentrateBy::Brix, "to soluble solids"),
];

/// How far water is taken off, and the liquor it leaves.
#[component]
pub fn ConcentrateFields() -> impl IntoView {
    let by = of_draft(|d| d.concentrate.by);
    let changes = Signal::derive(move || by.get() != ConcentrateBy::Unchanged);
    let line = of_plan(|g| liquor_line(&g.plan));
    view! {
        <div id="concentrate">
            <h3>"Concentrate"</h3>
            <div class="fields">
                {choice(
                    "take water off",
                    |_| "concentrate.to".to_owned(),
                    WAYS,
                    |d| Some(d.concentrate.by),
                    |d, by| d.concentrate.by = by,
                )}
                <div class="when" hidden=live(move || !changes.get())>
                    {live(move || {
                        let (label, unit, last) = match by.get() {
                            ConcentrateBy::WaterRemovedG => ("water taken off", "g", "water_removed_g"),
                            ConcentrateBy::Brix => ("soluble solids to reach", "°Bx", "brix"),
                            _ => ("volume of the liquor", "mL", "volume_ml"),
                        };
                        number(
                            words(label, unit),
                            move |_| format!("concentrate.to.{last}"),
                            |d| Some(&d.concentrate.to),
                            |d| Some(&mut d.concentrate.to),
                        )
                    })}
                </div>
                <div class="when" hidden=live(move || !changes.get())>
                    {fixed_number(
                        hinted("pH afterwards", "", "measure it; while this is empty it is worked out"),
                        "concentrate.ph_after",
                        |d| &d.concentrate.ph_after,
                        |d| &mut d.concentrate.ph_after,
                    )}
                </div>
            </div>
            <Results there=Signal::derive(move || line.with(|l| !l.is_empty()))>
                <p>"Liquor: " {live(move || line.get())}</p>
                <Working
                    title="the liquor"
                    lines=of_plan(|g| liquor_working(&g.study, &g.plan.liquor))
                    reference="mass balance; densities of sucrose solutions, ICUMSA SPS-4, H. Bettin et al. (1998)"
                    validity="0–75 °Bx at 20 °C, all soluble solids counted as sucrose, nothing but water leaves"
                />
            </Results>
            <Settling/>
        </div>
    }
}

/// What concentrating does to settling.
#[component]
fn Settling() -> impl IntoView {
    let sentences = of_plan(|g| settling_sentences(&g.study, &g.plan));
    view! {
        <Results there=Signal::derive(move || sentences.with(|s| !s.is_empty()))>
            <h3>"Settling in this liquor"</h3>
            <ul class="words">
                {live_view(move || sentences.get().into_iter().map(|s| view! { <li>{s}</li> }).collect_view())}
            </ul>
            <DataTable
                caption=Signal::stored("What concentrating saves and costs".to_owned())
                head=Signal::stored(trade_head())
                rows=of_plan(|g| trade_rows(&g.plan))
            />
            <Working
                title="settling"
                lines=of_plan(|g| settling_working(&g.study, &g.plan))
                reference="G. G. Stokes (1851); viscosity J. Génotelle and the tables of J. F. Swindells (1958); density ICUMSA SPS-4 (1998)"
                validity="small rigid drops, the same drop in both; soluble solids as sucrose, 0–75 °Bx; says nothing of emulsions held by surface-active ingredients"
            />
        </Results>
    }
}
