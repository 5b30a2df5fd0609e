//! The committed index is what the sources say. To write it anew after a source has changed:
//! `HESSWRIGHT_WRITE_INDEX=1 cargo test --release index_of_the_built_in_sources`.

use super::builtin::{FILES, GLENN};
use super::glenn::GlennIndex;
use super::index;
use super::model::{Entry, Subject};
use super::read::{Provenance, read_source};
use super::sha256::sha256_hex;
use crate::finding::Text;

#[test]
fn the_index_of_the_built_in_sources_is_true() {
    let expected = made_anew();
    if std::env::var_os("HESSWRIGHT_WRITE_INDEX").is_some() {
        let path = concat!(env!("CARGO_MANIFEST_DIR"), "/src/source/data/index.tsv");
        std::fs::write(path, &expected).expect("the index can be written");
        return;
    }
    assert!(
        index::text() == expected,
        "data/index.tsv is not what the sources say"
    );
}

fn made_anew() -> String {
    let mut rows: Vec<(String, String)> = Vec::new();
    for (id, text) in FILES {
        rows.push((format!("{id}\t#sha256"), sha256_hex(text.as_bytes())));
        rows.extend(rows_of(id, text));
    }
    for (key, place) in GlennIndex::build().rows() {
        rows.push((format!("{GLENN}\t{key}"), place));
    }
    rows.sort_by(|a, b| a.0.cmp(&b.0));
    rows.iter()
        .map(|(cell, place)| format!("{cell}\t{place}\n"))
        .collect()
}

/// The blocks of a file from one `[[entry]]` to the next.
fn blocks(text: &str) -> Vec<(usize, usize)> {
    let mut starts: Vec<usize> = text
        .match_indices("\n[[entry]]")
        .map(|(at, _)| at + 1)
        .collect();
    assert!(!text.contains("[[correlation]]") && !text.contains("[[erratum]]"));
    starts.push(text.len());
    starts.windows(2).map(|pair| (pair[0], pair[1])).collect()
}

fn rows_of(id: &str, text: &str) -> Vec<(String, String)> {
    let (source, _) = read_source(&Text::new(id, text), Provenance::Original);
    let entries = source.expect("a built-in source reads").all();
    let blocks = blocks(text);
    assert_eq!(entries.len(), blocks.len(), "{id}");
    let rows = entries
        .iter()
        .zip(blocks)
        .flat_map(|(entry, (start, end))| {
            let place = format!("{start}-{end}");
            keys(entry)
                .into_iter()
                .map(move |key| (format!("{id}\t{key}"), place.clone()))
        });
    rows.collect()
}

fn keys(entry: &Entry) -> Vec<String> {
    let mut keys = match &entry.subject {
        Subject::Species(species) => vec![species.formula.hill()],
        Subject::Symbol(symbol) => vec![format!("={symbol}")],
    };
    keys.extend(
        entry
            .reference_for
            .map(|element| format!("@{}", element.symbol())),
    );
    keys
}
