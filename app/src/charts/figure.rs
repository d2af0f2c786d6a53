//! A chart on the page: title, canvas, and the numbers in a table.

use super::ink::Ink;
use super::plot::Drawing;
use super::screen::{Screen, screen_changes, watch_size};
use crate::parts::{live, live_view};
use leptos::html;
use leptos::prelude::*;
use plotters::coord::Shift;
use plotters::drawing::{DrawingArea, IntoDrawingArea};
use plotters::prelude::DrawingBackend;
use plotters_canvas::CanvasBackend;
use std::time::Duration;

/// Data that can be drawn and read.
pub(super) trait Drawn: Clone + PartialEq + Send + Sync + 'static {
    /// The finding.
    fn title(&self) -> &str;
    /// The finding for those who do not see the chart.
    fn alt(&self) -> &str;
    /// The numbers.
    fn table(&self) -> Table;
    /// Draws it; see the chart's own function.
    fn draw<B: DrawingBackend>(&self, root: &DrawingArea<B, Shift>, scale: f64, ink: &Ink) -> Drawing<B>;
}

/// The numbers of a chart.
#[derive(Clone, Debug, Default, PartialEq)]
pub(super) struct Table {
    pub(super) head: Vec<String>,
    pub(super) rows: Vec<Vec<String>>,
}

/// Most rows of a table below a chart.
const MOST_ROWS: usize = 20;

/// Rows of a table: `xs` in the first column, then the series, thinned to about twenty rows that
/// include the first and the last.
pub(super) fn table_rows(
    xs: &[f64],
    x_digits: usize,
    series: &[&[f64]],
    words: impl Fn(f64) -> String,
) -> Vec<Vec<String>> {
    let n = xs.len();
    let every = n.saturating_sub(1).div_ceil(MOST_ROWS - 1).max(1);
    (0..n)
        .filter(|i| i % every == 0 || i + 1 == n)
        .map(|i| {
            let values = series.iter().map(|s| match s.get(i) {
                Some(v) if v.is_finite() => words(*v),
                _ => "–".to_owned(),
            });
            std::iter::once(format!("{:.x_digits$}", xs[i])).chain(values).collect()
        })
        .collect()
}

/// Waiting time after a change of the data, so that a chart is not drawn at every keystroke.
const AFTER_CHANGE: Duration = Duration::from_millis(60);
/// Device pixels to a CSS pixel on paper.
const PRINT_SCALE: f64 = 3.0;

/// The figure of a chart. Its box keeps its shape while the data change, so that nothing below
/// moves.
pub(super) fn chart_figure<D: Drawn>(data: Signal<Option<D>>) -> impl IntoView {
    let canvas: NodeRef<html::Canvas> = NodeRef::new();
    let read = move |of: fn(&D) -> &str| data.with(|d| d.as_ref().map_or_else(String::new, |d| of(d).to_owned()));
    let paint_as = move |screen: Screen, scale: Option<f64>| {
        let (Some(Some(canvas)), Some(Some(data))) = (canvas.try_get_untracked(), data.try_get_untracked()) else {
            return;
        };
        paint(&canvas, &data, screen, scale);
    };

    let waiting = StoredValue::new(false);
    let redraw = move || {
        if waiting.try_get_value() != Some(false) {
            return;
        }
        waiting.set_value(true);
        request_animation_frame(move || {
            if waiting.try_set_value(false).is_none() {
                paint_as(Screen::now(), None);
            }
        });
    };
    let changes = StoredValue::new(0u32);
    Effect::new(move |_| {
        data.track();
        let Some(canvas) = canvas.get() else { return };
        watch_size(&canvas, redraw);
    });
    Effect::new(move |first: Option<()>| {
        data.track();
        if first.is_none() {
            return redraw();
        }
        // Only the last of several changes draws.
        let own = changes.get_value().wrapping_add(1);
        changes.set_value(own);
        set_timeout(
            move || {
                if changes.try_get_value() == Some(own) {
                    redraw();
                }
            },
            AFTER_CHANGE,
        );
    });
    let screen = screen_changes();
    Effect::new(move |_| {
        screen.track();
        redraw();
    });
    // Printing does not wait for an animation frame.
    let before = window_event_listener_untyped("beforeprint", move |_| {
        paint_as(Screen { ink: Ink::PRINT, ..Screen::now() }, Some(PRINT_SCALE));
    });
    let after = window_event_listener_untyped("afterprint", move |_| redraw());
    on_cleanup(move || {
        before.remove();
        after.remove();
    });

    let table = Memo::new(move |_| data.with(|d| d.as_ref().map(Drawn::table).unwrap_or_default()));
    view! {
        <figure class="chart" hidden=live(move || data.with(Option::is_none))>
            <figcaption>{live(move || read(D::title))}</figcaption>
            <div class="chart-box">
                <canvas node_ref=canvas role="img" aria-label=live(move || read(D::alt))></canvas>
            </div>
            <details class="quiet">
                <summary>"numbers"</summary>
                <div class="table-wrap" role="region" tabindex="0" aria-label="numbers of the chart">
                    <table>
                        <thead>
                            <tr>
                                {live_view(move || {
                                    let cell = |words| view! { <th scope="col" class="number">{words}</th> };
                                    table.get().head.into_iter().map(cell).collect_view()
                                })}
                            </tr>
                        </thead>
                        <tbody>
                            {live_view(move || {
                                let row = |cells: Vec<String>| {
                                    let cell = |(i, words)| {
                                        if i == 0 {
                                            view! { <th scope="row" class="number">{words}</th> }.into_any()
                                        } else {
                                            view! { <td class="number">{words}</td> }.into_any()
                                        }
                                    };
                                    view! { <tr>{cells.into_iter().enumerate().map(cell).collect_view()}</tr> }
                                };
                                table.get().rows.into_iter().map(row).collect_view()
                            })}
                        </tbody>
                    </table>
                </div>
            </details>
        </figure>
    }
}

/// Draws `data` on `canvas`, whose pixels are made those of the screen, or `scale` to a CSS pixel.
fn paint<D: Drawn>(canvas: &web_sys::HtmlCanvasElement, data: &D, screen: Screen, scale: Option<f64>) {
    let (width, height) = (f64::from(canvas.client_width()), f64::from(canvas.client_height()));
    if width < 1.0 || height < 1.0 {
        // Folded away or not laid out yet; the change of size draws it.
        return;
    }
    let scale = scale.unwrap_or(screen.scale);
    canvas.set_width((width * scale).round() as u32);
    canvas.set_height((height * scale).round() as u32);
    if let Some(backend) = CanvasBackend::with_canvas_object(canvas.clone()) {
        // The table still has the numbers if the canvas refuses.
        let _ = data.draw(&backend.into_drawing_area(), scale, &screen.ink);
    }
}
