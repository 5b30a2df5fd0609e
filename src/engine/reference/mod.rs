//! What it costs to mix sources of different reference temperature, pressure or reference state.

mod ions;
mod pressure;
mod state;
mod temperature;

use std::collections::BTreeSet;

use crate::finding::{Finding, FindingCode, Severity, Span, Text};
use crate::source::{ComponentHeat, Problem, ProblemTerm};

use super::work::Working;
use ions::{charge_in_water, free_electrons};
use pressure::pressure;
use state::states;
use temperature::temperature;

/// All findings about mixed references, one for each reaction and kind.
pub(super) fn check(problem: &Problem, working: &Working, text: &Text) -> Vec<Finding> {
    let mut findings = pressure(problem, text);
    let mut said = BTreeSet::new();
    for reaction in &sums(problem, working) {
        let place = text.place(reaction.span.start);
        for (severity, code, message) in temperature(problem, reaction)
            .into_iter()
            .chain(charge_in_water(problem, reaction))
            .chain(free_electrons(problem, reaction))
            .chain(states(problem, reaction))
        {
            let finding = Finding {
                severity,
                code,
                message,
                at: place.clone(),
            };
            // Components of one fuel can have the same to say.
            if said.insert(finding.message.clone()) {
                findings.push(finding);
            }
        }
    }
    findings
}

/// A sum of formation enthalpies: a reaction, or the combustion of a component of a fuel.
pub(super) struct Sum<'a> {
    pub(super) id: &'a str,
    pub(super) terms: &'a [ProblemTerm],
    span: &'a Span,
}

fn sums<'a>(problem: &'a Problem, working: &Working) -> Vec<Sum<'a>> {
    let worked = working.reactions.iter().filter(|r| r.is_worked());
    let reactions = worked.map(|reaction| {
        let reaction = &problem.reactions[reaction.reaction];
        Sum {
            id: &reaction.id,
            terms: &reaction.terms,
            span: &reaction.span,
        }
    });
    let fuels = working
        .heating_values
        .iter()
        .filter(|f| f.mixture.is_some());
    let fuels = fuels.map(|fuel| &problem.heating_values[fuel.heating_value]);
    let combustions = fuels.flat_map(|fuel| {
        let heats = fuel.components.iter().map(|component| &component.heat);
        heats.filter_map(|heat| match heat {
            ComponentHeat::Hess { terms } => Some(Sum {
                id: &fuel.id,
                terms,
                span: &fuel.span,
            }),
            ComponentHeat::Nothing | ComponentHeat::Printed { .. } => None,
        })
    });
    reactions.chain(combustions).collect()
}

pub(super) type Said = (Severity, FindingCode, String);
