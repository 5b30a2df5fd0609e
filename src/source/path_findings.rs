//! What has to be said of a path: heat capacities that are missing, forms that are not stable, values
//! that disagree.

use crate::finding::{FindingCode, Severity, Span};
use crate::quantity::{Exact, exact_text, to_f64, two_digits};

use super::gas_constant::gas_constant;
use super::instability::stable_instead;
use super::path::{Candidate, Material, on_formation_scale, reference_kelvin};
use super::resolve::Resolver;
use super::route::{Route, RouteStep};
use super::solution::is_infinitely_dilute;
use super::walk::{Reach, Stretch, covering};

/// Printed value and function further apart than this, in J/mol, carry a caution.
const APART: f64 = 10.0;

impl Resolver<'_> {
    pub(super) fn say_missing(&mut self, substance: usize, kelvin: &Exact, span: &Span) {
        if is_infinitely_dilute(&self.substances[substance].species) {
            return self.say_no_partial(substance, kelvin, span);
        }
        let message = format!(
            "{}: no consulted source gives a heat capacity, so its enthalpy at {} K is not known. \
             Consult a source that has one, or give one in [substances]: a value with its source, \
             a low and a high bound, or an estimate.",
            self.substances[substance].label,
            exact_text(kelvin)
        );
        self.say_of(
            Severity::Stop,
            FindingCode::HeatCapacityMissing,
            message,
            span,
        );
    }

    /// The checks on a route that was found.
    pub(super) fn check_route(
        &mut self,
        substance: usize,
        material: &Material,
        route: &Route,
        kelvin: &Exact,
        span: &Span,
    ) {
        self.check_start(substance, route, span);
        self.check_constant(substance, &material.candidates, route, span);
        self.check_stability(substance, material, kelvin, span);
    }

    /// A function that begins just above 298.15 K.
    fn check_start(&mut self, substance: usize, route: &Route, span: &Span) {
        let reference = reference_kelvin();
        let Some(RouteStep::Stretch(candidate, stretch)) = route.steps.first() else {
            return;
        };
        let first = match stretch {
            Stretch::Along { function, .. } => *function,
            Stretch::Scale { from_function, .. } => *from_function,
        };
        let function = &candidate.entry.heat_capacity[first];
        let Some([low, _]) = function.range_kelvin().filter(|[low, _]| *low > reference) else {
            return;
        };
        if low > &reference + Exact::from_integer(2.into()) {
            return;
        }
        let message = format!(
            "{}: its function in {} begins at {} K and serves from 298.15 K here.",
            self.substances[substance].label,
            self.sources[candidate.source].id(),
            exact_text(&low)
        );
        self.say_of(Severity::Note, FindingCode::RangeStart, message, span);
    }

    /// A form that its source calls unstable at the temperature is worked as stated.
    pub(super) fn check_stability(
        &mut self,
        substance: usize,
        material: &Material,
        kelvin: &Exact,
        span: &Span,
    ) {
        // The source of the formation enthalpy first, then those that have the very form.
        let candidates = material.candidates.iter().zip(&material.forms);
        let said = candidates.into_iter().find_map(|(candidate, forms)| {
            let instead = stable_instead(forms, &candidate.entry, kelvin)?;
            Some((candidate.source, instead))
        });
        let Some((source, instead)) = said else {
            return;
        };
        let message = format!(
            "{}: by {} {instead}. It is worked as stated; `(stable)` in place of the phase would \
             take the form that the source gives there.",
            self.substances[substance].label,
            self.sources[source].id(),
        );
        self.say_of(Severity::Caution, FindingCode::UnstableForm, message, span);
    }

    /// The printed formation enthalpy and the integration constant should say the same.
    pub(super) fn check_scale(&mut self, substance: usize, own: &Candidate, span: &Span) {
        let reference = reference_kelvin();
        let functions = &own.entry.heat_capacity;
        let Some(index) = covering(functions, &reference, Reach::Stated) else {
            return;
        };
        let function = &functions[index];
        let (Some(printed), true) = (
            &own.entry.formation_enthalpy,
            on_formation_scale(function.form),
        ) else {
            return;
        };
        let r = gas_constant(&self.sources[own.source].head);
        let Some(worked) = function.enthalpy(&reference, &r) else {
            return;
        };
        let apart = worked.to_f64() - to_f64(&printed.value_in_si());
        if f64::abs(apart) <= APART {
            return;
        }
        let message = format!(
            "{}: {} prints a formation enthalpy of {printed}, and its function gives {} kJ/mol \
             more at 298.15 K. One of the two is likely to be wrong; the printed value is used, \
             and of the function its increments.",
            self.substances[substance].label,
            self.sources[own.source].id(),
            two_digits(apart / 1000.0),
        );
        self.say_of(
            Severity::Caution,
            FindingCode::FunctionAndValue,
            message,
            span,
        );
    }
}
