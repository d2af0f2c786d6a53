//! Text of a study in, its plan as JSON out: what a batch, or a check from outside, uses.

use crate::judgement::rank::{SolventRank, rank};
use crate::outcome::Notice;
use crate::plan::{self, Plan};
use crate::study::{self, Problem};
use serde::Serialize;

/// A plan as written to JSON: the plan's own fields, `headline` first, then the ranking of solvents and the notices.
#[derive(Serialize)]
struct Solved {
    #[serde(flatten)]
    plan: Plan,
    /// The solvents of the library for this liquid.
    ranking: Vec<SolventRank>,
    notices: Vec<Notice>,
}

/// The plan of the study in `text`, as JSON that opens with `headline`.
///
/// # Errors
/// Every problem of the text or the study, each with the field it belongs to.
pub fn solve_text(text: &str) -> Result<String, Vec<Problem>> {
    let study = study::parse(text).map_err(|p| vec![p])?;
    let outcome = plan::plan(&study)?;
    let ranking = rank(&study).map_err(|p| vec![p])?;
    serde_json::to_string_pretty(&Solved { plan: outcome.value, ranking, notices: outcome.notices })
        .map_err(|e| vec![Problem::new("plan", format!("the plan cannot be written: {e}"))])
}
