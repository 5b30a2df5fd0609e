//! A number of the working: its value, the digits it may claim, and what it depends on.

use crate::quantity::{Exact, LinearForm, Real, Significance};
use crate::source::Problem;

/// A number on the way to a result, in a unit that stands where it is made.
#[derive(Clone, Debug)]
pub struct Worked {
    pub value: Real,
    pub significance: Significance,
    /// Sensitivities to the values used, per unit of the value as printed.
    pub form: LinearForm,
}

impl Worked {
    /// An exact number that rests on no value.
    pub fn exact(value: Exact) -> Worked {
        Worked {
            value: Real::Exact(value),
            significance: Significance::Exact,
            form: LinearForm::default(),
        }
    }

    /// A value used, in the coherent SI unit; `sign` turns it.
    pub fn printed(problem: &Problem, index: usize, sign: i64) -> Worked {
        let value = &problem.values[index];
        let factor = value.printed.unit.factor() * Exact::from_integer(sign.into());
        let number = value.printed.decimal.value();
        let mut form = LinearForm::default();
        form.add_scaled(index, &Real::Exact(factor.clone()));
        Worked {
            significance: value.significance.times_exact(&number, &factor),
            value: Real::Exact(number * factor),
            form,
        }
    }

    /// The sum; none of nothing is zero, exactly.
    pub fn sum<'a>(parts: impl IntoIterator<Item = &'a Worked>) -> Worked {
        let mut sum = Worked::exact(Exact::from_integer(0.into()));
        for part in parts {
            sum.significance = Significance::sum([sum.significance, part.significance]);
            sum.value = sum.value.plus(&part.value);
            sum.form
                .add_form(&part.form, &Real::Exact(Exact::from_integer(1.into())));
        }
        sum
    }

    /// The number times an exact one.
    #[must_use]
    pub fn times_exact(&self, factor: &Exact) -> Worked {
        let exact = Real::Exact(factor.clone());
        let significance = match self.value.to_exact() {
            Some(value) => self.significance.times_exact(&value, factor),
            None => self.significance,
        };
        Worked {
            significance,
            value: self.value.times(&exact),
            form: self.form.scaled(&exact),
        }
    }

    /// The product, to first order in both.
    #[must_use]
    pub fn times(&self, other: &Worked) -> Worked {
        let significance = match (self.value.to_exact(), other.value.to_exact()) {
            (Some(a), Some(b)) => {
                Significance::product(&a, self.significance, &b, other.significance)
            }
            _ => Significance::sum([self.significance, other.significance]),
        };
        let mut form = self.form.scaled(&other.value);
        form.add_form(&other.form, &self.value);
        Worked {
            value: self.value.times(&other.value),
            significance,
            form,
        }
    }

    /// The quotient, to first order in both; none where `other` is zero.
    pub fn over(&self, other: &Worked) -> Option<Worked> {
        let value = self.value.over(&other.value)?;
        let one = Real::Exact(Exact::from_integer(1.into()));
        let inverse = one.over(&other.value)?;
        let significance = match (self.value.to_exact(), other.value.to_exact()) {
            (Some(a), Some(b)) => {
                Significance::quotient(&a, self.significance, &b, other.significance)?
            }
            _ => Significance::sum([self.significance, other.significance]),
        };
        let mut form = self.form.scaled(&inverse);
        form.add_form(&other.form, &value.times(&inverse).negated());
        Some(Worked {
            value,
            significance,
            form,
        })
    }
}
