//! Kopp's estimate of a heat capacity, among the values used.

use crate::case::CaseHeatCapacity;
use crate::finding::Span;
use crate::quantity::{Exact, InputUncertainty};

use super::builtin::KOPP;
use super::entry_value::value_of;
use super::given::{constant, decimal};
use super::kopp::{KoppEstimate, kopp_estimate};
use super::path_values::zero_error;
use super::problem::{ValueKind, ValueUsed};
use super::resolve::Resolver;
use super::standing::Standing;

impl Resolver<'_> {
    /// Kopp's estimate, made of the contributions of the atoms.
    pub(super) fn kopp_function(
        &mut self,
        substance: usize,
        given: &CaseHeatCapacity,
    ) -> Option<usize> {
        let source = self.sources.iter().position(|s| s.id() == KOPP)?;
        let species = self.substances[substance].species.clone();
        let estimate = kopp_estimate(&self.sources[source], &species.formula)?;
        let made_of = self.contributions(source, &estimate, &given.span);
        let label = self.substances[substance].label.clone();
        let of_case = given.source.as_ref();
        let value = ValueUsed {
            kind: ValueKind::HeatCapacity,
            source,
            substance: label.clone(),
            species: Some(species),
            name: None,
            cas: None,
            printed: zero_error(),
            significance: estimate.significance,
            uncertainty: InputUncertainty::Standard(estimate.standard),
            function: Some(constant(decimal(&estimate.sum)?, None)),
            made_of,
            locator: match of_case {
                Some(of_case) => format!("substances.{label}, estimate by Kopp's rule; {of_case}"),
                None => format!("substances.{label}, estimate by Kopp's rule"),
            },
            note: Some(estimate.sum_text()),
            standing: Standing::Stated,
            used_at: given.span.clone(),
        };
        self.say_estimated(substance, &estimate, given);
        Some(self.enter_value(value, "kopp"))
    }

    /// The rows of the rule that an estimate rests on. They have no uncertainty of their own: the
    /// rule has one.
    fn contributions(
        &mut self,
        source: usize,
        estimate: &KoppEstimate,
        span: &Span,
    ) -> Vec<(usize, Exact)> {
        let terms = estimate
            .terms
            .iter()
            .map(|t| (&t.entry, &t.printed, t.count.clone()));
        let error = (
            &estimate.error,
            &estimate.error_printed,
            Exact::from_integer(0.into()),
        );
        let mut made_of = Vec::new();
        for (entry, printed, count) in terms.chain([error]) {
            let head = &self.sources[source].head;
            let kind = ValueKind::HeatCapacity;
            let value = ValueUsed {
                uncertainty: InputUncertainty::Exact,
                ..value_of(source, head, kind, entry, printed.clone(), span)
            };
            made_of.push((self.enter_value(value, ""), count));
        }
        made_of
    }
}
