//! Charts: one message each, said in the title; the same numbers in a table below.
//!
//! Each chart is a function over a drawing backend: a canvas on the page, SVG text in the tests
//! and for export. Axes and labels are laid out here rather than by the plotting library, because
//! curves are labelled directly and labels must keep clear of each other.

mod figure;
mod ink;
mod labels;
mod log_d;
mod plot;
mod removal;
mod screen;
mod species;

pub use ink::Ink;
pub use log_d::{LogDChart, LogDData, draw_log_d};
pub use plot::Drawing;
pub use removal::{RemovalChart, RemovalData, draw_removal};
pub use species::{SpeciesChart, SpeciesData, draw_species};

#[cfg(test)]
mod tests;
