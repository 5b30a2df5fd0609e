//! The working of a cycle, as a careful hand calculation shows it.

use num_traits::{Signed, Zero};

use crate::calculation::Calculation;
use crate::engine::{
    Adjustment, COVERAGE, CRITICAL_RESIDUAL, CycleSum, CycleWorking, Multipliers, Outcome,
    SIGNIFICANCE_LEVEL, decimals, global_test, local_test, weakness,
};
use crate::quantity::{Exact, Quantity, Significance, exact_text, to_f64, two_digits};
use crate::source::{Basis, Problem, ProblemCycle, StepSource};

use super::cycle_symbols::{
    birge_ratio, bomb_to_enthalpy, chi_square, cycle_sum, misclosure, multiplier_condition,
    residuals, spread,
};
use super::cycle_tables::{Shown, equation, multiplier};
use super::numerals::{in_full, minus, unit};
use super::pages::{Step, WorkingSection};
use super::rich::{Rich, Run};
use super::stating::stating;
use super::symbols::combined_uncertainty;
use super::working::{displayed, result};

pub(super) fn cycle_sections(calculation: &Calculation) -> Vec<WorkingSection> {
    let cycles = calculation.working.cycles.iter();
    cycles
        .map(|working| section(calculation, working))
        .collect()
}

/// The target with names where the case declares them.
pub(super) fn target(cycle: &ProblemCycle) -> Rich {
    equation(cycle, &cycle.numbers, false)
}

fn section(calculation: &Calculation, working: &CycleWorking) -> WorkingSection {
    let cycle = &calculation.problem.cycles[working.cycle];
    let mut steps = vec![Step::Reaction {
        text: target(cycle),
    }];
    let outcome = calculation.working.outcome(&format!("{}.heat", cycle.id));
    match (outcome, &working.sum, &working.multipliers) {
        (Some(outcome), Some(sum), Ok(found)) => {
            let parts = Parts {
                calculation,
                cycle,
                working,
                found,
                sum,
                outcome,
            };
            steps.extend(parts.steps());
        }
        _ => steps.push(plain("Not worked: see the findings.")),
    }
    WorkingSection {
        id: cycle.id.clone(),
        heading: format!("Cycle {}", cycle.id),
        steps,
    }
}

fn plain(text: impl Into<String>) -> Step {
    Step::Text {
        text: Rich::plain(text),
    }
}

fn heading(text: &str) -> Step {
    Step::Heading {
        text: text.to_string(),
    }
}

struct Parts<'a> {
    calculation: &'a Calculation,
    cycle: &'a ProblemCycle,
    working: &'a CycleWorking,
    found: &'a Multipliers,
    sum: &'a CycleSum,
    outcome: &'a Outcome,
}

