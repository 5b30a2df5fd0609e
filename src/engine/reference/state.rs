//! Sources that count an element from another reference state than the conventions.

use num_traits::Zero;

use crate::finding::{FindingCode, Severity};
use crate::notation::{Element, Species};
use crate::quantity::{Exact, exact_text, to_f64, two_digits};
use crate::source::Problem;

use super::{Said, Sum};

/// Sources that count an element from another form do not add up with the others unless the
/// atoms of that element cancel within them.
pub(super) fn states(problem: &Problem, reaction: &Sum<'_>) -> Vec<Said> {
    let mut said = Vec::new();
    for (index, source) in problem.sources.iter().enumerate() {
        for (element, state) in &source.head.reference_states {
            let Some(usual) = problem.reference_states.of_element(*element) else {
                continue;
            };
            let atoms = net_atoms(problem, reaction, index, *element);
            if usual != state && !atoms.is_zero() {
                said.push(mixed_state(
                    problem, reaction, index, *element, state, &atoms,
                ));
            }
        }
    }
    said
}

/// Σ ν·n of an element over the terms whose value comes from one source.
fn net_atoms(problem: &Problem, reaction: &Sum<'_>, source: usize, element: Element) -> Exact {
    let atoms = reaction.terms.iter().map(|term| {
        let substance = &problem.substances[term.substance];
        let count = substance.species.formula.counts().get(&element);
        match (substance.source == source, count) {
            (true, Some(count)) => &term.nu * count,
            _ => Exact::zero(),
        }
    });
    atoms.sum()
}

fn mixed_state(
    problem: &Problem,
    reaction: &Sum<'_>,
    source: usize,
    element: Element,
    state: &Species,
    atoms: &Exact,
) -> Said {
    let id = problem.sources[source].id();
    let symbol = element.symbol();
    let cost = match state_enthalpy(problem, state) {
        Some(kilojoule) => {
            let per_atom = state.formula.counts().get(&element).cloned();
            let total =
                kilojoule * atoms / per_atom.unwrap_or_else(|| Exact::from_integer(1.into()));
            format!("moves the heat by {} kJ/mol", two_digits(to_f64(&total)))
        }
        None => format!(
            "moves the heat by {} times the enthalpy of {state}, which no consulted \
                         source gives",
            exact_text(atoms)
        ),
    };
    (
        Severity::Stop,
        FindingCode::ReferenceState,
        format!(
            "{}: {id} counts {symbol} from {state}, the others from its usual reference state. \
             {} mol of {symbol} does not cancel within {id}: that {cost}. Take all substances with \
             {symbol} from one source.",
            reaction.id,
            exact_text(atoms)
        ),
    )
}

/// The formation enthalpy of an unusual reference state on the conventional scale, kJ/mol.
fn state_enthalpy(problem: &Problem, state: &Species) -> Option<Exact> {
    let kilo = Exact::from_integer(1000.into());
    problem.sources[..problem.consulted]
        .iter()
        .find_map(|source| {
            let counted_from_it = source.head.reference_states.iter().any(|(_, s)| s == state);
            let entries = source.of_composition(&state.formula.hill());
            let entry = entries.iter().find(|e| e.notations().any(|s| s == state))?;
            let value = entry.formation_enthalpy.as_ref()?;
            (!counted_from_it).then(|| value.value_in_si() / &kilo)
        })
}
