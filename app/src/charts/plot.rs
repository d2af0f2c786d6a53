//! What the charts share: a pen that counts in screen pixels, axes, dashes, and lines with words.

use super::ink::Ink;
use super::labels::{spread_apart, text_width, wrapped};
use plotters::coord::Shift;
use plotters::drawing::{DrawingArea, DrawingAreaErrorKind};
use plotters::element::{Circle, PathElement, Rectangle};
use plotters::prelude::DrawingBackend;
use plotters::style::text_anchor::{HPos, Pos, VPos};
use plotters::style::{Color, FontDesc, FontFamily, FontStyle, RGBColor, ShapeStyle, TextStyle};

/// What drawing comes to.
pub type Drawing<B> = Result<(), DrawingAreaErrorKind<<B as DrawingBackend>::ErrorType>>;

/// The size of all words on a chart, CSS pixels.
pub(super) const TEXT: f64 = 13.0;
/// Height of a line of words.
pub(super) const LINE: f64 = 16.0;
/// Places tried along a line for its words, less one.
const PLACES: u32 = 12;
/// Most points drawn of one curve.
const MOST_POINTS: usize = 600;

/// How a curve is dashed: lengths of stroke and gap in turn; empty for solid.
pub(super) type Dash = &'static [f64];
/// A solid line.
pub(super) const SOLID: Dash = &[];
/// Dots.
pub(super) const DOTTED: Dash = &[2.0, 3.0];
/// Patterns that can be told from each other, the first next to solid.
pub(super) const DASHES: [Dash; 5] =
    [&[8.0, 4.0], DOTTED, &[10.0, 3.0, 2.0, 3.0], &[4.0, 4.0], &[12.0, 3.0, 2.0, 3.0, 2.0, 3.0]];

/// Draws in CSS pixels on an area that has `scale` device pixels to each.
pub(super) struct Pen<'a, B: DrawingBackend> {
    root: &'a DrawingArea<B, Shift>,
    scale: f64,
    /// The colours.
    pub(super) ink: &'a Ink,
}

/// Which part of the words is at the point.
#[derive(Clone, Copy)]
pub(super) enum Hang {
    /// The point is at their left.
    Left,
    /// The point is in their middle.
    Middle,
    /// The point is at their right.
    Right,
}

impl<'a, B: DrawingBackend> Pen<'a, B> {
    /// A pen for `root`; the area is filled with paper.
    pub(super) fn new(
        root: &'a DrawingArea<B, Shift>,
        scale: f64,
        ink: &'a Ink,
    ) -> Result<Self, DrawingAreaErrorKind<B::ErrorType>> {
        root.fill(&ink.paper)?;
        let scale = if scale.is_finite() && scale > 0.0 { scale } else { 1.0 };
        Ok(Self { root, scale, ink })
    }

    /// Width and height in CSS pixels.
    pub(super) fn size(&self) -> (f64, f64) {
        let (w, h) = self.root.dim_in_pixel();
        (f64::from(w) / self.scale, f64::from(h) / self.scale)
    }

    fn device(&self, (x, y): (f64, f64)) -> (i32, i32) {
        ((x * self.scale).round() as i32, (y * self.scale).round() as i32)
    }

    fn style(&self, color: RGBColor, width: f64, filled: bool) -> ShapeStyle {
        let stroke_width = (width * self.scale).round().max(1.0) as u32;
        ShapeStyle { color: color.to_rgba(), filled, stroke_width }
    }

    /// A line through `points`.
    pub(super) fn line(&self, points: &[(f64, f64)], color: RGBColor, width: f64, dash: Dash) -> Drawing<B> {
        let style = self.style(color, width, false);
        let snapped = snapped(points);
        for piece in dashed(snapped.as_ref().map_or(points, |s| s), dash) {
            let piece: Vec<(i32, i32)> = piece.into_iter().map(|p| self.device(p)).collect();
            self.root.draw(&PathElement::new(piece, style))?;
        }
        Ok(())
    }

