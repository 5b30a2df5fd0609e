//! Cycles: what is said where they do not work, and what holds for all of them.

use hesswright::calculation::Calculation;
use hesswright::engine::Outcome;
use hesswright::finding::{FaultCode, Severity};
use hesswright::quantity::Real;
use proptest::prelude::*;

use crate::laws::support::{Files, calculation, case, codes, messages, near, outcome, worked};

const NONE: [&str; 1] = ["codata-1989"];

fn files() -> Files {
    Files::of(&[])
}

fn worked_cycle(tables: &str) -> Calculation {
    worked(&case(&NONE, tables), &files())
}

/// A step between forms of carbon, which need no source.
fn step(id: &str, equation: &str, heat: &str) -> String {
    format!(
        "{{ id = \"{id}\", equation = \"{equation}\", heat = \"{heat}\", measured = \"enthalpy\", \
         source = \"invented\" }},\n"
    )
}

fn cycle(id: &str, target: &str, steps: &[String]) -> String {
    format!(
        "[cycles.{id}]\ntarget = \"{target}\"\nsteps = [\n{}]\n",
        steps.concat()
    )
}

/// The one message with a code, which has to weigh what is said.
fn said(calculation: &Calculation, code: &str, severity: Severity) -> String {
    let findings = calculation.working.findings.iter();
    let coded: Vec<_> = findings.filter(|f| f.code.word() == code).collect();
    let all = &calculation.working.findings;
    assert_eq!(coded.len(), 1, "{code}: {all:#?}");
    assert_eq!(coded[0].severity, severity);
    coded[0].message.clone()
}

fn assert_stopped(calculation: &Calculation, code: &str, words: &[&str]) {
    let message = said(calculation, code, Severity::Stop);
    for word in words {
        assert!(message.contains(word), "no {word:?} in: {message}");
    }
    assert!(
        calculation
            .working
            .outcomes
            .iter()
            .all(|o| o.id != "c.heat")
    );
}

#[test]
fn a_target_that_no_sum_gives_is_stopped_with_what_is_left_over() {
    // The combustion of hydrogen is missing.
    let steps = [
        step(
            "methane",
            "CH4(g) + 2 O2(g) -> CO2(g) + 2 H2O(l)",
            "-890.6 ± 0.4 kJ/mol",
        ),
        step(
            "carbon",
            "C(cr, graphite) + O2(g) -> CO2(g)",
            "-393.5 ± 0.1 kJ/mol",
        ),
    ];
    let calculation = worked_cycle(&cycle("c", "C(cr, graphite) + 2 H2(g) -> CH4(g)", &steps));
    let left = ["2 H2(g) consumed", "O2(g) consumed", "2 H2O(l) formed"];
    assert_stopped(&calculation, "cycle-open", &left);
}

#[test]
fn one_substance_under_two_names_is_pointed_out() {
    let declared = "[substances]\nbenzene = { formula = \"C6H6\", phase = \"l\" }\n";
    let steps = [step("a", "3 C2H2(g) -> C6H6(l)", "-630 ± 2 kJ/mol")];
    let tables = declared.to_string() + &cycle("c", "3 C2H2(g) -> benzene", &steps);
    let calculation = worked_cycle(&tables);
    let words = ["`benzene` and `C6H6(l)`", "counted as two substances"];
    assert_stopped(&calculation, "cycle-open", &words);
}

#[test]
fn exact_heats_that_differ_contradict_each_other() {
    let steps = [
        step("a", "2 C(g) -> C2(g)", "exact -600 kJ/mol"),
        step("b", "4 C(g) -> 2 C2(g)", "exact -1201 kJ/mol"),
    ];
    let calculation = worked_cycle(&cycle("c", "2 C(g) -> C2(g)", &steps));
    assert_stopped(
        &calculation,
        "cycle-contradictory",
        &["2·(a) − (b)", "should be zero"],
    );
    // Where they agree nothing is adjusted, and the value is exact.
    let steps = [
        step("a", "2 C(g) -> C2(g)", "exact -600 kJ/mol"),
        step("b", "4 C(g) -> 2 C2(g)", "exact -1200 kJ/mol"),
    ];
    let calculation = worked_cycle(&cycle("c", "2 C(g) -> C2(g)", &steps));
    assert_eq!(outcome(&calculation, "c.heat").value.to_f64(), -600.0);
    assert!(!calculation.is_stopped());
}

