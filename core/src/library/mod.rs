//! The library: published values built into the tool, each with its source.
//!
//! Typed views over the comma-separated files of `core/data`. Everything here is plain data;
//! judging and computing happen elsewhere. Values are held in one unit each, named in the field.
//!
//! | to find | look in | file |
//! | --- | --- | --- |
//! | solvents: density, solubility, vapour, fire, peroxides, hazard codes | [`solvents`] | `solvents.csv` |
//! | exposure limits of the solvents | [`limits`] | `exposure_limits.csv` |
//! | cautions for the bench; what a hazard code means | [`cautions`] | `cautions.csv`, `hazard_statements.csv` |
//! | limits of what stays of a solvent, as listed | [`residual`] | `residual_limits.csv` |
//! | published partition coefficients | [`partition`] | `partition.csv` |
//! | solutes, their sites, and printed readings of their constants | [`solutes`] | `solutes.csv`, `pka_readings.csv` |
//! | coefficients and descriptors of the free-energy estimate of K | [`free_energy`] | `free_energy_systems.csv`, `descriptors.csv` |
//! | Henry constants of solutes, estimates left out | [`henry`] | `henry.csv` |
//! | Debye–Hückel constant against temperature | [`activity`] | `activity_constants.csv` |
//! | sucrose solutions at 20 °C | [`sucrose`] | `sucrose.csv` |
//! | what a source is and how far it was checked | [`sources`] | `sources.csv` |
//!
//! **Invariant:** a number is never here without a [`sources::Source`] that says whether it was
//! read, quoted, calculated or is from memory.
//! A row that cannot be read is left out; the unit tests hold that there is none.

pub mod activity;
pub mod cautions;
pub mod free_energy;
pub mod henry;
pub mod limits;
pub mod partition;
pub mod residual;
pub mod solutes;
pub mod solvents;
pub mod sources;
pub mod sucrose;
mod table;
