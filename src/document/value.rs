//! A value of a document.

use chrono::NaiveDate;
use toml::Spanned;
use toml::de::DeValue;

use super::reader::Reader;
use super::table::Table;
use crate::finding::{FaultCode, Located, Span, shorten};

/// How much of a value messages repeat.
const LONGEST_VALUE: usize = 48;

/// A value with the key it belongs to.
#[derive(Clone)]
pub struct Value<'r, 'd> {
    reader: &'r Reader<'d>,
    value: &'r Spanned<DeValue<'d>>,
    /// The key's own place.
    pub key_span: Span,
    pub path: String,
}

impl<'r, 'd> Value<'r, 'd> {
    pub(super) fn new(
        reader: &'r Reader<'d>,
        value: &'r Spanned<DeValue<'d>>,
        key_span: Span,
        path: String,
    ) -> Value<'r, 'd> {
        Value {
            reader,
            value,
            key_span,
            path,
        }
    }

    pub fn span(&self) -> Span {
        self.value.span()
    }

    pub fn reader(&self) -> &'r Reader<'d> {
        self.reader
    }

    /// Whether the value is a string, without complaint where it is not.
    pub fn is_string(&self) -> bool {
        self.value.get_ref().is_str()
    }

    /// Whether the value is a table, without complaint where it is not.
    pub fn is_table(&self) -> bool {
        self.value.get_ref().is_table()
    }

    pub fn string(&self) -> Option<Located<String>> {
        match self.value.get_ref() {
            DeValue::String(text) => Some(Located::new(text.to_string(), self.span())),
            _ => self.wrong_type("text in \"quotes\"", "put it in \"quotes\""),
        }
    }

    /// A string or a whole number, as text.
    pub fn word(&self) -> Option<String> {
        match self.value.get_ref() {
            DeValue::Integer(number) => Some(number.to_string()),
            _ => self.string().map(|text| text.value),
        }
    }

    pub fn boolean(&self) -> Option<Located<bool>> {
        match self.value.get_ref() {
            DeValue::Boolean(value) => Some(Located::new(*value, self.span())),
            _ => self.wrong_type("true or false", "write it without quotes"),
        }
    }

    /// A local date (`2026-12-01`).
    pub fn date(&self) -> Option<Located<NaiveDate>> {
        let DeValue::Datetime(moment) = self.value.get_ref() else {
            return self.wrong_type("a date such as 2026-12-01", "write it without quotes");
        };
        let date = match (moment.date, moment.time, moment.offset) {
            (Some(d), None, None) => {
                NaiveDate::from_ymd_opt(i32::from(d.year), u32::from(d.month), u32::from(d.day))
            }
            _ => None,
        };
        match date {
            Some(date) => Some(Located::new(date, self.span())),
            None => self.wrong_type("a day of the calendar", "write year-month-day alone"),
        }
    }

    /// An array of strings; elements of another type are reported and left out.
    pub fn strings(&self) -> Vec<Located<String>> {
        self.elements("a list of texts", "put it in [brackets]")
            .iter()
            .filter_map(Value::string)
            .collect()
    }

    /// An array of tables; elements of another type are reported and left out.
    pub fn tables(&self) -> Vec<Table<'r, 'd>> {
        self.elements(
            "a list of tables",
            "write it as [{ key = \"value\" }] or under a [[header]]",
        )
        .iter()
        .filter_map(Value::table)
        .collect()
    }

    /// How many elements an array has; none where it is none.
    pub fn count(&self) -> usize {
        self.value
            .get_ref()
            .as_array()
            .map_or(0, |array| array.len())
    }

    /// The elements of an array.
    pub fn elements(&self, expected: &str, advice: &str) -> Vec<Value<'r, 'd>> {
        let DeValue::Array(array) = self.value.get_ref() else {
            self.wrong_type::<()>(expected, advice);
            return Vec::new();
        };
        let element = |(i, value): (usize, &'r Spanned<DeValue<'d>>)| {
            let path = format!("{}[{}]", self.path, i + 1);
            Value::new(self.reader, value, value.span(), path)
        };
        array.iter().enumerate().map(element).collect()
    }

    /// Adds every string in the value and below it.
    pub(super) fn collect_strings(&self, found: &mut Vec<Located<String>>) {
        match self.value.get_ref() {
            DeValue::String(text) => found.push(Located::new(text.to_string(), self.span())),
            DeValue::Array(_) => {
                for element in self.elements("a list", "") {
                    element.collect_strings(found);
                }
            }
            DeValue::Table(_) => found.extend(self.table().iter().flat_map(Table::all_strings)),
            _ => {}
        }
    }

    pub fn table(&self) -> Option<Table<'r, 'd>> {
        match self.value.get_ref() {
            DeValue::Table(table) => Some(Table::inner(
                self.reader,
                table,
                self.table_span(),
                self.path.clone(),
            )),
            _ => self.wrong_type(
                "a table",
                "write it as { key = \"value\" } or under a [header]",
            ),
        }
    }

    /// An inline table is best pointed at by itself, one under a header by its key.
    fn table_span(&self) -> Span {
        if self.reader.text().slice(&self.span()).starts_with('{') {
            self.span()
        } else {
            self.key_span.clone()
        }
    }

    /// What messages call a value of its type.
    fn kind(&self) -> &'static str {
        match self.value.get_ref() {
            DeValue::String(_) => "the text",
            DeValue::Integer(_) | DeValue::Float(_) => "the number",
            DeValue::Boolean(_) => "the word",
            DeValue::Datetime(_) => "the date or time",
            DeValue::Array(_) => "the list",
            DeValue::Table(_) => "the table",
        }
    }

    /// The value as it stands in the file, on one line.
    fn shown(&self) -> String {
        let text = self.reader.text().slice(&self.span());
        shorten(text.lines().next().unwrap_or(""), LONGEST_VALUE)
    }

    fn wrong_type<T>(&self, expected: &str, advice: &str) -> Option<T> {
        self.reader.fault(
            FaultCode::WrongType,
            &self.span(),
            format!("{} {}", self.kind(), self.shown()),
            format!("`{}` as {expected}", self.path),
            advice,
        );
        None
    }
}
