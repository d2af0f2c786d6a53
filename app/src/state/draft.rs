//! The study as typed: texts, choices, and rows with ids that never change.
//!
//! Plain data; the only state of the page that is saved. See [`super::to_study`] for the way to a
//! [`unstir_core::study::Study`] and [`super::from_study`] for the way back.

use super::NumberText;
use serde::{Deserialize, Serialize};
use unstir_core::study::{LossPlace, MeantAs, Purpose, SiteKind};

/// Version of the draft as saved in the browser.
pub const DRAFT_VERSION: u32 = 1;

/// Stable id of a row; 0 is no row.
pub type RowId = u32;

/// The study as typed.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
pub struct Draft {
    /// [`DRAFT_VERSION`].
    pub unstir_draft: u32,
    /// Next row id to give out.
    pub next_id: RowId,
    /// Name of the study.
    pub name: String,
    /// Free text.
    pub note: String,
    /// Least fraction of the target to take out.
    pub goal: NumberText,
    /// What the liquid is for.
    #[serde(default)]
    pub purpose: Purpose,
    /// The liquid as received.
    pub feed: FeedDraft,
    /// Target and company.
    pub ingredients: Vec<IngredientDraft>,
    /// Taking water off.
    pub concentrate: ConcentrateDraft,
    /// The solvent.
    pub solvent: SolventDraft,
    /// Partition coefficients, for this solvent and others.
    pub partition: Vec<PartitionDraft>,
    /// Portions or stages.
    pub extraction: ExtractionDraft,
    /// The isolate, once weighed.
    pub isolate: IsolateDraft,
    /// The room.
    #[serde(default)]
    pub room: RoomDraft,
    /// Stripping the raffinate.
    #[serde(default)]
    pub strip: StripDraft,
    /// Losses.
    pub losses: Vec<LossDraft>,
    /// Volume reached at make-up, once done.
    pub made_up_to: NumberText,
    /// Temperature of carbonating [°C]; optional.
    #[serde(default)]
    pub carbonate_at: NumberText,
}

/// The liquid as received, as typed.
#[derive(Clone, Debug, Default, PartialEq, Serialize, Deserialize)]
pub struct FeedDraft {
    /// Volume [mL].
    pub volume: NumberText,
    /// pH.
    pub ph: NumberText,
    /// Temperature [°C].
    pub temperature: NumberText,
    /// Soluble solids [°Brix]; optional.
    pub brix: NumberText,
    /// Dissolved carbon dioxide [g/L]; optional.
    #[serde(default)]
    pub co2: NumberText,
    /// Ions of fixed charge.
    #[serde(default)]
    pub ions: Vec<IonDraft>,
    /// Row of the ingredient to remove.
    pub target: RowId,
    /// Name of the target in a file that does not list it.
    pub target_not_listed: String,
}

/// An ion of fixed charge, as typed.
#[derive(Clone, Debug, Default, PartialEq, Serialize, Deserialize)]
pub struct IonDraft {
    /// Row id.
    pub id: RowId,
    /// Name.
    pub name: String,
    /// Charge number.
    pub charge: String,
    /// Concentration [mmol/L].
    pub amount: NumberText,
}

/// How an amount is stated.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
#[serde(rename_all = "snake_case")]
pub enum AmountAs {
    /// Mass in the whole feed [mg].
    MassMg,
    /// Concentration [mg/L].
    #[default]
    MgPerL,
    /// Mass per serving.
    PerServing,
}

/// One ingredient, as typed.
#[derive(Clone, Debug, Default, PartialEq, Serialize, Deserialize)]
pub struct IngredientDraft {
    /// Row id.
    pub id: RowId,
    /// Name.
    pub name: String,
    /// Molar mass [g/mol]; optional.
    pub molar_mass: NumberText,
    /// How the amount is stated.
    pub amount_as: AmountAs,
    /// The amount, in the unit of `amount_as`.
    pub amount: NumberText,
    /// Serving [mL], for an amount per serving.
    pub serving: NumberText,
    /// Sites, pKa rising.
    pub sites: Vec<SiteDraft>,
    /// Readings of one more, disputed constant.
    pub readings: Vec<ReadingDraft>,
    /// Row of the reading the plan uses.
    pub reading_in_use: RowId,
    /// Whether the study has a disputed constant for it at all.
    pub disputed: bool,
}

