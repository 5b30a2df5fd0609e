//! Findings for people.

use std::path::Path;

use super::faults::place_name;
use super::terminal::{Style, Tone, plain, wrap};
use crate::finding::{Finding, Severity};

/// All findings, the weightiest first, each with its place.
pub fn shown(case: &Path, findings: &[Finding], style: Style) -> String {
    findings
        .iter()
        .map(|finding| one(case, finding, style))
        .collect()
}

fn one(case: &Path, finding: &Finding, style: Style) -> String {
    let word = format!("{:<9}", finding.severity.to_string());
    let message = format!(
        "{} [{}] {}",
        plain(&finding.message),
        finding.code.word(),
        place_name(case, &finding.at)
    );
    let text = wrap(&word, &message);
    let tone = match finding.severity {
        Severity::Stop => Tone::Stop,
        Severity::Caution => Tone::Caution,
        Severity::Note => Tone::Quiet,
    };
    // The word stands first, so it can be painted after wrapping.
    format!("{}{}", style.paint(tone, &word), &text[word.len()..])
}
