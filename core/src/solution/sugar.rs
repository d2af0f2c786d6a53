//! Sucrose solutions against °Brix and temperature. Other soluble solids are counted as sucrose,
//! as a refractometer counts them.

use super::ionisation::GAS_CONSTANT;
use super::water;
use crate::library::sucrose::{SucroseRow, sucrose_rows};
use crate::math;
use crate::outcome::{Notice, Outcome};
use crate::study::Problem;
use serde::Serialize;

/// Highest °Brix the density is answered for: above it a liquor sets or crystallises.
pub const BRIX_MAX: f64 = 85.0;
/// Highest °Brix of the tables of viscosity and refractive index.
pub const BRIX_TABLE_MAX: f64 = 75.0;
/// Lowest and highest temperature of the correlations [°C].
pub const TEMPERATURE_C: (f64, f64) = (0.0, 80.0);

const MOLAR_MASS_SUCROSE: f64 = 342.297;
const MOLAR_MASS_WATER: f64 = 18.015;

/// Excess of the density over that of water [kg/m³]: a row per power of `(t − 20)/100` from 0, a column
/// per power of the mass fraction from 1.
const EXCESS: [[f64; 6]; 5] = [
    [385.1761, 135.3705, 40.9299, -3.9643, 13.4853, -17.2890],
    [-46.2720, -7.1720, 1.1597, 5.1126, 17.5254, 0.0],
    [59.7712, 7.2491, 12.3630, -35.4791, 0.0, 0.0],
    [-47.2207, -21.6977, 27.6301, 0.0, 0.0, 0.0],
    [18.3184, 12.3081, 0.0, 0.0, 0.0, 0.0],
];

/// Density of a sucrose solution [g/mL] from `brix` [°Brix] and `temperature_c` [°C].
///
/// `ρ = ρ_water(t) + Σᵢ ϑⁱ Σⱼ aᵢⱼ wʲ`, `w = °Brix/100`, `ϑ = (t − 20)/100`, the 20 `aᵢⱼ` in
/// `EXCESS`.
/// Valid: 0–75 °Brix, 0–80 °C; rises smoothly on to 100 °Brix, where it is not checked. Within
/// 0.0005 g/mL of Plato's table (NBS Circular 440).
/// Reference: ICUMSA SPS-4 (1998), H. Bettin, F. Emmerich, F. Spieweck & H. Toth, Zuckerind. 123 (1998)
/// 341; 40 °Brix, 20 °C: 1176.5 kg/m³.
pub fn density_g_per_ml(brix: f64, temperature_c: f64) -> f64 {
    let w = brix / 100.0;
    let theta = (temperature_c - 20.0) / 100.0;
    let mut excess = 0.0;
    for row in EXCESS.iter().rev() {
        let mut inner = 0.0;
        for a in row.iter().rev() {
            inner = (inner + a) * w;
        }
        excess = excess * theta + inner;
    }
    water::density_g_per_ml(temperature_c) + excess / 1000.0
}

/// Sucrose in a litre of solution [g/L] from `brix` [°Brix] and `temperature_c` [°C].
///
/// `c = 10·°Brix·ρ`. Valid and referenced as [`density_g_per_ml`]; 20 °Brix, 20 °C: 216.2 g/L.
pub fn sucrose_g_per_l(brix: f64, temperature_c: f64) -> f64 {
    10.0 * brix * density_g_per_ml(brix, temperature_c)
}

/// °Brix of a solution that holds `sucrose_g_per_l` [g/L] at `temperature_c` [°C]; `None` when that is
/// negative, not a number, or more than dry sugar would hold.
///
/// Bisection of [`sucrose_g_per_l`], which rises throughout, to the last bit.
pub fn brix_from_sucrose_g_per_l(grams: f64, temperature_c: f64) -> Option<f64> {
    if !(grams >= 0.0 && grams <= sucrose_g_per_l(100.0, temperature_c)) {
        return None;
    }
    rising(0.0, 100.0, &|brix| sucrose_g_per_l(brix, temperature_c) < grams)
}

/// Where `below` turns from true to false between `a` and `b`, by halving.
pub(crate) fn rising(mut a: f64, mut b: f64, below: &dyn Fn(f64) -> bool) -> Option<f64> {
    for _ in 0..200 {
        let m = 0.5 * (a + b);
        if m <= a || m >= b {
            break;
        }
        if below(m) { a = m } else { b = m }
    }
    Some(b)
}

