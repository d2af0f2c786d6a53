//! What all fields share: ids, the hint and the problem below the input.

use super::live::live;
use leptos::prelude::*;

/// The element id of the field for `path` in the study file, e.g. `field-feed-volume_ml` for
/// `feed.volume_ml` and `field-feed-ingredients-0-amount` for `feed.ingredients[0].amount`.
///
/// A link to `#` and this id leads to the field.
pub fn field_id(path: &str) -> String {
    let mut id = String::from("field");
    let mut parted = false;
    for c in path.chars() {
        if c.is_ascii_alphanumeric() || c == '_' {
            if !parted {
                id.push('-');
            }
            parted = true;
            id.push(c.to_ascii_lowercase());
        } else {
            parted = false;
        }
    }
    id
}

/// The ids of one field's elements.
#[derive(Clone, Copy)]
pub(super) struct Ids {
    /// Of the input itself.
    pub(super) input: Memo<String>,
    has_hint: bool,
    has_unit: bool,
}

impl Ids {
    /// Ids for the field at `path`.
    pub(super) fn new(path: Signal<String>, has_hint: bool, has_unit: bool) -> Self {
        Self { input: Memo::new(move |_| path.with(|p| field_id(p))), has_hint, has_unit }
    }

    /// The id of the part called `part`.
    pub(super) fn of(self, part: &str) -> String {
        self.input.with(|id| format!("{id}-{part}"))
    }

    /// What describes the input, in reading order.
    pub(super) fn described_by(self, has_problem: bool) -> Option<String> {
        let parts = [(self.has_unit, "unit"), (self.has_hint, "hint"), (has_problem, "problem")];
        let ids: Vec<String> = parts.into_iter().filter(|p| p.0).map(|p| self.of(p.1)).collect();
        (!ids.is_empty()).then(|| ids.join(" "))
    }
}

/// The hint, if there is one.
pub(super) fn hint_line(ids: Ids, hint: String) -> impl IntoView {
    (!hint.is_empty()).then(|| view! { <p class="hint" id=live(move || ids.of("hint"))>{hint}</p> })
}

/// The problem; the element stays, so that a screen reader keeps track of it.
pub(super) fn problem_line(ids: Ids, problem: Signal<Option<String>>) -> impl IntoView {
    view! {
        <p class="problem" id=live(move || ids.of("problem")) hidden=live(move || problem.with(Option::is_none))>
            {live(move || problem.get().unwrap_or_default())}
        </p>
    }
}

#[cfg(test)]
mod tests {
    use super::field_id;

    #[test]
    fn ids_follow_the_path() {
        for (path, id) in [
            ("feed.volume_ml", "field-feed-volume_ml"),
            ("feed.ingredients[0].amount", "field-feed-ingredients-0-amount"),
            ("feed.ingredients.0.amount", "field-feed-ingredients-0-amount"),
            ("/feed/ph", "field-feed-ph"),
            ("", "field"),
        ] {
            assert_eq!(field_id(path), id);
        }
    }
}
