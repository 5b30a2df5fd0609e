//! Water's heat of vaporisation: the standard-state difference against the real fluid.
//!
//! Real: H(vapour) - H(liquid) at saturation, IAPWS-95 as CoolProp works it, kJ/mol (worked once
//! with that package; it is not run here). Standard state: liquid and ideal gas at 1 bar, from
//! NASA's functions.
//!
//! The two are different quantities, and the gap is physics: real vapour lies below the ideal gas
//! by about -p·(B - T·dB/dT) per mole, which grows with the vapour pressure. It is a hundredth of
//! the smallest step of a result at 0.01 °C (611 Pa), 0.017 kJ/mol at 25 °C (3.17 kPa), and
//! 0.2 kJ/mol at 101.325 kPa, where B - T·dB/dT is about -2.2 L/mol (from memory).

use super::case::{Folder, reactions};

/// Temperature; real fluid, kJ/mol; least and most that the standard state may lie above it. At
/// 0.01 °C NASA's functions, 0.003 kJ/mol below, are all that shows.
const SATURATION: [(&str, f64, [f64; 2]); 3] = [
    ("0.01 °C", 45.0546, [-0.004, 0.004]),
    ("25 °C", 43.9875, [0.015, 0.018]),
    ("99.974 °C", 40.6509, [0.20, 0.24]),
];

#[test]
fn the_standard_state_lies_above_the_real_fluid_by_what_the_vapour_is_not_ideal() {
    let list = SATURATION.map(|(temperature, ..)| ("H2O(l) -> H2O(g)", temperature));
    let case = reactions(&["nasa-glenn-2021"], &list, "");
    let results = Folder::new()
        .results(&case)
        .expect("a case that can be worked");
    for (i, (temperature, real, [least, most])) in SATURATION.into_iter().enumerate() {
        let gap = results.number(&format!("r{i}.heat"), "value") - real;
        assert!((least..=most).contains(&gap), "{temperature}: {gap} kJ/mol");
    }
}
