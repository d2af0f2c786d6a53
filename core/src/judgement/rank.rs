//! Every solvent of the library beside the others, for this liquor and this scheme.

use crate::chain::Chain;
use crate::library::partition::{KBasis, PublishedK, published_k};
use crate::library::solutes::solute_named;
use crate::library::solvents::{Layer, Solvent, solvents};
use crate::order::put_in_order;
use crate::partition::distribution::{Partition, distribution_ratio, partition_at};
use crate::partition::estimate::estimated_k;
use crate::process::concentrate::density_g_per_ml;
use crate::study::{PartitionEntry, Problem, Study};
use serde::Serialize;

/// Where a K comes from, best first.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord, Serialize)]
#[serde(rename_all = "snake_case")]
pub enum KOrigin {
    /// Entered in the study.
    Entered,
    /// Published and held in the library.
    Published,
    /// Published, but of low confidence.
    PublishedWeak,
    /// Estimated; see [`crate::partition::estimate`].
    Estimated,
}

/// How one ingredient would part between the liquor and a solvent.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct Parted {
    /// Distribution ratio at the liquor's pH [-].
    pub d: f64,
    /// Fraction that the scheme of the study would take out [-].
    pub removed_fraction: f64,
    /// Where its K comes from.
    pub origin: KOrigin,
    /// The source of K, in words.
    pub source: String,
}

/// One solvent beside the others.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct SolventRank {
    /// Identifier in the library.
    pub id: String,
    /// Name.
    pub name: String,
    /// The target; none while no K is known for it.
    #[serde(skip_serializing_if = "Option::is_none")]
    pub target: Option<Parted>,
    /// The company, in the order of the feed, the target left out.
    pub company: Vec<CompanyParted>,
    /// D of the target over the largest known D of the company [-]; none if either is unknown or
    /// no company enters the solvent.
    #[serde(skip_serializing_if = "Option::is_none")]
    pub selectivity: Option<f64>,
    /// Layer the solvent would form against this liquor.
    pub layer: &'static str,
    /// Density of the solvent less that of the liquor, 20 °C [g/mL].
    pub density_difference_g_per_ml: f64,
}

/// One ingredient of the company beside a solvent.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct CompanyParted {
    /// Name of the ingredient.
    pub name: String,
    /// How it would part; none while no K is known for it.
    #[serde(skip_serializing_if = "Option::is_none")]
    pub parted: Option<Parted>,
}

/// K of an ingredient in a solvent with its origin and source: what the study states for the pair,
/// else the best published value (of the neutral form, not weak, the first listed), else an
/// estimate.
fn k_for(study: &Study, ingredient: &str, solvent: &str) -> Option<(Partition, KOrigin, String)> {
    let t = study.feed.temperature_c.value;
    let stated = |p: &&PartitionEntry| p.ingredient == ingredient && p.solvent == solvent;
    if let Some(entry) = study.partition.iter().find(stated) {
        let source = entry.k_neutral.source.clone();
        return Some((partition_at(Some(entry), t), KOrigin::Entered, source));
    }
    let solute = solute_named(ingredient)?;
    let rows = published_k(&solute.id, solvent);
    let rank = |r: &PublishedK| (r.weak, r.basis == KBasis::SolubilityRatio);
    let Some(best) = rows.iter().min_by_key(|r| rank(r)) else {
        let estimate = estimated_k(&solute.id, solvent)?;
        let k = Partition { k_neutral: estimate.k, k_ion_pair: 0.0 };
        return Some((k, KOrigin::Estimated, estimate.source));
    };
    let origin = if best.weak { KOrigin::PublishedWeak } else { KOrigin::Published };
    Some((Partition { k_neutral: best.k, k_ion_pair: 0.0 }, origin, best.source.citation.clone()))
}

/// Every solvent of the library for the liquor and the scheme of `study`, those that would take
/// out most of the target first, then those for which no K is known, by name.
///
/// `D = K·f_N + K_ip(1 − f_N)` at the liquor's pH for each ingredient, run through the portions or
/// stages as stated, solvent entering clean; selectivity is `D_target/max D_company` over the
/// company whose K is known.
/// Valid: as [`distribution_ratio`] and the scheme. An ingredient without a K counts as unknown,
/// never as staying in the liquor; it still has no part in the selectivity, which is then an upper
/// bound.
///
/// # Errors
/// What stops the plan.
///
/// Reference: definitions; D after D. Harvey, Analytical Chemistry 2.1, section 7.7.
pub fn rank(study: &Study) -> Result<Vec<SolventRank>, Problem> {
    let chain = Chain::run(study)?;
    let liquor = density_g_per_ml(chain.liquor.brix.unwrap_or(0.0));
    let mut list: Vec<SolventRank> = solvents().iter().map(|s| one(study, &chain, s, liquor)).collect();
    let removal = |r: &SolventRank| r.target.as_ref().map_or(-1.0, |t| t.removed_fraction);
    put_in_order(&mut list, |a, b| removal(b).total_cmp(&removal(a)).then_with(|| a.name.cmp(&b.name)));
    Ok(list)
}

