//! What the tests of redundant determinations say, and what would be without the one that does not
//! fit.

use crate::engine::{
    Adjustment, COVERAGE, CRITICAL_RESIDUAL, CycleSum, SIGNIFICANCE_LEVEL, Without, critical,
    decimals, global_test, local_test, weakness,
};
use crate::quantity::{Exact, round_to_place, two_digits};
use crate::source::ProblemCycle;

use super::cycle_symbols::birge_ratio;
use super::cycle_tables::Shown;
use super::cycle_working::plain;
use super::numerals::minus;
use super::pages::Step;
use super::working::displayed;

/// Global and local test, the Birge ratio, and what would be without the one that does not fit.
pub(super) fn verdict(
    shown: &Shown<'_>,
    adjustment: &Adjustment,
    sum: &CycleSum,
    without: Option<&Without>,
) -> Vec<Step> {
    if adjustment.degrees_of_freedom == 0 {
        return vec![plain("No test: no closure carries an uncertainty.")];
    }
    let ratio = decimals(adjustment.birge_ratio());
    let mut steps = vec![
        plain(global(adjustment)),
        plain(format!(
            "Local test (limit {CRITICAL_RESIDUAL}): {} Nothing is dropped.",
            local_test(shown.cycle, adjustment)
        )),
        displayed(birge_ratio()),
        plain(format!(
            "Birge ratio {ratio}, f being the degrees of freedom. {}",
            inflation(shown.cycle, sum, &ratio)
        )),
    ];
    if adjustment.disagrees() {
        steps.push(plain(for_information(shown, adjustment, without)));
    }
    steps
}

fn global(adjustment: &Adjustment) -> String {
    let freedom = adjustment.degrees_of_freedom;
    let level = format!(
        "{:.0} %, which belongs to χ² = {}",
        SIGNIFICANCE_LEVEL * 100.0,
        decimals(critical(SIGNIFICANCE_LEVEL, freedom))
    );
    let verdict = match adjustment.probability < SIGNIFICANCE_LEVEL {
        true => {
            format!(
                "That is below {level}: the determinations disagree beyond their uncertainties."
            )
        }
        false => format!("That is not below {level}: the uncertainties stated can explain it."),
    };
    let weak = weakness(freedom).map(|text| {
        let mut letters = text.chars();
        let first: String = letters
            .next()
            .into_iter()
            .flat_map(char::to_uppercase)
            .collect();
        first + letters.as_str()
    });
    format!(
        "Global test: {}. {verdict} {}",
        global_test(adjustment),
        weak.unwrap_or_default()
    )
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

/// How far the result hangs on what does not fit.
fn for_information(
    shown: &Shown<'_>,
    adjustment: &Adjustment,
    without: Option<&Without>,
) -> String {
    let unit = shown.unit;
    let expanded = f64::from(COVERAGE) * adjustment.checked.inflated;
    let inflated = (adjustment.birge_ratio() > 1.0).then(|| {
        format!(
            " With the uncertainties of the determinations that check each other, and of those \
             alone, times the Birge ratio, U would be {} {unit}.",
            two_digits(expanded)
        )
    });
    let without = without.map(|without| {
        format!(
            " Without {} the heat would be {} {unit}{}.",
            shown.cycle.steps[without.step].name,
            hundredths(without.heat),
            fit(without)
        )
    });
    format!(
        "For information, as no result:{}{}",
        without.unwrap_or_default(),
        inflated.unwrap_or_default()
    )
}

/// " (χ² = 0.98 at 3 degrees of freedom)"
fn fit(without: &Without) -> String {
    match without.degrees_of_freedom {
        0 => String::new(),
        freedom => {
            let degrees = if freedom == 1 { "degree" } else { "degrees" };
            format!(
                " (χ² = {} at {freedom} {degrees} of freedom)",
                decimals(without.chi_square)
            )
        }
    }
}

fn hundredths(size: f64) -> String {
    Exact::from_float(size).map_or(String::new(), |size| minus(&round_to_place(&size, -2).text))
}
