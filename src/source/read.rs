//! Reading a source file in the project's own format.

use std::collections::{BTreeMap, BTreeSet};

use num_traits::Signed;
use sha2::{Digest, Sha256};

use crate::document::{Document, Reader, Table, one_of, quantity, unit, value_fault};
use crate::document::{species, with_document};
use crate::finding::{FaultCode, Faults, Located, Span, Text};
use crate::notation::Element;
use crate::quantity::{
    Coverage, Decimal, Dimension, Exact, Quantity, StatedUncertainty, Unit, UnitKind,
};

use super::model::{Digits, Entry, Erratum, SourceHead, StatedCorrelation};
use super::read_entry::{EntryRules, read_entry};
use super::standing::Standing;
use super::store::Source;

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

/// Where the text of a source comes from.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Provenance {
    /// A file as its author keeps it.
    Original,
    /// The attachment of a record, which a manifest vouches for; it names the SHA-256 of the
    /// whole file that its entries came from.
    Extract,
}

/// Reads a source file. The source is there only where no fault was found.
pub fn read_source(text: &Text, provenance: Provenance) -> (Option<Source>, Faults) {
    let (source, faults) = with_document(text, |document| {
        let source = read_document(document, text);
        check_provenance(&document.root, provenance);
        source
    });
    let source = if faults.is_empty() { source } else { None };
    (source, faults)
}

fn read_document(document: &Document<'_, '_>, text: &Text) -> Option<Source> {
    let root = &document.root;
    root.only(&["source", "entry", "correlation", "erratum"]);
    let Some(table) = root.table("source") else {
        root.missing(
            "source",
            "begin the file with a [source] table: id, title, …",
        );
        return None;
    };
    let head = read_head(&table, text);
    let rules = EntryRules::of(&head);
    let tables = root.tables("entry");
    let read = |table: &Table<'_, '_>| {
        let span = table.get("substance").map_or(0..0, |value| value.span());
        Some((span, read_entry(table, &rules)?))
    };
    let entries: Vec<(Span, Entry)> = tables.iter().filter_map(read).collect();
    refuse_repeated(document.reader, &entries);
    let entries: Vec<Entry> = entries.into_iter().map(|(_, entry)| entry).collect();
    require_for_entries(&table, &head, &entries);
    let correlations = read_correlations(root);
    let errata = root.tables("erratum");
    let errata = errata.iter().filter_map(read_erratum);
    Some(Source::listed(
        head,
        entries,
        correlations,
        errata.collect(),
    ))
}

/// Only a manifest vouches for the hash of a file that is not there.
fn check_provenance(root: &Table<'_, '_>, provenance: Provenance) {
    let Some(hash) = root
        .table("source")
        .and_then(|table| table.string("extract-of"))
    else {
        return;
    };
    let hex = |c: char| c.is_ascii_digit() || ('a'..='f').contains(&c);
    let is_hash = hash.value.len() == 64 && hash.value.chars().all(hex);
    if provenance == Provenance::Extract && is_hash {
        return;
    }
    value_fault(
        root.reader(),
        &hash.span,
        "`extract-of` in a file that no manifest vouches for",
        "a source file of its own, or an extracted one beside the manifest.json of its record",
        "remove the key: the file then stands under its own hash",
    );
}

/// Reads the `[source]` table of a text that holds nothing else.
pub(super) fn read_head_alone(text: &Text) -> Option<SourceHead> {
    let (head, _) = with_document(text, |document| {
        let table = document.root.table("source")?;
        Some(read_head(&table, text))
    });
    head
}

