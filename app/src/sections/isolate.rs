//! Isolate: what was weighed, beside the plan.

use super::bind::{fixed_number, hinted, of_draft, of_plan, words};
use super::step::{Cautions, Results, Step};
use crate::parts::{DataTable, Working, live};
use crate::state::work::work;
use crate::view_model::isolate::{anhydrous_working, comparison_head, comparison_rows, isolate_in_a_line};
use crate::view_model::solvent::cautions_at;
use leptos::prelude::*;
use unstir_core::library::cautions::CautionStep;

/// The step.
#[component]
pub fn IsolateStep() -> impl IntoView {
    let w = work();
    let weighed = of_draft(|d| d.isolate.weighed);
    let sum = of_plan(|g| isolate_in_a_line(&g.plan));
    let solvent = of_draft(|d| d.solvent.id.clone());
    let cautions = Memo::new(move |_| solvent.with(|s| cautions_at(&[CautionStep::Isolate], s)));
    view! {
        <Step id="isolate" name="Isolate" sum=sum>
            <label class="check">
                <input
                    type="checkbox"
                    prop:checked=weighed
                    on:change=move |e| w.draft.update(|d| d.isolate.weighed = event_target_checked(&e))
                />
                "the extract has been evaporated and its residue weighed"
            </label>
            <div class="fields" hidden=live(move || !weighed.get())>
                {fixed_number(
                    words("crude mass", "mg"),
                    "isolate.crude_mass_mg",
                    |d| &d.isolate.crude_mass,
                    |d| &mut d.isolate.crude_mass,
                )}
                {fixed_number(
                    hinted("purity", "", "fraction of the solvent-free solid that is target, as its hydrate"),
                    "isolate.purity",
                    |d| &d.isolate.purity,
                    |d| &mut d.isolate.purity,
                )}
                {fixed_number(
                    hinted("water of the hydrate", "mol/mol", "need not be whole; 0 if left empty"),
                    "isolate.hydrate_waters",
                    |d| &d.isolate.hydrate_waters,
                    |d| &mut d.isolate.hydrate_waters,
                )}
                {fixed_number(
                    hinted("solvent still in it", "", "a fraction; 0 if left empty"),
                    "isolate.residual_solvent_fraction",
                    |d| &d.isolate.residual_solvent,
                    |d| &mut d.isolate.residual_solvent,
                )}
            </div>
            <Results there=Signal::derive(move || weighed.get() && sum.with(|s| !s.is_empty()))>
                <DataTable
                    caption=Signal::stored("Plan and isolate".to_owned())
                    head=Signal::stored(comparison_head())
                    rows=of_plan(|g| comparison_rows(&g.plan))
                />
                <Working
                    title="the anhydrous target in the isolate"
                    lines=of_plan(|g| anhydrous_working(&g.study, &g.plan))
                    reference="stoichiometry; molar mass of water 18.015 g/mol, IUPAC (2021)"
                    validity="solvent and impurity hold no target; one weighing cannot tell poor mixing from a lower D or from losses at work-up"
                />
            </Results>
            <Cautions list=cautions/>
        </Step>
    }
}
