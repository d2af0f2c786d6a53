//! Debye–Hückel constant of water against temperature.

use super::sources::Source;
use super::table::{Loaded, Row, load};
use std::sync::OnceLock;

/// Debye–Hückel constant at one temperature.
#[derive(Clone, Debug, PartialEq)]
pub struct DebyeHueckel {
    /// Temperature [°C].
    pub t_c: f64,
    /// `A` for decimal logarithms, molal [(kg/mol)^½].
    pub a_log10_molal: f64,
    /// Where it comes from.
    pub source: Source,
}

/// Every value held, temperature rising.
pub fn debye_hueckel() -> &'static [DebyeHueckel] {
    &table().items
}

fn table() -> &'static Loaded<DebyeHueckel> {
    static TABLE: OnceLock<Loaded<DebyeHueckel>> = OnceLock::new();
    TABLE.get_or_init(|| load(include_str!("../../data/activity_constants.csv"), parse))
}

fn parse(row: &Row) -> Result<DebyeHueckel, String> {
    Ok(DebyeHueckel {
        t_c: row.number("t_c")?,
        a_log10_molal: row.number("a_log10_molal")?,
        source: row.source("source")?,
    })
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn thirteen_rows_rising() {
        assert_eq!(table().defects, Vec::<String>::new());
        assert_eq!(debye_hueckel().len(), 13);
        for pair in debye_hueckel().windows(2) {
            assert!(pair[1].t_c > pair[0].t_c && pair[1].a_log10_molal > pair[0].a_log10_molal);
        }
    }
}
