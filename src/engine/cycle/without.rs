//! What a cycle would give without the one determination that does not fit.
//!
//! For information alone: no result rests on it.

use crate::quantity::{Exact, LinearForm, to_f64};
use crate::source::{Problem, ProblemCycle};

use super::super::worked::Worked;
use super::adjust::{Adjustment, adjust};
use super::covariance::Covariances;
use super::exact_heats;
use super::multipliers::multipliers;

/// The target from all determinations but one.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Without {
    /// Index among the steps.
    pub step: usize,
    /// In the unit of the heats.
    pub heat: f64,
    pub chi_square: f64,
    pub degrees_of_freedom: usize,
}

impl Without {
    /// Where the determinations disagree and one of them fits least.
    pub(super) fn of(
        problem: &Problem,
        cycle: &ProblemCycle,
        heats: &[Worked],
        all: &Adjustment,
    ) -> Option<Without> {
        let [step] = all.most_deviant_alike()[..] else {
            return None;
        };
        if !all.disagrees() {
            return None;
        }
        let steps = cycle.steps.iter().map(|s| s.numbers.clone());
        let steps = others(step, steps);
        let heats = others(step, heats.iter().cloned());
        let found = multipliers(&cycle.numbers, &steps).ok()?;
        let forms: Vec<&LinearForm> = heats.iter().map(|heat| &heat.form).collect();
        let matrix = Covariances::of(problem, &forms).matrix(&forms)?;
        let values = exact_heats(&heats)?;
        let rest = adjust(&values, &matrix, &found).ok()?;
        let heat: Exact = values.iter().zip(&rest.weights).map(|(q, w)| q * w).sum();
        Some(Without {
            step,
            heat: to_f64(&heat),
            chi_square: rest.chi_square,
            degrees_of_freedom: rest.degrees_of_freedom,
        })
    }
}

fn others<T>(step: usize, all: impl Iterator<Item = T>) -> Vec<T> {
    let kept = all.enumerate().filter(|(index, _)| *index != step);
    kept.map(|(_, one)| one).collect()
}
