//! Where a quantity may stand: the quantity itself, an input by its id, or another result.

use indexmap::IndexMap;

use crate::document::{Reader, is_id, quantity};
use crate::finding::{FaultCode, Located, Span};
use crate::quantity::{Dimension, Quantity, UnitKind};
use num_traits::Signed;

use super::ids::{IdKind, Ids};
use super::model::Input;

/// A quantity as a case gives it.
#[derive(Clone, Debug, PartialEq)]
pub enum Given {
    /// Written where it is used.
    Stated(Box<Located<Quantity>>),
    /// The id of an input.
    Input(Located<String>),
    /// `id.quantity`, a result of this case.
    Result(Located<String>),
}

impl Given {
    pub fn span(&self) -> &Span {
        match self {
            Given::Stated(quantity) => &quantity.span,
            Given::Input(name) | Given::Result(name) => &name.span,
        }
    }

    /// The quantity, where it is known before anything is worked.
    pub fn quantity<'a>(&'a self, inputs: &'a IndexMap<String, Input>) -> Option<&'a Quantity> {
        match self {
            Given::Stated(quantity) => Some(&quantity.value),
            Given::Input(id) => inputs.get(&id.value).map(|input| &input.value.value),
            Given::Result(_) => None,
        }
    }
}

/// What may stand in a place.
#[derive(Clone, Copy, Debug)]
pub(super) struct Wanted {
    pub(super) dimension: Dimension,
    /// Whether a result of this case may stand there; [`super::results`] checks its name.
    pub(super) results: bool,
    /// What is expected, in words, and how it is written.
    pub(super) expected: &'static str,
    pub(super) advice: &'static str,
}

/// Reads a quantity, the id of an input or the name of a result.
pub(super) fn read_given(
    reader: &Reader<'_>,
    ids: &Ids,
    inputs: &IndexMap<String, Input>,
    text: &Located<String>,
    wanted: &Wanted,
) -> Option<Given> {
    let given = if is_id(&text.value) {
        if !inputs.contains_key(&text.value) {
            if ids.kind(&text.value) != Some(IdKind::Input) {
                ids.unknown(reader, &text.value, &text.span, &[IdKind::Input]);
            }
            return None;
        }
        Given::Input(text.clone())
    } else if wanted.results && is_result_name(&text.value) {
        return Some(Given::Result(text.clone()));
    } else {
        Given::Stated(Box::new(quantity(reader, text)?))
    };
    let fits = given
        .quantity(inputs)
        .is_some_and(|q| q.unit.dimension() == wanted.dimension);
    if !fits {
        refuse(reader, text, wanted);
        return None;
    }
    Some(given)
}

/// A temperature above absolute zero.
pub(super) fn read_temperature(
    reader: &Reader<'_>,
    ids: &Ids,
    inputs: &IndexMap<String, Input>,
    text: &Located<String>,
) -> Option<Given> {
    let wanted = Wanted {
        dimension: Dimension::TEMPERATURE,
        results: false,
        expected: "a temperature",
        advice: "write it as \"25 °C\" or \"298.15 K\"",
    };
    let given = read_given(reader, ids, inputs, text, &wanted)?;
    let quantity = given.quantity(inputs)?;
    if quantity.unit.kind() == UnitKind::Difference {
        refuse(reader, text, &wanted);
        return None;
    }
    if !quantity.value_in_si().is_positive() {
        let above = Wanted {
            expected: "a temperature above absolute zero",
            advice: "check the number and its unit",
            ..wanted
        };
        refuse(reader, text, &above);
        return None;
    }
    if matches!(given, Given::Stated(_)) && quantity.uncertainty.is_some() {
        let certain = Wanted {
            expected: "a temperature without an uncertainty: it says what is asked",
            advice: "leave it out, or write an input with its tolerance and give the id of that",
            ..wanted
        };
        refuse(reader, text, &certain);
        return None;
    }
    Some(given)
}

fn refuse(reader: &Reader<'_>, text: &Located<String>, wanted: &Wanted) {
    reader.fault(
        FaultCode::Quantity,
        &text.span,
        format!("\"{}\"", text.value),
        wanted.expected,
        wanted.advice,
    );
}

/// `hydrogenation.heat`; a quantity begins with a digit, a sign or `exact`.
fn is_result_name(text: &str) -> bool {
    text.split_once('.')
        .is_some_and(|(id, quantity)| is_id(id) && is_id(quantity))
}
