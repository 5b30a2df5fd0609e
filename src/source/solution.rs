//! Aqueous participants: how concentrated they are, and what that does to their enthalpies.
//!
//! The sources give ions and other solutes at infinite dilution. A concentration that the case
//! states is judged here, and a relative enthalpy that it gives becomes a leg of the path. A
//! solution of stated dilution, `HCl(aq, 100 H2O)`, is an entry of its own and needs neither.

use crate::case::{AllowedKind, Molality, Reaction};
use crate::finding::{FindingCode, Severity, Span};
use crate::notation::{Phase, Species};
use crate::quantity::{Exact, Quantity};

use super::case_values::{CaseValue, NO_SOURCE};
use super::problem::{BoundedPath, Leg, ProblemTerm, ValueKind};
use super::resolve::Resolver;

/// Up to this molality, in mol/kg, values at infinite dilution serve with a note.
const DILUTE: i64 = 1;

/// What leaving out the heat of dilution costs: hydrogen chloride, as an example of a strong
/// electrolyte (V. B. Parker, Thermal Properties of Aqueous Uni-univalent Electrolytes,
/// NSRDS-NBS 2, 1965; read in a transcription of a handbook's table).
const SIZE: &str = "Of hydrogen chloride, for example, dilution to infinite dilution gives off \
                    0.56, 1.17 and 1.70 kJ/mol from 0.1, 0.5 and 1 mol/kg.";

/// Whether a species is a solute at infinite dilution.
pub(super) fn is_infinitely_dilute(species: &Species) -> bool {
    let phase = species.phase.as_ref();
    phase.is_some_and(Phase::is_infinite_dilution)
}

