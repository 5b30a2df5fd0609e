//! Reading a composition: the substances that a fuel or a stream consists of, with their fractions.
//!
//! What the substances are in the sources, and the conversion of one basis into another, are left
//! to others.

use indexmap::IndexMap;

use crate::document::{Reader, Table, notation_fault, one_of, value_fault};
use crate::finding::{Located, Span};
use crate::notation::Participant;
use crate::quantity::FractionBasis;

use super::composition_sum::{check_sum, refuse_repeated};
use super::fraction::{basis_word, read_share};
use super::given::Given;
use super::ids::{IdKind, Ids};
use super::model::{DeclaredKind, DeclaredSubstance, Input};

/// A composition: fractions of one basis that add up to one.
#[derive(Clone, Debug)]
pub struct Composition {
    pub basis: Located<FractionBasis>,
    pub moisture: Moisture,
    pub parts: Vec<Part>,
    pub span: Span,
}

/// Whether the fractions are of the material with its water or without.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Moisture {
    Dry,
    Wet,
}

/// A substance of a composition.
#[derive(Clone, Debug)]
pub struct Part {
    pub substance: Located<Participant>,
    pub share: Share,
}

/// How much of the whole a substance is.
#[derive(Clone, Debug)]
pub enum Share {
    Fraction(Box<Given>),
    /// What the others leave.
    Balance,
}

/// The words for what fractions are of.
pub(super) const BASES: [(&str, FractionBasis); 3] = [
    (basis_word(FractionBasis::Amount), FractionBasis::Amount),
    (basis_word(FractionBasis::Mass), FractionBasis::Mass),
    (basis_word(FractionBasis::Volume), FractionBasis::Volume),
];

const MOISTURES: [(&str, Moisture); 2] = [("dry", Moisture::Dry), ("wet", Moisture::Wet)];

/// More substances than this would be work without bound.
const MOST_PARTS: usize = 200;

/// What the reading of a composition looks things up in.
pub(super) struct Context<'a> {
    pub(super) ids: &'a Ids,
    pub(super) inputs: &'a IndexMap<String, Input>,
    pub(super) substances: &'a IndexMap<String, DeclaredSubstance>,
}

/// Reads a composition. `beside` is a basis that stands beside the table instead of in it.
pub(super) fn read_composition(
    table: &Table<'_, '_>,
    beside: Option<Located<String>>,
    context: &Context<'_>,
) -> Option<Composition> {
    let basis = read_basis(table, beside);
    let moisture = table.string("moisture");
    let moisture = moisture.map_or(Some(Moisture::Wet), |text| {
        one_of(table.reader(), &text, &MOISTURES)
    });
    let entries = table.entries();
    let named = entries
        .into_iter()
        .filter(|(key, _)| !["basis", "moisture"].contains(&key.value.as_str()));
    let named: Vec<_> = named.collect();
    if named.len() > MOST_PARTS || named.is_empty() {
        refuse_number(table, named.len());
        return None;
    }
    let basis_known = basis.as_ref().map(|basis| basis.value);
    let parts = named.iter().map(|(key, value)| {
        let substance = read_substance(table.reader(), key, context);
        let share = value.string();
        let share = share.and_then(|text| read_share(table.reader(), &text, basis_known, context));
        Some(Part {
            substance: substance?,
            share: share?,
        })
    });
    let read: Vec<Option<Part>> = parts.collect();
    let complete = read.iter().all(Option::is_some);
    let composition = Composition {
        basis: basis?,
        moisture: moisture?,
        parts: read.into_iter().flatten().collect(),
        span: table.span.clone(),
    };
    let single = refuse_repeated(table.reader(), &composition);
    let holds = complete && single && check_sum(table, &composition, context);
    holds.then(|| composition.alone_is_whole())
}

fn refuse_number(table: &Table<'_, '_>, found: usize) {
    value_fault(
        table.reader(),
        &table.span,
        format!("a composition of {found} substances"),
        format!("1 to {MOST_PARTS} substances with their fractions"),
        "write { basis = \"mole\", \"CH4(g)\" = \"0.950\", \"N2(g)\" = \"balance\" }",
    );
}

fn read_basis(
    table: &Table<'_, '_>,
    beside: Option<Located<String>>,
) -> Option<Located<FractionBasis>> {
    let reader = table.reader();
    let inside = table.string("basis");
    if let (Some(inside), Some(beside)) = (&inside, &beside)
        && inside.value != beside.value
    {
        value_fault(
            reader,
            &beside.span,
            format!("\"{}\" beside \"{}\"", beside.value, inside.value),
            "one basis for the composition",
            "keep the one in the composition",
        );
        return None;
    }
    let Some(text) = inside.or(beside) else {
        if table.get("basis").is_none() {
            table.missing(
                "basis",
                "say what the fractions are of: mole, mass or volume",
            );
        }
        return None;
    };
    let basis = one_of(reader, &text, &BASES)?;
    Some(Located::new(basis, text.span))
}

/// A declared name or a species, from the key of a table.
pub(super) fn read_substance(
    reader: &Reader<'_>,
    key: &Located<String>,
    context: &Context<'_>,
) -> Option<Located<Participant>> {
    let participant = match Participant::parse(&key.value) {
        Ok(participant) => participant,
        Err(error) => {
            notation_fault(reader, key, &error);
            return None;
        }
    };
    let Participant::Declared(id) = &participant else {
        return Some(Located::new(participant, key.span.clone()));
    };
    match context.substances.get(id).map(|s| &s.kind) {
        Some(DeclaredKind::Compound { .. } | DeclaredKind::Inert) => {
            Some(Located::new(participant, key.span.clone()))
        }
        None => {
            if context.ids.kind(id) != Some(IdKind::Substance) {
                let wanted = [IdKind::Substance];
                context.ids.unknown(reader, id, &key.span, &wanted);
            }
            None
        }
    }
}

impl Composition {
    /// A substance that is alone is the whole, exactly, whatever digits its fraction has.
    fn alone_is_whole(mut self) -> Composition {
        if let [part] = &mut self.parts[..] {
            part.share = Share::Balance;
        }
        self
    }

    /// The substance that is what the others leave.
    pub fn balance(&self) -> Option<&Part> {
        let mut parts = self.parts.iter();
        parts.find(|part| matches!(part.share, Share::Balance))
    }
}
