//! Exposure limits of the solvents, as listed; none of it is legal advice.

use super::sources::Source;
use super::table::{Loaded, Row, load};
use std::sync::OnceLock;

/// Limits of one solvent in workplace air. `None` means that no such limit is listed.
/// State, national and other bodies' limits are not held.
#[derive(Clone, Debug, PartialEq)]
pub struct ExposureLimits {
    /// The solvent.
    pub solvent_id: String,
    /// OSHA permissible exposure limit, 8-hour average [ppm].
    pub osha_pel_twa_ppm: Option<f64>,
    /// OSHA short-term limit [ppm].
    pub osha_stel_ppm: Option<f64>,
    /// OSHA ceiling [ppm].
    pub osha_ceiling_ppm: Option<f64>,
    /// Further OSHA figures in words.
    pub osha_note: String,
    /// Source of the OSHA group.
    pub osha_source: Source,
    /// NIOSH recommended limit, work-shift average [ppm].
    pub niosh_rel_twa_ppm: Option<f64>,
    /// NIOSH short-term limit [ppm].
    pub niosh_stel_ppm: Option<f64>,
    /// NIOSH ceiling [ppm].
    pub niosh_ceiling_ppm: Option<f64>,
    /// Further NIOSH remarks.
    pub niosh_note: String,
    /// Source of the NIOSH group.
    pub niosh_source: Source,
    /// Immediately dangerous to life or health [ppm].
    pub idlh_ppm: Option<f64>,
    /// Source of that figure.
    pub idlh_source: Source,
    /// EU indicative value, 8-hour average [ppm].
    pub eu_twa_ppm: Option<f64>,
    /// The same [mg/m³].
    pub eu_twa_mg_m3: Option<f64>,
    /// EU indicative short-term value, 15 minutes [ppm].
    pub eu_stel_ppm: Option<f64>,
    /// The same [mg/m³].
    pub eu_stel_mg_m3: Option<f64>,
    /// EU skin notation: uptake through the skin counts.
    pub eu_skin: bool,
    /// Source of the EU group.
    pub eu_source: Source,
    /// Rules of their own for this solvent, in words; often blank.
    pub special_rules: String,
    /// Source of those rules.
    pub special_source: Source,
    /// Short-term limit of those rules [ppm], where they set one.
    pub special_short_ppm: Option<f64>,
    /// Lowest of the averages above, and of the special rules [ppm]. It looks at averages
    /// only: short-term limits and ceilings hold besides.
    pub strictest_twa_ppm: Option<f64>,
    /// Which of them it is.
    pub strictest_basis: String,
    /// A remark; often blank.
    pub note: String,
}

impl ExposureLimits {
    /// Lowest short-term limit or ceiling of all the lists and rules [ppm]; `None` when none is listed.
    pub fn strictest_short_ppm(&self) -> Option<f64> {
        let all = [
            self.osha_stel_ppm,
            self.osha_ceiling_ppm,
            self.niosh_stel_ppm,
            self.niosh_ceiling_ppm,
            self.eu_stel_ppm,
            self.special_short_ppm,
        ];
        all.into_iter().flatten().reduce(f64::min)
    }
}

/// Limits of every solvent, in the order of the file.
pub fn exposure_limits() -> Vec<ExposureLimits> {
    table().items.clone()
}

/// Limits of one solvent.
pub fn exposure_limits_for(solvent_id: &str) -> Option<ExposureLimits> {
    table().items.iter().find(|limits| limits.solvent_id == solvent_id).cloned()
}

fn table() -> &'static Loaded<ExposureLimits> {
    static TABLE: OnceLock<Loaded<ExposureLimits>> = OnceLock::new();
    TABLE.get_or_init(|| load(include_str!("../../data/exposure_limits.csv"), parse))
}

fn parse(row: &Row) -> Result<ExposureLimits, String> {
    Ok(ExposureLimits {
        solvent_id: row.required("solvent_id")?,
        osha_pel_twa_ppm: row.optional_number("osha_pel_twa_ppm")?,
        osha_stel_ppm: row.optional_number("osha_stel_ppm")?,
        osha_ceiling_ppm: row.optional_number("osha_ceiling_ppm")?,
        osha_note: row.owned("osha_note")?,
        osha_source: row.source("source_osha")?,
        niosh_rel_twa_ppm: row.optional_number("niosh_rel_twa_ppm")?,
        niosh_stel_ppm: row.optional_number("niosh_stel_ppm")?,
        niosh_ceiling_ppm: row.optional_number("niosh_ceiling_ppm")?,
        niosh_note: row.owned("niosh_note")?,
        niosh_source: row.source("source_niosh")?,
        idlh_ppm: row.optional_number("idlh_ppm")?,
        idlh_source: row.source("source_idlh")?,
        eu_twa_ppm: row.optional_number("eu_twa_ppm")?,
        eu_twa_mg_m3: row.optional_number("eu_twa_mg_m3")?,
        eu_stel_ppm: row.optional_number("eu_stel_ppm")?,
        eu_stel_mg_m3: row.optional_number("eu_stel_mg_m3")?,
        eu_skin: row.yes("eu_skin")?,
        eu_source: row.source("source_eu")?,
        special_rules: row.owned("special_rules")?,
        special_source: row.source("source_special")?,
        special_short_ppm: row.optional_number("special_short_ppm")?,
        strictest_twa_ppm: row.optional_number("strictest_twa_ppm")?,
        strictest_basis: row.owned("strictest_basis")?,
        note: row.owned("note")?,
    })
}

