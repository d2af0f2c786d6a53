//! A small, strict reader for the comma-separated text built into this crate.
//!
//! RFC 4180: a header line, commas, fields in double quotes when they hold a comma, a quote
//! (doubled) or a line break. Spaces are kept. The data are ours, so a defect is a bug: it is
//! collected in words for the unit tests to reject, and the row is left out when the tool runs.

use super::sources::{Source, resolve};

/// Records of one file, and what could not be read.
pub(crate) struct Loaded<T> {
    /// Every record that parsed.
    pub(crate) items: Vec<T>,
    /// One sentence for each row left out; empty for sound data.
    /// Only the unit tests look at it.
    #[cfg_attr(not(test), allow(dead_code))]
    pub(crate) defects: Vec<String>,
}

/// One data row, read by column name.
pub(crate) struct Row<'a> {
    header: &'a [String],
    cells: &'a [String],
}

impl Row<'_> {
    /// The cell under `column`, blank allowed. An unknown column is a defect.
    pub(crate) fn text(&self, column: &str) -> Result<&str, String> {
        let at = self.header.iter().position(|name| name == column);
        at.and_then(|i| self.cells.get(i)).map(String::as_str).ok_or_else(|| format!("no column {column}"))
    }

    /// The cell under `column`, which must not be blank.
    pub(crate) fn required(&self, column: &str) -> Result<String, String> {
        match self.text(column)? {
            "" => Err(format!("{column} is blank")),
            text => Ok(text.to_owned()),
        }
    }

    /// The cell under `column`, blank allowed, as owned text.
    pub(crate) fn owned(&self, column: &str) -> Result<String, String> {
        self.text(column).map(str::to_owned)
    }

    /// A finite number that must be there.
    pub(crate) fn number(&self, column: &str) -> Result<f64, String> {
        self.optional_number(column)?.ok_or_else(|| format!("{column} is blank"))
    }

    /// A finite number, or nothing when the cell is blank.
    pub(crate) fn optional_number(&self, column: &str) -> Result<Option<f64>, String> {
        match self.text(column)? {
            "" => Ok(None),
            text => match text.parse::<f64>() {
                Ok(value) if value.is_finite() => Ok(Some(value)),
                _ => Err(format!("{column} is not a number: {text}")),
            },
        }
    }

    /// A whole number above zero.
    pub(crate) fn ordinal(&self, column: &str) -> Result<u32, String> {
        let text = self.text(column)?;
        text.parse().ok().filter(|n| *n > 0).ok_or_else(|| format!("{column} is not a whole number above 0: {text}"))
    }

    /// Parts between semicolons; none for a blank cell.
    pub(crate) fn list(&self, column: &str) -> Result<Vec<String>, String> {
        Ok(self.text(column)?.split(';').filter(|part| !part.is_empty()).map(str::to_owned).collect())
    }

    /// `true` for `yes`, `false` for `no` or blank.
    pub(crate) fn yes(&self, column: &str) -> Result<bool, String> {
        match self.text(column)? {
            "yes" => Ok(true),
            "no" | "" => Ok(false),
            text => Err(format!("{column} is neither yes nor no: {text}")),
        }
    }

    /// The source named by its key, or keys, under `column`.
    pub(crate) fn source(&self, column: &str) -> Result<Source, String> {
        resolve(&self.required(column)?)
    }
}

/// Reads `text` and turns each row into a record with `parse`.
pub(crate) fn load<T>(text: &str, parse: impl Fn(&Row) -> Result<T, String>) -> Loaded<T> {
    let (records, mut defects) = split(text);
    let mut records = records.into_iter();
    let (_, header) = records.next().unwrap_or_default();
    for (i, name) in header.iter().enumerate() {
        if name.is_empty() || header.iter().take(i).any(|earlier| earlier == name) {
            defects.push(format!("header: blank or repeated column {name:?}"));
        }
    }
    let mut items = Vec::new();
    for (line, cells) in records {
        if cells.len() != header.len() {
            defects.push(format!("line {line}: {} fields, not {}", cells.len(), header.len()));
            continue;
        }
        match parse(&Row { header: &header, cells: &cells }) {
            Ok(item) => items.push(item),
            Err(reason) => defects.push(format!("line {line}: {reason}")),
        }
    }
    Loaded { items, defects }
}

