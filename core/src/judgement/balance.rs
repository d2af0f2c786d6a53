//! Every ingredient in every stream, and what does not add up.

use serde::Serialize;

/// Streams by ingredient.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct Balance {
    /// Names of the streams, in flow order; the first `inputs` of them bring matter in.
    pub streams: Vec<String>,
    /// How many of the streams are inputs (feed, entering solvent).
    pub inputs: usize,
    /// One row per ingredient, in the order of the feed.
    pub rows: Vec<BalanceRow>,
    /// Largest relative residual of any row [-].
    pub worst_residual: f64,
}

/// One ingredient in every stream.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct BalanceRow {
    /// Name.
    pub ingredient: String,
    /// Amount in each stream [mg], in the order of [`Balance::streams`].
    pub mg: Vec<f64>,
    /// (in − out) over in [-]; 0 for an ingredient that is not there at all.
    pub residual: f64,
}

impl Balance {
    /// Closes the balance of `rows`, each a name and its amounts [mg] by stream, where the first
    /// `inputs` streams bring matter in and the others take it out.
    ///
    /// `residual = (Σ in − Σ out) / Σ in`.
    pub fn close(streams: Vec<String>, inputs: usize, rows: Vec<(String, Vec<f64>)>) -> Self {
        let rows: Vec<BalanceRow> = rows
            .into_iter()
            .map(|(ingredient, mg)| {
                let (came, went) = mg.split_at(inputs.min(mg.len()));
                let came: f64 = came.iter().sum();
                let went: f64 = went.iter().sum();
                let residual = if came > 0.0 { (came - went) / came } else { -went };
                BalanceRow { ingredient, mg, residual }
            })
            .collect();
        let worst_residual = rows.iter().map(|r| r.residual.abs()).fold(0.0, f64::max);
        Self { streams, inputs, rows, worst_residual }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn what_is_missing_is_found() {
        let b = Balance::close(
            vec!["feed".into(), "extract".into(), "raffinate".into()],
            1,
            vec![("a".into(), vec![100.0, 24.0, 75.0])],
        );
        assert!((b.worst_residual - 0.01).abs() < 1e-15);
    }
}
