//! Solvents that do not mix with water, as candidates for taking one ingredient out.

use super::sources::Source;
use super::table::{Loaded, Row, load};
use std::sync::OnceLock;

/// Density of water at 20 °C [g/mL]. Kell 1975 (IAPWS-95 agrees to this digit).
pub const WATER_DENSITY_20C_G_ML: f64 = 0.9982;

/// Density difference under which the layer order is not to be relied on [g/mL]: dissolved
/// solids, mutual saturation and temperature each move it by a few hundredths.
pub const LAYER_MARGIN_G_ML: f64 = 0.05;

/// Highest flash point of a flammable liquid [°C]: UN GHS, category 4 (CLP stops at 60).
pub const FLAMMABLE_TO_C: f64 = 93.0;

/// Pressure of 1 mmHg [kPa] (101.325 kPa / 760).
pub const KPA_PER_MMHG: f64 = 101.325 / 760.0;

/// Where the solvent lies once the phases have settled.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Layer {
    /// Solvent below, aqueous phase above.
    Lower,
    /// Solvent above, aqueous phase below.
    Upper,
    /// The densities are within [`LAYER_MARGIN_G_ML`], or not known: find the layers by a drop of water.
    Uncertain,
}

/// How readily the solvent forms peroxides.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum PeroxideClass {
    /// Not a peroxide former.
    No,
    /// Low tendency: test old stock.
    Low,
    /// Hazard on concentration (class B): test before use and before evaporating.
    OnConcentration,
}

/// Where Antoine constants come from.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum AntoineKind {
    /// Constants of a published table, units converted.
    Published,
    /// Our least-squares fit to a published vapour-pressure equation.
    Fitted,
    /// Our fit to an estimate: no measured constants were found.
    Estimate,
}

/// Antoine constants: `log10(p/mmHg) = A − B/(t/°C + C)`.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Antoine {
    /// `A` [-].
    pub a: f64,
    /// `B` [°C].
    pub b: f64,
    /// `C` [°C].
    pub c: f64,
    /// Lowest temperature they hold for [°C].
    pub low_c: f64,
    /// Highest temperature they hold for [°C].
    pub high_c: f64,
    /// Where they come from.
    pub kind: AntoineKind,
}

/// Henry solubility constant in pure water: dissolved concentration over partial pressure.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Henry {
    /// Constant at 25 °C [mol/(m³ Pa)].
    pub hcp_25c_mol_m3_pa: f64,
    /// Lowest and highest printed constant [mol/(m³ Pa)].
    pub range_mol_m3_pa: Option<(f64, f64)>,
    /// Slope `d ln Hcp/d(1/T)` [K]; `None` when not held.
    pub slope_k: Option<f64>,
}

/// One solvent. Mass percent is grams per 100 g of the saturated phase.
#[derive(Clone, Debug, PartialEq)]
pub struct Solvent {
    /// Key used throughout the library, e.g. `ethyl_acetate`.
    pub id: String,
    /// Name as shown.
    pub name: String,
    /// CAS registry number.
    pub cas: String,
    /// Molecular formula.
    pub formula: String,
    /// Molar mass [g/mol].
    pub molar_mass_g_mol: f64,
    /// Source of name, number, formula and molar mass.
    pub identity_source: Source,
    /// Density at 20 °C [g/mL].
    pub density_20c_g_ml: f64,
    /// Source of the density.
    pub density_source: Source,
    /// Boiling point at 101.325 kPa [°C]; `None` for an oil that does not boil undecomposed.
    pub boiling_point_c: Option<f64>,
    /// Source of the boiling point.
    pub boiling_point_source: Source,
    /// Solubility in water [mass percent]; `None` when no number is held.
    pub solubility_in_water_mass_pct: Option<f64>,
    /// Temperature of that solubility [°C]; sets that state none are taken as about 25.
    pub solubility_in_water_temperature_c: Option<f64>,
    /// Lowest and highest printed solubility in water [mass percent].
    pub solubility_in_water_range_mass_pct: Option<(f64, f64)>,
    /// Source of the solubility in water.
    pub solubility_in_water_source: Source,
    /// Water in the saturated solvent [mass percent]; `None` when no number is held.
    pub water_in_solvent_mass_pct: Option<f64>,
    /// Temperature of that value [°C].
    pub water_in_solvent_temperature_c: Option<f64>,
    /// Source of the water content.
    pub water_in_solvent_source: Source,
    /// Flash point, closed cup [°C]; `None` when it has none by the usual tests.
    pub flash_point_c: Option<f64>,
    /// Source of the flash point.
    pub flash_point_source: Source,
    /// Lower explosive limit in air [volume percent]; `None` when not flammable.
    pub lel_vol_pct: Option<f64>,
    /// Upper explosive limit in air [volume percent]; `None` when not flammable.
    pub uel_vol_pct: Option<f64>,
    /// Source of the explosive limits.
    pub flammability_source: Source,
    /// How readily it forms peroxides.
    pub peroxide_class: PeroxideClass,
    /// What to do about that; often blank.
    pub peroxide_note: String,
    /// Source of the peroxide class.
    pub peroxide_source: Source,
    /// Hazard statement codes: the harmonised minimum, e.g. `H225`.
    pub h_codes: Vec<String>,
    /// Supplemental codes, e.g. `EUH066`.
    pub euh_codes: Vec<String>,
    /// Source of both kinds of code.
    pub ghs_source: Source,
    /// Viscosity at 25 °C [mPa·s].
    pub viscosity_25c_mpa_s: f64,
    /// Source of the viscosity.
    pub viscosity_source: Source,
    /// Interfacial tension against pure water at 20 °C [mN/m]; real liquors are lower.
    pub interfacial_tension_20c_mn_m: Option<f64>,
    /// Source of the interfacial tension.
    pub interfacial_tension_source: Source,
    /// Vapour pressure at 20 °C [kPa]; `None` when negligible.
    pub vapour_pressure_20c_kpa: Option<f64>,
    /// Vapour pressure at 25 °C [kPa]; `None` when negligible.
    pub vapour_pressure_25c_kpa: Option<f64>,
    /// Constants of the vapour pressure; `None` when none are held.
    pub antoine: Option<Antoine>,
    /// Source of the vapour pressures and of the constants.
    pub vapour_pressure_source: Source,
    /// How it divides between water and air; `None` when no constant is held.
    pub henry: Option<Henry>,
    /// Source of that.
    pub henry_source: Source,
    /// Heat of vaporisation at 25 °C [kJ/mol].
    pub heat_of_vaporisation_25c_kj_per_mol: Option<f64>,
    /// Heat of vaporisation at the boiling point [kJ/mol].
    pub heat_of_vaporisation_boiling_kj_per_mol: Option<f64>,
    /// Source of both.
    pub heat_of_vaporisation_source: Source,
    /// Whether it holds halogen, and so goes to the halogenated waste stream.
    pub halogenated: bool,
    /// Value groups that are weak, by name: a subset of [`GROUPS`].
    pub weak: Vec<String>,
    /// A remark; often blank.
    pub note: String,
}

