//! Laws of heating values, what is found about them, and that their records run again.

use hesswright::calculation::Calculation;
use proptest::prelude::*;

use super::rerun::assert_reruns;
use super::support::{Files, case, messages, outcome, worked};

pub const NATURAL_GAS: &str = include_str!("natural-gas.toml");

const SOURCES: [&str; 2] = ["codata-1989", "nasa-glenn-2021"];

fn none() -> Files {
    Files::of(&[])
}

fn fuel(table: &str) -> Calculation {
    let table = format!("[heating-values.f]\n{table}\ntemperature = \"25 °C\"\n");
    worked(&case(&SOURCES, &table), &none())
}

fn mole(parts: &str) -> Calculation {
    fuel(&format!("composition = {{ basis = \"mole\", {parts} }}"))
}

fn value(calculation: &Calculation, id: &str) -> f64 {
    outcome(calculation, id).value.to_f64()
}

/// In the order and with the digits of the case; combustion enthalpies are printed by the source.
const PRINTED: &str = r#"[source]
id = "given"
title = "Combustion enthalpies (invented)"
temperature = "298.15 K"
energy-unit = "kJ/mol"
coverage = "2"
[[entry]]
substance = "CH4(g)"
locator = "row 1"
combustion-enthalpy = "-890.6 ± 0.4"
[[entry]]
substance = "H2O(l)"
locator = "row 2"
formation-enthalpy = "-285.830 ± 0.040"
[[entry]]
substance = "H2O(g)"
locator = "row 3"
formation-enthalpy = "-241.826 ± 0.040"
"#;

#[test]
fn a_record_of_a_fuel_runs_again_from_its_attachments() {
    assert_reruns(NATURAL_GAS, &none());
    let printed = case(
        &["given.toml"],
        "[heating-values.f]\ncomposition = { basis = \"mole\", \"CH4(g)\" = \"0.95\", \
         \"N2(g)\" = \"0.05\" }\ntemperature = \"25 °C\"\nmetering = { temperature = \"15 °C\", \
         pressure = \"1 atm\", compression-factor = \"0.998\" }\n",
    );
    assert_reruns(&printed, &Files::of(&[("given.toml", PRINTED)]));
}

/// A printed combustion enthalpy is taken at its own temperature alone; elsewhere the substance
/// needs a formation enthalpy, which this source does not have.
#[test]
fn a_printed_combustion_enthalpy_serves_at_its_temperature() {
    let files = Files::of(&[("given.toml", PRINTED)]);
    let at = |temperature: &str| {
        let table = format!(
            "[heating-values.f]\ncomposition = {{ basis = \"mole\", \"CH4(g)\" = \"exact 1\" }}\n\
             temperature = \"{temperature}\"\n"
        );
        case(&["given.toml"], &table)
    };
    let calculation = worked(&at("298.15 K"), &files);
    assert_eq!(value(&calculation, "f.gross"), 890.6);
    assert_eq!(outcome(&calculation, "f.gross").stated.value_text, "890.6");
    assert!(super::support::calculation(&at("15 °C"), &files).is_err());
}

#[test]
fn what_is_given_off_is_positive_and_said_to_be_so() {
    let calculation = worked(NATURAL_GAS, &none());
    for outcome in &calculation.working.outcomes {
        assert!(outcome.value.to_f64() > 0.0, "{}", outcome.id);
        assert_eq!(outcome.direction().word(), "given off", "{}", outcome.id);
    }
    // Eight of the fuel; the bomb has none per volume.
    assert_eq!(calculation.working.outcomes.len(), 8 + 4);
    let nothing = mole("\"N2(g)\" = \"0.5\", \"CO2(g)\" = \"0.5\"");
    let word = outcome(&nothing, "f.gross").direction().word();
    assert_eq!(word, "neither released nor absorbed");
}

/// By hand: as received the dry gas is multiplied by 1 − 0.0040, and water vapour added.
#[test]
fn the_moisture_content_of_a_gas_thins_it_and_condenses() {
    let dry = NATURAL_GAS.replace(
        "state = \"as received\"\nmoisture-content = \"0.0040 ± 0.0010\"\n",
        "",
    );
    let dry = dry.replace(", \"H2O(g)\" = \"0.3093\"", "");
    let (dry, received) = (worked(&dry, &none()), worked(NATURAL_GAS, &none()));
    // ISO 6976:2016 has 44.431 at 15 °C [T]; CODATA and NASA give 44.42.
    let expected = 0.996 * value(&dry, "fuel.gross") + 0.004 * 44.42;
    let found = value(&received, "fuel.gross");
    assert!((found - expected).abs() < 1e-4, "{found}, {expected}");
    let expected = 0.996 * value(&dry, "fuel.net");
    assert!((value(&received, "fuel.net") - expected).abs() < 1e-9);
}

#[test]
fn products_that_are_not_agreed_stop_the_case_and_name_themselves() {
    let calculation = mole("\"CH4(g)\" = \"0.9\", \"CH3Cl(g)\" = \"0.1\"");
    assert!(calculation.is_stopped());
    assert!(calculation.working.outcomes.is_empty());
    let said = messages(&calculation, "combustion-products");
    assert_eq!(said.len(), 1);
    assert!(said[0].contains("CH3Cl(g)"), "{}", said[0]);
    assert!(
        said[0].contains("hydrogen chloride in water"),
        "{}",
        said[0]
    );
}

