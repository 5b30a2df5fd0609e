//! Reading a fraction of a composition.

use num_traits::{One, Signed};

use crate::document::{Reader, is_id, one_of, value_fault};
use crate::finding::{Located, nearest, shorten};
use crate::quantity::{Dimension, Exact, FractionBasis, Quantity, UnitKind};

use super::composition::{Context, Share};
use super::given::{Given, Wanted, read_given};

pub(super) fn read_share(
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
        let near = nearest(&text.value, words.iter().map(|w| w.0), 1);
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
        format!("\"{}\", of {} basis", text.value, basis_word(own)),
        format!(
            "fractions of the composition's basis, {}",
            basis_word(basis)
        ),
        "give all fractions on one basis",
    );
    false
}

/// The word that a case has for a basis.
pub(super) const fn basis_word(basis: FractionBasis) -> &'static str {
    match basis {
        FractionBasis::Amount => "mole",
        FractionBasis::Mass => "mass",
        FractionBasis::Volume => "volume",
    }
}
