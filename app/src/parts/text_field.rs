//! A field for words.

use super::field::{Ids, hint_line, problem_line};
use super::live::live;
use leptos::prelude::*;

/// A line of text: label above, what is wrong with it below.
#[component]
pub fn TextField(
    /// What the text is.
    #[prop(into)]
    label: String,
    /// Path in the study file; see [`field_id`](super::field_id).
    #[prop(into)]
    path: Signal<String>,
    /// What is typed.
    value: Signal<String>,
    /// Called at each keystroke.
    on_change: Callback<String>,
    /// What is wrong with it.
    problem: Signal<Option<String>>,
    /// Help shown below the input.
    #[prop(optional, into)]
    hint: String,
) -> impl IntoView {
    let ids = Ids::new(path, !hint.is_empty(), false);
    view! {
        <div class="field field-text" class:has-problem=live(move || problem.with(Option::is_some))>
            <label class="field-label" for=live(move || ids.input.get())>{label}</label>
            <div class="field-line">
                <input
                    type="text"
                    autocomplete="off"
                    id=live(move || ids.input.get())
                    prop:value=live(move || value.get())
                    aria-invalid=live(move || problem.with(|p| p.is_some().then_some("true")))
                    aria-describedby=live(move || ids.described_by(problem.with(Option::is_some)))
                    on:input=move |ev| on_change.run(event_target_value(&ev))
                />
            </div>
            {hint_line(ids, hint)}
            {problem_line(ids, problem)}
        </div>
    }
}
