//! Equations and multipliers of a cycle as they stand on the pages.

use num_traits::{Signed, Zero};

use crate::notation::PhaseLabel;
use crate::quantity::{
    Exact, Significance, full_text, order_of_magnitude, power_of_ten, round_to_place,
};
use crate::source::{ProblemCycle, ProblemStep};

use super::numerals::{coefficient, minus};
use super::rich::Rich;

/// Digits shown of a multiplier that uncertainties had a part in: as many as of its products.
const WEIGHT_DIGITS: i64 = 10;

/// An equation from its numbers, turned where it is subtracted.
pub(super) fn equation(cycle: &ProblemCycle, numbers: &[Exact], turned: bool) -> Rich {
    let side = |negative: bool| {
        let terms = cycle.species.iter().zip(numbers);
        let terms = terms.filter(|(_, nu)| !nu.is_zero() && nu.is_negative() == negative);
        terms
            .enumerate()
            .fold(Rich::default(), |text, (at, (species, nu))| {
                let plus = if at == 0 { "" } else { " + " };
                text.and(format!("{plus}{}", coefficient(&nu.abs())))
                    .with(Rich::from(species.species.pieces()))
            })
    };
    side(!turned).and(" → ").with(side(turned))
}

/// "7 CO2(g) − 15/2 O2(g)"
pub(super) fn gases(cycle: &ProblemCycle, step: &ProblemStep) -> Rich {
    let mut text = Rich::default();
    for (species, nu) in cycle.species.iter().zip(&step.numbers) {
        let phase = species.species.phase.as_ref();
        let gas = phase.is_some_and(|p| p.label == PhaseLabel::Gas);
        if !gas || nu.is_zero() {
            continue;
        }
        let sign = match (text.0.is_empty(), nu.is_negative()) {
            (true, false) => "",
            (true, true) => "\u{2212}",
            (false, false) => " + ",
            (false, true) => " \u{2212} ",
        };
        text = text
            .and(format!("{sign}{}", coefficient(&nu.abs())))
            .with(Rich::from(species.species.pieces()));
    }
    if text.0.is_empty() {
        Rich::plain("no gas")
    } else {
        text
    }
}

/// A multiplier: a fraction, or the first digits of one that is long.
pub(super) fn multiplier(weight: &Exact) -> String {
    let fraction = weight.to_string();
    if fraction.len() <= 8 {
        fraction
    } else {
        minus(&cut(weight, WEIGHT_DIGITS))
    }
}

/// The first digits, with an ellipsis where there are more.
pub(super) fn cut(value: &Exact, digits: i64) -> String {
    let full = full_text(value, Significance::Exact);
    if !full.ends_with('…') && full.chars().count() as i64 <= digits + 2 {
        return full;
    }
    let Some(order) = order_of_magnitude(value) else {
        return full;
    };
    let place = (order + 1 - digits).min(0);
    let short = (value * power_of_ten(-place)).trunc() * power_of_ten(place);
    format!("{}…", round_to_place(&short, place).text)
}
