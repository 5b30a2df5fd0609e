//! Finding a substance in sources by formula, name or CAS number.

use crate::notation::{Formula, Species};

use super::model::{Entry, Subject};
use super::store::Source;

/// An entry that fits what was looked for.
#[derive(Clone, Debug)]
pub struct Hit {
    pub source: String,
    pub entry: Entry,
}

/// All entries of some sources that fit a word: a formula (in any way of writing it), a species,
/// a CAS number, or a part of a name.
pub fn search(sources: &[Source], word: &str) -> Vec<Hit> {
    let hill = formula_key(word);
    let lower = word.to_lowercase();
    let mut hits = Vec::new();
    for source in sources {
        let entries = match &hill {
            Some(hill) => source.of_composition(hill),
            None => Vec::new(),
        };
        let entries = match entries.is_empty() {
            true => named(source, word, &lower),
            false => entries,
        };
        hits.extend(entries.into_iter().map(|entry| Hit {
            source: source.id().to_string(),
            entry,
        }));
    }
    hits
}

fn formula_key(word: &str) -> Option<String> {
    let species = Species::parse(word).map(|species| species.formula);
    species
        .or_else(|_| Formula::parse(word))
        .ok()
        .map(|formula| formula.hill())
}

fn named(source: &Source, word: &str, lower: &str) -> Vec<Entry> {
    let fits = |entry: &Entry| {
        let name = entry
            .name
            .as_ref()
            .is_some_and(|n| n.to_lowercase().contains(lower));
        let symbol = entry.subject == Subject::Symbol(word.to_string());
        name || symbol || entry.cas.as_deref() == Some(word)
    };
    source.all().into_iter().filter(fits).collect()
}
