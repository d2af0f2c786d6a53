//! The answer: a sentence, four figures, what the reader should know, and what stops a plan.

use super::bind::{of_plan, stale};
use crate::parts::{field_id, live, live_view};
use crate::state::work::work;
use crate::view_model::answer::{Figure, figures, step_of};
use leptos::prelude::*;

/// Answer, notices and problems.
#[component]
pub fn AnswerPanel() -> impl IntoView {
    let old = stale();
    let sentence = of_plan(|g| g.plan.answer.sentence.clone());
    let detail = of_plan(|g| g.plan.answer.detail.clone());
    let shown = of_plan(|g| figures(&g.plan).to_vec());
    let none = move || sentence.with(String::is_empty);
    view! {
        <div class="answer" class:stale=old role="status">
            <p class="stale-word" hidden=live(move || !old.get() || none())>
                "This answer is older than what is typed."
            </p>
            <p class="answer-sentence">
                {live(move || {
                    if none() {
                        "Describe the liquid on your bench: once the fields listed below are filled, the answer stands here.".to_owned()
                    } else {
                        unbroken(&sentence.get())
                    }
                })}
            </p>
            <p class="answer-detail" hidden=live(move || detail.with(String::is_empty))>{live(move || unbroken(&detail.get()))}</p>
            <div class="figures">
                {live_view(move || shown.get().into_iter().map(figure).collect_view())}
            </div>
        </div>
        <Problems/>
        <Notices/>
    }
}

/// Keeps a number and its percent sign in one line.
fn unbroken(text: &str) -> String {
    text.replace(" %", "\u{a0}%")
}

fn figure(f: Figure) -> impl IntoView {
    let interval = (!f.interval.is_empty()).then(|| view! { <p class="interval">{f.interval}</p> });
    let note = (!f.note.is_empty()).then(|| view! { <p class="figure-note quiet">{f.note}</p> });
    view! {
        <div class="figure">
            <p class="figure-label">{f.label}</p>
            <p class="figure-value">{f.value}</p>
            {interval}
            {note}
        </div>
    }
}

/// Links to the fields that stop a plan.
#[component]
fn Problems() -> impl IntoView {
    let problems = work().problems;
    let count = move || problems.with(Vec::len);
    view! {
        <details class="problems" hidden=live(move || count() == 0) open=live(move || count() <= 3)>
            <summary>
                {live(move || match count() {
                    1 => "1 field stops the plan".to_owned(),
                    n => format!("{n} fields stop the plan"),
                })}
            </summary>
            <ul>
                {live_view(move || {
                    problems
                        .get()
                        .into_iter()
                        .map(|p| {
                            let (anchor, step) = step_of(&p.at);
                            let field = field_id(&p.at);
                            view! {
                                <li>
                                    <a href=format!("#{anchor}") on:click=move |e| go_to(&e, &field)>{step}</a>
                                    ": "
                                    {p.message}
                                </li>
                            }
                        })
                        .collect_view()
                })}
            </ul>
        </details>
    }
}

/// Puts the cursor into the field where there is one; else the link leads to its step.
fn go_to(event: &web_sys::MouseEvent, field: &str) {
    use wasm_bindgen::JsCast;
    let element = document().get_element_by_id(field).and_then(|e| e.dyn_into::<web_sys::HtmlElement>().ok());
    if let Some(element) = element {
        event.prevent_default();
        let _ = element.focus();
        element.scroll_into_view();
    }
}

/// What the reader should know about the plan.
#[component]
fn Notices() -> impl IntoView {
    let notices = of_plan(|g| g.notices.clone());
    view! {
        <ul class="notices" hidden=live(move || notices.with(Vec::is_empty))>
            {live_view(move || {
                notices
                    .get()
                    .into_iter()
                    .map(|n| {
                        let (anchor, step) = step_of(&n.at);
                        view! {
                            <li class="notice">
                                <a class="notice-where" href=format!("#{anchor}")>{step}</a>
                                " "
                                {n.message}
                            </li>
                        }
                    })
                    .collect_view()
            })}
        </ul>
    }
}
