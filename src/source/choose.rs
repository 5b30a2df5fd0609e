//! Which entry of which source serves for a substance.

use crate::case::Choice;
use crate::finding::{Fault, FaultCode, Span};
use crate::notation::{PhaseLabel, Species};
use crate::quantity::{Exact, Quantity};

use super::identity_findings::{note_identity, note_passed_over};
use super::matching::{Match, Wanted, are_isomers, passed_over, pick};
use super::model::Entry;
use super::path::on_formation_scale;
use super::resolve::Resolver;
use super::stable::{is_stable, no_stable_form, stable_form};
use super::suggest::{ambiguous, no_enthalpy, unknown_substance};
use super::transitions::ways;

/// An entry that gives the enthalpy of the wanted substance on the scale of formation enthalpies.
#[derive(Clone, Debug)]
pub(super) struct Held {
    pub(super) source: usize,
    pub(super) entry: Entry,
}

impl Held {
    /// The printed formation enthalpy; none where a function gives it.
    pub(super) fn value(&self) -> Option<&Quantity> {
        self.entry.formation_enthalpy.as_ref()
    }
}

/// The entry that serves, and what the other consulted sources hold.
#[derive(Clone, Debug)]
pub(super) struct Chosen {
    pub(super) source: usize,
    pub(super) entry: Entry,
    pub(super) others: Vec<Held>,
    /// What the case said where it chose.
    pub(super) because: Option<String>,
    pub(super) chosen_at: Option<Span>,
}

/// Chooses the first source in order, or the one that the case chose.
///
/// `kelvin` decides which form `(stable)` stands for. Where nothing serves, a fault or a `stop`
/// says why.
pub(super) fn choose(
    resolver: &mut Resolver<'_>,
    wanted: &Wanted,
    kelvin: &Exact,
    span: &Span,
) -> Option<Chosen> {
    let found = look_up(resolver, wanted, kelvin, span)?;
    let choice = choice_for(resolver, wanted).cloned();
    let index = match &choice {
        Some(choice) => chosen_index(resolver, choice, &found)?,
        None => 0,
    };
    let mut found = found;
    let first = found.remove(index);
    if refuse_isomers(resolver, wanted, span, &first, &found) {
        return None;
    }
    note_identity(resolver, wanted, kelvin, span, &first.entry);
    Some(Chosen {
        source: first.source,
        entry: first.entry,
        others: found,
        chosen_at: choice.as_ref().map(|choice| choice.substance.span.clone()),
        because: choice.map(|choice| choice.because),
    })
}

/// All consulted entries that hold the value, in the order of the sources; never empty.
fn look_up(
    resolver: &mut Resolver<'_>,
    wanted: &Wanted,
    kelvin: &Exact,
    span: &Span,
) -> Option<Vec<Held>> {
    let hill = wanted.species.formula.hill();
    resolver.named_formulas.insert(hill.clone());
    let mut search = Search::default();
    for source in 0..resolver.sources.len() {
        let entries = resolver.sources[source].of_composition(&hill);
        if let Some(entry) = passed_over(wanted, &entries) {
            note_passed_over(resolver, wanted, span, source, entry);
        }
        let matched = match is_stable(wanted) {
            true => stable_form(pick(wanted, &entries), kelvin),
            false => Ok(pick(wanted, &entries)),
        };
        match matched {
            Err(why) => {
                let id = resolver.sources[source].id();
                search.no_form.push(format!("{id}: {why}"));
            }
            Ok(Match::None) => {}
            Ok(Match::Several(several)) => {
                if search.found.is_empty() || tells_isomers(wanted) {
                    let fault = ambiguous(resolver, wanted, span, source, &several);
                    resolver.faults.push(fault);
                    return None;
                }
            }
            Ok(Match::One(entry)) if gives_enthalpy(&entries, &entry) => search.found.push(Held {
                source,
                entry: *entry,
            }),
            Ok(Match::One(entry)) => search.without_value = Some((source, *entry)),
        }
    }
    search.ended(resolver, wanted, span)
}

/// What a search through the sources has met.
#[derive(Default)]
struct Search {
    found: Vec<Held>,
    /// The last entry that matches and leads to no enthalpy, with its source.
    without_value: Option<(usize, Entry)>,
    /// Why each source that knows the substance has no stable form of it.
    no_form: Vec<String>,
}

impl Search {
    /// What was found; where that is nothing, why is said.
    fn ended(self, resolver: &mut Resolver<'_>, wanted: &Wanted, span: &Span) -> Option<Vec<Held>> {
        if !self.found.is_empty() {
            return Some(self.found);
        }
        if !self.no_form.is_empty() {
            let finding = no_stable_form(resolver, wanted, &self.no_form.join(". "), span);
            resolver.say(finding);
            return None;
        }
        let fault = match self.without_value {
            Some((source, entry)) => no_enthalpy(resolver, wanted, span, source, &entry),
            None => unknown_substance(resolver, wanted, span),
        };
        resolver.faults.push(fault);
        None
    }
}

/// A printed formation enthalpy, a function that carries its integration constant, or transitions
/// from another form that has one.
fn gives_enthalpy(entries: &[Entry], entry: &Entry) -> bool {
    let functions = &entry.heat_capacity;
    entry.formation_enthalpy.is_some()
        || functions.iter().any(|f| on_formation_scale(f.form))
        || !ways(entries, entry).is_empty()
}

/// In a gas, a liquid or a solution several entries of one formula are different compounds.
fn tells_isomers(wanted: &Wanted) -> bool {
    let phase = wanted.species.phase.as_ref();
    phase.is_some_and(|p| {
        matches!(
            p.label,
            PhaseLabel::Gas | PhaseLabel::Liquid | PhaseLabel::Aqueous
        )
    })
}

pub(super) fn choice_for<'c>(resolver: &Resolver<'c>, wanted: &Wanted) -> Option<&'c Choice> {
    resolver.case.choices.iter().find(|choice| {
        let label = Species::parse(&choice.substance.value).map(|species| species.to_string());
        label.as_ref() == Ok(&wanted.label) || choice.substance.value == wanted.label
    })
}

fn chosen_index(resolver: &mut Resolver<'_>, choice: &Choice, found: &[Held]) -> Option<usize> {
    let index = found
        .iter()
        .position(|held| resolver.sources[held.source].id() == choice.source.value);
    if index.is_none() {
        let ids: Vec<&str> = found
            .iter()
            .map(|h| resolver.sources[h.source].id())
            .collect();
        let fault = Fault::new(
            FaultCode::Source,
            resolver.text,
            &choice.source.span,
            format!("\"{}\"", choice.source.value),
            format!(
                "a consulted source that holds the value: {}",
                ids.join(", ")
            ),
            "write the id of the source (not its path)",
        );
        resolver.faults.push(fault);
    }
    index
}

fn refuse_isomers(
    resolver: &mut Resolver<'_>,
    wanted: &Wanted,
    span: &Span,
    first: &Held,
    others: &[Held],
) -> bool {
    let Some(other) = others
        .iter()
        .find(|other| are_isomers(&first.entry, &other.entry))
    else {
        return false;
    };
    let entries = [first.entry.clone(), other.entry.clone()];
    let fault = ambiguous(resolver, wanted, span, other.source, &entries);
    resolver.faults.push(fault);
    true
}
