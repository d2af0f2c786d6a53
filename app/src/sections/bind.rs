//! Fields bound to the draft: each reads its text from it and writes its text to it.

use crate::parts::{ChoiceField, NumberField, TextField};
use crate::state::NumberText;
use crate::state::draft::Draft;
use crate::state::work::{Good, work};
use leptos::prelude::*;
use serde::Serialize;
use serde::de::DeserializeOwned;

/// Words of a number field.
#[derive(Clone, Copy, Default)]
pub struct Words {
    /// Label.
    pub label: &'static str,
    /// Unit; empty for none.
    pub unit: &'static str,
    /// Help; empty for none.
    pub hint: &'static str,
}

/// Label and unit, without a hint.
pub const fn words(label: &'static str, unit: &'static str) -> Words {
    Words { label, unit, hint: "" }
}

/// Label, unit and hint.
pub const fn hinted(label: &'static str, unit: &'static str, hint: &'static str) -> Words {
    Words { label, unit, hint }
}

// The closures of a field are boxed at once: a memo or a callback is then made for one type, not
// for each field, which keeps the page small.
type Of<T> = Box<dyn Fn(&Draft) -> T + Send + Sync>;
type Get<T> = Box<dyn Fn(&Draft) -> Option<&T> + Send + Sync>;
type Edit<T> = Box<dyn Fn(&mut Draft) -> Option<&mut T> + Send + Sync>;
type Set = Box<dyn Fn(&mut Draft, String) + Send + Sync>;

/// Something of the draft, remembered.
fn memo_of<T>(of: Of<T>) -> Signal<T>
where
    T: Clone + PartialEq + Send + Sync + 'static,
{
    let draft = work().draft;
    Memo::new(move |_| draft.with(|d| of(d))).into()
}

/// What is typed in a field, remembered.
fn typed_of<T>(get: Get<T>) -> Signal<T>
where
    T: Clone + Default + PartialEq + Send + Sync + 'static,
{
    let draft = work().draft;
    Memo::new(move |_| draft.with(|d| get(d).cloned().unwrap_or_default())).into()
}

/// Writes what is typed.
fn write_to<T: Send + Sync + 'static>(edit: Edit<T>) -> Callback<T> {
    let draft = work().draft;
    Callback::new(move |typed: T| {
        draft.update(|d| {
            if let Some(field) = edit(d) {
                *field = typed;
            }
        });
    })
}

/// A number at `path`, read by `get` and changed by `edit`; both find nothing once its row is gone.
pub fn number(
    words: Words,
    path: impl Fn(&Draft) -> String + Send + Sync + 'static,
    get: impl Fn(&Draft) -> Option<&NumberText> + Send + Sync + 'static,
    edit: impl Fn(&mut Draft) -> Option<&mut NumberText> + Send + Sync + 'static,
) -> AnyView {
    number_view(words, memo_of(Box::new(path)), typed_of(Box::new(get)), write_to(Box::new(edit)))
}

fn number_view(
    words: Words,
    path: Signal<String>,
    value: Signal<NumberText>,
    on_change: Callback<NumberText>,
) -> AnyView {
    let problem = work().problem_at(path);
    let Words { label, unit, hint } = words;
    view! { <NumberField label unit path value on_change problem hint with_source=true/> }.into_any()
}

/// A number that is always there, at a fixed path.
pub fn fixed_number(
    words: Words,
    path: &'static str,
    get: fn(&Draft) -> &NumberText,
    edit: fn(&mut Draft) -> &mut NumberText,
) -> AnyView {
    number(words, move |_| path.to_owned(), move |d| Some(get(d)), move |d| Some(edit(d)))
}

/// A text at `path`.
pub fn text(
    words: Words,
    path: impl Fn(&Draft) -> String + Send + Sync + 'static,
    get: impl Fn(&Draft) -> Option<&String> + Send + Sync + 'static,
    edit: impl Fn(&mut Draft) -> Option<&mut String> + Send + Sync + 'static,
) -> AnyView {
    text_view(words, memo_of(Box::new(path)), typed_of(Box::new(get)), write_to(Box::new(edit)))
}

