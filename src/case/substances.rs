//! Reading `[substances]`.

use indexmap::IndexMap;

use crate::document::{Table, cas_number, notation_fault, quantity, value_fault};
use crate::finding::Located;
use crate::notation::{Formula, Phase};

use super::heat_capacity::{CaseHeatCapacity, HeatCapacityReader};
use super::ids::Ids;
use super::model::{DeclaredKind, DeclaredSubstance, Input};

const KEYS: [&str; 8] = [
    "formula",
    "phase",
    "name",
    "cas",
    "inert",
    "specific-heat-capacity",
    "heat-capacity",
    "source",
];

pub(super) fn read_substances(
    table: &Table<'_, '_>,
    ids: &Ids,
    inputs: &IndexMap<String, Input>,
) -> IndexMap<String, DeclaredSubstance> {
    let mut substances = IndexMap::new();
    for (id, value) in table.entries() {
        let substance = value
            .table()
            .and_then(|table| read_substance(&table, id, ids, inputs));
        if let Some(substance) = substance {
            substances.insert(substance.id.value.clone(), substance);
        }
    }
    substances
}

fn read_substance(
    table: &Table<'_, '_>,
    id: Located<String>,
    ids: &Ids,
    inputs: &IndexMap<String, Input>,
) -> Option<DeclaredSubstance> {
    table.only(&KEYS);
    let inert = table.boolean("inert").is_some_and(|b| b.value);
    let name = table.string("name").map(|t| t.value);
    let cas = table.string("cas");
    let cas = cas.and_then(|text| cas_number(table.reader(), &text));
    let (kind, heat_capacity) = if inert {
        (read_inert(table), None)
    } else {
        read_compound(table, ids, inputs)?
    };
    Some(DeclaredSubstance {
        id,
        kind,
        name,
        cas,
        heat_capacity,
    })
}

fn read_inert(table: &Table<'_, '_>) -> DeclaredKind {
    if let Some(text) = table.string("specific-heat-capacity") {
        quantity(table.reader(), &text);
    }
    for key in ["formula", "phase", "heat-capacity"] {
        if let Some(value) = table.get(key) {
            value_fault(
                table.reader(),
                &value.key_span,
                format!("`{key}` of a substance that is declared inert"),
                "a name and a specific-heat-capacity alone for what is inert",
                "leave it out, or leave `inert` out",
            );
        }
    }
    DeclaredKind::Inert
}

fn read_compound(
    table: &Table<'_, '_>,
    ids: &Ids,
    inputs: &IndexMap<String, Input>,
) -> Option<(DeclaredKind, Option<CaseHeatCapacity>)> {
    let reader = table.reader();
    let formula = table.required_string("formula", "give the formula: formula = \"C6H7N\"");
    let phase = table.required_string("phase", "give the phase: g, l, s, cr, am, vit or aq");
    let formula = formula.and_then(|text| {
        Formula::parse(&text.value)
            .map_err(|error| notation_fault(reader, &text, &error))
            .ok()
    });
    let phase = phase.and_then(|text| {
        Phase::parse(&text.value)
            .map_err(|error| notation_fault(reader, &text, &error))
            .ok()
    });
    let heat_capacity = HeatCapacityReader {
        ids,
        inputs,
        formula: formula.as_ref(),
        phase: phase.as_ref(),
    };
    let heat_capacity = heat_capacity.read(table);
    let kind = DeclaredKind::Compound {
        formula: formula?,
        phase: phase?,
    };
    Some((kind, heat_capacity))
}
