//! The adjustment of redundant determinations in the working of a cycle.

use crate::engine::{Adjustment, CycleSum, Without};
use crate::quantity::Exact;
use crate::source::ProblemCycle;

use super::cycle_checks::digits;
use super::cycle_symbols::{
    checked_part, chi_square, correlates, gradients, misclosure, normalised, residuals, scatter,
    spread,
};
use super::cycle_tables::Shown;
use super::cycle_verdict::verdict;
use super::cycle_working::{heading, plain};
use super::pages::Step;
use super::rich::{Rich, Run};
use super::working::displayed;

/// How determinations that check each other are held against each other.
pub(super) fn adjustment_steps(
    shown: &Shown<'_>,
    closures: &[Vec<Exact>],
    adjustment: &Adjustment,
    sum: &CycleSum,
    without: Option<&Without>,
) -> Vec<Step> {
    let mut steps = vec![
        heading("Determinations that check each other"),
        plain(
            "q is the heat of a step. Each line of the next table adds steps up to no reaction at \
             all, so that its heat m should be zero; the numbers before the steps are b. V holds \
             the variances u² of the heats and, for each correlated pair, r times both u.",
        ),
        displayed(misclosure()),
        displayed(spread()),
        displayed(correlates()),
        Step::Table(shown.closures(closures, adjustment)),
        Step::Text {
            text: correlations(shown, adjustment),
        },
        plain(
            "Generalised least squares, as conditions. B holds the numbers b, a line for each step; \
             S the variances and covariances of the sums m; λ is the sum of b·y over the lines. The \
             residual e is what the measured heat exceeds the adjusted one by: u²·λ where the heat \
             is correlated with no other. By hand: the adjusted heats make every line of the table \
             before add up to zero.",
        ),
        displayed(gradients()),
        displayed(residuals()),
        Step::Table(shown.adjusted(adjustment)),
        plain(
            "s is what λ may scatter by if the uncertainties are right, and t is λ over it; where \
             the heat is correlated with no other, t is the residual over what the residual may \
             scatter by. ρ is the part of an error in the step that shows in its residual: at 0 no \
             other determination checks it.",
        ),
        displayed(scatter()),
        displayed(normalised()),
        displayed(checked_part()),
        Step::Table(shown.checks(adjustment)),
        displayed(chi_square()),
    ];
    steps.extend(verdict(shown, adjustment, sum, without));
    steps.push(plain(
        "Methods (all cited from memory): A. C. Aitken, Proc. Roy. Soc. Edinburgh 55 (1935) 42; W. \
         Baarda, A Testing Procedure for Use in Geodetic Networks, Netherlands Geodetic Commission, \
         1968; R. T. Birge, Phys. Rev. 40 (1932) 207.",
    ));
    steps
}

/// The coefficients in V, those that the case states with their rows.
fn correlations(shown: &Shown<'_>, adjustment: &Adjustment) -> Rich {
    if adjustment.correlated.is_empty() {
        return Rich::plain(
            "The heats are independent: V has the squares of u on its diagonal and nothing else.",
        );
    }
    let start = Rich::plain("Correlation coefficients: ");
    let pairs = adjustment.correlated.iter().enumerate();
    let text = pairs.fold(start, |text, (at, (a, b, r))| {
        let comma = if at == 0 { "" } else { ", " };
        let text = text.and(format!(
            "{comma}{} and {} {}",
            shown.cycle.steps[*a].name,
            shown.cycle.steps[*b].name,
            digits(*r, 4)
        ));
        match stated(shown.cycle, *a, *b) {
            Some(value) => text.and(" ").run(Run::ValueUsed(value + 1)),
            None => text,
        }
    });
    text.and(
        "; all others are zero. Of those with a row the coefficient is stated; the rest comes of \
         values that both heats rest on.",
    )
}

/// The row of the coefficient that the case states for a pair.
fn stated(cycle: &ProblemCycle, a: usize, b: usize) -> Option<usize> {
    let mut all = cycle.correlations.iter();
    let found = all.find(|stated| stated.between == [a, b] || stated.between == [b, a]);
    found.map(|stated| stated.value)
}
