//! Syntax errors of TOML in the words of people who fill in forms.
//!
//! The parser says what it met; what to do about it is said here. A message of the parser that is
//! not known here is passed on, so that nothing is lost where the parser changes.

use super::reader::Reader;
use crate::finding::{FaultCode, Span, shorten};

/// How many syntax errors of one file are reported one by one; a file that is not TOML at all
/// would otherwise be answered by a wall of text.
const MOST_SYNTAX_ERRORS: usize = 20;

/// How much of what the parser stopped at is repeated.
const LONGEST_TOKEN: usize = 40;

/// Reports the errors of a text, the ones beyond the limit by their number.
pub(super) fn report_syntax(reader: &Reader<'_>, errors: &[toml::de::Error]) {
    for error in errors.iter().take(MOST_SYNTAX_ERRORS) {
        let span = span_in(reader, error);
        let help = help(error.message(), &token(reader, &span));
        reader.fault(
            FaultCode::Syntax,
            &span,
            help.found,
            help.expected,
            help.advice,
        );
    }
    if let Some(next) = errors.get(MOST_SYNTAX_ERRORS) {
        reader.fault(
            FaultCode::Syntax,
            &span_in(reader, next),
            format!(
                "{} more syntax errors from here on",
                errors.len() - MOST_SYNTAX_ERRORS
            ),
            "a file of TOML text",
            "mend the first ones and run again; check that this is the file you meant",
        );
    }
}

/// The place of an error; one without a place, or at the very end, is at the end of the text.
fn span_in(reader: &Reader<'_>, error: &toml::de::Error) -> Span {
    let end = reader.text().as_str().len();
    error.span().unwrap_or(end..end)
}

fn token(reader: &Reader<'_>, span: &Span) -> String {
    let text = reader.text().slice(span);
    shorten(text.lines().next().unwrap_or("").trim(), LONGEST_TOKEN)
}

struct Help {
    found: String,
    expected: String,
    advice: String,
}

fn help(message: &str, token: &str) -> Help {
    let (problem, expected) = message.split_once(", expected ").unwrap_or((message, ""));
    let (found, expected, advice) = match problem {
        "duplicate key" => (
            format!("`{token}` a second time"),
            "each key once in its table, and each table once".to_string(),
            "remove or rename one of the two",
        ),
        "string values must be quoted" => (
            format!("{token} without quotes"),
            "text in \"quotes\", a date, true or false".to_string(),
            "put it in \"quotes\"",
        ),
        "invalid date" | "invalid datetime" | "invalid time" => (
            format!("{token}, which is no day of the calendar"),
            "a date such as 2026-12-01".to_string(),
            "check year, month and day; write no time",
        ),
        "missing value" | "missing value for key" | "key with no value" => (
            "a key without a value".to_string(),
            "a line of the form key = \"value\"".to_string(),
            "give the value, or leave the line out",
        ),
        _ if problem.contains("dotted key") => (
            format!("`{token}` before a point, which has a value already"),
            "keys that contain points in \"quotes\"".to_string(),
            "write \"reaction.heat\" = … with the quotes",
        ),
        _ if problem.starts_with("invalid unquoted key") || problem == "invalid key" => (
            format!("the key {token}"),
            "letters, digits and hyphens in a key, any others in \"quotes\"".to_string(),
            "write it as in \"H2O(l)\" = …",
        ),
        _ if problem.contains("recurs") => (
            "brackets within brackets, too many of them".to_string(),
            "at most 80 levels".to_string(),
            "check that this is what was meant",
        ),
        _ if problem.ends_with("string") => return string_help(expected, token),
        _ if problem.starts_with("unclosed") => (
            format!(
                "a {} that is not closed",
                problem.trim_start_matches("unclosed ")
            ),
            format!("a closing {expected}"),
            "close it where it ends",
        ),
        _ if is_about_numbers(problem) => (
            format!("{token}, which is no number"),
            "a date as 2026-12-01, or a quantity as \"12.5 kg\"".to_string(),
            "write dates as year-month-day, and put quantities in \"quotes\"",
        ),
        _ => return unknown(problem, expected, token),
    };
    Help {
        found,
        expected,
        advice: advice.to_string(),
    }
}

fn is_about_numbers(problem: &str) -> bool {
    let words = [
        "float",
        "integer",
        "radix",
        "numeric",
        "leading zero",
        "sign",
        "digits",
    ];
    words.iter().any(|word| problem.contains(word))
}

/// A text that is not closed, or that holds what no text can.
fn string_help(expected: &str, token: &str) -> Help {
    let quote = expected.trim_matches('`');
    if matches!(quote, "\"" | "'" | "\"\"\"" | "'''") {
        return Help {
            found: "text whose quotes are not closed".to_string(),
            expected: format!("a closing {quote}"),
            advice: "close the quotes; a text over several lines stands in three of them"
                .to_string(),
        };
    }
    let control = token.chars().find(|c| c.is_control());
    let found = match control {
        Some(c) => format!("the character U+{:04X} in a text", u32::from(c)),
        None => format!("{token} in a text"),
    };
    Help {
        found,
        expected: "characters that can be seen".to_string(),
        advice: "leave it out; it may have come in by copying".to_string(),
    }
}

fn unknown(problem: &str, expected: &str, token: &str) -> Help {
    let found = match token {
        "" => problem.to_string(),
        token => format!("{problem}: {token}"),
    };
    let expected = match expected {
        "" => "a line of the form key = \"value\", or a [table]",
        expected => expected,
    };
    Help {
        found,
        expected: expected.to_string(),
        advice: "mend the line; text stands in \"quotes\", tables in [brackets]".to_string(),
    }
}
