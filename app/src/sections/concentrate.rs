//! Taking water off before extraction.

use super::bind::{choice, fixed_number, hinted, number, of_draft, of_plan, words};
use super::step::Results;
use crate::parts::{Working, live};
use crate::state::draft::ConcentrateBy;
use crate::view_model::feed::{liquor_line, liquor_working};
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
                    reference="mass balance; densities of sucrose solutions, National Bureau of Standards Circular 440 (1942)"
                    validity="0–70 °Bx at 20 °C, all soluble solids counted as sucrose, nothing but water leaves"
                />
            </Results>
        </div>
    }
}