    /// A filled disc.
    pub(super) fn disc(&self, at: (f64, f64), radius: f64, color: RGBColor) -> Drawing<B> {
        let radius = (radius * self.scale).round() as i32;
        self.root.draw(&Circle::new(self.device(at), radius, self.style(color, 1.0, true)))
    }

    /// A square filled with paper and outlined.
    pub(super) fn square(&self, (x, y): (f64, f64), half: f64, color: RGBColor) -> Drawing<B> {
        let corners = [self.device((x - half, y - half)), self.device((x + half, y + half))];
        self.root.draw(&Rectangle::new(corners, self.style(self.ink.paper, 1.0, true)))?;
        self.root.draw(&Rectangle::new(corners, self.style(color, 1.5, false)))
    }

    /// Words, their middle height at `at`.
    pub(super) fn words(&self, text: &str, at: (f64, f64), color: RGBColor, hang: Hang) -> Drawing<B> {
        let h = match hang {
            Hang::Left => HPos::Left,
            Hang::Middle => HPos::Center,
            Hang::Right => HPos::Right,
        };
        let size = TEXT * self.scale;
        let font = FontDesc::new(FontFamily::Name(FACE), size, FontStyle::Normal);
        let style = TextStyle::from(font).color(&color).pos(Pos::new(h, VPos::Center));
        self.root.draw_text(text, &style, self.device(at))
    }

    /// As [`Self::words`], on a ground of paper, so that what lies behind does not disturb them.
    pub(super) fn words_on_paper(&self, text: &str, at: (f64, f64), color: RGBColor, hang: Hang) -> Drawing<B> {
        let width = text_width(text, TEXT);
        let left = match hang {
            Hang::Left => at.0,
            Hang::Middle => at.0 - width / 2.0,
            Hang::Right => at.0 - width,
        };
        let corners =
            [(left - 2.0, at.1 - LINE / 2.0), (left + width + 2.0, at.1 + LINE / 2.0)].map(|p| self.device(p));
        let ground = ShapeStyle { color: self.ink.paper.mix(0.85), filled: true, stroke_width: 1 };
        self.root.draw(&Rectangle::new(corners, ground))?;
        self.words(text, at, color, hang)
    }
}

/// The page's own face.
const FACE: &str = "system-ui, sans-serif";

/// Values along one side.
#[derive(Clone, Debug, PartialEq)]
pub(super) struct Axis {
    pub(super) low: f64,
    pub(super) high: f64,
    /// Where a line of the grid and a number stand.
    pub(super) ticks: Vec<f64>,
    /// Digits after the decimal mark in the numbers.
    digits: usize,
}

impl Axis {
    /// From `low` to `high` exactly, with round ticks, about `most` of them.
    pub(super) fn exact(low: f64, high: f64, most: usize) -> Self {
        let (low, high) = if low.is_finite() && high.is_finite() && high > low {
            (low, high)
        } else if low.is_finite() {
            (low - 0.5, low + 0.5)
        } else {
            (0.0, 1.0)
        };
        let (step, digits) = round_step((high - low) / most.max(1) as f64);
        // Whole multiples of the step, so that no error adds up along the axis.
        let first = (low / step - 1e-9).ceil() as i64;
        let last = (high / step + 1e-9).floor() as i64;
        let ticks = (first..=last).map(|i| i as f64 * step).collect();
        Self { low, high, ticks, digits }
    }

    /// As [`Self::exact`], widened to whole steps.
    pub(super) fn round(low: f64, high: f64, most: usize) -> Self {
        let exact = Self::exact(low, high, most);
        let (step, _) = round_step((exact.high - exact.low) / most.max(1) as f64);
        Self::exact((exact.low / step + 1e-9).floor() * step, (exact.high / step - 1e-9).ceil() * step, most)
    }

    /// From nothing to `last` things, with ticks at whole ones only.
    pub(super) fn counting(last: f64, most: usize) -> Self {
        let mut axis = Self::exact(0.0, last.max(1.0), most);
        axis.ticks.retain(|t| (t - t.round()).abs() < 1e-9);
        axis.digits = 0;
        axis
    }

