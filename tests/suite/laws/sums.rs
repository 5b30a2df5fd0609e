//! Laws of the sum: reversal, scaling, addition, units.

use hesswright::engine::Outcome;
use hesswright::quantity::{Exact, Real};
use num_traits::{Signed, Zero};
use proptest::prelude::*;

use super::invented::{
    SOURCE, balanced, compounds, equation, expected, expected_uncertainty, files, numbers,
    positive, ratio,
};
use super::support::{case, exact, near, outcome, reaction, sensitivities, worked};

fn scaled(numbers: &[Exact], factor: &Exact) -> Vec<Exact> {
    numbers.iter().map(|nu| nu * factor).collect()
}

fn standard(outcome: &Outcome) -> Option<f64> {
    outcome.combined.standard
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(64))]

    #[test]
    fn a_heat_is_the_sum_of_its_formation_enthalpies(all in compounds(), nu in numbers()) {
        let rest = reaction("a", &equation(&balanced(&all, &nu)));
        let calculation = worked(&case(&[SOURCE], &rest), &files(&all));
        let heat = outcome(&calculation, "a.heat");
        prop_assert_eq!(exact(heat), &expected(&all, &nu));
        prop_assert!(near(standard(heat), expected_uncertainty(&all, &nu)));
        // The elements are exact by convention, so they are not among the values that count.
        let taking_part = nu.iter().filter(|nu| !nu.is_zero()).count();
        prop_assert_eq!(heat.combined.of, taking_part);
    }

    #[test]
    fn reversal_changes_the_sign_and_nothing_else(all in compounds(), nu in numbers()) {
        let forward = equation(&balanced(&all, &nu));
        let backward = equation(&balanced(&all, &scaled(&nu, &ratio(-1, 1))));
        let rest = reaction("a", &forward) + &reaction("b", &backward);
        let calculation = worked(&case(&[SOURCE], &rest), &files(&all));
        let (a, b) = (outcome(&calculation, "a.heat"), outcome(&calculation, "b.heat"));
        prop_assert_eq!(exact(a), &-exact(b));
        prop_assert_eq!(a.expanded, b.expanded);
        prop_assert_eq!(&a.combined, &b.combined);
        let sign = |text: &str| text.trim_start_matches('-').to_string();
        prop_assert_eq!(sign(&a.stated.value_text), sign(&b.stated.value_text));
        prop_assert_eq!(&a.stated.uncertainty_text, &b.stated.uncertainty_text);
        prop_assert_eq!(a.stated_by, b.stated_by);
    }

    #[test]
    fn scaling_scales_the_heat_and_leaves_what_is_per_substance(
        all in compounds(), nu in numbers(), factor in positive()
    ) {
        let participant = nu.iter().position(|nu| !nu.is_zero()).expect("numbers() holds one");
        let per = format!("per = \"{}\"\n\n", all[participant].species());
        let once = reaction("a", &equation(&balanced(&all, &nu))).trim_end().to_string();
        let more = equation(&balanced(&all, &scaled(&nu, &factor)));
        let more = reaction("b", &more).trim_end().to_string();
        let rest = format!("{once}\n{per}{more}\n{per}");
        let calculation = worked(&case(&[SOURCE], &rest), &files(&all));
        let get = |id: &str| outcome(&calculation, id);
        prop_assert_eq!(&(exact(get("a.heat")) * &factor), exact(get("b.heat")));
        let once = get("a.heat").form.scaled(&Real::Exact(factor.clone()));
        prop_assert_eq!(&once, &get("b.heat").form);
        let factor = hesswright::quantity::to_f64(&factor);
        let scaled = standard(get("a.heat")).map(|u| u * factor);
        prop_assert!(near(scaled, standard(get("b.heat"))));
        for quantity in ["heat-per", "heat-per-mass"] {
            let (a, b) = (get(&format!("a.{quantity}")), get(&format!("b.{quantity}")));
            prop_assert_eq!(exact(a), exact(b));
            prop_assert_eq!(&a.form, &b.form);
            prop_assert_eq!(&a.combined, &b.combined);
        }
    }

    #[test]
    fn the_heat_of_a_sum_counts_shared_values_once(
        all in compounds(), first in numbers(), second in numbers()
    ) {
        let total: Vec<Exact> = first.iter().zip(&second).map(|(a, b)| a + b).collect();
        prop_assume!(total.iter().any(|nu| !nu.is_zero()));
        let parts = [("a", &first), ("b", &second), ("c", &total)];
        let rest = parts.map(|(id, nu)| reaction(id, &equation(&balanced(&all, nu))));
        let calculation = worked(&case(&[SOURCE], &rest.concat()), &files(&all));
        let [a, b, c] = ["a.heat", "b.heat", "c.heat"].map(|id| outcome(&calculation, id));
        prop_assert_eq!(&(exact(a) + exact(b)), exact(c));
        // Elements take part in `a` and `b` and may be missing from `c`; so may compounds.
        prop_assert_eq!(&a.form.plus(&b.form), &c.form);
        prop_assert!(near(standard(c), expected_uncertainty(&all, &total)));
        for (compound, nu) in all.iter().zip(&total).filter(|(_, nu)| nu.is_zero()) {
            let counted = sensitivities(&calculation, c).contains_key(&compound.species());
            prop_assert!(!counted, "{} cancels ({nu})", compound.species());
        }
    }

    #[test]
    fn results_in_other_units_are_the_same_heat(all in compounds(), nu in numbers()) {
        // Definitions: 1 cal_th = 4.184 J (ISO 80000-5:2007, annex C); 1 Btu_IT =
        // 1055.05585262 J (ISO 31-4:1992, annex A). Both from memory.
        let units = [("kJ", ratio(1000, 1)), ("J", ratio(1, 1)), ("kcal_th", ratio(4184, 1)),
            ("Btu_IT", ratio(105_505_585_262, 100_000_000))];
        let used = all.iter().zip(&nu).find(|(_, nu)| !nu.is_zero());
        let per = used.expect("numbers() holds one").0.species();
        let rest = reaction("a", &equation(&balanced(&all, &nu))).trim_end().to_string();
        let mut joules: Vec<[Exact; 3]> = Vec::new();
        for (unit, size) in units {
            let rest = format!("{rest}\nper = \"{per}\"\n[units]\nenergy = \"{unit}\"\n");
            let calculation = worked(&case(&[SOURCE], &rest), &files(&all));
            let ids = ["a.heat", "a.heat-per", "a.heat-per-mass"];
            joules.push(ids.map(|id| exact(outcome(&calculation, id)) * &size));
            prop_assert!(outcome(&calculation, "a.heat").unit.symbol().starts_with(unit));
        }
        for other in &joules[1..] {
            prop_assert_eq!(&joules[0], other);
        }
    }
}

