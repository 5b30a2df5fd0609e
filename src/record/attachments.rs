//! What travels with a record: the case, the sources' excerpts, the results and the manifest.

use crate::calculation::Calculation;
use crate::source::{attachment_name, excerpts};

use super::manifest::{Identity, MANIFEST_NAME, Manifest, ManifestInput, Typesetting};
use super::results_json::results_json;

/// A file attached to a record.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct AttachedFile {
    pub name: String,
    pub bytes: Vec<u8>,
    /// Whether the record was made from it (AFRelationship Source) or it holds data (Data).
    pub is_source: bool,
    pub media_type: &'static str,
    pub description: String,
}

/// All attachments, the manifest last. The stamp is the SHA-256 of the manifest.
pub(super) fn attached_files(
    calculation: &Calculation,
    typesetting: &Typesetting,
) -> Vec<AttachedFile> {
    let mut files = vec![case_file(calculation)];
    files.extend(source_files(calculation));
    files.push(data_file(
        "results.json",
        results_json(calculation),
        "Results, values used and findings, as `hesswright compute --json` prints them",
    ));
    let manifest = manifest(calculation, typesetting, &files);
    files.push(data_file(
        MANIFEST_NAME,
        manifest.to_json(),
        "SHA-256 of everything the record was made from; its own SHA-256 is the stamp",
    ));
    files
}

fn case_file(calculation: &Calculation) -> AttachedFile {
    AttachedFile {
        name: crate::case::CASE_NAME.to_string(),
        bytes: calculation.text.as_str().as_bytes().to_vec(),
        is_source: true,
        media_type: "application/toml",
        description: "The case as the preparer wrote it".to_string(),
    }
}

fn source_files(calculation: &Calculation) -> Vec<AttachedFile> {
    let named = |(name, text): (String, String)| AttachedFile {
        name,
        bytes: text.into_bytes(),
        is_source: false,
        media_type: "application/toml",
        description: "Entries of a source that decided something".to_string(),
    };
    excerpts(&calculation.problem)
        .into_iter()
        .map(named)
        .collect()
}

fn data_file(name: &str, text: String, description: &str) -> AttachedFile {
    AttachedFile {
        name: name.to_string(),
        bytes: text.into_bytes(),
        is_source: false,
        media_type: "application/json",
        description: description.to_string(),
    }
}

fn manifest(
    calculation: &Calculation,
    typesetting: &Typesetting,
    files: &[AttachedFile],
) -> Manifest {
    let head = &calculation.case.record;
    let problem = &calculation.problem;
    let became = problem
        .became
        .iter()
        .map(|(name, index)| (name.clone(), attachment_name(problem.sources[*index].id())));
    Manifest::of(&ManifestInput {
        identity: Identity {
            number: head.number.value.clone(),
            revision: head.revision.value.clone(),
        },
        engine: format!("{} {}", env!("CARGO_PKG_NAME"), env!("CARGO_PKG_VERSION")),
        typesetting,
        consult: became.collect(),
        attachments: files
            .iter()
            .map(|f| (f.name.as_str(), f.bytes.as_slice()))
            .collect(),
    })
}
