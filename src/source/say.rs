//! Saying a finding once.

use crate::finding::{Finding, FindingCode, Severity, Span};

use super::resolve::Resolver;

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
}
