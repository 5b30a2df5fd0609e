//! Molar gross heating values of ISO 6976:2016, Table 3, ideal gas, kJ/mol.
//!
//! The standard was not seen. Two public transcriptions agree for methane and ethane, the others
//! stand in one of them only (mark T). u is the standard uncertainty printed there.

use super::super::case::source;
use super::fuel;

struct Row {
    gas: &'static str,
    /// At 0, 15, 20 and 25 °C.
    gross: [f64; 4],
    u: f64,
    /// Whether the function of NASA's file reaches below 298.15 K, so that the case need not allow
    /// that it is carried on.
    reaches: bool,
}

const fn row(gas: &'static str, gross: [f64; 4], u: f64, reaches: bool) -> Row {
    Row {
        gas,
        gross,
        u,
        reaches,
    }
}

const ROWS: [Row; 7] = [
    row("CH4(g)", [892.92, 891.51, 891.05, 890.58], 0.19, true),
    row("C2H6(g)", [1564.35, 1562.14, 1561.42, 1560.69], 0.51, false),
    row("H2(g)", [286.64, 286.15, 285.99, 285.83], 0.02, true),
    row("CO(g)", [282.80, 282.91, 282.95, 282.98], 0.06, true),
    row("NH3(g)", [384.57, 383.51, 383.16, 382.81], 0.18, true),
    row("methanol", [766.60, 765.09, 764.59, 764.09], 0.13, true),
    row("toluene", [3952.77, 3949.83, 3948.86, 3947.89], 0.51, false),
];

const TEMPERATURES: [&str; 4] = ["0 °C", "15 °C", "20 °C", "25 °C"];

const SUBSTANCES: &str = r#"[substances]
methanol = { formula = "CH4O", phase = "g", name = "methanol", cas = "67-56-1" }
toluene = { formula = "C7H8", phase = "g", name = "toluene", cas = "108-88-3" }
"#;

/// From formation enthalpies of CODATA 1989 and NASA's file and NASA's heat capacities. The two
/// sides rest on different measurements: for methanol they are 0.14 kJ/mol apart, which is within
/// twice the standard's u; the others agree to a tenth of it.
#[test]
fn molar_values_agree_within_the_uncertainties_of_both_sides() {
    for row in ROWS {
        for (temperature, expected) in TEMPERATURES.iter().zip(row.gross) {
            let results = molar(&row, temperature);
            let value = results.number("f.gross", "value");
            // What is known of our side; NASA's file states nothing.
            let ours = results.number("f.gross", "expanded");
            let ours = if ours.is_nan() { 0.0 } else { ours };
            let allowed = libm::sqrt(4.0 * row.u * row.u + ours * ours) + 0.005;
            assert!(
                (value - expected).abs() <= allowed,
                "{} at {temperature}: {value}, the standard has {expected}, allowed {allowed}",
                row.gas
            );
        }
    }
}

/// The heat-capacity part alone: from 25 °C to 0 °C both sides move by the same amount, whatever
/// the formation enthalpies are. 0.02 is the rounding of two printed values and a little of the
/// difference of two functions.
#[test]
fn the_change_with_temperature_agrees_to_two_hundredths() {
    for row in ROWS {
        let at = |temperature| molar(&row, temperature).number("f.gross", "value");
        let (worked, printed) = (at("0 °C") - at("25 °C"), row.gross[0] - row.gross[3]);
        assert!(
            (worked - printed).abs() <= 0.02,
            "{}: {worked}, {printed}",
            row.gas
        );
    }
}

fn molar(row: &Row, temperature: &str) -> super::super::case::Results {
    let table = format!(
        "composition = {{ basis = \"mole\", \"{}\" = \"exact 1\" }}\ntemperature = \"{temperature}\"",
        row.gas
    );
    let allowance = match row.reaches {
        true => String::new(),
        false => format!(
            "[[assumptions]]\ntext = \"The function serves down to 0 °C.\"\n\
             basis = \"It begins at 300 K.\"\nconfirmed = true\n\
             allows = {{ extrapolation = [\"{}\"] }}\n",
            row.gas
        ),
    };
    let more = match row.gas {
        "methanol" => SUBSTANCES.lines().take(2).collect::<Vec<_>>().join("\n"),
        "toluene" => SUBSTANCES
            .lines()
            .enumerate()
            .filter(|(at, _)| [0, 2].contains(at))
            .map(|(_, line)| line)
            .collect::<Vec<_>>()
            .join("\n"),
        _ => String::new(),
    };
    let more = format!("{more}\n{allowance}");
    fuel(&["codata-1989", "nasa-glenn-2021"], None, &table, &more)
}

/// L0 of the standard (Table A.5 [T]); CODATA's two values of water differ by 44.004. The gap of
/// 0.009 is more than twice the standard's 0.004 and cannot close: it derives from the measured
/// properties of real steam. Within CODATA's own ±0.04 it is nothing.
#[test]
fn the_heat_of_vaporisation_agrees_within_the_uncertainty_of_codata() {
    let expected = [45.064, 44.431, 44.222, 44.013];
    for (temperature, expected) in TEMPERATURES.iter().zip(expected) {
        let table = format!(
            "composition = {{ basis = \"mole\", \"H2O(g)\" = \"exact 1\" }}\n\
             temperature = \"{temperature}\""
        );
        let results = fuel(&["codata-1989", "nasa-glenn-2021"], None, &table, "");
        let value = results.number("f.gross", "value");
        assert!((value - expected).abs() < 0.04, "{temperature}: {value}");
        assert_eq!(results.number("f.net", "value"), 0.0);
    }
}

/// Net at 25 °C by the standard's rule, with its own molar values as printed combustion enthalpies
/// and its own heat of vaporisation: to the last digit (worked by hand, mark C).
#[test]
fn net_values_follow_the_rule_of_the_standard_exactly() {
    let printed = [
        ("CH4(g)", "890.58", "802.554"),
        ("C2H6(g)", "1560.69", "1428.651"),
        ("H2(g)", "285.83", "241.817"),
        ("CO(g)", "282.98", "282.98"),
    ];
    for (gas, gross, net) in printed {
        let more = format!(
            "[[entry]]\nsubstance = \"{gas}\"\nlocator = \"Table 3\"\n\
             combustion-enthalpy = \"-{gross}\"\n"
        );
        // Liquid water as CODATA has it, vapour 44.013 above.
        let water = [("H2O(l)", "-285.830"), ("H2O(g)", "-241.817")];
        let given = source("kJ/mol", &water, &more);
        let table = format!(
            "composition = {{ basis = \"mole\", \"{gas}\" = \"exact 1\" }}\ntemperature = \"25 °C\""
        );
        let results = fuel(&["given.toml"], Some(&given), &table, "");
        assert_eq!(results.text("f.gross", "exact"), gross, "{gas}");
        assert_eq!(results.text("f.net", "exact"), net, "{gas}");
    }
}
