//! What happened at the bench: isolate, losses, make-up.

use super::Quantity;
use serde::{Deserialize, Serialize};

/// What was weighed after evaporating the extract.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "schema", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields)]
pub struct Isolate {
    /// Crude mass as weighed [mg].
    pub crude_mass_mg: Quantity,
    /// Mass fraction of the solvent-free isolate that is target (as its hydrate), 0 to 1.
    pub purity: Quantity,
    /// Moles of water per mole of target in the solid weighed; need not be whole.
    #[serde(default)]
    pub hydrate_waters: Quantity,
    /// Mass fraction of the crude isolate that is solvent still in it, 0 to 1.
    #[serde(default)]
    pub residual_solvent_fraction: Quantity,
}

/// Liquid that did not reach the end.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "schema", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields)]
pub struct Loss {
    /// What happened, e.g. "sample for assay".
    pub what: String,
    /// Where in the flow.
    pub at: LossPlace,
    /// How much.
    pub amount: LossAmount,
}

/// Where in the flow a loss happened.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Serialize, Deserialize)]
#[cfg_attr(feature = "schema", derive(schemars::JsonSchema))]
#[serde(rename_all = "snake_case")]
pub enum LossPlace {
    /// Before water was taken off.
    Feed,
    /// After concentrating, before the first portion.
    Liquor,
    /// After the last portion.
    Raffinate,
}

/// How much was lost.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "schema", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields, rename_all = "snake_case")]
pub enum LossAmount {
    /// As a fraction of what was there, 0 to 1.
    Fraction(Quantity),
    /// As a volume [mL].
    VolumeMl(Quantity),
}

/// Bringing the raffinate to its final volume.
#[derive(Clone, Debug, Default, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "schema", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields)]
pub struct MakeUp {
    /// Volume to which the liquid was in fact brought [mL], once done.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub made_up_to_ml: Option<Quantity>,
    /// Temperature at which carbon dioxide is given back [°C].
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub carbonate_at_c: Option<Quantity>,
}
