//! Sums over all ions at one pH, the pH at which their charges cancel, and the ionic strength that
//! agrees with itself.

use super::activity::{DAVIES_MAX_MOL_PER_L, debye_hueckel_a, log_gamma_per_z2};
use super::carbonate;
use super::composition::{Activities, Carbonate, Composition, PH_RANGE};
use super::ionisation::Constant;
use super::water;
use crate::math;
use crate::order::put_in_order;
use crate::study::SiteKind;

/// A weak ingredient with its constants falling.
struct Ladder {
    pka: Vec<f64>,
    n_acid: usize,
    mol_per_l: f64,
}

impl Ladder {
    fn new(constants: &[Constant], mol_per_l: f64) -> Self {
        let mut pka: Vec<f64> = constants.iter().map(|c| c.pka).collect();
        put_in_order(&mut pka, |a, b| b.total_cmp(a));
        let n_acid = constants.iter().filter(|c| c.kind == SiteKind::Acid).count();
        Self { pka, n_acid, mol_per_l }
    }

    /// Mean charge and mean square charge, weights as in [`super::ionisation`].
    fn means(&self, ph: f64, lg: f64) -> (f64, f64) {
        let weight = |k: usize, sum: f64| {
            let z = k as f64 - self.n_acid as f64;
            (z, sum - z * z * lg)
        };
        let mut sum = 0.0;
        let mut top = weight(0, 0.0).1;
        for (k, pka) in self.pka.iter().enumerate() {
            sum += pka - ph;
            top = top.max(weight(k + 1, sum).1);
        }
        let (mut total, mut first, mut second) = (0.0, 0.0, 0.0);
        sum = 0.0;
        for k in 0..=self.pka.len() {
            let (z, log_w) = weight(k, sum);
            let w = math::exp10(log_w - top);
            total += w;
            first += w * z;
            second += w * z * z;
            sum += self.pka.get(k).map_or(0.0, |pka| pka - ph);
        }
        (first / total, second / total)
    }
}

/// Sums over all ions [mol/L].
#[derive(Clone, Copy)]
pub(super) struct Sums {
    /// `Σ z c`.
    pub charge: f64,
    /// `½ Σ z² c`.
    pub ionic_strength: f64,
    /// `−d(charge)/dpH` at constant activity coefficients.
    pub beta: f64,
    /// Hydrogen ions.
    pub h: f64,
    /// Hydroxide ions.
    pub oh: f64,
}

/// A composition made ready for many evaluations.
pub(super) struct Solver {
    strong_charge: f64,
    strong_squares: f64,
    ladders: Vec<Ladder>,
    /// `log10` of dissolved CO₂ at equilibrium with its gas, pK₁ and pK₂.
    open: Option<(f64, f64, f64)>,
    pkw: f64,
}

impl Solver {
    pub(super) fn new(c: &Composition) -> Self {
        let t = c.temperature_c;
        let (pk1, pk2) = (carbonate::pk1(t), carbonate::pk2(t));
        let mut ladders: Vec<Ladder> = c.weak.iter().map(|w| Ladder::new(&w.constants, w.mol_per_l)).collect();
        let mut open = None;
        match c.carbonate {
            Carbonate::Closed { mol_per_l } => ladders.push(Ladder { pka: vec![pk2, pk1], n_acid: 2, mol_per_l }),
            Carbonate::Open { co2_kpa } if co2_kpa > 0.0 => {
                open = Some((math::log10(carbonate::dissolved_co2_mol_per_l(co2_kpa, t)), pk1, pk2));
            }
            _ => {}
        }
        Self {
            strong_charge: c.strong_charge_mol_per_l(),
            strong_squares: c.strong.iter().map(|ion| f64::from(ion.charge * ion.charge) * ion.mol_per_l).sum(),
            ladders,
            open,
            pkw: water::pkw(t),
        }
    }

