//! The template's parts, compiled into the program, and the hash that names them as a whole.

use std::fmt::Write;
use std::sync::LazyLock;

use sha2::{Digest, Sha256};
use typst::syntax::{FileId, RootedPath, Source, VirtualPath, VirtualRoot};

/// The part that includes all others.
pub(super) const MAIN: &str = "record.typ";

macro_rules! parts {
    ($($name:literal),* $(,)?) => {
        /// Name and text of each part, sorted by name.
        pub(super) const PARTS: &[(&str, &str)] =
            &[$(($name, include_str!(concat!("../../templates/", $name)))),*];
    };
}

parts![
    "basis.typ",
    "budget.typ",
    "findings.typ",
    "front.typ",
    "math.typ",
    "prose.typ",
    "record.typ",
    "references.typ",
    "results.typ",
    "rich.typ",
    "sheet.typ",
    "style.typ",
    "table.typ",
    "values.typ",
    "words.typ",
    "working.typ",
];

/// SHA-256 over all parts in sorted order: for each its name, a line feed, its length in bytes in
/// decimal, a line feed, and its bytes. 64 lower-case hexadecimal digits.
pub fn template_sha256() -> String {
    let mut hasher = Sha256::new();
    for (name, text) in PARTS {
        hasher.update(format!("{name}\n{}\n", text.len()));
        hasher.update(text);
    }
    hex(&hasher.finalize())
}

pub(super) fn hex(bytes: &[u8]) -> String {
    bytes.iter().fold(String::new(), |mut digits, byte| {
        // Writing to a string cannot fail.
        let _ = write!(digits, "{byte:02x}");
        digits
    })
}

/// The identity of a file at the root of the template's world. Only for the fixed names of this
/// module and of the data file: the typesetter keeps every name that it ever saw.
pub(super) fn file_id(name: &'static str) -> FileId {
    // The names are constants without separators, which are valid paths.
    let path = VirtualPath::new(name).expect("a constant flat name is a valid path");
    RootedPath::new(VirtualRoot::Project, path).intern()
}

/// The parts, parsed once.
pub(super) static SOURCES: LazyLock<Vec<Source>> = LazyLock::new(|| {
    PARTS
        .iter()
        .map(|(name, text)| Source::new(file_id(name), (*text).to_owned()))
        .collect()
});

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn every_template_file_is_a_part_and_the_parts_are_sorted() {
        let folder = std::path::Path::new(file!()).with_file_name("../../templates");
        let mut names: Vec<String> = std::fs::read_dir(folder)
            .unwrap()
            .map(|entry| entry.unwrap().file_name().into_string().unwrap())
            .collect();
        names.sort();
        let parts: Vec<&str> = PARTS.iter().map(|(name, _)| *name).collect();
        assert_eq!(parts, names);
    }

    #[test]
    fn the_hash_is_over_names_lengths_and_bytes() {
        let joined: String = PARTS
            .iter()
            .map(|(name, text)| format!("{name}\n{}\n{text}", text.len()))
            .collect();
        assert_eq!(template_sha256(), hex(&Sha256::digest(joined)));
        assert_eq!(template_sha256().len(), 64);
    }
}