#[test]
fn a_value_on_both_sides_of_two_reactions_is_one_value() {
    let all = [([1, 2, 1], "-100.0 ± 2.0"), ([2, 4, 2], "-250.0 ± 4.0")];
    let all = all.map(|(atoms, enthalpy)| super::invented::Compound {
        atoms,
        enthalpy: enthalpy.to_string(),
    });
    // CH2O is a reactant of the first and a product of the second, C2H4O2 the other way round.
    let rest =
        reaction("join", "2 CH2O(l) -> C2H4O2(l)") + &reaction("split", "C2H4O2(l) -> 2 CH2O(l)");
    let calculation = worked(&case(&[SOURCE], &rest), &files(&all));
    assert_eq!(calculation.problem.values.len(), 2);
    let (join, split) = (
        outcome(&calculation, "join.heat"),
        outcome(&calculation, "split.heat"),
    );
    // -250.0 - 2·(-100.0) = -50.0; u² = (2·1.0)² + (1·2.0)² = 8.
    assert_eq!(exact(join), &ratio(-50, 1));
    assert_eq!(exact(split), &ratio(50, 1));
    assert!(near(join.combined.standard, Some(libm::sqrt(8.0))));
    let together = join.form.plus(&split.form);
    assert!(
        together.is_empty(),
        "one and its reverse leave nothing: {together:?}"
    );
    assert!(exact(join).is_negative());
}
