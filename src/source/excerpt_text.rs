//! Entries of a source as a source file of their own.

use serde::Serialize;

use crate::notation::Species;
use crate::quantity::{Decimal, Quantity};

use super::heat_capacity::HeatCapacity;
use super::model::{Digits, Entry, Erratum, SourceHead, StatedCorrelation, Subject, Transition};
use super::standing::Standing;
use super::store::Source;

#[derive(Serialize)]
struct File {
    source: toml::Table,
    #[serde(skip_serializing_if = "Vec::is_empty")]
    entry: Vec<toml::Table>,
    #[serde(skip_serializing_if = "Vec::is_empty")]
    correlation: Vec<toml::Table>,
    #[serde(skip_serializing_if = "Vec::is_empty")]
    erratum: Vec<toml::Table>,
}

pub(super) fn text(source: &Source, entries: &[Entry]) -> String {
    let named = |species: &Species| {
        let mut all = entries.iter().flat_map(Entry::notations);
        all.any(|other| other == species)
    };
    let correlations = source.correlations.iter();
    let correlations = correlations.filter(|c| c.between.iter().all(named));
    let file = File {
        source: head(&source.head),
        entry: entries.iter().map(entry).collect(),
        correlation: correlations.map(correlation).collect(),
        erratum: source.errata.iter().map(erratum).collect(),
    };
    // Tables of strings and arrays of them always have a TOML form.
    toml::to_string(&file).expect("an excerpt is made of strings")
}

/// A table filled key by key; what is not there is left out.
#[derive(Default)]
struct Fields(toml::Table);

impl Fields {
    fn put(mut self, key: &str, value: Option<impl Into<toml::Value>>) -> Fields {
        if let Some(value) = value {
            self.0.insert(key.to_string(), value.into());
        }
        self
    }
}

fn head(head: &SourceHead) -> toml::Table {
    let digits = match head.digits {
        Digits::Significant => "significant",
        Digits::FixedDecimals => "fixed-decimals",
    };
    let states = head.reference_states.iter().map(|(element, species)| {
        (
            element.symbol().to_string(),
            toml::Value::from(species.to_string()),
        )
    });
    let states: toml::Table = states.collect();
    Fields::default()
        .put("id", Some(head.id.clone()))
        .put("title", Some(head.title.clone()))
        .put("authors", head.authors.clone())
        .put("year", head.year.clone())
        .put("publisher", head.publisher.clone())
        .put("report", head.report.clone())
        .put("edition", head.edition.clone())
        .put("doi", head.doi.clone())
        .put("licence", head.licence.clone())
        .put("note", head.note.clone())
        .put(
            "temperature",
            head.temperature.as_ref().map(Quantity::to_string),
        )
        .put("pressure", head.pressure.as_ref().map(Quantity::to_string))
        .put(
            "energy-unit",
            head.energy_unit.as_ref().map(|u| u.symbol().to_string()),
        )
        .put("coverage", head.coverage_text.clone())
        .put(
            "gas-constant",
            head.gas_constant.as_ref().map(|r| r.printed().to_string()),
        )
        .put("digits", Some(digits))
        .put("standing", Some(head.standing.word()))
        .put("extract-of", Some(head.sha256.clone()))
        .put("reference-states", (!states.is_empty()).then_some(states))
        .0
}

fn entry(entry: &Entry) -> toml::Table {
    let subject = match &entry.subject {
        Subject::Species(species) => species.to_string(),
        Subject::Symbol(symbol) => symbol.clone(),
    };
    let also: Vec<String> = entry.also.iter().map(Species::to_string).collect();
    let functions: Vec<toml::Table> = entry.heat_capacity.iter().map(heat_capacity).collect();
    let transitions: Vec<toml::Table> = entry.transitions.iter().map(transition).collect();
    Fields::default()
        .put("substance", Some(subject))
        .put("also", (!also.is_empty()).then_some(also))
        .put("name", entry.name.clone())
        .put("cas", entry.cas.clone())
        .put("locator", Some(entry.locator.clone()))
        .put("note", entry.note.clone())
        .put("standing", Some(Standing::word(entry.standing)))
        .put("reference-for", entry.reference_for.map(|e| e.symbol()))
        .put(
            "formation-enthalpy",
            entry.formation_enthalpy.as_ref().map(number_text),
        )
        .put(
            "combustion-enthalpy",
            entry.combustion_enthalpy.as_ref().map(number_text),
        )
        .put(
            "atomic-weight",
            entry.atomic_weight.as_ref().map(number_text),
        )
        .put("value", entry.value.as_ref().map(Quantity::to_string))
        .put(
            "heat-capacity",
            (!functions.is_empty()).then_some(functions),
        )
        .put(
            "transitions",
            (!transitions.is_empty()).then_some(transitions),
        )
        .0
}