    /// Place of `value` on the axis: 0 at its low end, 1 at its high end.
    fn share(&self, value: f64) -> f64 {
        (value - self.low) / (self.high - self.low)
    }

    /// A tick in words.
    pub(super) fn words(&self, tick: f64) -> String {
        // Avoids a minus before zero.
        let tick = if tick == 0.0 { 0.0 } else { tick };
        format!("{tick:.*}", self.digits).replace('-', "−")
    }
}

/// The round number nearest above `least`, and the digits it needs after the decimal mark.
fn round_step(least: f64) -> (f64, usize) {
    let power = least.abs().max(1e-12).log10().floor();
    let unit = 10f64.powi(power as i32);
    let times = [1.0, 2.0, 5.0, 10.0].into_iter().find(|t| t * unit >= least * (1.0 - 1e-9)).unwrap_or(10.0);
    let step = times * unit;
    (step, (-step.log10().floor()).clamp(0.0, 6.0) as usize)
}

/// The smallest and the largest finite value.
pub(super) fn span(values: impl IntoIterator<Item = f64>) -> Option<(f64, f64)> {
    values.into_iter().filter(|v| v.is_finite()).fold(None, |span, v| {
        let (low, high) = span.unwrap_or((v, v));
        Some((f64::min(low, v), f64::max(high, v)))
    })
}

/// The box that curves are drawn in.
pub(super) struct Frame {
    pub(super) left: f64,
    pub(super) right: f64,
    pub(super) top: f64,
    pub(super) bottom: f64,
    pub(super) x: Axis,
    pub(super) y: Axis,
}

impl Frame {
    /// Where `x` stands.
    pub(super) fn at_x(&self, x: f64) -> f64 {
        self.left + self.x.share(x) * (self.right - self.left)
    }

    /// Where `y` stands.
    pub(super) fn at_y(&self, y: f64) -> f64 {
        self.bottom - self.y.share(y) * (self.bottom - self.top)
    }

    /// Grid, numbers and what the axes measure. `y_words` turns a tick into words.
    pub(super) fn draw<B: DrawingBackend>(
        &self,
        pen: &Pen<'_, B>,
        x_title: &str,
        y_title: &str,
        y_words: impl Fn(&Axis, f64) -> String,
    ) -> Drawing<B> {
        let ink = pen.ink;
        for &tick in &self.y.ticks {
            let y = self.at_y(tick);
            pen.line(&[(self.left, y), (self.right, y)], ink.rule, 1.0, SOLID)?;
            pen.words(&y_words(&self.y, tick), (self.left - 6.0, y), ink.quiet, Hang::Right)?;
        }
        for &tick in &self.x.ticks {
            let x = self.at_x(tick);
            pen.line(&[(x, self.bottom), (x, self.bottom + 4.0)], ink.quiet, 1.0, SOLID)?;
            pen.words(&self.x.words(tick), (x, self.bottom + 6.0 + LINE / 2.0), ink.quiet, Hang::Middle)?;
        }
        pen.line(&[(self.left, self.bottom), (self.right, self.bottom)], ink.quiet, 1.0, SOLID)?;
        pen.words(x_title, (self.right, self.bottom + 6.0 + 1.6 * LINE), ink.quiet, Hang::Right)?;
        // At the left edge above the numbers: words set upright are read faster than turned ones.
        pen.words(y_title, (2.0, self.top - 9.0 - LINE / 2.0), ink.quiet, Hang::Left)
    }

