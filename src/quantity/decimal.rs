//! A number exactly as printed: its text, its value, and the place of its last digit.
//!
//! Leaves to others: uncertainties and units printed beside the number.

use std::fmt;
use std::ops::Range;

use num_bigint::BigInt;

use super::decimal_error::DecimalError;
use super::exact::{Exact, times_power_of_ten};

/// No table prints a number with more digits; it bounds the work that a text can ask for.
const MOST_DIGITS: usize = 100;
/// The largest power of ten accepted, either way.
const LARGEST_EXPONENT: i64 = 400;

/// A decimal number that keeps the digits it was printed with.
///
/// `3.140` and `3.14000` have equal [`value`](Self::value)s and different digits; `==` compares
/// the printed text.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct Decimal {
    printed: String,
    value: Exact,
    place: i64,
    significant_digits: u64,
    uncounted_zeros: u64,
}

impl Decimal {
    /// Reads `-285.830`, `1.200e3`, `+0.5`, `1200.`; U+2212 counts as a minus sign.
    ///
    /// # Errors
    /// Anything else, more than 100 digits, or an exponent beyond ±400.
    pub fn parse(text: &str) -> Result<Self, DecimalError> {
        let (negative, start) = sign(text);
        let exponent_at = text[start..]
            .find(['e', 'E'])
            .map_or(text.len(), |at| start + at);
        let mantissa = Mantissa::scan(text, start..exponent_at)?;
        let exponent = exponent(text, exponent_at)?;
        let place = exponent - mantissa.decimals;
        Ok(Self {
            printed: text.to_owned(),
            value: times_power_of_ten(mantissa.coefficient(negative), place),
            place,
            significant_digits: mantissa.significant_digits(),
            uncounted_zeros: mantissa.uncounted_zeros(),
        })
    }

    /// The text as given, byte for byte.
    pub fn printed(&self) -> &str {
        &self.printed
    }

    /// The value, exactly.
    pub fn value(&self) -> Exact {
        self.value.clone()
    }

    /// The power of ten of the last printed digit: -3 for `-285.830`, 0 for `1200` and `1200.`.
    pub fn place(&self) -> i64 {
        self.place
    }

    /// How many digits are significant (ASTM E29); the coarsest reading where trailing zeros
    /// cannot be counted. A printed zero has none.
    pub fn significant_digits(&self) -> u64 {
        self.significant_digits - self.uncounted_zeros
    }

    /// Whether this is an integer such as `1200`, printed without a decimal point, whose trailing
    /// zeros may or may not be significant (ASTM E29).
    pub fn ends_in_uncounted_zeros(&self) -> bool {
        self.uncounted_zeros > 0
    }

    /// The power of ten of the last digit that is certainly significant: 2 for `1200`.
    pub fn coarsest_place(&self) -> i64 {
        // At most MOST_DIGITS zeros: the sum stays far inside i64.
        self.place + self.uncounted_zeros as i64
    }
}

impl fmt::Display for Decimal {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.write_str(&self.printed)
    }
}

/// The digits before an exponent.
struct Mantissa {
    digits: String,
    decimals: i64,
    has_point: bool,
}

impl Mantissa {
    /// Reads the mantissa that stands at `span` of `text`.
    fn scan(text: &str, span: Range<usize>) -> Result<Self, DecimalError> {
        let mut digits = String::new();
        let mut point: Option<usize> = None;
        for (at, character) in text[span.clone()].char_indices() {
            let at = span.start + at;
            match character {
                '0'..='9' => digits.push(character),
                '.' if point.is_none() => point = Some(digits.len()),
                _ => {
                    let span = at..at + character.len_utf8();
                    return Err(DecimalError::Unexpected { span, character });
                }
            }
        }
        check_count(text, &digits, span)?;
        let decimals = point.map_or(0, |before| digits.len() - before) as i64;
        let has_point = point.is_some();
        Ok(Self {
            digits,
            decimals,
            has_point,
        })
    }

    fn coefficient(&self, negative: bool) -> BigInt {
        let sign = if negative { "-" } else { "" };
        // `digits` holds between 1 and MOST_DIGITS ASCII digits and nothing else.
        format!("{sign}{}", self.digits)
            .parse()
            .expect("ASCII digits are a whole number")
    }

    fn significant_digits(&self) -> u64 {
        self.digits.trim_start_matches('0').len() as u64
    }

    fn uncounted_zeros(&self) -> u64 {
        let significant = self.digits.trim_start_matches('0');
        if self.has_point {
            return 0;
        }
        (significant.len() - significant.trim_end_matches('0').len()) as u64
    }
}

