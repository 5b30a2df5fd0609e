//! Faults: what is wrong with an input, so that there is no working.

use std::collections::BTreeSet;

use super::nearest::{shorten, shorten_words};
use super::place::{Place, Span};
use super::text::Text;
use super::visible::visible;

/// What kind of fault it is; the word is stable and stands in messages and JSON.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum FaultCode {
    File,
    Syntax,
    UnknownKey,
    MissingKey,
    WrongType,
    Value,
    Quantity,
    Notation,
    DuplicateId,
    UnknownId,
    UnknownSubstance,
    AmbiguousSubstance,
    Unbalanced,
    Source,
    Character,
    NotWorked,
}

impl FaultCode {
    pub fn word(self) -> &'static str {
        match self {
            FaultCode::File => "file",
            FaultCode::Syntax => "syntax",
            FaultCode::UnknownKey => "unknown-key",
            FaultCode::MissingKey => "missing-key",
            FaultCode::WrongType => "wrong-type",
            FaultCode::Value => "value",
            FaultCode::Quantity => "quantity",
            FaultCode::Notation => "notation",
            FaultCode::DuplicateId => "duplicate-id",
            FaultCode::UnknownId => "unknown-id",
            FaultCode::UnknownSubstance => "unknown-substance",
            FaultCode::AmbiguousSubstance => "ambiguous-substance",
            FaultCode::Unbalanced => "unbalanced",
            FaultCode::Source => "source",
            FaultCode::Character => "character",
            FaultCode::NotWorked => "not-worked",
        }
    }

    /// Whether the fault may be a mere consequence of a syntax error elsewhere in the file.
    fn follows_from_syntax(self) -> bool {
        matches!(self, FaultCode::MissingKey | FaultCode::UnknownId)
    }
}

/// One fault, complete in itself: where, what was found, what was expected, what to do.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Fault {
    pub code: FaultCode,
    pub place: Place,
    /// The line of the file, shortened around the fault where it is very long.
    pub line: String,
    /// First character (from 0) and number of characters to mark in `line`.
    pub mark: (usize, usize),
    pub found: String,
    pub expected: String,
    pub advice: String,
}

/// How much of a long line is shown before and after the fault.
const CONTEXT: usize = 48;

/// How much of the file a message repeats, and how much of one word of it.
const LONGEST_FOUND: usize = 200;
const LONGEST_WORD: usize = 48;

impl Fault {
    pub fn new(
        code: FaultCode,
        text: &Text,
        span: &Span,
        found: impl AsRef<str>,
        expected: impl Into<String>,
        advice: impl Into<String>,
    ) -> Fault {
        let place = text.place(span.start);
        let (line, mark) = excerpt(text, &place, span);
        Fault {
            code,
            place,
            line,
            mark,
            found: shorten(&shorten_words(found.as_ref(), LONGEST_WORD), LONGEST_FOUND),
            expected: expected.into(),
            advice: advice.into(),
        }
    }

    /// A fault of a whole file, which has no line to show.
    pub fn of_file(
        file: impl Into<String>,
        found: impl Into<String>,
        expected: impl Into<String>,
        advice: impl Into<String>,
    ) -> Fault {
        let text = Text::new(file, "");
        Fault::new(
            FaultCode::File,
            &text,
            &(0..0),
            found.into(),
            expected,
            advice,
        )
    }
}

impl Fault {
    fn line_of_file(&self) -> (String, usize) {
        (self.place.file.clone(), self.place.line)
    }
}

fn excerpt(text: &Text, place: &Place, span: &Span) -> (String, (usize, usize)) {
    let line: Vec<char> = text.line(place.line).chars().collect();
    let start = (place.column - 1).min(line.len());
    let marked = text.slice(span).lines().next().unwrap_or("");
    let length = marked
        .chars()
        .count()
        .clamp(1, line.len().max(start + 1) - start);
    let from = start.saturating_sub(CONTEXT);
    let to = (start + length.min(CONTEXT) + CONTEXT).min(line.len());
    let head = if from > 0 { "…" } else { "" };
    let tail = if to < line.len() { "…" } else { "" };
    let body: String = line[from..to].iter().map(|c| in_line(*c)).collect();
    let offset = start - from + head.chars().count();
    let shown = length.min(to.max(start + 1) - start);
    (format!("{head}{body}{tail}"), (offset, shown))
}

/// A tab counts as one character, so that the mark stands under what it marks.
fn in_line(c: char) -> char {
    match c {
        '\t' => ' ',
        c => visible(c),
    }
}

/// All faults found so far, each kept once.
#[derive(Clone, Debug, Default)]
pub struct Faults {
    list: Vec<Fault>,
}

impl Faults {
    pub fn push(&mut self, fault: Fault) {
        self.list.push(fault);
    }

    pub fn is_empty(&self) -> bool {
        self.list.is_empty()
    }

    pub fn len(&self) -> usize {
        self.list.len()
    }

    pub fn extend(&mut self, other: Faults) {
        self.list.extend(other.list);
    }

    /// Whether a syntax error is among them.
    pub fn has_syntax(&self) -> bool {
        self.list
            .iter()
            .any(|fault| fault.code == FaultCode::Syntax)
    }

    /// The faults in the order of their places. Where there are syntax errors, faults that may
    /// only follow from them are left out, and so are all others on their lines: the next run
    /// will tell.
    pub fn into_sorted(mut self) -> Vec<Fault> {
        let syntax = self
            .list
            .iter()
            .filter(|fault| fault.code == FaultCode::Syntax);
        let lines: BTreeSet<(String, usize)> = syntax.map(Fault::line_of_file).collect();
        if !lines.is_empty() {
            self.list.retain(|fault| {
                let follows =
                    fault.code.follows_from_syntax() || lines.contains(&fault.line_of_file());
                fault.code == FaultCode::Syntax || !follows
            });
        }
        self.list
            .sort_by(|a, b| (&a.place, a.code).cmp(&(&b.place, b.code)));
        self.list.dedup();
        self.list
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_long_line_is_shown_around_the_fault() {
        let text = Text::new("case.toml", format!("k = \"{} H2(g)\"", "7".repeat(4000)));
        let fault = Fault::new(FaultCode::Notation, &text, &(5..4005), "x", "y", "z");
        assert!(fault.line.chars().count() < 120, "{}", fault.line);
        assert_eq!(fault.mark.0, 5);
    }

    #[test]
    fn the_mark_stays_inside_the_line() {
        let text = Text::new("a", "ab\ncd");
        let fault = Fault::new(FaultCode::Syntax, &text, &(2..2), "", "", "");
        assert_eq!((fault.line.as_str(), fault.mark), ("ab", (2, 1)));
    }

    #[test]
    fn faults_that_follow_from_syntax_errors_are_left_out() {
        let text = Text::new("a", "a\nbc");
        let mut faults = Faults::default();
        for (code, at) in [
            (FaultCode::Value, 0),
            (FaultCode::MissingKey, 0),
            (FaultCode::Syntax, 2),
            (FaultCode::WrongType, 3),
        ] {
            faults.push(Fault::new(code, &text, &(at..at + 1), "", "", ""));
        }
        let codes: Vec<_> = faults.into_sorted().into_iter().map(|f| f.code).collect();
        assert_eq!(codes, [FaultCode::Value, FaultCode::Syntax]);
    }

    #[test]
    fn control_characters_are_not_shown_as_such() {
        let text = Text::new("a", "a\u{1b}[31mb");
        let fault = Fault::new(FaultCode::Value, &text, &(0..1), "", "", "");
        assert_eq!(fault.line, "a\u{fffd}[31mb");
    }
}
