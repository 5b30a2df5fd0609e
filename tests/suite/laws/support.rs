//! Cases and source files as texts, and what comes out of them.

use std::collections::BTreeMap;

use hesswright::calculation::Calculation;
use hesswright::engine::Outcome;
use hesswright::finding::{Fault, FaultCode, Text};
use hesswright::quantity::{Exact, Real};
use hesswright::source::{Provenance, SourceFiles};

/// Source files by the name that a case consults.
#[derive(Clone, Debug)]
pub struct Files(pub BTreeMap<String, String>, Provenance);

impl Files {
    pub fn of(files: &[(&str, &str)]) -> Files {
        let owned = |(name, text): &(&str, &str)| (name.to_string(), text.to_string());
        Files(files.iter().map(owned).collect(), Provenance::Original)
    }

    /// The attachments of a record, which its manifest vouches for.
    pub fn extracted(files: impl Iterator<Item = (String, String)>) -> Files {
        Files(files.collect(), Provenance::Extract)
    }
}

impl SourceFiles for Files {
    fn provenance(&self) -> Provenance {
        self.1
    }

    fn text(&self, name: &str) -> Option<Result<Text, Fault>> {
        self.0
            .get(name)
            .map(|text| Ok(Text::new(name, text.as_str())))
    }
}

pub const RECORD: &str = r#"[record]
number = "T-1"
revision = "A"
title = "A case of the tests"
date = 2026-01-02
preparer = "N. N."
status = "for-check"
"#;

/// A case that consults `sources` and holds `rest`.
pub fn case(sources: &[&str], rest: &str) -> String {
    format!("{RECORD}\n[sources]\nconsult = {sources:?}\n\n{rest}")
}

/// `[reactions.<id>]` with an equation.
pub fn reaction(id: &str, equation: &str) -> String {
    format!("[reactions.{id}]\nequation = \"{equation}\"\n\n")
}

pub fn calculation(case: &str, files: &Files) -> Result<Calculation, Vec<Fault>> {
    Calculation::of(Text::new("case.toml", case), files)
}

/// The working of a case without faults.
pub fn worked(case: &str, files: &Files) -> Calculation {
    calculation(case, files).unwrap_or_else(|faults| panic!("{faults:#?}\n{case}"))
}

pub fn codes(faults: &[Fault]) -> Vec<FaultCode> {
    faults.iter().map(|fault| fault.code).collect()
}

pub fn outcome<'c>(calculation: &'c Calculation, id: &str) -> &'c Outcome {
    calculation
        .working
        .outcome(id)
        .unwrap_or_else(|| panic!("no result {id}"))
}

pub fn exact(outcome: &Outcome) -> &Exact {
    outcome
        .value
        .exact()
        .expect("sums of printed decimals are exact")
}

/// Sensitivities by the substance of the value; equal for equal results however the values used
/// are numbered.
pub fn sensitivities(calculation: &Calculation, outcome: &Outcome) -> BTreeMap<String, Real> {
    let values = &calculation.problem.values;
    let named = |(index, c): (usize, &Real)| (values[index].substance.clone(), c.clone());
    outcome.form.iter().map(named).collect()
}

/// The share of each substance in the variance.
pub fn shares(calculation: &Calculation, outcome: &Outcome) -> BTreeMap<String, Option<f64>> {
    let values = &calculation.problem.values;
    let named = |(index, share): &(usize, Option<f64>)| (values[*index].substance.clone(), *share);
    outcome.combined.shares.iter().map(named).collect()
}

/// Equal but for the last digits of a sum of floats, which depend on the order of its terms.
pub fn near(a: Option<f64>, b: Option<f64>) -> bool {
    match (a, b) {
        (Some(a), Some(b)) => (a - b).abs() <= 1e-12 * a.abs().max(b.abs()),
        (a, b) => a == b,
    }
}

/// The messages of the findings with a code.
pub fn messages(calculation: &Calculation, code: &str) -> Vec<String> {
    let findings = calculation.working.findings.iter();
    let coded = findings.filter(|finding| finding.code.word() == code);
    coded.map(|finding| finding.message.clone()).collect()
}
