//! What the user typed, and what follows from it.

pub mod demos;
pub mod draft;
mod edit;
pub mod file_text;
mod from_study;
pub mod number_text;
pub mod shelf;
mod to_study;
pub mod work;

pub use draft::Draft;
pub use number_text::NumberText;
