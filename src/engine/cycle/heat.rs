//! The heat of each step, per mole of its equation as written.

use crate::quantity::{Exact, LinearForm, Real, Significance, Unit};
use crate::source::{Basis, Bomb, Problem, ProblemCycle, ProblemStep, StepSource};

use super::super::per::{MolarMass, sum_of_weights};
use super::super::work::Working;
use super::super::worked::Worked;

/// The heat of a step and how it came about, in the unit of the results.
#[derive(Clone, Debug)]
pub struct StepHeat {
    /// What the case or the source prints, per mole of the equation as written.
    pub measured: Worked,
    /// The molar mass where the printed heat is per mass.
    pub molar_mass: Option<MolarMass>,
    /// Δn_gas·R·T, where an internal energy was measured.
    pub gas_work: Option<Worked>,
    /// The enthalpy.
    pub heat: Worked,
    /// Whether the result that it rests on carries an inflated uncertainty, which is not passed
    /// on.
    pub rests_on_inflated: bool,
}

pub(super) fn step_heats(
    problem: &Problem,
    cycle: &ProblemCycle,
    unit: &Unit,
    working: &Working,
) -> Vec<Option<StepHeat>> {
    let heat = |step: &ProblemStep| match &step.heat {
        StepSource::Value { value, per } => Some(of_value(problem, cycle, step, *value, per, unit)),
        StepSource::Result { name } => of_result(name, working),
    };
    cycle.steps.iter().map(heat).collect()
}

fn of_result(name: &str, working: &Working) -> Option<StepHeat> {
    let outcome = working.outcome(name)?;
    let heat = Worked {
        value: outcome.value.clone(),
        significance: outcome.significance,
        form: outcome.form.clone(),
    };
    Some(StepHeat {
        measured: heat.clone(),
        molar_mass: None,
        gas_work: None,
        heat,
        rests_on_inflated: outcome.inflation != 1.0,
    })
}

fn of_value(
    problem: &Problem,
    cycle: &ProblemCycle,
    step: &ProblemStep,
    value: usize,
    per: &Basis,
    unit: &Unit,
) -> StepHeat {
    let printed = Worked::printed(problem, value, 1);
    let mut molar_mass = None;
    let measured = match per {
        Basis::Reaction => printed.times_exact(&unit.factor().recip()),
        Basis::Mole { nu, .. } => printed.times_exact(&(nu / unit.factor())),
        Basis::Mass { nu, weights, .. } => {
            let mass = sum_of_weights(problem, weights);
            let in_kilograms = Exact::new(1.into(), 1000.into());
            let molar = printed.times(&mass.worked());
            molar_mass = Some(mass);
            molar.times_exact(&(nu * in_kilograms / unit.factor()))
        }
    };
    let bomb = step.bomb.as_ref().zip(cycle.gas_constant);
    let gas_work = bomb.map(|(bomb, r)| gas_work(problem, step, bomb, r, unit));
    StepHeat {
        heat: Worked::sum(std::iter::once(&measured).chain(&gas_work)),
        measured,
        molar_mass,
        gas_work,
        rests_on_inflated: false,
    }
}

/// Δ_rH − Δ_rU = Δn_gas·R·T in `unit`, for ideal gases, the volume of all that is not gas being
/// left out. With the results of bombs it holds for standard states alone: E. W. Washburn,
/// J. Res. Natl. Bur. Stand. 10 (1933) 525 (from memory). R is exact, and T as the case states
/// it.
fn gas_work(problem: &Problem, step: &ProblemStep, bomb: &Bomb, r: usize, unit: &Unit) -> Worked {
    let mut form = LinearForm::new();
    if let Some(value) = bomb.temperature_value {
        let kelvin = problem.values[value].printed.unit.factor().clone();
        form.add_scaled(value, &Real::Exact(kelvin));
    }
    let temperature = Worked {
        value: Real::Exact(step.kelvin.clone()),
        significance: Significance::Exact,
        form,
    };
    let product = Worked::printed(problem, r, 1).times(&temperature);
    product.times_exact(&(&bomb.gas_moles / unit.factor()))
}
