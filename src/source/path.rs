//! From the formation enthalpy of a substance to its molar enthalpy at a temperature: what a path
//! is made from, and what it uses among the values used.
//!
//! Leaves to others: finding the way (the route), working the increments (the engine).

use std::rc::Rc;

use crate::finding::Span;
use crate::quantity::Exact;

use super::heat_capacity::Form;
use super::matching::{Match, pick};
use super::model::Entry;
use super::problem::{EnthalpyPath, Leg, Start};
use super::resolve::Resolver;
use super::route::{Route, RouteStart, RouteStep};
use super::stable::is_stable;
use super::walk::{Reach, Stretch, covering};

/// The temperature at which formation enthalpies are printed, 298.15 K.
pub fn reference_kelvin() -> Exact {
    Exact::new(29815.into(), 100.into())
}

/// Whether a function gives enthalpies on the scale of formation enthalpies of its source.
pub(super) fn on_formation_scale(form: Form) -> bool {
    matches!(form, Form::Nasa7 | Form::Nasa9)
}

/// An entry that may serve for the way, with its source.
#[derive(Clone, Debug)]
pub(super) struct Candidate {
    pub(super) source: usize,
    pub(super) entry: Rc<Entry>,
}

/// What a substance's paths are made from, gathered once.
#[derive(Clone, Debug)]
pub(super) struct Material {
    /// The serving entry first, then the same form in the other consulted sources.
    pub(super) candidates: Vec<Candidate>,
    /// For each of them all entries of the composition in its source.
    pub(super) forms: Vec<Vec<Rc<Entry>>>,
}

impl Resolver<'_> {
    /// The path of a substance to a temperature in K. None where there is none; a `stop` then
    /// says why.
    pub(super) fn path(&mut self, substance: usize, kelvin: &Exact, span: &Span) -> Option<usize> {
        let key = (substance, kelvin.clone());
        if let Some(known) = self.known_paths.get(&key) {
            return *known;
        }
        let given = self.given_path(substance, kelvin, span);
        let index = given.unwrap_or_else(|| {
            let path = self.new_path(substance, kelvin, span)?;
            self.paths.push(path);
            Some(self.paths.len() - 1)
        });
        self.known_paths.insert(key, index);
        index
    }

    fn new_path(&mut self, substance: usize, kelvin: &Exact, span: &Span) -> Option<EnthalpyPath> {
        let value = self.substances[substance].value;
        if let (Some(value), true) = (value, *kelvin == reference_kelvin()) {
            return Some(EnthalpyPath {
                substance,
                kelvin: kelvin.clone(),
                start: Start::Printed { value },
                legs: Vec::new(),
                end: None,
            });
        }
        let material = self.material(substance, span);
        let route = self.route(substance, &material, kelvin, span)?;
        self.check_route(substance, &material, &route, kelvin, span);
        self.enter(substance, kelvin, route, span)
    }

    /// Gives a path that stays at 298.15 K the function that holds there, where the uncertainty of
    /// the temperature needs its heat capacity.
    pub(super) fn add_end(&mut self, path: usize, span: &Span) {
        let at = &self.paths[path];
        if at.end.is_some() {
            return;
        }
        let kelvin = at.kelvin.clone();
        let material = self.material(at.substance, span);
        let function = material.candidates.iter().find_map(|candidate| {
            let index = covering(&candidate.entry.heat_capacity, &kelvin, Reach::Stated)?;
            Some((candidate, index))
        });
        let end = function.map(|(candidate, index)| self.function_value(candidate, index, span));
        self.paths[path].end = end;
    }

    pub(super) fn material(&mut self, substance: usize, span: &Span) -> Rc<Material> {
        if let Some(known) = self.materials.get(&substance) {
            return Rc::clone(known);
        }
        let material = Rc::new(self.gathered(substance));
        self.materials.insert(substance, Rc::clone(&material));
        self.check_scale(substance, &material.candidates[0], span);
        material
    }

    fn gathered(&self, substance: usize) -> Material {
        let own = &self.serving[substance];
        let mut candidates = vec![Candidate {
            source: own.source,
            entry: Rc::new(own.entry.clone()),
        }];
        let mut wanted = own.wanted.clone();
        wanted.species = self.substances[substance].species.clone();
        let hill = wanted.species.formula.hill();
        for source in (0..self.consulted).filter(|source| *source != own.source) {
            let entries = self.sources[source].of_composition(&hill);
            let found = match pick(&wanted, &entries) {
                // What the serving source writes for a form may be several in another one.
                Match::Several(_) if !is_stable(&own.wanted) => pick(&own.wanted, &entries),
                found => found,
            };
            if let Match::One(entry) = found {
                let entry = Rc::new(*entry);
                candidates.push(Candidate { source, entry });
            }
        }
        let forms = candidates.iter().map(|candidate| {
            let entries = self.sources[candidate.source].of_composition(&hill);
            entries.into_iter().map(Rc::new).collect()
        });
        Material {
            forms: forms.collect(),
            candidates,
        }
    }

    /// Registers what a route uses among the values used.
    fn enter(
        &mut self,
        substance: usize,
        kelvin: &Exact,
        route: Route,
        span: &Span,
    ) -> Option<EnthalpyPath> {
        let start = self.start(substance, &route.start, span)?;
        let legs = route.steps.iter().map(|step| self.leg(step, span));
        let legs: Vec<Leg> = legs.collect();
        let end = route
            .end
            .map(|(candidate, index)| self.function_value(&candidate, index, span));
        Some(EnthalpyPath {
            substance,
            kelvin: kelvin.clone(),
            start,
            legs,
            end,
        })
    }

    fn start(&mut self, substance: usize, start: &RouteStart, span: &Span) -> Option<Start> {
        Some(match start {
            RouteStart::Printed => Start::Printed {
                value: self.substances[substance].value?,
            },
            RouteStart::OtherForm(candidate) => Start::Printed {
                value: self.formation_value(candidate, span)?,
            },
            RouteStart::Function(candidate, index) => Start::Function {
                value: self.function_value(candidate, *index, span),
                constant: self.integration_constant(candidate, *index, span)?,
            },
        })
    }

    fn leg(&mut self, step: &RouteStep, span: &Span) -> Leg {
        match step {
            RouteStep::Stretch(candidate, Stretch::Along { function, from, to }) => Leg::Heating {
                value: self.function_value(candidate, *function, span),
                from: from.clone(),
                to: to.clone(),
            },
            RouteStep::Stretch(
                candidate,
                Stretch::Scale {
                    from_function,
                    from,
                    to_function,
                    to,
                },
            ) => Leg::Scale {
                from_value: self.function_value(candidate, *from_function, span),
                from: from.clone(),
                to_value: self.function_value(candidate, *to_function, span),
                to: to.clone(),
            },
            RouteStep::Transition(candidate, index, forward) => Leg::Transition {
                value: self.transition_value(candidate, *index, span),
                kelvin: candidate.entry.transitions[*index]
                    .temperature
                    .value_in_si(),
                forward: *forward,
            },
        }
    }
}
