//! What a case states itself: heat capacities, bounds of them, estimates, concentrations.

use hesswright::engine::Bound;

use super::rerun::assert_reruns;
use super::support::{Files, case, exact, messages, near, outcome, worked};
use hesswright::calculation::Calculation;
use hesswright::quantity::Real;

/// Invented: no heat capacities, so that those of the case are the only ones.
const SHEET: &str = r#"[source]
id = "sheet"
title = "Invented values without heat capacities"
temperature = "298.15 K"
energy-unit = "kJ/mol"
coverage = "2"

[[entry]]
substance = "C2H4O2(l)"
name = "acid"
locator = "row 1"
formation-enthalpy = "-484.5 ± 0.2"

[[entry]]
substance = "C2H6O(l)"
name = "alcohol"
locator = "row 2"
formation-enthalpy = "-277.6 ± 0.2"

[[entry]]
substance = "C4H8O2(l)"
name = "ester"
locator = "row 3"
formation-enthalpy = "-479.3 ± 0.2"

[[entry]]
substance = "H2O(l)"
name = "water"
locator = "row 4"
formation-enthalpy = "-285.830 ± 0.040"
"#;

/// Acid + alcohol -> ester + water at 340 K with four heat capacities.
fn esterification(capacities: [&str; 4]) -> String {
    let given = |text: &str| format!("{text}, range = [\"290 K\", \"350 K\"], source = \"S\"");
    let names = ["acid", "alcohol", "ester", "water"];
    let formulas = ["C2H4O2", "C2H6O", "C4H8O2", "H2O"];
    let mut text = String::from("[substances]\n");
    for (at, name) in names.iter().enumerate() {
        text += &format!(
            "{name} = {{ formula = \"{}\", phase = \"l\", heat-capacity = {{ {} }} }}\n",
            formulas[at],
            given(capacities[at])
        );
    }
    let equation = "acid + alcohol -> ester + water";
    let reaction = format!(
        "[reactions.r]\nequation = \"{equation}\"\ntemperature = \"340 K\"\nper = \"ester\"\n"
    );
    case(&["sheet.toml"], &(text + &reaction))
}

fn files() -> Files {
    Files::of(&[("sheet.toml", SHEET)])
}

fn run(capacities: [&str; 4]) -> Calculation {
    worked(&esterification(capacities), &files())
}

fn heat(calculation: &Calculation) -> f64 {
    outcome(calculation, "r.heat").value.to_f64()
}

const ACID: [&str; 2] = ["120 J/(mol K)", "130 J/(mol K)"];
const ESTER: [&str; 2] = ["160 J/(mol K)", "180 J/(mol K)"];
const ALCOHOL: &str = "value = \"112.3 J/(mol K)\"";
const WATER: &str = "value = \"75.3 J/(mol K)\"";

fn bounds([low, high]: [&str; 2]) -> String {
    format!("low = \"{low}\", high = \"{high}\"")
}

fn value(text: &str) -> String {
    format!("value = \"{text}\"")
}

/// By hand: −479.3 − 285.83 + 484.5 + 277.6 = −3.03 kJ/mol at 298.15 K, and
/// (170 + 75.3 − 125 − 112.3)·41.85 J/mol = 0.3348 kJ/mol for the increments.
#[test]
fn increments_go_by_the_heat_capacities_of_the_case() {
    let [acid, ester] = [value("125 J/(mol K)"), value("170 J/(mol K)")];
    let heat = heat(&run([&acid, ALCOHOL, &ester, WATER]));
    assert!((heat - (-3.03 + 0.3348)).abs() < 1e-9, "{heat}");
}

