//! The compact working that `compute` prints: results and findings first, readable at 80 columns.

use std::path::Path;

use super::cycle_text::cycle;
use super::findings;
use super::heating_value_text;
use super::terminal::{Style, Tone, plain, wrap};
use crate::calculation::Calculation;
use crate::engine::{HeatAt, Hess, Outcome, ReactionWorking, Worked};
use crate::quantity::{exact_text, full_text, working_text};
use crate::record::coverage;
use crate::source::{Problem, ProblemReaction};

/// The working of a case as text.
pub fn shown(case: &Path, calculation: &Calculation, style: Style) -> String {
    let head = &calculation.case.record;
    let title = format!(
        "{} revision {}, {}: {}",
        head.number.value,
        head.revision.value,
        head.status.value.word(),
        plain(&head.title)
    );
    let mut text = style.paint(Tone::Strong, wrap("", &title).trim_end()) + "\n\n";
    text += &results(calculation, style);
    if !calculation.working.findings.is_empty() {
        text += &format!("\n{}\n", style.paint(Tone::Strong, "Findings"));
        text += &findings::shown(case, &calculation.working.findings, style);
    }
    text += &format!("\n{}\n", style.paint(Tone::Strong, "Working"));
    for working in &calculation.working.reactions {
        text += &reaction(calculation, working);
    }
    for working in &calculation.working.cycles {
        text += &cycle(calculation, working);
    }
    for working in &calculation.working.heating_values {
        text += &heating_value_text::shown(calculation, working);
    }
    text += &format!("\n{}\n", style.paint(Tone::Strong, "Values used"));
    text + &values(&calculation.problem)
}

fn results(calculation: &Calculation, style: Style) -> String {
    let outcomes = &calculation.working.outcomes;
    let width = outcomes
        .iter()
        .map(|o| o.id.chars().count())
        .max()
        .unwrap_or(0);
    let mut text = style.paint(Tone::Strong, "Results") + "\n";
    for outcome in outcomes {
        let line = format!("{} {}", stated(outcome), outcome.direction().word());
        text += &wrap(&format!("  {:<width$}  ", outcome.id), &line);
        text += &wrap(
            &format!("  {:<width$}  ", ""),
            &coverage(outcome).replace('\u{a0}', " "),
        );
    }
    if outcomes.is_empty() {
        text += "  none\n";
    }
    text
}

fn stated(outcome: &Outcome) -> String {
    let uncertainty = match (&outcome.stated.uncertainty_text, outcome.is_complete()) {
        (Some(text), true) => format!(" ± {text}"),
        _ => String::new(),
    };
    format!(
        "{}{uncertainty} {}",
        outcome.stated.value_text,
        outcome.unit.symbol()
    )
}

fn reaction(calculation: &Calculation, working: &ReactionWorking) -> String {
    let problem = &calculation.problem;
    let reaction = &problem.reactions[working.reaction];
    let text = wrap(
        &format!("{}: ", reaction.id),
        &reaction.equation.to_string(),
    );
    let unit = calculation
        .working
        .outcome(&format!("{}.heat", reaction.id));
    let unit = unit.map_or("", |outcome| outcome.unit.symbol());
    match (&working.heat, &working.hess) {
        (Some(heat), _) => text + &at_temperature(problem, heat, reaction, unit),
        (None, Some(hess)) => text + &sum(problem, hess, unit),
        (None, None) => text + "  not worked, see the findings\n",
    }
}

fn sum(problem: &Problem, hess: &Hess, unit: &str) -> String {
    let rows = hess.terms.iter().map(|term| {
        [
            exact_text(&term.nu),
            problem.substances[term.substance].label.clone(),
            format!(
                "[{}] {}",
                term.value + 1,
                full_text(&term.molar, term.molar_significance)
            ),
            full_text(&term.contribution, term.contribution_significance),
        ]
    });
    let rows: Vec<[String; 4]> = rows.collect();
    let sum = full_text(&hess.sum, hess.significance);
    table(&rows) + &wrap("  sum ", &format!("{sum} {unit}"))
}

/// Each participant with its molar enthalpy at the temperature in J/mol, and what it adds.
fn at_temperature(
    problem: &Problem,
    heat: &HeatAt,
    reaction: &ProblemReaction,
    unit: &str,
) -> String {
    let rows = heat.terms.iter().map(|term| {
        let marks = problem.paths[term.path].values();
        let marks: Vec<String> = marks
            .iter()
            .map(|value| format!("[{}]", value + 1))
            .collect();
        [
            exact_text(&term.nu),
            problem.substances[term.substance].label.clone(),
            format!("{} {}", marks.join(""), number(&term.molar)),
            number(&term.contribution),
        ]
    });
    let rows: Vec<[String; 4]> = rows.collect();
    let at = format!("  at {} K, H in J/mol:\n", exact_text(&reaction.kelvin));
    let sum = format!("{} {unit}", number(&heat.sum));
    at + &table(&rows) + &wrap("  sum ", &sum)
}

pub(super) fn number(worked: &Worked) -> String {
    working_text(&worked.value, worked.significance)
}

/// Four columns, numbers flush right; a long cell takes its row with it.
pub(super) fn table(rows: &[[String; 4]]) -> String {
    let width = |column: usize, most: usize| {
        let lengths = rows.iter().map(|row| row[column].chars().count());
        lengths.max().unwrap_or(0).min(most)
    };
    let (a, b, c, d) = (width(0, 8), width(1, 28), width(2, 22), width(3, 16));
    let line = |row: &[String; 4]| {
        let line = format!(
            "  {:>a$}  {:<b$}  {:>c$}  {:>d$}",
            row[0], row[1], row[2], row[3]
        );
        format!("{}\n", line.trim_end())
    };
    rows.iter().map(line).collect()
}

fn values(problem: &Problem) -> String {
    let mut text = String::new();
    for (index, value) in problem.values.iter().enumerate() {
        let head = &problem.sources[value.source].head;
        let unit = match value.printed.unit.symbol() {
            "1" => String::new(),
            symbol => format!(" {symbol}"),
        };
        let line = format!(
            "{} {} {}{unit} ({}; {}; {})",
            value.substance,
            value.kind.word(),
            value.printed_text(),
            head.id,
            plain(&value.locator),
            value.standing.word()
        );
        text += &wrap(&format!("  [{}] ", index + 1), &line);
    }
    text
}
