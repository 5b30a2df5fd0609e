//! `issue`: which record is written, and that it is the same from everywhere.

use crate::program::Folder;

use super::{WATER, case};

#[test]
fn a_record_is_the_same_bytes_twice_and_from_another_folder_and_file_name() {
    let here = Folder::new();
    here.copy("cases", "cases");
    let first = here.run(&["issue", "cases/nitrobenzene-hydrogenation.toml"]);
    assert_eq!(first.status, 0, "{}", first.err);
    let bytes = here.read("out/LA-0412-A.pdf");
    let again = here.run(&["issue", "cases/nitrobenzene-hydrogenation.toml"]);
    assert!(
        again.err.contains("the same record was there already"),
        "{}",
        again.err
    );
    assert!(here.read("out/LA-0412-A.pdf") == bytes);

    let there = Folder::new();
    there.copy("cases/sources", "deep/below/sources");
    there.write(
        "deep/below/another name.toml",
        here.read("cases/nitrobenzene-hydrogenation.toml"),
    );
    let ran = there.run(&["issue", "deep/below/another name.toml", "--out", "records"]);
    assert_eq!(ran.status, 0, "{}", ran.err);
    assert!(
        there.read("records/LA-0412-A.pdf") == bytes,
        "other bytes from another folder"
    );
}

#[test]
fn several_cases_are_each_done_and_the_worst_status_counts() {
    let folder = Folder::new();
    let good = case("for-check", &["codata-1989"], WATER);
    let hot = format!("{WATER}temperature = \"80 °C\"\n");
    folder.write("a.toml", &good);
    folder.write("b.toml", "[record]\n");
    folder.write(
        "c.toml",
        case("preliminary", &["codata-1989"], &hot).replace("T-0001", "T-0002"),
    );
    folder.write("d.toml", good.replace("T-0001", "T-0003"));
    let ran = folder.run(&["issue", "a.toml", "b.toml", "c.toml", "d.toml", "--json"]);
    assert_eq!(ran.status, 2, "{}", ran.err);
    assert_eq!(
        folder.names("out"),
        ["T-0001-A.pdf", "T-0002-A.pdf", "T-0003-A.pdf"]
    );
    let lines: Vec<serde_json::Value> = ran.out.lines().map(line).collect();
    assert_eq!(lines.len(), 4);
    assert_eq!(lines[0]["file"], "out/T-0001-A.pdf");
    assert!(lines[1]["faults"].is_array());
    assert_eq!(
        folder.run(&["issue", "a.toml", "c.toml", "d.toml"]).status,
        1
    );
    assert_eq!(folder.run(&["issue", "a.toml", "d.toml"]).status, 0);
}

fn line(text: &str) -> serde_json::Value {
    serde_json::from_str(text).unwrap_or_else(|error| panic!("{error}: {text}"))
}

#[test]
fn the_stamp_that_is_told_is_that_of_the_attached_manifest() {
    let folder = Folder::new();
    folder.write("a.toml", case("for-check", &["codata-1989"], WATER));
    let issued = folder.run(&["issue", "a.toml", "--json"]).json();
    assert_eq!(
        folder.run(&["extract", "out/T-0001-A.pdf", "files"]).status,
        0
    );
    let manifest = folder.read("files/manifest.json");
    assert_eq!(
        issued["stamp"],
        hesswright::source::sha256_hex(&manifest).as_str()
    );
    assert!(
        !folder
            .text("files/results.json")
            .contains(issued["stamp"].as_str().expect("a stamp"))
    );
}
