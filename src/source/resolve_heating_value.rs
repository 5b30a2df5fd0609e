//! Resolving `[heating-values]`: a fuel and every number that its working needs.
//!
//! Leaves to others: a component of it, and the conditions of a volume.

use num_traits::{One, Zero};

use crate::case::{Constant, Given, HeatingValue};
use crate::finding::Span;
use crate::notation::{Participant, Phase, PhaseLabel, Species};
use crate::quantity::{Exact, Quantity};

use super::case_values::CaseValue;
use super::combustion_equation::Combustion;
use super::heating_value::{FuelComponent, FuelShare, ProblemHeatingValue};
use super::problem::ValueKind;
use super::resolve::Resolver;

impl Resolver<'_> {
    pub(super) fn heating_value(&mut self, fuel: &HeatingValue) -> ProblemHeatingValue {
        let kelvin = self.si(&fuel.temperature);
        let mut components = Vec::new();
        let mut complete = true;
        for part in &fuel.composition.parts {
            match self.component(fuel, part, &kelvin) {
                Some(component) => components.push(component),
                None => complete = false,
            }
        }
        if let Some(content) = &fuel.moisture_content {
            let water = self.moisture(fuel, content, &components, &kelvin);
            complete &= water.is_some();
            components.extend(water);
        }
        let hydrogen = |component: &FuelComponent| !component.combustion.hydrogen.is_zero();
        let water = match components.iter().any(hydrogen) {
            true => self.water(&kelvin, &fuel.id.span),
            false => None,
        };
        complete &= water.is_some() || !components.iter().any(hydrogen);
        let metering = fuel.metering.as_ref();
        let metering = metering.and_then(|m| self.metering(fuel, m, &components));
        complete &= metering.is_some() || fuel.metering.is_none();
        let gas = metering.is_some() || fuel.at == Constant::Volume;
        ProblemHeatingValue {
            id: fuel.id.value.clone(),
            at: fuel.at,
            basis: fuel.composition.basis.value,
            moisture: fuel.composition.moisture,
            state: fuel.state,
            components,
            water,
            metering,
            gas_constant: gas
                .then(|| self.gas_constant_value(&fuel.id.span))
                .flatten(),
            complete,
            source: fuel.source.clone(),
            span: fuel.id.span.clone(),
            kelvin,
        }
    }

    /// A quantity in coherent SI units; the reading of the case has seen that it is there.
    pub(super) fn si(&self, given: &Given) -> Exact {
        let quantity = given.quantity(&self.case.inputs);
        quantity.map_or_else(Exact::one, Quantity::value_in_si)
    }

    /// A value that stands in the case or is one of its inputs.
    pub(super) fn stated_or_input(
        &mut self,
        given: &Given,
        kind: ValueKind,
        label: String,
        species: Option<Species>,
        locator: String,
        span: &Span,
    ) -> Option<usize> {
        if let Given::Input(id) = given {
            return self.input_value(&id.value);
        }
        let quantity = given.quantity(&self.case.inputs)?.clone();
        Some(self.case_value(CaseValue {
            kind,
            label,
            species,
            quantity,
            locator,
            note: None,
            span,
        }))
    }

    /// The water that makes a dry fuel the fuel as received: vapour in a gas, liquid otherwise.
    fn moisture(
        &mut self,
        fuel: &HeatingValue,
        content: &Given,
        components: &[FuelComponent],
        kelvin: &Exact,
    ) -> Option<FuelComponent> {
        let gas = |species: &Species| {
            let phase = species.phase.as_ref();
            phase.is_some_and(|phase| phase.label == PhaseLabel::Gas)
        };
        let label = match components.iter().all(|component| gas(&component.species)) {
            true => PhaseLabel::Gas,
            false => PhaseLabel::Liquid,
        };
        let species = water(label)?;
        let span = content.span();
        let combustion = Combustion::of(&species).ok()?;
        let wanted = self.wanted(&Participant::Species(species.clone()))?;
        let participant = Participant::Species(species.clone());
        let heat = self.component_heat(&participant, &wanted, &combustion, kelvin, span);
        let locator = located(fuel, "moisture-content", fuel.source.as_deref());
        let value = self.stated_or_input(
            content,
            ValueKind::Fraction,
            wanted.label.clone(),
            Some(species.clone()),
            locator,
            span,
        );
        Some(FuelComponent {
            label: wanted.label,
            molar_mass: self.weights(&species, span),
            species,
            share: FuelShare::Moisture(value?),
            heat: heat?,
            combustion,
        })
    }

    /// Paths of liquid and gaseous water to the temperature.
    fn water(&mut self, kelvin: &Exact, span: &Span) -> Option<[usize; 2]> {
        let mut path = |label| {
            let participant = Participant::Species(water(label)?);
            let substance = self.participant(&participant, kelvin, span)?;
            self.path(substance, kelvin, span)
        };
        let (liquid, gas) = (path(PhaseLabel::Liquid), path(PhaseLabel::Gas));
        Some([liquid?, gas?])
    }
}

/// Where a value of a fuel stands, and what it was taken from.
pub(super) fn located(fuel: &HeatingValue, key: &str, source: Option<&str>) -> String {
    let source = source.unwrap_or(super::case_values::NO_SOURCE);
    format!("heating-values.{}, {key}; {source}", fuel.id.value)
}

fn water(label: PhaseLabel) -> Option<Species> {
    let mut species = Species::parse("H2O(l)").ok()?;
    species.phase = Some(Phase::plain(label));
    Some(species)
}
