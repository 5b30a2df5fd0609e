//! A source with its entries, to be looked up by composition or by symbol.

use std::collections::BTreeMap;

use super::glenn_entries;
use super::model::{Entry, Erratum, SourceHead, StatedCorrelation, Subject};

/// A source as it is consulted.
#[derive(Clone, Debug)]
pub struct Source {
    pub head: SourceHead,
    pub correlations: Vec<StatedCorrelation>,
    pub errata: Vec<Erratum>,
    store: Store,
}

/// Where the entries are.
#[derive(Clone, Debug)]
enum Store {
    /// Read from a source file.
    Listed {
        entries: Vec<Entry>,
        by_composition: BTreeMap<String, Vec<usize>>,
    },
    /// The NASA Glenn file, whose entries are read when they are asked for.
    Glenn,
}

impl Source {
    /// A source with all its entries at hand.
    pub fn listed(
        head: SourceHead,
        entries: Vec<Entry>,
        correlations: Vec<StatedCorrelation>,
        errata: Vec<Erratum>,
    ) -> Source {
        let mut by_composition: BTreeMap<String, Vec<usize>> = BTreeMap::new();
        for (index, entry) in entries.iter().enumerate() {
            if let Some(species) = entry.species() {
                let key = species.formula.hill();
                by_composition.entry(key).or_default().push(index);
            }
        }
        Source {
            head,
            correlations,
            errata,
            store: Store::Listed {
                entries,
                by_composition,
            },
        }
    }

    /// The NASA Glenn source.
    pub(super) fn glenn(head: SourceHead) -> Source {
        Source {
            head,
            correlations: Vec::new(),
            errata: Vec::new(),
            store: Store::Glenn,
        }
    }

    pub fn id(&self) -> &str {
        &self.head.id
    }

    /// All entries of a composition (`Formula::hill`), in the order of the source.
    pub fn of_composition(&self, hill: &str) -> Vec<Entry> {
        match &self.store {
            Store::Glenn => glenn_entries::of_composition(hill),
            Store::Listed {
                entries,
                by_composition,
            } => {
                let indices = by_composition.get(hill).into_iter().flatten();
                indices.map(|index| entries[*index].clone()).collect()
            }
        }
    }

    /// The entry of an element or a constant by its symbol.
    pub fn of_symbol(&self, symbol: &str) -> Option<&Entry> {
        let Store::Listed { entries, .. } = &self.store else {
            return None;
        };
        let wanted = Subject::Symbol(symbol.to_string());
        entries.iter().find(|entry| entry.subject == wanted)
    }

    /// Every entry, for listings and for help with names; the Glenn file is read whole.
    pub fn all(&self) -> Vec<Entry> {
        match &self.store {
            Store::Glenn => glenn_entries::all(),
            Store::Listed { entries, .. } => entries.clone(),
        }
    }
}
