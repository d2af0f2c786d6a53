//! Tables of sucrose solutions at 20 °C, one row every 5 °Brix.

use super::sources::Source;
use super::table::{Loaded, Row, load};
use std::sync::OnceLock;

/// A sucrose solution at 20 °C as tabulated.
#[derive(Clone, Debug, PartialEq)]
pub struct SucroseRow {
    /// Grams of sucrose in 100 g of solution [°Brix].
    pub brix: f64,
    /// Viscosity at 20 °C [mPa s].
    pub viscosity_20c_mpa_s: f64,
    /// Its source.
    pub viscosity_source: Source,
    /// Refractive index at 20 °C, 589 nm, against air [-].
    pub refractive_index_20c: f64,
    /// Its source.
    pub refractive_index_source: Source,
}

/// All rows, rising in °Brix.
pub fn sucrose_rows() -> &'static [SucroseRow] {
    &table().items
}

fn table() -> &'static Loaded<SucroseRow> {
    static TABLE: OnceLock<Loaded<SucroseRow>> = OnceLock::new();
    TABLE.get_or_init(|| load(include_str!("../../data/sucrose.csv"), parse))
}

fn parse(row: &Row) -> Result<SucroseRow, String> {
    Ok(SucroseRow {
        brix: row.number("brix")?,
        viscosity_20c_mpa_s: row.number("viscosity_20c_mpa_s")?,
        viscosity_source: row.source("source_viscosity")?,
        refractive_index_20c: row.number("refractive_index_20c")?,
        refractive_index_source: row.source("source_refractive_index")?,
    })
}

#[cfg(test)]
mod tests {
    use super::*;

    /// The interpolation counts on a row every 5 °Brix from 0, and on columns that only rise.
    #[test]
    fn every_row_parses_in_equal_steps() {
        assert_eq!(table().defects, Vec::<String>::new());
        let rows = sucrose_rows();
        assert_eq!(rows.len(), 16);
        for (i, row) in rows.iter().enumerate() {
            assert_eq!(row.brix, 5.0 * i as f64);
        }
        for pair in rows.windows(2) {
            assert!(pair[0].viscosity_20c_mpa_s < pair[1].viscosity_20c_mpa_s);
            assert!(pair[0].refractive_index_20c < pair[1].refractive_index_20c);
        }
    }
}