    /// The curve through `values` over `xs`, in pieces: broken where a value is missing, and cut
    /// off at the top and the bottom of the frame.
    pub(super) fn curve(&self, xs: &[f64], values: &[f64]) -> Vec<Vec<(f64, f64)>> {
        let n = xs.len().min(values.len());
        let every = n.div_ceil(MOST_POINTS).max(1);
        let kept = (0..n).filter(|i| i % every == 0 || i + 1 == n);
        let points = kept.map(|i| (self.at_x(xs[i]), self.at_y(values[i])));
        let mut pieces: Vec<Vec<(f64, f64)>> = Vec::new();
        let mut before: Option<(f64, f64)> = None;
        for point in points {
            let usable = point.0.is_finite() && point.1.is_finite();
            if let (true, Some(from)) = (usable, before)
                && let Some((a, b)) = cut(from, point, self.top, self.bottom)
            {
                match pieces.last_mut() {
                    Some(piece) if piece.last() == Some(&a) => piece.push(b),
                    _ => pieces.push(vec![a, b]),
                }
            }
            before = usable.then_some(point);
        }
        pieces
    }

    /// A line down the frame at `x` with `words` above it, their middle at the height `words_y`.
    pub(super) fn upright<B: DrawingBackend>(&self, pen: &Pen<'_, B>, x: f64, words: &str, words_y: f64) -> Drawing<B> {
        if !(self.x.low..=self.x.high).contains(&x) {
            return Ok(());
        }
        let at = self.at_x(x);
        pen.line(&[(at, words_y + LINE / 2.0), (at, self.bottom)], pen.ink.ink, 1.0, SOLID)?;
        let (width, _) = pen.size();
        let half = text_width(words, TEXT) / 2.0;
        let middle = at.min(width - half - 2.0).max(half + 2.0);
        pen.words(words, (middle, words_y), pen.ink.ink, Hang::Middle)
    }

    /// A line across the frame with its words on it, if it has any, where the `curves` leave most
    /// room and clear of the words `taken` before, to which its own are added.
    pub(super) fn across<B: DrawingBackend>(
        &self,
        pen: &Pen<'_, B>,
        guide: &Guide<'_>,
        curves: &[Vec<(f64, f64)>],
        taken: &mut Vec<(f64, f64)>,
    ) -> Drawing<B> {
        if !guide.y.is_finite() {
            return Ok(());
        }
        let y = self.at_y(guide.y).clamp(self.top, self.bottom);
        pen.line(&[(self.left, y), (self.right, y)], guide.color, guide.width, guide.dash)?;
        if guide.words.is_empty() {
            return Ok(());
        }
        let width = text_width(guide.words, TEXT);
        let (first, last) = (self.left + 6.0, (self.right - 6.0 - width).max(self.left + 6.0));
        let places = (0..=PLACES).map(|i| first + f64::from(i) / f64::from(PLACES) * (last - first));
        let places = places
            .flat_map(|x| [(x, y - LINE / 2.0 - 2.0), (x, y + LINE / 2.0 + 2.0)])
            .filter(|p| p.1 - LINE / 2.0 >= self.top - LINE && p.1 + LINE / 2.0 <= self.bottom);
        // How much is in the way: points of curves, and any words above all.
        let in_the_way = |&(x, middle): &(f64, f64)| {
            let hidden =
                |p: &(f64, f64)| (x - 3.0..=x + width + 3.0).contains(&p.0) && (p.1 - middle).abs() < LINE / 2.0 + 1.0;
            let points = curves.iter().flat_map(|c| closely(c)).filter(hidden).count();
            let words = taken.iter().filter(|t| (t.0 - x).abs() < width && (t.1 - middle).abs() < LINE).count();
            points + 1000 * words
        };
        let (x, middle) = places.min_by_key(in_the_way).unwrap_or((first, y + LINE / 2.0 + 2.0));
        taken.push((x, middle));
        pen.words_on_paper(guide.words, (x, middle), guide.color, Hang::Left)
    }

