//! Integrals against values worked by hand, printed elsewhere, or found another way.

use proptest::prelude::*;

use super::*;
use crate::source::built_in;

/// R of NASA's fits, J/(mol K).
const NASA: &str = "8.31451";

fn exact(text: &str) -> Exact {
    Decimal::parse(text).expect(text).value()
}

fn decimals(texts: &[&str]) -> Vec<Decimal> {
    let parsed = texts.iter().map(|text| Decimal::parse(text).expect(text));
    parsed.collect()
}

fn function(form: Form, coefficients: &[&str]) -> HeatCapacity {
    HeatCapacity {
        form,
        range: None,
        coefficients: decimals(coefficients),
        points: Vec::new(),
        uncertainty: None,
    }
}

fn table(points: &[[&str; 2]]) -> HeatCapacity {
    let points = points
        .iter()
        .map(|point| <[Decimal; 2]>::try_from(decimals(point)).expect("two numbers"));
    HeatCapacity {
        points: points.collect(),
        ..function(Form::Table, &[])
    }
}

fn ranged(function: HeatCapacity, low: &str, high: &str) -> HeatCapacity {
    let range = [low, high].map(|text| Quantity::parse(text).expect(text));
    HeatCapacity {
        range: Some(range),
        ..function
    }
}

fn increment(function: &HeatCapacity, from: &str, to: &str) -> Option<Real> {
    function.increment(&exact(from), &exact(to), &exact(NASA))
}

fn kilojoules(real: Option<Real>) -> f64 {
    real.expect("a value").to_f64() / 1000.0
}

/// Nitrogen, 500 K to 2000 K, NIST Chemistry WebBook (from memory; meets JANAF below).
fn nitrogen() -> HeatCapacity {
    let printed = [
        "19.50583",
        "19.88705",
        "-8.598535",
        "1.369784",
        "0.527601",
        "-4.935202",
        "212.3900",
        "0.0",
    ];
    function(Form::Shomate, &printed)
}

/// Oxygen, 200 K to 1000 K, read in the file gri30.yaml of Cantera 3.2.0, which names TPIS 89.
fn oxygen() -> HeatCapacity {
    let printed = [
        "3.78245636E+00",
        "-2.99673416E-03",
        "9.84730201E-06",
        "-9.68129509E-09",
        "3.24372837E-12",
        "-1.06394356E+03",
        "3.65767573E+00",
    ];
    function(Form::Nasa7, &printed)
}

/// The functions of a species of NASA's file.
fn glenn(species: &str, hill: &str) -> Vec<HeatCapacity> {
    let source = built_in("nasa-glenn-2021").expect("a built-in source");
    let mut entries = source.of_composition(hill).into_iter();
    let named = entries.find(|e| e.species().is_some_and(|s| s.to_string() == species));
    named.expect(species).heat_capacity
}

#[test]
fn integrals_worked_by_hand() {
    let parabola = function(Form::Polynomial, &["10", "0.02", "0.0003"]);
    let reciprocal = function(Form::MaierKelley, &["50", "0.01", "-1.2e6"]);
    let corner = table(&[["300", "20"], ["400", "30"], ["600", "40"]]);
    for (function, from, to, joules) in [
        // 75.3 · 75
        (
            function(Form::Constant, &["75.3"]),
            "298.15",
            "373.15",
            "5647.5",
        ),
        // 10·100 + 0.01·(400² - 300²) + 0.0001·(400³ - 300³)
        (parabola, "300", "400", "5400"),
        // 50·200 + 0.005·(400² - 200²) + 1.2e6·(1/400 - 1/200)
        (reciprocal, "200", "400", "7600"),
        // (20 + 30)/2·100 + (30 + 35)/2·100
        (corner.clone(), "300", "500", "5750"),
        // Inside one line: 25 at 350 K, 27.5 at 375 K.
        (corner.clone(), "350", "375", "656.25"),
        // Down again; 2 K below the first point, where the line has 19.8; 100 K beyond the last one,
        // where it has 45.
        (corner.clone(), "500", "300", "-5750"),
        (corner.clone(), "298", "300", "39.8"),
        (corner, "600", "700", "4250"),
    ] {
        let worked = increment(&function, from, to);
        let expected = Real::Exact(exact(joules));
        assert_eq!(worked, Some(expected), "{} to {to} K", function.form.word());
    }
}

