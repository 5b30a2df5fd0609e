//! Sources of different reference temperature, pressure or reference state, worked by hand.
//! All figures are invented.

use super::rerun::assert_reruns;
use super::support::{Files, case, messages, reaction, worked};

fn source(id: &str, head: &str, entries: &str) -> String {
    format!(
        "[source]\nid = \"{id}\"\ntitle = \"Invented\"\nenergy-unit = \"kJ/mol\"\n{head}\n{entries}"
    )
}

fn entry(substance: &str, rest: &str) -> String {
    format!("[[entry]]\nsubstance = \"{substance}\"\nlocator = \"row\"\n{rest}\n")
}

fn enthalpy(substance: &str, value: &str) -> String {
    entry(substance, &format!("formation-enthalpy = \"{value}\""))
}

fn heat_capacity(substance: &str, value: &str) -> String {
    let function =
        format!("heat-capacity = [{{ form = \"constant\", coefficients = [\"{value}\"] }}]");
    entry(substance, &function)
}

#[test]
fn another_reference_temperature_costs_the_heat_capacity_of_formation() {
    // At 18 °C = 291.15 K, 7 K below 298.15 K. Cp(H2O, l) - Cp(H2) - Cp(O2)/2
    // = 75.0 - 29.0 - 30.0/2 = 31.0 J/(mol K); 7 K · 31.0 J/(mol K) = 0.217 kJ/mol.
    let old = source(
        "old",
        "temperature = \"18 °C\"",
        &enthalpy("H2O(l)", "-286.1"),
    );
    let capacities = source(
        "cp",
        "",
        &[
            heat_capacity("H2O(l)", "75.0"),
            heat_capacity("H2(g)", "29.0"),
            heat_capacity("O2(g)", "30.0"),
        ]
        .concat(),
    );
    let files = Files::of(&[("old.toml", &old), ("cp.toml", &capacities)]);
    let rest = reaction("one", "H2(g) + 1/2 O2(g) -> H2O(l)")
        + &reaction("back", "4 H2O(l) -> 4 H2(g) + 2 O2(g)");
    let text = case(&["old.toml", "cp.toml"], &rest);
    let said = messages(&worked(&text, &files), "reference-temperature");
    assert_eq!(said.len(), 2, "{said:?}");
    assert!(
        said[0].starts_with("one: old (18 °C) gives values"),
        "{}",
        said[0]
    );
    assert!(
        said[0].ends_with("moves the heat by about 0.22 kJ/mol."),
        "{}",
        said[0]
    );
    // Four times as much, the other way: -0.868 kJ/mol.
    assert!(
        said[1].ends_with("moves the heat by about -0.87 kJ/mol."),
        "{}",
        said[1]
    );
    assert_reruns(&text, &files);
}

#[test]
fn heat_capacities_of_elements_that_cancel_travel_with_the_record() {
    // 3 CH2O -> C3H6O3 names no element; the formation of each still needs those of C, H2 and
    // O2, which cancel: (200.0 - 3·60.0) J/(mol K) · 7 K = 0.14 kJ/mol.
    let values = enthalpy("CH2O(l)", "-110.0") + &enthalpy("C3H6O3(l)", "-500.0");
    let old = source("old", "temperature = \"291.15 K\"", &values);
    let capacities = [
        heat_capacity("CH2O(l)", "60.0"),
        heat_capacity("C3H6O3(l)", "200.0"),
        heat_capacity("C(cr, graphite)", "8.5"),
        heat_capacity("H2(g)", "29.0"),
        heat_capacity("O2(g)", "30.0"),
    ];
    let capacities = source("cp", "", &capacities.concat());
    let files = Files::of(&[("old.toml", &old), ("cp.toml", &capacities)]);
    let text = case(
        &["old.toml", "cp.toml"],
        &reaction("a", "3 CH2O(l) -> C3H6O3(l)"),
    );
    let said = messages(&worked(&text, &files), "reference-temperature");
    assert!(
        said[0].ends_with("moves the heat by about 0.14 kJ/mol."),
        "{}",
        said[0]
    );
    assert_reruns(&text, &files);
}

#[test]
fn a_reference_temperature_whose_cost_is_not_known_is_said_too() {
    let old = source(
        "old",
        "temperature = \"291.15 K\"",
        &enthalpy("H2O(l)", "-286.1"),
    );
    let files = Files::of(&[("old.toml", &old)]);
    let text = case(
        &["old.toml"],
        &reaction("one", "H2(g) + 1/2 O2(g) -> H2O(l)"),
    );
    let said = messages(&worked(&text, &files), "reference-temperature");
    assert_eq!(said.len(), 1);
    assert!(
        said[0].contains("not known here") && said[0].contains("H2O(l)"),
        "{}",
        said[0]
    );
    assert_reruns(&text, &files);
}

