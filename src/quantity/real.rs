//! A number that stays exact while its operands are, and is floating point after that.
//!
//! Leaves to others: transcendental functions, which callers take from `libm` and return as
//! [`Real::Float`].

use std::cmp::Ordering;

use num_traits::Zero;

use super::exact::Exact;
use super::nearest_float::to_f64;

/// A value of a working: exact where only +, -, ×, ÷ of exact numbers made it.
#[derive(Debug, Clone, PartialEq)]
pub enum Real {
    /// Without any rounding.
    Exact(Exact),
    /// A transcendental function had a part in it.
    Float(f64),
}

impl Real {
    /// The sum.
    pub fn plus(&self, other: &Self) -> Self {
        self.with(other, |a, b| a + b, |a, b| a + b)
    }

    /// The difference, `self` - `other`.
    pub fn minus(&self, other: &Self) -> Self {
        self.with(other, |a, b| a - b, |a, b| a - b)
    }

    /// The product.
    pub fn times(&self, other: &Self) -> Self {
        self.with(other, |a, b| a * b, |a, b| a * b)
    }

    /// The quotient `self` / `other`; `None` where `other` is zero.
    pub fn over(&self, other: &Self) -> Option<Self> {
        if other.is_zero() {
            return None;
        }
        Some(self.with(other, |a, b| a / b, |a, b| a / b))
    }

    /// The number with the opposite sign.
    pub fn negated(&self) -> Self {
        match self {
            Self::Exact(value) => Self::Exact(-value),
            Self::Float(value) => Self::Float(-value),
        }
    }

    /// Whether this is zero.
    pub fn is_zero(&self) -> bool {
        match self {
            Self::Exact(value) => value.is_zero(),
            Self::Float(value) => *value == 0.0,
        }
    }

    /// The nearest floating-point number.
    pub fn to_f64(&self) -> f64 {
        match self {
            Self::Exact(value) => to_f64(value),
            Self::Float(value) => *value,
        }
    }

    /// The exact number, where this is one.
    pub fn exact(&self) -> Option<&Exact> {
        match self {
            Self::Exact(value) => Some(value),
            Self::Float(_) => None,
        }
    }

    /// The value that this stands for, exactly: a float's binary value. `None` where it is not
    /// finite.
    pub fn to_exact(&self) -> Option<Exact> {
        match self {
            Self::Exact(value) => Some(value.clone()),
            Self::Float(value) => Exact::from_float(*value),
        }
    }

    /// Which is larger, without rounding either; `None` where one is not a finite number.
    pub fn compare(&self, other: &Self) -> Option<Ordering> {
        match (self, other) {
            (Self::Exact(a), Self::Exact(b)) => Some(a.cmp(b)),
            _ => Some(self.to_exact()?.cmp(&other.to_exact()?)),
        }
    }

    fn with(
        &self,
        other: &Self,
        exact: impl Fn(&Exact, &Exact) -> Exact,
        float: impl Fn(f64, f64) -> f64,
    ) -> Self {
        match (self, other) {
            (Self::Exact(a), Self::Exact(b)) => Self::Exact(exact(a, b)),
            _ => Self::Float(float(self.to_f64(), other.to_f64())),
        }
    }
}

impl From<Exact> for Real {
    fn from(value: Exact) -> Self {
        Self::Exact(value)
    }
}

impl From<f64> for Real {
    fn from(value: f64) -> Self {
        Self::Float(value)
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn ratio(n: i64, d: i64) -> Real {
        Real::Exact(Exact::new(n.into(), d.into()))
    }

    #[test]
    fn exact_operands_give_exact_results() {
        let third = ratio(1, 3);
        assert_eq!(third.plus(&third).plus(&third), ratio(1, 1));
        assert_eq!(third.times(&ratio(3, 1)), ratio(1, 1));
        assert_eq!(third.over(&third), Some(ratio(1, 1)));
        assert_eq!(third.minus(&third), ratio(0, 1));
        assert_eq!(third.over(&ratio(0, 1)), None);
        assert_eq!(third.over(&Real::Float(-0.0)), None);
    }

    #[test]
    fn one_float_makes_the_result_a_float() {
        let sum = ratio(1, 2).plus(&Real::Float(0.25));
        assert_eq!(sum, Real::Float(0.75));
        assert_eq!(sum.exact(), None);
        assert_eq!(sum.to_exact().map(Real::Exact), Some(ratio(3, 4)));
    }

    #[test]
    fn comparison_rounds_nothing() {
        // The float nearest to 0.1 lies above it: 0.1000000000000000055… (IEEE 754).
        let tenth = ratio(1, 10);
        assert_eq!(Real::Float(0.1).compare(&tenth), Some(Ordering::Greater));
        assert_eq!(tenth.compare(&tenth.negated()), Some(Ordering::Greater));
        assert_eq!(Real::Float(f64::NAN).compare(&tenth), None);
    }
}
