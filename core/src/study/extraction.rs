//! The solvent and the way it is used.

use super::Quantity;
use super::feed::{is_room, room};
use serde::{Deserialize, Serialize};

/// The solvent.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "schema", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields)]
pub struct SolventChoice {
    /// Identifier: one of the library's, or the user's own.
    pub id: String,
    /// Name shown.
    pub name: String,
    /// Density at 20 °C [g/mL].
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub density_g_per_ml: Option<Quantity>,
}

/// Partition of one ingredient into one solvent.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "schema", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields)]
pub struct PartitionEntry {
    /// Name of the ingredient.
    pub ingredient: String,
    /// Identifier of the solvent.
    pub solvent: String,
    /// Partition coefficient K of the neutral form, organic/aqueous concentration [-].
    pub k_neutral: Quantity,
    /// K of the ionised forms as ion pairs [-]; 0 if not stated.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub k_ion_pair: Option<Quantity>,
    /// Enthalpy of transfer water to solvent [kJ/mol], for other temperatures.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub transfer_enthalpy_kj_per_mol: Option<Quantity>,
    /// Temperature of K [°C]; 25 if not stated.
    #[serde(default = "room", skip_serializing_if = "is_room")]
    pub k_temperature_c: f64,
}

/// How the liquor meets the solvent.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "schema", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields)]
pub struct Extraction {
    /// Cross-current, counter-current or continuous.
    pub scheme: Scheme,
    /// Stage efficiency E: fraction of the way to equilibrium, above 0 to 1.
    pub stage_efficiency: Quantity,
    /// Solvent left with the liquor after each draining [mL].
    #[serde(default)]
    pub organic_left_behind_ml: Quantity,
    /// Liquor carried out with each extract [mL].
    #[serde(default)]
    pub aqueous_carried_out_ml: Quantity,
    /// What the solvent holds when it arrives (recycled or pre-loaded solvent).
    #[serde(default, skip_serializing_if = "Vec::is_empty")]
    pub entering_solvent: Vec<EnteringSolvent>,
    /// Largest vessel [mL]; liquor and solvent together must fit.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub vessel_ml: Option<Quantity>,
}

/// The order in which liquor and solvent meet.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "schema", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields, rename_all = "snake_case")]
pub enum Scheme {
    /// Fresh solvent in each of a list of portions.
    CrossCurrent {
        /// The portions in order.
        portions: Vec<Portion>,
    },
    /// Liquor and solvent pass through the stages in opposite directions.
    CounterCurrent {
        /// Number of stages.
        stages: u32,
        /// Solvent passed while the whole liquor passes [mL].
        solvent_ml: Quantity,
    },
    /// Solvent passed steadily through the standing liquor.
    Continuous {
        /// Solvent passed in all [mL].
        solvent_ml: Quantity,
    },
}

/// One portion of solvent.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "schema", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields)]
pub struct Portion {
    /// Volume [mL].
    pub volume_ml: Quantity,
    /// Stage efficiency of this portion, where it differs from the rest.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub stage_efficiency: Option<Quantity>,
}

/// An ingredient already in the entering solvent.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "schema", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields)]
pub struct EnteringSolvent {
    /// Name of the ingredient.
    pub ingredient: String,
    /// Concentration in the entering solvent [mg/mL].
    pub mg_per_ml: Quantity,
}
