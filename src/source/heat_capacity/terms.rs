//! The terms of an integral, so that a working can show each of them.

use num_traits::{One, Zero};

use crate::quantity::{Exact, Real, Significance, to_f64, working_text};

use super::{Form, HeatCapacity};

/// One term: a coefficient times a factor that depends on the temperatures.
#[derive(Clone, Debug, PartialEq)]
pub struct FunctionTerm {
    /// The coefficient and its factor in symbols: `a4·(T² − T₀²)/2`.
    pub name: String,
    /// The coefficient as printed; for a table the mean between two points.
    pub coefficient: String,
    pub factor: Real,
    /// The term in J/mol.
    pub product: Real,
}

impl HeatCapacity {
    /// The terms of the increment between two temperatures in K, or without the first one of the
    /// enthalpy on the function's own scale. Their products add up to what
    /// [`HeatCapacity::increment`] and [`HeatCapacity::enthalpy`] give.
    pub fn terms(
        &self,
        from: Option<&Exact>,
        to: &Exact,
        gas_constant: &Exact,
    ) -> Vec<FunctionTerm> {
        match (self.form, from) {
            (Form::Table, Some(from)) => self.segments(from, to),
            (Form::Table, None) => Vec::new(),
            _ => self.power_terms(from, to, gas_constant),
        }
    }

    fn power_terms(
        &self,
        from: Option<&Exact>,
        to: &Exact,
        gas_constant: &Exact,
    ) -> Vec<FunctionTerm> {
        let unit = Exact::from_integer(self.form.kelvin_per_unit().into());
        let scale = match self.form.needs_gas_constant() {
            true => gas_constant.clone(),
            false => unit.clone(),
        };
        let variable = if unit.is_one() { "T" } else { "t" };
        let (x, x0) = (to / &unit, from.map(|from| from / &unit));
        let names = self.form.coefficient_names();
        let mut terms = Vec::new();
        for (index, power) in self.form.powers().iter().enumerate() {
            let Some(coefficient) = self.coefficients.get(index) else {
                break;
            };
            let factor = factor(*power, &x, x0.as_ref());
            let exact = Real::Exact(coefficient.value() * &scale);
            terms.push(FunctionTerm {
                name: format!(
                    "{}·{}",
                    name(names, index),
                    factor_name(*power, variable, from.is_some())
                ),
                coefficient: coefficient.printed().to_string(),
                product: exact.times(&factor),
                factor,
            });
        }
        let constant = self.form.integration_constant().filter(|_| from.is_none());
        if let Some(coefficient) = constant.and_then(|at| self.coefficients.get(at)) {
            let at = constant.unwrap_or_default();
            terms.push(FunctionTerm {
                name: name(names, at),
                coefficient: coefficient.printed().to_string(),
                factor: Real::Exact(Exact::one()),
                product: Real::Exact(coefficient.value() * &scale),
            });
        }
        terms
    }

    /// Between the printed points: the mean of the two ends times the way.
    fn segments(&self, from: &Exact, to: &Exact) -> Vec<FunctionTerm> {
        let (low, high) = if from < to { (from, to) } else { (to, from) };
        let printed = self.points.iter().map(|[t, _]| t.value());
        let inside = printed.filter(|t| t > low && t < high);
        let mut stops: Vec<Exact> = std::iter::once(low.clone()).chain(inside).collect();
        stops.push(high.clone());
        if to < from {
            stops.reverse();
        }
        let segment = |pair: &[Exact]| {
            let way = &pair[1] - &pair[0];
            let product = self.increment(&pair[0], &pair[1], &Exact::zero())?;
            let mean = product.over(&Real::Exact(way.clone()))?;
            let kelvin = |t: &Exact| working_text(&Real::Exact(t.clone()), Significance::Exact);
            Some(FunctionTerm {
                name: format!("{} K to {} K", kelvin(&pair[0]), kelvin(&pair[1])),
                coefficient: working_text(&mean, Significance::Exact),
                factor: Real::Exact(way),
                product,
            })
        };
        stops.windows(2).filter_map(segment).collect()
    }
}

/// ∫ x^p dx, between bounds or from nowhere in particular.
fn factor(power: i32, x: &Exact, x0: Option<&Exact>) -> Real {
    if power == -1 {
        let argument = x0.map_or_else(|| x.clone(), |x0| x / x0);
        return Real::Float(libm::log(to_f64(&argument)));
    }
    let antiderivative = |x: &Exact| {
        let size = num_traits::pow(x.clone(), (power + 1).unsigned_abs() as usize);
        let raised = if power + 1 < 0 { size.recip() } else { size };
        raised / Exact::from_integer((power + 1).into())
    };
    let zero = Exact::zero();
    Real::Exact(antiderivative(x) - x0.map_or(zero, antiderivative))
}

fn factor_name(power: i32, x: &str, between: bool) -> String {
    const RAISED: [&str; 10] = ["", "", "²", "³", "⁴", "⁵", "⁶", "⁷", "⁸", "⁹"];
    let exponent = (power + 1).unsigned_abs() as usize;
    let raised = RAISED
        .get(exponent)
        .map_or_else(|| format!("^{exponent}"), ToString::to_string);
    match (power, between) {
        (-1, true) => format!("ln({x}/{x}₀)"),
        (-1, false) => format!("ln {x}"),
        (-2, true) => format!("(1/{x}₀ − 1/{x})"),
        (-2, false) => format!("(−1/{x})"),
        (0, true) => format!("({x} − {x}₀)"),
        (0, false) => x.to_string(),
        (_, true) => format!("({x}{raised} − {x}₀{raised})/{exponent}"),
        (_, false) => format!("{x}{raised}/{exponent}"),
    }
}

fn name(names: &[&str], index: usize) -> String {
    names
        .get(index)
        .map_or_else(|| format!("a{index}"), ToString::to_string)
}

impl Form {
    /// What the coefficients are called, in their order; none where they are counted from a0.
    pub fn coefficient_names(self) -> &'static [&'static str] {
        match self {
            Form::Constant => &["c"],
            Form::MaierKelley => &["a", "b", "c"],
            Form::Shomate => &["A", "B", "C", "D", "E", "F", "G", "H"],
            Form::Nasa7 => &["a1", "a2", "a3", "a4", "a5", "a6", "a7"],
            Form::Nasa9 => &["a1", "a2", "a3", "a4", "a5", "a6", "a7", "b1", "b2"],
            Form::Polynomial | Form::Table => &[],
        }
    }
}
