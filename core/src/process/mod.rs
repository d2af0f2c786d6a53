//! One file per step of the flow, and what the steps share.

pub mod acidity;
pub mod carbonate;
pub mod concentrate;
pub mod counter_current;
pub mod degas;
pub mod drops;
pub mod extract_workup;
pub mod henry;
pub mod isolate;
pub mod make_up;
pub mod portions;
pub mod settle;
pub mod strip;
pub mod strip_fit;
pub mod strip_plan;
pub mod vapour;
pub mod volatile;
