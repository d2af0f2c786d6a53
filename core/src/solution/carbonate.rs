//! Carbon dioxide in water: its constants against temperature.

use crate::math;

/// Kilopascals in one standard atmosphere.
const KPA_PER_ATM: f64 = 101.325;

fn of_t(t: f64, c: [f64; 5]) -> f64 {
    let k = t + 273.15;
    c[0] + c[1] * k + c[2] / k + c[3] * math::log10(k) + c[4] / (k * k)
}

/// First pKa of dissolved carbon dioxide (hydrated or not), thermodynamic [-], from `t` [°C].
///
/// `log K₁ = −356.3094 − 0.06091964 T + 21834.37/T + 126.8339 log T − 1684915/T²`, `T` [K].
/// Valid: 0–90 °C.
/// Reference: L. N. Plummer & E. Busenberg, Geochim. Cosmochim. Acta 46 (1982) 1011, coefficients
/// read in texts that quote them; 6.352 at 25 °C.
pub fn pk1(t: f64) -> f64 {
    -of_t(t, [-356.3094, -0.060_919_64, 21_834.37, 126.8339, -1_684_915.0])
}

/// Second pKa of dissolved carbon dioxide, thermodynamic [-], from `t` [°C].
///
/// `log K₂ = −107.8871 − 0.03252849 T + 5151.79/T + 38.92561 log T − 563713.9/T²`.
/// Valid and reference: as [`pk1`]; 10.329 at 25 °C.
pub fn pk2(t: f64) -> f64 {
    -of_t(t, [-107.8871, -0.032_528_49, 5_151.79, 38.92561, -563_713.9])
}

/// Dissolved carbon dioxide [mol/L] in equilibrium with its partial pressure `p_kpa` [kPa] at `t`
/// [°C].
///
/// `[CO₂] = K_H·p`, `log K_H = 108.3865 + 0.01985076 T − 6919.53/T − 40.45154 log T + 669365/T²`
/// (mol/kg/atm).
/// Valid: 0–90 °C, gas ideal, water; mol/kg taken as mol/L; salts and sugar lower it and are not
/// counted.
/// Reference: as [`pk1`]; 0.0341 mol/L at 101.325 kPa and 25 °C.
pub fn dissolved_co2_mol_per_l(p_kpa: f64, t: f64) -> f64 {
    p_kpa / KPA_PER_ATM * math::exp10(of_t(t, [108.3865, 0.019_850_76, -6_919.53, -40.451_54, 669_365.0]))
}

#[cfg(test)]
mod tests {
    use super::*;

    /// H. S. Harned & R. Davis (1943), H. S. Harned & S. R. Scholes (1941), as tabulated (from
    /// memory): pK1 6.577, 6.464, 6.352, 6.298, 6.285 and pK2 10.627, 10.490, 10.329, 10.220,
    /// 10.172 at 0, 10, 25, 40, 50 °C.
    #[test]
    fn against_the_older_measurements() {
        let table = [
            (0.0, 6.577, 10.627),
            (10.0, 6.464, 10.490),
            (25.0, 6.352, 10.329),
            (40.0, 6.298, 10.220),
            (50.0, 6.285, 10.172),
        ];
        for (t, a, b) in table {
            assert!((pk1(t) - a).abs() < 0.01 && (pk2(t) - b).abs() < 0.01, "{t}: {} {}", pk1(t), pk2(t));
        }
    }

    /// R. F. Weiss, Marine Chem. 2 (1974) 203, zero salinity, as tabulated (from memory): 0.0776 at
    /// 0 °C and 0.0341 mol/kg/atm at 25 °C.
    #[test]
    fn henry() {
        assert!((dissolved_co2_mol_per_l(101.325, 0.0) / 0.0776 - 1.0).abs() < 0.02);
        assert!((dissolved_co2_mol_per_l(101.325, 25.0) / 0.0341 - 1.0).abs() < 0.01);
    }
}
