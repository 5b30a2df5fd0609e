//! Heats at the temperature of the reaction: ranges, changes of phase, what is allowed, and what is
//! said of it. The numbers are invented and worked by hand beside each check.

use serde_json::Value;

use crate::program::{Folder, Ran};

/// Invented forms of titanium dioxide, with one gap above the liquid.
const FORMS: &str = r#"
[source]
id = "forms"
title = "Forms (invented)"
temperature = "298.15 K"
energy-unit = "kJ/mol"
coverage = "2"
gas-constant = "8.31451"

[[entry]]
substance = "TiO2(cr, alpha)"
locator = "sheet 1 (invented)"
formation-enthalpy = "-900.0 ± 1.0"
heat-capacity = [{ form = "constant", range = ["200 K", "1000 K"], coefficients = ["60"], uncertainty = "2" }]
transitions = [{ to = "TiO2(cr, beta)", temperature = "1000 K", enthalpy = "5.0 ± 0.2 kJ/mol" }]

[[entry]]
substance = "TiO2(cr, beta)"
locator = "sheet 1 (invented)"
heat-capacity = [{ form = "constant", range = ["1000 K", "1500 K"], coefficients = ["70"], uncertainty = "2" }]
transitions = [{ to = "TiO2(l)", temperature = "1500 K", enthalpy = "40.0 ± 1.0 kJ/mol", locator = "sheet 2 (invented)" }]

[[entry]]
substance = "TiO2(l)"
locator = "sheet 1 (invented)"
heat-capacity = [{ form = "constant", range = ["1500 K", "2500 K"], coefficients = ["100"], uncertainty = "2" }]

[[entry]]
substance = "Ti(cr)"
locator = "sheet 2 (invented)"
heat-capacity = [{ form = "constant", range = ["200 K", "3000 K"], coefficients = ["30"], uncertainty = "1" }]
formation-enthalpy = "exact 0"

[[entry]]
substance = "O2(g)"
locator = "sheet 2 (invented)"
heat-capacity = [{ form = "polynomial", range = ["200 K", "3000 K"], coefficients = ["32", "0"], uncertainty = "1" }]
formation-enthalpy = "exact 0"
"#;

struct Tried {
    ran: Ran,
}

impl Tried {
    fn result(&self, id: &str) -> Value {
        self.ran.json()["results"][id].clone()
    }

    fn exact(&self, id: &str) -> String {
        self.result(id)["exact"]
            .as_str()
            .unwrap_or("none")
            .to_string()
    }

    /// The messages of a code with their severity.
    fn said(&self, code: &str) -> Vec<(String, String)> {
        let document = self.ran.json();
        let findings = document["findings"].as_array().cloned().unwrap_or_default();
        let of_code = findings.into_iter().filter(|f| f["code"] == code);
        let text = |value: &Value| value.as_str().unwrap_or_default().to_string();
        of_code
            .map(|f| (text(&f["severity"]), text(&f["message"])))
            .collect()
    }
}

/// Computes a case that consults the invented forms and further sources.
fn tried(consult: &[&str], files: &[(&str, &str)], rest: &str) -> Tried {
    let folder = Folder::new();
    for (name, text) in files {
        folder.write(name, text);
    }
    let case = format!(
        "[record]\nnumber = \"T-0002\"\nrevision = \"A\"\ntitle = \"At temperature\"\n\
         date = 2026-01-02\npreparer = \"N. N.\"\nstatus = \"for-check\"\n\n\
         [sources]\nconsult = {consult:?}\n\n{rest}"
    );
    folder.write("a.toml", case);
    let ran = folder.run(&["compute", "a.toml", "--json"]);
    assert!(ran.status < 2, "{}", ran.err);
    Tried { ran }
}

fn forms(rest: &str) -> Tried {
    tried(&["forms.toml"], &[("forms.toml", FORMS)], rest)
}

fn reaction(equation: &str, temperature: &str) -> String {
    format!("[reactions.r]\nequation = \"{equation}\"\ntemperature = \"{temperature}\"\n")
}

