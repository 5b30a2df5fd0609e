//! Heating values per volume.

use super::fuel;

/// Methane, ideal gas, gross: 1010.0 Btu per cubic foot at 60 °F and 14.696 psia (as two
/// public programs carry the figure, one of which names GPA 2145; the standard was not seen,
/// mark T). Its molar
/// value is of another vintage than ours by a few hundredths of a kJ/mol, 0.07 Btu here.
#[test]
fn methane_has_its_published_heat_per_cubic_foot() {
    let table = "composition = { basis = \"mole\", \"CH4(g)\" = \"exact 1\" }\n\
                 temperature = \"60 °F\"\n\
                 metering = { temperature = \"60 °F\", pressure = \"14.696 psia\" }";
    let units = "[units]\nenergy = \"Btu_IT\"\nvolume = \"ft3\"";
    let results = fuel(&["codata-1989", "nasa-glenn-2021"], None, table, units);
    assert_eq!(results.text("f.gross-per-volume", "unit"), "Btu_IT/ft3");
    let value = results.number("f.gross-per-volume", "value");
    assert!((value - 1010.0).abs() < 0.15, "{value}");
}

/// The metering conditions move the volume and nothing else: the ratio of 0 °C to 15 °C is that of
/// the absolute temperatures, and that of two pressures their own.
#[test]
fn metering_and_combustion_conditions_are_apart() {
    let at = |combustion: &str, metering: &str, pressure: &str| {
        let table = format!(
            "composition = {{ basis = \"volume\", \"CH4(g)\" = \"exact 1\" }}\n\
             temperature = \"{combustion}\"\n\
             metering = {{ temperature = \"{metering}\", pressure = \"{pressure}\" }}"
        );
        fuel(&["codata-1989", "nasa-glenn-2021"], None, &table, "")
    };
    let cold = at("25 °C", "0 °C", "101.325 kPa");
    let warm = at("25 °C", "15 °C", "101.325 kPa");
    let bar = at("25 °C", "0 °C", "1 bar");
    assert_eq!(cold.text("f.gross", "exact"), warm.text("f.gross", "exact"));
    let ratio = |a: &super::super::case::Results, b: &super::super::case::Results| {
        a.number("f.gross-per-volume", "value") / b.number("f.gross-per-volume", "value")
    };
    assert!((ratio(&cold, &warm) - 288.15 / 273.15).abs() < 1e-12);
    assert!((ratio(&cold, &bar) - 1.01325).abs() < 1e-12);
    // 890.57 kJ/mol over 22.413969… L/mol (CODATA 2018, molar volume at 273.15 K, 101.325 kPa).
    let value = cold.number("f.gross-per-volume", "value");
    assert!((value - 890.57 / 0.022_413_969_54).abs() < 0.01, "{value}");
    assert_ne!(
        at("0 °C", "0 °C", "101.325 kPa").number("f.gross", "value"),
        890.57
    );
}

/// Three ways to one compression factor give one result: Z = 0.998 stated, the summation factor
/// √0.002 to many digits, and B = −0.002·R·T/p in cm³/mol (by hand).
#[test]
fn the_compression_factor_comes_from_either_kind_of_data() {
    let with = |data: &str| {
        let table = format!(
            "composition = {{ basis = \"mole\", \"CH4(g)\" = \"exact 1\" }}\n\
             temperature = \"25 °C\"\n[heating-values.f.metering]\ntemperature = \"15 °C\"\n\
             pressure = \"101.325 kPa\"\nsource = \"invented\"\n{data}"
        );
        fuel(&["codata-1989", "nasa-glenn-2021"], None, &table, "")
    };
    let stated = with("compression-factor = \"0.998\"");
    let summed = with("summation-factors = { \"CH4(g)\" = \"0.04472135954999579\" }");
    let virial = with("second-virial = \"-47.28966007245707 cm3/mol\"");
    let ideal = stated.number("f.gross-per-volume", "value");
    for results in [&stated, &summed, &virial] {
        let real = results.number("f.gross-per-volume-real", "value");
        assert!((real - ideal / 0.998).abs() < 1e-6 * ideal, "{real}");
        assert_eq!(results.number("f.gross-per-volume", "value"), ideal);
    }
}
