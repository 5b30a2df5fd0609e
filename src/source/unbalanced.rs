//! Whether an equation balances, and the fault of one that does not.

use num_bigint::BigInt;
use num_traits::Zero;

use crate::finding::{Fault, FaultCode, Located, Text};
use crate::notation::{Conserved, Equation, Formula, Surplus, Term, balanced_form, imbalance};
use crate::quantity::{Exact, exact_text};

use super::resolve::Resolver;

impl Resolver<'_> {
    /// Reports an equation that does not balance, where all its formulas are known.
    pub(super) fn check_balance(&mut self, equation: &Located<Equation>) {
        let sides = [&equation.value.left, &equation.value.right];
        let [left, right] = sides.map(|side| {
            side.iter()
                .filter_map(|t| self.formula_of(t))
                .collect::<Vec<_>>()
        });
        if left.len() != equation.value.left.len() || right.len() != equation.value.right.len() {
            return;
        }
        let signed = |side: &[(Exact, Formula)], sign: i32| -> Vec<(Exact, Formula)> {
            let sign = Exact::from_integer(sign.into());
            side.iter().map(|(c, f)| (c * &sign, f.clone())).collect()
        };
        let mut terms = signed(&left, -1);
        terms.extend(signed(&right, 1));
        let terms: Vec<(Exact, &Formula)> = terms.iter().map(|(c, f)| (c.clone(), f)).collect();
        let off = imbalance(&terms);
        if off.is_empty() {
            return;
        }
        let formulas =
            |side: &'_ [(Exact, Formula)]| side.iter().map(|(_, f)| f.clone()).collect::<Vec<_>>();
        let (left, right) = (formulas(&left), formulas(&right));
        let form = balanced_form(
            &left.iter().collect::<Vec<_>>(),
            &right.iter().collect::<Vec<_>>(),
        );
        self.faults
            .push(unbalanced(self.text, equation, &off, form.as_deref()));
    }

    fn formula_of(&self, term: &Term) -> Option<(Exact, Formula)> {
        let formula = self.wanted(&term.participant)?.species.formula;
        Some((term.coefficient.clone(), formula))
    }
}

/// Says which element or the charge is off and by how much, and the balanced form where there is
/// exactly one.
fn unbalanced(
    text: &Text,
    equation: &Located<Equation>,
    off: &[Surplus],
    form: Option<&[BigInt]>,
) -> Fault {
    let found: Vec<String> = off.iter().map(describe).collect();
    let advice = match form {
        Some(coefficients) => format!(
            "balanced it reads: {}",
            balanced(&equation.value, coefficients)
        ),
        None => not_balanced(off),
    };
    Fault::new(
        FaultCode::Unbalanced,
        text,
        &equation.span,
        found.join("; "),
        "as many atoms of each element, and as much charge, on the right as on the left",
        advice,
    )
}

/// What to do where no single set of positive coefficients balances the equation.
fn not_balanced(off: &[Surplus]) -> String {
    let one_sided = off.iter().find_map(|surplus| match &surplus.of {
        Conserved::Element(element) if surplus.left.is_zero() => Some((element, "right", "left")),
        Conserved::Element(element) if surplus.right.is_zero() => Some((element, "left", "right")),
        _ => None,
    });
    match one_sided {
        Some((element, there, missing)) => format!(
            "{} stands on the {there} alone: add the substance that brings it to the {missing}",
            element.symbol()
        ),
        None => "no coefficients balance it, or more than one set of them: check the substances, \
                 and write each reaction as an equation of its own"
            .to_string(),
    }
}

fn describe(surplus: &Surplus) -> String {
    let (left, right) = (exact_text(&surplus.left), exact_text(&surplus.right));
    let difference = exact_text(&(&surplus.right - &surplus.left));
    let sign = if difference.starts_with('-') { "" } else { "+" };
    match &surplus.of {
        Conserved::Element(element) => format!(
            "{}: {left} on the left, {right} on the right ({sign}{difference})",
            element.symbol()
        ),
        Conserved::Charge => {
            format!("charge: {left} on the left, {right} on the right ({sign}{difference})")
        }
    }
}

fn balanced(equation: &Equation, coefficients: &[BigInt]) -> String {
    let (left, right) = coefficients.split_at(equation.left.len().min(coefficients.len()));
    format!(
        "{} -> {}",
        side(&equation.left, left),
        side(&equation.right, right)
    )
}

fn side(terms: &[Term], coefficients: &[BigInt]) -> String {
    let one = BigInt::from(1);
    let term = |(term, coefficient): (&Term, &BigInt)| match *coefficient == one {
        true => term.participant.to_string(),
        false => format!("{coefficient} {}", term.participant),
    };
    let terms: Vec<String> = terms.iter().zip(coefficients).map(term).collect();
    terms.join(" + ")
}
