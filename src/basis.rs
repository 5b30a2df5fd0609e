//! What a case rests on that is not yet confirmed, and what its inputs leave open.

use crate::case::{Case, Hold, Status};
use crate::finding::{Finding, FindingCode, Severity, Span, Text};

/// Findings about holds, unconfirmed statements and digits that cannot be counted.
pub fn check(case: &Case, text: &Text) -> Vec<Finding> {
    let mut findings = Vec::new();
    for item in unconfirmed(case) {
        findings.extend(item.finding(case.record.status.value, text));
    }
    findings.extend(uncounted_zeros(case, text));
    findings
}

/// An assumption or an input that is not confirmed.
struct Unconfirmed<'a> {
    what: String,
    hold: Option<&'a Hold>,
    span: Span,
}

fn unconfirmed(case: &Case) -> Vec<Unconfirmed<'_>> {
    let assumptions = case.assumptions.iter().enumerate();
    let assumptions = assumptions
        .filter(|(_, a)| !a.confirmed)
        .map(|(i, a)| Unconfirmed {
            what: format!("Assumption {}", i + 1),
            hold: a.hold.as_ref(),
            span: a.text.span.clone(),
        });
    let inputs = case.inputs.values().filter(|input| !input.confirmed);
    let inputs = inputs.map(|input| Unconfirmed {
        what: format!("Input `{}`", input.id.value),
        hold: input.hold.as_ref(),
        span: input.id.span.clone(),
    });
    assumptions.chain(inputs).collect()
}

impl Unconfirmed<'_> {
    fn finding(&self, status: Status, text: &Text) -> Option<Finding> {
        let (severity, code, message) = match self.hold {
            None => (
                self.blocking(status, Severity::Caution),
                FindingCode::Unconfirmed,
                format!(
                    "{} is not confirmed and no hold says who will close it: add hold = {{ \
                     owner, closed-by }}, or confirmed = true.",
                    self.what
                ),
            ),
            Some(hold) if status == Status::Issued => self.open_hold(hold),
            Some(_) => return None,
        };
        Some(Finding {
            severity,
            code,
            message,
            at: text.place(self.span.start),
        })
    }

    /// What is not confirmed keeps a record from `issued`.
    fn blocking(&self, status: Status, otherwise: Severity) -> Severity {
        match status {
            Status::Issued => Severity::Stop,
            _ => otherwise,
        }
    }

    fn open_hold(&self, hold: &Hold) -> (Severity, FindingCode, String) {
        let open = format!(
            "{}: the hold is open (owner: {}; closed by: {})",
            self.what, hold.owner, hold.closed_by
        );
        match &hold.accepted_by {
            Some(name) => (
                Severity::Caution,
                FindingCode::HoldOpen,
                format!("{open}; {name} accepts that the record is issued with it."),
            ),
            None => (
                Severity::Stop,
                FindingCode::HoldOpen,
                format!(
                    "{open}; a record with an open hold is not issued unless the hold says who \
                     accepts that: accepted-by = \"…\"."
                ),
            ),
        }
    }
}

/// ASTM E29: an integer with trailing zeros has digits that nobody can count.
fn uncounted_zeros(case: &Case, text: &Text) -> Vec<Finding> {
    let inputs = case.inputs.values();
    let unclear = inputs.filter(|i| i.value.value.ambiguous_zeros && i.tolerance.is_none());
    let finding = |input: &crate::case::Input| Finding {
        severity: Severity::Note,
        code: FindingCode::UncountedZeros,
        message: format!(
            "The zeros at the end of {} may or may not be significant; it is taken at the coarsest \
             reading. Write it as 1.200e3, or state a tolerance.",
            input.value.value
        ),
        at: text.place(input.value.span.start),
    };
    unclear.map(finding).collect()
}
