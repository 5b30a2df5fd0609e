//! Issued records before readers that others wrote: poppler's pdfinfo, pdfdetach and pdftotext,
//! and qpdf. They have to agree with what the program says of its own file.

use std::collections::BTreeMap;
use std::path::{Path, PathBuf};
use std::process::Command;

use sha2::{Digest, Sha256};

use super::case::{Folder, Results, run};
use super::tools::tool;

const CASES: [&str; 3] = [
    "nitrobenzene-hydrogenation",
    "acid-neutralisation",
    "formation-from-combustion",
];

/// A shipped case, issued, with the files around it.
struct Issued {
    folder: Folder,
    record: PathBuf,
    results: Results,
}

fn issued(case: &str) -> Issued {
    let folder = Folder::new();
    let case = Path::new(env!("CARGO_MANIFEST_DIR")).join(format!("cases/{case}.toml"));
    let case = case.to_string_lossy();
    let output = run(folder.path(), &["issue", &case]);
    let said = String::from_utf8_lossy(&output.stderr);
    assert!(output.status.success(), "{said}");
    let mut records = files(&folder.path().join("out")).into_keys();
    let record = folder
        .path()
        .join("out")
        .join(records.next().expect("a record"));
    let results = Results::of_json(&run(folder.path(), &["compute", &case, "--json"]).stdout);
    Issued {
        folder,
        record,
        results,
    }
}

/// The files of a folder with their bytes.
fn files(folder: &Path) -> BTreeMap<String, Vec<u8>> {
    let entries = std::fs::read_dir(folder).expect("a folder");
    let file = |entry: std::io::Result<std::fs::DirEntry>| {
        let entry = entry.expect("an entry of a folder");
        let name = entry.file_name().to_string_lossy().into_owned();
        (name, std::fs::read(entry.path()).expect("a file"))
    };
    entries.map(file).collect()
}

impl Issued {
    fn poppler(&self, program: &str, arguments: &[&str]) -> String {
        let printed = tool(Command::new(program).args(arguments).arg(&self.record));
        String::from_utf8(printed).expect("poppler prints UTF-8")
    }

    /// The text of some pages in reading order, in one line, without hyphens put in by the break
    /// of a line and with plain minus signs.
    fn text(&self, pages: &[&str]) -> String {
        let printed = tool(
            Command::new("pdftotext")
                .args(pages)
                .arg(&self.record)
                .arg("-"),
        );
        let text = String::from_utf8(printed).expect("pdftotext prints UTF-8");
        let text = text.replace("\u{ad}\n", "").replace('\u{2212}', "-");
        text.split_whitespace().collect::<Vec<_>>().join(" ")
    }

    /// The text of the structure tree, as pdfinfo prints it: a quoted string on a line of its own.
    fn structure_text(&self) -> String {
        let printed = self.poppler("pdfinfo", &["-struct-text"]);
        let strings = printed.lines().filter_map(|line| {
            line.trim()
                .strip_prefix('"')?
                .strip_suffix('"')
                .map(squeezed)
        });
        strings.collect()
    }

    /// What pdfinfo prints in a field.
    fn info(&self, field: &str) -> String {
        let printed = self.poppler("pdfinfo", &[]);
        let mut lines = printed.lines().filter_map(|line| line.split_once(':'));
        let found = lines.find(|(key, _)| *key == field);
        found
            .map(|(_, value)| value.trim().to_string())
            .unwrap_or_default()
    }
}

/// A text without what a line break or a raised charge changes, and with plain minus signs.
fn squeezed(text: &str) -> String {
    let kept = |c: &char| !(c.is_whitespace() || "^\u{ad}\u{200b}".contains(*c));
    text.replace('\u{2212}', "-").chars().filter(kept).collect()
}

fn each(check: impl Fn(&Issued)) {
    for case in CASES {
        check(&issued(case));
    }
}

#[test]
fn qpdf_finds_no_fault_in_the_file() {
    each(|issued| {
        let printed = tool(Command::new("qpdf").arg("--check").arg(&issued.record));
        let printed = String::from_utf8_lossy(&printed);
        assert!(
            printed.contains("No syntax or stream encoding errors found"),
            "{printed}"
        );
    });
}

