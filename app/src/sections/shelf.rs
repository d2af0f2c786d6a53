//! Name of the study, and the shelf: new, demo, copy, delete with undo, files.

use super::bind::{button, of_draft};
use crate::browser::files;
use crate::parts::{live, live_view};
use crate::state::demos::DEMOS;
use crate::state::draft::Draft;
use crate::state::file_text::{draft_of, file_of};
use crate::state::shelf::ShelfEntry;
use crate::state::work::{Saved, Work, work};
use leptos::html::Input;
use leptos::prelude::*;

/// The line with the study's name, whether it is kept, and the shelf.
#[component]
pub fn Shelf() -> impl IntoView {
    let w = work();
    let name = of_draft(|d| d.name.clone());
    let saved = move || match w.saved.get() {
        Saved::Kept if w.lasts() => "kept in this browser",
        Saved::Kept => "kept only while this page is open",
        Saved::Soon => "keeping…",
        Saved::Not(_) => "not kept",
    };
    let demo = of_draft(|d| d.note.contains("Invented scenario"));
    view! {
        <div class="top-line">
            <p class="product">"Unstir"</p>
            <label class="sr-only" for="study-name">"Name of the study"</label>
            <input
                id="study-name"
                class="study-name"
                type="text"
                autocomplete="off"
                prop:value=live(move || name.get())
                on:input=move |e| w.draft.update(|d| d.name = event_target_value(&e))
            />
            <span class="saved">{saved}</span>
            {button("Save as a file", "", move || save_file(w))}
            <OpenFile/>
        </div>
        <p class="limits">
            "Unstir computes; it releases nothing. Whether a solvent may be used, and what becomes of a treated liquid, local rules and licensed practice decide."
        </p>
        <Told/>
        <div class="top-tools">
            <ShelfList/>
            <Note/>
            <p class="invite" hidden=live(move || !demo.get())>
                "A demo study with an invented scenario. "
                {button("Describe the liquid on your bench", "main", move || w.begin(Draft::blank()))}
            </p>
        </div>
    }
}

fn save_file(w: Work) {
    let (name, text) = w.draft.with_untracked(file_of);
    w.message.set(Some(match files::save(&name, &text) {
        Ok(()) => format!("Handed “{name}” to the browser to save."),
        Err(why) => why,
    }));
}

/// The file input, behind a button.
#[component]
fn OpenFile() -> impl IntoView {
    let w = work();
    let input = NodeRef::<Input>::new();
    let done = Callback::new(move |read: Result<(String, String), String>| match read {
        Ok((name, text)) => w.open_text(&name, &text),
        Err(why) => w.message.set(Some(why)),
    });
    let chosen = move |_| {
        if let Some(input) = input.get_untracked() {
            files::read_chosen(&input, done);
        }
    };
    let choose = move || {
        if let Some(input) = input.get_untracked() {
            input.click();
        }
    };
    view! {
        {button("Open a file", "", choose)}
        <input
            node_ref=input
            type="file"
            accept=".json,application/json"
            class="sr-only"
            tabindex="-1"
            aria-label="study file to open"
            on:change=chosen
        />
    }
}

/// What the last action came to, and what the browser does not keep.
#[component]
fn Told() -> impl IntoView {
    let w = work();
    let not_kept = move || match w.saved.get() {
        Saved::Not(why) => Some(why.words()),
        _ if !w.lasts() => Some("This browser keeps nothing here; save the study as a file."),
        _ => None,
    };
    let removed = move || {
        w.removed.get().map(|r| {
            view! {
                <p class="notice">
                    {format!("Deleted “{}”. ", r.draft.name)}
                    {button("Undo", "", move || w.put_back())}
                </p>
            }
        })
    };
    let other_tab = move || {
        w.other_tab.get().then(|| {
            view! {
                <p class="notice">
                    "Another tab has changed this study; nothing typed here is kept until you choose. "
                    {button("Take the other tab's version", "", move || w.take_other_tab())}
                    {button("Go on here as a copy", "", move || w.keep_as_copy())}
                </p>
            }
        })
    };
    view! {
        <div class="told" role="status">
            {live_view(move || not_kept().map(|words| view! { <p class="notice">{words}</p> }))}
            {live_view(move || w.message.get().map(|words| view! { <p class="notice">{words}</p> }))}
            {removed}
            {other_tab}
        </div>
    }
}

/// The studies kept here.
#[component]
fn ShelfList() -> impl IntoView {
    let w = work();
    let count = move || w.shelf.with(Vec::len);
    let demos = DEMOS.iter().map(|demo| {
        let open = move || {
            if let Ok(draft) = draft_of(demo.text) {
                w.begin(draft);
            }
        };
        button(format!("Demo: {}", demo.title), "", open)
    });
    let entry = move |e: ShelfEntry| {
        let open_now = w.id.get() == e.id;
        view! {
            <li class="shelf-row" class:current=open_now>
                {button(e.name, "quiet", move || w.open(e.id))}
                <span class="quiet" hidden=!open_now>"open now"</span>
            </li>
        }
    };
    let confirm_free = move || w.remove();
    view! {
        <details class="shelf">
            <summary>{live(move || format!("Studies ({})", count()))}</summary>
            <ul class="shelf-list">
                {live_view(move || w.shelf.get().into_iter().map(entry).collect_view())}
            </ul>
            <div class="buttons">
                {button("New study", "", move || w.begin(Draft::blank()))}
                {button("Duplicate this study", "", move || w.duplicate())}
                {button("Delete this study", "danger", confirm_free)}
            </div>
            <div class="buttons">{demos.collect_view()}</div>
        </details>
    }
}

/// Free text about the study.
#[component]
fn Note() -> impl IntoView {
    let w = work();
    let note = of_draft(|d| d.note.clone());
    view! {
        <details class="note quiet">
            <summary>"Note"</summary>
            <label class="sr-only" for="study-note">"Note: purpose, batch, who"</label>
            <textarea
                id="study-note"
                rows="3"
                prop:value=live(move || note.get())
                on:input=move |e| w.draft.update(|d| d.note = event_target_value(&e))
            ></textarea>
        </details>
    }
}
