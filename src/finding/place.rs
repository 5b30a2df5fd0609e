//! Places in a file.

use std::ops::Range;

use serde::Serialize;

/// A byte range in a file's text.
pub type Span = Range<usize>;

/// A position that a person can find: file, line and column, both counted from 1.
#[derive(Clone, Debug, PartialEq, Eq, PartialOrd, Ord, Serialize)]
pub struct Place {
    pub file: String,
    pub line: usize,
    pub column: usize,
}

/// A value together with the bytes of the file that it was read from.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Located<T> {
    pub value: T,
    pub span: Span,
}

impl<T> Located<T> {
    pub fn new(value: T, span: Span) -> Located<T> {
        Located { value, span }
    }

    /// The same place with another value.
    pub fn map<U>(self, f: impl FnOnce(T) -> U) -> Located<U> {
        Located::new(f(self.value), self.span)
    }
}
