//! Thermochemical and International Table units of energy, held against scipy.constants.

use serde_json::Value;

use super::case::{Folder, Results, one_reaction, source};
use super::tools::python;

/// scipy's factors are products of floating-point numbers.
const RELATIVE: f64 = 1e-13;

const UNITS: [&str; 6] = ["J", "kJ", "kcal_th", "kcal_IT", "Btu_th", "Btu_IT"];

/// The heat of 2 H2 + O2 -> 2 H2O(l), formation enthalpy -68.315 in `unit` (a printed number of
/// the right size for kcal_th/mol, and invented for the others), in the energy unit `wanted`.
fn heat(unit: &str, wanted: &str) -> Results {
    let folder = Folder::new();
    folder.write("given.toml", &source(unit, &[("H2O(l)", "-68.315")], ""));
    let equation = "2 H2(g) + O2(g) -> 2 H2O(l)";
    let case = one_reaction(
        &["given.toml"],
        equation,
        &format!("[units]\nenergy = \"{wanted}\""),
    );
    folder
        .results(&case)
        .unwrap_or_else(|said| panic!("{unit} in {wanted}: {said}"))
}

fn assert_near(worked: f64, expected: f64, what: &str) {
    let relative = (worked / expected - 1.0).abs();
    assert!(relative < RELATIVE, "{what}: {worked}, not {expected}");
}

fn factor(units: &Value, name: &str) -> f64 {
    units[name]
        .as_f64()
        .unwrap_or_else(|| panic!("scipy gives no {name}"))
}

#[test]
fn every_unit_becomes_every_other_by_the_factors_of_scipy() {
    let units = python("energy_units.py");
    for from in UNITS {
        for to in UNITS {
            let results = heat(&format!("{from}/mol"), to);
            let expected = -136.63 * factor(&units, from) / factor(&units, to);
            assert_near(
                results.number("r.heat", "value"),
                expected,
                &format!("{from} in {to}"),
            );
            assert_eq!(results.text("r.heat", "unit"), format!("{to}/mol"));
        }
    }
}

/// A pound-mole is as many moles as a pound has grams.
#[test]
fn a_table_per_pound_mole_is_read_by_the_pound_of_scipy() {
    let units = python("energy_units.py");
    let moles = factor(&units, "lb") * 1000.0;
    for energy in ["Btu_IT", "Btu_th", "kcal_IT"] {
        let results = heat(&format!("{energy}/lbmol"), "J");
        let expected = -136.63 * factor(&units, energy) / moles;
        assert_near(results.number("r.heat", "value"), expected, energy);
    }
}

/// The two calories are 0.0669 % apart (4.1868 and 4.184 J); a program that took one for the other
/// would be off by 0.09 kcal here.
#[test]
fn the_calories_are_told_apart() {
    let thermochemical = heat("kcal_th/mol", "kJ").number("r.heat", "value");
    let international = heat("kcal_IT/mol", "kJ").number("r.heat", "value");
    assert_near(international / thermochemical, 4.1868 / 4.184, "IT over th");
}
