//! Reading one entry of a source file.

use crate::document::{Table, Value, cas_number, number, one_of, quantity, species, value_fault};
use crate::finding::Located;
use crate::notation::Element;
use crate::quantity::{Decimal, Dimension, Quantity, Unit};

use super::heat_capacity::{Form, HeatCapacity};
use super::model::{Entry, SourceHead, Subject, Transition};
use super::read::{measured, read_decimal, read_standing, read_temperature};
use super::standing::Standing;

const ENTRY_KEYS: [&str; 14] = [
    "substance",
    "also",
    "name",
    "cas",
    "locator",
    "note",
    "standing",
    "reference-for",
    "formation-enthalpy",
    "combustion-enthalpy",
    "atomic-weight",
    "value",
    "heat-capacity",
    "transitions",
];

/// What the head of a source settles for its entries.
#[derive(Clone, Debug)]
pub(super) struct EntryRules {
    energy_unit: Option<Unit>,
    standing: Standing,
}

impl EntryRules {
    pub(super) fn of(head: &SourceHead) -> EntryRules {
        EntryRules {
            energy_unit: head.energy_unit.clone(),
            standing: head.standing,
        }
    }
}

/// Reads an entry; none where its substance cannot be read.
pub(super) fn read_entry(table: &Table<'_, '_>, rules: &EntryRules) -> Option<Entry> {
    table.only(&ENTRY_KEYS);
    let reader = table.reader();
    let substance = table.required_string("substance", "name the substance, with its phase")?;
    let owned = |key| table.string(key).map(|text| text.value);
    let symbol = table.get("atomic-weight").is_some() || table.get("value").is_some();
    let subject = if symbol {
        Subject::Symbol(substance.value.clone())
    } else {
        Subject::Species(species(reader, &substance)?)
    };
    let also = table.strings("also");
    Some(Entry {
        subject,
        also: also
            .iter()
            .filter_map(|text| species(reader, text))
            .collect(),
        name: owned("name"),
        cas: table
            .string("cas")
            .and_then(|text| cas_number(reader, &text)),
        locator: owned("locator").unwrap_or_default(),
        note: owned("note"),
        standing: read_standing(table).unwrap_or(rules.standing),
        reference_for: read_element(table),
        formation_enthalpy: read_enthalpy(table, "formation-enthalpy", rules),
        combustion_enthalpy: read_enthalpy(table, "combustion-enthalpy", rules),
        atomic_weight: table
            .string("atomic-weight")
            .and_then(|t| Some(number(reader, &t)?.value)),
        value: table
            .string("value")
            .and_then(|t| Some(quantity(reader, &t)?.value)),
        heat_capacity: table
            .tables("heat-capacity")
            .iter()
            .filter_map(read_heat_capacity)
            .collect(),
        transitions: table
            .tables("transitions")
            .iter()
            .filter_map(read_transition)
            .collect(),
    })
}

fn read_element(table: &Table<'_, '_>) -> Option<Element> {
    let symbol = table.string("reference-for")?;
    let element = Element::from_symbol(&symbol.value);
    if element.is_none() {
        value_fault(
            table.reader(),
            &symbol.span,
            format!("\"{}\"", symbol.value),
            "the symbol of an element",
            "write it as \"C\"",
        );
    }
    element
}

/// An enthalpy as printed, in the energy unit of the source. Without one it stays a bare number,
/// and the source is refused for its head.
fn read_enthalpy(table: &Table<'_, '_>, key: &str, rules: &EntryRules) -> Option<Quantity> {
    let text = table.string(key)?;
    let quantity = number(table.reader(), &text)?.value;
    Some(match &rules.energy_unit {
        Some(unit) => quantity.with_unit(unit.clone()),
        None => quantity,
    })
}

