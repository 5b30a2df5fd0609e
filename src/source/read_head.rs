//! Reading the head of a source file: what is said once for all entries.

use crate::document::{Reader, Table, one_of, species, unit, value_fault, with_document};
use crate::finding::{Located, Text};
use crate::notation::{Element, Species};
use crate::quantity::{Coverage, Decimal, Dimension, Exact, Unit};

use super::model::{Digits, SourceHead};
use super::read_quantity::{measured, read_decimal, read_temperature, wrong_dimension};
use super::sha256::sha256_hex;
use super::standing::Standing;

const HEAD_KEYS: [&str; 19] = [
    "id",
    "title",
    "authors",
    "year",
    "publisher",
    "report",
    "edition",
    "doi",
    "licence",
    "temperature",
    "pressure",
    "energy-unit",
    "coverage",
    "gas-constant",
    "digits",
    "standing",
    "reference-states",
    "note",
    "extract-of",
];

/// Reads the `[source]` table of a text that holds nothing else.
pub(super) fn read_head_alone(text: &Text) -> Option<SourceHead> {
    let (head, _) = with_document(text, |document| {
        let table = document.root.table("source")?;
        Some(read_head(&table, text))
    });
    head
}

/// Reads the head. What is at fault in it is reported and left empty.
pub(super) fn read_head(table: &Table<'_, '_>, text: &Text) -> SourceHead {
    table.only(&HEAD_KEYS);
    let reader = table.reader();
    let owned = |key| table.string(key).map(|text| text.value);
    let temperature = table.string("temperature");
    let pressure = table.string("pressure");
    let id = table.required_string("id", "name the source as cases will consult it");
    let title = table.required_string("title", "give the title as it is cited");
    let coverage = table.string("coverage");
    let energy = table.string("energy-unit");
    let constant = table.string("gas-constant");
    SourceHead {
        id: checked_id(reader, id).unwrap_or_default(),
        title: title.map_or_else(String::new, |title| title.value),
        authors: read_authors(table),
        year: table.get("year").and_then(|value| value.word()),
        publisher: owned("publisher"),
        report: owned("report"),
        edition: owned("edition"),
        doi: owned("doi"),
        licence: owned("licence"),
        note: owned("note"),
        temperature: temperature.and_then(|text| read_temperature(reader, &text)),
        pressure: pressure.and_then(|text| measured(reader, &text, Dimension::PRESSURE)),
        energy_unit: energy.and_then(|text| read_energy_unit(reader, &text)),
        coverage: coverage
            .as_ref()
            .map_or(Coverage::default(), |text| read_coverage(reader, text)),
        coverage_text: coverage.map(|text| text.value),
        gas_constant: constant.and_then(|text| read_gas_constant(reader, &text)),
        digits: read_digits(table),
        standing: read_standing(table).unwrap_or(Standing::EnteredOnce),
        reference_states: read_reference_states(table),
        sha256: owned("extract-of").unwrap_or_else(|| sha256_hex(text.as_str().as_bytes())),
    }
}

/// The unit of the table's energies, which are molar.
pub(super) fn read_energy_unit(reader: &Reader<'_>, text: &Located<String>) -> Option<Unit> {
    let read = unit(reader, text)?;
    let molar = Dimension::ENERGY.over(Dimension::AMOUNT);
    if read.dimension() == molar {
        return Some(read);
    }
    wrong_dimension(reader, text, &read.dimension().to_string(), molar);
    None
}

fn checked_id(reader: &Reader<'_>, id: Option<Located<String>>) -> Option<String> {
    let id = id?;
    let fits = |c: char| c.is_ascii_lowercase() || c.is_ascii_digit() || "-.".contains(c);
    if id.value.is_empty() || !id.value.chars().all(fits) || id.value.starts_with('.') {
        value_fault(
            reader,
            &id.span,
            format!("\"{}\"", id.value),
            "an id of lower-case letters, digits, hyphens and points",
            "the id becomes the name of an attachment: choose a plain one",
        );
        return None;
    }
    Some(id.value)
}

/// One string, or an array of names.
fn read_authors(table: &Table<'_, '_>) -> Option<String> {
    let value = table.get("authors")?;
    if value.is_string() {
        return Some(value.string()?.value);
    }
    let names: Vec<String> = value.strings().into_iter().map(|a| a.value).collect();
    Some(names.join("; "))
}

fn read_coverage(reader: &Reader<'_>, text: &Located<String>) -> Coverage {
    Coverage::parse(&text.value).unwrap_or_else(|error| {
        value_fault(
            reader,
            &text.span,
            error.found(),
            error.expected(),
            error.advice(),
        );
        Coverage::default()
    })
}

/// R in J/(mol K). The oldest tables that give joules have 8.3136 (from memory), so the bounds leave
/// room for every one that was in use and for none in another unit.
fn read_gas_constant(reader: &Reader<'_>, text: &Located<String>) -> Option<Decimal> {
    let number = text.value.split(' ').next().unwrap_or_default();
    if number != text.value && Decimal::parse(number).is_ok() {
        value_fault(
            reader,
            &text.span,
            format!("\"{}\"", text.value),
            "a gas constant in J/(mol K), as a number alone",
            format!("write \"{number}\"; convert it where it is in another unit"),
        );
        return None;
    }
    let read = read_decimal(reader, text)?;
    let bounds = [830, 833].map(|hundredths: i32| Exact::new(hundredths.into(), 100.into()));
    if (&bounds[0]..=&bounds[1]).contains(&&read.value()) {
        return Some(read);
    }
    value_fault(
        reader,
        &text.span,
        format!("\"{}\"", text.value),
        "a gas constant in J/(mol K), near 8.314",
        "give the R that the functions were fitted with (NASA TM-4513: 8.31451)",
    );
    None
}

fn read_digits(table: &Table<'_, '_>) -> Digits {
    const CHOICES: [(&str, Digits); 2] = [
        ("significant", Digits::Significant),
        ("fixed-decimals", Digits::FixedDecimals),
    ];
    let text = table.string("digits");
    text.and_then(|text| one_of(table.reader(), &text, &CHOICES))
        .unwrap_or(Digits::Significant)
}

/// The standing that a table states, where it states one.
pub(super) fn read_standing(table: &Table<'_, '_>) -> Option<Standing> {
    let choices = Standing::ALL.map(|standing| (standing.word(), standing));
    one_of(table.reader(), &table.string("standing")?, &choices)
}

fn read_reference_states(table: &Table<'_, '_>) -> Vec<(Element, Species)> {
    let Some(states) = table.table("reference-states") else {
        return Vec::new();
    };
    let mut read = Vec::new();
    for (symbol, value) in states.entries() {
        let state = value.string().and_then(|s| species(states.reader(), &s));
        match (Element::from_symbol(&symbol.value), state) {
            (Some(element), Some(state)) => read.push((element, state)),
            (None, _) => value_fault(
                states.reader(),
                &symbol.span,
                format!("`{}`", symbol.value),
                "the symbol of an element",
                "write it as P = \"P(cr, white)\"",
            ),
            _ => {}
        }
    }
    read
}
