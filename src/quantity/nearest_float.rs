//! The floating-point number nearest to an exact one.
//!
//! Leaves to others: any arithmetic with it.

use num_bigint::BigUint;
use num_integer::Integer;
use num_traits::{Signed, ToPrimitive, Zero};

use super::exact::Exact;

/// The nearest floating-point number, a tie going to the even one (IEEE 754 round to nearest).
/// Beyond the largest it is infinite, below half the smallest it is zero.
pub fn to_f64(value: &Exact) -> f64 {
    let size = magnitude_to_f64(value.numer().magnitude(), value.denom().magnitude());
    if value.is_negative() { -size } else { size }
}

/// `over`/`under`, correctly rounded.
fn magnitude_to_f64(over: &BigUint, under: &BigUint) -> f64 {
    if over.bits() <= 53 && under.bits() <= 53 {
        // Both are exact as f64, so one IEEE division rounds correctly.
        return over.to_f64().unwrap_or(0.0) / under.to_f64().unwrap_or(1.0);
    }
    // A quotient of 56 or 57 bits: 53 to keep, the rest and a sticky bit to round by.
    let shift = 56 + under.bits() as i64 - over.bits() as i64;
    let (over, under) = if shift >= 0 {
        (over << shift as u64, under.clone())
    } else {
        (over.clone(), under << shift.unsigned_abs())
    };
    let (quotient, rest) = over.div_rem(&under);
    // The shift bounds the quotient by 2^57.
    let quotient = quotient.to_u64().unwrap_or(u64::MAX) | u64::from(!rest.is_zero());
    round_bits(quotient, shift)
}

/// `quotient`·2^-`shift` rounded to a float, the lowest bit of `quotient` being sticky.
fn round_bits(quotient: u64, shift: i64) -> f64 {
    let bits = i64::from(64 - quotient.leading_zeros());
    let exponent = bits - 1 - shift;
    if exponent > 1023 {
        return f64::INFINITY;
    }
    if exponent < -1075 {
        return 0.0;
    }
    // Below 2^-1022 the spacing is fixed, and fewer bits are kept.
    let kept = 53 - (-1022 - exponent).max(0);
    let mantissa = half_even_shift(quotient, (bits - kept) as u32);
    if exponent >= -1022 {
        // The hidden bit adds one to the exponent field; a carry runs into it correctly.
        f64::from_bits((((exponent + 1022) as u64) << 52) + mantissa)
    } else {
        f64::from_bits(mantissa)
    }
}

/// `number` / 2^`drop` to the nearest whole number, half to even; `drop` is between 1 and 63.
fn half_even_shift(number: u64, drop: u32) -> u64 {
    let kept = number >> drop;
    let rest = number & ((1 << drop) - 1);
    let half = 1 << (drop - 1);
    let up = rest > half || (rest == half && kept & 1 == 1);
    kept + u64::from(up)
}

#[cfg(test)]
mod tests {
    use super::super::Decimal;
    use super::*;

    fn value(text: &str) -> Exact {
        Decimal::parse(text).unwrap().value()
    }

    #[test]
    fn floats_at_the_edges() {
        // The limits are those of IEEE 754 binary64.
        for (text, expected) in [
            ("1e400", f64::INFINITY),
            ("-1e400", f64::NEG_INFINITY),
            ("1e-400", 0.0),
            ("1.7976931348623157e308", f64::MAX),
            ("5e-324", f64::from_bits(1)),
            ("2.4703282292062327e-324", 0.0),
            ("2.4703282292062328e-324", f64::from_bits(1)),
            ("2.2250738585072014e-308", f64::MIN_POSITIVE),
            (
                "2.2250738585072011e-308",
                f64::from_bits(0x000f_ffff_ffff_ffff),
            ),
            ("9007199254740993", 9_007_199_254_740_992.0),
            ("9007199254740993.00000001", 9_007_199_254_740_994.0),
        ] {
            assert_eq!(to_f64(&value(text)), expected, "{text}");
        }
    }
}