fn text_view(words: Words, path: Signal<String>, value: Signal<String>, on_change: Callback<String>) -> AnyView {
    let problem = work().problem_at(path);
    view! { <TextField label=words.label path value on_change problem hint=words.hint/> }.into_any()
}

/// One of a few, each with its words; written in the file as its own tag.
pub fn choice<T>(
    label: &'static str,
    path: impl Fn(&Draft) -> String + Send + Sync + 'static,
    options: &'static [(T, &'static str)],
    get: impl Fn(&Draft) -> Option<T> + Send + Sync + 'static,
    set: impl Fn(&mut Draft, T) + Send + Sync + 'static,
) -> AnyView
where
    T: Copy + Serialize + DeserializeOwned + Send + Sync + 'static,
{
    let options: Vec<(String, String)> =
        options.iter().map(|(value, words)| (tag(value), (*words).to_owned())).collect();
    let path = move |d: &Draft| path(d);
    let get = move |d: &Draft| get(d).as_ref().map(tag).unwrap_or_default();
    let set = move |d: &mut Draft, chosen: String| {
        if let Ok(value) = serde_json::from_value(serde_json::Value::String(chosen)) {
            set(d, value);
        }
    };
    choice_of(label, path, move |_| options.clone(), get, set)
}

/// One of a list that depends on the draft, each a value and its words.
pub fn choice_of(
    label: &'static str,
    path: impl Fn(&Draft) -> String + Send + Sync + 'static,
    options: impl Fn(&Draft) -> Vec<(String, String)> + Send + Sync + 'static,
    get: impl Fn(&Draft) -> String + Send + Sync + 'static,
    set: impl Fn(&mut Draft, String) + Send + Sync + 'static,
) -> AnyView {
    choice_view(label, memo_of(Box::new(path)), memo_of(Box::new(options)), memo_of(Box::new(get)), Box::new(set))
}

fn choice_view(
    label: &'static str,
    path: Signal<String>,
    options: Signal<Vec<(String, String)>>,
    value: Signal<String>,
    set: Set,
) -> AnyView {
    let draft = work().draft;
    let on_change = Callback::new(move |chosen: String| draft.update(|d| set(d, chosen)));
    let problem = work().problem_at(path);
    view! { <ChoiceField label path options value on_change problem/> }.into_any()
}

/// The tag of a choice in the file.
fn tag<T: Serialize>(value: &T) -> String {
    serde_json::to_value(value).ok().and_then(|v| v.as_str().map(str::to_owned)).unwrap_or_default()
}

/// Something of what is shown; the default while there has been no plan.
pub fn of_plan<T>(of: impl Fn(&Good) -> T + Send + Sync + 'static) -> Signal<T>
where
    T: Clone + Default + PartialEq + Send + Sync + 'static,
{
    plan_memo(Box::new(of))
}

fn plan_memo<T>(of: Box<dyn Fn(&Good) -> T + Send + Sync>) -> Signal<T>
where
    T: Clone + Default + PartialEq + Send + Sync + 'static,
{
    let shown = work().shown;
    Memo::new(move |_| shown.with(|s| s.good.as_ref().map(|g| of(g)).unwrap_or_default())).into()
}

/// Whether what is shown is older than the text.
pub fn stale() -> Signal<bool> {
    let shown = work().shown;
    Memo::new(move |_| shown.with(|s| s.stale)).into()
}

/// Something of the draft.
pub fn of_draft<T>(of: impl Fn(&Draft) -> T + Send + Sync + 'static) -> Signal<T>
where
    T: Clone + PartialEq + Send + Sync + 'static,
{
    memo_of(Box::new(of))
}

/// A button with plain words.
pub fn button(words: impl Into<String>, class: &'static str, press: impl Fn() + 'static) -> AnyView {
    button_view(words.into(), class, Box::new(press))
}

fn button_view(words: String, class: &'static str, press: Box<dyn Fn()>) -> AnyView {
    view! { <button type="button" class=class on:click=move |_| press()>{words}</button> }.into_any()
}
