//! Starting and failing, told in the plain HTML of the page.

use wasm_bindgen::JsCast;

/// If the program stops, has the page say so and offer a copy of what was typed.
pub fn watch() {
    std::panic::set_hook(Box::new(|info| {
        console_error_panic_hook::hook(info);
        let Some(window) = web_sys::window() else { return };
        let told = js_sys::Reflect::get(&window, &"unstirTrouble".into())
            .ok()
            .and_then(|f| f.dyn_into::<js_sys::Function>().ok())
            .is_some_and(|f| f.call1(&window, &info.to_string().into()).is_ok());
        if !told && let Some(body) = window.document().and_then(|d| d.body()) {
            let _ = body.prepend_with_str_1("The page has stopped. Reload it to go on with what was kept.");
        }
    }));
}

/// Takes the "opening" words away.
pub fn started() {
    if let Some(words) = web_sys::window().and_then(|w| w.document()).and_then(|d| d.get_element_by_id("starting")) {
        words.remove();
    }
}
