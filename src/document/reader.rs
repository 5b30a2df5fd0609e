//! The reader: a document's text and the faults found in it.

use std::cell::RefCell;
use std::collections::BTreeSet;

use toml::Spanned;
use toml::de::DeTable;

use super::syntax::report_syntax;
use super::table::Table;
use crate::finding::{Fault, FaultCode, Faults, Span, Text};

/// The text being read and the faults found so far.
pub struct Reader<'d> {
    text: &'d Text,
    faults: RefCell<Faults>,
    /// Tables and keys that an unknown key was probably meant for; they are not missing as well.
    meant: RefCell<BTreeSet<(String, String)>>,
}

impl<'d> Reader<'d> {
    /// A reader over a text, for what needs no parsed document (tests, single strings).
    pub fn new(text: &'d Text) -> Reader<'d> {
        Reader {
            text,
            faults: RefCell::default(),
            meant: RefCell::default(),
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

    /// Remembers that an unknown key of a table was reported with this key as the one meant.
    pub(super) fn mean(&self, table: &str, key: &str) {
        self.meant
            .borrow_mut()
            .insert((table.to_string(), key.to_string()));
    }

    pub(super) fn is_meant(&self, table: &str, key: &str) -> bool {
        self.meant
            .borrow()
            .contains(&(table.to_string(), key.to_string()))
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
    report_syntax(&reader, &errors);
    let document = Document {
        root: Table::root(&reader, &root),
        reader: &reader,
    };
    let value = read(&document);
    (value, reader.into_faults())
}

/// The span of a table in a document that was parsed.
pub(super) fn span_of<T>(value: &Spanned<T>) -> Span {
    value.span()
}
