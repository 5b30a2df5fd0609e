//! The road from a case's text to its finished working, in one call.

use crate::basis;
use crate::case::{Case, read_case};
use crate::engine::{WorkOptions, Working, work};
use crate::finding::{Fault, Severity, Text};
use crate::source::{Problem, SourceFiles, consult, resolve};

/// A case that was read, resolved and worked.
#[derive(Debug)]
pub struct Calculation {
    pub text: Text,
    pub case: Case,
    pub problem: Problem,
    pub working: Working,
}

impl Calculation {
    /// Reads, resolves and works a case. All faults of the case and of the sources that it
    /// consults come together.
    pub fn of(text: Text, files: &dyn SourceFiles) -> Result<Calculation, Vec<Fault>> {
        let (case, mut faults) = read_case(&text);
        let Some(case) = case else {
            return Err(faults.into_sorted());
        };
        // Where the list of sources could not be read, no substance would be found.
        if faults.has_syntax() || (case.consult.is_empty() && !faults.is_empty()) {
            return Err(faults.into_sorted());
        }
        let (consultation, found) = consult(&case, &text, files);
        let all_there = found.is_empty();
        faults.extend(found);
        if !all_there {
            return Err(faults.into_sorted());
        }
        let (problem, found) = resolve(&case, &text, consultation, files);
        faults.extend(found);
        let (Some(problem), true) = (problem, faults.is_empty()) else {
            return Err(faults.into_sorted());
        };
        let options = WorkOptions {
            units: &case.units,
            rounding: &case.rounding,
            text: &text,
        };
        let mut working = work(&problem, &options);
        working.findings.extend(basis::check(&case, &text));
        working
            .findings
            .sort_by(|a, b| (a.severity, &a.at, a.code).cmp(&(b.severity, &b.at, b.code)));
        Ok(Calculation {
            text,
            case,
            problem,
            working,
        })
    }

    /// Whether a finding says that the working does not hold.
    pub fn is_stopped(&self) -> bool {
        let mut findings = self.working.findings.iter();
        findings.any(|finding| finding.severity == Severity::Stop)
    }
}
