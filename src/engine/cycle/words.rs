//! The outcome of an adjustment in words, for findings and pages alike.

use num_traits::Signed;

use crate::engine::standing::list;
use crate::quantity::{Exact, round_to_place};
use crate::source::ProblemCycle;

use super::CRITICAL_RESIDUAL;
use super::adjust::Adjustment;

/// A sum of steps in words: "run-1 − 2·run-2 + step 3".
pub fn closure_text(cycle: &ProblemCycle, by: &[Exact]) -> String {
    let zero = Exact::from_integer(0.into());
    let terms = cycle.steps.iter().zip(by).filter(|(_, by)| **by != zero);
    terms
        .enumerate()
        .fold(String::new(), |text, (at, (step, by))| {
            let sign = match (at, by.is_negative()) {
                (0, false) => "",
                (0, true) => "−",
                (_, false) => " + ",
                (_, true) => " − ",
            };
            let number = match by.abs().to_string().as_str() {
                "1" => String::new(),
                number => format!("{number}·"),
            };
            format!("{text}{sign}{number}({})", step.name)
        })
}

/// What the test can and cannot see where there is little redundancy. The sizes are the square
/// roots of the noncentrality with which a test at 5 % is failed in four cases of five, 7.85 at
/// one degree of freedom and 9.63 at two (from memory; read once more with scipy 1.17.1, `ncx2`).
pub fn weakness(degrees_of_freedom: usize) -> Option<&'static str> {
    match degrees_of_freedom {
        1 => Some(
            "one degree of freedom makes a weak test: it holds one difference against its \
             uncertainty. It cannot tell which of the determinations is off, and it lets an error \
             of 2.8 times the standard uncertainty of that difference pass in one case of five.",
        ),
        2 => Some(
            "two degrees of freedom make a weak test: a determination that is off pulls the \
             others with it, and an error of 3.1 times the standard uncertainty with which it can \
             be seen passes in one case of five.",
        ),
        _ => None,
    }
}

/// χ², its degrees of freedom and its probability.
pub fn global_test(adjustment: &Adjustment) -> String {
    format!(
        "{}; a χ² as large has a probability {}",
        chi_square_text(adjustment),
        probability(adjustment.probability)
    )
}

/// "χ² = 41.48 at 4 degrees of freedom"
pub(super) fn chi_square_text(adjustment: &Adjustment) -> String {
    let freedom = adjustment.degrees_of_freedom;
    let degrees = if freedom == 1 { "degree" } else { "degrees" };
    format!(
        "χ² = {} at {freedom} {degrees} of freedom",
        decimals(adjustment.chi_square)
    )
}

/// "of 0.012"; a size that nobody needs more exactly.
fn probability(of: f64) -> String {
    match Exact::from_float(of) {
        Some(exact) if of >= 0.001 => format!("of {}", round_to_place(&exact, -3).text),
        _ => "below 0.001".to_string(),
    }
}

/// A test quantity to two decimals.
pub fn decimals(size: f64) -> String {
    match Exact::from_float(size) {
        Some(exact) => round_to_place(&exact, -2).text,
        None => "beyond all numbers".to_string(),
    }
}

/// Which determination fits least, in a sentence.
pub fn local_test(cycle: &ProblemCycle, adjustment: &Adjustment) -> String {
    let Some((step, size)) = adjustment.most_deviant() else {
        return "No determination is checked by another one.".to_string();
    };
    let alike = adjustment.most_deviant_alike().into_iter();
    let names: Vec<String> = alike.map(|step| cycle.steps[step].name.clone()).collect();
    let beyond = match size.abs() > CRITICAL_RESIDUAL {
        true => "beyond",
        false => "within",
    };
    let size = decimals(size.abs());
    if names.len() > 1 {
        return format!(
            "{} deviate alike (normalised residual {size}, {beyond} {CRITICAL_RESIDUAL}): the \
             data cannot say which of them is off.",
            list(names.into_iter())
        );
    }
    format!(
        "{} fits least (normalised residual {size}, {beyond} {CRITICAL_RESIDUAL}, the two-sided \
         0.1 % limit).",
        cycle.steps[step].name
    )
}
