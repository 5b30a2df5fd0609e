//! How a result comes to its stated digits, in words.

use crate::engine::{COVERAGE, Outcome, StatedBy};
use crate::quantity::{Significance, Stated, three_digits};

use super::numerals::{minus, superscript, unit};
use super::rich::{Rich, Run};

/// The combined uncertainty in numbers, the rule that decides the digits, and what the other
/// rule would say.
pub(super) fn stating(outcome: &Outcome) -> Rich {
    let text = uncertainty(outcome).and(rule(outcome));
    match &outcome.remark {
        Some(remark) => text.and(other_rule(outcome, remark)),
        None => text,
    }
}

fn uncertainty(outcome: &Outcome) -> Rich {
    let unit = unit(&outcome.unit);
    let (stated, of) = (outcome.combined.stated, outcome.combined.of);
    match (outcome.combined.standard, outcome.expanded) {
        (Some(standard), Some(expanded)) => Rich::default()
            .run(Run::Italic("u".to_string()))
            .and(format!(" = {} {unit}, ", three_digits(standard)))
            .run(Run::Italic("U".to_string()))
            .and(format!(
                " = {COVERAGE}·u = {} {unit} (k = {COVERAGE}), covering {stated} of {of} values \
                 used that are not exact. ",
                three_digits(expanded)
            )),
        _ if of == 0 => Rich::plain("All values used are exact. "),
        _ => Rich::plain(format!(
            "None of the {of} values used that are not exact states an uncertainty. "
        )),
    }
}

fn rule(outcome: &Outcome) -> String {
    match outcome.stated_by {
        StatedBy::Uncertainty => "The expanded uncertainty covers every value, so it decides the \
             digits (JCGM 100:2008, 7.2.6): two where it begins with 1 or 2, otherwise one."
            .to_string(),
        StatedBy::Significance => format!(
            "{}, so the significant digits of the values decide (ASTM E29): {}.",
            match outcome.is_complete() {
                true => "There is no uncertainty to decide the digits",
                false => "The uncertainty does not cover every value",
            },
            last_place(outcome.significance)
        ),
        StatedBy::FixedDecimals => format!(
            "The uncertainty does not cover every value, and a table with a fixed number of \
             decimals, or a function of temperature, is among them: its digits limit nothing, and \
             the result is stated to 0.1 kJ/mol or 1 kJ/kg at the finest (practice of this \
             program). With the digits of the other values (ASTM E29), {}.",
            last_place(outcome.significance)
        ),
        StatedBy::Rounding => "The case names the place ([rounding]).".to_string(),
    }
}

fn last_place(significance: Significance) -> String {
    match significance {
        Significance::Exact => "none is limited".to_string(),
        Significance::Unlimited => "none limits them".to_string(),
        Significance::Place(place) => {
            format!(
                "the coarsest last place is 10{}",
                superscript(&place.to_string())
            )
        }
    }
}

fn other_rule(outcome: &Outcome, remark: &Stated) -> String {
    let name = match (outcome.stated_by, &remark.uncertainty_text) {
        (StatedBy::Uncertainty, _) => "ASTM E29 alone would state",
        (_, Some(_)) => "The uncertainty that is stated would alone give",
        _ => "By its significant digits it would be",
    };
    let uncertainty = remark.uncertainty_text.as_ref();
    let uncertainty = uncertainty.map_or(String::new(), |u| format!(" ± {u}"));
    format!(
        " {name} {}{uncertainty} {}.",
        minus(&remark.value_text),
        unit(&outcome.unit)
    )
}
