//! What is wrong with a piece of notation, and where.
//!
//! An error is a kind and a place. The sentences are made here, from the kind, in three
//! parts (found, expected, what to do), so that a caller can lay them out as it likes;
//! severity and the position in a file are the caller's.

use std::fmt;
use std::ops::Range;

use super::equation_fault::EquationFault;
use super::formula_fault::{BracketFault, ChargeFault, FormulaFault};
use super::number::NumberFault;
use super::phase_fault::PhaseFault;

/// A fault in a piece of notation.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct NotationError {
    /// The byte range in the text that was given.
    pub span: Range<usize>,
    /// What is wrong there.
    pub kind: NotationErrorKind,
}

/// What is wrong, by the thing that it is wrong with.
#[derive(Clone, Debug, PartialEq, Eq)]
pub enum NotationErrorKind {
    /// More than this program reads of something.
    TooMuch {
        /// What there is too much of.
        of: Bounded,
        /// How much there is, in the unit of `of`.
        found: usize,
        /// How much is read.
        limit: usize,
    },
    /// A count, a multiplier, a coefficient or an amount of water.
    Number(NumberFault),
    /// The body of a formula.
    Formula(FormulaFault),
    /// Brackets in a formula.
    Bracket(BracketFault),
    /// The charge of a formula.
    Charge(ChargeFault),
    /// The phase of a species.
    Phase(PhaseFault),
    /// An equation or one of its terms.
    Equation(EquationFault),
}

/// Things whose size has a limit.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Bounded {
    /// The text of an equation, in bytes.
    Equation,
    /// The terms of an equation.
    Terms,
    /// The text of a formula, in bytes.
    Formula,
    /// Brackets within brackets.
    Nesting,
    /// The digits of a number.
    Digits,
    /// The digits of a charge number.
    ChargeDigits,
    /// The name of a form, in bytes.
    Form,
}

/// The three parts of an error's text.
pub(super) struct Message {
    pub(super) found: String,
    pub(super) expected: String,
    pub(super) advice: String,
}

impl Message {
    pub(super) fn new(
        found: impl Into<String>,
        expected: impl Into<String>,
        advice: impl Into<String>,
    ) -> Self {
        Self {
            found: found.into(),
            expected: expected.into(),
            advice: advice.into(),
        }
    }
}

impl NotationError {
    pub(super) fn new(span: Range<usize>, kind: impl Into<NotationErrorKind>) -> Self {
        Self {
            span,
            kind: kind.into(),
        }
    }

    /// The error as seen from a text in which the one that was read begins at `by`.
    pub(super) fn shifted(mut self, by: usize) -> Self {
        self.span = self.span.start + by..self.span.end + by;
        self
    }

    /// What stands there, as a phrase.
    pub fn found(&self) -> String {
        self.kind.message().found
    }

    /// What should stand there, as a phrase.
    pub fn expected(&self) -> String {
        self.kind.message().expected
    }

    /// What to do about it, as a clause in the imperative.
    pub fn advice(&self) -> String {
        self.kind.message().advice
    }
}

impl NotationErrorKind {
    fn message(&self) -> Message {
        match self {
            Self::TooMuch { of, found, limit } => of.message(*found, *limit),
            Self::Number(fault) => fault.message(),
            Self::Formula(fault) => fault.message(),
            Self::Bracket(fault) => fault.message(),
            Self::Charge(fault) => fault.message(),
            Self::Phase(fault) => fault.message(),
            Self::Equation(fault) => fault.message(),
        }
    }
}

impl Bounded {
    /// Refuses more than `limit`.
    pub(super) fn check(
        self,
        found: usize,
        limit: usize,
        span: Range<usize>,
    ) -> Result<(), NotationError> {
        if found <= limit {
            return Ok(());
        }
        let kind = NotationErrorKind::TooMuch {
            of: self,
            found,
            limit,
        };
        Err(NotationError { span, kind })
    }

    fn message(self, found: usize, limit: usize) -> Message {
        let (thing, unit, advice) = match self {
            Self::Equation => ("an equation", "bytes", "split the reaction into steps"),
            Self::Terms => ("an equation", "terms", "split the reaction into steps"),
            Self::Formula => ("a formula", "bytes", "gather repeated parts in brackets"),
            Self::Nesting => ("brackets", "levels", "write the formula with fewer"),
            Self::Digits => ("a number", "digits", "round it to digits that are known"),
            Self::ChargeDigits => ("a charge number", "digits", "check the charge"),
            Self::Form => ("the name of a form", "bytes", "shorten the name"),
        };
        Message::new(
            format!("{thing} of {found} {unit}"),
            format!("at most {limit} {unit}"),
            advice,
        )
    }
}

impl fmt::Display for NotationError {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        let Message {
            found,
            expected,
            advice,
        } = self.kind.message();
        write!(f, "found {found}; expected {expected}; {advice}")
    }
}

impl std::error::Error for NotationError {}

macro_rules! kind_from {
    ($($variant:ident($fault:ty)),* $(,)?) => {$(
        impl From<$fault> for NotationErrorKind {
            fn from(fault: $fault) -> Self {
                Self::$variant(fault)
            }
        }
    )*};
}

kind_from!(
    Number(NumberFault),
    Formula(FormulaFault),
    Bracket(BracketFault),
    Charge(ChargeFault),
    Phase(PhaseFault),
    Equation(EquationFault),
);

/// How much of a text an error repeats.
const QUOTED_CHARACTERS: usize = 40;

/// The user's text in an error: in backquotes, on one line, cut where it is long.
pub(super) fn quoted(text: &str) -> String {
    let mut shown: String = text
        .chars()
        .take(QUOTED_CHARACTERS)
        .flat_map(|character| match character.is_control() {
            true => character.escape_default().collect::<Vec<_>>(),
            false => vec![character],
        })
        .collect();
    if text.chars().nth(QUOTED_CHARACTERS).is_some() {
        shown.push('…');
    }
    format!("`{shown}`")
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn quoted_text_stays_short_and_on_one_line() {
        assert_eq!(quoted("a\nb"), "`a\\nb`");
        assert_eq!(quoted(&"x".repeat(40)), format!("`{}`", "x".repeat(40)));
        assert_eq!(quoted(&"x".repeat(41)), format!("`{}…`", "x".repeat(40)));
    }

    #[test]
    fn shifting_moves_the_span() {
        let fault = NumberFault::Zero {
            role: super::super::NumberRole::Count,
        };
        let error = NotationError::new(2..3, fault).shifted(10);
        assert_eq!(error.span, 12..13);
    }
}
