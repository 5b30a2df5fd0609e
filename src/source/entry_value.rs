//! A value of an entry, with its origin.

use crate::finding::Span;
use crate::quantity::{InputUncertainty, Quantity};

use super::model::{Entry, SourceHead, Subject};
use super::problem::{ValueKind, ValueUsed};

/// An entry's value with its origin; its digits are those that it prints.
pub(super) fn value_of(
    source: usize,
    head: &SourceHead,
    kind: ValueKind,
    entry: &Entry,
    printed: Quantity,
    span: &Span,
) -> ValueUsed {
    ValueUsed {
        source,
        kind,
        substance: match &entry.subject {
            Subject::Species(species) => species.to_string(),
            Subject::Symbol(symbol) => symbol.clone(),
        },
        species: entry.species().cloned(),
        name: entry.name.clone(),
        cas: entry.cas.clone(),
        significance: printed.significance(),
        uncertainty: input_uncertainty(&printed, head),
        printed,
        function: None,
        made_of: Vec::new(),
        locator: entry.locator.clone(),
        note: entry.note.clone(),
        standing: entry.standing,
        used_at: span.clone(),
    }
}

fn input_uncertainty(printed: &Quantity, head: &SourceHead) -> InputUncertainty {
    match &printed.uncertainty {
        _ if printed.exact => InputUncertainty::Exact,
        None => InputUncertainty::NotStated,
        Some(stated) => InputUncertainty::Standard(stated.standard(&head.coverage)),
    }
}
