//! Mounts the page.

use unstir_app::{App, browser::failure};

fn main() {
    failure::watch();
    leptos::mount::mount_to_body(App);
    failure::started();
}
