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
    /// The states that a source of conventions lists for some elements.
    pub fn of(
        conventions: &Source,
        elements: impl IntoIterator<Item = Element>,
    ) -> ReferenceStates {
        let state = |element| Some((element, conventions.reference_state(element)?));
        ReferenceStates {
            states: elements.into_iter().filter_map(state).collect(),
        }
    }

    pub fn of_element(&self, element: Element) -> Option<&Species> {
        self.states.get(&element)
    }
}
