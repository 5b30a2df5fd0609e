//! The atomic weights that a heat per mass needs.

use crate::case::Reaction;
use crate::finding::{Fault, FaultCode, Span};
use crate::notation::Species;
use crate::quantity::Exact;

use super::builtin::ATOMIC_WEIGHTS;
use super::entry_value::value_of;
use super::problem::ValueKind;
use super::resolve::Resolver;

impl Resolver<'_> {
    /// The atomic weights that make up a molar mass, with the counts of atoms.
    pub(super) fn molar_mass(
        &mut self,
        reaction: &Reaction,
        species: &Species,
    ) -> Vec<(usize, Exact)> {
        let span = &reaction.equation.span;
        if species.formula.charge() != 0 {
            self.refuse_mass_of_ion(reaction, species);
            return Vec::new();
        }
        self.weights(species, span)
    }

    /// The atomic weights of a neutral substance.
    pub(super) fn weights(&mut self, species: &Species, span: &Span) -> Vec<(usize, Exact)> {
        let counts = species.formula.counts().clone();
        let weights = counts.into_iter().filter_map(|(element, count)| {
            Some((self.atomic_weight(element.symbol(), span)?, count))
        });
        weights.collect()
    }

    /// A result that cannot be there must not be asked for.
    fn refuse_mass_of_ion(&mut self, reaction: &Reaction, species: &Species) {
        let name = format!("{}.heat-per-mass", reaction.id.value);
        let rounded = self
            .case
            .rounding
            .iter()
            .find(|rule| rule.result.value == name);
        let bound = self
            .case
            .prose
            .iter()
            .find(|p| p.markdown.value.contains(&format!("{{{name}}}")));
        let span = rounded.map(|rule| rule.result.span.clone());
        let Some(span) = span.or_else(|| bound.map(|prose| prose.markdown.span.clone())) else {
            return;
        };
        self.faults.push(Fault::new(
            FaultCode::Value,
            self.text,
            &span,
            format!("`{name}`"),
            format!(
                "a result that is there: {species} is an ion, and no mass of it alone is weighed"
            ),
            format!(
                "use {}.heat-per, or name a neutral substance in `per`",
                reaction.id.value
            ),
        ));
    }

    pub(super) fn atomic_weight(&mut self, symbol: &str, span: &Span) -> Option<usize> {
        if let Some(index) = self.atomic_weights.get(symbol) {
            return Some(*index);
        }
        let source = self.sources.iter().position(|s| s.id() == ATOMIC_WEIGHTS)?;
        let head = &self.sources[source].head;
        let Some(entry) = self.sources[source].of_symbol(symbol) else {
            self.faults.push(Fault::new(
                FaultCode::UnknownSubstance,
                self.text,
                span,
                format!("the element {symbol}"),
                format!("an element with a standard atomic weight in {ATOMIC_WEIGHTS}"),
                "leave `per` out: its molar mass is not known here",
            ));
            return None;
        };
        let printed = entry.atomic_weight.clone()?;
        let value = value_of(source, head, ValueKind::AtomicWeight, &entry, printed, span);
        self.values.push(value);
        self.atomic_weights
            .insert(symbol.to_string(), self.values.len() - 1);
        Some(self.values.len() - 1)
    }
}
