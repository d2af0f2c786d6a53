//! Stripping dissolved solvent out of the raffinate.

use super::Quantity;
use serde::{Deserialize, Serialize};

/// How the raffinate is stripped, and what was found on the way.
#[derive(Clone, Debug, Default, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "schema", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields)]
pub struct Strip {
    /// Pressure [kPa]; that of the atmosphere if not stated.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub pressure_kpa: Option<Quantity>,
    /// Assays of the solvent in the raffinate while it is stripped.
    #[serde(default, skip_serializing_if = "Vec::is_empty")]
    pub readings: Vec<StripReading>,
    /// Residue to reach in the made-up liquid [mg/L].
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub limit_mg_per_l: Option<Quantity>,
    /// What is taken at a time of the made-up liquid [mL].
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub serving_ml: Option<Quantity>,
}

/// One assay.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "schema", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields)]
pub struct StripReading {
    /// Time since stripping began [min].
    pub minutes: Quantity,
    /// Solvent in the raffinate [mg/L].
    pub mg_per_l: Quantity,
}
