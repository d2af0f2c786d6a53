//! Balance: every ingredient in every stream, and what the uncertainty is made of.

use super::bind::of_plan;
use super::step::{Results, Step};
use crate::parts::{DataTable, Working, live};
use crate::view_model::balance::{balance_head, balance_line, balance_rows, contributions_head, contributions_rows};
use leptos::prelude::*;

/// The step.
#[component]
pub fn BalanceStep() -> impl IntoView {
    let sum = of_plan(|g| balance_line(&g.plan));
    let contributions = of_plan(|g| contributions_rows(&g.plan));
    view! {
        <Step id="balance" name="Balance" sum=sum>
            <Results there=Signal::derive(move || sum.with(|s| !s.is_empty()))>
                <DataTable
                    caption=Signal::stored("Every ingredient in every stream".to_owned())
                    head=of_plan(|g| balance_head(&g.plan))
                    rows=of_plan(|g| balance_rows(&g.plan))
                />
                <Working
                    title="the balance"
                    lines=Signal::stored(vec!["(Σ in − Σ out)/Σ in, for each ingredient".to_owned()])
                    reference="conservation of mass"
                    validity="planned streams; nothing reacts or evaporates but water and solvent"
                />
                <div hidden=live(move || contributions.with(Vec::is_empty))>
                    <DataTable
                        caption=Signal::stored("What the doubt about the planned removal is made of".to_owned())
                        head=Signal::stored(contributions_head())
                        rows=contributions
                    />
                    <Working
                        title="the uncertainty"
                        lines=Signal::stored(vec![
                            "u²(y) = Σ (∂y/∂xᵢ)²·u²(xᵢ), slopes by central differences".to_owned(),
                            "a range counts as uniform: u = (high − low)/√12; intervals are ± 2u".to_owned(),
                        ])
                        reference="JCGM 100:2008, 5.1.2 and 4.3.7"
                        validity="inputs independent; the plan nearly straight over ± u of each"
                    />
                </div>
            </Results>
        </Step>
    }
}
