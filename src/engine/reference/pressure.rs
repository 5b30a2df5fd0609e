//! Sources of different standard pressure.

use std::collections::BTreeSet;

use num_traits::Zero;

use crate::finding::{Finding, FindingCode, Severity, Text};
use crate::quantity::{Exact, exact_text, to_f64, two_digits};
use crate::source::{Problem, ValueKind, ValueUsed};

/// Enthalpies of ideal gases do not depend on pressure; those of condensed substances by about
/// V·Δp (from (∂H/∂p)_T = V − T(∂V/∂T)_p). 100 cm³/mol stands for a large molar volume.
pub(super) fn pressure(problem: &Problem, text: &Text) -> Vec<Finding> {
    let pressures = standard_pressures(problem);
    let by_pressure = |a: &&Standard<'_>, b: &&Standard<'_>| a.pressure.cmp(&b.pressure);
    let lowest = pressures.iter().min_by(by_pressure);
    let highest = pressures.iter().max_by(by_pressure);
    let (Some(lowest), Some(highest)) = (lowest, highest) else {
        return Vec::new();
    };
    let pascal = &highest.pressure - &lowest.pressure;
    if pascal.is_zero() {
        return Vec::new();
    }
    let (first, second) = match lowest.used_at <= highest.used_at {
        true => (lowest, highest),
        false => (highest, lowest),
    };
    let cost = to_f64(&pascal) * 1e-4 / 1000.0;
    vec![Finding {
        severity: Severity::Note,
        code: FindingCode::ReferencePressure,
        message: format!(
            "{} and {} have standard pressures {} Pa apart. That moves no enthalpy of an ideal \
             gas, and one of a condensed substance of 100 cm³/mol by about {} kJ/mol.",
            first.source,
            second.source,
            exact_text(&pascal),
            two_digits(cost),
        ),
        at: text.place(second.used_at),
    }]
}

/// A standard pressure in Pa, with the source that states it and the first use of a value of it.
struct Standard<'a> {
    pressure: Exact,
    source: &'a str,
    used_at: usize,
}

fn standard_pressures(problem: &Problem) -> Vec<Standard<'_>> {
    let enthalpies = problem
        .values
        .iter()
        .filter(|v| v.kind == ValueKind::FormationEnthalpy);
    let mut seen = BTreeSet::new();
    let of_source = |value: &ValueUsed| {
        let head = &problem.sources[value.source].head;
        let pressure = head.pressure.as_ref()?.value_in_si();
        seen.insert(value.source).then(|| Standard {
            pressure,
            source: problem.sources[value.source].id(),
            used_at: value.used_at.start,
        })
    };
    enthalpies
        .filter(|v| !v.printed.exact)
        .filter_map(of_source)
        .collect()
}
