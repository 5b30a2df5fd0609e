//! What has to be said about a cycle.

use num_traits::Signed;

use crate::finding::{Finding, FindingCode, Severity, Text};
use crate::quantity::{Exact, exact_text};
use crate::source::{Problem, ProblemCycle, ProblemStep, StepSource};

use super::adjust::{Adjustment, NoAdjustment};
use super::heat::StepHeat;
use super::multipliers::{Multipliers, NoMultipliers};
use super::words::{closure_text, decimals, global_test, local_test, weakness};
use crate::engine::standing::list;

/// The voice of one cycle.
pub(super) struct Say<'a> {
    pub(super) problem: &'a Problem,
    pub(super) cycle: &'a ProblemCycle,
    pub(super) text: &'a Text,
}

impl Say<'_> {
    fn finding(&self, severity: Severity, code: FindingCode, message: String) -> Finding {
        Finding {
            severity,
            code,
            message: format!("{}: {message}", self.cycle.id),
            at: self.text.place(self.cycle.span.start),
        }
    }

    fn at_step(
        &self,
        severity: Severity,
        code: FindingCode,
        step: &ProblemStep,
        message: String,
    ) -> Finding {
        Finding {
            at: self.text.place(step.span.start),
            ..self.finding(severity, code, message)
        }
    }

    /// What can be said before determinations are held against each other.
    pub(super) fn before(
        &self,
        heats: &[Option<StepHeat>],
        found: &Result<Multipliers, NoMultipliers>,
    ) -> Vec<Finding> {
        let mut findings = Vec::new();
        for (step, heat) in self.cycle.steps.iter().zip(heats) {
            findings.extend(self.about_step(step, heat.as_ref()));
        }
        findings.extend(self.temperatures());
        findings.extend(found.as_ref().err().map(|why| self.open(why)));
        findings
    }

    fn about_step(&self, step: &ProblemStep, heat: Option<&StepHeat>) -> Option<Finding> {
        if let (StepSource::Result { name }, None) = (&step.heat, heat) {
            let message =
                format!("rests on {name}, which was not worked. No result is given without it.");
            let code = FindingCode::CycleNotWorked;
            return Some(self.at_step(Severity::Stop, code, step, message));
        }
        if heat.is_some_and(|heat| heat.rests_on_inflated) {
            let message = format!(
                "{} rests on a result whose uncertainty was inflated by a Birge ratio; here that \
                 result counts with its uncertainty as it was before.",
                step.name
            );
            let code = FindingCode::CycleInflated;
            return Some(self.at_step(Severity::Caution, code, step, message));
        }
        let bomb = step.bomb.as_ref().filter(|bomb| !bomb.reduced);
        bomb.map(|_| self.not_reduced(step))
    }

    fn not_reduced(&self, step: &ProblemStep) -> Finding {
        let message = format!(
            "{} is a bomb result that the case does not call reduced to standard states. Only \
             Δn·R·T is applied. Missing may be: the heat of the nitric and sulfuric acids that \
             formed, the energy of ignition and of the fuse, and the corrections of E. W. \
             Washburn to standard states (pressure, dissolved gases, the dilution of the acids). \
             Make them, and write reduced-to-standard-states = true.",
            step.name
        );
        self.at_step(
            Severity::Caution,
            FindingCode::BombNotReduced,
            step,
            message,
        )
    }

    fn temperatures(&self) -> Option<Finding> {
        if self.cycle.kelvin().is_some() {
            return None;
        }
        let steps = self.cycle.steps.iter();
        let each = steps.map(|s| format!("{} at {} K", s.name, exact_text(&s.kelvin)));
        let message = format!(
            "its steps hold at different temperatures: {}. Heats add up at one temperature only; \
             bring them to one with heat capacities first.",
            list(each)
        );
        Some(self.finding(Severity::Stop, FindingCode::CycleTemperature, message))
    }

    fn open(&self, why: &NoMultipliers) -> Finding {
        let message = match why {
            NoMultipliers::LeftOver(left) => format!(
                "no sum of the steps gives the target; left over: {}. Add a step that brings them \
                 in, or write one substance the same way everywhere.{}",
                list(
                    left.iter()
                        .map(|(species, amount)| self.amount(*species, amount))
                ),
                self.written_twice()
            ),
            NoMultipliers::TooLarge => "more steps, more substances or longer stoichiometric \
                 numbers than a cycle can have (60 steps, 200 substances, 19 digits). Divide it \
                 into several."
                .to_string(),
        };
        self.finding(Severity::Stop, FindingCode::CycleOpen, message)
    }

    /// "2 H2(g) consumed"
    fn amount(&self, species: usize, amount: &Exact) -> String {
        let label = &self.cycle.species[species].label;
        let number = match exact_text(&amount.abs()).as_str() {
            "1" => String::new(),
            _ => format!("{} ", amount.abs()),
        };
        let side = if amount.is_negative() {
            "consumed"
        } else {
            "formed"
        };
        format!("{number}{label} {side}")
    }

    /// One formula and phase under two labels is counted as two substances.
    fn written_twice(&self) -> String {
        let species = &self.cycle.species;
        let twice = species.iter().enumerate().find_map(|(index, one)| {
            let mut earlier = species[..index].iter();
            let other = earlier.find(|other| other.species.key() == one.species.key())?;
            Some((&other.label, &one.label))
        });
        twice.map_or(String::new(), |(a, b)| {
            format!(" `{a}` and `{b}` are one formula in one phase, and counted as two substances.")
        })
    }

    /// Determinations of unknown uncertainty cannot be weighed.
    pub(super) fn unweighted(&self, silent: &[usize]) -> Finding {
        let values = silent.iter().map(|index| &self.problem.values[*index]);
        let names = values.map(|value| {
            let source = self.problem.sources[value.source].id();
            format!("{} ({source})", value.substance)
        });
        let message = format!(
            "several determinations check each other, and some state no uncertainty, so that \
             nobody can say what each counts: {}. State it, or keep only the steps that the target \
             needs.",
            list(names)
        );
        self.finding(Severity::Stop, FindingCode::CycleUnweighted, message)
    }

    pub(super) fn not_finite(&self) -> Finding {
        let message = "a heat or a sensitivity is no finite number.".to_string();
        self.finding(Severity::Stop, FindingCode::CycleNotWorked, message)
    }

    pub(super) fn not_adjusted(&self, why: NoAdjustment, found: &Multipliers) -> Finding {
        match why {
            NoAdjustment::TooMany => {
                let message = "more redundant determinations than can be adjusted together (40). \
                               Divide the cycle into several."
                    .to_string();
                self.finding(Severity::Stop, FindingCode::CycleOpen, message)
            }
            NoAdjustment::Contradictory { closure } => {
                let message = format!(
                    "determinations contradict each other and leave no room for it: {} should be \
                     zero and is not, and no uncertainty is left between them (exact heats, or \
                     fully correlated ones). Correct one of them, or state what is not known.",
                    self.closure(&found.closures[closure])
                );
                self.finding(Severity::Stop, FindingCode::CycleContradictory, message)
            }
        }
    }

    /// "run-1 − 2·run-2"
    fn closure(&self, by: &[Exact]) -> String {
        closure_text(self.cycle, by)
    }

    /// What the adjustment showed.
    pub(super) fn after(
        &self,
        found: &Multipliers,
        adjustment: Option<&Adjustment>,
    ) -> Vec<Finding> {
        let weights = adjustment.map_or(&found.particular, |a| &a.weights);
        let mut findings: Vec<Finding> = self.unused(weights).into_iter().collect();
        let Some(adjustment) = adjustment.filter(|a| a.degrees_of_freedom > 0) else {
            return findings;
        };
        if adjustment.degrees_of_freedom <= 2 {
            findings.push(self.weak(adjustment));
        }
        if adjustment.disagrees() {
            findings.push(self.disagree(adjustment));
        }
        if self.cycle.inflate {
            findings.push(self.inflated(adjustment));
        }
        findings
    }

    fn unused(&self, weights: &[Exact]) -> Option<Finding> {
        let zero = Exact::from_integer(0.into());
        let steps = self.cycle.steps.iter().zip(weights);
        let unused: Vec<&ProblemStep> = steps
            .filter(|(_, weight)| **weight == zero)
            .map(|(step, _)| step)
            .collect();
        let first = unused.first()?;
        let message = format!(
            "the target needs nothing of {}.",
            list(unused.iter().map(|step| step.name.clone()))
        );
        Some(self.at_step(Severity::Note, FindingCode::CycleStepUnused, first, message))
    }

    fn weak(&self, adjustment: &Adjustment) -> Finding {
        let message = weakness(adjustment.degrees_of_freedom).unwrap_or_default();
        self.finding(
            Severity::Note,
            FindingCode::CycleWeakTest,
            message.to_string(),
        )
    }

    fn disagree(&self, adjustment: &Adjustment) -> Finding {
        let inflated = match self.cycle.inflate {
            true => "",
            false => " and no uncertainty inflated for that",
        };
        let message = format!(
            "its determinations do not agree within their uncertainties: {}. {} Nothing was \
             dropped{inflated}: look for the cause in the reports.",
            global_test(adjustment),
            local_test(self.cycle, adjustment)
        );
        self.finding(Severity::Caution, FindingCode::CycleDisagrees, message)
    }

    fn inflated(&self, adjustment: &Adjustment) -> Finding {
        let birge = adjustment.birge_ratio();
        let message = match birge > 1.0 {
            true => format!(
                "the case asks for it, and the uncertainty of the result is that of the stated \
                 uncertainties times the Birge ratio {}. That takes all of them as too small by \
                 one factor.",
                decimals(birge)
            ),
            false => format!(
                "the case asks for a Birge ratio; it is {}, not above one, and the uncertainty \
                 stays as it is.",
                decimals(birge)
            ),
        };
        self.finding(Severity::Caution, FindingCode::CycleInflated, message)
    }
}
