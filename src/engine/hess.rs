//! The Hess sum of formation enthalpies.

use crate::quantity::{Exact, LinearForm, Real, Significance, Unit};
use crate::source::{Problem, ProblemReaction};

use super::worked::Worked;

/// What one participant adds to the sum.
#[derive(Clone, Debug)]
pub struct HessTerm {
    /// Index among the substances of the problem.
    pub substance: usize,
    /// Index among the values used.
    pub value: usize,
    /// Stoichiometric number, negative for reactants.
    pub nu: Exact,
    /// The formation enthalpy in the unit of the sum.
    pub molar: Exact,
    pub molar_significance: Significance,
    /// ν·Δ_fH° in the unit of the sum.
    pub contribution: Exact,
    pub contribution_significance: Significance,
}

/// A heat of reaction per mole of reaction as written.
#[derive(Clone, Debug)]
pub struct Hess {
    pub terms: Vec<HessTerm>,
    pub sum: Exact,
    pub significance: Significance,
    /// Sensitivities to the values used: unit of the sum per unit of the value as printed.
    pub form: LinearForm,
}

impl Hess {
    /// The sum with its digits and what it depends on.
    pub fn worked(&self) -> Worked {
        Worked {
            value: Real::Exact(self.sum.clone()),
            significance: self.significance,
            form: self.form.clone(),
        }
    }
}

/// Δ_rH° = Σ ν_i·Δ_fH°_i at the reference temperature of the formation enthalpies, in `unit`
/// (energy per amount of substance). G. H. Hess, Ann. Phys. Chem. 50 (1840) 385; in today's
/// notation IUPAC Green Book, 3rd ed. (2007), section 2.11 (both from memory).
///
/// Exact: printed decimals and stoichiometric numbers are rational, and nothing is rounded. The
/// last significant place follows ASTM E29 (a product by an exact number keeps the number of
/// significant digits, a sum takes the coarsest last place). Limits: participants in their
/// standard states at the reference temperature; nothing about kinetics, mixing or pressure.
///
/// None where a participant has no printed formation enthalpy.
pub fn hess_sum(problem: &Problem, reaction: &ProblemReaction, unit: &Unit) -> Option<Hess> {
    let terms = reaction.terms.iter().map(|term| {
        let value = problem.substances[term.substance].value?;
        Some(hess_term(problem, term.substance, value, &term.nu, unit))
    });
    let terms: Vec<HessTerm> = terms.collect::<Option<_>>()?;
    let sum = terms.iter().map(|term| &term.contribution).sum();
    let significance = Significance::sum(terms.iter().map(|term| term.contribution_significance));
    let mut form = LinearForm::default();
    for term in &terms {
        let used = &problem.values[term.value];
        let sensitivity = &term.nu * conversion(&used.printed.unit, unit);
        form.add_scaled(term.value, &Real::Exact(sensitivity));
    }
    Some(Hess {
        terms,
        sum,
        significance,
        form,
    })
}

fn hess_term(
    problem: &Problem,
    substance: usize,
    value: usize,
    nu: &Exact,
    unit: &Unit,
) -> HessTerm {
    let used = &problem.values[value];
    let factor = conversion(&used.printed.unit, unit);
    let printed = used.printed.decimal.value();
    let molar_significance = used.significance.times_exact(&printed, &factor);
    let molar = printed * factor;
    let contribution = &molar * nu;
    HessTerm {
        substance,
        value,
        nu: nu.clone(),
        contribution_significance: molar_significance.times_exact(&molar, nu),
        molar_significance,
        molar,
        contribution,
    }
}

/// How many of `to` one of `from` is; both are units of energy per amount, as resolved.
fn conversion(from: &Unit, to: &Unit) -> Exact {
    from.factor() / to.factor()
}
