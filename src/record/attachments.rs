//! What travels with a record: the case, the sources' excerpts, the results and the manifest.

use crate::calculation::Calculation;
use crate::source::{attachment_name, excerpts};

use super::manifest::{Identity, MANIFEST_NAME, Manifest, ManifestInput, Typesetting};
use super::results_json::results_json;

/// How an attached file relates to the pages (AFRelationship, ISO 19005-3, 6.8).
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Relationship {
    /// The pages were made from it.
    Source,
    /// It holds the data that the pages show.
    Data,
}

impl Relationship {
    pub fn word(self) -> &'static str {
        match self {
            Relationship::Source => "Source",
            Relationship::Data => "Data",
        }
    }
}

/// A file attached to a record.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Attachment {
    /// Flat name: no folder, no separator.
    pub name: String,
    pub bytes: Vec<u8>,
    pub relationship: Relationship,
    pub media_type: &'static str,
    pub description: String,
}

/// All attachments, the manifest last. The stamp is the SHA-256 of the manifest.
pub(super) fn attached_files(
    calculation: &Calculation,
    typesetting: &Typesetting,
) -> Vec<Attachment> {
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

fn case_file(calculation: &Calculation) -> Attachment {
    Attachment {
        name: crate::case::CASE_NAME.to_string(),
        bytes: calculation.text.as_str().as_bytes().to_vec(),
        relationship: Relationship::Source,
        media_type: "application/toml",
        description: "The case as the preparer wrote it".to_string(),
    }
}

fn source_files(calculation: &Calculation) -> Vec<Attachment> {
    let named = |(name, text): (String, String)| Attachment {
        name,
        bytes: text.into_bytes(),
        relationship: Relationship::Data,
        media_type: "application/toml",
        description: "Entries of a source that decided something".to_string(),
    };
    excerpts(&calculation.problem)
        .into_iter()
        .map(named)
        .collect()
}

fn data_file(name: &str, text: String, description: &str) -> Attachment {
    Attachment {
        name: name.to_string(),
        bytes: text.into_bytes(),
        relationship: Relationship::Data,
        media_type: "application/json",
        description: description.to_string(),
    }
}

fn manifest(
    calculation: &Calculation,
    typesetting: &Typesetting,
    files: &[Attachment],
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
