//! The heat of a reaction at its temperature, participant by participant.

use crate::calculation::Calculation;
use crate::engine::{HeatAt, HeatTerm, Outcome, Worked, heat_capacity_at};
use crate::quantity::{Exact, exact_text, round_to_place, to_f64, working_text};
use crate::source::{EnthalpyPath, Leg, Problem, ProblemReaction, Start, reference_kelvin};

use super::numerals::{minus, printed, signed, unit};
use super::pages::{Step, Table};
use super::path_working::path_steps;
use super::rich::{Rich, Run};
use super::symbols::{enthalpy_at_temperature, heat_at_temperature};
use super::tables::{enthalpy, mark, number, text};
use super::working::displayed;

/// The steps from the enthalpies at 298.15 K to the heat at the temperature of the reaction.
pub(super) fn heat_steps(
    calculation: &Calculation,
    reaction: &ProblemReaction,
    heat: &HeatAt,
    outcome: &Outcome,
    steps: &mut Vec<Step>,
) {
    let problem = &calculation.problem;
    let kelvin = minus(&exact_text(&reaction.kelvin));
    match reaction.kelvin == reference_kelvin() {
        true => steps.push(Step::Heading {
            text: "At the stated concentrations".to_string(),
        }),
        false => steps.extend(temperature_steps(problem, reaction, heat)),
    }
    for term in &heat.terms {
        steps.extend(path_steps(problem, term));
    }
    steps.push(displayed(heat_at_temperature()));
    steps.push(Step::Table(contributions(problem, heat, outcome)));
    steps.push(Step::Text {
        text: substitution(heat, outcome, &kelvin),
    });
    let error = temperature_error(problem, reaction, heat);
    steps.extend(error.map(|text| Step::Text { text }));
}

/// What is done to come from 298.15 K to another temperature.
fn temperature_steps(problem: &Problem, reaction: &ProblemReaction, heat: &HeatAt) -> Vec<Step> {
    let kelvin = minus(&exact_text(&reaction.kelvin));
    let crossed = heat.terms.iter().any(|term| crosses(problem, term));
    let mut said = Rich::default()
        .run(Run::Italic("T".into()))
        .run(Run::Sub("0".into()))
        .and(" = 298.15 K, ")
        .run(Run::Italic("T".into()))
        .and(" = ");
    if let Some(value) = reaction.temperature_value {
        let given = printed(&problem.values[value].printed);
        said = said.and(given).run(Run::ValueUsed(value + 1)).and(" = ");
    }
    vec![
        Step::Heading {
            text: format!("At {kelvin} K"),
        },
        displayed(enthalpy_at_temperature(crossed)),
        Step::Text {
            text: said.and(format!(
                "{kelvin} K. The reference states of the elements stay at 298.15 K, so the sum of \
                 these enthalpies is the heat of reaction at the temperature."
            )),
        },
    ]
}

fn crosses(problem: &Problem, term: &HeatTerm) -> bool {
    let legs = &problem.paths[term.path].legs;
    legs.iter().any(|leg| matches!(leg, Leg::Transition { .. }))
}

/// How an error of the temperature counts: with the change of heat capacity, term by term.
fn temperature_error(problem: &Problem, reaction: &ProblemReaction, heat: &HeatAt) -> Option<Rich> {
    let value = reaction.temperature_value?;
    let mut sum = 0.0;
    let mut parts = Vec::new();
    for term in &heat.terms {
        let cp = heat_capacity_at(problem, term.path)?;
        sum += to_f64(&term.nu) * cp;
        parts.push(format!("({})·{}", signed(&term.nu), decimals(cp)));
    }
    let text = Rich::plain("An error of the temperature ")
        .run(Run::ValueUsed(value + 1))
        .and(" counts with Δ")
        .run(Run::Italic("C".into()))
        .run(Run::Sub("p".into()));
    Some(text.and(format!(
        " at this temperature: {} = {} J/(mol K).",
        parts.join(" + "),
        decimals(sum)
    )))
}

fn decimals(value: f64) -> String {
    let exact = Exact::from_float(value).unwrap_or_default();
    minus(&round_to_place(&exact, -3).text)
}

/// ν, substance, rows, H(298.15 K), increment, H(T), ν·H(T).
fn contributions(problem: &Problem, heat: &HeatAt, outcome: &Outcome) -> Table {
    let symbol = unit(&outcome.unit);
    let factor = outcome.unit.factor().recip();
    let rows = heat.terms.iter().map(|term| row(problem, term, &factor));
    let blank = Rich::default;
    let at_temperature = || {
        Rich::default()
            .run(Run::Italic("H".into()))
            .and("(")
            .run(Run::Italic("T".into()))
            .and(")")
    };
    Table {
        caption: format!("What each participant adds, in {symbol}"),
        columns: vec![
            number(Rich::plain("ν")),
            text("Substance"),
            mark("Rows"),
            number(enthalpy("f")),
            number(Rich::plain("Increment")),
            number(at_temperature()),
            number(Rich::plain("ν·").with(at_temperature())),
        ],
        rows: rows.collect(),
        total: Some(vec![
            blank(),
            Rich::plain("Sum"),
            blank(),
            blank(),
            blank(),
            blank(),
            Rich::plain(shown(&heat.sum)),
        ]),
    }
}

fn row(problem: &Problem, term: &HeatTerm, factor: &Exact) -> Vec<Rich> {
    let substance = &problem.substances[term.substance];
    let path = &problem.paths[term.path];
    let start = match path.start {
        Start::Printed { .. } => shown(&term.start.times_exact(factor)),
        Start::Function { .. } => "–".to_string(),
    };
    let increment = match term.legs.is_empty() {
        true => "–".to_string(),
        false => shown(&Worked::sum(&term.legs).times_exact(factor)),
    };
    vec![
        Rich::plain(signed(&term.nu)),
        Rich::from(substance.species.pieces()),
        marks(path),
        Rich::plain(start),
        Rich::plain(increment),
        Rich::plain(shown(&term.molar.times_exact(factor))),
        Rich::plain(shown(&term.contribution)),
    ]
}

fn marks(path: &EnthalpyPath) -> Rich {
    let values = path.values();
    values.into_iter().fold(Rich::default(), |text, value| {
        text.run(Run::ValueUsed(value + 1))
    })
}

/// A number of the working before anything is rounded.
pub(super) fn shown(worked: &Worked) -> String {
    minus(&working_text(&worked.value, worked.significance))
}

fn substitution(heat: &HeatAt, outcome: &Outcome, kelvin: &str) -> Rich {
    let terms: Vec<String> = heat
        .terms
        .iter()
        .map(|term| format!("({})", shown(&term.contribution)))
        .collect();
    enthalpy("r").and(format!(
        "({kelvin} K) = {} = {} {}; nothing is rounded here, long numbers are cut for print.",
        terms.join(" + "),
        shown(&heat.sum),
        unit(&outcome.unit)
    ))
}
