//! The page: the answer on top, then one section per step of the flow.

mod answer;
mod balance;
mod bind;
mod concentrate;
mod feed;
mod ingredient;
mod ionisation;
mod isolate;
mod make_up;
mod partition;
mod portions;
mod ranking;
mod readings;
mod shelf;
mod solvent;
mod step;
mod strip;

use crate::browser::storage::Store;
use crate::parts::Column;
use crate::state::work::Work;
use crate::view_model::column::levels;
use leptos::prelude::*;

/// The whole page.
#[component]
pub fn App() -> impl IntoView {
    let work = Work::start(Store::probe());
    provide_context(work);
    work.keep_from_now_on();
    let column = bind::of_plan(|g| levels(&g.plan));
    let old = bind::stale();
    view! {
        <div class="page">
            <header class="top">
                <shelf::Shelf/>
                <answer::AnswerPanel/>
            </header>
            <div class="flow">
                <aside class="liquid" class:stale=old aria-label="the liquid, level by level">
                    <Column levels=column/>
                </aside>
                <main class="steps">
                    <feed::Feed/>
                    <ionisation::Ionisation/>
                    <solvent::SolventStep/>
                    <portions::Portions/>
                    <isolate::IsolateStep/>
                    <strip::StripStep/>
                    <make_up::MakeUpStep/>
                    <balance::BalanceStep/>
                </main>
            </div>
            <footer class="foot">
                <p class="quiet">
                    "Formulas hold for dilute, ideal phases that do not dissolve in each other, with D constant; intervals are about 95 % (coverage factor 2). Planned results are estimates, not an assay. Everything stays in this browser; nothing is sent anywhere."
                </p>
            </footer>
        </div>
    }
}
