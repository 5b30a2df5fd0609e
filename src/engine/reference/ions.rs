//! Conventions for ions: the hydrogen ion in water, the electron in a gas.

use num_traits::Zero;

use crate::finding::{FindingCode, Severity};
use crate::notation::PhaseLabel;
use crate::quantity::{Exact, exact_text};
use crate::source::{Problem, ProblemTerm};

use super::{Said, Sum};

/// Enthalpies of ions in water rest on the convention that H+(aq) is zero, which cancels only
/// where the ions on the two sides carry the same charge (IUPAC Green Book, from memory).
pub(super) fn charge_in_water(problem: &Problem, reaction: &Sum<'_>) -> Option<Said> {
    let charge: Exact = reaction
        .terms
        .iter()
        .map(|term| {
            let species = &problem.substances[term.substance].species;
            let phase = species.phase.as_ref();
            let in_water = phase.is_some_and(|phase| phase.label == PhaseLabel::Aqueous);
            let charge = if in_water {
                species.formula.charge()
            } else {
                0
            };
            &term.nu * Exact::from_integer(charge.into())
        })
        .sum();
    if charge.is_zero() {
        return None;
    }
    Some((
        Severity::Caution,
        FindingCode::ChargeInWater,
        format!(
            "{}: the charge of the ions in water is not the same on both sides (right less left: \
             {}). The heat then rests on the convention that H+(aq) is zero, and cannot be \
             measured as such.",
            reaction.id,
            exact_text(&charge)
        ),
    ))
}

/// Tables of gas ions differ in whether the electron is at rest or in thermal motion: 5/2·R·T, or
/// 6.197 kJ/mol at 298.15 K, for each electron (NASA/TP-2002-211556 prints 6197.428 J/mol).
pub(super) fn free_electrons(problem: &Problem, reaction: &Sum<'_>) -> Option<Said> {
    let species = |term: &ProblemTerm| &problem.substances[term.substance].species;
    let electron = reaction
        .terms
        .iter()
        .any(|t| species(t).formula.is_electron());
    let gas_ion = reaction.terms.iter().any(|term| {
        let phase = species(term).phase.as_ref();
        let in_gas = phase.is_some_and(|phase| phase.label == PhaseLabel::Gas);
        in_gas && species(term).formula.charge() != 0
    });
    (electron && gas_ion).then(|| {
        (
            Severity::Caution,
            FindingCode::FreeElectron,
            format!(
                "{}: the electron is zero by the convention for ions in water, while tables of gas \
                 ions differ in how they count it, by 6.2 kJ/mol for each electron.",
                reaction.id
            ),
        )
    })
}
