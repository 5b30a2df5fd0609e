//! A source with its entries, to be looked up by composition or by symbol.

use std::collections::BTreeMap;

use super::model::{Entry, Erratum, SourceHead, StatedCorrelation, Subject};
use super::read::{Provenance, read_source};
use super::read_entry::{EntryRules, read_entry};
use super::sha256::sha256_hex;
use super::{glenn_entries, index};
use crate::document::with_document;
use crate::finding::Text;
use crate::notation::{Element, Species};

/// The id of the source that stands for the case.
pub const CASE: &str = "case";

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
    /// A source file that is part of the program; its entries are read when they are asked for.
    Embedded {
        text: &'static str,
        rules: EntryRules,
    },
    /// The NASA Glenn file, likewise.
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

    /// The source that stands for what the case itself states.
    pub(super) fn case(text: &Text, preparer: &str) -> Source {
        let head = SourceHead {
            id: CASE.to_string(),
            title: "Stated in this case".to_string(),
            authors: Some(preparer.to_string()),
            coverage_text: Some("2".to_string()),
            note: Some(
                "Its tolerances are bounds of a rectangular distribution, read as u = a/√3."
                    .to_string(),
            ),
            sha256: sha256_hex(text.as_str().as_bytes()),
            ..SourceHead::default()
        };
        Source::listed(head, Vec::new(), Vec::new(), Vec::new())
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

    /// A source file that is part of the program.
    pub(super) fn embedded(head: SourceHead, text: &'static str) -> Source {
        let rules = EntryRules::of(&head);
        Source {
            store: Store::Embedded { text, rules },
            ..Source::glenn(head)
        }
    }

    pub fn id(&self) -> &str {
        &self.head.id
    }

    /// All entries of a composition (`Formula::hill`), in the order of the source.
    pub fn of_composition(&self, hill: &str) -> Vec<Entry> {
        match &self.store {
            Store::Glenn => glenn_entries::of_composition(hill),
            Store::Embedded { text, rules } => read_places(self.id(), hill, text, rules),
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
    pub fn of_symbol(&self, symbol: &str) -> Option<Entry> {
        match &self.store {
            Store::Glenn => None,
            Store::Embedded { text, rules } => {
                let key = format!("={symbol}");
                read_places(self.id(), &key, text, rules).pop()
            }
            Store::Listed { entries, .. } => {
                let wanted = Subject::Symbol(symbol.to_string());
                entries
                    .iter()
                    .find(|entry| entry.subject == wanted)
                    .cloned()
            }
        }
    }

    /// The form that the source calls the reference state of an element.
    pub fn reference_state(&self, element: Element) -> Option<Species> {
        let entry = match &self.store {
            Store::Glenn => None,
            Store::Embedded { text, rules } => {
                let key = format!("@{}", element.symbol());
                read_places(self.id(), &key, text, rules).pop()
            }
            Store::Listed { entries, .. } => {
                let named = |entry: &&Entry| entry.reference_for == Some(element);
                entries.iter().find(named).cloned()
            }
        };
        entry?.species().cloned()
    }

    /// Every entry, for listings and for help with names; a built-in source is read whole.
    pub fn all(&self) -> Vec<Entry> {
        match &self.store {
            Store::Glenn => glenn_entries::all(),
            Store::Embedded { text, .. } => {
                let (source, _) = read_source(&Text::new(self.id(), *text), Provenance::Original);
                source.map_or_else(Vec::new, |source| source.all())
            }
            Store::Listed { entries, .. } => entries.clone(),
        }
    }
}

/// The entries that the index names under a key. A test reads all of them without fault.
fn read_places(id: &str, key: &str, text: &str, rules: &EntryRules) -> Vec<Entry> {
    let blocks = index::places(id, key).into_iter().filter_map(index::span);
    let blocks = blocks.filter_map(|span| text.get(span));
    blocks
        .flat_map(|block| read_block(id, block, rules))
        .collect()
}

fn read_block(id: &str, block: &str, rules: &EntryRules) -> Vec<Entry> {
    let text = Text::new(id, block);
    let (entries, _) = with_document(&text, |document| {
        let tables = document.root.tables("entry");
        tables
            .iter()
            .filter_map(|table| read_entry(table, rules))
            .collect()
    });
    entries
}
