//! Stated digits, worked by hand: ASTM E29 for sums and products, JCGM 100 7.2.6 for
//! uncertainties, tables with fixed decimals, and places that the case names.
//!
//! All cases have two invented values, A = CH2O(l) and B = C3H6O3(l).

use hesswright::calculation::Calculation;
use hesswright::engine::StatedBy;

use super::support::{Files, case, messages, outcome, reaction, worked};

const SOURCE: &str = "digits.toml";

fn source(head: &str, a: &str, b: &str) -> Files {
    let entry = |substance: &str, value: &str| {
        format!(
            "[[entry]]\nsubstance = \"{substance}\"\nlocator = \"row\"\nformation-enthalpy = \"{value}\"\n"
        )
    };
    let text = format!(
        "[source]\nid = \"digits\"\ntitle = \"Invented digits\"\ntemperature = \"298.15 K\"\n\
         energy-unit = \"kJ/mol\"\n{head}\n{}{}",
        entry("CH2O(l)", a),
        entry("C3H6O3(l)", b)
    );
    Files::of(&[(SOURCE, &text)])
}

/// A case of one reaction `a`, with more lines after it.
fn case_of(equation: &str, more: &str) -> String {
    let reaction = reaction("a", equation);
    case(&[SOURCE], &format!("{}\n{more}", reaction.trim_end()))
}

fn stated(calculation: &Calculation, id: &str) -> (String, Option<String>, StatedBy) {
    let outcome = outcome(calculation, id);
    let stated = &outcome.stated;
    (
        stated.value_text.clone(),
        stated.uncertainty_text.clone(),
        outcome.stated_by,
    )
}

fn significance(text: &str) -> (String, Option<String>, StatedBy) {
    (text.to_string(), None, StatedBy::Significance)
}

#[test]
fn a_sum_ends_at_the_coarsest_last_place() {
    // -3·40.1 keeps three digits, so it ends at the units (ASTM E29 7.4: the exact 3 limits
    // nothing): -120.3 + (-7.25) = -127.55, to the units -128.
    let text = case_of("3 CH2O(l) -> C3H6O3(l)", "");
    let calculation = worked(&text, &source("", "40.1", "-7.25"));
    assert_eq!(stated(&calculation, "a.heat"), significance("-128"));
    // 33.4·3 = 100.2 has three digits again and ends at the units, 33.3·3 = 99.9 at the tenths.
    // B - 3 A = -7.25 - 99.9 = -107.15: a tie at the tenths, to the even digit -107.2.
    let calculation = worked(&text, &source("", "33.3", "-7.25"));
    assert_eq!(stated(&calculation, "a.heat"), significance("-107.2"));
    let calculation = worked(&text, &source("", "33.4", "-7.25"));
    assert_eq!(stated(&calculation, "a.heat"), significance("-107"));
}

#[test]
fn a_quotient_has_as_many_digits_as_its_worst_operand() {
    // Formation of A from elements, exact zeros that limit nothing: 40.1 kJ/mol, three digits.
    // M = 12.011 + 2·1.0080 + 15.999 = 30.026 g/mol (abridged weights, IUPAC 2021), five digits.
    // 40.1/30.026 = 1.33550... kJ/g = 1335.5 kJ/kg, three digits: 1.34e3.
    let equation = "C(cr, graphite) + H2(g) + 1/2 O2(g) -> CH2O(l)";
    let text = case_of(equation, "per = \"CH2O(l)\"");
    let calculation = worked(&text, &source("", "40.1", "-7.25"));
    assert_eq!(stated(&calculation, "a.heat"), significance("40.1"));
    assert_eq!(stated(&calculation, "a.heat-per"), significance("40.1"));
    assert_eq!(
        stated(&calculation, "a.heat-per-mass"),
        significance("1.34e3")
    );
    // Six digits are more than the molar mass has: 40.1000/30.026 to five digits is 1335.5.
    let calculation = worked(&text, &source("", "40.1000", "-7.25"));
    assert_eq!(
        stated(&calculation, "a.heat-per-mass"),
        significance("1335.5")
    );
}

#[test]
fn a_complete_uncertainty_decides() {
    // B - 3 A, k = 2. U² = (3·U_A)² + U_B².
    for (a, b, value, expanded) in [
        // 9·0.2² + 0.3² = 0.45, U = 0.67: one digit, at the tenths. -127.55 is a tie: -127.6.
        ("40.1 ± 0.2", "-7.25 ± 0.3", "-127.6", "0.7"),
        // 9·0.5² + 0.08² = 2.2564, U = 1.502: begins with 1, two digits.
        ("40.1 ± 0.5", "-7.25 ± 0.08", "-127.6", "1.5"),
        // 9·1.2² = 12.96, U = 3.6: one digit, at the units.
        ("40.1 ± 1.2", "-7.25 ± 0.0001", "-128", "4"),
        // 9·0.02² + 0.08² = 0.01, U = 0.10.
        ("40.1 ± 0.02", "-7.25 ± 0.08", "-127.55", "0.10"),
    ] {
        let text = case_of("3 CH2O(l) -> C3H6O3(l)", "");
        let calculation = worked(&text, &source("coverage = \"2\"", a, b));
        let wanted = (
            value.to_string(),
            Some(expanded.to_string()),
            StatedBy::Uncertainty,
        );
        assert_eq!(stated(&calculation, "a.heat"), wanted, "{a}, {b}");
        // What ASTM E29 alone would say stands beside it.
        let remark = outcome(&calculation, "a.heat")
            .remark
            .clone()
            .map(|r| r.value_text);
        assert_eq!(remark.as_deref(), Some("-128"));
        assert_eq!(messages(&calculation, "uncertainty-incomplete"), [""; 0]);
    }
}

