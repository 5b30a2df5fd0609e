//! Sums of powers of the temperature, which every form but the table is: their values and their
//! integrals, written once for exact and for floating-point numbers.

use num_traits::{FromPrimitive, Num, pow};

use crate::quantity::{Decimal, Exact, to_f64};

use super::form::Form;

/// Numbers that the formulas are worked with.
pub(super) trait Number: Num + Clone + FromPrimitive {
    fn of(value: &Exact) -> Self;
}

impl Number for Exact {
    fn of(value: &Exact) -> Exact {
        value.clone()
    }
}

impl Number for f64 {
    fn of(value: &Exact) -> f64 {
        to_f64(value)
    }
}

/// Cp = R·Σ c·x^p with x = T/unit, where R is 1 for the forms that do without it.
pub(super) struct Powers<N> {
    terms: Vec<(N, i32)>,
    /// The integration constant of the enthalpy; zero where the form has none.
    constant: N,
    scale: N,
    unit: N,
}

impl<N: Number> Powers<N> {
    pub(super) fn new(form: Form, coefficients: &[Decimal], gas_constant: N) -> Powers<N> {
        let number = |decimal: &Decimal| N::of(&decimal.value());
        let terms = coefficients.iter().map(number);
        let constant = form
            .integration_constant()
            .and_then(|at| coefficients.get(at));
        Powers {
            terms: terms.zip(form.powers().iter().copied()).collect(),
            constant: constant.map_or_else(N::zero, number),
            scale: if form.needs_gas_constant() {
                gas_constant
            } else {
                N::one()
            },
            unit: whole(form.kelvin_per_unit()),
        }
    }

    /// Cp at a temperature above 0 K.
    pub(super) fn at(&self, kelvin: &N) -> N {
        let x = kelvin.clone() / self.unit.clone();
        let terms = self.terms.iter().map(|(c, p)| c.clone() * power(&x, *p));
        self.scale.clone() * terms.fold(N::zero(), |sum, term| sum + term)
    }

    /// The integral of Cp over the temperature, from nowhere in particular: for a form with an
    /// integration constant the enthalpy on its scale, without the logarithm.
    pub(super) fn integral(&self, kelvin: &N) -> N {
        let x = kelvin.clone() / self.unit.clone();
        let terms = self.terms.iter().filter(|(_, p)| *p != -1);
        let terms = terms.map(|(c, p)| c.clone() * power(&x, p + 1) / whole(p + 1));
        let sum = terms.fold(self.constant.clone(), |sum, term| sum + term);
        self.scale.clone() * self.unit.clone() * sum
    }

    /// What the integral has of ln T. No form with a logarithm has another unit than the kelvin.
    pub(super) fn of_logarithm(&self) -> N {
        let term = self.terms.iter().find(|(_, p)| *p == -1);
        term.map_or_else(N::zero, |(c, _)| self.scale.clone() * c.clone())
    }
}

fn power<N: Number>(x: &N, exponent: i32) -> N {
    let size = pow(x.clone(), exponent.unsigned_abs() as usize);
    if exponent < 0 { N::one() / size } else { size }
}

/// A small whole number, which every number can be.
fn whole<N: Number>(number: i32) -> N {
    // Rationals and floats hold every i32 exactly, so the conversion never fails.
    N::from_i32(number).expect("a rational and a float hold every i32")
}