#[test]
fn each_result_is_worked_at_the_bounds_that_make_it_largest() {
    let bounded = run([&bounds(ACID), ALCOHOL, &bounds(ESTER), WATER]);
    let mut all = Vec::new();
    for acid in ACID {
        for ester in ESTER {
            all.push(heat(&run([&value(acid), ALCOHOL, &value(ester), WATER])));
        }
    }
    let largest = all.iter().map(|heat| heat.abs()).fold(0.0, f64::max);
    assert!((heat(&bounded).abs() - largest).abs() < 1e-9, "{all:?}");
    assert!(all.iter().any(|heat| (heat.abs() - largest).abs() > 0.1));
    // Released, so that the consumed acid is taken with its high bound and the ester with its low.
    for id in ["r.heat", "r.heat-per", "r.heat-per-mass"] {
        let adverse = &outcome(&bounded, id).adverse;
        let bounds: Vec<Bound> = adverse.iter().map(|a| a.bound).collect();
        assert_eq!(bounds, [Bound::High, Bound::Low], "{id}");
    }
    let said = messages(&bounded, "heat-capacity-bounds");
    assert_eq!(said.len(), 1);
    assert!(
        said[0].contains("the high bound of acid and the low bound of ester"),
        "{said:?}"
    );
}

#[test]
fn per_mass_per_mole_in_calories_and_by_an_input_is_the_same_heat() {
    let molar = run([
        &value("2.000 J/(mol K)"),
        ALCOHOL,
        &value("170 J/(mol K)"),
        WATER,
    ]);
    let calories = run([
        &value("0.4780114722753346080305927342256214149 cal_th/(mol K)"),
        ALCOHOL,
        &value("170 J/(mol K)"),
        WATER,
    ]);
    assert!((heat(&molar) - heat(&calories)).abs() < 1e-12);
    // C2H4O2 weighs 2·12.011 + 4·1.0080 + 2·15.999 = 60.052 g/mol (standard atomic weights 2021).
    let specific = run([
        &value("2.0 kJ/(kg K)"),
        ALCOHOL,
        &value("170 J/(mol K)"),
        WATER,
    ]);
    let by_hand = run([
        &value("120.104 J/(mol K)"),
        ALCOHOL,
        &value("170 J/(mol K)"),
        WATER,
    ]);
    assert_eq!(
        exact(outcome(&specific, "r.heat")),
        exact(outcome(&by_hand, "r.heat"))
    );
    let named = esterification([&value("stated"), ALCOHOL, &value("170 J/(mol K)"), WATER]);
    let input =
        "[inputs]\nstated = { value = \"2.000 J/(mol K)\", source = \"S\", confirmed = true }\n";
    let named = worked(&(named + input), &files());
    assert_eq!(
        exact(outcome(&named, "r.heat")),
        exact(outcome(&molar, "r.heat"))
    );
}

/// u = 0.5 J/(mol K) over 41.85 K is 20.925 J/mol, and of a value per mass the same.
#[test]
fn the_uncertainty_of_a_given_heat_capacity_counts_with_the_way() {
    for ester in ["170.0 ± 1.0 J/(mol K)", "170.0(5) J/(mol K)"] {
        let with = run([ALCOHOL, ALCOHOL, &value(ester), WATER]);
        let form = &outcome(&with, "r.heat").form;
        let stated = with
            .problem
            .values
            .iter()
            .position(|v| v.substance == "ester");
        let index = stated.expect("a value of the case");
        assert_eq!(form.get(index).map(Real::to_f64), Some(0.04185), "{ester}");
        let combined = outcome(&with, "r.heat")
            .combined
            .standard
            .expect("stated values");
        let of_formation = 0.1 * 0.1 * 3.0 + 0.02 * 0.02;
        let expected = libm::sqrt(of_formation + 0.020925 * 0.020925);
        assert!((combined - expected).abs() < 1e-12, "{combined} {expected}");
    }
}

/// The sum is made of the rows of the rule, and its error is 0.09·√(π/2) of it.
#[test]
fn an_estimate_carries_the_published_error_of_the_rule() {
    let text = "[substances]\nsalt = { formula = \"NaCl\", phase = \"cr\", name = \"sodium \
                chloride\", heat-capacity = { estimate = \"kopp\" } }\n[reactions.r]\nequation = \
                \"2 Na(cr) + Cl2(g) -> 2 salt\"\ntemperature = \"320 K\"\n";
    let worked = worked(&case(&["nasa-glenn-2021"], text), &Files::of(&[]));
    let row = worked
        .problem
        .values
        .iter()
        .position(|v| v.substance == "salt");
    let outcome = outcome(&worked, "r.heat");
    let sensitivity = outcome
        .form
        .get(row.expect("the estimate"))
        .map(Real::to_f64);
    assert!(
        near(sensitivity, Some(2.0 * 21.85 / 1000.0)),
        "{sensitivity:?}"
    );
    // 26.19 + 24.69 = 50.88 J/(mol K); 0.0437·50.88·0.09·1.2533141 = 0.25080 kJ/mol.
    let u = outcome.combined.standard.expect("an uncertainty");
    assert!((u - 0.250_80).abs() < 2e-5, "{u}");
    let said = messages(&worked, "heat-capacity-estimated");
    assert!(
        said[0].contains("50.88 J/(mol K)") && said[0].contains("9 %"),
        "{said:?}"
    );
}

