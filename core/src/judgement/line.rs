//! A straight line through points, with its uncertainty.

use crate::math;

/// A straight line `y = intercept + slope·x` fitted by least squares.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Line {
    /// Slope.
    pub slope: f64,
    /// Intercept.
    pub intercept: f64,
    /// Standard error of the slope.
    pub slope_error: f64,
    /// Standard error of the intercept.
    pub intercept_error: f64,
    /// Residual standard deviation of y.
    pub residual: f64,
    /// Mean of x.
    mean_x: f64,
    /// `Σ (x − x̄)²`.
    spread: f64,
    /// Number of points.
    n: usize,
}

/// The least-squares line through `points` (x, y); none with fewer than three points, or all at
/// one x.
///
/// `b = Σ(x − x̄)(y − ȳ)/Σ(x − x̄)²`, `s² = Σ r²/(n − 2)`, `s_b = s/√Σ(x − x̄)²`.
/// Valid: errors in y only, alike at every x.
/// Reference: J. N. Miller & J. C. Miller, Statistics and Chemometrics for Analytical Chemistry,
/// fluorescein example: slope 1.93 ± 0.0409, intercept 1.52 ± 0.2949, residual 0.4329.
pub fn line(points: &[(f64, f64)]) -> Option<Line> {
    let n = points.len();
    if n < 3 {
        return None;
    }
    let count = n as f64;
    let mean_x = points.iter().map(|p| p.0).sum::<f64>() / count;
    let mean_y = points.iter().map(|p| p.1).sum::<f64>() / count;
    let spread: f64 = points.iter().map(|p| (p.0 - mean_x) * (p.0 - mean_x)).sum();
    if !(spread > 0.0) {
        return None;
    }
    let slope = points.iter().map(|p| (p.0 - mean_x) * (p.1 - mean_y)).sum::<f64>() / spread;
    let intercept = mean_y - slope * mean_x;
    let squares: f64 = points
        .iter()
        .map(|p| {
            let off = p.1 - intercept - slope * p.0;
            off * off
        })
        .sum();
    let residual = math::sqrt(squares / (count - 2.0));
    Some(Line {
        slope,
        intercept,
        slope_error: residual / math::sqrt(spread),
        intercept_error: residual * math::sqrt(1.0 / count + mean_x * mean_x / spread),
        residual,
        mean_x,
        spread,
        n,
    })
}

impl Line {
    /// Student's t for 95 % with the line's degrees of freedom.
    pub fn t95(&self) -> f64 {
        student_t95(self.n - 2)
    }

    /// The x at which the line reaches `y`, and its standard error.
    ///
    /// `x = (y − a)/b`, `s_x = (s/|b|)·√(1/n + (x − x̄)²/Σ(x − x̄)²)`.
    /// Valid: `y` known without error; s_b small beside b.
    /// Reference: Miller & Miller, regression line used the other way round, m → ∞.
    pub fn x_at(&self, y: f64) -> (f64, f64) {
        let x = (y - self.intercept) / self.slope;
        let off = x - self.mean_x;
        let error = self.residual / self.slope.abs() * math::sqrt(1.0 / self.n as f64 + off * off / self.spread);
        (x, error)
    }
}

/// Student's t, two-sided 95 %, for `freedom` degrees of freedom; that of 30 and then 1.96 above.
///
/// Reference: JCGM 100:2008, Table G.2.
pub fn student_t95(freedom: usize) -> f64 {
    const T: [f64; 30] = [
        12.706, 4.303, 3.182, 2.776, 2.571, 2.447, 2.365, 2.306, 2.262, 2.228, 2.201, 2.179, 2.160, 2.145, 2.131,
        2.120, 2.110, 2.101, 2.093, 2.086, 2.080, 2.074, 2.069, 2.064, 2.060, 2.056, 2.052, 2.048, 2.045, 2.042,
    ];
    match freedom {
        0 => f64::INFINITY,
        1..=30 => T[freedom - 1],
        31..=60 => T[29],
        _ => 1.960,
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Miller & Miller, fluorescence of fluorescein (from memory): slope 1.93, intercept 1.52,
    /// residual 0.4329, errors 0.0409 and 0.2949; t for 5 degrees of freedom 2.57.
    #[test]
    fn fluorescein() {
        let y = [2.1, 5.0, 9.0, 12.6, 17.3, 21.0, 24.7];
        let points: Vec<(f64, f64)> = y.iter().enumerate().map(|(i, y)| (2.0 * i as f64, *y)).collect();
        let l = line(&points).unwrap();
        assert!((l.slope - 1.93).abs() < 0.005 && (l.intercept - 1.52).abs() < 0.005, "{l:?}");
        assert!((l.residual - 0.4329).abs() < 1e-4 && (l.slope_error - 0.0409).abs() < 1e-4);
        assert!((l.intercept_error - 0.2949).abs() < 1e-4 && (l.t95() - 2.57).abs() < 0.002);
    }

    #[test]
    fn too_little_is_no_line() {
        assert_eq!(line(&[(0.0, 1.0), (1.0, 2.0)]), None);
        assert_eq!(line(&[(1.0, 1.0), (1.0, 2.0), (1.0, 3.0)]), None);
    }
}
