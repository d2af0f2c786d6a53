//! Solvents that do not mix with water, as candidates for taking one ingredient out.

use super::sources::Source;
use super::table::{Loaded, Row, load};
use std::sync::OnceLock;

/// Density of water at 20 °C [g/mL]. Kell 1975 (IAPWS-95 agrees to this digit).
pub const WATER_DENSITY_20C_G_ML: f64 = 0.9982;

/// Density difference under which the layer order is not to be relied on [g/mL]: dissolved
/// solids, mutual saturation and temperature each move it by a few hundredths.
pub const LAYER_MARGIN_G_ML: f64 = 0.05;

/// Pressure of 1 mmHg [kPa] (101.325 kPa / 760).
const KPA_PER_MMHG: f64 = 101.325 / 760.0;

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
    /// Boiling point at 101.325 kPa [°C].
    pub boiling_point_c: f64,
    /// Source of the boiling point.
    pub boiling_point_source: Source,
    /// Solubility in water [mass percent].
    pub solubility_in_water_mass_pct: f64,
    /// Temperature of that solubility [°C]; sets that state none are taken as about 25.
    pub solubility_in_water_temperature_c: f64,
    /// Lowest and highest printed solubility in water [mass percent].
    pub solubility_in_water_range_mass_pct: (f64, f64),
    /// Source of the solubility in water.
    pub solubility_in_water_source: Source,
    /// Water in the saturated solvent [mass percent].
    pub water_in_solvent_mass_pct: f64,
    /// Temperature of that value [°C].
    pub water_in_solvent_temperature_c: f64,
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
    /// Vapour pressure at 20 °C [kPa].
    pub vapour_pressure_20c_kpa: f64,
    /// Vapour pressure at 25 °C [kPa].
    pub vapour_pressure_25c_kpa: f64,
    /// Source of both vapour pressures.
    pub vapour_pressure_source: Source,
    /// Value groups that are weak, by name: a subset of [`GROUPS`].
    pub weak: Vec<String>,
    /// A remark; often blank.
    pub note: String,
}

