//! Linear propagation of uncertainty through the whole chain.

use crate::plan::Interval;
use crate::study::{Quantity, Study, for_each_quantity};

/// Coverage factor of the intervals shown: about 95 % for a normal result.
pub const COVERAGE_FACTOR: f64 = 2.0;
/// Step of the numerical derivative, as a fraction of the standard uncertainty: small enough for
/// the slope at the value, large enough to leave eight digits.
const STEP: f64 = 1e-3;

/// What one input contributes to each output.
#[derive(Clone, Debug, PartialEq)]
pub struct Component {
    /// Path of the input in the file.
    pub at: String,
    /// Its standard uncertainty.
    pub u: f64,
    /// Sensitivity times standard uncertainty, per output.
    pub effect: Vec<f64>,
}

/// Values, combined standard uncertainties and components of the outputs of a model.
#[derive(Clone, Debug, PartialEq)]
pub struct Propagated {
    /// Values at the stated inputs.
    pub values: Vec<f64>,
    /// Combined standard uncertainty of each.
    pub u: Vec<f64>,
    /// One per uncertain input.
    pub components: Vec<Component>,
}

/// Propagates the standard uncertainties of every number in `study` through `model`.
///
/// `u²(y) = Σ (∂y/∂x_i)² u²(x_i)`, derivatives by central differences; inputs independent.
/// Outputs that cannot be computed are NaN. `None` if the model fails at the stated inputs.
/// Valid: the model nearly straight over ± u of each input.
/// Reference: JCGM 100:2008 5.1.2 and 5.1.3; check: Eurachem/CITAC QUAM Example A1.
pub fn propagate(study: &Study, model: &dyn Fn(&Study) -> Option<Vec<f64>>) -> Option<Propagated> {
    let values = model(study)?;
    let mut uncertain: Vec<(String, f64)> = Vec::new();
    let mut walk = study.clone();
    for_each_quantity(&mut walk, &mut |path, q: &mut Quantity| {
        let u = q.standard_uncertainty();
        if u > 0.0 && u.is_finite() {
            uncertain.push((path.to_owned(), u));
        }
    });
    let mut components = Vec::with_capacity(uncertain.len());
    for (at, u) in uncertain {
        let step = u * STEP;
        let shifted = |by: f64| {
            let mut s = study.clone();
            for_each_quantity(&mut s, &mut |path, q| {
                if path == at {
                    q.value += by;
                }
            });
            model(&s)
        };
        let (up, down) = (shifted(step), shifted(-step));
        let effect = (0..values.len())
            .map(|i| {
                let value = |o: &Option<Vec<f64>>| o.as_ref().and_then(|v| v.get(i).copied());
                match (value(&up), value(&down)) {
                    (Some(a), Some(b)) => (a - b) / (2.0 * STEP),
                    (Some(a), None) => (a - values[i]) / STEP,
                    (None, Some(b)) => (values[i] - b) / STEP,
                    (None, None) => 0.0,
                }
            })
            .map(|e| if e.is_finite() { e } else { 0.0 })
            .collect();
        components.push(Component { at, u, effect });
    }
    let u = (0..values.len())
        .map(|i| components.iter().map(|c: &Component| c.effect[i] * c.effect[i]).sum::<f64>().sqrt())
        .collect();
    Some(Propagated { values, u, components })
}

/// `value ± 2u`, held within `least` and `most`.
pub fn interval(value: f64, u: f64, least: f64, most: f64, unit: &'static str) -> Interval {
    let half = COVERAGE_FACTOR * u;
    Interval { value, low: (value - half).max(least).min(value), high: (value + half).min(most).max(value), unit }
}