#[test]
fn pdfinfo_reads_the_title_and_the_tags() {
    each(|issued| {
        let title = issued.results.record("title");
        let (number, revision) = (
            issued.results.record("number"),
            issued.results.record("revision"),
        );
        assert_eq!(
            issued.info("Title"),
            format!("{number}, revision {revision}: {title}")
        );
        assert_eq!(issued.info("Author"), issued.results.record("preparer"));
        assert_eq!(issued.info("Tagged"), "yes");
        assert_eq!(issued.info("Encrypted"), "no");
        assert_eq!(issued.info("JavaScript"), "no");
    });
}

#[test]
fn every_page_says_which_sheet_of_how_many_it_is() {
    each(|issued| {
        let pages: usize = issued.info("Pages").parse().expect("a number of pages");
        assert!(pages > 1);
        for page in 1..=pages {
            let number = page.to_string();
            let text = issued.text(&["-f", &number, "-l", &number]);
            assert!(
                text.contains(&format!("Sheet {page} of {pages}")),
                "page {page}: {text}"
            );
            assert!(
                text.contains(issued.results.record("number")),
                "page {page}: {text}"
            );
        }
    });
}

#[test]
fn pdfdetach_takes_out_the_same_files_as_extract() {
    each(|issued| {
        let extracted = issued.folder.path().join("extracted");
        let record = issued.record.to_string_lossy();
        let output = run(issued.folder.path(), &["extract", &record, "extracted"]);
        assert!(output.status.success(), "{output:?}");
        let detached = issued.folder.path().join("detached");
        std::fs::create_dir(&detached).expect("a new folder");
        issued.poppler(
            "pdfdetach",
            &["-saveall", "-o", &detached.to_string_lossy()],
        );
        assert_eq!(files(&detached), files(&extracted));
        let listed = issued.poppler("pdfdetach", &["-list"]);
        for (index, name) in files(&extracted).keys().enumerate() {
            assert!(
                listed.contains(&format!("{}: {name}\n", index + 1)),
                "{name}\n{listed}"
            );
        }
    });
}

/// The stamp by this test's own hashing: SHA-256 of manifest.json, on page 1 and in short on
/// every page.
#[test]
fn the_pages_carry_the_stamp_of_the_manifest_that_is_attached() {
    each(|issued| {
        let detached = issued.folder.path().join("manifest");
        issued.poppler(
            "pdfdetach",
            &[
                "-savefile",
                "manifest.json",
                "-o",
                &detached.to_string_lossy(),
            ],
        );
        let digest = Sha256::digest(std::fs::read(&detached).expect("the manifest"));
        let stamp: String = digest.iter().map(|byte| format!("{byte:02x}")).collect();
        // Many findings can push it from the first sheet to the second.
        let first = issued.text(&["-l", "2"]);
        assert!(first.replace(' ', "").contains(&stamp), "{stamp}: {first}");
        let pages: usize = issued.info("Pages").parse().expect("a number of pages");
        let short = format!("Stamp {}", &stamp[..16]);
        assert_eq!(issued.text(&[]).matches(&short).count(), pages);
    });
}

#[test]
fn pdftotext_reads_every_result() {
    each(|issued| {
        let text = issued.text(&[]);
        for (name, result) in issued.results.all() {
            let stated = result["stated"].as_str().expect("a stated result");
            assert!(text.contains(name), "{name}");
            assert!(text.contains(stated), "{name}: {stated}");
        }
    });
}

/// A row of the table may go over two pages; in the structure tree it stays together.
/// What is printed of a value: the number, or the coefficients of a function without their powers
/// of ten, which the pages set in another way.
fn numbers(printed: &str) -> Vec<String> {
    let Some((_, coefficients)) = printed.split_once(": ") else {
        return vec![printed.to_string()];
    };
    let mantissa = |number: &str| number.split('e').next().unwrap_or_default().to_string();
    coefficients.split("; ").map(mantissa).collect()
}

#[test]
fn the_structure_tree_holds_every_value_used() {
    each(|issued| {
        let text = issued.structure_text();
        for value in issued.results.values_used() {
            for number in numbers(value["printed"].as_str().expect("a text")) {
                let said = squeezed(&number);
                assert!(text.contains(&said), "{said} of {value}");
            }
            for key in ["substance", "unit", "source", "locator", "standing"] {
                let said = value[key].as_str().expect("a text");
                // The equation of a measured heat is set below the name of its step, with formulas.
                let said = match key == "substance" && value["quantity"] == "measured-heat" {
                    true => said.split(": ").next().unwrap_or_default(),
                    false => said,
                };
                let said = squeezed(said);
                assert!(text.contains(&said), "{key} {said} of {value}");
            }
        }
    });
}
