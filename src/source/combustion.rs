//! Combustion enthalpies that the consulted sources list.

use std::collections::BTreeSet;

use num_traits::Signed;

use crate::finding::{Fault, FaultCode, Finding, FindingCode, Located, Severity};
use crate::notation::{Equation, Participant, PhaseLabel, Species};
use crate::quantity::{Exact, Quantity};

use super::choose::choice_for;
use super::cycle::CycleSpecies;
use super::entry_value::value_of;
use super::identity_findings::note_identity;
use super::matching::{Match, pick};
use super::model::Entry;
use super::path::reference_kelvin;
use super::path_values::formation_significance;
use super::problem::{ValueKind, ValueUsed};
use super::resolve::Resolver;
use super::suggest::ambiguous;

impl Resolver<'_> {
    /// The combustion enthalpy of a participant from the source that the case chose, or else the
    /// first in its order that lists one; an index among the values used.
    pub(super) fn combustion_value(&mut self, named: &Located<String>) -> Option<usize> {
        let participant = Participant::parse(&named.value).ok()?;
        let wanted = self.wanted(&participant)?;
        let span = &named.span;
        self.looked_up.insert(wanted.label.clone());
        let mut found: Vec<(usize, Entry)> = Vec::new();
        for source in 0..self.consulted {
            let entries = self.sources[source].of_composition(&wanted.species.formula.hill());
            let with_value = entries
                .into_iter()
                .filter(|e| e.combustion_enthalpy.is_some());
            match pick(&wanted, &with_value.collect::<Vec<_>>()) {
                Match::None => {}
                Match::One(entry) => found.push((source, *entry)),
                Match::Several(several) => {
                    let fault = ambiguous(self, &wanted, span, source, &several);
                    self.faults.push(fault);
                    return None;
                }
            }
        }
        let chosen = choice_for(self, &wanted).map(|choice| choice.source.value.clone());
        let chosen =
            chosen.and_then(|id| found.iter().position(|(s, _)| self.sources[*s].id() == id));
        let Some((source, entry)) = found.get(chosen.unwrap_or(0)).cloned() else {
            self.no_combustion(named);
            return None;
        };
        note_identity(self, &wanted, &reference_kelvin(), span, &entry);
        let printed = entry.combustion_enthalpy.clone()?;
        Some(self.enter_combustion(named, source, &entry, printed))
    }

    /// A combustion enthalpy among the values used; a `stop` where it is not negative.
    pub(super) fn enter_combustion(
        &mut self,
        named: &Located<String>,
        source: usize,
        entry: &Entry,
        printed: Quantity,
    ) -> usize {
        if !printed.decimal.value().is_negative() {
            self.not_released(named, source);
        }
        let head = &self.sources[source].head;
        let significance = formation_significance(&printed, head);
        let value = ValueUsed {
            significance,
            ..value_of(
                source,
                head,
                ValueKind::CombustionEnthalpy,
                entry,
                printed,
                &named.span,
            )
        };
        self.enter_value(value, "")
    }

    /// Tables do not always print which products their heats of combustion are for.
    pub(super) fn check_products(
        &mut self,
        burnt: &Located<String>,
        equation: &Located<Equation>,
        species: &[CycleSpecies],
        numbers: &[Exact],
    ) {
        let formed = species.iter().zip(numbers);
        let formed = formed.filter(|(_, nu)| nu.is_positive());
        let formed: Vec<&Species> = formed.map(|(s, _)| &s.species).collect();
        let Some(doubt) = doubt(&formed) else {
            return;
        };
        self.findings.push(Finding {
            severity: Severity::Caution,
            code: FindingCode::CombustionProducts,
            message: format!(
                "the combustion enthalpy of `{}` is used with an equation that says {doubt}. \
                 Compare the equation with what the table says of its products.",
                burnt.value
            ),
            at: self.text.place(equation.span.start),
        });
    }

    fn no_combustion(&mut self, named: &Located<String>) {
        let consulted = self.sources[..self.consulted].iter().map(|s| s.id());
        let consulted: Vec<&str> = consulted.collect();
        self.faults.push(Fault::new(
            FaultCode::UnknownSubstance,
            self.text,
            &named.span,
            format!("`{}`", named.value),
            format!(
                "a substance whose combustion enthalpy a consulted source lists ({})",
                consulted.join(", ")
            ),
            "consult a source that lists it, or state the heat in the step",
        ));
    }

    /// Some tables print heats of combustion as positive numbers.
    fn not_released(&mut self, named: &Located<String>, source: usize) {
        self.findings.push(Finding {
            severity: Severity::Stop,
            code: FindingCode::CombustionSign,
            message: format!(
                "{} gives the combustion enthalpy of `{}` as no heat released: it is not \
                 negative. Enter it with the sign of an enthalpy change.",
                self.sources[source].id(),
                named.value
            ),
            at: self.text.place(named.span.start),
        });
    }
}

/// What tables may mean otherwise of the products that an equation forms.
fn doubt(formed: &[&Species]) -> Option<String> {
    let gas = |s: &Species| s.phase.as_ref().is_some_and(|p| p.label == PhaseLabel::Gas);
    if formed.iter().any(|s| gas(s) && s.formula.hill() == "H2O") {
        let water = "that water forms as a gas, and most tables take it as a liquid, 44 kJ/mol \
                     apart";
        return Some(water.to_string());
    }
    let elements = formed.iter().flat_map(|s| s.formula.counts().keys());
    let others: BTreeSet<&str> = elements
        .map(|element| element.symbol())
        .filter(|symbol| !["C", "H", "O", "N"].contains(symbol))
        .collect();
    let others: Vec<&str> = others.into_iter().collect();
    (!others.is_empty()).then(|| {
        format!(
            "products with {}, for which tables differ (sulfur dioxide or sulfuric acid, hydrogen \
             halide as a gas or in water)",
            others.join(", ")
        )
    })
}
