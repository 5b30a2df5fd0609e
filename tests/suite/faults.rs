//! What the program says to bad input, compared word for word.
//!
//! Each file in `tests/faults/` is an input followed by what it has to be answered with: the
//! arguments where they are not `compute case.toml` (`#$ …`), the exit status (`#= 2`), and the
//! whole of standard error (`#> …`). The input is everything before these lines; it is run as
//! `case.toml` beside `tests/faults/sources/`. Read from top to bottom, a file shows what its
//! author did wrong and what the program made of it.
//!
//! `HESSWRIGHT_WRITE_EXPECTED=1` writes the answers anew; they are to be read before they stay.

use std::fs;
use std::path::{Path, PathBuf};

use crate::program::{Folder, Ran, repository};

mod mutations;

/// Widest line that is written for people, but for lines of the file itself.
const WIDTH: usize = 80;

/// A fault file taken apart.
struct Expected {
    input: String,
    arguments: String,
    status: String,
    answer: String,
}

impl Expected {
    fn of(text: &str) -> Expected {
        let marked = |line: &&str| ["#$", "#=", "#>"].iter().any(|mark| line.starts_with(mark));
        let tail = |mark: &str| -> Vec<String> {
            let lines = text.lines().filter(|line| line.starts_with(mark));
            lines
                .map(|line| line[2..].strip_prefix(' ').unwrap_or("").to_string())
                .collect()
        };
        let input = text.split_inclusive('\n').take_while(|line| !marked(line));
        let arguments = tail("#$").pop().unwrap_or_else(|| DEFAULT.to_string());
        Expected {
            input: input.collect(),
            arguments,
            status: tail("#=").join(" "),
            answer: tail("#>").iter().map(|line| format!("{line}\n")).collect(),
        }
    }

    fn run(&self) -> Ran {
        let folder = Folder::new();
        folder
            .copy("tests/faults/sources", "sources")
            .write("case.toml", &self.input);
        folder.write("sources/folder.toml/file", "");
        let arguments: Vec<&str> = self.arguments.split_whitespace().collect();
        folder.run(&arguments)
    }

    fn rewritten(&self, ran: &Ran) -> String {
        let mut text = self.input.clone();
        if self.arguments != DEFAULT {
            text += &format!("#$ {}\n", self.arguments);
        }
        text += &format!("#= {}\n", ran.status);
        let answer = ran.err.lines().map(|line| format!("#> {line}"));
        text + &answer
            .map(|line| format!("{}\n", line.trim_end()))
            .collect::<String>()
    }
}

const DEFAULT: &str = "compute case.toml";

fn fault_files() -> Vec<PathBuf> {
    let entries = fs::read_dir(repository().join("tests/faults")).expect("a folder of cases");
    let paths = entries.flatten().map(|entry| entry.path());
    let mut paths: Vec<PathBuf> = paths.filter(|path| path.is_file()).collect();
    paths.sort();
    paths
}

#[test]
fn every_fault_is_answered_as_its_file_says() {
    let files = fault_files();
    assert!(files.len() > 40, "{} files", files.len());
    let different: Vec<String> = files.iter().filter_map(|path| difference(path)).collect();
    assert!(different.is_empty(), "\n{}", different.join("\n"));
}

fn difference(path: &Path) -> Option<String> {
    let text = fs::read_to_string(path).expect("text in UTF-8");
    let expected = Expected::of(&text);
    let ran = expected.run();
    if std::env::var_os("HESSWRIGHT_WRITE_EXPECTED").is_some() {
        fs::write(path, expected.rewritten(&ran)).expect("written");
        return None;
    }
    let same = ran.err == expected.answer && ran.status.to_string() == expected.status;
    let said = format!("status {} expected, {} found", expected.status, ran.status);
    (!same || !ran.out.is_empty()).then(|| {
        let lines = changed_lines(&expected.answer, &ran.err);
        format!("{}: {said}\n{lines}{}", path.display(), ran.out)
    })
}

/// The lines in which two texts differ, between those with which both begin and end.
fn changed_lines(expected: &str, found: &str) -> String {
    let (old, new): (Vec<&str>, Vec<&str>) = (expected.lines().collect(), found.lines().collect());
    let shorter = old.len().min(new.len());
    let head = (0..shorter).take_while(|at| old[*at] == new[*at]).count();
    let tail = (0..shorter - head)
        .take_while(|at| old[old.len() - 1 - at] == new[new.len() - 1 - at])
        .count();
    let mark = |sign: &str, lines: &[&str]| -> String {
        let body = &lines[head..lines.len() - tail];
        body.iter().map(|line| format!("{sign} {line}\n")).collect()
    };
    mark("-", &old) + &mark("+", &new)
}

#[test]
fn answers_are_readable_at_eighty_columns_and_end_with_their_number() {
    for path in fault_files() {
        let text = fs::read_to_string(&path).expect("text in UTF-8");
        let expected = Expected::of(&text);
        for line in expected
            .answer
            .lines()
            .filter(|line| !line.starts_with("    "))
        {
            let width = line.chars().count();
            assert!(
                width <= WIDTH,
                "{}: {width} columns: {line}",
                path.display()
            );
        }
        let last = expected.answer.lines().last().unwrap_or("");
        assert!(
            last.ends_with("; nothing was written."),
            "{}: {last}",
            path.display()
        );
    }
}

