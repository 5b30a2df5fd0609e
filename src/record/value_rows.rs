//! The table of values used, and what other sources say of the same values.

use crate::quantity::{terminating_decimal, to_f64, two_digits};
use crate::source::{Comparison, Judgement, Problem, Substance, ValueKind, ValueUsed};

use super::numerals::{minus, printed_number, unit};
use super::pages::{ComparisonRow, ValueRow};
use super::references::numbers;
use super::rich::Rich;

pub(super) fn value_rows(problem: &Problem) -> Vec<ValueRow> {
    let numbers = numbers(problem);
    let row = |(index, value): (usize, &ValueUsed)| {
        let head = &problem.sources[value.source].head;
        let note = value
            .note
            .as_ref()
            .map_or(String::new(), |note| format!(". {note}"));
        ValueRow {
            number: index + 1,
            substance: substance(value),
            name: value.name.clone(),
            cas: value.cas.clone(),
            quantity: quantity(value.kind).to_string(),
            printed: printed_number(&value.printed),
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
        None => Rich::plain(value.substance.clone()),
    }
}

fn quantity(kind: ValueKind) -> &'static str {
    match kind {
        ValueKind::FormationEnthalpy => "formation enthalpy",
        ValueKind::AtomicWeight => "atomic weight",
    }
}

pub(super) fn comparison_rows(problem: &Problem) -> Vec<ComparisonRow> {
    let rows = |substance: &Substance| -> Vec<ComparisonRow> {
        let row = |comparison: &Comparison| comparison_row(problem, substance, comparison);
        substance.comparisons.iter().map(row).collect()
    };
    let mut shown: Vec<usize> = Vec::new();
    let mut all = Vec::new();
    for substance in &problem.substances {
        // Two names for one value are compared once.
        if !shown.contains(&substance.value) {
            shown.push(substance.value);
            all.extend(rows(substance));
        }
    }
    all
}

fn comparison_row(problem: &Problem, of: &Substance, comparison: &Comparison) -> ComparisonRow {
    let value = &problem.values[of.value];
    let difference = &comparison.difference;
    let text = terminating_decimal(difference).unwrap_or_else(|| two_digits(to_f64(difference)));
    ComparisonRow {
        substance: substance(value),
        value_used: of.value + 1,
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
    }
}

fn judgement(judgement: Judgement) -> String {
    let size = |combined: f64| minus(&two_digits(combined));
    let stated = |complete: bool| match complete {
        true => "the combined expanded uncertainty",
        false => "the one expanded uncertainty that is stated",
    };
    match judgement {
        Judgement::Within { combined, complete } => {
            format!("within {}, {}", stated(complete), size(combined))
        }
        Judgement::Beyond { combined, complete } => {
            format!("beyond {}, {}", stated(complete), size(combined))
        }
        Judgement::NotJudged { equal: true } => "equal as printed".to_string(),
        Judgement::NotJudged { equal: false } => {
            "not judged: neither states an uncertainty".to_string()
        }
    }
}
