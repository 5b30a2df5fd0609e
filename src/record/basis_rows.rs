//! What the calculation rests on: inputs, assumptions and holds.

use crate::case::{Assumption, Case, Hold, Input};

use super::numerals::printed;
use super::pages::{AssumptionRow, Basis, HoldRow, InputRow};

pub(super) fn basis(case: &Case) -> Basis {
    let mut holds = Holds::default();
    let assumptions = case.assumptions.iter().enumerate();
    let assumptions = assumptions
        .map(|(i, a)| assumption_row(i + 1, a, &mut holds))
        .collect();
    let inputs = case
        .inputs
        .values()
        .map(|input| input_row(input, &mut holds))
        .collect();
    Basis {
        inputs,
        assumptions,
        holds: holds.rows,
    }
}

#[derive(Default)]
struct Holds {
    rows: Vec<HoldRow>,
}

impl Holds {
    /// Takes a hold in and returns its number.
    fn number(&mut self, what: String, hold: Option<&Hold>) -> Option<usize> {
        let hold = hold?;
        let number = self.rows.len() + 1;
        let accepted = hold.accepted_by.as_ref();
        let accepted = accepted.map_or(String::new(), |n| {
            format!(" (open at issue: accepted by {n})")
        });
        self.rows.push(HoldRow {
            number,
            what: format!("{what}{accepted}"),
            owner: hold.owner.clone(),
            closed_by: hold.closed_by.clone(),
        });
        Some(number)
    }
}

fn assumption_row(number: usize, assumption: &Assumption, holds: &mut Holds) -> AssumptionRow {
    AssumptionRow {
        number,
        text: assumption.text.value.clone(),
        basis: assumption.basis.clone(),
        confirmed: assumption.confirmed,
        hold: holds.number(assumption.text.value.clone(), assumption.hold.as_ref()),
    }
}

fn input_row(input: &Input, holds: &mut Holds) -> InputRow {
    let what = format!("Input {}: {}", input.id.value, with_reference(input));
    InputRow {
        id: input.id.value.clone(),
        value: with_reference(input),
        tolerance: input.tolerance.as_ref().map(|t| format!("±{}", printed(t))),
        source: input
            .source
            .clone()
            .unwrap_or_else(|| "none stated".to_string()),
        confirmed: input.confirmed,
        hold: holds.number(what, input.hold.as_ref()),
    }
}

/// The value, a gas volume with what it refers to.
fn with_reference(input: &Input) -> String {
    let value = printed(&input.value.value);
    match &input.reference {
        Some(reference) => format!("{value} (at {reference})"),
        None => value,
    }
}