/// Moles of sucrose in a kilogram of water [mol/kg] from `brix` [°Brix]; `None` outside 0 to below 100.
///
/// `m = 1000·°Brix/(100 − °Brix)/342.297`. Reference: definition; 50 °Brix: 2.921 mol/kg.
pub fn molality_mol_per_kg(brix: f64) -> Option<f64> {
    (0.0..100.0).contains(&brix).then(|| 1000.0 * brix / (100.0 - brix) / MOLAR_MASS_SUCROSE)
}

/// Boiling-point rise at 1 atm [K] from `brix` [°Brix], by the osmotic route; `None` outside 0–75 °Brix.
///
/// `1/T = 1/373.15 + R ln a_w/ΔH`, `ln a_w = ln(1 − x) − 6.47 x²`, `x` the mole fraction of sucrose, `ΔH`
/// 40.66 kJ/mol.
/// Valid: 0–75 °Brix at 1 atm. Within 2 % of the rise from osmotic coefficients (Robinson & Stokes) to
/// 65 °Brix. Printed sugar tables (from memory) are rounded to 0.05 K and read lower: by up to
/// 40 % under 25 °Brix, 6–14 % above 40 °Brix.
/// Reference: R. S. Norrish, J. Food Technol. 1 (1966) 25, constant for sucrose; Clausius–Clapeyron.
/// Sugar tables: 3.0 K at 60 °Brix, within 25 %.
pub fn boiling_rise_k(brix: f64) -> Option<f64> {
    if !(0.0..=BRIX_TABLE_MAX).contains(&brix) {
        return None;
    }
    let sugar = brix / MOLAR_MASS_SUCROSE;
    let x = sugar / (sugar + (100.0 - brix) / MOLAR_MASS_WATER);
    let ln_activity = math::ln_1p(-x) - 6.47 * x * x;
    Some(1.0 / (1.0 / 373.15 + GAS_CONSTANT * ln_activity / 40_660.0) - 373.15)
}

/// °Brix of a saturated sucrose solution at `temperature_c` [°C].
///
/// `64.447 + 0.08222 t + 1.6169e−3 t² − 1.558e−6 t³ − 4.63e−8 t⁴`.
/// Valid: 0–100 °C, pure sucrose in pure water; other solutes shift it either way.
/// Reference: G. Vavrinecz, Atlas of Sugar Crystals (1965), basis of ICUMSA SPS-2; 66.7 at 20 °C.
/// Older tables read up to 0.4 more (Herzfeld 1892, 67.09 at 20 °C).
pub fn saturation_brix(temperature_c: f64) -> f64 {
    let t = temperature_c;
    64.447 + t * (0.082_22 + t * (1.616_9e-3 + t * (-1.558e-6 - t * 4.63e-8)))
}

/// Viscosity of a sucrose solution [Pa s] from `brix` [°Brix] and `temperature_c` [°C]; `None` outside
/// 0–75 °Brix or 0–80 °C.
///
/// `log₁₀ μ_G = 22.46 x − 0.114 + (30 − t)/(91 + t)·(1.1 + 43.1 x^1.25)` in mPa s,
/// `x = °Brix/(1900 − 18 °Brix)`; times what brings it onto the table at 20 °C (up to 4 %), and,
/// fading out at 20 °Brix, onto water at every temperature.
/// Valid: at 20 °C within 0.4 % of the table, also between its rows; 10–60 °C within 5 %; at 0 °C up
/// to 12 % too high above 40 °Brix.
/// Reference: J. Génotelle, in Z. Bubník, P. Kadlec, D. Urban & M. Bruhns, Sugar Technologists Manual
/// (1995); table of J. F. Swindells and others, supplement to NBS Circular 440 (1958).
pub fn viscosity_pa_s(brix: f64, temperature_c: f64) -> Option<f64> {
    let t = temperature_c;
    if !((0.0..=BRIX_TABLE_MAX).contains(&brix) && t >= TEMPERATURE_C.0 && t <= TEMPERATURE_C.1) {
        return None;
    }
    let to_table = at_nodes(brix, |row| math::ln(row.viscosity_20c_mpa_s / 1000.0 / genotelle_pa_s(row.brix, 20.0)))?;
    let off_water = |t| math::ln(water::viscosity_pa_s(t) / genotelle_pa_s(0.0, t));
    let near_water = (1.0 - brix / 20.0).max(0.0);
    let correction = to_table + near_water * (off_water(t) - off_water(20.0));
    Some(genotelle_pa_s(brix, t) * math::exp(correction))
}

fn genotelle_pa_s(brix: f64, t: f64) -> f64 {
    let x = brix / (1900.0 - 18.0 * brix);
    math::exp10(22.46 * x - 3.114 + (30.0 - t) / (91.0 + t) * (1.1 + 43.1 * math::pow(x, 1.25)))
}

