//! The reader: a document's text and the faults found in it.

use std::cell::RefCell;

use toml::Spanned;
use toml::de::DeTable;

use super::table::Table;
use crate::finding::{Fault, FaultCode, Faults, Span, Text};

/// How many syntax errors of one file are reported; a file that is not TOML at all would
/// otherwise be answered by a wall of text.
const MOST_SYNTAX_ERRORS: usize = 20;

/// The text being read and the faults found so far.
pub struct Reader<'d> {
    text: &'d Text,
    faults: RefCell<Faults>,
}

impl<'d> Reader<'d> {
    /// A reader over a text, for what needs no parsed document (tests, single strings).
    pub fn new(text: &'d Text) -> Reader<'d> {
        Reader {
            text,
            faults: RefCell::default(),
        }
    }

    pub fn text(&self) -> &'d Text {
        self.text
    }

    /// Records a fault at a span of the text.
    pub fn fault(
        &self,
        code: FaultCode,
        span: &Span,
        found: impl AsRef<str>,
        expected: impl Into<String>,
        advice: impl Into<String>,
    ) {
        let fault = Fault::new(code, self.text, span, found, expected, advice);
        self.faults.borrow_mut().push(fault);
    }

    /// The faults, taken out.
    pub fn into_faults(self) -> Faults {
        self.faults.into_inner()
    }
}

/// A parsed document: the root table and the reader that collects faults.
pub struct Document<'r, 'd> {
    pub root: Table<'r, 'd>,
    pub reader: &'r Reader<'d>,
}

/// Parses a text and hands the document to `read`. All syntax errors are reported; what could be
/// parsed in spite of them is read as well, so that its faults come in the same answer.
pub fn with_document<T>(text: &Text, read: impl FnOnce(&Document<'_, '_>) -> T) -> (T, Faults) {
    let (root, errors) = DeTable::parse_recoverable(text.as_str());
    let reader = Reader::new(text);
    for error in errors.iter().take(MOST_SYNTAX_ERRORS) {
        syntax_fault(&reader, error);
    }
    let document = Document {
        root: Table::root(&reader, &root),
        reader: &reader,
    };
    let value = read(&document);
    (value, reader.into_faults())
}

fn syntax_fault(reader: &Reader<'_>, error: &toml::de::Error) {
    let end = reader.text.as_str().len();
    let span = error.span().unwrap_or(end..end);
    let message = error.message();
    let (problem, expected) = match message.split_once(", expected ") {
        Some((problem, expected)) => (problem, expected.to_string()),
        None => (message, "TOML 1.1".to_string()),
    };
    let token = reader.text.slice(&span);
    let found = if token.trim().is_empty() {
        problem.to_string()
    } else {
        format!("{problem}: {token}")
    };
    let (expected, advice) = syntax_help(problem, expected);
    reader.fault(FaultCode::Syntax, &span, found, expected, advice);
}

fn syntax_help(problem: &str, expected: String) -> (String, &'static str) {
    match problem {
        "duplicate key" => (
            "each key once in its table".to_string(),
            "remove or rename one of the two",
        ),
        _ => (
            expected,
            "mend the line; strings stand in \"quotes\", tables in [brackets]",
        ),
    }
}

/// The span of a table in a document that was parsed.
pub(super) fn span_of<T>(value: &Spanned<T>) -> Span {
    value.span()
}
