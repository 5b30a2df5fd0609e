//! The adjustment of redundant determinations in the working of a cycle.

use crate::engine::{
    Adjustment, CRITICAL_RESIDUAL, CycleSum, SIGNIFICANCE_LEVEL, decimals, global_test, local_test,
    weakness,
};
use crate::quantity::Exact;
use crate::source::ProblemCycle;

use super::cycle_symbols::{birge_ratio, chi_square, correlates, misclosure, residuals, spread};
use super::cycle_tables::Shown;
use super::cycle_working::{heading, plain};
use super::numerals::minus;
use super::pages::Step;
use super::working::displayed;

/// How determinations that check each other are held against each other.
pub(super) fn adjustment_steps(
    shown: &Shown<'_>,
    closures: &[Vec<Exact>],
    adjustment: &Adjustment,
    sum: &CycleSum,
) -> Vec<Step> {
    let mut steps = vec![
        heading("Determinations that check each other"),
        displayed(misclosure()),
        plain(
            "q is the heat of a step. Each line below adds steps up to no reaction at all, so \
             that its heat m should be zero; the numbers before the steps are n.",
        ),
        displayed(spread()),
        displayed(correlates()),
        Step::Table(shown.closures(closures, adjustment)),
        displayed(residuals()),
        displayed(chi_square()),
        plain(format!(
            "Generalised least squares (Aitken 1935), as conditions: N holds the numbers n, V \
             the variances u² of the heats and, for each correlated pair, r times both u; S then \
             holds the variances and covariances of the sums m. v is what each measured heat \
             exceeds the adjusted one by; for a heat that is correlated with no other it is u² \
             times the sum of n·y over the lines. {}",
            correlations(shown.cycle, adjustment)
        )),
        Step::Table(shown.adjusted(adjustment)),
        plain(
            "Normalised: the residual over what it may scatter by (Baarda 1968). Checked part: \
             which part of an error in the step shows in its residual; at 0 no other \
             determination checks it. By hand: the adjusted heats make every line of the \
             table before add up to zero.",
        ),
    ];
    steps.extend(tests(shown.cycle, adjustment, sum));
    steps
}

/// What the tests say, and the Birge ratio.
fn tests(cycle: &ProblemCycle, adjustment: &Adjustment, sum: &CycleSum) -> Vec<Step> {
    if adjustment.degrees_of_freedom == 0 {
        return vec![plain("No test: no closure carries an uncertainty.")];
    }
    let level = format!("{:.0} %", SIGNIFICANCE_LEVEL * 100.0);
    let verdict = match adjustment.probability < SIGNIFICANCE_LEVEL {
        true => {
            format!("Below {level}: the determinations disagree beyond their uncertainties.")
        }
        false => format!("Not below {level}: the uncertainties stated can explain it."),
    };
    let weak = weakness(adjustment.degrees_of_freedom).map(|text| {
        let mut letters = text.chars();
        let first: String = letters
            .next()
            .into_iter()
            .flat_map(char::to_uppercase)
            .collect();
        first + letters.as_str()
    });
    let ratio = decimals(adjustment.birge_ratio());
    let mut steps = vec![plain(format!(
        "Global test: {}. {verdict} {}",
        global_test(adjustment),
        weak.unwrap_or_default()
    ))];
    steps.push(plain(format!(
        "Local test (limit {CRITICAL_RESIDUAL}): {} Nothing is dropped.",
        local_test(cycle, adjustment)
    )));
    steps.push(displayed(birge_ratio()));
    steps.push(plain(format!(
        "Birge ratio {ratio}, f being the degrees of freedom. {}",
        inflation(cycle, sum, &ratio)
    )));
    steps
}

/// What became of the Birge ratio.
fn inflation(cycle: &ProblemCycle, sum: &CycleSum, ratio: &str) -> String {
    match (cycle.inflate, sum.inflation > 1.0) {
        (false, _) => "The case does not ask for it, and no uncertainty is inflated.".to_string(),
        (true, false) => "It is not above one, and no uncertainty is inflated.".to_string(),
        (true, true) => {
            format!("The case asks for it: the uncertainty of the result is multiplied by {ratio}.")
        }
    }
}

fn correlations(cycle: &ProblemCycle, adjustment: &Adjustment) -> String {
    if adjustment.correlated.is_empty() {
        return "The heats are independent: V has the squares of u on its diagonal and nothing \
                else."
            .to_string();
    }
    let name = |index: usize| cycle.steps[index].name.as_str();
    let pairs = adjustment.correlated.iter();
    let each =
        pairs.map(|(a, b, r)| format!("{} and {} {}", name(*a), name(*b), minus(&decimals(*r))));
    format!(
        "Correlation coefficients, from shared values and as stated: {}; all others are zero.",
        each.collect::<Vec<_>>().join(", ")
    )
}
