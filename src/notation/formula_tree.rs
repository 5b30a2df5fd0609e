//! The structure of a formula as it is written: parts, items, groups in brackets.
//!
//! Counts it out; reading and writing it are left to `formula_parse` and `formula`.

use std::collections::BTreeMap;

use num_rational::BigRational;
use num_traits::One;

use super::element::Element;
use super::number::decimal_text;

/// What stands between the dots of an addition compound.
#[derive(Clone, Debug, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub(super) struct Part {
    pub(super) multiplier: BigRational,
    pub(super) items: Vec<Item>,
}

/// An element or a group with its count.
#[derive(Clone, Debug, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub(super) struct Item {
    pub(super) unit: Unit,
    pub(super) count: BigRational,
}

#[derive(Clone, Debug, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub(super) enum Unit {
    Element(Element),
    Group(Bracket, Vec<Item>),
}

/// The kinds of brackets that enclose a group.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub(super) enum Bracket {
    Round,
    Square,
    Curly,
}

impl Bracket {
    const ALL: [Self; 3] = [Self::Round, Self::Square, Self::Curly];

    pub(super) fn open(self) -> char {
        match self {
            Self::Round => '(',
            Self::Square => '[',
            Self::Curly => '{',
        }
    }

    pub(super) fn close(self) -> char {
        match self {
            Self::Round => ')',
            Self::Square => ']',
            Self::Curly => '}',
        }
    }

    pub(super) fn opened_by(character: char) -> Option<Self> {
        Self::ALL.into_iter().find(|kind| kind.open() == character)
    }

    pub(super) fn closed_by(character: char) -> Option<Self> {
        Self::ALL.into_iter().find(|kind| kind.close() == character)
    }
}

/// Whether a bare sign after these items could be read with the digit before it as a
/// charge number: `Fe3+`, `[Fe(CN)6]4-`, `SO42-`. The charge of `NO3-` and `NH4+` is one.
pub(super) fn sign_is_ambiguous_after(items: &[Item]) -> bool {
    let Some(last) = items.last().filter(|item| item.count.is_integer()) else {
        return false;
    };
    let digits = count_text(&last.count);
    let reads_as_charge = digits.ends_with(|digit: char| digit >= '2');
    reads_as_charge && (items.len() == 1 || digits.len() > 1)
}

/// Adds what the items hold, `multiplier` times.
pub(super) fn add_counts(
    counts: &mut BTreeMap<Element, BigRational>,
    items: &[Item],
    multiplier: &BigRational,
) {
    for item in items {
        let count = &item.count * multiplier;
        match &item.unit {
            Unit::Element(element) => {
                *counts.entry(*element).or_default() += count;
            }
            Unit::Group(_, inner) => add_counts(counts, inner, &count),
        }
    }
}

/// A number as it stands in a formula: nothing for one.
pub(super) fn count_text(count: &BigRational) -> String {
    match count.is_one() {
        true => String::new(),
        false => decimal_text(count),
    }
}
