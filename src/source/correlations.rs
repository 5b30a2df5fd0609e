//! The correlations that sources state, between values used.

use crate::finding::{Fault, FaultCode};
use crate::notation::Species;
use crate::quantity::{Correlations, to_f64};

use super::problem::ValueKind;
use super::resolve::Resolver;
use super::store::Source;

impl Resolver<'_> {
    /// Correlations that cannot all be true would make a variance negative.
    pub(super) fn check_correlations(&mut self) {
        let used: Vec<usize> = (0..self.values.len()).collect();
        let (found, expected, advice) = match self.correlations().is_consistent(&used) {
            Ok(true) => return,
            Err(error) => (error.found(), error.expected(), error.advice()),
            Ok(false) => (
                "correlations that contradict each other".to_string(),
                "coefficients that can all be true together (JCGM 100:2008, 5.2)".to_string(),
                "compare the coefficients with the source".to_string(),
            ),
        };
        let with_any = self
            .sources
            .iter()
            .filter(|source| !source.correlations.is_empty());
        let mut ids: Vec<&str> = with_any.map(Source::id).collect();
        let cycles = self.case.cycles.values();
        let cycles = cycles.filter(|cycle| !cycle.correlations.is_empty());
        let correlated: Vec<_> = cycles.map(|cycle| &cycle.id).collect();
        ids.extend(correlated.iter().map(|id| id.value.as_str()));
        let cycle = correlated.first().map(|id| id.span.clone());
        let consult = self.case.consult.first().map(|name| name.span.clone());
        let span = cycle.or(consult).unwrap_or(0..0);
        self.faults.push(Fault::new(
            FaultCode::Source,
            self.text,
            &span,
            format!("{found} ({})", ids.join(", ")),
            expected,
            advice,
        ));
    }

    /// Correlations that the sources state, between values used.
    pub(super) fn correlations(&self) -> Correlations {
        let mut correlations = self.stated_correlations.clone();
        for (index, source) in self.sources.iter().enumerate() {
            for stated in &source.correlations {
                let of = |wanted: &Species| {
                    let name = wanted.to_string();
                    self.values.iter().position(|v| {
                        v.source == index
                            && v.substance == name
                            && v.kind == ValueKind::FormationEnthalpy
                    })
                };
                if let (Some(a), Some(b)) = (of(&stated.between[0]), of(&stated.between[1])) {
                    // The reader of sources has checked that the coefficient is one.
                    let _ = correlations.state(a, b, to_f64(&stated.coefficient.value()));
                }
            }
        }
        correlations
    }
}
