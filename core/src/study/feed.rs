//! The liquid as received, its ingredients, and taking water off.

use super::Quantity;
use serde::{Deserialize, Serialize};

/// The liquid as received.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "schema", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields)]
pub struct Feed {
    /// Volume [mL].
    pub volume_ml: Quantity,
    /// pH of the liquid itself, as measured; worked out from the composition if not stated.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub ph: Option<Quantity>,
    /// Temperature at which the extraction is done [°C].
    pub temperature_c: Quantity,
    /// Soluble solids [°Brix = g sucrose-equivalent per 100 g solution].
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub soluble_solids_brix: Option<Quantity>,
    /// Name of the ingredient to remove; must be one of `ingredients`.
    pub target: String,
    /// Target and company.
    pub ingredients: Vec<Ingredient>,
    /// Ions whose charge no pH changes, e.g. sodium, as far as they are known.
    #[serde(default, skip_serializing_if = "Vec::is_empty")]
    pub strong_ions: Vec<StrongIon>,
    /// Dissolved carbon dioxide [g/L].
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub co2_g_per_l: Option<Quantity>,
}

/// An ion whose charge no pH changes.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "schema", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields)]
pub struct StrongIon {
    /// Name.
    pub name: String,
    /// Charge number, e.g. 1 for sodium, −1 for chloride.
    pub charge: i32,
    /// Concentration in the feed [mmol/L].
    pub mmol_per_l: Quantity,
}

/// One ingredient of the feed.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "schema", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields)]
pub struct Ingredient {
    /// Name, unique in the study.
    pub name: String,
    /// Molar mass of the anhydrous, neutral substance [g/mol].
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub molar_mass_g_per_mol: Option<Quantity>,
    /// How much the feed holds.
    pub amount: Amount,
    /// Macroscopic pKa values in rising order, each with its kind. Empty: not ionised.
    #[serde(default, skip_serializing_if = "Vec::is_empty")]
    pub sites: Vec<Site>,
    /// One more site whose constant is disputed.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub disputed: Option<Disputed>,
}

/// How much of an ingredient the feed holds.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "schema", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields, rename_all = "snake_case")]
pub enum Amount {
    /// In the whole feed [mg].
    MassMg(Quantity),
    /// Concentration [mg/L].
    MgPerL(Quantity),
    /// As a label states it.
    PerServing {
        /// Mass in one serving [mg].
        mg: Quantity,
        /// Volume of one serving [mL].
        serving_ml: Quantity,
    },
}

impl Amount {
    /// Amount in a feed of `feed_ml` [mL], in mg.
    pub fn mg_in(&self, feed_ml: f64) -> f64 {
        match self {
            Self::MassMg(q) => q.value,
            Self::MgPerL(q) => q.value * feed_ml / 1000.0,
            Self::PerServing { mg, serving_ml } => mg.value * feed_ml / serving_ml.value,
        }
    }
}

/// A site that gains or loses a proton, by its macroscopic constant.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "schema", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields)]
pub struct Site {
    /// Acid, or conjugate acid of a base.
    pub kind: SiteKind,
    /// Macroscopic pKa of the acid or conjugate acid.
    pub pka: Quantity,
    /// Enthalpy of proton loss [kJ/mol], for other temperatures.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub enthalpy_kj_per_mol: Option<Quantity>,
    /// Temperature of the pKa [°C]; 25 if not stated.
    #[serde(default = "room", skip_serializing_if = "is_room")]
    pub pka_temperature_c: f64,
}

pub(super) fn room() -> f64 {
    25.0
}
pub(super) fn is_room(t: &f64) -> bool {
    *t == 25.0
}

/// What a site is when it has lost its proton.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Serialize, Deserialize)]
#[cfg_attr(feature = "schema", derive(schemars::JsonSchema))]
#[serde(rename_all = "snake_case")]
pub enum SiteKind {
    /// Neutral with its proton, −1 without.
    Acid,
    /// +1 with its proton, neutral without.
    ConjugateAcidOfBase,
}

/// A site about whose constant published values disagree.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "schema", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields)]
pub struct Disputed {
    /// The published values and the way each may be meant.
    pub readings: Vec<Reading>,
    /// Which reading the plan uses, counted from 0.
    #[serde(default)]
    pub in_use: usize,
}

/// One published value of a disputed constant.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "schema", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields)]
pub struct Reading {
    /// The number as printed.
    pub value: Quantity,
    /// The way it may be meant.
    pub meant_as: MeantAs,
}

/// The way a published acidity constant may be meant.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Serialize, Deserialize)]
#[cfg_attr(feature = "schema", derive(schemars::JsonSchema))]
#[serde(rename_all = "snake_case")]
pub enum MeantAs {
    /// pKa of the neutral molecule as an acid.
    Acid,
    /// pKa of the protonated molecule, the conjugate acid of a base.
    ConjugateAcidOfBase,
    /// pKb of the base, printed as if it were a pKa.
    PkbWrittenAsPka,
    /// The source does not say: all three are tried.
    Unstated,
}

/// Taking water off before extraction.
#[derive(Clone, Debug, Default, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "schema", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields)]
pub struct Concentrate {
    /// How far.
    #[serde(default)]
    pub to: ConcentrateTo,
    /// pH measured after concentrating; the feed's pH is used if not stated.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub ph_after: Option<Quantity>,
}

/// How far water is taken off.
#[derive(Clone, Debug, Default, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "schema", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields, rename_all = "snake_case")]
pub enum ConcentrateTo {
    /// Not at all: the feed is extracted as it is.
    #[default]
    Unchanged,
    /// To a volume [mL].
    VolumeMl(Quantity),
    /// By a mass of water [g].
    WaterRemovedG(Quantity),
    /// To a soluble-solids reading [°Brix].
    Brix(Quantity),
}
