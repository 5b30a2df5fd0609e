//! The table of values used, and what other sources say of the same values.

use std::collections::BTreeMap;

use crate::quantity::{
    Quantity, StatedUncertainty, exact_text, terminating_decimal, to_f64, two_digits,
};
use crate::source::{
    Comparison, Form, Judgement, Problem, StepSource, Substance, ValueKind, ValueUsed,
};

use super::cycle_equation::equation;
use super::function_rows::range;
use super::numerals::{minus, printed_number, unit};
use super::pages::{ComparisonRow, ValueRow};
use super::references::numbers;
use super::rich::Rich;

pub(super) fn value_rows(problem: &Problem) -> Vec<ValueRow> {
    let numbers = numbers(problem);
    let measured = measured_heats(problem);
    let row = |(index, value): (usize, &ValueUsed)| {
        let head = &problem.sources[value.source].head;
        let note = value
            .note
            .as_ref()
            .map_or(String::new(), |note| format!(". {note}"));
        ValueRow {
            number: index + 1,
            substance: substance(value),
            name: measured
                .get(&index)
                .cloned()
                .or_else(|| value.name.clone().map(Rich::plain)),
            cas: value.cas.clone(),
            quantity: quantity(value),
            printed: printed_value(value),
            unit: unit(&value.printed.unit),
            // Every source of a value used is in the reference list.
            reference: numbers.get(&value.source).copied().unwrap_or(0),
            source: head.id.clone(),
            locator: format!("{}{note}", value.locator),
            standing: value.standing.word().to_string(),
            sha256: head.sha256[..16.min(head.sha256.len())].to_string(),
        }
    };
    problem.values.iter().enumerate().map(row).collect()
}

/// A substance as it is typeset.
pub(super) fn substance(value: &ValueUsed) -> Rich {
    match &value.species {
        Some(species) => Rich::from(species.pieces()),
        // The step of a cycle alone: the table of values used says what was measured.
        None if value.kind == ValueKind::MeasuredHeat => {
            let step = value.substance.split(": ").next();
            Rich::plain(step.unwrap_or_default())
        }
        None => Rich::plain(value.substance.clone()),
    }
}

/// What was measured, of each heat that a step of a cycle states.
fn measured_heats(problem: &Problem) -> BTreeMap<usize, Rich> {
    let steps = problem.cycles.iter().flat_map(|cycle| {
        let steps = cycle.steps.iter();
        steps.map(move |step| (cycle, step))
    });
    let measured = steps.filter_map(|(cycle, step)| {
        let StepSource::Value { value, .. } = &step.heat else {
            return None;
        };
        let stated = problem.values[*value].kind == ValueKind::MeasuredHeat;
        let what = match step.bomb {
            Some(_) => "internal energy",
            None => "enthalpy",
        };
        let text = Rich::plain(format!("{what} of "));
        stated.then(|| (*value, text.with(equation(cycle, &step.numbers, false))))
    });
    measured.collect()
}

fn quantity(value: &ValueUsed) -> String {
    let kind = value.kind.word().replace('-', " ");
    match &value.function {
        Some(function) => format!("{kind}, {}, {}", function.form.word(), range(function)),
        None => kind,
    }
}

/// A number as printed, with the tolerance that stands beside it in the case.
fn with_tolerance(quantity: &Quantity) -> String {
    let number = printed_number(quantity);
    match &quantity.uncertainty {
        Some(StatedUncertainty::Tolerance { half_width }) => {
            format!("{number} (tolerance ±{})", exact_text(half_width))
        }
        _ => number,
    }
}

/// As the source prints it; of a function the constant, or where its coefficients stand.
fn printed_value(value: &ValueUsed) -> String {
    let Some(function) = &value.function else {
        return with_tolerance(&value.printed);
    };
    match (function.form, function.coefficients.first()) {
        (Form::Constant, Some(constant)) => {
            let error = function.uncertainty.as_ref();
            let error = error.map_or(String::new(), |u| format!(" ± {}", u.printed()));
            minus(&format!("{}{error}", constant.printed()))
        }
        _ => "see below".to_string(),
    }
}

pub(super) fn comparison_rows(problem: &Problem) -> Vec<ComparisonRow> {
    let rows = |substance: &Substance| -> Vec<ComparisonRow> {
        let row = |comparison: &Comparison| comparison_row(problem, substance, comparison);
        substance.comparisons.iter().filter_map(row).collect()
    };
    let mut shown: Vec<usize> = Vec::new();
    let mut all = Vec::new();
    for substance in &problem.substances {
        // Two names for one value are compared once.
        if let Some(value) = substance.value.filter(|value| !shown.contains(value)) {
            shown.push(value);
            all.extend(rows(substance));
        }
    }
    all
}

fn comparison_row(
    problem: &Problem,
    of: &Substance,
    comparison: &Comparison,
) -> Option<ComparisonRow> {
    let index = of.value?;
    let value = &problem.values[index];
    let difference = &comparison.difference;
    let text = terminating_decimal(difference).unwrap_or_else(|| two_digits(to_f64(difference)));
    Some(ComparisonRow {
        substance: substance(value),
        value_used: index + 1,
        used: printed_number(&value.printed),
        other: format!(
            "{} {}",
            printed_number(&comparison.printed),
            unit(&comparison.printed.unit)
        ),
        unit: unit(&value.printed.unit),
        reference: numbers(problem)
            .get(&comparison.source)
            .copied()
            .unwrap_or(0),
        locator: comparison.locator.clone(),
        difference: minus(&text),
        judgement: match &of.because {
            Some(because) => {
                format!(
                    "{}; chosen by the case: {because}",
                    judgement(comparison.judgement)
                )
            }
            None => judgement(comparison.judgement),
        },
    })
}

/// U is the combined expanded uncertainty of the two values, or the one that is stated.
fn judgement(judgement: Judgement) -> String {
    let stated = |combined: f64, complete: bool| {
        let remark = if complete { "" } else { "; one states none" };
        format!("U = {} (k = 2{remark})", minus(&two_digits(combined)))
    };
    match judgement {
        Judgement::Within { combined, complete } => {
            format!("within {}", stated(combined, complete))
        }
        Judgement::Beyond { combined, complete } => {
            format!("beyond {}", stated(combined, complete))
        }
        Judgement::NotJudged { equal: true } => "equal as printed".to_string(),
        Judgement::NotJudged { equal: false } => {
            "not judged: neither states an uncertainty".to_string()
        }
    }
}
