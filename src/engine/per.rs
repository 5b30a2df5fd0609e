//! A heat referred to one mole, or to the mass, of one participant.

use num_traits::{Signed, Zero};

use crate::quantity::{Exact, LinearForm, Real, Significance, Unit};
use crate::source::{Problem, ProblemReaction};

use super::worked::Worked;

/// A molar mass as the sum of standard atomic weights.
#[derive(Clone, Debug)]
pub struct MolarMass {
    /// Index among the values used and the number of atoms.
    pub parts: Vec<(usize, Exact)>,
    /// g/mol
    pub value: Exact,
    pub significance: Significance,
}

/// M = Σ n_i·A_r(i)·(1 g/mol), from standard atomic weights (IUPAC/CIAAW), in g/mol. Ions have none
/// here: nobody weighs them, and the electron's mass is not among the weights.
pub(super) fn molar_mass(problem: &Problem, reaction: &ProblemReaction) -> Option<MolarMass> {
    if reaction.molar_mass.is_empty() {
        return None;
    }
    Some(sum_of_weights(problem, &reaction.molar_mass))
}

/// A molar mass from atomic weights: index among the values used and count of atoms.
pub(super) fn sum_of_weights(problem: &Problem, parts: &[(usize, Exact)]) -> MolarMass {
    let weight = |index: usize| problem.values[index].printed.decimal.value();
    let places = parts.iter().map(|(index, n)| {
        let used = &problem.values[*index];
        used.significance
            .times_exact(&used.printed.decimal.value(), n)
    });
    MolarMass {
        significance: Significance::sum(places),
        value: parts.iter().map(|(index, n)| weight(*index) * n).sum(),
        parts: parts.to_vec(),
    }
}

/// Δ_rH°/|ν| for the participant named by `per`, in the unit of the heat.
pub(super) fn per_mole(heat: &Worked, nu: &Exact) -> Option<Worked> {
    (!nu.is_zero()).then(|| heat.times_exact(&nu.abs().recip()))
}

/// (Δ_rH°/|ν|)/M in `unit` (energy per mass), `from` being the unit of the heat per mole.
pub(super) fn per_mass(
    heat: &Worked,
    mass: &MolarMass,
    from: &Unit,
    unit: &Unit,
) -> Option<Worked> {
    // from.factor / (10^-3 kg per g) / unit.factor, exactly.
    let scale = from.factor() * Exact::from_integer(1000.into()) / unit.factor();
    Some(heat.over(&mass.worked())?.times_exact(&scale))
}

impl MolarMass {
    /// The molar mass in g/mol with what it depends on.
    pub fn worked(&self) -> Worked {
        let mut form = LinearForm::default();
        for (index, count) in &self.parts {
            form.add_scaled(*index, &Real::Exact(count.clone()));
        }
        Worked {
            value: Real::Exact(self.value.clone()),
            significance: self.significance,
            form,
        }
    }
}
