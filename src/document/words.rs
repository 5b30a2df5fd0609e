//! Small typed readings that case and source files share: quantities, formulas, dates.

use std::fmt::Display;

use crate::finding::{FaultCode, Located, Span, nearest, shorten};
use crate::notation::{NotationError, Species};
use crate::quantity::{Quantity, QuantityError, StatedUncertainty, Unit, order_of_magnitude};

use super::reader::Reader;

/// A quantity with its unit, `"-285.830 kJ/mol"`.
pub fn quantity(reader: &Reader<'_>, text: &Located<String>) -> Option<Located<Quantity>> {
    match Quantity::parse(&text.value) {
        Ok(quantity) => sizeable(reader, text, quantity),
        Err(error) => quantity_fault(reader, text, &error),
    }
}

/// A number without a unit, `"-285.830 ± 0.040"`.
pub fn number(reader: &Reader<'_>, text: &Located<String>) -> Option<Located<Quantity>> {
    match Quantity::parse_number(&text.value) {
        Ok(quantity) => sizeable(reader, text, quantity),
        Err(error) => quantity_fault(reader, text, &error),
    }
}

/// Powers of ten beyond which results and their uncertainties would leave floating point.
const FARTHEST: i64 = 100;

fn sizeable(
    reader: &Reader<'_>,
    text: &Located<String>,
    quantity: Quantity,
) -> Option<Located<Quantity>> {
    let widths = quantity.uncertainty.iter().map(StatedUncertainty::width);
    let sizes = widths
        .cloned()
        .chain([quantity.value_in_si(), quantity.decimal.value()]);
    let mut orders = sizes.filter_map(|size| order_of_magnitude(&size));
    if orders.all(|order| order.abs() <= FARTHEST) {
        return Some(Located::new(quantity, text.span.clone()));
    }
    value_fault(
        reader,
        &text.span,
        format!("\"{}\"", shorten(&text.value, 60)),
        format!("sizes between 1e-{FARTHEST} and 1e{FARTHEST}"),
        "check the exponent",
    );
    None
}

fn quantity_fault<T>(
    reader: &Reader<'_>,
    text: &Located<String>,
    error: &QuantityError,
) -> Option<T> {
    let span = inside(reader, text, error.span());
    reader.fault(
        FaultCode::Quantity,
        &span,
        error.found(),
        error.expected(),
        error.advice(),
    );
    None
}

/// The place of a part of a string; the whole literal where the part is not known.
fn inside(reader: &Reader<'_>, text: &Located<String>, part: Option<Span>) -> Span {
    match part {
        Some(part) => reader.text().inside(&text.span, &part),
        None => text.span.clone(),
    }
}

/// A unit of a given kind.
pub fn unit(reader: &Reader<'_>, text: &Located<String>) -> Option<Unit> {
    match Unit::parse(&text.value) {
        Ok(unit) => Some(unit),
        Err(error) => quantity_fault(reader, text, &QuantityError::from(error)),
    }
}

/// A substance in a phase, `"CaCO3(cr, calcite)"`.
pub fn species(reader: &Reader<'_>, text: &Located<String>) -> Option<Species> {
    match Species::parse(&text.value) {
        Ok(species) => Some(species),
        Err(error) => {
            notation_fault(reader, text, &error);
            None
        }
    }
}

/// Reports what is wrong with a formula or an equation, at its place in the literal.
pub fn notation_fault(reader: &Reader<'_>, text: &Located<String>, error: &NotationError) {
    let span = reader.text().inside(&text.span, &error.span);
    reader.fault(
        FaultCode::Notation,
        &span,
        error.found(),
        error.expected(),
        error.advice(),
    );
}

/// One word out of a list; `names` are the words in the order that messages show.
pub fn one_of<T: Copy>(
    reader: &Reader<'_>,
    text: &Located<String>,
    choices: &[(&str, T)],
) -> Option<T> {
    let found = choices.iter().find(|(word, _)| *word == text.value);
    if found.is_none() {
        let words: Vec<&str> = choices.iter().map(|(word, _)| *word).collect();
        let advice = match nearest(&text.value, words.iter().copied(), 1).first() {
            Some(near) => format!("did you mean \"{near}\"?"),
            None => "use one of these words".to_string(),
        };
        value_fault(
            reader,
            &text.span,
            format!("\"{}\"", text.value),
            format!("one of: {}", words.join(", ")),
            advice,
        );
    }
    found.map(|(_, value)| *value)
}

/// Words that have to be there.
pub fn filled(reader: &Reader<'_>, text: Located<String>) -> Option<Located<String>> {
    if text.value.trim().is_empty() {
        value_fault(reader, &text.span, "an empty text", "words", "fill it in");
        return None;
    }
    Some(text)
}

/// A fault of a value that is well-formed and still cannot be.
pub fn value_fault(
    reader: &Reader<'_>,
    span: &Span,
    found: impl Display,
    expected: impl Into<String>,
    advice: impl Into<String>,
) {
    reader.fault(FaultCode::Value, span, found.to_string(), expected, advice);
}

/// What an id is: lower-case letters, digits and hyphens, begun by a letter, not `exact`.
pub fn is_id(text: &str) -> bool {
    let mut characters = text.chars();
    characters.next().is_some_and(|c| c.is_ascii_lowercase())
        && characters.all(|c| c.is_ascii_lowercase() || c.is_ascii_digit() || c == '-')
        && text != "exact"
        && text.len() <= 64
}

/// What can stand in the name of a record's file: letters, digits, points, underscores and
/// hyphens, begun by a letter or digit, at most 64.
pub fn is_file_word(text: &str) -> bool {
    let fits = |c: char| c.is_ascii_alphanumeric() || "._-".contains(c);
    let begun = text.starts_with(|c: char| c.is_ascii_alphanumeric());
    begun && text.chars().all(fits) && text.len() <= 64
}
