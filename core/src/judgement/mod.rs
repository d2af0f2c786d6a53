//! What the numbers mean: balance, solvents compared, readings of a disputed constant, uncertainty.

pub mod balance;
pub mod explain;
pub mod line;
pub mod rank;
pub mod readings;
pub mod uncertainty;