/// What the entries need the head to say, so that nothing about them is guessed.
fn require_for_entries(table: &Table<'_, '_>, head: &SourceHead, entries: &[Entry]) {
    let enthalpies = entries
        .iter()
        .any(|entry| entry.formation_enthalpy.is_some());
    if enthalpies && head.energy_unit.is_none() && table.get("energy-unit").is_none() {
        table.missing(
            "energy-unit",
            "add the unit that the table prints: energy-unit = \"kJ/mol\"",
        );
    }
    if enthalpies && head.temperature.is_none() && table.get("temperature").is_none() {
        table.missing(
            "temperature",
            "state the reference temperature: temperature = \"298.15 K\"",
        );
    }
    if entries.iter().any(states_expanded) && head.coverage_text.is_none() {
        table.missing(
            "coverage",
            "say what ± covers in this table: coverage = \"2\" for about 95 %",
        );
    }
    let mut functions = entries.iter().flat_map(|entry| &entry.heat_capacity);
    let fitted = functions.any(|function| function.form.needs_gas_constant());
    if fitted && head.gas_constant.is_none() && table.get("gas-constant").is_none() {
        table.missing(
            "gas-constant",
            "state the R that the functions were fitted with (NASA TM-4513: 8.31451)",
        );
    }
}

/// Whether an entry states an uncertainty that needs the coverage of the table.
fn states_expanded(entry: &Entry) -> bool {
    let values = [
        &entry.formation_enthalpy,
        &entry.combustion_enthalpy,
        &entry.atomic_weight,
    ];
    let heats = entry.transitions.iter().map(|t| &t.enthalpy);
    let mut stated = values.into_iter().flatten().chain(heats);
    let expanded = |q: &Quantity| matches!(q.uncertainty, Some(StatedUncertainty::Expanded { .. }));
    stated.any(expanded) || entry.heat_capacity.iter().any(|f| f.uncertainty.is_some())
}

/// Two entries that nothing tells apart would make each other useless.
fn refuse_repeated(reader: &Reader<'_>, entries: &[(Span, Entry)]) {
    let mut seen = BTreeMap::new();
    for (span, entry) in entries {
        let told_apart_by = (&entry.subject, &entry.name, &entry.cas);
        let Some(first) = seen.insert(told_apart_by, span) else {
            continue;
        };
        let line = reader.text().place(first.start).line;
        reader.fault(
            FaultCode::DuplicateId,
            span,
            "a second entry of this substance, name and CAS number",
            format!("one entry for it: the first stands in line {line}"),
            "gather the values in one entry; tell isomers apart by name or CAS number",
        );
    }
}