#[test]
fn transitions_on_the_way_are_crossed_with_their_heats() {
    // H(l, 2000 K) = −900 + 0.060·701.85 + 5 + 0.070·500 + 40 + 0.100·500 = −727.889;
    // elements: (0.030 + 0.032)·1701.85 = 105.5147.
    for product in ["TiO2(l)", "TiO2(stable)"] {
        let tried = forms(&reaction(&format!("Ti(cr) + O2(g) -> {product}"), "2000 K"));
        assert_eq!(tried.exact("r.heat"), "-833.4037", "{product}");
        // u² = 0.5² + 0.1² + 0.5² + (0.70185·1)² + 0.5² + 0.5² + 2·(1.70185·0.5)², by hand.
        let u = tried.result("r.heat")["standard-uncertainty"].as_f64();
        assert!((u.unwrap_or_default() - 1.7178).abs() < 2e-4, "{u:?}");
    }
}

#[test]
fn a_transition_is_cited_by_its_own_locator_or_that_of_its_entry() {
    let tried = forms(&reaction("Ti(cr) + O2(g) -> TiO2(l)", "2000 K"));
    let document = tried.ran.json();
    let values = document["values-used"]
        .as_array()
        .cloned()
        .unwrap_or_default();
    let transitions = values
        .iter()
        .filter(|v| v["quantity"] == "transition-enthalpy");
    let locators: Vec<&Value> = transitions.map(|v| &v["locator"]).collect();
    assert_eq!(locators, ["sheet 1 (invented)", "sheet 2 (invented)"]);
}

#[test]
fn a_form_serves_up_to_its_upper_bound_and_then_the_next() {
    // −900 + 0.060·701.85 = −857.889 and, from the transition on, 5 more.
    let of = |kelvin: &str| {
        let tried = forms(&reaction("TiO2(cr, alpha) -> TiO2(stable)", kelvin));
        tried.exact("r.heat")
    };
    assert_eq!(of("1000 K"), "0");
    // (60 − 70)·… : at 1001 K alpha is outside its range, so take the way of beta alone.
    let tried = forms(&reaction("Ti(cr) + O2(g) -> TiO2(stable)", "1001 K"));
    // −857.889 + 5 + 0.070 − 0.062·702.85 = −896.3957
    assert_eq!(tried.exact("r.heat"), "-896.3957");
}

#[test]
fn outside_the_ranges_is_a_stop_that_an_assumption_lowers() {
    let beyond = reaction("Ti(cr) + O2(g) -> TiO2(cr, alpha)", "1100 K");
    let tried = forms(&beyond);
    assert_eq!(tried.ran.status, 1);
    assert!(tried.result("r.heat").is_null());
    let said = tried.said("outside-range");
    assert_eq!(said.len(), 1, "{said:?}");
    assert_eq!(said[0].0, "stop");
    assert!(said[0].1.contains("1100 K is 100 K outside"), "{said:?}");

    let allowed = format!(
        "[[assumptions]]\ntext = \"The heat capacity goes on.\"\nbasis = \"judgement (invented)\"\n\
         confirmed = true\nallows = {{ extrapolation = [\"TiO2(cr, alpha)\"] }}\n\n{beyond}"
    );
    let tried = forms(&allowed);
    let said = tried.said("outside-range");
    assert_eq!(said[0].0, "caution");
    assert!(said[0].1.contains("100 K outside"), "{said:?}");
    assert!(said[0].1.contains("The heat capacity goes on."), "{said:?}");
    // −900 + (60 − 62)·0.80185 = −901.6037
    assert_eq!(tried.exact("r.heat"), "-901.6037");
    // By its source the form has turned into another one at 1000 K.
    assert_eq!(tried.said("unstable-form")[0].0, "caution");
}

