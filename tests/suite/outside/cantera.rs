//! Heats of reaction worked by Cantera from NASA's file in the same test run.
//!
//! `tests/outside/cantera/reference_heats.py` says how; none of the program's code takes part.

use num_bigint::BigInt;
use num_rational::BigRational;
use serde::Deserialize;
use toml::Table;

use super::case::{Folder, Results, one_reaction};
use super::rational::rational;
use super::tools::{outside, python};

/// How far Cantera's functions may be from the printed enthalpies, J for each mole that reacts
/// or forms: the file prints the enthalpy and the coefficients apart, and its authors fitted them
/// to meet at 298.15 K. All records agree within 1 J/mol there (../../outside/glenn/README.md).
const FUNCTION_TOLERANCE: f64 = 1.0;

#[derive(Deserialize)]
struct Listed {
    reaction: Vec<Reaction>,
}

#[derive(Deserialize)]
struct Reaction {
    equation: String,
    #[serde(default)]
    substances: Table,
}

#[derive(Deserialize)]
struct Reference {
    reactions: Vec<Heat>,
}

/// J/mol: the sum of the printed enthalpies, exactly, and Cantera's from the functions.
#[derive(Deserialize)]
struct Heat {
    equation: String,
    printed: String,
    cantera: Option<f64>,
    moles: f64,
}

#[test]
fn cantera_works_the_same_heats_from_the_same_file() {
    let text = std::fs::read_to_string(outside("cantera/reactions.toml")).expect("the list");
    let listed: Listed = toml::from_str(&text).expect("a list of reactions");
    let reference: Reference =
        serde_json::from_value(python("cantera/reference_heats.py")).expect("its heats");
    assert_eq!(listed.reaction.len(), reference.reactions.len());
    let by_cantera = reference
        .reactions
        .iter()
        .filter(|heat| heat.cantera.is_some());
    assert!(
        by_cantera.count() >= 50,
        "Cantera worked fewer reactions than it should"
    );
    let folder = Folder::new();
    let pairs = listed.reaction.iter().zip(&reference.reactions);
    let apart: Vec<String> = pairs
        .filter_map(|(r, heat)| apart(&folder, r, heat))
        .collect();
    assert!(apart.is_empty(), "{}", apart.join("\n"));
}

/// What the program and the reference disagree on; none where they agree.
fn apart(folder: &Folder, reaction: &Reaction, heat: &Heat) -> Option<String> {
    assert_eq!(reaction.equation, heat.equation);
    let declared =
        Table::from_iter([("substances".to_string(), reaction.substances.clone().into())]);
    let case = one_reaction(
        &["nasa-glenn-2021"],
        &reaction.equation,
        &declared.to_string(),
    );
    match folder.results(&case) {
        Ok(results) => {
            disagreement(&results, heat).map(|said| format!("{}: {said}", heat.equation))
        }
        Err(said) => Some(format!("{}: {said}", heat.equation)),
    }
}

fn disagreement(results: &Results, heat: &Heat) -> Option<String> {
    let worked = results.exact("r.heat");
    let kilo = BigRational::from_integer(BigInt::from(1000));
    if results.text("r.heat", "unit") != "kJ/mol" || worked * &kilo != rational(&heat.printed) {
        return Some(format!(
            "{} J/mol by the printed enthalpies, not {results:?}",
            heat.printed
        ));
    }
    let joule = results.number("r.heat", "value") * 1000.0;
    let far = |cantera: f64| (joule - cantera).abs() > FUNCTION_TOLERANCE * heat.moles;
    heat.cantera
        .filter(|cantera| far(*cantera) || cantera.is_nan())
        .map(|cantera| format!("{cantera} J/mol by Cantera, {joule} here"))
}
