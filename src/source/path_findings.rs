//! What has to be said of a path: ranges, heat capacities that are missing, values that disagree.

use num_traits::Signed;

use crate::case::AllowedKind;
use crate::finding::{FindingCode, Severity, Span};
use crate::quantity::{Exact, exact_text, to_f64, two_digits};

use super::gas_constant::gas_constant;
use super::heat_capacity::HeatCapacity;
use super::path::{Candidate, Material, on_formation_scale, reference_kelvin};
use super::resolve::Resolver;
use super::route::{Route, RouteStep};
use super::solution::is_infinitely_dilute;
use super::walk::{Reach, Stretch, covering, distance};

/// Printed value and function further apart than this, in J/mol, carry a caution.
const APART: f64 = 10.0;

/// Why a case says that a path may leave its ranges: the text of the assumption.
pub(super) type Allowance = String;

impl Resolver<'_> {
    /// The assumption that allows a substance to be worked beyond the ranges of its functions.
    pub(super) fn extrapolation_allowed(&self, substance: usize) -> Option<Allowance> {
        let label = &self.substances[substance].label;
        let assumption = self.case.allowed(AllowedKind::Extrapolation, label)?;
        Some(assumption.text.value.clone())
    }

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

    /// Outside the ranges: a stop, or a caution where the case allows it.
    pub(super) fn say_outside(
        &mut self,
        substance: usize,
        candidate: &Candidate,
        kelvin: &Exact,
        reached: Option<Exact>,
        allowed: Option<Allowance>,
        worked: bool,
        span: &Span,
    ) {
        let label = self.substances[substance].label.clone();
        let functions = &candidate.entry.heat_capacity;
        let beyond = distance(functions, kelvin);
        let where_to = match (beyond.is_positive(), reached) {
            (true, _) => format!(
                "{} K is {} K outside them",
                exact_text(kelvin),
                exact_text(&beyond)
            ),
            (false, Some(reached)) => format!(
                "on the way from 298.15 K to {} K they end at {} K",
                exact_text(kelvin),
                exact_text(&reached)
            ),
            (false, None) => format!("they do not lead to {} K", exact_text(kelvin)),
        };
        let source = self.sources[candidate.source].id().to_string();
        let ranges = ranges(functions);
        let (severity, what) = match (allowed, worked) {
            (Some(assumption), true) => (
                Severity::Caution,
                format!("Followed beyond them, as the case allows: {assumption}"),
            ),
            (Some(_), false) => (
                Severity::Stop,
                "A table cannot be followed beyond its points, nor a gap be crossed.".to_string(),
            ),
            (None, _) => (
                Severity::Stop,
                format!(
                    "Consult a source that reaches further, or allow it by name in an assumption: \
                     allows = {{ extrapolation = [\"{label}\"] }}."
                ),
            ),
        };
        let message =
            format!("{label}: {source} gives its heat capacity for {ranges}; {where_to}. {what}");
        self.say_of(severity, FindingCode::OutsideRange, message, span);
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

fn ranges(functions: &[HeatCapacity]) -> String {
    let ranges = functions.iter().filter_map(HeatCapacity::range_kelvin);
    let lines: Vec<String> = ranges
        .map(|[low, high]| format!("{} to {} K", exact_text(&low), exact_text(&high)))
        .collect();
    lines.join(", ")
}
