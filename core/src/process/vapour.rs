//! Vapour pressure and boiling point of water.

use crate::math;

/// Critical temperature of water [K] and pressure [kPa].
const CRITICAL: (f64, f64) = (647.096, 22_064.0);
/// Temperatures for which the equation holds [°C].
pub const WATER_RANGE_C: (f64, f64) = (0.01, 373.9);

/// Vapour pressure of water [kPa] at `t` [°C].
///
/// `ln(p/p_c) = (T_c/T)(a₁τ + a₂τ^1.5 + a₃τ³ + a₄τ^3.5 + a₅τ⁴ + a₆τ^7.5)`, `τ = 1 − T/T_c`.
/// Valid: 0.01–373.9 °C, within 0.03 %; clamped to that range. What is dissolved lowers it: sugar
/// raises the boiling point by half a kelvin at 30 °Brix.
/// Reference: W. Wagner & A. Pruß, J. Phys. Chem. Ref. Data 22 (1993) 783; 101.325 kPa at
/// 99.974 °C.
pub fn water_vapour_pressure_kpa(t: f64) -> f64 {
    let kelvin = t.clamp(WATER_RANGE_C.0, WATER_RANGE_C.1) + 273.15;
    let tau = 1.0 - kelvin / CRITICAL.0;
    let half = math::sqrt(tau);
    let t3 = tau * tau * tau;
    let sum = -7.859_517_83 * tau + 1.844_082_59 * tau * half - 11.786_649_7 * t3 + 22.680_741_1 * t3 * half
        - 15.961_871_9 * t3 * tau
        + 1.801_225_02 * t3 * t3 * tau * half;
    CRITICAL.1 * math::exp(CRITICAL.0 / kelvin * sum)
}

/// Boiling point of water [°C] at `kpa` [kPa]; none below its triple point or above its critical
/// point.
///
/// The temperature at which [`water_vapour_pressure_kpa`] is `kpa`, by bisection.
/// Valid and reference: as there; 32.88 °C at 5 kPa (steam tables).
pub fn water_boiling_point_c(kpa: f64) -> Option<f64> {
    let (mut low, mut high) = WATER_RANGE_C;
    if !(kpa >= water_vapour_pressure_kpa(low) && kpa <= water_vapour_pressure_kpa(high)) {
        return None;
    }
    for _ in 0..60 {
        let middle = 0.5 * (low + high);
        if water_vapour_pressure_kpa(middle) < kpa { low = middle } else { high = middle }
    }
    Some(0.5 * (low + high))
}

#[cfg(test)]
mod tests {
    use super::*;

    /// IAPWS-IF97 verification values, region 4: 3.53658941 kPa at 300 K, 372.755919 K at 100 kPa
    /// (from memory); steam tables: 2.339, 7.384, 12.35, 19.94 and 47.39 kPa at 20, 40, 50, 60 and
    /// 80 °C, 32.88 °C at 5 kPa, 81.33 °C at 50 kPa.
    #[test]
    fn steam_tables() {
        assert!((water_vapour_pressure_kpa(26.85) / 3.536_589_41 - 1.0).abs() < 5e-4);
        for (t, p) in [(20.0, 2.339), (40.0, 7.384), (50.0, 12.35), (60.0, 19.94), (80.0, 47.39)] {
            assert!((water_vapour_pressure_kpa(t) / p - 1.0).abs() < 1e-3, "{t}");
        }
        for (p, t) in [(100.0, 99.605_919), (5.0, 32.88), (50.0, 81.33)] {
            assert!((water_boiling_point_c(p).unwrap() - t).abs() < 0.02, "{p}");
        }
        for none in [0.0, -1.0, f64::NAN, 1e9] {
            assert_eq!(water_boiling_point_c(none), None);
        }
    }
}
