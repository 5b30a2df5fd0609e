//! A cycle as typed data: a target and the measured steps that lead round it.

use super::given::Given;
use crate::finding::{Located, Span};
use crate::notation::Equation;
use crate::quantity::Quantity;

/// A heat that follows from the measured heats of other reactions.
#[derive(Clone, Debug)]
pub struct Cycle {
    pub id: Located<String>,
    pub target: Located<Equation>,
    pub steps: Vec<CycleStep>,
    /// Between the heats of two steps, as whoever measured them states.
    pub correlations: Vec<StepCorrelation>,
    /// Where the case asks for uncertainties inflated by the Birge ratio.
    pub inflate: Option<Span>,
}

/// A determination.
#[derive(Clone, Debug)]
pub struct CycleStep {
    /// A name inside the cycle.
    pub id: Option<Located<String>>,
    /// None where the heat is a result, whose own equation then holds.
    pub equation: Option<Located<Equation>>,
    pub heat: StepHeat,
    /// The participant that the heat is per mole or per mass of; none for the reaction as
    /// written.
    pub per: Option<Located<String>>,
    pub measured: Measured,
    /// Whether the result was reduced to standard states (Washburn corrections).
    pub reduced: bool,
    pub temperature: Option<Given>,
    pub source: Option<String>,
    pub locator: Option<String>,
    pub span: Span,
}

/// Where the heat of a step comes from.
#[derive(Clone, Debug)]
pub enum StepHeat {
    Given(Given),
    /// The combustion enthalpy that a consulted source lists for this participant.
    CombustionOf(Located<String>),
}

/// What a calorimeter gives.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Measured {
    /// At constant pressure.
    Enthalpy,
    /// At constant volume, in a bomb.
    InternalEnergy,
}

/// A correlation between the heats of two steps, by their place among the steps.
#[derive(Clone, Debug)]
pub struct StepCorrelation {
    pub between: [usize; 2],
    pub coefficient: Quantity,
    /// Whose statement it is, and where it stands there.
    pub source: Option<String>,
    pub locator: Option<String>,
    pub span: Span,
}

/// How messages call a step: its id, or its number counted from one.
pub fn step_name(id: Option<&str>, index: usize) -> String {
    match id {
        Some(id) => id.to_string(),
        None => format!("step {}", index + 1),
    }
}
