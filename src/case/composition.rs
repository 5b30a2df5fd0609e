//! Reading a composition: the substances that a fuel or a stream consists of, with their fractions.
//!
//! What the substances are in the sources, and the conversion of one basis into another, are left
//! to others.

use indexmap::IndexMap;
use num_traits::{One, Signed, Zero};

use crate::document::{Reader, Table, is_id, notation_fault, one_of, value_fault};
use crate::finding::{FaultCode, Located, Span, shorten};
use crate::notation::Participant;
use crate::quantity::{Dimension, Exact, FractionBasis, Quantity, UnitKind, exact_text};

use super::given::{Given, Wanted, read_given};
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
    ("mole", FractionBasis::Amount),
    ("mass", FractionBasis::Mass),
    ("volume", FractionBasis::Volume),
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

fn read_share(
    reader: &Reader<'_>,
    text: &Located<String>,
    basis: Option<FractionBasis>,
    context: &Context<'_>,
) -> Option<Share> {
    if text.value == "balance" && !context.inputs.contains_key("balance") {
        return Some(Share::Balance);
    }
    // A slip in the word would be looked for among the inputs.
    if is_id(&text.value) && !context.inputs.contains_key(&text.value) {
        let words = [("balance", ())];
        let near = crate::finding::nearest(&text.value, words.iter().map(|w| w.0), 1);
        if !near.is_empty() {
            one_of(reader, text, &words);
            return None;
        }
    }
    let fraction = read_fraction(reader, text, basis, context)?;
    Some(Share::Fraction(Box::new(fraction)))
}

/// A fraction from zero to one, of the basis where it says one.
pub(super) fn read_fraction(
    reader: &Reader<'_>,
    text: &Located<String>,
    basis: Option<FractionBasis>,
    context: &Context<'_>,
) -> Option<Given> {
    let wanted = Wanted {
        dimension: Dimension::ONE,
        results: false,
        expected: "a fraction, or \"balance\"",
        advice: "write \"0.950\", \"95.0 mol%\", \"0.950 ± 0.002\" or the id of an input",
    };
    let given = read_given(reader, context.ids, context.inputs, text, &wanted)?;
    let quantity = given.quantity(context.inputs)?;
    if !of_basis(reader, text, quantity, basis) {
        return None;
    }
    let value = quantity.value_in_si();
    if value.is_negative() || value > Exact::one() {
        value_fault(
            reader,
            &text.span,
            format!("\"{}\"", shorten(&text.value, 60)),
            "a fraction from 0 to 1",
            "check the number; per cent are written as wt%, mol% or vol%",
        );
        return None;
    }
    Some(given)
}

/// A percentage says what it is of, and has to be of the composition's basis.
fn of_basis(
    reader: &Reader<'_>,
    text: &Located<String>,
    quantity: &Quantity,
    basis: Option<FractionBasis>,
) -> bool {
    let (UnitKind::Fraction(own), Some(basis)) = (quantity.unit.kind(), basis) else {
        return true;
    };
    if own == basis {
        return true;
    }
    value_fault(
        reader,
        &text.span,
        format!("\"{}\", of {} basis", text.value, word(own)),
        format!("fractions of the composition's basis, {}", word(basis)),
        "give all fractions on one basis",
    );
    false
}

/// The word that a case has for a basis.
fn word(basis: FractionBasis) -> &'static str {
    match basis {
        FractionBasis::Amount => "mole",
        FractionBasis::Mass => "mass",
        FractionBasis::Volume => "volume",
    }
}

/// A substance that stands twice (`CH4(g)` and `CH4( g )`), and a second balance.
fn refuse_repeated(reader: &Reader<'_>, composition: &Composition) -> bool {
    let mut names: Vec<String> = Vec::new();
    let mut balances = 0;
    let mut single = true;
    for part in &composition.parts {
        let name = part.substance.value.to_string();
        let again = names.contains(&name);
        let is_balance = matches!(part.share, Share::Balance);
        balances += usize::from(is_balance);
        let second_balance = is_balance && balances > 1;
        if again || second_balance {
            single = false;
            value_fault(
                reader,
                &part.substance.span,
                match again {
                    true => format!("`{name}` a second time"),
                    false => format!("`{name}` as a second balance"),
                },
                "each substance once, and at most one \"balance\"",
                match again {
                    true => "remove one of the two",
                    false => "give the fractions of all substances but one",
                },
            );
        }
        names.push(name);
    }
    single
}

/// The fractions add up to one exactly; with a balance they leave something for it.
fn check_sum(table: &Table<'_, '_>, composition: &Composition, context: &Context<'_>) -> bool {
    let fractions = composition
        .parts
        .iter()
        .filter_map(|part| match &part.share {
            Share::Fraction(given) => given.quantity(context.inputs),
            Share::Balance => None,
        });
    let sum: Exact = fractions.map(Quantity::value_in_si).sum();
    let balance = composition.balance().is_some();
    let holds = match balance {
        true => sum < Exact::one(),
        false => sum == Exact::one(),
    };
    if holds {
        return true;
    }
    let left = Exact::one() - &sum;
    let (expected, advice) = match (balance, left.is_zero() || left.is_negative()) {
        (true, _) => (
            "a sum below 1, so that something is left for the balance",
            "check the fractions, or leave the balance out".to_string(),
        ),
        (false, false) => (
            "fractions that add up to 1 exactly",
            format!(
                "{} is missing: name it, or make one \"balance\"",
                exact_text(&left)
            ),
        ),
        (false, true) => (
            "fractions that add up to 1 exactly",
            format!(
                "{} is too much: check, or make one \"balance\"",
                exact_text(&-left)
            ),
        ),
    };
    table.reader().fault(
        FaultCode::Value,
        &table.span,
        format!("fractions that add up to {}", exact_text(&sum)),
        expected,
        advice,
    );
    false
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