/// At least one digit, and no more than a table prints.
fn check_count(text: &str, digits: &str, span: Range<usize>) -> Result<(), DecimalError> {
    if digits.is_empty() {
        let text = text.to_owned();
        return Err(DecimalError::NoDigits { span, text });
    }
    if digits.len() > MOST_DIGITS {
        return Err(DecimalError::TooManyDigits {
            span,
            found: digits.len(),
            limit: MOST_DIGITS,
        });
    }
    Ok(())
}

/// Whether the text is negative, and how many bytes its sign takes.
fn sign(text: &str) -> (bool, usize) {
    match text.chars().next() {
        Some('+') => (false, 1),
        Some(minus @ ('-' | '\u{2212}')) => (true, minus.len_utf8()),
        _ => (false, 0),
    }
}

/// The exponent whose `e` stands at byte `at`, zero where the text ends there.
fn exponent(text: &str, at: usize) -> Result<i64, DecimalError> {
    if at == text.len() {
        return Ok(0);
    }
    let written = &text[at + 1..];
    let span = at + 1..text.len();
    let (negative, sign_length) = sign(written);
    let digits = &written[sign_length..];
    if digits.is_empty() || !digits.bytes().all(|byte| byte.is_ascii_digit()) {
        let text = written.to_owned();
        return Err(DecimalError::BadExponent { span, text });
    }
    let size = digits.trim_start_matches('0');
    match format!("0{size}").parse::<i64>() {
        Ok(size) if size <= LARGEST_EXPONENT => Ok(if negative { -size } else { size }),
        _ => Err(DecimalError::ExponentTooLarge {
            span,
            text: written.to_owned(),
            limit: LARGEST_EXPONENT,
        }),
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn decimal(text: &str) -> Decimal {
        Decimal::parse(text).unwrap_or_else(|error| panic!("{text}: {error}"))
    }

    #[test]
    fn digits_and_places() {
        // ASTM E29-02 3.1 (excerpt, transcribed by others): 1270. and 32.00 have four significant
        // digits, 140 000 Pa has two to six, 1.40e5 Pa is to the nearest 1000 Pa.
        for (text, place, coarsest, digits) in [
            ("1270.", 0, 0, 4),
            ("32.00", -2, -2, 4),
            ("140000", 0, 4, 2),
            ("1.40e5", 3, 3, 3),
            ("-285.830", -3, -3, 6),
            ("1.200E+3", 0, 0, 4),
            ("+0.50", -2, -2, 2),
            ("0", 0, 0, 0),
            ("0.", 0, 0, 0),
            ("0.00", -2, -2, 0),
            ("12e-2", -2, -2, 2),
            (".5", -1, -1, 1),
        ] {
            let read = decimal(text);
            assert_eq!(read.place(), place, "{text}");
            assert_eq!(read.coarsest_place(), coarsest, "{text}");
            assert_eq!(read.significant_digits(), digits, "{text}");
            assert_eq!(read.ends_in_uncounted_zeros(), coarsest != place, "{text}");
            assert_eq!(read.printed(), text);
        }
    }

    #[test]
    fn values_are_exact() {
        let ratio = |n: i64, d: i64| Exact::new(n.into(), d.into());
        assert_eq!(decimal("\u{2212}285.830").value(), ratio(-28583, 100));
        assert_eq!(decimal("1.200E+3").value(), ratio(1200, 1));
        assert_eq!(decimal("-0.0").value(), ratio(0, 1));
        assert_eq!(decimal("5e-3").value(), ratio(1, 200));
    }

    #[test]
    fn faults_name_place_and_remedy() {
        for (text, message) in [
            (
                "",
                "found nothing; expected a number such as -285.830 or 1.200e3; \
                 write the value with the digits that its source prints",
            ),
            (
                "1,5",
                "found “,”; expected digits with at most one decimal point; \
                 use a decimal point, and nothing between groups of digits: 1234.5",
            ),
            (
                "1e401",
                "found the exponent “401”; expected an exponent between -400 and 400; \
                 check the exponent, or choose another unit",
            ),
        ] {
            let error = Decimal::parse(text).unwrap_err();
            assert_eq!(error.to_string(), message);
        }
        assert_eq!(Decimal::parse("1.5.2").unwrap_err().span(), 3..4);
        assert!(Decimal::parse(&"1".repeat(100)).is_ok());
        let long = Decimal::parse(&"1".repeat(101)).unwrap_err();
        assert_eq!(long.found(), "101 digits");
        let huge = format!("1e{}", "9".repeat(1000));
        assert!(Decimal::parse(&huge).is_err());
        for text in ["-", "e5", "1e", "1e+", "1e1.5", "--1", "1 2", "NaN", "inf"] {
            assert!(Decimal::parse(text).is_err(), "{text}");
        }
    }
}
