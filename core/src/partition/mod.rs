//! How an ingredient divides between liquor and solvent.

pub mod distribution;
pub mod estimate;
