//! The engine: a resolved problem worked to results. Pure: no files, no clock, no text layout.
//!
//! One file per method. Each method's docstring names its published source, its units and its
//! limits.

mod formation;
mod hess;
mod outcome;
mod per;
mod reference;
mod standing;
mod work;

pub use formation::{FormationEquation, formation_equation};
pub use hess::{Hess, HessTerm};
pub use outcome::{COVERAGE, Direction, Outcome, StatedBy};
pub use per::MolarMass;
pub use work::{ReactionWorking, WorkOptions, Working, work};
