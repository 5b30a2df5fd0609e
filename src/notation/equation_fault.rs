//! What can be wrong with an equation, and what is said of it.

use super::equation::Side;
use super::error::{Message, quoted};

/// What can be wrong with an equation as a whole or with one of its terms.
#[derive(Clone, Debug, PartialEq, Eq)]
pub enum EquationFault {
    /// No arrow, accepted or not.
    NoArrow,
    /// An arrow after the first.
    SecondArrow { arrow: String },
    /// An arrow of equilibrium, of resonance or to the left.
    WrongArrow { arrow: String },
    /// An arrow with nothing on one side.
    EmptySide { side: Side },
    /// Nothing between two `+`, or between one and an end.
    EmptyTerm,
    /// A coefficient with no participant after it.
    LoneCoefficient { written: String },
    /// A coefficient with a minus sign.
    NegativeCoefficient { written: String },
    /// A number with no space before a declared name.
    GluedCoefficient { written: String, meant: String },
    /// `3CdSO4·8H2O(cr)`: three of the whole, or of its first part.
    AmbiguousCoefficient { spaced: String, bracketed: String },
    /// Small letters first, and something that no declared name has.
    NotAnId { id: String },
    /// A participant again on its side.
    Repeated { participant: String, side: Side },
    /// A participant again on the other side.
    OnBothSides { participant: String },
}

impl EquationFault {
    pub(super) fn message(&self) -> Message {
        match self {
            Self::NoArrow | Self::SecondArrow { .. } | Self::WrongArrow { .. } => {
                self.arrow_message()
            }
            Self::Repeated { .. } | Self::OnBothSides { .. } => self.repetition_message(),
            _ => self.term_message(),
        }
    }

    fn arrow_message(&self) -> Message {
        match self {
            Self::SecondArrow { arrow } => Message::new(
                format!("a second arrow, {}", quoted(arrow)),
                "one arrow",
                "write each step as an equation of its own, and no bonds in formulas",
            ),
            Self::WrongArrow { arrow } => Message::new(
                format!("the arrow {}", quoted(arrow)),
                "`->`, `→` or `=`: a heat belongs to one direction",
                "write what is consumed, `->`, and what is formed",
            ),
            _ => Message::new(
                "no arrow",
                "`->`, `→` or `=` between what is consumed and what is formed",
                "add it",
            ),
        }
    }

    fn term_message(&self) -> Message {
        match self {
            Self::EmptySide { side } => Message::new(
                format!("nothing on the {side} of the arrow"),
                "at least one participant on each side",
                "complete the equation",
            ),
            Self::LoneCoefficient { written } => Message::new(
                format!("the number {} alone", quoted(written)),
                "a participant after the coefficient",
                "complete the term or leave it out",
            ),
            Self::NegativeCoefficient { written } => Message::new(
                format!("the coefficient {}", quoted(written)),
                "a number above zero",
                "move the term to the other side",
            ),
            Self::GluedCoefficient { written, meant } => Message::new(
                format!("the number in {} without a space after it", quoted(written)),
                "a space between a coefficient and a declared name",
                format!("write {} if that is meant", quoted(meant)),
            ),
            Self::AmbiguousCoefficient { spaced, bracketed } => Message::new(
                "a number close before an addition compound",
                format!("{} or {}", quoted(spaced), quoted(bracketed)),
                "write the one that is meant",
            ),
            Self::NotAnId { id } => Message::new(
                quoted(id),
                "a declared name (lower-case letters, digits and hyphens, not `exact`) \
                 or a formula with a phase",
                "correct the name, begin symbols with a capital letter, or part terms by ` + `",
            ),
            _ => Message::new(
                "a `+` without a participant beside it",
                "a participant on each side of ` + `",
                "complete the term or leave the `+` out",
            ),
        }
    }

    fn repetition_message(&self) -> Message {
        let (participant, place, advice) = match self {
            Self::Repeated { participant, side } => (
                participant,
                format!("twice on the {side}"),
                "add the coefficients up; tell isomers apart by declared names",
            ),
            Self::OnBothSides { participant } => (
                participant,
                "on both sides".to_owned(),
                "cancel it; tell isomers apart by declared names",
            ),
            _ => return self.term_message(),
        };
        Message::new(
            format!("{} {place}", quoted(participant)),
            "every participant once",
            advice,
        )
    }
}
