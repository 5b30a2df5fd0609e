//! Reading the charge at the end of a formula.
//!
//! Refuses what can be read in two ways, and names both readings.

use super::cursor::{Cursor, Script, sign};
use super::error::{Bounded, NotationError};
use super::formula_fault::ChargeFault;
use super::formula_tree::{Item, sign_is_ambiguous_after};

/// The most digits of a charge number.
const MAX_DIGITS: usize = 3;

/// Reads the charge after `items`, whose last count was written in `script`.
pub(super) fn scan(
    cursor: &mut Cursor<'_>,
    items: &[Item],
    script: Script,
) -> Result<i32, NotationError> {
    let start = cursor.at();
    let charge = match cursor.peek() {
        Some('^') => {
            cursor.bump();
            scan_scripted(cursor, Script::Plain, start)?
        }
        Some('⁺' | '⁻') => scan_scripted(cursor, Script::Superscript, start)?,
        Some(next) if Script::Superscript.digit(next).is_some() => {
            scan_scripted(cursor, Script::Superscript, start)?
        }
        Some(next) if sign(next).is_some() => {
            let charge = scan_scripted(cursor, Script::Plain, start)?;
            if script == Script::Plain && sign_is_ambiguous_after(items) {
                return Err(ambiguous(cursor, start, charge));
            }
            charge
        }
        _ => return Ok(0),
    };
    match cursor.rest() {
        "" => Ok(charge),
        rest => {
            let span = cursor.at()..cursor.at() + rest.len();
            let rest = rest.to_owned();
            Err(NotationError::new(span, ChargeFault::NotLast { rest }))
        }
    }
}

/// Reads number and sign.
fn scan_scripted(
    cursor: &mut Cursor<'_>,
    script: Script,
    start: usize,
) -> Result<i32, NotationError> {
    let number = scan_number(cursor, script);
    let found = cursor.eat(|c| sign(c).is_some()).and_then(sign);
    let Some(found) = found else {
        cursor.bump();
        return Err(malformed(cursor, start));
    };
    refuse_misordered(cursor, start, found, &number)?;
    Bounded::ChargeDigits.check(number.len(), MAX_DIGITS, cursor.span_from(start))?;
    match magnitude(&number) {
        Some(value) if found == '-' => Ok(-value),
        Some(value) => Ok(value),
        None => Err(malformed(cursor, start)),
    }
}

/// The charge number of at most three digits: one where none is written; zero is none.
fn magnitude(number: &str) -> Option<i32> {
    match number {
        "" => Some(1),
        _ if number.starts_with('0') => None,
        _ => number.parse().ok(),
    }
}

fn scan_number(cursor: &mut Cursor<'_>, script: Script) -> String {
    let written = cursor.eat_while(|c| script.digit(c).is_some());
    written.chars().filter_map(|c| script.digit(c)).collect()
}

/// Refuses digits or further signs after the sign: `SO4-2`, `Ca++`.
fn refuse_misordered(
    cursor: &mut Cursor<'_>,
    start: usize,
    found: char,
    number: &str,
) -> Result<(), NotationError> {
    let head = &cursor.read()[..start];
    let signs = 1 + cursor.eat_while(|c| sign(c) == Some(found)).chars().count();
    let plain = scan_number(cursor, Script::Plain);
    let late = plain + &scan_number(cursor, Script::Superscript);
    if signs == 1 && late.is_empty() {
        return Ok(());
    }
    if !number.is_empty() || (signs > 1 && !late.is_empty()) {
        return Err(malformed(cursor, start));
    }
    let charge = match late.is_empty() {
        true => signs.to_string(),
        false => late,
    };
    let fault = ChargeFault::Misordered {
        written: cursor.read()[start..].to_owned(),
        meant: format!("{head}^{charge}{found}"),
    };
    Err(NotationError::new(cursor.span_from(start), fault))
}

fn malformed(cursor: &Cursor<'_>, start: usize) -> NotationError {
    let written = cursor.read()[start..].to_owned();
    NotationError::new(cursor.span_from(start), ChargeFault::Malformed { written })
}

/// Both readings of `Fe3+`: the last digit as a charge number, or as (part of) a count.
fn ambiguous(cursor: &Cursor<'_>, start: usize, charge: i32) -> NotationError {
    let (head, _) = cursor.read().split_at(start);
    let sign = if charge < 0 { '-' } else { '+' };
    let mut shorter = head.chars();
    let digit = shorter.next_back().map(String::from).unwrap_or_default();
    let fault = ChargeFault::Ambiguous {
        written: cursor.read().to_owned(),
        charged: format!("{}^{digit}{sign}", shorter.as_str()),
        counted: format!("{head}^{sign}"),
    };
    NotationError::new(0..cursor.at(), fault)
}
