//! `compute`: the working as text and as JSON.

use std::fs;

use crate::program::{Folder, repository, run};

const SHIPPED: [&str; 3] = [
    "acid-neutralisation",
    "formation-from-combustion",
    "nitrobenzene-hydrogenation",
];

#[test]
fn the_working_of_the_shipped_cases_reads_as_expected() {
    for name in SHIPPED {
        let ran = run(repository(), &["compute", &format!("cases/{name}.toml")]);
        assert_eq!((ran.status, ran.err.as_str()), (0, ""), "{name}");
        let path = repository().join(format!("tests/suite/expected/{name}.txt"));
        if std::env::var_os("HESSWRIGHT_WRITE_EXPECTED").is_some() {
            fs::write(&path, &ran.out).expect("written");
        }
        let expected = fs::read_to_string(&path).expect("an expected text");
        assert!(ran.out == expected, "{name}:\n{}", ran.out);
        let widest = ran.out.lines().map(|line| line.chars().count()).max();
        assert!(widest <= Some(80), "{name}: {widest:?} columns");
        assert!(!ran.out.contains('\u{1b}'), "{name}: colours in a pipe");
    }
}

#[test]
fn json_is_the_attached_results_byte_for_byte() {
    let folder = Folder::new();
    folder.copy("cases", "cases");
    for (name, record) in SHIPPED.iter().zip(["HV-0077-B", "KT-2207-A", "LA-0412-A"]) {
        let case = format!("cases/{name}.toml");
        let computed = folder.run(&["compute", &case, "--json"]);
        assert_eq!((computed.status, computed.err.as_str()), (0, ""));
        computed.json();
        assert_eq!(folder.run(&["issue", &case]).status, 0);
        let pdf = format!("out/{record}.pdf");
        assert_eq!(folder.run(&["extract", &pdf, record]).status, 0);
        let attached = folder.text(&format!("{record}/results.json"));
        assert!(attached == computed.out, "{name}");
    }
}

#[test]
fn faults_come_as_one_json_document_with_code_and_place() {
    let folder = Folder::new();
    folder.write("bad.toml", "[record]\nnumber = 1\n");
    let ran = folder.run(&["compute", "bad.toml", "--json"]);
    assert_eq!(ran.status, 2);
    let document = ran.json();
    let wrong = document["faults"].as_array().into_iter().flatten();
    let wrong: Vec<_> = wrong
        .filter(|fault| fault["code"] == "wrong-type")
        .collect();
    assert_eq!(wrong.len(), 1);
    let at = serde_json::json!({ "file": "case.toml", "line": 2, "column": 10 });
    assert_eq!(wrong[0]["at"], at);
}
