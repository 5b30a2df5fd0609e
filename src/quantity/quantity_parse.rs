//! Quantities in one string: `-285.830 ± 0.040 kJ/mol`, `1.200e3 kg`, `exact 3 mol`.
//!
//! Leaves to others: what a bare name in place of a quantity refers to.

use std::ops::Range;

use num_bigint::BigInt;
use num_traits::{Signed, Zero};

use super::decimal::Decimal;
use super::decimal_error::DecimalError;
use super::exact::times_power_of_ten;
use super::printed_quantity::Quantity;
use super::quantity_error::QuantityError;
use super::stated_uncertainty::StatedUncertainty;
use super::unit::Unit;

const EXACT: &str = "exact";
const PLUS_MINUS: [&str; 2] = ["±", "+/-"];
/// More digits in brackets than any value has are a mistake.
const MOST_BRACKET_DIGITS: usize = 20;

impl Quantity {
    /// Reads a value with its unit; without a unit it is a pure number.
    ///
    /// # Errors
    /// See [`QuantityError`]; the span is in `text`.
    pub fn parse(text: &str) -> Result<Self, QuantityError> {
        let (number, rest) = PrintedNumber::read(text)?;
        let written = text[rest..].trim();
        if written.is_empty() {
            return number.with(Unit::one(), String::new());
        }
        let start = rest + text[rest..].len() - text[rest..].trim_start().len();
        refuse_more_number(written, rest, start)?;
        let unit = Unit::parse(written).map_err(|error| error.shifted(start))?;
        number.with(unit, written.to_owned())
    }

    /// Reads a number with or without uncertainty, whose unit is stated elsewhere
    /// (see [`Quantity::with_unit`]).
    ///
    /// # Errors
    /// See [`QuantityError`]; a unit is one.
    pub fn parse_number(text: &str) -> Result<Self, QuantityError> {
        let (number, rest) = PrintedNumber::read(text)?;
        let written = text[rest..].trim();
        if !written.is_empty() {
            let start = rest + text[rest..].len() - text[rest..].trim_start().len();
            return Err(QuantityError::UnitNotWanted {
                span: start..start + written.len(),
                text: written.to_owned(),
            });
        }
        number.with(Unit::one(), String::new())
    }
}

/// Refuses digits in groups (`1 200 kg`) and an uncertainty behind the unit (`12 kg ± 1 kg`).
fn refuse_more_number(unit: &str, rest: usize, start: usize) -> Result<(), QuantityError> {
    let digits = unit.len() - unit.trim_start_matches(|c: char| c.is_ascii_digit()).len();
    if digits > 0 && !unit.starts_with("1/") && !unit.starts_with("1 ") {
        let span = rest..start + digits;
        let error = DecimalError::Unexpected {
            span,
            character: ' ',
        };
        return Err(QuantityError::Number(error));
    }
    match PLUS_MINUS.iter().find_map(|sign| unit.find(sign)) {
        Some(at) => Err(QuantityError::UncertaintyAfterUnit {
            span: start + at..start + unit.len(),
        }),
        None => Ok(()),
    }
}

/// All that may stand before a unit.
struct PrintedNumber {
    decimal: Decimal,
    exact: bool,
    uncertainty: Option<StatedUncertainty>,
    /// Where it stands, for messages about the whole.
    span: Range<usize>,
    text: String,
}

impl PrintedNumber {
    /// Reads the number, and says at which byte the rest begins.
    fn read(text: &str) -> Result<(Self, usize), QuantityError> {
        let mut reader = Reader { text, at: 0 };
        reader.skip_spaces();
        let start = reader.at;
        let exact = reader.take_exact();
        let (decimal, in_brackets) = reader.take_value()?;
        let uncertainty = match in_brackets {
            Some(stated) => Some(stated),
            None => reader.take_plus_minus()?,
        };
        let span = start..reader.at;
        let text = text[span.clone()].to_owned();
        let number = Self {
            decimal,
            exact,
            uncertainty,
            span,
            text,
        };
        Ok((number, reader.at))
    }

    fn with(self, unit: Unit, unit_text: String) -> Result<Quantity, QuantityError> {
        if self.exact && self.uncertainty.is_some() {
            return Err(QuantityError::ExactWithUncertainty { span: self.span });
        }
        let counted = self.exact || self.uncertainty.is_some();
        Ok(Quantity {
            ambiguous_zeros: !counted && self.decimal.ends_in_uncounted_zeros(),
            decimal: self.decimal,
            unit,
            exact: self.exact,
            uncertainty: self.uncertainty,
            number_text: self.text,
            unit_text,
        })
    }
}

/// A place in the text, moving forward.
struct Reader<'a> {
    text: &'a str,
    at: usize,
}

