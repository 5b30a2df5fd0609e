//! Unit expressions and the factors of the units that they name.

use super::*;
use crate::quantity::Decimal;

fn unit(text: &str) -> Unit {
    Unit::parse(text).unwrap_or_else(|error| panic!("{text}: {error}"))
}

fn message(text: &str) -> String {
    Unit::parse(text).unwrap_err().to_string()
}

fn value(text: &str) -> Exact {
    Decimal::parse(text).unwrap().value()
}

#[test]
fn one_spelling_for_each_unit() {
    for (written, canonical) in [
        ("kJ/(kg K)", "kJ/(kg K)"),
        ("kJ mol^-1", "kJ/mol"),
        ("kJ·mol⁻¹", "kJ/mol"),
        ("kJ mol-1", "kJ/mol"),
        ("J K^-1 mol^-1", "J/(K mol)"),
        ("m³", "m3"),
        ("m^3", "m3"),
        ("ft3", "ft3"),
        ("m m", "m2"),
        ("kg/m3", "kg/m3"),
        ("1/h", "1/h"),
        ("h^-1", "1/h"),
        ("1", "1"),
        ("ml", "mL"),
        ("μg", "µg"),
        ("kg/kg", "kg/kg"),
        ("∆°C", "Δ°C"),
        ("kJ/(kg Δ°C)", "kJ/(kg Δ°C)"),
        ("W/(m² K)", "W/(m2 K)"),
    ] {
        assert_eq!(unit(written).symbol(), canonical, "{written}");
        assert_eq!(unit(canonical), unit(written), "{written}");
    }
}

#[test]
fn factors_agree_with_outside_tables() {
    // scipy.constants and pint 0.24.4 (default_en.txt), as check values; 1055.05585262 and
    // 101325 are exact there, the others rounded to the digits shown.
    for (text, factor, place) in [
        ("cal_th", "4.184", -6),
        ("cal_IT", "4.1868", -6),
        ("Btu_IT", "1055.05585262", -12),
        ("Btu_th", "1054.350264", -6),
        ("atm", "101325", -6),
        ("Torr", "133.32236842105", -11),
        ("psia", "6894.757293168", -9),
        ("lb", "0.45359237", -12),
    ] {
        let rounded = super::super::exact::round_to_place(unit(text).factor(), place);
        assert_eq!(rounded.value, value(factor), "{text}");
    }
    // NIST SP 811 (2008) B.8, from memory: 1 mmHg = 1.333224e2 Pa, 1 ft3 = 2.831685e-2 m3,
    // 1 Btu_IT/(lb °F) = 4.1868e3 J/(kg K) exactly, 1 Btu_IT/lb = 2.326e3 J/kg exactly.
    let rounded =
        |text, place| super::super::exact::round_to_place(unit(text).factor(), place).text;
    assert_eq!(rounded("mmHg", -4), "133.3224");
    assert_eq!(rounded("ft3", -8), "0.02831685");
    assert_eq!(unit("Btu_IT/(lb Δ°F)").factor(), &value("4186.8"));
    assert_eq!(unit("Btu_IT/lb").factor(), &value("2326"));
}

#[test]
fn prefixes_and_powers() {
    for (text, factor) in [
        ("kWh", "3.6e6"),
        ("MW", "1e6"),
        ("mg", "1e-6"),
        ("kmol", "1000"),
        ("lbmol", "453.59237"),
        ("mbar", "100"),
        ("cm3", "1e-6"),
        ("mL", "1e-6"),
        ("kcal_th/mol", "4184"),
        ("kJ/(mol K)", "1000"),
        ("g/mol", "0.001"),
        ("in2", "0.00064516"),
    ] {
        assert_eq!(unit(text).factor(), &value(factor), "{text}");
    }
}

#[test]
fn ambiguous_solidus_is_refused_with_the_spelling() {
    let expected = "expected one solidus, with one factor or brackets after it";
    for (text, spelling) in [
        ("J/mol/K", "J/(mol K)"),
        ("J/mol K", "J/(mol K)"),
        ("W/m^2/K", "W/(m2 K)"),
        ("J/(mol K) s", "J/(mol K s)"),
    ] {
        let message = message(text);
        assert_eq!(
            message,
            format!("found “{text}”; {expected}; write {spelling}")
        );
    }
}

#[test]
fn words_with_several_meanings_name_their_choices() {
    for text in [
        "kcal", "cal", "Btu", "BTU", "Nm3", "scf", "%", "ton", "ppm", "psi", "barg",
    ] {
        let error = Unit::parse(text).unwrap_err();
        assert!(matches!(error, UnitError::SeveralMeanings { .. }), "{text}");
    }
    assert_eq!(
        message("kcal/mol"),
        "found “kcal”; expected a unit with one meaning; \
         write kcal_th (4.184 kJ) or kcal_IT (4.1868 kJ)"
    );
}

#[test]
fn readings_and_percentages_stand_alone() {
    assert_eq!(
        message("kJ/(kg °C)"),
        "found “°C” in a compound unit; expected a temperature difference; use K or Δ°C"
    );
    assert!(matches!(
        Unit::parse("kg/wt%"),
        Err(UnitError::FractionInCompound { .. })
    ));
}

#[test]
fn faults_point_at_their_place() {
    for (text, span) in [
        ("kJ/moll", 3..7),
        ("kJ/(kg K", 0..8),
        ("kJ/", 0..3),
        ("/mol", 0..1),
        ("kJ)", 2..3),
        ("kJ^99", 2..5),
        ("kJ^", 2..3),
        ("m^0", 1..3),
        ("kJ/()", 4..5),
        ("kJ 2", 3..4),
        ("(kJ)", 0..1),
        ("J^2^3", 1..5),
    ] {
        let error = Unit::parse(text).unwrap_err();
        assert_eq!(error.span(), Some(span), "{text}: {error}");
    }
    assert!(message("kJ/moll").ends_with("did you mean mol?"));
    assert!(matches!(Unit::parse("  "), Err(UnitError::Missing { .. })));
    assert!(matches!(
        Unit::parse(&"kg ".repeat(1000)),
        Err(UnitError::TooLong { .. })
    ));
}
