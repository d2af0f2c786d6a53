//! A field for a number with its unit, spread and source.

use super::field::{Ids, hint_line, problem_line};
use super::live::live;
use crate::state::NumberText;
use leptos::prelude::*;

/// A number as typed: label above, unit after, what is wrong with it below, and, folded away, its
/// spread and source.
#[component]
pub fn NumberField(
    /// What the number is.
    #[prop(into)]
    label: String,
    /// The unit, shown after the input; empty for none.
    #[prop(into)]
    unit: String,
    /// Path in the study file, e.g. `feed.volume_ml`; see [`field_id`](super::field_id).
    #[prop(into)]
    path: Signal<String>,
    /// What is typed.
    value: Signal<NumberText>,
    /// Called with everything typed so far at each keystroke in any of the inputs.
    on_change: Callback<NumberText>,
    /// What is wrong with it.
    problem: Signal<Option<String>>,
    /// Help shown below the input.
    #[prop(optional, into)]
    hint: String,
    /// Whether a spread and a source can be given.
    #[prop(optional)]
    with_source: bool,
) -> impl IntoView {
    let has_unit = !unit.is_empty();
    let ids = Ids::new(path, !hint.is_empty(), has_unit);
    let change = move |set: fn(&mut NumberText, String), ev: web_sys::Event| {
        let mut text = value.get_untracked();
        set(&mut text, event_target_value(&ev));
        on_change.run(text);
    };
    let said = move || value.with(summary).unwrap_or_else(|| "± and source".to_owned());
    view! {
        <div class="field field-number" class:has-problem=live(move || problem.with(Option::is_some))>
            <label class="field-label" for=live(move || ids.input.get())>{label}</label>
            <div class="field-line">
                <input
                    class="input-number"
                    type="text"
                    inputmode="decimal"
                    autocomplete="off"
                    id=live(move || ids.input.get())
                    // Long numbers stay in sight; short ones keep the usual width.
                    size=live(move || value.with(|v| v.value.chars().count().clamp(6, 16)).to_string())
                    prop:value=live(move || value.with(|v| v.value.clone()))
                    aria-invalid=live(move || problem.with(|p| p.is_some().then_some("true")))
                    aria-describedby=live(move || ids.described_by(problem.with(Option::is_some)))
                    on:input=move |ev| change(|text, typed| text.value = typed, ev)
                />
                {has_unit.then(|| view! { <span class="unit" id=live(move || ids.of("unit"))>{unit}</span> })}
            </div>
            {hint_line(ids, hint)}
            {problem_line(ids, problem)}
            {with_source
                .then(|| {
                    view! {
                        <details class="source" class:unsaid=live(move || value.with(|v| summary(v).is_none()))>
                            <summary title=said>
                                <span class="source-said">{said}</span>
                            </summary>
                            <div class="source-fields">
                                <label class="field-label" for=live(move || ids.of("spread"))>
                                    "± or range"
                                </label>
                                <input
                                    class="input-small"
                                    type="text"
                                    autocomplete="off"
                                    placeholder="0.2 or 4.6 to 10.2"
                                    id=live(move || ids.of("spread"))
                                    prop:value=live(move || value.with(|v| v.spread.clone()))
                                    on:input=move |ev| change(|text, typed| text.spread = typed, ev)
                                />
                                <label class="field-label" for=live(move || ids.of("source"))>
                                    "source"
                                </label>
                                <input
                                    class="input-small"
                                    type="text"
                                    autocomplete="off"
                                    placeholder="measured, label, reference"
                                    id=live(move || ids.of("source"))
                                    prop:value=live(move || value.with(|v| v.source.clone()))
                                    on:input=move |ev| change(|text, typed| text.source = typed, ev)
                                />
                            </div>
                        </details>
                    }
                })}
        </div>
    }
}

/// Spread and source in a few words; `None` if neither is given.
fn summary(text: &NumberText) -> Option<String> {
    let spread = text.spread.trim();
    // A single number is a standard uncertainty; anything with more words speaks for itself.
    let bare = spread.starts_with(|c: char| c.is_ascii_digit() || c == '.') && !spread.contains([' ', ';', '–', '—']);
    let spread = if bare { format!("± {spread}") } else { spread.to_owned() };
    let parts: Vec<&str> = [spread.as_str(), text.source.trim()].into_iter().filter(|p| !p.is_empty()).collect();
    (!parts.is_empty()).then(|| parts.join(" · "))
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn summaries() {
        for (spread, source, expected) in [
            ("", "", None),
            ("0.2", "", Some("± 0.2")),
            (" 0,2 ", "label", Some("± 0,2 · label")),
            ("± 0.2", "", Some("± 0.2")),
            ("1e-3", "", Some("± 1e-3")),
            ("4.6 to 10.2", "a table", Some("4.6 to 10.2 · a table")),
            ("4.6–10.2", "", Some("4.6–10.2")),
            ("", "measured", Some("measured")),
        ] {
            let text = NumberText { value: "9.5".into(), spread: spread.into(), source: source.into() };
            assert_eq!(summary(&text).as_deref(), expected);
        }
    }
}
