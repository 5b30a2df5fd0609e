//! A table of a document.

use toml::Spanned;
use toml::de::{DeTable, DeValue};

use super::reader::{Reader, span_of};
use super::value::Value;
use crate::finding::{FaultCode, Located, Span, nearest};

/// A table, with the words that name it in messages (`reactions.hydrogenation`).
#[derive(Clone)]
pub struct Table<'r, 'd> {
    reader: &'r Reader<'d>,
    table: &'r DeTable<'d>,
    /// The table's header or braces; for the root, the start of the file.
    pub span: Span,
    pub path: String,
}

impl<'r, 'd> Table<'r, 'd> {
    pub(super) fn root(reader: &'r Reader<'d>, root: &'r Spanned<DeTable<'d>>) -> Table<'r, 'd> {
        Table {
            reader,
            table: root.get_ref(),
            span: 0..0,
            path: String::new(),
        }
    }

    pub(super) fn inner(
        reader: &'r Reader<'d>,
        table: &'r DeTable<'d>,
        span: Span,
        path: String,
    ) -> Table<'r, 'd> {
        Table {
            reader,
            table,
            span,
            path,
        }
    }

    pub fn reader(&self) -> &'r Reader<'d> {
        self.reader
    }

    /// The value of a key, where it is there.
    pub fn get(&self, key: &str) -> Option<Value<'r, 'd>> {
        let (key, value) = self.table.get_key_value(key)?;
        Some(self.value(key, value))
    }

    /// All keys with their values, in the order of the file.
    pub fn entries(&self) -> Vec<(Located<String>, Value<'r, 'd>)> {
        let entry = |(key, value): (&'r Spanned<_>, _)| {
            let name: &std::borrow::Cow<'d, str> = key.get_ref();
            (
                Located::new(name.to_string(), key.span()),
                self.value(key, value),
            )
        };
        self.table.iter().map(entry).collect()
    }

    fn value(
        &self,
        key: &'r Spanned<std::borrow::Cow<'d, str>>,
        value: &'r Spanned<DeValue<'d>>,
    ) -> Value<'r, 'd> {
        Value::new(self.reader, value, key.span(), self.child(key.get_ref()))
    }

    fn child(&self, key: &str) -> String {
        match self.path.as_str() {
            "" => key.to_string(),
            path => format!("{path}.{key}"),
        }
    }

    /// Reports every key that is not among the known ones, with the nearest that is.
    pub fn only(&self, known: &[&str]) {
        for key in self.table.keys() {
            if !known.contains(&key.get_ref().as_ref()) {
                self.unknown_key(key.get_ref(), &span_of(key), known);
            }
        }
    }

    fn unknown_key(&self, key: &str, span: &Span, known: &[&str]) {
        let advice = match nearest(key, known.iter().copied(), 1).first() {
            Some(near) => {
                self.reader.mean(&self.path, near);
                format!("did you mean `{near}`?")
            }
            None => "remove it, or move it to the table that it belongs to".to_string(),
        };
        self.reader.fault(
            FaultCode::UnknownKey,
            span,
            format!("the key `{key}`"),
            format!("in {} one of: {}", self.title(), known.join(", ")),
            advice,
        );
    }

    /// What messages call this table.
    pub fn title(&self) -> String {
        match self.path.as_str() {
            "" => "the file".to_string(),
            path if path.ends_with(']') || path.contains("].") => format!("`{path}`"),
            path => format!("[{path}]"),
        }
    }

    /// Reports that a key has to be there and is not; a slip in its name was reported already.
    /// Call [`Table::only`] before.
    pub fn missing(&self, key: &str, advice: &str) {
        if self.reader.is_meant(&self.path, key) {
            return;
        }
        self.reader.fault(
            FaultCode::MissingKey,
            &self.span,
            format!("{} without `{key}`", self.title()),
            format!("the key `{key}`"),
            advice,
        );
    }

    /// The string of a key, where it is there.
    pub fn string(&self, key: &str) -> Option<Located<String>> {
        self.get(key)?.string()
    }

    /// The string of a key that has to be there.
    pub fn required_string(&self, key: &str, advice: &str) -> Option<Located<String>> {
        match self.get(key) {
            Some(value) => value.string(),
            None => {
                self.missing(key, advice);
                None
            }
        }
    }

    /// The strings of a key that holds an array of them; empty where it is not there.
    pub fn strings(&self, key: &str) -> Vec<Located<String>> {
        self.get(key).map_or_else(Vec::new, |value| value.strings())
    }

    /// The tables of a key that holds an array of them; empty where it is not there.
    pub fn tables(&self, key: &str) -> Vec<Table<'r, 'd>> {
        self.get(key).map_or_else(Vec::new, |value| value.tables())
    }

    /// The table of a key, where it is there.
    pub fn table(&self, key: &str) -> Option<Table<'r, 'd>> {
        self.get(key)?.table()
    }

    /// The truth value of a key, where it is there.
    pub fn boolean(&self, key: &str) -> Option<Located<bool>> {
        self.get(key)?.boolean()
    }

    /// Every string in the table and below it, in the order of the file.
    pub fn all_strings(&self) -> Vec<Located<String>> {
        let mut found = Vec::new();
        for (_, value) in self.entries() {
            value.collect_strings(&mut found);
        }
        found
    }
}
