//! `(stable)` in a gas mixture: refused for what has a vapour there.
//!
//! `(stable)` means condensed forms alone. How much of a substance condenses out of a gas depends
//! on its partial pressure, of which an equation says nothing.

use crate::case::Reaction;
use crate::finding::{FindingCode, Severity};
use crate::notation::{Participant, PhaseLabel, Species};
use crate::quantity::{Exact, to_f64};

use super::model::Entry;
use super::problem::ProblemTerm;
use super::resolve::Resolver;

/// Vapour pressures above this many bar count: 10 Pa.
const COUNTS: f64 = 1e-4;

/// Entropy of vaporisation by Trouton's rule, J/(mol K): about 88 for liquids that do not
/// associate (F. Trouton, Phil. Mag. 18 (1884) 54; the number is common practice, no source).
const TROUTON: f64 = 88.0;

/// J/(mol K), enough digits for an estimate.
const R: f64 = 8.314;

/// ln(p/bar) = (S − L/T)/R with S by Trouton's rule and the enthalpy of vaporisation or
/// sublimation L in J/mol, taken as constant: Clausius and Clapeyron through the boiling point
/// L/S. Good to a power of ten or two, which is enough to tell water from iron.
fn vapour_pressure(enthalpy: f64, kelvin: f64) -> f64 {
    libm::exp((TROUTON - enthalpy / kelvin) / R)
}

impl Resolver<'_> {
    /// A `stop` for each `(stable)` participant that has a vapour beside other gases.
    pub(super) fn check_vapours(
        &mut self,
        reaction: &Reaction,
        terms: &[ProblemTerm],
        kelvin: &Exact,
    ) {
        let equation = &reaction.equation.value;
        let written = equation.left.iter().chain(&equation.right);
        for (term, written) in terms.iter().zip(written) {
            if !asks_for_stable(&written.participant) || !self.has_gases_beside(terms, term) {
                continue;
            }
            let Some(pressure) = self.estimated_vapour(term.substance, kelvin) else {
                continue;
            };
            if pressure < COUNTS {
                continue;
            }
            let label = self.substances[term.substance].label.clone();
            let message = format!(
                "{}: {label} stands beside gases, and its vapour counts at {} K. `(stable)` means \
                 condensed forms alone, and in a gas mixture condensation depends on the partial \
                 pressure. Write the phase that is meant, (l) or (g).",
                reaction.id.value,
                crate::quantity::exact_text(kelvin),
            );
            let place = self.text.inside(&reaction.equation.span, &written.span);
            self.say_of(Severity::Stop, FindingCode::StableInGas, message, &place);
        }
    }

    /// Whether a gas of another composition takes part.
    fn has_gases_beside(&self, terms: &[ProblemTerm], of: &ProblemTerm) -> bool {
        let own = self.substances[of.substance].species.formula.hill();
        terms.iter().any(|term| {
            let species = &self.substances[term.substance].species;
            is_gas(species) && species.formula.hill() != own
        })
    }

    /// Vapour pressure in bar, estimated from the formation enthalpies of the serving source;
    /// none where it lists no vapour.
    fn estimated_vapour(&self, substance: usize, kelvin: &Exact) -> Option<f64> {
        let serving = &self.serving[substance];
        let formula = &self.substances[substance].species.formula;
        let entries = self.sources[serving.source].of_composition(&formula.hill());
        let printed = |entry: &Entry| {
            let enthalpy = entry.formation_enthalpy.as_ref()?;
            Some(to_f64(&enthalpy.value_in_si()))
        };
        let gas = |entry: &&Entry| entry.species().is_some_and(is_gas);
        let vapour = entries.iter().find(gas).and_then(printed)?;
        let condensed = printed(&serving.entry);
        let condensed =
            condensed.or_else(|| entries.iter().filter(|e| !gas(e)).find_map(printed))?;
        Some(vapour_pressure(vapour - condensed, to_f64(kelvin)))
    }
}

fn asks_for_stable(participant: &Participant) -> bool {
    let Participant::Species(species) = participant else {
        return false;
    };
    let phase = species.phase.as_ref();
    phase.is_some_and(|phase| phase.label == PhaseLabel::Stable)
}

fn is_gas(species: &Species) -> bool {
    let phase = species.phase.as_ref();
    phase.is_some_and(|phase| phase.label == PhaseLabel::Gas)
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Enthalpies of vaporisation at 298.15 K from CODATA and NASA values, rounded.
    #[test]
    fn water_has_a_vapour_at_25_degrees_and_iron_none_in_the_blast_furnace() {
        assert!(vapour_pressure(44.0e3, 298.15) > COUNTS);
        assert!(vapour_pressure(44.0e3, 298.15) < 0.0317);
        assert!(vapour_pressure(415.0e3, 1800.0) < COUNTS);
        assert!(vapour_pressure(61.4e3, 500.0) > COUNTS, "mercury");
    }

    #[test]
    fn at_the_boiling_point_by_the_rule_it_is_one_bar() {
        assert!((vapour_pressure(35.2e3, 400.0) - 1.0).abs() < 1e-12);
    }
}
