//! K from solvation descriptors, where nothing has been measured.

use crate::library::free_energy::{Phase, descriptors, free_energy_system};
use crate::math;
use serde::Serialize;

/// Standard error where the fit reports none [log units]: root-mean-square of estimate less
/// measurement over the measured pairs of the library, rounded up; see the unit test.
pub const USUAL_ERROR: f64 = 0.2;
/// Standard error for strong hydrogen-bonders, weak sets and weak descriptors [log units].
pub const WIDE_ERROR: f64 = 0.3;
/// Hydrogen-bond acidity, or basicity, from which a solute counts as a strong hydrogen-bonder.
const STRONG_BOND: (f64, f64) = (0.5, 1.0);

/// An estimated partition coefficient.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct EstimatedK {
    /// `log10 K`, neutral form, organic over aqueous concentration.
    pub log_k: f64,
    /// Its standard error [log units].
    pub standard_error: f64,
    /// K [-].
    pub k: f64,
    /// Lower end of K, two standard errors down [-].
    pub k_low: f64,
    /// Upper end of K, two standard errors up [-].
    pub k_high: f64,
    /// What the estimate rests on, in words.
    pub source: String,
}

/// K of a solute of the library in a solvent of the library, estimated.
///
/// `log10 K = c + eE + sS + aA + bB + vV`, coefficients of the solvent saturated with water where
/// there is such a set, descriptors of the neutral solute; `B0` for `B` in wet solvents where it is
/// held. None where either is not held.
/// Valid: neutral form, dilute, 25 °C, monomer. Standard error as reported for the fit; else 0.2,
/// or 0.3 for strong hydrogen-bonders (A ≥ 0.5 or B ≥ 1), sets from memory or for dry solvent, and
/// descriptors known to fit badly.
/// Reference: M. H. Abraham et al., J. Pharm. Sci. 99 (2010) 1500. Phenol in 1-octanol: 1.54
/// (by hand from the coefficients; measured 1.48).
pub fn estimated_k(solute_id: &str, solvent_id: &str) -> Option<EstimatedK> {
    let system = free_energy_system(solvent_id)?;
    let d = descriptors(solute_id)?;
    let [c, e, s, a, b, v] = system.coefficients;
    let basicity = d.b0.filter(|_| system.phase == Phase::Wet).unwrap_or(d.b);
    let log_k = c + e * d.e + s * d.s + a * d.a + b * basicity + v * d.v;
    let wide = system.weak || d.weak || d.a >= STRONG_BOND.0 || d.b >= STRONG_BOND.1;
    let usual = if wide { WIDE_ERROR } else { USUAL_ERROR };
    let standard_error = match system.standard_error {
        Some(reported) if !wide => reported,
        Some(reported) => reported.max(usual),
        None => usual,
    };
    let set = match system.phase {
        Phase::Dry => ", set for the dry solvent",
        _ => "",
    };
    Some(EstimatedK {
        log_k,
        standard_error,
        k: math::exp10(log_k),
        k_low: math::exp10(log_k - 2.0 * standard_error),
        k_high: math::exp10(log_k + 2.0 * standard_error),
        source: format!(
            "linear free-energy estimate, log K {log_k:.2} ± {standard_error}{set}: {}; {}",
            system.source.citation, d.source.citation
        ),
    })
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::library::partition::{KBasis, published_partition};

    /// Phenol in 1-octanol by hand: 0.088 + 0.562·0.805 − 1.054·0.89 + 0.034·0.60 − 3.460·0.30 +
    /// 3.814·0.7751 = 1.541; measured 1.48 (from memory).
    #[test]
    fn phenol_in_octanol() {
        let k = estimated_k("phenol", "1_octanol").unwrap();
        assert!((k.log_k - 1.541).abs() < 1e-3, "{}", k.log_k);
        assert!((k.log_k - 1.48).abs() < 2.0 * k.standard_error);
        assert!(k.k_low < k.k && k.k < k.k_high);
    }

    #[test]
    fn what_is_not_held_is_not_estimated() {
        assert_eq!(estimated_k("sucrose", "dichloromethane"), None);
        assert_eq!(estimated_k("phenol", "water"), None);
    }

    /// Every measured K of the library that is a shaken measurement of the neutral monomer beside
    /// its estimate. Expected: the same comparison made with another program on the reference set,
    /// root-mean-square 0.19 without solubility ratios and octanol.
    #[test]
    fn measured_pairs_are_met_within_their_error() {
        let (mut sum, mut n, mut outside) = (0.0, 0.0, 0.0);
        for row in published_partition().iter().filter(|r| r.basis != KBasis::SolubilityRatio) {
            if let Some(k) = estimated_k(&row.solute_id, &row.solvent_id) {
                let off = k.log_k - math::log10(row.k);
                sum += off * off;
                n += 1.0;
                if off.abs() > 2.0 * k.standard_error {
                    outside += 1.0;
                }
            }
        }
        let rms = math::sqrt(sum / n);
        assert!(n >= 20.0 && rms < 0.25, "{n} pairs, root-mean-square {rms}");
        // Two standard errors hold about 95 %.
        assert!(outside / n <= 0.15, "{outside} of {n} pairs lie outside");
    }
}
