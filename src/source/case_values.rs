//! What the case itself states, among the values used.

use crate::finding::Span;
use crate::notation::Species;
use crate::quantity::{Coverage, InputUncertainty, Quantity};

use super::problem::{ValueKind, ValueUsed};
use super::resolve::Resolver;
use super::standing::Standing;

/// What stands in a locator where the case names no source.
pub const NO_SOURCE: &str = "no source stated";

/// A value that a case states where it is used.
pub(super) struct CaseValue<'a> {
    pub(super) kind: ValueKind,
    /// What it is the value of, in plain words or notation.
    pub(super) label: String,
    pub(super) species: Option<Species>,
    pub(super) quantity: Quantity,
    /// Where it stands and what it was taken from: "cycles.x, step 2; report RC-26-014, table 3".
    pub(super) locator: String,
    pub(super) note: Option<String>,
    pub(super) span: &'a Span,
}

impl Resolver<'_> {
    /// The value of an input; one value however often it is used. None where there is no such
    /// input, as the reading of the case has then reported.
    pub(super) fn input_value(&mut self, id: &str) -> Option<usize> {
        let input = self.case.inputs.get(id)?;
        let value = input.value.value.clone();
        let quantity = match &input.tolerance {
            // The reader of inputs has checked that the tolerance fits.
            Some(tolerance) => value.clone().with_tolerance(tolerance).unwrap_or(value),
            None => value,
        };
        let source = input.source.as_deref().unwrap_or(NO_SOURCE);
        let span = input.value.span.clone();
        Some(self.case_value(CaseValue {
            kind: ValueKind::Input,
            label: id.to_string(),
            species: None,
            quantity,
            locator: format!("inputs.{id}; {source}"),
            note: None,
            span: &span,
        }))
    }

    /// A value of the case with its row in the table of values used.
    pub(super) fn case_value(&mut self, stated: CaseValue<'_>) -> usize {
        let quantity = stated.quantity;
        let uncertainty = match &quantity.uncertainty {
            _ if quantity.exact => InputUncertainty::Exact,
            None => InputUncertainty::NotStated,
            Some(u) => InputUncertainty::Standard(u.standard(&Coverage::default())),
        };
        let value = ValueUsed {
            source: self.case_source,
            kind: stated.kind,
            substance: stated.label,
            species: stated.species,
            name: None,
            cas: None,
            significance: quantity.significance(),
            uncertainty,
            printed: quantity,
            function: None,
            made_of: Vec::new(),
            locator: stated.locator,
            note: stated.note,
            standing: Standing::Stated,
            used_at: stated.span.clone(),
        };
        self.enter_value(value, "")
    }
}
