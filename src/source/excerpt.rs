//! What of a source travels with a record: the entries that decided something.

use std::collections::BTreeSet;

use crate::notation::Species;
use crate::quantity::{Exact, Quantity};

use super::excerpt_text::text;
use super::model::Entry;
use super::problem::{Problem, ValueKind};
use super::store::Source;

/// The name under which a source's excerpt is attached.
pub fn attachment_name(id: &str) -> String {
    format!("source-{id}.toml")
}

/// For each source of a problem, its excerpt as TOML: all forms of the formulas that the case
/// names, what the checks of mixed references look up, and the atomic weights used. The head
/// names the SHA-256 of the whole file.
pub fn excerpts(problem: &Problem) -> Vec<(String, String)> {
    let mut formulas = unusual_states(problem);
    formulas.extend(problem.named_formulas.iter().cloned());
    formulas.extend(problem.substances.iter().map(|s| s.species.formula.hill()));
    let burnt = problem
        .values
        .iter()
        .filter(|v| v.kind == ValueKind::CombustionEnthalpy);
    formulas.extend(burnt.flat_map(|v| &v.species).map(|s| s.formula.hill()));
    let states = reference_formulas(problem);
    let capacities = mixes_temperatures(problem);
    let excerpt = |(index, source): (usize, &Source)| {
        let mut wanted = formulas.clone();
        if index == 0 || capacities {
            wanted.extend(states.iter().cloned());
        }
        let entries = entries(problem, index, source, &wanted);
        (attachment_name(source.id()), text(source, &entries))
    };
    let sources = problem.sources.iter().enumerate();
    let sources = sources.filter(|(index, _)| *index != problem.case_source);
    sources.map(excerpt).collect()
}

/// What a source counts from another reference state costs the enthalpy of that state, which
/// any source consulted may give.
fn unusual_states(problem: &Problem) -> BTreeSet<String> {
    let states = problem
        .sources
        .iter()
        .flat_map(|source| &source.head.reference_states);
    states.map(|(_, state)| state.formula.hill()).collect()
}

/// Where a source has another reference temperature than the conventions, the heat capacities of
/// the elements decide what that costs.
fn mixes_temperatures(problem: &Problem) -> bool {
    let temperatures = problem
        .sources
        .iter()
        .filter_map(|source| source.head.temperature.as_ref());
    let kelvin: BTreeSet<Exact> = temperatures.map(Quantity::value_in_si).collect();
    kelvin.len() > 1
}

/// Formation equations are written from the reference states, which therefore travel as well.
fn reference_formulas(problem: &Problem) -> BTreeSet<String> {
    let elements = problem
        .substances
        .iter()
        .flat_map(|s| s.species.formula.counts().keys());
    let states = elements.filter_map(|e| problem.reference_states.of_element(*e));
    let mut formulas: BTreeSet<String> = states.map(|s| s.formula.hill()).collect();
    // The electron stands in the formation equations of ions.
    if let Ok(electron) = Species::parse("e-") {
        formulas.insert(electron.formula.hill());
    }
    formulas
}

fn entries(
    problem: &Problem,
    index: usize,
    source: &Source,
    formulas: &BTreeSet<String>,
) -> Vec<Entry> {
    let mut entries: Vec<Entry> = formulas
        .iter()
        .flat_map(|f| source.of_composition(f))
        .collect();
    // Atomic weights, constants, and what atoms contribute to a heat capacity.
    let symbols = problem.values.iter();
    let symbols = symbols.filter(|v| v.source == index && v.species.is_none());
    entries.extend(symbols.filter_map(|v| source.of_symbol(&v.substance)));
    entries
}
