//! The studies kept in this browser: one key each, as typed.

use super::draft::{DRAFT_VERSION, Draft};
use crate::browser::storage::{NotKept, Store};
use unstir_core::order::put_in_order;

const STUDY: &str = "unstir.study.";
const CURRENT: &str = "unstir.current";
const BROKEN: &str = "-broken";

/// One study on the shelf.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct ShelfEntry {
    /// Number of the study.
    pub id: u32,
    /// Its name.
    pub name: String,
}

/// The key of a study.
pub fn key_of(id: u32) -> String {
    format!("{STUDY}{id}")
}

/// Numbers of the studies there are, rising.
fn ids(store: &Store) -> Vec<u32> {
    let mut ids: Vec<u32> = store.keys().iter().filter_map(|k| k.strip_prefix(STUDY)?.parse().ok()).collect();
    put_in_order(&mut ids, Ord::cmp);
    ids
}

/// The studies there are, in the order they were begun. An entry that cannot be read is set aside.
pub fn list(store: &Store) -> Vec<ShelfEntry> {
    ids(store)
        .into_iter()
        .filter_map(|id| {
            let name = load(store, id).ok()?.name;
            let name = if name.trim().is_empty() { "Study without a name".to_owned() } else { name };
            Some(ShelfEntry { id, name })
        })
        .collect()
}

/// A number no study has.
pub fn new_id(store: &Store) -> u32 {
    ids(store).last().map_or(1, |last| last.saturating_add(1))
}

/// The study as typed.
///
/// # Errors
/// Why there is none to show; an entry that cannot be read has been set aside, not deleted.
pub fn load(store: &Store, id: u32) -> Result<Draft, String> {
    let key = key_of(id);
    let text = store.get(&key).ok_or("This study is no longer in this browser.")?;
    match serde_json::from_str::<Draft>(&text) {
        Ok(draft) if draft.unstir_draft == DRAFT_VERSION => Ok(draft.repaired()),
        _ => {
            let aside = format!("{key}{BROKEN}");
            if store.set(&aside, &text).is_ok() {
                store.remove(&key);
            }
            Err(format!("A study kept here is damaged and was set aside under “{aside}”; nothing of it was deleted."))
        }
    }
}

/// How many damaged entries have been set aside.
pub fn set_aside(store: &Store) -> usize {
    store.keys().iter().filter(|k| k.starts_with(STUDY) && k.ends_with(BROKEN)).count()
}

/// Keeps the study.
///
/// # Errors
/// Why it was not kept.
pub fn save(store: &Store, id: u32, draft: &Draft) -> Result<(), NotKept> {
    let text = serde_json::to_string(draft).map_err(|_| NotKept::Refused)?;
    store.set(&key_of(id), &text)
}

/// Removes the study.
pub fn remove(store: &Store, id: u32) {
    store.remove(&key_of(id));
}

/// The study that was open last.
pub fn current(store: &Store) -> Option<u32> {
    store.get(CURRENT)?.parse().ok()
}

/// Remembers which study is open.
pub fn set_current(store: &Store, id: u32) {
    // Only a convenience: without it the page opens with another study.
    let _ = store.set(CURRENT, &id.to_string());
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn what_is_kept_comes_back_as_typed() {
        let store = Store::memory();
        let mut draft = Draft::blank();
        draft.feed.ph.value = "3,".into();
        let id = new_id(&store);
        save(&store, id, &draft).unwrap();
        set_current(&store, id);
        assert_eq!(load(&store, current(&store).unwrap()).unwrap(), draft);
        assert_eq!(list(&store), [ShelfEntry { id, name: "New study".into() }]);
        remove(&store, id);
        assert!(list(&store).is_empty());
    }

    #[test]
    fn a_damaged_entry_is_set_aside() {
        let store = Store::memory();
        store.set(&key_of(4), "{ not a draft").unwrap();
        store.set(&key_of(5), r#"{"unstir_draft": 99}"#).unwrap();
        assert!(list(&store).is_empty());
        assert_eq!(set_aside(&store), 2);
        assert_eq!(store.get("unstir.study.4-broken").as_deref(), Some("{ not a draft"));
    }
}