fn one(study: &Study, chain: &Chain, s: &Solvent, liquor_g_per_ml: f64) -> SolventRank {
    let ingredients = &study.feed.ingredients;
    let known: Vec<Option<(f64, KOrigin, String)>> = ingredients
        .iter()
        .enumerate()
        .map(|(i, g)| {
            let (k, origin, source) = k_for(study, &g.name, &s.id)?;
            Some((distribution_ratio(k, chain.constants_of(i), chain.ph), origin, source))
        })
        .collect();
    let d: Vec<f64> = known.iter().map(|k| k.as_ref().map_or(0.0, |k| k.0)).collect();
    let taken = chain.removed_with(study, &d);
    let mut parted: Vec<Option<Parted>> = known
        .into_iter()
        .enumerate()
        .map(|(i, known)| {
            let (d, origin, source) = known?;
            let removed_fraction = taken.as_ref().and_then(|t| t.get(i).copied())?;
            Some(Parted { d, removed_fraction, origin, source })
        })
        .collect();
    let target = parted[chain.target].take();
    let company: Vec<CompanyParted> = ingredients
        .iter()
        .zip(parted)
        .enumerate()
        .filter(|(i, _)| *i != chain.target)
        .map(|(_, (g, parted))| CompanyParted { name: g.name.clone(), parted })
        .collect();
    let most = company.iter().filter_map(|c| c.parted.as_ref()).map(|p| p.d).fold(0.0, f64::max);
    SolventRank {
        id: s.id.clone(),
        name: s.name.clone(),
        selectivity: target.as_ref().filter(|_| most > 0.0).map(|t| t.d / most),
        target,
        company,
        layer: match s.layer_against(liquor_g_per_ml) {
            Layer::Lower => "lower layer",
            Layer::Upper => "upper layer",
            Layer::Uncertain => "too close to tell",
        },
        density_difference_g_per_ml: s.density_20c_g_ml - liquor_g_per_ml,
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::plan::plan;
    use crate::study::parse;

    const TEXT: &str = include_str!("../../../tests/data/studies/neutral-alkaloid.json");

    /// The solvent in use must come out of the ranking as it comes out of the plan.
    #[test]
    fn the_solvent_in_use_agrees_with_the_plan() {
        let study = parse(TEXT).unwrap();
        let planned = plan(&study).unwrap().value;
        let list = rank(&study).unwrap();
        let own = list.iter().find(|r| r.id == study.solvent.id).unwrap();
        let target = own.target.as_ref().unwrap();
        assert_eq!(target.d, planned.ingredients[0].d);
        assert!((target.removed_fraction - planned.headline.removal_fraction.value).abs() < 1e-12);
        assert_eq!(target.origin, KOrigin::Entered);
        assert_eq!(own.company.len(), study.feed.ingredients.len() - 1);
    }

    /// Published for caffeine: 9.5 in chloroform (Edwards et al. 2015), below 1 in ethyl acetate.
    #[test]
    fn published_values_fill_in_and_unknown_stays_unknown() {
        let study = parse(TEXT).unwrap();
        let list = rank(&study).unwrap();
        assert_eq!(list.len(), solvents().len());
        let d = |id: &str| list.iter().find(|r| r.id == id).unwrap().target.clone();
        let butyl = d("n_butyl_acetate").unwrap();
        assert_eq!(butyl.origin, KOrigin::Estimated);
        let chloroform = d("chloroform").unwrap();
        assert!(chloroform.d > 8.0 && chloroform.origin == KOrigin::Published);
        let unknown = list.iter().position(|r| r.target.is_none()).unwrap();
        assert!(list[unknown..].iter().all(|r| r.target.is_none()));
        let sorted: Vec<f64> = list[..unknown].iter().map(|r| r.target.as_ref().unwrap().removed_fraction).collect();
        assert!(sorted.windows(2).all(|w| w[0] >= w[1]), "{sorted:?}");
    }

    #[test]
    fn what_stops_the_plan_stops_the_ranking() {
        let mut study = parse(TEXT).unwrap();
        study.feed.target = "nobody".into();
        assert!(rank(&study).is_err());
    }
}
