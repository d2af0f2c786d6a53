//! pH of the feed and of the liquor: measured where it was, worked out from the composition where
//! it was not.

use crate::outcome::Notice;
use crate::process::concentrate::Liquor;
use crate::solution::charge_balance::{balance, closed_at, strong_ion_difference};
use crate::solution::composition::{Carbonate, Composition, StrongIon, Weak};
use crate::solution::concentrated::{Co2After, ph_after_concentrating};
use crate::solution::ionisation::constants_in_use;
use crate::study::{Problem, Study};
use serde::Serialize;

/// Molar mass of carbon dioxide [g/mol]; IUPAC standard atomic weights (2021).
pub const CO2_MOLAR_MASS: f64 = 44.009;
/// Least share of the buffer capacity that listed ingredients must have for a prediction [-];
/// below it, what is not listed decides.
const LEAST_SHARE: f64 = 0.5;

/// Where a pH comes from.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Serialize)]
#[serde(rename_all = "snake_case")]
pub enum PhFrom {
    /// Measured.
    Measured,
    /// Worked out from the composition by charge balance.
    Composition,
    /// That of the feed, for want of anything better.
    Feed,
}

/// Acidity of the feed and of the liquor.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct Acidity {
    /// pH of the feed.
    pub feed_ph: f64,
    /// Where it comes from.
    pub feed_ph_from: PhFrom,
    /// pH of the liquor, at which it is extracted.
    pub liquor_ph: f64,
    /// Where it comes from.
    pub liquor_ph_from: PhFrom,
    /// pH of the liquor by charge balance, also where it was measured; none if the composition
    /// does not say.
    #[serde(skip_serializing_if = "Option::is_none")]
    pub predicted_liquor_ph: Option<f64>,
    /// Buffer capacity of the liquor at its pH [mmol/L per unit of pH].
    #[serde(skip_serializing_if = "Option::is_none")]
    pub buffer_capacity_mmol_per_l: Option<f64>,
    /// Ionic strength of the liquor [mol/L].
    #[serde(skip_serializing_if = "Option::is_none")]
    pub ionic_strength_mol_per_l: Option<f64>,
    /// Strong ions of the feed beyond those listed, which its measured pH gives away [mmol/L];
    /// positive: cations.
    #[serde(skip_serializing_if = "Option::is_none")]
    pub strong_ions_mmol_per_l: Option<f64>,
    /// What that means, in words.
    #[serde(skip_serializing_if = "String::is_empty")]
    pub strong_ions_words: String,
    /// What the reader should know.
    #[serde(skip)]
    pub notices: Vec<Notice>,
}

/// Composition of the feed as far as its pH goes, at the temperature of the extraction; the second
/// value counts the weak ingredients in it.
///
/// Ingredients without a molar mass or without sites are left out.
fn composition(study: &Study) -> (Composition, usize) {
    let feed = &study.feed;
    let t = feed.temperature_c.value;
    let volume_l = feed.volume_ml.value / 1000.0;
    let mut c = Composition::water(t);
    for ion in &feed.strong_ions {
        c.strong.push(StrongIon { charge: ion.charge, mol_per_l: ion.mmol_per_l.value / 1000.0 });
    }
    for ing in &feed.ingredients {
        let constants = constants_in_use(ing, t);
        let Some(m) = ing.molar_mass_g_per_mol.as_ref().filter(|_| !constants.is_empty()) else { continue };
        let mol_per_l = ing.amount.mg_in(feed.volume_ml.value) / 1000.0 / m.value / volume_l;
        c.weak.push(Weak { constants, mol_per_l });
    }
    if let Some(co2) = &feed.co2_g_per_l {
        c.carbonate = Carbonate::Closed { mol_per_l: co2.value / CO2_MOLAR_MASS };
    }
    let weak = c.weak.len();
    (c, weak)
}

/// Share of the buffer capacity at `ph` that is not that of water with its strong ions [-].
fn share_of_listed(beta_mol_per_l: f64, ph: f64, c: &Composition) -> f64 {
    let water = Composition { weak: Vec::new(), carbonate: Carbonate::None, ..c.clone() };
    let bare = strong_ion_difference(&water, ph).map_or(f64::INFINITY, |s| s.value.beta_mol_per_l);
    1.0 - bare / beta_mol_per_l
}