/// Fully correlated heats of one uncertainty leave nothing to close in: the matrix is singular.
#[test]
fn a_singular_covariance_is_a_contradiction_only_where_the_heats_differ() {
    let tables = |second: &str| {
        let steps = [
            step("a", "2 C(g) -> C2(g)", "-600.0 ± 1.0 kJ/mol"),
            step("b", "2 C(g) -> C2(g)", second),
            step("d", "2 C(g) -> C2(g)", "-601.0 ± 1.0 kJ/mol"),
        ];
        let correlated = "correlations = [{ between = [\"a\", \"b\"], coefficient = \"1\" }]\n";
        cycle("c", "2 C(g) -> C2(g)", &steps) + correlated
    };
    let calculation = worked_cycle(&tables("-600.2 ± 1.0 kJ/mol"));
    assert_stopped(&calculation, "cycle-contradictory", &["fully correlated"]);
    let calculation = worked_cycle(&tables("-600.0 ± 1.0 kJ/mol"));
    // Two that are one count once beside the third: the mean of −600 and −601.
    assert_eq!(outcome(&calculation, "c.heat").value.to_f64(), -600.5);
}

#[test]
fn redundant_heats_without_uncertainty_cannot_be_weighed() {
    let steps = [
        step("a", "2 C(g) -> C2(g)", "-600.0 ± 1.0 kJ/mol"),
        step("b", "2 C(g) -> C2(g)", "-601.0 kJ/mol"),
    ];
    let calculation = worked_cycle(&cycle("c", "2 C(g) -> C2(g)", &steps));
    assert_stopped(
        &calculation,
        "cycle-unweighted",
        &["b: enthalpy of", "(case)"],
    );
}

/// Two heats of −600 and one of −610, u = 0.5 each, by hand: the mean is −603.3, and without the
/// third −600 with nothing left over.
fn one_apart(more: &str) -> String {
    let equation = "2 C(g) -> C2(g)";
    let steps = [
        step("a", equation, "-600.0 ± 1.0 kJ/mol"),
        step("b", equation, "-600.0 ± 1.0 kJ/mol"),
        step("d", equation, "-610.0 ± 1.0 kJ/mol"),
    ];
    cycle("c", equation, &steps) + more
}

#[test]
fn an_uncertainty_says_that_it_does_not_cover_a_disagreement() {
    let resting =
        "[cycles.half]\ntarget = \"C(g) -> 1/2 C2(g)\"\nsteps = [{ heat = \"c.heat\" }]\n";
    let calculation = worked_cycle(&one_apart(resting));
    for id in ["c.heat", "half.heat"] {
        // (10/3)²·(1 + 1 + 4)/0.25
        let apart = "the disagreement of determinations (χ² = 266.67 at 2 degrees of freedom)";
        assert_eq!(outcome(&calculation, id).not_covered, [apart], "{id}");
    }
    let without = calculation.working.cycles[0]
        .without
        .expect("one does not fit");
    assert_eq!((without.step, without.heat), (2, -600.0));
    assert_eq!((without.chi_square, without.degrees_of_freedom), (0.0, 1));
    // Inflated for it, the uncertainty covers it.
    let calculation = worked_cycle(&one_apart("inflate = \"birge-ratio\"\n"));
    assert!(outcome(&calculation, "c.heat").not_covered.is_empty());
}

