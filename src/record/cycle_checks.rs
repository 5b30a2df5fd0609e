//! The tables in which redundant determinations are held against each other.

use crate::engine::{Adjustment, closure_text, decimals};
use crate::quantity::{Exact, order_of_magnitude, round_to_place};

use super::cycle_equation::cut;
use super::cycle_tables::Shown;
use super::heat_working::shown;
use super::numerals::minus;
use super::pages::{Column, Table};
use super::rich::{Rich, Run};
use super::tables::{number, text};

impl Shown<'_> {
    /// What should be zero, and how far it is from it.
    pub(super) fn closures(&self, closures: &[Vec<Exact>], adjustment: &Adjustment) -> Table {
        let rows = closures.iter().enumerate().map(|(k, by)| {
            vec![
                Rich::plain(closure_text(self.cycle, by)),
                Rich::plain(minus(&cut(&adjustment.misclosures[k], 10))),
                Rich::plain(digits(adjustment.misclosure_uncertainty[k], 4)),
                Rich::plain(digits(adjustment.correlates[k], 6)),
            ]
        });
        Table {
            caption: format!(
                "Sums of steps that are no reaction at all: m and u(m) in {0}, y in 1/({0})",
                self.unit
            ),
            columns: vec![
                text("What should be zero"),
                number(italic("m")),
                number(uncertainty_of("m")),
                number(italic("y")),
            ],
            rows: rows.collect(),
            total: None,
        }
    }

    /// Measured and adjusted heats with their residuals.
    pub(super) fn adjusted(&self, adjustment: &Adjustment) -> Table {
        let rows = self.steps().enumerate().map(|(index, (step, heat))| {
            let residual = &adjustment.residuals[index];
            let adjusted = heat.heat.value.to_exact().map(|q| q - residual);
            let place = residual_place(adjustment.standard[index]);
            vec![
                Rich::plain(step.name.clone()),
                Rich::plain(shown(&heat.heat)),
                Rich::plain(digits(adjustment.standard[index], 4)),
                Rich::plain(adjusted.map_or(String::new(), |q| at(&q, place))),
                Rich::plain(at(residual, place)),
            ]
        });
        Table {
            caption: format!(
                "Measured heats, adjusted heats and residuals, in {}",
                self.unit
            ),
            columns: vec![
                text("Step"),
                number(Rich::plain("Measured ").with(italic("q"))),
                number(uncertainty_of("q")),
                number(Rich::plain("Adjusted")),
                number(Rich::plain("Residual ").with(italic("e"))),
            ],
            rows: rows.collect(),
            total: None,
        }
    }

    /// How much each heat deviates for what it may, and how far the others check it.
    pub(super) fn checks(&self, adjustment: &Adjustment) -> Table {
        let rows = self.steps().enumerate().map(|(index, (step, _))| {
            let normalised = adjustment.normalised[index];
            let size = |size: f64| normalised.map_or("0".to_string(), |_| digits(size, 5));
            vec![
                Rich::plain(step.name.clone()),
                Rich::plain(size(adjustment.gradients[index])),
                Rich::plain(size(adjustment.gradient_uncertainty[index])),
                Rich::plain(normalised.map_or("–".into(), |t| minus(&decimals(t)))),
                Rich::plain(places(adjustment.redundancy[index])),
            ]
        });
        let sum: f64 = adjustment.redundancy.iter().sum();
        Table {
            caption: format!(
                "Which heat deviates, and how far the others check it: λ and s in 1/({})",
                self.unit
            ),
            columns: self.check_columns(),
            rows: rows.collect(),
            total: Some(vec![
                Rich::plain("Sum: the degrees of freedom"),
                Rich::default(),
                Rich::default(),
                Rich::default(),
                Rich::plain(places(sum)),
            ]),
        }
    }

    fn check_columns(&self) -> Vec<Column> {
        vec![
            text("Step"),
            number(italic("λ")),
            number(italic("s")),
            number(Rich::plain("Normalised ").with(italic("t"))),
            number(Rich::plain("Checked part ").with(italic("ρ"))),
        ]
    }
}

fn italic(text: &str) -> Rich {
    Rich::default().run(Run::Italic(text.into()))
}

fn uncertainty_of(of: &str) -> Rich {
    italic("u").and("(").with(italic(of)).and(")")
}

/// To three decimals.
fn places(size: f64) -> String {
    Exact::from_float(size).map_or(String::new(), |size| at(&size, -3))
}

/// A number that others are worked out with by hand, to so many significant digits.
pub(super) fn digits(size: f64, count: i64) -> String {
    let exact = Exact::from_float(size);
    let order = exact.as_ref().and_then(order_of_magnitude);
    match (exact, order) {
        (Some(size), Some(order)) => at(&size, (order + 1 - count).min(0)),
        _ => "0".to_string(),
    }
}

/// One place more than the two digits of the uncertainty.
fn residual_place(standard: f64) -> i64 {
    let exact = Exact::from_float(standard);
    let order = exact.and_then(|u| order_of_magnitude(&u));
    order.map_or(-4, |order| order - 2).min(0)
}

fn at(value: &Exact, place: i64) -> String {
    minus(&round_to_place(value, place).text)
}
