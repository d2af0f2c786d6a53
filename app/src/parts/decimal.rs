//! Numbers in a table column, aligned on the decimal mark.

/// A cell as it is set: the number, what follows it, and blanks as wide as the digits it lacks.
#[derive(Clone, Debug, Default, PartialEq)]
pub(super) struct Cell {
    /// The number, or the whole text if it is none.
    pub(super) text: String,
    /// Blanks that bring the decimal mark into line.
    pub(super) blanks: String,
    /// Unit or sign after the number.
    pub(super) after: String,
    /// Whether the cell is a number.
    pub(super) numeric: bool,
}

/// As wide as a digit in tabular figures.
const FIGURE_SPACE: char = '\u{2007}';
/// As wide as a full stop.
const PUNCTUATION_SPACE: char = '\u{2008}';

/// Most letters in what follows a number.
const LONGEST_UNIT: usize = 7;
/// Most decimals that are lined up.
const MOST_DECIMALS: usize = 4;

/// The cells of a column, ready to be set flush right.
///
/// Numbers with a power of ten or a range are set as they are: their marks do not line up.
pub(super) fn aligned(column: &[&str]) -> Vec<Cell> {
    let parted: Vec<Option<(&str, &str)>> = column.iter().map(|c| split_number(c)).collect();
    let most = parted.iter().flatten().filter_map(|p| fraction_digits(p.0, p.1)).max().unwrap_or(0);
    // Beside many decimals, short numbers would stand far from their units.
    let decimals = if most <= MOST_DECIMALS { most } else { 0 };
    column
        .iter()
        .zip(parted)
        .map(|(whole, parted)| match parted {
            None => Cell { text: (*whole).to_owned(), ..Cell::default() },
            Some((number, after)) => {
                let blanks = fraction_digits(number, after).map_or_else(String::new, |own| {
                    let mark = (own == 0 && decimals > 0).then_some(PUNCTUATION_SPACE);
                    mark.into_iter().chain(std::iter::repeat_n(FIGURE_SPACE, decimals.saturating_sub(own))).collect()
                });
                Cell { text: number.to_owned(), blanks, after: after.to_owned(), numeric: true }
            }
        })
        .collect()
}

/// The number that `cell` begins with and the rest; `None` if the cell is not a number with a unit.
fn split_number(cell: &str) -> Option<(&str, &str)> {
    let unsigned = cell.trim_start_matches(['-', '−', '+', '<', '>', '≤', '≥', '≈', '±', ' ']);
    if !unsigned.starts_with(|c: char| c.is_ascii_digit()) {
        return None;
    }
    let start = cell.len() - unsigned.len();
    let mut end = start;
    let mut rest = unsigned.chars().peekable();
    while let Some(c) = rest.next() {
        // A blank between digits parts thousands; any other blank ends the number.
        let group_blank = matches!(c, '\u{202f}' | '\u{2009}') && rest.peek().is_some_and(char::is_ascii_digit);
        if c.is_ascii_digit() || c == '.' || group_blank {
            end += c.len_utf8();
        } else {
            break;
        }
    }
    let after = &cell[end..];
    // "2-butanone" is a name and "3.13 acid; 4.77 acid" a remark.
    let name = after.strip_prefix('-').is_some_and(|a| a.starts_with(char::is_alphabetic));
    let remark = after.chars().filter(|c| c.is_alphabetic()).count() > LONGEST_UNIT;
    (!name && !remark).then_some((&cell[..end], after))
}

/// Digits after the decimal mark; `None` where more of the number follows, or another number.
fn fraction_digits(number: &str, after: &str) -> Option<usize> {
    let goes_on = after.trim_start().starts_with(['–', '-', '×', '·', 'e', 'E', '/', '±', '^'])
        || after.starts_with(|c: char| c.is_alphabetic())
        || after.contains(|c: char| c.is_ascii_digit());
    (!goes_on).then(|| number.split_once('.').map_or(0, |p| p.1.len()))
}

#[cfg(test)]
mod tests {
    use super::*;

    fn check(column: &[&str], expected: &[&str]) {
        let set: Vec<String> = aligned(column).iter().map(|c| format!("{}{}{}", c.text, c.after, c.blanks)).collect();
        let expected: Vec<String> =
            expected.iter().map(|e| e.replace('_', "\u{2007}").replace(',', "\u{2008}")).collect();
        assert_eq!(set, expected);
    }

    #[test]
    fn marks_line_up() {
        check(&["1.25", "10.5", "3"], &["1.25", "10.5_", "3,__"]);
        check(&["12 %", "3.5 %"], &["12 %,_", "3.5 %"]);
        check(&["−1.5", "< 0.01", "–"], &["−1.5_", "< 0.01", "–"]);
    }

    #[test]
    fn what_cannot_line_up_stays() {
        check(&["1.2×10⁻³", "5"], &["1.2×10⁻³", "5"]);
        check(&["19–29 %", "24.5 %"], &["19–29 %", "24.5 %"]);
        check(&["98.2 % (96.6–99.7 %)", "82 % (73–90 %)"], &["98.2 % (96.6–99.7 %)", "82 % (73–90 %)"]);
        check(&["0.000071", "82"], &["0.000071", "82"]);
        check(&["water", ""], &["water", ""]);
        for words in ["2-butanone", "3.13 acid; 4.77 acid", "0.60 conjugate acid"] {
            assert!(!aligned(&[words])[0].numeric, "{words}");
        }
        assert!(aligned(&["12 mg per mL"])[0].numeric);
    }
}
