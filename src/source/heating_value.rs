//! A heating value with everything that its working needs: the components of a fuel, what they
//! burn to, and the conditions of a volume.

use crate::case::{Constant, Moisture};
use crate::finding::Span;
use crate::notation::Species;
use crate::quantity::{Exact, FractionBasis};

use super::combustion_equation::Combustion;
use super::problem::ProblemTerm;

/// A fuel with its components resolved. Indices are those of values used and of paths.
#[derive(Clone, Debug)]
pub struct ProblemHeatingValue {
    pub id: String,
    /// Combustion reference temperature, K.
    pub kelvin: Exact,
    pub at: Constant,
    pub basis: FractionBasis,
    /// Of the composition as it is stated.
    pub moisture: Moisture,
    /// Of the results.
    pub state: Moisture,
    /// In the order of the case; water that the moisture content adds comes last.
    pub components: Vec<FuelComponent>,
    /// Paths of liquid and gaseous water, where hydrogen makes water.
    pub water: Option<[usize; 2]>,
    pub metering: Option<ProblemMetering>,
    pub gas_constant: Option<usize>,
    /// Whether all was found; otherwise a `stop` says what was not.
    pub complete: bool,
    pub source: Option<String>,
    pub span: Span,
}

/// A component of a fuel.
#[derive(Clone, Debug)]
pub struct FuelComponent {
    /// As the case writes it.
    pub label: String,
    pub species: Species,
    pub share: FuelShare,
    pub combustion: Combustion,
    pub heat: ComponentHeat,
    /// Atomic weights with the number of atoms.
    pub molar_mass: Vec<(usize, Exact)>,
}

/// How much of the fuel a component is.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum FuelShare {
    /// The fraction among the values used.
    Stated(usize),
    /// What the others leave.
    Balance,
    /// The moisture content of the fuel as received.
    Moisture(usize),
}

/// Where the molar heating value of a component comes from.
#[derive(Clone, Debug)]
pub enum ComponentHeat {
    /// Nothing burns and nothing condenses.
    Nothing,
    /// A combustion enthalpy that the source prints at the temperature asked for.
    Printed { value: usize },
    /// The Hess sum of the combustion equation.
    Hess { terms: Vec<ProblemTerm> },
}

/// The conditions that a volume refers to.
#[derive(Clone, Debug)]
pub struct ProblemMetering {
    pub kelvin: Exact,
    pub pascal: Exact,
    pub compression: Option<ProblemCompression>,
    pub span: Span,
}

/// What the compression factor comes from; values used, in the order of the components.
#[derive(Clone, Debug)]
pub enum ProblemCompression {
    Factor(usize),
    Summation(Vec<usize>),
    SecondVirial(usize),
}
