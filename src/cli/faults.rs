//! Faults for people and for scripts.

use std::path::Path;

use serde_json::{Value, json};

use super::exit::Exit;
use super::terminal::{Style, Tone, plain, print, tell, wrap};
use crate::case::CASE_NAME;
use crate::finding::{Fault, Place};

/// Shows all faults of an input and says that it could not be done.
pub fn report(case: &Path, faults: &[Fault], json: bool) -> Exit {
    if json {
        print(&format!("{}\n", to_json(case, faults)));
    }
    let style = Style::stderr();
    for fault in faults {
        tell(&shown(case, fault, style));
    }
    let count = match faults.len() {
        1 => "1 fault".to_string(),
        n => format!("{n} faults"),
    };
    tell(&format!("{count}; nothing was written.\n"));
    Exit::NotDone
}

/// The case is called by the name that it was given on the command line.
pub fn place_name(case: &Path, place: &Place) -> String {
    let file = match place.file.as_str() {
        CASE_NAME => case.display().to_string(),
        other => other.to_string(),
    };
    plain(&format!("{file}:{}:{}", place.line, place.column))
}

fn shown(case: &Path, fault: &Fault, style: Style) -> String {
    let head = format!("{}: {}", place_name(case, &fault.place), fault.code.word());
    let mut text = format!("{}\n", style.paint(Tone::Strong, &head));
    if !fault.line.is_empty() {
        let (start, length) = fault.mark;
        let mark = format!("{}{}", " ".repeat(start), "^".repeat(length));
        text += &format!(
            "    {}\n    {}\n",
            fault.line,
            style.paint(Tone::Stop, &mark)
        );
    }
    text += &wrap("  found     ", &plain(&fault.found));
    text += &wrap("  expected  ", &plain(&fault.expected));
    text += &wrap("  do        ", &plain(&fault.advice));
    text + "\n"
}

fn to_json(case: &Path, faults: &[Fault]) -> Value {
    let fault = |fault: &Fault| {
        json!({
            "code": fault.code.word(),
            "found": fault.found,
            "expected": fault.expected,
            "advice": fault.advice,
            "at": fault.place,
        })
    };
    json!({ "case": case, "faults": faults.iter().map(fault).collect::<Vec<_>>() })
}
