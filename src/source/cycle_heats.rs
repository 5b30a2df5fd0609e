//! The heats of the steps of a cycle: the values used, what they are referred to, and what a bomb
//! needs besides.

use num_traits::Signed;

use crate::case::{Cycle, CycleStep, Given, Measured, StepCorrelation, StepHeat};
use crate::finding::{Fault, FaultCode, Located};
use crate::notation::PhaseLabel;
use crate::quantity::{Dimension, Exact, Quantity, to_f64};

use super::case_values::{CaseValue, NO_SOURCE};
use super::cycle::{Basis, Bomb, CycleSpecies, ProblemStep, StatedCorrelation, StepSource};
use super::path::reference_kelvin;
use super::problem::ValueKind;
use super::resolve::Resolver;
use super::species_list::SpeciesList;

impl Resolver<'_> {
    /// The value used that a step's heat is.
    pub(super) fn step_value(
        &mut self,
        cycle: &Cycle,
        step: &CycleStep,
        name: &str,
    ) -> Option<usize> {
        match &step.heat {
            StepHeat::CombustionOf(participant) => self.combustion_value(participant),
            StepHeat::Given(Given::Input(id)) => self.input_value(&id.value),
            StepHeat::Given(Given::Stated(quantity)) => {
                self.stated_heat(cycle, step, name, quantity)
            }
            // Results are no values used.
            StepHeat::Given(Given::Result(_)) => None,
        }
    }

    /// A heat that the case states, with where it was read.
    fn stated_heat(
        &mut self,
        cycle: &Cycle,
        step: &CycleStep,
        name: &str,
        quantity: &Located<Quantity>,
    ) -> Option<usize> {
        let place = format!("cycles.{}, {name}", cycle.id.value);
        let from = stated_by(step.source.as_deref(), step.locator.as_deref());
        let measured = match step.measured {
            Measured::Enthalpy => "enthalpy",
            Measured::InternalEnergy => "internal energy",
        };
        let equation = &step.equation.as_ref()?.value;
        Some(self.case_value(CaseValue {
            kind: ValueKind::MeasuredHeat,
            label: format!("{name}: {measured} of {equation}"),
            species: None,
            quantity: quantity.value.clone(),
            locator: format!("{place}; {from}"),
            note: None,
            span: &quantity.span,
        }))
    }

    /// Correlations between heats that the case states, each with its row among the values used.
    pub(super) fn state_correlations(
        &mut self,
        cycle: &Cycle,
        steps: &[ProblemStep],
    ) -> Vec<StatedCorrelation> {
        let each = cycle.correlations.iter();
        each.filter_map(|stated| self.state_correlation(cycle, stated, steps))
            .collect()
    }

    /// None where a step's heat is a result, which the reading of the case has reported.
    fn state_correlation(
        &mut self,
        cycle: &Cycle,
        stated: &StepCorrelation,
        steps: &[ProblemStep],
    ) -> Option<StatedCorrelation> {
        let value = |index: usize| match &steps[index].heat {
            StepSource::Value { value, .. } => Some(*value),
            StepSource::Result { .. } => None,
        };
        let [a, b] = stated.between.map(value);
        let coefficient = to_f64(&stated.coefficient.decimal.value());
        if let Err(error) = self.stated_correlations.state(a?, b?, coefficient) {
            self.faults.push(Fault::new(
                FaultCode::Value,
                self.text,
                &stated.span,
                error.found(),
                error.expected(),
                error.advice(),
            ));
        }
        let [first, second] = stated.between.map(|index| steps[index].name.as_str());
        let pair = format!("{first} and {second}");
        let place = format!("cycles.{}, correlations", cycle.id.value);
        let from = stated_by(stated.source.as_deref(), stated.locator.as_deref());
        let value = self.case_value(CaseValue {
            kind: ValueKind::Correlation,
            label: pair,
            species: None,
            quantity: stated.coefficient.clone(),
            locator: format!("{place}; {from}"),
            note: None,
            span: &stated.span,
        });
        Some(StatedCorrelation {
            between: stated.between,
            value,
        })
    }

    /// What the heat is referred to. None where no mass can be had, as a fault then says.
    pub(super) fn basis(
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

    pub(super) fn bomb(
        &mut self,
        step: &CycleStep,
        species: &SpeciesList,
        numbers: &[Exact],
    ) -> Option<Bomb> {
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

    /// What the case says, the reference temperature of the table, or 298.15 K.
    pub(super) fn step_kelvin(&self, step: &CycleStep, value: usize) -> Exact {
        let given = step.temperature.as_ref();
        let stated = given.and_then(|given| given.quantity(&self.case.inputs));
        let head = &self.sources[self.values[value].source].head;
        let quantity = stated.or(head.temperature.as_ref());
        quantity.map_or_else(reference_kelvin, Quantity::value_in_si)
    }
}

/// "report RC-26-014, table 3"; it ends on `NO_SOURCE` where a locator stands alone, too.
fn stated_by(source: Option<&str>, locator: Option<&str>) -> String {
    match (source, locator) {
        (Some(source), Some(locator)) => format!("{source}, {locator}"),
        (Some(source), None) => source.to_string(),
        (None, Some(locator)) => format!("{locator}, {NO_SOURCE}"),
        (None, None) => NO_SOURCE.to_string(),
    }
}
