//! Dimensions: what kind of quantity a unit measures, and its name in words.
//!
//! Leaves to others: units, and quantities of equal dimension that must not be mixed.

use std::fmt;

/// Powers of length, mass, time, thermodynamic temperature and amount of substance.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub struct Dimension([i32; 5]);

impl Dimension {
    /// A pure number.
    pub const ONE: Self = Self([0, 0, 0, 0, 0]);
    /// Length.
    pub const LENGTH: Self = Self([1, 0, 0, 0, 0]);
    /// Mass.
    pub const MASS: Self = Self([0, 1, 0, 0, 0]);
    /// Time.
    pub const TIME: Self = Self([0, 0, 1, 0, 0]);
    /// Thermodynamic temperature.
    pub const TEMPERATURE: Self = Self([0, 0, 0, 1, 0]);
    /// Amount of substance.
    pub const AMOUNT: Self = Self([0, 0, 0, 0, 1]);
    /// Volume.
    pub const VOLUME: Self = Self([3, 0, 0, 0, 0]);
    /// Energy, work, heat.
    pub const ENERGY: Self = Self([2, 1, -2, 0, 0]);
    /// Power, heat flow.
    pub const POWER: Self = Self([2, 1, -3, 0, 0]);
    /// Pressure.
    pub const PRESSURE: Self = Self([-1, 1, -2, 0, 0]);
    /// Force.
    pub const FORCE: Self = Self([1, 1, -2, 0, 0]);

    /// The dimension of a product.
    pub const fn times(self, other: Self) -> Self {
        let mut powers = self.0;
        let mut at = 0;
        while at < powers.len() {
            powers[at] = powers[at].saturating_add(other.0[at]);
            at += 1;
        }
        Self(powers)
    }

    /// The dimension of a quotient.
    pub const fn over(self, other: Self) -> Self {
        self.times(other.to_power(-1))
    }

    /// The dimension of a power.
    pub const fn to_power(self, power: i32) -> Self {
        let mut powers = self.0;
        let mut at = 0;
        while at < powers.len() {
            powers[at] = powers[at].saturating_mul(power);
            at += 1;
        }
        Self(powers)
    }
}

/// Dimensions that the field has a name for.
const NAMED: &[(Dimension, &str)] = &[
    (Dimension::ONE, "a pure number"),
    (Dimension::LENGTH, "length"),
    (Dimension::MASS, "mass"),
    (Dimension::TIME, "time"),
    (Dimension::TEMPERATURE, "temperature"),
    (Dimension::AMOUNT, "amount of substance"),
    (Dimension::VOLUME, "volume"),
    (Dimension::ENERGY, "energy"),
    (Dimension::POWER, "power"),
    (Dimension::PRESSURE, "pressure"),
    (Dimension::FORCE, "force"),
    (Dimension::LENGTH.to_power(2), "area"),
];

/// Numerators and denominators that quotients of two or three words are made of. The first
/// match in this order names a dimension: energy per volume is `pressure` above.
const NUMERATORS: &[(Dimension, &str)] = &[
    (Dimension::ENERGY, "energy"),
    (Dimension::POWER, "power"),
    (Dimension::MASS, "mass"),
    (Dimension::AMOUNT, "amount of substance"),
    (Dimension::VOLUME, "volume"),
    (Dimension::TEMPERATURE, "temperature"),
    (Dimension::LENGTH, "length"),
    (Dimension::ONE, "one"),
];
const DENOMINATORS: &[(Dimension, &str)] = &[
    (Dimension::MASS, "mass"),
    (Dimension::AMOUNT, "amount of substance"),
    (Dimension::VOLUME, "volume"),
    (Dimension::TIME, "time"),
    (Dimension::TEMPERATURE, "temperature"),
    (Dimension::LENGTH.to_power(2), "area"),
];

/// The name in words: `energy per amount of substance`; where the field has none, the powers of
/// the base quantities.
impl fmt::Display for Dimension {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        if let Some((_, name)) = NAMED.iter().find(|(named, _)| named == self) {
            return f.write_str(name);
        }
        match self.quotient().or_else(|| self.heat_capacity()) {
            Some(words) => f.write_str(&words),
            None => f.write_str(&self.powers()),
        }
    }
}

impl Dimension {
    /// `mass per volume`.
    fn quotient(self) -> Option<String> {
        NUMERATORS.iter().find_map(|(over, over_name)| {
            let (_, under_name) = DENOMINATORS
                .iter()
                .find(|(under, _)| over.over(*under) == self)?;
            Some(format!("{over_name} per {under_name}"))
        })
    }

    /// `energy per mass and temperature`.
    fn heat_capacity(self) -> Option<String> {
        let without_temperature = self.times(Self::TEMPERATURE);
        let words = without_temperature.quotient()?;
        Some(format!("{words} and temperature"))
    }

    /// `length^2 mass time^-3`.
    fn powers(self) -> String {
        let names = ["length", "mass", "time", "temperature", "amount"];
        let written: Vec<String> = names
            .iter()
            .zip(self.0)
            .filter(|(_, power)| *power != 0)
            .map(|(name, power)| match power {
                1 => (*name).to_owned(),
                _ => format!("{name}^{power}"),
            })
            .collect();
        written.join(" ")
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn names_in_words() {
        let molar = Dimension::ENERGY.over(Dimension::AMOUNT);
        let specific = Dimension::ENERGY.over(Dimension::MASS);
        for (dimension, words) in [
            (Dimension::ONE, "a pure number"),
            (molar, "energy per amount of substance"),
            (
                molar.over(Dimension::TEMPERATURE),
                "energy per amount of substance and temperature",
            ),
            (
                specific.over(Dimension::TEMPERATURE),
                "energy per mass and temperature",
            ),
            (Dimension::MASS.over(Dimension::VOLUME), "mass per volume"),
            (Dimension::MASS.over(Dimension::TIME), "mass per time"),
            (Dimension::ENERGY.over(Dimension::TIME), "power"),
            (Dimension::ENERGY.over(Dimension::VOLUME), "pressure"),
            (Dimension::ONE.over(Dimension::TIME), "one per time"),
            (
                Dimension::TIME.to_power(2).times(Dimension::MASS),
                "mass time^2",
            ),
        ] {
            assert_eq!(dimension.to_string(), words);
        }
    }
}
