//! What `results.json` says of the adjustment of redundant determinations.

use serde_json::{Value, json};

use crate::calculation::Calculation;
use crate::engine::{Adjustment, CycleSum};
use crate::quantity::to_f64;
use crate::source::ProblemCycle;

/// By result, unrounded; heats in the unit of the result.
pub(super) fn adjustments(calculation: &Calculation) -> Vec<(String, Value)> {
    let each = calculation.working.cycles.iter().filter_map(|working| {
        let cycle = &calculation.problem.cycles[working.cycle];
        let (adjustment, sum) = (working.adjustment.as_ref()?, working.sum.as_ref()?);
        Some((
            format!("{}.heat", cycle.id),
            document(cycle, adjustment, sum),
        ))
    });
    each.collect()
}

fn document(cycle: &ProblemCycle, adjustment: &Adjustment, sum: &CycleSum) -> Value {
    let steps = cycle.steps.iter().enumerate().map(|(index, step)| {
        json!({
            "step": step.name,
            "multiplier": to_f64(&sum.weights[index]),
            "standard-uncertainty": adjustment.standard[index],
            "residual": to_f64(&adjustment.residuals[index]),
            "normalised-residual": adjustment.normalised[index],
            "redundancy": adjustment.redundancy[index],
        })
    });
    json!({
        "chi-square": adjustment.chi_square,
        "degrees-of-freedom": adjustment.degrees_of_freedom,
        "probability": adjustment.probability,
        "birge-ratio": adjustment.birge_ratio(),
        "inflation": sum.inflation,
        "steps": steps.collect::<Vec<_>>(),
    })
}