#[test]
fn a_gap_and_an_overlap_leave_no_stable_form() {
    let at = |forms: &str, kelvin: &str| {
        let rest = reaction("Ti(cr) + O2(g) -> TiO2(stable)", kelvin);
        tried(&["forms.toml"], &[("forms.toml", forms)], &rest)
    };
    let gap = FORMS.replace("[\"1000 K\", \"1500 K\"]", "[\"1100 K\", \"1500 K\"]");
    let overlap = FORMS.replace("[\"1000 K\", \"1500 K\"]", "[\"900 K\", \"1500 K\"]");
    for (forms, kelvin, word) in [
        (gap, "1050 K", "no form covers 1050 K"),
        (overlap.clone(), "950 K", "several forms claim 950 K"),
        // At its upper bound a form gives way to the one that begins there, and to no other.
        (overlap, "1000 K", "several forms claim 1000 K"),
        (FORMS.to_string(), "2600 K", "no form covers 2600 K"),
    ] {
        let tried = at(&forms, kelvin);
        assert_eq!(tried.ran.status, 1);
        let said = tried.said("stable-form");
        assert_eq!(said[0].0, "stop", "{said:?}");
        assert!(said[0].1.contains(word), "{said:?}");
        assert!(tried.result("r.heat").is_null());
    }
}

/// The conventions have iron without a range; what the other source says must not be lost.
const IRON: &str = r#"
[source]
id = "iron"
title = "Forms of iron (invented)"
temperature = "298.15 K"
energy-unit = "kJ/mol"

[[entry]]
substance = "Fe(cr, alpha)"
locator = "sheet 1 (invented)"
formation-enthalpy = "exact 0"
heat-capacity = [{ form = "constant", range = ["200 K", "1100 K"], coefficients = ["25.0"] }]
transitions = [{ to = "Fe(cr, gamma)", temperature = "1184 K", enthalpy = "0.9 kJ/mol" }]

[[entry]]
substance = "Fe(cr, gamma)"
locator = "sheet 1 (invented)"
heat-capacity = [{ form = "constant", range = ["1184 K", "1600 K"], coefficients = ["35.0"] }]
"#;

#[test]
fn every_source_says_why_no_form_is_stable_and_a_record_of_that_runs_again() {
    let folder = Folder::new();
    folder.write("iron.toml", IRON);
    let case = format!(
        "[record]\nnumber = \"T-0003\"\nrevision = \"A\"\ntitle = \"A gap\"\n\
         date = 2026-01-02\npreparer = \"N. N.\"\nstatus = \"preliminary\"\n\n\
         [sources]\nconsult = [\"iron.toml\"]\n\n{}",
        reaction("Fe(stable) -> Fe(cr, gamma)", "1150 K")
    );
    folder.write("a.toml", case);
    let first = folder.run(&["compute", "a.toml", "--json"]);
    assert_eq!(first.status, 1, "{}", first.err);
    assert!(first.out.contains("no form covers 1150 K"), "{}", first.out);
    folder.run(&["issue", "a.toml"]);
    folder.run(&["extract", "out/T-0003-A.pdf", "again"]);
    let again = folder.run(&["compute", "again/case.toml", "--json"]);
    assert_eq!((again.status, again.out), (first.status, first.out));
}

#[test]
fn a_form_whose_formation_enthalpy_is_a_convention_has_the_functions_of_its_source() {
    let iron = IRON.replace("[\"200 K\", \"1100 K\"]", "[\"200 K\", \"1300 K\"]");
    let rest = reaction("Fe(cr, alpha) -> Fe(cr, gamma)", "1200 K");
    let tried = tried(&["iron.toml"], &[("iron.toml", &iron)], &rest);
    // 0.025·885.85 + 0.9 + 0.035·16 − 0.025·901.85 = 1.06
    assert_eq!(tried.exact("r.heat"), "1.06");
    let said = tried.said("unstable-form");
    assert!(
        said[0].1.contains("Fe(cr, alpha): by iron it turns into"),
        "{said:?}"
    );
}

