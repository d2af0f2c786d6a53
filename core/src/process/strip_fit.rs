//! How fast solvent leaves, from readings taken while stripping: a first-order fit with its band.

use crate::judgement::student::student_t;
use crate::math;
use crate::outcome::{Notice, Outcome};
use crate::study::Problem;

/// Probability of the bands [-].
const BAND: f64 = 0.95;

/// One reading: an assay, or a weighing turned into a concentration.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Assay {
    /// Time since stripping began [h].
    pub hours: f64,
    /// Solvent dissolved [mg/L].
    pub mg_per_l: f64,
}

/// The line `ln c = a − k·t` through the readings.
#[derive(Clone, Debug, PartialEq)]
pub struct StripFit {
    /// Number of readings.
    pub readings: usize,
    /// Concentration at the start by the line [mg/L].
    pub start_mg_per_l: f64,
    /// Rate `k` [1/h]; not above 0 where the readings do not fall.
    pub rate_per_h: f64,
    /// 95 % band of the rate [1/h]; `None` with two readings, which leave nothing to judge by.
    pub rate_band_per_h: Option<(f64, f64)>,
    /// Time constant `1/k` [h]; `None` where nothing falls.
    pub time_constant_h: Option<f64>,
    /// Standard deviation of `ln c` about the line [-].
    pub residual_sd: Option<f64>,
    mean_h: f64,
    mean_ln: f64,
    sxx: f64,
    /// Student's t times the standard deviation.
    reach: Option<f64>,
    last_h: f64,
    lowest_mg_per_l: f64,
}

/// When a limit is reached.
#[derive(Clone, Debug, PartialEq)]
pub struct TimeTo {
    /// By the line [h]; 0 where it starts below the limit.
    pub hours: f64,
    /// Early end of the 95 % band [h].
    pub early_h: Option<f64>,
    /// Late end of the 95 % band [h]; `None` where the readings do not settle it.
    pub late_h: Option<f64>,
}

/// First-order fit of solvent against time.
///
/// `ln c = a − k·t` by linear least squares; band of `k`: `± t(95 %, n − 2)·s/√Sxx`.
/// Valid: one rate throughout (constant temperature, pressure, stirring); errors alike on the
/// logarithm. While a solvent layer remains, or near the floor, the rate is another.
/// Reference: N. R. Draper & H. Smith, Applied Regression Analysis; slope 1.93 ± 0.11 for the
/// fluorescein line of J. C. Miller & J. N. Miller, Statistics for Analytical Chemistry.
///
/// # Errors
/// Fewer than two readings, all at one time, a time that is negative, or a concentration not above 0.
pub fn fit(readings: &[Assay]) -> Result<Outcome<StripFit>, Problem> {
    let n = readings.len();
    if n < 2 {
        return Err(Problem::new("strip.readings", format!("{n} readings; a rate needs two, a band three or more")));
    }
    for (i, r) in readings.iter().enumerate() {
        let at = format!("strip.readings[{i}]");
        if !(r.hours >= 0.0 && r.hours.is_finite()) {
            return Err(Problem::new(at, format!("time {} h; enter hours since the start, 0 or more", r.hours)));
        }
        if !(r.mg_per_l > 0.0 && r.mg_per_l.is_finite()) {
            let words = "enter a value above 0; leave out a reading below the detection limit";
            return Err(Problem::new(at, format!("solvent {} mg/L; {words}", r.mg_per_l)));
        }
    }
    let count = n as f64;
    let mean_h = readings.iter().map(|r| r.hours).sum::<f64>() / count;
    let mean_ln = readings.iter().map(|r| math::ln(r.mg_per_l)).sum::<f64>() / count;
    let (mut sxx, mut sxy) = (0.0, 0.0);
    for r in readings {
        let d = r.hours - mean_h;
        sxx += d * d;
        sxy += d * (math::ln(r.mg_per_l) - mean_ln);
    }
    if !(sxx > 0.0 && sxx.is_finite()) {
        return Err(Problem::new("strip.readings", "all readings are at one time; take them at different times"));
    }
    let slope = sxy / sxx;
    let mut squares = 0.0;
    for r in readings {
        let e = math::ln(r.mg_per_l) - mean_ln - slope * (r.hours - mean_h);
        squares += e * e;
    }
    let dof = n as u32 - 2;
    let residual_sd = (dof > 0).then(|| math::sqrt(squares / f64::from(dof)));
    let reach = residual_sd.and_then(|s| student_t(BAND, dof).map(|t| t * s));
    let half = reach.map(|r| r / math::sqrt(sxx));
    let rate = -slope;
    let mut notices = Vec::new();
    let mut note = |message: &str| notices.push(Notice::new("strip.readings", message));
    if !(rate > 0.0) {
        note("The readings do not fall: no time to a limit follows from them. Check temperature, vacuum and assay.");
    } else if half.is_some_and(|h| h >= rate) {
        note("The scatter is so large that the fall is not certain: take more readings, further apart.");
    }
    if dof == 0 {
        note("Two readings give a line but no band: take a third.");
    }
    let value = StripFit {
        readings: n,
        start_mg_per_l: math::exp(mean_ln - slope * mean_h),
        rate_per_h: rate,
        rate_band_per_h: half.map(|h| (rate - h, rate + h)),
        time_constant_h: (rate > 0.0).then(|| 1.0 / rate),
        residual_sd,
        mean_h,
        mean_ln,
        sxx,
        reach,
        last_h: readings.iter().map(|r| r.hours).fold(0.0, f64::max),
        lowest_mg_per_l: readings.iter().map(|r| r.mg_per_l).fold(f64::INFINITY, f64::min),
    };
    Ok(Outcome { value, notices })
}

