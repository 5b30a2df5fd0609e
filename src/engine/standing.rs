//! What the values used are worth: findings about their verification and their digits.

use std::collections::{BTreeMap, BTreeSet};

use crate::finding::{Finding, FindingCode, Severity, Text};
use crate::quantity::{Decimal, InputUncertainty, Significance};
use crate::source::{Form, NO_SOURCE, Problem, Standing, ValueUsed};

use super::outcome::{Outcome, StatedBy};

/// How many results or values a message names.
const MOST: usize = 8;

/// A caution for each source and standing below "compared with the original", naming its values.
pub(super) fn not_compared(problem: &Problem, text: &Text) -> Vec<Finding> {
    let mut groups: BTreeMap<(usize, Standing), Vec<&ValueUsed>> = BTreeMap::new();
    for value in problem.values.iter().filter(|v| !v.standing.is_compared()) {
        groups
            .entry((value.source, value.standing))
            .or_default()
            .push(value);
    }
    let finding = |((source, standing), values): (&(usize, Standing), &Vec<&ValueUsed>)| Finding {
        severity: Severity::Caution,
        code: FindingCode::NotCompared,
        message: format!(
            "{} of {} ({}): not compared with the printed table. Compare before relying on it.",
            list(once_each(values.iter().map(|v| v.substance.clone()))),
            problem.sources[*source].id(),
            standing.word(),
        ),
        at: text.place(values[0].used_at.start),
    };
    groups.iter().map(finding).collect()
}

/// A caution for values whose entries do not say where in the source they stand.
pub(super) fn not_located(problem: &Problem, text: &Text) -> Vec<Finding> {
    let silent = problem
        .values
        .iter()
        .filter(|v| v.locator.trim().is_empty());
    let silent: Vec<&ValueUsed> = silent.collect();
    let without = "without a locator: a checker cannot find the value. Give each entry its table and \
                   page.";
    let unsourced = problem
        .values
        .iter()
        .filter(|v| v.locator.ends_with(NO_SOURCE));
    let unsourced: Vec<&ValueUsed> = unsourced.collect();
    let unsaid =
        "stated by the case without a source: a checker cannot compare the value. Add `source`.";
    let finding = |(values, what): (Vec<&ValueUsed>, &str)| {
        let first = values.first()?;
        Some(Finding {
            severity: Severity::Caution,
            code: FindingCode::NotLocated,
            message: format!("{} {what}", named_values(problem, &values)),
            at: text.place(first.used_at.start),
        })
    };
    [(silent, without), (unsourced, unsaid)]
        .into_iter()
        .filter_map(finding)
        .collect()
}

/// ASTM E29: an integer with trailing zeros has digits that nobody can count.
pub(super) fn uncounted_zeros(problem: &Problem, text: &Text) -> Vec<Finding> {
    let unclear = problem.values.iter().filter(|v| has_uncounted_zeros(v));
    let unclear: Vec<&ValueUsed> = unclear.collect();
    let Some(first) = unclear.first() else {
        return Vec::new();
    };
    vec![Finding {
        severity: Severity::Note,
        code: FindingCode::UncountedZeros,
        message: format!(
            "The zeros at the end of the values of {} may or may not be significant; they are \
             taken at the coarsest reading. Write them as 1.200e3, or give the stated uncertainty.",
            named_values(problem, &unclear)
        ),
        at: text.place(first.used_at.start),
    }]
}

/// Of the number as printed, or of the constant that a heat capacity is.
fn has_uncounted_zeros(value: &ValueUsed) -> bool {
    let constant = value.function.as_ref().filter(|f| f.form == Form::Constant);
    let constant = constant.filter(|_| value.made_of.is_empty());
    let coefficient = constant.and_then(|f| f.coefficients.first());
    value.printed.ambiguous_zeros || coefficient.is_some_and(Decimal::ends_in_uncounted_zeros)
}

fn named_values(problem: &Problem, values: &[&ValueUsed]) -> String {
    let name = |value: &&ValueUsed| {
        let source = problem.sources[value.source].id();
        format!("{} ({source})", value.substance)
    };
    list(once_each(values.iter().map(name)))
}

