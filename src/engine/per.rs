//! A heat referred to one mole, or to the mass, of one participant.

use num_traits::{Signed, Zero};

use crate::quantity::{Exact, LinearForm, Real, Significance, Unit};
use crate::source::{Problem, ProblemReaction};

use super::hess::Hess;

/// A molar mass as the sum of standard atomic weights.
#[derive(Clone, Debug)]
pub struct MolarMass {
    /// Index among the values used and the number of atoms.
    pub parts: Vec<(usize, Exact)>,
    /// g/mol
    pub value: Exact,
    pub significance: Significance,
}

/// A heat divided by an exact number or by a molar mass.
pub(super) struct Per {
    pub(super) value: Exact,
    pub(super) significance: Significance,
    pub(super) form: LinearForm,
}

/// M = Σ n_i·A_r(i)·(1 g/mol), from standard atomic weights (IUPAC/CIAAW), in g/mol. Ions have none
/// here: nobody weighs them, and the electron's mass is not among the weights.
pub(super) fn molar_mass(problem: &Problem, reaction: &ProblemReaction) -> Option<MolarMass> {
    if reaction.molar_mass.is_empty() {
        return None;
    }
    let weight = |index: usize| problem.values[index].printed.decimal.value();
    let parts = reaction.molar_mass.clone();
    let value: Exact = parts.iter().map(|(index, n)| weight(*index) * n).sum();
    let places = parts.iter().map(|(index, n)| {
        let used = &problem.values[*index];
        used.significance
            .times_exact(&used.printed.decimal.value(), n)
    });
    Some(MolarMass {
        significance: Significance::sum(places),
        value,
        parts,
    })
}

/// Δ_rH°/|ν| for the participant named by `per`, in the unit of the heat.
pub(super) fn per_mole(hess: &Hess, nu: &Exact) -> Option<Per> {
    if nu.is_zero() {
        return None;
    }
    let factor = nu.abs().recip();
    Some(Per {
        value: &hess.sum * &factor,
        significance: hess.significance.times_exact(&hess.sum, &factor),
        form: hess.form.scaled(&Real::Exact(factor)),
    })
}

/// (Δ_rH°/|ν|)/M in `unit` (energy per mass), `from` being the unit of the heat per mole.
pub(super) fn per_mass(heat: &Per, mass: &MolarMass, from: &Unit, unit: &Unit) -> Option<Per> {
    if mass.value.is_zero() {
        return None;
    }
    // from.factor / (10^-3 kg per g) / unit.factor, exactly.
    let scale = from.factor() * Exact::from_integer(1000.into()) / unit.factor();
    let value = &heat.value / &mass.value * &scale;
    let mut form = heat.form.scaled(&Real::Exact(&scale / &mass.value));
    for (index, count) in &mass.parts {
        let sensitivity = -(&value / &mass.value * count);
        form.add_scaled(*index, &Real::Exact(sensitivity));
    }
    let significance = Significance::quotient(
        &heat.value,
        heat.significance,
        &mass.value,
        mass.significance,
    )?;
    Some(Per {
        significance: significance.times_exact(&(&heat.value / &mass.value), &scale),
        value,
        form,
    })
}
