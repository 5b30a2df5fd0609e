//! Reading `[substances]`.

use indexmap::IndexMap;

use crate::document::{Table, notation_fault, quantity, value_fault};
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
    let cas = cas.and_then(|text| read_cas(table, text));
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

/// A CAS number has its own check digit: the digits before it, weighted 1, 2, 3 … from the right,
/// add up to it modulo 10 (CAS Registry, check digit verification).
fn read_cas(table: &Table<'_, '_>, text: Located<String>) -> Option<String> {
    if is_cas(&text.value) {
        return Some(text.value);
    }
    value_fault(
        table.reader(),
        &text.span,
        format!("\"{}\"", text.value),
        "a CAS number such as 7732-18-5, whose last digit checks the others",
        "compare it with the sheet that it comes from",
    );
    None
}

fn is_cas(text: &str) -> bool {
    let parts: Vec<&str> = text.split('-').collect();
    let [first, second, check] = parts[..] else {
        return false;
    };
    let all_digits = parts.iter().all(|p| p.bytes().all(|b| b.is_ascii_digit()));
    let lengths = (2..=7).contains(&first.len()) && second.len() == 2 && check.len() == 1;
    if !all_digits || !lengths {
        return false;
    }
    let digits = first
        .bytes()
        .chain(second.bytes())
        .map(|b| u32::from(b - b'0'));
    let digits: Vec<u32> = digits.collect();
    let weighted = digits
        .iter()
        .rev()
        .zip(1..)
        .map(|(digit, weight)| digit * weight);
    weighted.sum::<u32>() % 10 == u32::from(check.as_bytes()[0] - b'0')
}

#[cfg(test)]
mod tests {
    use super::is_cas;

    /// Water, aniline and nitrobenzene as their suppliers print them.
    #[test]
    fn the_check_digit_decides() {
        for good in ["7732-18-5", "62-53-3", "98-95-3"] {
            assert!(is_cas(good), "{good}");
        }
        for bad in ["7732-18-4", "62-53", "98-95-33", "a2-53-3", "", "--"] {
            assert!(!is_cas(bad), "{bad}");
        }
    }
}
