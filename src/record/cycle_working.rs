//! The working of a cycle, as a careful hand calculation shows it.

use num_traits::{Signed, Zero};

use crate::calculation::Calculation;
use crate::engine::{COVERAGE, CycleSum, CycleWorking, Multipliers, Outcome, decimals};
use crate::quantity::{Exact, exact_text};
use crate::source::ProblemCycle;

use super::cycle_adjustment::adjustment_steps;
use super::cycle_checks::digits;
use super::cycle_equation::{equation, multiplier};
use super::cycle_heats::{bomb_steps, mass_steps};
use super::cycle_symbols::{cycle_sum, multiplier_condition, share};
use super::cycle_tables::Shown;
use super::numerals::unit;
use super::pages::{Step, WorkingSection};
use super::rich::Rich;
use super::stating::stating;
use super::symbols::combined_uncertainty;
use super::working::{displayed, result};

pub(super) fn cycle_sections(calculation: &Calculation) -> Vec<WorkingSection> {
    let cycles = calculation.working.cycles.iter();
    cycles
        .map(|working| section(calculation, working))
        .collect()
}

/// The target with names where the case declares them.
pub(super) fn target(cycle: &ProblemCycle) -> Rich {
    equation(cycle, &cycle.numbers, false)
}

fn section(calculation: &Calculation, working: &CycleWorking) -> WorkingSection {
    let cycle = &calculation.problem.cycles[working.cycle];
    let mut steps = vec![Step::Reaction {
        text: target(cycle),
    }];
    let outcome = calculation.working.outcome(&format!("{}.heat", cycle.id));
    match (outcome, &working.sum, &working.multipliers) {
        (Some(outcome), Some(sum), Ok(found)) => {
            let parts = Parts {
                calculation,
                cycle,
                working,
                found,
                sum,
                outcome,
            };
            steps.extend(parts.steps());
        }
        _ => steps.push(plain("Not worked: see the findings.")),
    }
    WorkingSection {
        id: cycle.id.clone(),
        heading: format!("Cycle {}", cycle.id),
        steps,
    }
}

pub(super) fn plain(text: impl Into<String>) -> Step {
    Step::Text {
        text: Rich::plain(text),
    }
}

pub(super) fn heading(text: &str) -> Step {
    Step::Heading {
        text: text.to_string(),
    }
}

struct Parts<'a> {
    calculation: &'a Calculation,
    cycle: &'a ProblemCycle,
    working: &'a CycleWorking,
    found: &'a Multipliers,
    sum: &'a CycleSum,
    outcome: &'a Outcome,
}

