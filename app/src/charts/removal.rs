//! How much has been removed after each portion.

use super::figure::{Drawn, Table, chart_figure, table_rows};
use super::ink::Ink;
use super::plot::{Axis, DOTTED, Drawing, End, Frame, Guide, LINE, Pen, SOLID, label_room, last_point};
use leptos::prelude::*;
use plotters::coord::Shift;
use plotters::drawing::DrawingArea;
use plotters::prelude::DrawingBackend;

/// Shares removed, portion by portion.
#[derive(Clone, Debug, PartialEq)]
pub struct RemovalData {
    /// What the chart shows, as a finding.
    pub title: String,
    /// The same for those who do not see it.
    pub alt: String,
    /// Each ingredient, whether it is the target, and its share removed, 0 to 1, after the first
    /// portion, the second, and so on. Each curve begins at nothing before the first.
    pub series: Vec<(String, bool, Vec<f64>)>,
    /// The share of the target to be removed, 0 to 1.
    pub goal: f64,
    /// The share of the target that was found to be removed at the bench, 0 to 1.
    pub found: Option<f64>,
}

impl RemovalData {
    /// Numbers of portions: 1, 2 …
    fn portions(&self) -> Vec<f64> {
        let most = self.series.iter().map(|s| s.2.len()).max().unwrap_or(0);
        (1..=most).map(|i| i as f64).collect()
    }
}

/// Draws `data` on `root`, which has `scale` device pixels to a CSS pixel.
///
/// # Errors
/// What the backend reports.
pub fn draw_removal<B: DrawingBackend>(
    root: &DrawingArea<B, Shift>,
    data: &RemovalData,
    scale: f64,
    ink: &Ink,
) -> Drawing<B> {
    let pen = Pen::new(root, scale, ink)?;
    let (width, height) = pen.size();
    let portions: Vec<f64> = std::iter::once(0.0).chain(data.portions()).collect();
    let removed = |s: &[f64]| -> Vec<f64> { std::iter::once(0.0).chain(s.iter().copied()).collect() };
    let last = portions.last().copied().unwrap_or(1.0);
    let room = label_room(width, data.series.iter().map(|s| s.0.as_str()));
    let top = LINE + 14.0;
    let frame = Frame {
        left: 48.0,
        right: (width - room).max(70.0),
        top,
        bottom: (height - 2.0 * LINE - 10.0).max(top + 20.0),
        x: Axis::counting(last, if width < 420.0 { 5 } else { 10 }),
        y: Axis::exact(0.0, 1.0, 4),
    };
    frame.draw(&pen, "portions", "removed", |_, tick| format!("{:.0} %", 100.0 * tick))?;
    let curves: Vec<Vec<Vec<(f64, f64)>>> =
        data.series.iter().map(|s| frame.curve(&portions, &removed(&s.2))).collect();
    for is_target in [false, true] {
        for (series, pieces) in data.series.iter().zip(&curves).filter(|p| p.0.1 == is_target) {
            let (color, stroke, dash) = if is_target { (ink.target, 2.5, SOLID) } else { (ink.company, 2.0, DOTTED) };
            for piece in pieces {
                pen.line(piece, color, stroke, dash)?;
            }
            for (&n, &share) in portions.iter().skip(1).zip(&series.2).filter(|p| p.1.is_finite()) {
                let at = (frame.at_x(n), frame.at_y(share.clamp(0.0, 1.0)));
                if is_target {
                    pen.disc(at, 3.5, color)?;
                } else {
                    pen.square(at, 3.0, color)?;
                }
            }
        }
    }
    let all: Vec<Vec<(f64, f64)>> = curves.concat();
    let mut taken = Vec::new();
    let percent = |share: f64| format!("{:.0} %", 100.0 * share);
    let goal = format!("goal {}", percent(data.goal));
    frame.across(
        &pen,
        &Guide { y: data.goal, words: &goal, color: ink.ink, width: 1.0, dash: SOLID },
        &all,
        &mut taken,
    )?;
    if let Some(found) = data.found {
        let words = format!("found {}", percent(found));
        let guide = Guide { y: found, words: &words, color: ink.caution, width: 1.5, dash: &[6.0, 3.0] };
        frame.across(&pen, &guide, &all, &mut taken)?;
    }
    let ends: Vec<End<'_>> = data
        .series
        .iter()
        .zip(&curves)
        .filter_map(|(series, pieces)| {
            let color = if series.1 { ink.target } else { ink.company };
            Some(End { words: &series.0, at: last_point(pieces)?, color })
        })
        .collect();
    frame.label_ends(&pen, &ends)
}

impl Drawn for RemovalData {
    fn title(&self) -> &str {
        &self.title
    }

    fn alt(&self) -> &str {
        &self.alt
    }

    fn table(&self) -> Table {
        let head = std::iter::once("portions".to_owned())
            .chain(self.series.iter().map(|s| format!("{} removed, %", s.0)))
            .collect();
        let values: Vec<&[f64]> = self.series.iter().map(|s| s.2.as_slice()).collect();
        Table { head, rows: table_rows(&self.portions(), 0, &values, |v| format!("{:.1}", 100.0 * v)) }
    }

    fn draw<B: DrawingBackend>(&self, root: &DrawingArea<B, Shift>, scale: f64, ink: &Ink) -> Drawing<B> {
        draw_removal(root, self, scale, ink)
    }
}

/// What has been removed after each portion, with the goal and what was found.
#[component]
pub fn RemovalChart(
    /// What to draw; nothing is shown for `None`.
    data: Signal<Option<RemovalData>>,
) -> impl IntoView {
    chart_figure(data)
}
