//! What the page asks of the browser: storage, files, failure.

pub mod failure;
pub mod files;
pub mod storage;
