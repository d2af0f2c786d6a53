//! What a liquid is made of, as far as its pH goes.

use super::ionisation::Constant;
use crate::study::Problem;

/// Lowest and highest pH looked at.
pub const PH_RANGE: (f64, f64) = (-2.0, 16.0);
/// Highest concentration accepted [mol/L]; water itself is 55.
pub const MAX_MOL_PER_L: f64 = 60.0;
/// Highest partial pressure of carbon dioxide accepted [kPa].
pub const MAX_CO2_KPA: f64 = 10_000.0;

/// An ion whose charge no pH changes, e.g. sodium, calcium, chloride.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct StrongIon {
    /// Charge number, −8 to 8.
    pub charge: i32,
    /// Concentration [mol/L].
    pub mol_per_l: f64,
}

/// An ingredient with acid or base sites, all its protonation states together.
#[derive(Clone, Debug, PartialEq)]
pub struct Weak {
    /// Thermodynamic macroscopic constants at the temperature of the liquid, in any order.
    pub constants: Vec<Constant>,
    /// Concentration of all its states [mol/L].
    pub mol_per_l: f64,
}

/// Dissolved carbon dioxide, bicarbonate and carbonate.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum Carbonate {
    /// None.
    None,
    /// All three together, nothing exchanged with a gas [mol/L].
    Closed {
        /// Their sum [mol/L].
        mol_per_l: f64,
    },
    /// In equilibrium with a gas.
    Open {
        /// Partial pressure of carbon dioxide [kPa]; outdoor air has about 0.042.
        co2_kpa: f64,
    },
}

/// How the ions' activities are worked out.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Activities {
    /// Davies equation; see [`super::activity`].
    Davies,
    /// Every activity is the concentration, as in textbook problems.
    Ideal,
}

/// What a liquid is made of.
///
/// Weak ingredients are counted without their counter-ions: trisodium citrate is citric acid
/// (three acid sites) and three times as much sodium among the strong ions.
#[derive(Clone, Debug, PartialEq)]
pub struct Composition {
    /// Ions of fixed charge.
    pub strong: Vec<StrongIon>,
    /// Acids and bases.
    pub weak: Vec<Weak>,
    /// Carbon dioxide.
    pub carbonate: Carbonate,
    /// Temperature [°C].
    pub temperature_c: f64,
    /// How activities are worked out.
    pub activities: Activities,
}

impl Composition {
    /// Water at `temperature_c` [°C], activities by Davies.
    pub fn water(temperature_c: f64) -> Self {
        Self {
            strong: Vec::new(),
            weak: Vec::new(),
            carbonate: Carbonate::None,
            temperature_c,
            activities: Activities::Davies,
        }
    }

    /// The same with `mol_per_l` [mol/L] more of a singly charged cation; negative: of an anion.
    #[must_use]
    pub fn with_strong_ions(mut self, mol_per_l: f64) -> Self {
        let charge = if mol_per_l < 0.0 { -1 } else { 1 };
        self.strong.push(StrongIon { charge, mol_per_l: mol_per_l.abs() });
        self
    }

    /// Everything dissolved times `factor` [-]; an open carbonate stays at its pressure.
    #[must_use]
    pub fn scaled(mut self, factor: f64) -> Self {
        for ion in &mut self.strong {
            ion.mol_per_l *= factor;
        }
        for weak in &mut self.weak {
            weak.mol_per_l *= factor;
        }
        if let Carbonate::Closed { mol_per_l } = &mut self.carbonate {
            *mol_per_l *= factor;
        }
        self
    }

    /// Charge of the strong ions [mol/L], positive where cations are in excess.
    pub fn strong_charge_mol_per_l(&self) -> f64 {
        self.strong.iter().map(|ion| f64::from(ion.charge) * ion.mol_per_l).sum()
    }

    /// The first reason why the pH of this liquid cannot be worked out.
    ///
    /// # Errors
    /// A concentration below 0, above [`MAX_MOL_PER_L`] or not a number; a charge beyond ±8; a
    /// pKa outside −20 to 40; a temperature outside 0–100 °C; a pressure outside 0–10 000 kPa.
    pub fn check(&self) -> Result<(), Problem> {
        within("composition.temperature_c", "temperature", self.temperature_c, (0.0, 100.0), "°C")?;
        for (i, ion) in self.strong.iter().enumerate() {
            concentration(&format!("composition.strong[{i}]"), ion.mol_per_l)?;
            within(&format!("composition.strong[{i}].charge"), "charge", f64::from(ion.charge), (-8.0, 8.0), "")?;
        }
        for (i, weak) in self.weak.iter().enumerate() {
            concentration(&format!("composition.weak[{i}]"), weak.mol_per_l)?;
            for c in &weak.constants {
                within(&format!("composition.weak[{i}].constants"), "pKa", c.pka, (-20.0, 40.0), "")?;
            }
        }
        match self.carbonate {
            Carbonate::None => Ok(()),
            Carbonate::Closed { mol_per_l } => concentration("composition.carbonate", mol_per_l),
            Carbonate::Open { co2_kpa } => within(
                "composition.carbonate.co2_kpa",
                "partial pressure of carbon dioxide",
                co2_kpa,
                (0.0, MAX_CO2_KPA),
                "kPa",
            ),
        }
    }
}

fn concentration(at: &str, value: f64) -> Result<(), Problem> {
    within(&format!("{at}.mol_per_l"), "concentration", value, (0.0, MAX_MOL_PER_L), "mol/L")
}

/// Refuses `value` outside `range`, and what is not a number.
pub(super) fn within(at: &str, what: &str, value: f64, range: (f64, f64), unit: &str) -> Result<(), Problem> {
    if value >= range.0 && value <= range.1 {
        return Ok(());
    }
    let space = if unit.is_empty() { "" } else { " " };
    Err(Problem::new(
        at,
        format!("{what} is {value}{space}{unit}; allowed is {} to {}{space}{unit}. Correct it", range.0, range.1),
    ))
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn refusals_name_the_field() {
        let salt = |mol_per_l| Composition {
            strong: vec![StrongIon { charge: 1, mol_per_l: 0.1 }, StrongIon { charge: -1, mol_per_l }],
            ..Composition::water(25.0)
        };
        assert!(salt(0.1).check().is_ok());
        for bad in [-0.1, f64::NAN, f64::INFINITY, 61.0] {
            assert_eq!(salt(bad).check().unwrap_err().at, "composition.strong[1].mol_per_l");
        }
        assert_eq!(Composition::water(120.0).check().unwrap_err().at, "composition.temperature_c");
        let open = Composition { carbonate: Carbonate::Open { co2_kpa: -1.0 }, ..Composition::water(25.0) };
        assert!(open.check().unwrap_err().message.contains("partial pressure of carbon dioxide is -1 kPa"));
    }

    #[test]
    fn scaling_leaves_the_gas_alone() {
        let c = Composition { carbonate: Carbonate::Open { co2_kpa: 0.04 }, ..Composition::water(25.0) };
        let c = c.with_strong_ions(-0.2).scaled(3.0);
        assert_eq!(c.carbonate, Carbonate::Open { co2_kpa: 0.04 });
        assert!((c.strong_charge_mol_per_l() + 0.6).abs() < 1e-15);
    }
}
