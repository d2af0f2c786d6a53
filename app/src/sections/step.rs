//! The frame of one step.

use super::bind::stale;
use crate::parts::{CautionBox, CautionText, live, live_view};
use leptos::prelude::*;

/// A step of the flow: its name, its result in a line, and what belongs to it.
#[component]
pub fn Step(
    /// Id of the section.
    id: &'static str,
    /// Name of the step.
    name: &'static str,
    /// Its result in one line; empty while there is none.
    sum: Signal<String>,
    /// What belongs to it.
    children: Children,
) -> impl IntoView {
    let old = stale();
    view! {
        <section class="step" id=id aria-labelledby=format!("{id}-name")>
            <h2 id=format!("{id}-name")>{name}</h2>
            <p class="step-sum" class:stale=old hidden=live(move || sum.with(String::is_empty))>
                {live(move || sum.get())}
            </p>
            {children()}
        </section>
    }
}

/// Results of a step: marked while they are older than the text, away while there are none.
#[component]
pub fn Results(
    /// Whether there is anything to show.
    #[prop(into)]
    there: Signal<bool>,
    /// The results.
    children: Children,
) -> impl IntoView {
    let old = stale();
    view! {
        <div class="results" class:stale=old hidden=live(move || !there.get())>
            <p class="stale-word" hidden=live(move || !old.get())>
                "These results are older than what is typed: correct the fields marked above."
            </p>
            {children()}
        </div>
    }
}

/// Cautions, always open.
#[component]
pub fn Cautions(
    /// The cautions.
    #[prop(into)]
    list: Signal<Vec<CautionText>>,
) -> impl IntoView {
    view! {
        <div class="cautions">
            {live_view(move || list.get().into_iter().map(|caution| view! { <CautionBox caution/> }).collect_view())}
        </div>
    }
}