#[test]
fn a_heat_capacity_that_nobody_gives_is_not_zero() {
    let bare = FORMS.replace(
        "heat-capacity = [{ form = \"polynomial\", range = [\"200 K\", \"3000 K\"], \
         coefficients = [\"32\", \"0\"], uncertainty = \"1\" }]\n",
        "",
    );
    assert_ne!(bare, FORMS);
    let rest = reaction("Ti(cr) + O2(g) -> TiO2(cr, alpha)", "400 K");
    let tried = tried(&["forms.toml"], &[("forms.toml", &bare)], &rest);
    assert_eq!(tried.ran.status, 1);
    assert!(tried.result("r.heat").is_null());
    assert_eq!(tried.said("heat-capacity-missing")[0].0, "stop");
}

/// A second invented source, with another formation enthalpy and a function that rises.
const RISING: &str = r#"
[source]
id = "rising"
title = "Rising (invented)"
temperature = "298.15 K"
energy-unit = "kJ/mol"
coverage = "2"

[[entry]]
substance = "TiO2(cr, alpha)"
locator = "sheet 9 (invented)"
formation-enthalpy = "-899.5 ± 1.0"
heat-capacity = [{ form = "polynomial", range = ["298.15 K", "1000 K"], coefficients = ["50", "0.02"] }]
"#;

#[test]
fn of_another_source_only_increments_are_taken() {
    let bare = FORMS.replace(
        "heat-capacity = [{ form = \"constant\", range = [\"200 K\", \"1000 K\"], \
         coefficients = [\"60\"], uncertainty = \"2\" }]\n",
        "",
    );
    assert_ne!(bare, FORMS);
    let files = [("forms.toml", bare.as_str()), ("rising.toml", RISING)];
    let rest = reaction("Ti(cr) + O2(g) -> TiO2(cr, alpha)", "398.15 K");
    let tried = tried(&["forms.toml", "rising.toml"], &files, &rest);
    // −900 + (50·100 + 0.01·(398.15² − 298.15²))/1000 − 6.2 = −900 + 5.6963 − 6.2 = −900.5037
    assert_eq!(tried.exact("r.heat"), "-900.5037");
}

#[test]
fn a_constant_over_more_than_100_kelvin_says_what_a_function_would_change() {
    let files = [("forms.toml", FORMS), ("rising.toml", RISING)];
    let at = |kelvin: &str| {
        let rest = reaction("Ti(cr) + O2(g) -> TiO2(cr, alpha)", kelvin);
        tried(&["forms.toml", "rising.toml"], &files, &rest)
    };
    let said = at("698.15 K").said("constant-heat-capacity");
    // 50·400 + 0.01·(698.15² − 298.15²) − 60·400 = 23985.2 − 24000 = −14.8 J/mol
    let own: Vec<_> = said
        .iter()
        .filter(|(_, text)| text.contains("TiO2"))
        .collect();
    assert_eq!(own.len(), 1, "{said:?}");
    assert!(own[0].1.contains("-0.015 kJ/mol"), "{own:?}");
    assert!(at("398.15 K").said("constant-heat-capacity").is_empty());
}

#[test]
fn the_uncertainty_of_a_temperature_is_carried_by_the_change_of_heat_capacity() {
    let input = "[inputs]\nplant = { value = \"400.00 ± 20.00 K\", source = \"log (invented)\", \
                 confirmed = true }\n\n";
    let rest = format!(
        "{input}{}",
        reaction("Ti(cr) + O2(g) -> TiO2(cr, alpha)", "plant")
    );
    let tried = forms(&rest);
    let result = tried.result("r.heat");
    let used = tried.ran.json()["values-used"].clone();
    let is_input = |row: &Value| row["quantity"] == "input";
    let rows = used.as_array().cloned().unwrap_or_default();
    let number = rows
        .iter()
        .find(|row| is_input(row))
        .map(|row| row["number"].clone());
    let budget = result["budget"].as_array().cloned().unwrap_or_default();
    let row = budget
        .iter()
        .find(|row| Some(&row["value-used"]) == number.as_ref());
    // ΔCp = 60 − 30 − 32 = −2 J/(mol K) = −0.002 kJ/mol per kelvin.
    let sensitivity = row
        .and_then(|row| row["sensitivity"].as_f64())
        .unwrap_or_default();
    assert!((sensitivity + 0.002).abs() < 1e-12, "{result}");
}