/// NIST-JANAF, 4th edition, H - H(Tr): N2 5.911 at 500 K and 21.463 at 1000 K (from memory), CO2
/// 33.397 at 1000 K (read in the data of janaf 1.4.0). The fits have 0.003 kJ/mol to spare.
#[test]
fn shomate_enthalpies_meet_the_table_they_were_fitted_to() {
    let nitrogen = nitrogen();
    let at = |kelvin| kilojoules(nitrogen.enthalpy(&exact(kelvin), &exact(NASA)));
    assert!((at("500") - 5.911).abs() < 0.001, "{}", at("500"));
    assert!((at("1000") - 21.463).abs() < 0.001, "{}", at("1000"));
    // CO2, 298 K to 1200 K, WebBook from memory; on the formation scale.
    let printed = [
        "24.99735",
        "55.18696",
        "-33.69137",
        "7.948387",
        "-0.136638",
        "-403.6075",
        "228.2431",
        "-393.5224",
    ];
    let dioxide = function(Form::Shomate, &printed);
    let at = kilojoules(dioxide.enthalpy(&exact("1000"), &exact(NASA)));
    assert!((at - (33.397 - 393.5224)).abs() < 0.003, "{at}");
}

/// Oxygen is an element: zero at 298.15 K. Cantera 3.2.0 has 22706.8109 J/mol at 1000 K, worked
/// with R = 8.31446261815324 J/(mol K); JANAF 22.703 kJ/mol (from memory).
#[test]
fn seven_coefficients_give_enthalpies_on_the_formation_scale() {
    let oxygen = oxygen();
    let constant = exact("8.31446261815324");
    let at = |kelvin| {
        let enthalpy = oxygen.enthalpy(&exact(kelvin), &constant);
        enthalpy.expect("a value").to_f64()
    };
    assert!(at("298.15").abs() < 1e-4, "{}", at("298.15"));
    assert!(
        (at("1000") - 22_706.810_919_79).abs() < 1e-7,
        "{}",
        at("1000")
    );
}

/// NIST-JANAF, 4th edition, H - H(Tr) at 1000 K, read in the data of janaf 1.4.0. The two
/// collections are of different vintage; for these two gases they agree within 0.02 kJ/mol.
#[test]
fn nine_coefficients_meet_other_tables() {
    for (species, hill, formation, janaf) in [
        ("H2O(g)", "H2O", -241.826, 26.000),
        ("CO(g)", "CO", -110.535, 21.690),
    ] {
        let functions = glenn(species, hill);
        let [low, high] = [&functions[0], &functions[1]];
        let at = |f: &HeatCapacity, t| kilojoules(f.enthalpy(&exact(t), &exact(NASA)));
        let start = at(low, "298.15");
        assert!((start - formation).abs() < 0.0005, "{species}: {start}");
        let worked = kilojoules(increment(low, "298.15", "1000"));
        assert!((worked - janaf).abs() < 0.02, "{species}: {worked}");
        // The next range goes on where this one ends.
        let gap = at(high, "1000") - at(low, "1000");
        assert!(gap.abs() < 0.001, "{species}: {gap}");
    }
}

#[test]
fn a_function_without_logarithm_stays_exact() {
    let zero = "0.000000000E+00";
    let constant = [
        zero,
        zero,
        "2.5",
        zero,
        zero,
        zero,
        zero,
        "-745.375",
        "4.37967491",
    ];
    let argon = function(Form::Nasa9, &constant);
    let worked = increment(&argon, "298.15", "398.15");
    assert_eq!(worked, Some(Real::Exact(exact("2078.6275"))));
    let real = increment(&glenn("H2O(g)", "H2O")[0], "298.15", "398.15");
    assert!(matches!(real, Some(Real::Float(_))));
}

#[test]
fn only_forms_with_an_integration_constant_have_a_scale() {
    let at = exact("400");
    for form in Form::ALL {
        let given = form.coefficients().unwrap_or(3);
        let made = function(form, &vec!["1.5"; given]);
        let has = made.enthalpy(&at, &exact(NASA)).is_some();
        assert_eq!(has, form.has_enthalpy_scale(), "{}", form.word());
        assert_eq!(has, form.integration_constant().is_some());
    }
}

#[test]
fn there_is_no_value_at_absolute_zero_and_none_of_a_table_without_points() {
    let constant = function(Form::Constant, &["30"]);
    for (function, from, to) in [
        (&constant, "0", "300"),
        (&constant, "300", "-1"),
        (&nitrogen(), "0", "300"),
        (&table(&[["300", "20"]]), "300", "301"),
        (&table(&[]), "300", "301"),
    ] {
        assert_eq!(increment(function, from, to), None, "{from} to {to}");
        let [from, to] = [from, to].map(|text| to_f64(&exact(text)));
        assert_eq!(function.increment_f64(from, to, 8.0), None);
    }
    assert_eq!(constant.at(0.0, 8.0), None);
    let line = table(&[["300", "20"], ["400", "30"]]);
    assert_eq!(line.at(350.0, 8.0), Some(25.0));
    assert_eq!(line.at(450.0, 8.0), Some(35.0));
}