    /// Words at the right of the frame for each curve, spread apart and led to the curve's end.
    pub(super) fn label_ends<B: DrawingBackend>(&self, pen: &Pen<'_, B>, ends: &[End<'_>]) -> Drawing<B> {
        let (width, _) = pen.size();
        let room = width - self.right - LEADER - 2.0;
        let (low, high) = (self.top - LINE / 2.0, self.bottom + LINE / 2.0);
        let set =
            |most: usize| -> Vec<Vec<String>> { ends.iter().map(|e| wrapped(e.words, TEXT, room, most)).collect() };
        let height = |lines: &Vec<String>| lines.len().max(1) as f64 * LINE + BETWEEN;
        let fits = |lines: &Vec<Vec<String>>| lines.iter().map(height).sum::<f64>() <= high - low;
        let lines = (2..=4).rev().map(set).find(fits).unwrap_or_else(|| set(1));
        let heights: Vec<f64> = lines.iter().map(height).collect();
        let wanted: Vec<f64> = ends.iter().map(|e| e.at.1).collect();
        let middles = spread_apart(&wanted, &heights, low, high);
        for ((end, lines), middle) in ends.iter().zip(lines).zip(middles) {
            let elbow = (self.right + 3.0, end.at.1);
            pen.line(&[end.at, elbow, (self.right + LEADER - 3.0, middle)], end.color, 1.0, SOLID)?;
            let first = middle - (lines.len() as f64 - 1.0) * LINE / 2.0;
            for (i, line) in lines.iter().enumerate() {
                pen.words(line, (self.right + LEADER, first + i as f64 * LINE), end.color, Hang::Left)?;
            }
        }
        Ok(())
    }
}

/// Room between the words of one curve and those of the next.
const BETWEEN: f64 = 3.0;
/// Width of the lines from the curves to their words.
const LEADER: f64 = 14.0;

/// Room that words at the right of a chart `width` wide get.
pub(super) fn label_room<'w>(width: f64, words: impl Iterator<Item = &'w str>) -> f64 {
    let longest = words.map(|w| text_width(w, TEXT)).fold(0.0, f64::max);
    (longest + LEADER + 4.0).min(0.34 * width).max(24.0)
}

/// The last point of a curve; `None` for a curve that is not seen.
pub(super) fn last_point(pieces: &[Vec<(f64, f64)>]) -> Option<(f64, f64)> {
    pieces.last().and_then(|p| p.last()).copied()
}

/// A line across with words.
pub(super) struct Guide<'w> {
    pub(super) y: f64,
    pub(super) words: &'w str,
    pub(super) color: RGBColor,
    pub(super) width: f64,
    pub(super) dash: Dash,
}

/// The end of a curve and its words.
pub(super) struct End<'w> {
    pub(super) words: &'w str,
    pub(super) at: (f64, f64),
    pub(super) color: RGBColor,
}

/// The part of a line between the heights `top` and `bottom`.
fn cut(a: (f64, f64), b: (f64, f64), top: f64, bottom: f64) -> Option<((f64, f64), (f64, f64))> {
    let inside = |p: (f64, f64)| p.1 >= top && p.1 <= bottom;
    if inside(a) && inside(b) {
        return Some((a, b));
    }
    if (a.1 < top && b.1 < top) || (a.1 > bottom && b.1 > bottom) {
        return None;
    }
    let at = |y: f64| (a.0 + (b.0 - a.0) * (y - a.1) / (b.1 - a.1), y);
    let end = |p: (f64, f64)| {
        if p.1 < top {
            at(top)
        } else if p.1 > bottom {
            at(bottom)
        } else {
            p
        }
    };
    Some((end(a), end(b)))
}

/// Points along a curve, close enough together that no word slips between them.
fn closely(curve: &[(f64, f64)]) -> impl Iterator<Item = (f64, f64)> {
    curve.windows(2).flat_map(|pair| {
        let (a, b) = (pair[0], pair[1]);
        let steps = ((b.0 - a.0).abs().max((b.1 - a.1).abs()) / 4.0).ceil().clamp(1.0, 500.0) as u32;
        (0..=steps).map(move |i| {
            let part = f64::from(i) / f64::from(steps);
            (a.0 + part * (b.0 - a.0), a.1 + part * (b.1 - a.1))
        })
    })
}

