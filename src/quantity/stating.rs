//! How a result is stated: the one rounding, at the end.
//!
//! Leaves to others: which of the rules applies, units, and typography.

use super::exact::{Exact, exact_text, order_of_magnitude, round_to_place, units_at};
use super::real::Real;
use super::significance::Significance;

/// A result as it is stated, without its unit.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct Stated {
    /// The rounded value.
    pub value_text: String,
    /// The expanded uncertainty, where one is stated with it.
    pub uncertainty_text: Option<String>,
    /// The power of ten of the last digit; `None` where nothing was rounded away.
    pub place: Option<i64>,
}

impl Stated {
    /// States a value to the digits that its expanded uncertainty leaves. The uncertainty has
    /// two digits where its first is 1 or 2 and one otherwise (common practice, no source; at
    /// most two: JCGM 100:2008 7.2.6), and the value is rounded to the same place, both once
    /// and half to even (ASTM E29; ISO 80000-1 Annex B rule A). A rounding that carries leaves
    /// the place: 0.96 is stated as 1.0.
    ///
    /// `None` where the value is not finite, or the uncertainty not finite and positive.
    pub fn by_uncertainty(value: &Real, expanded: f64) -> Option<Self> {
        let expanded = positive(expanded)?;
        let place = uncertainty_place(&expanded)?;
        Some(Self {
            value_text: rounded(value, place)?,
            uncertainty_text: Some(round_to_place(&expanded, place).text),
            place: Some(place),
        })
    }

    /// States a value to the digits that its significance leaves (ASTM E29); an exact one in
    /// full, as a fraction where no decimal ends.
    ///
    /// `None` where nothing says how many digits to state: the significance is unlimited, the
    /// value not finite, or a float said to be exact.
    pub fn by_significance(value: &Real, significance: Significance) -> Option<Self> {
        match significance {
            Significance::Place(place) => Self::at_place(value, place, None),
            Significance::Exact => Some(Self {
                value_text: exact_text(value.exact()?),
                uncertainty_text: None,
                place: None,
            }),
            Significance::Unlimited => None,
        }
    }

    /// States a value to a place that somebody chose, and the expanded uncertainty to the same;
    /// one that would be rounded to zero there keeps the place of its own first digits.
    ///
    /// `None` where the value is not finite. An uncertainty that is not finite and positive is
    /// left out.
    pub fn at_place(value: &Real, place: i64, expanded: Option<f64>) -> Option<Self> {
        let expanded = expanded.and_then(positive);
        Some(Self {
            value_text: rounded(value, place)?,
            uncertainty_text: expanded.and_then(|expanded| never_zero(&expanded, place)),
            place: Some(place),
        })
    }
}

/// A number to two significant digits, for a size that is told in words: `0.084`, `1.2e3`.
pub fn two_digits(size: f64) -> String {
    digits(size, 2)
}

/// A number to three significant digits, for uncertainties on the way to a result.
pub fn three_digits(size: f64) -> String {
    digits(size, 3)
}

fn digits(size: f64, count: u32) -> String {
    let Some(size) = Exact::from_float(size) else {
        return "an unknown amount".to_owned();
    };
    match order_of_magnitude(&size) {
        Some(order) => {
            let place = order + 1 - i64::from(count);
            // 9.96 carries to 10, which has two digits one place further up.
            let carries = units_at(&size, place).magnitude() == &10_u32.pow(count).into();
            round_to_place(&size, place + i64::from(carries)).text
        }
        None => "0".to_owned(),
    }
}

/// The value's text at the place; a float is rounded from its binary value, exactly.
fn rounded(value: &Real, place: i64) -> Option<String> {
    match value {
        Real::Exact(value) => Some(round_to_place(value, place).text),
        Real::Float(_) => Some(round_to_place(&value.to_exact()?, place).text),
    }
}

/// The uncertainty as an exact number, where it is finite and positive.
fn positive(expanded: f64) -> Option<Exact> {
    if expanded > 0.0 {
        Exact::from_float(expanded)
    } else {
        None
    }
}

/// Where the last digit of an uncertainty stands. Its first digit is looked at after rounding to
/// two digits: 0.3 as a float lies just below 0.3, and begins with a 3 all the same.
fn uncertainty_place(expanded: &Exact) -> Option<i64> {
    let order = order_of_magnitude(expanded)?;
    let two_digits = units_at(expanded, order - 1);
    // 10 to 100, the last where the rounding carries: 0.996 is 1.0.
    Some(if two_digits < 30.into() {
        order - 1
    } else {
        order
    })
}

