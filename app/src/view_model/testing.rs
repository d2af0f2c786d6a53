//! The demo studies with their plans, for tests.

use crate::state::demos::DEMOS;
use crate::state::work::Good;
use unstir_core::plan::{Curves, curves, plan};
use unstir_core::study::parse;

pub fn good(demo: usize) -> Good {
    let study = parse(DEMOS[demo].text).unwrap();
    let outcome = plan(&study).unwrap();
    Good { study, plan: outcome.value, notices: outcome.notices }
}

pub fn curves_of(good: &Good) -> Curves {
    curves(&good.study, 0.0, 14.0, 29).unwrap()
}
