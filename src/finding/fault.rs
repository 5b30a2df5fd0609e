//! Faults: what is wrong with an input, so that there is no working.

use super::nearest::shorten;
use super::place::{Place, Span};
use super::text::Text;

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
            found: shorten(found.as_ref(), 160),
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
    let body: String = line[from..to].iter().map(|c| visible(*c)).collect();
    let offset = start - from + head.chars().count();
    let shown = length.min(to.max(start + 1) - start);
    (format!("{head}{body}{tail}"), (offset, shown))
}

/// Control characters would move the cursor or change colours where the line is shown.
fn visible(c: char) -> char {
    match c {
        '\t' => ' ',
        c if c.is_control() => '\u{fffd}',
        c => c,
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

    /// The faults in the order of their places. Where there are syntax errors, faults that may
    /// only follow from them are left out: the next run will tell.
    pub fn into_sorted(mut self) -> Vec<Fault> {
        if self.list.iter().any(|f| f.code == FaultCode::Syntax) {
            self.list.retain(|f| !f.code.follows_from_syntax());
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
        let text = Text::new("a", "ab");
        let mut faults = Faults::default();
        for code in [FaultCode::MissingKey, FaultCode::Syntax, FaultCode::Value] {
            faults.push(Fault::new(code, &text, &(0..1), "", "", ""));
        }
        let codes: Vec<_> = faults.into_sorted().into_iter().map(|f| f.code).collect();
        assert_eq!(codes, [FaultCode::Syntax, FaultCode::Value]);
    }

    #[test]
    fn control_characters_are_not_shown_as_such() {
        let text = Text::new("a", "a\u{1b}[31mb");
        let fault = Fault::new(FaultCode::Value, &text, &(0..1), "", "", "");
        assert_eq!(fault.line, "a\u{fffd}[31mb");
    }
}
