//! Enthalpies at a temperature, and the heat of a reaction there.

use crate::quantity::{Exact, LinearForm, Real, Significance, Unit, to_f64};
use crate::source::{EnthalpyPath, HeatCapacity, Leg, Problem, Start, ValueUsed};

use super::worked::Worked;

/// What one participant adds to a heat at a temperature.
#[derive(Clone, Debug)]
pub struct HeatTerm {
    /// Index among the substances of the problem.
    pub substance: usize,
    /// Index among the paths of the problem.
    pub path: usize,
    /// Stoichiometric number, negative for reactants.
    pub nu: Exact,
    /// Where the path starts, J/mol.
    pub start: Worked,
    /// What its legs add, J/mol, in their order.
    pub legs: Vec<Worked>,
    /// The sum of both, J/mol.
    pub molar: Worked,
    /// ν times the molar enthalpy, in the unit of the sum.
    pub contribution: Worked,
}

/// The heat of a reaction at a temperature, per mole of reaction as written.
#[derive(Clone, Debug)]
pub struct HeatAt {
    pub terms: Vec<HeatTerm>,
    pub sum: Worked,
}

/// Δ_rH°(T) = Σ ν_i·H_i(T) in `unit` (energy per amount of substance), where
/// H_i(T) = Δ_fH°_i(298.15 K) + ∫ C_p,i dT + Σ Δ_trsH_i along the path of each participant.
/// G. Kirchhoff, Ann. Phys. Chem. 103 (1858) 177 (from memory).
///
/// Exact where every function is rational in the temperature. Limits: ideal gases and pure
/// condensed phases at standard pressure; heat capacities inside the ranges of their functions
/// (the resolver sees to that); the reference state of the elements stays at 298.15 K.
pub fn heat_at(problem: &Problem, terms: &[(usize, Exact)], unit: &Unit) -> HeatAt {
    let terms: Vec<HeatTerm> = terms
        .iter()
        .map(|(path, nu)| heat_term(problem, *path, nu, unit))
        .collect();
    HeatAt {
        sum: Worked::sum(terms.iter().map(|term| &term.contribution)),
        terms,
    }
}

fn heat_term(problem: &Problem, path: usize, nu: &Exact, unit: &Unit) -> HeatTerm {
    let (start, legs) = parts(problem, &problem.paths[path]);
    let molar = Worked::sum(std::iter::once(&start).chain(&legs));
    HeatTerm {
        substance: problem.paths[path].substance,
        path,
        nu: nu.clone(),
        contribution: molar.times_exact(&(nu / unit.factor())),
        start,
        legs,
        molar,
    }
}

/// The molar enthalpy at the end of a path, J/mol.
pub fn molar_enthalpy(problem: &Problem, path: &EnthalpyPath) -> Worked {
    let (start, legs) = parts(problem, path);
    Worked::sum(std::iter::once(&start).chain(&legs))
}

fn parts(problem: &Problem, path: &EnthalpyPath) -> (Worked, Vec<Worked>) {
    let legs = path.legs.iter().map(|leg| leg_enthalpy(problem, leg));
    (start_enthalpy(problem, path), legs.collect())
}

fn start_enthalpy(problem: &Problem, path: &EnthalpyPath) -> Worked {
    match path.start {
        Start::Printed { value } => Worked::printed(problem, value, 1),
        Start::Function { value, constant } => {
            let (function, r) = function(problem, value);
            let mut form = LinearForm::default();
            // The constant is what the formation enthalpy would be; an error of the heat capacity
            // counts from 298.15 K on.
            form.add_scaled(constant, &Real::Exact(r.clone()));
            let way = &path.kelvin - crate::source::reference_kelvin();
            form.add_scaled(value, &Real::Exact(way));
            Worked {
                value: worked(function.enthalpy(&path.kelvin, &r)),
                significance: Significance::Unlimited,
                form,
            }
        }
    }
}

