//! Laws that hold for all notation.

use num_bigint::BigInt;
use num_integer::Integer;
use num_rational::BigRational;
use num_traits::Zero;
use proptest::prelude::*;

use super::trees;
use crate::notation::{
    Equation, Formula, NotationErrorKind, Participant, Phase, Piece, Species, balanced_form,
    imbalance,
};

/// Text that looks like notation more often than not.
fn scribble() -> impl Strategy<Value = String> {
    prop_oneof![
        any::<String>(),
        "[A-Za-z0-9₂²⁻⁺+^().,·/ =>{}∞\u{2212}-]{0,40}",
        "([A-Z][a-z]?[0-9]{0,2}[+^()-]{0,2}){1,6}(\\((g|l|cr|aq|am)\\))?( [+] | -> )?",
    ]
}

fn terms_of(equation: &Equation) -> Vec<(BigRational, Participant)> {
    let terms = equation.left.iter().chain(&equation.right);
    terms
        .map(|term| (term.coefficient.clone(), term.participant.clone()))
        .collect()
}

/// Whether the errors are of participants that repeat, which random equations may have.
fn only_repetitions(errors: &[crate::notation::NotationError]) -> bool {
    use crate::notation::EquationFault::{OnBothSides, Repeated};
    errors.iter().all(|error| {
        matches!(
            error.kind,
            NotationErrorKind::Equation(Repeated { .. } | OnBothSides { .. })
        )
    })
}

/// A stoichiometry of combustion with an arbitrary fuel: CaHbOc.
fn fuel() -> impl Strategy<Value = [Formula; 4]> {
    (1u32..30, 1u32..60, 1u32..5).prop_map(|(c, h, o)| {
        let fuel = format!("C{c}H{h}O{o}").replace("C1H", "CH");
        [fuel.as_str(), "O2", "CO2", "H2O"].map(|text| Formula::parse(text).unwrap())
    })
}

/// Coefficients of `fuel`, oxygen, carbon dioxide and water, from the element balances by
/// hand; negative for what is consumed.
fn combustion(formulas: &[Formula; 4]) -> Vec<BigRational> {
    let count = |symbol| {
        let element = crate::notation::Element::from_symbol(symbol).unwrap();
        formulas[0].counts()[&element].clone()
    };
    let (one, two) = (ratio(1, 1), ratio(2, 1));
    let water = count("H") / &two;
    let oxygen = (&two * count("C") + &water - count("O")) / two;
    vec![-one, -oxygen, count("C"), water]
}

fn ratio(p: i64, q: i64) -> BigRational {
    BigRational::new(p.into(), q.into())
}

fn signed<'a>(
    coefficients: &[BigRational],
    formulas: &'a [Formula],
) -> Vec<(BigRational, &'a Formula)> {
    coefficients.iter().cloned().zip(formulas).collect()
}

proptest! {
    #[test]
    fn a_formula_is_read_back_from_its_text(text in trees::formula()) {
        let formula = Formula::parse(&text).unwrap();
        let shown = formula.to_string();
        prop_assert_eq!(Formula::parse(&shown), Ok(formula.clone()), "{}", shown);
        prop_assert!(formula.counts().values().all(|count| *count > BigRational::zero()));
    }

    #[test]
    fn pieces_hold_the_text_without_marks(text in trees::formula()) {
        let formula = Formula::parse(&text).unwrap();
        let pieces = formula.pieces().into_iter().map(|piece| match piece {
            Piece::Text(text) | Piece::Sub(text) | Piece::Sup(text) | Piece::Italic(text) => text,
        });
        let set: String = pieces.collect();
        let plain = formula.to_string().replace('^', "");
        prop_assert_eq!(set.replace('\u{2212}', "-"), plain);
    }

    #[test]
    fn a_key_depends_on_composition_alone(first in trees::part(), second in trees::part()) {
        let key = |text: String| Formula::parse(&text).unwrap().hill();
        let joined = key(format!("{first}{second}"));
        prop_assert_eq!(&joined, &key(format!("{second}{first}")));
        prop_assert_eq!(&joined, &key(format!("({first})[{second}]")));
        prop_assert_eq!(&joined, &key(format!("{first}·{second}")));
        prop_assert_ne!(&joined, &key(first.clone()));
        prop_assert_ne!(&joined, &key(format!("({first}{second})^+")));
    }

    #[test]
    fn an_equation_is_read_back_from_its_text(text in trees::equation()) {
        match Equation::parse(&text) {
            Ok(equation) => {
                let shown = equation.to_string();
                let again = Equation::parse(&shown).unwrap();
                prop_assert_eq!(terms_of(&again), terms_of(&equation));
                prop_assert_eq!(again.to_string(), shown);
            }
            Err(errors) => prop_assert!(only_repetitions(&errors), "{text}: {errors:?}"),
        }
    }

    #[test]
    fn any_text_is_read_or_refused_within_itself(text in scribble()) {
        let errors = [
            Formula::parse(&text).err().into_iter().collect(),
            Species::parse(&text).err().into_iter().collect(),
            Phase::parse(&text).err().into_iter().collect(),
            Participant::parse(&text).err().into_iter().collect(),
            Equation::parse(&text).err().unwrap_or_default(),
        ];
        for error in errors.concat() {
            prop_assert!(text.get(error.span.clone()).is_some(), "{:?}", error);
            prop_assert!(!error.to_string().contains('\n'));
        }
    }

    #[test]
    fn what_is_read_is_read_back(text in scribble()) {
        if let Ok(formula) = Formula::parse(&text) {
            prop_assert_eq!(Formula::parse(&formula.to_string()), Ok(formula));
        }
        if let Ok(species) = Species::parse(&text) {
            prop_assert_eq!(Species::parse(&species.to_string()), Ok(species));
        }
    }

    #[test]
    fn combustion_balances_however_it_is_scaled_and_ordered(
        formulas in fuel(), p in 1i64..1000, q in 1i64..1000, turn in 0usize..4,
    ) {
        let scale = ratio(p, q);
        let coefficients: Vec<_> = combustion(&formulas).iter().map(|c| c * &scale).collect();
        let mut terms = signed(&coefficients, &formulas);
        terms.rotate_left(turn);
        prop_assert_eq!(imbalance(&terms), []);
    }

    #[test]
    fn a_changed_coefficient_is_noticed(
        formulas in fuel(), which in 0usize..4, by in 1i64..100,
    ) {
        let mut coefficients = combustion(&formulas);
        coefficients[which] += ratio(by, 7);
        let off = imbalance(&signed(&coefficients, &formulas));
        prop_assert_eq!(off.len(), formulas[which].counts().len());
    }

    #[test]
    fn the_balanced_form_is_the_smallest_multiple(formulas in fuel()) {
        let [fuel, oxygen, dioxide, water] = &formulas;
        let expected = combustion(&formulas);
        let found = balanced_form(&[fuel, oxygen], &[dioxide, water]);
        if expected[1] >= BigRational::zero() {
            prop_assert_eq!(found, None);
            return Ok(());
        }
        let found = found.unwrap();
        let scale = BigRational::from_integer(found[0].clone());
        for (value, expected) in found.iter().zip(&expected) {
            let sign = if *expected < BigRational::zero() { -1 } else { 1 };
            prop_assert_eq!(
                BigRational::from_integer(value * BigInt::from(sign)),
                expected * &scale
            );
        }
        let shared = found.iter().fold(BigInt::zero(), |gcd, value| gcd.gcd(value));
        prop_assert_eq!(shared, BigInt::from(1));
    }
}