#[test]
fn a_stated_correlation_is_a_value_used_with_a_source() {
    let correlated = |source: &str| {
        let pair = "between = [\"a\", \"b\"], coefficient = \"0.5\"";
        worked_cycle(&one_apart(&format!(
            "correlations = [{{ {pair}{source} }}]\n"
        )))
    };
    let calculation = correlated("");
    let message = said(&calculation, "not-located", Severity::Caution);
    assert!(message.contains("a and b"), "{message}");
    let calculation = correlated(", source = \"report 7\", locator = \"table 2\"");
    let mut findings = calculation.working.findings.iter();
    assert!(!findings.any(|finding| finding.code.word() == "not-located"));
    let stated = calculation.problem.cycles[0].correlations[0];
    let value = &calculation.problem.values[stated.value];
    assert_eq!(
        (stated.between, value.printed_text().as_str()),
        ([0, 1], "0.5")
    );
    assert!(
        value.locator.ends_with("report 7, table 2"),
        "{}",
        value.locator
    );
}

/// What cancels between the determinations needs no uncertainty for them to be weighed.
#[test]
fn a_value_that_all_determinations_share_need_not_state_one() {
    let steps = [
        step("shared", "C2(g) -> 1/2 C4(g)", "-300 kJ/mol"),
        step("a", "2 C(g) -> C2(g)", "-600.0 ± 1.0 kJ/mol"),
        step("b", "4 C(g) -> 2 C2(g)", "-1202.0 ± 2.0 kJ/mol"),
    ];
    let calculation = worked_cycle(&cycle("c", "2 C(g) -> 1/2 C4(g)", &steps));
    let result = outcome(&calculation, "c.heat");
    // Both give 2 C → C2 with u = 0.5: −600.5 − 300.
    assert_eq!(result.value.to_f64(), -900.5);
    assert_eq!((result.combined.stated, result.combined.of), (2, 3));
}

#[test]
fn steps_at_different_temperatures_do_not_add_up() {
    let steps = [
        step("a", "2 C(g) -> C2(g)", "-600.0 ± 1.0 kJ/mol"),
        step("b", "C2(g) -> 1/2 C4(g)", "-300 ± 1 kJ/mol")
            .replace("measured", "temperature = \"20 °C\", measured"),
    ];
    let calculation = worked_cycle(&cycle("c", "2 C(g) -> 1/2 C4(g)", &steps));
    assert_stopped(
        &calculation,
        "cycle-temperature",
        &["b at 293.15 K", "a at 298.15 K"],
    );
}

#[test]
fn a_cycle_rests_on_results_and_falls_with_them() {
    let open = cycle(
        "d",
        "2 C(g) -> C2(g)",
        &[step("a", "3 C(g) -> C3(g)", "-900 ± 1 kJ/mol")],
    );
    let on = "[cycles.c]\ntarget = \"4 C(g) -> 2 C2(g)\"\nsteps = [{ heat = \"d.heat\" }]\n";
    let calculation = worked_cycle(&(on.to_string() + &open));
    assert_stopped(&calculation, "cycle-not-worked", &["rests on d.heat"]);
    // The order of the tables does not matter.
    let good = cycle(
        "d",
        "2 C(g) -> C2(g)",
        &[step("a", "4 C(g) -> 2 C2(g)", "-1200 ± 1 kJ/mol")],
    );
    let calculation = worked_cycle(&(on.to_string() + &good));
    assert_eq!(outcome(&calculation, "c.heat").value.to_f64(), -1200.0);
}

#[test]
fn what_a_step_does_not_add_is_said() {
    let steps = [
        step("a", "2 C(g) -> C2(g)", "-600.0 ± 1.0 kJ/mol"),
        step("b", "3 C(g) -> C3(g)", "-900.0 ± 1.0 kJ/mol"),
    ];
    let calculation = worked_cycle(&cycle("c", "2 C(g) -> C2(g)", &steps));
    let message = said(&calculation, "cycle-step-unused", Severity::Note);
    assert!(message.contains("needs nothing of b"), "{message}");
    let value = outcome(&calculation, "c.heat").value.exact().cloned();
    assert_eq!(value.map(|v| v.to_string()), Some("-600".to_string()));
}

