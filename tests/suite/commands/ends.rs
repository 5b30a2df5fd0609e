//! How runs end: usage, exit statuses, readers that go away.

use std::io::{BufRead, BufReader};
use std::process::Stdio;

use crate::program::{Folder, program, ran};

#[test]
fn usage_that_is_not_understood_ends_with_two_and_help_with_none() {
    let folder = Folder::new();
    let bad: [&[&str]; 7] = [
        &[],
        &["work"],
        &["compute"],
        &["issue"],
        &["compute", "a.toml", "--colour"],
        &["draft", "A", "B"],
        &["source"],
    ];
    for arguments in bad {
        let ran = folder.run(arguments);
        assert_eq!((ran.status, ran.out.as_str()), (2, ""), "{arguments:?}");
        assert!(!ran.err.is_empty());
    }
    let commands = ["draft", "compute", "issue", "extract", "source"];
    for arguments in [vec!["--help"], vec!["--version"]] {
        assert_eq!(folder.run(&arguments).status, 0);
    }
    let help = folder.run(&["--help"]).out;
    for command in commands {
        assert!(help.contains(command), "{command}");
        let help = folder.run(&[command, "--help"]);
        assert_eq!((help.status, help.err.as_str()), (0, ""), "{command}");
        assert!(
            help.out.lines().all(|line| line.chars().count() <= 80),
            "{}",
            help.out
        );
    }
}

#[test]
fn a_reader_that_goes_away_is_no_fault() {
    let folder = Folder::new();
    let mut child = program(folder.path())
        .args(["source", "show", "nasa-glenn-2021"])
        .stdout(Stdio::piped())
        .stderr(Stdio::piped())
        .spawn()
        .expect("the program starts");
    let mut first = String::new();
    let stdout = child.stdout.take().expect("a pipe");
    BufReader::new(stdout)
        .read_line(&mut first)
        .expect("a line");
    let ran = ran(child.wait_with_output().expect("an end"));
    assert!(!first.is_empty());
    assert_eq!((ran.status, ran.err.as_str()), (0, ""));
}

#[test]
fn colours_are_for_terminals_alone() {
    let folder = Folder::new();
    folder.write("bad.toml", "[record]\n\u{1b}[31m = 1\n");
    let ran = folder.run(&["compute", "bad.toml"]);
    assert_eq!(ran.status, 2);
    assert!(!ran.err.contains('\u{1b}'), "{:?}", ran.err);
}
