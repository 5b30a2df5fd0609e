//! One unit symbol, with or without a prefix, looked up in the table; the nearest known symbol
//! where there is none.
//!
//! Leaves to others: compound units.

use std::ops::Range;

use super::exact::{Exact, power_of_ten};
use super::unit::Unit;
use super::unit_error::UnitError;
use super::unit_table::{PREFIXES, SEVERAL_MEANINGS, TableUnit, UNITS};

/// More edits than this make another word, not a slip of the pen.
const MOST_EDITS: usize = 2;

/// The unit that `text` stands for.
pub(super) fn look_up(text: &str, span: Range<usize>) -> Result<Unit, UnitError> {
    if let Some(choices) = several_meanings(text) {
        return Err(UnitError::SeveralMeanings {
            span,
            word: text.to_owned(),
            choices,
        });
    }
    plain(text)
        .or_else(|| prefixed(text))
        .ok_or_else(|| UnitError::Unknown {
            span,
            text: text.to_owned(),
            nearest: nearest(text),
        })
}

fn several_meanings(text: &str) -> Option<&'static str> {
    SEVERAL_MEANINGS
        .iter()
        .find(|(words, _)| words.contains(&text))
        .map(|(_, choices)| *choices)
}

fn plain(text: &str) -> Option<Unit> {
    UNITS
        .iter()
        .find(|unit| unit.symbol == text || unit.also.contains(&text))
        .map(|unit| built(unit, 0, ""))
}

fn prefixed(text: &str) -> Option<Unit> {
    PREFIXES.iter().find_map(|(prefix, power)| {
        let base = text.strip_prefix(prefix)?;
        let unit = UNITS
            .iter()
            .find(|unit| unit.prefixed && unit.symbol == base)?;
        Some(built(unit, *power, prefix))
    })
}

/// The unit of the table, 10^`power` times as large.
fn built(unit: &TableUnit, power: i64, prefix: &str) -> Unit {
    let ratio = |(over, under): (u64, u64)| Exact::new(over.into(), under.into());
    // One spelling for what is read in two: µ (U+00B5) for micro, L for litre.
    let prefix = if prefix == "μ" { "µ" } else { prefix };
    let symbol = if unit.symbol == "l" { "L" } else { unit.symbol };
    let symbol = format!("{prefix}{symbol}");
    let factor = ratio(unit.factor) * power_of_ten(power);
    let built = Unit::with_kind(symbol, unit.dimension, factor, unit.kind);
    match unit.offset {
        Some(offset) => built.with_offset(ratio(offset)),
        None => built,
    }
}

/// The known symbol that the fewest edits make of `text`; a difference in case counts least.
fn nearest(text: &str) -> Option<String> {
    let length = text.chars().count();
    known_symbols()
        .filter(|known| known.chars().count().abs_diff(length) <= MOST_EDITS)
        .map(|known| {
            let folded = edits(&text.to_lowercase(), &known.to_lowercase());
            (folded, edits(text, &known), known)
        })
        .filter(|(folded, _, _)| *folded <= MOST_EDITS && *folded < length)
        .min_by_key(|(folded, exact, _)| (*folded, *exact))
        .map(|(_, _, known)| known)
}

/// The symbols of the table, and those with the prefixes that people use most.
fn known_symbols() -> impl Iterator<Item = String> {
    UNITS
        .iter()
        .filter(|unit| unit.symbol != "l")
        .flat_map(|unit| {
            let prefixes: &[&str] = if unit.prefixed {
                &["", "k", "M", "m"]
            } else {
                &[""]
            };
            prefixes
                .iter()
                .map(move |prefix| format!("{prefix}{}", unit.symbol))
        })
}

/// How many insertions, deletions and replacements turn one text into the other (Levenshtein
/// distance, by rows). Callers bound the length of both.
fn edits(from: &str, to: &str) -> usize {
    let to: Vec<char> = to.chars().collect();
    let mut row: Vec<usize> = (0..=to.len()).collect();
    for character in from.chars() {
        let mut diagonal = row[0];
        row[0] += 1;
        for (at, other) in to.iter().enumerate() {
            let replaced = diagonal + usize::from(character != *other);
            diagonal = row[at + 1];
            row[at + 1] = replaced.min(row[at] + 1).min(diagonal + 1);
        }
    }
    row[to.len()]
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn the_nearest_known_unit_is_named() {
        for (text, expected) in [
            ("KJ", Some("kJ")),
            ("Kg", Some("kg")),
            ("hr", Some("h")),
            ("kcal_it", Some("kcal_IT")),
            ("Btu_It", Some("Btu_IT")),
            ("torr", Some("Torr")),
            ("mole", Some("mol")),
            ("furlong", None),
            ("x", None),
        ] {
            assert_eq!(nearest(text).as_deref(), expected, "{text}");
        }
    }

    #[test]
    fn symbols_are_unique() {
        let mut spellings: Vec<&str> = UNITS
            .iter()
            .flat_map(|unit| unit.also.iter().chain([&unit.symbol]))
            .copied()
            .collect();
        let refused = SEVERAL_MEANINGS.iter().flat_map(|(words, _)| words.iter());
        spellings.extend(refused);
        let all = spellings.len();
        spellings.sort_unstable();
        spellings.dedup();
        assert_eq!(spellings.len(), all);
    }

    #[test]
    fn no_prefixed_symbol_hides_another_unit() {
        for unit in UNITS {
            let hidden = prefixed(unit.symbol);
            assert!(hidden.is_none(), "{} reads two ways", unit.symbol);
        }
    }
}
