//! Numbers as shown: significant figures follow the uncertainty; a true minus; no false digits.

use unstir_core::plan::Interval;

/// A pH as it is told in words, to 0.01.
pub fn ph_words(ph: f64) -> String {
    ((ph * 100.0).round() / 100.0).to_string().replace('-', "−")
}

/// `value` to `digits` significant figures: plain from 0.001 up to a million, else as a power of ten.
pub fn significant(value: f64, digits: usize) -> String {
    if value == 0.0 {
        return "0".to_owned();
    }
    if !value.is_finite() {
        return "—".to_owned();
    }
    let digits = digits.max(1);
    // Rounded first, so that 9.996 to three figures counts as 10.0.
    let rounded = format!("{:.*e}", digits - 1, value);
    let exponent: i32 = rounded.rsplit('e').next().and_then(|e| e.parse().ok()).unwrap_or(0);
    if (-3..6).contains(&exponent) {
        let decimals = (digits as i32 - 1 - exponent).max(0);
        return with_minus(format!("{value:.*}", decimals as usize));
    }
    let mantissa = rounded.split('e').next().unwrap_or("0");
    with_minus(format!("{mantissa}×10{}", raised(exponent)))
}

/// `value` as stated: to at most six significant figures, without zeros at the end.
pub fn stated(value: f64) -> String {
    let text = significant(value, 6);
    if text.contains('×') || !text.contains('.') {
        return text;
    }
    text.trim_end_matches('0').trim_end_matches('.').to_owned()
}

/// `value` to a fixed number of decimals.
pub fn fixed(value: f64, decimals: usize) -> String {
    if !value.is_finite() {
        return "—".to_owned();
    }
    let text = format!("{value:.decimals$}");
    // Rounding must not leave a minus before nothing.
    let nothing = text.trim_start_matches('-').chars().all(|c| matches!(c, '0' | '.'));
    with_minus(if nothing { text.trim_start_matches('-').to_owned() } else { text })
}

/// A fraction in percent, with enough figures near 0 and 100 %.
pub fn percent(fraction: f64) -> String {
    let p = 100.0 * fraction;
    let from_end = p.abs().min((100.0 - p).abs());
    let decimals = match from_end {
        d if d == 0.0 || d >= 10.0 => 0,
        d if d >= 1.0 => 1,
        d if d >= 0.1 => 2,
        d if d >= 0.001 => 3,
        _ => 0,
    };
    if p > 0.0 && p < 0.001 {
        return "under 0.001 %".to_owned();
    }
    if p < 100.0 && 100.0 - p < 0.001 {
        return "over 99.999 %".to_owned();
    }
    format!("{} %", fixed(p, decimals))
}

/// Decimals that show the half-width of an interval to two figures where its first is 1 or 2, else
/// to one.
fn decimals_for(half_width: f64) -> usize {
    let exponent = half_width.log10().floor();
    let first = half_width / 10f64.powf(exponent);
    let figures = if first < 2.95 { 1.0 } else { 0.0 };
    (figures - exponent).clamp(0.0, 6.0) as usize
}

/// Value and interval as shown, e.g. `24` and `19–29`; without an interval where there is none.
#[derive(Clone, Debug, Default, PartialEq, Eq)]
pub struct Measured {
    /// The value with its unit.
    pub value: String,
    /// The interval with its unit; empty where there is none.
    pub interval: String,
}

impl Measured {
    /// Both on one line.
    pub fn line(&self) -> String {
        if self.interval.is_empty() { self.value.clone() } else { format!("{} ({})", self.value, self.interval) }
    }
}

/// `i` as shown; a fraction (unit "1") as it is.
pub fn measured(i: &Interval) -> Measured {
    scaled(i, 1.0, if i.unit == "1" { "" } else { i.unit })
}

/// The fraction `i` as shown in percent.
pub fn measured_percent(i: &Interval) -> Measured {
    // Beyond this a plan tells nothing.
    if i.high < 1e-5 {
        return Measured { value: percent(i.high), interval: String::new() };
    }
    scaled(i, 100.0, "%")
}

fn scaled(i: &Interval, factor: f64, unit: &str) -> Measured {
    let unit = if unit.is_empty() { String::new() } else { format!(" {unit}") };
    let (v, low, high) = (i.value * factor, i.low * factor, i.high * factor);
    let half = (high - v).max(v - low);
    if !(half > 0.0) || !half.is_finite() {
        let value = if unit == " %" { percent(i.value) } else { format!("{}{unit}", stated(v)) };
        return Measured { value, interval: String::new() };
    }
    let decimals = decimals_for(half);
    let show = |x| fixed(x, decimals);
    let dash = if low < 0.0 { " to " } else { "–" };
    Measured { value: format!("{}{unit}", show(v)), interval: format!("{}{dash}{}{unit}", show(low), show(high)) }
}

fn with_minus(text: String) -> String {
    text.replace('-', "−")
}

/// An exponent in raised figures.
fn raised(exponent: i32) -> String {
    exponent
        .to_string()
        .chars()
        .map(|c| match c {
            '-' => '⁻',
            '0' => '⁰',
            '1' => '¹',
            '2' => '²',
            '3' => '³',
            '4' => '⁴',
            '5' => '⁵',
            '6' => '⁶',
            '7' => '⁷',
            '8' => '⁸',
            _ => '⁹',
        })
        .collect()
}

#[cfg(test)]
mod tests {
    use super::*;

    fn i(value: f64, low: f64, high: f64, unit: &'static str) -> Interval {
        Interval { value, low, high, unit }
    }

    #[test]
    fn figures_follow_the_uncertainty() {
        assert_eq!(measured_percent(&i(0.2437, 0.19, 0.29, "1")).line(), "24 % (19–29 %)");
        assert_eq!(measured(&i(480.0, 470.2, 489.8, "mL")).line(), "480 mL (470–490 mL)");
        assert_eq!(measured(&i(9.5, 9.35, 9.65, "mL")).line(), "9.50 mL (9.35–9.65 mL)");
        assert_eq!(measured(&i(75.0, 75.0, 75.0, "mL")).line(), "75 mL");
        assert_eq!(measured_percent(&i(7e-7, 5e-7, 9e-7, "1")).line(), "under 0.001 %");
        assert_eq!(measured(&i(0.1, -0.2, 0.4, "1")).line(), "0.1 (−0.2 to 0.4)");
    }

    #[test]
    fn no_digit_is_made_up() {
        assert_eq!(significant(1234.5, 3), "1234");
        assert_eq!(significant(0.000_012_3, 2), "1.2×10⁻⁵");
        assert_eq!(significant(-9.996, 3), "−10.0");
        assert_eq!(significant(1e12, 2), "1.0×10¹²");
        assert_eq!(significant(f64::NAN, 2), "—");
        assert_eq!((stated(500.0), stated(0.95), stated(120_000.0)), ("500".into(), "0.95".into(), "120000".into()));
        assert_eq!(fixed(-0.001, 1), "0.0");
    }

    #[test]
    fn percents_near_the_ends() {
        for (f, text) in [
            (0.0, "0 %"),
            (0.5, "50 %"),
            (0.9984, "99.84 %"),
            (0.045, "4.5 %"),
            (1.0, "100 %"),
            (1e-9, "under 0.001 %"),
            (1.0 - 1e-9, "over 99.999 %"),
        ] {
            assert_eq!(percent(f), text);
        }
    }
}
