//! The aqueous phase: protonation states, water itself, and what changing the pH takes.

pub mod dose;
pub mod ionisation;
pub mod water;
