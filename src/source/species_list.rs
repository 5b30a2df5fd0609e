//! The species of a cycle, each with a place of its own.

use std::collections::BTreeMap;

use super::cycle::CycleSpecies;

/// Species in the order in which they first appear.
#[derive(Default)]
pub(super) struct SpeciesList {
    pub(super) all: Vec<CycleSpecies>,
    by_key: BTreeMap<String, usize>,
}

impl SpeciesList {
    /// The place of a species, which is added where it is new.
    pub(super) fn index(&mut self, species: CycleSpecies) -> usize {
        let next = self.all.len();
        let index = *self.by_key.entry(species.key.clone()).or_insert(next);
        if index == next {
            self.all.push(species);
        }
        index
    }
}
