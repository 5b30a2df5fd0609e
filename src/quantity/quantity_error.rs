//! What can be wrong with a quantity.

use std::ops::Range;

use super::decimal_error::DecimalError;
use super::message::{explained_error, quoted};
use super::unit_error::UnitError;

/// Why a text is not a quantity. Spans are byte ranges in the text that was parsed.
#[derive(Debug, Clone, PartialEq, Eq)]
pub enum QuantityError {
    /// The value or its uncertainty is no number.
    Number(DecimalError),
    /// The unit is none.
    Unit(UnitError),
    /// An uncertainty that is zero, negative, or not whole digits in brackets.
    BadUncertainty { span: Range<usize>, text: String },
    /// `exact` beside a stated uncertainty.
    ExactWithUncertainty { span: Range<usize> },
    /// `±` behind the unit.
    UncertaintyAfterUnit { span: Range<usize> },
    /// A unit where the source has stated it for all values.
    UnitNotWanted { span: Range<usize>, text: String },
    /// A tolerance beside a value that states an uncertainty or is exact.
    ToleranceBesideUncertainty,
    /// A tolerance that is zero or negative, or states an uncertainty of its own.
    BadTolerance { text: String },
    /// A tolerance in `°C` or `°F`.
    ToleranceIsReading { text: String },
}

impl QuantityError {
    /// The byte range of the fault in the text that was parsed; `None` where two quantities do
    /// not go together.
    pub fn span(&self) -> Option<Range<usize>> {
        match self {
            Self::Number(error) => Some(error.span()),
            Self::Unit(error) => error.span(),
            Self::BadUncertainty { span, .. }
            | Self::ExactWithUncertainty { span }
            | Self::UncertaintyAfterUnit { span }
            | Self::UnitNotWanted { span, .. } => Some(span.clone()),
            Self::ToleranceBesideUncertainty
            | Self::BadTolerance { .. }
            | Self::ToleranceIsReading { .. } => None,
        }
    }

    /// What stands there.
    pub fn found(&self) -> String {
        match self {
            Self::Number(error) => error.found(),
            Self::Unit(error) => error.found(),
            Self::BadUncertainty { text, .. } => format!("the uncertainty {}", quoted(text)),
            Self::ExactWithUncertainty { .. } => "an exact value with an uncertainty".to_owned(),
            Self::UncertaintyAfterUnit { .. } => "an uncertainty behind the unit".to_owned(),
            Self::UnitNotWanted { text, .. } => format!("the unit {}", quoted(text)),
            Self::ToleranceBesideUncertainty => {
                "a tolerance beside a value that is exact or states an uncertainty".to_owned()
            }
            Self::BadTolerance { text } | Self::ToleranceIsReading { text } => {
                format!("the tolerance {}", quoted(text))
            }
        }
    }

    /// What should stand there.
    pub fn expected(&self) -> String {
        match self {
            Self::Number(error) => return error.expected(),
            Self::Unit(error) => return error.expected(),
            Self::BadUncertainty { .. } => "a positive uncertainty: ± 0.040 or (40)",
            Self::ExactWithUncertainty { .. } | Self::ToleranceBesideUncertainty => {
                "one statement of how well the value is known"
            }
            Self::UncertaintyAfterUnit { .. } => "one unit, behind value and uncertainty",
            Self::UnitNotWanted { .. } => "a number without a unit",
            Self::BadTolerance { .. } => "a positive half-width without an uncertainty",
            Self::ToleranceIsReading { .. } => "a temperature difference",
        }
        .to_owned()
    }

    /// What to do about it.
    pub fn advice(&self) -> String {
        match self {
            Self::Number(error) => return error.advice(),
            Self::Unit(error) => return error.advice(),
            Self::BadUncertainty { .. } => {
                "leave the uncertainty out where none is stated; put exact before a value \
                 that has none"
            }
            Self::ExactWithUncertainty { .. } => "leave out exact, or the uncertainty",
            Self::UncertaintyAfterUnit { .. } => "write it as 12.5 ± 0.4 kg",
            Self::UnitNotWanted { .. } => "leave the unit to the source",
            Self::ToleranceBesideUncertainty => "leave one of them out",
            Self::BadTolerance { .. } => "write a tolerance of ±12 kg as 12 kg",
            Self::ToleranceIsReading { .. } => "write it in K, Δ°C or Δ°F",
        }
        .to_owned()
    }
}

explained_error!(QuantityError);

impl From<UnitError> for QuantityError {
    fn from(error: UnitError) -> Self {
        Self::Unit(error)
    }
}
