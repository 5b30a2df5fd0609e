//! The working of each reaction, as a careful hand calculation shows it.

use crate::calculation::Calculation;
use crate::engine::{Hess, MolarMass, Outcome, ReactionWorking};
use crate::quantity::{exact_text, terminating_decimal, working_text};
use crate::source::{Problem, ProblemReaction};

use super::cycle_working::cycle_sections;
use super::formation_table::{cancelled, formation_table};
use super::given_working::bounds_step;
use super::heat_working::heat_steps;
use super::heating_value_working::heating_value_sections;
use super::math::Math;
use super::numerals::{exact_fraction, in_full, minus, printed, signed, unit};
use super::pages::{Step, Table, WorkingSection};
use super::result_rows::{in_words, what};
use super::rich::{Rich, Run};
use super::speak::speak;
use super::stating::stating;
use super::symbols::{combined_uncertainty, hess_law, molar_mass_sum, per_mass_quotient};
use super::tables::{enthalpy, mark, number, text};

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

fn hess_steps(
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

pub(super) fn displayed(math: Math) -> Step {
    let alt = speak(&math);
    Step::Equation { math, alt }
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

fn mass_steps(
    calculation: &Calculation,
    reaction: &ProblemReaction,
    mass: &MolarMass,
) -> Vec<Step> {
    let outcome = |quantity: &str| {
        calculation
            .working
            .outcome(&format!("{}.{quantity}", reaction.id))
    };
    let (Some(per), Some(by_mass)) = (outcome("heat-per"), outcome("heat-per-mass")) else {
        return Vec::new();
    };
    let nu = reaction
        .per
        .map(|index| num_traits::Signed::abs(&reaction.terms[index].nu));
    let nu = nu.map_or(String::new(), |nu| exact_fraction(&nu));
    let values = &calculation.problem.values;
    let mut sum = Rich::plain("M = ");
    for (i, (index, count)) in mass.parts.iter().enumerate() {
        let plus = if i == 0 { "" } else { " + " };
        let value = &values[*index];
        sum = sum
            .and(format!(
                "{plus}{} · {} ",
                exact_fraction(count),
                value.printed.decimal.printed()
            ))
            .run(Run::ValueUsed(index + 1));
    }
    let sum = sum.and(format!(
        " = {} g/mol",
        in_full(&mass.value, mass.significance)
    ));
    vec![
        Step::Heading {
            text: "Referred to one substance".to_string(),
        },
        Step::Text {
            text: Rich::plain(format!("Per mole: the heat divided by |ν| = {nu}. "))
                .with(stating(per)),
        },
        result(calculation, per),
        displayed(molar_mass_sum()),
        Step::Text { text: sum },
        displayed(per_mass_quotient()),
        Step::Text {
            text: mass_substitution(per, by_mass, mass),
        },
        Step::Text {
            text: stating(by_mass),
        },
        result(calculation, by_mass),
    ]
}

/// Δ_rh = (−552.86 kJ/mol)/(123.111 g/mol) = −4490.7…·kJ/kg
fn mass_substitution(per: &Outcome, by_mass: &Outcome, mass: &MolarMass) -> Rich {
    let number = |outcome: &Outcome| minus(&working_text(&outcome.value, outcome.significance));
    Rich::plain("Δ")
        .run(Run::Sub("r".to_string()))
        .run(Run::Italic("h".to_string()))
        .and(format!(
            " = ({} {})/({} g/mol) = {} {}. ",
            number(per),
            unit(&per.unit),
            in_full(&mass.value, mass.significance),
            number(by_mass),
            unit(&by_mass.unit)
        ))
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
