//! Dilutions: how much water a solute is dissolved in.

use std::fmt;

use num_rational::BigRational;

use super::cursor::{Cursor, Script};
use super::error::NotationError;
use super::number::{NumberRole, decimal_text, scan_positive};
use super::phase_fault::PhaseFault;
use super::piece::Piece;

/// How far a solution is diluted.
#[derive(Clone, Debug, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub struct Dilution {
    /// Moles of water per mole of solute.
    pub water: BigRational,
}

impl Dilution {
    /// Reads `100 H2O`; infinite dilution, `∞ H2O`, is none.
    pub(super) fn read(text: &str) -> Result<Option<Self>, NotationError> {
        let mut cursor = Cursor::new(text);
        cursor.eat_while(char::is_whitespace);
        let number = scan_positive(&mut cursor, NumberRole::Water)?;
        let infinite = number.is_none() && cursor.eat(|c| c == '∞').is_some();
        match number {
            Some(number) if is_water(cursor.rest()) => Ok(Some(Self {
                water: number.value,
            })),
            None if infinite && is_water(cursor.rest()) => Ok(None),
            _ => {
                let written = text.trim().to_owned();
                let fault = PhaseFault::MalformedDilution { written };
                Err(NotationError::new(0..text.len(), fault))
            }
        }
    }

    pub(super) fn pieces(&self) -> Vec<Piece> {
        vec![
            Piece::Text(format!("{} H", decimal_text(&self.water))),
            Piece::Sub("2".to_owned()),
            Piece::Text("O".to_owned()),
        ]
    }
}

fn is_water(text: &str) -> bool {
    let plain = |c: char| Script::Subscript.digit(c).unwrap_or(c);
    text.trim().chars().map(plain).eq("H2O".chars())
}

impl fmt::Display for Dilution {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        write!(f, "{} H2O", decimal_text(&self.water))
    }
}
