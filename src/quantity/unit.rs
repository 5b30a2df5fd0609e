//! A unit of measurement, and exact conversion between units.
//!
//! Leaves to others: reading unit expressions (`unit_parse`) and the units there are
//! (`unit_table`).

use std::fmt;

use num_traits::One;

use super::dimension::Dimension;
use super::exact::Exact;
use super::unit_error::UnitError;

/// What a fraction written in percent is a fraction of.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum FractionBasis {
    /// `wt%`
    Mass,
    /// `mol%`
    Amount,
    /// `vol%`
    Volume,
}

impl FractionBasis {
    /// `mass fraction` and so on.
    pub fn words(self) -> &'static str {
        match self {
            Self::Mass => "mass fraction",
            Self::Amount => "amount-of-substance fraction",
            Self::Volume => "volume fraction",
        }
    }
}

/// Distinctions that a dimension does not make.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum UnitKind {
    /// Measures its dimension, and no more is to be said.
    Plain,
    /// A reading on a scale with its own zero: `°C`, `°F`.
    Reading,
    /// A difference of two readings: `Δ°C`, `Δ°F`.
    Difference,
    /// A fraction in percent, with its basis.
    Fraction(FractionBasis),
}

/// A unit: value in SI = value × factor + offset, in the coherent SI unit of the dimension.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct Unit {
    symbol: String,
    dimension: Dimension,
    factor: Exact,
    offset: Option<Exact>,
    kind: UnitKind,
}

impl Unit {
    /// The unit one, of pure numbers.
    pub fn one() -> Self {
        Self::plain("1".to_owned(), Dimension::ONE, Exact::one())
    }

    /// A unit whose values are multiplied and nothing else.
    pub(super) fn plain(symbol: String, dimension: Dimension, factor: Exact) -> Self {
        Self::with_kind(symbol, dimension, factor, UnitKind::Plain)
    }

    /// A unit of the given kind, without an offset.
    pub(super) fn with_kind(
        symbol: String,
        dimension: Dimension,
        factor: Exact,
        kind: UnitKind,
    ) -> Self {
        Self {
            symbol,
            dimension,
            factor,
            offset: None,
            kind,
        }
    }

    /// The same unit, its zero lying at `offset` in SI.
    pub(super) fn with_offset(mut self, offset: Exact) -> Self {
        self.offset = Some(offset);
        self
    }

    /// The one spelling in which the program writes the unit: `kJ/(kg K)`.
    pub fn symbol(&self) -> &str {
        &self.symbol
    }

    /// What the unit measures.
    pub fn dimension(&self) -> Dimension {
        self.dimension
    }

    /// How many coherent SI units make one of it. The amount of substance counts in mol, mass
    /// in kg.
    pub fn factor(&self) -> &Exact {
        &self.factor
    }

    /// Where its zero lies, in coherent SI units, for `°C` and `°F`.
    pub fn offset(&self) -> Option<&Exact> {
        self.offset.as_ref()
    }

    /// What the dimension does not say.
    pub fn kind(&self) -> UnitKind {
        self.kind
    }

    /// A value in this unit, in the coherent SI unit.
    pub fn to_si(&self, value: &Exact) -> Exact {
        let scaled = value * &self.factor;
        match &self.offset {
            Some(offset) => scaled + offset,
            None => scaled,
        }
    }

    /// A value in the coherent SI unit, in this unit.
    pub fn out_of_si(&self, value: &Exact) -> Exact {
        match &self.offset {
            Some(offset) => (value - offset) / &self.factor,
            None => value / &self.factor,
        }
    }

    /// A value in this unit, exactly, in the unit `to`.
    ///
    /// # Errors
    /// The dimensions differ, a reading would become a difference, or a fraction change its basis.
    pub fn convert(&self, value: &Exact, to: &Self) -> Result<Exact, UnitError> {
        self.comparable(to)?;
        if self == to {
            return Ok(value.clone());
        }
        Ok(to.out_of_si(&self.to_si(value)))
    }

    /// What a difference, an uncertainty or a tolerance in this unit is multiplied by to be in
    /// the unit `to`; offsets play no part.
    ///
    /// # Errors
    /// The dimensions differ.
    pub fn ratio_to(&self, to: &Self) -> Result<Exact, UnitError> {
        if self.dimension != to.dimension {
            return Err(self.mismatch(to));
        }
        Ok(&self.factor / &to.factor)
    }

    /// Whether values in the two units can be converted into each other.
    fn comparable(&self, to: &Self) -> Result<(), UnitError> {
        use UnitKind::{Difference, Fraction, Reading};
        if self.dimension != to.dimension {
            return Err(self.mismatch(to));
        }
        let mixed = match (self.kind, to.kind) {
            (Reading, Difference) | (Difference, Reading) => true,
            (Fraction(a), Fraction(b)) => a != b,
            _ => false,
        };
        if mixed {
            return Err(UnitError::Kinds {
                from: self.clone().into(),
                to: to.clone().into(),
            });
        }
        Ok(())
    }

    fn mismatch(&self, to: &Self) -> UnitError {
        UnitError::Dimensions {
            from: self.clone().into(),
            to: to.clone().into(),
        }
    }
}

impl fmt::Display for Unit {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.write_str(&self.symbol)
    }
}

#[cfg(test)]
mod tests {
    use super::super::Decimal;
    use super::*;

    fn unit(text: &str) -> Unit {
        Unit::parse(text).unwrap_or_else(|error| panic!("{text}: {error}"))
    }

    fn value(text: &str) -> Exact {
        Decimal::parse(text).unwrap().value()
    }

    fn converted(number: &str, from: &str, to: &str) -> Result<Exact, UnitError> {
        unit(from).convert(&value(number), &unit(to))
    }

    #[test]
    fn temperatures() {
        // 0 °C = 273.15 K (SI brochure 2.3.1, from memory); 212 °F = 100 °C, -40 °F = -40 °C, by definition.
        assert_eq!(converted("0", "°C", "K"), Ok(value("273.15")));
        assert_eq!(converted("212", "°F", "°C"), Ok(value("100")));
        assert_eq!(converted("-40", "°F", "°C"), Ok(value("-40")));
        assert_eq!(converted("671.67", "°R", "°C"), Ok(value("100")));
        assert_eq!(converted("9", "Δ°F", "K"), Ok(value("5")));
    }

    #[test]
    fn differences_are_not_readings() {
        let error = converted("5", "Δ°C", "°C").unwrap_err();
        assert_eq!(
            error.to_string(),
            "found Δ°C, a temperature difference; expected °C, a reading; \
             give a temperature in K, °C or °F, and a difference in K, Δ°C or Δ°F"
        );
        assert_eq!(unit("Δ°C").ratio_to(&unit("°C")), Ok(value("1")));
    }

    #[test]
    fn dimensions_are_named_in_words() {
        let error = converted("1", "kJ/kg", "kJ/mol").unwrap_err();
        assert_eq!(
            error.to_string(),
            "found kJ/kg, energy per mass; expected kJ/mol, energy per amount of substance; \
             give the value in a unit of energy per amount of substance"
        );
    }

    #[test]
    fn fractions_keep_their_basis() {
        assert_eq!(converted("5", "wt%", "1"), Ok(value("0.05")));
        assert_eq!(converted("0.05", "kg/kg", "wt%"), Ok(value("5")));
        assert!(converted("5", "wt%", "mol%").is_err());
    }
}
