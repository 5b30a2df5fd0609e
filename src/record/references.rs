//! The reference list: every source from which a value was used or compared.

use std::collections::BTreeMap;

use crate::case::CASE_NAME;
use crate::quantity::Quantity;
use crate::source::{CASE, Problem, SourceHead, attachment_name};

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
    let silent = match head.id.as_str() {
        CASE => "as each statement says",
        _ => "not stated",
    };
    let stated = |quantity: &Option<Quantity>| {
        let text = quantity.as_ref().map(Quantity::to_string);
        text.unwrap_or_else(|| silent.to_string())
    };
    Reference {
        number,
        id: head.id.clone(),
        text: text(head),
        temperature: stated(&head.temperature),
        pressure: stated(&head.pressure),
        licence: head.licence.clone(),
        sha256: head.sha256.clone(),
        attachment: attachment(&head.id),
    }
}

fn attachment(id: &str) -> String {
    match id {
        CASE => CASE_NAME.to_string(),
        _ => attachment_name(id),
    }
}

/// Citation, what its uncertainties cover, and the note of the source file.
fn text(head: &SourceHead) -> String {
    let coverage = head.coverage_text.as_ref().map(|text| match text.as_str() {
        "bounds" => "Its uncertainties (±) are bounds, read as u = a/√3.".to_string(),
        k => format!("Its uncertainties (±) are read with k = {k}."),
    });
    let parts = [Some(head.citation()), coverage, head.note.clone()];
    parts.into_iter().flatten().collect::<Vec<_>>().join(" ")
}
