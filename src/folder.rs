//! The folder of a case: source files beside it, or the attachments of an extracted record.

use std::path::{Component, Path, PathBuf};

use crate::document::read_text;
use crate::finding::{Fault, Text};
use crate::record::{MANIFEST_NAME, Manifest};
use crate::source::{SourceFiles, sha256_hex};

/// Source files by the names that a case consults.
pub struct CaseFolder {
    root: PathBuf,
    /// Where the case was extracted from a record: what each name became.
    manifest: Option<Manifest>,
}

impl CaseFolder {
    /// The folder of a case. Where a `manifest.json` beside it names this very case, the case was
    /// extracted from a record, and its sources are the extracted ones.
    pub fn of(case: &Path, text: &Text) -> CaseFolder {
        let root = case.parent().map_or_else(PathBuf::new, Path::to_path_buf);
        let manifest = manifest_of(&root, text);
        CaseFolder { root, manifest }
    }

    fn read(&self, name: &str) -> Result<Text, Fault> {
        if !stays_inside(name) || leads_outside(&self.root, name) {
            return Err(Fault::of_file(
                name,
                "a path that leaves the folder of the case",
                "a path relative to the case that stays inside its folder",
                "put the file beside the case, or in a folder below it",
            ));
        }
        read_text(&self.root.join(name), name)
    }
}

impl CaseFolder {
    /// An extracted source has to be the one that the manifest names: its head bears the hash of
    /// the file that the values came from, which no longer vouches for altered ones.
    fn read_extracted(&self, manifest: &Manifest, file: &str) -> Result<Text, Fault> {
        let text = self.read(file)?;
        let named = manifest
            .attachments
            .get(file)
            .and_then(|hash| hash.as_str());
        if named == Some(&sha256_hex(text.as_str().as_bytes())) {
            return Ok(text);
        }
        Err(Fault::of_file(
            file,
            "another content than manifest.json beside it names",
            "the file as it was extracted from the record",
            "extract the record again; to work with other values, take the case to a folder of \
             its own and consult a source file of your own",
        ))
    }
}

impl SourceFiles for CaseFolder {
    fn text(&self, name: &str) -> Option<Result<Text, Fault>> {
        if let Some(manifest) = &self.manifest {
            let file = manifest.consult.get(name)?.as_str()?;
            return Some(self.read_extracted(manifest, file));
        }
        name.ends_with(".toml").then(|| self.read(name))
    }
}

fn manifest_of(root: &Path, case: &Text) -> Option<Manifest> {
    let text = read_text(&root.join(MANIFEST_NAME), MANIFEST_NAME).ok()?;
    let manifest: Manifest = serde_json::from_str(text.as_str()).ok()?;
    let named = manifest.attachments.get(crate::case::CASE_NAME)?.as_str()?;
    (named == sha256_hex(case.as_str().as_bytes())).then_some(manifest)
}

fn stays_inside(name: &str) -> bool {
    let plain = |c: Component<'_>| matches!(c, Component::Normal(_) | Component::CurDir);
    Path::new(name).components().all(plain)
}

/// A link can leave the folder although its name does not.
fn leads_outside(root: &Path, name: &str) -> bool {
    let root = if root.as_os_str().is_empty() {
        Path::new(".")
    } else {
        root
    };
    match (root.canonicalize(), root.join(name).canonicalize()) {
        (Ok(root), Ok(file)) => !file.starts_with(root),
        _ => false,
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn only_paths_below_the_case_stay_inside() {
        assert!(stays_inside("sources/a.toml"));
        assert!(stays_inside("./a.toml"));
        for bad in ["../a.toml", "/etc/a.toml", "sources/../../a.toml"] {
            assert!(!stays_inside(bad), "{bad}");
        }
    }
}
