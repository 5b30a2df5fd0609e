//! Faults about substances, with help towards the one that was meant.

use std::collections::BTreeSet;

use crate::finding::{Fault, FaultCode, Span, nearest};
use crate::notation::{PhaseLabel, Species};

use super::builtin::{ATOMIC_WEIGHTS, BUILT_IN, built_in};
use super::matching::{Match, Wanted, pick};
use super::model::Entry;
use super::resolve::Resolver;
use super::store::CASE;

/// How many candidates a message names.
const MOST: usize = 6;

/// How many faults are helped by a search through all names, which takes milliseconds each.
const MOST_SEARCHED: usize = 20;

const OWN_VALUE: &str = "cite a value for it in a source file of your own and consult that";

/// No consulted source lists the substance.
pub(super) fn unknown_substance(resolver: &Resolver<'_>, wanted: &Wanted, span: &Span) -> Fault {
    Fault::new(
        FaultCode::UnknownSubstance,
        resolver.text,
        span,
        format!("{}, which no consulted source lists", describe(wanted)),
        format!("a substance of: {}", source_ids(resolver).join(", ")),
        advice(resolver, wanted),
    )
}

fn describe(wanted: &Wanted) -> String {
    match wanted.is_declared() {
        true => format!("`{}` = {}", wanted.label, wanted.species),
        false => format!("`{}`", wanted.label),
    }
}

fn source_ids<'r>(resolver: &'r Resolver<'_>) -> Vec<&'r str> {
    // Atomic weights are no substances.
    let listing = resolver
        .sources
        .iter()
        .filter(|source| ![ATOMIC_WEIGHTS, CASE].contains(&source.id()));
    listing.map(|source| source.id()).collect()
}

fn advice(resolver: &Resolver<'_>, wanted: &Wanted) -> String {
    let ions = match is_neutral_in_water(wanted) {
        true => {
            ". A strong acid, base or salt in dilute solution is written as its ions: \
                 H+(aq) + NO3-(aq)"
        }
        false => "",
    };
    let forms = other_forms(resolver, wanted);
    if !forms.is_empty() {
        return format!("the sources list: {}{ions}", forms.join(", "));
    }
    if resolver.faults.len() >= MOST_SEARCHED {
        return OWN_VALUE.to_string();
    }
    let elsewhere = not_consulted(resolver, wanted);
    if !elsewhere.is_empty() {
        return format!(
            "add to `consult` a source that lists it: {}",
            elsewhere.join(", ")
        );
    }
    let near = near_names(resolver, wanted);
    if near.is_empty() {
        return OWN_VALUE.to_string();
    }
    format!(
        "did you mean {}? Otherwise cite a value in a source file of your own",
        near.join(", ")
    )
}

fn is_neutral_in_water(wanted: &Wanted) -> bool {
    let phase = wanted.species.phase.as_ref();
    let in_water = phase.is_some_and(|phase| phase.label == PhaseLabel::Aqueous);
    in_water && wanted.species.formula.charge() == 0
}

/// Entries of the same composition in other phases or forms, or of another identity.
fn other_forms(resolver: &Resolver<'_>, wanted: &Wanted) -> Vec<String> {
    let hill = wanted.species.formula.hill();
    let mut forms = Vec::new();
    for source in &resolver.sources {
        for entry in source.of_composition(&hill) {
            let form = format!("{} in {}", label(&entry), source.id());
            if !forms.contains(&form) && forms.len() < MOST {
                forms.push(form);
            }
        }
    }
    forms
}

