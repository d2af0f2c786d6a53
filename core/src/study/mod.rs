//! What the user states: plain data, and the file format.
//!
//! A study file is JSON whose first field is `"unstir_study": 1`. Every number is either bare or an
//! object `{value, standard_uncertainty, range, source}` (see [`Quantity`]). Unknown fields are
//! refused by name, so a misspelt field is never silently ignored.

mod bench;
mod check;
mod extraction;
mod feed;
mod quantity;
mod read;
mod room;
mod strip;
mod visit;

pub use crate::library::residual::Purpose;
pub use bench::{Isolate, Loss, LossAmount, LossPlace, MakeUp};
pub use check::{Problem, check, words_of};
pub use extraction::{EnteringSolvent, Extraction, PartitionEntry, Portion, Scheme, SolventChoice};
pub use feed::{
    Amount, Concentrate, ConcentrateTo, Disputed, Feed, Ingredient, MeantAs, Reading, Site, SiteKind, StrongIon,
};
pub use quantity::{Quantity, Range};
#[cfg(feature = "schema")]
pub use read::schema_text;
pub use read::{MAX_FILE_BYTES, parse, to_text};
pub use room::Room;
pub use strip::{Strip, StripReading};
pub use visit::for_each_quantity;

use serde::{Deserialize, Serialize};

/// The version of the file format written by this program.
pub const VERSION: u32 = 1;

/// One selective removal study.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "schema", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields)]
pub struct Study {
    /// Version of the file format; 1.
    pub unstir_study: u32,
    /// What the study is called.
    pub name: String,
    /// Free text: purpose, batch, whether the scenario is invented.
    #[serde(default, skip_serializing_if = "String::is_empty")]
    pub note: String,
    /// What is to be reached.
    pub goal: Goal,
    /// The liquid as received.
    pub feed: Feed,
    /// How much water is taken off before extraction.
    #[serde(default)]
    pub concentrate: Concentrate,
    /// The solvent.
    pub solvent: SolventChoice,
    /// Partition coefficients, one per ingredient and solvent.
    #[serde(default)]
    pub partition: Vec<PartitionEntry>,
    /// Portions or stages.
    pub extraction: Extraction,
    /// What was weighed after evaporating the extract.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub isolate: Option<Isolate>,
    /// The room in which it is done.
    #[serde(default, skip_serializing_if = "no_room")]
    pub room: Room,
    /// Stripping the raffinate.
    #[serde(default, skip_serializing_if = "is_unstated")]
    pub strip: Strip,
    /// Liquid that did not reach the end.
    #[serde(default)]
    pub losses: Vec<Loss>,
    /// Bringing the raffinate to its final volume.
    #[serde(default)]
    pub make_up: MakeUp,
}

/// What is to be reached.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "schema", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields)]
pub struct Goal {
    /// Least fraction of the target to take out, 0 to 1.
    pub removal_fraction: Quantity,
    /// What the liquid is for: which lists of residual limits are looked at.
    #[serde(default)]
    pub purpose: Purpose,
}

fn no_room(room: &Room) -> bool {
    *room == Room::default()
}

fn is_unstated(strip: &Strip) -> bool {
    *strip == Strip::default()
}

impl Study {
    /// The ingredient to remove, if it is in the feed.
    pub fn target(&self) -> Option<&Ingredient> {
        self.feed.ingredients.iter().find(|i| i.name == self.feed.target)
    }

    /// The constants of `ingredient` in the solvent in use, if stated.
    pub fn partition_of(&self, ingredient: &str) -> Option<&PartitionEntry> {
        self.partition.iter().find(|p| p.ingredient == ingredient && p.solvent == self.solvent.id)
    }
}
