//! Reading a file the user chose, and handing one to save.

use leptos::prelude::*;
use unstir_core::study::MAX_FILE_BYTES;
use wasm_bindgen::JsCast;
use wasm_bindgen::closure::Closure;

/// Reads the file chosen in `input` and hands on its name and text, or why it cannot be read.
/// The input is emptied, so that the same file can be chosen again.
pub fn read_chosen(input: &web_sys::HtmlInputElement, done: Callback<Result<(String, String), String>>) {
    let Some(file) = input.files().and_then(|f| f.get(0)) else { return };
    let name = file.name();
    input.set_value("");
    if file.size() > MAX_FILE_BYTES as f64 {
        done.run(Err(format!(
            "“{name}” holds {:.1} MB; a study file may hold at most 1 MB. Check that it is a study.",
            file.size() / 1e6
        )));
        return;
    }
    let Ok(reader) = web_sys::FileReader::new() else {
        done.run(Err("This browser cannot read files.".to_owned()));
        return;
    };
    let finished = reader.clone();
    let named = name.clone();
    let on_end = Closure::once_into_js(move || {
        let text = finished.result().ok().and_then(|r| r.as_string());
        done.run(text.map(|t| (named.clone(), t)).ok_or_else(|| format!("“{named}” could not be read.")));
    });
    reader.set_onloadend(Some(on_end.unchecked_ref()));
    if reader.read_as_text(&file).is_err() {
        done.run(Err(format!("“{name}” could not be read.")));
    }
}

/// Hands `text` to the browser to save as the file `name`.
///
/// # Errors
/// A sentence for the user.
pub fn save(name: &str, text: &str) -> Result<(), String> {
    try_save(name, text).ok_or_else(|| "This browser did not take the file.".to_owned())
}

fn try_save(name: &str, text: &str) -> Option<()> {
    let document = web_sys::window()?.document()?;
    let parts = js_sys::Array::of1(&text.into());
    let kind = web_sys::BlobPropertyBag::new();
    kind.set_type("application/json");
    let blob = web_sys::Blob::new_with_str_sequence_and_options(&parts, &kind).ok()?;
    let address = web_sys::Url::create_object_url_with_blob(&blob).ok()?;
    let link: web_sys::HtmlAnchorElement = document.create_element("a").ok()?.dyn_into().ok()?;
    link.set_href(&address);
    link.set_download(name);
    document.body()?.append_child(&link).ok()?;
    link.click();
    link.remove();
    // The browser reads the address after the click has been handled.
    let forget = Closure::once_into_js(move || {
        let _ = web_sys::Url::revoke_object_url(&address);
    });
    web_sys::window()?.set_timeout_with_callback_and_timeout_and_arguments_0(forget.unchecked_ref(), 10_000).ok()?;
    Some(())
}