/// Names of the value groups, as used in [`Solvent::weak`].
pub const GROUPS: [&str; 14] = [
    "identity",
    "density",
    "boiling_point",
    "solubility_in_water",
    "water_in_solvent",
    "flash_point",
    "flammability",
    "peroxide",
    "ghs",
    "viscosity",
    "interfacial_tension",
    "vapour_pressure",
    "henry",
    "enthalpy",
];

impl Solvent {
    /// Layer of the solvent against pure water at 20 °C. A liquor rich in dissolved solids is
    /// denser than water and can float a solvent that sinks in water: see [`Solvent::layer_against`].
    ///
    /// # Example: a chlorinated solvent sinks, an ester floats
    ///
    /// ```
    /// use unstir_core::library::solvents::{Layer, solvent};
    /// assert_eq!(solvent("dichloromethane").unwrap().layer_against_water(), Layer::Lower);
    /// assert_eq!(solvent("ethyl_acetate").unwrap().layer_against_water(), Layer::Upper);
    /// ```
    pub fn layer_against_water(&self) -> Layer {
        self.layer_against(WATER_DENSITY_20C_G_ML)
    }

    /// Layer of the solvent against a liquor of density `liquor_density_g_ml` [g/mL] at 20 °C.
    pub fn layer_against(&self, liquor_density_g_ml: f64) -> Layer {
        let difference = self.density_20c_g_ml - liquor_density_g_ml;
        if difference > LAYER_MARGIN_G_ML {
            Layer::Lower
        } else if difference < -LAYER_MARGIN_G_ML {
            Layer::Upper
        } else {
            Layer::Uncertain
        }
    }

    /// Whether its vapour can be lit in ordinary handling: a flash point of at most
    /// [`FLAMMABLE_TO_C`]. Oils burn too, once they are hot.
    pub fn is_flammable(&self) -> bool {
        self.flash_point_c.is_some_and(|t| t <= FLAMMABLE_TO_C)
    }

    /// Whether the value group `group` (one of [`GROUPS`]) is weak.
    pub fn is_weak(&self, group: &str) -> bool {
        self.weak.iter().any(|name| name == group)
    }

    /// Every value group with its source, in the order of [`GROUPS`].
    pub fn sources(&self) -> [(&'static str, &Source); 14] {
        [
            ("identity", &self.identity_source),
            ("density", &self.density_source),
            ("boiling_point", &self.boiling_point_source),
            ("solubility_in_water", &self.solubility_in_water_source),
            ("water_in_solvent", &self.water_in_solvent_source),
            ("flash_point", &self.flash_point_source),
            ("flammability", &self.flammability_source),
            ("peroxide", &self.peroxide_source),
            ("ghs", &self.ghs_source),
            ("viscosity", &self.viscosity_source),
            ("interfacial_tension", &self.interfacial_tension_source),
            ("vapour_pressure", &self.vapour_pressure_source),
            ("henry", &self.henry_source),
            ("enthalpy", &self.heat_of_vaporisation_source),
        ]
    }
}

/// All solvents, in the order of the file.
pub fn solvents() -> Vec<Solvent> {
    table().items.clone()
}

/// The solvent with this id.
pub fn solvent(id: &str) -> Option<Solvent> {
    table().items.iter().find(|solvent| solvent.id == id).cloned()
}

fn table() -> &'static Loaded<Solvent> {
    static TABLE: OnceLock<Loaded<Solvent>> = OnceLock::new();
    TABLE.get_or_init(|| load(include_str!("../../data/solvents.csv"), parse))
}

