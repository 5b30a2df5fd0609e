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

    /// Cp on the line over a temperature. The first and the last line go on beyond their ends, as
    /// other functions do beyond their range. None without two points.
    pub(super) fn at(&self, kelvin: &N) -> Option<N> {
        let mut lines = self.points.windows(2);
        let over = lines.find(|pair| *kelvin <= pair[1].0);
        match over.or_else(|| self.points.windows(2).last())? {
            [a, b] => Some(line(a, b, kelvin)),
            _ => None,
        }
    }

    /// The integral of Cp from the first point to a temperature.
    pub(super) fn integral(&self, kelvin: &N) -> Option<N> {
        let end = (kelvin.clone(), self.at(kelvin)?);
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
