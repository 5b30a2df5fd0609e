//! The problem: a case resolved against its sources, ready to be worked.

use std::collections::BTreeSet;

use crate::finding::{Finding, Span};
use crate::notation::{Equation, Species};
use crate::quantity::{Correlations, Decimal, Exact, InputUncertainty, Quantity, Significance};

use super::cycle::ProblemCycle;
use super::heat_capacity::HeatCapacity;
use super::heating_value::ProblemHeatingValue;
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
    /// Index of the source that stands for what the case itself states.
    pub case_source: usize,
    /// For each name in `consult`, the index of the source that it became.
    pub became: Vec<(String, usize)>,
    pub substances: Vec<Substance>,
    pub values: Vec<ValueUsed>,
    pub reactions: Vec<ProblemReaction>,
    /// Each after those that it rests on.
    pub cycles: Vec<ProblemCycle>,
    pub heating_values: Vec<ProblemHeatingValue>,
    /// Molar enthalpies of substances at the temperatures asked for.
    pub paths: Vec<EnthalpyPath>,
    /// Paths along a heat capacity of which the case states two bounds, by rising `low`.
    pub bounded: Vec<BoundedPath>,
    /// Between values used, by their index.
    pub correlations: Correlations,
    pub reference_states: ReferenceStates,
    /// The formulas that the case names, also of substances that no entry serves for (Hill order).
    pub named_formulas: BTreeSet<String>,
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
    /// The serving source.
    pub source: usize,
    /// Index of its printed formation enthalpy among the values used; none where the source
    /// gives the form by its function of temperature alone.
    pub value: Option<usize>,
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
    CombustionEnthalpy,
    HeatCapacity,
    IntegrationConstant,
    TransitionEnthalpy,
    RelativeEnthalpy,
    AtomicWeight,
    GasConstant,
    MeasuredHeat,
    Correlation,
    Fraction,
    CompressionData,
    Input,
}

impl ValueKind {
    pub fn word(self) -> &'static str {
        match self {
            ValueKind::FormationEnthalpy => "formation-enthalpy",
            ValueKind::CombustionEnthalpy => "combustion-enthalpy",
            ValueKind::HeatCapacity => "heat-capacity",
            ValueKind::IntegrationConstant => "integration-constant",
            ValueKind::TransitionEnthalpy => "transition-enthalpy",
            ValueKind::RelativeEnthalpy => "relative-enthalpy",
            ValueKind::AtomicWeight => "atomic-weight",
            ValueKind::GasConstant => "gas-constant",
            ValueKind::MeasuredHeat => "measured-heat",
            ValueKind::Correlation => "correlation-coefficient",
            ValueKind::Fraction => "fraction",
            ValueKind::CompressionData => "compression-data",
            ValueKind::Input => "input",
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
    /// The number as printed. For a heat-capacity function its error: zero, with the uncertainty
    /// that is stated for it; what is printed is then `function`.
    pub printed: Quantity,
    pub function: Option<HeatCapacity>,
    /// Values used that a heat capacity is worked from, with ∂C_p/∂x in J/(mol K) per unit of
    /// each as printed. Its own uncertainty is then what they leave.
    pub made_of: Vec<(usize, Exact)>,
    pub significance: Significance,
    pub uncertainty: InputUncertainty,
    pub locator: String,
    pub note: Option<String>,
    pub standing: Standing,
    /// Where the case first names it.
    pub used_at: Span,
}

impl ValueUsed {
    /// What the source prints, in plain text without the unit.
    pub fn printed_text(&self) -> String {
        match &self.function {
            Some(function) => function_text(function),
            None => self.printed.printed_number().to_string(),
        }
    }
}

/// Form, range and coefficients of a function in plain text.
fn function_text(function: &HeatCapacity) -> String {
    let printed = |decimal: &Decimal| decimal.printed().to_string();
    let range = function.range.as_ref().map_or(String::new(), |range| {
        let [low, high] = range.each_ref().map(Quantity::to_string);
        format!(" {low} to {high}")
    });
    let coefficients = function.coefficients.iter().map(printed);
    let points = function.points.iter();
    let points = points.map(|[t, cp]| format!("{} K {}", t.printed(), cp.printed()));
    let numbers: Vec<String> = coefficients.chain(points).collect();
    let error = function.uncertainty.as_ref();
    let error = error.map_or(String::new(), |u| format!("; ± {}", u.printed()));
    format!(
        "{}{range}: {}{error}",
        function.form.word(),
        numbers.join("; ")
    )
}

/// The molar enthalpy of a substance at a temperature, on the scale of formation enthalpies: from
/// where it is known along what leads to the temperature.
#[derive(Clone, Debug)]
pub struct EnthalpyPath {
    /// Index among the substances.
    pub substance: usize,
    pub kelvin: Exact,
    pub start: Start,
    pub legs: Vec<Leg>,
    /// The function that gives the heat capacity at the end, where one was needed.
    pub end: Option<usize>,
}

impl EnthalpyPath {
    /// The values that it rests on, in their order on the way, each once.
    pub fn values(&self) -> Vec<usize> {
        let start = match self.start {
            Start::Printed { value } => vec![value],
            Start::Function { value, constant } => vec![value, constant],
        };
        let mut values = start;
        for leg in &self.legs {
            match leg {
                Leg::Heating { value, .. }
                | Leg::Concentration { value }
                | Leg::Transition { value, .. } => values.push(*value),
                Leg::Scale {
                    from_value,
                    to_value,
                    ..
                } => values.extend([*from_value, *to_value]),
            }
        }
        let mut seen = std::collections::BTreeSet::new();
        values.retain(|value| seen.insert(*value));
        values
    }
}

/// The two paths of a substance whose heat capacity lies between bounds; indices of paths.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub struct BoundedPath {
    pub low: usize,
    pub high: usize,
}

