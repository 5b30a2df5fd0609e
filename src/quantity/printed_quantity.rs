//! A value with its unit and what is stated of its uncertainty, as printed.
//!
//! Leaves to others: reading the text (`quantity_parse`), and where the value comes from.

use std::fmt;

use num_traits::{Signed, Zero};

use super::decimal::Decimal;
use super::exact::Exact;
use super::quantity_error::QuantityError;
use super::significance::Significance;
use super::stated_uncertainty::{Coverage, StatedUncertainty};
use super::unit::{Unit, UnitKind};
use super::unit_error::UnitError;

/// A printed value, its unit, and what is known of its uncertainty.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct Quantity {
    /// The number as printed, without its uncertainty.
    pub decimal: Decimal,
    /// The unit that the number counts.
    pub unit: Unit,
    /// Whether the value limits no digits and has no uncertainty.
    pub exact: bool,
    /// The stated uncertainty; `None` means not stated, never zero (unless `exact`).
    pub uncertainty: Option<StatedUncertainty>,
    /// Whether the value was taken at its coarsest reading because its trailing zeros cannot be
    /// counted (ASTM E29), and neither `exact` nor an uncertainty says more.
    pub ambiguous_zeros: bool,
    /// The text before the unit.
    pub(super) number_text: String,
    /// The unit as written; empty where it was not.
    pub(super) unit_text: String,
}

impl Quantity {
    /// The number with its uncertainty, as printed: `-285.830 ± 0.040`.
    pub fn printed_number(&self) -> &str {
        &self.number_text
    }

    /// The value in the coherent SI unit, exactly.
    pub fn value_in_si(&self) -> Exact {
        self.unit.to_si(&self.decimal.value())
    }

    /// The value in another unit, exactly.
    ///
    /// # Errors
    /// The units do not measure the same.
    pub fn value_in(&self, unit: &Unit) -> Result<Exact, UnitError> {
        self.unit.convert(&self.decimal.value(), unit)
    }

    /// The standard uncertainty in the coherent SI unit; `None` where none is stated.
    /// `coverage` is that of the source, for an uncertainty printed with ±.
    pub fn standard_uncertainty_in_si(&self, coverage: &Coverage) -> Option<f64> {
        let uncertainty = self.in_si(self.uncertainty.as_ref()?);
        Some(uncertainty.standard(coverage))
    }

    /// The stated uncertainty, its width in the coherent SI unit.
    fn in_si(&self, uncertainty: &StatedUncertainty) -> StatedUncertainty {
        let scaled = |width: &Exact| width * self.unit.factor();
        let mut uncertainty = uncertainty.clone();
        match &mut uncertainty {
            StatedUncertainty::Expanded { half_width, .. }
            | StatedUncertainty::Tolerance { half_width } => *half_width = scaled(half_width),
            StatedUncertainty::StandardLastDigits { standard, .. } => *standard = scaled(standard),
        }
        uncertainty
    }

    /// The digits that the value has in its own unit.
    pub fn significance(&self) -> Significance {
        if self.exact {
            Significance::Exact
        } else {
            Significance::Place(self.decimal.coarsest_place())
        }
    }

    /// The digits that the value has in the coherent SI unit. A conversion factor is exact and
    /// keeps the count of digits; a change of zero (`°C` to `K`) keeps the place.
    pub fn significance_in_si(&self) -> Significance {
        let value = match self.unit.offset() {
            Some(_) => Exact::zero(),
            None => self.decimal.value(),
        };
        self.significance().times_exact(&value, self.unit.factor())
    }

    /// The same number in `unit`, where a source states the unit of all its values.
    #[must_use]
    pub fn with_unit(mut self, unit: Unit) -> Self {
        self.unit_text = unit.symbol().to_owned();
        self.unit = unit;
        self
    }

    /// The same value with a tolerance stated beside it.
    ///
    /// # Errors
    /// The value says otherwise how well it is known; the tolerance is not a positive quantity
    /// of the same dimension, or is a reading in `°C` or `°F`.
    pub fn with_tolerance(mut self, tolerance: &Self) -> Result<Self, QuantityError> {
        if self.exact || self.uncertainty.is_some() {
            return Err(QuantityError::ToleranceBesideUncertainty);
        }
        let text = tolerance.to_string();
        if tolerance.unit.kind() == UnitKind::Reading {
            return Err(QuantityError::ToleranceIsReading { text });
        }
        let width = tolerance.decimal.value();
        if !width.is_positive() || tolerance.uncertainty.is_some() {
            return Err(QuantityError::BadTolerance { text });
        }
        let half_width = width * tolerance.unit.ratio_to(&self.unit)?;
        self.uncertainty = Some(StatedUncertainty::Tolerance { half_width });
        self.ambiguous_zeros = false;
        Ok(self)
    }
}

/// The quantity as printed.
impl fmt::Display for Quantity {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.write_str(&self.number_text)?;
        if self.unit_text.is_empty() {
            return Ok(());
        }
        write!(f, " {}", self.unit_text)
    }
}
