//! What a spill of the solvent in use would make of the air of the room, in a plan.

use crate::judgement::air::{BesideLimits, RoomAir, RoomIn, beside_limits, room_air};
use crate::library::limits::exposure_limits_for;
use crate::library::solvents::solvent;
use crate::process::vapour::ATMOSPHERE_KPA;
use crate::study::Study;
use serde::Serialize;

/// Room assumed where none is stated [m³]: a small laboratory; common practice.
pub const USUAL_ROOM_M3: f64 = 50.0;
/// Air changes assumed where none are stated [1/h]: a room without a running fume cupboard; common
/// practice.
pub const USUAL_CHANGES_PER_H: f64 = 2.0;
/// How many times worse than fully mixed the fresh air is taken to work [-]; common practice.
pub const MIXING_FACTOR: f64 = 3.0;
/// Temperature of the room [°C].
const ROOM_C: f64 = 20.0;

/// The air of the room after a spill.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct SpillPlan {
    /// Solvent spilled [mL].
    pub spill_ml: f64,
    /// Volume of the room [m³].
    pub room_m3: f64,
    /// Air changes [1/h].
    pub changes_per_h: f64,
    /// Highest concentration, well mixed [ppm].
    pub peak_ppm: f64,
    /// Average over 8 hours, well mixed [ppm].
    pub mean_8h_ppm: f64,
    /// The peak over the lowest listed short-term limit [-].
    #[serde(skip_serializing_if = "Option::is_none")]
    pub peak_over_short_term: Option<f64>,
    /// The average over the lowest listed average [-].
    #[serde(skip_serializing_if = "Option::is_none")]
    pub mean_over_average: Option<f64>,
    /// The peak over the lower explosive limit [-].
    #[serde(skip_serializing_if = "Option::is_none")]
    pub peak_over_explosive: Option<f64>,
    /// Time until the air is below the lowest listed average [h]; none if it stays above or none is
    /// listed.
    #[serde(skip_serializing_if = "Option::is_none")]
    pub hours_to_average: Option<f64>,
    /// What is assumed.
    pub assumptions: Vec<String>,
}

/// The air of the room if `all_ml` [mL] of the solvent of `study`, or what it states, is spilled;
/// none for a solvent that the library does not hold, or none spilled.
///
/// Evaporates at once; room, air changes and mixing as stated or as assumed above. See
/// [`crate::judgement::air`].
/// Valid: an order of magnitude, for a warning.
/// Reference: as there.
pub fn spill(study: &Study, all_ml: f64) -> Option<SpillPlan> {
    let s = solvent(&study.solvent.id)?;
    let stated = &study.room;
    let spill_ml = stated.spill_ml.as_ref().map_or(all_ml, |q| q.value);
    let room = RoomIn {
        volume_ml: spill_ml,
        density_g_per_ml: s.density_20c_g_ml,
        molar_mass_g_per_mol: s.molar_mass_g_mol,
        vapour_kpa: s.vapour_pressure_20c_kpa,
        evaporates_over_h: 0.0,
        room_m3: stated.volume_m3.as_ref().map_or(USUAL_ROOM_M3, |q| q.value),
        changes_per_h: stated.changes_per_h.as_ref().map_or(USUAL_CHANGES_PER_H, |q| q.value),
        mixing_factor: MIXING_FACTOR,
        temperature_c: ROOM_C,
        pressure_kpa: ATMOSPHERE_KPA,
    };
    // A solvent without vapour, such as an oil, makes none of the air.
    s.vapour_pressure_20c_kpa?;
    let air = room_air(&room).ok()?;
    let beside = exposure_limits_for(&s.id).map(|l| beside_limits(&room, &air, &l, s.lel_vol_pct));
    let RoomAir { peak_ppm, mean_8h_ppm, mut assumptions, .. } = air;
    assumptions.push(format!("The fresh air works a third as well as if it mixed fully (factor {MIXING_FACTOR})."));
    let of = |f: fn(&BesideLimits) -> Option<f64>| beside.as_ref().and_then(f);
    Some(SpillPlan {
        spill_ml,
        room_m3: room.room_m3,
        changes_per_h: room.changes_per_h,
        peak_ppm,
        mean_8h_ppm,
        peak_over_short_term: of(|b| b.peak_over_short_term),
        mean_over_average: of(|b| b.mean_over_twa),
        peak_over_explosive: of(|b| b.peak_over_lel),
        hours_to_average: of(|b| b.hours_to_twa),
        assumptions,
    })
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::study::parse;

    /// By hand: 75 mL of dichloromethane, 1.3266 g/mL, in 50 m³: 1990 mg/m³, and 24.055 L/mol at
    /// 20 °C over 84.93 g/mol: 564 ppm, 35 times 16 ppm (40 CFR 751.109).
    #[test]
    fn the_portions_of_the_first_demo_on_the_floor() {
        let mut study = parse(include_str!("../../../tests/data/studies/neutral-alkaloid.json")).unwrap();
        let plan = spill(&study, 75.0).unwrap();
        assert!((plan.peak_ppm - 563.6).abs() < 1.0, "{}", plan.peak_ppm);
        assert!((plan.peak_over_short_term.unwrap() - 35.2).abs() < 0.1);
        assert!(plan.mean_8h_ppm < plan.peak_ppm && plan.hours_to_average.unwrap() > 1.0);
        study.room.spill_ml = Some(7.5.into());
        assert!((spill(&study, 75.0).unwrap().peak_ppm - 56.36).abs() < 0.1);
        study.solvent.id = "soybean_oil".into();
        assert_eq!(spill(&study, 75.0), None);
    }
}
