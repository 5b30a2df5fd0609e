//! Sources of another reference temperature than the conventions.

use num_traits::Zero;

use crate::finding::{FindingCode, Severity};
use crate::notation::Species;
use crate::quantity::{to_f64, two_digits};
use crate::source::{Problem, reference_kelvin};

use super::{Said, Sum};

/// A formation enthalpy at another temperature is off by ΔCp of the formation reaction times the
/// difference (Kirchhoff); the heat capacities come from whatever source consulted has them.
pub(super) fn temperature(problem: &Problem, reaction: &Sum<'_>) -> Option<Said> {
    let shift = shift(problem, reaction);
    if shift.sources.is_empty() {
        return None;
    }
    // A heat that is off by an unknown amount does not hold.
    let severity = match shift.unknown.is_empty() {
        true => Severity::Caution,
        false => Severity::Stop,
    };
    Some((
        severity,
        FindingCode::ReferenceTemperature,
        format!(
            "{}: {} gives values for another reference temperature than 298.15 K. They are used \
             as printed; referring them to 298.15 K {}.",
            reaction.id,
            shift.sources.join(", "),
            shift.size()
        ),
    ))
}

/// What referring the values of a sum to 298.15 K would change.
#[derive(Default)]
struct Shift {
    /// The sources of another reference temperature, each with that temperature.
    sources: Vec<String>,
    /// J/mol, as far as it is known.
    joule: f64,
    /// Species for which no consulted source gives the heat capacities.
    unknown: Vec<String>,
}

impl Shift {
    fn size(&self) -> String {
        match self.unknown.is_empty() {
            true => format!(
                "moves the heat by about {} kJ/mol",
                two_digits(self.joule / 1000.0)
            ),
            false => format!(
                "moves the heat by an amount not known here, because no consulted source gives the \
                 heat capacities that the formation of {} needs (100 J/(mol K) would make {} kJ/mol \
                 for each kelvin)",
                self.unknown.join(", "),
                two_digits(0.1)
            ),
        }
    }
}

fn shift(problem: &Problem, reaction: &Sum<'_>) -> Shift {
    let mut shift = Shift::default();
    for term in reaction.terms {
        let substance = &problem.substances[term.substance];
        let Some(value) = substance.value.map(|value| &problem.values[value]) else {
            continue;
        };
        let head = &problem.sources[value.source].head;
        let Some(reference) = head.temperature.as_ref() else {
            continue;
        };
        let kelvin = reference_kelvin() - reference.value_in_si();
        if kelvin.is_zero() || value.printed.exact {
            continue;
        }
        let source = format!("{} ({reference})", head.id);
        if !shift.sources.contains(&source) {
            shift.sources.push(source);
        }
        match formation_heat_capacity(problem, &substance.species) {
            Some(cp) => shift.joule += to_f64(&term.nu) * cp * to_f64(&kelvin),
            None => shift.unknown.push(substance.species.to_string()),
        }
    }
    shift
}

/// Cp of a species less that of its elements at 298.15 K, J/(mol K).
fn formation_heat_capacity(problem: &Problem, species: &Species) -> Option<f64> {
    let mut sum = heat_capacity(problem, species)?;
    for (element, count) in species.formula.counts() {
        let state = problem.reference_states.of_element(*element)?;
        let atoms = state.formula.counts().get(element)?;
        sum -= to_f64(&(count / atoms)) * heat_capacity(problem, state)?;
    }
    Some(sum)
}

fn heat_capacity(problem: &Problem, species: &Species) -> Option<f64> {
    let kelvin = reference_kelvin();
    for source in &problem.sources[..problem.consulted] {
        let r = source.head.gas_constant.as_ref();
        let r = r.map_or(8.314_462_618_153_24, |r| to_f64(&r.value()));
        for entry in source.of_composition(&species.formula.hill()) {
            let same = entry.notations().any(|other| other == species);
            let function = entry.heat_capacity.iter().find(|f| f.serves(&kelvin));
            if let (true, Some(function)) = (same, function) {
                return function.at(to_f64(&kelvin), r);
            }
        }
    }
    None
}
