//! What has to be said of a constant heat capacity that serves over a long way.

use num_traits::Signed;

use crate::finding::{FindingCode, Severity, Span};
use crate::quantity::{Exact, exact_text, two_digits};

use super::gas_constant::gas_constant;
use super::heat_capacity::{Form, HeatCapacity};
use super::path::Candidate;
use super::resolve::Resolver;
use super::route::{Route, RouteStep};
use super::walk::{Reach, Stretch, walk};

/// A constant heat capacity over more than this many kelvin carries a caution.
pub(super) const LONG: i64 = 100;

impl Resolver<'_> {
    /// A constant heat capacity over a long way, with what a function would have changed.
    pub(super) fn check_constant(
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
            let r = gas_constant(head);
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
