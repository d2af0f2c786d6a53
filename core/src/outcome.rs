//! A result that is still useful, with what the reader should know about it.

use serde::Serialize;

/// Something the reader should know about a result: not an error, the number stands.
#[derive(Clone, Debug, PartialEq, Eq, Serialize)]
pub struct Notice {
    /// Which part of the study it belongs to, as a path of the file, e.g. `concentrate`.
    pub at: String,
    /// One or two plain sentences.
    pub message: String,
}

impl Notice {
    /// A notice about the part of the study named by `at`.
    pub fn new(at: impl Into<String>, message: impl Into<String>) -> Self {
        Self { at: at.into(), message: message.into() }
    }
}

/// A value together with its notices.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct Outcome<T> {
    /// The result.
    pub value: T,
    /// What the reader should know about it.
    pub notices: Vec<Notice>,
}
