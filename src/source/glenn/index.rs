//! Finding the records of a composition: by the committed index, or by reading the whole file.

use super::columns::{Place, field, places};
use super::names::Named;
use super::record::{GlennRecord, ranges};
use super::{ID, NAMES, THERMO, key};
use crate::source::index;

/// The entries of a composition, in the order of the file; none where it is unknown.
///
/// `key` is the formula in Hill order with its charge: `CCaO3`, `C2H4O`, `O4S^2-`. Isomers and the
/// forms of a substance come together.
pub fn find(key: &str) -> Vec<GlennRecord> {
    let entries = index::places(ID, key).into_iter().filter_map(Entry::at);
    entries.filter_map(|entry| entry.record()).collect()
}

/// The whole file: all entries that are served, in its order.
#[derive(Debug)]
pub struct GlennIndex {
    /// Each with its composition key and the byte of its row in `names.tsv`.
    entries: Vec<(String, usize, Entry)>,
}

#[derive(Debug)]
struct Entry {
    named: Named,
    /// Several where the file splits one form into records, as at a lambda transition.
    places: Vec<Place>,
}

impl GlennIndex {
    /// Reads the rows of `names.tsv` against the file. A row that does not fit it is passed over.
    pub fn build() -> Self {
        GlennIndex::of(NAMES)
    }

    pub(super) fn of(names: &'static str) -> Self {
        let places = places(THERMO);
        let mut entries = Vec::with_capacity(2100);
        let mut row = 0;
        for line in names.split_inclusive('\n') {
            let named = Named::read(line.trim_end_matches('\n'));
            entries.extend(named.and_then(|named| Entry::of(named, row, &places)));
            row += line.len();
        }
        GlennIndex { entries }
    }

    /// All entries, in the order of the file.
    pub fn all(&self) -> impl Iterator<Item = GlennRecord> {
        self.entries
            .iter()
            .filter_map(|(_, _, entry)| entry.record())
    }
}

/// What only tests ask for.
#[cfg(test)]
impl GlennIndex {
    /// The entries under the file's own name; several where it uses one name for two forms.
    pub fn by_name(&self, glenn_name: &str) -> Vec<GlennRecord> {
        let entries = self.entries.iter().map(|(_, _, entry)| entry);
        let own = entries.filter(|entry| entry.named.glenn_name == glenn_name);
        own.filter_map(Entry::record).collect()
    }

    /// The composition keys in the order of the file.
    pub fn keys(&self) -> impl Iterator<Item = &str> {
        self.entries.iter().map(|(key, _, _)| key.as_str())
    }

    /// Key and place of each entry, as the committed index holds them.
    pub fn rows(&self) -> impl Iterator<Item = (&str, String)> {
        self.entries
            .iter()
            .map(|(key, row, entry)| (key.as_str(), entry.place(*row)))
    }
}

impl Entry {
    fn of(named: Named, row: usize, places: &[Place]) -> Option<(String, usize, Entry)> {
        let own: Option<Vec<Place>> = named.lines().map(|line| at_line(places, line)).collect();
        let own = own?;
        let mut lines = THERMO.get(own.first()?.offset..)?.lines();
        let first = lines.next()?;
        if field(first, 0, 18) != named.glenn_name {
            return None;
        }
        let key = key::composition(named.glenn_name, lines.next()?)?;
        let entry = Entry { named, places: own };
        Some((key, row, entry))
    }

    /// The entry at a place of the committed index: `row;line@byte,line@byte`.
    fn at(place: &str) -> Option<Entry> {
        let (row, places) = place.split_once(';')?;
        let row: usize = row.parse().ok()?;
        let place = |text: &str| {
            let (line, offset) = text.split_once('@')?;
            Some(Place {
                line: line.parse().ok()?,
                offset: offset.parse().ok()?,
            })
        };
        Some(Entry {
            named: Named::read(NAMES.get(row..)?.lines().next()?)?,
            places: places.split(',').map(place).collect::<Option<Vec<_>>>()?,
        })
    }

    #[cfg(test)]
    fn place(&self, row: usize) -> String {
        let place = |place: &Place| format!("{}@{}", place.line, place.offset);
        let places: Vec<String> = self.places.iter().map(place).collect();
        format!("{row};{}", places.join(","))
    }

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
