//! Reading `[substances]`.

use indexmap::IndexMap;

use crate::document::{Table, cas_number, notation_fault, quantity, value_fault};
use crate::finding::Located;
use crate::notation::{Formula, Phase};

use super::model::{DeclaredKind, DeclaredSubstance};

const KEYS: [&str; 7] = [
    "formula",
    "phase",
    "name",
    "cas",
    "inert",
    "specific-heat-capacity",
    "source",
];

pub(super) fn read_substances(table: &Table<'_, '_>) -> IndexMap<String, DeclaredSubstance> {
    let mut substances = IndexMap::new();
    for (id, value) in table.entries() {
        let substance = value.table().and_then(|table| read_substance(&table, id));
        if let Some(substance) = substance {
            substances.insert(substance.id.value.clone(), substance);
        }
    }
    substances
}

fn read_substance(table: &Table<'_, '_>, id: Located<String>) -> Option<DeclaredSubstance> {
    table.only(&KEYS);
    let inert = table.boolean("inert").is_some_and(|b| b.value);
    let name = table.string("name").map(|t| t.value);
    let cas = table.string("cas");
    let cas = cas.and_then(|text| cas_number(table.reader(), &text));
    let kind = if inert {
        read_inert(table)
    } else {
        read_compound(table)?
    };
    Some(DeclaredSubstance {
        id,
        kind,
        name,
        cas,
    })
}

fn read_inert(table: &Table<'_, '_>) -> DeclaredKind {
    if let Some(text) = table.string("specific-heat-capacity") {
        quantity(table.reader(), &text);
    }
    for key in ["formula", "phase"] {
        if let Some(value) = table.get(key) {
            value_fault(
                table.reader(),
                &value.key_span,
                format!("`{key}` of a substance that is declared inert"),
                "a name and a heat capacity alone for what is inert",
                "leave it out, or leave `inert` out",
            );
        }
    }
    DeclaredKind::Inert
}

fn read_compound(table: &Table<'_, '_>) -> Option<DeclaredKind> {
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
    Some(DeclaredKind::Compound {
        formula: formula?,
        phase: phase?,
    })
}
