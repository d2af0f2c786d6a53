//! How a number came about.

use super::live::live_view;
use leptos::prelude::*;

/// A quiet control that opens the formula with the values put in, its validity and its reference.
#[component]
pub fn Working(
    /// What is worked out.
    #[prop(into)]
    title: String,
    /// The formula, then the formula with the values in it, then the result.
    lines: Signal<Vec<String>>,
    /// Where the formula comes from.
    #[prop(into)]
    reference: String,
    /// Where it holds.
    #[prop(into)]
    validity: String,
) -> impl IntoView {
    let small = |word: &'static str, text: String| {
        (!text.is_empty()).then(|| {
            view! {
                <p class="working-note">
                    <span class="working-word">{word}</span>
                    " "
                    {text}
                </p>
            }
        })
    };
    let spoken = format!("working of {title}");
    view! {
        <details class="working">
            <summary aria-label=spoken>"working"</summary>
            <div class="working-body">
                <p class="working-title">{title}</p>
                <div class="formula" role="region" tabindex="0" aria-label="formula">
                    {live_view(move || lines.get().into_iter().map(|line| view! { <p>{line}</p> }).collect_view())}
                </div>
                {small("holds", validity)}
                {small("from", reference)}
            </div>
        </details>
    }
}
