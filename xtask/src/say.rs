//! Progress and sizes in plain words.

use std::path::Path;
use std::time::{Duration, Instant};

/// Says that a step begins; progress goes to standard error so that output can be piped.
pub fn step(what: &str) {
    eprintln!("» {what}");
}

/// Says what was done.
pub fn done(what: &str) {
    eprintln!("  {what}");
}

/// Time since `start`, as people say it.
pub fn since(start: Instant) -> String {
    took(start.elapsed())
}

/// A duration, as people say it.
pub fn took(time: Duration) -> String {
    let s = time.as_secs();
    if s < 60 { format!("{s} s") } else { format!("{} min {:02} s", s / 60, s % 60) }
}

/// Size of a file [kB].
pub fn kilobytes(file: &Path) -> f64 {
    std::fs::metadata(file).map_or(0.0, |m| m.len() as f64 / 1000.0)
}