#[test]
fn an_incomplete_uncertainty_does_not_decide_and_is_said() {
    let text = case_of("3 CH2O(l) -> C3H6O3(l)", "");
    let calculation = worked(&text, &source("coverage = \"2\"", "40.1", "-7.25 ± 0.08"));
    assert_eq!(stated(&calculation, "a.heat"), significance("-128"));
    let heat = outcome(&calculation, "a.heat");
    assert_eq!((heat.combined.stated, heat.combined.of), (1, 2));
    assert_eq!(heat.expanded, Some(0.08));
    // U = 0.08 alone would give the hundredths.
    let remark = heat.remark.clone().expect("the other rule");
    assert_eq!(
        (
            remark.value_text.as_str(),
            remark.uncertainty_text.as_deref()
        ),
        ("-127.55", Some("0.08"))
    );
    let said = messages(&calculation, "uncertainty-incomplete");
    assert_eq!(said.len(), 1);
    assert!(
        said[0].contains("a.heat does not cover every value used: CH2O(l) (digits) not stated"),
        "{}",
        said[0]
    );
    let silent = worked(&text, &source("", "40.1", "-7.25"));
    assert_eq!(outcome(&silent, "a.heat").combined.standard, None);
    assert!(
        messages(&silent, "uncertainty-incomplete")[0]
            .contains("CH2O(l) (digits), C3H6O3(l) (digits)")
    );
}

#[test]
fn a_table_with_fixed_decimals_limits_nothing_below_the_house_place() {
    // B - 3 A = -7.250 - 120.300 = -127.550 kJ/mol: a tie at 0.1, to the even digit -127.6.
    let files = source("digits = \"fixed-decimals\"", "40.100", "-7.250");
    let equation = "3 CH2O(l) -> C3H6O3(l)";
    for (unit, value) in [
        ("kJ", "-127.6"),
        // 100 J/mol: -127550 lies between -1275 and -1276 hundreds, a tie again.
        ("J", "-1.276e5"),
        // 0.1 kJ is 0.0239 kcal_th (1 cal_th = 4.184 J, by definition); the place is never finer
        // than that, so it is 0.1: -127.550/4.184 = -30.4852...
        ("kcal_th", "-30.5"),
    ] {
        let text = case_of(equation, &format!("[units]\nenergy = \"{unit}\""));
        let calculation = worked(&text, &files);
        let wanted = (value.to_string(), None, StatedBy::FixedDecimals);
        assert_eq!(stated(&calculation, "a.heat"), wanted);
        let said = messages(&calculation, "fixed-decimals");
        assert!(
            said.len() == 1 && said[0].starts_with("digits prints a fixed number"),
            "{said:?}"
        );
    }
    let text = case_of(equation, "[rounding]\n\"a.heat\" = \"0.01 kJ/mol\"");
    let calculation = worked(&text, &files);
    let wanted = ("-127.55".to_string(), None, StatedBy::Rounding);
    assert_eq!(stated(&calculation, "a.heat"), wanted);
}

#[test]
fn a_place_that_the_case_names_goes_before_every_rule() {
    let files = source("coverage = \"2\"", "40.1 ± 0.5", "-7.25 ± 0.08");
    // U = 1.50 as above: stated to the same place, with two digits at most (JCGM 100 7.2.6),
    // and never as zero.
    for (place, value, expanded, cautions) in [
        ("0.01 kJ/mol", "-127.55", "1.5", 1),
        ("0.1 kJ/mol", "-127.6", "1.5", 0),
        ("1 kJ/mol", "-128", "2", 0),
        ("10 kJ/mol", "-1.3e2", "", 0),
        // 1 kcal_th is 4.184 kJ; the next place that is no finer is 10 kJ.
        ("1 kcal_th/mol", "-1.3e2", "", 0),
    ] {
        let rounding = format!("[rounding]\n\"a.heat\" = \"{place}\"");
        let text = case_of("3 CH2O(l) -> C3H6O3(l)", &rounding);
        let calculation = worked(&text, &files);
        let wanted = (
            value.to_string(),
            (!expanded.is_empty()).then(|| expanded.to_string()),
            StatedBy::Rounding,
        );
        assert_eq!(stated(&calculation, "a.heat"), wanted, "{place}");
        assert_eq!(
            messages(&calculation, "rounding-finer").len(),
            cautions,
            "{place}"
        );
    }
}
