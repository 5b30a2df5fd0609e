//! The sources that are there from the first minute.

use crate::finding::Text;

use super::glenn;
use super::glenn_entries;
use super::index;
use super::read_head::read_head_alone;
use super::store::Source;

/// The conventions: elements in their reference states, the hydrogen ion and the electron.
pub(super) const CONVENTIONS: &str = "conventions";
pub(super) const ATOMIC_WEIGHTS: &str = "atomic-weights-2021";
pub(super) const CONSTANTS: &str = "constants-2022";
pub(super) const GLENN: &str = glenn::ID;
/// What atoms add to the heat capacities of solids.
pub const KOPP: &str = "kopp-1992";

/// Source files that are part of the program.
pub(super) const FILES: [(&str, &str); 5] = [
    (CONVENTIONS, include_str!("data/conventions.toml")),
    ("codata-1989", include_str!("data/codata-1989.toml")),
    (
        ATOMIC_WEIGHTS,
        include_str!("data/atomic-weights-2021.toml"),
    ),
    (CONSTANTS, include_str!("data/constants-2022.toml")),
    (KOPP, include_str!("data/kopp-1992.toml")),
];

/// The ids of all built-in sources.
pub const BUILT_IN: [&str; 6] = [
    CONVENTIONS,
    "codata-1989",
    GLENN,
    ATOMIC_WEIGHTS,
    CONSTANTS,
    KOPP,
];

/// A built-in source by its id.
pub fn built_in(id: &str) -> Option<Source> {
    if id == GLENN {
        return Some(Source::glenn(glenn_entries::head(GLENN)));
    }
    let (name, content) = FILES.iter().find(|(name, _)| *name == id)?;
    let end = content.find("\n[[entry]]").unwrap_or(content.len());
    let mut head = read_head_alone(&Text::new(*name, &content[..end]))?;
    head.sha256 = index::places(name, "#sha256").pop()?.to_string();
    Some(Source::embedded(head, content))
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::source::read::{Provenance, read_source};

    #[test]
    fn every_built_in_source_reads_without_fault_and_bears_its_id() {
        for (id, content) in FILES {
            let (source, faults) = read_source(&Text::new(id, content), Provenance::Original);
            assert_eq!(faults.into_sorted(), [], "{id}");
            assert_eq!(source.map(|s| s.head.id), Some(id.to_string()));
        }
        for id in BUILT_IN {
            let source = built_in(id);
            assert!(
                source.is_some_and(|source| !source.all().is_empty()),
                "{id}"
            );
        }
    }
}
