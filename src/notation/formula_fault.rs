//! What can be wrong with a formula, its brackets and its charge, and what is said of it.

use super::error::{Message, quoted};

/// What can be wrong with the body of a formula.
#[derive(Clone, Debug, PartialEq, Eq)]
pub enum FormulaFault {
    /// No formula where one is needed.
    Missing,
    /// An upper-case letter with what follows it that is no symbol; where splitting or
    /// another case would give symbols, that reading.
    UnknownElement {
        symbol: String,
        meant: Option<String>,
    },
    /// A lower-case word where a symbol is needed.
    LowerCase { word: String },
    /// A phase before the end, or where a formula alone is read.
    PhaseWithin { label: String },
    /// White space within a formula.
    Space,
    /// A number before the formula, `whole` being the formula with it.
    LeadingNumber { number: String },
    /// `.` or `*` where `·` joins the parts of an addition compound.
    PlainDot { character: char },
    /// `O4.5` before more: `O4·5` or `(O4.5)`.
    AmbiguousDecimal {
        written: String,
        dotted: String,
        bracketed: String,
    },
    /// A character that has no meaning in a formula.
    Unreadable { character: char },
}

/// What can be wrong with brackets.
#[derive(Clone, Debug, PartialEq, Eq)]
pub enum BracketFault {
    /// Opened and never closed.
    Unclosed { open: char },
    /// Closed and never opened.
    Unopened { close: char },
    /// Opened by one kind and closed by another.
    Mismatched { open: char, close: char },
    /// Nothing between them.
    Empty { open: char, close: char },
}

/// What can be wrong with a charge.
#[derive(Clone, Debug, PartialEq, Eq)]
pub enum ChargeFault {
    /// `Fe3+`: `Fe^3+` or `Fe3^+`.
    Ambiguous {
        written: String,
        charged: String,
        counted: String,
    },
    /// `SO4-2`, `Ca++`: another order than number, then sign.
    Misordered { written: String, meant: String },
    /// `^` without a number and a sign after it, or with a zero.
    Malformed { written: String },
    /// More of a formula after its charge.
    NotLast { rest: String },
}

impl FormulaFault {
    pub(super) fn message(&self) -> Message {
        match self {
            Self::Missing => Message::new("no formula", "a formula such as `H2O`", "write one"),
            Self::UnknownElement { symbol, meant } => Message::new(
                format!("{}, which is no element", quoted(symbol)),
                "the symbol of an element",
                unknown_element_advice(meant.as_deref()),
            ),
            Self::LowerCase { word } => Message::new(
                format!("the lower-case {}", quoted(word)),
                "the symbol of an element, which begins with a capital letter",
                "correct the letters: Na, Cl, not na, cl",
            ),
            Self::PhaseWithin { label } => Message::new(
                format!(
                    "the phase {} within a formula",
                    quoted(&format!("({label})"))
                ),
                "a phase at the end of a species, and none in a formula by itself",
                "part participants by ` + `, or state the phase apart from the formula",
            ),
            Self::Space => Message::new(
                "a space within a formula",
                "a formula without spaces",
                "close it up, or write ` + ` between two participants",
            ),
            Self::LeadingNumber { number } => Message::new(
                format!("the number {} before a symbol", quoted(number)),
                "a formula that begins with a symbol or a bracket",
                "write (CdSO4)3·8H2O for 3CdSO4·8H2O; mass numbers are not read, D and T are",
            ),
            Self::PlainDot { character } => Message::new(
                format!("`{character}` within a formula"),
                "`·` between the parts of an addition compound",
                "write CuSO4·5H2O with a raised dot (U+00B7)",
            ),
            Self::AmbiguousDecimal {
                written,
                dotted,
                bracketed,
            } => Message::new(
                format!("the point in {} before more symbols", quoted(written)),
                format!(
                    "{} (an added part) or {} (a decimal count)",
                    quoted(dotted),
                    quoted(bracketed)
                ),
                "write the one that is meant",
            ),
            Self::Unreadable { character } => Message::new(
                format!("{} within a formula", quoted(&character.to_string())),
                "symbols, counts, brackets, `·` and a charge",
                "leave it out; a charge is written with + or -, and bonds are not written",
            ),
        }
    }
}

fn unknown_element_advice(meant: Option<&str>) -> String {
    match meant {
        Some(meant) => format!("write {} if that is meant", quoted(meant)),
        None => "write a capital letter and at most one small letter, or a declared name in \
                 small letters"
            .to_owned(),
    }
}

impl BracketFault {
    pub(super) fn message(&self) -> Message {
        match self {
            Self::Unclosed { open } => Message::new(
                format!("`{open}` that is never closed"),
                "a closing bracket",
                "close it",
            ),
            Self::Unopened { close } => Message::new(
                format!("`{close}` that closes nothing"),
                "an opening bracket before it",
                "open it or leave it out",
            ),
            Self::Mismatched { open, close } => Message::new(
                format!("`{open}` closed by `{close}`"),
                "brackets in pairs of one kind",
                "correct one of them",
            ),
            Self::Empty { open, close } => Message::new(
                format!("`{open}{close}` with nothing in it"),
                "symbols within brackets",
                "fill it or leave it out",
            ),
        }
    }
}

impl ChargeFault {
    pub(super) fn message(&self) -> Message {
        match self {
            Self::Ambiguous {
                written,
                charged,
                counted,
            } => Message::new(
                format!("{}, which can be read in two ways", quoted(written)),
                format!(
                    "{} (charge number) or {} (count, then a single charge)",
                    quoted(charged),
                    quoted(counted)
                ),
                "write the one that is meant",
            ),
            Self::Misordered { written, meant } => Message::new(
                format!("the charge {}", quoted(written)),
                "the number and then the sign, after `^`",
                format!("write {} if that is meant", quoted(meant)),
            ),
            Self::Malformed { written } => Message::new(
                format!("{} as a charge", quoted(written)),
                "a number and then a sign after `^`",
                "write it as in SO4^2- or Na+, or leave it out for a neutral formula",
            ),
            Self::NotLast { rest } => Message::new(
                format!("{} after the charge", quoted(rest)),
                "the charge at the end of the formula",
                "move the charge to the end",
            ),
        }
    }
}