/// A line straight across or down, moved to the middle of a pixel, where it is sharp; `None` for any
/// other.
fn snapped(points: &[(f64, f64)]) -> Option<[(f64, f64); 2]> {
    let &[a, b] = points else { return None };
    let middle = |v: f64| v.floor() + 0.5;
    if a.0 == b.0 {
        Some([(middle(a.0), a.1), (middle(a.0), b.1)])
    } else if a.1 == b.1 {
        Some([(a.0, middle(a.1)), (b.0, middle(a.1))])
    } else {
        None
    }
}

/// `points` cut into the strokes of `dash`.
fn dashed(points: &[(f64, f64)], dash: Dash) -> Vec<Vec<(f64, f64)>> {
    if points.len() < 2 {
        return Vec::new();
    }
    // A line longer than any screen is not worth dashing.
    let drawable = points.iter().all(|p| p.0.abs() < 1e5 && p.1.abs() < 1e5);
    if dash.is_empty() || !drawable {
        return vec![points.to_vec()];
    }
    let mut strokes = Vec::new();
    let mut stroke = vec![points[0]];
    let (mut part, mut left) = (0, dash[0]);
    for pair in points.windows(2) {
        let (mut from, to) = (pair[0], pair[1]);
        loop {
            let (dx, dy) = (to.0 - from.0, to.1 - from.1);
            let length = dx.hypot(dy);
            if length <= left {
                left -= length;
                stroke.push(to);
                break;
            }
            from = (from.0 + dx * left / length, from.1 + dy * left / length);
            stroke.push(from);
            let drawn = std::mem::replace(&mut stroke, vec![from]);
            if part % 2 == 0 {
                strokes.push(drawn);
            }
            part = (part + 1) % dash.len();
            left = dash[part];
        }
    }
    if part % 2 == 0 && stroke.len() > 1 {
        strokes.push(stroke);
    }
    strokes
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn ticks_are_round_and_within() {
        let ph = Axis::exact(0.0, 14.0, 7);
        assert_eq!(ph.ticks, [0.0, 2.0, 4.0, 6.0, 8.0, 10.0, 12.0, 14.0]);
        let log_d = Axis::round(-3.7, 2.1, 6);
        assert_eq!((log_d.low, log_d.high), (-4.0, 3.0));
        assert_eq!(log_d.words(-4.0), "−4");
        assert_eq!(Axis::exact(0.0, 0.4, 4).words(0.1), "0.1");
        let portions = Axis::counting(4.0, 10);
        assert_eq!((portions.ticks.len(), portions.words(4.0)), (5, "4".to_owned()));
        for (low, high) in [(f64::NAN, 1.0), (1.0, 1.0), (2.0, -1.0), (f64::NEG_INFINITY, f64::INFINITY)] {
            let axis = Axis::round(low, high, 5);
            assert!(axis.high > axis.low && axis.ticks.len() < 30, "{axis:?}");
        }
    }

    #[test]
    fn curves_break_at_gaps_and_end_at_the_frame() {
        let frame = Frame {
            left: 0.0,
            right: 100.0,
            top: 0.0,
            bottom: 100.0,
            x: Axis::exact(0.0, 10.0, 5),
            y: Axis::exact(0.0, 10.0, 5),
        };
        let pieces = frame.curve(&[0.0, 1.0, 2.0, 3.0, 4.0, 5.0], &[5.0, 5.0, f64::NAN, 5.0, 15.0, f64::NEG_INFINITY]);
        assert_eq!(pieces, [vec![(0.0, 50.0), (10.0, 50.0)], vec![(30.0, 50.0), (35.0, 0.0)]]);
        assert!(frame.curve(&[1.0], &[1.0]).is_empty());
    }

    #[test]
    fn dashes_run_on_round_corners() {
        let strokes = dashed(&[(0.0, 0.0), (3.0, 0.0), (3.0, 9.0)], &[4.0, 4.0]);
        assert_eq!(strokes, [vec![(0.0, 0.0), (3.0, 0.0), (3.0, 1.0)], vec![(3.0, 5.0), (3.0, 9.0)]]);
    }
}