fn leg_enthalpy(problem: &Problem, leg: &Leg) -> Worked {
    match leg {
        Leg::Heating { value, from, to } => heating(problem, *value, from, to),
        Leg::Scale {
            from_value,
            from,
            to_value,
            to,
        } => scale(problem, (*from_value, from), (*to_value, to)),
        Leg::Concentration { value } => Worked::printed(problem, *value, 1),
        Leg::Transition { value, forward, .. } => {
            let sign = if *forward { 1 } else { -1 };
            Worked::printed(problem, *value, sign)
        }
    }
}

/// ∫ C_p dT along one function. An error of the heat capacity that is the same over the range
/// counts with the length of the way.
fn heating(problem: &Problem, value: usize, from: &Exact, to: &Exact) -> Worked {
    let (function, r) = function(problem, value);
    let increment = worked(function.increment(from, to, &r));
    let way = to - from;
    let mut form = LinearForm::default();
    form.add_scaled(value, &Real::Exact(way.clone()));
    for (part, sensitivity) in &problem.values[value].made_of {
        form.add_scaled(*part, &Real::Exact(sensitivity * &way));
    }
    Worked {
        significance: heating_significance(&problem.values[value], &increment, &way),
        value: increment,
        form,
    }
}

/// A constant heat capacity gives its increment as many digits as it has itself.
fn heating_significance(value: &ValueUsed, increment: &Real, way: &Exact) -> Significance {
    match (value.significance, increment.to_exact()) {
        (Significance::Place(_), Some(increment)) if *way != Exact::from_integer(0.into()) => {
            let heat_capacity = &increment / way;
            value.significance.times_exact(&heat_capacity, way)
        }
        (other, _) => other,
    }
}

/// H_b(T_b) − H_a(T_a) of two functions whose integration constants share one scale.
fn scale(problem: &Problem, from: (usize, &Exact), to: (usize, &Exact)) -> Worked {
    let (start, r) = function(problem, from.0);
    let (end, _) = function(problem, to.0);
    let difference = worked(end.enthalpy(to.1, &r)).minus(&worked(start.enthalpy(from.1, &r)));
    let bound = end.range_kelvin().map(|[low, high]| match to.1 > from.1 {
        true => low,
        false => high,
    });
    let bound = bound.unwrap_or_else(|| from.1.clone());
    let mut form = LinearForm::default();
    form.add_scaled(from.0, &Real::Exact(&bound - from.1));
    form.add_scaled(to.0, &Real::Exact(to.1 - &bound));
    Worked {
        value: difference,
        significance: Significance::Unlimited,
        form,
    }
}

fn function(problem: &Problem, value: usize) -> (&HeatCapacity, Exact) {
    let used = &problem.values[value];
    let head = &problem.sources[used.source].head;
    let r = head.gas_constant.as_ref();
    let r = r.map_or_else(|| Exact::from_integer(0.into()), |r| r.value());
    // Paths name values that are functions: the resolver makes both together.
    (
        used.function.as_ref().expect("a path runs along functions"),
        r,
    )
}

/// The resolver has seen to it that the function reaches.
fn worked(value: Option<Real>) -> Real {
    value.unwrap_or(Real::Float(f64::NAN))
}

/// ΔC_p = Σ ν_i·C_p,i(T), J/(mol K), where every path knows its heat capacity at the end.
pub(super) fn heat_capacity_change(problem: &Problem, terms: &[(usize, Exact)]) -> Option<f64> {
    let parts = terms.iter();
    let parts = parts.map(|(path, nu)| Some(to_f64(nu) * heat_capacity_at(problem, *path)?));
    parts.sum()
}

/// C_p of a substance at the end of a path, J/(mol K), where a function is known there.
pub fn heat_capacity_at(problem: &Problem, path: usize) -> Option<f64> {
    let path = problem.paths.get(path)?;
    let (function, r) = function(problem, path.end?);
    function.at(to_f64(&path.kelvin), to_f64(&r))
}
