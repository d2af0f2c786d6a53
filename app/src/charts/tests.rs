//! The charts drawn as SVG text.

use super::*;
use plotters::drawing::IntoDrawingArea;
use plotters::prelude::SVGBackend;

/// SVG of a chart at a width of `width` CSS pixels and `scale` device pixels to each.
fn svg(
    width: u32,
    scale: f64,
    draw: impl for<'a> Fn(&plotters::drawing::DrawingArea<SVGBackend<'a>, plotters::coord::Shift>, f64, &Ink),
) -> String {
    let mut text = String::new();
    let height = f64::from(width) * 0.62;
    let size = ((f64::from(width) * scale) as u32, (height * scale) as u32);
    {
        let root = SVGBackend::with_string(&mut text, size).into_drawing_area();
        draw(&root, scale, &Ink::LIGHT);
        root.present().unwrap();
    }
    text
}

fn species(data: &SpeciesData, width: u32) -> String {
    svg(width, 1.0, |root, scale, ink| draw_species(root, data, scale, ink).unwrap())
}

fn log_d(data: &LogDData, width: u32) -> String {
    svg(width, 1.0, |root, scale, ink| draw_log_d(root, data, scale, ink).unwrap())
}

fn removal(data: &RemovalData, width: u32) -> String {
    svg(width, 2.0, |root, scale, ink| draw_removal(root, data, scale, ink).unwrap())
}

fn species_data() -> SpeciesData {
    let ph: Vec<f64> = (0..=140).map(|i| f64::from(i) / 10.0).collect();
    let neutral = ph.iter().map(|ph| 1.0 / (1.0 + 10f64.powf(8.5 - ph)));
    let cation = ph.iter().map(|ph| 1.0 / (1.0 + 10f64.powf(ph - 8.5)));
    SpeciesData {
        title: "Charged below pH 7.5".into(),
        alt: "The neutral share is under 1 % at pH 3.4.".into(),
        series: vec![("neutral".into(), neutral.collect()), ("cation".into(), cation.collect())],
        ph,
        own_ph: 3.4,
    }
}

fn log_d_data() -> LogDData {
    let ph: Vec<f64> = (0..=140).map(|i| f64::from(i) / 10.0).collect();
    let reading = |pka: f64| ph.iter().map(|ph| 1.7 - (1.0 + 10f64.powf(pka - ph)).log10()).collect::<Vec<f64>>();
    LogDData {
        title: "Enough above pH 8".into(),
        alt: "log D reaches what is needed at pH 8.".into(),
        series: vec![
            ("base, pKa 8.5".into(), true, reading(8.5)),
            ("base, pKa 8.2".into(), false, reading(8.2)),
            ("pKb read as pKa, 5.5".into(), false, reading(5.5)),
        ],
        ph,
        own_ph: 3.4,
        needed_log_d: Some(0.9),
    }
}

fn removal_data() -> RemovalData {
    RemovalData {
        title: "Three portions reach the goal".into(),
        alt: "Removed: 60, 84, 94 %.".into(),
        series: vec![("quinine".into(), true, vec![0.6, 0.84, 0.936]), ("aroma".into(), false, vec![0.05, 0.09, 0.13])],
        goal: 0.9,
        found: Some(0.24),
    }
}

/// The heights of all words in `svg` that contain `words`.
fn heights(svg: &str, words: &str) -> Vec<f64> {
    svg.split("<text ")
        .skip(1)
        .filter(|t| t.split('>').nth(1).is_some_and(|body| body.contains(words)))
        .map(|t| t.split("y=\"").nth(1).unwrap().split('"').next().unwrap().parse().unwrap())
        .collect()
}

