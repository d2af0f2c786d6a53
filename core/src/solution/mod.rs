//! The aqueous phase: protonation states, activities, charge balance, water itself, and what
//! changing the pH takes.

pub mod activity;
pub mod carbonate;
pub mod charge_balance;
pub mod composition;
pub mod concentrated;
pub mod dose;
pub mod ionisation;
mod solver;
pub mod sugar;
pub mod water;
