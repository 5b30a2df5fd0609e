//! Which form of each element the formation enthalpies are counted from.

use std::collections::BTreeMap;

use crate::notation::{Element, Species};

use super::store::Source;

/// The conventional reference state of each element, and the electron for ions.
#[derive(Clone, Debug, Default)]
pub struct ReferenceStates {
    states: BTreeMap<Element, Species>,
}

impl ReferenceStates {
    /// The states that a source of conventions lists.
    pub fn of(conventions: &Source) -> ReferenceStates {
        let entries = conventions.all();
        let states = entries
            .iter()
            .filter_map(|entry| Some((entry.reference_for?, entry.species()?.clone())));
        ReferenceStates {
            states: states.collect(),
        }
    }

    pub fn of_element(&self, element: Element) -> Option<&Species> {
        self.states.get(&element)
    }
}