impl Parts<'_> {
    fn steps(&self) -> Vec<Step> {
        let unit = unit(&self.outcome.unit);
        let shown = Shown {
            problem: &self.calculation.problem,
            cycle: self.cycle,
            heats: self.working.heats.iter().flatten().collect(),
            unit: &unit,
        };
        let mut steps = self.opening();
        steps.push(Step::Table(shown.determinations()));
        steps.extend(mass_steps(&shown));
        steps.extend(bomb_steps(&shown));
        if let Some(adjustment) = &self.working.adjustment {
            let closures = &self.found.closures;
            steps.extend(adjustment_steps(
                &shown,
                closures,
                adjustment,
                self.sum,
                self.working.without.as_ref(),
            ));
        }
        steps.extend(self.multiplied(&shown));
        steps.extend(self.closing());
        steps
    }

    fn opening(&self) -> Vec<Step> {
        let kelvin = self.cycle.kelvin().map_or(String::new(), exact_text);
        let how = match self.found.closures.is_empty() {
            true => "There is exactly one set of them.",
            false => {
                "Several sets do, because determinations check each other; the one of least \
                 variance is taken."
            }
        };
        vec![
            displayed(cycle_sum()),
            displayed(multiplier_condition()),
            plain(format!(
                "The heat of this reaction follows from those of the steps below, all of them at \
                 {kelvin} K and between standard states, with multipliers w that make their \
                 equations add up to it: ν with the index of a substance i and of a step j is the \
                 stoichiometric number of the one in the equation of the other, negative for what \
                 is consumed; that of i alone is the target's. {how}"
            )),
        ]
    }

    fn multiplied(&self, shown: &Shown<'_>) -> Vec<Step> {
        let mut steps = vec![
            heading("The sum"),
            Step::Table(shown.multiplied(self.sum)),
            Step::Text {
                text: self.cancelled(),
            },
        ];
        if self.sum.weights != self.found.particular {
            steps.push(plain(
                "Long multipliers are cut for print. They need not be found again to be checked: \
                 they make the equations add up to the target, and for every line that should be \
                 zero, Σ b·w·u² over its steps is zero where the heats are independent (with V \
                 otherwise), which is the condition of least variance.",
            ));
        }
        steps
    }

    /// What stands on both sides of the multiplied steps.
    fn cancelled(&self) -> Rich {
        let mut shown: Vec<(Exact, Rich)> = Vec::new();
        for (index, species) in self.cycle.species.iter().enumerate() {
            let steps = self.cycle.steps.iter().zip(&self.sum.weights);
            let amounts: Vec<Exact> = steps.map(|(s, w)| &s.numbers[index] * w).collect();
            let made: Exact = amounts.iter().filter(|a| a.is_positive()).sum();
            let used: Exact = amounts.iter().filter(|a| a.is_negative()).map(|a| -a).sum();
            let both = if used < made { used } else { made };
            if !both.is_zero() {
                shown.push((both, Rich::from(species.species.pieces())));
            }
        }
        if shown.is_empty() {
            return Rich::plain("Nothing stands on both sides of the multiplied equations.");
        }
        let last = shown.len() - 1;
        let mut text = Rich::plain("Added up, ");
        for (at, (amount, species)) in shown.into_iter().enumerate() {
            let between = match at {
                0 => "",
                _ if at == last => " and ",
                _ => ", ",
            };
            let number = match multiplier(&amount).as_str() {
                "1" => String::new(),
                number => format!("{number} "),
            };
            text = text.and(format!("{between}{number}")).with(species);
        }
        let verb = if last == 0 { "stands" } else { "stand" };
        text.and(format!(
            " {verb} on both sides and cancel, and what is left is the target."
        ))
    }

    fn closing(&self) -> Vec<Step> {
        let mut steps = vec![heading("Uncertainty and stated digits")];
        if self.outcome.combined.standard.is_some() {
            steps.push(displayed(combined_uncertainty()));
        }
        if self.sum.inflation > 1.0 {
            steps.push(plain(format!(
                "Multiplied by the Birge ratio {}; U = {COVERAGE}·u holds that already.",
                decimals(self.sum.inflation)
            )));
        }
        steps.push(Step::Text {
            text: stating(self.outcome),
        });
        steps.extend(self.checked_share());
        steps.extend(self.shares());
        steps.push(result(self.calculation, self.outcome));
        steps
    }

    /// The part that the determinations have which check each other.
    fn checked_share(&self) -> Option<Step> {
        let adjustment = self.working.adjustment.as_ref()?;
        let checked = adjustment.redundancy.iter().any(|part| *part > 0.0);
        let text = format!(
            "By themselves the determinations that check each other leave the result a standard \
             uncertainty of {} {}, √(wᵀVw) over them.",
            digits(adjustment.checked.standard, 4),
            unit(&self.outcome.unit)
        );
        checked.then(|| plain(text))
    }

    /// What a share of the budget is where values are correlated.
    fn shares(&self) -> Vec<Step> {
        if self.cycle.correlations.is_empty() {
            return Vec::new();
        }
        vec![
            displayed(share()),
            plain(
                "Where values are correlated, the budget counts half of what a pair adds to u² \
                 with each of the two, so that the shares add up to one.",
            ),
        ]
    }
}
