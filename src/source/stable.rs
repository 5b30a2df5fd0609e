//! `(stable)`: the condensed form that a source gives at a temperature, by its ranges.

use crate::finding::{Finding, FindingCode, Severity, Span};
use crate::notation::{PhaseLabel, Species};
use crate::quantity::{Exact, exact_text};

use super::heat_capacity::HeatCapacity;
use super::matching::{Match, Wanted};
use super::model::Entry;
use super::path::reference_kelvin;
use super::resolve::Resolver;

pub(super) fn is_stable(wanted: &Wanted) -> bool {
    let phase = wanted.species.phase.as_ref();
    phase.is_some_and(|phase| phase.label == PhaseLabel::Stable)
}

/// Each form serves up to its upper bound, then the next. Where no form or several claim the
/// temperature, the reason. A source without functions says nothing of stability but at 298.15 K,
/// where the one form that it lists is taken.
pub(super) fn stable_form(found: Match, kelvin: &Exact) -> Result<Match, String> {
    let entries = match found {
        Match::None => return Ok(Match::None),
        Match::One(entry) => vec![*entry],
        Match::Several(entries) => entries,
    };
    let with_range: Vec<&Entry> = entries.iter().filter(|e| bounds(e).is_some()).collect();
    if with_range.is_empty() {
        return match (entries.len(), *kelvin == reference_kelvin()) {
            (1, true) => Ok(one(&entries[0])),
            (_, true) => Ok(Match::Several(entries)),
            (_, false) => Err("it gives no ranges of temperature for its forms".to_string()),
        };
    }
    let mut serving = with_range.clone();
    serving.retain(|entry| serves(entry, kelvin));
    if serving.iter().any(|entry| ends_at(entry, kelvin)) {
        // Up to its upper bound a form serves, and what begins there is the next.
        serving.retain(|entry| !begins_at(entry, kelvin));
    }
    match serving[..] {
        [entry] => Ok(one(entry)),
        [] => Err(format!(
            "no form covers {} K; {}",
            exact_text(kelvin),
            listed(&with_range)
        )),
        _ => Err(format!(
            "several forms claim {} K; {}",
            exact_text(kelvin),
            listed(&with_range)
        )),
    }
}

fn one(entry: &Entry) -> Match {
    Match::One(Box::new(entry.clone()))
}

/// From the lowest bound of an entry's functions to the highest, K.
fn bounds(entry: &Entry) -> Option<[Exact; 2]> {
    let ranges = entry
        .heat_capacity
        .iter()
        .filter_map(HeatCapacity::range_kelvin);
    ranges.reduce(|[low, high], [other_low, other_high]| [low.min(other_low), high.max(other_high)])
}

fn ends_at(entry: &Entry, kelvin: &Exact) -> bool {
    bounds(entry).is_some_and(|[_, high]| high == *kelvin)
}

fn begins_at(entry: &Entry, kelvin: &Exact) -> bool {
    bounds(entry).is_some_and(|[low, _]| low == *kelvin)
}

/// Inside the bounds, or at 298.15 K just below them.
fn serves(entry: &Entry, kelvin: &Exact) -> bool {
    entry
        .heat_capacity
        .iter()
        .any(|f| match *kelvin == reference_kelvin() {
            true => f.serves(kelvin),
            false => f.covers(kelvin),
        })
}

fn listed(entries: &[&Entry]) -> String {
    let line = |entry: &&Entry| {
        let form = entry.species().map_or_else(String::new, Species::to_string);
        let [low, high] = bounds(entry)?;
        Some(format!(
            "{form} {} to {} K",
            exact_text(&low),
            exact_text(&high)
        ))
    };
    let lines: Vec<String> = entries.iter().filter_map(line).collect();
    lines.join(", ")
}

/// The `stop` where no source says which form is stable.
pub(super) fn no_stable_form(
    resolver: &Resolver<'_>,
    wanted: &Wanted,
    why: &str,
    span: &Span,
) -> Finding {
    Finding {
        severity: Severity::Stop,
        code: FindingCode::StableForm,
        message: format!(
            "{}: which form is stable is not said. {why}. Name the form in the equation, or consult \
             a source whose ranges say it.",
            wanted.label
        ),
        at: resolver.text.place(span.start),
    }
}
