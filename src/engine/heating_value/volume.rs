//! Heating values per volume: the molar volume at metering conditions, ideal and real.

use crate::quantity::Exact;
use crate::source::{Problem, ProblemCompression, ProblemMetering};

use super::super::worked::Worked;
use super::mixture::{Mixture, minus, one, pairs, value};

/// The volume of a gas as it was worked.
#[derive(Clone, Debug)]
pub struct VolumeWorking {
    /// m3/mol of the ideal gas.
    pub ideal: Worked,
    pub compression: Option<CompressionWorking>,
    /// J/m3
    pub gross: Worked,
    /// J/m3
    pub net: Worked,
    /// Gross and net of the real gas, J/m3, where the compression factor is known.
    pub real: Option<[Worked; 2]>,
}

/// The compression factor as it was worked.
#[derive(Clone, Debug)]
pub struct CompressionWorking {
    pub factor: Worked,
    /// Σ x_j·s_j, where it comes from summation factors.
    pub sum: Option<Worked>,
}

/// The pressure that summation factors refer to, Pa (ISO 6976, from memory).
pub const SUMMATION_PRESSURE: i64 = 101_325;

/// H_v = H_m/V with V = Z·R·T2/p2, T2 and p2 being the metering conditions (ISO 6976:2016, clauses
/// 8 and 9, from memory). Z is 1 for the ideal gas. For the real one it is what the case states,
/// 1 − (p2/p0)·(Σ x_j·s_j)² with p0 = 101.325 kPa from summation factors (clause 4.2, from memory),
/// or 1 + B·p2/(R·T2) from the second virial coefficient of the mixture.
///
/// Limits: one gas phase; summation factors near atmospheric pressure, between about 90 and
/// 110 kPa; the virial equation after its second term. None where Z is not positive.
pub(super) fn volume(
    problem: &Problem,
    metering: &ProblemMetering,
    gas_constant: usize,
    mixture: &Mixture,
) -> Option<VolumeWorking> {
    let constant = value(problem, gas_constant);
    let ideal = constant.times_exact(&(&metering.kelvin / &metering.pascal));
    let gross = mixture.gross.over(&ideal)?;
    let net = mixture.net.over(&ideal)?;
    let compression = metering
        .compression
        .as_ref()
        .map(|compression| factor(problem, metering, compression, &ideal, mixture));
    let compression = match compression {
        Some(compression) => Some(compression?),
        None => None,
    };
    let real = match &compression {
        Some(worked) => Some([gross.over(&worked.factor)?, net.over(&worked.factor)?]),
        None => None,
    };
    Some(VolumeWorking {
        ideal,
        compression,
        gross,
        net,
        real,
    })
}

fn factor(
    problem: &Problem,
    metering: &ProblemMetering,
    compression: &ProblemCompression,
    ideal: &Worked,
    mixture: &Mixture,
) -> Option<CompressionWorking> {
    let (factor, sum) = match compression {
        ProblemCompression::Factor(index) => (value(problem, *index), None),
        ProblemCompression::SecondVirial(index) => {
            let part = value(problem, *index).over(ideal)?;
            (Worked::sum([&one(), &part]), None)
        }
        ProblemCompression::Summation(factors) => {
            let factors: Vec<Worked> = factors.iter().map(|index| value(problem, *index)).collect();
            let sum = pairs(&mixture.amounts, &factors).over(&mixture.total)?;
            let pressure = &metering.pascal / Exact::from_integer(SUMMATION_PRESSURE.into());
            let part = sum.times(&sum).times_exact(&pressure);
            (minus(&one(), &part), Some(sum))
        }
    };
    let positive = factor.value.to_f64() > 0.0;
    positive.then_some(CompressionWorking { factor, sum })
}
