//! A number as typed, and the one parser that reads it.
//!
//! The typed text is the state and is never altered; a [`Quantity`] is read from it.

use serde::{Deserialize, Serialize};
use unstir_core::study::{Quantity, Range};

/// A number as typed, with its spread and its source.
#[derive(Clone, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
pub struct NumberText {
    /// The value, e.g. `9.5`, `9,5`, `1.2×10^-3`.
    pub value: String,
    /// What is known about its spread: `0.2` is a standard uncertainty, `4.6 to 10.2` or
    /// `4.6–10.2` a range, `0.2; 4.6 to 10.2` both; empty if nothing is known.
    #[serde(default)]
    pub spread: String,
    /// Where the number comes from.
    #[serde(default)]
    pub source: String,
}

impl NumberText {
    /// A bare value.
    pub fn of(value: impl Into<String>) -> Self {
        Self { value: value.into(), ..Self::default() }
    }

    /// Whether neither a value nor a spread is typed.
    pub fn is_empty(&self) -> bool {
        self.value.trim().is_empty() && self.spread.trim().is_empty()
    }

    /// The text that reads back as `q`.
    pub fn from_quantity(q: &Quantity) -> Self {
        let mut spread = q.standard_uncertainty.map(|u| u.to_string()).unwrap_or_default();
        if let Some(r) = q.range {
            if !spread.is_empty() {
                spread.push_str("; ");
            }
            spread.push_str(&format!("{} to {}", r.low, r.high));
        }
        Self { value: q.value.to_string(), spread, source: q.source.clone() }
    }

    /// As [`Self::from_quantity`], empty for a number that is not stated.
    pub fn from_optional(q: Option<&Quantity>) -> Self {
        q.map(Self::from_quantity).unwrap_or_default()
    }

    /// The quantity typed.
    ///
    /// # Errors
    /// What is wrong with the text, naming `what`.
    pub fn quantity(&self, what: &str) -> Result<Quantity, String> {
        let value = number(&self.value).map_err(|e| format!("{what}: {e}"))?;
        let (standard_uncertainty, range) = spread(&self.spread).map_err(|e| format!("{what}, spread: {e}"))?;
        Ok(Quantity { value, standard_uncertainty, range, source: self.source.trim().to_owned() })
    }
}

/// The number in `text`.
///
/// Read: `.` or one `,` as decimal mark, `1e-3`, `1.2×10^-3`, `1.2·10⁻³`, a Unicode minus, and
/// spaces between groups of three digits.
///
/// # Errors
/// A sentence without the field's name, e.g. "enter a number".
pub fn number(text: &str) -> Result<f64, String> {
    let trimmed = text.trim();
    if trimmed.is_empty() {
        return Err("enter a number".to_owned());
    }
    let not_read = || format!("“{trimmed}” is not a number; write it like 12.5 or 1.2e-3");
    let plain = plain_text(trimmed).ok_or_else(not_read)?;
    let plain = decimal_mark(&plain, trimmed)?;
    // Only digits and the marks of a number, so that words such as "inf" are refused.
    if !plain.chars().all(|c| c.is_ascii_digit() || matches!(c, '.' | '-' | '+' | 'e' | 'E')) {
        return Err(not_read());
    }
    match plain.parse::<f64>() {
        Ok(v) if v.is_finite() => Ok(v),
        Ok(_) => Err(format!("“{trimmed}” is too large to compute with")),
        Err(_) => Err(not_read()),
    }
}

/// `text` with an ASCII minus, a power of ten as `e`, and spaces between digit groups left out;
/// `None` where spaces stand in other places.
fn plain_text(text: &str) -> Option<String> {
    let minus: String = text
        .chars()
        .map(|c| match c {
            '\u{2212}' | '\u{2013}' | '\u{2010}' | '\u{2011}' => '-',
            '\u{a0}' | '\u{202f}' | '\u{2009}' | '\u{2007}' => ' ',
            c => c,
        })
        .collect();
    let (head, power) = match minus.find(['×', '·', '*', 'x']) {
        Some(at) => {
            let mark = minus[at..].chars().next().map_or(1, char::len_utf8);
            let rest = minus[at + mark..].trim_start().strip_prefix("10")?;
            let exponent = match rest.strip_prefix('^') {
                Some(e) => e.trim().to_owned(),
                None => rest.trim().chars().map(lowered).collect::<Option<String>>()?,
            };
            if exponent.is_empty() || exponent.contains(['e', 'E', '.', ',']) {
                return None;
            }
            (minus[..at].trim_end(), Some(exponent))
        }
        None => (minus.as_str(), None),
    };
    let mut out = without_group_spaces(head)?;
    if let Some(e) = power {
        out.push('e');
        out.push_str(&e);
    }
    Some(out)
}

/// The plain character of a superscript.
fn lowered(c: char) -> Option<char> {
    Some(match c {
        '⁰' => '0',
        '¹' => '1',
        '²' => '2',
        '³' => '3',
        '⁴' => '4',
        '⁵' => '5',
        '⁶' => '6',
        '⁷' => '7',
        '⁸' => '8',
        '⁹' => '9',
        '⁻' => '-',
        '⁺' => '+',
        _ => return None,
    })
}

