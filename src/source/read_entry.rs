//! Reading one entry of a source file.

use crate::document::{Reader, Table, cas_number, number, quantity, species, value_fault};
use crate::finding::Located;
use crate::notation::{Element, PhaseLabel, Species};
use crate::quantity::{Dimension, Quantity, Unit};

use super::model::{Entry, SourceHead, Subject, Transition};
use super::read_head::read_standing;
use super::read_heat_capacity::read_heat_capacities;
use super::read_quantity::{measured, read_temperature};
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
    let aqueous = is_aqueous(&subject);
    let also = table.strings("also");
    Some(Entry {
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
        heat_capacity: read_heat_capacities(table, aqueous),
        transitions: table
            .tables("transitions")
            .iter()
            .filter_map(|table| read_transition(table, &subject))
            .collect(),
        subject,
    })
}

fn is_aqueous(subject: &Subject) -> bool {
    let Subject::Species(species) = subject else {
        return false;
    };
    let phase = species.phase.as_ref();
    phase.is_some_and(|phase| phase.label == PhaseLabel::Aqueous)
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

/// Another form of the composition of an entry.
fn read_form(reader: &Reader<'_>, text: &Located<String>, subject: &Subject) -> Option<Species> {
    let to = species(reader, text)?;
    let another = match subject {
        Subject::Species(from) => *from != to && from.formula.hill() == to.formula.hill(),
        Subject::Symbol(_) => true,
    };
    if !another {
        value_fault(
            reader,
            &text.span,
            format!("a transition to {to}"),
            "another form of the same composition",
            "name the form that it turns into: to = \"H2O(g)\"",
        );
    }
    another.then_some(to)
}

fn read_transition(table: &Table<'_, '_>, subject: &Subject) -> Option<Transition> {
    table.only(&["to", "temperature", "enthalpy", "locator", "note"]);
    let reader = table.reader();
    let advice = "a transition names the form it leads to, its temperature and its heat";
    let to = table.required_string("to", advice);
    let temperature = table.required_string("temperature", advice);
    let enthalpy = table.required_string("enthalpy", advice);
    let molar = Dimension::ENERGY.over(Dimension::AMOUNT);
    let to = to.and_then(|text| read_form(reader, &text, subject));
    let temperature = temperature.and_then(|text| read_temperature(reader, &text));
    let enthalpy = enthalpy.and_then(|text| measured(reader, &text, molar));
    let owned = |key| table.string(key).map(|text| text.value);
    let (locator, note) = (owned("locator"), owned("note"));
    Some(Transition {
        to: to?,
        temperature: temperature?,
        enthalpy: enthalpy?,
        locator,
        note,
    })
}
