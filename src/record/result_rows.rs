//! Results as they are stated.

use crate::calculation::Calculation;
use crate::case::RESULT_QUANTITIES;
use crate::engine::{COVERAGE, Outcome};
use crate::quantity::{exact_text, two_digits};

use super::cycle_working::target;
use super::heating_value_rows::{heating_value_rows, heating_value_what};
use super::numerals::{minus, unit};
use super::pages::ResultRow;
use super::working::equation;

pub(super) fn result_rows(calculation: &Calculation) -> Vec<ResultRow> {
    let mut rows = Vec::new();
    for (section, reaction) in calculation.working.reactions.iter().enumerate() {
        let id = &calculation.problem.reactions[reaction.reaction].id;
        let own = RESULT_QUANTITIES
            .iter()
            .filter_map(|quantity| calculation.working.outcome(&format!("{id}.{quantity}")));
        let first = rows.len();
        rows.extend(own.map(|outcome| result_row(calculation, outcome, section)));
        if !reaction.is_worked() {
            rows.push(not_worked(
                &format!("{id}.heat"),
                "Heat of reaction",
                section,
            ));
        }
        if let Some(row) = rows.get_mut(first) {
            let reaction = &calculation.problem.reactions[reaction.reaction];
            row.equation = Some(equation(&calculation.problem, reaction));
        }
    }
    let first = calculation.working.reactions.len();
    for (at, working) in calculation.working.cycles.iter().enumerate() {
        let cycle = &calculation.problem.cycles[working.cycle];
        let outcome = calculation.working.outcome(&format!("{}.heat", cycle.id));
        let mut row = match outcome {
            Some(outcome) => result_row(calculation, outcome, first + at),
            None => not_worked(
                &format!("{}.heat", cycle.id),
                "Heat of reaction",
                first + at,
            ),
        };
        row.equation = Some(target(cycle));
        rows.push(row);
    }
    let first = first + calculation.working.cycles.len();
    rows.extend(heating_value_rows(calculation, first));
    rows
}

pub(super) fn result_row(
    calculation: &Calculation,
    outcome: &Outcome,
    section: usize,
) -> ResultRow {
    ResultRow {
        id: outcome.id.clone(),
        what: what(calculation, outcome),
        equation: None,
        section,
        stated: Some(minus(&outcome.stated.value_text)),
        expanded: stated_uncertainty(outcome),
        unit: unit(&outcome.unit),
        direction: Some(outcome.direction().word().to_string()),
        coverage: coverage(outcome),
    }
}

/// What was not worked stands in the list all the same.
pub(super) fn not_worked(id: &str, what: &str, section: usize) -> ResultRow {
    ResultRow {
        id: id.to_string(),
        what: format!("{what}: not worked, see the findings"),
        equation: None,
        section,
        stated: None,
        expanded: None,
        unit: String::new(),
        direction: None,
        coverage: "not worked".to_string(),
    }
}

/// What a result is, in words.
pub(super) fn what(calculation: &Calculation, outcome: &Outcome) -> String {
    let (id, quantity) = outcome.id.split_once('.').unwrap_or((&outcome.id, ""));
    if let Some(what) = heating_value_what(calculation, id, quantity) {
        return what;
    }
    let reaction = calculation.case.reactions.get(id);
    let per = reaction
        .and_then(|r| r.per.as_ref())
        .map_or("", |per| per.value.as_str());
    let at = kelvin(calculation, id);
    if calculation.case.cycles.contains_key(id) {
        return format!(
            "Heat of reaction at {at} K from a cycle, per mole of the target as written"
        );
    }
    match quantity {
        "heat" => format!("Heat of reaction at {at} K, per mole of reaction as written"),
        "heat-per" => format!("Heat of reaction at {at} K, per mole of {per}"),
        _ => format!("Heat of reaction at {at} K, per mass of {per}"),
    }
}

fn kelvin(calculation: &Calculation, id: &str) -> String {
    let mut reactions = calculation.problem.reactions.iter();
    let reaction = reactions.find(|reaction| reaction.id == id);
    let mut cycles = calculation.problem.cycles.iter();
    let cycle = cycles
        .find(|cycle| cycle.id == id)
        .and_then(|cycle| cycle.kelvin());
    let kelvin = reaction.map(|r| &r.kelvin).or(cycle);
    kelvin.map_or(String::new(), |kelvin| minus(&exact_text(kelvin)))
}

/// The expanded uncertainty where it covers every value used, otherwise none.
pub(super) fn stated_uncertainty(outcome: &Outcome) -> Option<String> {
    outcome
        .is_complete()
        .then(|| outcome.stated.uncertainty_text.clone())?
}

/// What the uncertainty covers, in words.
pub fn coverage(outcome: &Outcome) -> String {
    let covered = values_covered(outcome);
    match outcome.not_covered.is_empty() {
        true => covered,
        false => format!(
            "{covered}; does not cover {}",
            outcome.not_covered.join(", ")
        ),
    }
}

fn values_covered(outcome: &Outcome) -> String {
    let (stated, of) = (outcome.combined.stated, outcome.combined.of);
    match (outcome.expanded, of) {
        (_, 0) => "exact".to_string(),
        (Some(_), 1) if outcome.is_complete() => {
            format!("k = {COVERAGE}, about 95 %; covers the one value used")
        }
        (Some(_), _) if outcome.is_complete() => {
            format!("k = {COVERAGE}, about 95 %; covers all {of} values used")
        }
        (Some(expanded), _) => format!(
            "covers {stated} of {of} values used; those alone give ±{} {} (k = {COVERAGE})",
            two_digits(expanded),
            unit(&outcome.unit)
        ),
        (None, _) => format!("uncertainty not stated by any of {of} values used"),
    }
}

/// A result in running text: −552.6 ± 0.8 kJ/mol.
pub(super) fn in_words(outcome: &Outcome) -> String {
    let value = minus(&outcome.stated.value_text);
    let uncertainty = stated_uncertainty(outcome);
    let uncertainty = uncertainty.map_or(String::new(), |u| format!("\u{a0}±\u{a0}{u}"));
    format!("{value}{uncertainty}\u{a0}{}", unit(&outcome.unit))
}
