//! The molar gas constant: among the values used, and as functions were fitted with it.

use crate::finding::{Fault, FaultCode, Span};
use crate::quantity::{Decimal, Exact, Quantity};

use super::builtin::CONSTANTS;
use super::entry_value::value_of;
use super::model::{Entry, SourceHead};
use super::problem::ValueKind;
use super::resolve::Resolver;

impl Resolver<'_> {
    /// The molar gas constant R, J/(mol K), with its row in the table of values used. None where
    /// the source of constants lacks it, as a fault then says.
    pub(super) fn gas_constant_value(&mut self, span: &Span) -> Option<usize> {
        let Some((source, entry, printed)) = self.printed_gas_constant() else {
            self.faults.push(Fault::new(
                FaultCode::Source,
                self.text,
                span,
                format!("{CONSTANTS} without the molar gas constant R"),
                "a source of constants with the entry R",
                "extract the record again, or consult the program's own source",
            ));
            return None;
        };
        let head = &self.sources[source].head;
        let value = value_of(source, head, ValueKind::GasConstant, &entry, printed, span);
        Some(self.enter_value(value, ""))
    }

    fn printed_gas_constant(&self) -> Option<(usize, Entry, Quantity)> {
        let source = self.sources.iter().position(|s| s.id() == CONSTANTS)?;
        let entry = self.sources[source].of_symbol("R")?;
        let printed = entry.value.clone()?;
        Some((source, entry, printed))
    }
}

/// The R that the functions of a source were fitted with, J/(mol K); where it states none it has
/// no function that needs one.
pub(super) fn gas_constant(head: &SourceHead) -> Exact {
    let stated = head.gas_constant.as_ref();
    stated.map_or_else(|| Exact::from_integer(0.into()), Decimal::value)
}