#[cfg(test)]
mod tests {
    use super::super::solvents::{solvent, solvents};
    use super::super::sources::Checked;
    use super::*;

    #[test]
    fn every_row_parses_and_every_solvent_has_one() {
        assert_eq!(table().defects, Vec::<String>::new());
        let ids: Vec<String> = exposure_limits().into_iter().map(|limits| limits.solvent_id).collect();
        assert_eq!(ids, solvents().into_iter().map(|s| s.id).collect::<Vec<_>>());
        assert_eq!(exposure_limits_for("water"), None);
    }

    #[test]
    fn every_limit_is_in_range() {
        for l in exposure_limits() {
            let averages = [l.osha_pel_twa_ppm, l.niosh_rel_twa_ppm, l.eu_twa_ppm, l.strictest_twa_ppm];
            let short = [l.osha_stel_ppm, l.osha_ceiling_ppm, l.niosh_stel_ppm, l.niosh_ceiling_ppm, l.eu_stel_ppm];
            for ppm in averages.into_iter().chain(short).chain([l.idlh_ppm]).flatten() {
                assert!((1.0..5000.0).contains(&ppm), "{}", l.solvent_id);
            }
            assert!(l.eu_twa_ppm.zip(l.eu_stel_ppm).is_none_or(|(twa, stel)| twa < stel), "{}", l.solvent_id);
        }
    }

    /// The strictest average is at most every average listed.
    #[test]
    fn the_strictest_average_is_the_lowest() {
        for l in exposure_limits() {
            for ppm in [l.osha_pel_twa_ppm, l.niosh_rel_twa_ppm, l.eu_twa_ppm].into_iter().flatten() {
                assert!(l.strictest_twa_ppm.is_some_and(|strictest| strictest <= ppm), "{}", l.solvent_id);
            }
            assert!(!l.strictest_basis.is_empty(), "{}", l.solvent_id);
        }
    }

    /// Two printed units of one limit agree at 20 °C, where a mole of gas fills 24.06 L. The
    /// lists round to about two digits.
    #[test]
    fn eu_values_agree_between_units() {
        const MOLAR_VOLUME_20C_L_MOL: f64 = 24.06;
        const REL_TOL: f64 = 0.02;
        for l in exposure_limits() {
            let molar_mass = solvent(&l.solvent_id).unwrap().molar_mass_g_mol;
            for (ppm, mg) in [(l.eu_twa_ppm, l.eu_twa_mg_m3), (l.eu_stel_ppm, l.eu_stel_mg_m3)] {
                if let (Some(ppm), Some(mg)) = (ppm, mg) {
                    let expected = ppm * molar_mass / MOLAR_VOLUME_20C_L_MOL;
                    assert!((mg / expected - 1.0).abs() < REL_TOL, "{}: {mg} against {expected}", l.solvent_id);
                }
            }
        }
    }

    #[test]
    fn published_values_are_carried_as_printed() {
        let dichloromethane = exposure_limits_for("dichloromethane").unwrap();
        assert_eq!(dichloromethane.osha_pel_twa_ppm, Some(25.0)); // 29 CFR 1910.1052(c)
        assert_eq!(dichloromethane.osha_stel_ppm, Some(125.0)); // same
        assert_eq!(dichloromethane.strictest_twa_ppm, Some(2.0)); // 40 CFR 751.109
        assert!(dichloromethane.special_rules.contains("16 ppm"));
        assert_eq!(dichloromethane.strictest_short_ppm(), Some(16.0)); // 40 CFR 751.109
        assert_eq!(exposure_limits_for("1_butanol").unwrap().strictest_short_ppm(), Some(50.0)); // NIOSH ceiling
        assert_eq!(exposure_limits_for("mct_oil").unwrap().strictest_short_ppm(), None);
        let ester = exposure_limits_for("n_butyl_acetate").unwrap();
        assert_eq!((ester.eu_twa_ppm, ester.eu_stel_ppm), (Some(50.0), Some(150.0))); // Directive (EU) 2019/1831
        assert_eq!(ester.eu_source.checked, Checked::Read);
        let chloroform = exposure_limits_for("chloroform").unwrap();
        assert_eq!(chloroform.osha_ceiling_ppm, Some(50.0)); // 29 CFR 1910.1000 Table Z-1
        assert_eq!(chloroform.osha_pel_twa_ppm, None);
        assert!(chloroform.eu_skin);
        let ether = exposure_limits_for("mtbe").unwrap();
        assert_eq!(ether.osha_pel_twa_ppm, None);
        assert_eq!(ether.eu_source.checked, Checked::Memory);
    }
}
