//! What has to be said of a temperature outside the ranges of a source's functions.

use num_traits::Signed;

use crate::case::AllowedKind;
use crate::finding::{FindingCode, Severity, Span};
use crate::quantity::{Exact, exact_text};

use super::heat_capacity::HeatCapacity;
use super::path::{Candidate, reference_kelvin};
use super::resolve::Resolver;
use super::walk::distance;

/// Why a case says that a path may leave its ranges: the text of the assumption.
pub(super) type Allowance = String;

/// A temperature to which the ranges of an entry's functions do not lead.
pub(super) struct Outside<'a> {
    pub(super) candidate: &'a Candidate,
    pub(super) kelvin: &'a Exact,
    /// Whether the way begins at 298.15 K, with a printed formation enthalpy.
    pub(super) printed: bool,
    /// How far they lead, K.
    pub(super) reached: Option<Exact>,
    pub(super) allowed: Option<Allowance>,
    /// Whether the functions could be followed beyond their ranges.
    pub(super) worked: bool,
}

impl Resolver<'_> {
    /// The assumption that allows a substance to be worked beyond the ranges of its functions.
    pub(super) fn extrapolation_allowed(&self, substance: usize) -> Option<Allowance> {
        let label = &self.substances[substance].label;
        let assumption = self.case.allowed(AllowedKind::Extrapolation, label)?;
        Some(assumption.text.value.clone())
    }

    /// Outside the ranges: a stop, or a caution where the case allows it.
    pub(super) fn say_outside(&mut self, substance: usize, outside: &Outside<'_>, span: &Span) {
        let label = self.substances[substance].label.clone();
        let (severity, what) = outside.consequence(&label);
        let message = format!(
            "{label}: {} gives its heat capacity for {}; {}. {what}",
            self.sources[outside.candidate.source].id(),
            ranges(&outside.candidate.entry.heat_capacity),
            outside.where_to(),
        );
        self.say_of(severity, FindingCode::OutsideRange, message, span);
    }
}

impl Outside<'_> {
    /// Where the temperature lies, or where the ranges end on the way to it.
    fn where_to(&self) -> String {
        let kelvin = exact_text(self.kelvin);
        let ends = self.ends_outside();
        match (ends.is_empty(), &self.reached) {
            (false, _) => ends.join(", and "),
            (true, Some(reached)) => format!(
                "on the way from 298.15 K to {kelvin} K they end at {} K",
                exact_text(reached)
            ),
            (true, None) => format!("they do not lead to {kelvin} K"),
        }
    }

    /// Which ends of the way lie outside all functions, and how far.
    fn ends_outside(&self) -> Vec<String> {
        let functions = &self.candidate.entry.heat_capacity;
        let reference = reference_kelvin();
        let begins = self.printed && !functions.iter().any(|f| f.serves(&reference));
        let ends = [begins.then_some(&reference), Some(self.kelvin)];
        let outside = |at: &Exact| {
            let beyond = distance(functions, at);
            let text = format!(
                "{} K is {} K outside them",
                exact_text(at),
                exact_text(&beyond)
            );
            beyond.is_positive().then_some(text)
        };
        ends.into_iter().flatten().filter_map(outside).collect()
    }

    fn consequence(&self, label: &str) -> (Severity, String) {
        match (&self.allowed, self.worked) {
            (Some(assumption), true) => (
                Severity::Caution,
                format!("Followed beyond them, as the case allows: {assumption}"),
            ),
            (Some(_), false) => (
                Severity::Stop,
                "The case allows it, and still nothing leads there: a gap between ranges is not \
                 crossed, nor is a form followed beyond them that has no formation enthalpy of its \
                 own. Consult a source that reaches."
                    .to_string(),
            ),
            (None, _) => (
                Severity::Stop,
                format!(
                    "Consult a source that reaches further, or allow it by name in an assumption: \
                     allows = {{ extrapolation = [\"{label}\"] }}."
                ),
            ),
        }
    }
}

fn ranges(functions: &[HeatCapacity]) -> String {
    let ranges = functions.iter().filter_map(HeatCapacity::range_kelvin);
    let lines: Vec<String> = ranges
        .map(|[low, high]| format!("{} to {} K", exact_text(&low), exact_text(&high)))
        .collect();
    lines.join(", ")
}