/// One site, as typed.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
pub struct SiteDraft {
    /// Row id.
    pub id: RowId,
    /// Acid, or conjugate acid of a base.
    pub kind: SiteKind,
    /// pKa.
    pub pka: NumberText,
    /// Enthalpy of proton loss [kJ/mol]; optional.
    pub enthalpy: NumberText,
    /// Temperature of the pKa [°C]; 25 if empty.
    pub temperature: String,
}

/// One reading of a disputed constant, as typed.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
pub struct ReadingDraft {
    /// Row id.
    pub id: RowId,
    /// The number as printed.
    pub value: NumberText,
    /// How it is meant.
    pub meant_as: MeantAs,
}

/// How far water is taken off.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
#[serde(rename_all = "snake_case")]
pub enum ConcentrateBy {
    /// Not at all.
    #[default]
    Unchanged,
    /// To a volume [mL].
    VolumeMl,
    /// By a mass of water [g].
    WaterRemovedG,
    /// To soluble solids [°Brix].
    Brix,
}

/// Taking water off, as typed.
#[derive(Clone, Debug, Default, PartialEq, Serialize, Deserialize)]
pub struct ConcentrateDraft {
    /// How far it goes.
    pub by: ConcentrateBy,
    /// The number that goes with `by`.
    pub to: NumberText,
    /// pH afterwards; optional.
    pub ph_after: NumberText,
}

/// The solvent, as typed.
#[derive(Clone, Debug, Default, PartialEq, Serialize, Deserialize)]
pub struct SolventDraft {
    /// Id in the library, or of the user's own.
    pub id: String,
    /// Name.
    pub name: String,
    /// Density [g/mL]; optional.
    pub density: NumberText,
}

/// Partition of one ingredient into one solvent, as typed.
#[derive(Clone, Debug, Default, PartialEq, Serialize, Deserialize)]
pub struct PartitionDraft {
    /// Row id.
    pub id: RowId,
    /// Row of the ingredient; 0 if the feed does not list it.
    pub ingredient: RowId,
    /// Name in a file, of an ingredient the feed does not list.
    pub not_listed: String,
    /// Solvent id.
    pub solvent: String,
    /// K of the neutral form.
    pub k: NumberText,
    /// K of the ionised forms; optional.
    pub k_ion_pair: NumberText,
    /// Enthalpy of transfer [kJ/mol]; optional.
    pub enthalpy: NumberText,
    /// Temperature of K [°C]; 25 if empty.
    pub temperature: String,
}

impl PartitionDraft {
    /// Whether nothing is typed, so that the file needs no entry.
    pub fn is_blank(&self) -> bool {
        self.k.is_empty()
            && self.k_ion_pair.is_empty()
            && self.enthalpy.is_empty()
            && self.temperature.trim().is_empty()
            && self.not_listed.is_empty()
    }
}

/// The order in which liquor and solvent meet.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
#[serde(rename_all = "snake_case")]
pub enum SchemeKind {
    /// Fresh solvent in each portion.
    #[default]
    CrossCurrent,
    /// Opposite directions.
    CounterCurrent,
    /// Solvent passed steadily.
    Continuous,
}

/// Portions or stages, as typed.
#[derive(Clone, Debug, Default, PartialEq, Serialize, Deserialize)]
pub struct ExtractionDraft {
    /// Scheme.
    pub scheme: SchemeKind,
    /// Portions of a cross-current scheme.
    pub portions: Vec<PortionDraft>,
    /// Stages of a counter-current scheme.
    pub stages: String,
    /// Solvent of a counter-current or continuous scheme [mL].
    pub solvent_total: NumberText,
    /// Stage efficiency E.
    pub efficiency: NumberText,
    /// Solvent left behind [mL]; 0 if empty.
    pub left_behind: NumberText,
    /// Liquor carried out [mL]; 0 if empty.
    pub carried_out: NumberText,
    /// What the entering solvent holds.
    pub entering: Vec<EnteringDraft>,
    /// Largest vessel [mL]; optional.
    pub vessel: NumberText,
}

/// One portion, as typed.
#[derive(Clone, Debug, Default, PartialEq, Serialize, Deserialize)]
pub struct PortionDraft {
    /// Row id.
    pub id: RowId,
    /// Volume [mL].
    pub volume: NumberText,
    /// Stage efficiency of this portion; optional.
    pub efficiency: NumberText,
}