/// Refractive index at 20 °C, 589 nm [-] from `brix` [°Brix]; `None` outside 0–75.
///
/// Four-point interpolation between rows 5 °Brix apart, within 2e−5 of the table.
/// Reference: ICUMSA SPS-3 scale (1974); 12.5 °Brix: 1.35171 (OIV, table of must refractometry).
pub fn refractive_index_20c(brix: f64) -> Option<f64> {
    at_nodes(brix, |row| row.refractive_index_20c)
}

/// °Brix from the refractive index at 20 °C, 589 nm [-]; `None` outside the scale, 1.33299 to 1.47787.
///
/// Bisection of [`refractive_index_20c`].
pub fn brix_from_refractive_index_20c(index: f64) -> Option<f64> {
    let (low, high) = (refractive_index_20c(0.0)?, refractive_index_20c(BRIX_TABLE_MAX)?);
    if !(index >= low && index <= high) {
        return None;
    }
    rising(0.0, BRIX_TABLE_MAX, &|brix| refractive_index_20c(brix).is_some_and(|n| n < index))
}

/// A column of the table at `brix`, by the cubic through the four nearest rows: continuous across rows,
/// so that slopes taken by differences make sense.
fn at_nodes(brix: f64, column: fn(&SucroseRow) -> f64) -> Option<f64> {
    let rows = sucrose_rows();
    if !(0.0..=BRIX_TABLE_MAX).contains(&brix) || rows.len() < 4 {
        return None;
    }
    let x = brix / 5.0;
    let i = (x as usize).clamp(1, rows.len() - 3);
    let u = x - i as f64;
    let y = |k: usize| column(&rows[i + k - 1]);
    Some(
        -u * (u - 1.0) * (u - 2.0) / 6.0 * y(0) + (u + 1.0) * (u - 1.0) * (u - 2.0) / 2.0 * y(1)
            - (u + 1.0) * u * (u - 2.0) / 2.0 * y(2)
            + (u + 1.0) * u * (u - 1.0) / 6.0 * y(3),
    )
}

/// All of it about one solution.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct SugarSolution {
    /// Soluble solids [°Brix].
    pub brix: f64,
    /// Temperature [°C].
    pub temperature_c: f64,
    /// Density [g/mL].
    pub density_g_per_ml: f64,
    /// Viscosity [Pa s]; unknown outside the table.
    pub viscosity_pa_s: Option<f64>,
    /// Refractive index at 20 °C, 589 nm [-]; unknown outside the table.
    pub refractive_index_20c: Option<f64>,
    /// Boiling-point rise at 1 atm [K]; unknown outside 0–75 °Brix.
    pub boiling_rise_k: Option<f64>,
    /// Sucrose in a litre [g/L].
    pub sucrose_g_per_l: f64,
    /// Sucrose on water [mol/kg].
    pub molality_mol_per_kg: Option<f64>,
    /// °Brix at which sucrose is saturated at this temperature.
    pub saturation_brix: f64,
}

/// Everything here about a liquor of `brix` [°Brix] at `temperature_c` [°C]; `at` is the field that notices
/// and problems belong to.
///
/// # Errors
/// °Brix outside 0–85 or temperature outside 0–80 °C.
pub fn describe(brix: f64, temperature_c: f64, at: &str) -> Result<Outcome<SugarSolution>, Problem> {
    in_range(brix, temperature_c, at)?;
    let saturation = saturation_brix(temperature_c);
    let mut notices = Vec::new();
    let viscosity = viscosity_pa_s(brix, temperature_c);
    if brix > saturation {
        notices.push(Notice::new(
            at,
            format!(
                "{brix:.1} °Brix is above saturation: pure sucrose crystallises above {saturation:.1} °Brix at {temperature_c:.0} °C. \
                 Take less water off, or keep it warmer"
            ),
        ));
    }
    if viscosity.is_none() {
        notices.push(Notice::new(
            at,
            format!("The viscosity is tabulated to {BRIX_TABLE_MAX} °Brix; at {brix:.1} it is unknown"),
        ));
    } else if temperature_c < 10.0 && brix > 20.0 {
        notices.push(Notice::new(at, "Below 10 °C the viscosity of a sugar liquor may be up to 12 % lower than shown"));
    }
    Ok(Outcome {
        value: SugarSolution {
            brix,
            temperature_c,
            density_g_per_ml: density_g_per_ml(brix, temperature_c),
            viscosity_pa_s: viscosity,
            refractive_index_20c: refractive_index_20c(brix),
            boiling_rise_k: boiling_rise_k(brix),
            sucrose_g_per_l: sucrose_g_per_l(brix, temperature_c),
            molality_mol_per_kg: molality_mol_per_kg(brix),
            saturation_brix: saturation,
        },
        notices,
    })
}

