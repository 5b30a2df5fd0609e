//! A cycle resolved: vectors of stoichiometric numbers, and where each heat comes from.

use crate::finding::Span;
use crate::notation::{Equation, Species};
use crate::quantity::Exact;

/// A cycle ready to be worked.
#[derive(Clone, Debug)]
pub struct ProblemCycle {
    pub id: String,
    pub target: Equation,
    /// What takes part in the target and the steps; vectors of numbers follow this order.
    pub species: Vec<CycleSpecies>,
    /// The stoichiometric numbers of the target, negative for what is consumed.
    pub numbers: Vec<Exact>,
    pub steps: Vec<ProblemStep>,
    /// Between the heats of two steps, as the case states them.
    pub correlations: Vec<StatedCorrelation>,
    /// Index of R among the values used, where a step needs it.
    pub gas_constant: Option<usize>,
    /// Whether the case asks for uncertainties inflated by the Birge ratio.
    pub inflate: bool,
    pub span: Span,
}

impl ProblemCycle {
    /// The temperature that all steps share, in K; none where they do not.
    pub fn kelvin(&self) -> Option<&Exact> {
        let first = &self.steps.first()?.kelvin;
        let shared = self.steps.iter().all(|step| step.kelvin == *first);
        shared.then_some(first)
    }
}

/// A coefficient that the case states, with its row among the values used.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub struct StatedCorrelation {
    /// Indices of steps.
    pub between: [usize; 2],
    /// Index among the values used.
    pub value: usize,
}

/// A participant of the target or of a step.
#[derive(Clone, Debug, PartialEq)]
pub struct CycleSpecies {
    /// What tells it from others: its id, or formula and phase.
    pub key: String,
    /// As the case writes it.
    pub label: String,
    pub species: Species,
}

/// A determination with its heat resolved.
#[derive(Clone, Debug)]
pub struct ProblemStep {
    /// Its id, or "step 3".
    pub name: String,
    pub equation: Equation,
    /// By species of the cycle; negative for what is consumed.
    pub numbers: Vec<Exact>,
    pub heat: StepSource,
    pub bomb: Option<Bomb>,
    /// K
    pub kelvin: Exact,
    pub span: Span,
}

/// Where the heat of a step comes from.
#[derive(Clone, Debug)]
pub enum StepSource {
    /// A value used.
    Value { value: usize, per: Basis },
    /// A result of the case, of the equation of the step.
    Result { name: String },
}

/// What the printed heat is referred to.
#[derive(Clone, Debug, PartialEq)]
pub enum Basis {
    /// One mole of the reaction as written.
    Reaction,
    /// One mole of a participant: the index of its species and |ν|.
    Mole { species: usize, nu: Exact },
    /// The mass of a participant; its atomic weights as index among the values used and count.
    Mass {
        species: usize,
        nu: Exact,
        weights: Vec<(usize, Exact)>,
    },
}

/// A heat that was measured at constant volume.
#[derive(Clone, Debug)]
pub struct Bomb {
    /// Σν of the gases of the equation.
    pub gas_moles: Exact,
    /// Whether the result holds for standard states.
    pub reduced: bool,
    /// The input that states the temperature with an uncertainty, among the values used.
    pub temperature_value: Option<usize>,
}