/// A substance has a value for each function that serves, and is named once.
fn once_each(names: impl Iterator<Item = String>) -> impl Iterator<Item = String> {
    let mut seen = BTreeSet::new();
    names.filter(move |name| seen.insert(name.clone()))
}

/// A note where results rest on a table whose trailing zeros claim nothing.
pub(super) fn fixed_decimals(problem: &Problem, outcomes: &[Outcome], text: &Text) -> Vec<Finding> {
    let decided: Vec<&Outcome> = outcomes
        .iter()
        .filter(|outcome| outcome.stated_by == StatedBy::FixedDecimals)
        .collect();
    let fixed = problem.values.iter();
    let fixed: Vec<&ValueUsed> = fixed
        .filter(|v| v.significance == Significance::Unlimited)
        .collect();
    let (Some(first), false) = (fixed.first(), decided.is_empty()) else {
        return Vec::new();
    };
    let mut tables: Vec<&str> = fixed
        .iter()
        .map(|v| problem.sources[v.source].id())
        .collect();
    tables.sort_unstable();
    tables.dedup();
    let verb = if tables.len() == 1 { "prints" } else { "print" };
    vec![Finding {
        severity: Severity::Note,
        code: FindingCode::FixedDecimals,
        message: format!(
            "{} {verb} a fixed number of decimals, or coefficients of functions, whatever is known; \
             they limit no digits: {} stated to 0.1 kJ/mol or 1 kJ/kg at the finest. [rounding] \
             states another place.",
            tables.join(", "),
            named(&decided),
        ),
        at: text.place(first.used_at.start),
    }]
}

/// A caution where the uncertainty of results does not cover all values used.
pub(super) fn incomplete(problem: &Problem, outcomes: &[Outcome], text: &Text) -> Vec<Finding> {
    let short: Vec<&Outcome> = outcomes.iter().filter(|o| !o.is_complete()).collect();
    if short.is_empty() {
        return Vec::new();
    }
    let mut seen = BTreeSet::new();
    let rested_on = short.iter().flat_map(|outcome| outcome.form.iter());
    let silent: Vec<&ValueUsed> = rested_on
        .filter(|(index, _)| seen.insert(*index))
        .map(|(index, _)| &problem.values[index])
        .filter(|value| value.uncertainty == InputUncertainty::NotStated)
        .collect();
    let at = silent.first().map_or(0, |value| value.used_at.start);
    vec![Finding {
        severity: Severity::Caution,
        code: FindingCode::UncertaintyIncomplete,
        message: format!(
            "The uncertainty of {} does not cover every value used: {} not stated, which is not \
             zero.",
            named(&short),
            named_values(problem, &silent),
        ),
        at: text.place(at),
    }]
}

/// A note where the case asks for a finer place than the values carry.
pub(super) fn rounding_finer(
    outcomes: &[Outcome],
    at: impl Fn(&str) -> crate::finding::Place,
) -> Vec<Finding> {
    let finer = |outcome: &&Outcome| {
        outcome.stated_by == StatedBy::Rounding
            && outcome
                .remark
                .as_ref()
                .is_some_and(|remark| outcome.stated.place < remark.place)
    };
    let finding = |outcome: &Outcome| Finding {
        severity: Severity::Caution,
        code: FindingCode::RoundingFiner,
        message: format!(
            "[rounding] states {} as {} {}; what is known of it carries {} only.",
            outcome.id,
            outcome.stated.value_text,
            outcome.unit.symbol(),
            outcome
                .remark
                .as_ref()
                .map_or("less", |r| r.value_text.as_str()),
        ),
        at: at(&outcome.id),
    };
    outcomes.iter().filter(finer).map(finding).collect()
}

fn named(outcomes: &[&Outcome]) -> String {
    list(outcomes.iter().map(|outcome| outcome.id.clone()))
}

/// The first few items of a list, with the number of those left out.
pub(super) fn list(items: impl Iterator<Item = String>) -> String {
    let items: Vec<String> = items.collect();
    let shown = items
        .iter()
        .take(MOST)
        .cloned()
        .collect::<Vec<_>>()
        .join(", ");
    match items.len().saturating_sub(MOST) {
        0 => shown,
        more => format!("{shown} and {more} more"),
    }
}
