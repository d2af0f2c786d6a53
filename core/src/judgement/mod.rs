//! What the numbers mean: balance, readings of a disputed constant, uncertainty.

pub mod balance;
pub mod explain;
pub mod readings;
pub mod uncertainty;
