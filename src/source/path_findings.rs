//! What has to be said of a path: ranges, stability, heat capacities that are missing or constant.

use std::rc::Rc;

use num_traits::Signed;

use crate::case::AllowedKind;
use crate::finding::{Finding, FindingCode, Severity, Span};
use crate::notation::Species;
use crate::quantity::{Exact, exact_text, to_f64, two_digits};

use super::heat_capacity::{Form, HeatCapacity};
use super::model::Entry;
use super::path::{Candidate, Material, Route, RouteStep, on_formation_scale, reference_kelvin};
use super::resolve::Resolver;
use super::solution::is_infinitely_dilute;
use super::walk::{Reach, Stretch, covering, distance, walk};

/// A constant heat capacity over more than this many kelvin carries a caution.
pub(super) const LONG: i64 = 100;

/// Printed value and function further apart than this, in J/mol, carry a caution.
const APART: f64 = 10.0;

/// Why a case says that a path may leave its ranges: the text of the assumption.
pub(super) type Allowance = String;

impl Resolver<'_> {
    /// Says something once.
    pub(super) fn say(&mut self, finding: Finding) {
        if self.said.insert(finding.message.clone()) {
            self.findings.push(finding);
        }
    }

    pub(super) fn say_of(
        &mut self,
        severity: Severity,
        code: FindingCode,
        message: String,
        span: &Span,
    ) {
        let at = self.text.place(span.start);
        self.say(Finding {
            severity,
            code,
            message,
            at,
        });
    }

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

    /// A constant heat capacity over a long way, with what a function would have changed.
    fn check_constant(
        &mut self,
        substance: usize,
        candidates: &[Candidate],
        route: &Route,
        span: &Span,
    ) {
        for step in &route.steps {
            let RouteStep::Stretch(candidate, Stretch::Along { function, from, to }) = step else {
                continue;
            };
            let constant = &candidate.entry.heat_capacity[*function];
            let way = (to - from).abs();
            if constant.form != Form::Constant || way <= Exact::from_integer(LONG.into()) {
                continue;
            }
            let size = self.change(candidates, constant, from, to);
            let message = format!(
                "{}: {} gives a constant heat capacity, used over {} K (from {} K to {} K). {size}",
                self.substances[substance].label,
                self.sources[candidate.source].id(),
                exact_text(&way),
                exact_text(from),
                exact_text(to),
            );
            self.say_of(
                Severity::Caution,
                FindingCode::ConstantHeatCapacity,
                message,
                span,
            );
        }
    }

    /// What the function of another consulted source would make of the same stretch.
    pub(super) fn change(
        &self,
        candidates: &[Candidate],
        constant: &HeatCapacity,
        from: &Exact,
        to: &Exact,
    ) -> String {
        for other in candidates {
            let functions = &other.entry.heat_capacity;
            if functions.iter().all(|f| f.form == Form::Constant) {
                continue;
            }
            let head = &self.sources[other.source].head;
            let Ok(stretches) = walk(functions, from, to, Reach::Stated) else {
                continue;
            };
            let r = super::resolve::gas_constant(head);
            let sum: Option<f64> = stretches
                .iter()
                .map(|s| increment(functions, s, &r))
                .sum::<Option<f64>>();
            let own = constant.increment(from, to, &r).map(|own| own.to_f64());
            if let (Some(sum), Some(own)) = (sum, own) {
                return format!(
                    "The function of {} would change its enthalpy by {} kJ/mol.",
                    head.id,
                    two_digits((sum - own) / 1000.0)
                );
            }
        }
        "No consulted source has a function to compare it with.".to_string()
    }

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
        let r = super::resolve::gas_constant(&self.sources[own.source].head);
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

fn increment(functions: &[HeatCapacity], stretch: &Stretch, r: &Exact) -> Option<f64> {
    let value = match stretch {
        Stretch::Along { function, from, to } => functions[*function].increment(from, to, r)?,
        Stretch::Scale {
            from_function,
            from,
            to_function,
            to,
        } => {
            let end = functions[*to_function].enthalpy(to, r)?;
            end.minus(&functions[*from_function].enthalpy(from, r)?)
        }
    };
    Some(value.to_f64())
}

fn ranges(functions: &[HeatCapacity]) -> String {
    let ranges = functions.iter().filter_map(HeatCapacity::range_kelvin);
    let lines: Vec<String> = ranges
        .map(|[low, high]| format!("{} to {} K", exact_text(&low), exact_text(&high)))
        .collect();
    lines.join(", ")
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
    phase.is_some_and(|phase| phase.label == crate::notation::PhaseLabel::Gas)
}
