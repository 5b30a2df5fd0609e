//! Reading the quantities and numbers of a source file.

use num_traits::Signed;

use crate::document::{Reader, quantity, value_fault};
use crate::finding::{FaultCode, Located};
use crate::quantity::{Decimal, Dimension, Exact, Quantity, UnitKind};

/// A temperature, not a difference of two.
pub(super) fn read_temperature(reader: &Reader<'_>, text: &Located<String>) -> Option<Quantity> {
    let read = measured(reader, text, Dimension::TEMPERATURE)?;
    if read.unit.kind() == UnitKind::Difference {
        wrong_dimension(
            reader,
            text,
            "a temperature difference",
            Dimension::TEMPERATURE,
        );
        return None;
    }
    above_zero_kelvin(reader, text, &read.value_in_si()).then_some(read)
}

/// Whether a temperature is above absolute zero; reported where it is not.
pub(super) fn above_zero_kelvin(
    reader: &Reader<'_>,
    text: &Located<String>,
    kelvin: &Exact,
) -> bool {
    let above = kelvin.is_positive();
    if !above {
        value_fault(
            reader,
            &text.span,
            format!("\"{}\"", text.value),
            "a temperature above 0 K",
            "check the sign and the unit; leave out a point at 0 K",
        );
    }
    above
}

/// A quantity that measures what is asked for.
pub(super) fn measured(
    reader: &Reader<'_>,
    text: &Located<String>,
    dimension: Dimension,
) -> Option<Quantity> {
    let read = quantity(reader, text)?.value;
    if read.unit.dimension() == dimension {
        return Some(read);
    }
    wrong_dimension(reader, text, &read.unit.dimension().to_string(), dimension);
    None
}

pub(super) fn wrong_dimension(
    reader: &Reader<'_>,
    text: &Located<String>,
    found: &str,
    wanted: Dimension,
) {
    reader.fault(
        FaultCode::Quantity,
        &text.span,
        format!("\"{}\": {found}", text.value),
        wanted.to_string(),
        "check the unit that the table prints",
    );
}

/// A plain decimal number in a string.
pub(super) fn read_decimal(reader: &Reader<'_>, text: &Located<String>) -> Option<Decimal> {
    let decimal = Decimal::parse(&text.value);
    if let Err(error) = &decimal {
        value_fault(
            reader,
            &text.span,
            format!("\"{}\"", text.value),
            "a decimal number as printed",
            error.advice(),
        );
    }
    decimal.ok()
}