#[test]
fn labels_and_lines_have_their_words() {
    for width in [320, 680, 1100] {
        for (text, words) in [
            (species(&species_data(), width), &["neutral", "cation", "this liquid, pH 3.4", "100 %"][..]),
            (log_d(&log_d_data(), width), &["8.5", "8.2", "needed,", "this liquid, pH 3.4", "log D"]),
            (removal(&removal_data(), width), &["quinine", "aroma", "goal 90 %", "found 24 %", "portions"]),
        ] {
            for w in words {
                assert!(!heights(&text, w).is_empty(), "{w} at {width}: {text}");
            }
        }
    }
}

#[test]
fn labels_of_curves_that_meet_are_kept_apart() {
    let text = log_d(&log_d_data(), 900);
    let mut at: Vec<f64> = ["pKa 8.5", "pKa 8.2", "pKb read"].iter().map(|w| heights(&text, w)[0]).collect();
    at.sort_by(f64::total_cmp);
    assert!(at.windows(2).all(|p| p[1] - p[0] >= 14.0), "{at:?}");
}

#[test]
fn words_stay_within_the_picture() {
    for width in [320, 680] {
        for text in [species(&species_data(), width), log_d(&log_d_data(), width)] {
            for word in text.split("<text ").skip(1) {
                let number =
                    |of: &str| word.split(of).nth(1).unwrap().split('"').next().unwrap().parse::<f64>().unwrap();
                let body = word.split('>').nth(1).unwrap().split('<').next().unwrap().trim();
                let wide = super::labels::text_width(body, super::plot::TEXT);
                let left = number("x=\"")
                    - match word {
                        w if w.contains("text-anchor=\"end\"") => wide,
                        w if w.contains("text-anchor=\"middle\"") => wide / 2.0,
                        _ => 0.0,
                    };
                assert!(left >= 0.0 && left + wide <= f64::from(width), "{left} {wide} {word}");
                assert!((8.0..=f64::from(width) * 0.62 - 6.0).contains(&number("y=\"")), "{word}");
            }
        }
    }
}

#[test]
fn nothing_strange_brings_drawing_down() {
    let bad = [f64::NAN, f64::INFINITY, f64::NEG_INFINITY, 1e300, -1e300];
    let mut lists: Vec<Vec<f64>> = vec![Vec::new(), vec![3.0], vec![3.0, 3.0], bad.to_vec()];
    lists.extend(bad.map(|b| vec![0.0, b, 2.0]));
    for ph in &lists {
        for values in &lists {
            for point in bad.into_iter().chain([3.0]) {
                let data = SpeciesData {
                    ph: ph.clone(),
                    series: vec![("a".into(), values.clone()), (String::new(), Vec::new())],
                    own_ph: point,
                    ..species_data()
                };
                species(&data, 320);
                let data = LogDData {
                    ph: ph.clone(),
                    series: vec![("a".into(), true, values.clone()), ("b".into(), false, Vec::new())],
                    own_ph: point,
                    needed_log_d: Some(point),
                    ..log_d_data()
                };
                log_d(&data, 320);
                let data = RemovalData {
                    series: vec![("a".into(), true, values.clone()), ("b".into(), false, ph.clone())],
                    goal: point,
                    found: Some(point),
                    ..removal_data()
                };
                removal(&data, 320);
            }
        }
    }
    for width in [1, 8, 60] {
        species(&SpeciesData { series: Vec::new(), ..species_data() }, width);
        log_d(&log_d_data(), width);
        removal(&RemovalData { series: Vec::new(), found: None, ..removal_data() }, width);
    }
}

#[test]
fn tables_are_thinned_but_keep_both_ends() {
    use super::figure::Drawn;
    let table = species_data().table();
    assert!(table.rows.len() <= 21, "{}", table.rows.len());
    assert_eq!(table.rows[0], ["0.0", "0.0", "100.0"]);
    assert_eq!(table.rows.last().unwrap()[0], "14.0");
    assert_eq!(removal_data().table().rows.len(), 3);
    assert_eq!(log_d_data().table().head[1], "log D, base, pKa 8.5 (in use)");
}