/// Three sources of one liquid each, at these standard pressures.
fn at_pressures(pressures: [&str; 3]) -> Vec<String> {
    let substances = ["CH2O(l)", "C2H4O2(l)", "C3H6O3(l)"];
    let names = ["p0.toml", "p1.toml", "p2.toml"];
    let texts: Vec<String> = (0..3)
        .map(|i| {
            let head = format!(
                "temperature = \"298.15 K\"\npressure = \"{}\"",
                pressures[i]
            );
            source(&format!("p{i}"), &head, &enthalpy(substances[i], "-100.0"))
        })
        .collect();
    let files: Vec<(&str, &str)> = names
        .into_iter()
        .zip(texts.iter().map(String::as_str))
        .collect();
    let files = Files::of(&files);
    let text = case(&names, &reaction("a", "CH2O(l) + C2H4O2(l) -> C3H6O3(l)"));
    assert_reruns(&text, &files);
    messages(&worked(&text, &files), "reference-pressure")
}

#[test]
fn another_standard_pressure_costs_v_dp() {
    assert_eq!(at_pressures(["1 bar"; 3]), [""; 0]);
    // 1 atm = 101325 Pa: 1325 Pa · 1e-4 m³/mol = 0.1325 J/mol.
    let said = at_pressures(["1 bar", "1 atm", "1 bar"]);
    assert_eq!(said.len(), 1);
    assert!(
        said[0].starts_with("p0 and p1 have standard pressures 1325 Pa apart."),
        "{}",
        said[0]
    );
    assert!(
        said[0].ends_with("100 cm³/mol by about 0.00013 kJ/mol."),
        "{}",
        said[0]
    );
    // The two that are farthest apart are named, in whatever order they are used:
    // 2 bar - 1 bar = 100000 Pa, 10 J/mol.
    let said = at_pressures(["1 bar", "2 bar", "1 atm"]);
    assert!(
        said[0].starts_with("p0 and p1 have standard pressures 100000 Pa apart."),
        "{}",
        said[0]
    );
    assert!(said[0].ends_with("by about 0.010 kJ/mol."), "{}", said[0]);
}

/// A source that counts phosphorus from the red form, and one on the conventional scale.
fn phosphorus() -> Files {
    let head = "temperature = \"298.15 K\"\nreference-states = { P = \"P(cr, red)\" }";
    let values = [
        enthalpy("PCl3(l)", "-300.0"),
        enthalpy("PCl5(cr)", "-420.0"),
        enthalpy("P(cr, red)", "exact 0"),
    ];
    let red = source("red", head, &values.concat());
    let white = enthalpy("P(cr, red)", "-17.5") + &enthalpy("POCl3(l)", "-600.0");
    let white = source("white", "temperature = \"298.15 K\"", &white);
    Files::of(&[("red.toml", &red), ("white.toml", &white)])
}

#[test]
fn another_reference_state_stops_unless_its_atoms_cancel() {
    let files = phosphorus();
    let stops = |sources: &[&str], equation: &str| {
        let text = case(sources, &reaction("a", equation));
        assert_reruns(&text, &files);
        messages(&worked(&text, &files), "reference-state")
    };
    let both = ["red.toml", "white.toml"];
    // Both values count phosphorus from the red form: it cancels.
    assert_eq!(stops(&both, "PCl3(l) + Cl2(g) -> PCl5(cr)"), [""; 0]);
    // White phosphorus is zero by the conventions, red is -17.5 kJ/mol on their scale. Counted
    // from white, 2 PCl3 would be 2·(-17.5) = -35.0 kJ/mol lower.
    let said = stops(&both, "2 P(cr, white) + 3 Cl2(g) -> 2 PCl3(l)");
    assert_eq!(said.len(), 1);
    assert!(
        said[0].starts_with("a: red counts P from P(cr, red)"),
        "{}",
        said[0]
    );
    assert!(
        said[0].contains("2 mol of P does not cancel within red"),
        "{}",
        said[0]
    );
    assert!(
        said[0].contains("moves the heat by -35 kJ/mol"),
        "{}",
        said[0]
    );
    // As a reactant the other way: +17.5, to two digits, half to even, 18.
    let said = stops(&both, "PCl3(l) + 1/2 O2(g) -> POCl3(l)");
    assert!(
        said[0].contains("-1 mol of P") && said[0].contains("by 18 kJ/mol"),
        "{}",
        said[0]
    );
    // Without a value of the red form on the usual scale the cost is not known.
    let said = stops(&["red.toml"], "2 P(cr, white) + 3 Cl2(g) -> 2 PCl3(l)");
    assert!(
        said[0].contains("2 times the enthalpy of P(cr, red)"),
        "{}",
        said[0]
    );
}
