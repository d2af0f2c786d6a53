//! One file per step of the flow.

pub mod acidity;
pub mod concentrate;
pub mod counter_current;
pub mod isolate;
pub mod make_up;
pub mod portions;
pub mod strip;
pub mod vapour;
