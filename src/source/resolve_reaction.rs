//! Resolving a reaction: its participants with their stoichiometric numbers, at its temperature.

use crate::case::{Given, Reaction};
use crate::quantity::{Exact, Quantity};

use super::path::reference_kelvin;
use super::problem::{ProblemReaction, ProblemTerm};
use super::resolve::Resolver;

impl Resolver<'_> {
    pub(super) fn reaction(&mut self, reaction: &Reaction) -> Option<ProblemReaction> {
        let equation = &reaction.equation;
        self.check_balance(equation);
        let (kelvin, temperature_value) = self.temperature(reaction.temperature.as_ref());
        let sides = [(&equation.value.left, -1), (&equation.value.right, 1)];
        let mut terms = Vec::new();
        let mut complete = true;
        for (term, sign) in sides
            .iter()
            .flat_map(|(side, sign)| side.iter().map(move |t| (t, sign)))
        {
            let place = self.text.inside(&equation.span, &term.span);
            let Some(substance) = self.participant(&term.participant, &kelvin, &place) else {
                complete = false;
                continue;
            };
            let nu = &term.coefficient * Exact::from_integer((*sign).into());
            let path = self.path(substance, &kelvin, &place);
            terms.push(ProblemTerm {
                substance,
                nu,
                path,
            });
        }
        if !complete {
            // A fault says why, and then there is no problem; or a `stop`.
            terms.clear();
        }
        self.check_vapours(reaction, &terms, &kelvin);
        let left_out = self.dissolve(reaction, &mut terms);
        let all = equation.value.left.iter().chain(&equation.value.right);
        let names: Vec<String> = all.map(|term| term.participant.to_string()).collect();
        let per = reaction.per.as_ref();
        let per = per.and_then(|per| names.iter().position(|name| *name == per.value));
        let per = per.filter(|_| complete);
        let molar_mass = per.map_or_else(Vec::new, |index| {
            let species = self.substances[terms[index].substance].species.clone();
            self.molar_mass(reaction, &species)
        });
        Some(ProblemReaction {
            id: reaction.id.value.clone(),
            equation: equation.value.clone(),
            terms,
            per,
            molar_mass,
            kelvin,
            temperature_value,
            left_out,
            span: equation.span.clone(),
        })
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
