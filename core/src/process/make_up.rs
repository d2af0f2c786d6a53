//! Bringing the raffinate to the volume that restores its strength.

use crate::study::{Loss, LossAmount, LossPlace, Problem};
use serde::Serialize;

/// The plan for making up.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct MakeUpPlan {
    /// Volume that restores strength [mL].
    pub volume_ml: f64,
    /// Fraction of the feed's matter that reached the end [-].
    pub retained_fraction: f64,
    /// The losses, in flow order.
    pub losses: Vec<LossRow>,
    /// Raffinate there is to make up [mL].
    pub raffinate_ml: f64,
    /// Water to add [mL]; negative: water to take off first.
    pub water_to_add_ml: f64,
    /// What making up in fact gave, once done.
    #[serde(skip_serializing_if = "Option::is_none")]
    pub made_up: Option<MadeUp>,
    /// What to do, in a sentence.
    pub advice: String,
}

/// One loss of the ledger.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct LossRow {
    /// What happened.
    pub what: String,
    /// `feed`, `liquor`, `extract` or `raffinate`.
    pub at: &'static str,
    /// Volume lost there [mL].
    pub volume_ml: f64,
    /// Fraction of what was there [-].
    pub fraction: f64,
    /// The same loss as a volume of feed [mL].
    pub feed_equivalent_ml: f64,
}

/// What making up in fact gave.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct MadeUp {
    /// Volume reached [mL].
    pub volume_ml: f64,
    /// Strength relative to the feed [-]; under 1 when overshot.
    pub strength: f64,
}

/// Fraction lost at `place` by each of `losses` that happened there, one after another, where
/// `there_ml` [mL] was there at first.
///
/// A volume counts against what the losses before it left.
///
/// # Errors
/// A volume as large as what is there.
pub fn losses_at(losses: &[Loss], place: LossPlace, there_ml: f64) -> Result<Vec<(usize, f64, f64)>, Problem> {
    let mut left = there_ml;
    let mut rows = Vec::new();
    for (i, loss) in losses.iter().enumerate().filter(|(_, l)| l.at == place) {
        let (fraction, volume, at) = match &loss.amount {
            LossAmount::Fraction(q) => (q.value, q.value * left, "fraction"),
            LossAmount::VolumeMl(q) => (q.value / left, q.value, "volume_ml"),
        };
        if fraction >= 1.0 {
            return Err(Problem::new(
                format!("losses[{i}].amount.{at}"),
                format!("“{}” loses {volume:.1} mL but only {left:.1} mL are there; give less", loss.what),
            ));
        }
        left -= volume;
        rows.push((i, volume, fraction));
    }
    Ok(rows)
}

/// Volume [mL] that restores strength, from the `feed_ml` [mL] and the fractions lost.
///
/// `V = V_feed·Π(1 − f_i)`: what is left of everything that was not to be removed, at the
/// concentration it had in the feed.
/// Valid: each loss takes its share of everything present; nothing of the company extracted.
/// Reference: mass balance, common practice.
pub fn make_up_volume(feed_ml: f64, fractions: impl IntoIterator<Item = f64>) -> f64 {
    fractions.into_iter().fold(feed_ml, |v, f| v * (1.0 - f))
}

/// What to do at making up, in a sentence.
pub fn advice(volume_ml: f64, raffinate_ml: f64, made_up_ml: Option<f64>) -> String {
    match made_up_ml {
        None if raffinate_ml > volume_ml * (1.0 + 1e-9) => format!(
            "The raffinate is already {raffinate_ml:.0} mL; take {:.0} mL of water off, gently, before it is at strength ({volume_ml:.0} mL).",
            raffinate_ml - volume_ml
        ),
        None => format!(
            "Add water to {volume_ml:.0} mL ({:.0} mL of water), not to the volume it began with.",
            volume_ml - raffinate_ml
        ),
        Some(v) if v > volume_ml * 1.005 => format!(
            "Overshot: at {v:.0} mL the liquid is at {:.1} % of its strength. Take {:.0} mL of water off again, or \
             blend with raffinate not yet made up; adding anything else would leave something behind.",
            100.0 * volume_ml / v,
            v - volume_ml
        ),
        Some(v) if v < volume_ml * 0.995 => {
            format!(
                "At {v:.0} mL the liquid is at {:.1} % of its strength. Add {:.0} mL of water.",
                100.0 * volume_ml / v,
                volume_ml - v
            )
        }
        Some(v) => format!("At {v:.0} mL the liquid is at its own strength within 0.5 %."),
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Common practice: 500 mL with 4 % lost is made up to 480 mL.
    #[test]
    fn strength_not_volume() {
        assert!((make_up_volume(500.0, [0.04]) - 480.0).abs() < 1e-9);
    }

    #[test]
    fn more_lost_than_there_is_refused() {
        let loss = Loss { what: "spill".into(), at: LossPlace::Raffinate, amount: LossAmount::VolumeMl(120.0.into()) };
        let e = losses_at(&[loss], LossPlace::Raffinate, 100.0).unwrap_err();
        assert_eq!(e.at, "losses[0].amount.volume_ml");
    }
}
