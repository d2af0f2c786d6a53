//! A field for one of a few.

use super::field::{Ids, problem_line};
use super::live::{live, live_view};
use leptos::prelude::*;

/// One of several options: label above, what is wrong with it below.
#[component]
pub fn ChoiceField(
    /// What is chosen.
    #[prop(into)]
    label: String,
    /// Path in the study file; see [`field_id`](super::field_id).
    #[prop(into)]
    path: Signal<String>,
    /// The value and the words of each option.
    options: Signal<Vec<(String, String)>>,
    /// The value chosen. One that is not among the options is shown as it is, never dropped.
    value: Signal<String>,
    /// Called with the value chosen.
    on_change: Callback<String>,
    /// What is wrong with it.
    problem: Signal<Option<String>>,
) -> impl IntoView {
    let ids = Ids::new(path, false, false);
    // Built anew when the options change, not when another one is chosen; which one is chosen is
    // told to each option by itself.
    let shown = Memo::new(move |_| {
        let mut shown = options.get();
        value.with(|v| {
            if !shown.iter().any(|o| &o.0 == v) {
                shown.insert(0, (v.clone(), if v.is_empty() { "choose…".to_owned() } else { v.clone() }));
            }
        });
        shown
    });
    view! {
        <div class="field field-choice" class:has-problem=live(move || problem.with(Option::is_some))>
            <label class="field-label" for=live(move || ids.input.get())>{label}</label>
            <div class="field-line">
                <select
                    id=live(move || ids.input.get())
                    aria-invalid=live(move || problem.with(|p| p.is_some().then_some("true")))
                    aria-describedby=live(move || ids.described_by(problem.with(Option::is_some)))
                    on:change=move |ev| on_change.run(event_target_value(&ev))
                >
                    {live_view(move || {
                        shown
                            .get()
                            .into_iter()
                            .map(|(of_option, words)| {
                                let own = of_option.clone();
                                view! {
                                    <option value=of_option prop:selected=live(move || value.with(|v| *v == own))>
                                        {words}
                                    </option>
                                }
                            })
                            .collect_view()
                    })}
                </select>
            </div>
            {problem_line(ids, problem)}
        </div>
    }
}
