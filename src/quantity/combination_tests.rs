//! Combined uncertainties against the worked examples of JCGM 100:2008.

use super::*;
use crate::quantity::{Exact, Real};

fn form(sensitivities: &[f64]) -> LinearForm {
    let mut form = LinearForm::new();
    for (index, sensitivity) in sensitivities.iter().enumerate() {
        form.add_scaled(index, &Real::Float(*sensitivity));
    }
    form
}

fn combined(sensitivities: &[f64], u: &[f64], correlations: &Correlations) -> Combined {
    let uncertainty = |index: usize| InputUncertainty::Standard(u[index]);
    combine(&form(sensitivities), &uncertainty, correlations)
}

fn assert_near(found: f64, expected: f64, within: f64) {
    assert!(
        (found - expected).abs() <= within,
        "{found}, not {expected}"
    );
}

/// GUM H.2, inputs as transcribed in the GTC documentation: V 4.999 V, u 0.0032; I 19.661 mA,
/// u 0.0095 mA; φ 1.04446 rad, u 0.00075; r(V,I) -0.36, r(V,φ) 0.86, r(I,φ) -0.65.
#[test]
fn gum_h2_resistance_reactance_impedance() {
    let (v, i, phi) = (4.999, 19.661e-3, 1.044_46);
    let u = [0.0032, 0.0095e-3, 0.000_75];
    let mut correlations = Correlations::new();
    for (a, b, r) in [(0, 1, -0.36), (0, 2, 0.86), (1, 2, -0.65)] {
        correlations.state(a, b, r).unwrap();
    }
    let z = v / i;
    let (sine, cosine) = (libm::sin(phi), libm::cos(phi));
    let resistance = [cosine / i, -z * cosine / i, -z * sine];
    let reactance = [sine / i, -z * sine / i, z * cosine];
    let impedance = [1.0 / i, -z / i, 0.0];
    // Computed from these inputs with GTC 1.5.1: 0.0700, 0.2957, 0.2366. The GUM prints 0.071,
    // 0.295, 0.236 (from memory), from readings with more digits.
    for (sensitivities, gtc, gum) in [
        (resistance, 0.0700, 0.071),
        (reactance, 0.2957, 0.295),
        (impedance, 0.2366, 0.236),
    ] {
        let standard = combined(&sensitivities, &u, &correlations)
            .standard
            .unwrap();
        assert_near(standard, gtc, 0.00005);
        assert_near(standard, gum, 0.0011);
    }
    // Without the correlations, by hand from relative contributions to R = 127.73 Ω: 0.0818 (V),
    // 0.0617 (I), 0.1649 (φ); the root of the sum of squares is 0.194, wrong by a factor of 2.8.
    let without = combined(&resistance, &u, &Correlations::new());
    assert_near(without.standard.unwrap(), 0.1941, 0.0001);
}

#[test]
fn gum_h1_end_gauge() {
    // Components in nm (inputs from memory): the GUM prints 32 nm; 31.67 by hand.
    let combined = combined(&[1.0; 4], &[25.0, 9.7, 2.9, 16.6], &Correlations::new());
    assert_near(combined.standard.unwrap(), 31.67, 0.01);
    // 25²/31.67² = 0.623 by hand.
    assert_near(combined.shares[0].1.unwrap(), 0.623, 0.0005);
}

/// H2O(l) -> H2O(g) from -241.826 ± 0.040 and -285.830 ± 0.040 kJ/mol (k = 2), CODATA 1989.
/// By hand, with u = 0.020 for each: u² = 0.020² + 0.020² - 2 r 0.020² = 0.0008 (1 - r).
#[test]
fn vaporisation_is_a_difference_of_correlated_values() {
    // r = 0.98 is invented for the check: u² = 1.6e-5, u = 0.0040. Without it u = 0.0283.
    for (r, expected) in [(0.98, 0.004), (0.0, 0.028_284), (1.0, 0.0)] {
        let mut correlations = Correlations::new();
        correlations.state(1, 0, r).unwrap();
        let combined = combined(&[1.0, -1.0], &[0.020, 0.020], &correlations);
        assert_near(combined.standard.unwrap(), expected, 1e-6);
        let share = if r < 1.0 { 0.5 } else { 0.0 };
        assert_near(combined.shares[0].1.unwrap(), share, 1e-9);
    }
}

#[test]
fn what_nobody_stated_is_not_zero() {
    let known = [
        InputUncertainty::Exact,
        InputUncertainty::NotStated,
        InputUncertainty::Standard(0.3),
        InputUncertainty::Standard(f64::NAN),
    ];
    let form = form(&[1.0, 1.0, -2.0, 1.0]);
    let result = combine(&form, &|index| known[index], &Correlations::new());
    assert_eq!(result.standard, Some(0.6));
    assert_eq!((result.stated, result.of), (1, 3));
    assert_eq!(result.shares, [(1, None), (2, Some(1.0)), (3, None)]);
    let none = combine(
        &form,
        &|_| InputUncertainty::NotStated,
        &Correlations::new(),
    );
    assert_eq!((none.standard, none.stated, none.of), (None, 0, 4));
    let exact = combine(&form, &|_| InputUncertainty::Exact, &Correlations::new());
    assert_eq!((exact.standard, exact.stated, exact.of), (None, 0, 0));
}

#[test]
fn a_value_that_cancels_has_no_part() {
    let one = Real::Exact(Exact::from_integer(1.into()));
    let mut form = LinearForm::new();
    form.add_scaled(7, &one);
    form.add_scaled(7, &one.negated());
    assert!(form.is_empty());
}

#[test]
fn very_large_and_very_small_contributions() {
    let combined = |u: f64| combined(&[3.0, 4.0], &[u, u], &Correlations::new());
    // 3-4-5: by hand. Squares of these would overflow and underflow.
    assert_near(combined(1e200).standard.unwrap(), 5e200, 1e186);
    assert_near(combined(1e-200).standard.unwrap(), 5e-200, 1e-214);
    assert_eq!(combined(0.0).standard, Some(0.0));
    let infinite = combined(f64::MAX);
    assert_eq!(infinite.standard, Some(f64::INFINITY));
    assert_eq!(infinite.shares[0].1, None);
}