    /// Sums at `ph` with `log10 γ = z²·lg`.
    pub(super) fn sums(&self, ph: f64, lg: f64) -> Sums {
        let h = math::exp10(-ph - lg);
        let oh = math::exp10(ph - self.pkw - lg);
        let mut weak_charge = 0.0;
        let mut squares = 0.0;
        let mut spread = 0.0;
        for ladder in &self.ladders {
            let (z, zz) = ladder.means(ph, lg);
            weak_charge += ladder.mol_per_l * z;
            squares += ladder.mol_per_l * zz;
            spread += ladder.mol_per_l * (zz - z * z).max(0.0);
        }
        if let Some((log_co2, pk1, pk2)) = self.open {
            let bicarbonate = math::exp10(log_co2 - pk1 + ph - lg);
            let carbonate = math::exp10(log_co2 - pk1 - pk2 + 2.0 * ph - 4.0 * lg);
            weak_charge -= bicarbonate + 2.0 * carbonate;
            squares += bicarbonate + 4.0 * carbonate;
            spread += bicarbonate + 4.0 * carbonate;
        }
        Sums {
            charge: (self.strong_charge + weak_charge) + (h - oh),
            ionic_strength: 0.5 * (self.strong_squares + squares + h + oh),
            beta: math::LN_10 * (h + oh + spread),
            h,
            oh,
        }
    }

    /// The pH at which the charge is 0 and the sums there, searched from `start`; the end of
    /// the range nearest to it if it lies outside.
    ///
    /// The charge falls with pH everywhere, so a bracket holds the root: Newton's step where it
    /// stays inside, the middle where it does not, and after 30 steps the middle only. It stops
    /// when the bracket cannot be split.
    pub(super) fn solve(&self, lg: f64, start: f64) -> (f64, Sums) {
        let (mut low, mut high) = PH_RANGE;
        let mut ph = start.clamp(low, high);
        let mut best = (ph, self.sums(ph, lg));
        let mut here = best.1;
        for step in 0..120 {
            if here.charge.abs() < best.1.charge.abs() {
                best = (ph, here);
            }
            if here.charge == 0.0 {
                break;
            }
            if here.charge > 0.0 {
                low = ph
            } else {
                high = ph
            }
            let newton = ph + here.charge / here.beta;
            let next = if step < 30 && newton > low && newton < high { newton } else { 0.5 * (low + high) };
            if next <= low || next >= high {
                break;
            }
            ph = next;
            here = self.sums(ph, lg);
        }
        best
    }
}

/// `log10 γ` per `z²` at the ionic strength that `strength(log γ)` gives back for itself.
pub(super) fn settle(c: &Composition, strength: &mut dyn FnMut(f64) -> f64) -> f64 {
    if c.activities == Activities::Ideal {
        return 0.0;
    }
    let a = debye_hueckel_a(c.temperature_c);
    let mut over = |i: f64| strength(log_gamma_per_z2(i, a)) - i;
    let (mut low, mut high) = (0.0, DAVIES_MAX_MOL_PER_L);
    let mut over_high = over(high);
    if over_high >= 0.0 {
        return log_gamma_per_z2(high, a);
    }
    let mut over_low = over(low);
    // Regula falsi with the Illinois change: the bracket never opens, and the end that stays is
    // given half its weight so that it moves too.
    let mut last = 0;
    for _ in 0..100 {
        let chord = (low * over_high - high * over_low) / (over_high - over_low);
        let i = if chord > low && chord < high { chord } else { 0.5 * (low + high) };
        if i <= low || i >= high {
            break;
        }
        let here = over(i);
        if here.abs() <= 1e-15 * i {
            return log_gamma_per_z2(i, a);
        }
        if here > 0.0 {
            (low, over_low) = (i, here);
            over_high *= if last == 1 { 0.5 } else { 1.0 };
            last = 1;
        } else {
            (high, over_high) = (i, here);
            over_low *= if last == -1 { 0.5 } else { 1.0 };
            last = -1;
        }
    }
    log_gamma_per_z2(0.5 * (low + high), a)
}
