//! Resolving a reaction: its participants with their stoichiometric numbers, at its temperature.

use crate::case::{Given, Reaction};
use crate::notation::Equation;
use crate::quantity::{Exact, Quantity};

use super::path::reference_kelvin;
use super::problem::{ProblemReaction, ProblemTerm};
use super::resolve::Resolver;

impl Resolver<'_> {
    pub(super) fn reaction(&mut self, reaction: &Reaction) -> ProblemReaction {
        let equation = &reaction.equation;
        self.check_balance(equation);
        let (kelvin, temperature_value) = self.temperature(reaction.temperature.as_ref());
        let (mut terms, complete) = self.terms(reaction, &kelvin);
        self.check_vapours(reaction, &terms, &kelvin);
        if temperature_value.is_some() {
            let paths = terms.iter().filter_map(|term| term.path);
            paths.for_each(|path| self.add_end(path, &equation.span));
        }
        let left_out = self.dissolve(reaction, &mut terms);
        let per = per_index(reaction).filter(|_| complete);
        let molar_mass = per.map_or_else(Vec::new, |index| {
            let species = self.substances[terms[index].substance].species.clone();
            self.molar_mass(reaction, &species)
        });
        ProblemReaction {
            id: reaction.id.value.clone(),
            equation: equation.value.clone(),
            terms,
            per,
            molar_mass,
            kelvin,
            temperature_value,
            left_out,
            span: equation.span.clone(),
        }
    }

    /// The participants, reactants first, and whether all have been found; without one of them
    /// there are none. A fault then says why, and there is no problem; or a `stop` does.
    fn terms(&mut self, reaction: &Reaction, kelvin: &Exact) -> (Vec<ProblemTerm>, bool) {
        let equation = &reaction.equation;
        let mut terms = Vec::new();
        let mut complete = true;
        let left = equation.value.left.iter().map(|term| (term, -1));
        let right = equation.value.right.iter().map(|term| (term, 1));
        for (term, sign) in left.chain(right) {
            let place = self.text.inside(&equation.span, &term.span);
            let Some(substance) = self.participant(&term.participant, kelvin, &place) else {
                complete = false;
                continue;
            };
            terms.push(ProblemTerm {
                substance,
                nu: &term.coefficient * Exact::from_integer(sign.into()),
                path: self.path(substance, kelvin, &place),
            });
        }
        if !complete {
            terms.clear();
        }
        (terms, complete)
    }

    /// The temperature of a heat in K, and the input that states it where there is one.
    pub(super) fn temperature(&mut self, given: Option<&Given>) -> (Exact, Option<usize>) {
        let quantity = given.and_then(|given| given.quantity(&self.case.inputs));
        let kelvin = quantity.map_or_else(reference_kelvin, Quantity::value_in_si);
        let value = match given {
            // An exact temperature is the question, not a value that the answer rests on.
            Some(Given::Input(id)) if quantity.is_some_and(|q| !q.exact) => {
                self.input_value(&id.value)
            }
            _ => None,
        };
        (kelvin, value)
    }
}

/// Which participant `per` names.
fn per_index(reaction: &Reaction) -> Option<usize> {
    let per = reaction.per.as_ref()?;
    let Equation { left, right, .. } = &reaction.equation.value;
    let mut all = left.iter().chain(right);
    all.position(|term| term.participant.to_string() == per.value)
}
