//! How a heat capacity of the case comes about, and which of two bounds was taken.

use num_traits::Zero;

use crate::engine::{AdverseBound, Outcome, Worked};
use crate::quantity::{Exact, InputUncertainty, exact_text, two_digits, working_text};
use crate::source::{KOPP, Problem, ValueUsed};

use super::numerals::{minus, unit};
use super::pages::Step;
use super::rich::{Rich, Run};

/// What a heat capacity is worked from; nothing where it stands in a source as it is.
pub(super) fn made_of_steps(problem: &Problem, value: usize) -> Vec<Step> {
    let used = &problem.values[value];
    let Some((first, _)) = used.made_of.first() else {
        return Vec::new();
    };
    let name = &used.substance;
    let said = if problem.sources[used.source].id() == KOPP {
        kopp(problem, used)
    } else if used.made_of.len() > 1 {
        per_mass(problem, used)
    } else {
        Rich::plain(format!("Heat capacity of {name}: ")).with(row(problem, *first))
    };
    let total = used.function.as_ref().and_then(|f| f.coefficients.first());
    let total = total.map_or(String::new(), |total| minus(total.printed()));
    let mut text = said.and(format!(" = {total} J/(mol K)."));
    if let InputUncertainty::Standard(u) = used.uncertainty {
        text = text.and(" Its standard uncertainty is the average absolute error of the rule ");
        if let Some((error, _)) = used.made_of.iter().find(|(_, n)| n.is_zero()) {
            text = text.run(Run::ValueUsed(error + 1));
        }
        text = text.and(format!(" times √(π/2): {} J/(mol K).", two_digits(u)));
    }
    vec![Step::Text { text }]
}

/// Σ n·c over the atoms.
fn kopp(problem: &Problem, used: &ValueUsed) -> Rich {
    let counted = used.made_of.iter().filter(|(_, n)| !n.is_zero());
    let start = Rich::plain(format!(
        "Heat capacity of {} by Kopp's rule: ",
        used.substance
    ));
    counted.enumerate().fold(start, |text, (i, (part, n))| {
        let plus = if i == 0 { "" } else { " + " };
        let count = exact_text(n);
        text.and(format!("{plus}{count} · "))
            .with(row(problem, *part))
    })
}

/// c·M, with M from atomic weights.
fn per_mass(problem: &Problem, used: &ValueUsed) -> Rich {
    let (first, _) = &used.made_of[0];
    let counts = used
        .species
        .as_ref()
        .map(|species| species.formula.counts());
    let counts: Vec<&Exact> = counts.map_or_else(Vec::new, |counts| counts.values().collect());
    let weights = used.made_of[1..].iter().zip(counts);
    let text = Rich::plain(format!("Heat capacity of {}, per mole: ", used.substance))
        .with(row(problem, *first))
        .and(" · (");
    let text = weights.enumerate().fold(text, |text, (i, ((part, _), n))| {
        let plus = if i == 0 { "" } else { " + " };
        let count = exact_text(n);
        let weight = problem.values[*part].printed.decimal.printed();
        text.and(format!("{plus}{count} · {weight} "))
            .run(Run::ValueUsed(part + 1))
    });
    text.and(") g/mol")
}

/// A value as printed, with its row.
fn row(problem: &Problem, value: usize) -> Rich {
    let printed = &problem.values[value].printed;
    let number = minus(printed.decimal.printed());
    Rich::plain(format!("{number} {} ", unit(&printed.unit))).run(Run::ValueUsed(value + 1))
}

/// Which bounds a heat was worked with.
pub(super) fn bounds_step(problem: &Problem, outcome: &Outcome) -> Option<Step> {
    if outcome.adverse.is_empty() {
        return None;
    }
    let line = |bound: &AdverseBound| {
        let label = &problem.substances[bound.substance].label;
        format!("the {} bound of {label}", bound.bound.word())
    };
    let lines: Vec<String> = outcome.adverse.iter().map(line).collect();
    Some(Step::Text {
        text: Rich::plain(format!(
            "Worked with {}, which is adverse here: it makes the heat larger.",
            lines.join(" and ")
        )),
    })
}

/// From infinite dilution to the stated concentration.
pub(super) fn concentration_step(
    problem: &Problem,
    value: usize,
    worked: &Worked,
    name: &Rich,
) -> Step {
    let number = minus(&working_text(&worked.value, worked.significance));
    Step::Text {
        text: name
            .clone()
            .and(", from infinite dilution to its concentration: relative enthalpy ")
            .run(Run::ValueUsed(value + 1))
            .and(format!(
                " of {}, {number} J/mol.",
                problem.values[value].substance
            )),
    }
}
