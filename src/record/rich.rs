//! Short pieces of text as data: what the typesetter receives instead of markup.
//!
//! A [`Rich`] text is a list of runs, each with one of a few roles. Formulas, symbols and plain
//! words travel this way, so that nothing that a case says can become markup or code.

use serde::{Deserialize, Serialize};

use crate::notation::Piece;

/// One run of characters and the role in which it is set.
#[derive(Clone, Debug, PartialEq, Eq, Serialize, Deserialize)]
#[serde(tag = "as", content = "text", rename_all = "kebab-case")]
pub enum Run {
    Plain(String),
    Strong(String),
    Emphasis(String),
    Italic(String),
    Sub(String),
    Sup(String),
    Code(String),
    /// A reference mark that leads to row n of the table of values used.
    ValueUsed(usize),
}

/// A line of text as runs.
#[derive(Clone, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
pub struct Rich(pub Vec<Run>);

impl Rich {
    /// A text of one plain run.
    pub fn plain(text: impl Into<String>) -> Rich {
        Rich(vec![Run::Plain(text.into())])
    }

    /// Appends a plain run.
    pub fn and(mut self, text: impl Into<String>) -> Rich {
        self.0.push(Run::Plain(text.into()));
        self
    }

    /// Appends all runs of another text.
    pub fn with(mut self, other: Rich) -> Rich {
        self.0.extend(other.0);
        self
    }

    /// Appends one run.
    pub fn run(mut self, run: Run) -> Rich {
        self.0.push(run);
        self
    }
}

impl From<Vec<Piece>> for Rich {
    fn from(pieces: Vec<Piece>) -> Rich {
        Rich(pieces.into_iter().map(Run::from).collect())
    }
}

impl From<Piece> for Run {
    fn from(piece: Piece) -> Run {
        match piece {
            Piece::Text(text) => Run::Plain(text),
            Piece::Sub(text) => Run::Sub(text),
            Piece::Sup(text) => Run::Sup(text),
            Piece::Italic(text) => Run::Italic(text),
        }
    }
}
