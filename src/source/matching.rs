//! Whether an entry of a source is the substance that a case asks for.

use crate::notation::{Phase, PhaseLabel, Species};

use super::model::Entry;

/// What a case asks for: a form of a substance, with the words that identify it.
#[derive(Clone, Debug)]
pub struct Wanted {
    /// As the case writes it: an id or a species.
    pub label: String,
    pub species: Species,
    /// The id and the name of a declared substance; empty for a formula in an equation.
    pub names: Vec<String>,
    pub cas: Option<String>,
}

impl Wanted {
    /// Whether the case said more than a formula.
    pub fn is_declared(&self) -> bool {
        !self.names.is_empty()
    }
}

/// How an entry's identity compares with what is wanted.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Identity {
    /// The same by CAS number or by name, or nothing but the formula on both sides.
    Same,
    /// Neither confirmed nor excluded.
    Open,
    Different,
}

/// The outcome of looking for a substance in one source.
#[derive(Clone, Debug)]
pub enum Match {
    None,
    One(Box<Entry>),
    /// Several entries that the case does not tell apart.
    Several(Vec<Entry>),
}

/// Picks the wanted substance out of the entries of its composition in one source.
pub fn pick(wanted: &Wanted, entries: &[Entry]) -> Match {
    let phase = wanted.species.phase.as_ref();
    let fitting = entries.iter().filter(|entry| fits_phase(phase, entry));
    let fitting: Vec<(&Entry, Identity)> = fitting.map(|e| (e, identity(wanted, e))).collect();
    let best = match fitting.iter().any(|(_, id)| *id == Identity::Same) {
        true => Identity::Same,
        false => Identity::Open,
    };
    let kept = fitting
        .into_iter()
        .filter(|(_, id)| *id == best)
        .map(|(e, _)| e);
    let mut kept: Vec<Entry> = exact_form_first(phase, kept.collect());
    match kept.len() {
        0 => Match::None,
        1 => Match::One(Box::new(kept.remove(0))),
        _ => Match::Several(kept),
    }
}

/// `cr` without a name means the entry without a name where a source lists one.
fn exact_form_first(phase: Option<&Phase>, entries: Vec<&Entry>) -> Vec<Entry> {
    let exact = |entry: &&Entry| entry.notations().any(|s| s.phase.as_ref() == phase);
    let exactly: Vec<Entry> = entries.iter().copied().filter(exact).cloned().collect();
    if exactly.is_empty() {
        return entries.into_iter().cloned().collect();
    }
    exactly
}

fn fits_phase(wanted: Option<&Phase>, entry: &Entry) -> bool {
    entry.notations().any(|have| match (wanted, &have.phase) {
        (None, None) => true,
        (Some(wanted), Some(have)) => phase_serves(wanted, have),
        _ => false,
    })
}

fn phase_serves(wanted: &Phase, have: &Phase) -> bool {
    if wanted == have {
        return true;
    }
    let solid = [
        PhaseLabel::Solid,
        PhaseLabel::Crystal,
        PhaseLabel::Amorphous,
        PhaseLabel::Vitreous,
    ];
    match wanted.label {
        PhaseLabel::Solid => wanted.form.is_none() && solid.contains(&have.label),
        PhaseLabel::Crystal if wanted.form.is_none() => {
            matches!(have.label, PhaseLabel::Crystal | PhaseLabel::Solid)
        }
        PhaseLabel::Stable => solid.contains(&have.label) || have.label == PhaseLabel::Liquid,
        _ => false,
    }
}

/// Compares by CAS number where both have one, otherwise by name.
pub fn identity(wanted: &Wanted, entry: &Entry) -> Identity {
    if let (Some(ours), Some(theirs)) = (&wanted.cas, &entry.cas) {
        return match ours == theirs {
            true => Identity::Same,
            false => Identity::Different,
        };
    }
    if !wanted.is_declared() {
        return Identity::Same;
    }
    match &entry.name {
        Some(name) if wanted.names.iter().any(|n| same_name(n, name)) => Identity::Same,
        Some(_) => Identity::Open,
        None => Identity::Same,
    }
}

/// An entry that would serve but for its CAS number, although its name is the wanted one: one of
/// the two numbers is likely to be wrong.
pub fn passed_over<'e>(wanted: &Wanted, entries: &'e [Entry]) -> Option<&'e Entry> {
    let phase = wanted.species.phase.as_ref();
    entries.iter().find(|entry| {
        let name = entry.name.as_ref();
        let named = name.is_some_and(|name| wanted.names.iter().any(|n| same_name(n, name)));
        named && fits_phase(phase, entry) && identity(wanted, entry) == Identity::Different
    })
}

/// Names are compared without regard to case, spaces and hyphens.
fn same_name(a: &str, b: &str) -> bool {
    let plain = |text: &str| -> String {
        let letters = text.chars().filter(|c| !matches!(c, ' ' | '-' | '_'));
        letters.flat_map(char::to_lowercase).collect()
    };
    plain(a) == plain(b)
}

/// Whether two entries are known to be different compounds.
pub fn are_isomers(a: &Entry, b: &Entry) -> bool {
    match (&a.cas, &b.cas) {
        (Some(a), Some(b)) => a != b,
        _ => false,
    }
}
