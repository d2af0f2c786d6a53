//! The one state of the page and everything derived from it.
//!
//! ```text
//! draft (as typed) -> study or problems -> plan with notices or problems -> what is shown
//! ```

use super::demos::DEMOS;
use super::draft::Draft;
use super::file_text;
use super::shelf::{self, ShelfEntry};
use crate::browser::storage::{NotKept, Store};
use leptos::prelude::*;
use std::sync::Arc;
use std::time::Duration;
use unstir_core::outcome::{Notice, Outcome};
use unstir_core::plan::{Curves, Plan, curves, plan};
use unstir_core::study::{Problem, Study};
use wasm_bindgen::JsCast;

/// How long typing rests before it is kept.
const KEEP_AFTER: Duration = Duration::from_millis(250);
/// Points of the curves against pH 0 to 14.
const CURVE_POINTS: usize = 141;

/// A plan with the study it belongs to.
#[derive(Clone, Debug, PartialEq)]
pub struct Good {
    /// The study.
    pub study: Study,
    /// Its plan.
    pub plan: Plan,
    /// What the reader should know.
    pub notices: Vec<Notice>,
}

/// What the page shows: the last plan there was for this study, and whether the text has moved on.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Shown {
    /// The plan, if this study has had one.
    pub good: Option<Arc<Good>>,
    /// Whether the present text has problems, so that the plan is an older one.
    pub stale: bool,
    /// Number of the study.
    id: u32,
}

/// Whether what was typed has been kept.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Saved {
    /// In this browser.
    Kept,
    /// Not yet.
    Soon,
    /// Only in this page.
    Not(NotKept),
}

/// A study taken off the shelf, which can be put back.
#[derive(Clone, Debug, PartialEq)]
pub struct Removed {
    /// Its number.
    pub id: u32,
    /// The study as typed.
    pub draft: Draft,
}

/// The state of the page; copied freely.
#[derive(Clone, Copy)]
pub struct Work {
    /// The study as typed: the only state that is written by fields.
    pub draft: RwSignal<Draft>,
    /// Number of the study on the shelf.
    pub id: RwSignal<u32>,
    /// What stops a plan, each at its field.
    pub problems: Memo<Vec<Problem>>,
    /// What is shown.
    pub shown: Memo<Shown>,
    /// Curves against pH for what is shown.
    pub curves: Memo<Option<Curves>>,
    /// The shelf.
    pub shelf: RwSignal<Vec<ShelfEntry>>,
    /// Whether what was typed has been kept.
    pub saved: RwSignal<Saved>,
    /// What the last action on the shelf or a file came to.
    pub message: RwSignal<Option<String>>,
    /// The study removed last.
    pub removed: RwSignal<Option<Removed>>,
    /// Whether another tab has changed this study.
    pub other_tab: RwSignal<bool>,
    kept: StoredValue<Draft>,
    store: StoredValue<Store>,
}

/// The state of the page, from any component in it.
pub fn work() -> Work {
    expect_context::<Work>()
}

impl Work {
    /// Opens the study that was open last, or the first demo study.
    pub fn start(store: Store) -> Self {
        let mut message = None;
        let last = shelf::current(&store).and_then(|id| match shelf::load(&store, id) {
            Ok(draft) => Some((id, draft)),
            Err(why) => {
                message = Some(why);
                None
            }
        });
        let any = || shelf::list(&store).first().and_then(|e| shelf::load(&store, e.id).ok().map(|d| (e.id, d)));
        let fresh = || {
            let draft = file_text::draft_of(DEMOS[0].text).unwrap_or_default();
            (shelf::new_id(&store), draft)
        };
        let (id, draft) = last.or_else(any).unwrap_or_else(fresh);
        let work = Self::new(store, id, draft);
        work.message.set(message);
        work.write();
        work
    }

    fn new(store: Store, id: u32, first: Draft) -> Self {
        let draft = RwSignal::new(first.clone());
        let id = RwSignal::new(id);
        let study = Memo::new(move |_| draft.with(Draft::to_study));
        let outcome = Memo::new(move |_| study.with(|s| s.as_ref().map_err(Clone::clone).and_then(plan)));
        let problems = Memo::new(move |_| outcome.with(|o| o.as_ref().err().cloned().unwrap_or_default()));
        let shown = Memo::new(move |before: Option<&Shown>| {
            let id = id.get();
            outcome.with(|outcome| match outcome {
                Ok(Outcome { value, notices }) => {
                    let good = study
                        .with(|s| s.clone().ok())
                        .map(|study| Arc::new(Good { study, plan: value.clone(), notices: notices.clone() }));
                    Shown { good, stale: false, id }
                }
                Err(_) => {
                    let good = before.filter(|b| b.id == id).and_then(|b| b.good.clone());
                    Shown { good, stale: true, id }
                }
            })
        });
        let curves = Memo::new(move |_| {
            shown.with(|s| s.good.as_ref().and_then(|g| curves(&g.study, 0.0, 14.0, CURVE_POINTS).ok()))
        });
        Self {
            draft,
            id,
            problems,
            shown,
            curves,
            shelf: RwSignal::new(shelf::list(&store)),
            saved: RwSignal::new(Saved::Soon),
            message: RwSignal::new(None),
            removed: RwSignal::new(None),
            other_tab: RwSignal::new(false),
            kept: StoredValue::new(Draft::default()),
            store: StoredValue::new(store),
        }
    }

