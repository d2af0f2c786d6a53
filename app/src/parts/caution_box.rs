//! A caution beside the choice that brings it.

use leptos::prelude::*;

/// The words of a caution.
#[derive(Clone, Debug, PartialEq)]
pub struct CautionText {
    /// How serious it is, in one word, e.g. `Warning`.
    pub sign_word: String,
    /// What can happen.
    pub what_can_happen: String,
    /// What to do about it.
    pub what_to_do: String,
    /// Where this is said; may be empty.
    pub source: String,
}

/// A caution in its row: always open, its kind said in a word and not by colour alone.
#[component]
pub fn CautionBox(
    /// What it says.
    caution: CautionText,
) -> impl IntoView {
    let CautionText { sign_word, what_can_happen, what_to_do, source } = caution;
    view! {
        <div class="caution" role="note">
            <p class="caution-what">
                <strong class="caution-word">{sign_word}</strong>
                " "
                {what_can_happen}
            </p>
            {(!what_to_do.is_empty()).then(|| view! { <p class="caution-do">{what_to_do}</p> })}
            {(!source.is_empty()).then(|| view! { <p class="caution-source">{source}</p> })}
        </div>
    }
}
