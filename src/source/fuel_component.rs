//! Resolving a component of a fuel: its share, what it burns to, and where its heat comes from.

use crate::case::{Given, HeatingValue, Part, Share};
use crate::finding::{FindingCode, Located, Severity, Span};
use crate::notation::Participant;
use crate::quantity::Exact;

use super::choose::choice_for;
use super::combustion_equation::{Combustion, would_be};
use super::heating_value::{ComponentHeat, FuelComponent, FuelShare};
use super::identity_findings::note_identity;
use super::matching::{Match, Wanted, pick};
use super::problem::{ProblemTerm, ValueKind};
use super::resolve::Resolver;
use super::resolve_heating_value::located;

impl Resolver<'_> {
    pub(super) fn component(
        &mut self,
        fuel: &HeatingValue,
        part: &Part,
        kelvin: &Exact,
    ) -> Option<FuelComponent> {
        let wanted = self.wanted(&part.substance.value)?;
        let span = &part.substance.span;
        let combustion = match Combustion::of(&wanted.species) {
            Ok(combustion) => combustion,
            Err(elements) => {
                let products: Vec<String> = elements
                    .iter()
                    .map(|element| format!("{}: {}", element.symbol(), would_be(*element)))
                    .collect();
                self.say_products(&fuel.id.value, &wanted.label, &products.join("; "), span);
                return None;
            }
        };
        let heat = self.component_heat(&part.substance.value, &wanted, &combustion, kelvin, span);
        let share = match &part.share {
            Share::Balance => FuelShare::Balance,
            Share::Fraction(given) => FuelShare::Stated(self.fraction(fuel, &wanted, given, span)?),
        };
        Some(FuelComponent {
            label: wanted.label.clone(),
            molar_mass: self.weights(&wanted.species, span),
            species: wanted.species,
            share,
            heat: heat?,
            combustion,
        })
    }

    fn fraction(
        &mut self,
        fuel: &HeatingValue,
        wanted: &Wanted,
        given: &Given,
        span: &Span,
    ) -> Option<usize> {
        self.stated_or_input(
            given,
            ValueKind::Fraction,
            wanted.label.clone(),
            Some(wanted.species.clone()),
            located(fuel, "composition", fuel.source.as_deref()),
            span,
        )
    }

    pub(super) fn component_heat(
        &mut self,
        participant: &Participant,
        wanted: &Wanted,
        combustion: &Combustion,
        kelvin: &Exact,
        span: &Span,
    ) -> Option<ComponentHeat> {
        if combustion.is_nothing() {
            self.looked_up.insert(wanted.label.clone());
            return Some(ComponentHeat::Nothing);
        }
        if let Some(value) = self.printed_combustion(wanted, kelvin, span) {
            self.looked_up.insert(wanted.label.clone());
            return Some(ComponentHeat::Printed { value });
        }
        let mut terms = Vec::new();
        let mut complete = true;
        for (index, (nu, species)) in combustion.terms.iter().enumerate() {
            let found = match index == 0 && *species == wanted.species {
                true => self.participant(participant, kelvin, span),
                false => self.participant(&Participant::Species(species.clone()), kelvin, span),
            };
            let path = found.and_then(|substance| self.one_path(substance, kelvin, span));
            complete &= path.is_some();
            terms.extend(found.map(|substance| ProblemTerm {
                substance,
                nu: nu.clone(),
                path,
            }));
        }
        complete.then_some(ComponentHeat::Hess { terms })
    }

    /// The combustion enthalpy of the first consulted source that knows the substance, where it
    /// prints one at the temperature asked for.
    fn printed_combustion(
        &mut self,
        wanted: &Wanted,
        kelvin: &Exact,
        span: &Span,
    ) -> Option<usize> {
        let chosen = choice_for(self, wanted).map(|choice| choice.source.value.clone());
        let hill = wanted.species.formula.hill();
        let fits = |source: &usize| {
            let id = self.sources[*source].id();
            chosen.as_ref().is_none_or(|chosen| id == chosen)
        };
        let (source, entry) = (0..self.consulted).filter(fits).find_map(|source| {
            match pick(wanted, &self.sources[source].of_composition(&hill)) {
                Match::One(entry) => Some((source, *entry)),
                Match::None | Match::Several(_) => None,
            }
        })?;
        let printed = entry.combustion_enthalpy.clone()?;
        let temperature = self.sources[source].head.temperature.as_ref();
        if temperature.is_none_or(|t| t.value_in_si() != *kelvin) {
            return None;
        }
        note_identity(self, wanted, kelvin, span, &entry);
        let named = Located::new(wanted.label.clone(), span.clone());
        Some(self.enter_combustion(&named, source, &entry, printed))
    }

    fn say_products(&mut self, fuel: &str, label: &str, products: &str, span: &Span) {
        let message = format!(
            "{fuel}: heating values are worked for carbon, hydrogen, nitrogen, oxygen, sulfur and \
             noble gases. What {label} burns to has to be agreed first ({products}). Write the \
             combustion as a reaction with the products that you mean."
        );
        self.say_of(
            Severity::Stop,
            FindingCode::CombustionProducts,
            message,
            span,
        );
    }
}
