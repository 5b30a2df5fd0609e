//! What a path rests on, among the values used.

use crate::finding::Span;
use crate::quantity::{InputUncertainty, Quantity, Significance};

use num_traits::Zero;

use super::entry_value::value_of;
use super::heat_capacity::{Form, HeatCapacity};
use super::model::{Digits, Entry, SourceHead};
use super::path::Candidate;
use super::problem::{ValueKind, ValueUsed};
use super::resolve::Resolver;
use super::standing::Standing;

impl Resolver<'_> {
    /// A heat-capacity function of an entry.
    pub(super) fn function_value(
        &mut self,
        candidate: &Candidate,
        index: usize,
        span: &Span,
    ) -> usize {
        let Candidate { source, entry } = candidate;
        let function = &entry.heat_capacity[index];
        let head = &self.sources[*source].head;
        let printed = error_of(function);
        let mut value = ValueUsed {
            significance: significance(function),
            function: Some(function.clone()),
            ..value_of(*source, head, ValueKind::HeatCapacity, entry, printed, span)
        };
        if entry.standing == Standing::ByDefinition {
            // The zero of the hydrogen ion is agreed, not measured.
            value.significance = Significance::Exact;
            value.uncertainty = InputUncertainty::Exact;
        }
        let key = format!("{index} {}", value.locator);
        self.enter_value(value, &key)
    }

    /// The integration constant of a function on the formation scale: a6 or b1 of H/R, in K. It
    /// takes the place of the formation enthalpy, and no fit states its uncertainty.
    pub(super) fn integration_constant(
        &mut self,
        candidate: &Candidate,
        index: usize,
        span: &Span,
    ) -> Option<usize> {
        let Candidate { source, entry } = candidate;
        let function = &entry.heat_capacity[index];
        let coefficient = function
            .coefficients
            .get(function.form.integration_constant()?)?;
        let mut printed = Quantity::parse(&format!("{} K", coefficient.printed())).ok()?;
        printed.ambiguous_zeros = false;
        let head = &self.sources[*source].head;
        let kind = ValueKind::IntegrationConstant;
        let value = ValueUsed {
            significance: Significance::Unlimited,
            ..value_of(*source, head, kind, entry, printed, span)
        };
        Some(self.enter_value(value, &format!("constant {index}")))
    }

    /// The heat of a transition that an entry lists. What it does not say itself of its place, or
    /// in a note, the entry says.
    pub(super) fn transition_value(
        &mut self,
        candidate: &Candidate,
        index: usize,
        span: &Span,
    ) -> usize {
        let Candidate { source, entry } = candidate;
        let transition = &entry.transitions[index];
        let head = &self.sources[*source].head;
        let printed = transition.enthalpy.clone();
        let kind = ValueKind::TransitionEnthalpy;
        let mut value = value_of(*source, head, kind, entry, printed, span);
        value.substance = format!(
            "{} → {} at {}",
            value.substance, transition.to, transition.temperature
        );
        value.species = None;
        if let Some(locator) = &transition.locator {
            value.locator.clone_from(locator);
        }
        if transition.note.is_some() {
            value.note.clone_from(&transition.note);
        }
        let key = value.substance.clone();
        self.enter_value(value, &key)
    }

    /// The printed formation enthalpy of an entry that is not itself a participant.
    pub(super) fn formation_value(&mut self, candidate: &Candidate, span: &Span) -> Option<usize> {
        let Candidate { source, entry } = candidate;
        let printed = entry.formation_enthalpy.clone()?;
        let head = &self.sources[*source].head;
        let by_convention = self.is_conventional_zero(entry, &printed);
        let mut value = ValueUsed {
            significance: formation_significance(&printed, head),
            ..value_of(
                *source,
                head,
                ValueKind::FormationEnthalpy,
                entry,
                printed,
                span,
            )
        };
        if by_convention {
            value.significance = Significance::Exact;
            value.uncertainty = InputUncertainty::Exact;
        }
        Some(self.enter_value(value, ""))
    }

    /// Whether a printed zero is that of an element in its reference state, which is zero by
    /// convention and limits no digits however it is printed.
    fn is_conventional_zero(&self, entry: &Entry, printed: &Quantity) -> bool {
        let Some(species) = entry.species() else {
            return false;
        };
        let mut elements = species.formula.counts().keys();
        let (Some(element), None) = (elements.next(), elements.next()) else {
            return false;
        };
        // The conventions are always the first source.
        let state = self.sources[0].reference_state(*element);
        printed.decimal.value().is_zero() && state.as_ref() == Some(species)
    }

    /// The index of a value, which is entered once. `key` tells values of one entry apart.
    pub(super) fn enter_value(&mut self, value: ValueUsed, key: &str) -> usize {
        let identity = (
            value.source,
            value.kind.word(),
            [
                value.substance.as_str(),
                value.name.as_deref().unwrap_or(""),
                value.cas.as_deref().unwrap_or(""),
                value.locator.as_str(),
                key,
            ]
            .join("\n"),
        );
        if let Some(index) = self.entered.get(&identity) {
            return *index;
        }
        self.values.push(value);
        self.entered.insert(identity, self.values.len() - 1);
        self.values.len() - 1
    }
}

/// How many digits a formation enthalpy may claim.
pub(super) fn formation_significance(printed: &Quantity, head: &SourceHead) -> Significance {
    match (printed.exact, head.digits) {
        (true, _) => Significance::Exact,
        (false, Digits::FixedDecimals) => Significance::Unlimited,
        (false, Digits::Significant) => printed.significance(),
    }
}

/// The error of a heat capacity of which nothing is stated.
pub(super) fn zero_error() -> Quantity {
    // The unit is one of the unit table.
    Quantity::parse("0 J/(mol K)").expect("a plain quantity")
}

/// The error of a function as a quantity: zero, known as well as the source states.
fn error_of(function: &HeatCapacity) -> Quantity {
    let stated = function.uncertainty.as_ref();
    let width = stated.map_or(String::new(), |u| format!(" ± {}", u.printed()));
    let text = format!("0{width} J/(mol K)");
    // The reader of sources has checked the uncertainty.
    Quantity::parse(&text).unwrap_or_else(|_| zero_error())
}

/// A constant keeps the digits that it was printed with; the coefficients of a fit limit none.
fn significance(function: &HeatCapacity) -> Significance {
    match (function.form, function.coefficients.first()) {
        (Form::Constant, Some(constant)) => Significance::Place(constant.coarsest_place()),
        _ => Significance::Unlimited,
    }
}
