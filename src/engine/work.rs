//! Working a problem: every reaction, every result, every check.

use std::collections::BTreeMap;

use crate::case::{ResultUnits, RoundingRule};
use crate::finding::{Finding, FindingCode, Severity, Text};
use crate::quantity::{Exact, Real, Unit};
use crate::source::{Problem, ProblemReaction};

use super::hess::{Hess, hess_sum};
use super::outcome::{Outcome, place_in};
use super::per::{MolarMass, molar_mass, per_mass, per_mole};
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

    fn unit(&self, over: &Unit) -> Unit {
        let symbol = format!("{}/{}", self.units.energy.symbol(), over.symbol());
        // Energy over amount or mass, both of them units without a solidus of their own.
        Unit::parse(&symbol).expect("the units of a case have simple symbols")
    }
}

/// A finished working.
#[derive(Debug)]
pub struct Working {
    pub reactions: Vec<ReactionWorking>,
    /// All results, in the order of the case.
    pub outcomes: Vec<Outcome>,
    pub findings: Vec<Finding>,
    /// Index of each result by its id.
    by_id: BTreeMap<String, usize>,
}

impl Working {
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
    /// The sum, where the reaction could be worked.
    pub hess: Option<Hess>,
    pub molar_mass: Option<MolarMass>,
}

/// Works a problem.
pub fn work(problem: &Problem, options: &WorkOptions<'_>) -> Working {
    let mut working = Working {
        reactions: Vec::with_capacity(problem.reactions.len()),
        outcomes: Vec::with_capacity(problem.reactions.len()),
        findings: problem.findings.clone(),
        by_id: BTreeMap::new(),
    };
    for (index, reaction) in problem.reactions.iter().enumerate() {
        work_reaction(problem, options, index, reaction, &mut working);
    }
    let ids = working.outcomes.iter().enumerate();
    working.by_id = ids
        .map(|(index, outcome)| (outcome.id.clone(), index))
        .collect();
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
    if let Some(finding) = other_temperature(reaction, options.text) {
        working.findings.push(finding);
        working.reactions.push(ReactionWorking {
            reaction: index,
            hess: None,
            molar_mass: None,
        });
        return;
    }
    let hess = hess_sum(problem, reaction, &unit);
    working.outcomes.push(Outcome::new(
        problem,
        options,
        format!("{}.heat", reaction.id),
        Real::Exact(hess.sum.clone()),
        unit.clone(),
        hess.significance,
        hess.form.clone(),
    ));
    let mass = molar_mass(problem, reaction);
    work_per(
        problem,
        options,
        reaction,
        &hess,
        mass.as_ref(),
        &unit,
        working,
    );
    working.reactions.push(ReactionWorking {
        reaction: index,
        hess: Some(hess),
        molar_mass: mass,
    });
}

fn work_per(
    problem: &Problem,
    options: &WorkOptions<'_>,
    reaction: &ProblemReaction,
    hess: &Hess,
    mass: Option<&MolarMass>,
    unit: &Unit,
    working: &mut Working,
) {
    let nu = reaction.per.map(|index| &reaction.terms[index].nu);
    let Some(per) = nu.and_then(|nu| per_mole(hess, nu)) else {
        return;
    };
    let by_mass = options.unit(&options.units.mass);
    let mass = mass.and_then(|mass| per_mass(&per, mass, unit, &by_mass));
    let mut push = |quantity: &str, per: super::per::Per, unit: Unit| {
        working.outcomes.push(Outcome::new(
            problem,
            options,
            format!("{}.{quantity}", reaction.id),
            Real::Exact(per.value),
            unit,
            per.significance,
            per.form,
        ));
    };
    push("heat-per", per, unit.clone());
    if let Some(mass) = mass {
        push("heat-per-mass", mass, by_mass);
    }
}

/// The formation enthalpies hold at 298.15 K; a heat at another temperature is not that sum.
fn other_temperature(reaction: &ProblemReaction, text: &Text) -> Option<Finding> {
    let (asked, span) = reaction.temperature.as_ref()?;
    if asked.value_in_si() == Exact::new(29815.into(), 100.into()) {
        return None;
    }
    Some(Finding {
        severity: Severity::Stop,
        code: FindingCode::TemperatureNotWorked,
        message: format!(
            "{}: asked for at {asked}, and this version works heats at 298.15 K (25 °C) only. No \
             result is given rather than one at another temperature.",
            reaction.id
        ),
        at: text.place(span.start),
    })
}
