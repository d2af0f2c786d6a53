//! Solvent vapour in the air of a room: a rough, cautious estimate beside the listed limits.

use crate::library::limits::ExposureLimits;
use crate::math;
use crate::process::vapour::{mg_per_m3_to_ppm, ppm_to_mg_per_m3, saturated_air};
use crate::study::Problem;

/// Length of a working shift over which averages are taken [h].
pub const SHIFT_H: f64 = 8.0;

/// What evaporates into which room.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct RoomIn {
    /// Solvent spilled or left open [mL]; all of it is taken to evaporate.
    pub volume_ml: f64,
    /// Density of the solvent [g/mL].
    pub density_g_per_ml: f64,
    /// Molar mass of the solvent [g/mol].
    pub molar_mass_g_per_mol: f64,
    /// Vapour pressure of the solvent at the room's temperature [kPa]; `None` where not held.
    pub vapour_kpa: Option<f64>,
    /// Time it takes to evaporate [h]; 0 for at once.
    pub evaporates_over_h: f64,
    /// Volume of the room [m³].
    pub room_m3: f64,
    /// Air changes [1/h]; 0 for a closed room.
    pub changes_per_h: f64,
    /// Mixing factor [-], 1 to 10: how many times worse than fully mixed the fresh air works.
    pub mixing_factor: f64,
    /// Temperature [°C].
    pub temperature_c: f64,
    /// Pressure of the air [kPa].
    pub pressure_kpa: f64,
}

/// The air of the room, well mixed.
#[derive(Clone, Debug, PartialEq)]
pub struct RoomAir {
    /// Highest concentration, when evaporation ends [mg/m³].
    pub peak_mg_per_m3: f64,
    /// The same [ppm by volume].
    pub peak_ppm: f64,
    /// Average over 8 hours from the start [ppm].
    pub mean_8h_ppm: f64,
    /// Share that saturated air would hold [ppm]; `None` where the vapour pressure is not held.
    pub saturated_ppm: Option<f64>,
    /// What is assumed, and what is not counted, in plain sentences. To be shown with the numbers.
    pub assumptions: Vec<String>,
}

/// The air beside the limits: fractions of each, where it is listed; above 1 is over the limit.
#[derive(Clone, Debug, PartialEq)]
pub struct BesideLimits {
    /// Average over 8 hours, over the lowest listed average [-].
    pub mean_over_twa: Option<f64>,
    /// Peak over the lowest listed average [-].
    pub peak_over_twa: Option<f64>,
    /// Peak over the lowest listed short-term limit or ceiling [-].
    pub peak_over_short_term: Option<f64>,
    /// Peak over the lower explosive limit [-].
    pub peak_over_lel: Option<f64>,
    /// Time from the start until the air is below the lowest listed average [h]; `None` where none
    /// is listed, or the room is closed and it stays above.
    pub hours_to_twa: Option<f64>,
    /// The same for the short-term limit [h].
    pub hours_to_short_term: Option<f64>,
}

/// Concentration [mg/m³] at `t_h` [h] in a room that is fed for `RoomIn::evaporates_over_h`.
///
/// `V·dc/dt = G − (n/m)·V·c`: `c = G/(nV)·(1 − e^−nt)` while it evaporates, `e^−nt` after.
/// At once: `c₀ = m/V`. `n` air changes over the mixing factor.
/// Valid: well mixed; no sink but ventilation.
/// Reference: single-zone mass balance; G 200 mg/h, 50 m³/h, 40 m³: 1.859 mg/m³ after 0.5 h.
pub fn concentration_mg_per_m3(room: &RoomIn, t_h: f64) -> f64 {
    let full = room.volume_ml * room.density_g_per_ml * 1000.0 / room.room_m3;
    let n = room.changes_per_h / room.mixing_factor;
    let fed = room.evaporates_over_h;
    if fed <= 0.0 {
        return full * math::exp(-n * t_h);
    }
    let during = t_h.min(fed);
    let x = n * during;
    // (1 − e^−x)/x, which is 1 where nothing is exchanged.
    let kept = if x > 1e-9 { (1.0 - math::exp(-x)) / x } else { 1.0 - 0.5 * x };
    full * (during / fed) * kept * math::exp(-n * (t_h - during))
}

