//! Numbers as they stand on the pages.

use num_traits::Signed;

use crate::quantity::{
    Exact, Quantity, Significance, Unit, exact_text, round_to_place, terminating_decimal,
};

/// Digits shown of a number whose decimals do not end, beyond its last significant place.
const GUARD_DIGITS: i64 = 3;

/// The same text with true minus signs in front of numbers.
pub fn minus(text: &str) -> String {
    text.replace('-', "\u{2212}")
}

/// A number of the working in full, with the zeros that are significant: −571.660. Where its
/// decimals do not end, some digits beyond its last place and an ellipsis.
pub(super) fn in_full(value: &Exact, significance: Significance) -> String {
    let place = match significance {
        Significance::Place(place) => place.min(0),
        Significance::Exact | Significance::Unlimited => 0,
    };
    let text = match terminating_decimal(value) {
        Some(decimal) => pad(decimal, place),
        None => {
            let digits = place.min(-1) - GUARD_DIGITS;
            format!("{}…", round_to_place(value, digits).text)
        }
    };
    minus(&text)
}

/// Zeros up to a decimal place.
fn pad(decimal: String, place: i64) -> String {
    let wanted = usize::try_from(-place).unwrap_or(0);
    let have = decimal.split_once('.').map_or(0, |(_, part)| part.len());
    if have >= wanted {
        return decimal;
    }
    let point = if have == 0 { "." } else { "" };
    format!("{decimal}{point}{}", "0".repeat(wanted - have))
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

/// A unit for people: `kJ/mol`.
pub(super) fn unit(unit: &Unit) -> String {
    spaced(unit.symbol())
}