impl Parts<'_> {
    fn steps(&self) -> Vec<Step> {
        let unit = unit(&self.outcome.unit);
        let shown = Shown {
            problem: &self.calculation.problem,
            cycle: self.cycle,
            heats: self.working.heats.iter().flatten().collect(),
            unit: &unit,
        };
        let mut steps = self.opening();
        steps.push(Step::Table(shown.determinations()));
        steps.extend(masses(&shown));
        steps.extend(self.bombs(&shown));
        if let Some(adjustment) = &self.working.adjustment {
            steps.extend(self.adjustment(&shown, adjustment));
        }
        steps.extend(self.multiplied(&shown));
        steps.extend(self.closing());
        steps
    }

    fn opening(&self) -> Vec<Step> {
        let kelvin = self.cycle.kelvin().map_or(String::new(), exact_text);
        let how = match self.found.closures.is_empty() {
            true => "There is exactly one set of them.",
            false => {
                "Several sets do, because determinations check each other; the one of least \
                 variance is taken."
            }
        };
        vec![
            displayed(cycle_sum()),
            displayed(multiplier_condition()),
            plain(format!(
                "The heat of this reaction follows from those of the steps below, all of them at \
                 {kelvin} K and between standard states, with multipliers that make their \
                 equations add up to it. {how}"
            )),
        ]
    }

    fn bombs(&self, shown: &Shown<'_>) -> Vec<Step> {
        let (Some(table), Some(r)) = (shown.gas_work(), self.cycle.gas_constant) else {
            return Vec::new();
        };
        let kelvin = self.cycle.kelvin().map_or(String::new(), exact_text);
        let value = &self.calculation.problem.values[r].printed;
        let product = value.value_in_si() * self.cycle.kelvin().cloned().unwrap_or_default();
        let text = Rich::default()
            .run(Run::Italic("R".into()))
            .and(format!(" = {} J/(mol K) ", value.decimal.printed()))
            .run(Run::ValueUsed(r + 1))
            .and(", ")
            .run(Run::Italic("T".into()))
            .and(format!(" = {kelvin} K, "))
            .run(Run::Italic("R·T".into()))
            .and(format!(
                " = {} J/mol. Gases alone count; the volume of the rest is left out. {} {}",
                in_full(&product, Significance::Exact),
                temperature_error(self.cycle, value),
                reduced(self.cycle)
            ));
        vec![
            heading("From the bomb to constant pressure"),
            displayed(bomb_to_enthalpy()),
            Step::Text { text },
            Step::Table(table),
        ]
    }

    fn adjustment(&self, shown: &Shown<'_>, adjustment: &Adjustment) -> Vec<Step> {
        let mut steps = vec![
            heading("Determinations that check each other"),
            displayed(misclosure()),
            plain(
                "q is the heat of a step. Each line below adds steps up to no reaction at all, so \
                 that its heat m should be zero; the numbers before the steps are n.",
            ),
            Step::Table(shown.closures(&self.found.closures, adjustment)),
            displayed(spread()),
            displayed(residuals()),
            displayed(chi_square()),
            plain(format!(
                "Generalised least squares (Aitken 1935), as conditions: N holds the numbers n, V \
                 the variances and covariances of the heats. v is what each measured heat exceeds \
                 the adjusted one by. {}",
                correlations(self.cycle, adjustment)
            )),
            Step::Table(shown.adjusted(adjustment)),
            plain(
                "Normalised: the residual over what it may scatter by (Baarda 1968). Checked part: \
                 which part of an error in the step shows in its residual; at 0 no other \
                 determination checks it. By hand: the adjusted heats make every line of the \
                 table before add up to zero.",
            ),
        ];
        steps.extend(self.tests(adjustment));
        steps
    }

    fn tests(&self, adjustment: &Adjustment) -> Vec<Step> {
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
        let inflated = match (self.cycle.inflate, self.sum.inflation > 1.0) {
            (false, _) => {
                "The case does not ask for it, and no uncertainty is inflated.".to_string()
            }
            (true, false) => "It is not above one, and no uncertainty is inflated.".to_string(),
            (true, true) => {
                format!(
                    "The case asks for it: the uncertainty of the result is multiplied by {ratio}."
                )
            }
        };
        let mut steps = vec![plain(format!(
            "Global test: {}. {verdict} {}",
            global_test(adjustment),
            weak.unwrap_or_default()
        ))];
        steps.push(plain(format!(
            "Local test (limit {CRITICAL_RESIDUAL}): {} Nothing is dropped.",
            local_test(self.cycle, adjustment)
        )));
        steps.push(displayed(birge_ratio()));
        steps.push(plain(format!(
            "Birge ratio {ratio}, f being the degrees of freedom. {inflated}"
        )));
        steps
    }

    fn multiplied(&self, shown: &Shown<'_>) -> Vec<Step> {
        let mut steps = vec![
            heading("The sum"),
            Step::Table(shown.multiplied(self.sum)),
            Step::Text {
                text: self.cancelled(),
            },
        ];
        if self.sum.weights != self.found.particular {
            steps.push(plain(
                "Long multipliers are cut for print. They need not be found again to be checked: \
                 they make the equations add up to the target, and for every line that should be \
                 zero, Σ n·w·u² over its steps is zero where the heats are independent (with V \
                 otherwise), which is the condition of least variance.",
            ));
        }
        steps
    }

    /// What stands on both sides of the multiplied steps.
    fn cancelled(&self) -> Rich {
        let mut shown: Vec<(Exact, Rich)> = Vec::new();
        for (index, species) in self.cycle.species.iter().enumerate() {
            let steps = self.cycle.steps.iter().zip(&self.sum.weights);
            let amounts: Vec<Exact> = steps.map(|(s, w)| &s.numbers[index] * w).collect();
            let made: Exact = amounts.iter().filter(|a| a.is_positive()).sum();
            let used: Exact = amounts.iter().filter(|a| a.is_negative()).map(|a| -a).sum();
            let both = if used < made { used } else { made };
            if !both.is_zero() {
                shown.push((both, Rich::from(species.species.pieces())));
            }
        }
        if shown.is_empty() {
            return Rich::plain("Nothing stands on both sides of the multiplied equations.");
        }
        let last = shown.len() - 1;
        let mut text = Rich::plain("Added up, ");
        for (at, (amount, species)) in shown.into_iter().enumerate() {
            let between = match at {
                0 => "",
                _ if at == last => " and ",
                _ => ", ",
            };
            let number = match multiplier(&amount).as_str() {
                "1" => String::new(),
                number => format!("{number} "),
            };
            text = text.and(format!("{between}{number}")).with(species);
        }
        let verb = if last == 0 { "stands" } else { "stand" };
        text.and(format!(
            " {verb} on both sides and cancel, and what is left is the target."
        ))
    }

    fn closing(&self) -> Vec<Step> {
        let mut steps = vec![heading("Uncertainty and stated digits")];
        if self.outcome.combined.standard.is_some() {
            steps.push(displayed(combined_uncertainty()));
        }
        if self.sum.inflation > 1.0 {
            steps.push(plain(format!(
                "Multiplied by the Birge ratio {}; U = {COVERAGE}·u holds that already.",
                decimals(self.sum.inflation)
            )));
        }
        steps.push(Step::Text {
            text: stating(self.outcome),
        });
        steps.push(result(self.calculation, self.outcome));
        steps
    }
}

