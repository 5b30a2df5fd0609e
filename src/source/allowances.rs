//! Allowances of a case, checked against the substances that take part in it.

use crate::case::{Allowance, AllowedKind};
use crate::finding::{Fault, FaultCode};

use super::resolve::Resolver;

impl Resolver<'_> {
    /// An allowance for a substance that nothing names is a slip that should not pass.
    pub(super) fn check_allowances(&mut self) {
        let assumptions = &self.case.assumptions;
        let allowances = assumptions.iter().flat_map(|a| &a.allows);
        for allowance in allowances.filter(|a| a.kind == AllowedKind::Extrapolation) {
            if !self.is_participant(&allowance.name.value) {
                let fault = self.not_a_participant(allowance);
                self.faults.push(fault);
            }
        }
    }

    fn not_a_participant(&self, allowance: &Allowance) -> Fault {
        let known: Vec<&str> = self.participants().collect();
        Fault::new(
            FaultCode::UnknownId,
            self.text,
            &allowance.name.span,
            format!(
                "an allowance of {} for `{}`",
                allowance.kind.word(),
                allowance.name.value
            ),
            format!("a participant of a reaction: {}", known.join(", ")),
            "write the substance as it stands in the equation",
        )
    }
}
