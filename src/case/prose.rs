//! Reading `[prose]`, and the results that it is bound to.

use indexmap::IndexMap;
use pulldown_cmark::{Event, Options, Parser};

use crate::document::{Reader, Table, is_id};
use crate::finding::{FaultCode, Located, Span, nearest};

use super::ids::{IdKind, Ids};
use super::model::{ProsePart, ProseText, Reaction};
use super::reactions::RESULT_QUANTITIES;

const PARTS: [(&str, ProsePart); 5] = [
    ("purpose", ProsePart::Purpose),
    ("scope", ProsePart::Scope),
    ("method", ProsePart::Method),
    ("discussion", ProsePart::Discussion),
    ("conclusion", ProsePart::Conclusion),
];

/// The Markdown that prose may use: CommonMark with tables.
pub const MARKDOWN: Options = Options::ENABLE_TABLES;

/// A place in a text where a result or an input is to stand: `{hydrogenation.heat}`.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Binding {
    /// Between the braces.
    pub name: String,
    /// With the braces, in bytes of the text.
    pub span: Span,
}

/// The bindings of a plain text, in order. A brace that is not closed is no binding.
pub fn bindings(text: &str) -> Vec<Binding> {
    let mut found = Vec::new();
    let mut from = 0;
    while let Some(open) = text[from..].find('{').map(|at| from + at) {
        let Some(close) = text[open..].find('}').map(|at| open + at) else {
            break;
        };
        // Of two opening braces before a closing one, the last one opens.
        let open = text[open..close].rfind('{').map_or(open, |at| open + at);
        found.push(Binding {
            name: text[open + 1..close].to_string(),
            span: open..close + 1,
        });
        from = close + 1;
    }
    found
}

/// The bindings of a Markdown text: those in its running text, none in code; `\\{` is a brace.
fn markdown_bindings(markdown: &str) -> Vec<Binding> {
    let mut found = Vec::new();
    for (event, range) in Parser::new_ext(markdown, MARKDOWN).into_offset_iter() {
        if !matches!(event, Event::Text(_)) {
            continue;
        }
        for mut binding in bindings(&markdown[range.clone()]) {
            binding.span = range.start + binding.span.start..range.start + binding.span.end;
            if !is_escaped(markdown, &binding.span) {
                found.push(binding);
            }
        }
    }
    found
}

/// Whether a backslash stands before the opening brace.
pub fn is_escaped(markdown: &str, span: &Span) -> bool {
    markdown[..span.start].ends_with('\\')
}

pub(super) fn read_prose(
    table: Option<&Table<'_, '_>>,
    ids: &Ids,
    reactions: &IndexMap<String, Reaction>,
) -> Vec<ProseText> {
    let Some(table) = table else {
        return Vec::new();
    };
    table.only(&PARTS.map(|(word, _)| word));
    let mut prose = Vec::new();
    for (word, part) in PARTS {
        if let Some(markdown) = table.string(word) {
            check_bindings(table.reader(), &markdown, ids, reactions);
            prose.push(ProseText { part, markdown });
        }
    }
    prose
}

fn check_bindings(
    reader: &Reader<'_>,
    markdown: &Located<String>,
    ids: &Ids,
    reactions: &IndexMap<String, Reaction>,
) {
    for binding in markdown_bindings(&markdown.value) {
        let span = reader
            .text()
            .inside(&markdown.span, &markdown.value, &binding.span);
        if ids.kind(&binding.name) != Some(IdKind::Input) {
            check_result(reader, &binding.name, &span, ids, reactions);
        }
    }
}

/// Reports a name that is not the name of a result of this case.
pub(super) fn check_result(
    reader: &Reader<'_>,
    name: &str,
    span: &Span,
    ids: &Ids,
    reactions: &IndexMap<String, Reaction>,
) {
    let (id, quantity) = name.split_once('.').unwrap_or((name, ""));
    if !is_id(id) || quantity.is_empty() {
        reader.fault(
            FaultCode::Value,
            span,
            format!("`{name}`"),
            "a result (`id.quantity`) or the id of an input",
            "write {reaction.heat}; write \\{ for a literal brace",
        );
    } else if ids.kind(id) != Some(IdKind::Reaction) {
        ids.unknown(reader, id, span, &[IdKind::Reaction]);
    } else if let Some(reaction) = reactions.get(id) {
        check_quantity(reader, reaction, quantity, span);
    }
}

fn check_quantity(reader: &Reader<'_>, reaction: &Reaction, quantity: &str, span: &Span) {
    if RESULT_QUANTITIES.contains(&quantity) {
        if quantity != "heat" && reaction.per.is_none() {
            reader.fault(
                FaultCode::Value,
                span,
                format!("`{}.{quantity}`", reaction.id.value),
                "a reaction that names a substance in `per`",
                format!("add per = \"…\" to [reactions.{}]", reaction.id.value),
            );
        }
        return;
    }
    let advice = match nearest(quantity, RESULT_QUANTITIES, 1).first() {
        Some(near) => format!("did you mean `{}.{near}`?", reaction.id.value),
        None => "use one of these".to_string(),
    };
    reader.fault(
        FaultCode::UnknownId,
        span,
        format!("`{quantity}` of a reaction"),
        format!("one of: {}", RESULT_QUANTITIES.join(", ")),
        advice,
    );
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn bindings_are_found_with_their_places() {
        let found = bindings("a {x.heat} b {{y}} {open");
        let names: Vec<_> = found.iter().map(|b| b.name.as_str()).collect();
        assert_eq!(names, ["x.heat", "y"]);
        assert_eq!(found[0].span, 2..10);
    }

    #[test]
    fn code_and_escaped_braces_are_no_bindings() {
        let found = markdown_bindings("*see* {x.heat}, `{y.heat}` and \\{z.heat}");
        let names: Vec<_> = found.iter().map(|b| b.name.as_str()).collect();
        assert_eq!(names, ["x.heat"]);
        assert_eq!(found[0].span, 6..14);
    }
}
