//! Random balanced reactions at random temperatures, worked by Cantera in the same test run.
//!
//! `tests/outside/cantera/random_heats.py` makes the reactions and says how their heats are worked;
//! none of the program's code takes part.

use std::collections::BTreeMap;

use serde::Deserialize;

use super::case::{Folder, Results, reactions};
use super::tools::python;

/// How far the two may be apart, as a share of Σ |ν·H(T)|: what is left after the terms have
/// cancelled is a matter of the reaction, not of the arithmetic.
const RELATIVE: f64 = 1e-9;

/// The reactions of one form, and the source file that both sides use where it is not built in.
#[derive(Deserialize)]
struct Set {
    source: Option<String>,
    reactions: Vec<Heat>,
}

#[derive(Deserialize)]
struct Heat {
    equation: String,
    kelvin: String,
    /// J/mol of the equation as written.
    heat: f64,
    /// Σ |ν·H(T)|, J/mol.
    magnitude: f64,
    /// How many participants are condensed, and how many are in a form that has no printed
    /// enthalpy at 298.15 K: beyond a transition, or given by a function alone.
    condensed: usize,
    transformed: usize,
}

#[test]
fn cantera_works_the_same_heats_at_random_temperatures() {
    let sets: BTreeMap<String, Set> =
        serde_json::from_value(python("cantera/random_heats.py")).expect("its heats");
    let count = |form: &str, counts: fn(&Heat) -> bool| {
        sets[form]
            .reactions
            .iter()
            .filter(|heat| counts(heat))
            .count()
    };
    assert!(count("nasa-9", |_| true) >= 300);
    assert!(count("nasa-9", |heat| heat.condensed > 0) >= 200);
    assert!(count("nasa-9", |heat| heat.transformed > 0) >= 100);
    assert!(count("nasa-7", |_| true) >= 100 && count("shomate", |_| true) >= 100);
    let apart: Vec<String> = sets
        .iter()
        .flat_map(|(form, set)| apart(form, set))
        .collect();
    assert!(
        apart.is_empty(),
        "{} apart:\n{}",
        apart.len(),
        apart.join("\n")
    );
}

/// Where the program and the reference disagree.
fn apart(form: &str, set: &Set) -> Vec<String> {
    let folder = Folder::new();
    let consult = match &set.source {
        Some(text) => {
            folder.write("given.toml", text);
            "given.toml"
        }
        None => "nasa-glenn-2021",
    };
    let kelvin: Vec<String> = set
        .reactions
        .iter()
        .map(|h| format!("{} K", h.kelvin))
        .collect();
    let pairs = set.reactions.iter().zip(&kelvin);
    let list: Vec<(&str, &str)> = pairs
        .map(|(h, k)| (h.equation.as_str(), k.as_str()))
        .collect();
    let results = folder
        .results(&reactions(&[consult], &list, ""))
        .unwrap_or_else(|said| panic!("{form}: {said}"));
    let judged = set.reactions.iter().enumerate();
    judged
        .filter_map(|(i, heat)| disagreement(&results, i, heat))
        .collect()
}

fn disagreement(results: &Results, index: usize, heat: &Heat) -> Option<String> {
    let id = format!("r{index}.heat");
    let worked = results.number(&id, "value") * 1000.0;
    let met = (worked - heat.heat).abs() <= RELATIVE * heat.magnitude
        && results.text(&id, "unit") == "kJ/mol";
    (!met).then(|| {
        let Heat {
            equation,
            kelvin,
            heat,
            ..
        } = heat;
        format!("{equation} at {kelvin} K: {worked} J/mol, not {heat}")
    })
}
