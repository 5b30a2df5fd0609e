//! The digits that a result may claim (ASTM E29 §7.4).
//!
//! A place is a power of ten in the unit of the value that it belongs to: -1 for `5.3 kJ` is
//! 0.1 kJ. Leaves to others: rounding, and whether uncertainty decides instead.

use std::cmp::Ordering;

use super::exact::{Exact, order_of_magnitude};

/// How far down a value is known, in its own unit.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Significance {
    /// An exact number: limits nothing.
    Exact,
    /// The power of ten of the last significant digit.
    Place(i64),
    /// From a table that prints a fixed number of decimals: limits no digits, yet is not exact.
    Unlimited,
}

impl Significance {
    /// The significance of a sum or difference of values in one unit: the coarsest last place.
    pub fn sum(terms: impl IntoIterator<Item = Self>) -> Self {
        terms
            .into_iter()
            .fold(Self::Exact, |sum, term| match (sum, term) {
                (Self::Place(a), Self::Place(b)) => Self::Place(a.max(b)),
                (Self::Place(place), _) | (_, Self::Place(place)) => Self::Place(place),
                (Self::Exact, Self::Exact) => Self::Exact,
                _ => Self::Unlimited,
            })
    }

    /// The significance of `value` × `factor`, `self` being that of `value` and `factor` exact:
    /// as many significant digits as before, the place following the magnitude of the product.
    /// A zero has no digits to count: its place moves by the magnitude of the factor. The
    /// product with an exact zero is exact.
    #[must_use]
    pub fn times_exact(self, value: &Exact, factor: &Exact) -> Self {
        let Self::Place(place) = self else {
            return if order_of_magnitude(factor).is_none() {
                Self::Exact
            } else {
                self
            };
        };
        let Some(factor_order) = order_of_magnitude(factor) else {
            return Self::Exact;
        };
        match order_of_magnitude(value) {
            Some(order) => {
                let product = order_of_magnitude(&(value * factor));
                Self::Place(place + product.map_or(0, |product| product - order))
            }
            None => Self::Place(place + factor_order),
        }
    }

    /// The significance of `a` × `b`: as many digits as the factor with the fewest.
    pub fn product(a: &Exact, of_a: Self, b: &Exact, of_b: Self) -> Self {
        match (of_a, of_b) {
            (Self::Place(place_a), Self::Place(place_b)) => {
                let value = a * b;
                Self::Place(product_place((a, place_a), (b, place_b), &value))
            }
            (Self::Place(_), _) => of_a.limited_by(a, b, of_b),
            (_, Self::Place(_)) => of_b.limited_by(b, a, of_a),
            (Self::Exact, _) => of_b.times_exact(b, a),
            (_, Self::Exact) => of_a.times_exact(a, b),
            (Self::Unlimited, Self::Unlimited) => Self::Unlimited,
        }
    }

    /// The significance of `a` / `b`: as many digits as the operand with the fewest. `None`
    /// where `b` is zero.
    pub fn quotient(a: &Exact, of_a: Self, b: &Exact, of_b: Self) -> Option<Self> {
        order_of_magnitude(b)?;
        let inverse = b.recip();
        // The inverse has as many digits as `b`: the place follows from the magnitudes.
        let of_inverse = match (of_b, order_of_magnitude(b), order_of_magnitude(&inverse)) {
            (Self::Place(place), Some(order), Some(inverted)) => {
                Self::Place(place - order + inverted)
            }
            _ => of_b,
        };
        Some(Self::product(a, of_a, &inverse, of_inverse))
    }

    /// The product of a limited value with one that limits nothing; an unlimited zero is not
    /// exactly zero, and keeps the place of the limited value.
    fn limited_by(self, value: &Exact, factor: &Exact, of_factor: Self) -> Self {
        match (of_factor, order_of_magnitude(factor)) {
            (Self::Unlimited, None) => self,
            _ => self.times_exact(value, factor),
        }
    }
}

