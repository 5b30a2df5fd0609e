//! Numbers of a working in full, before anything is rounded.

use super::exact::{Exact, order_of_magnitude, power_of_ten, round_to_place, terminating_decimal};
use super::real::Real;
use super::significance::Significance;

/// Digits shown beyond the last significant place of a number whose decimals do not end.
const GUARD_DIGITS: i64 = 3;

/// The number as a decimal with the zeros that are significant: 2 × -285.830 is `-571.660`. Where
/// its decimals do not end, some digits beyond its last place and an ellipsis.
pub fn full_text(value: &Exact, significance: Significance) -> String {
    let place = match significance {
        Significance::Place(place) => place.min(0),
        Significance::Exact | Significance::Unlimited => 0,
    };
    match terminating_decimal(value) {
        Some(decimal) => padded(decimal, place),
        None => {
            let digits = place.min(-1) - GUARD_DIGITS;
            // Cut, not rounded: the ellipsis says that more digits follow these.
            let cut = (value * power_of_ten(-digits)).trunc() * power_of_ten(digits);
            format!("{}…", round_to_place(&cut, digits).text)
        }
    }
}

/// The longest number that a working shows in full.
const LONGEST: usize = 14;

/// Significant digits of a number that is too long to be shown in full.
const SHOWN_DIGITS: i64 = 10;

/// The number as a working shows it: in full where that is short, otherwise its first ten digits
/// and an ellipsis.
pub fn working_text(value: &Real, significance: Significance) -> String {
    if let Some(exact) = value.exact() {
        let full = full_text(exact, significance);
        if full.chars().count() <= LONGEST && !full.ends_with('…') {
            return full;
        }
    }
    let order = value
        .to_exact()
        .and_then(|exact| order_of_magnitude(&exact));
    // Digits before the point are never cut.
    let place = order.map_or(0, |order| (order + 1 - SHOWN_DIGITS).min(-2));
    cut_text(value, place)
}

/// The number cut at a decimal place, with an ellipsis where more digits follow.
pub fn cut_text(value: &Real, place: i64) -> String {
    let Some(exact) = value.to_exact() else {
        return "not a number".to_string();
    };
    let cut = (&exact * power_of_ten(-place)).trunc() * power_of_ten(place);
    let more = if cut == exact { "" } else { "…" };
    let text = round_to_place(&cut, place).text;
    match text.split_once('e') {
        Some((mantissa, exponent)) => format!("{mantissa}{more}e{exponent}"),
        None => format!("{text}{more}"),
    }
}

/// Zeros up to a decimal place.
fn padded(decimal: String, place: i64) -> String {
    // A place is bounded where a decimal is read, so this many zeros fit in memory.
    let wanted = usize::try_from(-place).unwrap_or(0);
    let have = decimal.split_once('.').map_or(0, |(_, part)| part.len());
    if have >= wanted {
        return decimal;
    }
    let point = if have == 0 { "." } else { "" };
    format!("{decimal}{point}{}", "0".repeat(wanted - have))
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::quantity::Decimal;

    fn text(number: &str, place: i64) -> String {
        // The numbers of this test are decimals.
        let value = Decimal::parse(number).expect("a decimal").value();
        full_text(&value, Significance::Place(place))
    }

    #[test]
    fn significant_zeros_are_kept() {
        assert_eq!(text("-571.66", -3), "-571.660");
        assert_eq!(text("12", -1), "12.0");
        assert_eq!(text("-571.66", -1), "-571.66");
        assert_eq!(text("1200", 2), "1200");
    }

    #[test]
    fn decimals_that_do_not_end_are_cut_with_an_ellipsis() {
        let third = Exact::new(1.into(), 3.into());
        assert_eq!(full_text(&third, Significance::Place(-2)), "0.33333…");
        assert_eq!(full_text(&third, Significance::Exact), "0.3333…");
        let two_thirds = Exact::new((-2).into(), 3.into());
        assert_eq!(full_text(&two_thirds, Significance::Exact), "-0.6666…");
    }
}
