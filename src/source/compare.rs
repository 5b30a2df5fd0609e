//! What the other consulted sources say of the same value.

use crate::finding::{Finding, FindingCode, Severity, Span};
use crate::quantity::{
    Exact, InputUncertainty, Quantity, power_of_ten, terminating_decimal, to_f64, two_digits,
};
use num_traits::{Signed, Zero};

use super::choose::{Chosen, Held};
use super::matching::Wanted;
use super::model::SourceHead;
use super::problem::{Comparison, Judgement, ValueUsed};
use super::resolve::Resolver;

/// The coverage factor at which two sources are compared.
const COVERAGE: f64 = 2.0;

/// Compares the value used with what the other sources hold; says so where they differ.
pub(super) fn compare(
    resolver: &mut Resolver<'_>,
    wanted: &Wanted,
    chosen: &Chosen,
    used: &ValueUsed,
    span: &Span,
) -> Vec<Comparison> {
    let mut comparisons = Vec::new();
    for other in &chosen.others {
        let Some(theirs) = other.value() else {
            continue;
        };
        if used.printed.exact && theirs.decimal.value().is_zero() {
            continue;
        }
        let Some(comparison) = compare_one(resolver, used, other, theirs) else {
            continue;
        };
        if let Some(finding) = judge(resolver, wanted, chosen, used, &comparison, span) {
            resolver.findings.push(finding);
        }
        comparisons.push(comparison);
    }
    comparisons
}

fn compare_one(
    resolver: &Resolver<'_>,
    used: &ValueUsed,
    other: &Held,
    value: &Quantity,
) -> Option<Comparison> {
    let head = &resolver.sources[other.source].head;
    // Units of the two sources are both of energy per amount; anything else was refused.
    let theirs = value.value_in(&used.printed.unit).ok()?;
    let difference = theirs - used.printed.decimal.value();
    let judgement = judgement(&difference, used, value, head);
    Some(Comparison {
        source: other.source,
        printed: value.clone(),
        locator: other.entry.locator.clone(),
        difference,
        judgement,
    })
}

fn judgement(
    difference: &Exact,
    used: &ValueUsed,
    other: &Quantity,
    head: &SourceHead,
) -> Judgement {
    let ours = match used.uncertainty {
        InputUncertainty::Standard(u) => Some(u),
        InputUncertainty::Exact => Some(0.0),
        InputUncertainty::NotStated => None,
    };
    let factor = to_f64(&(other.unit.factor() / used.printed.unit.factor()));
    let stated = other.uncertainty.as_ref();
    let theirs = stated.map(|u| u.standard(&head.coverage) * factor);
    let squares = [ours, theirs]
        .into_iter()
        .flatten()
        .map(|u| u * u)
        .sum::<f64>();
    let combined = COVERAGE * libm::sqrt(squares);
    let apart = to_f64(&difference.abs());
    let complete = ours.is_some() && theirs.is_some();
    match (ours.is_some() || theirs.is_some(), apart > combined) {
        (true, true) => Judgement::Beyond { combined, complete },
        (true, false) => Judgement::Within { combined, complete },
        (false, _) => Judgement::NotJudged {
            equal: difference.abs() <= half_places(used, other),
        },
    }
}

/// Half a unit of the last printed place of the two values together.
fn half_places(used: &ValueUsed, other: &Quantity) -> Exact {
    let half = Exact::new(1.into(), 2.into());
    let ours = power_of_ten(used.printed.decimal.place());
    let theirs =
        power_of_ten(other.decimal.place()) * other.unit.factor() / used.printed.unit.factor();
    half * if ours > theirs { ours } else { theirs }
}

fn judge(
    resolver: &Resolver<'_>,
    wanted: &Wanted,
    chosen: &Chosen,
    used: &ValueUsed,
    comparison: &Comparison,
    span: &Span,
) -> Option<Finding> {
    let ours = resolver.sources[chosen.source].id();
    let theirs = resolver.sources[comparison.source].id();
    let apart = amount(&comparison.difference, used);
    let differ = format!(
        "{}: {ours} and {theirs} are {apart} apart (the latter prints {})",
        wanted.label, comparison.printed
    );
    let (beyond, remark) = remark(&comparison.judgement, used)?;
    let (severity, code, serves) = match (&chosen.because, beyond) {
        (Some(because), _) => (
            Severity::Note,
            FindingCode::ChoiceOverrides,
            format!("The case chooses {ours}: {because}"),
        ),
        (None, true) => (
            Severity::Stop,
            FindingCode::SourcesDiffer,
            "Choose in [sources.choose] which one serves, and say why.".to_string(),
        ),
        (None, false) => (
            Severity::Caution,
            FindingCode::SourcesDiffer,
            format!("{ours} serves because it is consulted first."),
        ),
    };
    let at = chosen.chosen_at.as_ref().unwrap_or(span).start;
    Some(Finding {
        severity,
        code,
        message: format!("{differ}; {remark}. {serves}"),
        at: resolver.text.place(at),
    })
}

/// Whether two values are too far apart, and by what that is judged; none where they agree.
fn remark(judgement: &Judgement, used: &ValueUsed) -> Option<(bool, String)> {
    match *judgement {
        Judgement::Within { .. } | Judgement::NotJudged { equal: true } => None,
        Judgement::Beyond { combined, complete } => {
            Some((true, beyond_words(combined, complete, used)))
        }
        Judgement::NotJudged { equal: false } => {
            let remark = "neither states an uncertainty to judge it by";
            Some((false, remark.to_string()))
        }
    }
}

fn beyond_words(combined: f64, complete: bool, used: &ValueUsed) -> String {
    let unit = used.printed.unit.symbol();
    let combined = two_digits(combined);
    match complete {
        true => format!("their combined expanded uncertainty is {combined} {unit}"),
        false => format!(
            "the one uncertainty that is stated is {combined} {unit} (k = 2), the other states none"
        ),
    }
}

fn amount(difference: &Exact, used: &ValueUsed) -> String {
    let size = difference.abs();
    let text = terminating_decimal(&size).unwrap_or_else(|| two_digits(to_f64(&size)));
    format!("{text} {}", used.printed.unit.symbol())
}
