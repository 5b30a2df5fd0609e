//! Reaction equations as they are written: terms on two sides.
//!
//! Keeps coefficients exact and remembers where each term stands in the text. Whether an
//! equation balances can be said once declared names have formulas: see `balance`.

use std::fmt;
use std::ops::Range;

use num_rational::BigRational;
use num_traits::One;

use super::error::NotationError;
use super::participant::Participant;
use super::piece::{Piece, push_all, push_text};

/// A reaction equation with its direction from left to right.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Equation {
    /// What is consumed.
    pub left: Vec<Term>,
    /// What is formed.
    pub right: Vec<Term>,
}

/// A participant with its coefficient.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Term {
    /// Positive and exact.
    pub coefficient: BigRational,
    /// The coefficient as it was written; `1` where none was.
    pub coefficient_text: String,
    /// A declared name or a species.
    pub participant: Participant,
    /// The byte range of the whole term in the text of the equation.
    pub span: Range<usize>,
}

/// A side of an equation.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Side {
    /// What is consumed.
    Left,
    /// What is formed.
    Right,
}

impl Equation {
    /// Reads an equation such as `nitrobenzene + 3 H2(g) -> aniline + 2 H2O(l)`.
    ///
    /// The arrow is `->`, `→`, `⟶` or `=`. Coefficients are positive integers, decimals
    /// or fractions. ` + ` parts the terms.
    ///
    /// # Errors
    /// Every fault of the arrow, or else of the terms and of terms that repeat.
    pub fn parse(text: &str) -> Result<Self, Vec<NotationError>> {
        super::equation_parse::parse(text)
    }

    /// The equation for typesetting, with a true arrow (U+2192).
    pub fn pieces(&self) -> Vec<Piece> {
        let mut pieces = side_pieces(&self.left);
        push_text(&mut pieces, " → ");
        push_all(&mut pieces, side_pieces(&self.right));
        pieces
    }
}

impl Term {
    /// The term for typesetting; a declared name stands as it is.
    pub fn pieces(&self) -> Vec<Piece> {
        let mut pieces = Vec::new();
        push_text(&mut pieces, &self.before_participant());
        match &self.participant {
            Participant::Declared(id) => push_text(&mut pieces, id),
            Participant::Species(species) => push_all(&mut pieces, species.pieces()),
        }
        pieces
    }

    /// The canonical coefficient, an integer or a reduced fraction, and a space; nothing
    /// for one.
    fn before_participant(&self) -> String {
        match self.coefficient.is_one() {
            true => String::new(),
            false => format!("{} ", self.coefficient),
        }
    }
}

fn side_pieces(terms: &[Term]) -> Vec<Piece> {
    let mut pieces = Vec::new();
    for (index, term) in terms.iter().enumerate() {
        push_text(&mut pieces, if index > 0 { " + " } else { "" });
        push_all(&mut pieces, term.pieces());
    }
    pieces
}

fn side_text(terms: &[Term]) -> String {
    let terms: Vec<_> = terms.iter().map(Term::to_string).collect();
    terms.join(" + ")
}

impl fmt::Display for Term {
    /// The canonical text.
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        write!(f, "{}{}", self.before_participant(), self.participant)
    }
}

impl fmt::Display for Equation {
    /// The canonical text: reading it gives the same terms.
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        write!(f, "{} -> {}", side_text(&self.left), side_text(&self.right))
    }
}

impl fmt::Display for Side {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.write_str(match self {
            Self::Left => "left",
            Self::Right => "right",
        })
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn coefficients_have_one_canonical_form() {
        let text = "1.5 O2(g) + 1 CO(g) + 4/2 H2(g) = 0.25 HCl(aq, 5 H2O)";
        let equation = Equation::parse(text).unwrap();
        assert_eq!(
            equation.to_string(),
            "3/2 O2(g) + CO(g) + 2 H2(g) -> 1/4 HCl(aq, 5 H2O)"
        );
        let written: Vec<_> = equation
            .left
            .iter()
            .map(|term| term.coefficient_text.as_str())
            .collect();
        assert_eq!(written, ["1.5", "1", "4/2"]);
        assert_eq!(&text[equation.left[2].span.clone()], "4/2 H2(g)");
    }

    #[test]
    fn pieces_are_joined_across_terms() {
        let equation = Equation::parse("aniline + 2 H2(g) -> e-").unwrap();
        assert_eq!(
            equation.pieces(),
            [
                Piece::Text("aniline + 2 H".into()),
                Piece::Sub("2".into()),
                Piece::Text("(g) → e".into()),
                Piece::Sup("\u{2212}".into()),
            ]
        );
    }
}
