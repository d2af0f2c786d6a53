//! Stripping: dissolved solvent leaves the raffinate with water vapour. What equilibrium allows at
//! best, what goes with it, and what the residue amounts to.

use crate::math;

/// Solvent dissolved at saturation [mg/L], from the solubility [mass percent of the saturated
/// phase] and the density of the liquor [g/mL].
///
/// `c = w/100·ρ·10⁶`.
/// Valid: pure water; sugar and salt lower it, ethanol raises it. Droplets not yet settled come on top.
/// Reference: definition.
pub fn saturation_mg_per_l(solubility_mass_pct: f64, density_g_per_ml: f64) -> f64 {
    solubility_mass_pct * 1e4 * density_g_per_ml
}

/// Fraction of a dilute volatile left [-] when the fraction `water_left` [-] of the water is left.
///
/// `n/n₀ = (n_w/n_w₀)^α`, the Rayleigh relation; `alpha` volatility against water [-].
/// Valid: vapour in equilibrium with the liquid and taken away; α constant over the boil.
/// Reference: Lord Rayleigh, Phil. Mag. 4 (1902) 521; K = 100, 2 % boiled off: 0.13262 left.
pub fn left_after_boiling(alpha: f64, water_left: f64) -> f64 {
    math::pow(water_left, alpha)
}

/// Least fraction of the water [-] that must leave for the fraction `left` [-] of the volatile to stay.
///
/// `1 − left^(1/α)`; the same relation. `None` unless `alpha` > 0 and `left` is above 0 and at most 1.
/// Reference: as [`left_after_boiling`].
pub fn water_off_for(left: f64, alpha: f64) -> Option<f64> {
    if alpha > 0.0 && left > 0.0 && left <= 1.0 { Some(1.0 - math::pow(left, 1.0 / alpha)) } else { None }
}

/// Least fraction of the water [-] that must leave to bring the volatile down tenfold; see
/// [`water_off_for`].
pub fn water_off_per_decade(alpha: f64) -> Option<f64> {
    water_off_for(0.1, alpha)
}

/// What it takes, at the least, to bring the solvent down to one limit.
#[derive(Clone, Debug, PartialEq)]
pub struct ToLimit {
    /// The limit [mg/L].
    pub limit_mg_per_l: f64,
    /// Powers of ten from the start to it; 0 where the start is below it.
    pub decades: f64,
    /// Least fraction of the water that must leave [-].
    pub water_off_fraction: f64,
    /// Fraction of each volatile ingredient that leaves with it [-].
    pub company_lost: Vec<f64>,
}

/// Equilibrium floor on the way from `start_mg_per_l` to `limit_mg_per_l` [mg/L]: water, and the
/// share of each volatile ingredient of volatility `company` [-], that leaves with the solvent.
///
/// Decades `lg(c₀/c)`, water by [`water_off_for`] on amounts: the water leaving concentrates the
/// rest, so with `w` of it left `c/c₀ = w^α/w` in the liquor as it stands; water is put back before
/// assay or serving, and the limit is compared at the volume before stripping: `c/c₀ = w^α`.
/// `None` unless all are above 0.
/// Valid: as [`left_after_boiling`]; a real still takes longer and drives off more water.
/// Reference: as [`left_after_boiling`].
pub fn to_limit(start_mg_per_l: f64, limit_mg_per_l: f64, alpha: f64, company: &[f64]) -> Option<ToLimit> {
    if !(start_mg_per_l > 0.0 && start_mg_per_l.is_finite() && limit_mg_per_l > 0.0) {
        return None;
    }
    let left = (limit_mg_per_l / start_mg_per_l).min(1.0);
    let water_off_fraction = water_off_for(left, alpha)?;
    Some(ToLimit {
        limit_mg_per_l,
        decades: -math::log10(left),
        water_off_fraction,
        company_lost: company.iter().map(|&a| 1.0 - left_after_boiling(a, 1.0 - water_off_fraction)).collect(),
    })
}

/// Concentration [mg/L] that a limit of `mg_per_kg` [mg/kg] means in a liquid of that density [g/mL].
pub fn limit_mg_per_l(mg_per_kg: f64, density_g_per_ml: f64) -> f64 {
    mg_per_kg * density_g_per_ml
}

/// Limit in a product [ppm by mass] from a permitted daily exposure [mg/day] and the daily dose [g].
///
/// `ppm = 1000·PDE/dose`.
/// Reference: ICH Q3C, Option 1: dichloromethane, 6.0 mg/day and 10 g, 600 ppm.
pub fn ppm_from_pde(pde_mg_per_day: f64, dose_g: f64) -> f64 {
    1000.0 * pde_mg_per_day / dose_g
}

