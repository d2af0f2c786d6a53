//! The room in which a spill would evaporate.

use super::Quantity;
use serde::{Deserialize, Serialize};

/// The room and what could be spilled in it; what is not stated is assumed and said.
#[derive(Clone, Debug, Default, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "schema", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields)]
pub struct Room {
    /// Volume of the room [m³].
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub volume_m3: Option<Quantity>,
    /// Air changes [1/h].
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub changes_per_h: Option<Quantity>,
    /// Solvent spilled or left open [mL].
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub spill_ml: Option<Quantity>,
}