/// Air of the room after a spill or an open evaporation.
///
/// Peak at the end of evaporation by [`concentration_mg_per_m3`]; 8-hour average by the integral of
/// the same balance, `(m/V − c(8 h) − what has still to evaporate)/(n·8 h)`.
/// Valid: an order of magnitude. Near the source the air is richer, up to saturation.
/// Reference: J. Kuo, Practical Design Calculations, 2nd ed., Example 2.4: 600 mL of
/// dichloromethane in 108 m³ give 2100 ppm.
///
/// # Errors
/// A volume, room, density, molar mass, pressure that is not above 0; a mixing factor outside 1 to
/// 10; negative time or air changes.
pub fn room_air(room: &RoomIn) -> Result<RoomAir, Problem> {
    let positive = [
        ("volume", room.volume_ml, "mL"),
        ("density", room.density_g_per_ml, "g/mL"),
        ("molar mass", room.molar_mass_g_per_mol, "g/mol"),
        ("room", room.room_m3, "m³"),
        ("pressure", room.pressure_kpa, "kPa"),
    ];
    for (what, value, unit) in positive {
        if !(value > 0.0 && value.is_finite()) {
            return Err(Problem::new("room", format!("{what} {value} {unit}; it must be above 0")));
        }
    }
    if !(1.0..=10.0).contains(&room.mixing_factor) {
        let words = "1 for fully mixed, 3 for a common room, up to 10";
        return Err(Problem::new("room", format!("mixing factor {}; take {words}", room.mixing_factor)));
    }
    for (what, value) in [("time to evaporate", room.evaporates_over_h), ("air changes per hour", room.changes_per_h)] {
        if !(value >= 0.0 && value.is_finite()) {
            return Err(Problem::new("room", format!("{what} {value}; it must be 0 or more")));
        }
    }
    if !(-40.0..=60.0).contains(&room.temperature_c) {
        return Err(Problem::new("room", format!("temperature {} °C; take −40 to 60", room.temperature_c)));
    }
    let ppm = |mg: f64| mg_per_m3_to_ppm(mg, room.molar_mass_g_per_mol, room.temperature_c, room.pressure_kpa).min(1e6);
    let peak = concentration_mg_per_m3(room, room.evaporates_over_h);
    let full = room.volume_ml * room.density_g_per_ml * 1000.0 / room.room_m3;
    let n = room.changes_per_h / room.mixing_factor;
    let entered = if room.evaporates_over_h > SHIFT_H { full * SHIFT_H / room.evaporates_over_h } else { full };
    let mean = if n * SHIFT_H > 1e-6 {
        (entered - concentration_mg_per_m3(room, SHIFT_H)) / (n * SHIFT_H)
    } else {
        // Closed room: it rises while it evaporates and then stays.
        let fed = room.evaporates_over_h.min(SHIFT_H);
        entered * (1.0 - 0.5 * fed / SHIFT_H)
    };
    let saturated_ppm =
        room.vapour_kpa.map(|p| saturated_air(p, room.molar_mass_g_per_mol, room.temperature_c, room.pressure_kpa).ppm);
    let mut assumptions = vec![
        "All of it evaporates; nothing is wiped up, absorbed or drawn off at the source.".to_owned(),
        "The air is taken as mixed. Near the spill, and at the floor for a heavy vapour, it is richer, \
         up to saturation: this number does not speak for the breathing zone beside it."
            .to_owned(),
    ];
    if room.evaporates_over_h <= 0.0 {
        assumptions.push("It evaporates at once, which gives the highest peak.".to_owned());
    }
    if saturated_ppm.is_some_and(|s| ppm(peak) > s) {
        assumptions.push(
            "More than saturated air can hold: part of it stays liquid and goes on evaporating longer than shown."
                .to_owned(),
        );
    }
    Ok(RoomAir { peak_mg_per_m3: peak, peak_ppm: ppm(peak), mean_8h_ppm: ppm(mean), saturated_ppm, assumptions })
}

/// Time from the start until the air is below `limit_ppm` [ppm] for good [h]; 0 where it never
/// passes it, `None` where it stays above.
///
/// `t = t_end + ln(c_end/L)/n`; the decay after the end of evaporation.
/// Valid: as [`concentration_mg_per_m3`].
/// Reference: single-zone decay; one air change takes out 63 %.
pub fn hours_to_limit(room: &RoomIn, limit_ppm: f64) -> Option<f64> {
    let limit = ppm_to_mg_per_m3(limit_ppm, room.molar_mass_g_per_mol, room.temperature_c, room.pressure_kpa);
    let peak = concentration_mg_per_m3(room, room.evaporates_over_h);
    if !(limit > 0.0 && peak >= 0.0) {
        return None;
    }
    if peak <= limit {
        return Some(0.0);
    }
    let n = room.changes_per_h / room.mixing_factor;
    (n > 0.0).then(|| room.evaporates_over_h.max(0.0) + math::ln(peak / limit) / n)
}

/// The air of the room beside the listed limits of the solvent; `lel_vol_pct` [volume percent].
///
/// The lowest of the lists counts, averages apart from short-term limits and ceilings.
pub fn beside_limits(room: &RoomIn, air: &RoomAir, limits: &ExposureLimits, lel_vol_pct: Option<f64>) -> BesideLimits {
    let twa = limits.strictest_twa_ppm;
    let short = limits.strictest_short_ppm();
    BesideLimits {
        mean_over_twa: twa.map(|l| air.mean_8h_ppm / l),
        peak_over_twa: twa.map(|l| air.peak_ppm / l),
        peak_over_short_term: short.map(|l| air.peak_ppm / l),
        peak_over_lel: lel_vol_pct.map(|l| air.peak_ppm / (l * 1e4)),
        hours_to_twa: twa.and_then(|l| hours_to_limit(room, l)),
        hours_to_short_term: short.and_then(|l| hours_to_limit(room, l)),
    }
}

/// Fresh air [m³/h] that holds a steady evaporation of `g_per_h` [g/h] at `limit_mg_per_m3` [mg/m³].
///
/// `Q = G·m/L`, `mixing_factor` m [-]. `None` unless the limit is above 0.
/// Reference: ACGIH, Industrial Ventilation, dilution ventilation (methyl ethyl ketone, 3750 cfm).
pub fn dilution_air_m3_per_h(g_per_h: f64, limit_mg_per_m3: f64, mixing_factor: f64) -> Option<f64> {
    (limit_mg_per_m3 > 0.0).then(|| g_per_h * 1000.0 * mixing_factor / limit_mg_per_m3)
}

#[cfg(test)]
mod tests;
