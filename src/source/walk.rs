//! Along the functions of one form from one temperature to another.

use num_traits::{Signed, Zero};

use crate::quantity::Exact;

use super::heat_capacity::HeatCapacity;

/// A stretch of the way; functions by their index in the entry, temperatures in K.
#[derive(Clone, Debug, PartialEq)]
pub(super) enum Stretch {
    Along {
        function: usize,
        from: Exact,
        to: Exact,
    },
    /// On the scale that the integration constants of both functions share.
    Scale {
        from_function: usize,
        from: Exact,
        to_function: usize,
        to: Exact,
    },
}

impl Stretch {
    /// The function at its end.
    pub(super) fn end(&self) -> usize {
        match self {
            Stretch::Along { function, .. } => *function,
            Stretch::Scale { to_function, .. } => *to_function,
        }
    }
}

/// How strictly ranges are taken.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(super) enum Reach {
    /// As the source states them; at 298.15 K a function may begin up to 2 K later.
    Stated,
    /// The lowest and the highest function are followed beyond their ranges.
    Extended,
}

/// Where the functions end on the way: the temperature in K that they reach.
#[derive(Clone, Debug, PartialEq)]
pub(super) struct Short {
    pub(super) reached: Exact,
}

/// The way from `from` to `to`, both in K; none of the functions is used outside its range.
pub(super) fn walk(
    functions: &[HeatCapacity],
    from: &Exact,
    to: &Exact,
    reach: Reach,
) -> Result<Vec<Stretch>, Short> {
    if from == to {
        return Ok(Vec::new());
    }
    let covering = |kelvin| covering(functions, kelvin, reach);
    if let (Some(a), Some(b)) = (covering(from), covering(to)) {
        if a == b {
            return Ok(vec![along(a, from, to)]);
        }
        let form = functions[a].form;
        if form == functions[b].form && form.has_enthalpy_scale() {
            return Ok(vec![Stretch::Scale {
                from_function: a,
                from: from.clone(),
                to_function: b,
                to: to.clone(),
            }]);
        }
    }
    piecewise(functions, from, to, reach)
}

fn along(function: usize, from: &Exact, to: &Exact) -> Stretch {
    Stretch::Along {
        function,
        from: from.clone(),
        to: to.clone(),
    }
}

/// From range to range; neighbours have to touch.
fn piecewise(
    functions: &[HeatCapacity],
    from: &Exact,
    to: &Exact,
    reach: Reach,
) -> Result<Vec<Stretch>, Short> {
    let rising = to > from;
    let mut stretches = Vec::new();
    let mut at = from.clone();
    // Each step ends at another bound, so there are no more steps than functions.
    for _ in 0..=functions.len() {
        if at == *to {
            return Ok(stretches);
        }
        let onward = |(_, f): &(usize, &HeatCapacity)| {
            serves(functions, f, &at, reach) && leads_on(functions, f, &at, rising, reach)
        };
        let Some((index, function)) = functions.iter().enumerate().find(onward) else {
            return Err(Short { reached: at });
        };
        let end = end_of(functions, function, to, rising, reach);
        stretches.push(along(index, &at, &end));
        at = end;
    }
    Err(Short { reached: at })
}

/// The function that serves at a temperature; at a common bound the lower one.
pub(super) fn covering(functions: &[HeatCapacity], kelvin: &Exact, reach: Reach) -> Option<usize> {
    let mut serving = functions
        .iter()
        .enumerate()
        .filter(|(_, f)| serves(functions, f, kelvin, reach));
    serving
        .by_ref()
        .min_by_key(|(_, f)| f.range_kelvin().map(|[low, _]| low))
        .map(|(index, _)| index)
}

fn serves(
    functions: &[HeatCapacity],
    function: &HeatCapacity,
    kelvin: &Exact,
    reach: Reach,
) -> bool {
    let lenient = *kelvin == super::path::reference_kelvin() && function.serves(kelvin);
    if lenient || function.covers(kelvin) {
        return true;
    }
    let Some([low, high]) = function.range_kelvin().filter(|_| reach == Reach::Extended) else {
        return false;
    };
    (*kelvin < low && is_lowest(functions, &low))
        || (*kelvin > high && is_highest(functions, &high))
}

fn is_lowest(functions: &[HeatCapacity], low: &Exact) -> bool {
    functions
        .iter()
        .filter_map(HeatCapacity::range_kelvin)
        .all(|[other, _]| other >= *low)
}

fn is_highest(functions: &[HeatCapacity], high: &Exact) -> bool {
    functions
        .iter()
        .filter_map(HeatCapacity::range_kelvin)
        .all(|[_, other]| other <= *high)
}

/// Whether a function goes on from `at` in the direction of the way.
fn leads_on(
    functions: &[HeatCapacity],
    function: &HeatCapacity,
    at: &Exact,
    rising: bool,
    reach: Reach,
) -> bool {
    let Some([low, high]) = function.range_kelvin() else {
        return true;
    };
    let extended = reach == Reach::Extended;
    match rising {
        true => high > *at || (extended && is_highest(functions, &high)),
        false => low < *at || (extended && is_lowest(functions, &low)),
    }
}

fn end_of(
    functions: &[HeatCapacity],
    function: &HeatCapacity,
    to: &Exact,
    rising: bool,
    reach: Reach,
) -> Exact {
    let Some([low, high]) = function.range_kelvin() else {
        return to.clone();
    };
    let extended = reach == Reach::Extended;
    match rising {
        true if *to <= high || (extended && is_highest(functions, &high)) => to.clone(),
        true => high,
        false if *to >= low || (extended && is_lowest(functions, &low)) => to.clone(),
        false => low,
    }
}

/// How far a temperature lies outside all functions of a form, K; zero inside or between them.
pub(super) fn distance(functions: &[HeatCapacity], kelvin: &Exact) -> Exact {
    let distances = functions
        .iter()
        .map(|function| function.distance(kelvin).abs());
    distances.min().unwrap_or_else(Exact::zero)
}
