//! The numbers of notation: counts, multipliers and coefficients, exact.
//!
//! Reads decimals and fractions and writes them in one canonical form. Measured values,
//! with their digits and units, are left to `quantity`.

use std::ops::Range;

use num_bigint::BigInt;
use num_integer::Integer;
use num_rational::BigRational;
use num_traits::{One, Zero};

use super::cursor::{Cursor, Script};
use super::error::{Bounded, Message, NotationError, quoted};

/// The most digits that a number may have, on either side of a fraction bar.
const MAX_DIGITS: usize = 64;

/// What a number is there for.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum NumberRole {
    /// How many of an atom or group: `2` in `H2O`.
    Count,
    /// How many of an added part: `5` in `CuSO4·5H2O`.
    Multiplier,
    /// Before a participant of an equation.
    Coefficient,
    /// Moles of water in `(aq, 100 H2O)`.
    Water,
}

/// What can be wrong with a number.
#[derive(Clone, Debug, PartialEq, Eq)]
pub enum NumberFault {
    /// Zero where only more makes sense.
    Zero { role: NumberRole },
    /// A zero before other digits, often meant as a letter O.
    LeadingZero { role: NumberRole, text: String },
    /// A fraction over zero.
    ZeroDenominator { text: String },
    /// Neither integer nor decimal nor fraction.
    Malformed { role: NumberRole, text: String },
}

/// A number as it was found.
pub(super) struct Scanned<'a> {
    pub(super) value: BigRational,
    pub(super) text: &'a str,
    pub(super) span: Range<usize>,
    pub(super) script: Script,
}

impl NumberRole {
    fn name(self) -> &'static str {
        match self {
            Self::Count => "count",
            Self::Multiplier => "multiplier",
            Self::Coefficient => "coefficient",
            Self::Water => "amount of water",
        }
    }

    fn with_article(self) -> &'static str {
        match self {
            Self::Count => "a count",
            Self::Multiplier => "a multiplier",
            Self::Coefficient => "a coefficient",
            Self::Water => "an amount of water",
        }
    }

    fn without_zero(self) -> &'static str {
        match self {
            Self::Count => "write the letter O if oxygen is meant, or leave the part out",
            Self::Multiplier => "leave the part out",
            Self::Coefficient => "leave the term out",
            Self::Water => "give the substance another phase, such as (l) or (g)",
        }
    }
}

impl NumberFault {
    pub(super) fn message(&self) -> Message {
        match self {
            Self::Zero { role } => Message::new(
                format!("{} of zero", role.with_article()),
                "a number above zero",
                role.without_zero(),
            ),
            Self::LeadingZero { role, text } => Message::new(
                format!("the {} {} with a zero before it", role.name(), quoted(text)),
                "a number without leading zeros",
                match role {
                    NumberRole::Count => "write the letter O if oxygen is meant",
                    _ => "leave the zeros out",
                },
            ),
            Self::ZeroDenominator { text } => Message::new(
                format!("{}, which divides by zero", quoted(text)),
                "a number below the bar that is above zero",
                "correct the fraction",
            ),
            Self::Malformed { role, text } => Message::new(
                format!("the {} {}", role.name(), quoted(text)),
                "an integer, a decimal such as `1.5` or a fraction such as `3/2`",
                "write a point before decimals and a bar between two integers",
            ),
        }
    }
}

/// Reads a decimal in the given script, or nothing where no digit stands.
pub(super) fn scan_decimal<'a>(
    cursor: &mut Cursor<'a>,
    script: Script,
    role: NumberRole,
) -> Result<Option<Scanned<'a>>, NotationError> {
    let begin = cursor.clone();
    let start = cursor.at();
    let whole = scan_digits(cursor, script);
    if whole.is_empty() {
        return Ok(None);
    }
    let is_digit = |c: char| script.digit(c).is_some();
    let mut fraction = String::new();
    if cursor.peek() == Some('.') && cursor.peek_second().is_some_and(is_digit) {
        cursor.bump();
        fraction = scan_digits(cursor, script);
    }
    let span = cursor.span_from(start);
    let text = &begin.rest()[..span.len()];
    Bounded::Digits.check(whole.len() + fraction.len(), MAX_DIGITS, span.clone())?;
    if whole.len() > 1 && whole.starts_with('0') {
        let text = text.to_owned();
        return Err(NotationError::new(
            span,
            NumberFault::LeadingZero { role, text },
        ));
    }
    let value = decimal(&whole, &fraction);
    Ok(Some(Scanned {
        value,
        text,
        span,
        script,
    }))
}

/// Reads a positive decimal or fraction in plain digits, or nothing where no digit stands.
pub(super) fn scan_positive<'a>(
    cursor: &mut Cursor<'a>,
    role: NumberRole,
) -> Result<Option<Scanned<'a>>, NotationError> {
    let begin = cursor.clone();
    let Some(mut number) = scan_decimal(cursor, Script::Plain, role)? else {
        return Ok(None);
    };
    if cursor.eat(|c| c == '/').is_some() {
        let lower = scan_decimal(cursor, Script::Plain, role)?;
        number.span.end = cursor.at();
        number.text = &begin.rest()[..number.span.len()];
        number.value = divide(&number, lower, role)?;
    }
    if number.value.is_zero() {
        return Err(NotationError::new(number.span, NumberFault::Zero { role }));
    }
    Ok(Some(number))
}