/// The answer to one input, which has to be a refusal.
fn refused(folder: &Folder, arguments: &[&str]) -> String {
    let ran = folder.run(arguments);
    assert_eq!(ran.status, 2, "{}{}", ran.out, ran.err);
    assert_eq!(ran.out, "");
    ran.err
}

#[test]
fn a_file_that_is_not_there_a_folder_and_an_empty_file_are_named_as_such() {
    let folder = Folder::new();
    folder.write("empty.toml", "").write("folder.toml/file", "");
    let missing = refused(&folder, &["compute", "missing.toml"]);
    assert!(
        missing.starts_with("missing.toml:1:1: file\n  found     no file of this name\n"),
        "{missing}"
    );
    let directory = refused(&folder, &["compute", "folder.toml"]);
    assert!(
        directory.starts_with("folder.toml:1:1: file\n  found     a folder\n"),
        "{directory}"
    );
    let empty = refused(&folder, &["compute", "empty.toml"]);
    assert!(empty.contains("the file without `record`"), "{empty}");
}

#[test]
fn bytes_that_are_not_utf_8_are_named_with_their_place() {
    let folder = Folder::new();
    folder.write("latin.toml", b"[record]\ntitle = \"M\xFCller\"\n");
    let latin = refused(&folder, &["compute", "latin.toml"]);
    let expected =
        "latin.toml:2:11: file\n    title = \"M\u{fffd}\n              ^\n  found     byte 0xFC, ";
    assert!(latin.starts_with(expected), "{latin}");
    let utf16: Vec<u8> = "\u{feff}[record]"
        .encode_utf16()
        .flat_map(u16::to_le_bytes)
        .collect();
    folder.write("utf16.toml", utf16);
    let utf16 = refused(&folder, &["compute", "utf16.toml"]);
    assert!(utf16.starts_with("utf16.toml:1:1: file\n"), "{utf16}");
    assert!(utf16.contains("UTF-16"), "{utf16}");
    folder.write("nul.toml", b"[record]\ntitle = \"a\0b\"\n");
    let nul = refused(&folder, &["compute", "nul.toml"]);
    assert!(nul.contains("the character U+0000 in a text"), "{nul}");
}

#[test]
fn a_byte_order_mark_and_windows_line_ends_are_no_faults() {
    let folder = Folder::new();
    folder.copy("cases", "cases");
    let text = folder.text("cases/acid-neutralisation.toml");
    folder.write(
        "windows.toml",
        format!("\u{feff}{}", text.replace('\n', "\r\n")),
    );
    let ran = folder.run(&["compute", "windows.toml"]);
    assert_eq!(ran.status, 0, "{}", ran.err);
}

#[test]
fn a_file_of_fifty_megabytes_is_refused_at_once() {
    let folder = Folder::new();
    folder.write("large.toml", vec![b'#'; 50 * 1024 * 1024]);
    let answer = refused(&folder, &["compute", "large.toml"]);
    assert!(answer.contains("a file of 52428800 bytes"), "{answer}");
}

#[cfg(unix)]
#[test]
fn a_link_that_leaves_the_folder_of_the_case_is_refused() {
    let folder = Folder::new();
    folder.copy("tests/faults/sources", "elsewhere");
    let case = fs::read_to_string(repository().join("tests/faults/sources-twice.toml"));
    let case = case
        .expect("text")
        .replace("\"sources/plant-one.toml\", ", "\"link.toml\", ");
    folder.write("inside/case.toml", case);
    let target = folder.at("elsewhere/plant-one.toml");
    std::os::unix::fs::symlink(target, folder.at("inside/link.toml")).expect("a link");
    let answer = refused(&folder, &["compute", "inside/case.toml"]);
    assert!(
        answer.contains("\"link.toml\": a path that leaves the folder of the case"),
        "{answer}"
    );
}

#[test]
fn hundreds_of_faults_come_all_at_once_in_the_order_of_their_places() {
    let folder = Folder::new();
    let head = Expected::of(include_str!("../faults/balance-element.toml")).input;
    let reactions: String = (0..600)
        .map(|n| format!("\n[reactions.r-{n}]\nequation = \"H2(g) + Xx(g) -> H{n}(gas)\"\n"))
        .collect();
    folder.write("case.toml", head + &reactions);
    let ran = folder.run(&["compute", "case.toml", "--json"]);
    assert_eq!(ran.status, 2);
    let document = ran.json();
    let faults = document["faults"].as_array().expect("a list");
    assert!(faults.len() >= 1200, "{}", faults.len());
    let place =
        |fault: &serde_json::Value| (fault["at"]["line"].as_u64(), fault["at"]["column"].as_u64());
    assert!(
        faults
            .windows(2)
            .all(|pair| place(&pair[0]) <= place(&pair[1]))
    );
}

#[test]
fn what_is_no_toml_at_all_is_not_answered_by_a_wall_of_text() {
    let folder = Folder::new();
    folder.write(
        "case.toml",
        "Dear colleague, here is the case.\n".repeat(500),
    );
    let answer = refused(&folder, &["compute", "case.toml"]);
    assert!(
        answer.contains("more syntax errors from here on"),
        "{answer}"
    );
    assert!(answer.lines().count() < 200, "{}", answer.lines().count());
}
