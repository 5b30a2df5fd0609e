//! The reference list: every source from which a value was used or compared.

use std::collections::BTreeMap;

use crate::quantity::Quantity;
use crate::source::{Problem, SourceHead, attachment_name};

use super::pages::Reference;

/// The number of each source in the reference list, by its index among the problem's sources.
pub(super) fn numbers(problem: &Problem) -> BTreeMap<usize, usize> {
    let used = problem.values.iter().map(|value| value.source);
    let compared = problem
        .substances
        .iter()
        .flat_map(|s| s.comparisons.iter().map(|c| c.source));
    let mut cited: Vec<usize> = used.chain(compared).collect();
    cited.sort_unstable();
    cited.dedup();
    cited.into_iter().zip(1..).collect()
}

pub(super) fn references(problem: &Problem) -> Vec<Reference> {
    let row = |(index, number): (usize, usize)| reference(&problem.sources[index].head, number);
    numbers(problem).into_iter().map(row).collect()
}

fn reference(head: &SourceHead, number: usize) -> Reference {
    let stated = |quantity: &Option<Quantity>| {
        quantity
            .as_ref()
            .map_or_else(|| "not stated".to_string(), Quantity::to_string)
    };
    Reference {
        number,
        id: head.id.clone(),
        text: match &head.note {
            Some(note) => format!("{} {note}", head.citation()),
            None => head.citation(),
        },
        temperature: stated(&head.temperature),
        pressure: stated(&head.pressure),
        licence: head.licence.clone(),
        sha256: head.sha256.clone(),
        attachment: attachment_name(&head.id),
    }
}
