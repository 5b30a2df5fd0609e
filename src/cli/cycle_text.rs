//! The compact working of a cycle that `compute` prints.

use super::terminal::wrap;
use super::working_text::{number, table};
use crate::calculation::Calculation;
use crate::engine::{CycleSum, CycleWorking, global_test, local_test};
use crate::quantity::{Real, Significance, exact_text, working_text};
use crate::source::{ProblemCycle, ProblemStep, StepSource};

/// The target, then each step with its multiplier, its heat and their product.
pub(super) fn cycle(calculation: &Calculation, working: &CycleWorking) -> String {
    let cycle = &calculation.problem.cycles[working.cycle];
    let text = wrap(&format!("{}: ", cycle.id), &cycle.target.to_string());
    let outcome = calculation.working.outcome(&format!("{}.heat", cycle.id));
    let (Some(outcome), Some(sum)) = (outcome, &working.sum) else {
        return text + "  not worked, see the findings\n";
    };
    let text = text + &steps(cycle, working, sum);
    let heat = format!("{} {}", number(&sum.heat), outcome.unit.symbol());
    let text = text + &wrap("  sum ", &heat);
    match working
        .adjustment
        .as_ref()
        .filter(|a| a.degrees_of_freedom > 0)
    {
        Some(adjustment) => {
            let said = format!(
                "{}. {}",
                global_test(adjustment),
                local_test(cycle, adjustment)
            );
            text + &wrap("  ", &said)
        }
        None => text,
    }
}

fn steps(cycle: &ProblemCycle, working: &CycleWorking, sum: &CycleSum) -> String {
    let steps = cycle.steps.iter().zip(&working.heats).zip(&sum.weights);
    let rows = steps.filter_map(|((step, heat), weight)| {
        let heat = &heat.as_ref()?.heat;
        Some([
            multiplier(&exact_text(weight), weight),
            step.name.clone(),
            format!("{} {}", mark(step), number(heat)),
            number(&heat.times_exact(weight)),
        ])
    });
    table(&rows.collect::<Vec<_>>())
}

/// In full where it is short.
fn multiplier(text: &str, weight: &crate::quantity::Exact) -> String {
    if text.len() <= 8 {
        return text.to_string();
    }
    let cut = working_text(&Real::Exact(weight.clone()), Significance::Exact);
    let most = if cut.starts_with('-') { 7 } else { 6 };
    format!("{}…", cut.chars().take(most).collect::<String>())
}

fn mark(step: &ProblemStep) -> String {
    match &step.heat {
        StepSource::Value { value, .. } => format!("[{}]", value + 1),
        StepSource::Result { name } => name.clone(),
    }
}
