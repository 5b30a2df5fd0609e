//! Findings: judgements on a finished working.

use std::fmt;

use super::place::Place;

/// How much a finding weighs.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum Severity {
    /// The working does not hold; the case can be issued only as preliminary.
    Stop,
    /// The working holds within limits that the reader has to know.
    Caution,
    /// Worth knowing.
    Note,
}

impl fmt::Display for Severity {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.write_str(match self {
            Severity::Stop => "stop",
            Severity::Caution => "caution",
            Severity::Note => "note",
        })
    }
}

/// Which check speaks; the word is stable and stands in records and JSON.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum FindingCode {
    ChargeInWater,
    ChoiceOverrides,
    FixedDecimals,
    HoldOpen,
    IdentityByFormula,
    NotCompared,
    NotLocated,
    ReferencePressure,
    ReferenceState,
    ReferenceTemperature,
    RoundingFiner,
    SourcesDiffer,
    TemperatureNotWorked,
    UncertaintyIncomplete,
    UncountedZeros,
    Unconfirmed,
}

impl FindingCode {
    pub fn word(self) -> &'static str {
        match self {
            FindingCode::ChargeInWater => "charge-in-water",
            FindingCode::ChoiceOverrides => "choice-overrides",
            FindingCode::FixedDecimals => "fixed-decimals",
            FindingCode::HoldOpen => "hold-open",
            FindingCode::IdentityByFormula => "identity-by-formula",
            FindingCode::NotCompared => "not-compared",
            FindingCode::NotLocated => "not-located",
            FindingCode::ReferencePressure => "reference-pressure",
            FindingCode::ReferenceState => "reference-state",
            FindingCode::ReferenceTemperature => "reference-temperature",
            FindingCode::RoundingFiner => "rounding-finer",
            FindingCode::SourcesDiffer => "sources-differ",
            FindingCode::TemperatureNotWorked => "temperature-not-worked",
            FindingCode::UncertaintyIncomplete => "uncertainty-incomplete",
            FindingCode::UncountedZeros => "uncounted-zeros",
            FindingCode::Unconfirmed => "unconfirmed",
        }
    }
}

/// What a check has to say about a finished working.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Finding {
    pub severity: Severity,
    pub code: FindingCode,
    pub message: String,
    pub at: Place,
}
