//! The manifest: the SHA-256 of everything that a record was computed and typeset from.
//!
//! The stamp is the SHA-256 of the manifest's own bytes, so it stands for all of them.

use serde::{Deserialize, Serialize};
use serde_json::{Map, Value};

use crate::source::sha256_hex;

/// The name under which the manifest is attached.
pub const MANIFEST_NAME: &str = "manifest.json";

/// What a typesetter brings to a record: its identity, its template and its fonts.
#[derive(Clone, Debug)]
pub struct Typesetting {
    pub version: String,
    pub template_sha256: String,
    /// Name and SHA-256 of each font.
    pub fonts: Vec<(String, String)>,
}

/// `manifest.json`.
#[derive(Clone, Debug, Serialize, Deserialize)]
#[serde(rename_all = "kebab-case")]
pub struct Manifest {
    pub record: Identity,
    pub engine: String,
    /// SHA-256 of the source that the engine was built from.
    #[serde(default)]
    pub engine_source: String,
    pub typesetter: String,
    pub template: String,
    pub fonts: Map<String, Value>,
    /// For each name in `consult`, the attachment that it became.
    pub consult: Map<String, Value>,
    /// SHA-256 of each other attachment by its name.
    pub attachments: Map<String, Value>,
}

/// Which record it is.
#[derive(Clone, Debug, PartialEq, Eq, Serialize, Deserialize)]
pub struct Identity {
    pub number: String,
    pub revision: String,
}

/// What a manifest is made from.
pub struct ManifestInput<'a> {
    pub identity: Identity,
    pub engine: String,
    pub typesetting: &'a Typesetting,
    pub consult: Vec<(String, String)>,
    /// Name and bytes of each other attachment.
    pub attachments: Vec<(&'a str, &'a [u8])>,
}

impl Manifest {
    pub fn of(input: &ManifestInput<'_>) -> Manifest {
        let text = |(name, value): &(String, String)| (name.clone(), Value::from(value.clone()));
        let hash =
            |(name, bytes): &(&str, &[u8])| (name.to_string(), Value::from(sha256_hex(bytes)));
        Manifest {
            record: input.identity.clone(),
            engine: input.engine.clone(),
            engine_source: env!("HESSWRIGHT_SOURCE").to_string(),
            typesetter: input.typesetting.version.clone(),
            template: input.typesetting.template_sha256.clone(),
            fonts: input.typesetting.fonts.iter().map(text).collect(),
            consult: input.consult.iter().map(text).collect(),
            attachments: input.attachments.iter().map(hash).collect(),
        }
    }

    /// The bytes that are attached and stamped.
    pub fn to_json(&self) -> String {
        // A structure of strings always has a JSON form.
        serde_json::to_string_pretty(self).expect("a manifest is made of strings") + "\n"
    }
}
