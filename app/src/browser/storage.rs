//! Text by key: the browser's local storage where it may be used, else memory.

use gloo_storage::{LocalStorage, Storage as _};
use std::collections::BTreeMap;
use std::sync::{Arc, Mutex, PoisonError};

/// Why a text was not kept.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum NotKept {
    /// The storage is full.
    Full,
    /// The browser refused.
    Refused,
}

impl NotKept {
    /// What to tell the user.
    pub fn words(self) -> &'static str {
        match self {
            Self::Full => {
                "This browser's storage is full: the study is kept only while this page is open. Save it as a file, or delete studies you no longer need."
            }
            Self::Refused => {
                "This browser did not keep the study: it is here only while this page is open. Save it as a file."
            }
        }
    }
}

/// Text by key.
#[derive(Clone, Debug)]
pub enum Store {
    /// Local storage; it was tried once and works.
    Local,
    /// Memory of this page: everything goes when it is closed.
    Memory(Arc<Mutex<BTreeMap<String, String>>>),
}

impl Store {
    /// Local storage if a trial entry can be written and removed, else memory.
    ///
    /// The trial goes before anything else: the storage library panics where storage is blocked.
    pub fn probe() -> Self {
        const TRIAL: &str = "unstir.trial";
        let works = web_sys::window()
            .and_then(|w| w.local_storage().ok().flatten())
            // A full storage refuses the trial but still holds studies: it can be read.
            .is_some_and(|s| match s.set_item(TRIAL, "1") {
                Ok(()) => s.remove_item(TRIAL).is_ok(),
                Err(_) => s.length().is_ok_and(|n| n > 0),
            });
        if works { Self::Local } else { Self::memory() }
    }

    /// An empty store in memory.
    pub fn memory() -> Self {
        Self::Memory(Arc::default())
    }

    /// Whether texts outlive the page.
    pub fn lasts(&self) -> bool {
        matches!(self, Self::Local)
    }

    /// The text under `key`.
    pub fn get(&self, key: &str) -> Option<String> {
        match self {
            Self::Local => LocalStorage::raw().get_item(key).ok().flatten(),
            Self::Memory(m) => lock(m).get(key).cloned(),
        }
    }

    /// Puts `text` under `key`.
    ///
    /// # Errors
    /// Why it was not kept; what was there before is still there.
    pub fn set(&self, key: &str, text: &str) -> Result<(), NotKept> {
        match self {
            Self::Local => LocalStorage::raw().set_item(key, text).map_err(|e| {
                let name = js_sys::Reflect::get(&e, &"name".into()).ok().and_then(|n| n.as_string());
                if name.is_some_and(|n| n.contains("Quota")) { NotKept::Full } else { NotKept::Refused }
            }),
            Self::Memory(m) => {
                lock(m).insert(key.to_owned(), text.to_owned());
                Ok(())
            }
        }
    }

    /// Removes `key`.
    pub fn remove(&self, key: &str) {
        match self {
            Self::Local => {
                let _ = LocalStorage::raw().remove_item(key);
            }
            Self::Memory(m) => {
                lock(m).remove(key);
            }
        }
    }

    /// Every key, in no order.
    pub fn keys(&self) -> Vec<String> {
        match self {
            Self::Local => {
                let raw = LocalStorage::raw();
                (0..LocalStorage::length()).filter_map(|i| raw.key(i).ok().flatten()).collect()
            }
            Self::Memory(m) => lock(m).keys().cloned().collect(),
        }
    }
}

fn lock(m: &Mutex<BTreeMap<String, String>>) -> std::sync::MutexGuard<'_, BTreeMap<String, String>> {
    m.lock().unwrap_or_else(PoisonError::into_inner)
}