/// A record and the line it starts on, counted from 1.
type Record = (usize, Vec<String>);

/// Records of `text`, with a defect for each quote out of place. A record that holds such a
/// quote is left out.
fn split(text: &str) -> (Vec<Record>, Vec<String>) {
    let mut records = Vec::new();
    let mut defects = Vec::new();
    let mut fields: Vec<String> = Vec::new();
    let mut field = String::new();
    let (mut line, mut start) = (1, 1);
    let (mut in_quotes, mut was_quoted, mut sound) = (false, false, true);
    let mut chars = text.chars().peekable();
    // One turn more than there are characters: the end of the text ends the last record.
    loop {
        let c = chars.next();
        match c {
            Some('"') if in_quotes => {
                if chars.next_if_eq(&'"').is_some() {
                    field.push('"');
                } else {
                    in_quotes = false;
                }
            }
            Some(c) if in_quotes => {
                line += usize::from(c == '\n');
                field.push(c);
            }
            Some('"') if field.is_empty() && !was_quoted => {
                in_quotes = true;
                was_quoted = true;
            }
            Some(',') => {
                fields.push(std::mem::take(&mut field));
                was_quoted = false;
            }
            Some('\r') if chars.peek() == Some(&'\n') => {}
            Some('\n') | None => {
                let blank_line = fields.is_empty() && field.is_empty() && !was_quoted;
                fields.push(std::mem::take(&mut field));
                let record = std::mem::take(&mut fields);
                if !sound || in_quotes {
                    defects.push(format!("line {start}: a quote is out of place"));
                } else if !blank_line {
                    records.push((start, record));
                }
                line += 1;
                start = line;
                was_quoted = false;
                sound = true;
                if c.is_none() {
                    return (records, defects);
                }
            }
            Some(c) => {
                sound &= c != '"' && !was_quoted;
                field.push(c);
            }
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn check(text: &str, expected: &[&[&str]], defects: usize) {
        let (records, found) = split(text);
        let cells: Vec<Vec<String>> = records.into_iter().map(|(_, cells)| cells).collect();
        assert_eq!(cells, expected, "{text:?}");
        assert_eq!(found.len(), defects, "{text:?}: {found:?}");
    }

    #[test]
    fn splits_as_rfc_4180_says() {
        // RFC 4180 section 2, rules 1 to 7.
        check("aaa,bbb\r\nzzz,yyy\r\n", &[&["aaa", "bbb"], &["zzz", "yyy"]], 0);
        check("aaa,bbb\nzzz,yyy", &[&["aaa", "bbb"], &["zzz", "yyy"]], 0);
        check("\"aaa\",\"b\r\nbb\",\"ccc\"", &[&["aaa", "b\r\nbb", "ccc"]], 0);
        check("\"aaa\",\"b\"\"bb\"", &[&["aaa", "b\"bb"]], 0);
        check("a,,\n\n b , c\n", &[&["a", "", ""], &[" b ", " c"]], 0);
        check("\"\",\"a,b\"\n", &[&["", "a,b"]], 0);
    }

    #[test]
    fn leaves_out_rows_with_a_quote_out_of_place() {
        check("a,b\nx\"y,1\nz,2\n", &[&["a", "b"], &["z", "2"]], 1);
        check("\"a\"b,1\nz,2\n", &[&["z", "2"]], 1);
        check("a,b\n\"never closed,1\n", &[&["a", "b"]], 1);
    }

    #[test]
    fn a_bad_row_is_left_out_and_named() {
        let loaded = load("id,value\na,1\nb,high\nc\nd,4\n", |row| row.number("value"));
        assert_eq!(loaded.items, [1.0, 4.0]);
        assert_eq!(loaded.defects, ["line 3: value is not a number: high", "line 4: 1 fields, not 2"]);
        let loaded = load("id,id\na,1\n", |row| row.number("amount"));
        assert_eq!(loaded.defects.len(), 2);
    }

    #[test]
    fn refuses_numbers_that_are_not_finite() {
        let loaded = load("v\nNaN\ninf\n", |row| row.optional_number("v"));
        assert!(loaded.items.is_empty());
    }
}