impl StripFit {
    /// Concentration by the line at `hours` [mg/L], with the 95 % band of the line.
    ///
    /// `ln c = a − k·t ± t₉₅·s·√(1/n + (t − t̄)²/Sxx)`.
    /// Valid: within the readings; the band widens outside them and knows nothing of a changing rate.
    /// Reference: N. R. Draper & H. Smith, Applied Regression Analysis.
    pub fn at(&self, hours: f64) -> (f64, Option<(f64, f64)>) {
        let d = hours - self.mean_h;
        let ln = self.mean_ln - self.rate_per_h * d;
        let band = self.reach.map(|r| {
            let half = r * math::sqrt(1.0 / self.readings as f64 + d * d / self.sxx);
            (math::exp(ln - half), math::exp(ln + half))
        });
        (math::exp(ln), band)
    }

    /// When the line reaches `limit_mg_per_l` [mg/L], with its 95 % band: the times at which the
    /// band of the line crosses the limit.
    ///
    /// `t = t̄ + (mean − ln L)/k`; band from `(k·d − Y)² = (t·s)²(1/n + d²/Sxx)`, `d = t − t̄`.
    /// Valid: as [`fit`]. A notice says where it lies beyond the readings.
    /// Reference: E. C. Fieller, J. R. Stat. Soc. B 16 (1954) 175; confidence band of the line.
    ///
    /// # Errors
    /// A limit that is not above 0; readings that do not fall.
    pub fn time_to(&self, limit_mg_per_l: f64) -> Result<Outcome<TimeTo>, Problem> {
        let k = self.rate_per_h;
        if !(limit_mg_per_l > 0.0 && limit_mg_per_l.is_finite()) {
            return Err(Problem::new("strip.limit", format!("limit {limit_mg_per_l} mg/L; it must be above 0")));
        }
        if !(k > 0.0) {
            return Err(Problem::new(
                "strip.readings",
                "the readings do not fall, so no limit is reached; strip harder",
            ));
        }
        let y = self.mean_ln - math::ln(limit_mg_per_l);
        let hours = (self.mean_h + y / k).max(0.0);
        let (mut early_h, mut late_h) = (None, None);
        if let Some(q) = self.reach {
            // (k² − q²/Sxx)·d² − 2kY·d + Y² − q²/n = 0.
            let a = k * k - q * q / self.sxx;
            let c = y * y - q * q / self.readings as f64;
            if a > 0.0 {
                let root = math::sqrt((k * y * k * y - a * c).max(0.0));
                early_h = Some((self.mean_h + (k * y - root) / a).max(0.0));
                late_h = Some((self.mean_h + (k * y + root) / a).max(0.0));
            }
        }
        let mut notices = Vec::new();
        let mut note = |message: String| notices.push(Notice::new("strip.limit", message));
        if self.reach.is_some() && late_h.is_none() {
            note("The readings scatter too much for a latest time: take more.".into());
        }
        if late_h.unwrap_or(hours) > self.last_h {
            note(format!(
                "Beyond the last reading at {} h ({} mg/L was the lowest): the line is drawn on. Assay before relying on it.",
                self.last_h, self.lowest_mg_per_l
            ));
        }
        Ok(Outcome { value: TimeTo { hours, early_h, late_h }, notices })
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Fluorescein line of Miller & Miller (from memory): slope 1.93 ± 0.11, intercept 1.52, s 0.433.
    /// The signals stand for −ln c.
    fn published() -> StripFit {
        let y = [2.1, 5.0, 9.0, 12.6, 17.3, 21.0, 24.7];
        let readings: Vec<Assay> =
            (0..7u8).map(|i| Assay { hours: 2.0 * f64::from(i), mg_per_l: math::exp(-y[usize::from(i)]) }).collect();
        fit(&readings).unwrap().value
    }

    #[test]
    fn a_published_line() {
        let f = published();
        assert!((f.rate_per_h - 1.93).abs() < 0.005);
        assert!((-math::ln(f.start_mg_per_l) - 1.52).abs() < 0.005);
        assert!((f.residual_sd.unwrap() - 0.4329).abs() < 0.0005);
        let (low, high) = f.rate_band_per_h.unwrap();
        assert!((0.5 * (high - low) - 0.11).abs() < 0.006);
    }

    /// The band of the time is where the band of the line meets the limit.
    #[test]
    fn the_band_of_a_time_meets_the_band_of_the_line() {
        let f = published();
        let limit = math::exp(-15.0);
        let t = f.time_to(limit).unwrap().value;
        let (early, late) = (t.early_h.unwrap(), t.late_h.unwrap());
        assert!(early < t.hours && t.hours < late);
        assert!((f.at(early).1.unwrap().0 / limit - 1.0).abs() < 1e-9);
        assert!((f.at(late).1.unwrap().1 / limit - 1.0).abs() < 1e-9);
        assert!((f.at(t.hours).0 / limit - 1.0).abs() < 1e-9);
    }

    #[test]
    fn what_cannot_be_told_is_said() {
        let at = |hours, mg_per_l| Assay { hours, mg_per_l };
        let two = fit(&[at(0.0, 100.0), at(1.0, 50.0)]).unwrap();
        assert_eq!(two.value.rate_band_per_h, None);
        assert!(two.notices[0].message.contains("third"));
        assert!((two.value.time_to(25.0).unwrap().value.hours - 2.0).abs() < 1e-12);
        let rising = fit(&[at(0.0, 10.0), at(1.0, 12.0), at(2.0, 13.0)]).unwrap();
        assert!(rising.value.time_to(1.0).is_err() && !rising.notices.is_empty());
        let wild = fit(&[at(0.0, 100.0), at(1.0, 10.0), at(2.0, 80.0), at(3.0, 9.0)]).unwrap().value;
        let t = wild.time_to(1.0).unwrap();
        assert!(t.value.late_h.is_none() && t.notices.len() == 2);
        for bad in [at(0.0, 0.0), at(-1.0, 5.0), at(f64::NAN, 5.0), at(0.0, f64::INFINITY)] {
            assert!(fit(&[bad, at(1.0, 2.0)]).is_err());
        }
        assert!(fit(&[at(1.0, 5.0), at(1.0, 4.0)]).is_err() && fit(&[]).is_err());
        assert!(published().time_to(0.0).is_err());
    }
}
