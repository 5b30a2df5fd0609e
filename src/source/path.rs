//! From the formation enthalpy of a substance to its molar enthalpy at a temperature.
//!
//! The serving source's own functions go first, then the transitions that it lists, then the
//! functions of the other consulted sources for the very form: of those only increments are
//! taken. Leaves to others: working the increments (the engine).

use std::rc::Rc;

use crate::finding::Span;
use crate::quantity::Exact;

use super::heat_capacity::Form;
use super::matching::{Match, pick};
use super::model::Entry;
use super::problem::{EnthalpyPath, Leg, Start};
use super::resolve::Resolver;
use super::transitions::{Way, ways};
use super::walk::{Reach, Short, Stretch, covering, walk};

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
    /// All entries of the composition in the serving source.
    pub(super) forms: Vec<Rc<Entry>>,
}

/// A way that was found, in terms of entries.
pub(super) struct Route {
    pub(super) start: RouteStart,
    pub(super) steps: Vec<RouteStep>,
    /// The function at the end, with its entry.
    pub(super) end: Option<(Candidate, usize)>,
}

pub(super) enum RouteStart {
    Printed,
    /// The printed formation enthalpy of another form of the same source.
    OtherForm(Candidate),
    Function(Candidate, usize),
}

pub(super) enum RouteStep {
    Stretch(Candidate, Stretch),
    /// The index of the transition in the entry, and whether it is taken as listed.
    Transition(Candidate, usize, bool),
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
            if let Match::One(entry) = pick(&wanted, &entries) {
                let entry = Rc::new(*entry);
                candidates.push(Candidate { source, entry });
            }
        }
        let forms = self.sources[own.source].of_composition(&hill);
        Material {
            candidates,
            forms: forms.into_iter().map(Rc::new).collect(),
        }
    }

    fn route(
        &mut self,
        substance: usize,
        material: &Material,
        kelvin: &Exact,
        span: &Span,
    ) -> Option<Route> {
        let candidates = &material.candidates;
        if let Some(route) = self.own_route(substance, material, kelvin) {
            return Some(route);
        }
        let printed = self.substances[substance].value.is_some();
        let mut short: Option<(usize, Short)> = None;
        for (index, candidate) in candidates.iter().enumerate().filter(|_| printed) {
            match along_functions(candidate, kelvin, Reach::Stated) {
                Ok(route) => return Some(route),
                Err(Some(found)) => short = short.or(Some((index, found))),
                Err(None) => {}
            }
        }
        let with_functions = candidates
            .iter()
            .find(|c| !c.entry.heat_capacity.is_empty());
        match with_functions {
            Some(candidate) => self.extended(substance, candidate, kelvin, short, span),
            None => {
                self.say_missing(substance, kelvin, span);
                None
            }
        }
    }

    /// By the serving source alone.
    fn own_route(&self, substance: usize, material: &Material, kelvin: &Exact) -> Option<Route> {
        // The serving entry is always there.
        let own = material.candidates.first()?;
        if self.substances[substance].value.is_some()
            && let Ok(route) = along_functions(own, kelvin, Reach::Stated)
        {
            return Some(route);
        }
        let functions = &own.entry.heat_capacity;
        let direct = covering(functions, kelvin, Reach::Stated);
        if let Some(index) = direct.filter(|index| on_formation_scale(functions[*index].form)) {
            return Some(Route {
                start: RouteStart::Function(own.clone(), index),
                steps: Vec::new(),
                end: Some((own.clone(), index)),
            });
        }
        through_transitions(own, &material.forms, kelvin)
    }

    /// Beyond the ranges, where the case allows it by name.
    fn extended(
        &mut self,
        substance: usize,
        candidate: &Candidate,
        kelvin: &Exact,
        short: Option<(usize, Short)>,
        span: &Span,
    ) -> Option<Route> {
        // Without a printed formation enthalpy there is nothing to start from at 298.15 K.
        let allowed = self.extrapolation_allowed(substance);
        let allowed = allowed.filter(|_| self.substances[substance].value.is_some());
        let route = match allowed {
            Some(_) => along_functions(candidate, kelvin, Reach::Extended).ok(),
            None => None,
        };
        let reached = short.map(|(_, short)| short.reached);
        self.say_outside(
            substance,
            candidate,
            kelvin,
            reached,
            allowed,
            route.is_some(),
            span,
        );
        route
    }

    /// Registers what a route uses among the values used.
    fn enter(
        &mut self,
        substance: usize,
        kelvin: &Exact,
        route: Route,
        span: &Span,
    ) -> Option<EnthalpyPath> {
        let start = match route.start {
            RouteStart::Printed => Start::Printed {
                value: self.substances[substance].value?,
            },
            RouteStart::OtherForm(candidate) => Start::Printed {
                value: self.formation_value(&candidate, span)?,
            },
            RouteStart::Function(candidate, index) => Start::Function {
                value: self.function_value(&candidate, index, span),
            },
        };
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

/// From another form of the source that has a formation enthalpy, through the transitions that it
/// lists.
fn through_transitions(own: &Candidate, forms: &[Rc<Entry>], kelvin: &Exact) -> Option<Route> {
    let routes = ways(forms, &own.entry);
    routes
        .iter()
        .find_map(|way| along_way(own.source, forms, way, kelvin))
}

/// From 298.15 K along the functions of one entry. Without functions no reason.
fn along_functions(
    candidate: &Candidate,
    kelvin: &Exact,
    reach: Reach,
) -> Result<Route, Option<Short>> {
    let functions = &candidate.entry.heat_capacity;
    if functions.is_empty() {
        return Err(None);
    }
    let stretches = walk(functions, &reference_kelvin(), kelvin, reach).map_err(Some)?;
    let end = match stretches.last() {
        Some(stretch) => Some(stretch.end()),
        None => covering(functions, kelvin, reach),
    };
    let step = |stretch| RouteStep::Stretch(candidate.clone(), stretch);
    Ok(Route {
        start: RouteStart::Printed,
        steps: stretches.into_iter().map(step).collect(),
        end: end.map(|index| (candidate.clone(), index)),
    })
}

/// Along the functions of each form to the transition into the next.
fn along_way(source: usize, entries: &[Rc<Entry>], way: &Way, kelvin: &Exact) -> Option<Route> {
    let candidate = |index: usize| Candidate {
        source,
        entry: Rc::clone(&entries[index]),
    };
    let mut steps = Vec::new();
    let mut at = reference_kelvin();
    let mut form = way.from;
    for crossing in &way.crossings {
        let functions = &entries[form].heat_capacity;
        for stretch in walk(functions, &at, &crossing.kelvin, Reach::Stated).ok()? {
            steps.push(RouteStep::Stretch(candidate(form), stretch));
        }
        steps.push(RouteStep::Transition(
            candidate(crossing.listed_by),
            crossing.transition,
            crossing.forward,
        ));
        at = crossing.kelvin.clone();
        form = crossing.to;
    }
    let functions = &entries[form].heat_capacity;
    for stretch in walk(functions, &at, kelvin, Reach::Stated).ok()? {
        steps.push(RouteStep::Stretch(candidate(form), stretch));
    }
    let end = covering(functions, kelvin, Reach::Stated).map(|index| (candidate(form), index));
    Some(Route {
        start: RouteStart::OtherForm(candidate(way.from)),
        steps,
        end,
    })
}
