//! The index: which entries the file has for a composition, and where they begin.

use std::sync::OnceLock;

use super::columns::{Place, field, places};
use super::names::Named;
use super::record::{GlennRecord, ranges};
use super::{NAMES, THERMO, key};

/// All entries that are served, found by composition or by the file's own name.
#[derive(Debug)]
pub struct GlennIndex {
    /// In the order of the file.
    entries: Vec<Entry>,
    /// Composition keys in order, each with the number of its entry.
    keys: Vec<(String, usize)>,
}

#[derive(Debug)]
struct Entry {
    named: Named,
    /// Several where the file splits one form into records, as at a lambda transition.
    places: Vec<Place>,
}

impl GlennIndex {
    /// The index of the embedded file, built at the first call.
    pub fn global() -> &'static GlennIndex {
        static INDEX: OnceLock<GlennIndex> = OnceLock::new();
        INDEX.get_or_init(|| GlennIndex::build(NAMES))
    }

    /// Reads the rows of `names` against the file. A row that does not fit it is passed over.
    pub(super) fn build(names: &'static str) -> Self {
        let places = places(THERMO);
        let mut index = GlennIndex {
            entries: Vec::with_capacity(2000),
            keys: Vec::with_capacity(2000),
        };
        for named in names.lines().filter_map(Named::read) {
            index.add(named, &places);
        }
        index.keys.sort_unstable();
        index
    }

    fn add(&mut self, named: Named, places: &[Place]) -> Option<()> {
        let own: Option<Vec<Place>> = named.lines().map(|line| at_line(places, line)).collect();
        let own = own?;
        let mut lines = THERMO.get(own.first()?.offset..)?.lines();
        let first = lines.next()?;
        if field(first, 0, 18) != named.glenn_name {
            return None;
        }
        let key = key::composition(named.glenn_name, lines.next()?)?;
        self.keys.push((key, self.entries.len()));
        self.entries.push(Entry { named, places: own });
        Some(())
    }

    /// The entries of a composition, in the order of the file; none where it is unknown.
    ///
    /// `key` is the formula in Hill order with its charge: `CCaO3`, `C2H4O`, `O4S^2-`. Isomers
    /// and the forms of a substance come together.
    pub fn find(&self, key: &str) -> Vec<GlennRecord> {
        let start = self.keys.partition_point(|(known, _)| known.as_str() < key);
        self.keys[start..]
            .iter()
            .take_while(|(known, _)| known == key)
            .filter_map(|(_, number)| self.entries.get(*number)?.record())
            .collect()
    }

    /// All entries, in the order of the file.
    pub fn all(&self) -> impl Iterator<Item = GlennRecord> {
        self.entries.iter().filter_map(Entry::record)
    }
}

/// What only tests ask for.
#[cfg(test)]
impl GlennIndex {
    /// The entries under the file's own name; several where it uses one name for two forms.
    pub fn by_name(&self, glenn_name: &str) -> Vec<GlennRecord> {
        let own = |entry: &&Entry| entry.named.glenn_name == glenn_name;
        self.entries
            .iter()
            .filter(own)
            .filter_map(Entry::record)
            .collect()
    }

    /// The composition keys in order; a key comes once for each of its entries.
    pub fn keys(&self) -> impl Iterator<Item = &str> {
        self.keys.iter().map(|(key, _)| key.as_str())
    }
}

impl Entry {
    /// The entry with all ranges of its records; `None` where one of them is malformed.
    fn record(&self) -> Option<GlennRecord> {
        let (first, others) = self.places.split_first()?;
        let line = usize::try_from(first.line).ok()?;
        let mut record = GlennRecord::read(&self.named, line, THERMO.get(first.offset..)?)?;
        for place in others {
            let line = usize::try_from(place.line).ok()?;
            record
                .ranges
                .extend(ranges(line, THERMO.get(place.offset..)?)?);
        }
        Some(record)
    }
}

fn at_line(places: &[Place], line: u32) -> Option<Place> {
    let number = places
        .binary_search_by_key(&line, |place| place.line)
        .ok()?;
    places.get(number).copied()
}
