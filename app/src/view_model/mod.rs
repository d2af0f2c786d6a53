//! From a plan to words, rows and data for charts; nothing here computes chemistry.

pub mod answer;
pub mod balance;
pub mod column;
pub mod feed;
pub mod format;
pub mod ionisation;
pub mod isolate;
pub mod make_up;
pub mod portions;
pub mod ranking;
pub mod settle;
pub mod solvent;
pub mod strip;
#[cfg(test)]
mod testing;
