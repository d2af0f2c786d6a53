use super::*;
use crate::library::limits::exposure_limits_for;
use crate::process::vapour::ATMOSPHERE_KPA;

fn spill() -> RoomIn {
    RoomIn {
        volume_ml: 600.0,
        density_g_per_ml: 1.335,
        molar_mass_g_per_mol: 84.93,
        vapour_kpa: Some(47.5),
        evaporates_over_h: 0.0,
        room_m3: 108.0,
        changes_per_h: 0.0,
        mixing_factor: 1.0,
        temperature_c: 20.0,
        pressure_kpa: ATMOSPHERE_KPA,
    }
}

/// J. Kuo, Practical Design Calculations, 2nd ed., Example 2.4 (statement read, answer recomputed).
#[test]
fn a_spill_in_a_closed_room() {
    let air = room_air(&spill()).unwrap();
    assert!((air.peak_mg_per_m3 - 7417.0).abs() < 5.0 && (air.peak_ppm - 2100.0).abs() < 6.0);
    assert!((air.mean_8h_ppm - air.peak_ppm).abs() < 1e-6);
    let limits = exposure_limits_for("dichloromethane").unwrap();
    let beside = beside_limits(&spill(), &air, &limits, Some(13.0));
    // The strictest average is 2 ppm and the strictest short-term limit 16 ppm (40 CFR 751.109).
    assert!((beside.peak_over_twa.unwrap() - 1050.0).abs() < 3.0);
    assert!((beside.peak_over_short_term.unwrap() - 131.25).abs() < 0.4);
    assert!((beside.peak_over_lel.unwrap() - 2100.0 / 130_000.0).abs() < 1e-4);
    assert_eq!(beside.hours_to_twa, None);
}

/// The average is the integral of the concentration: against a sum of small steps.
#[test]
fn the_average_is_the_integral() {
    for (fed, n) in [(0.0, 0.5), (0.5, 3.0), (12.0, 2.0), (3.0, 0.0), (12.0, 0.0)] {
        let room = RoomIn { evaporates_over_h: fed, changes_per_h: n, mixing_factor: 2.0, ..spill() };
        let steps = 80_000;
        let dt = SHIFT_H / f64::from(steps);
        let sum: f64 = (0..steps).map(|i| concentration_mg_per_m3(&room, (f64::from(i) + 0.5) * dt) * dt).sum();
        let mean = ppm_to_mg_per_m3(room_air(&room).unwrap().mean_8h_ppm, 84.93, 20.0, ATMOSPHERE_KPA);
        assert!((sum / SHIFT_H / mean - 1.0).abs() < 1e-4, "{fed} {n}: {sum} {mean}");
    }
}

#[test]
fn the_time_to_a_limit_is_when_it_is_met() {
    let room = RoomIn { evaporates_over_h: 0.5, changes_per_h: 3.0, ..spill() };
    let t = hours_to_limit(&room, 100.0).unwrap();
    let at = mg_per_m3_to_ppm(concentration_mg_per_m3(&room, t), 84.93, 20.0, ATMOSPHERE_KPA);
    assert!((at - 100.0).abs() < 1e-6);
    assert_eq!(hours_to_limit(&room, 1e6), Some(0.0));
    assert_eq!(hours_to_limit(&room, 0.0), None);
}

#[test]
fn assumptions_are_told_and_bad_input_refused() {
    let air = room_air(&RoomIn { room_m3: 0.3, ..spill() }).unwrap();
    assert!(air.assumptions.iter().any(|a| a.contains("richer")));
    assert!(air.assumptions.iter().any(|a| a.contains("stays liquid")));
    for bad in [0.0, -1.0, f64::NAN, f64::INFINITY] {
        assert!(room_air(&RoomIn { room_m3: bad, ..spill() }).is_err());
        assert!(room_air(&RoomIn { mixing_factor: bad, ..spill() }).is_err());
    }
    assert!(room_air(&RoomIn { changes_per_h: -1.0, ..spill() }).is_err());
    assert!(room_air(&RoomIn { temperature_c: f64::NAN, ..spill() }).is_err());
}
