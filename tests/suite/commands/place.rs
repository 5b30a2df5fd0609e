//! What `issue` does with what stands in the place of the record.

use crate::program::Folder;

use super::{WATER, case};

/// A folder with an issued record, and its stamp.
fn issued() -> (Folder, String) {
    let folder = Folder::new();
    folder.write("a.toml", case("for-check", &["codata-1989"], WATER));
    let document = folder.run(&["issue", "a.toml", "--json"]).json();
    assert!(document["replaced"].is_null());
    let stamp = document["stamp"].as_str().expect("a stamp").to_string();
    (folder, stamp)
}

fn change_title(folder: &Folder) {
    let changed = folder
        .text("a.toml")
        .replace("A case of the tests", "Another title");
    folder.write("a.toml", changed);
}

#[test]
fn an_unsigned_record_is_replaced_with_both_stamps_named() {
    let (folder, old) = issued();
    change_title(&folder);
    let ran = folder.run(&["issue", "a.toml", "--json"]);
    assert_eq!(ran.status, 0, "{}", ran.err);
    let document = ran.json();
    assert_eq!(document["replaced"], old.as_str());
    let new = document["stamp"].as_str().expect("a stamp");
    assert_ne!(new, old);
    assert!(ran.err.contains(&format!(
        "  stamp {new}\n  replaces the unsigned record {old}\n"
    )));
    assert_eq!(folder.names("out"), ["T-0001-A.pdf"]);
}

#[test]
fn what_is_no_record_is_left_untouched() {
    let folder = Folder::new();
    folder.write("a.toml", case("for-check", &["codata-1989"], WATER));
    let blank = b"%PDF-1.4\n1 0 obj<</Type/Catalog/Pages 2 0 R>>endobj 2 0 obj<</Type/Pages/Kids[]/Count 0>>endobj\ntrailer<</Root 1 0 R>>\n";
    for foreign in [b"hello".as_slice(), b"", blank] {
        folder.write("out/T-0001-A.pdf", foreign);
        let ran = folder.run(&["issue", "a.toml", "--json"]);
        assert_eq!(ran.status, 2, "{}", ran.err);
        assert!(ran.json()["error"].is_string());
        assert!(
            ran.err.contains("is there; move it away first"),
            "{}",
            ran.err
        );
        assert_eq!(folder.read("out/T-0001-A.pdf"), foreign);
    }
    assert_eq!(folder.names("out"), ["T-0001-A.pdf"]);
}

/// The record with a signature dictionary added in an incremental update (ISO 32000-2, 7.5.6). It
/// signs nothing: what counts here is that something is there which nobody may overwrite.
fn signed(record: &[u8]) -> Vec<u8> {
    let text = String::from_utf8_lossy(record);
    let after = |key: &str| {
        let at = text
            .rfind(key)
            .unwrap_or_else(|| panic!("{key} in the record"))
            + key.len();
        let number: String = text[at..]
            .trim_start()
            .chars()
            .take_while(char::is_ascii_digit)
            .collect();
        number.parse::<usize>().expect("a number")
    };
    let (size, root, previous) = (after("/Size"), after("/Root"), after("startxref"));
    let mut bytes = record.to_vec();
    let offset = bytes.len() + 1;
    bytes.extend(
        format!("\n{size} 0 obj\n<</Type/Sig/ByteRange[0 0 0 0]/Contents<00>>>\nendobj\n").bytes(),
    );
    let table = bytes.len();
    bytes.extend(
        format!(
            "xref\n{size} 1\n{offset:010} 00000 n \ntrailer\n<</Size {}/Root {root} 0 R/Prev {previous}>>\n\
             startxref\n{table}\n%%EOF\n",
            size + 1
        )
        .bytes(),
    );
    bytes
}

#[test]
fn a_signed_record_is_left_alone_by_the_same_content_and_refuses_other() {
    let (folder, stamp) = issued();
    let signed = signed(&folder.read("out/T-0001-A.pdf"));
    folder.write("out/T-0001-A.pdf", &signed);
    let same = folder.run(&["issue", "a.toml"]);
    assert_eq!(same.status, 0, "{}", same.err);
    assert!(
        same.err
            .contains("the signed record there has this content; left alone"),
        "{}",
        same.err
    );
    assert!(folder.read("out/T-0001-A.pdf") == signed);

    change_title(&folder);
    let other = folder.run(&["issue", "a.toml"]);
    assert_eq!(other.status, 2, "{}", other.err);
    assert!(
        other
            .err
            .contains("a signed record of other content is there"),
        "{}",
        other.err
    );
    assert!(other.err.contains(&stamp), "{}", other.err);
    assert!(folder.read("out/T-0001-A.pdf") == signed);
    assert_eq!(folder.names("out"), ["T-0001-A.pdf"]);
}

#[test]
fn a_folder_that_cannot_be_written_ends_with_two_and_nothing_half_written() {
    let folder = Folder::new();
    folder.write("a.toml", case("for-check", &["codata-1989"], WATER));
    folder.write("file", "a file");
    folder.write("full/T-0001-A.pdf/in-the-way", "");
    for out in ["file", "file/below", "full"] {
        let ran = folder.run(&["issue", "a.toml", "--out", out]);
        assert_eq!(ran.status, 2, "{out}: {}", ran.err);
        assert!(ran.err.contains("not written: "), "{}", ran.err);
        assert!(!ran.err.contains("os error"), "{}", ran.err);
    }
    assert_eq!(folder.text("file"), "a file");
    assert_eq!(folder.names("full"), ["T-0001-A.pdf"]);
    assert_eq!(folder.run(&["draft", "C-1", "--out", "file"]).status, 2);
}
