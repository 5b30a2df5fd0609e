//! Reading `[sources]`: which are consulted, in which order, and what was chosen.

use crate::document::{Table, value_fault};
use crate::finding::Located;

use super::model::Choice;

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
    let consult = table.strings("consult");
    for (index, text) in consult.iter().enumerate() {
        if consult[..index]
            .iter()
            .any(|earlier| earlier.value == text.value)
        {
            value_fault(
                table.reader(),
                &text.span,
                format!("\"{}\" a second time", text.value),
                "each source once, in order of preference",
                "remove one of the two",
            );
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
