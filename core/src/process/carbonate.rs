//! Giving back the carbon dioxide that left with the water.

use crate::process::acidity::CO2_MOLAR_MASS;
use crate::process::vapour::water_kpa;
use crate::solution::carbonate::dissolved_co2_mol_per_l;
use crate::study::Study;
use serde::Serialize;

/// Density of carbon dioxide at 0 °C and 101.325 kPa [g/L]; what one "volume" weighs.
pub const GAS_G_PER_L: f64 = 1.9768;
/// Temperature assumed where none is stated [°C]; common practice: carbonate cold.
pub const USUAL_C: f64 = 5.0;
/// Pressure of the atmosphere [kPa].
const ATMOSPHERE_KPA: f64 = 101.325;

/// Carbon dioxide dissolved in water under a partial pressure of `kpa` [kPa] at `t` [°C], in g/L.
///
/// `c = M·K_H(t)·p`; see [`dissolved_co2_mol_per_l`].
/// Valid: water, 0–40 °C; sugar lowers it by about a per cent for each °Brix, which is not counted.
/// Reference: Bunsen coefficients (Bohr 1899) as carried in handbooks, from memory: 2.815 g/L at
/// 5 °C and 1.736 g/L at 20 °C under 101.325 kPa.
pub fn dissolved_g_per_l(kpa: f64, t: f64) -> f64 {
    CO2_MOLAR_MASS * dissolved_co2_mol_per_l(kpa, t)
}

/// Carbon dioxide to give back to the made-up liquid.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct Recarbonation {
    /// Content of the feed, and to reach [g/L].
    pub g_per_l: f64,
    /// The same as volumes of gas at 0 °C in one of liquid [-].
    pub volumes: f64,
    /// Carbon dioxide to dissolve [g].
    pub co2_g: f64,
    /// Temperature of carbonating [°C].
    pub temperature_c: f64,
    /// Gauge pressure at which it stays dissolved there [kPa]; 0 where an open vessel holds it.
    pub gauge_kpa: f64,
    /// Gauge pressure in the closed vessel when it has warmed to 25 °C [kPa].
    pub gauge_at_25c_kpa: f64,
}

/// Carbon dioxide to give back to `made_up_ml` [mL] of the liquid of `study`, which had it in the
/// feed; none if the feed states none.
///
/// All of the feed's is taken to leave with the water. `p_gauge = c/(M·K_H(t)) + p_water(t) − 101.325
/// kPa`. The pressure at 25 °C is for a full vessel, where no gas leaves the liquid.
/// Valid and reference: [`dissolved_g_per_l`].
pub fn recarbonation(study: &Study, made_up_ml: f64) -> Option<Recarbonation> {
    let g_per_l = study.feed.co2_g_per_l.as_ref()?.value;
    let temperature_c = study.make_up.carbonate_at_c.as_ref().map_or(USUAL_C, |q| q.value);
    let gauge = |t: f64| (g_per_l / dissolved_g_per_l(1.0, t) + water_kpa(t) - ATMOSPHERE_KPA).max(0.0);
    Some(Recarbonation {
        g_per_l,
        volumes: g_per_l / GAS_G_PER_L,
        co2_g: g_per_l * made_up_ml / 1000.0,
        temperature_c,
        gauge_kpa: gauge(temperature_c),
        gauge_at_25c_kpa: gauge(25.0),
    })
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::study::parse;

    /// Bunsen table as carried in handbooks (from memory), under 101.325 kPa; other measurements lie
    /// 2 to 3 % off it from 20 °C up.
    #[test]
    fn solubility_table() {
        let table =
            [(0.0, 3.386), (5.0, 2.815), (10.0, 2.360), (15.0, 2.014), (20.0, 1.736), (25.0, 1.500), (40.0, 1.048)];
        for (t, g) in table {
            let got = dissolved_g_per_l(101.325, t);
            assert!((got / g - 1.0).abs() < 0.03, "{t}: {got}");
        }
    }

    /// By hand: 5.63 g/L is twice what 5 °C holds under one atmosphere, so about one atmosphere of
    /// gauge pressure, and 2.7 g in 480 mL.
    #[test]
    fn two_atmospheres() {
        let mut study = parse(include_str!("../../../tests/data/studies/neutral-alkaloid.json")).unwrap();
        assert_eq!(recarbonation(&study, 480.0), None);
        study.feed.co2_g_per_l = Some(5.63.into());
        let r = recarbonation(&study, 480.0).unwrap();
        assert!((r.gauge_kpa - 101.3).abs() < 4.0, "{}", r.gauge_kpa);
        assert!((r.co2_g - 2.70).abs() < 0.01 && (r.volumes - 2.85).abs() < 0.01);
        assert!(r.gauge_at_25c_kpa > r.gauge_kpa);
        study.feed.co2_g_per_l = Some(0.5.into());
        assert_eq!(recarbonation(&study, 480.0).unwrap().gauge_kpa, 0.0);
    }
}
