//! A table of results.

use super::decimal::{Cell, aligned};
use super::live::{live, live_view};
use leptos::prelude::*;

/// A table in a box of its own that scrolls sideways when it is too wide.
///
/// The first cell of each row names the row. A column whose filled cells are mostly numbers is set
/// flush right, aligned on the decimal mark.
#[component]
pub fn DataTable(
    /// What the table shows.
    #[prop(into)]
    caption: Signal<String>,
    /// The words above the columns, with units.
    #[prop(into)]
    head: Signal<Vec<String>>,
    /// The cells, row by row.
    rows: Signal<Vec<Vec<String>>>,
) -> impl IntoView {
    let set = Memo::new(move |_| rows.with(|rows| columns_set(rows)));
    view! {
        <div class="table-wrap" role="region" tabindex="0" aria-label=live(move || caption.get())>
            <table>
                <caption>{live(move || caption.get())}</caption>
                <thead>
                    <tr>
                        {live_view(move || {
                            head.get()
                                .into_iter()
                                .enumerate()
                                .map(|(i, words)| {
                                    let number = set.with(|s| s.numeric.get(i).copied().unwrap_or(false));
                                    let long = set.with(|s| s.long.get(i).copied().unwrap_or(false));
                                    view! { <th scope="col" class:number=number class:long=long>{words}</th> }
                                })
                                .collect_view()
                        })}
                    </tr>
                </thead>
                <tbody>
                    {live_view(move || {
                        set.with(|s| {
                            s.rows
                                .iter()
                                .map(|row| view! { <tr>{row_cells(row, &s.numeric, &s.long)}</tr> })
                                .collect_view()
                        })
                    })}
                </tbody>
            </table>
        </div>
    }
}

/// The cells of one row.
fn row_cells(row: &[Cell], numeric: &[bool], long: &[bool]) -> impl IntoView + use<> {
    row.iter()
        .zip(numeric)
        .enumerate()
        .map(|(i, (cell, &number))| {
            let Cell { text, blanks, after, .. } = cell.clone();
            let long = long[i];
            let blanks = (number && !blanks.is_empty())
                .then(|| view! { <span class="blanks" aria-hidden="true">{blanks}</span> });
            if i == 0 {
                view! { <th scope="row" class:number=number class:long=long>{text}{after}{blanks}</th> }.into_any()
            } else {
                view! { <td class:number=number class:long=long>{text}{after}{blanks}</td> }.into_any()
            }
        })
        .collect_view()
}

/// A table ready to be set.
#[derive(Clone, Debug, Default, PartialEq)]
struct SetTable {
    rows: Vec<Vec<Cell>>,
    /// Which columns are numbers.
    numeric: Vec<bool>,
    /// Which columns hold sentences.
    long: Vec<bool>,
}

/// From this many characters on, a cell is a sentence that needs room.
const SENTENCE: usize = 28;

/// Aligns each column; rows that are too short are filled with empty cells.
fn columns_set(rows: &[Vec<String>]) -> SetTable {
    let width = rows.iter().map(Vec::len).max().unwrap_or(0);
    let mut set = SetTable { rows: vec![Vec::with_capacity(width); rows.len()], ..SetTable::default() };
    for column in 0..width {
        let cells: Vec<&str> = rows.iter().map(|r| r.get(column).map_or("", String::as_str)).collect();
        let cells = aligned(&cells);
        let filled = cells.iter().filter(|c| !c.text.is_empty()).count();
        let numbers = cells.iter().filter(|c| c.numeric).count();
        let numeric = numbers > 0 && numbers * 2 >= filled;
        set.numeric.push(numeric);
        set.long.push(!numeric && cells.iter().any(|c| c.text.chars().count() >= SENTENCE));
        for (row, cell) in set.rows.iter_mut().zip(cells) {
            row.push(cell);
        }
    }
    set
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn columns_of_numbers_are_found_and_short_rows_filled() {
        let rows: Vec<Vec<String>> = [&["a", "1.5", "x"][..], &["b", "–"], &["c", "12"]]
            .iter()
            .map(|r| r.iter().map(|c| (*c).to_owned()).collect())
            .collect();
        let set = columns_set(&rows);
        assert_eq!(set.numeric, [false, true, false]);
        assert!(set.rows.iter().all(|r| r.len() == 3));
        assert_eq!(set.rows[2][1].blanks, "\u{2008}\u{2007}");
        assert_eq!(columns_set(&[]), SetTable::default());
    }
}
