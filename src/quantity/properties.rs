//! Laws that hold for every input, tried on generated ones.

use num_traits::{Pow, Signed, Zero};
use proptest::prelude::*;

use super::exact::power_of_ten;
use super::*;

/// Printed decimals of every accepted shape.
const PRINTED: &str = "[-+\u{2212}]?[0-9]{1,25}(\\.[0-9]{0,25})?([eE][-+]?[0-9]{1,2})?";

const UNITS: [&str; 12] = [
    "J", "kcal_th", "Btu_IT", "kWh", "°C", "°F", "K", "°R", "psia", "mmHg", "lb", "g",
];

fn exact() -> impl Strategy<Value = Exact> {
    (any::<i128>(), 1..i64::MAX, -30..30_i64)
        .prop_map(|(n, d, power)| Exact::new(n.into(), d.into()) * power_of_ten(power))
}

fn small() -> impl Strategy<Value = Real> {
    (-40..40_i64, 1..6_i64).prop_map(|(n, d)| Real::Exact(Exact::new(n.into(), d.into())))
}

fn form() -> impl Strategy<Value = LinearForm> {
    prop::collection::vec((0..6_usize, small()), 0..8).prop_map(|terms| {
        let mut form = LinearForm::new();
        for (index, sensitivity) in &terms {
            form.add_scaled(*index, sensitivity);
        }
        form
    })
}

