//! What the numbers mean: balance, solvents compared, readings of a disputed constant, uncertainty,
//! room air.

pub mod air;
pub mod balance;
pub mod explain;
pub mod rank;
pub mod readings;
pub mod spill;
pub mod student;
pub mod uncertainty;
