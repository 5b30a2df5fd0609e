//! A mixture held against a script that works it by the arithmetic of ISO 6976.

use super::super::rational::rational;
use super::super::tools::python;
use super::fuel;

/// The mixture of `heating_value.py`, as a user writes it. Invented.
const TABLE: &str = r#"composition = { basis = "mole", "CH4(g)" = "0.9000", "C2H6(g)" = "0.0550", "CO2(g)" = "0.0120", "H2O(g)" = "0.0030", "N2(g)" = "balance" }
temperature = "25 °C"
source = "invented composition"
[heating-values.f.metering]
temperature = "15 °C"
pressure = "101.325 kPa"
summation-factors = { "CH4(g)" = "0.04452", "C2H6(g)" = "0.0919", "CO2(g)" = "0.0752", "H2O(g)" = "0.2562", "N2(g)" = "0.0170" }
source = "given to show the arithmetic"
"#;

#[test]
fn every_result_of_a_natural_gas_is_that_of_the_script() {
    let script = python("heating_value.py");
    let expected = script.as_object().expect("an object of fractions");
    let results = fuel(&["codata-1989", "nasa-glenn-2021"], None, TABLE, "");
    assert_eq!(results.all().len(), expected.len());
    for (name, value) in expected {
        let value = rational(value.as_str().expect("a fraction"));
        assert_eq!(results.exact(&format!("f.{name}")), value, "{name}");
    }
}

/// The same gas by mass, converted by hand from the mole fractions with the same atomic weights
/// (here exact fractions are not printable, so to 12 digits).
#[test]
fn a_composition_by_mass_gives_the_same_heat_per_mass() {
    // Two components so that the conversion can be followed: x(CH4) = 0.6, x(N2) = 0.4;
    // M = 0.6·16.043 + 0.4·28.014 = 20.8314; w(CH4) = 9.6258/20.8314.
    let by_mole = "composition = { basis = \"mole\", \"CH4(g)\" = \"0.6\", \"N2(g)\" = \"0.4\" }\n\
                   temperature = \"25 °C\"";
    let by_mass = "composition = { basis = \"mass\", \"CH4(g)\" = \"0.4620812811428900\", \
                   \"N2(g)\" = \"balance\" }\ntemperature = \"25 °C\"";
    let sources = ["codata-1989", "nasa-glenn-2021"];
    let (mole, mass) = (
        fuel(&sources, None, by_mole, ""),
        fuel(&sources, None, by_mass, ""),
    );
    for name in ["f.gross", "f.net", "f.gross-per-mass", "f.net-per-mass"] {
        let (a, b) = (mole.number(name, "value"), mass.number(name, "value"));
        assert!((a / b - 1.0).abs() < 1e-12, "{name}: {a}, {b}");
    }
    // By hand: 0.6·890.57/0.0208314 = 25650.80… kJ/kg.
    let value = mole.number("f.gross-per-mass", "value");
    assert!((value - 0.6 * 890.57 / 0.020_831_4).abs() < 1e-6, "{value}");
}

/// Dry and as received: liquid methanol with water, by hand. Per kilogram as received the gross
/// value is (1 − w) times the dry one, and the net one is less by the heat of vaporisation of the
/// water that the fuel holds as well.
#[test]
fn the_state_of_a_liquid_fuel_counts_as_by_hand() {
    let sources = ["codata-1989", "nasa-glenn-2021"];
    let declared = "[substances]\n\
                    methanol = { formula = \"CH4O\", phase = \"l\", cas = \"67-56-1\" , name = \"methanol\" }";
    let dry = "composition = { basis = \"mass\", moisture = \"dry\", methanol = \"exact 1\" }\n\
               temperature = \"25 °C\"";
    let received = format!("{dry}\nstate = \"as received\"\nmoisture-content = \"10 wt%\"");
    let wet = "composition = { basis = \"mass\", methanol = \"0.90\", \"H2O(l)\" = \"0.10\" }\n\
               temperature = \"25 °C\"";
    let again = format!("{wet}\nstate = \"dry\"");
    let run = |table: &str| fuel(&sources, None, table, declared);
    let (dry, received, wet, again) = (run(dry), run(&received), run(wet), run(&again));
    let value = |results: &super::super::case::Results, name: &str| results.number(name, "value");
    let near = |a: f64, b: f64| assert!((a / b - 1.0).abs() < 1e-12, "{a}, {b}");
    let gross = value(&dry, "f.gross-per-mass");
    let net = value(&dry, "f.net-per-mass");
    // 44.004 kJ/mol over 18.015 g/mol for the water held.
    let held = 0.1 * 44.004 / 0.018_015;
    near(value(&received, "f.gross-per-mass"), 0.9 * gross);
    near(value(&received, "f.net-per-mass"), 0.9 * net - held);
    for name in ["f.gross-per-mass", "f.net-per-mass", "f.gross", "f.net"] {
        near(value(&wet, name), value(&received, name));
        near(value(&again, name), value(&dry, name));
    }
}

/// At constant volume: graphite takes and gives as much gas and changes nothing; methane loses
/// two moles of gas, so 2·R·T = 2·8.31446…·298.15 J/mol less is given off (by hand).
#[test]
fn constant_volume_differs_by_the_gas_that_vanishes() {
    let sources = ["codata-1989", "nasa-glenn-2021"];
    let at = |gas: &str, at: &str| {
        let table = format!(
            "composition = {{ basis = \"mole\", \"{gas}\" = \"exact 1\" }}\n\
             temperature = \"25 °C\"\nat = \"{at}\""
        );
        fuel(&sources, None, &table, "")
    };
    let rt = 8.314_462_618_153_24 * 298.15 / 1000.0;
    for (gas, gross, net) in [
        ("CH4(g)", -2.0, 0.0),
        ("C(cr, graphite)", 0.0, 0.0),
        ("H2(g)", -1.5, -0.5),
    ] {
        let (pressure, volume) = (at(gas, "constant pressure"), at(gas, "constant volume"));
        for (name, change) in [("f.gross", gross), ("f.net", net)] {
            let difference = volume.number(name, "value") - pressure.number(name, "value");
            assert!(
                (difference - change * rt).abs() < 1e-9,
                "{gas} {name}: {difference}"
            );
        }
    }
}
