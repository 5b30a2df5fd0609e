//! Reading equations: arrow, terms, coefficients, participants that repeat.
//!
//! Every bad term is reported. What a participant is called or made of is left to
//! `participant` and `species`.

use std::collections::BTreeMap;
use std::ops::Range;

use num_rational::BigRational;
use num_traits::One;

use super::arrow;
use super::cursor::Cursor;
use super::equation::{Equation, Side, Term};
use super::equation_fault::EquationFault;
use super::error::{Bounded, NotationError};
use super::formula_parse::is_electron;
use super::formula_tree::Bracket;
use super::number::{NumberFault, NumberRole, Scanned, scan_positive};
use super::participant::{Participant, begins_id};
use super::phase::PhaseLabel;
use super::species::last_group;

/// The longest equation, in bytes.
const MAX_BYTES: usize = 64 * 1024;

/// The most terms of an equation, both sides together.
const MAX_TERMS: usize = 200;

pub(super) fn parse(text: &str) -> Result<Equation, Vec<NotationError>> {
    let whole = 0..text.len();
    Bounded::Equation
        .check(text.len(), MAX_BYTES, whole.clone())
        .map_err(|error| vec![error])?;
    let arrow = arrow::find(text)?;
    let sides = [0..arrow.start, arrow.end..text.len()].map(|side| term_spans(text, side));
    Bounded::Terms
        .check(sides[0].len() + sides[1].len(), MAX_TERMS, whole)
        .map_err(|error| vec![error])?;
    let mut errors = Vec::new();
    let [left, right] = sides;
    let equation = Equation {
        left: read_side(text, left, Side::Left, &mut errors),
        right: read_side(text, right, Side::Right, &mut errors),
    };
    find_repetitions(&equation, &mut errors);
    errors.sort_by_key(|error| (error.span.start, error.span.end));
    match errors.is_empty() {
        true => Ok(equation),
        false => Err(errors),
    }
}

/// Where the terms of a side stand, between the `+` that part them.
fn term_spans(text: &str, side: Range<usize>) -> Vec<Range<usize>> {
    let mut spans = Vec::new();
    let mut start = side.start;
    for (at, _) in text[side.clone()].match_indices('+') {
        let at = side.start + at;
        if parts_terms(&text[start..at], &text[at + 1..side.end]) {
            spans.push(start..at);
            start = at + 1;
        }
    }
    spans.push(start..side.end);
    spans
}

/// Whether a `+` between these texts parts two terms, rather than being a charge: it has
/// white space or a phase before it. `Ca(OH)+(aq)` has neither.
fn parts_terms(before: &str, after: &str) -> bool {
    if before.is_empty() || before.ends_with(char::is_whitespace) {
        return true;
    }
    let Some((_, inner)) = last_group(before) else {
        return false;
    };
    let word = inner.split(',').next().unwrap_or(inner).trim();
    let next = after.chars().next();
    PhaseLabel::from_symbol(word).is_some()
        || next.is_some_and(|next| next != '(' && !next.is_whitespace())
}

fn read_side(
    text: &str,
    spans: Vec<Range<usize>>,
    side: Side,
    errors: &mut Vec<NotationError>,
) -> Vec<Term> {
    let trimmed: Vec<_> = spans.into_iter().map(|span| trim(text, span)).collect();
    if let [span] = trimmed.as_slice()
        && span.is_empty()
    {
        let fault = EquationFault::EmptySide { side };
        errors.push(NotationError::new(span.clone(), fault));
        return Vec::new();
    }
    let mut terms = Vec::new();
    for span in trimmed {
        match read_term(&text[span.clone()], span.clone()) {
            Ok(term) => terms.push(term),
            Err(error) => errors.push(error.shifted(span.start)),
        }
    }
    terms
}

/// The span without the white space at its ends.
fn trim(text: &str, span: Range<usize>) -> Range<usize> {
    let raw = &text[span.clone()];
    let start = span.end - raw.trim_start().len();
    start..start + raw.trim().len()
}