/// −600 and −604, u = 0.5 each: m = 4, u(m) = 0.5·√2, χ² = 32 (by hand). Nobody can say which.
fn two_that_disagree() -> String {
    let steps = [
        step("a", "2 C(g) -> C2(g)", "-600.0 ± 1.0 kJ/mol"),
        step("b", "2 C(g) -> C2(g)", "-604.0 ± 1.0 kJ/mol"),
    ];
    cycle("c", "2 C(g) -> C2(g)", &steps)
}

#[test]
fn a_weak_test_says_what_it_cannot_see() {
    let calculation = worked_cycle(&two_that_disagree());
    let message = said(&calculation, "cycle-disagrees", Severity::Caution);
    for words in [
        "χ² = 32.00 at 1 degree of freedom",
        "below 0.001",
        "a, b deviate alike",
        "5.66",
    ] {
        assert!(message.contains(words), "{words}: {message}");
    }
    let message = said(&calculation, "cycle-weak-test", Severity::Note);
    assert!(message.contains("cannot tell which"), "{message}");
    let result = outcome(&calculation, "c.heat");
    assert_eq!(result.value.to_f64(), -602.0);
    // u = 0.5/√2, not inflated by itself.
    assert!(near(result.combined.standard, Some(libm::sqrt(0.125))));
}

#[test]
fn inflation_is_asked_for_or_not_there() {
    let tables = two_that_disagree() + "inflate = \"birge-ratio\"\n";
    let calculation = worked_cycle(&tables);
    let result = outcome(&calculation, "c.heat");
    // √32 times 0.5/√2 is 2: half the difference, as it should be for two.
    assert!((result.combined.standard.unwrap() - 2.0).abs() < 1e-12);
    assert!(near(result.expanded, Some(4.0)));
    assert_eq!(result.stated.value_text, "-602");
    let message = said(&calculation, "cycle-inflated", Severity::Caution);
    assert!(message.contains("5.66"), "{message}");
    let message = said(&calculation, "cycle-disagrees", Severity::Caution);
    assert!(!message.contains("no uncertainty inflated"), "{message}");
    // A result that rests on it is told that the inflation stays behind.
    let on = "[cycles.e]\ntarget = \"4 C(g) -> 2 C2(g)\"\nsteps = [{ heat = \"c.heat\" }]\n";
    let calculation = worked_cycle(&(tables + on));
    assert_eq!(messages(&calculation, "cycle-inflated").len(), 2);
    assert!(near(
        outcome(&calculation, "e.heat").combined.standard,
        Some(libm::sqrt(0.5))
    ));
}

/// Δn = 2 − 1 = 1 of gas at 300 K: 8.31446261815324 · 300 J/mol, exactly (R of CODATA 2022).
#[test]
fn a_bomb_result_is_corrected_exactly_and_for_gases_alone() {
    let step = "{ equation = \"CaCO3(cr, calcite) + C(cr, graphite) -> CaO(cr) + 2 CO(g)\", \
                heat = \"exact 300 kJ/mol\", measured = \"internal energy\", temperature = \"300 \
                K\", reduced-to-standard-states = true, source = \"invented\" },\n";
    let target = "CaCO3(cr, calcite) + C(cr, graphite) -> CaO(cr) + 2 CO(g)";
    let calculation = worked_cycle(&cycle("c", target, &[step.to_string()]));
    let value = outcome(&calculation, "c.heat")
        .value
        .exact()
        .cloned()
        .expect("exact");
    let by_hand = 300.0 + 2.0 * 8.31446261815324 * 300.0 / 1000.0;
    assert!((hesswright::quantity::to_f64(&value) - by_hand).abs() < 1e-12);
    let r = calculation
        .problem
        .values
        .iter()
        .find(|v| v.kind.word() == "gas-constant");
    assert!(r.is_some_and(|v| v.printed.to_string() == "exact 8.31446261815324 J/(mol K)"));
}

