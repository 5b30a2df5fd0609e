//! Working a problem: every reaction, every result, every check.

use std::collections::BTreeMap;

use crate::case::{ResultUnits, RoundingRule};
use crate::finding::{Finding, FindingCode, Severity, Text};
use crate::quantity::{Exact, InputUncertainty, LinearForm, Real, Unit, exact_text, to_f64};
use crate::source::{EnthalpyPath, Leg, Problem, ProblemReaction, reference_kelvin};

use super::bounds::{adverse_heat, bounds_finding};
use super::cycle::{CycleWorking, work_cycle};
use super::heating_value::{HeatingValueWorking, work_heating_value};
use super::hess::{Hess, hess_sum};
use super::kirchhoff::{HeatAt, heat_capacity_change};
use super::outcome::{Outcome, place_in};
use super::per::{MolarMass, molar_mass, per_mass, per_mole};
use super::worked::Worked;
use super::{reference, standing};

/// How results are to be given.
pub struct WorkOptions<'a> {
    pub units: &'a ResultUnits,
    pub rounding: &'a [RoundingRule],
    /// The case's text, for the places of findings.
    pub text: &'a Text,
}

impl WorkOptions<'_> {
    /// The place that the case states a result to, in the result's own unit.
    pub(super) fn place_for(&self, id: &str, unit: &Unit) -> Option<i64> {
        let rule = self.rounding.iter().find(|rule| rule.result.value == id)?;
        place_in(rule.place, &rule.unit, unit)
    }

    pub(super) fn unit(&self, over: &Unit) -> Unit {
        let symbol = format!("{}/{}", self.units.energy.symbol(), over.symbol());
        // Energy over amount or mass, both of them units without a solidus of their own.
        Unit::parse(&symbol).expect("the units of a case have simple symbols")
    }
}

/// A finished working.
#[derive(Debug)]
pub struct Working {
    pub reactions: Vec<ReactionWorking>,
    pub cycles: Vec<CycleWorking>,
    pub heating_values: Vec<HeatingValueWorking>,
    /// All results, in the order of the case.
    pub outcomes: Vec<Outcome>,
    pub findings: Vec<Finding>,
    /// Index of each result by its id.
    by_id: BTreeMap<String, usize>,
}

impl Working {
    /// Adds a result, which others can rest on from then on.
    pub(super) fn push(&mut self, outcome: Outcome) {
        self.by_id.insert(outcome.id.clone(), self.outcomes.len());
        self.outcomes.push(outcome);
    }

    pub fn outcome(&self, id: &str) -> Option<&Outcome> {
        let index = self.by_id.get(id)?;
        self.outcomes.get(*index)
    }

    /// Whether a finding says that the working does not hold.
    pub fn is_stopped(&self) -> bool {
        self.findings
            .iter()
            .any(|finding| finding.severity == Severity::Stop)
    }
}

/// One reaction as it was worked.
#[derive(Debug)]
pub struct ReactionWorking {
    /// Index among the reactions of the problem.
    pub reaction: usize,
    /// The sum at 298.15 K, where every participant has a printed formation enthalpy.
    pub hess: Option<Hess>,
    /// The heat along the paths of the participants, where that is not the sum alone.
    pub heat: Option<HeatAt>,
    pub molar_mass: Option<MolarMass>,
}

impl ReactionWorking {
    pub fn is_worked(&self) -> bool {
        self.hess.is_some() || self.heat.is_some()
    }
}

/// Works a problem.
pub fn work(problem: &Problem, options: &WorkOptions<'_>) -> Working {
    let mut working = Working {
        reactions: Vec::with_capacity(problem.reactions.len()),
        cycles: Vec::with_capacity(problem.cycles.len()),
        heating_values: Vec::with_capacity(problem.heating_values.len()),
        outcomes: Vec::with_capacity(problem.reactions.len()),
        findings: problem.findings.clone(),
        by_id: BTreeMap::new(),
    };
    for (index, reaction) in problem.reactions.iter().enumerate() {
        work_reaction(problem, options, index, reaction, &mut working);
    }
    for index in 0..problem.cycles.len() {
        work_cycle(problem, options, index, &mut working);
    }
    for index in 0..problem.heating_values.len() {
        work_heating_value(problem, options, index, &mut working);
    }
    let text = options.text;
    working
        .findings
        .extend(reference::check(problem, &working, text));
    working
        .findings
        .extend(standing::not_compared(problem, text));
    working
        .findings
        .extend(standing::not_located(problem, text));
    working
        .findings
        .extend(standing::uncounted_zeros(problem, text));
    working
        .findings
        .extend(standing::fixed_decimals(problem, &working.outcomes, text));
    working
        .findings
        .extend(standing::incomplete(problem, &working.outcomes, text));
    let at = |id: &str| {
        let rule = options.rounding.iter().find(|rule| rule.result.value == id);
        text.place(rule.map_or(0, |rule| rule.span.start))
    };
    working
        .findings
        .extend(standing::rounding_finer(&working.outcomes, at));
    working
}

