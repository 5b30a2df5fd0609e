//! PDF/A-3a (ISO 19005-3:2012), as far as a reader of objects can tell.

use std::collections::BTreeSet;

use hayro_syntax::Pdf;
use hayro_syntax::object::{Dict, Object, Stream};
use hesswright::record::Relationship;

use super::issued::{Issued, shipped};
use super::reader::{all_dicts, array, catalogue, decoded, dict, name, stream, string, tree};

/// `2026-11-24` as PDF writes it, at midnight in UTC.
fn pdf_date(record: &Issued) -> String {
    let date = record.calculation.case.record.date.to_string();
    format!("D:{}000000Z", date.replace('-', ""))
}

fn xmp(pdf: &Pdf) -> String {
    let metadata: Stream<'_> = catalogue(pdf).get("Metadata").expect("a metadata stream");
    String::from_utf8(stream(&metadata)).expect("XMP in UTF-8")
}

fn contains(bytes: &[u8], needle: &[u8]) -> bool {
    bytes.windows(needle.len()).any(|window| window == needle)
}

#[test]
fn the_file_begins_as_a_pdf_and_is_not_encrypted() {
    for record in shipped() {
        let bytes = &record.issue.pdf;
        assert!(bytes.starts_with(b"%PDF-1.7\n%"), "{:?}", &bytes[..12]);
        assert!(
            bytes[10..14].iter().all(|byte| *byte > 127),
            "a comment of high bytes"
        );
        assert!(!contains(bytes, b"/Encrypt"));
        assert!(contains(bytes, b"/ID"));
    }
}

#[test]
fn the_metadata_claim_both_standards_and_give_the_date_of_the_record() {
    for record in shipped() {
        let head = &record.calculation.case.record;
        let text = xmp(&record.pdf());
        let title = format!(
            "{}, revision {}: {}",
            head.number.value, head.revision.value, head.title
        );
        let date = format!("{}T00:00:00", head.date);
        for said in [
            "<pdfaid:part>3</pdfaid:part>".to_string(),
            "<pdfaid:conformance>A</pdfaid:conformance>".to_string(),
            "<pdfuaid:part>1</pdfuaid:part>".to_string(),
            format!("<xmp:CreateDate>{date}"),
            format!("<xmp:ModifyDate>{date}"),
            title,
            head.preparer.clone(),
        ] {
            assert!(text.contains(&said), "{said} is not in {text}");
        }
    }
}

#[test]
fn the_information_dictionary_agrees_with_the_metadata() {
    for record in shipped() {
        let pdf = record.pdf();
        let infos: Vec<Dict<'_>> = all_dicts(&pdf)
            .into_iter()
            .filter(|d| d.contains_key("CreationDate"))
            .collect();
        assert_eq!(infos.len(), 1);
        for key in ["CreationDate", "ModDate"] {
            assert_eq!(string(&infos[0], key), pdf_date(record), "{key}");
        }
        let text = xmp(&pdf);
        for key in ["Title", "Author", "Creator"] {
            let value = string(&infos[0], key);
            assert!(!value.is_empty() && text.contains(&value), "{key}: {value}");
        }
    }
}

#[test]
fn an_output_intent_carries_its_profile() {
    for record in shipped() {
        let pdf = record.pdf();
        let intents: Vec<Dict<'_>> = array(&catalogue(&pdf), "OutputIntents");
        assert_eq!(intents.len(), 1);
        assert_eq!(name(&intents[0], "S"), "GTS_PDFA1");
        assert!(!string(&intents[0], "OutputConditionIdentifier").is_empty());
        let profile: Stream<'_> = intents[0].get("DestOutputProfile").expect("a profile");
        let bytes = stream(&profile);
        // The signature of an ICC profile (ISO 15076-1, 7.2).
        assert_eq!(bytes.get(36..40), Some(&b"acsp"[..]));
        assert!(profile.dict().contains_key("N"));
    }
}

