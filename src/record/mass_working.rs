//! The working of a heat per mole and per mass of one substance.

use crate::calculation::Calculation;
use crate::engine::{MolarMass, Outcome};
use crate::quantity::working_text;
use crate::source::{ProblemReaction, ValueUsed};

use super::numerals::{exact_fraction, in_full, minus, unit};
use super::pages::Step;
use super::rich::{Rich, Run};
use super::stating::stating;
use super::symbols::{molar_mass_sum, per_mass_quotient};
use super::working::{displayed, result};

pub(super) fn mass_steps(
    calculation: &Calculation,
    reaction: &ProblemReaction,
    mass: &MolarMass,
) -> Vec<Step> {
    let outcome = |quantity: &str| {
        calculation
            .working
            .outcome(&format!("{}.{quantity}", reaction.id))
    };
    let (Some(per), Some(by_mass)) = (outcome("heat-per"), outcome("heat-per-mass")) else {
        return Vec::new();
    };
    let nu = reaction
        .per
        .map(|index| num_traits::Signed::abs(&reaction.terms[index].nu));
    let nu = nu.map_or(String::new(), |nu| exact_fraction(&nu));
    let sum = mass_sum(&calculation.problem.values, mass);
    vec![
        Step::Heading {
            text: "Referred to one substance".to_string(),
        },
        Step::Text {
            text: Rich::plain(format!("Per mole: the heat divided by |ν| = {nu}. "))
                .with(stating(per)),
        },
        result(calculation, per),
        displayed(molar_mass_sum()),
        Step::Text { text: sum },
        displayed(per_mass_quotient()),
        Step::Text {
            text: mass_substitution(per, by_mass, mass),
        },
        Step::Text {
            text: stating(by_mass),
        },
        result(calculation, by_mass),
    ]
}

/// Δ_rh = (−552.86 kJ/mol)/(123.111 g/mol) = −4490.7…·kJ/kg
fn mass_substitution(per: &Outcome, by_mass: &Outcome, mass: &MolarMass) -> Rich {
    let number = |outcome: &Outcome| minus(&working_text(&outcome.value, outcome.significance));
    Rich::plain("Δ")
        .run(Run::Sub("r".to_string()))
        .run(Run::Italic("h".to_string()))
        .and(format!(
            " = ({} {})/({} g/mol) = {} {}. ",
            number(per),
            unit(&per.unit),
            in_full(&mass.value, mass.significance),
            number(by_mass),
            unit(&by_mass.unit)
        ))
}

/// M as the sum of the atomic weights, each with its row.
fn mass_sum(values: &[ValueUsed], mass: &MolarMass) -> Rich {
    let mut sum = Rich::plain("M = ");
    for (i, (index, count)) in mass.parts.iter().enumerate() {
        let plus = if i == 0 { "" } else { " + " };
        let value = &values[*index];
        sum = sum
            .and(format!(
                "{plus}{} · {} ",
                exact_fraction(count),
                value.printed.decimal.printed()
            ))
            .run(Run::ValueUsed(index + 1));
    }
    sum.and(format!(
        " = {} g/mol",
        in_full(&mass.value, mass.significance)
    ))
}
