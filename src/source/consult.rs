//! Which sources a case consults, loaded in its order of preference.

use crate::case::Case;
use crate::finding::{Fault, FaultCode, Faults, Located, Text, nearest};

use super::builtin::{BUILT_IN, CONVENTIONS, built_in};
use super::read::{Provenance, read_source};
use super::store::{CASE, Source};

/// The one door through which source files come in: a folder, or the attachments of a record.
pub trait SourceFiles {
    /// The text of a source by its name in `consult`; none where this door does not lead to it
    /// and the built-in source of that id serves.
    fn text(&self, name: &str) -> Option<Result<Text, Fault>>;

    /// Whether the door leads to attachments of a record that its manifest vouches for.
    fn provenance(&self) -> Provenance {
        Provenance::Original
    }
}

/// The sources that a case consults.
#[derive(Clone, Debug)]
pub struct Consultation {
    /// The conventions first, then the case's in its order.
    pub sources: Vec<Source>,
    /// For each name in `consult`, the index of what it became.
    pub became: Vec<(String, usize)>,
}

/// Loads the sources of a case. Faults in source files are reported with their own places.
pub fn consult(case: &Case, text: &Text, files: &dyn SourceFiles) -> (Consultation, Faults) {
    let mut faults = Faults::default();
    let mut sources = Vec::new();
    let mut became = Vec::new();
    let conventions = Located::new(CONVENTIONS.to_string(), 0..0);
    let named = case.consult.iter().filter(|name| name.value != CONVENTIONS);
    for name in std::iter::once(&conventions).chain(named) {
        let Some(source) = load(name, text, files, &mut faults) else {
            continue;
        };
        if sources.iter().any(|s: &Source| s.id() == source.id()) {
            faults.push(same_id(name, text, source.id()));
            continue;
        }
        became.push((name.value.clone(), sources.len()));
        sources.push(source);
    }
    (Consultation { sources, became }, faults)
}

/// A built-in source that a result needs beyond those consulted (atomic weights).
pub(super) fn load_built_in(id: &str, files: &dyn SourceFiles) -> (Option<Source>, Faults) {
    match files.text(id) {
        Some(Ok(text)) => read_source(&text, files.provenance()),
        Some(Err(fault)) => {
            let mut faults = Faults::default();
            faults.push(fault);
            (None, faults)
        }
        None => (built_in(id), Faults::default()),
    }
}

fn load(
    name: &Located<String>,
    case: &Text,
    files: &dyn SourceFiles,
    faults: &mut Faults,
) -> Option<Source> {
    match files.text(&name.value) {
        Some(Ok(text)) => {
            let (source, found) = read_source(&text, files.provenance());
            faults.extend(found);
            let source = source?;
            if files.provenance() == Provenance::Original
                && (BUILT_IN.contains(&source.id()) || source.id() == CASE)
            {
                faults.push(borrowed_id(name, case, source.id()));
                return None;
            }
            Some(source)
        }
        Some(Err(fault)) => {
            faults.push(at_consult(name, case, &fault));
            None
        }
        None => built_in(&name.value).or_else(|| {
            faults.push(unknown(name, case));
            None
        }),
    }
}

/// A file that cannot be read is a fault of the line that names it.
fn at_consult(name: &Located<String>, case: &Text, fault: &Fault) -> Fault {
    if fault.code != FaultCode::File || !fault.line.is_empty() {
        return fault.clone();
    }
    Fault::new(
        FaultCode::File,
        case,
        &name.span,
        format!("\"{}\": {}", name.value, fault.found),
        fault.expected.clone(),
        fault.advice.clone(),
    )
}

fn unknown(name: &Located<String>, case: &Text) -> Fault {
    let advice = match nearest(&name.value, BUILT_IN, 1).first() {
        Some(near) => format!("did you mean \"{near}\"?"),
        None => "a path ends in .toml and is relative to the case".to_string(),
    };
    Fault::new(
        FaultCode::Source,
        case,
        &name.span,
        format!("\"{}\"", name.value),
        format!(
            "a built-in source ({}) or a path beside the case",
            BUILT_IN.join(", ")
        ),
        advice,
    )
}

fn borrowed_id(name: &Located<String>, case: &Text, id: &str) -> Fault {
    Fault::new(
        FaultCode::DuplicateId,
        case,
        &name.span,
        format!("\"{}\", whose id is `{id}`", name.value),
        "an id of its own: a built-in source has this one",
        "give the file's [source] another id",
    )
}

fn same_id(name: &Located<String>, case: &Text, id: &str) -> Fault {
    Fault::new(
        FaultCode::DuplicateId,
        case,
        &name.span,
        format!("\"{}\", whose id is `{id}`", name.value),
        "sources with an id each of its own; another one here has this id",
        "give the file's [source] another id, or consult it once",
    )
}
