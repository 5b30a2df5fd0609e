//! The problem: a case resolved against its sources, ready to be worked.

use crate::finding::{Finding, Span};
use crate::notation::{Equation, Species};
use crate::quantity::{Correlations, Exact, InputUncertainty, Quantity, Significance};

use super::reference_states::ReferenceStates;
use super::standing::Standing;
use super::store::Source;

/// Everything that the engine needs, every number with its origin.
#[derive(Debug)]
pub struct Problem {
    /// The conventions, the consulted sources in order, then what the results need besides.
    pub sources: Vec<Source>,
    /// How many of `sources` were consulted by the case (conventions included).
    pub consulted: usize,
    /// For each name in `consult`, the index of the source that it became.
    pub became: Vec<(String, usize)>,
    pub substances: Vec<Substance>,
    pub values: Vec<ValueUsed>,
    pub reactions: Vec<ProblemReaction>,
    /// Between values used, by their index.
    pub correlations: Correlations,
    pub reference_states: ReferenceStates,
    pub findings: Vec<Finding>,
}

/// A substance of the case, with the value that serves for it.
#[derive(Clone, Debug)]
pub struct Substance {
    /// As the case writes it: an id or a species.
    pub label: String,
    /// The form that the serving source lists.
    pub species: Species,
    pub name: Option<String>,
    /// Index of its formation enthalpy among the values used.
    pub value: usize,
    pub comparisons: Vec<Comparison>,
    /// Why the case chose the source, where it did.
    pub because: Option<String>,
}

/// The same value in another source that was consulted.
#[derive(Clone, Debug)]
pub struct Comparison {
    pub source: usize,
    pub printed: Quantity,
    pub locator: String,
    /// Other value less the value used, in the unit of the value used.
    pub difference: Exact,
    pub judgement: Judgement,
}

/// How a difference between two sources compares with what they state.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum Judgement {
    /// Within the combined expanded uncertainty (k = 2), in the unit of the value used.
    Within { combined: f64, complete: bool },
    /// Beyond it, or beyond what the one source states that states any.
    Beyond { combined: f64, complete: bool },
    /// Equal to the printed digits, or no uncertainty to judge by.
    NotJudged { equal: bool },
}

/// Which kind of value it is.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum ValueKind {
    FormationEnthalpy,
    AtomicWeight,
}

impl ValueKind {
    pub fn word(self) -> &'static str {
        match self {
            ValueKind::FormationEnthalpy => "formation-enthalpy",
            ValueKind::AtomicWeight => "atomic-weight",
        }
    }
}

/// An entry's printed value that reaches a result.
#[derive(Clone, Debug)]
pub struct ValueUsed {
    /// Index among the sources of the problem.
    pub source: usize,
    pub kind: ValueKind,
    /// The substance as the source writes it, in plain notation.
    pub substance: String,
    pub species: Option<Species>,
    pub name: Option<String>,
    pub cas: Option<String>,
    pub printed: Quantity,
    pub significance: Significance,
    pub uncertainty: InputUncertainty,
    pub locator: String,
    pub note: Option<String>,
    pub standing: Standing,
    /// Where the case first names it.
    pub used_at: Span,
}

/// A reaction with its participants resolved.
#[derive(Clone, Debug)]
pub struct ProblemReaction {
    pub id: String,
    pub equation: Equation,
    /// Reactants first, in the order of the equation.
    pub terms: Vec<ProblemTerm>,
    /// Index in `terms` of the substance named by `per`.
    pub per: Option<usize>,
    /// Atomic weights for the molar mass of that substance: value index and count of atoms.
    pub molar_mass: Vec<(usize, Exact)>,
    /// The temperature that the case asks for, in K.
    pub temperature: Option<(Quantity, Span)>,
    pub span: Span,
}

/// A participant of a reaction.
#[derive(Clone, Debug)]
pub struct ProblemTerm {
    /// Index among the substances of the problem.
    pub substance: usize,
    /// Stoichiometric number: negative for reactants, positive for products.
    pub nu: Exact,
}
