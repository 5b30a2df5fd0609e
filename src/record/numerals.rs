//! Numbers as they stand on the pages.

use num_traits::Signed;

use crate::quantity::{Exact, Quantity, Significance, Unit, exact_text, full_text};

/// The same number with a true minus, and powers of ten as they are typeset: 1.200e3 becomes
/// 1.200 × 10³.
pub fn minus(text: &str) -> String {
    let text = text.replace('-', "\u{2212}");
    match text.split_once(['e', 'E']) {
        Some((mantissa, rest)) if mantissa.ends_with(|c: char| c.is_ascii_digit() || c == '…') => {
            power_of_ten(mantissa, rest)
        }
        _ => text,
    }
}

/// `rest` begins with the exponent; what follows it stays.
fn power_of_ten(mantissa: &str, rest: &str) -> String {
    let digits = |c: char| c.is_ascii_digit() || c == '+' || c == '\u{2212}';
    let end = rest.find(|c| !digits(c)).unwrap_or(rest.len());
    let (exponent, after) = rest.split_at(end);
    let sign = if exponent.starts_with('\u{2212}') {
        "\u{2212}"
    } else {
        ""
    };
    // +04 is 4: the zeros of an exponent are no digits of the value.
    let size = exponent
        .trim_start_matches(['+', '\u{2212}'])
        .trim_start_matches('0');
    let size = match (size, exponent) {
        ("", "") => "",
        ("", _) => "0",
        (size, _) => size,
    };
    let exponent = format!("{sign}{size}");
    match exponent.is_empty() {
        true => format!("{mantissa}e{after}"),
        false => format!("{mantissa}\u{a0}×\u{a0}10{}{after}", superscript(&exponent)),
    }
}

/// A whole number in superscript digits, without a plus sign.
pub(super) fn superscript(number: &str) -> String {
    const DIGITS: [char; 10] = ['⁰', '¹', '²', '³', '⁴', '⁵', '⁶', '⁷', '⁸', '⁹'];
    let set = |c: char| match c.to_digit(10) {
        Some(digit) => Some(DIGITS[digit as usize]),
        None => (c != '+').then_some('⁻'),
    };
    number.chars().filter_map(set).collect()
}

/// A number of the working in full, with the zeros that are significant: −571.660.
pub(super) fn in_full(value: &Exact, significance: Significance) -> String {
    minus(&full_text(value, significance))
}

/// A stoichiometric number with its sign: −1, +3/2.
pub(super) fn signed(nu: &Exact) -> String {
    let text = exact_fraction(nu);
    match nu.is_positive() {
        true => format!("+{text}"),
        false => minus(&text),
    }
}

/// An exact coefficient as an integer or a fraction: 1, 3/2.
pub(super) fn exact_fraction(value: &Exact) -> String {
    value.to_string()
}

/// A coefficient in front of a substance; nothing for one.
pub(super) fn coefficient(value: &Exact) -> String {
    match exact_text(value).as_str() {
        "1" => String::new(),
        _ => format!("{} ", exact_fraction(value)),
    }
}

/// A value as its source prints it, with a true minus and its unit.
pub(super) fn printed(quantity: &Quantity) -> String {
    minus(&spaced(&quantity.to_string()))
}

/// The number of a value as its source prints it.
pub(super) fn printed_number(quantity: &Quantity) -> String {
    minus(&spaced(quantity.printed_number()))
}

/// No line is broken inside a quantity.
fn spaced(text: &str) -> String {
    text.replace(' ', "\u{a0}")
}

/// A unit for people: `kJ/mol`; nothing for a plain number.
pub(super) fn unit(unit: &Unit) -> String {
    match unit.symbol() {
        "1" => String::new(),
        symbol => spaced(symbol),
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn numbers_are_set_with_a_true_minus_and_powers_of_ten() {
        assert_eq!(minus("-285.830"), "−285.830");
        assert_eq!(minus("1.200e3 kg"), "1.200\u{a0}×\u{a0}10³ kg");
        assert_eq!(minus("-1.5E-12"), "−1.5\u{a0}×\u{a0}10⁻¹²");
        assert_eq!(minus("4.07e+04"), "4.07\u{a0}×\u{a0}10⁴");
        assert_eq!(minus("8.21e+00"), "8.21\u{a0}×\u{a0}10⁰");
        assert_eq!(minus("exact 0"), "exact 0");
        assert_eq!(minus("2.1 kJ/(kg K)"), "2.1 kJ/(kg K)");
    }
}