/// Acidity of the feed of `study` and of its `liquor`.
///
/// Feed: as measured, or by charge balance of what is listed. Liquor: as measured; else by charge
/// balance of the feed times the factor of concentration, carbon dioxide gone with the water, the
/// strong ions first worked out from the feed's measured pH; else that of the feed. A prediction
/// is only made where listed ingredients hold at least half of the buffer capacity.
/// Valid: as [`balance`]; nothing but water and carbon dioxide leaves; volatile acids leave in part
/// and make the liquor less acid than predicted.
///
/// # Errors
/// No measured pH and nothing listed from which it could be worked out.
///
/// Reference: charge balance, see [`crate::solution::charge_balance`].
pub fn acidity(study: &Study, liquor: &Liquor) -> Result<Acidity, Problem> {
    let (mut c, weak) = composition(study);
    let measured = study.feed.ph.as_ref().map(|q| q.value);
    let mut out = Acidity {
        feed_ph: measured.unwrap_or(7.0),
        feed_ph_from: PhFrom::Measured,
        liquor_ph: measured.unwrap_or(7.0),
        liquor_ph_from: if liquor.factor == 1.0 { PhFrom::Measured } else { PhFrom::Feed },
        predicted_liquor_ph: None,
        buffer_capacity_mmol_per_l: None,
        ionic_strength_mol_per_l: None,
        strong_ions_mmol_per_l: None,
        strong_ions_words: String::new(),
        notices: Vec::new(),
    };
    let listed = weak > 0 || !c.strong.is_empty() || c.carbonate != Carbonate::None;
    let mut share = 0.0;
    match measured {
        Some(ph) => {
            if let Ok(s) = strong_ion_difference(&c, ph) {
                share = share_of_listed(s.value.beta_mol_per_l, ph, &c);
                if weak > 0 {
                    out.strong_ions_mmol_per_l = Some(1000.0 * s.value.mol_per_l);
                    out.strong_ions_words = s.value.words.to_owned();
                }
            }
            if let Ok(closed) = closed_at(&c, ph) {
                c = closed;
            }
        }
        None if listed => {
            let found = balance(&c).map_err(|p| Problem::new("feed.ph", p.message))?;
            out.feed_ph = found.value.ph;
            out.feed_ph_from = PhFrom::Composition;
            out.liquor_ph = found.value.ph;
            out.notices.extend(found.notices);
            share = 1.0;
        }
        None => {
            return Err(Problem::new(
                "feed.ph",
                "no pH is given, and no ingredient with a pKa and a molar mass, no strong ion and no carbon dioxide \
                 is listed from which it could be worked out; measure it and enter it",
            ));
        }
    }

    let after = study.concentrate.ph_after.as_ref().map(|q| q.value);
    if share >= LEAST_SHARE {
        // Water leaves by evaporation, and carbon dioxide before it.
        let co2 = if liquor.factor > 1.0 { Co2After::Gone } else { Co2After::Kept };
        if let Ok(found) = ph_after_concentrating(&c, liquor.factor, co2) {
            let at = &found.value.after;
            out.predicted_liquor_ph = Some(at.ph);
            out.buffer_capacity_mmol_per_l = Some(1000.0 * at.beta_mol_per_l);
            out.ionic_strength_mol_per_l = Some(at.ionic_strength_mol_per_l);
            if liquor.factor != 1.0 {
                out.liquor_ph = at.ph;
                out.liquor_ph_from = PhFrom::Composition;
            }
            out.notices.extend(found.notices);
        }
    }
    if out.feed_ph_from == PhFrom::Composition && liquor.factor == 1.0 {
        out.liquor_ph_from = PhFrom::Composition;
    }
    if let Some(ph) = after {
        out.liquor_ph = ph;
        out.liquor_ph_from = PhFrom::Measured;
    }
    for notice in &mut out.notices {
        notice.at = "feed.ph".to_owned();
    }
    say(study, liquor, &mut out);
    Ok(out)
}

