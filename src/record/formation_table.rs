//! The sum of formation equations, turned and multiplied so that they add up to the reaction.

use num_traits::{Signed, Zero};

use crate::engine::{FormationEquation, Hess, formation_equation};
use crate::notation::Species;
use crate::quantity::Exact;
use crate::source::{Problem, ProblemReaction};

use super::numerals::{coefficient, exact_fraction, in_full};
use super::pages::{ColumnKind, Table};
use super::rich::{Rich, Run};
use super::tables::{column, enthalpy, mark, number};

/// One line for each participant that is not itself a reference state; none where an element has
/// no conventional reference state.
pub(super) fn formation_table(
    problem: &Problem,
    reaction: &ProblemReaction,
    hess: &Hess,
    unit: &str,
) -> Option<Table> {
    let mut rows = Vec::new();
    for term in &hess.terms {
        let species = &problem.substances[term.substance].species;
        let equation = formation_equation(species, &problem.reference_states)?;
        if is_identity(&equation) {
            continue;
        }
        rows.push(vec![
            Rich::plain(multiplier(&term.nu)),
            written(&equation, term.nu.is_negative()),
            Rich::default().run(Run::ValueUsed(term.value + 1)),
            Rich::plain(in_full(&term.contribution, term.contribution_significance)),
        ]);
    }
    if rows.is_empty() {
        return None;
    }
    Some(Table {
        caption: format!(
            "Formation equations, turned where the substance is consumed; heats already multiplied, in {unit}"
        ),
        columns: vec![
            mark("Times"),
            column(Rich::plain("Equation"), ColumnKind::Text),
            mark("Row"),
            number(enthalpy("r")),
        ],
        rows,
        total: Some(vec![
            Rich::default(),
            target(problem, reaction),
            Rich::default(),
            Rich::plain(in_full(&hess.sum, hess.significance)),
        ]),
    })
}

/// The formation of a reference state from itself says nothing.
fn is_identity(equation: &FormationEquation) -> bool {
    equation.left == equation.right
}

fn multiplier(nu: &Exact) -> String {
    exact_fraction(&nu.abs())
}

/// The equation as it is added: turned for what is consumed.
fn written(equation: &FormationEquation, turned: bool) -> Rich {
    let (from, to) = match turned {
        true => (&equation.right, &equation.left),
        false => (&equation.left, &equation.right),
    };
    side(from).and(" → ").with(side(to))
}

fn side(terms: &[(Exact, Species)]) -> Rich {
    terms
        .iter()
        .enumerate()
        .fold(Rich::default(), |text, (i, (count, species))| {
            let plus = if i == 0 { "" } else { " + " };
            text.and(format!("{plus}{}", coefficient(count)))
                .with(Rich::from(species.pieces()))
        })
}

fn target(problem: &Problem, reaction: &ProblemReaction) -> Rich {
    let part = |negative: bool| -> Vec<(Exact, Species)> {
        let terms = reaction
            .terms
            .iter()
            .filter(|t| t.nu.is_negative() == negative);
        let species = |index: usize| problem.substances[index].species.clone();
        terms.map(|t| (t.nu.abs(), species(t.substance))).collect()
    };
    side(&part(true)).and(" → ").with(side(&part(false)))
}

/// What stands on both sides of the added equations and cancels.
pub(super) fn cancelled(problem: &Problem, reaction: &ProblemReaction) -> Rich {
    let amounts = reference_amounts(problem, reaction);
    let shown: Vec<(Exact, Species)> = amounts
        .into_iter()
        .filter(|(used, made, _)| !used.is_zero() && !made.is_zero())
        .map(|(used, made, species)| (if used < made { used } else { made }, species))
        .collect();
    if shown.is_empty() {
        return Rich::plain("Added up, the equations give the reaction; nothing cancels.");
    }
    let mut text = Rich::plain("Added up, ");
    let last = shown.len() - 1;
    for (i, (amount, species)) in shown.iter().enumerate() {
        let separator = match i {
            0 => "",
            _ if i == last => " and ",
            _ => ", ",
        };
        text = text
            .and(format!("{separator}{}", coefficient(amount)))
            .with(Rich::from(species.pieces()));
    }
    text.and(" stand on both sides and cancel, and what is left is the reaction.")
}

/// For each reference state: how much the formations of the products use, and how much the
/// turned formations of the reactants give back.
fn reference_amounts(
    problem: &Problem,
    reaction: &ProblemReaction,
) -> Vec<(Exact, Exact, Species)> {
    let mut amounts: Vec<(Exact, Exact, Species)> = Vec::new();
    for term in &reaction.terms {
        let species = &problem.substances[term.substance].species;
        let Some(equation) = formation_equation(species, &problem.reference_states) else {
            continue;
        };
        if is_identity(&equation) {
            continue;
        }
        let of_elements = equation.left.iter().map(|part| (part, false));
        // The electron of a cation's formation stands on the other side.
        let others = equation
            .right
            .iter()
            .filter(|(_, s)| s != species)
            .map(|part| (part, true));
        for ((count, state), other_side) in of_elements.chain(others) {
            let amount = count * term.nu.abs();
            let given = term.nu.is_negative() != other_side;
            add(&mut amounts, state, &amount, given);
        }
    }
    amounts
}

fn add(amounts: &mut Vec<(Exact, Exact, Species)>, state: &Species, amount: &Exact, given: bool) {
    let index = amounts
        .iter()
        .position(|(_, _, s)| s == state)
        .unwrap_or_else(|| {
            amounts.push((Exact::zero(), Exact::zero(), state.clone()));
            amounts.len() - 1
        });
    match given {
        true => amounts[index].1 += amount,
        false => amounts[index].0 += amount,
    }
}
