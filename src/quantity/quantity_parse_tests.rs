//! Quantities as people write them, and as they must not.

use super::*;
use crate::quantity::{Coverage, Exact, Significance};

fn quantity(text: &str) -> Quantity {
    Quantity::parse(text).unwrap_or_else(|error| panic!("{text}: {error}"))
}

fn value(text: &str) -> Exact {
    Decimal::parse(text).unwrap().value()
}

fn k2() -> Coverage {
    Coverage::parse("2").unwrap()
}

#[test]
fn printed_as_given() {
    for (text, unit) in [
        ("-285.830 kJ/mol", "kJ/mol"),
        ("1.200e3 kg", "kg"),
        ("60 °C", "°C"),
        ("0.08 ± 0.02", "1"),
        ("-285.830 ± 0.040 kJ/mol", "kJ/mol"),
        ("-285.830 +/- 0.040 kJ/mol", "kJ/mol"),
        ("0.08±0.02", "1"),
        ("-285.830(40) kJ/mol", "kJ/mol"),
        ("exact 3 mol", "mol"),
        ("1", "1"),
        ("2.1 kJ kg^-1 K^-1", "kJ/(kg K)"),
        ("1.2345(12)e3 kg", "kg"),
    ] {
        let read = quantity(text);
        assert_eq!(read.to_string(), text);
        assert_eq!(read.unit.symbol(), unit);
    }
}

#[test]
fn uncertainties_are_exact() {
    let expanded = |text: &str, printed: &str| StatedUncertainty::Expanded {
        half_width: value(text),
        printed: printed.to_owned(),
    };
    let last = |text: &str, printed: &str| StatedUncertainty::StandardLastDigits {
        standard: value(text),
        printed: printed.to_owned(),
    };
    for (text, stated) in [
        ("-285.830 ± 0.040 kJ/mol", expanded("0.040", "0.040")),
        ("5+/-1e-1 s", expanded("0.1", "1e-1")),
        ("-285.830(40) kJ/mol", last("0.040", "(40)")),
        ("1234.5(12) K", last("1.2", "(12)")),
        ("1200(50) kg", last("50", "(50)")),
        ("1.2345(12)e3 kg", last("1.2", "(12)")),
    ] {
        assert_eq!(quantity(text).uncertainty, Some(stated), "{text}");
    }
    assert_eq!(quantity("1.2345(12)e3 kg").value_in_si(), value("1234.5"));
}

#[test]
fn in_si() {
    assert_eq!(quantity("60 °C").value_in_si(), value("333.15"));
    assert_eq!(
        quantity("-68.32 kcal_th/mol").value_in_si(),
        value("-285850.88")
    );
    let read = quantity("-285.830 ± 0.040 kJ/mol");
    assert_eq!(read.standard_uncertainty_in_si(&k2()), Some(20.0));
    assert_eq!(
        quantity("60 ± 2 °C").standard_uncertainty_in_si(&k2()),
        Some(1.0)
    );
    assert_eq!(quantity("60 °C").standard_uncertainty_in_si(&k2()), None);
    let kelvin = Unit::parse("K").unwrap();
    assert_eq!(quantity("60 °C").value_in(&kelvin), Ok(value("333.15")));
}

#[test]
fn digits_that_a_value_has() {
    for (text, own, si) in [
        (
            "-285.830 kJ/mol",
            Significance::Place(-3),
            Significance::Place(0),
        ),
        ("60 °C", Significance::Place(1), Significance::Place(1)),
        ("25.0 °C", Significance::Place(-1), Significance::Place(-1)),
        ("1200 kg", Significance::Place(2), Significance::Place(2)),
        ("exact 3 mol", Significance::Exact, Significance::Exact),
        // 2.5 kcal_th has two digits; 10460 J with two digits ends at 10^3.
        (
            "2.5 kcal_th",
            Significance::Place(-1),
            Significance::Place(3),
        ),
    ] {
        assert_eq!(quantity(text).significance(), own, "{text}");
        assert_eq!(quantity(text).significance_in_si(), si, "{text}");
    }
}

#[test]
fn zeros_that_nobody_can_count() {
    for (text, ambiguous) in [
        ("1200 kg", true),
        ("1200. kg", false),
        ("1.200e3 kg", false),
        ("1200 ± 50 kg", false),
        ("exact 1200 kg", false),
        ("0 kJ", false),
    ] {
        assert_eq!(quantity(text).ambiguous_zeros, ambiguous, "{text}");
    }
}

#[test]
fn numbers_whose_unit_the_source_states() {
    let read = Quantity::parse_number("-285.830 ± 0.040").unwrap();
    let read = read.with_unit(Unit::parse("kJ/mol").unwrap());
    assert_eq!(read, quantity("-285.830 ± 0.040 kJ/mol"));
    assert_eq!(read.printed_number(), "-285.830 ± 0.040");
    assert_eq!(
        Quantity::parse_number("-285.8 kJ/mol").unwrap_err(),
        QuantityError::UnitNotWanted {
            span: 7..13,
            text: "kJ/mol".to_owned()
        }
    );
}

#[test]
fn tolerances() {
    let half_width = |value: &str, tolerance: &str| {
        let read = quantity(value).with_tolerance(&quantity(tolerance));
        read.map(|read| match read.uncertainty {
            Some(StatedUncertainty::Tolerance { half_width }) => half_width,
            other => panic!("{other:?}"),
        })
    };
    assert_eq!(half_width("1.200e3 kg", "12 kg"), Ok(value("12")));
    assert_eq!(half_width("1.2 t", "12 kg"), Ok(value("0.012")));
    assert_eq!(half_width("60 °C", "9 Δ°F"), Ok(value("5")));
    for (value, tolerance) in [
        ("60 °C", "2 °C"),
        ("60 °C", "2 kg"),
        ("60 kg", "0 kg"),
        ("60 kg", "-1 kg"),
        ("60 kg", "1 ± 1 kg"),
        ("60 ± 1 kg", "1 kg"),
        ("exact 60 kg", "1 kg"),
    ] {
        assert!(
            half_width(value, tolerance).is_err(),
            "{value}, {tolerance}"
        );
    }
}

#[test]
fn faults_point_at_their_place() {
    for (text, span) in [
        ("", 0..0),
        ("kJ", 0..1),
        ("5kJ", 1..2),
        ("5 kJoule", 2..8),
        ("5 ± 0 kJ", 5..6),
        ("5 ± -1 kJ", 5..7),
        ("5 ± kJ", 5..6),
        ("5.0(0) kJ", 3..6),
        ("5.0(1.2) kJ", 3..8),
        ("5.0(12 kJ", 3..9),
        ("5.0(12)e999 kJ", 8..11),
        ("  5.0.1 kJ", 5..6),
        ("exact 5 ± 1 kJ", 0..12),
        ("5 kcal", 2..6),
        ("1,200 kg", 1..2),
    ] {
        let error = Quantity::parse(text).unwrap_err();
        assert_eq!(error.span(), Some(span), "{text}: {error}");
    }
}
