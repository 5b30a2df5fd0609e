//! Chemical notation: elements, formulas, phases, species and reaction equations.
//!
//! Responsible for reading IUPAC notation as text, for writing it back in one canonical
//! form, for cutting it into pieces for typesetting, and for whether an equation balances.
//! Everything is exact. Nothing here knows of sources, values, units or case files, and
//! what a declared name stands for is left to the caller.
//!
//! The notation follows the IUPAC recommendations of 2005 for inorganic formulas
//! (chapter IR-4) and the phase symbols of the IUPAC Green Book, both from memory; `^`
//! marks a charge number in plain text.

mod arrow;
mod balance;
mod charge_parse;
mod cursor;
mod dilution;
mod element;
mod equation;
mod equation_fault;
mod equation_parse;
mod error;
mod formula;
mod formula_fault;
mod formula_parse;
mod formula_tree;
mod number;
mod participant;
mod phase;
mod phase_fault;
mod piece;
mod species;

#[cfg(test)]
mod tests;

pub use balance::{Conserved, Surplus, balanced_form, imbalance};
pub use dilution::Dilution;
pub use element::Element;
pub use equation::{Equation, Side, Term};
pub use equation_fault::EquationFault;
pub use error::{Bounded, NotationError, NotationErrorKind};
pub use formula::Formula;
pub use formula_fault::{BracketFault, ChargeFault, FormulaFault};
pub use number::{NumberFault, NumberRole};
pub use participant::Participant;
pub use phase::{Phase, PhaseLabel};
pub use phase_fault::PhaseFault;
pub use piece::Piece;
pub use species::Species;
