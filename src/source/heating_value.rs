//! Resolving `[heating-values]`: the components of a fuel, what they burn to, and every number
//! that the working needs.

use num_traits::{One, Zero};

use crate::case::{Compression, Constant, Given, HeatingValue, Metering, Moisture, Part, Share};
use crate::finding::{Finding, FindingCode, Located, Severity, Span};
use crate::notation::{Participant, Phase, PhaseLabel, Species};
use crate::quantity::{Exact, FractionBasis, Quantity};

use super::case_values::CaseValue;
use super::choose::{choice_for, note_identity};
use super::combustion_equation::{Combustion, would_be};
use super::matching::{Match, Wanted, pick};
use super::problem::{ProblemTerm, ValueKind};
use super::resolve::Resolver;

/// A fuel with its components resolved. Indices are those of values used and of paths.
#[derive(Clone, Debug)]
pub struct ProblemHeatingValue {
    pub id: String,
    /// Combustion reference temperature, K.
    pub kelvin: Exact,
    pub at: Constant,
    pub basis: FractionBasis,
    /// Of the composition as it is stated.
    pub moisture: Moisture,
    /// Of the results.
    pub state: Moisture,
    /// In the order of the case; water that the moisture content adds comes last.
    pub components: Vec<FuelComponent>,
    /// Paths of liquid and gaseous water, where hydrogen makes water.
    pub water: Option<[usize; 2]>,
    pub metering: Option<ProblemMetering>,
    pub gas_constant: Option<usize>,
    /// Whether all was found; otherwise a `stop` says what was not.
    pub complete: bool,
    pub source: Option<String>,
    pub span: Span,
}

/// A component of a fuel.
#[derive(Clone, Debug)]
pub struct FuelComponent {
    /// As the case writes it.
    pub label: String,
    pub species: Species,
    pub share: FuelShare,
    pub combustion: Combustion,
    pub heat: ComponentHeat,
    /// Atomic weights with the number of atoms.
    pub molar_mass: Vec<(usize, Exact)>,
}

/// How much of the fuel a component is.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum FuelShare {
    /// The fraction among the values used.
    Stated(usize),
    /// What the others leave.
    Balance,
    /// The moisture content of the fuel as received.
    Moisture(usize),
}

/// Where the molar heating value of a component comes from.
#[derive(Clone, Debug)]
pub enum ComponentHeat {
    /// Nothing burns and nothing condenses.
    Nothing,
    /// A combustion enthalpy that the source prints at the temperature asked for.
    Printed { value: usize },
    /// The Hess sum of the combustion equation.
    Hess { terms: Vec<ProblemTerm> },
}

/// The conditions that a volume refers to.
#[derive(Clone, Debug)]
pub struct ProblemMetering {
    pub kelvin: Exact,
    pub pascal: Exact,
    pub compression: Option<ProblemCompression>,
    pub span: Span,
}

/// What the compression factor comes from; values used, in the order of the components.
#[derive(Clone, Debug)]
pub enum ProblemCompression {
    Factor(usize),
    Summation(Vec<usize>),
    SecondVirial(usize),
}

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
    fn si(&self, given: &Given) -> Exact {
        let quantity = given.quantity(&self.case.inputs);
        quantity.map_or_else(Exact::one, Quantity::value_in_si)
    }

    fn component(
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
            molar_mass: self.atoms(&wanted.species, span),
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

    /// A value that stands in the case or is one of its inputs.
    fn stated_or_input(
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

    fn component_heat(
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

    /// The molar mass of a neutral species as atomic weights.
    fn atoms(&mut self, species: &Species, span: &Span) -> Vec<(usize, Exact)> {
        let counts = species.formula.counts().clone();
        let weights = counts.into_iter().filter_map(|(element, count)| {
            Some((self.atomic_weight(element.symbol(), span)?, count))
        });
        weights.collect()
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
            molar_mass: self.atoms(&species, span),
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

    fn metering(
        &mut self,
        fuel: &HeatingValue,
        metering: &Metering,
        components: &[FuelComponent],
    ) -> Option<ProblemMetering> {
        let source = metering.source.as_deref();
        let mut value = |given: &Given, label: String, key: &str| {
            let locator = located(fuel, &format!("metering.{key}"), source);
            let kind = ValueKind::CompressionData;
            self.stated_or_input(given, kind, label, None, locator, given.span())
        };
        let compression = match &metering.compression {
            None => None,
            Some(Compression::Factor(given)) => Some(ProblemCompression::Factor(value(
                given,
                "compression factor".into(),
                "compression-factor",
            )?)),
            Some(Compression::SecondVirial(given)) => Some(ProblemCompression::SecondVirial(
                value(given, "second virial coefficient".into(), "second-virial")?,
            )),
            Some(Compression::Summation(factors)) => {
                let values = components.iter().map(|component| {
                    let of = |(name, _): &&(Located<Participant>, Given)| {
                        name.value.to_string() == component.label
                    };
                    let (_, given) = factors.iter().find(of)?;
                    let label = format!("summation factor of {}", component.label);
                    value(given, label, "summation-factors")
                });
                Some(ProblemCompression::Summation(
                    values.collect::<Option<_>>()?,
                ))
            }
        };
        Some(ProblemMetering {
            kelvin: self.si(&metering.temperature),
            pascal: self.si(&metering.pressure),
            compression,
            span: metering.pressure.span().clone(),
        })
    }

    fn say_products(&mut self, fuel: &str, label: &str, products: &str, span: &Span) {
        let finding = Finding {
            severity: Severity::Stop,
            code: FindingCode::CombustionProducts,
            message: format!(
                "{fuel}: heating values are worked for carbon, hydrogen, nitrogen, oxygen, sulfur \
                 and noble gases. What {label} burns to has to be agreed first ({products}). Write \
                 the combustion as a reaction with the products that you mean."
            ),
            at: self.text.place(span.start),
        };
        self.say(finding);
    }
}

/// Where a value of a fuel stands, and what it was taken from.
fn located(fuel: &HeatingValue, key: &str, source: Option<&str>) -> String {
    let source = source.unwrap_or("no source stated");
    format!("heating-values.{}, {key}; {source}", fuel.id.value)
}

fn water(label: PhaseLabel) -> Option<Species> {
    let mut species = Species::parse("H2O(l)").ok()?;
    species.phase = Some(Phase::plain(label));
    Some(species)
}
