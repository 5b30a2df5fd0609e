//! The ways from the forms with a formation enthalpy to another form, by transitions that the
//! source lists.

use std::borrow::Borrow;
use std::collections::VecDeque;

use crate::quantity::Exact;

use super::model::Entry;

/// A change of phase on the way; entries by their index.
#[derive(Clone, Debug)]
pub(super) struct Crossing {
    /// The entry that lists the transition, and its index there.
    pub(super) listed_by: usize,
    pub(super) transition: usize,
    /// Whether it is taken in the direction in which it is listed.
    pub(super) forward: bool,
    pub(super) kelvin: Exact,
    /// The form that it leads to.
    pub(super) to: usize,
}

/// From a form with a printed formation enthalpy to the form that is wanted.
#[derive(Clone, Debug)]
pub(super) struct Way {
    pub(super) from: usize,
    pub(super) crossings: Vec<Crossing>,
}

/// The shortest way from each form with a formation enthalpy to `target`, the shortest first.
pub(super) fn ways<E: Borrow<Entry>>(entries: &[E], target: &Entry) -> Vec<Way> {
    let entries: Vec<&Entry> = entries.iter().map(E::borrow).collect();
    let Some(end) = entries.iter().position(|e| e.subject == target.subject) else {
        return Vec::new();
    };
    let starts = entries.iter().enumerate();
    let starts = starts.filter(|(from, e)| e.formation_enthalpy.is_some() && *from != end);
    let mut found: Vec<Way> = starts
        .filter_map(|(from, _)| shortest(&entries, from, end))
        .collect();
    found.sort_by_key(|way| way.crossings.len());
    found
}

/// Breadth first: every form is entered once.
fn shortest(entries: &[&Entry], from: usize, end: usize) -> Option<Way> {
    let mut entered_by: Vec<Option<(usize, Crossing)>> = vec![None; entries.len()];
    let mut queue = VecDeque::from([from]);
    while let Some(at) = queue.pop_front() {
        if at == end {
            return Some(traced(&entered_by, from, end));
        }
        for crossing in crossings_from(entries, at) {
            let to = crossing.to;
            if to != from && entered_by[to].is_none() {
                entered_by[to] = Some((at, crossing));
                queue.push_back(to);
            }
        }
    }
    None
}

fn traced(entered_by: &[Option<(usize, Crossing)>], from: usize, end: usize) -> Way {
    let mut crossings = Vec::new();
    let mut at = end;
    while let Some((before, crossing)) = &entered_by[at] {
        crossings.push(crossing.clone());
        at = *before;
    }
    crossings.reverse();
    Way { from, crossings }
}

/// The transitions that an entry lists, and those that lead to it.
fn crossings_from(entries: &[&Entry], at: usize) -> Vec<Crossing> {
    let mut crossings = Vec::new();
    for (listed_by, entry) in entries.iter().enumerate() {
        for (index, transition) in entry.transitions.iter().enumerate() {
            let leads_to = |entry: &Entry| entry.notations().any(|s| *s == transition.to);
            let Some(to) = entries.iter().position(|entry| leads_to(entry)) else {
                continue;
            };
            let crossing = |forward, to| Crossing {
                listed_by,
                transition: index,
                forward,
                kelvin: transition.temperature.value_in_si(),
                to,
            };
            if listed_by == at {
                crossings.push(crossing(true, to));
            } else if to == at {
                crossings.push(crossing(false, listed_by));
            }
        }
    }
    crossings
}
