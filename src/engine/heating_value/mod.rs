//! Gross and net heating values of fuels: per mole, per mass and per volume.
//!
//! Results are heats given off, and positive where heat is given off (ISO 6976:2016, clause 3, from
//! memory). Leaves to others: what the components burn to (`source::combustion`), and enthalpies
//! at the combustion temperature (`kirchhoff`).

mod mixture;
mod volume;

pub use mixture::{ComponentWorking, Mixture};
pub use volume::{CompressionWorking, SUMMATION_PRESSURE, VolumeWorking};

use crate::finding::{Finding, FindingCode, Severity};
use crate::quantity::{Exact, Unit};
use crate::source::{Problem, ProblemCompression, ProblemHeatingValue, ProblemMetering};

use super::outcome::Outcome;
use super::work::{WorkOptions, Working};
use super::worked::Worked;

use mixture::mixture;

/// A fuel as it was worked.
#[derive(Debug)]
pub struct HeatingValueWorking {
    /// Index among the heating values of the problem.
    pub heating_value: usize,
    /// None where a `stop` says why it was not worked.
    pub mixture: Option<Mixture>,
    pub volume: Option<VolumeWorking>,
}

/// Works a fuel, and adds its results and findings.
pub(super) fn work_heating_value(
    problem: &Problem,
    options: &WorkOptions<'_>,
    index: usize,
    working: &mut Working,
) {
    let fuel = &problem.heating_values[index];
    let mixture = fuel.complete.then(|| mixture(problem, fuel)).flatten();
    let metering = fuel.metering.as_ref().zip(fuel.gas_constant);
    let volume = mixture.as_ref().zip(metering);
    let volume = volume.and_then(|(mixture, (metering, constant))| {
        volume::volume(problem, metering, constant, mixture)
    });
    if let Some(mixture) = &mixture {
        let named = results(options, mixture, volume.as_ref());
        for (name, worked, unit) in named {
            let id = format!("{}.{name}", fuel.id);
            let worked = worked.times_exact(&unit.factor().recip());
            let outcome = Outcome::new(problem, options, id, worked, unit).given_off();
            working.push(outcome);
        }
        let finding = finding(fuel, volume.as_ref(), options);
        working.findings.extend(finding);
    }
    working.heating_values.push(HeatingValueWorking {
        heating_value: index,
        mixture,
        volume,
    });
}

/// The results in coherent SI units, each with the unit that it is given in.
fn results(
    options: &WorkOptions<'_>,
    mixture: &Mixture,
    volume: Option<&VolumeWorking>,
) -> Vec<(&'static str, Worked, Unit)> {
    let units = options.units;
    let (mole, mass) = (options.unit(&units.amount), options.unit(&units.mass));
    let mut results = vec![
        ("gross", mixture.gross.clone(), mole.clone()),
        ("net", mixture.net.clone(), mole),
        (
            "gross-per-mass",
            mixture.gross_per_mass.clone(),
            mass.clone(),
        ),
        ("net-per-mass", mixture.net_per_mass.clone(), mass),
    ];
    let Some(volume) = volume else {
        return results;
    };
    let unit = options.unit(&units.volume);
    results.push(("gross-per-volume", volume.gross.clone(), unit.clone()));
    results.push(("net-per-volume", volume.net.clone(), unit.clone()));
    if let Some([gross, net]) = &volume.real {
        results.push(("gross-per-volume-real", gross.clone(), unit.clone()));
        results.push(("net-per-volume-real", net.clone(), unit));
    }
    results
}

/// Pressures between which summation factors serve, Pa (ISO 6976:2016, clause 4, from memory).
const SUMMATION_RANGE: [i64; 2] = [90_000, 110_000];

fn finding(
    fuel: &ProblemHeatingValue,
    volume: Option<&VolumeWorking>,
    options: &WorkOptions<'_>,
) -> Option<Finding> {
    let metering = fuel.metering.as_ref()?;
    let (severity, code, what) = said_of_volume(metering, volume)?;
    Some(Finding {
        severity,
        code,
        message: format!("{}: {what}", fuel.id),
        at: options.text.place(metering.span.start),
    })
}

/// What has to be said of results per volume.
fn said_of_volume(
    metering: &ProblemMetering,
    volume: Option<&VolumeWorking>,
) -> Option<(Severity, FindingCode, &'static str)> {
    match (&metering.compression, volume) {
        (Some(_), None) => Some((
            Severity::Stop,
            FindingCode::CompressionFactor,
            "the compression factor at the metering conditions is not above zero. Check the data \
             on it and the pressure. No result per volume is given.",
        )),
        (None, _) => Some((
            Severity::Note,
            FindingCode::IdealGasVolume,
            "results per volume are those of the ideal gas. A real gas holds more in the same \
             volume, natural gas about 0.2 to 0.4 % at 15 °C and 1 atm (common practice, no \
             source): give a compression factor in `metering`.",
        )),
        (Some(ProblemCompression::Summation(_)), Some(_)) if outside(metering) => Some((
            Severity::Caution,
            FindingCode::CompressionFactor,
            "summation factors serve between about 90 and 110 kPa; the metering pressure lies \
             outside. Give a compression factor for it.",
        )),
        _ => None,
    }
}

fn outside(metering: &ProblemMetering) -> bool {
    let [low, high] = SUMMATION_RANGE.map(|pascal| Exact::from_integer(pascal.into()));
    metering.pascal < low || metering.pascal > high
}
