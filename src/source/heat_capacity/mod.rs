//! Heat-capacity functions as a source prints them: their values, their integrals in closed form,
//! and the temperatures that they cover.
//!
//! Leaves to others: which function serves, transitions between forms, and the path from 298.15 K.

mod form;
mod lines;
mod powers;
mod terms;
#[cfg(test)]
mod tests;

use num_traits::{Signed, Zero};

use crate::quantity::{Decimal, Exact, Quantity, Real, to_f64};

pub use form::{Form, MOST_POWERS};
use lines::Lines;
use powers::{Number, Powers};
pub use terms::FunctionTerm;

/// A heat-capacity function over a range of temperatures.
///
/// Its integrals are closed expressions, see [`Form`]. They are exact for all forms but `nasa-9`
/// with a logarithm, which comes from `libm`.
#[derive(Clone, Debug)]
pub struct HeatCapacity {
    pub form: Form,
    pub range: Option<[Quantity; 2]>,
    /// In the order of the form, as printed.
    pub coefficients: Vec<Decimal>,
    /// For a table: temperature in K and heat capacity in J/(mol K), as printed.
    pub points: Vec<[Decimal; 2]>,
    /// What the source states of Cp over the range, J/(mol K), with the source's coverage: one
    /// error for all temperatures.
    pub uncertainty: Option<Decimal>,
}

/// How far below its range a function may serve at 298.15 K, in K (many start at 300 K).
const LENIENCE: i64 = 2;

impl HeatCapacity {
    /// The temperatures in K that the function is stated for, the lower first; for a table without
    /// a range, those of its first and last point. None where the source states none.
    pub fn range_kelvin(&self) -> Option<[Exact; 2]> {
        match (&self.range, self.points.first(), self.points.last()) {
            (Some(range), _, _) => Some(range.each_ref().map(Quantity::value_in_si)),
            (None, Some(first), Some(last)) => Some([first[0].value(), last[0].value()]),
            _ => None,
        }
    }

    /// Whether the function is stated for a temperature in K.
    pub fn covers(&self, kelvin: &Exact) -> bool {
        self.distance(kelvin).is_zero()
    }

    /// How far outside the stated range a temperature lies, K: zero inside, negative below.
    pub fn distance(&self, kelvin: &Exact) -> Exact {
        match self.range_kelvin() {
            Some([low, _]) if *kelvin < low => kelvin - low,
            Some([_, high]) if *kelvin > high => kelvin - high,
            _ => Exact::zero(),
        }
    }

    /// Whether the function covers a temperature in K, or starts within 2 K above it.
    pub fn serves(&self, kelvin: &Exact) -> bool {
        let distance = self.distance(kelvin);
        distance >= -lenience() && !distance.is_positive()
    }

    /// Cp at a temperature in K, J/(mol K), inside the range or not: whether the function may
    /// serve there is the caller's to ask. `gas_constant` is the R of the source's fits. None at
    /// 0 K and below, and for a table without two points.
    pub fn at(&self, kelvin: f64, gas_constant: f64) -> Option<f64> {
        if kelvin <= 0.0 {
            return None;
        }
        match self.form {
            Form::Table => self.lines().at(&kelvin),
            _ => Some(self.powers(gas_constant).at(&kelvin)),
        }
    }

    /// ∫Cp dT from one temperature in K to another, J/mol, inside the range or not; negative where
    /// it goes down and Cp is positive. None as in [`HeatCapacity::at`].
    pub fn increment(&self, from: &Exact, to: &Exact, gas_constant: &Exact) -> Option<Real> {
        if self.has_logarithm() {
            let [from, to, gas_constant] = [from, to, gas_constant].map(to_f64);
            return self.increment_f64(from, to, gas_constant).map(Real::Float);
        }
        let increment = self.difference(from, to, gas_constant)?;
        Some(Real::Exact(increment.sum))
    }

    /// The same in floating point, for solvers that need it often.
    pub fn increment_f64(&self, from: f64, to: f64, gas_constant: f64) -> Option<f64> {
        let increment = self.difference(&from, &to, &gas_constant)?;
        Some(increment.sum + increment.of_logarithm * libm::log(to / from))
    }

    /// H°(T) at a temperature in K on the function's own scale, J/mol, where it carries an
    /// integration constant: the formation scale of its source, see [`Form`]. None for other
    /// forms, and at 0 K and below.
    pub fn enthalpy(&self, kelvin: &Exact, gas_constant: &Exact) -> Option<Real> {
        if !self.form.has_enthalpy_scale() || !kelvin.is_positive() {
            return None;
        }
        if self.has_logarithm() {
            let powers = self.powers(to_f64(gas_constant));
            let kelvin = to_f64(kelvin);
            let logarithm = powers.of_logarithm() * libm::log(kelvin);
            return Some(Real::Float(powers.integral(&kelvin) + logarithm));
        }
        let powers = self.powers(gas_constant.clone());
        Some(Real::Exact(powers.integral(kelvin)))
    }

    /// Whether a logarithm makes the integral a floating-point number, so that nothing is won by
    /// exact numbers for the rest of it.
    fn has_logarithm(&self) -> bool {
        let powers = self.form.powers().iter().zip(&self.coefficients);
        let mut logarithms = powers.filter(|(power, _)| **power == -1);
        logarithms.any(|(_, coefficient)| !coefficient.value().is_zero())
    }

    fn difference<N: Number + PartialOrd>(
        &self,
        from: &N,
        to: &N,
        gas_constant: &N,
    ) -> Option<Integral<N>> {
        if *from <= N::zero() || *to <= N::zero() {
            return None;
        }
        if self.form == Form::Table {
            let lines = self.lines();
            return Some(Integral {
                sum: lines.integral(to)? - lines.integral(from)?,
                of_logarithm: N::zero(),
            });
        }
        let powers = self.powers(gas_constant.clone());
        Some(Integral {
            sum: powers.integral(to) - powers.integral(from),
            of_logarithm: powers.of_logarithm(),
        })
    }

    fn powers<N: Number>(&self, gas_constant: N) -> Powers<N> {
        Powers::new(self.form, &self.coefficients, gas_constant)
    }

    fn lines<N: Number + PartialOrd>(&self) -> Lines<N> {
        Lines::new(&self.points)
    }
}

/// An integral, J/mol: a sum, and what goes with the logarithm of a temperature or of a ratio.
struct Integral<N> {
    sum: N,
    of_logarithm: N,
}

/// The same as an exact number, K.
pub(super) fn lenience() -> Exact {
    Exact::from_integer(LENIENCE.into())
}