    /// Keeps what is typed a moment after each change, and at once when the page goes away.
    pub fn keep_from_now_on(self) {
        let mut later = leptos::prelude::debounce(KEEP_AFTER, move |()| self.keep());
        Effect::new(move |_| {
            if self.draft.with(|d| self.kept.with_value(|k| k != d)) {
                self.saved.set(Saved::Soon);
                later(());
            }
        });
        for event in ["pagehide", "visibilitychange"] {
            let handle = window_event_listener_untyped(event, move |_| self.keep());
            on_cleanup(move || handle.remove());
        }
        let handle = window_event_listener_untyped("storage", move |event| {
            let Some(event) = event.dyn_ref::<web_sys::StorageEvent>() else { return };
            if event.key().as_deref() == Some(&shelf::key_of(self.id.get_untracked())) && event.new_value().is_some() {
                self.other_tab.set(true);
            }
        });
        on_cleanup(move || handle.remove());
    }

    /// Whether studies outlive the page.
    pub fn lasts(self) -> bool {
        self.store.with_value(Store::lasts)
    }

    /// Keeps what is typed now, unless another tab has changed the study.
    pub fn keep(self) {
        let changed = self.draft.with_untracked(|d| self.kept.with_value(|k| k != d));
        if changed && !self.other_tab.get_untracked() {
            self.write();
        }
    }

    fn write(self) {
        let (id, draft) = (self.id.get_untracked(), self.draft.get_untracked());
        let result = self.store.with_value(|s| {
            shelf::set_current(s, id);
            shelf::save(s, id, &draft)
        });
        match result {
            Ok(()) => {
                let name = draft.name.clone();
                self.kept.set_value(draft);
                self.saved.set(Saved::Kept);
                let known = self.shelf.with_untracked(|s| s.iter().any(|e| e.id == id && e.name == name));
                if !known {
                    self.refresh_shelf();
                }
            }
            Err(why) => self.saved.set(Saved::Not(why)),
        }
    }

    fn refresh_shelf(self) {
        self.shelf.set(self.store.with_value(shelf::list));
    }

    /// Puts `draft` on the table as the study `id`.
    fn lay_out(self, id: u32, draft: Draft) {
        self.other_tab.set(false);
        self.id.set(id);
        self.draft.set(draft);
        self.write();
    }

    /// Begins a study of its own from `draft`.
    pub fn begin(self, draft: Draft) {
        self.keep();
        self.removed.set(None);
        self.message.set(None);
        let used = self.id.get_untracked();
        // A study that could not be kept still has its number.
        let id = self.store.with_value(shelf::new_id).max(used.saturating_add(1));
        self.lay_out(id, draft);
        self.refresh_shelf();
    }

    /// Opens a study of the shelf.
    pub fn open(self, id: u32) {
        if self.other_tab.get_untracked() {
            // Both versions are kept: the other tab's under the number, this one as a copy.
            self.keep_as_copy();
        }
        self.keep();
        self.removed.set(None);
        match self.store.with_value(|s| shelf::load(s, id)) {
            Ok(draft) => {
                self.kept.set_value(draft.clone());
                self.saved.set(Saved::Kept);
                self.message.set(None);
                self.lay_out(id, draft);
            }
            Err(why) => self.message.set(Some(why)),
        }
        self.refresh_shelf();
    }

    /// Opens the text of a file, or says why not.
    pub fn open_text(self, file: &str, text: &str) {
        match file_text::draft_of(text) {
            Ok(draft) => {
                self.begin(draft);
                self.message.set(Some(format!("Opened “{file}”.")));
            }
            Err(why) => self.message.set(Some(format!("“{file}” was not opened: {why}."))),
        }
    }

    /// Begins a copy of the study on the table.
    pub fn duplicate(self) {
        let mut draft = self.draft.get_untracked();
        draft.name = format!("{} (copy)", draft.name);
        self.begin(draft);
    }

    /// Takes the study on the table off the shelf; see [`Self::put_back`].
    pub fn remove(self) {
        self.keep();
        let removed = Removed { id: self.id.get_untracked(), draft: self.draft.get_untracked() };
        self.store.with_value(|s| shelf::remove(s, removed.id));
        let next = self.store.with_value(shelf::list).into_iter().find(|e| e.id != removed.id);
        match next {
            Some(entry) => self.open(entry.id),
            None => self.begin(Draft::blank()),
        }
        self.removed.set(Some(removed));
    }

    /// Puts the study removed last back and opens it.
    pub fn put_back(self) {
        let Some(Removed { id, draft }) = self.removed.get_untracked() else { return };
        self.keep();
        // The number may have been given to a new study since.
        let free = self.store.with_value(|s| shelf::load(s, id).is_err());
        let id = if free { id } else { self.store.with_value(shelf::new_id) };
        self.removed.set(None);
        self.lay_out(id, draft);
        self.refresh_shelf();
    }

    /// Takes the version another tab has kept.
    pub fn take_other_tab(self) {
        let id = self.id.get_untracked();
        if let Ok(draft) = self.store.with_value(|s| shelf::load(s, id)) {
            self.kept.set_value(draft.clone());
            self.lay_out(id, draft);
        }
        self.other_tab.set(false);
        self.refresh_shelf();
    }

    /// Leaves the other tab its version and goes on with this one as a study of its own.
    pub fn keep_as_copy(self) {
        let mut draft = self.draft.get_untracked();
        draft.name = format!("{} (this tab)", draft.name);
        self.begin(draft);
    }

    /// What is wrong at the field `path`, if anything.
    pub fn problem_at(self, path: Signal<String>) -> Signal<Option<String>> {
        Memo::new(move |_| {
            path.with(|path| {
                self.problems.with(|all| {
                    let here: Vec<&str> =
                        all.iter().filter(|p| p.at == *path && !path.is_empty()).map(|p| p.message.as_str()).collect();
                    if here.is_empty() { None } else { Some(here.join(" ")) }
                })
            })
        })
        .into()
    }
}