#[test]
fn fonts_are_embedded_and_say_their_text() {
    for record in shipped() {
        let pdf = record.pdf();
        let fonts: Vec<Dict<'_>> = all_dicts(&pdf)
            .into_iter()
            .filter(|d| name(d, "Type") == "Font")
            .collect();
        let (mut whole, mut descendants) = (0, 0);
        for font in fonts {
            if name(&font, "Subtype") == "Type0" {
                assert!(font.get::<Stream<'_>>("ToUnicode").is_some());
                assert_eq!(name(&font, "Encoding"), "Identity-H");
                whole += 1;
            } else {
                let descriptor = dict(&font, "FontDescriptor");
                let embedded = ["FontFile2", "FontFile3"];
                assert!(
                    embedded
                        .iter()
                        .any(|key| descriptor.get::<Stream<'_>>(key).is_some())
                );
                let full = name(&descriptor, "FontName");
                assert_eq!(full.find('+'), Some(6), "{full} is a subset");
                descendants += 1;
            }
        }
        assert!(whole > 0 && whole == descendants);
    }
}

/// Actions, scripts, multimedia, forms of JavaScript and XFA, references to other files.
#[test]
fn nothing_acts_and_nothing_lies_outside() {
    for record in shipped() {
        let pdf = record.pdf();
        for dict in all_dicts(&pdf) {
            for key in [
                "JS",
                "AA",
                "OpenAction",
                "XFA",
                "Launch",
                "URI",
                "FFilter",
                "Ref",
            ] {
                assert!(!dict.contains_key(key), "{key} in {dict:?}");
            }
            let kind = name(&dict, "Type");
            assert!(
                !["Action", "ObjStm3D", "Sound", "Movie"].contains(&kind.as_str()),
                "{kind}"
            );
            if name(&dict, "Subtype") == "Link" {
                assert!(
                    dict.contains_key("Dest") && !dict.contains_key("A"),
                    "{dict:?}"
                );
            }
            if kind == "Filespec" {
                assert!(
                    dict.contains_key("EF"),
                    "a file that is not embedded: {dict:?}"
                );
            }
        }
        assert!(!dict(&catalogue(&pdf), "Names").contains_key("JavaScript"));
    }
}

#[test]
fn every_attachment_is_declared_described_and_dated() {
    for record in shipped() {
        let pdf = record.pdf();
        let catalogue = catalogue(&pdf);
        let associated: BTreeSet<String> = array::<Dict<'_>>(&catalogue, "AF")
            .iter()
            .map(|file| string(file, "UF"))
            .collect();
        let names = dict(&dict(&catalogue, "Names"), "EmbeddedFiles");
        let attached = &record.issue.record.attachments;
        let listed = tree(&names, "Names");
        assert_eq!(listed.len(), attached.len());
        for (key, file) in listed {
            let (Object::String(key), Object::Dict(file)) = (key, file) else {
                panic!("a name tree of strings and dictionaries")
            };
            let key = decoded(key.as_bytes());
            let ours = attached
                .iter()
                .find(|a| a.name == key)
                .expect("an attachment of ours");
            assert!(associated.contains(&key), "{key} is not in /AF");
            assert_eq!(
                (string(&file, "F"), string(&file, "UF")),
                (key.clone(), key.clone())
            );
            assert_eq!(string(&file, "Desc"), ours.description);
            let relationship = if key == "case.toml" { "Source" } else { "Data" };
            assert_eq!(name(&file, "AFRelationship"), relationship, "{key}");
            assert_eq!(
                ours.relationship == Relationship::Source,
                key == "case.toml"
            );
            let embedded: Stream<'_> = dict(&file, "EF").get("UF").expect("an embedded file");
            assert!(stream(&embedded) == ours.bytes, "{key}");
            let media = if key.ends_with(".json") {
                "application/json"
            } else {
                "application/toml"
            };
            assert_eq!(name(embedded.dict(), "Subtype"), media, "{key}");
            let params = dict(embedded.dict(), "Params");
            assert_eq!(string(&params, "ModDate"), pdf_date(record), "{key}");
        }
        assert_eq!(associated.len(), attached.len());
    }
}