/// How heats per mass became heats per mole.
fn masses(shown: &Shown<'_>) -> Vec<Step> {
    let mut said: Vec<usize> = Vec::new();
    let mut steps = Vec::new();
    for (step, heat) in shown.cycle.steps.iter().zip(&shown.heats) {
        let (StepSource::Value { per, .. }, Some(mass)) = (&step.heat, &heat.molar_mass) else {
            continue;
        };
        let Basis::Mass {
            species, weights, ..
        } = per
        else {
            continue;
        };
        if said.contains(species) {
            continue;
        }
        said.push(*species);
        let text = Rich::plain(format!(
            "Molar mass of {}: ",
            shown.cycle.species[*species].label
        ));
        let text = sum_of_weights(shown.problem, weights, text).and(format!(
            " = {} g/mol. Heats per mass of it are multiplied by that and by its |ν|.",
            in_full(&mass.value, mass.significance)
        ));
        steps.push(Step::Text { text });
    }
    steps
}

fn sum_of_weights(problem: &Problem, weights: &[(usize, Exact)], text: Rich) -> Rich {
    weights
        .iter()
        .enumerate()
        .fold(text, |text, (at, (index, count))| {
            let plus = if at == 0 { "" } else { " + " };
            let printed = problem.values[*index].printed.decimal.printed();
            text.and(format!("{plus}{count} · {printed} "))
                .run(Run::ValueUsed(index + 1))
        })
}

/// What the temperature, taken as it is stated, can do to the correction.
fn temperature_error(cycle: &ProblemCycle, r: &Quantity) -> String {
    let bombs = cycle.steps.iter().filter_map(|step| step.bomb.as_ref());
    let most = bombs.map(|bomb| bomb.gas_moles.abs()).max();
    let per_kelvin = most.unwrap_or_default() * r.value_in_si();
    format!(
        "An error of 0.1 K in T would move Δn·R·T by {} J/mol at the most.",
        two_digits(to_f64(&per_kelvin) * 0.1)
    )
}

/// Whether the bomb results hold for standard states.
fn reduced(cycle: &ProblemCycle) -> String {
    let bombs = cycle
        .steps
        .iter()
        .filter_map(|step| Some((step, step.bomb.as_ref()?)));
    let open: Vec<&str> = bombs
        .filter(|(_, bomb)| !bomb.reduced)
        .map(|(step, _)| step.name.as_str())
        .collect();
    match open.is_empty() {
        true => "The results are reduced to standard states by whoever measured them (Washburn \
                 1933)."
            .to_string(),
        false => format!(
            "Not reduced to standard states: {}; see the findings.",
            open.join(", ")
        ),
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
