//! From a cycle of the case to one that can be worked.

use std::collections::BTreeMap;

use num_traits::Zero;

use crate::case::{Cycle, CycleStep, Given, Measured, Order, StepHeat, step_name};
use crate::finding::{Fault, FaultCode, Located};
use crate::notation::{Equation, Participant, Term};
use crate::quantity::{Dimension, Exact};

use super::builtin::{ATOMIC_WEIGHTS, CONSTANTS};
use super::consult::SourceFiles;
use super::cycle::{CycleSpecies, ProblemCycle, ProblemStep, StepSource};
use super::path::reference_kelvin;
use super::resolve::Resolver;
use super::species_list::SpeciesList;

impl Resolver<'_> {
    /// The built-in sources that cycles need.
    pub(super) fn add_for_cycles(&mut self, files: &dyn SourceFiles) {
        let steps = || self.case.cycles.values().flat_map(|cycle| &cycle.steps);
        let weighed = steps().any(|step| self.is_per_mass(step));
        let bombs = steps().any(|step| step.measured == Measured::InternalEnergy);
        if weighed {
            self.add_built_in(ATOMIC_WEIGHTS, files);
        }
        if bombs {
            self.add_built_in(CONSTANTS, files);
        }
    }

    fn is_per_mass(&self, step: &CycleStep) -> bool {
        let StepHeat::Given(given) = &step.heat else {
            return false;
        };
        let quantity = given.quantity(&self.case.inputs);
        quantity.is_some_and(|q| q.unit.dimension() == Dimension::ENERGY.over(Dimension::MASS))
    }

    /// The cycles of the case, each after those that it rests on.
    pub(super) fn cycles(&mut self) -> Vec<ProblemCycle> {
        let case = self.case;
        let order = Order::of(&case.cycles);
        let mut found = Resolved::default();
        for index in order.worked {
            let Some((_, cycle)) = case.cycles.get_index(index) else {
                continue;
            };
            if let Some(resolved) = self.cycle(cycle, &found) {
                found.push(resolved);
            }
        }
        found.cycles
    }

    fn cycle(&mut self, cycle: &Cycle, earlier: &Resolved) -> Option<ProblemCycle> {
        self.check_balance(&cycle.target);
        let mut species = SpeciesList::default();
        let target = self.sum(&cycle.target.value, &mut species);
        let steps: Vec<Option<ProblemStep>> = cycle
            .steps
            .iter()
            .enumerate()
            .map(|(index, step)| self.step(cycle, index, step, &mut species, earlier))
            .collect();
        let mut steps = steps.into_iter().collect::<Option<Vec<_>>>()?;
        let mut numbers = target?;
        let size = species.all.len();
        numbers.resize(size, Exact::zero());
        for step in &mut steps {
            step.numbers.resize(size, Exact::zero());
        }
        let correlations = self.state_correlations(cycle, &steps);
        let bomb = steps.iter().any(|step| step.bomb.is_some());
        Some(ProblemCycle {
            id: cycle.id.value.clone(),
            target: cycle.target.value.clone(),
            species: species.all,
            numbers,
            gas_constant: if bomb {
                self.gas_constant_value(&cycle.target.span)
            } else {
                None
            },
            steps,
            correlations,
            inflate: cycle.inflate.is_some(),
            span: cycle.target.span.clone(),
        })
    }

    /// An equation as stoichiometric numbers; species that are new are added to the list. None
    /// where the reading of the case has reported a participant.
    fn sum(&self, equation: &Equation, species: &mut SpeciesList) -> Option<Vec<Exact>> {
        let mut numbers = Vec::new();
        for (terms, sign) in [(&equation.left, -1), (&equation.right, 1)] {
            for term in terms {
                let index = self.cycle_species(term, species)?;
                numbers.resize(species.all.len().max(numbers.len()), Exact::zero());
                numbers[index] += &term.coefficient * Exact::from_integer(sign.into());
            }
        }
        Some(numbers)
    }

    /// Measured reactions need no source that lists their substances: a species is what the case
    /// writes.
    fn cycle_species(&self, term: &Term, species: &mut SpeciesList) -> Option<usize> {
        let wanted = self.wanted(&term.participant)?;
        let key = match &term.participant {
            Participant::Declared(id) => id.clone(),
            Participant::Species(species) => species.key(),
        };
        Some(species.index(CycleSpecies {
            key,
            label: wanted.label,
            species: wanted.species,
        }))
    }

    fn step(
        &mut self,
        cycle: &Cycle,
        index: usize,
        step: &CycleStep,
        species: &mut SpeciesList,
        earlier: &Resolved,
    ) -> Option<ProblemStep> {
        let name = step_name(step.id.as_ref().map(|id| id.value.as_str()), index);
        if let Some(equation) = &step.equation {
            self.check_balance(equation);
        }
        if let StepHeat::Given(Given::Result(result)) = &step.heat {
            return self.result_step(name, step, result, species, earlier);
        }
        let equation = step.equation.as_ref()?;
        let numbers = self.sum(&equation.value, species)?;
        let value = self.step_value(cycle, step, &name)?;
        if let StepHeat::CombustionOf(burnt) = &step.heat {
            self.check_products(burnt, equation, &species.all, &numbers);
        }
        let per = self.basis(step, value, species, &numbers)?;
        Some(ProblemStep {
            name,
            equation: equation.value.clone(),
            bomb: self.bomb(step, species, &numbers),
            numbers,
            heat: StepSource::Value { value, per },
            kelvin: self.step_kelvin(step, value),
            span: step.span.clone(),
        })
    }

    /// The equation that a result is of, its temperature, and what the equation is divided by
    /// where the result is per mole of a participant. The reading of the case has checked that
    /// the result is there.
    fn result_equation(
        &mut self,
        result: &str,
        earlier: &Resolved,
    ) -> Option<(Equation, Exact, Exact)> {
        let one = Exact::from_integer(1.into());
        let (id, quantity) = result.split_once('.')?;
        let Some(reaction) = self.case.reactions.get(id) else {
            let cycle = earlier.get(id)?;
            let kelvin = cycle.kelvin().cloned().unwrap_or_else(reference_kelvin);
            return Some((cycle.target.clone(), kelvin, one));
        };
        let equation = reaction.equation.value.clone();
        let kelvin = self.temperature(reaction.temperature.as_ref()).0;
        if quantity != "heat-per" {
            return Some((equation, kelvin, one));
        }
        let per = reaction.per.as_ref()?;
        let mut terms = equation.left.iter().chain(&equation.right);
        let named = terms.find(|term| term.participant.to_string() == per.value)?;
        let nu = named.coefficient.clone();
        Some((equation, kelvin, nu))
    }

    /// A step whose heat is a result of a reaction or of a cycle that was resolved before.
    fn result_step(
        &mut self,
        name: String,
        step: &CycleStep,
        result: &Located<String>,
        species: &mut SpeciesList,
        earlier: &Resolved,
    ) -> Option<ProblemStep> {
        let (equation, kelvin, divisor) = self.result_equation(&result.value, earlier)?;
        let mut numbers = self.sum(&equation, species)?;
        numbers.iter_mut().for_each(|number| *number /= &divisor);
        if let Some(stated) = &step.equation {
            let own = self.sum(&stated.value, species)?;
            if !same(&own, &numbers) {
                self.faults.push(Fault::new(
                    FaultCode::Value,
                    self.text,
                    &stated.span,
                    format!("another equation than that of {}", result.value),
                    format!("the equation that the result is of: {equation}"),
                    "leave `equation` out of the step, or name another result",
                ));
                return None;
            }
        }
        Some(ProblemStep {
            name,
            equation: step
                .equation
                .as_ref()
                .map_or(equation, |own| own.value.clone()),
            numbers,
            heat: StepSource::Result {
                name: result.value.clone(),
            },
            bomb: None,
            kelvin,
            span: result.span.clone(),
        })
    }
}

/// Cycles that were resolved before, by their id.
#[derive(Default)]
struct Resolved {
    cycles: Vec<ProblemCycle>,
    by_id: BTreeMap<String, usize>,
}

impl Resolved {
    fn push(&mut self, cycle: ProblemCycle) {
        self.by_id.insert(cycle.id.clone(), self.cycles.len());
        self.cycles.push(cycle);
    }

    fn get(&self, id: &str) -> Option<&ProblemCycle> {
        self.cycles.get(*self.by_id.get(id)?)
    }
}

/// Equal but for zeros at the end.
fn same(a: &[Exact], b: &[Exact]) -> bool {
    let zero = Exact::zero();
    let at = |numbers: &[Exact], index: usize| numbers.get(index).unwrap_or(&zero).clone();
    (0..a.len().max(b.len())).all(|index| at(a, index) == at(b, index))
}
