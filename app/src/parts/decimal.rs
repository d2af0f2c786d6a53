//! Numbers in a table column, aligned on the decimal mark.

/// A cell as it is set: the number, blanks as wide as the digits it lacks, and what follows it.
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

/// The cells of a column, ready to be set flush right.
///
/// Numbers with a power of ten or a range are set as they are: their marks do not line up.
pub(super) fn aligned(column: &[&str]) -> Vec<Cell> {
    let parted: Vec<Option<(&str, &str)>> = column.iter().map(|c| split_number(c)).collect();
    let decimals = parted.iter().flatten().filter_map(|p| fraction_digits(p.0, p.1)).max().unwrap_or(0);
    column
        .iter()
        .zip(parted)
        .map(|(whole, parted)| match parted {
            None => Cell { text: (*whole).to_owned(), ..Cell::default() },
            Some((number, after)) => {
                let blanks = fraction_digits(number, after).map_or_else(String::new, |own| {
                    let mark = (own == 0 && decimals > 0).then_some(PUNCTUATION_SPACE);
                    mark.into_iter().chain(std::iter::repeat_n(FIGURE_SPACE, decimals - own)).collect()
                });
                Cell { text: number.to_owned(), blanks, after: after.to_owned(), numeric: true }
            }
        })
        .collect()
}

/// The number that `cell` begins with and the rest; `None` if it begins with none.
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
    Some((&cell[..end], &cell[end..]))
}

/// Digits after the decimal mark; `None` where more of the number follows.
fn fraction_digits(number: &str, after: &str) -> Option<usize> {
    let follows = after.trim_start();
    let goes_on = follows.starts_with(['–', '-', '×', '·', 'e', 'E', '/', '±', '(', '^'])
        || follows.starts_with("to ")
        || after.starts_with(|c: char| c.is_alphabetic());
    (!goes_on).then(|| number.split_once('.').map_or(0, |p| p.1.len()))
}

#[cfg(test)]
mod tests {
    use super::*;

    fn check(column: &[&str], expected: &[&str]) {
        let set: Vec<String> = aligned(column).iter().map(|c| format!("{}{}{}", c.text, c.blanks, c.after)).collect();
        let expected: Vec<String> =
            expected.iter().map(|e| e.replace('_', "\u{2007}").replace(',', "\u{2008}")).collect();
        assert_eq!(set, expected);
    }

    #[test]
    fn marks_line_up() {
        check(&["1.25", "10.5", "3"], &["1.25", "10.5_", "3,__"]);
        check(&["12 %", "3.5 %"], &["12,_ %", "3.5 %"]);
        check(&["−1.5", "< 0.01", "–"], &["−1.5_", "< 0.01", "–"]);
    }

    #[test]
    fn what_cannot_line_up_stays() {
        check(&["1.2×10⁻³", "5"], &["1.2×10⁻³", "5"]);
        check(&["19–29 %", "24.5 %"], &["19–29 %", "24.5 %"]);
        check(&["water", ""], &["water", ""]);
        assert!(aligned(&["2-butanone"])[0].numeric);
    }
}