/// Reads a term; errors are placed in `text`, the term alone.
fn read_term(text: &str, span: Range<usize>) -> Result<Term, NotationError> {
    if text.is_empty() {
        return Err(NotationError::new(0..0, EquationFault::EmptyTerm));
    }
    refuse_negative(text)?;
    refuse_comma(text)?;
    let mut cursor = Cursor::new(text);
    let number = scan_positive(&mut cursor, NumberRole::Coefficient)?;
    match &number {
        Some(number) => refuse_misread(number, cursor.rest(), text)?,
        None if text.starts_with(char::is_numeric) => return Err(malformed(text)),
        None => {}
    }
    let at = cursor.at();
    let participant = Participant::parse(cursor.rest()).map_err(|error| error.shifted(at))?;
    if let (Some(number), Participant::Species(species)) = (&number, &participant)
        && species.formula.has_parts()
        && !cursor.rest().starts_with(char::is_whitespace)
    {
        return Err(ambiguous(number, cursor.rest()));
    }
    let (coefficient, coefficient_text) = match number {
        Some(number) => (number.value, number.text.to_owned()),
        None => (BigRational::one(), "1".to_owned()),
    };
    Ok(Term {
        coefficient,
        coefficient_text,
        participant,
        span,
    })
}

/// Refuses a minus sign with a number after it.
fn refuse_negative(text: &str) -> Result<(), NotationError> {
    let mut cursor = Cursor::new(text);
    let minus = cursor.eat(|c| matches!(c, '-' | '\u{2212}'));
    cursor.eat_while(char::is_whitespace);
    let number = cursor.eat_while(|c| c.is_ascii_digit());
    if minus.is_none() || number.is_empty() {
        return Ok(());
    }
    let fault = EquationFault::NegativeCoefficient {
        written: cursor.read().to_owned(),
    };
    Err(NotationError::new(0..cursor.at(), fault))
}

/// Refuses a comma between digits: `0,5` is not a coefficient of zero.
fn refuse_comma(text: &str) -> Result<(), NotationError> {
    let digits = text.trim_start_matches(|c: char| c.is_ascii_digit());
    match digits.len() < text.len() && digits.starts_with(',') {
        true => Err(malformed(text)),
        false => Ok(()),
    }
}

/// Refuses a number that goes on as none does, or that runs into a declared name.
fn refuse_misread(number: &Scanned<'_>, rest: &str, text: &str) -> Result<(), NotationError> {
    let span = 0..text.len();
    let Some(next) = rest.chars().next() else {
        let written = text.to_owned();
        let fault = EquationFault::LoneCoefficient { written };
        return Err(NotationError::new(span, fault));
    };
    if begins_id(rest) {
        let fault = EquationFault::GluedCoefficient {
            written: text.to_owned(),
            meant: format!("{} {rest}", number.text),
        };
        return Err(NotationError::new(span, fault));
    }
    let second = rest.trim_start().chars().next();
    let goes_on = match next.is_whitespace() {
        true => second.is_some_and(|c| c.is_ascii_digit()),
        false => !begins_species(rest),
    };
    match goes_on {
        true => Err(malformed(text)),
        false => Ok(()),
    }
}

fn begins_species(text: &str) -> bool {
    let electron = is_electron(text.split('(').next().unwrap_or(text));
    let symbol = |c| char::is_ascii_uppercase(&c) || Bracket::opened_by(c).is_some();
    electron || text.starts_with(symbol)
}

/// The fault of a coefficient that is no number: all that stands before a letter.
fn malformed(text: &str) -> NotationError {
    let letter = text.find(char::is_alphabetic).unwrap_or(text.len());
    let written = text[..letter].trim_end();
    let fault = NumberFault::Malformed {
        role: NumberRole::Coefficient,
        text: written.to_owned(),
    };
    NotationError::new(0..written.len(), fault)
}

fn ambiguous(number: &Scanned<'_>, rest: &str) -> NotationError {
    let (first, others) = rest.split_once(['·', '⋅', '•']).unwrap_or((rest, ""));
    let fault = EquationFault::AmbiguousCoefficient {
        spaced: format!("{} {rest}", number.text),
        bracketed: format!("({first}){}·{others}", number.text),
    };
    let end = number.span.end + rest.len();
    NotationError::new(0..end, fault)
}

/// Reports participants that an equation names more than once.
fn find_repetitions(equation: &Equation, errors: &mut Vec<NotationError>) {
    let mut seen = BTreeMap::new();
    let left = equation.left.iter().map(|term| (Side::Left, term));
    let right = equation.right.iter().map(|term| (Side::Right, term));
    for (side, term) in left.chain(right) {
        let participant = term.participant.to_string();
        let fault = match seen.insert(term.participant.key(), side) {
            None => continue,
            Some(before) if before == side => EquationFault::Repeated { participant, side },
            Some(_) => EquationFault::OnBothSides { participant },
        };
        errors.push(NotationError::new(term.span.clone(), fault));
    }
}
