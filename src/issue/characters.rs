//! Characters that the pages cannot hold, found before typesetting and named with their line.

use serde_json::Value;

use crate::calculation::Calculation;
use crate::document::with_document;
use crate::finding::{Fault, FaultCode, Located, Text};
use crate::record::Pages;
use crate::source::SourceFiles;
use crate::typeset::uncovered;

/// A fault for each string of the case, or of its sources, that holds such a character; none
/// where the pages hold none.
pub(super) fn faults(
    pages: &Pages,
    calculation: &Calculation,
    files: &dyn SourceFiles,
) -> Vec<Fault> {
    // The pages are a structure of strings, numbers and lists.
    let pages = serde_json::to_value(pages).expect("pages have a JSON form");
    if !holds_uncovered(&pages) {
        return Vec::new();
    }
    let mut faults = in_text(&calculation.text);
    for (name, _) in &calculation.problem.became {
        if let Some(Ok(text)) = files.text(name) {
            faults.extend(in_text(&text));
        }
    }
    faults
}

fn holds_uncovered(value: &Value) -> bool {
    match value {
        Value::String(text) => uncovered(text).is_some(),
        Value::Array(values) => values.iter().any(holds_uncovered),
        Value::Object(map) => map.values().any(holds_uncovered),
        _ => false,
    }
}

fn in_text(text: &Text) -> Vec<Fault> {
    let (strings, _) = with_document(text, |document| document.root.all_strings());
    let fault = |string: &Located<String>| {
        let (at, character) = uncovered(&string.value)?;
        let end = at + character.len_utf8();
        Some(Fault::new(
            FaultCode::Character,
            text,
            &text.inside(&string.span, &(at..end)),
            name(character),
            "characters that the record's fonts can show",
            "write it in other words or letters; a control character may have come in by copying",
        ))
    };
    strings.iter().filter_map(fault).collect()
}

fn name(character: char) -> String {
    let code = format!("U+{:04X}", u32::from(character));
    match character.is_control() || character.is_whitespace() {
        true => format!("the character {code}"),
        false => format!("the character {character} ({code})"),
    }
}