/// The place of the product of two limited numbers.
fn product_place(a: (&Exact, i64), b: (&Exact, i64), product: &Exact) -> i64 {
    let ((value_a, place_a), (value_b, place_b)) = (a, b);
    match (order_of_magnitude(value_a), order_of_magnitude(value_b)) {
        (Some(order_a), Some(order_b)) => {
            let below = match (order_a - place_a).cmp(&(order_b - place_b)) {
                Ordering::Less | Ordering::Equal => order_a - place_a,
                Ordering::Greater => order_b - place_b,
            };
            // Neither factor is zero, so the product has a magnitude.
            order_of_magnitude(product).map_or(0, |order| order - below)
        }
        (None, Some(order_b)) => place_a + order_b,
        (Some(order_a), None) => place_b + order_a,
        (None, None) => place_a + place_b,
    }
}

#[cfg(test)]
mod tests {
    use super::super::Decimal;
    use super::*;
    use Significance::{Exact as Counted, Place, Unlimited};

    fn value(text: &str) -> Exact {
        Decimal::parse(text).unwrap().value()
    }

    #[test]
    fn a_sum_has_the_coarsest_place() {
        assert_eq!(
            Significance::sum([Place(-3), Place(-1), Counted]),
            Place(-1)
        );
        assert_eq!(Significance::sum([Counted, Counted]), Counted);
        assert_eq!(Significance::sum([Counted, Unlimited]), Unlimited);
        assert_eq!(Significance::sum([Unlimited, Place(-2)]), Place(-2));
        assert_eq!(Significance::sum([]), Counted);
    }

    #[test]
    fn an_exact_factor_keeps_the_count_of_digits() {
        for (text, place, factor, expected) in [
            ("-285.830", -3, "2", -3),  // -571.660: six digits
            ("-285.830", -3, "4", -2),  // -1143.32: six digits
            ("9.5", -1, "1.5", 0),      // 14.25: two digits
            ("0.00", -2, "1000", 1),    // zero: shifted with the factor
            ("1.200", -3, "0.001", -6), // 0.001200
        ] {
            let significance = Place(place).times_exact(&value(text), &value(factor));
            assert_eq!(significance, Place(expected), "{text} × {factor}");
        }
        assert_eq!(Place(-1).times_exact(&value("5.0"), &value("0")), Counted);
        assert_eq!(Unlimited.times_exact(&value("5.0"), &value("3")), Unlimited);
    }

    #[test]
    fn a_product_has_the_fewest_digits() {
        // 11.38 × 4.3 = 48.934: two digits, place 0 (by the rule, by hand).
        let (a, b) = (value("11.38"), value("4.3"));
        let product = Significance::product(&a, Place(-2), &b, Place(-1));
        assert_eq!(product, Place(0));
        assert_eq!(Significance::product(&b, Place(-1), &a, Place(-2)), product);
        // 926.3 / 4.3 = 215.4…: two digits, place 1.
        let quotient = Significance::quotient(&value("926.3"), Place(-1), &b, Place(-1));
        assert_eq!(quotient, Some(Place(1)));
        // 2.0 / 5.00 = 0.40: two digits, place -2.
        let quotient = Significance::quotient(&value("2.0"), Place(-1), &value("5.00"), Place(-2));
        assert_eq!(quotient, Some(Place(-2)));
        assert_eq!(
            Significance::quotient(&a, Counted, &value("0"), Counted),
            None
        );
        assert_eq!(Significance::product(&a, Counted, &b, Place(-1)), Place(0));
        assert_eq!(Significance::product(&a, Unlimited, &b, Counted), Unlimited);
        // An exact zero makes an exact zero of the other; a printed zero does not.
        let zero = value("0.000");
        let product = |of_zero| Significance::product(&zero, of_zero, &b, Place(-1));
        assert_eq!(product(Counted), Counted);
        assert_eq!(product(Unlimited), Place(-1));
        assert_eq!(product(Place(-3)), Place(-3));
        let product = Significance::product(&zero, Unlimited, &zero, Unlimited);
        assert_eq!(product, Unlimited);
    }
}