/// Built-in sources that list the composition in the wanted phase and are not consulted.
fn not_consulted(resolver: &Resolver<'_>, wanted: &Wanted) -> Vec<&'static str> {
    let consulted = source_ids(resolver);
    let hill = wanted.species.formula.hill();
    let open = BUILT_IN.into_iter().filter(|id| !consulted.contains(id));
    open.filter(|id| {
        let entries = built_in(id).map_or_else(Vec::new, |source| source.of_composition(&hill));
        !matches!(pick(wanted, &entries), Match::None)
    })
    .collect()
}

/// Substances of the same elements and phase, and such as have a name near to what was written.
fn near_names(resolver: &Resolver<'_>, wanted: &Wanted) -> Vec<String> {
    let entries = resolver.listed();
    let mut near: Vec<String> = Vec::new();
    let alike = entries
        .iter()
        .filter(|entry| is_alike(wanted, entry))
        .filter_map(Entry::species);
    near.extend(alike.map(|species| format!("`{species}`")));
    let names: Vec<&str> = entries
        .iter()
        .filter_map(|entry| entry.name.as_deref())
        .collect();
    for word in &wanted.names {
        for name in nearest(word, names.iter().copied(), 3) {
            let found = entries
                .iter()
                .filter(|entry| entry.name.as_deref() == Some(name));
            near.extend(found.map(label));
        }
    }
    let mut seen = BTreeSet::new();
    near.retain(|candidate| seen.insert(candidate.clone()));
    near.truncate(MOST);
    near
}

/// Whether an entry is of the same elements, in whatever number, and in the same kind of phase.
fn is_alike(wanted: &Wanted, entry: &Entry) -> bool {
    let Some(species) = entry.species() else {
        return false;
    };
    let elements = |species: &Species| species.formula.counts().keys().copied().collect::<Vec<_>>();
    let label = |species: &Species| species.phase.as_ref().map(|phase| phase.label);
    elements(species) == elements(&wanted.species) && label(species) == label(&wanted.species)
}

/// An entry with what tells it apart.
fn label(entry: &Entry) -> String {
    let form = entry.species().map_or_else(String::new, Species::to_string);
    match (&entry.name, &entry.cas) {
        (Some(name), Some(cas)) => format!("{form} ({name}, CAS {cas})"),
        (Some(name), None) => format!("{form} ({name})"),
        _ => form,
    }
}

/// A source lists several entries that what the case says does not tell apart.
pub(super) fn ambiguous(
    resolver: &Resolver<'_>,
    wanted: &Wanted,
    span: &Span,
    source: usize,
    entries: &[Entry],
) -> Fault {
    let labels: Vec<String> = entries.iter().take(MOST).map(label).collect();
    // HCN(g) and HNC(g) are spelt apart, and still one composition in one phase: neither spelling
    // chooses between them.
    let phase = |entry: &Entry| entry.species().map(|species| species.phase.clone());
    let same_phase = entries
        .windows(2)
        .all(|pair| phase(&pair[0]) == phase(&pair[1]));
    let advice = match same_phase {
        true => declare(wanted, entries),
        false => "name the form: write one of them in the equation".to_string(),
    };
    Fault::new(
        FaultCode::AmbiguousSubstance,
        resolver.text,
        span,
        format!("{}, which can be several things", describe(wanted)),
        format!(
            "one of {} (with {})",
            labels.join("; "),
            resolver.sources[source].id()
        ),
        advice,
    )
}

/// The line of `[substances]` that would tell them apart.
fn declare(wanted: &Wanted, entries: &[Entry]) -> String {
    let Some(example) = entries.iter().find(|entry| entry.name.is_some()) else {
        return "declare it under a name in [substances], with its CAS number".to_string();
    };
    let name = example.name.clone().unwrap_or_default();
    let id: String = name
        .chars()
        .map(|c| if c.is_ascii_alphanumeric() { c } else { '-' })
        .collect();
    let phase = wanted
        .species
        .phase
        .as_ref()
        .map_or_else(String::new, |p| p.label.symbol().to_string());
    let cas = example
        .cas
        .as_ref()
        .map_or_else(String::new, |cas| format!(", cas = \"{cas}\""));
    format!(
        "declare the one that you mean and use its id, for example {} = {{ formula = \"{}\", \
         phase = \"{phase}\", name = \"{name}\"{cas} }}",
        id.to_lowercase(),
        wanted.species.formula
    )
}

/// A source lists the substance, but not its formation enthalpy at the reference temperature.
pub(super) fn no_enthalpy(
    resolver: &Resolver<'_>,
    wanted: &Wanted,
    span: &Span,
    source: usize,
    entry: &Entry,
) -> Fault {
    let why = match &entry.note {
        Some(note) => format!("{note}. "),
        None => String::new(),
    };
    Fault::new(
        FaultCode::Source,
        resolver.text,
        span,
        format!(
            "{} in {}, without a formation enthalpy",
            label(entry),
            resolver.sources[source].id()
        ),
        "an entry with `formation-enthalpy`",
        format!(
            "{why}Consult another source for `{}`, or cite a value of your own",
            wanted.label
        ),
    )
}