#[test]
fn combustion_enthalpies_come_from_the_sources_in_their_order() {
    let source = |id: &str, value: &str| {
        format!(
            "[source]\nid = \"{id}\"\ntitle = \"Invented\"\ntemperature = \"298.15 K\"\n\
             energy-unit = \"kJ/mol\"\ncoverage = \"2\"\n[[entry]]\nsubstance = \"CH4(g)\"\nlocator = \"row 1\"\n\
             combustion-enthalpy = \"{value}\"\n"
        )
    };
    let files = Files::of(&[
        ("one.toml", &source("one", "-890.6 ± 0.4")),
        ("two.toml", &source("two", "890.7 ± 0.4")),
    ]);
    let tables = "[cycles.c]\ntarget = \"2 CH4(g) + 4 O2(g) -> 2 CO2(g) + 4 H2O(l)\"\nsteps = [{ \
                  equation = \"2 CH4(g) + 4 O2(g) -> 2 CO2(g) + 4 H2O(l)\", combustion-of = \
                  \"CH4(g)\" }]\n";
    let calculation = worked(&case(&["one.toml", "two.toml"], tables), &files);
    assert_eq!(outcome(&calculation, "c.heat").value.to_f64(), -1781.2);
    assert!(messages(&calculation, "combustion-products").is_empty());
    crate::laws::assert_reruns(&case(&["one.toml", "two.toml"], tables), &files);
    let vapour = tables.replace("H2O(l)", "H2O(g)");
    let calculation = worked(&case(&["one.toml"], &vapour), &files);
    said(&calculation, "combustion-products", Severity::Caution);
    let calculation = worked(&case(&["two.toml"], tables), &files);
    said(&calculation, "combustion-sign", Severity::Stop);
    let none = calculation_faults(&case(&NONE, tables), &files);
    assert_eq!(none, [FaultCode::UnknownSubstance]);
}

fn calculation_faults(case: &str, files: &Files) -> Vec<FaultCode> {
    codes(&calculation(case, files).expect_err("faults"))
}

#[test]
fn a_chain_of_many_cycles_is_no_burden() {
    let first = cycle(
        "x0",
        "2 C(g) -> C2(g)",
        &[step("a", "2 C(g) -> C2(g)", "-600 ± 1 kJ/mol")],
    );
    let next = |k: usize| {
        let before = k - 1;
        format!(
            "[cycles.x{k}]\ntarget = \"2 C(g) -> C2(g)\"\nsteps = [{{ heat = \"x{before}.heat\" }}]\n"
        )
    };
    // Written from the last to the first, so that each rests on one further down.
    let tables: String = (1..2000).rev().map(next).collect();
    let calculation = worked_cycle(&(tables + &first));
    assert_eq!(outcome(&calculation, "x1999.heat").value.to_f64(), -600.0);
}

/// Five determinations over four forms of carbon, two of them redundant.
fn five() -> impl Strategy<Value = Vec<String>> {
    let numbers = prop::collection::vec((-9999i64..9999, 1i64..40), 5);
    numbers.prop_map(|numbers| {
        let equations = [
            "2 C(g) -> C2(g)",
            "3/2 C2(g) -> C3(g)",
            "4/3 C3(g) -> C4(g)",
            "4 C(g) -> C4(g)",
            "3 C(g) -> C3(g)",
        ];
        let each = equations.iter().zip(numbers).enumerate();
        each.map(|(at, (equation, (q, u)))| {
            let (q, u) = (q as f64 / 10.0, u as f64 / 10.0);
            step(
                &format!("s{at}"),
                equation,
                &format!("{q:.1} ± {u:.1} kJ/mol"),
            )
        })
        .collect()
    })
}

