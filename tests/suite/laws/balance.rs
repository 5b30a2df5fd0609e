//! Equations that do not balance have no heat.

use hesswright::finding::FaultCode;
use proptest::prelude::*;

use super::invented::{SOURCE, balanced, compounds, equation, files, numbers, positive};
use super::support::{Files, calculation, case, codes, reaction};

proptest! {
    #![proptest_config(ProptestConfig::with_cases(128))]

    /// Every participant holds atoms, so one wrong coefficient is enough.
    #[test]
    fn one_wrong_coefficient_is_refused(
        all in compounds(), nu in numbers(), which in any::<prop::sample::Index>(),
        factor in positive()
    ) {
        prop_assume!(factor != super::invented::ratio(1, 1));
        let mut terms = balanced(&all, &nu);
        prop_assume!(terms.len() > 1);
        let wrong = which.index(terms.len());
        terms[wrong].1 *= factor;
        let text = case(&[SOURCE], &reaction("a", &equation(&terms)));
        let faults = calculation(&text, &files(&all)).err();
        prop_assert_eq!(faults.map(|f| codes(&f)), Some(vec![FaultCode::Unbalanced]));
    }
}

#[test]
fn charge_has_to_balance_as_well() {
    // The atoms balance: one hydrogen on each side. The charge is +1 and 0.
    let text = case(&["codata-1989"], &reaction("a", "H+(aq) -> 1/2 H2(g)"));
    let faults = calculation(&text, &Files::of(&[])).unwrap_err();
    assert_eq!(codes(&faults), [FaultCode::Unbalanced]);
    assert!(
        faults[0].found.starts_with("charge: "),
        "{}",
        faults[0].found
    );
}

#[test]
fn every_unbalanced_equation_of_a_case_is_named() {
    let rest = reaction("a", "H2(g) + O2(g) -> H2O(l)") + &reaction("b", "H2(g) -> H2O(g)");
    let faults = calculation(&case(&["codata-1989"], &rest), &Files::of(&[])).unwrap_err();
    assert_eq!(codes(&faults), [FaultCode::Unbalanced; 2]);
    assert_eq!(
        faults[0].advice,
        "balanced it reads: 2 H2(g) + O2(g) -> 2 H2O(l)"
    );
}