/// The notices about the two values.
fn say(study: &Study, liquor: &Liquor, out: &mut Acidity) {
    let mut add = |at: &str, text: String| out.notices.push(Notice::new(at, text));
    if out.feed_ph_from == PhFrom::Composition {
        add(
            "feed.ph",
            format!(
                "The pH of the feed, {:.2}, is worked out from what is listed; an acid, base or salt that is not listed shifts it. Measure it and enter it.",
                out.feed_ph
            ),
        );
    }
    if liquor.factor == 1.0 {
        return;
    }
    match (out.liquor_ph_from, out.predicted_liquor_ph) {
        (PhFrom::Composition, Some(ph)) => add(
            "concentrate.ph_after",
            format!(
                "The liquor is planned at pH {ph:.2}, worked out from the feed's pH {:.2} and the acids and bases listed, carbon dioxide gone. Measure it after concentrating and enter it.",
                out.feed_ph
            ),
        ),
        (PhFrom::Feed, _) => add(
            "concentrate.ph_after",
            format!(
                "The liquor is taken to keep the feed's pH of {:.2}: the ingredients listed are not what holds its pH. List its acids with pKa and molar mass, or measure the pH after concentrating and enter it.",
                out.feed_ph
            ),
        ),
        (PhFrom::Measured, Some(ph)) if study.concentrate.ph_after.is_some() && (ph - out.liquor_ph).abs() > 0.3 => {
            add(
                "concentrate.ph_after",
                format!(
                    "The pH measured after concentrating, {:.2}, is not the {ph:.2} that the listed acids and bases give: something that buffers is not listed, or something left with the water.",
                    out.liquor_ph
                ),
            );
        }
        _ => {}
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::process::concentrate;
    use crate::study::{Amount, StrongIon as Ion, parse};

    const TEXT: &str = r#"{"unstir_study": 1, "name": "phthalate standard", "goal": {"removal_fraction": 0.5},
      "feed": {"volume_ml": 1000, "ph": 4.005, "temperature_c": 25, "target": "phthalic acid",
               "ingredients": [{"name": "phthalic acid", "molar_mass_g_per_mol": 166.13,
                 "amount": {"mass_mg": 8306.5},
                 "sites": [{"kind": "acid", "pka": 2.950}, {"kind": "acid", "pka": 5.408}]}]},
      "solvent": {"id": "own", "name": "own solvent"},
      "partition": [{"ingredient": "phthalic acid", "solvent": "own", "k_neutral": 1}],
      "extraction": {"scheme": {"cross_current": {"portions": [{"volume_ml": 15}]}}, "stage_efficiency": 1}}"#;

    fn of(study: &Study) -> Result<Acidity, Problem> {
        acidity(study, &concentrate::liquor(study, study.feed.volume_ml.value).unwrap())
    }

    /// 0.05 mol/kg potassium hydrogen phthalate, pH 4.005 at 25 °C (R. G. Bates, J. Res. NBS 66A
    /// (1962) 179): 50 mmol/L of potassium, and 4.005 again from it.
    #[test]
    fn a_primary_standard_both_ways() {
        let mut study = parse(TEXT).unwrap();
        let a = of(&study).unwrap();
        assert!((a.strong_ions_mmol_per_l.unwrap() - 50.0).abs() < 0.5, "{a:?}");
        assert_eq!((a.feed_ph_from, a.liquor_ph_from, a.liquor_ph), (PhFrom::Measured, PhFrom::Measured, 4.005));
        study.feed.ph = None;
        study.feed.strong_ions.push(Ion { name: "potassium".into(), charge: 1, mmol_per_l: 50.0.into() });
        let a = of(&study).unwrap();
        assert!((a.feed_ph - 4.005).abs() < 0.01, "{}", a.feed_ph);
        assert_eq!((a.feed_ph_from, a.liquor_ph_from), (PhFrom::Composition, PhFrom::Composition));
        assert_eq!(a.notices.len(), 1);
    }

    /// Dilution value of the same standard (Bates 1973, from memory) turned round: concentrating
    /// 0.025 to 0.05 mol/kg lowers the pH by 0.052.
    #[test]
    fn concentrating_moves_a_buffer_little() {
        let mut study = parse(TEXT).unwrap();
        study.feed.ph = Some(4.057.into());
        study.feed.ingredients[0].amount = Amount::MassMg(4153.25.into());
        study.concentrate.to = crate::study::ConcentrateTo::VolumeMl(500.0.into());
        let a = of(&study).unwrap();
        assert!((a.liquor_ph - 4.005).abs() < 0.015, "{}", a.liquor_ph);
        assert_eq!(a.liquor_ph_from, PhFrom::Composition);
        study.concentrate.ph_after = Some(4.6.into());
        let a = of(&study).unwrap();
        assert_eq!((a.liquor_ph, a.liquor_ph_from), (4.6, PhFrom::Measured));
        assert!(a.notices[0].message.contains("something that buffers"));
    }

    #[test]
    fn what_is_not_listed_is_not_predicted() {
        let mut study = parse(TEXT).unwrap();
        study.feed.ingredients[0].sites.clear();
        study.concentrate.to = crate::study::ConcentrateTo::VolumeMl(500.0.into());
        let a = of(&study).unwrap();
        assert_eq!((a.liquor_ph, a.liquor_ph_from, a.predicted_liquor_ph), (4.005, PhFrom::Feed, None));
        study.feed.ph = None;
        assert_eq!(of(&study).unwrap_err().at, "feed.ph");
    }
}
