//! Which of two bounds of a heat capacity is adverse for a result.

use num_traits::Signed;

use crate::finding::{Finding, FindingCode, Severity, Text};
use crate::quantity::{Exact, Unit, to_f64, two_digits};
use crate::source::{Problem, ProblemReaction, reference_kelvin};

use super::kirchhoff::{HeatAt, heat_at};

/// Which bound a result was worked with.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Bound {
    Low,
    High,
}

impl Bound {
    pub fn word(self) -> &'static str {
        match self {
            Bound::Low => "low",
            Bound::High => "high",
        }
    }
}

/// The bound that a result was worked with for one substance.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub struct AdverseBound {
    /// Index among the substances of the problem.
    pub substance: usize,
    pub bound: Bound,
}

/// A heat worked with the bounds that are adverse for it.
#[derive(Clone, Debug)]
pub struct AdverseHeat {
    pub heat: HeatAt,
    /// Empty where no heat capacity is bounded.
    pub bounds: Vec<AdverseBound>,
    /// The heat with every bound the other way.
    pub other: Option<HeatAt>,
}

/// The heat of a reaction with each bounded heat capacity at the bound that makes more heat, be it
/// released or absorbed: of the least and the greatest heat that the bounds allow, the one of the
/// larger magnitude. Each substance goes by the sign of its own contribution ν·(H_high − H_low),
/// so that the two are the extremes of all combinations (common practice, no source).
pub fn adverse_heat(problem: &Problem, terms: &[(usize, Exact)], unit: &Unit) -> AdverseHeat {
    let bounded = bounded_terms(problem, terms);
    if bounded.is_empty() {
        return AdverseHeat {
            heat: heat_at(problem, terms, unit),
            bounds: Vec::new(),
            other: None,
        };
    }
    let least = with_bounds(problem, terms, &bounded, unit, true);
    let greatest = with_bounds(problem, terms, &bounded, unit, false);
    let (adverse, other) = match magnitude(&least.0) >= magnitude(&greatest.0) {
        true => (least, greatest),
        false => (greatest, least),
    };
    AdverseHeat {
        heat: adverse.0,
        bounds: adverse.1,
        other: Some(other.0),
    }
}

/// A term whose path has two bounds.
struct BoundedTerm {
    /// Index in the terms.
    term: usize,
    high: usize,
    /// Whether the high bound makes the heat greater.
    high_is_greater: bool,
}

fn bounded_terms(problem: &Problem, terms: &[(usize, Exact)]) -> Vec<BoundedTerm> {
    let bounded = |(term, (path, _)): (usize, &(usize, Exact))| {
        let found = problem.bounded.binary_search_by_key(path, |b| b.low).ok()?;
        let bounded = problem.bounded[found];
        let way = &problem.paths[*path].kelvin - reference_kelvin();
        Some(BoundedTerm {
            term,
            high: bounded.high,
            high_is_greater: (net(problem, terms, *path) * way).is_positive(),
        })
    };
    terms.iter().enumerate().filter_map(bounded).collect()
}

/// The stoichiometric number of a substance, which may stand on both sides.
fn net(problem: &Problem, terms: &[(usize, Exact)], path: usize) -> Exact {
    let substance = problem.paths[path].substance;
    let same = terms
        .iter()
        .filter(|(other, _)| problem.paths[*other].substance == substance);
    same.map(|(_, nu)| nu).sum()
}

fn with_bounds(
    problem: &Problem,
    terms: &[(usize, Exact)],
    bounded: &[BoundedTerm],
    unit: &Unit,
    least: bool,
) -> (HeatAt, Vec<AdverseBound>) {
    let mut chosen = terms.to_vec();
    let mut bounds = Vec::new();
    for one in bounded {
        let high = one.high_is_greater != least;
        if high {
            chosen[one.term].0 = one.high;
        }
        let bound = AdverseBound {
            substance: problem.paths[one.high].substance,
            bound: if high { Bound::High } else { Bound::Low },
        };
        if !bounds.contains(&bound) {
            bounds.push(bound);
        }
    }
    (heat_at(problem, &chosen, unit), bounds)
}

fn magnitude(heat: &HeatAt) -> Exact {
    // A heat that is no number has no magnitude.
    let sum = heat.sum.value.to_exact();
    sum.map_or_else(|| Exact::from_integer(0.into()), |sum| sum.abs())
}

/// Which bounds were taken, and what the others would have made.
pub(super) fn bounds_finding(
    problem: &Problem,
    reaction: &ProblemReaction,
    adverse: &AdverseHeat,
    unit: &Unit,
    text: &Text,
) -> Option<Finding> {
    let other = adverse.other.as_ref()?;
    let apart = magnitude(&adverse.heat) - magnitude(other);
    let bound = |bound: &AdverseBound| {
        let label = &problem.substances[bound.substance].label;
        format!("the {} bound of {label}", bound.bound.word())
    };
    let bounds: Vec<String> = adverse.bounds.iter().map(bound).collect();
    Some(Finding {
        severity: Severity::Caution,
        code: FindingCode::HeatCapacityBounds,
        message: format!(
            "{}: worked with {}, which is adverse: the heat is larger by {} {} than with the other \
             {}.",
            reaction.id,
            bounds.join(" and "),
            two_digits(to_f64(&apart)),
            unit.symbol(),
            if bounds.len() == 1 { "bound" } else { "bounds" },
        ),
        at: text.place(reaction.span.start),
    })
}
