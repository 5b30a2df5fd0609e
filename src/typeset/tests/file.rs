//! The bytes: standards, attachments, determinism.

use super::*;

#[test]
fn equal_arguments_give_equal_bytes() {
    let first = typeset(&pages(), &attachments()).unwrap();
    let second = typeset(&pages(), &attachments()).unwrap();
    assert!(first == second);
}

#[test]
fn the_file_claims_both_standards_and_is_built_for_them() {
    let bytes = typeset(&pages(), &attachments()).unwrap();
    for token in [
        "<pdfaid:part>3</pdfaid:part>",
        "<pdfaid:conformance>A</pdfaid:conformance>",
        "<pdfuaid:part>1</pdfuaid:part>",
        "/OutputIntents",
        "/StructTreeRoot",
        "/MarkInfo",
        "/Lang",
        "/DisplayDocTitle true",
        "/AF",
        "2026-03-05T00:00:00",
    ] {
        assert!(contains(&bytes, token), "{token} is missing");
    }
}

#[test]
fn attachments_carry_name_relationship_and_media_type() {
    let bytes = typeset(&pages(), &attachments()).unwrap();
    for token in [
        "(case.toml)",
        "(results.json)",
        "/AFRelationship/Source",
        "/AFRelationship/Data",
        "/application#2Ftoml",
        "/application#2Fjson",
    ] {
        assert!(contains(&bytes, token), "{token} is missing");
    }
}

#[test]
fn attachment_names_are_flat_and_unique() {
    let named = |name: &str| Attachment {
        name: name.to_owned(),
        ..attachments()[0].clone()
    };
    for name in ["", "..", "a/b", "a\\b", "c:d", "new\nline"] {
        let error = typeset(&pages(), &[named(name)]).unwrap_err();
        assert_eq!(error, TypesetError::AttachmentName(name.to_owned()));
    }
    let twice = typeset(&pages(), &[named("a"), named("a")]).unwrap_err();
    assert_eq!(twice.to_string(), "two attachments are named `a`.");
}
