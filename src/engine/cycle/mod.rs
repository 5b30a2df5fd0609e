//! A heat from the measured heats of other reactions.
//!
//! Heats of steps (`heat`), their multipliers (`multipliers`), the adjustment of redundant
//! determinations (`covariance`, `adjust`, `chi_square`, `without`), and what has to be said (`findings`,
//! `words`).

mod adjust;
mod chi_square;
mod covariance;
mod findings;
mod heat;
mod multipliers;
mod without;
mod words;

use num_traits::Zero;

use crate::quantity::{Exact, LinearForm, Real, Significance, Unit, to_f64};
use crate::source::{Problem, ProblemCycle, StepSource};

use super::outcome::Outcome;
use super::work::{WorkOptions, Working};
use super::worked::Worked;

pub use adjust::{Adjustment, Checked};
pub use chi_square::critical;
pub use heat::StepHeat;
pub use multipliers::{Multipliers, NoMultipliers};
pub use without::Without;
pub use words::{closure_text, decimals, global_test, local_test, weakness};

use adjust::adjust;
use covariance::Covariances;
use findings::Say;
use multipliers::multipliers;
use words::chi_square_text;

/// The probability below which determinations are said to disagree.
pub const SIGNIFICANCE_LEVEL: f64 = 0.05;
/// The normalised residual beyond which a determination is said not to fit: the two-sided 0.1 %
/// of a normal distribution, as W. Baarda proposed (1968, from memory).
pub const CRITICAL_RESIDUAL: f64 = 3.29;

/// One cycle as it was worked.
#[derive(Debug)]
pub struct CycleWorking {
    /// Index among the cycles of the problem.
    pub cycle: usize,
    /// By step; none where the result that it rests on is not there.
    pub heats: Vec<Option<StepHeat>>,
    /// What the steps count in the target, and what closes; or why they do not make it up.
    pub multipliers: Result<Multipliers, NoMultipliers>,
    /// Where several determinations check each other.
    pub adjustment: Option<Adjustment>,
    /// What there would be without the one determination that does not fit; for information.
    pub without: Option<Without>,
    /// What was done; none where a `stop` says why there is no result.
    pub sum: Option<CycleSum>,
}

/// The sum that gives the heat of the target.
#[derive(Clone, Debug)]
pub struct CycleSum {
    /// By step, what it is multiplied by.
    pub weights: Vec<Exact>,
    pub heat: Worked,
    /// The factor by which the uncertainty was inflated; one where the case does not ask for it.
    pub inflation: f64,
}

/// Works a cycle and registers its result, `<id>.heat`, per mole of the target as written.
///
/// Δ_rH°(target) = Σ w_j·Δ_rH°(step j) with Σ w_j·(equation j) = target: G. H. Hess, Ann. Phys.
/// Chem. 50 (1840) 385 (from memory). The multipliers are found over the rational numbers. Where
/// the steps leave a choice, the one of least variance is taken: see [`adjust::adjust`]. Units:
/// those of the case's results. Limits: all steps at one temperature and in their standard
/// states; uncertainties to first order.
pub(super) fn work_cycle(
    problem: &Problem,
    options: &WorkOptions<'_>,
    index: usize,
    working: &mut Working,
) {
    let cycle = &problem.cycles[index];
    let unit = options.unit(&options.units.amount);
    let say = Say {
        problem,
        cycle,
        text: options.text,
    };
    let heats = heat::step_heats(problem, cycle, &unit, working);
    let steps: Vec<Vec<Exact>> = cycle.steps.iter().map(|s| s.numbers.clone()).collect();
    let found = multipliers(&cycle.numbers, &steps);
    working.findings.extend(say.before(&heats, &found));
    let mut adjustment = None;
    let mut without = None;
    let mut sum = None;
    let complete: Option<Vec<Worked>> = heats
        .iter()
        .map(|h| Some(h.as_ref()?.heat.clone()))
        .collect();
    if let (Some(heats), Ok(found), Some(_)) = (complete, &found, cycle.kelvin()) {
        match adjusted(problem, &heats, found, &say) {
            Ok(done) => {
                working.findings.extend(say.after(found, done.as_ref()));
                sum = sum_of(cycle, &heats, found, done.as_ref());
                without = done
                    .as_ref()
                    .and_then(|all| Without::of(problem, cycle, &heats, all));
                adjustment = done;
            }
            Err(finding) => working.findings.push(finding),
        }
    }
    if let Some(sum) = &sum {
        let mut outcome = outcome(problem, options, cycle, sum, unit);
        outcome.not_covered = not_covered(cycle, sum, adjustment.as_ref(), working);
        working.push(outcome);
    }
    working.cycles.push(CycleWorking {
        cycle: index,
        heats,
        multipliers: found,
        adjustment,
        without,
        sum,
    });
}

