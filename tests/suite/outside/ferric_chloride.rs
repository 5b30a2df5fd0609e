//! Iron(III) chloride gas: -1059.104288 kJ/mol in the 2004 edition of NASA's file, an error of
//! units that the 2021 edition corrects to -253.130 (its list of changes says so).

use num_bigint::BigInt;

use super::case::{Folder, one_reaction};
use super::rational::rational;
use super::tools::python;

#[test]
fn the_corrected_value_is_used_and_the_wrong_one_is_known() {
    let old = python("ferric_chloride.py");
    let old = rational(old["printed"].as_str().expect("a printed enthalpy"));
    assert_eq!(
        old,
        rational("-1059104.288"),
        "the other edition, as pyglenn 0.2.0 carries it"
    );

    let equation = "Fe(cr, alpha) + 3/2 Cl2(g) -> FeCl3(g)";
    let case = one_reaction(&["nasa-glenn-2021"], equation, "");
    let heat = Folder::new()
        .results(&case)
        .expect("a case that can be worked")
        .exact("r.heat");
    assert_eq!(heat, rational("-253.130"));

    // The two differ by the calorie, which is what an error of units looks like.
    let ratio = old / (heat * BigInt::from(1000));
    assert!(
        ratio > rational("4.183") && ratio < rational("4.185"),
        "{ratio}"
    );
}
