//! Uncertainty budgets: which values carry the uncertainty of a result.

use crate::calculation::Calculation;
use crate::engine::Outcome;
use crate::quantity::{InputUncertainty, Real, Unit, UnitKind, three_digits};
use crate::source::Problem;

use super::numerals::{minus, unit};
use super::pages::{Budget, BudgetRow};
use super::result_rows::coverage;
use super::value_rows::substance;

/// One budget for each result of which some value states an uncertainty.
pub(super) fn budgets(calculation: &Calculation) -> Vec<Budget> {
    let outcomes = calculation.working.outcomes.iter();
    let outcomes = outcomes.filter(|outcome| !outcome.form.is_empty());
    outcomes
        .map(|outcome| budget(&calculation.problem, outcome))
        .collect()
}

fn budget(problem: &Problem, outcome: &Outcome) -> Budget {
    let counted =
        |(index, _): &(usize, &Real)| problem.values[*index].uncertainty != InputUncertainty::Exact;
    let rows = outcome.form.iter().filter(counted);
    Budget {
        result: outcome.id.clone(),
        unit: unit(&outcome.unit),
        rows: rows
            .map(|(index, s)| budget_row(problem, outcome, index, s))
            .collect(),
        standard: outcome.combined.standard.map(|u| minus(&three_digits(u))),
        expanded: outcome.expanded.map(|u| minus(&three_digits(u))),
        coverage: coverage(outcome),
        remark: remark(problem, outcome),
    }
}

fn budget_row(problem: &Problem, outcome: &Outcome, index: usize, sensitivity: &Real) -> BudgetRow {
    let value = &problem.values[index];
    let share = outcome.combined.shares.iter().find(|(of, _)| *of == index);
    let share = share.and_then(|(_, share)| *share);
    let size = sensitivity.to_f64();
    let standard = match value.uncertainty {
        InputUncertainty::Standard(u) => Some(u),
        _ => None,
    };
    BudgetRow {
        value_used: index + 1,
        substance: substance(value),
        standard: standard.map_or("not stated".into(), |u| {
            let text = format!(
                "{}\u{a0}{}",
                minus(&three_digits(u)),
                difference(&value.printed.unit)
            );
            text.trim_end().to_string()
        }),
        sensitivity: minus(&short(sensitivity)),
        contribution: standard.map_or("–".into(), |u| minus(&three_digits(f64::abs(size) * u))),
        share: share.map_or("–".into(), |share| {
            minus(&format!("{:.1} %", share * 100.0))
        }),
        share_permille: share.and_then(permille),
    }
}

/// The unit of an uncertainty: that of a temperature read in °C is in K.
fn difference(of: &Unit) -> String {
    match (of.kind(), of.symbol()) {
        (UnitKind::Reading, "°C") => "K".to_string(),
        (UnitKind::Reading, symbol) => format!("Δ{symbol}"),
        _ => unit(of),
    }
}

/// An exact sensitivity as it is, another to three digits.
fn short(sensitivity: &Real) -> String {
    let exact = sensitivity
        .exact()
        .and_then(crate::quantity::terminating_decimal);
    match exact {
        Some(text) if text.len() <= 7 => text,
        _ => {
            let size = sensitivity.to_f64();
            let sign = if size < 0.0 { "-" } else { "" };
            format!("{sign}{}", three_digits(f64::abs(size)))
        }
    }
}

/// A share as thousandths for a bar; correlated values can have a negative one, without a bar.
fn permille(share: f64) -> Option<u32> {
    let permille = libm::round(share * 1000.0);
    (0.0..=1000.0)
        .contains(&permille)
        .then_some(permille as u32)
}

fn remark(problem: &Problem, outcome: &Outcome) -> Option<String> {
    let correlated = problem
        .correlations
        .pairs()
        .any(|(a, b)| outcome.form.get(a).is_some() && outcome.form.get(b).is_some());
    let mut remarks = vec![format!(
        "Sensitivity: {0} of the result for each unit of the value as printed (of a heat-capacity \
         function for each J/(mol K) added to it over the way); contribution in {0}.",
        unit(&outcome.unit)
    )];
    if !outcome.is_complete() {
        remarks.push(format!(
            "{} of {} values state no uncertainty; that is not zero, so the sum is a lower bound.",
            outcome.combined.of - outcome.combined.stated,
            outcome.combined.of
        ));
    }
    if correlated {
        remarks.push("Correlations that the source states are included.".to_string());
    }
    Some(remarks.join(" "))
}