#[test]
fn ranges_and_distances() {
    let celsius = ranged(function(Form::Constant, &["75.3"]), "26.85 °C", "400 K");
    let line = table(&[["300", "20"], ["350", "25"], ["400", "30"]]);
    for function in [celsius, line] {
        assert_eq!(function.range_kelvin(), Some([exact("300"), exact("400")]));
        for (kelvin, distance, serves) in [
            ("300", "0", true),
            ("400", "0", true),
            ("298", "-2", true),
            ("297.99", "-2.01", false),
            ("400.5", "0.5", false),
        ] {
            let at = exact(kelvin);
            assert_eq!(function.distance(&at), exact(distance), "{kelvin}");
            assert_eq!(function.covers(&at), distance == "0", "{kelvin}");
            assert_eq!(function.serves(&at), serves, "{kelvin}");
        }
    }
    let free = function(Form::Constant, &["75.3"]);
    assert!(free.range_kelvin().is_none() && free.covers(&exact("5000")));
}

/// One function of each form, as tables print them.
fn samples() -> Vec<HeatCapacity> {
    vec![
        function(Form::Constant, &["75.3"]),
        function(Form::Polynomial, &["27.3", "0.0153", "-2.1e-6", "8e-10"]),
        function(Form::MaierKelley, &["104.52", "0.02192", "-2.594e6"]),
        nitrogen(),
        oxygen(),
        glenn("CO2(g)", "CO2")[0].clone(),
        table(&[
            ["290", "29.1"],
            ["500", "29.6"],
            ["900", "32.1"],
            ["1100", "33.0"],
        ]),
    ]
}

/// Composite Simpson rule over 2000 steps: a way to the integral that takes nothing but Cp.
fn by_simpson(function: &HeatCapacity, from: f64, to: f64) -> f64 {
    let step = (to - from) / 2000.0;
    let cp = |i: i32| {
        function
            .at(from + step * f64::from(i), 8.31451)
            .expect("Cp")
    };
    let inner = (1..2000).map(|i| cp(i) * if i % 2 == 0 { 2.0 } else { 4.0 });
    (cp(0) + cp(2000) + inner.sum::<f64>()) * step / 3.0
}

fn hundredths(n: i32) -> Exact {
    Exact::new(n.into(), 100.into())
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(64))]

    /// For every form: the closed integral is the area under Cp, in both kinds of number.
    #[test]
    fn integrals_are_the_area_under_the_curve(from in 29_000..110_000, to in 29_000..110_000) {
        let (low, high) = (hundredths(from), hundredths(to));
        let (a, b) = (to_f64(&low), to_f64(&high));
        for function in samples() {
            let worked = function.increment(&low, &high, &exact(NASA)).expect("inside").to_f64();
            let float = function.increment_f64(a, b, 8.31451).expect("inside");
            let area = by_simpson(&function, a, b);
            let word = function.form.word();
            // The corners of a table cost the rule up to a step's worth of the change of slope.
            let tolerance = if function.form == Form::Table { 1e-2 } else { 1e-7 };
            prop_assert!((worked - area).abs() < tolerance, "{word}: {worked}, area {area}");
            prop_assert!((worked - float).abs() < 1e-8, "{word}: {worked}, float {float}");
        }
    }

    /// The terms that a working shows add up to the increment, and to the enthalpy.
    #[test]
    fn terms_add_up(from in 29_000..110_000, to in 29_000..110_000) {
        let (from, to, r) = (hundredths(from), hundredths(to), exact(NASA));
        for function in samples() {
            let sum = |start| {
                let terms = function.terms(start, &to, &r);
                let zero = Real::Exact(Exact::zero());
                terms.iter().fold(zero, |sum, term| sum.plus(&term.product)).to_f64()
            };
            let word = function.form.word();
            let apart = sum(Some(&from)) - function.increment(&from, &to, &r).expect("inside").to_f64();
            prop_assert!(apart.abs() < 1e-8, "{word}: {apart}");
            if let Some(enthalpy) = function.enthalpy(&to, &r) {
                let apart = sum(None) - enthalpy.to_f64();
                prop_assert!(apart.abs() < 1e-8, "{word}: {apart}");
            }
        }
    }

    /// Increments add up, and where there is a scale they are its differences.
    #[test]
    fn increments_add_up(a in 29_000..110_000, b in 29_000..110_000, c in 29_000..110_000) {
        let (a, b, c) = (hundredths(a), hundredths(b), hundredths(c));
        let r = exact(NASA);
        for function in samples() {
            let step = |from, to| function.increment(from, to, &r).expect("inside");
            let (sum, whole) = (step(&a, &b).plus(&step(&b, &c)), step(&a, &c));
            let same = match (&sum, &whole) {
                (Real::Exact(one), Real::Exact(other)) => one == other,
                _ => function.form == Form::Nasa9 && sum.minus(&whole).to_f64().abs() < 1e-9,
            };
            prop_assert!(same, "{}: {sum:?}, {whole:?}", function.form.word());
            if let (Some(from), Some(to)) = (function.enthalpy(&a, &r), function.enthalpy(&c, &r)) {
                let apart = to.minus(&from).minus(&whole).to_f64();
                prop_assert!(apart.abs() < 1e-8, "{}: {apart}", function.form.word());
            }
        }
    }
}
