//! `draft`, and the way from there to a record.

use crate::program::Folder;

#[test]
fn a_draft_computes_and_is_issued_as_it_stands() {
    let folder = Folder::new();
    let drafted = folder.run(&["draft", "C-0001"]);
    assert_eq!(
        (drafted.status, drafted.out.as_str()),
        (0, ""),
        "{}",
        drafted.err
    );
    assert!(
        drafted.err.starts_with("out/C-0001.toml\n"),
        "{}",
        drafted.err
    );
    let computed = folder.run(&["compute", "out/C-0001.toml"]);
    assert_eq!((computed.status, computed.err.as_str()), (0, ""));
    assert!(
        computed.out.starts_with("C-0001 revision A, preliminary: "),
        "{}",
        computed.out
    );
    let issued = folder.run(&["issue", "out/C-0001.toml"]);
    assert_eq!(
        (issued.status, issued.out.as_str()),
        (0, ""),
        "{}",
        issued.err
    );
    assert_eq!(folder.names("out"), ["C-0001-A.pdf", "C-0001.toml"]);
    assert!(folder.read("out/C-0001-A.pdf").starts_with(b"%PDF-"));
}

#[test]
fn a_draft_overwrites_nothing() {
    let folder = Folder::new();
    folder.write("cases/C-0001.toml", "mine");
    let ran = folder.run(&["draft", "C-0001", "--out", "cases"]);
    assert_eq!(ran.status, 2);
    assert!(
        ran.err.contains("cases/C-0001.toml: not written: "),
        "{}",
        ran.err
    );
    assert_eq!(folder.text("cases/C-0001.toml"), "mine");
}

#[test]
fn numbers_that_are_no_file_names_are_refused() {
    let folder = Folder::new();
    let long = "1".repeat(65);
    for bad in ["", "../C-1", "C/1", ".C-1", "C 1", "Ç-1", "C\n1", &long] {
        let ran = folder.run(&["draft", bad, "--json"]);
        assert_eq!(ran.status, 2, "{bad}");
        assert!(ran.json()["error"].is_string(), "{bad}");
    }
    assert_eq!(folder.run(&["draft", "--", "-C-1"]).status, 2);
    assert!(folder.names(".").is_empty(), "{:?}", folder.names("."));
}

#[test]
fn the_file_of_a_draft_is_told_to_scripts() {
    let folder = Folder::new();
    let ran = folder.run(&["draft", "C-0001", "--json", "--out", "a/b"]);
    assert_eq!(ran.json(), serde_json::json!({ "file": "a/b/C-0001.toml" }));
    assert!(folder.has("a/b/C-0001.toml"));
}
