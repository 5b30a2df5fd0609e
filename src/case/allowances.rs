//! What an assumption of the case allows: a working beyond a limit that would be a stop.
//!
//! This module reads the names and finds them again. Which check asks for which allowance, and
//! what it then says, is the business of the check.

use crate::document::{Table, Value, is_id, notation_fault, value_fault};
use crate::finding::Located;
use crate::notation::Species;

use super::ids::{IdKind, Ids};
use super::model::{Assumption, Case};

/// Which limit an assumption lets the working cross.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum AllowedKind {
    /// A heat-capacity function of a substance outside its range.
    Extrapolation,
    /// Values at infinite dilution for a reaction in a solution of more than 1 mol/kg.
    InfiniteDilution,
}

impl AllowedKind {
    const ALL: [AllowedKind; 2] = [AllowedKind::Extrapolation, AllowedKind::InfiniteDilution];

    /// The key under `allows`.
    pub fn word(self) -> &'static str {
        match self {
            AllowedKind::Extrapolation => "extrapolation",
            AllowedKind::InfiniteDilution => "infinite-dilution",
        }
    }
}

/// One limit that an assumption lets the working cross, for one substance or reaction.
#[derive(Clone, Debug)]
pub struct Allowance {
    pub kind: AllowedKind,
    /// A substance as equations write it, or the id of a reaction.
    pub name: Located<String>,
}

impl Case {
    /// The assumption that allows a thing by name, the first where there are several.
    pub fn allowed(&self, kind: AllowedKind, name: &str) -> Option<&Assumption> {
        let fits = |allowance: &Allowance| allowance.kind == kind && allowance.name.value == name;
        self.assumptions
            .iter()
            .find(|assumption| assumption.allows.iter().any(fits))
    }
}

/// Reads `allows = { extrapolation = ["aniline"], infinite-dilution = ["neutralisation"] }`.
pub(super) fn read_allowances(assumption: &Table<'_, '_>, ids: &Ids) -> Vec<Allowance> {
    let Some(table) = assumption.table("allows") else {
        return Vec::new();
    };
    table.only(&AllowedKind::ALL.map(AllowedKind::word));
    let basis = assumption.string("basis");
    if basis.is_none_or(|basis| basis.value.trim().is_empty()) {
        value_fault(
            table.reader(),
            &table.span,
            "an allowance without a basis",
            "the basis of the assumption that a check gives way to",
            "say in `basis` why the working still holds there",
        );
    }
    let of_kind = |kind: AllowedKind| {
        let value = table.get(kind.word());
        value.map_or_else(Vec::new, |value| read_names(&value, kind, ids))
    };
    AllowedKind::ALL.into_iter().flat_map(of_kind).collect()
}

fn read_names(value: &Value<'_, '_>, kind: AllowedKind, ids: &Ids) -> Vec<Allowance> {
    let names = value.strings();
    let read = |text: Located<String>| {
        let name = match kind {
            AllowedKind::Extrapolation => read_substance(value, text, ids),
            AllowedKind::InfiniteDilution => read_reaction(value, text, ids),
        };
        Some(Allowance { kind, name: name? })
    };
    names.into_iter().filter_map(read).collect()
}

/// A declared substance, or a species in the one way that equations print it. Whether it takes
/// part in anything is seen when the case is resolved.
fn read_substance(
    value: &Value<'_, '_>,
    text: Located<String>,
    ids: &Ids,
) -> Option<Located<String>> {
    let reader = value.reader();
    if is_id(&text.value) {
        return known(value, text, ids, IdKind::Substance);
    }
    match Species::parse(&text.value) {
        Ok(species) => Some(Located::new(species.to_string(), text.span)),
        Err(error) => {
            notation_fault(reader, &text, &error);
            None
        }
    }
}

fn read_reaction(
    value: &Value<'_, '_>,
    text: Located<String>,
    ids: &Ids,
) -> Option<Located<String>> {
    known(value, text, ids, IdKind::Reaction)
}

fn known(
    value: &Value<'_, '_>,
    text: Located<String>,
    ids: &Ids,
    kind: IdKind,
) -> Option<Located<String>> {
    if ids.kind(&text.value) == Some(kind) {
        return Some(text);
    }
    ids.unknown(value.reader(), &text.value, &text.span, &[kind]);
    None
}
