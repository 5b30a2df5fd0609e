//! Reading `[sources]`: which are consulted, in which order, and what was chosen.

use crate::document::{Table, filled, value_fault};
use crate::finding::Located;

use super::model::Choice;

/// The sources in their order; none where one of them could not be read, because the others alone
/// would answer differently.
pub(super) fn read_consult(table: Option<&Table<'_, '_>>) -> Vec<Located<String>> {
    let Some(table) = table else {
        return Vec::new();
    };
    table.only(&["consult", "choose"]);
    if table.get("consult").is_none() {
        table.missing(
            "consult",
            "list the sources in order: consult = [\"codata-1989\"]",
        );
    }
    let named = table.strings("consult");
    if named.len() < table.get("consult").map_or(0, |value| value.count()) {
        return Vec::new();
    }
    let mut consult: Vec<Located<String>> = Vec::new();
    for text in named {
        if consult.iter().any(|earlier| earlier.value == text.value) {
            value_fault(
                table.reader(),
                &text.span,
                format!("\"{}\" a second time", text.value),
                "each source once, in order of preference",
                "remove one of the two",
            );
        } else {
            consult.push(text);
        }
    }
    consult
}

pub(super) fn read_choices(table: Option<&Table<'_, '_>>) -> Vec<Choice> {
    let Some(table) = table.and_then(|table| table.table("choose")) else {
        return Vec::new();
    };
    let mut choices = Vec::new();
    for (substance, value) in table.entries() {
        let Some(table) = value.table() else { continue };
        table.only(&["source", "because"]);
        let source = table.required_string("source", "name the source that serves");
        let because = table.required_string("because", "say why this source and not the other");
        let because = because.and_then(|text| filled(table.reader(), text));
        if let (Some(source), Some(because)) = (source, because) {
            choices.push(Choice {
                substance,
                source,
                because: because.value,
            });
        }
    }
    choices
}