#[test]
fn a_temperature_in_the_reaction_takes_no_uncertainty() {
    let folder = Folder::new();
    folder.write("forms.toml", FORMS);
    let case = |temperature: &str, more: &str| {
        format!(
            "[record]\nnumber = \"T-0004\"\nrevision = \"A\"\ntitle = \"Faults\"\n\
             date = 2026-01-02\npreparer = \"N. N.\"\nstatus = \"for-check\"\n\n\
             [sources]\nconsult = [\"forms.toml\"]\n\n{}{more}",
            reaction("Ti(cr) + O2(g) -> TiO2(cr, alpha)", temperature)
        )
    };
    folder.write("a.toml", case("500 ± 10 K", ""));
    let ran = folder.run(&["compute", "a.toml", "--json"]);
    assert_eq!(ran.status, 2);
    assert!(
        ran.out.contains("write an input with its tolerance"),
        "{}",
        ran.out
    );
    // A size that no substance has is refused in a case as in a source.
    let given = "\n[substances.oxide]\nformula = \"TiO2\"\nphase = \"cr\"\nheat-capacity = \
                 { value = \"1e50 J/(mol K)\", range = [\"280 K\", \"600 K\"], source = \"none\" }\n";
    folder.write("a.toml", case("500 K", given));
    let ran = folder.run(&["compute", "a.toml", "--json"]);
    assert_eq!(ran.status, 2);
    assert!(ran.out.contains("below 1e5 J/(mol K)"), "{}", ran.out);
    // A transition leads to another form of the same substance.
    folder.write(
        "forms.toml",
        FORMS.replace("to = \"TiO2(l)\"", "to = \"Ti(cr)\""),
    );
    folder.write("a.toml", case("500 K", ""));
    let ran = folder.run(&["compute", "a.toml", "--json"]);
    assert_eq!(ran.status, 2);
    assert!(
        ran.out.contains("another form of the same composition"),
        "{}",
        ran.out
    );
    // The gas constant is a number; its unit is said to be superfluous.
    folder.write(
        "forms.toml",
        FORMS.replace("\"8.31451\"", "\"8.31451 J/(mol K)\""),
    );
    let ran = folder.run(&["compute", "a.toml", "--json"]);
    assert!(ran.out.contains("write \\\"8.31451\\\""), "{}", ran.out);
}

#[test]
fn zeros_of_a_constant_that_nobody_can_count_are_noted() {
    let tried = forms(&reaction("Ti(cr) + O2(g) -> TiO2(cr, alpha)", "500 K"));
    let said = tried.said("uncounted-zeros");
    assert!(said[0].1.contains("TiO2(cr, alpha) (forms)"), "{said:?}");
}

#[test]
fn a_function_that_begins_just_above_the_reference_serves_with_a_note() {
    let late = |low: &str| {
        FORMS.replace(
            "[\"200 K\", \"1000 K\"]",
            &format!("[\"{low}\", \"1000 K\"]"),
        )
    };
    let rest = reaction("Ti(cr) + O2(g) -> TiO2(cr, alpha)", "400 K");
    let at = |low: &str| tried(&["forms.toml"], &[("forms.toml", &late(low))], &rest);
    let served = at("300.15 K");
    assert_eq!(served.said("range-start")[0].0, "note");
    assert!(!served.result("r.heat").is_null());
    let refused = at("300.16 K");
    assert_eq!(refused.said("outside-range")[0].0, "stop");
    assert!(refused.result("r.heat").is_null());
}

/// Cp = 2.5·R: H = R·(2.5·T + a6); with a6 = −745.375 it is zero at 298.15 K.
const FITTED: &str = r#"
[source]
id = "fitted"
title = "Fitted (invented)"
temperature = "298.15 K"
gas-constant = "8.31451"
coverage = "2"