fn divide(
    whole: &Scanned<'_>,
    lower: Option<Scanned<'_>>,
    role: NumberRole,
) -> Result<BigRational, NotationError> {
    let text = whole.text.to_owned();
    let span = whole.span.clone();
    match lower {
        Some(lower) if !text.contains('.') => {
            if lower.value.is_zero() {
                return Err(NotationError::new(
                    span,
                    NumberFault::ZeroDenominator { text },
                ));
            }
            Ok(&whole.value / lower.value)
        }
        _ => Err(NotationError::new(
            span,
            NumberFault::Malformed { role, text },
        )),
    }
}

fn scan_digits(cursor: &mut Cursor<'_>, script: Script) -> String {
    let written = cursor.eat_while(|c| script.digit(c).is_some());
    written.chars().filter_map(|c| script.digit(c)).collect()
}

/// The value of `whole.fraction`, both ASCII digits and at most 64 of them.
fn decimal(whole: &str, fraction: &str) -> BigRational {
    let digits = whole.bytes().chain(fraction.bytes());
    let numerator = digits.fold(BigInt::zero(), |sum, digit| {
        sum * 10 + BigInt::from(digit - b'0')
    });
    BigRational::new(numerator, power_of_ten(fraction.len()))
}

fn power_of_ten(exponent: usize) -> BigInt {
    std::iter::repeat_n(BigInt::from(10), exponent).product()
}

/// The canonical text of a number in a formula: a decimal where one of at most 64 digits
/// ends, otherwise the reduced fraction.
pub(super) fn decimal_text(value: &BigRational) -> String {
    decimal_places(value.denom())
        .map(|places| point_text(value, places))
        .filter(|text| text.bytes().filter(u8::is_ascii_digit).count() <= MAX_DIGITS)
        .unwrap_or_else(|| value.to_string())
}

/// How many decimals 1/`denominator` has, if it ends within the limit.
fn decimal_places(denominator: &BigInt) -> Option<usize> {
    let mut rest = denominator.clone();
    let twos = divide_out(&mut rest, 2);
    let fives = divide_out(&mut rest, 5);
    let places = twos.max(fives);
    (rest.is_one() && places < MAX_DIGITS).then_some(places)
}

/// Divides by `factor` as often as it goes, up to the limit of digits.
fn divide_out(value: &mut BigInt, factor: u32) -> usize {
    let factor = BigInt::from(factor);
    let mut times = 0;
    while times < MAX_DIGITS && value.is_multiple_of(&factor) {
        *value /= &factor;
        times += 1;
    }
    times
}

fn point_text(value: &BigRational, places: usize) -> String {
    let scaled = value.numer() * power_of_ten(places) / value.denom();
    let digits = format!("{:0>width$}", scaled.to_string(), width = places + 1);
    let (whole, fraction) = digits.split_at(digits.len() - places);
    let point = if places == 0 { "" } else { "." };
    format!("{whole}{point}{fraction}")
}

#[cfg(test)]
mod tests {
    use super::*;

    fn ratio(p: i64, q: i64) -> BigRational {
        BigRational::new(p.into(), q.into())
    }

    #[test]
    fn decimals_and_fractions_are_exact() {
        for (text, value) in [
            ("1", ratio(1, 1)),
            ("1.50", ratio(3, 2)),
            ("0.947", ratio(947, 1000)),
            ("10/4", ratio(5, 2)),
        ] {
            let mut cursor = Cursor::new(text);
            let number = scan_positive(&mut cursor, NumberRole::Coefficient);
            let number = number.unwrap().unwrap();
            assert_eq!(number.value, value, "{text}");
            assert_eq!(number.text, text);
            assert_eq!(cursor.peek(), None);
        }
    }

    #[test]
    fn a_point_without_decimals_is_not_part_of_the_number() {
        let mut cursor = Cursor::new("2.H");
        let number = scan_decimal(&mut cursor, Script::Plain, NumberRole::Count);
        assert_eq!(number.unwrap().unwrap().value, ratio(2, 1));
        assert_eq!(cursor.rest(), ".H");
    }

    #[test]
    fn canonical_text_is_a_decimal_where_one_ends() {
        for (value, text) in [
            (ratio(3, 1), "3"),
            (ratio(1, 2), "0.5"),
            (ratio(947, 1000), "0.947"),
            (ratio(100, 1), "100"),
            (ratio(1, 3), "1/3"),
            (ratio(5, 4), "1.25"),
        ] {
            assert_eq!(decimal_text(&value), text);
        }
    }

    #[test]
    fn long_expansions_stay_fractions() {
        let tiny = BigRational::new(1.into(), BigInt::from(2).pow(100));
        assert_eq!(decimal_text(&tiny), tiny.to_string());
    }

    #[test]
    fn the_limit_of_digits_is_64() {
        let scan = |digits: usize| {
            let text = "9".repeat(digits);
            let mut cursor = Cursor::new(&text);
            scan_decimal(&mut cursor, Script::Plain, NumberRole::Count).is_ok()
        };
        assert!(scan(64));
        assert!(!scan(65));
    }
}