/// The uncertainty at the place, or at its own where it would vanish.
fn never_zero(expanded: &Exact, place: i64) -> Option<String> {
    let at_place = round_to_place(expanded, place);
    if order_of_magnitude(&at_place.value).is_some() {
        return Some(at_place.text);
    }
    Some(round_to_place(expanded, uncertainty_place(expanded)?).text)
}

#[cfg(test)]
mod tests {
    use super::super::Decimal;
    use super::*;

    fn exact(text: &str) -> Real {
        Real::Exact(Decimal::parse(text).unwrap().value())
    }

    #[test]
    fn the_uncertainty_decides_the_digits() {
        for (value, expanded, value_text, uncertainty_text, place) in [
            ("-552.56", 0.84, "-552.6", "0.8", -1),
            ("-890.575", 0.19, "-890.58", "0.19", -2), // a tie: to the even digit
            ("-890.565", 0.19, "-890.56", "0.19", -2),
            ("44.004", 0.296, "44.0", "0.3", -1),
            ("44.004", 0.294, "44.00", "0.29", -2),
            ("44.004", 0.996, "44.0", "1.0", -1),
            ("44.004", 0.3, "44.0", "0.3", -1),
            ("12.34", 0.96, "12.3", "1.0", -1),
            ("1234", 150.0, "1.23e3", "1.5e2", 1),
            ("1234", 300.0, "1.2e3", "3e2", 2),
            ("0.001", 0.5, "0.0", "0.5", -1),
            ("5", 0.25, "5.00", "0.25", -2),
        ] {
            let stated = Stated::by_uncertainty(&exact(value), expanded).unwrap();
            assert_eq!(stated.value_text, value_text);
            assert_eq!(stated.uncertainty_text.as_deref(), Some(uncertainty_text));
            assert_eq!(stated.place, Some(place));
        }
        for expanded in [0.0, -1.0, f64::NAN, f64::INFINITY] {
            assert_eq!(Stated::by_uncertainty(&exact("1"), expanded), None);
        }
        assert_eq!(Stated::by_uncertainty(&Real::Float(f64::NAN), 1.0), None);
    }

    #[test]
    fn significance_decides_where_uncertainty_cannot() {
        let text = |value: &str, significance| {
            Stated::by_significance(&exact(value), significance).map(|stated| stated.value_text)
        };
        let place = Significance::Place(-1);
        assert_eq!(text("-552.56", place).as_deref(), Some("-552.6"));
        let exactly = text("-552.560", Significance::Exact);
        assert_eq!(exactly.as_deref(), Some("-552.56"));
        assert_eq!(text("-552.56", Significance::Unlimited), None);
        let third = Real::Exact(Exact::new(1.into(), 3.into()));
        let stated = Stated::by_significance(&third, Significance::Exact).unwrap();
        assert_eq!(stated.value_text, "1/3");
    }

    #[test]
    fn a_float_is_rounded_from_its_binary_value() {
        // 2.675 is 2.67499999999999982… in binary64 (IEEE 754): not a tie.
        let stated = Stated::at_place(&Real::Float(2.675), -2, None).unwrap();
        assert_eq!(stated.value_text, "2.67");
        assert_eq!(
            Stated::at_place(&exact("2.675"), -2, None)
                .unwrap()
                .value_text,
            "2.68"
        );
    }

    #[test]
    fn a_stated_uncertainty_never_becomes_zero() {
        let uncertainty = |expanded| {
            Stated::at_place(&exact("12.3"), 0, Some(expanded)).and_then(|s| s.uncertainty_text)
        };
        assert_eq!(uncertainty(0.3).as_deref(), Some("0.3"));
        assert_eq!(uncertainty(0.15).as_deref(), Some("0.15"));
        assert_eq!(uncertainty(1.4).as_deref(), Some("1"));
        assert_eq!(uncertainty(0.0), None);
    }

    #[test]
    fn sizes_told_in_words() {
        for (size, text) in [
            (0.0837, "0.084"),
            (1234.0, "1.2e3"),
            (-9.96, "-10"),
            (0.0, "0"),
        ] {
            assert_eq!(two_digits(size), text);
        }
        assert_eq!(two_digits(f64::NAN), "an unknown amount");
    }
}
