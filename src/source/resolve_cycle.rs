//! From a cycle of the case to one that can be worked.

use std::collections::BTreeMap;

use num_traits::{Signed, Zero};

use crate::case::{Cycle, CycleStep, Given, Measured, Order, StepHeat, step_name};
use crate::finding::{Fault, FaultCode, Finding, FindingCode, Located, Severity};
use crate::notation::{Equation, Participant, PhaseLabel, Term};
use crate::quantity::{Dimension, Exact, Quantity, to_f64};

use super::builtin::{ATOMIC_WEIGHTS, CONSTANTS};
use super::case_values::CaseValue;
use super::consult::SourceFiles;
use super::cycle::{Basis, Bomb, CycleSpecies, ProblemCycle, ProblemStep, StepSource};
use super::path::reference_kelvin;
use super::problem::ValueKind;
use super::resolve::{Resolver, value_of};

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
        self.state_correlations(cycle, &steps);
        let bomb = steps.iter().any(|step| step.bomb.is_some());
        Some(ProblemCycle {
            id: cycle.id.value.clone(),
            target: cycle.target.value.clone(),
            species: species.all,
            numbers,
            gas_constant: if bomb {
                self.gas_constant_value(cycle)
            } else {
                None
            },
            steps,
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

    /// What the case says, the reference temperature of the table, or 298.15 K.
    fn step_kelvin(&self, step: &CycleStep, value: usize) -> Exact {
        let given = step.temperature.as_ref();
        let stated = given.and_then(|given| given.quantity(&self.case.inputs));
        let head = &self.sources[self.values[value].source].head;
        let quantity = stated.or(head.temperature.as_ref());
        quantity.map_or_else(reference_kelvin, Quantity::value_in_si)
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
        // The reading of the case has checked that the result is there.
        let (id, quantity) = result.value.split_once('.')?;
        let (equation, kelvin) = match self.case.reactions.get(id) {
            Some(reaction) => {
                let kelvin = self.temperature(reaction.temperature.as_ref()).0;
                (reaction.equation.value.clone(), kelvin)
            }
            None => {
                let cycle = earlier.get(id)?;
                let kelvin = cycle.kelvin().cloned().unwrap_or_else(reference_kelvin);
                (cycle.target.clone(), kelvin)
            }
        };
        let mut numbers = self.sum(&equation, species)?;
        if quantity == "heat-per" {
            let per = self.case.reactions.get(id)?.per.as_ref()?;
            let terms = equation.left.iter().chain(&equation.right);
            let mut named = terms.filter(|term| term.participant.to_string() == per.value);
            let nu = named.next()?.coefficient.clone();
            numbers.iter_mut().for_each(|number| *number /= &nu);
        }
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

    /// The value used that a step's heat is.
    fn step_value(&mut self, cycle: &Cycle, step: &CycleStep, name: &str) -> Option<usize> {
        match &step.heat {
            StepHeat::CombustionOf(participant) => self.combustion_value(participant),
            StepHeat::Given(Given::Input(id)) => self.input_value(&id.value),
            StepHeat::Given(Given::Stated(quantity)) => {
                let place = format!("cycles.{}, {name}", cycle.id.value);
                if step.source.is_none() {
                    self.no_source(step, &place);
                }
                let from = [&step.source, &step.locator];
                let from: Vec<&str> = from.into_iter().flatten().map(String::as_str).collect();
                let from = match from.is_empty() {
                    true => "no source stated".to_string(),
                    false => from.join(", "),
                };
                let measured = match step.measured {
                    Measured::Enthalpy => "enthalpy",
                    Measured::InternalEnergy => "internal energy",
                };
                let equation = step.equation.as_ref()?;
                Some(self.case_value(CaseValue {
                    kind: ValueKind::MeasuredHeat,
                    label: format!("{name}: {measured} of {}", equation.value),
                    species: None,
                    quantity: quantity.value.clone(),
                    locator: format!("{place}; {from}"),
                    note: None,
                    span: &quantity.span,
                }))
            }
            // Results are no values used.
            StepHeat::Given(Given::Result(_)) => None,
        }
    }

    fn no_source(&mut self, step: &CycleStep, place: &str) {
        self.findings.push(Finding {
            severity: Severity::Caution,
            code: FindingCode::NotLocated,
            message: format!(
                "{place}: the measured heat names no source. Give the report and the place in it: \
                 source = \"…\", locator = \"…\"."
            ),
            at: self.text.place(step.span.start),
        });
    }

    /// What the heat is referred to. None where no mass can be had, as a fault then says.
    fn basis(
        &mut self,
        step: &CycleStep,
        value: usize,
        species: &SpeciesList,
        numbers: &[Exact],
    ) -> Option<Basis> {
        let named = match &step.heat {
            StepHeat::CombustionOf(participant) => Some(participant),
            StepHeat::Given(_) => step.per.as_ref(),
        };
        let Some(named) = named else {
            return Some(Basis::Reaction);
        };
        let index = species.all.iter().position(|s| s.label == named.value)?;
        let nu = numbers.get(index)?.abs();
        let dimension = self.values[value].printed.unit.dimension();
        if dimension == Dimension::ENERGY.over(Dimension::AMOUNT) {
            return Some(Basis::Mole { species: index, nu });
        }
        let formula = &species.all[index].species;
        if formula.formula.charge() != 0 {
            self.faults.push(Fault::new(
                FaultCode::Value,
                self.text,
                &named.span,
                format!("a heat per mass of {formula}"),
                "a neutral substance: no mass of an ion alone is weighed",
                "give the heat per mole",
            ));
            return None;
        }
        let weights = self.weights(formula, &named.span);
        Some(Basis::Mass {
            species: index,
            nu,
            weights,
        })
    }

    fn bomb(&mut self, step: &CycleStep, species: &SpeciesList, numbers: &[Exact]) -> Option<Bomb> {
        if step.measured == Measured::Enthalpy {
            return None;
        }
        let gas = |s: &CycleSpecies| {
            let phase = s.species.phase.as_ref();
            phase.is_some_and(|phase| phase.label == PhaseLabel::Gas)
        };
        let gases = species.all.iter().zip(numbers).filter(|(s, _)| gas(s));
        let temperature_value = match &step.temperature {
            Some(Given::Input(id)) if self.is_uncertain(&id.value) => self.input_value(&id.value),
            _ => None,
        };
        Some(Bomb {
            gas_moles: gases.map(|(_, nu)| nu).sum(),
            reduced: step.reduced,
            temperature_value,
        })
    }

    fn is_uncertain(&self, input: &str) -> bool {
        let input = self.case.inputs.get(input);
        input.is_some_and(|i| i.tolerance.is_some() || i.value.value.uncertainty.is_some())
    }

    /// The molar gas constant, exact since 2019.
    fn gas_constant_value(&mut self, cycle: &Cycle) -> Option<usize> {
        let source = self.sources.iter().position(|s| s.id() == CONSTANTS)?;
        let entry = self.sources[source].of_symbol("R")?;
        let printed = entry.value.clone()?;
        let head = &self.sources[source].head;
        let span = &cycle.target.span;
        let value = value_of(source, head, ValueKind::GasConstant, &entry, printed, span);
        Some(self.enter_value(value, ""))
    }

    /// Correlations between heats that the case states.
    fn state_correlations(&mut self, cycle: &Cycle, steps: &[ProblemStep]) {
        for stated in &cycle.correlations {
            let value = |index: usize| match &steps[index].heat {
                StepSource::Value { value, .. } => Some(*value),
                StepSource::Result { .. } => None,
            };
            let [a, b] = stated.between.map(value);
            let (Some(a), Some(b)) = (a, b) else { continue };
            let coefficient = to_f64(&stated.coefficient.value());
            if let Err(error) = self.stated_correlations.state(a, b, coefficient) {
                self.faults.push(Fault::new(
                    FaultCode::Value,
                    self.text,
                    &stated.span,
                    error.found(),
                    error.expected(),
                    error.advice(),
                ));
            }
        }
    }
}

/// Species in the order in which they first appear.
#[derive(Default)]
struct SpeciesList {
    all: Vec<CycleSpecies>,
    by_key: BTreeMap<String, usize>,
}

impl SpeciesList {
    /// The place of a species, which is added where it is new.
    fn index(&mut self, species: CycleSpecies) -> usize {
        let next = self.all.len();
        let index = *self.by_key.entry(species.key.clone()).or_insert(next);
        if index == next {
            self.all.push(species);
        }
        index
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
