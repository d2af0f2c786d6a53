//! From extract to isolate: washing with water or brine, drying, rinsing what clings.

use super::isolate::WATER_MOLAR_MASS;
use crate::math;

/// Fraction of a solute kept in the extract [-] through washes of `washes_ml` [mL] each.
///
/// `Π D·V_o/(D·V_o + V_w)`; `d` organic over aqueous at the wash's pH [-], `organic_ml` [mL].
/// Valid: equilibrium at each wash, clean parting, volumes unchanged. Brine raises D: take the D
/// measured with it.
/// Reference: single-stage partition with the phases exchanged, Ostwald's washing formula.
pub fn kept_after_washes(d: f64, organic_ml: f64, washes_ml: &[f64]) -> f64 {
    washes_ml.iter().map(|v| d * organic_ml / (d * organic_ml + v)).product()
}

/// Water in a wet extract [g].
///
/// `m = V·ρ·w/100`; `volume_ml` [mL], `density_g_per_ml` [g/mL], `water_mass_pct` [mass percent of
/// the saturated phase].
/// Valid: saturated and clear; droplets come on top. A wash with saturated brine lowers it.
/// Reference: definition; 250 mL of ethyl acetate at 3.3 %: 7.4 g.
pub fn water_in_extract_g(volume_ml: f64, density_g_per_ml: f64, water_mass_pct: f64) -> f64 {
    volume_ml * density_g_per_ml * water_mass_pct / 100.0
}

/// Water bound by one gram of an anhydrous salt as its hydrate [g/g].
///
/// `n·18.015/M`; `molar_mass` of the anhydrous salt [g/mol], `waters` [mol/mol].
/// Reference: stoichiometry; calcium sulfate hemihydrate 6.6 % (G. R. Robertson, Laboratory
/// Practice of Organic Chemistry, 3rd ed., 1954).
pub fn hydrate_capacity(molar_mass: f64, waters: f64) -> f64 {
    waters * WATER_MOLAR_MASS / molar_mass
}

/// A salt that dries by forming a hydrate.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct DryingAgent {
    /// Key, e.g. `mgso4`.
    pub id: &'static str,
    /// Name as shown.
    pub name: &'static str,
    /// Molar mass of the anhydrous salt [g/mol]; IUPAC atomic weights.
    pub molar_mass: f64,
    /// Waters of the hydrate taken as full [mol/mol].
    pub waters: f64,
    /// Share of that capacity reached in ordinary use [-].
    pub practical_fraction: f64,
    /// What to know.
    pub note: &'static str,
    /// Where the practical share comes from.
    pub source: &'static str,
}

/// Salts offered for drying an extract. The practical shares are estimates from common practice:
/// put your own in their place.
pub const DRYING_AGENTS: [DryingAgent; 3] = [
    DryingAgent {
        id: "mgso4",
        name: "magnesium sulfate",
        molar_mass: 120.37,
        waters: 7.0,
        practical_fraction: 0.3,
        note: "Fast and thorough, slightly acidic. Higher hydrates hold water loosely: the last step gives 0.15 g/g.",
        source: "common practice, from memory (0.15 to 0.75 g/g printed)",
    },
    DryingAgent {
        id: "na2so4",
        name: "sodium sulfate",
        molar_mass: 142.04,
        waters: 10.0,
        practical_fraction: 0.3,
        note: "Slow, large capacity, not thorough: useless above 32 °C, where the hydrate gives its water up.",
        source: "common practice, from memory",
    },
    DryingAgent {
        id: "cacl2",
        name: "calcium chloride",
        molar_mass: 110.98,
        waters: 2.0,
        practical_fraction: 0.5,
        note: "Thorough, but holds on to alcohols, amines, phenols and acids: not for an alkaloid or an acid target.",
        source: "common practice, from memory",
    },
];

/// Drying agent needed [g] for `water_g` [g] of water.
///
/// `m = water/(capacity·share)`; `capacity_g_per_g` [g/g], `practical_fraction` [-]; share 1 is the
/// stoichiometric least. `None` unless both are above 0 and the water is not negative.
/// Reference: stoichiometry, [`hydrate_capacity`]; 7.425 g of water and sodium sulfate: 5.86 g at least.
pub fn agent_needed_g(water_g: f64, capacity_g_per_g: f64, practical_fraction: f64) -> Option<f64> {
    let works = capacity_g_per_g * practical_fraction;
    (works > 0.0 && practical_fraction <= 1.0 && water_g >= 0.0 && water_g.is_finite()).then(|| water_g / works)
}

/// Fraction of what clung to a wet solid or a wall that is recovered [-] by rinses of `rinses_ml`
/// [mL] each, drained back to the hold-up `held_ml` [mL] every time.
///
/// `1 − Π h/(h + v)`.
/// Valid: each rinse mixes fully with what is held; nothing is adsorbed.
/// Reference: Ostwald's washing formula, A. I. Vogel, Quantitative Inorganic Analysis.
pub fn recovered_by_rinses(held_ml: f64, rinses_ml: &[f64]) -> f64 {
    1.0 - rinses_ml.iter().map(|v| held_ml / (held_ml + v)).product::<f64>()
}

/// Volume of each of `n` equal rinses [mL] that leaves the fraction `left` [-] of what clung.
///
/// `v = h·(left^(−1/n) − 1)`; the same relation. `None` for no rinse or `left` outside 0 to 1.
/// Reference: as [`recovered_by_rinses`].
pub fn rinse_volume_ml(held_ml: f64, n: u32, left: f64) -> Option<f64> {
    (n > 0 && left > 0.0 && left <= 1.0).then(|| held_ml * (math::pow(left, -1.0 / f64::from(n)) - 1.0))
}

#[cfg(test)]
mod tests {
    use super::*;

    /// G. R. Robertson (1954), p. 147: calcium sulfate takes up 6.6 %. Stoichiometry for the rest.
    #[test]
    fn capacities() {
        assert!((hydrate_capacity(136.14, 0.5) - 0.066).abs() < 5e-4);
        let capacity = |i: usize| hydrate_capacity(DRYING_AGENTS[i].molar_mass, DRYING_AGENTS[i].waters);
        assert!((capacity(1) - 1.268).abs() < 1e-3 && (capacity(2) - 0.3247).abs() < 5e-4);
        for a in DRYING_AGENTS {
            let g = agent_needed_g(1.0, hydrate_capacity(a.molar_mass, a.waters), a.practical_fraction).unwrap();
            assert!((1.0..10.0).contains(&g), "{}: {g}", a.name);
        }
        for bad in [0.0, -1.0, f64::NAN, 1.5] {
            assert_eq!(agent_needed_g(1.0, 1.0, bad), None);
        }
    }

    #[test]
    fn washes_and_rinses() {
        assert!((kept_after_washes(20.0, 100.0, &[25.0, 25.0]) - 0.975_46).abs() < 1e-5);
        assert_eq!(kept_after_washes(20.0, 100.0, &[]), 1.0);
        assert!((recovered_by_rinses(5.0, &[10.0; 3]) - 0.962_96).abs() < 1e-5);
        let v = rinse_volume_ml(2.0, 3, 0.001).unwrap();
        assert!((v - 18.0).abs() < 1e-9);
        assert!((recovered_by_rinses(2.0, &[v; 3]) - 0.999).abs() < 1e-12);
        assert_eq!(rinse_volume_ml(2.0, 0, 0.1), None);
        assert_eq!(rinse_volume_ml(2.0, 3, f64::NAN), None);
    }
}
