//! What has to be said of a form that is not the stable one at a temperature.

use std::rc::Rc;

use crate::finding::{FindingCode, Severity, Span};
use crate::notation::{PhaseLabel, Species};
use crate::quantity::Exact;

use super::model::Entry;
use super::path::Material;
use super::resolve::Resolver;

impl Resolver<'_> {
    /// A form that its source calls unstable at the temperature is worked as stated.
    pub(super) fn check_stability(
        &mut self,
        substance: usize,
        material: &Material,
        kelvin: &Exact,
        span: &Span,
    ) {
        let own = &material.candidates[0];
        let Some(instead) = stable_instead(&material.forms, &own.entry, kelvin) else {
            return;
        };
        let message = format!(
            "{}: by {} {instead}. It is worked as stated; `(stable)` in place of the phase would \
             take the form that the source gives there.",
            self.substances[substance].label,
            self.sources[own.source].id(),
        );
        self.say_of(Severity::Caution, FindingCode::UnstableForm, message, span);
    }
}

/// What a source says where a form is not the stable one at a temperature.
fn stable_instead(entries: &[Rc<Entry>], own: &Entry, kelvin: &Exact) -> Option<String> {
    for transition in &own.transitions {
        let at = transition.temperature.value_in_si();
        if *kelvin > at && !is_gas(own.species()) {
            return Some(format!(
                "it turns into {} at {}",
                transition.to, transition.temperature
            ));
        }
    }
    let into_own = |entry: &Rc<Entry>| {
        let mut transitions = entry.transitions.iter();
        let found = transitions.find(|t| own.notations().any(|s| *s == t.to))?;
        let at = found.temperature.value_in_si();
        (*kelvin < at && !is_gas(own.species())).then(|| {
            let form = entry.species().map_or_else(String::new, Species::to_string);
            format!("it forms from {form} at {} only", found.temperature)
        })
    };
    entries.iter().find_map(into_own)
}

/// A vapour below its boiling point has a partial pressure of its own.
fn is_gas(species: Option<&Species>) -> bool {
    let phase = species.and_then(|species| species.phase.as_ref());
    phase.is_some_and(|phase| phase.label == PhaseLabel::Gas)
}
