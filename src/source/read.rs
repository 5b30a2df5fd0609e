//! Reading a source file in the project's own format.
//!
//! Leaves to others: the head, an entry, a correlation.

use std::collections::BTreeMap;

use crate::document::{Document, Reader, Table, value_fault, with_document};
use crate::finding::{FaultCode, Faults, Span, Text};
use crate::quantity::{Quantity, StatedUncertainty};

use super::model::{Entry, Erratum, SourceHead};
use super::read_correlation::read_correlations;
use super::read_entry::{EntryRules, read_entry};
use super::read_head::read_head;
use super::store::Source;

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

fn read_erratum(table: &Table<'_, '_>) -> Option<Erratum> {
    table.only(&["text", "date", "authority", "substance"]);
    let text = table.required_string("text", "say what was corrected")?;
    Some(Erratum {
        text: text.value,
        date: table.string("date").map(|d| d.value),
        authority: table.string("authority").map(|a| a.value),
    })
}