[[entry]]
substance = "N2O(g)"
locator = "sheet 3 (invented)"
heat-capacity = [{ form = "nasa-7", range = ["200 K", "1000 K"], coefficients = ["2.5", "0", "0", "0", "0", "-645.375", "0"] }]

[[entry]]
substance = "N2O(l)"
locator = "sheet 3 (invented)"
heat-capacity = [{ form = "nasa-7", range = ["200 K", "1000 K"], coefficients = ["2.5", "0", "0", "0", "0", "-845.375", "0"] }]
"#;

#[test]
fn a_fit_with_its_integration_constant_needs_no_formation_enthalpy() {
    for temperature in ["298.15 K", "500 K"] {
        let rest = reaction("N2O(l) -> N2O(g)", temperature);
        let tried = tried(&["fitted.toml"], &[("fitted.toml", FITTED)], &rest);
        // 8.31451·(−645.375 + 845.375) = 1662.902 J/mol at any temperature.
        assert_eq!(tried.exact("r.heat"), "1.662902");
        // No fit states what its integration constant is worth: neither of the two is covered.
        let covers = tried.result("r.heat")["covers"].clone();
        assert_eq!(covers["stated"], 0, "{covers}");
        assert!(covers["of"].as_u64() >= Some(2), "{covers}");
    }
}

#[test]
fn a_fit_goes_on_beyond_its_range_where_the_case_allows_it() {
    let rest = reaction("N2O(l) -> N2O(g)", "1050 K");
    let files = [("fitted.toml", FITTED)];
    let stopped = tried(&["fitted.toml"], &files, &rest);
    assert_eq!(stopped.said("outside-range")[0].0, "stop");
    let allowed = format!(
        "[[assumptions]]\ntext = \"The fits go on.\"\nbasis = \"judgement (invented)\"\n\
         confirmed = true\nallows = {{ extrapolation = [\"N2O(l)\", \"N2O(g)\"] }}\n\n{rest}"
    );
    let tried = tried(&["fitted.toml"], &files, &allowed);
    let said = tried.said("outside-range");
    assert!(
        said.iter().all(|(severity, _)| severity == "caution"),
        "{said:?}"
    );
    assert!(said[0].1.contains("1050 K is 50 K outside"), "{said:?}");
    assert_eq!(tried.exact("r.heat"), "1.662902");
}

#[test]
fn where_the_way_begins_outside_the_ranges_the_distance_is_that_of_298_kelvin() {
    let late = FORMS.replace("[\"200 K\", \"1000 K\"]", "[\"320 K\", \"1000 K\"]");
    let rest = reaction("Ti(cr) + O2(g) -> TiO2(cr, alpha)", "400 K");
    let tried = tried(&["forms.toml"], &[("forms.toml", &late)], &rest);
    let said = tried.said("outside-range");
    assert!(
        said[0].1.contains("298.15 K is 21.85 K outside"),
        "{said:?}"
    );
}

#[test]
fn a_fit_that_contradicts_the_printed_value_is_cautioned() {
    let both = FITTED.replace(
        "substance = \"N2O(g)\"",
        "substance = \"N2O(g)\"\nformation-enthalpy = \"3.8\"",
    );
    let both = both.replace("coverage", "energy-unit = \"kJ/mol\"\ncoverage");
    let rest = reaction("N2O(l) -> N2O(g)", "500 K");
    let tried = tried(&["fitted.toml"], &[("fitted.toml", &both)], &rest);
    let said = tried.said("function-and-value");
    // The function gives 8.31451·100 J/mol at 298.15 K, the table 3.8 kJ/mol: −2.97 apart.
    assert!(said[0].1.contains("-3.0 kJ/mol"), "{said:?}");
    // 3.8 + 8.31451·(2.5·201.85 − 2.5·500 + 845.375)/1000 = 3.8 + 4.19570960875 − 3.36425860875
    assert_eq!(tried.exact("r.heat"), "4.631451");
}

