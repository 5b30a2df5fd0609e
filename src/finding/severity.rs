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
    BombNotReduced,
    ChargeInWater,
    ChoiceOverrides,
    CombustionProducts,
    CombustionSign,
    CompressionFactor,
    ConcentrationNotStated,
    ConstantHeatCapacity,
    CycleContradictory,
    CycleDisagrees,
    CycleInflated,
    CycleNotWorked,
    CycleOpen,
    CycleStepUnused,
    CycleTemperature,
    CycleUnweighted,
    CycleWeakTest,
    FixedDecimals,
    FreeElectron,
    FunctionAndValue,
    HeatCapacityBounds,
    HeatCapacityEstimated,
    HeatCapacityGiven,
    HeatCapacityMissing,
    HoldOpen,
    IdealGasVolume,
    IdentityByFormula,
    InfiniteDilution,
    NotCompared,
    NotLocated,
    OutsideRange,
    RangeStart,
    ReferencePressure,
    ReferenceState,
    ReferenceTemperature,
    RoundingFiner,
    SourcesDiffer,
    StableForm,
    StableInGas,
    TemperatureUncertainty,
    UncertaintyIncomplete,
    Unconfirmed,
    UncountedZeros,
    UnstableForm,
}

impl FindingCode {
    pub fn word(self) -> &'static str {
        match self {
            FindingCode::BombNotReduced => "bomb-not-reduced",
            FindingCode::ChargeInWater => "charge-in-water",
            FindingCode::ChoiceOverrides => "choice-overrides",
            FindingCode::CombustionProducts => "combustion-products",
            FindingCode::CombustionSign => "combustion-sign",
            FindingCode::CompressionFactor => "compression-factor",
            FindingCode::ConcentrationNotStated => "concentration-not-stated",
            FindingCode::ConstantHeatCapacity => "constant-heat-capacity",
            FindingCode::CycleContradictory => "cycle-contradictory",
            FindingCode::CycleDisagrees => "cycle-disagrees",
            FindingCode::CycleInflated => "cycle-inflated",
            FindingCode::CycleNotWorked => "cycle-not-worked",
            FindingCode::CycleOpen => "cycle-open",
            FindingCode::CycleStepUnused => "cycle-step-unused",
            FindingCode::CycleTemperature => "cycle-temperature",
            FindingCode::CycleUnweighted => "cycle-unweighted",
            FindingCode::CycleWeakTest => "cycle-weak-test",
            FindingCode::FixedDecimals => "fixed-decimals",
            FindingCode::FreeElectron => "free-electron",
            FindingCode::FunctionAndValue => "function-and-value",
            FindingCode::HeatCapacityBounds => "heat-capacity-bounds",
            FindingCode::HeatCapacityEstimated => "heat-capacity-estimated",
            FindingCode::HeatCapacityGiven => "heat-capacity-given",
            FindingCode::HeatCapacityMissing => "heat-capacity-missing",
            FindingCode::HoldOpen => "hold-open",
            FindingCode::IdealGasVolume => "ideal-gas-volume",
            FindingCode::IdentityByFormula => "identity-by-formula",
            FindingCode::InfiniteDilution => "infinite-dilution",
            FindingCode::NotCompared => "not-compared",
            FindingCode::NotLocated => "not-located",
            FindingCode::OutsideRange => "outside-range",
            FindingCode::RangeStart => "range-start",
            FindingCode::ReferencePressure => "reference-pressure",
            FindingCode::ReferenceState => "reference-state",
            FindingCode::ReferenceTemperature => "reference-temperature",
            FindingCode::RoundingFiner => "rounding-finer",
            FindingCode::SourcesDiffer => "sources-differ",
            FindingCode::StableForm => "stable-form",
            FindingCode::StableInGas => "stable-in-gas",
            FindingCode::TemperatureUncertainty => "temperature-uncertainty",
            FindingCode::UncertaintyIncomplete => "uncertainty-incomplete",
            FindingCode::Unconfirmed => "unconfirmed",
            FindingCode::UncountedZeros => "uncounted-zeros",
            FindingCode::UnstableForm => "unstable-form",
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
