//! The tables in the working of a cycle.

use num_traits::{Signed, Zero};

use crate::engine::{CycleSum, StepHeat, Worked};
use crate::quantity::Exact;
use crate::source::{Basis, Problem, ProblemCycle, ProblemStep, StepSource};

use super::cycle_equation::{equation, gases, multiplier};
use super::heat_working::shown;
use super::numerals::{printed, signed};
use super::pages::Table;
use super::rich::{Rich, Run};
use super::tables::{enthalpy, mark, number, text};

/// A cycle and the heats of its steps, all of them there.
pub(super) struct Shown<'a> {
    pub(super) problem: &'a Problem,
    pub(super) cycle: &'a ProblemCycle,
    pub(super) heats: Vec<&'a StepHeat>,
    /// The unit of the results.
    pub(super) unit: &'a str,
}

impl Shown<'_> {
    pub(super) fn steps(&self) -> impl Iterator<Item = (&ProblemStep, &StepHeat)> {
        self.cycle.steps.iter().zip(self.heats.iter().copied())
    }

    /// Each determination as it is printed, and per mole of its equation.
    pub(super) fn determinations(&self) -> Table {
        let rows = self.steps().map(|(step, heat)| {
            vec![
                Rich::plain(step.name.clone()),
                equation(self.cycle, &step.numbers, false),
                marks(step, heat),
                Rich::plain(self.as_printed(step)),
                Rich::plain(shown(&heat.measured)),
            ]
        });
        Table {
            caption: format!(
                "Determinations; the last column per mole of the equation, in {}",
                self.unit
            ),
            columns: vec![
                text("Step"),
                text("Equation"),
                mark("Row"),
                text("As printed"),
                number(Rich::plain("Heat")),
            ],
            rows: rows.collect(),
            total: None,
        }
    }

    /// "−26434 ± 3 J/g, of benzoic-acid"
    fn as_printed(&self, step: &ProblemStep) -> String {
        let (value, per) = match &step.heat {
            StepSource::Value { value, per } => (*value, per),
            StepSource::Result { name } => return format!("result {name}"),
        };
        let what = if step.bomb.is_some() { "ΔU" } else { "ΔH" };
        let printed = printed(&self.problem.values[value].printed);
        let of = match per {
            Basis::Reaction => String::new(),
            Basis::Mole { species, .. } | Basis::Mass { species, .. } => {
                format!(", of {}", self.cycle.species[*species].label)
            }
        };
        format!("{what} {printed}{of}")
    }

    /// Δn of the gases, Δn·R·T and the enthalpy, for each step that needs it.
    pub(super) fn gas_work(&self) -> Option<Table> {
        let rows = self.steps().filter_map(|(step, heat)| {
            let (bomb, work) = (step.bomb.as_ref()?, heat.gas_work.as_ref()?);
            Some(vec![
                Rich::plain(step.name.clone()),
                gases(self.cycle, step),
                Rich::plain(sign_or_zero(&bomb.gas_moles)),
                Rich::plain(shown(work)),
                Rich::plain(shown(&heat.measured)),
                Rich::plain(shown(&heat.heat)),
            ])
        });
        let rows: Vec<Vec<Rich>> = rows.collect();
        (!rows.is_empty()).then(|| Table {
            caption: format!("From internal energy to enthalpy, heats in {}", self.unit),
            columns: vec![
                text("Step"),
                text("Σν of the gases"),
                number(Rich::plain("Δ").run(Run::Italic("n".into()))),
                number(Rich::plain("Δ").run(Run::Italic("n·R·T".into()))),
                number(
                    Rich::plain("Δ")
                        .run(Run::Sub("r".into()))
                        .run(Run::Italic("U".into())),
                ),
                number(enthalpy("r")),
            ],
            rows,
            total: None,
        })
    }

    /// The steps turned and multiplied, and their sum.
    pub(super) fn multiplied(&self, sum: &CycleSum) -> Table {
        let parts = self.steps().zip(&sum.weights).filter(|(_, w)| !w.is_zero());
        let rows = parts.map(|((step, heat), weight)| {
            vec![
                Rich::plain(multiplier(&weight.abs())),
                equation(self.cycle, &step.numbers, weight.is_negative()),
                Rich::plain(step.name.clone()),
                Rich::plain(shown(&turned(heat, weight))),
                Rich::plain(shown(&heat.heat.times_exact(weight))),
            ]
        });
        let blank = Rich::default;
        Table {
            caption: format!(
                "The steps, turned and multiplied so that they add up to the target; heats in {}",
                self.unit
            ),
            columns: vec![
                mark("Times"),
                text("Equation"),
                text("Step"),
                number(enthalpy("r")),
                number(Rich::plain("Product")),
            ],
            rows: rows.collect(),
            total: Some(vec![
                blank(),
                equation(self.cycle, &self.cycle.numbers, false),
                blank(),
                blank(),
                Rich::plain(shown(&sum.heat)),
            ]),
        }
    }
}

/// What the step's heat is multiplied by is shown without its sign, so the heat carries it.
fn turned(heat: &StepHeat, weight: &Exact) -> Worked {
    match weight.is_negative() {
        true => heat.heat.times_exact(&Exact::from_integer((-1).into())),
        false => heat.heat.clone(),
    }
}

fn sign_or_zero(number: &Exact) -> String {
    if number.is_zero() {
        "0".to_string()
    } else {
        signed(number)
    }
}

/// The rows of the table of values that a step rests on.
fn marks(step: &ProblemStep, heat: &StepHeat) -> Rich {
    let mut values: Vec<usize> = heat.measured.form.iter().map(|(index, _)| index).collect();
    if let StepSource::Value { value, .. } = &step.heat {
        values.retain(|index| index != value);
        values.insert(0, *value);
    }
    let marks = values.into_iter().map(|index| Run::ValueUsed(index + 1));
    marks.fold(Rich::default(), Rich::run)
}