fn work_reaction(
    problem: &Problem,
    options: &WorkOptions<'_>,
    index: usize,
    reaction: &ProblemReaction,
    working: &mut Working,
) {
    let unit = options.unit(&options.units.amount);
    let paths = paths(reaction);
    let hess = paths
        .as_ref()
        .and_then(|_| hess_sum(problem, reaction, &unit));
    let at_reference = hess.is_some() && is_sum_alone(problem, reaction, paths.as_deref());
    let heat = paths.as_ref().filter(|_| !at_reference);
    let heat = heat.map(|terms| adverse_heat(problem, terms, &unit));
    let (heat, adverse) = match heat {
        Some(heat) => {
            let said = bounds_finding(problem, reaction, &heat, &unit, options.text);
            working.findings.extend(said);
            (Some(heat.heat), heat.bounds)
        }
        None => (None, Vec::new()),
    };
    let mut worked = match (&heat, &hess) {
        (Some(heat), _) => Some(heat.sum.clone()),
        (None, Some(hess)) => Some(hess.worked()),
        (None, None) => None,
    };
    let mut not_covered = not_covered(problem, reaction);
    if let (Some(worked), Some(terms)) = (&mut worked, &paths)
        && let Some(message) = temperature_error(problem, reaction, terms, &unit, &mut worked.form)
    {
        not_covered.push("the uncertainty of its temperature".to_string());
        working
            .findings
            .push(uncertain(reaction, message, options.text));
    }
    let molar_mass = match worked {
        Some(worked) => {
            let first = working.outcomes.len();
            let mass = work_results(problem, options, reaction, worked, &unit, working);
            for outcome in &mut working.outcomes[first..] {
                outcome.adverse = adverse.clone();
                outcome.not_covered = not_covered.clone();
            }
            mass
        }
        None => None,
    };
    working.reactions.push(ReactionWorking {
        reaction: index,
        hess,
        heat,
        molar_mass,
    });
}

/// What an assumption of the case lets the heat leave out or go beyond.
fn not_covered(problem: &Problem, reaction: &ProblemReaction) -> Vec<String> {
    let paths = reaction.terms.iter().filter_map(|term| term.path);
    let extended = paths
        .map(|path| &problem.paths[path])
        .filter(|path| is_extended(problem, path));
    let beyond = extended.map(|path| {
        let label = &problem.substances[path.substance].label;
        format!("the heat capacity of {label} beyond its range")
    });
    reaction.left_out.iter().cloned().chain(beyond).collect()
}

/// Whether a path follows a function beyond its range, but for the 2 K below which one may begin.
fn is_extended(problem: &Problem, path: &EnthalpyPath) -> bool {
    let outside = |value: usize, kelvin: &Exact| {
        let function = problem.values[value].function.as_ref();
        function.is_some_and(|f| !f.covers(kelvin) && !f.serves(kelvin))
    };
    path.legs.iter().any(|leg| match leg {
        Leg::Heating { value, from, to } => outside(*value, from) || outside(*value, to),
        Leg::Scale {
            from_value,
            from,
            to_value,
            to,
        } => outside(*from_value, from) || outside(*to_value, to),
        Leg::Transition { .. } | Leg::Concentration { .. } => false,
    })
}

/// Whether the sum of the printed formation enthalpies is the whole heat.
fn is_sum_alone(
    problem: &Problem,
    reaction: &ProblemReaction,
    paths: Option<&[(usize, Exact)]>,
) -> bool {
    let mut paths = paths.unwrap_or_default().iter();
    let no_legs = paths.all(|(path, _)| problem.paths[*path].legs.is_empty());
    reaction.kelvin == reference_kelvin() && no_legs
}

/// The paths of the participants with their stoichiometric numbers; none where one is missing.
fn paths(reaction: &ProblemReaction) -> Option<Vec<(usize, Exact)>> {
    if reaction.terms.is_empty() {
        return None;
    }
    let terms = reaction.terms.iter();
    terms
        .map(|term| Some((term.path?, term.nu.clone())))
        .collect()
}

/// Adds the uncertainty of the temperature: ∂Δ_rH/∂T = ΔC_p (Kirchhoff). A sentence where the
/// heat capacities for it are not known.
fn temperature_error(
    problem: &Problem,
    reaction: &ProblemReaction,
    terms: &[(usize, Exact)],
    unit: &Unit,
    form: &mut LinearForm,
) -> Option<String> {
    let value = reaction.temperature_value?;
    let used = &problem.values[value];
    if used.uncertainty == InputUncertainty::Exact {
        return None;
    }
    let Some(change) = heat_capacity_change(problem, terms) else {
        return Some(format!(
            "the uncertainty of its temperature, `{}`, is not carried: the heat capacities at {} \
             K are not all known",
            used.substance,
            exact_text(&reaction.kelvin)
        ));
    };
    let per_kelvin = change * to_f64(&(used.printed.unit.factor() / unit.factor()));
    form.add_scaled(value, &Real::Float(per_kelvin));
    None
}

fn uncertain(reaction: &ProblemReaction, message: String, text: &Text) -> Finding {
    Finding {
        severity: Severity::Caution,
        code: FindingCode::TemperatureUncertainty,
        message: format!("{}: {message}.", reaction.id),
        at: text.place(reaction.span.start),
    }
}

/// The heat, and what it is per mole and per mass of the substance that `per` names.
fn work_results(
    problem: &Problem,
    options: &WorkOptions<'_>,
    reaction: &ProblemReaction,
    heat: Worked,
    unit: &Unit,
    working: &mut Working,
) -> Option<MolarMass> {
    let mut push = |quantity: &str, worked: Worked, unit: Unit| {
        let id = format!("{}.{quantity}", reaction.id);
        working.push(Outcome::new(problem, options, id, worked, unit));
    };
    let nu = reaction.per.map(|index| &reaction.terms[index].nu);
    let per = nu.and_then(|nu| per_mole(&heat, nu));
    push("heat", heat, unit.clone());
    let mass = molar_mass(problem, reaction);
    let per = per?;
    let by_mass = options.unit(&options.units.mass);
    let worked = mass
        .as_ref()
        .and_then(|mass| per_mass(&per, mass, unit, &by_mass));
    push("heat-per", per, unit.clone());
    if let Some(worked) = worked {
        push("heat-per-mass", worked, by_mass);
    }
    mass
}
