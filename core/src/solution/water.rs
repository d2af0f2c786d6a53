//! Water: density, viscosity and ion product against temperature.

use crate::math;

/// Density of water [g/mL] from `t` [°C], at 101 kPa.
///
/// `ρ = (999.83952 + 16.945176 t − 7.9870401e−3 t² − 46.170461e−6 t³ + 105.56302e−9 t⁴ −
/// 280.54253e−12 t⁵)/(1 + 16.879850e−3 t)` in kg/m³.
/// Valid: 0–100 °C (published range 0–150 °C), within 1e−5 g/mL.
/// Reference: G. S. Kell, J. Chem. Eng. Data 20 (1975) 97.
pub const fn density_g_per_ml(t: f64) -> f64 {
    let top = 999.839_52
        + t * (16.945_176 + t * (-7.987_040_1e-3 + t * (-46.170_461e-6 + t * (105.563_02e-9 - t * 280.542_53e-12))));
    top / (1.0 + 16.879_850e-3 * t) / 1000.0
}

/// Viscosity of water [Pa s] from `t` [°C], at 0.1 MPa.
///
/// `μ = (280.68 τ^−1.9 + 511.45 τ^−7.7 + 61.131 τ^−19.6 + 0.45903 τ^−40)·1e−6`, `τ = T/300 K`.
/// Valid: 0–100 °C here (published −20 to 110 °C), within 1 %.
/// Reference: J. Pátek, J. Hrubý, J. Klomfar, M. Součková & A. H. Harvey, J. Phys. Chem. Ref. Data
/// 38 (2009) 21; coefficients from memory, held by the published 1.7916, 1.0016, 0.8900, 0.6530,
/// 0.4660 mPa s at 0, 20, 25, 40, 60 °C.
pub fn viscosity_pa_s(t: f64) -> f64 {
    let ln_tau = math::ln((t + 273.15) / 300.0);
    let term = |a: f64, b: f64| a * math::exp(b * ln_tau);
    1e-6 * (term(280.68, -1.9) + term(511.45, -7.7) + term(61.131, -19.6) + term(0.459_03, -40.0))
}

/// Ion product of water as `pKw` [-], molal, from `t` [°C], along the saturation line.
///
/// `log Kw = −4.098 − 3245.2/T + 2.2362e5/T² − 3.984e7/T³ + (13.957 − 1262.3/T + 8.5641e5/T²) log ρ`,
/// `T` [K], `ρ` [g/cm³].
/// Valid: 0–100 °C here (published to 1000 °C), within 0.01.
/// Reference: W. L. Marshall & E. U. Franck, J. Phys. Chem. Ref. Data 10 (1981) 295; its table:
/// 14.938, 13.995, 13.275, 12.712, 12.265 at 0, 25, 50, 75, 100 °C.
pub fn pkw(t: f64) -> f64 {
    let k = 1.0 / (t + 273.15);
    let log_rho = math::log10(density_g_per_ml(t));
    let log_kw =
        -4.098 + k * (-3245.2 + k * (2.2362e5 - k * 3.984e7)) + (13.957 + k * (-1262.3 + k * 8.5641e5)) * log_rho;
    -log_kw
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Marshall & Franck (1981), table, saturated vapour column.
    #[test]
    fn ion_product_table() {
        for (t, expected) in [(0.0, 14.938), (25.0, 13.995), (50.0, 13.275), (75.0, 12.712), (100.0, 12.265)] {
            assert!((pkw(t) - expected).abs() < 0.002, "{t}: {}", pkw(t));
        }
    }

    /// Viscosity as tabulated in the CRC Handbook (from memory), within the correlation's 0.1 %.
    #[test]
    fn viscosity_table() {
        for (t, expected) in
            [(0.0, 1.7916), (20.0, 1.0016), (25.0, 0.8900), (40.0, 0.6530), (60.0, 0.4660), (100.0, 0.2818)]
        {
            let mpa_s = 1000.0 * viscosity_pa_s(t);
            assert!((mpa_s / expected - 1.0).abs() < 0.001, "{t}: {mpa_s}");
        }
    }

    /// Kell (1975) as tabulated: 0.999840, 0.998204, 0.983199 g/mL at 0, 20, 60 °C.
    #[test]
    fn density_table() {
        for (t, expected) in [(0.0, 0.999_840), (20.0, 0.998_204), (60.0, 0.983_199)] {
            assert!((density_g_per_ml(t) - expected).abs() < 2e-6, "{t}");
        }
    }
}
