//! Displayed equations as data, and what they say in words.
//!
//! The typesetter builds the equation from the tree; the alternative text that a reader who does
//! not see it needs is spoken from the same tree, so the two cannot drift apart.

use serde::{Deserialize, Serialize};

/// A node of a displayed equation.
#[derive(Clone, Debug, PartialEq, Eq, Serialize, Deserialize)]
#[serde(tag = "node", rename_all = "kebab-case")]
pub enum Math {
    /// A quantity symbol, set in italics.
    Symbol { text: String },
    /// Upright text: numbers, units, formulas, relations and operators (`=`, `+`, `−`, `·`).
    Upright { text: String },
    /// A base with a subscript and a superscript, either of which may be absent.
    Attach {
        base: Box<Math>,
        sub: Option<Box<Math>>,
        sup: Option<Box<Math>>,
    },
    /// A fraction.
    Fraction { over: Box<Math>, under: Box<Math> },
    /// A sum sign over the index below it.
    Sum { index: Box<Math> },
    /// An integral sign between two bounds.
    Integral { from: Box<Math>, to: Box<Math> },
    /// A square root.
    Root { of: Box<Math> },
    /// Nodes one after another.
    Row { of: Vec<Math> },
}
