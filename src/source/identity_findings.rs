//! What has to be said of the identity of a substance that was found.

use crate::finding::{Finding, FindingCode, Place, Severity, Span};
use crate::notation::Species;
use crate::quantity::{Exact, exact_text};

use super::matching::{Identity, Wanted, identity};
use super::model::Entry;
use super::resolve::Resolver;
use super::stable::is_stable;

pub(super) fn note_passed_over(
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
    let at = resolver.text.place(span.start);
    let form = entry.species().map_or_else(String::new, Species::to_string);
    let by_formula = |(severity, message)| Finding {
        severity,
        code: FindingCode::IdentityByFormula,
        message,
        at: at.clone(),
    };
    let open = by_formula_alone(wanted, entry, &form).or_else(|| one_of_isomers(wanted, entry));
    if let Some(said) = open {
        resolver.findings.push(by_formula(said));
    } else if is_stable(wanted) {
        let ranged = !entry.heat_capacity.is_empty();
        note_stable(resolver, wanted, &form, kelvin, ranged, at);
    } else if entry.notations().all(|s| s.phase != wanted.species.phase) {
        let message = format!(
            "`{}` is taken as {form}, the one such form of the source.",
            wanted.label
        );
        resolver
            .findings
            .push(by_formula((Severity::Note, message)));
    }
}

fn by_formula_alone(wanted: &Wanted, entry: &Entry, form: &str) -> Option<(Severity, String)> {
    if identity(wanted, entry) != Identity::Open {
        return None;
    }
    let name = entry.name.as_deref().unwrap_or("nothing");
    let message = format!(
        "`{}` was found by its formula alone: the source calls {form} \"{name}\". Give a name or a \
         CAS number in [substances] that says they are the same.",
        wanted.label
    );
    Some((Severity::Caution, message))
}

/// A formula without a declaration, of which other compounds exist than the one that is listed.
fn one_of_isomers(wanted: &Wanted, entry: &Entry) -> Option<(Severity, String)> {
    let name = entry.name.as_deref()?;
    if wanted.is_declared() || !can_have_isomers(wanted) {
        return None;
    }
    let mut elements = wanted.species.formula.counts().keys();
    // With a third element the isomers are common substances of other kinds.
    let severity = match elements.all(|e| ["C", "H"].contains(&e.symbol())) {
        true => Severity::Note,
        false => Severity::Caution,
    };
    let message = format!(
        "`{}` is taken as {name}, the one compound of this formula that the source lists. A \
         declaration in [substances] with its CAS number says which one is meant.",
        wanted.label
    );
    Some((severity, message))
}

/// Compounds of two carbon atoms or more, with other elements, commonly have isomers.
fn can_have_isomers(wanted: &Wanted) -> bool {
    let counts = wanted.species.formula.counts();
    let carbon = counts.iter().find(|(element, _)| element.symbol() == "C");
    let two = Exact::from_integer(2.into());
    counts.len() > 1 && carbon.is_some_and(|(_, count)| *count >= two)
}

fn note_stable(
    resolver: &mut Resolver<'_>,
    wanted: &Wanted,
    form: &str,
    kelvin: &Exact,
    ranged: bool,
    at: Place,
) {
    resolver.say(Finding {
        severity: Severity::Note,
        code: FindingCode::StableForm,
        message: format!(
            "`{}` is {form} at {} K, {}.",
            wanted.label,
            exact_text(kelvin),
            match ranged {
                true => "by the ranges of its source",
                false => "the one form that its source lists",
            }
        ),
        at,
    });
}
