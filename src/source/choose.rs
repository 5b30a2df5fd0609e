//! Which entry of which source serves for a substance.

use crate::case::Choice;
use crate::finding::{Fault, FaultCode, Finding, FindingCode, Severity, Span};
use crate::notation::{PhaseLabel, Species};
use crate::quantity::{Exact, Quantity};

use super::matching::{Identity, Match, Wanted, are_isomers, identity, passed_over, pick};
use super::model::Entry;
use super::resolve::Resolver;
use super::suggest::{ambiguous, no_enthalpy, unknown_substance};

/// An entry that holds a formation enthalpy of the wanted substance.
#[derive(Clone, Debug)]
pub(super) struct Held {
    pub(super) source: usize,
    pub(super) entry: Entry,
    pub(super) value: Quantity,
}

/// The entry that serves, and what the other consulted sources hold.
#[derive(Clone, Debug)]
pub(super) struct Chosen {
    pub(super) source: usize,
    pub(super) entry: Entry,
    pub(super) value: Quantity,
    pub(super) others: Vec<Held>,
    /// What the case said where it chose.
    pub(super) because: Option<String>,
    pub(super) chosen_at: Option<Span>,
}

/// Compounds of two carbon atoms or more, with other elements, commonly have isomers.
fn can_have_isomers(wanted: &Wanted) -> bool {
    let counts = wanted.species.formula.counts();
    let carbon = counts.iter().find(|(element, _)| element.symbol() == "C");
    let two = Exact::from_integer(2.into());
    counts.len() > 1 && carbon.is_some_and(|(_, count)| *count >= two)
}

/// Chooses the first source in order, or the one that the case chose.
pub(super) fn choose(resolver: &mut Resolver<'_>, wanted: &Wanted, span: &Span) -> Option<Chosen> {
    let found = look_up(resolver, wanted, span)?;
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
    note_identity(resolver, wanted, span, &first.entry);
    Some(Chosen {
        source: first.source,
        entry: first.entry,
        value: first.value,
        others: found,
        chosen_at: choice.as_ref().map(|choice| choice.substance.span.clone()),
        because: choice.map(|choice| choice.because),
    })
}

/// All consulted entries that hold the value, in the order of the sources; never empty.
fn look_up(resolver: &mut Resolver<'_>, wanted: &Wanted, span: &Span) -> Option<Vec<Held>> {
    let hill = wanted.species.formula.hill();
    let mut found = Vec::new();
    let mut without_value: Option<(usize, Entry)> = None;
    for source in 0..resolver.sources.len() {
        let entries = resolver.sources[source].of_composition(&hill);
        if let Some(entry) = passed_over(wanted, &entries) {
            note_passed_over(resolver, wanted, span, source, entry);
        }
        match stable_only(wanted, pick(wanted, &entries)) {
            Match::None => {}
            Match::Several(several) => {
                if found.is_empty() || tells_isomers(wanted) {
                    let fault = ambiguous(resolver, wanted, span, source, &several);
                    resolver.faults.push(fault);
                    return None;
                }
            }
            Match::One(entry) => match entry.formation_enthalpy.clone() {
                Some(value) => found.push(Held {
                    source,
                    entry: *entry,
                    value,
                }),
                None => without_value = Some((source, *entry)),
            },
        }
    }
    if found.is_empty() {
        let fault = match without_value {
            Some((source, entry)) => no_enthalpy(resolver, wanted, span, source, &entry),
            None => unknown_substance(resolver, wanted, span),
        };
        resolver.faults.push(fault);
        return None;
    }
    Some(found)
}

/// Of several condensed forms, those that the source gives at the reference temperature.
fn stable_only(wanted: &Wanted, found: Match) -> Match {
    let stable = wanted
        .species
        .phase
        .as_ref()
        .is_some_and(|p| p.label == PhaseLabel::Stable);
    let entries = match found {
        Match::Several(entries) => entries,
        // One form whose range ends elsewhere is not the one that is stable here.
        Match::One(entry) if stable && !entry.heat_capacity.is_empty() => vec![*entry],
        found => return found,
    };
    if !stable {
        return Match::Several(entries);
    }
    let reference = Exact::new(29815.into(), 100.into());
    let serving = |e: &Entry| e.heat_capacity.iter().any(|cp| cp.serves(&reference));
    let mut serving: Vec<Entry> = entries.iter().filter(|e| serving(e)).cloned().collect();
    match serving.len() {
        1 => Match::One(Box::new(serving.remove(0))),
        0 if entries.len() == 1 => Match::None,
        _ => Match::Several(entries),
    }
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

fn choice_for<'c>(resolver: &Resolver<'c>, wanted: &Wanted) -> Option<&'c Choice> {
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

fn note_passed_over(
    resolver: &mut Resolver<'_>,
    wanted: &Wanted,
    span: &Span,
    source: usize,
    entry: &Entry,
) {
    let number = |cas: &Option<String>| cas.clone().unwrap_or_default();
    resolver.findings.push(Finding {
        severity: Severity::Caution,
        code: FindingCode::IdentityByFormula,
        message: format!(
            "{} lists {} under the name of `{}` with CAS number {}, the case says {}: passed over. \
             One of the two numbers is likely to be wrong.",
            resolver.sources[source].id(),
            entry.species().map_or_else(String::new, Species::to_string),
            wanted.label,
            number(&entry.cas),
            number(&wanted.cas),
        ),
        at: resolver.text.place(span.start),
    });
}

/// What was taken for granted about the identity of a substance is said.
fn note_identity(resolver: &mut Resolver<'_>, wanted: &Wanted, span: &Span, entry: &Entry) {
    let form = entry.species().map_or_else(String::new, Species::to_string);
    let at = resolver.text.place(span.start);
    if identity(wanted, entry) == Identity::Open {
        let name = entry.name.as_deref().unwrap_or("nothing");
        resolver.findings.push(Finding {
            severity: Severity::Caution,
            code: FindingCode::IdentityByFormula,
            message: format!(
                "`{}` was found by its formula alone: the source calls {form} \"{name}\". Give a \
                 name or a CAS number in [substances] that says they are the same.",
                wanted.label
            ),
            at,
        });
        return;
    }
    if !wanted.is_declared() && can_have_isomers(wanted) && entry.name.is_some() {
        let name = entry.name.as_deref().unwrap_or_default();
        let carbon_and_hydrogen = ["C", "H"];
        let mut elements = wanted.species.formula.counts().keys();
        // With a third element the isomers are common substances of other kinds.
        let severity = match elements.all(|e| carbon_and_hydrogen.contains(&e.symbol())) {
            true => Severity::Note,
            false => Severity::Caution,
        };
        resolver.findings.push(Finding {
            severity,
            code: FindingCode::IdentityByFormula,
            message: format!(
                "`{}` is taken as {name}, the one compound of this formula that the source lists. \
                 A declaration in [substances] with its CAS number says which one is meant.",
                wanted.label
            ),
            at,
        });
        return;
    }
    let asked = &wanted.species.phase;
    let listed = entry.notations().any(|species| species.phase == *asked);
    if !listed {
        resolver.findings.push(Finding {
            severity: Severity::Note,
            code: FindingCode::IdentityByFormula,
            message: format!(
                "`{}` is taken as {form}, the one such form of the source.",
                wanted.label
            ),
            at,
        });
    }
}