fn solution(molality: &str, more: &str) -> Calculation {
    let text = format!(
        "[reactions.r]\nequation = \"H+(aq) + OH-(aq) -> H2O(l)\"\nmolality = {{ {molality} }}\n{more}"
    );
    worked(&case(&["codata-1989"], &text), &Files::of(&[]))
}

fn severities(calculation: &Calculation, code: &str) -> Vec<String> {
    let findings = calculation.working.findings.iter();
    let coded = findings.filter(|finding| finding.code.word() == code);
    coded.map(|finding| finding.severity.to_string()).collect()
}

#[test]
fn concentration_decides_what_infinite_dilution_is_worth() {
    let code = "infinite-dilution";
    let dilute = solution(
        "\"H+(aq)\" = \"1 mol/kg\", \"OH-(aq)\" = \"0.1 mol/kg\"",
        "",
    );
    assert_eq!(severities(&dilute, code), ["note"]);
    assert_eq!(severities(&dilute, "concentration-not-stated"), [""; 0]);
    let strong = "\"H+(aq)\" = \"1.1 mol/kg\", \"OH-(aq)\" = \"0.1 mol/kg\"";
    assert_eq!(severities(&solution(strong, ""), code), ["stop", "note"]);
    let allowed = "[[assumptions]]\ntext = \"Dilution is left out.\"\nbasis = \"It is small.\"\n\
                   confirmed = true\nallows = { infinite-dilution = [\"r\"] }\n";
    let allowed = solution(strong, allowed);
    assert_eq!(severities(&allowed, code), ["caution", "note"]);
    let said = messages(&allowed, code).join(" ");
    assert!(
        said.contains("Dilution is left out. Basis: It is small."),
        "{said}"
    );
    let unknown = solution("\"H+(aq)\" = \"1 mol/kg\"", "");
    let said = messages(&unknown, "concentration-not-stated");
    assert!(said[0].contains("of OH-(aq) is not stated"), "{said:?}");
}

#[test]
fn a_relative_enthalpy_is_added_to_what_is_consumed() {
    let plain = solution("\"H+(aq)\" = \"1 mol/kg\", \"OH-(aq)\" = \"1 mol/kg\"", "");
    let stated =
        "{ value = \"2.0 mol/kg\", relative-enthalpy = \"0.527 ± 0.060 kJ/mol\", source = \"S\" }";
    let strong = solution(
        &format!("\"H+(aq)\" = {stated}, \"OH-(aq)\" = \"1 mol/kg\""),
        "",
    );
    let apart = exact(outcome(&strong, "r.heat")) - exact(outcome(&plain, "r.heat"));
    assert_eq!(hesswright::quantity::exact_text(&apart), "-0.527");
    let u = |calculation: &Calculation| outcome(calculation, "r.heat").combined.standard;
    let (with, without) = (u(&strong).expect("u"), u(&plain).expect("u"));
    assert!((with * with - without * without - 0.03 * 0.03).abs() < 1e-12);
}

#[test]
fn a_solute_away_from_25_degrees_needs_a_partial_molar_heat_capacity() {
    let text =
        "[reactions.r]\nequation = \"H+(aq) + OH-(aq) -> H2O(l)\"\ntemperature = \"50 °C\"\n";
    let consult = ["codata-1989", "nasa-glenn-2021"];
    let worked = worked(&case(&consult, text), &Files::of(&[]));
    assert_eq!(severities(&worked, "heat-capacity-missing"), ["stop"]);
    let said = messages(&worked, "heat-capacity-missing");
    assert!(
        said[0].contains("OH-(aq)") && said[0].contains("10 %"),
        "{said:?}"
    );
    assert!(worked.working.outcomes.is_empty());
}

