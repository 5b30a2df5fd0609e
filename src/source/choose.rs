//! Which entry of which source serves for a substance.

use crate::case::Choice;
use crate::finding::{Fault, FaultCode, Finding, FindingCode, Place, Severity, Span};
use crate::notation::{PhaseLabel, Species};
use crate::quantity::{Exact, Quantity, exact_text};

use super::matching::{Identity, Match, Wanted, are_isomers, identity, passed_over, pick};
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

/// Compounds of two carbon atoms or more, with other elements, commonly have isomers.
fn can_have_isomers(wanted: &Wanted) -> bool {
    let counts = wanted.species.formula.counts();
    let carbon = counts.iter().find(|(element, _)| element.symbol() == "C");
    let two = Exact::from_integer(2.into());
    counts.len() > 1 && carbon.is_some_and(|(_, count)| *count >= two)
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
    let mut found = Vec::new();
    let mut without_value: Option<(usize, Entry)> = None;
    let mut no_form: Option<String> = None;
    for source in 0..resolver.sources.len() {
        let entries = resolver.sources[source].of_composition(&hill);
        if let Some(entry) = passed_over(wanted, &entries) {
            note_passed_over(resolver, wanted, span, source, entry);
        }
        let matched = match is_stable(wanted) {
            true => match stable_form(pick(wanted, &entries), kelvin) {
                Ok(matched) => matched,
                Err(why) => {
                    let id = resolver.sources[source].id();
                    no_form.get_or_insert(format!("{id}: {why}"));
                    continue;
                }
            },
            false => pick(wanted, &entries),
        };
        match matched {
            Match::None => {}
            Match::Several(several) => {
                if found.is_empty() || tells_isomers(wanted) {
                    let fault = ambiguous(resolver, wanted, span, source, &several);
                    resolver.faults.push(fault);
                    return None;
                }
            }
            Match::One(entry) if gives_enthalpy(&entries, &entry) => found.push(Held {
                source,
                entry: *entry,
            }),
            Match::One(entry) => without_value = Some((source, *entry)),
        }
    }
    if let (true, Some(why)) = (found.is_empty(), no_form) {
        let finding = no_stable_form(resolver, wanted, &why, span);
        resolver.say(finding);
        return None;
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
pub(super) fn note_identity(
    resolver: &mut Resolver<'_>,
    wanted: &Wanted,
    kelvin: &Exact,
    span: &Span,
    entry: &Entry,
) {
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
    if is_stable(wanted) {
        note_stable(resolver, wanted, &form, kelvin, at);
    } else if !listed {
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

fn note_stable(
    resolver: &mut Resolver<'_>,
    wanted: &Wanted,
    form: &str,
    kelvin: &Exact,
    at: Place,
) {
    resolver.say(Finding {
        severity: Severity::Note,
        code: FindingCode::StableForm,
        message: format!(
            "`{}` is {form} at {} K, by the ranges of its source.",
            wanted.label,
            exact_text(kelvin)
        ),
        at,
    });
}
