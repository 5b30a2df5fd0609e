//! What a source says of a form that is not the stable one at a temperature.

use std::rc::Rc;

use crate::notation::{PhaseLabel, Species};
use crate::quantity::Exact;

use super::model::Entry;

/// What a source says where a form is not the stable one at a temperature.
pub(super) fn stable_instead(entries: &[Rc<Entry>], own: &Entry, kelvin: &Exact) -> Option<String> {
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