proptest! {
    #[test]
    fn a_decimal_prints_as_it_was_printed(text in PRINTED) {
        let decimal = Decimal::parse(&text).unwrap();
        prop_assert_eq!(decimal.printed(), &text);
        let units = decimal.value() / power_of_ten(decimal.place());
        prop_assert!(units.is_integer());
    }

    #[test]
    fn exact_text_of_a_decimal_reads_back(text in "-?[0-9]{1,20}(\\.[0-9]{0,20})?(e-?[1-4]?[0-9])?") {
        let value = Decimal::parse(&text).unwrap().value();
        let written = terminating_decimal(&value).unwrap();
        prop_assert_eq!(Decimal::parse(&written).unwrap().value(), value);
    }

    #[test]
    fn rounding_moves_by_half_a_unit_at_most(value in exact(), place in -40..40_i64) {
        let rounded = round_to_place(&value, place);
        let moved = (&rounded.value - &value).abs() / power_of_ten(place);
        prop_assert!(moved <= Exact::new(1.into(), 2.into()));
        let read = Decimal::parse(&rounded.text).unwrap();
        prop_assert_eq!(read.place(), place);
        prop_assert_eq!(read.value(), rounded.value.clone());
        prop_assert_eq!(round_to_place(&rounded.value, place), rounded);
    }

    #[test]
    fn rounding_is_odd(value in exact(), place in -40..40_i64) {
        let (up, down) = (round_to_place(&value, place), round_to_place(&-value, place));
        prop_assert_eq!(up.value, -down.value);
    }

    #[test]
    fn order_of_magnitude_is_the_floor_of_the_logarithm(value in exact()) {
        match order_of_magnitude(&value) {
            None => prop_assert!(value.is_zero()),
            Some(order) => {
                prop_assert!(power_of_ten(order) <= value.abs());
                prop_assert!(value.abs() < power_of_ten(order + 1));
            }
        }
    }

    #[test]
    fn a_float_survives_the_way_to_exact_and_back(bits in any::<u64>()) {
        let float = f64::from_bits(bits);
        prop_assume!(float.is_finite());
        let exact = Exact::from_float(float).unwrap();
        prop_assert_eq!(to_f64(&exact), float);
    }

    /// The standard library's reading of decimal text is correctly rounded by its own contract.
    #[test]
    fn floats_agree_with_the_standard_reading(
        text in "-?[0-9]{1,30}(\\.[0-9]{1,30})?(e-?[0-9]{1,3})?"
    ) {
        if let Ok(decimal) = Decimal::parse(&text) {
            prop_assert_eq!(to_f64(&decimal.value()), text.parse::<f64>().unwrap());
        }
    }

    #[test]
    fn conversion_there_and_back_is_exact(value in exact(), from in 0..12_usize, to in 0..12_usize) {
        let (from, to) = (Unit::parse(UNITS[from]).unwrap(), Unit::parse(UNITS[to]).unwrap());
        match from.convert(&value, &to) {
            Ok(there) => prop_assert_eq!(to.convert(&there, &from), Ok(value)),
            Err(_) => prop_assert_ne!(from.dimension(), to.dimension()),
        }
    }

    #[test]
    fn powers_of_units_multiply(text in 0..12_usize, power in 1..=9_i32) {
        let symbol = UNITS[text];
        prop_assume!(!["°C", "°F"].contains(&symbol));
        let unit = Unit::parse(symbol).unwrap();
        let raised = Unit::parse(&format!("{symbol}^{power}")).unwrap();
        prop_assert_eq!(raised.factor(), &Pow::pow(unit.factor().clone(), power));
        prop_assert_eq!(raised.dimension(), unit.dimension().to_power(power));
    }

    #[test]
    fn any_text_is_read_or_refused(text in any::<String>()) {
        let fits = |span: std::ops::Range<usize>| text.get(span).is_some();
        if let Err(error) = Decimal::parse(&text) {
            prop_assert!(fits(error.span()));
            prop_assert!(!error.to_string().is_empty());
        }
        if let Err(error) = Unit::parse(&text) {
            prop_assert!(error.span().is_some_and(fits));
        }
        if let Err(error) = Quantity::parse(&text) {
            prop_assert!(error.span().is_some_and(fits));
        }
        let _ = (Quantity::parse_number(&text), Coverage::parse(&text));
    }

    #[test]
    fn text_of_the_right_letters_is_read_or_refused(
        text in "[-+0-9.eE ()±/µΔ°CFKkJmolghBtu_ITwt%^·⁻¹²\u{2212}]{0,24}"
    ) {
        if let Err(error) = Quantity::parse(&text) {
            let span = error.span().unwrap();
            prop_assert!(text.get(span).is_some());
        }
    }

    #[test]
    fn the_order_of_a_sum_does_not_matter(mut places in prop::collection::vec(-9..9_i64, 1..9)) {
        let sum = |places: &[i64]| Significance::sum(places.iter().copied().map(Significance::Place));
        let forward = sum(&places);
        places.reverse();
        prop_assert_eq!(sum(&places), forward);
        prop_assert_eq!(forward, Significance::Place(places.iter().copied().max().unwrap()));
    }

    #[test]
    fn a_product_has_the_digits_of_the_poorer_factor(
        a in "[1-9]\\.[0-9]{1,8}e-?[0-9]", b in "[1-9]\\.[0-9]{1,8}e-?[0-9]"
    ) {
        let (a, b) = (Decimal::parse(&a).unwrap(), Decimal::parse(&b).unwrap());
        let fewest = a.significant_digits().min(b.significant_digits());
        let (x, y) = (a.value(), b.value());
        let (of_x, of_y) = (Significance::Place(a.place()), Significance::Place(b.place()));
        let digits = |result: &Exact, significance| match significance {
            Significance::Place(place) => order_of_magnitude(result).unwrap() - place + 1,
            other => panic!("{other:?}"),
        };
        let product = digits(&(&x * &y), Significance::product(&x, of_x, &y, of_y));
        prop_assert_eq!(product, fewest as i64);
        let quotient = Significance::quotient(&x, of_x, &y, of_y).unwrap();
        prop_assert_eq!(digits(&(&x / &y), quotient), fewest as i64);
    }

    #[test]
    fn linear_forms_are_a_vector_space(a in form(), b in form(), c in form(), k in small()) {
        prop_assert_eq!(a.plus(&b), b.plus(&a));
        prop_assert_eq!(a.plus(&b).plus(&c), a.plus(&b.plus(&c)));
        prop_assert_eq!(a.plus(&b).scaled(&k), a.scaled(&k).plus(&b.scaled(&k)));
        prop_assert!(a.plus(&a.scaled(&Real::Exact(Exact::from_integer((-1).into())))).is_empty());
        prop_assert!(a.iter().all(|(_, sensitivity)| !sensitivity.is_zero()));
    }

    #[test]
    fn shares_add_up_to_one(a in form(), u in prop::collection::vec(0.01..10.0_f64, 6)) {
        let uncertainty = |index: usize| InputUncertainty::Standard(u[index]);
        let combined = combine(&a, &uncertainty, &Correlations::new());
        prop_assert_eq!(combined.standard.is_some(), !a.is_empty());
        let total: f64 = combined.shares.iter().filter_map(|(_, share)| *share).sum();
        prop_assert!(a.is_empty() || (total - 1.0).abs() < 1e-12);
    }

    #[test]
    fn full_correlation_adds_contributions(
        x in 0.1..10.0_f64, y in -10.0..-0.1_f64, u in 0.1..10.0_f64, v in 0.1..10.0_f64
    ) {
        let mut form = LinearForm::new();
        form.add_scaled(0, &Real::Float(x));
        form.add_scaled(1, &Real::Float(y));
        let mut correlations = Correlations::new();
        correlations.state(0, 1, 1.0).unwrap();
        let uncertainty = |index: usize| InputUncertainty::Standard([u, v][index]);
        let standard = combine(&form, &uncertainty, &correlations).standard.unwrap();
        prop_assert!((standard - (x * u + y * v).abs()).abs() < 1e-5);
    }

    #[test]
    fn an_uncertainty_is_stated_with_one_or_two_digits(expanded in 1e-30..1e30_f64) {
        let stated = Stated::by_uncertainty(&Real::Float(1.0), expanded).unwrap();
        let printed = Decimal::parse(stated.uncertainty_text.as_deref().unwrap()).unwrap();
        prop_assert!((1..=2).contains(&printed.significant_digits()) || printed.ends_in_uncounted_zeros());
        let moved = (to_f64(&printed.value()) - expanded).abs();
        prop_assert!(moved <= 0.17 * expanded);
    }
}