/// Reads the head. What is at fault in it is reported and left empty.
fn read_head(table: &Table<'_, '_>, text: &Text) -> SourceHead {
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

/// A temperature, not a difference of two.
pub(super) fn read_temperature(reader: &Reader<'_>, text: &Located<String>) -> Option<Quantity> {
    let read = measured(reader, text, Dimension::TEMPERATURE)?;
    if read.unit.kind() == UnitKind::Difference {
        wrong_dimension(
            reader,
            text,
            "a temperature difference",
            Dimension::TEMPERATURE,
        );
        return None;
    }
    above_zero_kelvin(reader, text, &read.value_in_si()).then_some(read)
}

/// Whether a temperature is above absolute zero; reported where it is not.
pub(super) fn above_zero_kelvin(
    reader: &Reader<'_>,
    text: &Located<String>,
    kelvin: &Exact,
) -> bool {
    let above = kelvin.is_positive();
    if !above {
        value_fault(
            reader,
            &text.span,
            format!("\"{}\"", text.value),
            "a temperature above 0 K",
            "check the sign and the unit; leave out a point at 0 K",
        );
    }
    above
}

/// A quantity that measures what is asked for.
pub(super) fn measured(
    reader: &Reader<'_>,
    text: &Located<String>,
    dimension: Dimension,
) -> Option<Quantity> {
    let read = quantity(reader, text)?.value;
    if read.unit.dimension() == dimension {
        return Some(read);
    }
    wrong_dimension(reader, text, &read.unit.dimension().to_string(), dimension);
    None
}

fn wrong_dimension(reader: &Reader<'_>, text: &Located<String>, found: &str, wanted: Dimension) {
    reader.fault(
        FaultCode::Quantity,
        &text.span,
        format!("\"{}\": {found}", text.value),
        wanted.to_string(),
        "check the unit that the table prints",
    );
}

/// The unit of the table's energies, which are molar.
fn read_energy_unit(reader: &Reader<'_>, text: &Located<String>) -> Option<Unit> {
    let read = unit(reader, text)?;
    let molar = Dimension::ENERGY.over(Dimension::AMOUNT);
    if read.dimension() == molar {
        return Some(read);
    }
    wrong_dimension(reader, text, &read.dimension().to_string(), molar);
    None
}

/// The SHA-256 of some bytes as 64 hexadecimal digits.
pub fn sha256_hex(bytes: &[u8]) -> String {
    let digest = Sha256::digest(bytes);
    digest.iter().map(|byte| format!("{byte:02x}")).collect()
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

/// A plain decimal number in a string.
pub(super) fn read_decimal(reader: &Reader<'_>, text: &Located<String>) -> Option<Decimal> {
    let decimal = Decimal::parse(&text.value);
    if let Err(error) = &decimal {
        value_fault(
            reader,
            &text.span,
            format!("\"{}\"", text.value),
            "a decimal number as printed",
            error.advice(),
        );
    }
    decimal.ok()
}

/// R in J/(mol K). The oldest tables that give joules have 8.3136 (from memory), so the bounds leave
/// room for every one that was in use and for none in another unit.
fn read_gas_constant(reader: &Reader<'_>, text: &Located<String>) -> Option<Decimal> {
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

fn read_reference_states(table: &Table<'_, '_>) -> Vec<(Element, crate::notation::Species)> {
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

/// Each pair once, and of two different values.
fn read_correlations(root: &Table<'_, '_>) -> Vec<StatedCorrelation> {
    let mut seen = BTreeSet::new();
    let mut read = Vec::new();
    for table in root.tables("correlation") {
        let Some(stated) = read_correlation(&table) else {
            continue;
        };
        let mut pair = stated.between.each_ref().map(|species| species.to_string());
        pair.sort();
        if pair[0] == pair[1] || !seen.insert(pair) {
            value_fault(
                root.reader(),
                &table.span,
                "a correlation of a value with itself, or a second one for the same pair",
                "one coefficient for each pair of values",
                "remove one of the two, or mend its `between`",
            );
        }
        read.push(stated);
    }
    read
}

fn read_correlation(table: &Table<'_, '_>) -> Option<StatedCorrelation> {
    table.only(&["between", "coefficient", "locator", "note"]);
    let reader = table.reader();
    let between: Vec<_> = table
        .strings("between")
        .iter()
        .filter_map(|s| species(reader, s))
        .collect();
    let coefficient = table.required_string("coefficient", "state r, between -1 and 1")?;
    let decimal = read_decimal(reader, &coefficient)?;
    let one = Exact::from_integer(1.into());
    if decimal.value() > one || decimal.value() < -one {
        value_fault(
            reader,
            &coefficient.span,
            format!("\"{}\"", coefficient.value),
            "a correlation coefficient from -1 to 1",
            "check the number in the source",
        );
        return None;
    }
    let Ok(between) = <[_; 2]>::try_from(between) else {
        table.missing(
            "between",
            "name the two substances: between = [\"H2O(l)\", \"H2O(g)\"]",
        );
        return None;
    };
    Some(StatedCorrelation {
        between,
        coefficient: decimal,
    })
}

fn read_erratum(table: &Table<'_, '_>) -> Option<Erratum> {
    table.only(&["text", "date", "authority", "substance"]);
    let text = table.required_string("text", "say what was corrected")?;
    Some(Erratum {
        text: text.value,
        date: table.string("date").map(|d| d.value),
        authority: table.string("authority").map(|a| a.value),
    })
}