/// Numbers that pass for chance, the same in every run (a linear congruential generator with the
/// constants of Knuth, The Art of Computer Programming 2, from memory).
struct Chance(u64);

impl Chance {
    fn uniform(&mut self) -> f64 {
        self.0 = self
            .0
            .wrapping_mul(6_364_136_223_846_793_005)
            .wrapping_add(1_442_695_040_888_963_407);
        (self.0 >> 11) as f64 / (1_u64 << 53) as f64
    }

    /// Standard normal, by Box and Muller (Ann. Math. Stat. 29 (1958) 610, from memory).
    fn normal(&mut self) -> f64 {
        let radius = libm::sqrt(-2.0 * libm::log(1.0 - self.uniform()));
        radius * libm::cos(core::f64::consts::TAU * self.uniform())
    }
}

#[test]
fn the_uncertainty_agrees_with_a_monte_carlo_propagation() {
    // JCGM 101:2008: the model is sampled by hand here, with the temperature uncertain as well.
    let input = "[inputs]\nplant = { value = \"2000.0 ± 40.0 K\", source = \"log (invented)\", \
                 confirmed = true }\n\n";
    let rest = format!("{input}{}", reaction("Ti(cr) + O2(g) -> TiO2(l)", "plant"));
    let stated = forms(&rest).result("r.heat")["standard-uncertainty"].as_f64();
    let mut chance = Chance(20_261_201);
    let mut heat = || {
        let mut about = |value: f64, u: f64| value + u * chance.normal();
        let kelvin = about(2000.0, 20.0);
        let solid = about(-900.0, 0.5) + about(60.0, 1.0) * 0.70185 + about(5.0, 0.1);
        let liquid =
            about(70.0, 1.0) * 0.5 + about(40.0, 0.5) + about(100.0, 1.0) * (kelvin - 1500.0) / 1e3;
        let elements = (about(30.0, 0.5) + about(32.0, 0.5)) * (kelvin - 298.15) / 1e3;
        solid + liquid - elements
    };
    let sample: Vec<f64> = (0..200_000).map(|_| heat()).collect();
    let mean = sample.iter().sum::<f64>() / sample.len() as f64;
    let squares = sample.iter().map(|x| (x - mean) * (x - mean)).sum::<f64>();
    let spread = libm::sqrt(squares / (sample.len() - 1) as f64);
    // The spread of 200 000 draws is itself uncertain by 1/√(2·200 000), that is 0.16 %.
    assert!(
        (stated.unwrap_or_default() / spread - 1.0).abs() < 0.006,
        "{stated:?} {spread}"
    );
}

#[test]
fn an_uncertain_25_degrees_counts_or_is_said_not_to() {
    let input = "[inputs]\nroom = { value = \"25.00 °C\", tolerance = \"2.0 K\", source = \"log \
                 (invented)\", confirmed = true }\n\n";
    let rest = format!(
        "{input}{}",
        reaction("Ti(cr) + O2(g) -> TiO2(cr, alpha)", "room")
    );
    let known = forms(&rest);
    assert!(known.said("temperature-uncertainty").is_empty());
    // u² = 0.5² + (0.002·2/√3)², by hand: ΔCp = 60 − 30 − 32 J/(mol K).
    let u = known.result("r.heat")["standard-uncertainty"]
        .as_f64()
        .unwrap_or_default();
    assert!(
        (u - libm::sqrt(0.25 + 0.002 * 0.002 * 4.0 / 3.0)).abs() < 1e-12,
        "{u}"
    );
    let bare = FORMS.replace(
        "heat-capacity = [{ form = \"polynomial\"",
        "note = \"none\" #",
    );
    let unknown = tried(&["forms.toml"], &[("forms.toml", &bare)], &rest);
    assert_eq!(unknown.said("temperature-uncertainty")[0].0, "caution");
    let open = unknown.result("r.heat")["not-covered"][0].clone();
    assert_eq!(open, "the uncertainty of its temperature");
}
