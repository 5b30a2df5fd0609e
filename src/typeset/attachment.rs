//! The files that travel inside a record, as the template receives them.

use std::collections::BTreeSet;

use typst::foundations::{Array, Bytes, Dict, IntoValue, Value};

use crate::record::{Attachment, Relationship};

use super::TypesetError;

/// Names that a reader of the record can save under, each once.
pub(super) fn check(attachments: &[Attachment]) -> Result<(), TypesetError> {
    let mut seen = BTreeSet::new();
    for attachment in attachments {
        let name = &attachment.name;
        if !is_flat(name) {
            return Err(TypesetError::AttachmentName(name.clone()));
        }
        if !seen.insert(name) {
            return Err(TypesetError::AttachmentTwice(name.clone()));
        }
    }
    Ok(())
}

fn is_flat(name: &str) -> bool {
    !matches!(name, "" | "." | "..")
        && !name
            .chars()
            .any(|c| matches!(c, '/' | '\\' | ':') || c.is_control())
}

/// The `inputs` of the template. Bytes go in as a value, so that no attached file's name enters
/// the typesetter's table of paths, which never shrinks.
pub(super) fn inputs(attachments: &[Attachment]) -> Dict {
    let files: Array = attachments.iter().map(value).collect();
    let mut inputs = Dict::new();
    inputs.insert("attachments".into(), files.into_value());
    inputs
}

fn value(attachment: &Attachment) -> Value {
    let mut file = Dict::new();
    let mut put = |key: &str, value: Value| file.insert(key.into(), value);
    put("name", attachment.name.as_str().into_value());
    put("data", Bytes::new(attachment.bytes.clone()).into_value());
    put(
        "relationship",
        keyword(attachment.relationship).into_value(),
    );
    put("media-type", attachment.media_type.into_value());
    put("description", attachment.description.as_str().into_value());
    file.into_value()
}

/// The typesetter's word for a relationship.
fn keyword(relationship: Relationship) -> &'static str {
    match relationship {
        Relationship::Source => "source",
        Relationship::Data => "data",
    }
}
