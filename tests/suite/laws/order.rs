//! What the order of things in a file may not change.

use hesswright::calculation::Calculation;
use hesswright::record::results_json;
use proptest::prelude::*;

use super::invented::{SOURCE, balanced, compounds, equation, files, numbers};
use super::support::{RECORD, case, exact, near, outcome, reaction, sensitivities, shares, worked};

/// Everything that is claimed of a result, the values used named by their substance.
fn assert_same_result(a: &Calculation, b: &Calculation, id: &str) {
    let (one, other) = (outcome(a, id), outcome(b, id));
    assert_eq!(exact(one), exact(other), "{id}");
    assert_eq!(sensitivities(a, one), sensitivities(b, other), "{id}");
    assert!(near(one.combined.standard, other.combined.standard), "{id}");
    assert!(near(one.expanded, other.expanded), "{id}");
    assert_eq!(one.stated, other.stated, "{id}");
    assert_eq!(one.stated_by, other.stated_by, "{id}");
    assert_eq!(one.remark, other.remark, "{id}");
    let (one, other) = (shares(a, one), shares(b, other));
    assert!(one.keys().eq(other.keys()), "{id}");
    assert!(
        one.values().zip(other.values()).all(|(a, b)| near(*a, *b)),
        "{id}: {one:?} {other:?}"
    );
}

/// A permutation of `n` things.
fn permutation(n: usize) -> impl Strategy<Value = Vec<usize>> {
    Just((0..n).collect::<Vec<_>>()).prop_shuffle()
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(64))]

    #[test]
    fn the_order_of_terms(all in compounds(), nu in numbers(), order in permutation(8)) {
        let terms = balanced(&all, &nu);
        let moved: Vec<_> = order.iter().filter_map(|i| terms.get(*i).cloned()).collect();
        let works = |terms: &[_]| {
            worked(&case(&[SOURCE], &reaction("a", &equation(terms))), &files(&all))
        };
        assert_same_result(&works(&terms), &works(&moved), "a.heat");
    }

    #[test]
    fn the_order_of_tables(
        all in compounds(), first in numbers(), second in numbers(), order in permutation(6)
    ) {
        let blocks = [
            RECORD.to_string(),
            format!("[sources]\nconsult = [\"{SOURCE}\"]\n"),
            reaction("a", &equation(&balanced(&all, &first))),
            reaction("b", &equation(&balanced(&all, &second))),
            "[inputs]\nwidth = { value = \"2.0 m\", confirmed = true }\n".to_string(),
            "[units]\nenergy = \"J\"\n".to_string(),
        ];
        let written = worked(&blocks.join("\n"), &files(&all));
        let moved: Vec<&str> = order.iter().map(|i| blocks[*i].as_str()).collect();
        let moved = worked(&moved.join("\n"), &files(&all));
        for id in ["a.heat", "b.heat"] {
            assert_same_result(&written, &moved, id);
        }
        let said = |calculation: &Calculation| {
            let mut codes: Vec<_> = calculation.working.findings.iter().map(|f| f.code).collect();
            codes.sort();
            codes
        };
        prop_assert_eq!(said(&written), said(&moved));
    }

    #[test]
    fn the_order_of_entries_in_a_source(
        all in compounds(), nu in numbers(), order in permutation(super::invented::COMPOUNDS)
    ) {
        let moved: Vec<_> = order.iter().map(|i| all[*i].clone()).collect();
        let text = case(&[SOURCE], &reaction("a", &equation(&balanced(&all, &nu))));
        let (a, b) = (worked(&text, &files(&all)), worked(&text, &files(&moved)));
        assert_same_result(&a, &b, "a.heat");
    }

    #[test]
    fn nothing_at_all_between_two_runs(all in compounds(), nu in numbers()) {
        let text = case(&[SOURCE], &reaction("a", &equation(&balanced(&all, &nu))));
        let json = || results_json(&worked(&text, &files(&all)));
        prop_assert_eq!(json(), json());
    }
}