/// One ingredient of the entering solvent, as typed.
#[derive(Clone, Debug, Default, PartialEq, Serialize, Deserialize)]
pub struct EnteringDraft {
    /// Row id.
    pub id: RowId,
    /// Row of the ingredient; 0 if the feed does not list it.
    pub ingredient: RowId,
    /// Name in a file, of an ingredient the feed does not list.
    pub not_listed: String,
    /// Concentration [mg/mL].
    pub concentration: NumberText,
}

/// The isolate, as typed.
#[derive(Clone, Debug, Default, PartialEq, Serialize, Deserialize)]
pub struct IsolateDraft {
    /// Whether it has been weighed; the rest counts only then.
    pub weighed: bool,
    /// Crude mass [mg].
    pub crude_mass: NumberText,
    /// Purity, a fraction.
    pub purity: NumberText,
    /// Water per mole [mol/mol]; 0 if empty.
    pub hydrate_waters: NumberText,
    /// Solvent in it, a fraction; 0 if empty.
    pub residual_solvent: NumberText,
}

/// The room, as typed; all optional.
#[derive(Clone, Debug, Default, PartialEq, Serialize, Deserialize)]
pub struct RoomDraft {
    /// Volume [m³].
    pub volume: NumberText,
    /// Air changes [1/h].
    pub changes: NumberText,
    /// Solvent spilled [mL].
    pub spill: NumberText,
}

/// Stripping, as typed.
#[derive(Clone, Debug, Default, PartialEq, Serialize, Deserialize)]
pub struct StripDraft {
    /// Pressure [kPa]; optional.
    pub pressure: NumberText,
    /// Assays on the way.
    pub readings: Vec<StripReadingDraft>,
    /// Residue to reach in the made-up liquid [mg/L]; optional.
    pub limit: NumberText,
    /// Serving [mL]; optional.
    pub serving: NumberText,
}

/// One assay, as typed.
#[derive(Clone, Debug, Default, PartialEq, Serialize, Deserialize)]
pub struct StripReadingDraft {
    /// Row id.
    pub id: RowId,
    /// Time [min].
    pub minutes: NumberText,
    /// Content [mg/L].
    pub content: NumberText,
}

/// How a loss is stated.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
#[serde(rename_all = "snake_case")]
pub enum LossAs {
    /// A fraction of what was there.
    Fraction,
    /// A volume [mL].
    #[default]
    VolumeMl,
}

/// One loss, as typed.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
pub struct LossDraft {
    /// Row id.
    pub id: RowId,
    /// What happened.
    pub what: String,
    /// Where.
    pub at: LossPlace,
    /// How `amount` is stated.
    pub amount_as: LossAs,
    /// How much.
    pub amount: NumberText,
}

impl Default for Draft {
    fn default() -> Self {
        Self::blank()
    }
}

impl Draft {
    /// A study to begin with: one ingredient, one portion, room temperature.
    pub fn blank() -> Self {
        let mut draft = Self::empty();
        draft.name = "New study".to_owned();
        draft.goal = NumberText::of("0.9");
        draft.feed.temperature = NumberText::of("20");
        draft.extraction.efficiency = NumberText::of("1");
        draft.feed.target = draft.add_ingredient();
        draft.add_portion();
        draft
    }

    /// Nothing at all.
    pub(super) fn empty() -> Self {
        Self {
            unstir_draft: DRAFT_VERSION,
            next_id: 1,
            name: String::new(),
            note: String::new(),
            goal: NumberText::default(),
            feed: FeedDraft::default(),
            ingredients: Vec::new(),
            concentrate: ConcentrateDraft::default(),
            solvent: SolventDraft::default(),
            partition: Vec::new(),
            extraction: ExtractionDraft::default(),
            isolate: IsolateDraft::default(),
            purpose: Purpose::default(),
            room: RoomDraft::default(),
            strip: StripDraft::default(),
            losses: Vec::new(),
            made_up_to: NumberText::default(),
            carbonate_at: NumberText::default(),
        }
    }

    /// An id no row has had.
    pub fn new_id(&mut self) -> RowId {
        let id = self.next_id.max(1);
        self.next_id = id.saturating_add(1);
        id
    }
}
