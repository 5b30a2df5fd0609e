//! The working of each reaction, as a careful hand calculation shows it.

use crate::calculation::Calculation;
use crate::engine::{Outcome, ReactionWorking};
use crate::source::{Problem, ProblemReaction};

use super::cycle_working::cycle_sections;
use super::given_working::bounds_step;
use super::heat_working::heat_steps;
use super::heating_value_working::heating_value_sections;
use super::hess_working::hess_steps;
use super::mass_working::mass_steps;
use super::math::Math;
use super::pages::{Step, WorkingSection};
use super::result_rows::{in_words, what};
use super::rich::{Rich, Run};
use super::speak::speak;
use super::stating::stating;
use super::symbols::combined_uncertainty;

pub(super) fn working_sections(calculation: &Calculation) -> Vec<WorkingSection> {
    let reactions = calculation.working.reactions.iter();
    let reactions = reactions.map(|reaction| section(calculation, reaction));
    let others = cycle_sections(calculation).into_iter();
    let others = others.chain(heating_value_sections(calculation));
    reactions.chain(others).collect()
}

fn section(calculation: &Calculation, working: &ReactionWorking) -> WorkingSection {
    let reaction = &calculation.problem.reactions[working.reaction];
    let mut steps = vec![Step::Reaction {
        text: equation(&calculation.problem, reaction),
    }];
    match calculation
        .working
        .outcome(&format!("{}.heat", reaction.id))
    {
        Some(outcome) => result_steps(calculation, reaction, working, outcome, &mut steps),
        None => steps.push(Step::Text {
            text: Rich::plain("Not worked: see the findings."),
        }),
    }
    if let Some(mass) = &working.molar_mass {
        steps.extend(mass_steps(calculation, reaction, mass));
    }
    WorkingSection {
        id: reaction.id.clone(),
        heading: format!("Reaction {}", reaction.id),
        steps,
    }
}

/// The reaction with names where the case declares them.
pub(super) fn equation(problem: &Problem, reaction: &ProblemReaction) -> Rich {
    if reaction.terms.is_empty() {
        return Rich::plain(reaction.equation.to_string());
    }
    let side = |negative: bool| {
        let terms = reaction.terms.iter();
        let terms = terms.filter(|t| (t.nu < num_traits::Zero::zero()) == negative);
        terms.enumerate().fold(Rich::default(), |text, (i, term)| {
            let plus = if i == 0 { "" } else { " + " };
            let nu = super::numerals::coefficient(&num_traits::Signed::abs(&term.nu));
            let species = &problem.substances[term.substance].species;
            text.and(format!("{plus}{nu}"))
                .with(Rich::from(species.pieces()))
        })
    };
    side(true).and(" → ").with(side(false))
}

/// The sum at 298.15 K, the way to the temperature where it is another, and what is stated.
fn result_steps(
    calculation: &Calculation,
    reaction: &ProblemReaction,
    working: &ReactionWorking,
    outcome: &Outcome,
    steps: &mut Vec<Step>,
) {
    if let Some(hess) = &working.hess {
        if working.heat.is_some() {
            steps.push(Step::Heading {
                text: "At 298.15 K".to_string(),
            });
        }
        hess_steps(calculation, reaction, hess, outcome, steps);
    }
    if let Some(heat) = &working.heat {
        heat_steps(calculation, reaction, heat, outcome, steps);
    }
    steps.extend(bounds_step(&calculation.problem, outcome));
    steps.push(Step::Heading {
        text: "Uncertainty and stated digits".to_string(),
    });
    if outcome.combined.standard.is_some() {
        steps.push(displayed(combined_uncertainty()));
    }
    steps.push(Step::Text {
        text: stating(outcome),
    });
    steps.push(result(calculation, outcome));
}

pub(super) fn displayed(math: Math) -> Step {
    let alt = speak(&math);
    Step::Equation { math, alt }
}

pub(super) fn result(calculation: &Calculation, outcome: &Outcome) -> Step {
    let text = Rich::plain(format!("{}: ", what(calculation, outcome)))
        .run(Run::Strong(in_words(outcome)))
        .and(format!(", {}", outcome.direction().word()));
    let text = match outcome.not_covered.is_empty() {
        true => text,
        false => text.and(format!(
            ". The uncertainty does not cover {}.",
            outcome.not_covered.join(", ")
        )),
    };
    Step::Result { text }
}
