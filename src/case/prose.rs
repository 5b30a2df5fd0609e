//! Reading `[prose]`, and the results that it is bound to.

use pulldown_cmark::{Event, Options, Parser, Tag, TagEnd};

use crate::document::{Reader, Table, value_fault};
use crate::finding::{Located, Span};

use super::ids::{IdKind, Ids};
use super::model::{ProsePart, ProseText};
use super::results::Results;

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

/// The braces of a Markdown text: those in its running text, none in code; `\\{` is a brace.
#[derive(Debug, Default)]
struct Braces {
    bindings: Vec<Binding>,
    /// Opening braces without a closing one in the same line.
    open: Vec<Span>,
}

impl Braces {
    fn of(markdown: &str) -> Braces {
        let mut braces = Braces::default();
        let mut in_code = false;
        for (event, range) in Parser::new_ext(markdown, MARKDOWN).into_offset_iter() {
            match event {
                Event::Start(Tag::CodeBlock(_)) => in_code = true,
                Event::End(TagEnd::CodeBlock) => in_code = false,
                Event::Text(_) if !in_code => braces.add(markdown, range),
                _ => {}
            }
        }
        braces
    }

    fn add(&mut self, markdown: &str, range: Span) {
        let mut end = range.start;
        for mut binding in bindings(&markdown[range.clone()]) {
            binding.span = range.start + binding.span.start..range.start + binding.span.end;
            end = binding.span.end;
            if !is_escaped(markdown, &binding.span) {
                self.bindings.push(binding);
            }
        }
        let open = markdown[end..range.end]
            .find('{')
            .map(|at| end + at..end + at + 1);
        self.open
            .extend(open.filter(|open| !is_escaped(markdown, open)));
    }
}

/// Whether a backslash stands before the opening brace.
pub fn is_escaped(markdown: &str, span: &Span) -> bool {
    markdown[..span.start].ends_with('\\')
}

pub(super) fn read_prose(
    table: Option<&Table<'_, '_>>,
    ids: &Ids,
    results: &Results,
) -> Vec<ProseText> {
    let Some(table) = table else {
        return Vec::new();
    };
    table.only(&PARTS.map(|(word, _)| word));
    let mut prose = Vec::new();
    for (word, part) in PARTS {
        if let Some(markdown) = table.string(word) {
            check_bindings(table.reader(), &markdown, ids, results);
            check_nesting(table.reader(), &markdown);
            prose.push(ProseText { part, markdown });
        }
    }
    prose
}

fn check_bindings(reader: &Reader<'_>, markdown: &Located<String>, ids: &Ids, results: &Results) {
    let braces = Braces::of(&markdown.value);
    let text = reader.text();
    let places = text.inside_each(&markdown.span, braces.bindings.iter().map(|b| &b.span));
    for (binding, place) in braces.bindings.into_iter().zip(places) {
        let name = Located::new(binding.name, place);
        if ids.kind(&name.value) != Some(IdKind::Input) {
            results.check(reader, &name, ids, "write {reaction.heat} or {input}");
        }
    }
    for place in text.inside_each(&markdown.span, &braces.open) {
        value_fault(
            reader,
            &place,
            "a brace that is not closed on its line",
            "{reaction.heat} or {input}, on one line",
            "close it; for a brace itself put a backslash before it",
        );
    }
}

/// Lists and quotes inside one another beyond this depth cannot be set on a page.
const DEEPEST: usize = 12;

fn check_nesting(reader: &Reader<'_>, markdown: &Located<String>) {
    let mut depth = 0_usize;
    for (event, range) in Parser::new_ext(&markdown.value, MARKDOWN).into_offset_iter() {
        match event {
            Event::Start(_) => depth += 1,
            Event::End(_) => depth = depth.saturating_sub(1),
            _ => {}
        }
        if depth > DEEPEST {
            value_fault(
                reader,
                &reader
                    .text()
                    .inside(&markdown.span, &(range.start..range.start)),
                format!("prose of more than {DEEPEST} levels inside one another"),
                format!("at most {DEEPEST} levels of lists, quotes and emphasis"),
                "make the text flatter",
            );
            return;
        }
    }
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
        let found = Braces::of("*see* {x.heat}, `{y.heat}` and \\{z.heat}\n\n    {code}").bindings;
        let names: Vec<_> = found.iter().map(|b| b.name.as_str()).collect();
        assert_eq!(names, ["x.heat"]);
        assert_eq!(found[0].span, 6..14);
    }

    #[test]
    fn a_brace_is_closed_on_its_line() {
        let open = Braces::of("a {x\n.heat} b").open;
        assert_eq!((open.len(), open[0].start), (1, 2));
        assert!(Braces::of("a \\{x").open.is_empty());
    }
}
