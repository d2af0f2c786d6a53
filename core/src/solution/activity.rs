//! Activity coefficients of ions in dilute solution.

use crate::library::activity::{DebyeHueckel, debye_hueckel};
use crate::math;

/// Highest ionic strength the Davies equation is used at [mol/L].
pub const DAVIES_MAX_MOL_PER_L: f64 = 0.5;

/// Debye–Hückel constant `A` [(kg/mol)^½], decimal logarithms, from `t` [°C].
///
/// Straight line between the rows of the table (every 5 °C, error below 0.0001), the last one
/// carried on above 60 °C.
/// Valid: 0–60 °C; to 100 °C within 2 % by the last slope.
/// Reference: computed from the permittivity of D. J. Bradley & K. S. Pitzer, J. Phys. Chem. 83
/// (1979) 1599 (from memory); 0.5100 at 25 °C, where older tables read 0.5085–0.5115.
pub fn debye_hueckel_a(t: f64) -> f64 {
    let between = |low: &DebyeHueckel, high: &DebyeHueckel| {
        low.a_log10_molal + (t - low.t_c) / (high.t_c - low.t_c) * (high.a_log10_molal - low.a_log10_molal)
    };
    let rows = debye_hueckel();
    let last = rows.len().saturating_sub(2);
    match rows.windows(2).enumerate().find(|(i, pair)| *i == last || t < pair[1].t_c) {
        Some((_, pair)) => between(&pair[0], &pair[1]),
        None => 0.51,
    }
}

/// `log10 γ` of an ion per square of its charge [-], from the ionic strength `i` [mol/L] and the
/// Debye–Hückel constant `a`.
///
/// `log10 γ = z²·(−A)(√I/(1 + √I) − 0.3 I)`.
/// Valid: I ≤ 0.5 mol/L; above it the value at 0.5 is held (the equation would let every ion
/// become ever more active), so that what follows stays continuous. Molality (mol/kg of water) is
/// taken as mol/L of solution: good to 1–2 % of a concentration in dilute liquids, worse in sugar
/// liquors, whose effect on activities is not modelled either. Net-neutral species have γ = 1.
/// Reference: C. W. Davies, Ion Association (1962), with 0.3 for the linear term; γ± of 0.1 mol/kg
/// HCl is 0.796, of NaCl 0.778 (R. A. Robinson & R. H. Stokes, Electrolyte Solutions, 1959).
pub fn log_gamma_per_z2(i: f64, a: f64) -> f64 {
    let i = if i > 0.0 { i.min(DAVIES_MAX_MOL_PER_L) } else { 0.0 };
    let root = math::sqrt(i);
    -a * (root / (1.0 + root) - 0.3 * i)
}

/// Activity coefficient [-] of an ion of charge `z` at ionic strength `i` [mol/L] and `t` [°C].
///
/// `γ = 10^(z²·log_gamma_per_z2)`; validity and reference as [`log_gamma_per_z2`].
pub fn davies(z: i32, i: f64, t: f64) -> f64 {
    let z = f64::from(z);
    math::exp10(z * z * log_gamma_per_z2(i, debye_hueckel_a(t)))
}

/// Ionic strength [mol/L] of ions given as (charge, concentration [mol/L]).
///
/// `I = ½ Σ c z²`. Valid: complete dissociation, no ion pairs.
/// Reference: definition; H. D. Crockford & S. B. Knight, Fundamentals of Physical Chemistry,
/// Example 6.2: 0.0075 mol/L.
pub fn ionic_strength(ions: &[(i32, f64)]) -> f64 {
    let mut sum = 0.0;
    for (z, c) in ions {
        sum += c * f64::from(*z) * f64::from(*z);
    }
    0.5 * sum
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Table: 0.5100 at 25 °C, 0.4908 at 0 °C, 0.5459 at 60 °C; 27.5 °C lies between 0.5100 and
    /// 0.5145.
    #[test]
    fn constant_against_temperature() {
        for (t, a) in [(0.0, 0.4908), (25.0, 0.5100), (27.5, 0.512_25), (60.0, 0.5459)] {
            assert!((debye_hueckel_a(t) - a).abs() < 1e-12, "{t}");
        }
        // The same permittivity equation worked out at 100 °C: molal A 0.5985 (from memory).
        assert!((debye_hueckel_a(100.0) / 0.5985 - 1.0).abs() < 0.02);
    }

    /// Robinson & Stokes (1959), Appendix 8.10 (from memory): γ± of NaCl at 25 °C 0.903, 0.822 and
    /// 0.778 at 0.01, 0.05 and 0.1 mol/kg. The equation is general, hence within 0.01.
    #[test]
    fn sodium_chloride() {
        for (i, published) in [(0.01, 0.903), (0.05, 0.822), (0.1, 0.778)] {
            assert!((davies(1, i, 25.0) - published).abs() < 0.01, "{i}: {}", davies(1, i, 25.0));
        }
    }

    #[test]
    fn held_above_its_range_and_sound_for_nonsense() {
        assert_eq!(davies(2, 0.5, 25.0), davies(2, 50.0, 25.0));
        assert_eq!(davies(3, -1.0, 25.0), 1.0);
        assert_eq!(davies(3, f64::NAN, 25.0), 1.0);
        assert_eq!(davies(0, 0.3, 25.0), 1.0);
    }

    /// Crockford & Knight, Example 6.2.
    #[test]
    fn mixed_salts() {
        let i = ionic_strength(&[(1, 0.001), (-1, 0.002), (2, 0.002), (-1, 0.004)]);
        assert!((i - 0.0075).abs() < 1e-12, "{i}");
    }
}