#[test]
fn the_volume_of_an_ideal_gas_is_said_to_be_that() {
    let metering = |more: &str| {
        fuel(&format!(
            "composition = {{ basis = \"mole\", \"CH4(g)\" = \"exact 1\" }}\n\
             metering = {{ temperature = \"15 °C\", {more} }}"
        ))
    };
    let ideal = metering("pressure = \"101.325 kPa\"");
    assert_eq!(messages(&ideal, "ideal-gas-volume").len(), 1);
    let factors = "summation-factors = { \"CH4(g)\" = \"0.0436\" }";
    let real = metering(&format!("pressure = \"101.325 kPa\", {factors}"));
    assert!(messages(&real, "ideal-gas-volume").is_empty());
    assert!(messages(&real, "compression-factor").is_empty());
    let far = metering(&format!("pressure = \"10 bar\", {factors}"));
    assert_eq!(messages(&far, "compression-factor").len(), 1);
    assert!(!far.is_stopped());
    // 1 − (p/p0)·s² is below zero at 1000 bar: no volume, and a stop.
    let beyond = metering(&format!("pressure = \"1000 bar\", {factors}"));
    assert!(beyond.is_stopped());
    assert!(beyond.working.outcome("f.gross").is_some());
    assert!(beyond.working.outcome("f.gross-per-volume").is_none());
}

#[test]
fn a_temperature_without_heat_capacities_stops_the_case() {
    let table = "[heating-values.f]\ncomposition = { basis = \"mole\", \"NH3(g)\" = \"exact 1\" }\n\
                 temperature = \"15 °C\"\n";
    let calculation = worked(&case(&["codata-1989"], table), &none());
    assert!(calculation.is_stopped());
    assert!(calculation.working.outcomes.is_empty());
}

/// A value printed for another temperature counts in a combustion as it does in a reaction.
#[test]
fn a_reference_at_another_temperature_is_said() {
    let given = PRINTED.replace(
        "combustion-enthalpy = \"-890.6",
        "formation-enthalpy = \"-74.6",
    );
    let given = given.replace("\"298.15 K\"", "\"291.15 K\"");
    let table = "[heating-values.f]\ncomposition = { basis = \"mole\", \"CH4(g)\" = \"exact 1\" }\n\
                 temperature = \"25 °C\"\n";
    let sources = ["given.toml", "codata-1989"];
    let calculation = worked(
        &case(&sources, table),
        &Files::of(&[("given.toml", &given)]),
    );
    assert!(!messages(&calculation, "reference-temperature").is_empty());
}

/// A mixture of as many components as a case may name is answered like a small one.
#[test]
fn two_hundred_components_by_mass_are_worked() {
    let declared = (1..=200).map(|i| format!("c{i} = {{ formula = \"C{i}H2\", phase = \"l\" }}\n"));
    let entries = (1..=200).map(|i| {
        format!(
            "[[entry]]\nsubstance = \"C{i}H2(l)\"\nlocator = \"row {i}\"\n\
             formation-enthalpy = \"{i}.0 ± 0.1\"\n"
        )
    });
    let source = format!(
        "[source]\nid = \"given\"\ntitle = \"Invented\"\ntemperature = \"298.15 K\"\n\
         energy-unit = \"kJ/mol\"\ncoverage = \"2\"\n{}",
        entries.collect::<String>()
    );
    let parts: String = (1..=200).map(|i| format!(", c{i} = \"0.005\"")).collect();
    let rest = format!(
        "[substances]\n{}[heating-values.f]\ncomposition = {{ basis = \"mass\"{parts} }}\n\
         temperature = \"25 °C\"\n",
        declared.collect::<String>()
    );
    let files = Files::of(&[("given.toml", &source)]);
    let calculation = worked(&case(&["given.toml", "codata-1989"], &rest), &files);
    assert!(value(&calculation, "f.gross-per-mass") > 0.0);
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(24))]

    /// The molar value of a mixture is the sum of mole fraction times component value, in any
    /// order of the components, and its net value that of theirs.
    #[test]
    fn a_mixture_is_the_sum_of_its_components(a in 1_u32..9000, b in 1_u32..999) {
        let rest = 10_000 - a - b;
        let parts = [("CH4(g)", a), ("CO(g)", b), ("H2(g)", rest)];
        let text = |parts: &[(&str, u32)]| {
            let part = |(name, count): &(&str, u32)| format!("\"{name}\" = \"0.{count:04}\"");
            parts.iter().map(part).collect::<Vec<_>>().join(", ")
        };
        let mixture = mole(&text(&parts));
        let mut turned = parts;
        turned.reverse();
        let turned = mole(&text(&turned));
        for id in ["f.gross", "f.net"] {
            let sum: f64 = parts
                .iter()
                .map(|(name, count)| {
                    let alone = mole(&format!("\"{name}\" = \"exact 1\""));
                    f64::from(*count) / 10_000.0 * value(&alone, id)
                })
                .sum();
            prop_assert!((value(&mixture, id) - sum).abs() < 1e-9);
            prop_assert_eq!(&outcome(&mixture, id).value, &outcome(&turned, id).value);
        }
        // Per mole over molar mass is per mass (M from the same weights, by hand).
        let mass = (f64::from(a) * 16.043 + f64::from(b) * 28.010 + f64::from(rest) * 2.016) / 1e7;
        let per_mass = value(&mixture, "f.gross") / mass;
        prop_assert!((value(&mixture, "f.gross-per-mass") / per_mass - 1.0).abs() < 1e-12);
    }
}
