//! Computation for selective removal studies: taking one ingredient out of a finished aqueous
//! liquid with an immiscible solvent, and handing the rest back at its own strength.
//!
//! A [`study::Study`] is what the user states. [`plan::plan`] runs it down the chain
//! feed, ionisation, solvent, portions, isolate, make-up, balance and returns a [`plan::Plan`]
//! in the same words. Everything arrives as an argument: there is no clock, storage, web type or
//! random state here, and every transcendental function goes through [`math`], so the same study
//! gives the same digits natively and in the page.
//!
//! | to find | look in |
//! | --- | --- |
//! | the file format | [`study`] |
//! | fractions of protonation states, pKw | [`solution`] |
//! | K and D | [`partition`] |
//! | water removal, portions, isolate, make-up | [`process`] |
//! | balance, readings of a disputed constant, uncertainty | [`judgement`] |
//! | solvents, solutes, limits, cautions | [`library`] |
//! | the whole chain | [`plan`], which drives `chain` |
//! | text in, JSON out | [`solve`] |
#![forbid(unsafe_code)]
#![deny(missing_docs)]

mod chain;
pub mod judgement;
pub mod library;
pub mod math;
pub mod order;
pub mod outcome;
pub mod partition;
pub mod plan;
pub mod process;
pub mod solution;
pub mod solve;
pub mod study;