fn read_heat_capacity(table: &Table<'_, '_>) -> Option<HeatCapacity> {
    table.only(&["form", "range", "coefficients", "points"]);
    let reader = table.reader();
    let form = table.required_string("form", "name the form of the function")?;
    let choices = Form::ALL.map(|form| (form.word(), form));
    let form = Located::new(one_of(reader, &form, &choices)?, form.span);
    let coefficients = table.strings("coefficients");
    let read = HeatCapacity {
        form: form.value,
        range: read_range(table),
        coefficients: coefficients
            .iter()
            .filter_map(|c| read_decimal(reader, c))
            .collect(),
        points: table
            .get("points")
            .map_or_else(Vec::new, |points| read_points(&points)),
    };
    let given = match form.value {
        Form::Table => table.get("points").map_or(0, |points| points.count()),
        _ => coefficients.len(),
    };
    count_coefficients(table, &form, given).then_some(read)
}

/// A function without the number of coefficients that its form has would be read wrongly.
fn count_coefficients(table: &Table<'_, '_>, form: &Located<Form>, given: usize) -> bool {
    let (what, expected) = match form.value {
        Form::Table => ("points", "at least 2 points".to_string()),
        other => {
            let expected = other
                .coefficients()
                .map_or("at least 1".into(), |n| n.to_string());
            ("coefficients", format!("{expected} coefficients"))
        }
    };
    let fits = match form.value {
        Form::Table => given >= 2,
        other => other.coefficients().map_or(given >= 1, |n| given == n),
    };
    if !fits {
        value_fault(
            table.reader(),
            &form.span,
            format!("{what} of a {}: {given}", form.value.word()),
            expected,
            "copy them from the table in the order that the form names",
        );
    }
    fits
}

fn read_range(table: &Table<'_, '_>) -> Option<[Quantity; 2]> {
    let value = table.get("range")?;
    let reader = table.reader();
    let bounds = value.strings();
    let bounds: Vec<_> = bounds
        .iter()
        .filter_map(|b| read_temperature(reader, b))
        .collect();
    if bounds.len() < value.count() {
        return None;
    }
    let rising = bounds.len() == 2 && bounds[0].value_in_si() < bounds[1].value_in_si();
    if !rising {
        value_fault(
            reader,
            &value.span(),
            reader.text().slice(&value.span()),
            "two temperatures, the lower first",
            "write range = [\"298.15 K\", \"1000 K\"]",
        );
        return None;
    }
    <[Quantity; 2]>::try_from(bounds).ok()
}

fn read_points(points: &Value<'_, '_>) -> Vec<[Decimal; 2]> {
    let mut read = Vec::new();
    for point in points.elements("a list of pairs", "write it as [[\"T\", \"Cp\"], …]") {
        let pair = point.strings();
        let pair: Vec<_> = pair
            .iter()
            .filter_map(|p| read_decimal(point.reader(), p))
            .collect();
        match <[Decimal; 2]>::try_from(pair) {
            Ok(pair) => read.push(pair),
            Err(_) => value_fault(
                point.reader(),
                &point.span(),
                point.reader().text().slice(&point.span()),
                "a temperature in K and a heat capacity in J/(mol K)",
                "write each point as [\"300\", \"75.3\"]",
            ),
        }
    }
    read
}

fn read_transition(table: &Table<'_, '_>) -> Option<Transition> {
    table.only(&["to", "temperature", "enthalpy", "locator", "note"]);
    let reader = table.reader();
    let advice = "a transition names the form it leads to, its temperature and its heat";
    let to = table.required_string("to", advice);
    let temperature = table.required_string("temperature", advice);
    let enthalpy = table.required_string("enthalpy", advice);
    let molar = Dimension::ENERGY.over(Dimension::AMOUNT);
    let to = to.and_then(|text| species(reader, &text));
    let temperature = temperature.and_then(|text| read_temperature(reader, &text));
    let enthalpy = enthalpy.and_then(|text| measured(reader, &text, molar));
    Some(Transition {
        to: to?,
        temperature: temperature?,
        enthalpy: enthalpy?,
    })
}
