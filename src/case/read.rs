//! Reading a case, table by table.

use indexmap::IndexMap;

use crate::document::{Table, with_document};
use crate::finding::{FaultCode, Faults, Text};

use super::assumptions::read_assumptions;
use super::cycle_references::report_rings;
use super::cycles::{Surroundings, read_cycles};
use super::heating_values::read_heating_values;
use super::ids::{IdKind, Ids};
use super::inputs::read_inputs;
use super::model::Case;
use super::output::{read_rounding, read_units};
use super::prose::read_prose;
use super::reactions::read_reactions;
use super::record::read_record;
use super::results::Results;
use super::sources::{read_choices, read_consult};
use super::substances::read_substances;

/// What a case is called in findings, whatever its file is called.
pub const CASE_NAME: &str = "case.toml";

const TABLES: [&str; 11] = [
    "record",
    "prose",
    "assumptions",
    "sources",
    "substances",
    "inputs",
    "reactions",
    "cycles",
    "heating-values",
    "rounding",
    "units",
];

/// Tables of the case format that this version does not work.
const NOT_WORKED: [&str; 4] = ["streams", "balances", "adiabatic", "criteria"];

/// Reads a case. Where there are faults it holds what could be read in spite of them, so that the
/// rest can be checked as well; such a case is not to be worked.
pub fn read_case(text: &Text) -> (Option<Case>, Faults) {
    with_document(text, |document| read_root(&document.root))
}

fn read_root(root: &Table<'_, '_>) -> Option<Case> {
    refuse_unworked(root);
    let mut known = TABLES.to_vec();
    known.extend(NOT_WORKED);
    root.only(&known);
    let substances = root.table("substances");
    let inputs = root.table("inputs");
    let reactions = root.table("reactions");
    let cycles = root.table("cycles");
    let fuels = root.table("heating-values");
    let mut ids = Ids::default();
    ids.take(substances.as_ref(), IdKind::Substance);
    ids.take(inputs.as_ref(), IdKind::Input);
    ids.take(reactions.as_ref(), IdKind::Reaction);
    ids.take(cycles.as_ref(), IdKind::Cycle);
    ids.take(fuels.as_ref(), IdKind::HeatingValue);

    let record = root.table("record");
    if record.is_none() {
        root.missing(
            "record",
            "begin the case with a [record] table: number, revision, title, …",
        );
    }
    let record = record.map(|table| read_record(&table));
    let inputs = inputs.map_or_else(IndexMap::new, |t| read_inputs(&t));
    let substances = substances.map_or_else(IndexMap::new, |t| read_substances(&t, &ids, &inputs));
    let tables = [&reactions, &cycles, &fuels].into_iter().flatten();
    let stated: usize = tables.map(|table| table.entries().len()).sum();
    let reactions = match reactions {
        Some(table) => read_reactions(&table, &ids, &inputs, &substances),
        None if cycles.is_some() || fuels.is_some() => IndexMap::new(),
        None => {
            root.missing(
                "reactions",
                "add a reaction: [reactions.NAME] with its equation",
            );
            IndexMap::new()
        }
    };
    let heating_values = fuels.map_or_else(IndexMap::new, |table| {
        read_heating_values(&table, &ids, &inputs, &substances)
    });
    let mut results = Results::default();
    results.add_reactions(&reactions);
    results.add_heating_values(&heating_values);
    results.add_cycles(cycles.as_ref());
    let around = Surroundings {
        ids: &ids,
        inputs: &inputs,
        substances: &substances,
        results: &results,
    };
    let read_cycles = read_cycles(cycles.as_ref(), &around);
    report_rings(root.reader(), &read_cycles);
    let units = read_units(root.table("units").as_ref());
    let sources = root.table("sources");
    if sources.is_none() {
        root.missing(
            "sources",
            "add [sources] with consult = [\"codata-1989\", \"nasa-glenn-2021\"]",
        );
    }
    let mut choices = read_choices(sources.as_ref());
    let mut assumptions = read_assumptions(root, &ids);
    if reactions.len() + read_cycles.len() + heating_values.len() < stated {
        // They may be for a substance of an equation or a fuel that could not be read.
        choices.clear();
        for assumption in &mut assumptions {
            assumption.allows.clear();
        }
    }
    Some(Case {
        prose: read_prose(root.table("prose").as_ref(), &ids, &results),
        assumptions,
        consult: read_consult(sources.as_ref()),
        choices,
        rounding: read_rounding(root.table("rounding").as_ref(), &ids, &results),
        record: record?,
        substances,
        inputs,
        reactions,
        cycles: read_cycles,
        heating_values,
        units,
    })
}

fn refuse_unworked(root: &Table<'_, '_>) {
    for key in NOT_WORKED {
        let Some(value) = root.get(key) else { continue };
        root.reader().fault(
            FaultCode::NotWorked,
            &value.key_span,
            format!("[{key}]"),
            "tables that this version works: heats of reaction at the reference temperature",
            "remove the table, or use a version that works it; nothing is left out silently",
        );
    }
}
