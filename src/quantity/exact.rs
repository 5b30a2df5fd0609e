//! Exact numbers: rationals, their text, and the one rounding at the end.
//!
//! Leaves to others: which place a result is rounded to, and floating point (`nearest_float`).

use std::cmp::Ordering;

use num_bigint::{BigInt, BigUint};
use num_integer::Integer;
use num_rational::BigRational;
use num_traits::{One, Pow, Signed, Zero};

/// A number without any rounding in it.
pub type Exact = BigRational;

/// Places beyond this are taken as this: far outside every printed number (at most 500), and
/// a bound on the work that a place can ask for.
const FARTHEST_PLACE: i64 = 4000;

/// A value rounded to a place, and its text.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct Rounded {
    /// The rounded value.
    pub value: Exact,
    /// The value with exactly the digits down to the place; `1.2e3` where the place lies above
    /// the units, so that no zero stands in for an unknown digit.
    pub text: String,
}

/// Rounds once, half to even (ASTM E29; ISO 80000-1 Annex B rule A), to a multiple of
/// 10^`place`. A zero carries no sign.
pub fn round_to_place(value: &Exact, place: i64) -> Rounded {
    let place = place.clamp(-FARTHEST_PLACE, FARTHEST_PLACE);
    let units = units_at(value, place);
    let text = if place > 0 {
        scientific(&units, place)
    } else {
        fixed(&units, place.unsigned_abs() as usize)
    };
    let value = times_power_of_ten(units, place);
    Rounded { value, text }
}

/// The nearest whole number of 10^`place`, a tie going to the even one.
pub(super) fn units_at(value: &Exact, place: i64) -> BigInt {
    let ten = Pow::pow(BigInt::from(10), place.unsigned_abs());
    // Whole numbers alone: a rational would be reduced here for nothing.
    if place > 0 {
        half_even(value.numer(), &(value.denom() * ten))
    } else {
        half_even(&(value.numer() * ten), value.denom())
    }
}

/// `over`/`under` to the nearest whole number, a tie going to the even one; `under` is positive.
fn half_even(over: &BigInt, under: &BigInt) -> BigInt {
    let (below, rest) = over.div_mod_floor(under);
    let up = match (rest * 2_u32).cmp(under) {
        Ordering::Less => false,
        Ordering::Equal => below.is_odd(),
        Ordering::Greater => true,
    };
    if up { below + 1_u32 } else { below }
}

/// `units`·10^-`decimals` with that many decimals.
fn fixed(units: &BigInt, decimals: usize) -> String {
    let sign = if units.is_negative() { "-" } else { "" };
    let digits = format!("{:0>1$}", units.magnitude().to_string(), decimals + 1);
    let (whole, part) = digits.split_at(digits.len() - decimals);
    if part.is_empty() {
        format!("{sign}{whole}")
    } else {
        format!("{sign}{whole}.{part}")
    }
}

/// `units`·10^`place` as `1.2e3`, with the digits of `units` and no others.
fn scientific(units: &BigInt, place: i64) -> String {
    let decimals = units.magnitude().to_string().len() - 1;
    let sign = if units.is_negative() { "-" } else { "" };
    let mantissa = fixed(&units.abs(), decimals);
    format!("{sign}{mantissa}e{}", place + decimals as i64)
}

/// The decimal that equals `value`, or `None` where no decimal ends (⅓).
pub fn terminating_decimal(value: &Exact) -> Option<String> {
    let denominator = value.denom().magnitude();
    let twos = denominator.trailing_zeros().unwrap_or(0);
    let (fives, rest) = without_fives(denominator >> twos);
    if !rest.is_one() {
        return None;
    }
    let decimals = twos.max(fives);
    let factor =
        Pow::pow(BigInt::from(2), decimals - twos) * Pow::pow(BigInt::from(5), decimals - fives);
    // A denominator with 2^64 factors does not fit in memory: the conversion is lossless.
    Some(fixed(&(value.numer() * factor), decimals as usize))
}

/// How often five divides `number`, and what is left. Powers of five are tried largest first, so
/// that a long denominator takes few divisions.
fn without_fives(mut number: BigUint) -> (u64, BigUint) {
    let mut powers = vec![(1_u64, BigUint::from(5_u32))];
    while let Some((count, power)) = powers.last()
        && power.bits() * 2 <= number.bits()
    {
        let next = (count * 2, power * power);
        powers.push(next);
    }
    let mut fives = 0;
    while let Some((count, power)) = powers.last() {
        let (quotient, rest) = number.div_rem(power);
        if rest.is_zero() {
            number = quotient;
            fives += count;
        } else {
            powers.pop();
        }
    }
    (fives, number)
}

