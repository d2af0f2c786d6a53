//! Which forms of an ingredient are present at each pH.

use super::figure::{Drawn, Table, chart_figure, table_rows};
use super::ink::Ink;
use super::labels::{spread_apart, text_width};
use super::plot::{Axis, DASHES, Dash, Drawing, Frame, Hang, LINE, Pen, SOLID, TEXT, span};
use leptos::prelude::*;
use plotters::coord::Shift;
use plotters::drawing::DrawingArea;
use plotters::prelude::DrawingBackend;
use unstir_core::order::put_in_order;

/// Shares of the forms over pH.
#[derive(Clone, Debug, PartialEq)]
pub struct SpeciesData {
    /// What the chart shows, as a finding.
    pub title: String,
    /// The same for those who do not see it.
    pub alt: String,
    /// The pH values, rising.
    pub ph: Vec<f64>,
    /// Each form and its share, 0 to 1, at each pH. The neutral form, known by “neutral” or
    /// “charge 0” in its name, is drawn as the one that matters; the first one if there is none.
    pub series: Vec<(String, Vec<f64>)>,
    /// The liquid's own pH.
    pub own_ph: f64,
}

/// Draws `data` on `root`, which has `scale` device pixels to a CSS pixel.
///
/// # Errors
/// What the backend reports.
pub fn draw_species<B: DrawingBackend>(
    root: &DrawingArea<B, Shift>,
    data: &SpeciesData,
    scale: f64,
    ink: &Ink,
) -> Drawing<B> {
    let pen = Pen::new(root, scale, ink)?;
    let (width, height) = pen.size();
    let (low, high) = span(data.ph.iter().copied()).unwrap_or((0.0, 14.0));
    // From the top: the liquid's pH, then the names of the forms in as many rows as they need.
    let left = 48.0;
    let right = width - 14.0;
    let names: Vec<f64> = data.series.iter().map(|s| text_width(&s.0, TEXT) + 14.0).collect();
    let rows = ((names.iter().sum::<f64>() / (width - left - 2.0).max(1.0)).ceil() as usize).clamp(1, 3);
    let top = 8.0 + LINE * (rows as f64 + 1.0) + 10.0;
    let frame = Frame {
        left,
        right,
        top,
        bottom: (height - 2.0 * LINE - 10.0).max(top + 20.0),
        x: Axis::exact(low, high, if width < 420.0 { 7 } else { 14 }),
        y: Axis::exact(0.0, 1.0, 4),
    };
    frame.draw(&pen, "pH", "", |_, tick| format!("{:.0} %", 100.0 * tick))?;

    let neutral = |name: &str| name.to_lowercase().contains("neutral") || name.ends_with("charge 0");
    let main = data.series.iter().position(|s| neutral(&s.0)).unwrap_or(0);
    let mut others = 0;
    let looks: Vec<(Dash, f64, plotters::style::RGBColor)> = (0..data.series.len())
        .map(|i| {
            if i == main {
                return (SOLID, 2.5, ink.target);
            }
            others += 1;
            (DASHES[(others - 1) % DASHES.len()], 1.5, ink.quiet)
        })
        .collect();
    for ((_, shares), &(dash, stroke, color)) in data.series.iter().zip(&looks) {
        for piece in frame.curve(&data.ph, shares) {
            pen.line(&piece, color, stroke, dash)?;
        }
    }
    frame.upright(&pen, data.own_ph, &format!("this liquid, pH {:.1}", data.own_ph), 8.0 + LINE / 2.0)?;

    // Each name stands above the pH where its form is most present, in the row its turn gives.
    let peaks: Vec<Option<(f64, f64)>> = data.series.iter().map(|s| peak(&data.ph, &s.1)).collect();
    for row in 0..rows {
        let members: Vec<usize> =
            order_by_peak(&peaks).into_iter().enumerate().filter(|(turn, _)| turn % rows == row).map(|m| m.1).collect();
        let wanted: Vec<f64> = members.iter().map(|&i| peaks[i].map_or(left, |p| frame.at_x(p.0))).collect();
        let sizes: Vec<f64> = members.iter().map(|&i| names[i]).collect();
        let y = 8.0 + LINE * (row as f64 + 1.5) + 2.0;
        for (&i, middle) in members.iter().zip(spread_apart(&wanted, &sizes, left, width - 2.0)) {
            let Some((at_ph, share)) = peaks[i] else { continue };
            let (dash, stroke, color) = looks[i];
            pen.line(
                &[(middle, y + LINE / 2.0), (frame.at_x(at_ph), frame.at_y(share.min(1.0)))],
                color,
                1.0,
                &[1.0, 2.0],
            )?;
            let half = text_width(&data.series[i].0, TEXT) / 2.0;
            pen.words_on_paper(&data.series[i].0, (middle, y), color, Hang::Middle)?;
            pen.line(&[(middle - half, y + LINE / 2.0), (middle + half, y + LINE / 2.0)], color, stroke, dash)?;
        }
    }
    Ok(())
}

/// The middle of the stretch where a form is most present, and its share there.
fn peak(ph: &[f64], shares: &[f64]) -> Option<(f64, f64)> {
    let pairs = || ph.iter().zip(shares).filter(|p| p.0.is_finite() && p.1.is_finite());
    let most = pairs().map(|p| *p.1).fold(f64::NEG_INFINITY, f64::max);
    let stretch: Vec<(f64, f64)> = pairs().filter(|p| *p.1 >= 0.98 * most).map(|p| (*p.0, *p.1)).collect();
    // Only the first unbroken part counts; forms do not come back.
    stretch.get(stretch.len() / 2).copied()
}

/// Places of the forms from the lowest peak pH to the highest.
fn order_by_peak(peaks: &[Option<(f64, f64)>]) -> Vec<usize> {
    let mut order: Vec<usize> = (0..peaks.len()).collect();
    let key = |i: usize| peaks[i].map_or(f64::INFINITY, |p| p.0);
    put_in_order(&mut order, |&a, &b| key(a).total_cmp(&key(b)));
    order
}

impl Drawn for SpeciesData {
    fn title(&self) -> &str {
        &self.title
    }

    fn alt(&self) -> &str {
        &self.alt
    }

    fn table(&self) -> Table {
        let head = std::iter::once("pH".to_owned()).chain(self.series.iter().map(|s| format!("{}, %", s.0))).collect();
        let values: Vec<&[f64]> = self.series.iter().map(|s| s.1.as_slice()).collect();
        Table { head, rows: table_rows(&self.ph, 1, &values, |v| format!("{:.1}", 100.0 * v)) }
    }

    fn draw<B: DrawingBackend>(&self, root: &DrawingArea<B, Shift>, scale: f64, ink: &Ink) -> Drawing<B> {
        draw_species(root, self, scale, ink)
    }
}

/// The forms of an ingredient over pH, with the liquid's own pH.
#[component]
pub fn SpeciesChart(
    /// What to draw; nothing is shown for `None`.
    data: Signal<Option<SpeciesData>>,
) -> impl IntoView {
    chart_figure(data)
}
