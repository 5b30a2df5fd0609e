//! How printed heats became enthalpies of the equations of their steps.

use num_traits::Signed;

use crate::engine::MolarMass;
use crate::quantity::{Exact, Quantity, Significance, combine, exact_text, to_f64, two_digits};
use crate::source::{Basis, Problem, ProblemCycle, StepSource};

use super::cycle_checks::digits;
use super::cycle_symbols::bomb_to_enthalpy;
use super::cycle_tables::Shown;
use super::cycle_working::heading;
use super::numerals::in_full;
use super::pages::Step;
use super::rich::{Rich, Run};
use super::working::displayed;

/// How heats per mass became heats per mole.
pub(super) fn mass_steps(shown: &Shown<'_>) -> Vec<Step> {
    let mut said: Vec<usize> = Vec::new();
    let mut steps = Vec::new();
    for (step, heat) in shown.cycle.steps.iter().zip(&shown.heats) {
        let (StepSource::Value { per, .. }, Some(mass)) = (&step.heat, &heat.molar_mass) else {
            continue;
        };
        let Basis::Mass {
            species, weights, ..
        } = per
        else {
            continue;
        };
        if said.contains(species) {
            continue;
        }
        said.push(*species);
        let text = Rich::plain(format!(
            "Molar mass of {}: ",
            shown.cycle.species[*species].label
        ));
        let text = sum_of_weights(shown.problem, weights, text).and(format!(
            " = {} g/mol. Heats per mass of it are multiplied by that and by its |ν|.{}",
            in_full(&mass.value, mass.significance),
            uncertainty(shown.problem, mass)
        ));
        steps.push(Step::Text { text });
    }
    steps
}

/// How the uncertainty of a heat per mole follows from that of the heat per mass.
fn uncertainty(problem: &Problem, mass: &MolarMass) -> String {
    let of_value = |index: usize| problem.values[index].uncertainty;
    let combined = combine(&mass.worked().form, &of_value, &problem.correlations);
    combined.standard.map_or(String::new(), |u| {
        format!(
            " The atomic weights leave u(M) = {} g/mol; for a heat h per mass the square of the \
             uncertainty is ν²·((M·u(h))² + (h·u(M))²).",
            digits(u, 3)
        )
    })
}

fn sum_of_weights(problem: &Problem, weights: &[(usize, Exact)], text: Rich) -> Rich {
    weights
        .iter()
        .enumerate()
        .fold(text, |text, (at, (index, count))| {
            let plus = if at == 0 { "" } else { " + " };
            let printed = problem.values[*index].printed.decimal.printed();
            text.and(format!("{plus}{count} · {printed} "))
                .run(Run::ValueUsed(index + 1))
        })
}

/// From internal energies to enthalpies.
pub(super) fn bomb_steps(shown: &Shown<'_>) -> Vec<Step> {
    let (Some(table), Some(r)) = (shown.gas_work(), shown.cycle.gas_constant) else {
        return Vec::new();
    };
    let kelvin = shown.cycle.kelvin().map_or(String::new(), exact_text);
    let value = &shown.problem.values[r].printed;
    let product = value.value_in_si() * shown.cycle.kelvin().cloned().unwrap_or_default();
    let text = Rich::default()
        .run(Run::Italic("R".into()))
        .and(format!(" = {} J/(mol K) ", value.decimal.printed()))
        .run(Run::ValueUsed(r + 1))
        .and(", ")
        .run(Run::Italic("T".into()))
        .and(format!(" = {kelvin} K, "))
        .run(Run::Italic("R·T".into()))
        .and(format!(
            " = {} J/mol. Gases alone count; the volume of the rest is left out. {} {}",
            in_full(&product, Significance::Exact),
            temperature_error(shown.cycle, value),
            reduced(shown.cycle)
        ));
    vec![
        heading("From the bomb to constant pressure"),
        displayed(bomb_to_enthalpy()),
        Step::Text { text },
        Step::Table(table),
    ]
}

/// What the temperature, taken as it is stated, can do to the correction.
fn temperature_error(cycle: &ProblemCycle, r: &Quantity) -> String {
    let bombs = cycle.steps.iter().filter_map(|step| step.bomb.as_ref());
    let most = bombs.map(|bomb| bomb.gas_moles.abs()).max();
    let per_kelvin = most.unwrap_or_default() * r.value_in_si();
    format!(
        "An error of 0.1 K in T would move Δn·R·T by {} J/mol at the most.",
        two_digits(to_f64(&per_kelvin) * 0.1)
    )
}

/// Whether the bomb results hold for standard states.
fn reduced(cycle: &ProblemCycle) -> String {
    let bombs = cycle
        .steps
        .iter()
        .filter_map(|step| Some((step, step.bomb.as_ref()?)));
    let open: Vec<&str> = bombs
        .filter(|(_, bomb)| !bomb.reduced)
        .map(|(step, _)| step.name.as_str())
        .collect();
    match open.is_empty() {
        true => "The results are reduced to standard states by whoever measured them (E. W. \
                 Washburn, J. Res. Natl. Bur. Stand. 10 (1933) 525; from memory)."
            .to_string(),
        false => format!(
            "Not reduced to standard states: {}; see the findings.",
            open.join(", ")
        ),
    }
}