/// The adjustment where there is anything to adjust.
fn adjusted(
    problem: &Problem,
    heats: &[Worked],
    found: &Multipliers,
    say: &Say<'_>,
) -> Result<Option<Adjustment>, crate::finding::Finding> {
    if found.closures.is_empty() {
        return Ok(None);
    }
    let forms: Vec<&LinearForm> = heats.iter().map(|heat| &heat.form).collect();
    let silent = covariance::silent(problem, &forms, &found.closures);
    if !silent.is_empty() {
        return Err(say.unweighted(&silent));
    }
    let matrix = Covariances::of(problem, &forms).matrix(&forms);
    let values = exact_heats(heats);
    let (Some(matrix), Some(values)) = (matrix, values) else {
        return Err(say.not_finite());
    };
    match adjust(&values, &matrix, found) {
        Ok(adjustment) => Ok(Some(adjustment)),
        Err(why) => Err(say.not_adjusted(why, found)),
    }
}

fn exact_heats(heats: &[Worked]) -> Option<Vec<Exact>> {
    heats.iter().map(|heat| heat.value.to_exact()).collect()
}

/// The weighted sum. It is exact where no uncertainty had a part in the multipliers.
fn sum_of(
    cycle: &ProblemCycle,
    heats: &[Worked],
    found: &Multipliers,
    adjustment: Option<&Adjustment>,
) -> Option<CycleSum> {
    let adjustment = adjustment.filter(|a| a.weights != found.particular);
    let Some(adjustment) = adjustment else {
        let parts = heats.iter().zip(&found.particular);
        let parts: Vec<Worked> = parts.map(|(heat, x)| heat.times_exact(x)).collect();
        return Some(CycleSum {
            weights: found.particular.clone(),
            heat: Worked::sum(&parts),
            inflation: 1.0,
        });
    };
    let weights = adjustment.weights.clone();
    let values = exact_heats(heats)?;
    let sum: Exact = values.iter().zip(&weights).map(|(q, w)| q * w).sum();
    let birge = adjustment.birge_ratio();
    Some(CycleSum {
        heat: Worked {
            value: Real::Float(to_f64(&sum)),
            significance: significance(heats, &values, &weights),
            form: form(heats, &weights),
        },
        inflation: if cycle.inflate && birge > 1.0 {
            birge
        } else {
            1.0
        },
        weights,
    })
}

/// Weights are exact while shared values cancel, and floats after that.
fn form(heats: &[Worked], weights: &[Exact]) -> LinearForm {
    let mut exact = LinearForm::new();
    for (heat, weight) in heats.iter().zip(weights) {
        exact.add_form(&heat.form, &Real::Exact(weight.clone()));
    }
    let mut form = LinearForm::new();
    for (index, sensitivity) in exact.iter() {
        form.add_scaled(index, &Real::Float(sensitivity.to_f64()));
    }
    form
}

/// ASTM E29 counts the digits of sums and products; a weight below one does not make the last
/// digit of a mean finer than that of the heats in it.
fn significance(heats: &[Worked], values: &[Exact], weights: &[Exact]) -> Significance {
    let of_part = |((heat, value), weight): ((&Worked, &Exact), &Exact)| {
        let product = heat.significance.times_exact(value, weight);
        match weight.is_zero() {
            true => product,
            false => Significance::sum([product, heat.significance]),
        }
    };
    Significance::sum(heats.iter().zip(values).zip(weights).map(of_part))
}

/// What the uncertainty of the result does not cover: that its determinations are apart, unless it
/// is inflated for that, and what those of the results that it rests on do not cover.
fn not_covered(
    cycle: &ProblemCycle,
    sum: &CycleSum,
    adjustment: Option<&Adjustment>,
    working: &Working,
) -> Vec<String> {
    let own = adjustment.filter(|a| a.disagrees() && sum.inflation == 1.0);
    let own = own.map(|a| {
        format!(
            "the disagreement of determinations ({})",
            chi_square_text(a)
        )
    });
    let steps = cycle.steps.iter().zip(&sum.weights);
    let counted = steps.filter(|(_, weight)| !weight.is_zero());
    let passed_on = counted.filter_map(|(step, _)| match &step.heat {
        StepSource::Result { name } => Some(&working.outcome(name)?.not_covered),
        StepSource::Value { .. } => None,
    });
    let mut all: Vec<String> = Vec::new();
    for text in own.iter().chain(passed_on.flatten()) {
        if !all.contains(text) {
            all.push(text.clone());
        }
    }
    all
}

fn outcome(
    problem: &Problem,
    options: &WorkOptions<'_>,
    cycle: &ProblemCycle,
    sum: &CycleSum,
    unit: Unit,
) -> Outcome {
    let id = format!("{}.heat", cycle.id);
    Outcome::inflated(problem, options, id, sum.heat.clone(), unit, sum.inflation)
}
