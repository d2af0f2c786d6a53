//! Words, attributes and rows that follow the state.
//!
//! Each of these has one type for all its uses. A view is generic over every closure in it, so
//! closures written straight into the views would make the page half as large again.

use crate::state::draft::RowId;
use leptos::prelude::*;
use std::sync::Arc;

/// Words or the value of an attribute that follow the state.
pub fn live<T>(of: impl Fn() -> T + Send + 'static) -> Box<dyn Fn() -> T + Send> {
    Box::new(of)
}

/// A piece of the page that is made anew when what it reads changes.
pub fn live_view<V: IntoView + 'static>(of: impl Fn() -> V + Send + 'static) -> Box<dyn Fn() -> AnyView + Send> {
    Box::new(move || of().into_any())
}

/// A row for each id; a row that stays is not made anew, so that what is typed in it stays.
pub fn each_row<V: IntoView + 'static>(
    ids: Signal<Vec<RowId>>,
    row: impl Fn(RowId) -> V + Send + Sync + Clone + 'static,
) -> AnyView {
    each_row_view(ids, Arc::new(move |id| row(id).into_any()))
}

fn each_row_view(ids: Signal<Vec<RowId>>, row: Arc<dyn Fn(RowId) -> AnyView + Send + Sync>) -> AnyView {
    view! { <For each=move || ids.get() key=|id| *id children=move |id| row(id)/> }.into_any()
}
