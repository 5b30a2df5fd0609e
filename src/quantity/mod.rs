//! Quantities: numbers exactly as printed, with units, significant digits and uncertainty.
//!
//! Responsible for reading `"-285.830 ± 0.040 kJ/mol"` without losing a digit, for exact
//! arithmetic and unit conversion, for propagating significance (ASTM E29) and uncertainty
//! (JCGM 100:2008), and for the one rounding at the end.
//!
//! Leaves to others: where a number comes from, what it is used for, chemical notation, files,
//! and the layout of anything that people read. Nothing here depends on the rest of the program.
//!
//! | file | noun |
//! | --- | --- |
//! | `decimal` | [`Decimal`]: a number as printed |
//! | `exact` | [`Exact`]: rational numbers, their text and their one rounding |
//! | `nearest_float` | [`to_f64`]: the floating-point number nearest to an exact one |
//! | `full_text` | numbers of a working, before anything is rounded |
//! | `real` | [`Real`]: exact while it can be, floating point after that |
//! | `dimension`, `unit`, `unit_table`, `unit_lookup`, `unit_tokens`, `unit_parse` | [`Unit`] |
//! | `printed_quantity`, `quantity_parse` | [`Quantity`]: value, unit, stated uncertainty |
//! | `stated_uncertainty` | [`StatedUncertainty`] and the [`Coverage`] it is read with |
//! | `significance` | [`Significance`]: the digits that a result may claim |
//! | `linear_form`, `correlation`, `combination` | combined standard uncertainty |
//! | `stating` | [`Stated`]: a result as it is stated |

mod combination;
mod correlation;
mod decimal;
mod decimal_error;
mod dimension;
mod exact;
mod full_text;
mod linear_form;
mod message;
mod nearest_float;
mod printed_quantity;
#[cfg(test)]
mod properties;
mod quantity_error;
mod quantity_parse;
mod real;
mod significance;
mod stated_uncertainty;
mod stating;
mod unit;
mod unit_error;
mod unit_lookup;
mod unit_parse;
mod unit_table;
mod unit_tokens;

pub use combination::{Combined, InputUncertainty, combine};
pub use correlation::{CorrelationError, Correlations};
pub use decimal::Decimal;
pub use decimal_error::DecimalError;
pub use dimension::Dimension;
pub use exact::{
    Exact, Rounded, exact_text, order_of_magnitude, power_of_ten, round_to_place,
    terminating_decimal,
};
pub use full_text::{cut_text, full_text, working_text};
pub use linear_form::LinearForm;
pub use nearest_float::to_f64;
pub use printed_quantity::Quantity;
pub use quantity_error::QuantityError;
pub use real::Real;
pub use significance::Significance;
pub use stated_uncertainty::{Coverage, CoverageError, StatedUncertainty};
pub use stating::{Stated, three_digits, two_digits};
pub use unit::{FractionBasis, Unit, UnitKind};
pub use unit_error::UnitError;