fn heat_capacity(function: &HeatCapacity) -> toml::Table {
    let range = function
        .range
        .as_ref()
        .map(|range| range.each_ref().map(Quantity::to_string).to_vec());
    let printed = |decimal: &Decimal| decimal.printed().to_string();
    let coefficients: Vec<String> = function.coefficients.iter().map(printed).collect();
    let points = function
        .points
        .iter()
        .map(|point| point.each_ref().map(printed).to_vec());
    let points: Vec<Vec<String>> = points.collect();
    Fields::default()
        .put("form", Some(function.form.word()))
        .put("range", range)
        .put(
            "coefficients",
            (!coefficients.is_empty()).then_some(coefficients),
        )
        .put("points", (!points.is_empty()).then_some(points))
        .put("uncertainty", function.uncertainty.as_ref().map(printed))
        .0
}

fn transition(transition: &Transition) -> toml::Table {
    Fields::default()
        .put("to", Some(transition.to.to_string()))
        .put("temperature", Some(transition.temperature.to_string()))
        .put("enthalpy", Some(transition.enthalpy.to_string()))
        .put("locator", transition.locator.clone())
        .put("note", transition.note.clone())
        .0
}

fn correlation(stated: &StatedCorrelation) -> toml::Table {
    let between = stated.between.each_ref().map(Species::to_string).to_vec();
    Fields::default()
        .put("between", Some(between))
        .put(
            "coefficient",
            Some(stated.coefficient.printed().to_string()),
        )
        .0
}

fn erratum(erratum: &Erratum) -> toml::Table {
    Fields::default()
        .put("text", Some(erratum.text.clone()))
        .put("date", erratum.date.clone())
        .put("authority", erratum.authority.clone())
        .0
}

/// The number of a quantity whose unit the head of the source states.
fn number_text(quantity: &Quantity) -> String {
    quantity.printed_number().to_string()
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::finding::Text;
    use crate::source::{Provenance, built_in, read_source};

    fn read_again(source: &Source) -> Source {
        let text = Text::new("excerpt", text(source, &source.all()));
        let (read, faults) = read_source(&text, Provenance::Extract);
        assert_eq!(faults.into_sorted(), []);
        read.expect("a source without faults")
    }

    fn functions(source: &Source) -> Vec<HeatCapacity> {
        let entries = source.all();
        entries.into_iter().flat_map(|e| e.heat_capacity).collect()
    }

    #[test]
    fn every_function_of_the_nasa_file_travels() {
        let source = built_in("nasa-glenn-2021").expect("a built-in source");
        let read = read_again(&source);
        assert!(functions(&source).len() > 3700);
        assert_eq!(functions(&read).len(), functions(&source).len());
    }

    #[test]
    fn every_form_travels_whole() {
        let given = r#"[source]
id = "invented"
title = "Invented"
coverage = "2"
gas-constant = "8.31451"
[[entry]]
substance = "H2O(l)"
heat-capacity = [
  { form = "constant", range = ["274 K", "300 K"], coefficients = ["75.3"], uncertainty = "0.40" },
  { form = "table", points = [["300", "75.3"], ["320.0", "75.1"]] },
  { form = "polynomial", range = ["320 K", "340 K"], coefficients = ["70.0", "1.5e-2"] },
  { form = "nasa-7", range = ["340 K", "370 K"], coefficients = ["9.0", "0", "0", "0", "0", "0", "0"] },
]
"#;
        let (source, faults) = read_source(&Text::new("given", given), Provenance::Original);
        assert_eq!(faults.into_sorted(), []);
        let source = source.expect("a source without faults");
        let tables = |source: &Source| -> Vec<toml::Table> {
            functions(source).iter().map(heat_capacity).collect()
        };
        assert_eq!(tables(&source).len(), 4);
        assert_eq!(tables(&source)[0]["uncertainty"].as_str(), Some("0.40"));
        assert_eq!(tables(&read_again(&source)), tables(&source));
    }

    #[test]
    fn a_transition_travels_with_its_locator_and_note() {
        let given = r#"[source]
id = "invented"
title = "Invented"
coverage = "2"
[[entry]]
substance = "H2O(l)"
locator = "sheet 1"
transitions = [
  { to = "H2O(g)", temperature = "373 K", enthalpy = "41 kJ/mol", locator = "sheet 2", note = "at 1 atm" },
  { to = "H2O(cr)", temperature = "273 K", enthalpy = "-6 kJ/mol" },
]
"#;
        let (source, faults) = read_source(&Text::new("given", given), Provenance::Original);
        assert_eq!(faults.into_sorted(), []);
        let source = source.expect("a source without faults");
        let entries = read_again(&source).all();
        let said = |index: usize| {
            let transition: &Transition = &entries[0].transitions[index];
            [&transition.locator, &transition.note].map(|text| text.as_deref())
        };
        assert_eq!(said(0), [Some("sheet 2"), Some("at 1 atm")]);
        assert_eq!(said(1), [None, None]);
    }
}
