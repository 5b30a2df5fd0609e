//! The committed index of the built-in sources: where an entry stands, so that a case reads the
//! few entries that it needs and the library is not felt at start-up.
//!
//! `data/index.tsv` holds lines of source, key and place, in order. The key is a composition
//! (`Formula::hill`), `=` and a symbol, `@` and the element whose reference state the entry is, or
//! `#sha256`. A test makes the index anew from the sources and compares.

static INDEX: &str = include_str!("data/index.tsv");

/// The places under a key of a source, in the order of the source.
pub(super) fn places(source: &str, key: &str) -> Vec<&'static str> {
    let wanted = format!("{source}\t{key}");
    let start = first_not_below(&wanted);
    let lines = INDEX[start..].lines();
    lines
        .map_while(|line| line.rsplit_once('\t'))
        .take_while(|(cell, _)| *cell == wanted)
        .map(|(_, place)| place)
        .collect()
}

/// The start of the first line whose source and key are not below the wanted ones.
fn first_not_below(wanted: &str) -> usize {
    let (mut low, mut high) = (0, INDEX.len());
    while low < high {
        let middle = line_start(low + (high - low) / 2, low);
        let line = INDEX[middle..].lines().next().unwrap_or("");
        let cell = line.rsplit_once('\t').map_or("", |(cell, _)| cell);
        if cell < wanted {
            low = (middle + line.len() + 1).min(INDEX.len());
        } else {
            high = middle;
        }
    }
    low
}

/// The start of the line that holds a byte, not before `low`, which is itself a start.
fn line_start(at: usize, low: usize) -> usize {
    let before = &INDEX.as_bytes()[low..at];
    before
        .iter()
        .rposition(|b| *b == b'\n')
        .map_or(low, |newline| low + newline + 1)
}

/// A place as two numbers, `12-34`.
pub(super) fn span(place: &str) -> Option<std::ops::Range<usize>> {
    let (start, end) = place.split_once('-')?;
    Some(start.parse().ok()?..end.parse().ok()?)
}

#[cfg(test)]
pub(super) fn text() -> &'static str {
    INDEX
}
