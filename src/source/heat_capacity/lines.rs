//! Straight lines between printed points: the value and the integral, for exact and for
//! floating-point numbers.

use crate::quantity::Decimal;

use super::powers::Number;

/// The points of a table, temperature in K and Cp in J/(mol K), in rising order.
pub(super) struct Lines<N> {
    points: Vec<(N, N)>,
}

impl<N: Number + PartialOrd> Lines<N> {
    pub(super) fn new(points: &[[Decimal; 2]]) -> Lines<N> {
        let number = |decimal: &Decimal| N::of(&decimal.value());
        let points = points.iter().map(|[t, c]| (number(t), number(c)));
        Lines {
            points: points.collect(),
        }
    }

    /// Cp on the line over a temperature; the first line goes on below its first point, by as
    /// much as a function may start too high. None where no line is.
    pub(super) fn at(&self, kelvin: &N, lenience: &N) -> Option<N> {
        let first = self.points.first()?;
        let on_line = |pair: &[(N, N)]| -> Option<N> {
            let [a, b] = pair else { return None };
            let extended = a.0 == first.0 && *kelvin >= a.0.clone() - lenience.clone();
            let inside = (*kelvin >= a.0 || extended) && *kelvin <= b.0 && a.0 < b.0;
            inside.then(|| line(a, b, kelvin))
        };
        self.points.windows(2).find_map(on_line)
    }

    /// The integral of Cp from the first point to a temperature that a line covers.
    pub(super) fn integral(&self, kelvin: &N, lenience: &N) -> Option<N> {
        let end = (kelvin.clone(), self.at(kelvin, lenience)?);
        let first = self.points.first()?;
        let between = self.points.iter().skip(1).filter(|(t, _)| t < kelvin);
        let mut sum = N::zero();
        let mut from = first;
        for to in between.chain([&end]) {
            sum = sum + area(from, to);
            from = to;
        }
        Some(sum)
    }
}

fn line<N: Number>(a: &(N, N), b: &(N, N), kelvin: &N) -> N {
    let slope = (b.1.clone() - a.1.clone()) / (b.0.clone() - a.0.clone());
    a.1.clone() + slope * (kelvin.clone() - a.0.clone())
}

/// The trapezium under the line from one point to another, negative where it goes down in
/// temperature.
fn area<N: Number>(a: &(N, N), b: &(N, N)) -> N {
    let two = N::one() + N::one();
    (b.0.clone() - a.0.clone()) * (a.1.clone() + b.1.clone()) / two
}
