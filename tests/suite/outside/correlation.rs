//! Correlation that a source states, through the whole program: water's heat of vaporisation is
//! the small difference of two values that share nearly all of their uncertainty.
//!
//! The values and uncertainties are those of CODATA (as `codata-1989` has them). Its correlation
//! is not published with them; the coefficients here are invented.

use super::case::{Folder, Results, one_reaction, source};

fn vaporisation(correlation: &str) -> Results {
    let folder = Folder::new();
    let entries = [
        ("H2O(l)", "-285.830 ± 0.040"),
        ("H2O(g)", "-241.826 ± 0.040"),
    ];
    folder.write("given.toml", &source("kJ/mol", &entries, correlation));
    let case = one_reaction(&["given.toml"], "H2O(l) -> H2O(g)", "");
    folder.results(&case).expect("a case that can be worked")
}

fn correlated(coefficient: &str) -> Results {
    vaporisation(&format!(
        "[[correlation]]\nbetween = [\"H2O(l)\", \"H2O(g)\"]\ncoefficient = \"{coefficient}\"\n"
    ))
}

/// By hand (JCGM 100:2008, 5.2.2): u² = u₁² + u₂² − 2·r·u₁·u₂ with u₁ = u₂ = 0.040/2 = 0.020
/// kJ/mol, so u = 0.020·√(2·(1 − r)): 0.004 for r = 0.98, 0 for r = 1, 0.040 for r = −1.
#[test]
fn a_stated_correlation_enters_the_uncertainty_of_a_difference() {
    for (coefficient, by_hand) in [("0.98", 0.004), ("1", 0.0), ("-1", 0.040), ("0.5", 0.020)] {
        let results = correlated(coefficient);
        let u = results.number("r.heat", "standard-uncertainty");
        assert!(
            (u - by_hand).abs() < 1e-12,
            "r = {coefficient}: {u}, by hand {by_hand}"
        );
        let expanded = results.number("r.heat", "expanded");
        assert!(
            (expanded - 2.0 * by_hand).abs() < 1e-12,
            "r = {coefficient}: U = {expanded}"
        );
    }
}

/// Without one the two are taken as independent: 0.020·√2 = 0.028284… kJ/mol, seven times too much.
#[test]
fn without_a_stated_correlation_the_two_are_independent() {
    let u = vaporisation("").number("r.heat", "standard-uncertainty");
    assert!((u - 0.028_284_271_247_461_9).abs() < 1e-12, "{u}");
}

/// ISO 6976:2016, Table A.5: 44.013 kJ/mol at 25 °C, u = 0.004 (one public transcription; the
/// standard was not seen). The two agree within the expanded uncertainty of their difference,
/// 2·√(0.004² + 0.004²) = 0.0113; the difference itself is 44.004 by hand.
#[test]
fn the_difference_agrees_with_the_standard_for_natural_gas() {
    let results = correlated("0.98");
    assert_eq!(results.text("r.heat", "exact"), "44.004");
    assert_eq!(results.text("r.heat", "stated"), "44.004");
    let apart = (results.number("r.heat", "value") - 44.013).abs();
    assert!(apart < 0.0113, "{apart}");
}