/// `text` without its spaces, which may only part groups of three digits.
fn without_group_spaces(text: &str) -> Option<String> {
    let parts: Vec<&str> = text.split(' ').collect();
    for (i, part) in parts.iter().enumerate().skip(1) {
        let digits = part.chars().take_while(char::is_ascii_digit).count();
        let before = parts[i - 1].trim_start_matches(['-', '+']);
        if digits != 3 || before.is_empty() || !before.chars().all(|c| c.is_ascii_digit()) || before.len() > 3 {
            return None;
        }
    }
    Some(parts.concat())
}

/// `plain` with `.` as its decimal mark.
fn decimal_mark(plain: &str, typed: &str) -> Result<String, String> {
    let (commas, points) = (plain.matches(',').count(), plain.matches('.').count());
    if commas > 0 && points > 0 || commas > 1 {
        return Err(format!("“{typed}” can be read in two ways; use one decimal mark and no mark between thousands"));
    }
    Ok(plain.replace(',', "."))
}

/// Standard uncertainty and range in `text`; see [`NumberText::spread`].
fn spread(text: &str) -> Result<(Option<f64>, Option<Range>), String> {
    let (mut u, mut range) = (None, None);
    for part in text.split(';').map(str::trim).filter(|p| !p.is_empty()) {
        match ends(part) {
            Some((low, high)) if range.is_none() => range = Some(Range { low: number(low)?, high: number(high)? }),
            None if u.is_none() => u = Some(number(part.trim_start_matches(['±', ' ']))?),
            _ => {
                return Err("write one standard uncertainty such as 0.2, or one range such as 4.6 to 10.2".to_owned());
            }
        }
    }
    Ok((u, range))
}

/// The two ends of a range.
fn ends(part: &str) -> Option<(&str, &str)> {
    if let Some((low, high)) = part.split_once(" to ") {
        return Some((low, high));
    }
    // A dash parts two ends only after a digit: "4.6–10.2", but not "-3" or "1e-3".
    let at = part
        .char_indices()
        .find(|&(i, c)| matches!(c, '–' | '—' | '-') && part[..i].trim_end().ends_with(|p: char| p.is_ascii_digit()))?;
    Some((&part[..at.0], &part[at.0 + at.1.len_utf8()..]))
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn numbers_as_people_type_them() {
        for (text, value) in [
            ("9.5", 9.5),
            (" 9,5 ", 9.5),
            ("1e-3", 1e-3),
            ("1.2×10^-3", 1.2e-3),
            ("1.2 × 10^−3", 1.2e-3),
            ("1.2·10⁻³", 1.2e-3),
            ("−4", -4.0),
            ("1 234", 1234.0),
            ("1\u{202f}234\u{a0}567,5", 1_234_567.5),
            ("+7", 7.0),
            (".5", 0.5),
            ("5.", 5.0),
        ] {
            assert_eq!(number(text), Ok(value), "{text}");
        }
    }

    #[test]
    fn what_is_no_number_is_refused_in_words() {
        for text in
            ["1,234.5", "1.234,5", "1,2,3", "12 34", "abc", "inf", "NaN", "1e999", "1..2", "×10^3", "1×10", "- "]
        {
            let message = number(text).unwrap_err();
            assert!(message.contains('“'), "{text}: {message}");
        }
        assert_eq!(number("  "), Err("enter a number".to_owned()));
        assert!(number("1,234.5").unwrap_err().contains("two ways"));
    }

    #[test]
    fn spreads() {
        let of = |s: &str| NumberText { value: "9.5".into(), spread: s.into(), source: String::new() }.quantity("K");
        assert_eq!(of("0.2").unwrap().standard_uncertainty, Some(0.2));
        assert_eq!(of("± 0,2").unwrap().standard_uncertainty, Some(0.2));
        for s in ["4.6 to 10.2", "4.6–10.2", "4,6 - 10,2"] {
            assert_eq!(of(s).unwrap().range, Some(Range { low: 4.6, high: 10.2 }), "{s}");
        }
        assert_eq!(of("-3 to -1").unwrap().range, Some(Range { low: -3.0, high: -1.0 }));
        assert_eq!(of("1e-3").unwrap().standard_uncertainty, Some(1e-3));
        assert!(of("wide").unwrap_err().starts_with("K, spread:"));
        assert!(of("1; 2").is_err());
    }

    #[test]
    fn a_quantity_survives_as_text() {
        let mut both = Quantity::within(-1.5e-7, -2.0, 3.25).from_source("a table");
        both.standard_uncertainty = Some(0.1);
        for q in [both, Quantity::exact(1e12), Quantity::with_u(0.1 + 0.2, 1e-5)] {
            assert_eq!(NumberText::from_quantity(&q).quantity("x"), Ok(q));
        }
    }
}