impl Resolver<'_> {
    /// Takes the molalities of a reaction into account: the paths of solutes whose relative
    /// enthalpy is stated gain a leg, and the others are judged.
    /// Returns what is left out because the case allows it.
    pub(super) fn dissolve(
        &mut self,
        reaction: &Reaction,
        terms: &mut [ProblemTerm],
    ) -> Vec<String> {
        let mut unknown = Vec::new();
        let mut dilute = Vec::new();
        let mut concentrated = Vec::new();
        for term in terms {
            let substance = &self.substances[term.substance];
            if !is_infinitely_dilute(&substance.species) {
                continue;
            }
            let label = substance.label.clone();
            let stated = reaction.molalities.iter();
            let Some(molality) = stated.clone().find(|m| m.participant.value == label) else {
                unknown.push(label);
                continue;
            };
            if molality.relative_enthalpy.is_some() {
                self.add_relative_enthalpy(reaction, molality, term);
            } else if let Some(quantity) = molality.molality.quantity(&self.case.inputs) {
                let line = format!("{label} at {}", without_uncertainty(quantity));
                match quantity.value_in_si() > Exact::from_integer(DILUTE.into()) {
                    true => concentrated.push(line),
                    false => dilute.push(line),
                }
            }
        }
        self.say_concentrations(reaction, &unknown, &dilute, &concentrated);
        self.say_formed(reaction);
        let solutes = concentrated.iter();
        solutes
            .map(|solute| format!("the heat of dilution of {solute}"))
            .collect()
    }

    /// h = h∞ + L_φ for one participant of one reaction.
    fn add_relative_enthalpy(
        &mut self,
        reaction: &Reaction,
        molality: &Molality,
        term: &mut ProblemTerm,
    ) {
        let Some(value) = self.relative_enthalpy(reaction, molality) else {
            return;
        };
        let Some(path) = term.path else { return };
        let dissolved = self.with_leg(path, value);
        let bounded = self.bounded.binary_search_by_key(&path, |b| b.low);
        if let Ok(found) = bounded {
            let high = self.with_leg(self.bounded[found].high, value);
            self.bounded.push(BoundedPath {
                low: dissolved,
                high,
            });
        }
        term.path = Some(dissolved);
    }

    fn with_leg(&mut self, path: usize, value: usize) -> usize {
        let mut dissolved = self.paths[path].clone();
        dissolved.legs.push(Leg::Concentration { value });
        self.paths.push(dissolved);
        self.paths.len() - 1
    }

    /// The relative enthalpy among the values used.
    fn relative_enthalpy(&mut self, reaction: &Reaction, molality: &Molality) -> Option<usize> {
        let given = molality.relative_enthalpy.as_ref()?;
        if let crate::case::Given::Input(id) = given {
            return self.input_value(&id.value);
        }
        let quantity = given.quantity(&self.case.inputs)?.clone();
        let at = molality.molality.quantity(&self.case.inputs)?;
        let label = &molality.participant.value;
        let source = molality.source.as_deref().unwrap_or(NO_SOURCE);
        Some(self.case_value(CaseValue {
            kind: ValueKind::RelativeEnthalpy,
            label: format!("{label} at {}", without_uncertainty(at)),
            species: None,
            quantity,
            locator: format!(
                "reactions.{}, molality of {label}; {source}",
                reaction.id.value
            ),
            note: None,
            span: given.span(),
        }))
    }

    /// Ions that stand unchanged on both sides are not in the equation, and with them the solution
    /// that forms.
    fn say_formed(&mut self, reaction: &Reaction) {
        let mut molalities = reaction.molalities.iter();
        if !molalities.any(|molality| molality.relative_enthalpy.is_some()) {
            return;
        }
        let id = &reaction.id.value;
        let message = format!(
            "{id}: the solution that forms counts as infinitely dilute. Where its heat of dilution \
             matters, state the relative enthalpy of what is consumed less that of what forms."
        );
        let span = &reaction.equation.span;
        self.say_of(Severity::Note, FindingCode::InfiniteDilution, message, span);
    }

    fn say_concentrations(
        &mut self,
        reaction: &Reaction,
        unknown: &[String],
        dilute: &[String],
        concentrated: &[String],
    ) {
        let id = &reaction.id.value;
        let span = &reaction.equation.span;
        if !unknown.is_empty() {
            let message = format!(
                "{id}: the concentration of {} is not stated. The values hold at infinite \
                 dilution. State `molality` in [reactions.{id}], with a relative enthalpy above \
                 {DILUTE} mol/kg.",
                unknown.join(", ")
            );
            let code = FindingCode::ConcentrationNotStated;
            self.say_of(Severity::Note, code, message, span);
        }
        if !dilute.is_empty() {
            let message = format!(
                "{id}: the values hold at infinite dilution; the heat of dilution of {} is left \
                 out. {SIZE}",
                dilute.join(", ")
            );
            self.say_of(Severity::Note, FindingCode::InfiniteDilution, message, span);
        }
        if !concentrated.is_empty() {
            self.say_concentrated(id, concentrated, span);
        }
    }

    /// Beyond what infinite dilution serves for: a stop that an assumption lowers.
    fn say_concentrated(&mut self, id: &str, concentrated: &[String], span: &Span) {
        let solutes = concentrated.join(", ");
        let allowed = self.case.allowed(AllowedKind::InfiniteDilution, id);
        let (severity, what) = match allowed {
            Some(assumption) => {
                let basis = assumption.basis.as_deref().unwrap_or("not stated");
                let text = assumption.text.value.trim().trim_end_matches('.');
                let basis = basis.trim().trim_end_matches('.');
                let what = format!("The case allows it: {text}. Basis: {basis}.");
                (Severity::Caution, what)
            }
            None => (
                Severity::Stop,
                format!(
                    "State its relative-enthalpy with a source, write a solution of stated \
                     dilution in the equation, or allow it in an assumption with its basis: \
                     allows = {{ infinite-dilution = [\"{id}\"] }}. {SIZE}"
                ),
            ),
        };
        let message = format!(
            "{id}: values at infinite dilution are used for {solutes}, above {DILUTE} mol/kg, \
             without a heat of dilution. {what}"
        );
        self.say_of(severity, FindingCode::InfiniteDilution, message, span);
    }
}

/// The number as printed with its unit, for a sentence.
fn without_uncertainty(quantity: &Quantity) -> String {
    format!("{} {}", quantity.printed_number(), quantity.unit.symbol())
}
