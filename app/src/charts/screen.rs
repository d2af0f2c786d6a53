//! The screen a chart is drawn for: its colours, its pixels, and when they change.

use super::ink::Ink;
use leptos::prelude::*;
use wasm_bindgen::JsCast;
use wasm_bindgen::closure::Closure;

/// Fewest pixels drawn to a CSS pixel. The backend rounds points to whole pixels; with one only, a
/// gentle curve shows steps.
const LEAST_SCALE: f64 = 2.0;

/// The screen as it is set.
#[derive(Clone, Copy, Debug, PartialEq)]
pub(super) struct Screen {
    /// Colours.
    pub(super) ink: Ink,
    /// Device pixels to a CSS pixel.
    pub(super) scale: f64,
}

impl Screen {
    /// The screen now.
    pub(super) fn now() -> Self {
        let dark = matches("(prefers-color-scheme: dark)");
        let more_contrast = matches("(prefers-contrast: more)") || matches("(forced-colors: active)");
        Self { ink: Ink::for_screen(dark, more_contrast), scale: window().device_pixel_ratio().clamp(LEAST_SCALE, 4.0) }
    }
}

/// Whether the media query holds.
fn matches(query: &str) -> bool {
    window().match_media(query).ok().flatten().is_some_and(|m| m.matches())
}

thread_local! {
    static CHANGES: ArcRwSignal<u32> = started();
}

/// Counts changes of colours and pixels; one watch serves all charts for as long as the page is
/// open.
pub(super) fn screen_changes() -> ArcRwSignal<u32> {
    CHANGES.with(Clone::clone)
}

fn started() -> ArcRwSignal<u32> {
    let changes = ArcRwSignal::new(0);
    for query in ["(prefers-color-scheme: dark)", "(prefers-contrast: more)", "(forced-colors: active)"] {
        let changes = changes.clone();
        on_media_change(query, move || changes.update(|n| *n = u32::wrapping_add(*n, 1)));
    }
    watch_pixels(changes.clone());
    changes
}

/// Watches for a change of the pixels, each time anew: the query names the present ratio.
fn watch_pixels(changes: ArcRwSignal<u32>) {
    let query = format!("(resolution: {}dppx)", window().device_pixel_ratio());
    let Ok(Some(list)) = window().match_media(&query) else { return };
    let heard = Closure::once_into_js(move || {
        changes.update(|n| *n = u32::wrapping_add(*n, 1));
        watch_pixels(changes);
    });
    let once = web_sys::AddEventListenerOptions::new();
    once.set_once(true);
    // Without the listener the chart is drawn again when its size changes next.
    let _ =
        list.add_event_listener_with_callback_and_add_event_listener_options("change", heard.unchecked_ref(), &once);
}

/// Calls `changed` whenever the media query begins or ceases to hold.
fn on_media_change(query: &str, changed: impl Fn() + 'static) {
    let Ok(Some(list)) = window().match_media(query) else { return };
    let heard = Closure::<dyn Fn()>::new(changed).into_js_value();
    let _ = list.add_event_listener_with_callback("change", heard.unchecked_ref());
}

/// Calls `changed` whenever the size of `element` changes, until the owner is cleaned up.
pub(super) fn watch_size(element: &web_sys::Element, changed: impl Fn() + 'static) {
    let heard = Closure::<dyn Fn()>::new(changed);
    let Ok(observer) = web_sys::ResizeObserver::new(heard.as_ref().unchecked_ref()) else { return };
    observer.observe(element);
    let kept = StoredValue::new_local((observer, heard));
    on_cleanup(move || {
        let _ = kept.try_with_value(|(observer, _)| observer.disconnect());
    });
}
