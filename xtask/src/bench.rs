//! How long a plan takes, natively, with the settings of the page replaced by those for speed.

use crate::Result;
use crate::tools::{self, run};

/// Builds and runs the benchmark of `core`.
pub fn print() -> Result {
    run(tools::cargo()
        .args(["bench", "--quiet", "--locked", "--package", "unstir-core", "--bench", "plan"])
        .env("CARGO_PROFILE_BENCH_OPT_LEVEL", "3"))
}
