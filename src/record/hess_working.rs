//! The working of a Hess sum at 298.15 K.

use crate::calculation::Calculation;
use crate::engine::{Hess, Outcome};
use crate::quantity::{exact_text, terminating_decimal};
use crate::source::{Problem, ProblemReaction};

use super::formation_table::{cancelled, formation_table};
use super::numerals::{in_full, minus, printed, signed, unit};
use super::pages::{Step, Table};
use super::rich::{Rich, Run};
use super::symbols::hess_law;
use super::tables::{enthalpy, mark, number, text};
use super::working::displayed;

pub(super) fn hess_steps(
    calculation: &Calculation,
    reaction: &ProblemReaction,
    hess: &Hess,
    outcome: &Outcome,
    steps: &mut Vec<Step>,
) {
    let problem = &calculation.problem;
    let unit = unit(&outcome.unit);
    steps.push(displayed(hess_law()));
    steps.push(Step::Text {
        text: Rich::plain(
            "Standard enthalpies of formation at 298.15 K; the number in brackets is the row of \
             the table of values used. ν is negative for what is consumed; a negative heat is released.",
        ),
    });
    steps.push(Step::Table(participants(problem, hess, &unit)));
    steps.extend(conversions(problem, hess, outcome).map(|text| Step::Text { text }));
    steps.push(Step::Text {
        text: substitution(hess, &unit),
    });
    if let Some(table) = formation_table(problem, reaction, hess, &unit) {
        steps.push(Step::Heading {
            text: "As a sum of formation equations".to_string(),
        });
        steps.push(Step::Table(table));
        steps.push(Step::Text {
            text: cancelled(problem, reaction),
        });
    }
}

fn participants(problem: &Problem, hess: &Hess, unit: &str) -> Table {
    let rows = hess.terms.iter().map(|term| {
        let value = &problem.values[term.value];
        let substance = &problem.substances[term.substance];
        let name = match substance.label == substance.species.to_string() {
            true => String::new(),
            false => format!("{}: ", substance.label),
        };
        vec![
            Rich::plain(signed(&term.nu)),
            Rich::plain(name).with(Rich::from(substance.species.pieces())),
            Rich::default().run(Run::ValueUsed(term.value + 1)),
            Rich::plain(printed(&value.printed)),
            Rich::plain(in_full(&term.molar, term.molar_significance)),
            Rich::plain(in_full(&term.contribution, term.contribution_significance)),
        ]
    });
    let blank = Rich::default;
    let sum = in_full(&hess.sum, hess.significance);
    Table {
        caption: format!("What each participant adds, in {unit}"),
        columns: vec![
            number(Rich::plain("ν")),
            text("Substance"),
            mark("Row"),
            text("As printed"),
            number(enthalpy("f")),
            number(Rich::plain("ν·").with(enthalpy("f"))),
        ],
        rows: rows.collect(),
        total: Some(vec![
            blank(),
            Rich::plain("Sum"),
            blank(),
            blank(),
            blank(),
            Rich::plain(sum),
        ]),
    }
}

/// The factors between the units that sources print and that of the result.
fn conversions(problem: &Problem, hess: &Hess, outcome: &Outcome) -> Option<Rich> {
    let mut said: Vec<String> = Vec::new();
    for term in &hess.terms {
        let from = &problem.values[term.value].printed.unit;
        if from.symbol() == outcome.unit.symbol() {
            continue;
        }
        let factor = from.factor() / outcome.unit.factor();
        let line = match terminating_decimal(&factor) {
            Some(factor) => format!("1 {} = {factor} {}", unit(from), unit(&outcome.unit)),
            None => {
                let back = exact_text(&factor.recip());
                format!("1 {} = {back} {}", unit(&outcome.unit), unit(from))
            }
        };
        if !said.contains(&line) {
            said.push(line);
        }
    }
    (!said.is_empty()).then(|| Rich::plain(format!("By definition, {}.", said.join("; "))))
}

/// Δ_rH° = 2·(−285.830) + 31.3 − … = −552.56 kJ/mol
fn substitution(hess: &Hess, unit: &str) -> Rich {
    let terms: Vec<String> = hess
        .terms
        .iter()
        .map(|term| {
            format!(
                "({})·({})",
                signed(&term.nu),
                in_full(&term.molar, term.molar_significance)
            )
        })
        .collect();
    enthalpy("r").and(format!(
        " = {} = {} {unit}, exactly: nothing is rounded here.",
        terms.join(" + "),
        minus(&exact_text(&hess.sum)),
    ))
}
