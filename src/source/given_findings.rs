//! What has to be said of a heat capacity that the case gives.

use num_traits::Signed;

use crate::case::{CaseHeatCapacity, HeatCapacityStatement};
use crate::finding::{FindingCode, Severity, Span};
use crate::quantity::{Exact, exact_text, two_digits};

use super::constant_findings::LONG;
use super::heat_capacity::lenience;
use super::kopp::KoppEstimate;
use super::outside_range::Allowance;
use super::path::{Material, reference_kelvin};
use super::resolve::Resolver;

impl Resolver<'_> {
    /// Whether the range leads from 298.15 K to the temperature, or may be left.
    pub(super) fn given_reaches(
        &mut self,
        substance: usize,
        given: &CaseHeatCapacity,
        kelvin: &Exact,
        span: &Span,
    ) -> bool {
        let range = match &given.statement {
            HeatCapacityStatement::Value { range, .. }
            | HeatCapacityStatement::Bounds { range, .. } => range,
            HeatCapacityStatement::Kopp => return true,
        };
        let [low, high] = range.each_ref().map(|bound| bound.value_in_si());
        let ends = [reference_kelvin(), kelvin.clone()];
        if self.begins_just_above(substance, &low, &high, kelvin, span) {
            return true;
        }
        let outside = |at: &&Exact| **at < low || **at > high;
        let Some(beyond) = ends
            .iter()
            .filter(outside)
            .max_by_key(|at| distance(at, &low, &high))
        else {
            return true;
        };
        let label = self.substances[substance].label.clone();
        let allowed = self.extrapolation_allowed(substance);
        let (severity, what) = consequence(allowed.as_ref(), &label);
        let message = format!(
            "{label}: the case gives its heat capacity for {} to {} K; {} K is {} K outside. {what}",
            exact_text(&low),
            exact_text(&high),
            exact_text(beyond),
            exact_text(&distance(beyond, &low, &high)),
        );
        self.say_of(severity, FindingCode::OutsideRange, message, span);
        allowed.is_some()
    }

    /// A range that begins up to 2 K above 298.15 K and reaches the temperature, as for the functions
    /// of sources.
    fn begins_just_above(
        &mut self,
        substance: usize,
        low: &Exact,
        high: &Exact,
        kelvin: &Exact,
        span: &Span,
    ) -> bool {
        let late = low - reference_kelvin();
        let serves = late.is_positive() && late <= lenience() && kelvin >= low && kelvin <= high;
        if serves {
            let message = format!(
                "{}: the heat capacity that the case gives begins at {} K and serves from 298.15 K \
                 here.",
                self.substances[substance].label,
                exact_text(low)
            );
            self.say_of(Severity::Note, FindingCode::RangeStart, message, span);
        }
        serves
    }

    /// The checks on a path along what the case gives.
    pub(super) fn check_given(
        &mut self,
        substance: usize,
        function: usize,
        kelvin: &Exact,
        span: &Span,
    ) {
        let material = self.material(substance, span);
        self.check_stability(substance, &material, kelvin, span);
        let Some(constant) = self.values[function].function.clone() else {
            return;
        };
        let reference = reference_kelvin();
        let size = self.change(&material.candidates, &constant, &reference, kelvin);
        self.check_other_source(substance, &material, &size, span);
        let way = (kelvin - reference).abs();
        if way > Exact::from_integer(LONG.into()) {
            let message = format!(
                "{}: a constant heat capacity of the case is used over {} K, to {} K. {size}",
                self.substances[substance].label,
                exact_text(&way),
                exact_text(kelvin),
            );
            let code = FindingCode::ConstantHeatCapacity;
            self.say_of(Severity::Caution, code, message, span);
        }
    }

    /// A source that has what the case gives in its place.
    fn check_other_source(
        &mut self,
        substance: usize,
        material: &Material,
        size: &str,
        span: &Span,
    ) {
        let mut candidates = material.candidates.iter();
        let Some(candidate) = candidates.find(|c| !c.entry.heat_capacity.is_empty()) else {
            return;
        };
        let message = format!(
            "{}: the heat capacity that the case gives is used, although {} has one. {size}",
            self.substances[substance].label,
            self.sources[candidate.source].id(),
        );
        let code = FindingCode::HeatCapacityGiven;
        self.say_of(Severity::Note, code, message, span);
    }

    pub(super) fn say_bounds_refused(&mut self, substance: usize, span: &Span) {
        let message = format!(
            "{}: the case gives two bounds of its heat capacity, and a heating value takes one \
             number. The low bound was taken; give a value with its source instead.",
            self.substances[substance].label
        );
        self.say_of(
            Severity::Stop,
            FindingCode::HeatCapacityBounds,
            message,
            span,
        );
    }

    pub(super) fn say_estimated(
        &mut self,
        substance: usize,
        estimate: &KoppEstimate,
        given: &CaseHeatCapacity,
    ) {
        let message = format!(
            "{}: its heat capacity is estimated by Kopp's rule from the formula, {} J/(mol K) at \
             298 K. The published average absolute error of the rule is 9 %, that is a standard \
             uncertainty of 11.3 % or {} J/(mol K) where errors are normal; a single compound can \
             be farther off, and a heat capacity rises with the temperature.",
            self.substances[substance].label,
            exact_text(&estimate.sum),
            two_digits(estimate.standard),
        );
        let code = FindingCode::HeatCapacityEstimated;
        self.say_of(Severity::Caution, code, message, &given.span);
    }

    /// Without any heat capacity; of a solute it would be a partial molar one.
    pub(super) fn say_no_partial(&mut self, substance: usize, kelvin: &Exact, span: &Span) {
        let message = format!(
            "{}: no consulted source gives its partial molar heat capacity, so its enthalpy at {} K \
             is not known. Those of ions are large and mostly negative: the heat of neutralising \
             a strong acid falls by about 10 % from 25 °C to 50 °C. Consult a source that has it, \
             or declare the solute in [substances] with a heat-capacity and its source.",
            self.substances[substance].label,
            exact_text(kelvin)
        );
        let code = FindingCode::HeatCapacityMissing;
        self.say_of(Severity::Stop, code, message, span);
    }
}

/// How far a temperature lies outside a range, K.
fn distance(kelvin: &Exact, low: &Exact, high: &Exact) -> Exact {
    let (below, above) = (low - kelvin, kelvin - high);
    below.max(above)
}

fn consequence(allowed: Option<&Allowance>, label: &str) -> (Severity, String) {
    match allowed {
        Some(assumption) => (
            Severity::Caution,
            format!("Used beyond it, as the case allows: {assumption}"),
        ),
        None => (
            Severity::Stop,
            format!(
                "State one that reaches, from 298.15 K on, or allow it by name in an assumption: \
                 allows = {{ extrapolation = [\"{label}\"] }}."
            ),
        ),
    }
}