fn heat_of(steps: &[String], more: &str) -> (Calculation, Outcome) {
    let calculation = worked_cycle(&(cycle("c", "4 C(g) -> C4(g)", steps) + more));
    let result = outcome(&calculation, "c.heat").clone();
    (calculation, result)
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(48))]

    #[test]
    fn the_order_of_steps_changes_no_digit(
        steps in five(),
        order in Just((0..5usize).collect::<Vec<_>>()).prop_shuffle(),
        r in 0u32..10,
    ) {
        let more = format!(
            "correlations = [{{ between = [\"s1\", \"s3\"], coefficient = \"0.{r}\" }}]\n"
        );
        let (_, first) = heat_of(&steps, &more);
        let moved: Vec<String> = order.iter().map(|at| steps[*at].clone()).collect();
        let (_, other) = heat_of(&moved, &more);
        prop_assert_eq!(&first.value, &other.value);
        prop_assert_eq!(&first.stated, &other.stated);
        prop_assert!(near(first.combined.standard, other.combined.standard));
    }

    #[test]
    fn a_step_written_backwards_and_doubled_says_the_same(steps in five(), which in 0usize..5) {
        let (_, first) = heat_of(&steps, "");
        let mut turned = steps.clone();
        turned[which] = backwards(&steps[which]);
        let (_, other) = heat_of(&turned, "");
        prop_assert!(near(Some(first.value.to_f64()), Some(other.value.to_f64())));
        prop_assert!(near(first.combined.standard, other.combined.standard));
    }

    /// The uncertainty that goes the usual road, through sensitivities to the values used, is
    /// that of least squares: √Σ(w·u)² with the multipliers and uncertainties of the adjustment.
    #[test]
    fn uncertainty_by_sensitivities_is_that_of_least_squares(steps in five()) {
        let (calculation, result) = heat_of(&steps, "");
        let working = &calculation.working.cycles[0];
        let (adjustment, sum) = (working.adjustment.as_ref().unwrap(), working.sum.as_ref().unwrap());
        let parts = sum.weights.iter().zip(&adjustment.standard);
        let variance: f64 =
            parts.map(|(w, u)| square(hesswright::quantity::to_f64(w) * u)).sum();
        let least_squares = libm::sqrt(variance);
        let by_form = result.combined.standard.unwrap();
        prop_assert!((by_form - least_squares).abs() <= 1e-12 * least_squares);
        prop_assert!(matches!(result.value, Real::Float(_)));
    }
}

fn square(x: f64) -> f64 {
    x * x
}

/// The step turned, doubled, with twice the uncertainty.
fn backwards(step: &str) -> String {
    let field = |key: &str| {
        let start = step.find(&format!("{key} = \"")).expect("the key") + key.len() + 4;
        let end = start + step[start..].find('"').expect("its end");
        step[start..end].to_string()
    };
    let equation = hesswright::notation::Equation::parse(&field("equation")).expect("an equation");
    let side = |terms: &[hesswright::notation::Term]| {
        let term = |t: &hesswright::notation::Term| {
            let two = &t.coefficient + &t.coefficient;
            format!("{two} {}", t.participant)
        };
        terms.iter().map(term).collect::<Vec<_>>().join(" + ")
    };
    let turned = format!("{} -> {}", side(&equation.right), side(&equation.left));
    let heat = field("heat");
    let (q, u) = heat
        .trim_end_matches(" kJ/mol")
        .split_once(" ± ")
        .expect("an uncertainty");
    let twice = |text: &str| 2.0 * text.parse::<f64>().expect("a number");
    let heat = format!("{:.1} ± {:.1} kJ/mol", -twice(q), twice(u));
    self::step(&field("id"), &turned, &heat)
}