/// Where a path begins; indices are those of values used.
#[derive(Clone, Debug, PartialEq)]
pub enum Start {
    /// A printed formation enthalpy, at 298.15 K.
    Printed { value: usize },
    /// A function that carries its integration constant, at the temperature of the path.
    Function { value: usize, constant: usize },
}

/// One stretch of a path; indices are those of values used, temperatures in K.
#[derive(Clone, Debug, PartialEq)]
pub enum Leg {
    /// Heating or cooling along one function.
    Heating {
        value: usize,
        from: Exact,
        to: Exact,
    },
    /// From one function to another on the scale of their source, whose integration constants
    /// carry what lies between (other ranges, changes of phase).
    Scale {
        from_value: usize,
        from: Exact,
        to_value: usize,
        to: Exact,
    },
    /// From infinite dilution to the stated concentration, at the end of the path.
    Concentration { value: usize },
    /// A change of phase; `forward` as the source lists it.
    Transition {
        value: usize,
        kelvin: Exact,
        forward: bool,
    },
}

/// A reaction with its participants resolved.
#[derive(Clone, Debug)]
pub struct ProblemReaction {
    pub id: String,
    pub equation: Equation,
    /// Reactants first, in the order of the equation; empty where a participant has no form at
    /// the temperature, as a finding then says.
    pub terms: Vec<ProblemTerm>,
    /// Index in `terms` of the substance named by `per`.
    pub per: Option<usize>,
    /// Atomic weights for the molar mass of that substance: value index and count of atoms.
    pub molar_mass: Vec<(usize, Exact)>,
    /// The temperature of the heat, in K.
    pub kelvin: Exact,
    /// The input that states the temperature, where its uncertainty counts: index among the
    /// values used.
    pub temperature_value: Option<usize>,
    /// What the heat leaves out because the case allows it; its uncertainty does not cover that.
    pub left_out: Vec<String>,
    pub span: Span,
}

/// A participant of a reaction.
#[derive(Clone, Debug)]
pub struct ProblemTerm {
    /// Index among the substances of the problem.
    pub substance: usize,
    /// Stoichiometric number: negative for reactants, positive for products.
    pub nu: Exact,
    /// Index of the path to the temperature of the reaction; none where a finding says why.
    pub path: Option<usize>,
}
