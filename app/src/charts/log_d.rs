//! The distribution ratio over pH by each reading of the constants.

use super::figure::{Drawn, Table, chart_figure, table_rows};
use super::ink::Ink;
use super::plot::{Axis, DASHES, Dash, Drawing, End, Frame, Guide, LINE, Pen, SOLID, label_room, last_point, span};
use leptos::prelude::*;
use plotters::coord::Shift;
use plotters::drawing::DrawingArea;
use plotters::prelude::DrawingBackend;
use plotters::style::RGBColor;

/// log D over pH, one curve for each reading.
#[derive(Clone, Debug, PartialEq)]
pub struct LogDData {
    /// What the chart shows, as a finding.
    pub title: String,
    /// The same for those who do not see it.
    pub alt: String,
    /// The pH values, rising.
    pub ph: Vec<f64>,
    /// Each reading, whether it is the one in use, and its log D at each pH.
    pub series: Vec<(String, bool, Vec<f64>)>,
    /// The liquid's own pH.
    pub own_ph: f64,
    /// The log D that the removal wanted needs.
    pub needed_log_d: Option<f64>,
}

/// Most powers of ten shown; what is lower is as good as nothing extracted.
const MOST_DECADES: f64 = 8.0;
/// Below this width, CSS pixels, a chart has fewer ticks and no words among its curves.
const NARROW: f64 = 420.0;

/// Draws `data` on `root`, which has `scale` device pixels to a CSS pixel.
///
/// # Errors
/// What the backend reports.
pub fn draw_log_d<B: DrawingBackend>(
    root: &DrawingArea<B, Shift>,
    data: &LogDData,
    scale: f64,
    ink: &Ink,
) -> Drawing<B> {
    let pen = Pen::new(root, scale, ink)?;
    let (width, height) = pen.size();
    let (low, high) = span(data.ph.iter().copied()).unwrap_or((0.0, 14.0));
    let values = data.series.iter().flat_map(|s| s.2.iter().copied()).chain(data.needed_log_d);
    let (bottom, top) = span(values).unwrap_or((-2.0, 2.0));
    let room = label_room(width, data.series.iter().map(|s| s.0.as_str()));
    // Two lines: the liquid's pH, and what is measured.
    let frame_top = 2.0 * LINE + 14.0;
    let frame = Frame {
        left: 38.0,
        right: (width - room).max(60.0),
        top: frame_top,
        bottom: (height - 2.0 * LINE - 10.0).max(frame_top + 20.0),
        x: Axis::exact(low, high, if width < NARROW { 5 } else { 8 }),
        y: Axis::round(bottom.max(top - MOST_DECADES), top + 0.2, 6),
    };
    frame.draw(&pen, "pH", "log D", Axis::words)?;
    let curves: Vec<Vec<Vec<(f64, f64)>>> = data.series.iter().map(|s| frame.curve(&data.ph, &s.2)).collect();
    let mut others = 0;
    let looks: Vec<(Dash, f64, RGBColor)> = data
        .series
        .iter()
        .map(|s| {
            if s.1 {
                return (SOLID, 2.5, ink.target);
            }
            others += 1;
            (DASHES[(others - 1) % DASHES.len()], 1.5, ink.quiet)
        })
        .collect();
    // The reading in use is drawn last, over the others.
    for in_use in [false, true] {
        for ((series, pieces), &(dash, stroke, color)) in data.series.iter().zip(&curves).zip(&looks) {
            if series.1 == in_use {
                for piece in pieces {
                    pen.line(piece, color, stroke, dash)?;
                }
            }
        }
    }
    frame.upright(&pen, data.own_ph, &format!("this liquid, pH {:.1}", data.own_ph), 8.0)?;
    let needed = data.needed_log_d.filter(|n| n.is_finite()).map(|n| {
        let words = format!("needed, log D {}", format!("{n:.1}").replace('-', "−"));
        (n, words)
    });
    // Where the frame is too small for words between the curves, they stand with the others.
    let beside = width < NARROW;
    if let Some((y, words)) = &needed {
        let guide =
            Guide { y: *y, words: if beside { "" } else { words }, color: ink.caution, width: 1.0, dash: &[6.0, 3.0] };
        // The words keep clear of the line at the liquid's pH as well.
        let own = frame.at_x(data.own_ph);
        let mut all: Vec<Vec<(f64, f64)>> = curves.concat();
        all.push(vec![(own, frame.top), (own, frame.bottom)]);
        frame.across(&pen, &guide, &all, &mut Vec::new())?;
    }
    let mut ends: Vec<End<'_>> = data
        .series
        .iter()
        .zip(&curves)
        .zip(&looks)
        .filter_map(|((series, pieces), look)| Some(End { words: &series.0, at: last_point(pieces)?, color: look.2 }))
        .collect();
    if let (true, Some((y, words))) = (beside, &needed) {
        ends.push(End { words, at: (frame.right, frame.at_y(*y)), color: ink.caution });
    }
    frame.label_ends(&pen, &ends)
}

impl Drawn for LogDData {
    fn title(&self) -> &str {
        &self.title
    }

    fn alt(&self) -> &str {
        &self.alt
    }

    fn table(&self) -> Table {
        let name = |s: &(String, bool, Vec<f64>)| format!("log D, {}{}", s.0, if s.1 { " (in use)" } else { "" });
        let head = std::iter::once("pH".to_owned()).chain(self.series.iter().map(name)).collect();
        let values: Vec<&[f64]> = self.series.iter().map(|s| s.2.as_slice()).collect();
        Table { head, rows: table_rows(&self.ph, 1, &values, |v| format!("{v:.2}").replace('-', "−")) }
    }

    fn draw<B: DrawingBackend>(&self, root: &DrawingArea<B, Shift>, scale: f64, ink: &Ink) -> Drawing<B> {
        draw_log_d(root, self, scale, ink)
    }
}

/// log D over pH by each reading, with the liquid's own pH and the log D needed.
#[component]
pub fn LogDChart(
    /// What to draw; nothing is shown for `None`.
    data: Signal<Option<LogDData>>,
) -> impl IntoView {
    chart_figure(data)
}