#[test]
fn a_given_heat_capacity_ends_where_its_range_does_unless_allowed() {
    let hot = |more: &str| {
        let text = esterification([ALCOHOL, ALCOHOL, ALCOHOL, WATER]);
        let text = text.replace("340 K\"\nper", "360 K\"\nper") + more;
        worked(&text, &files())
    };
    let stopped = hot("");
    assert_eq!(severities(&stopped, "outside-range"), ["stop"; 4]);
    assert!(messages(&stopped, "outside-range")[0].contains("360 K is 10 K outside"));
    let allowed = hot(
        "[[assumptions]]\ntext = \"It does not change.\"\nbasis = \"B\"\nallows = { \
                       extrapolation = [\"acid\", \"alcohol\", \"ester\", \"water\"] }\n",
    );
    assert_eq!(severities(&allowed, "outside-range"), ["caution"; 4]);
    assert!(!allowed.working.outcomes.is_empty());
}

#[test]
fn stable_is_refused_for_what_has_a_vapour_beside_other_gases() {
    let stops = |equation: &str, kelvin: &str| {
        let text =
            format!("[reactions.r]\nequation = \"{equation}\"\ntemperature = \"{kelvin} K\"\n");
        let worked = worked(&case(&["nasa-glenn-2021"], &text), &Files::of(&[]));
        severities(&worked, "stable-in-gas").len()
    };
    assert_eq!(
        stops("CH4(g) + 2 O2(g) -> CO2(g) + 2 H2O(stable)", "298.15"),
        1
    );
    assert_eq!(stops("CH4(g) + 2 O2(g) -> CO2(g) + 2 H2O(l)", "298.15"), 0);
    assert_eq!(
        stops("H2O(stable) -> H2O(g)", "350"),
        0,
        "its own vapour alone"
    );
    assert_eq!(stops("CaCO3(stable) -> CaO(stable) + CO2(g)", "800"), 0);
    assert_eq!(
        stops("Fe2O3(stable) + 3 H2(g) -> 2 Fe(stable) + 3 H2O(g)", "1000"),
        0
    );
    assert_eq!(stops("HgO(s) + H2(g) -> Hg(stable) + H2O(g)", "500"), 1);
}

#[test]
fn a_record_with_all_of_it_runs_again_from_its_attachments() {
    let text = "[substances]\n\
        lime = { formula = \"CaO\", phase = \"cr\", name = \"calcium oxide\", heat-capacity = { low \
        = \"0.70 J/(g K)\", high = \"0.90 J/(g K)\", range = [\"290 K\", \"500 K\"], source = \"S\" } }\n\
        calcite = { formula = \"CaCO3\", phase = \"cr\", heat-capacity = { estimate = \"kopp\" } }\n\
        [reactions.r]\nequation = \"calcite -> lime + CO2(g)\"\ntemperature = \"400 K\"\nper = \"lime\"\n\
        [reactions.s]\nequation = \"H+(aq) + OH-(aq) -> H2O(l)\"\nmolality = { \"H+(aq)\" = { value = \
        \"2.0 mol/kg\", relative-enthalpy = \"0.527 kJ/mol\", source = \"S\" } }\n";
    assert_reruns(
        &case(&["codata-1989", "nasa-glenn-2021"], text),
        &Files::of(&[]),
    );
}

#[test]
fn a_heating_value_takes_no_bounds() {
    let text = "[substances]\nmethane = { formula = \"CH4\", phase = \"g\", heat-capacity = { low = \
                \"35 J/(mol K)\", high = \"36 J/(mol K)\", range = [\"280 K\", \"300 K\"], source = \
                \"S\" } }\n[heating-values.f]\ncomposition = { basis = \"mole\", methane = \"exact \
                1\" }\ntemperature = \"15 °C\"\n";
    let consult = ["codata-1989", "nasa-glenn-2021"];
    let worked = worked(&case(&consult, text), &Files::of(&[]));
    assert_eq!(severities(&worked, "heat-capacity-bounds"), ["stop"]);
}
