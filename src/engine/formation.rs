//! Formation equations: what a formation enthalpy is the heat of.

use num_traits::One;

use crate::notation::Species;
use crate::quantity::Exact;
use crate::source::ReferenceStates;

/// A species formed from the elements in their reference states.
#[derive(Clone, Debug, PartialEq)]
pub struct FormationEquation {
    /// Elements with their coefficients; for a cation also the electrons on the right.
    pub left: Vec<(Exact, Species)>,
    pub right: Vec<(Exact, Species)>,
}

/// The formation equation of one mole of a species; none where an element has no reference state
/// among the conventions. The elements stand in Hill order. Ions are formed with electrons, which the convention for H+(aq) makes
/// count nothing (IUPAC Green Book, 3rd ed. 2007, section 2.11; from memory).
pub fn formation_equation(
    species: &Species,
    states: &ReferenceStates,
) -> Option<FormationEquation> {
    let mut left = Vec::new();
    let counts = species.formula.counts();
    let with_carbon = counts.keys().any(|element| element.symbol() == "C");
    let mut elements: Vec<_> = counts.iter().collect();
    elements.sort_by(|(a, _), (b, _)| a.hill_cmp(**b, with_carbon));
    for (element, count) in elements {
        let state = states.of_element(*element)?;
        let atoms = state.formula.counts().get(element)?;
        left.push((count / atoms, state.clone()));
    }
    let mut right = vec![(Exact::one(), species.clone())];
    if species.formula.is_electron() {
        return Some(FormationEquation { left, right });
    }
    let charge = species.formula.charge();
    if charge != 0 {
        let electron = Species::parse("e-").ok()?;
        let count = Exact::from_integer(charge.unsigned_abs().into());
        let side = if charge > 0 { &mut right } else { &mut left };
        side.push((count, electron));
    }
    Some(FormationEquation { left, right })
}