impl Reader<'_> {
    fn rest(&self) -> &str {
        &self.text[self.at..]
    }

    fn skip_spaces(&mut self) {
        self.at = self.text.len() - self.rest().trim_start().len();
    }

    /// The word `exact` with a space after it.
    fn take_exact(&mut self) -> bool {
        let after = self.rest().strip_prefix(EXACT);
        if !after.is_some_and(|after| after.starts_with(char::is_whitespace)) {
            return false;
        }
        self.at += EXACT.len();
        self.skip_spaces();
        true
    }

    /// The text up to a space, a bracket or a plus-minus sign, with its span.
    fn take_word(&mut self) -> Range<usize> {
        let rest = self.rest();
        let ends = [
            rest.find(char::is_whitespace),
            rest.find('('),
            rest.find(PLUS_MINUS[0]),
            rest.find(PLUS_MINUS[1]),
        ];
        let length = ends.into_iter().flatten().min().unwrap_or(rest.len());
        let span = self.at..self.at + length;
        self.at = span.end;
        span
    }

    /// A number, and the digits in brackets that follow it: `-285.830(40)`, `1.2345(12)e3`.
    fn take_value(&mut self) -> Result<(Decimal, Option<StatedUncertainty>), QuantityError> {
        let number = self.take_word();
        if !self.rest().starts_with('(') {
            return Ok((self.decimal(number)?, None));
        }
        // The mantissa alone, so that a fault in it is reported where it stands.
        self.decimal(number.clone())?;
        let bracket = self.take_bracket();
        let exponent = self.take_exponent();
        let written = format!("{}{}", &self.text[number.clone()], &self.text[exponent]);
        let decimal = Decimal::parse(&written).map_err(|error| {
            // Only the exponent can be at fault, and it stands after the bracket.
            QuantityError::Number(error.shifted(number.start + bracket.len()))
        })?;
        let stated = self.last_digits(bracket, decimal.place())?;
        Ok((decimal, Some(stated)))
    }

    fn decimal(&self, span: Range<usize>) -> Result<Decimal, QuantityError> {
        Decimal::parse(&self.text[span.clone()])
            .map_err(|error: DecimalError| QuantityError::Number(error.shifted(span.start)))
    }

    /// The span from `(` to `)`, or to the end where nothing closes it.
    fn take_bracket(&mut self) -> Range<usize> {
        let length = self.rest().find(')').map_or(self.rest().len(), |at| at + 1);
        let span = self.at..self.at + length;
        self.at = span.end;
        span
    }

    /// The exponent after a bracket, empty where there is none.
    fn take_exponent(&mut self) -> Range<usize> {
        if self.rest().starts_with(['e', 'E']) {
            self.take_word()
        } else {
            self.at..self.at
        }
    }

    /// The standard uncertainty in the last digits, the last one at `place`.
    fn last_digits(
        &self,
        bracket: Range<usize>,
        place: i64,
    ) -> Result<StatedUncertainty, QuantityError> {
        let printed = self.text[bracket.clone()].to_owned();
        let standard = printed
            .strip_prefix('(')
            .and_then(|digits| digits.strip_suffix(')'))
            .filter(|digits| digits.len() <= MOST_BRACKET_DIGITS)
            .filter(|digits| digits.bytes().all(|byte| byte.is_ascii_digit()))
            .and_then(|digits| digits.parse::<BigInt>().ok())
            .filter(|digits| !digits.is_zero())
            .map(|digits| times_power_of_ten(digits, place));
        match standard {
            Some(standard) => Ok(StatedUncertainty::StandardLastDigits { standard, printed }),
            None => Err(QuantityError::BadUncertainty {
                span: bracket,
                text: printed,
            }),
        }
    }

    /// `± 0.040` or `+/- 0.040`, where one follows.
    fn take_plus_minus(&mut self) -> Result<Option<StatedUncertainty>, QuantityError> {
        let before = self.at;
        self.skip_spaces();
        let Some(sign) = PLUS_MINUS
            .into_iter()
            .find(|sign| self.rest().starts_with(sign))
        else {
            self.at = before;
            return Ok(None);
        };
        self.at += sign.len();
        self.skip_spaces();
        let span = self.take_word();
        let half_width = self.decimal(span.clone())?.value();
        let printed = self.text[span.clone()].to_owned();
        if !half_width.is_positive() {
            let text = printed;
            return Err(QuantityError::BadUncertainty { span, text });
        }
        Ok(Some(StatedUncertainty::Expanded {
            half_width,
            printed,
        }))
    }
}

#[cfg(test)]
#[path = "quantity_parse_tests.rs"]
mod tests;
