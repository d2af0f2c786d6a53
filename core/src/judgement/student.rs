//! Student's t for whole degrees of freedom.

use crate::math;

/// Probability [-] that |t| stays below `t` with `dof` degrees of freedom.
///
/// The finite sums in `cos²θ`, `θ = atan(t/√ν)`, for even and odd ν.
/// Valid: whole ν above 0.
/// Reference: M. Abramowitz & I. A. Stegun, Handbook of Mathematical Functions, 26.7.3 and 26.7.4.
pub fn student_inside(t: f64, dof: u32) -> f64 {
    let nu = f64::from(dof);
    let cos2 = nu / (nu + t * t);
    let sin = t / math::sqrt(nu + t * t);
    let odd = dof % 2 == 1;
    let (mut term, mut sum) = (1.0, if dof == 1 { 0.0 } else { 1.0 });
    let mut k = if odd { 3 } else { 2 };
    while k + 1 < dof {
        term *= cos2 * f64::from(k - 1) / f64::from(k);
        sum += term;
        k += 2;
    }
    if odd {
        (math::atan(t / math::sqrt(nu)) + sin * math::sqrt(cos2) * sum) * core::f64::consts::FRAC_2_PI
    } else {
        sin * sum
    }
}

/// Two-sided factor of Student's t [-]: |t| stays below it with probability `p` [-].
///
/// Bisection on [`student_inside`]; `None` for no degrees of freedom, or `p` outside 0 to 0.999999.
/// Above 400 degrees of freedom the factor for 400 is given (within 0.2 % of the normal one at 95 %).
/// Reference: JCGM 100:2008, Table G.2: 2.65 for 95.45 % and 5 degrees of freedom.
pub fn student_t(p: f64, dof: u32) -> Option<f64> {
    if dof == 0 || !(p > 0.0 && p < 0.999_999) {
        return None;
    }
    let dof = dof.min(400);
    // One degree of freedom at 0.999999 needs about 640 000.
    let (mut low, mut high) = (0.0, 1e6);
    for _ in 0..200 {
        let mid = 0.5 * (low + high);
        if mid <= low || mid >= high {
            break;
        }
        if student_inside(mid, dof) < p { low = mid } else { high = mid }
    }
    Some(0.5 * (low + high))
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Tables of Student's t (printed in any statistics book; recomputed with another library).
    #[test]
    fn printed_factors() {
        let printed = [
            (0.95, 1, 12.706),
            (0.95, 2, 4.303),
            (0.95, 3, 3.182),
            (0.95, 4, 2.776),
            (0.95, 5, 2.571),
            (0.95, 10, 2.228),
            (0.99, 7, 3.499),
            (0.95, 30, 2.042),
        ];
        for (p, dof, t) in printed {
            assert!((student_t(p, dof).unwrap() - t).abs() < 0.0006, "{p} {dof}");
        }
        assert!((student_t(0.95, 100_000).unwrap() - 1.960).abs() < 0.007);
        for p in [0.0, 1.0, -1.0, f64::NAN] {
            assert_eq!(student_t(p, 5), None);
        }
        assert_eq!(student_t(0.95, 0), None);
    }
}