/// JCGM 101: every value of a cycle drawn at random, the whole case worked anew each time.
#[test]
fn simulation_of_a_whole_case_agrees_with_its_uncertainty() {
    let mut draw = Normal(7);
    let trials = 1500;
    let (mut sum, mut squares) = (0.0, 0.0);
    for _ in 0..trials {
        let value = drawn(&mut || draw.next()).1;
        sum += value;
        squares += value * value;
    }
    let n = f64::from(trials);
    let scatter = libm::sqrt((squares - sum * sum / n) / (n - 1.0));
    let u = drawn(&mut || 0.0).0;
    // The standard deviation of a standard deviation from 1500 trials is 1.8 %.
    assert!((scatter / u - 1.0).abs() < 0.06, "{scatter} {u}");
}

/// A formation from two bombs per mass and a heat of hydration, the values drawn about theirs:
/// the uncertainty that is stated, and the value.
fn drawn(next: &mut dyn FnMut() -> f64) -> (f64, f64) {
    let mut about = |value: f64, u: f64, places: usize| format!("{:.places$}", value + u * next());
    let source = format!(
        "[source]\nid = \"s\"\ntitle = \"Invented\"\ntemperature = \"298.15 K\"\nenergy-unit = \
         \"kJ/mol\"\ncoverage = \"2\"\n[[entry]]\nsubstance = \"CO2(g)\"\nlocator = \"1\"\nformation-enthalpy = \"{} \
         ± 0.40\"\n[[entry]]\nsubstance = \"H2O(l)\"\nlocator = \"2\"\nformation-enthalpy = \"{} ± \
         0.30\"\n",
        about(-393.51, 0.20, 8),
        about(-285.83, 0.15, 8),
    );
    let bomb = |id: &str, heat: String, u: &str| {
        format!(
            "{{ id = \"{id}\", equation = \"C4H4O4(cr) + 3 O2(g) -> 4 CO2(g) + 2 H2O(l)\", heat = \
             \"{heat} ± {u} J/g\", per = \"C4H4O4(cr)\", measured = \"internal energy\", \
             reduced-to-standard-states = true, source = \"invented\" }},\n"
        )
    };
    let steps = [
        bomb("a", about(-11500.0, 8.0, 6), "16.0"),
        bomb("b", about(-11520.0, 12.0, 6), "24.0"),
        step(
            "route",
            "4 CO2(g) + 4 H2(g) -> C4H4O4(cr) + 2 H2O(l) + O2(g)",
            &format!("{} ± 1.6 kJ/mol", about(190.0, 0.8, 8)),
        ),
        "{ heat = \"co2.heat\" },\n{ heat = \"water.heat\" },\n".to_string(),
    ];
    let tables = "[reactions.co2]\nequation = \"C(cr, graphite) + O2(g) -> CO2(g)\"\n\
                  [reactions.water]\nequation = \"H2(g) + 1/2 O2(g) -> H2O(l)\"\n"
        .to_string()
        + &cycle(
            "c",
            "4 C(cr, graphite) + 2 H2(g) + 2 O2(g) -> C4H4O4(cr)",
            &steps,
        );
    let files = Files::of(&[("s.toml", &source)]);
    let calculation = worked(&case(&["s.toml"], &tables), &files);
    let result = outcome(&calculation, "c.heat");
    (
        result.combined.standard.expect("stated"),
        result.value.to_f64(),
    )
}

/// Normal deviates from a linear congruence by the method of Box and Muller.
struct Normal(u64);

impl Normal {
    fn uniform(&mut self) -> f64 {
        self.0 = self
            .0
            .wrapping_mul(6_364_136_223_846_793_005)
            .wrapping_add(1_442_695_040_888_963_407);
        ((self.0 >> 11) as f64 + 0.5) / 9_007_199_254_740_992.0
    }

    fn next(&mut self) -> f64 {
        let radius = libm::sqrt(-2.0 * libm::log(self.uniform()));
        radius * libm::cos(std::f64::consts::TAU * self.uniform())
    }
}