fn parse_antoine(row: &Row) -> Result<Option<Antoine>, String> {
    let kind = match row.text("antoine_kind")? {
        "" => return Ok(None),
        "published" => AntoineKind::Published,
        "fitted" => AntoineKind::Fitted,
        "estimate" => AntoineKind::Estimate,
        other => return Err(format!("antoine_kind is none of the known words: {other}")),
    };
    Ok(Some(Antoine {
        a: row.number("antoine_A")?,
        b: row.number("antoine_B")?,
        c: row.number("antoine_C")?,
        low_c: row.number("antoine_low_C")?,
        high_c: row.number("antoine_high_C")?,
        kind,
    }))
}

fn parse(row: &Row) -> Result<Solvent, String> {
    let hcp_range = row.optional_number("hcp_low")?.zip(row.optional_number("hcp_high")?);
    let hcp_slope = row.optional_number("hcp_slope_K")?;
    Ok(Solvent {
        id: row.required("id")?,
        name: row.required("name")?,
        cas: row.required("cas")?,
        formula: row.required("formula")?,
        molar_mass_g_mol: row.number("molar_mass_g_mol")?,
        identity_source: row.source("source_identity")?,
        density_20c_g_ml: row.number("density_20C_g_mL")?,
        density_source: row.source("source_density")?,
        boiling_point_c: row.optional_number("boiling_point_C")?,
        boiling_point_source: row.source("source_boiling_point")?,
        solubility_in_water_mass_pct: row.optional_number("solubility_in_water_pct")?,
        solubility_in_water_temperature_c: row.optional_number("solubility_in_water_T_C")?,
        solubility_in_water_range_mass_pct: row
            .optional_number("solubility_in_water_low_pct")?
            .zip(row.optional_number("solubility_in_water_high_pct")?),
        solubility_in_water_source: row.source("source_solubility")?,
        water_in_solvent_mass_pct: row.optional_number("water_in_solvent_pct")?,
        water_in_solvent_temperature_c: row.optional_number("water_in_solvent_T_C")?,
        water_in_solvent_source: row.source("source_water_in_solvent")?,
        flash_point_c: row.optional_number("flash_point_C")?,
        flash_point_source: row.source("source_flash_point")?,
        lel_vol_pct: row.optional_number("lel_vol_pct")?,
        uel_vol_pct: row.optional_number("uel_vol_pct")?,
        flammability_source: row.source("source_flammability")?,
        peroxide_class: match row.text("peroxide_class")? {
            "no" => PeroxideClass::No,
            "low" => PeroxideClass::Low,
            "class_b" => PeroxideClass::OnConcentration,
            other => return Err(format!("peroxide_class is none of the known words: {other}")),
        },
        peroxide_note: row.owned("peroxide_note")?,
        peroxide_source: row.source("source_peroxide")?,
        h_codes: row.list("h_codes")?,
        euh_codes: row.list("euh_codes")?,
        ghs_source: row.source("source_ghs")?,
        viscosity_25c_mpa_s: row.number("viscosity_25C_mPas")?,
        viscosity_source: row.source("source_viscosity")?,
        interfacial_tension_20c_mn_m: row.optional_number("interfacial_tension_20C_mN_m")?,
        interfacial_tension_source: row.source("source_interfacial_tension")?,
        vapour_pressure_20c_kpa: row.optional_number("vapour_pressure_20C_mmHg")?.map(|p| p * KPA_PER_MMHG),
        vapour_pressure_25c_kpa: row.optional_number("vapour_pressure_25C_mmHg")?.map(|p| p * KPA_PER_MMHG),
        antoine: parse_antoine(row)?,
        vapour_pressure_source: row.source("source_vapour_pressure")?,
        henry: row.optional_number("hcp_25C_mol_m3_Pa")?.map(|hcp_25c_mol_m3_pa| Henry {
            hcp_25c_mol_m3_pa,
            range_mol_m3_pa: hcp_range,
            slope_k: hcp_slope,
        }),
        henry_source: row.source("source_henry")?,
        heat_of_vaporisation_25c_kj_per_mol: row.optional_number("hvap_25C_kJ_mol")?,
        heat_of_vaporisation_boiling_kj_per_mol: row.optional_number("hvap_boiling_kJ_mol")?,
        heat_of_vaporisation_source: row.source("source_enthalpy")?,
        halogenated: row.yes("halogenated")?,
        weak: row.list("weak")?,
        note: row.owned("note")?,
    })
}

#[cfg(test)]
mod tests;
