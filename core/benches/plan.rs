//! Time of one whole plan with its uncertainty, for the demo studies.
//!
//! Run with `cargo xtask bench`. Times, not tests: nothing here fails.

use std::hint::black_box;
use std::time::Instant;
use unstir_core::plan::plan;
use unstir_core::study::parse;

const RUNS: u32 = 500;

fn main() {
    for (name, text) in [
        ("neutral-alkaloid", include_str!("../../tests/data/studies/neutral-alkaloid.json")),
        ("charged-base", include_str!("../../tests/data/studies/charged-base.json")),
        ("weak-acid-preservative", include_str!("../../tests/data/studies/weak-acid-preservative.json")),
    ] {
        let Ok(study) = parse(text) else {
            println!("{name}: cannot be read");
            continue;
        };
        // Once unmeasured, so that caches are warm.
        let _ = black_box(plan(&study));
        let start = Instant::now();
        for _ in 0..RUNS {
            let _ = black_box(plan(black_box(&study)));
        }
        let each = start.elapsed() / RUNS;
        println!("{name}: {:.0} µs a plan with its uncertainty", each.as_secs_f64() * 1e6);
    }
}