/// The value as text without loss: a decimal, or `p/q` where no decimal ends.
pub fn exact_text(value: &Exact) -> String {
    terminating_decimal(value).unwrap_or_else(|| format!("{}/{}", value.numer(), value.denom()))
}

/// floor(log10 |`value`|) by whole-number arithmetic; `None` for zero.
pub fn order_of_magnitude(value: &Exact) -> Option<i64> {
    if value.is_zero() {
        return None;
    }
    let (over, under) = (value.numer().magnitude(), value.denom().magnitude());
    // log10(2) = 0.30103: the guess is off by a unit or two, and the comparisons decide.
    let bits = over.bits() as i64 - under.bits() as i64;
    let mut order = (bits * 30_103).div_euclid(100_000);
    while is_below_power(over, under, order) {
        order -= 1;
    }
    while !is_below_power(over, under, order + 1) {
        order += 1;
    }
    Some(order)
}

/// Whether `over`/`under` < 10^`power`.
fn is_below_power(over: &BigUint, under: &BigUint, power: i64) -> bool {
    let ten = Pow::pow(BigUint::from(10_u32), power.unsigned_abs());
    if power < 0 {
        over * ten < *under
    } else {
        *over < under * ten
    }
}

/// 10^`power`. The work grows with the power: callers take it from a printed number's place or
/// another bounded count.
pub fn power_of_ten(power: i64) -> Exact {
    times_power_of_ten(BigInt::one(), power)
}

/// `units`·10^`power`.
pub(super) fn times_power_of_ten(units: BigInt, power: i64) -> Exact {
    let ten = Pow::pow(BigInt::from(10), power.unsigned_abs());
    if power < 0 {
        Exact::new(units, ten)
    } else {
        Exact::from_integer(units * ten)
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn ratio(n: i64, d: i64) -> Exact {
        Exact::new(n.into(), d.into())
    }

    fn value(text: &str) -> Exact {
        super::super::Decimal::parse(text).unwrap().value()
    }

    #[test]
    fn rounding_examples_of_astm_e29() {
        // ASTM E29, quoted by a field testing manual (a transcription, not the standard).
        for (text, rounded) in [
            ("45.7500", "45.8"),
            ("45.4500", "45.4"),
            ("45.45001", "45.5"),
            ("45.74", "45.7"),
        ] {
            assert_eq!(round_to_place(&value(text), -1).text, rounded);
        }
        // Rounding twice would give 1.4501 -> 1.45 -> 1.4 (by hand).
        assert_eq!(round_to_place(&value("1.4501"), -1).text, "1.5");
    }

    #[test]
    fn rounded_texts() {
        for (text, place, rounded) in [
            ("-552.56", -1, "-552.6"),
            ("1234", 2, "1.2e3"),
            ("-1250", 2, "-1.2e3"),
            ("1350", 2, "1.4e3"),
            ("12", 2, "0e2"),
            ("-0.04", -1, "0.0"),
            ("-0.5", 0, "0"),
            ("1.5", 0, "2"),
            ("0.005", -3, "0.005"),
            ("99.96", -1, "100.0"),
            ("960", 2, "1.0e3"),
        ] {
            assert_eq!(round_to_place(&value(text), place).text, rounded, "{text}");
        }
        assert_eq!(round_to_place(&ratio(1, 3), i64::MAX).value, ratio(0, 1));
        assert_eq!(
            round_to_place(&value("-552.56"), -1).value,
            ratio(-5526, 10)
        );
    }

    #[test]
    fn texts_lose_nothing() {
        assert_eq!(exact_text(&ratio(-55256, 100)), "-552.56");
        assert_eq!(exact_text(&ratio(1, 3)), "1/3");
        assert_eq!(exact_text(&ratio(-7, 6)), "-7/6");
        assert_eq!(exact_text(&ratio(1, 1024)), "0.0009765625");
        assert_eq!(exact_text(&ratio(3, 125)), "0.024");
        assert_eq!(exact_text(&ratio(1200, 1)), "1200");
        assert_eq!(terminating_decimal(&ratio(1, 1250 * 7)), None);
    }

    #[test]
    fn orders_of_magnitude() {
        for (text, order) in [
            ("1", 0),
            ("9.999", 0),
            ("10", 1),
            ("-0.1", -1),
            ("0.0999", -2),
            ("1e400", 400),
            ("1e-400", -400),
            ("9.99e-400", -400),
        ] {
            assert_eq!(order_of_magnitude(&value(text)), Some(order), "{text}");
        }
        assert_eq!(order_of_magnitude(&ratio(0, 1)), None);
    }
}
