//! Heat-capacity functions as a source prints them.

use crate::quantity::{Decimal, Exact, Quantity, to_f64};

/// The form of a heat-capacity function; the meaning of its coefficients goes with it.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Form {
    Constant,
    Polynomial,
    MaierKelley,
    Shomate,
    Nasa7,
    Nasa9,
    Table,
}

impl Form {
    pub const ALL: [Form; 7] = [
        Form::Constant,
        Form::Polynomial,
        Form::MaierKelley,
        Form::Shomate,
        Form::Nasa7,
        Form::Nasa9,
        Form::Table,
    ];

    pub fn word(self) -> &'static str {
        match self {
            Form::Constant => "constant",
            Form::Polynomial => "polynomial",
            Form::MaierKelley => "maier-kelley",
            Form::Shomate => "shomate",
            Form::Nasa7 => "nasa-7",
            Form::Nasa9 => "nasa-9",
            Form::Table => "table",
        }
    }

    pub fn from_word(word: &str) -> Option<Form> {
        Form::ALL.into_iter().find(|form| form.word() == word)
    }

    /// How many coefficients the form has; none where the number is free.
    pub fn coefficients(self) -> Option<usize> {
        match self {
            Form::Constant => Some(1),
            Form::MaierKelley => Some(3),
            Form::Shomate => Some(8),
            Form::Nasa7 => Some(7),
            Form::Nasa9 => Some(9),
            Form::Polynomial | Form::Table => None,
        }
    }
}

/// A heat-capacity function over a range of temperatures.
#[derive(Clone, Debug)]
pub struct HeatCapacity {
    pub form: Form,
    pub range: Option<[Quantity; 2]>,
    /// In the order of the form, as printed.
    pub coefficients: Vec<Decimal>,
    /// For a table: temperature in K and heat capacity in J/(mol K), as printed.
    pub points: Vec<[Decimal; 2]>,
}

/// How far below its range a function may serve at 298.15 K, in K (many start at 300 K).
const LENIENCE: i64 = 2;

impl HeatCapacity {
    /// Whether the function covers a temperature in K, or starts within 2 K above it.
    pub fn serves(&self, kelvin: &Exact) -> bool {
        self.range.as_ref().is_none_or(|[low, high]| {
            let low = low.value_in_si() - Exact::from_integer(LENIENCE.into());
            low <= *kelvin && *kelvin <= high.value_in_si()
        })
    }

    /// Cp at a temperature in K, J/(mol K). `gas_constant` is the R of the source's fits.
    /// None where a table does not reach the temperature.
    pub fn at(&self, kelvin: f64, gas_constant: f64) -> Option<f64> {
        let c: Vec<f64> = self
            .coefficients
            .iter()
            .map(|c| to_f64(&c.value()))
            .collect();
        let t = kelvin;
        match self.form {
            Form::Constant | Form::Polynomial => Some(horner(&c, t)),
            Form::MaierKelley => Some(c[0] + c[1] * t + c[2] / (t * t)),
            Form::Shomate => {
                let s = t / 1000.0;
                Some(horner(&c[..4], s) + c[4] / (s * s))
            }
            Form::Nasa7 => Some(gas_constant * horner(&c[..5], t)),
            Form::Nasa9 => Some(gas_constant * (c[0] / (t * t) + c[1] / t + horner(&c[2..7], t))),
            Form::Table => self.interpolated(t),
        }
    }

    fn interpolated(&self, kelvin: f64) -> Option<f64> {
        let point = |p: &[Decimal; 2]| (to_f64(&p[0].value()), to_f64(&p[1].value()));
        self.points.windows(2).find_map(|pair| {
            let ((t0, c0), (t1, c1)) = (point(&pair[0]), point(&pair[1]));
            let inside = t0 <= kelvin && kelvin <= t1 && t1 > t0;
            inside.then(|| c0 + (c1 - c0) * (kelvin - t0) / (t1 - t0))
        })
    }
}

/// Σ c[i]·x^i
fn horner(coefficients: &[f64], x: f64) -> f64 {
    coefficients.iter().rev().fold(0.0, |sum, c| sum * x + c)
}
