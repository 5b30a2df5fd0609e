//! The way from the formation enthalpy of a substance to a temperature.
//!
//! The serving source's own functions go first, then the transitions that it lists, then the
//! functions of the other consulted sources for the very form: of those only increments are
//! taken.

use std::rc::Rc;

use crate::finding::Span;
use crate::quantity::Exact;

use super::model::Entry;
use super::outside_range::Outside;
use super::path::{Candidate, Material, on_formation_scale, reference_kelvin};
use super::resolve::Resolver;
use super::transitions::{Way, ways};
use super::walk::{Reach, Short, Stretch, covering, walk};

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
    pub(super) fn route(
        &mut self,
        substance: usize,
        material: &Material,
        kelvin: &Exact,
        span: &Span,
    ) -> Option<Route> {
        let candidates = &material.candidates;
        let printed = self.substances[substance].value.is_some();
        // The serving entry is always there.
        let own = candidates.first()?;
        let forms = material.forms.first()?;
        if let Some(route) = own_route(own, forms, printed, kelvin) {
            return Some(route);
        }
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

    /// Beyond the ranges, where the case allows it by name.
    fn extended(
        &mut self,
        substance: usize,
        candidate: &Candidate,
        kelvin: &Exact,
        short: Option<(usize, Short)>,
        span: &Span,
    ) -> Option<Route> {
        let allowed = self.extrapolation_allowed(substance);
        let printed = self.substances[substance].value.is_some();
        let own = candidate.source == self.serving[substance].source;
        let route = match (&allowed, printed) {
            (None, _) => None,
            (Some(_), true) => along_functions(candidate, kelvin, Reach::Extended).ok(),
            (Some(_), false) if own => on_own_scale(candidate, kelvin, Reach::Extended),
            (Some(_), false) => None,
        };
        let reached = short.map(|(_, short)| short.reached);
        self.say_outside(
            substance,
            &Outside {
                candidate,
                kelvin,
                printed,
                reached,
                allowed,
                worked: route.is_some(),
            },
            span,
        );
        route
    }
}

/// By the source of the entry alone; `printed` says whether a formation enthalpy is there to start
/// from.
fn own_route(own: &Candidate, forms: &[Rc<Entry>], printed: bool, kelvin: &Exact) -> Option<Route> {
    if printed && let Ok(route) = along_functions(own, kelvin, Reach::Stated) {
        return Some(route);
    }
    let direct = on_own_scale(own, kelvin, Reach::Stated);
    direct.or_else(|| through_transitions(own, forms, kelvin))
}

/// By a function that gives the enthalpy on the formation scale of its source, and needs no start.
fn on_own_scale(candidate: &Candidate, kelvin: &Exact, reach: Reach) -> Option<Route> {
    let functions = &candidate.entry.heat_capacity;
    let index = covering(functions, kelvin, reach)?;
    on_formation_scale(functions[index].form).then(|| Route {
        start: RouteStart::Function(candidate.clone(), index),
        steps: Vec::new(),
        end: Some((candidate.clone(), index)),
    })
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