/// Names of the value groups, as used in [`Solvent::weak`].
pub const GROUPS: [&str; 12] = [
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

    /// Whether it burns: it has a flash point.
    pub fn is_flammable(&self) -> bool {
        self.flash_point_c.is_some()
    }

    /// Whether the value group `group` (one of [`GROUPS`]) is weak.
    pub fn is_weak(&self, group: &str) -> bool {
        self.weak.iter().any(|name| name == group)
    }

    /// Every value group with its source, in the order of [`GROUPS`].
    pub fn sources(&self) -> [(&'static str, &Source); 12] {
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

fn parse(row: &Row) -> Result<Solvent, String> {
    Ok(Solvent {
        id: row.required("id")?,
        name: row.required("name")?,
        cas: row.required("cas")?,
        formula: row.required("formula")?,
        molar_mass_g_mol: row.number("molar_mass_g_mol")?,
        identity_source: row.source("source_identity")?,
        density_20c_g_ml: row.number("density_20C_g_mL")?,
        density_source: row.source("source_density")?,
        boiling_point_c: row.number("boiling_point_C")?,
        boiling_point_source: row.source("source_boiling_point")?,
        solubility_in_water_mass_pct: row.number("solubility_in_water_pct")?,
        solubility_in_water_temperature_c: row.number("solubility_in_water_T_C")?,
        solubility_in_water_range_mass_pct: (
            row.number("solubility_in_water_low_pct")?,
            row.number("solubility_in_water_high_pct")?,
        ),
        solubility_in_water_source: row.source("source_solubility")?,
        water_in_solvent_mass_pct: row.number("water_in_solvent_pct")?,
        water_in_solvent_temperature_c: row.number("water_in_solvent_T_C")?,
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
        vapour_pressure_20c_kpa: row.number("vapour_pressure_20C_mmHg")? * KPA_PER_MMHG,
        vapour_pressure_25c_kpa: row.number("vapour_pressure_25C_mmHg")? * KPA_PER_MMHG,
        vapour_pressure_source: row.source("source_vapour_pressure")?,
        weak: row.list("weak")?,
        note: row.owned("note")?,
    })
}

#[cfg(test)]
mod tests {
    use super::super::cautions::hazard_statement;
    use super::super::sources::Checked;
    use super::*;

    #[test]
    fn every_row_parses_and_ids_are_unique() {
        assert_eq!(table().defects, Vec::<String>::new());
        let all = solvents();
        assert_eq!(all.len(), 12);
        for (i, one) in all.iter().enumerate() {
            assert!(all.iter().skip(i + 1).all(|other| other.id != one.id && other.cas != one.cas), "{}", one.id);
        }
        assert_eq!(solvent("water"), None);
    }

    #[test]
    fn every_number_is_in_range() {
        for s in solvents() {
            let id = &s.id;
            assert!((50.0..200.0).contains(&s.molar_mass_g_mol), "{id}");
            assert!((0.6..1.6).contains(&s.density_20c_g_ml), "{id}");
            assert!((30.0..130.0).contains(&s.boiling_point_c), "{id}");
            let (low, high) = s.solubility_in_water_range_mass_pct;
            assert!(low > 0.0 && high < 10.0, "{id}");
            assert!((low..=high).contains(&s.solubility_in_water_mass_pct), "{id}");
            assert!((0.0..5.0).contains(&s.water_in_solvent_mass_pct), "{id}");
            for t in [s.solubility_in_water_temperature_c, s.water_in_solvent_temperature_c] {
                assert!((20.0..=25.0).contains(&t), "{id}");
            }
            assert!(s.flash_point_c.is_none_or(|t| (-50.0..30.0).contains(&t)), "{id}");
            assert_eq!(s.lel_vol_pct.is_some(), s.uel_vol_pct.is_some(), "{id}");
            assert!(s.lel_vol_pct.zip(s.uel_vol_pct).is_none_or(|(l, u)| 0.0 < l && l < u && u < 50.0), "{id}");
            assert!(!s.is_flammable() || s.lel_vol_pct.is_some(), "{id}");
            assert!((0.1..2.0).contains(&s.viscosity_25c_mpa_s), "{id}");
            assert!(s.interfacial_tension_20c_mn_m.is_none_or(|g| (1.0..60.0).contains(&g)), "{id}");
            assert!(0.0 < s.vapour_pressure_20c_kpa && s.vapour_pressure_20c_kpa < s.vapour_pressure_25c_kpa, "{id}");
        }
    }

    /// CAS registry numbers end in a check digit: the sum of digits times place, modulo 10.
    #[test]
    fn cas_numbers_have_a_right_check_digit() {
        for s in solvents() {
            let digits: Vec<u32> = s.cas.chars().filter_map(|c| c.to_digit(10)).rev().collect();
            let sum: u32 = digits.iter().skip(1).zip(1..).map(|(digit, place)| digit * place).sum();
            assert_eq!(digits.first(), Some(&(sum % 10)), "{}", s.id);
        }
    }

    /// Vapour pressure and boiling point come from different tables. Clausius and Clapeyron with
    /// Trouton's rule (88 J/mol/K) link them well within a factor of two, which is enough to
    /// catch a slipped digit or a wrong unit (1 mmHg is 0.133 kPa).
    #[test]
    fn vapour_pressure_agrees_with_the_boiling_point() {
        const GAS_CONSTANT_J_MOL_K: f64 = 8.314;
        const TROUTON_J_MOL_K: f64 = 88.0;
        const FACTOR: f64 = 2.0;
        for s in solvents() {
            let kelvin = s.boiling_point_c + 273.15;
            let exponent = TROUTON_J_MOL_K / GAS_CONSTANT_J_MOL_K * (1.0 - kelvin / 298.15);
            let expected = 101.325 * crate::math::exp(exponent);
            let found = s.vapour_pressure_25c_kpa;
            assert!((1.0 / FACTOR..FACTOR).contains(&(found / expected)), "{}: {found} against {expected}", s.id);
        }
    }

    #[test]
    fn every_hazard_code_has_a_meaning() {
        for s in solvents() {
            assert!(!s.h_codes.is_empty(), "{}", s.id);
            for code in s.h_codes.iter().chain(&s.euh_codes) {
                assert!(hazard_statement(code).is_some(), "{}: {code}", s.id);
            }
        }
    }

    #[test]
    fn codes_and_flash_points_agree() {
        for s in solvents() {
            // CLP Annex I 2.6.2: category 1 below 23 °C and boiling at 35 °C or less (H224),
            // category 2 below 23 °C (H225), category 3 up to 60 °C (H226).
            // The flash point of n-butyl acetate straddles the boundary: 22 here, 22 to 27 in print.
            let expected = match s.flash_point_c {
                Some(_) if s.id == "n_butyl_acetate" => Some("H226"),
                Some(t) if t < 23.0 && s.boiling_point_c <= 35.0 => Some("H224"),
                Some(t) if t < 23.0 => Some("H225"),
                Some(_) => Some("H226"),
                None => None,
            };
            let found = s.h_codes.iter().map(String::as_str).find(|code| code.starts_with("H22"));
            assert_eq!(found, expected, "{}", s.id);
            assert_eq!(
                s.euh_codes.iter().any(|code| code == "EUH019"),
                s.peroxide_class == PeroxideClass::OnConcentration,
                "{}",
                s.id
            );
        }
    }

    #[test]
    fn every_group_has_a_source_and_weak_names_a_group() {
        for s in solvents() {
            for ((name, source), group) in s.sources().into_iter().zip(GROUPS) {
                assert_eq!(name, group);
                assert!(!source.citation.is_empty(), "{}: {name}", s.id);
                assert!(source.checked != Checked::NotHeld || s.is_weak(name), "{}: {name}", s.id);
            }
            assert!(s.weak.iter().all(|name| GROUPS.contains(&name.as_str())), "{}: {:?}", s.id, s.weak);
            assert!(s.interfacial_tension_20c_mn_m.is_some() || s.is_weak("interfacial_tension"), "{}", s.id);
        }
    }

    #[test]
    fn layers_follow_density() {
        let names = |layer| {
            solvents().into_iter().filter(|s| s.layer_against_water() == layer).map(|s| s.id).collect::<Vec<_>>()
        };
        assert_eq!(names(Layer::Lower), ["dichloromethane", "chloroform"]);
        assert_eq!(names(Layer::Uncertain), Vec::<String>::new());
        let dichloromethane = solvent("dichloromethane").unwrap();
        // Sucrose of 65 % has 1.3166 g/mL at 20 °C (ICUMSA polynomial): too close to tell.
        assert_eq!(dichloromethane.layer_against(1.3166), Layer::Uncertain);
        assert_eq!(dichloromethane.layer_against(1.38), Layer::Upper);
        assert_eq!(dichloromethane.layer_against(f64::NAN), Layer::Uncertain);
    }

    #[test]
    fn published_values_are_carried_as_printed() {
        let ether = solvent("diethyl_ether").unwrap();
        assert_eq!(ether.density_20c_g_ml, 0.7138); // CRC Handbook table
        assert_eq!(ether.flash_point_c, Some(-45.0)); // IEC 60079-20-1 (2010)
        assert_eq!((ether.lel_vol_pct, ether.uel_vol_pct), (Some(1.7), Some(39.2))); // same
        let ester = solvent("ethyl_acetate").unwrap();
        assert_eq!(ester.water_in_solvent_mass_pct, 3.3); // IUPAC-NIST SDS vol. 88, 20 °C
        assert_eq!(ester.interfacial_tension_20c_mn_m, Some(6.8)); // Adamson & Gast 1997
        let dichloromethane = solvent("dichloromethane").unwrap();
        assert_eq!(dichloromethane.boiling_point_c, 39.8); // CRC Handbook
        // 356.5 mmHg from the Antoine constants of Poling et al.; 47.5 kPa.
        assert!((dichloromethane.vapour_pressure_20c_kpa - 47.53).abs() < 0.005);
        assert_eq!(dichloromethane.h_codes, ["H351"]); // CLP Annex VI, memory
        assert_eq!(dichloromethane.ghs_source.checked, Checked::Memory);
    }
}
