//! Words on a chart: how wide they are, where they break, and how they keep clear of each other.

use unstir_core::order::put_in_order;

/// Width of `text` in a sans face at font size `size`, about; rather too wide than too narrow.
pub(super) fn text_width(text: &str, size: f64) -> f64 {
    let ems: f64 = text
        .chars()
        .map(|c| match c {
            'i' | 'j' | 'l' | 'I' | '\'' | '|' | '.' | ',' | ':' | ';' | '!' | 'f' | 't' | 'r' | ' ' | '(' | ')'
            | '-' => 0.36,
            'm' | 'w' | 'M' | 'W' | '%' | '@' | '—' => 0.92,
            c if c.is_uppercase() => 0.70,
            _ => 0.58,
        })
        .sum();
    ems * size
}

/// `text` in at most `most` lines no wider than `width`; what does not fit ends in `…`.
pub(super) fn wrapped(text: &str, size: f64, width: f64, most: usize) -> Vec<String> {
    let mut lines: Vec<String> = Vec::new();
    for word in text.split_whitespace() {
        match lines.last_mut() {
            Some(line) if text_width(&format!("{line} {word}"), size) <= width => {
                line.push(' ');
                line.push_str(word);
            }
            _ => lines.push(word.to_owned()),
        }
    }
    let cut = lines.len() > most;
    lines.truncate(most.max(1));
    let last = lines.len().saturating_sub(1);
    for (i, line) in lines.iter_mut().enumerate() {
        let ends = cut && i == last;
        if ends || text_width(line, size) > width {
            *line = shortened(line, size, width, ends);
        }
    }
    lines
}

/// `line` cut to `width` with `…` at its end; the sign is added even to a line that fits if
/// `always`.
fn shortened(line: &str, size: f64, width: f64, always: bool) -> String {
    let mut kept = line.to_owned();
    if always && text_width(&format!("{kept}…"), size) <= width {
        return kept + "…";
    }
    while kept.chars().count() > 1 && text_width(&format!("{kept}…"), size) > width {
        kept.pop();
    }
    kept.truncate(kept.trim_end().len());
    kept + "…"
}

/// Centres of things `sizes` long, as near to `wanted` as they go without overlapping, between
/// `low` and `high`. Where there is not room for all, they overlap evenly rather than leave it.
pub(super) fn spread_apart(wanted: &[f64], sizes: &[f64], low: f64, high: f64) -> Vec<f64> {
    let total: f64 = sizes.iter().sum();
    let squeeze = if total > high - low && total > 0.0 { (high - low).max(0.0) / total } else { 1.0 };
    let size = |i: usize| sizes[i] * squeeze;
    let mut order: Vec<usize> = (0..wanted.len()).collect();
    put_in_order(&mut order, |&a, &b| wanted[a].total_cmp(&wanted[b]));
    // Runs of things that touch each other; each run sits where its members on average want to be.
    let mut runs: Vec<Run> = Vec::new();
    for &i in &order {
        let at = if wanted[i].is_finite() { wanted[i] } else { high };
        let mut run = Run { members: vec![i], length: size(i), sum: at - size(i) / 2.0, start: 0.0 };
        run.settle(low, high);
        while let Some(before) = runs.pop_if(|r| r.start + r.length > run.start) {
            run = before.joined(run);
            run.settle(low, high);
        }
        runs.push(run);
    }
    let mut centres = vec![low; wanted.len()];
    for run in runs {
        let mut edge = run.start;
        for i in run.members {
            centres[i] = edge + size(i) / 2.0;
            edge += size(i);
        }
    }
    centres
}

/// Things that touch.
struct Run {
    members: Vec<usize>,
    length: f64,
    /// Sum over the members of where the run would start if that member had its wish.
    sum: f64,
    start: f64,
}

impl Run {
    fn settle(&mut self, low: f64, high: f64) {
        self.start = (self.sum / self.members.len() as f64).min(high - self.length).max(low);
    }

    fn joined(mut self, after: Self) -> Self {
        self.sum += after.sum - after.members.len() as f64 * self.length;
        self.length += after.length;
        self.members.extend(after.members);
        self
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn things_with_room_stay_where_they_want_to_be() {
        assert_eq!(spread_apart(&[50.0, 10.0], &[10.0, 10.0], 0.0, 100.0), [50.0, 10.0]);
    }

    #[test]
    fn things_in_one_place_are_spread_evenly_about_it() {
        assert_eq!(spread_apart(&[50.0, 50.0, 50.0], &[10.0; 3], 0.0, 100.0), [40.0, 50.0, 60.0]);
        assert_eq!(spread_apart(&[100.0, 99.0], &[10.0; 2], 0.0, 100.0), [95.0, 85.0]);
    }

    #[test]
    fn nothing_overlaps_or_leaves() {
        let wanted = [3.0, 3.5, 90.0, f64::NAN, 91.0, 40.0];
        let sizes = [12.0, 12.0, 12.0, 24.0, 12.0, 12.0];
        let at = spread_apart(&wanted, &sizes, 0.0, 100.0);
        for i in 0..at.len() {
            assert!(at[i] - sizes[i] / 2.0 > -1e-9 && at[i] + sizes[i] / 2.0 < 100.0 + 1e-9, "{at:?}");
            for j in 0..i {
                assert!((at[i] - at[j]).abs() >= (sizes[i] + sizes[j]) / 2.0 - 1e-9, "{at:?}");
            }
        }
        let crowded = spread_apart(&[1.0; 20], &[12.0; 20], 0.0, 100.0);
        assert!(crowded.iter().all(|&c| (0.0..=100.0).contains(&c)));
        assert!(spread_apart(&[], &[], 0.0, 1.0).is_empty());
    }

    #[test]
    fn words_wrap_and_end_in_an_ellipsis() {
        assert_eq!(wrapped("quinine", 12.0, 100.0, 2), ["quinine"]);
        let lines = wrapped("as a base, second constant, pKa 8.5", 12.0, 90.0, 2);
        assert_eq!(lines.len(), 2);
        assert!(lines[1].ends_with('…'), "{lines:?}");
        assert!(lines.iter().all(|l| text_width(l, 12.0) <= 90.0), "{lines:?}");
        assert!(wrapped("", 12.0, 90.0, 2).is_empty());
    }
}