/// Whether the density is answered for.
pub(crate) fn in_range(brix: f64, temperature_c: f64, at: &str) -> Result<(), Problem> {
    if !(0.0..=BRIX_MAX).contains(&brix) {
        return Err(Problem::new(
            at,
            format!("soluble solids are {brix} °Brix; densities are known from 0 to {BRIX_MAX}. Take less water off"),
        ));
    }
    let (low, high) = TEMPERATURE_C;
    if !(low..=high).contains(&temperature_c) {
        return Err(Problem::new(
            at,
            format!(
                "the liquor is at {temperature_c} °C; sugar solutions are tabulated from {low} to {high} °C. Give the temperature at which it is worked"
            ),
        ));
    }
    Ok(())
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Plato's table, NBS Circular 440, at 20 °C; and the SPS-4 polynomial at 60 °C as in a table of it.
    #[test]
    fn density_table() {
        for (brix, t, expected) in
            [(10.0, 20.0, 1.03811), (40.0, 20.0, 1.17641), (70.0, 20.0, 1.34714), (40.0, 60.0, 1.15671)]
        {
            assert!((density_g_per_ml(brix, t) - expected).abs() < 5e-4, "{brix}");
        }
        assert_eq!(density_g_per_ml(0.0, 37.0), water::density_g_per_ml(37.0));
    }

    /// CRC Handbook: rows between those held, 20 °C; Bingham & Jackson (1918) elsewhere.
    #[test]
    fn viscosity_table() {
        for (brix, t, mpa_s, room) in [
            (24.0, 20.0, 2.331, 0.004),
            (44.0, 20.0, 8.596, 0.004),
            (60.0, 50.0, 14.01, 0.05),
            (40.0, 10.0, 9.794, 0.05),
        ] {
            let got = 1000.0 * viscosity_pa_s(brix, t).unwrap();
            assert!((got / mpa_s - 1.0).abs() < room, "{brix} {t}: {got}");
        }
        let water = water::viscosity_pa_s(40.0);
        assert!((viscosity_pa_s(0.0, 40.0).unwrap() / water - 1.0).abs() < 1e-3);
    }

    /// OIV table of must refractometry, between the rows held: 12.5 and 17.5 %.
    #[test]
    fn refractive_index_between_rows() {
        for (brix, n) in [(12.5, 1.351_71), (17.5, 1.359_72)] {
            assert!((refractive_index_20c(brix).unwrap() - n).abs() < 1.5e-5);
            assert!((brix_from_refractive_index_20c(n).unwrap() - brix).abs() < 0.01);
        }
    }

    /// Claassen-type sugar tables: 1.05 and 3.0 K at 40 and 60 °Brix, which differ among themselves by 25 %.
    #[test]
    fn boiling_rise_against_sugar_tables() {
        for (brix, rise) in [(40.0, 1.05), (60.0, 3.0)] {
            assert!((boiling_rise_k(brix).unwrap() / rise - 1.0).abs() < 0.25);
        }
    }

    /// Solubility as printed in a Russian sugar handbook page: 64.44, 66.74, 70.22, 74.32 at 0, 20, 40, 60 °C.
    #[test]
    fn saturation_table() {
        for (t, expected) in [(0.0, 64.44), (20.0, 66.74), (40.0, 70.22), (60.0, 74.32), (80.0, 78.74)] {
            assert!((saturation_brix(t) - expected).abs() < 0.15, "{t}");
        }
        let said = |brix, t| describe(brix, t, "concentrate.to").unwrap().notices.len();
        assert_eq!((said(66.0, 20.0), said(68.0, 20.0), said(68.0, 40.0)), (0, 1, 0));
    }

    #[test]
    fn odd_input_is_refused_not_answered() {
        for (brix, t) in
            [(f64::NAN, 20.0), (-1.0, 20.0), (86.0, 20.0), (10.0, f64::NAN), (10.0, 99.0), (f64::INFINITY, 0.0)]
        {
            assert!(describe(brix, t, "x").is_err());
        }
        for g in [f64::NAN, -1.0, 1e9, f64::INFINITY] {
            assert!(brix_from_sucrose_g_per_l(g, 20.0).is_none() && brix_from_refractive_index_20c(g).is_none());
            assert!(viscosity_pa_s(g, 20.0).is_none() && molality_mol_per_kg(g).is_none());
        }
    }
}
