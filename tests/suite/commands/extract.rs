//! `extract`: a record's attachments as files, which compute to the same results.

use crate::program::Folder;

#[test]
fn an_extracted_case_computes_to_the_same_bytes_and_record() {
    let folder = Folder::new();
    folder.copy("cases", "cases");
    let case = "cases/nitrobenzene-hydrogenation.toml";
    assert_eq!(folder.run(&["issue", case]).status, 0);
    let ran = folder.run(&["extract", "out/LA-0412-A.pdf", "files", "--json"]);
    assert_eq!(ran.status, 0, "{}", ran.err);
    let names = folder.names("files");
    let told = ran.json()["files"].as_array().cloned().unwrap_or_default();
    let mut told: Vec<&str> = told.iter().filter_map(|name| name.as_str()).collect();
    told.sort_unstable();
    assert_eq!(told, names);
    for name in [
        "case.toml",
        "manifest.json",
        "results.json",
        "source-organic-liquids.toml",
    ] {
        assert!(names.contains(&name.to_string()), "{name}");
    }
    assert!(folder.read("files/case.toml") == folder.read(case));
    let original = folder.run(&["compute", case, "--json"]).out;
    let extracted = folder.run(&["compute", "files/case.toml", "--json"]);
    assert_eq!(extracted.status, 0, "{}", extracted.err);
    assert!(extracted.out == original, "{}", extracted.out);

    let again = folder.run(&["issue", "files/case.toml", "--out", "again"]);
    assert_eq!(again.status, 0, "{}", again.err);
    assert!(folder.read("again/LA-0412-A.pdf") == folder.read("out/LA-0412-A.pdf"));
}

#[test]
fn nothing_is_written_where_a_file_is_in_the_way_or_the_record_is_none() {
    let folder = Folder::new();
    folder.copy("cases", "cases");
    assert_eq!(
        folder
            .run(&["issue", "cases/acid-neutralisation.toml"])
            .status,
        0
    );
    folder.write("files/results.json", "mine");
    let ran = folder.run(&["extract", "out/HV-0077-B.pdf", "files"]);
    assert_eq!(ran.status, 2);
    assert!(
        ran.err.contains("files/results.json is there already"),
        "{}",
        ran.err
    );
    assert_eq!(folder.names("files"), ["results.json"]);
    assert_eq!(folder.text("files/results.json"), "mine");
    for none in ["cases/acid-neutralisation.toml", "missing.pdf", "cases"] {
        let ran = folder.run(&["extract", none, "other", "--json"]);
        assert_eq!(ran.status, 2, "{none}");
        assert!(ran.json()["error"].is_string());
    }
    assert!(!folder.has("other"));
}
