//! Resolving a participant: what the case asks for, and the entry that serves.

use std::rc::Rc;

use crate::case::DeclaredKind;
use crate::finding::{Fault, FaultCode, Span};
use crate::notation::{Participant, Species};
use crate::quantity::Exact;

use super::choose::choose;
use super::compare::compare;
use super::matching::Wanted;
use super::path::Candidate;
use super::problem::Substance;
use super::resolve::{Resolver, Serving};
use super::stable::is_stable;

impl Resolver<'_> {
    /// A participant as the case writes it, in the form that it has at a temperature in K.
    pub(super) fn participant(
        &mut self,
        participant: &Participant,
        kelvin: &Exact,
        span: &Span,
    ) -> Option<usize> {
        let label = participant.to_string();
        let wanted = self.wanted(participant);
        // Which form is stable depends on the temperature.
        let stable = wanted.as_ref().is_some_and(is_stable);
        let key = (label, stable.then(|| kelvin.clone()));
        if let Some(known) = self.known.get(&key) {
            return *known;
        }
        let found = wanted.and_then(|wanted| self.substance(&wanted, kelvin, span));
        self.known.insert(key, found);
        found
    }

    /// What the case asks for; none where the reading of the case has reported it already.
    pub(super) fn wanted(&self, participant: &Participant) -> Option<Wanted> {
        match participant {
            Participant::Species(species) => Some(Wanted {
                label: species.to_string(),
                species: species.clone(),
                names: Vec::new(),
                cas: None,
            }),
            Participant::Declared(id) => {
                let declared = self.case.substances.get(id)?;
                let DeclaredKind::Compound { formula, phase } = &declared.kind else {
                    return None;
                };
                // A name that the case gives goes before the id, which is often a short form.
                let name = declared.name.clone().unwrap_or_else(|| id.clone());
                Some(Wanted {
                    label: id.clone(),
                    species: Species {
                        formula: formula.clone(),
                        phase: Some(phase.clone()),
                    },
                    names: vec![name],
                    cas: declared.cas.clone(),
                })
            }
        }
    }

    pub(super) fn substance(
        &mut self,
        wanted: &Wanted,
        kelvin: &Exact,
        span: &Span,
    ) -> Option<usize> {
        let chosen = choose(self, wanted, kelvin, span)?;
        let candidate = Candidate {
            source: chosen.source,
            entry: Rc::new(chosen.entry.clone()),
        };
        let value = self.formation_value(&candidate, span);
        let comparisons = match value {
            Some(value) => compare(self, wanted, &chosen, &self.values[value].clone(), span),
            None => Vec::new(),
        };
        self.serving.push(Serving {
            source: chosen.source,
            entry: chosen.entry.clone(),
            wanted: wanted.clone(),
        });
        // `choose` returns entries of species alone.
        let species = chosen
            .entry
            .species()
            .cloned()
            .unwrap_or(wanted.species.clone());
        self.substances.push(Substance {
            label: wanted.label.clone(),
            species,
            name: chosen.entry.name.clone(),
            source: chosen.source,
            value,
            comparisons,
            because: chosen.because.clone(),
        });
        Some(self.substances.len() - 1)
    }

    /// A choice for a substance that no reaction names is a slip that should not pass.
    pub(super) fn check_choices(&mut self) {
        for choice in &self.case.choices {
            let label = Species::parse(&choice.substance.value)
                .map_or(choice.substance.value.clone(), |species| {
                    species.to_string()
                });
            if !self.is_participant(&label) {
                let known: Vec<&str> = self.participants().collect();
                self.faults.push(Fault::new(
                    FaultCode::UnknownId,
                    self.text,
                    &choice.substance.span,
                    format!("a choice for `{}`", choice.substance.value),
                    format!("a participant of a reaction: {}", known.join(", ")),
                    "write the substance as it stands in the equation",
                ));
            }
        }
    }
}
