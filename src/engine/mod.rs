//! The engine: a resolved problem worked to results. Pure: no files, no clock, no text layout.
//!
//! One file per method. Each method's docstring names its published source, its units and its
//! limits.

mod bounds;
mod cycle;
mod formation;
mod heating_value;
mod hess;
mod kirchhoff;
mod outcome;
mod per;
mod reference;
mod standing;
mod work;
mod worked;

pub use bounds::{AdverseBound, AdverseHeat, Bound, adverse_heat};
pub use cycle::{
    Adjustment, CRITICAL_RESIDUAL, Checked, CycleSum, CycleWorking, Multipliers, NoMultipliers,
    SIGNIFICANCE_LEVEL, StepHeat, Without, closure_text, critical, decimals, global_test,
    local_test, weakness,
};
pub use formation::{FormationEquation, formation_equation};
pub use heating_value::{
    ComponentWorking, CompressionWorking, HeatingValueWorking, Mixture, SUMMATION_PRESSURE,
    VolumeWorking,
};
pub use hess::{Hess, HessTerm};
pub use kirchhoff::{HeatAt, HeatTerm, heat_at, heat_capacity_at, molar_enthalpy};
pub use outcome::{COVERAGE, Direction, Outcome, StatedBy};
pub use per::MolarMass;
pub use work::{ReactionWorking, WorkOptions, Working, work};
pub use worked::Worked;