/// Residue swallowed in a day beside a listed exposure.
#[derive(Clone, Debug, PartialEq)]
pub struct Exposure {
    /// Residue in one serving [mg].
    pub mg_per_serving: f64,
    /// Residue in a day's servings [mg].
    pub mg_per_day: f64,
    /// That over the listed daily exposure [-].
    pub over_pde: f64,
    /// The comparison in words. It compares; it does not clear anything.
    pub sentence: String,
}

/// Residue per serving and per day beside the permitted daily exposure of a list.
///
/// `mg = c·V/1000`; `mg_per_l` [mg/L], `serving_ml` [mL], servings a day [-], `pde_mg_per_day` [mg/day].
/// `None` unless all are finite, the exposure above 0 and the rest not negative.
/// Valid: the exposures of ICH Q3C are set for medicines; other uses have other rules.
/// Reference: ICH Q3C, definition of the permitted daily exposure.
pub fn exposure(mg_per_l: f64, serving_ml: f64, servings_per_day: f64, pde_mg_per_day: f64) -> Option<Exposure> {
    let mg_per_serving = mg_per_l * serving_ml / 1000.0;
    let mg_per_day = mg_per_serving * servings_per_day;
    if !(pde_mg_per_day > 0.0
        && mg_per_day.is_finite()
        && mg_per_l >= 0.0
        && serving_ml >= 0.0
        && servings_per_day >= 0.0)
    {
        return None;
    }
    let over_pde = mg_per_day / pde_mg_per_day;
    let short = |v: f64| if v > 0.0 && v < 0.01 { format!("{v:.1e}") } else { format!("{v:.2}") };
    let sentence = format!(
        "{} mg a day is {} times the daily exposure of {pde_mg_per_day} mg listed for medicines. \
         This compares two numbers; it does not say that the liquid may be drunk.",
        short(mg_per_day),
        short(over_pde)
    );
    Some(Exposure { mg_per_serving, mg_per_day, over_pde, sentence })
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Closed form of the Rayleigh relation: K = 100, 2 % boiled off.
    #[test]
    fn rayleigh() {
        assert!((left_after_boiling(100.0, 0.98) - 0.132_619_555_894_753).abs() < 1e-12);
        assert!((water_off_for(0.132_619_555_894_753, 100.0).unwrap() - 0.02).abs() < 1e-12);
        assert!((water_off_per_decade(1.0).unwrap() - 0.9).abs() < 1e-12);
    }

    /// By hand: α 10, a hundredfold down, so w = 10^(−0.2) = 0.63096; α 1 goes with the water.
    #[test]
    fn what_goes_with_the_solvent() {
        let r = to_limit(1000.0, 10.0, 10.0, &[1.0, 0.0, 10.0]).unwrap();
        assert!((r.decades - 2.0).abs() < 1e-12 && (r.water_off_fraction - 0.369_043).abs() < 1e-6);
        assert!((r.company_lost[0] - 0.369_043).abs() < 1e-6);
        assert!(r.company_lost[1].abs() < 1e-12 && (r.company_lost[2] - 0.99).abs() < 1e-12);
        assert_eq!(to_limit(5.0, 10.0, 10.0, &[1.0]).unwrap().water_off_fraction, 0.0);
        for bad in [0.0, -1.0, f64::NAN] {
            assert!(to_limit(bad, 10.0, 10.0, &[]).is_none());
            assert!(to_limit(10.0, bad, 10.0, &[]).is_none());
            assert!(to_limit(10.0, 1.0, bad, &[]).is_none());
        }
    }

    /// ICH Q3C, Table 2: dichloromethane 6 mg/day, 600 ppm.
    #[test]
    fn exposure_is_compared_and_not_cleared() {
        assert!((ppm_from_pde(6.0, 10.0) - 600.0).abs() < 1e-9);
        let e = exposure(3.0, 250.0, 2.0, 6.0).unwrap();
        assert!((e.mg_per_serving - 0.75).abs() < 1e-12 && (e.over_pde - 0.25).abs() < 1e-12);
        let lower = e.sentence.to_lowercase();
        assert!(lower.contains("does not say") && !lower.contains("safe") && !lower.contains("permitted"));
        assert!(exposure(3.0, 250.0, 2.0, 0.0).is_none() && exposure(f64::NAN, 1.0, 1.0, 1.0).is_none());
    }
}
