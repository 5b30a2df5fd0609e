//! Which multiples of the steps add up to the target, exactly.
//!
//! Equations are vectors of stoichiometric numbers, one place for each species. Heats and their
//! uncertainties are left to `adjust`.

use num_bigint::BigInt;
use num_integer::Integer;
use num_traits::{One, Signed, Zero};

use crate::elimination::eliminate;
use crate::quantity::Exact;

/// The most steps of one cycle, a bound on the work.
pub const MOST_STEPS: usize = 60;
/// The most species of one cycle, a bound on the work.
pub const MOST_SPECIES: usize = 200;
/// The longest numerator or denominator of a stoichiometric number, in bits.
const MOST_BITS: u64 = 64;

/// How the steps make up the target.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Multipliers {
    /// One set of multipliers, by step, that gives the target. The only one where there is no
    /// closure.
    pub particular: Vec<Exact>,
    /// Sets of multipliers that add up to no reaction at all, independent of each other, in
    /// smallest whole numbers. Their heats add up to zero if the determinations agree.
    pub closures: Vec<Vec<Exact>>,
}

/// Why the target cannot be made of the steps.
#[derive(Clone, Debug, PartialEq, Eq)]
pub enum NoMultipliers {
    /// The target is not among the sums of the steps: for the best attempt, each species that is
    /// left over (positive: still to be formed).
    LeftOver(Vec<(usize, Exact)>),
    /// More steps or species, or longer numbers, than can be worked.
    TooLarge,
}

/// Solves Σ x_j·s_j = t over the rational numbers, t and each s_j being vectors of stoichiometric
/// numbers. Gauss–Jordan elimination in whole numbers; a heat that belongs to each s_j adds up in
/// the same way (Hess's law). All vectors have one length.
///
/// # Errors
/// The target lies outside the span of the steps; the cycle is too large.
pub fn multipliers(target: &[Exact], steps: &[Vec<Exact>]) -> Result<Multipliers, NoMultipliers> {
    if steps.len() > MOST_STEPS || target.len() > MOST_SPECIES || !all_short(target, steps) {
        return Err(NoMultipliers::TooLarge);
    }
    let mut rows = rows(target, steps);
    let pivots = eliminate(&mut rows, steps.len());
    let mut particular = vec![Exact::zero(); steps.len()];
    for (row, pivot) in rows.iter().zip(&pivots) {
        particular[*pivot] = Exact::new(row[steps.len()].clone(), row[*pivot].clone());
    }
    let left = left_over(target, steps, &particular);
    if !left.is_empty() {
        return Err(NoMultipliers::LeftOver(left));
    }
    let free = (0..steps.len()).filter(|step| !pivots.contains(step));
    let closures = free.map(|step| closure(&rows, &pivots, step, steps.len()));
    Ok(Multipliers {
        particular,
        closures: closures.collect(),
    })
}

fn all_short(target: &[Exact], steps: &[Vec<Exact>]) -> bool {
    let short = |n: &Exact| n.numer().bits() <= MOST_BITS && n.denom().bits() <= MOST_BITS;
    target.iter().chain(steps.iter().flatten()).all(short)
}

/// A row for each species: its numbers in the steps and then in the target, whole. Species of the
/// target come first, those that few steps can supply before the others: what cannot be supplied
/// is then left over by its own name.
fn rows(target: &[Exact], steps: &[Vec<Exact>]) -> Vec<Vec<BigInt>> {
    let occurrences = |species: usize| steps.iter().filter(|s| !s[species].is_zero()).count();
    let mut order: Vec<usize> = (0..target.len()).collect();
    order.sort_by_key(|species| (target[*species].is_zero(), occurrences(*species)));
    let row = |species: usize| {
        let numbers = steps.iter().map(|step| &step[species]);
        whole(numbers.chain([&target[species]]))
    };
    order.into_iter().map(row).collect()
}

/// The numbers times their common denominator.
fn whole<'a>(numbers: impl Iterator<Item = &'a Exact> + Clone) -> Vec<BigInt> {
    let common = numbers
        .clone()
        .fold(BigInt::one(), |common, number| common.lcm(number.denom()));
    numbers
        .map(|number| number.numer() * (&common / number.denom()))
        .collect()
}

/// What the target has and the multiplied steps have not.
fn left_over(target: &[Exact], steps: &[Vec<Exact>], by: &[Exact]) -> Vec<(usize, Exact)> {
    let made =
        |species: usize| -> Exact { steps.iter().zip(by).map(|(s, x)| &s[species] * x).sum() };
    let left = (0..target.len()).map(|species| (species, &target[species] - made(species)));
    left.filter(|(_, amount)| !amount.is_zero()).collect()
}

/// One of the free step, and what of the pivot steps cancels it.
fn closure(rows: &[Vec<BigInt>], pivots: &[usize], free: usize, steps: usize) -> Vec<Exact> {
    let mut closure = vec![Exact::zero(); steps];
    closure[free] = Exact::one();
    for (row, pivot) in rows.iter().zip(pivots) {
        closure[*pivot] = Exact::new(-&row[free], row[*pivot].clone());
    }
    let whole = whole(closure.iter());
    let shared = whole.iter().fold(BigInt::zero(), |gcd, n| gcd.gcd(n));
    let first = whole.iter().find(|n| !n.is_zero());
    let sign = if first.is_some_and(BigInt::is_negative) {
        -shared
    } else {
        shared
    };
    // The free step has a one, so what all numbers share is not zero.
    whole
        .into_iter()
        .map(|n| Exact::from_integer(n / &sign))
        .collect()
}

#[cfg(test)]
mod tests {
    use super::*;

    fn vector(numbers: &[i64]) -> Vec<Exact> {
        let exact = |n: &i64| Exact::from_integer((*n).into());
        numbers.iter().map(exact).collect()
    }

    /// Carbon monoxide from the heats of combustion of graphite and of carbon monoxide; the
    /// schoolbook example, from memory. Species: C, O2, CO, CO2, all numbers doubled where ½
    /// would stand.
    #[test]
    fn a_unique_set_is_found_exactly() {
        let target = vector(&[-2, -1, 2, 0]);
        let steps = [vector(&[-1, -1, 0, 1]), vector(&[0, -1, -2, 2])];
        let found = multipliers(&target, &steps).unwrap();
        assert_eq!(found.particular, vector(&[2, -1]));
        assert!(found.closures.is_empty());
        let third: Vec<Exact> = target
            .iter()
            .map(|n| n / Exact::from_integer(3.into()))
            .collect();
        let found = multipliers(&third, &steps).unwrap();
        let thirds = [
            Exact::new(2.into(), 3.into()),
            Exact::new((-1).into(), 3.into()),
        ];
        assert_eq!(found.particular, thirds);
    }

    #[test]
    fn steps_that_depend_on_each_other_close() {
        let target = vector(&[-1, 1, 0]);
        let steps = [
            vector(&[-1, 1, 0]),
            vector(&[0, -2, 2]),
            vector(&[-3, 0, 3]),
            vector(&[2, -2, 0]),
        ];
        let found = multipliers(&target, &steps).unwrap();
        assert_eq!(found.closures.len(), 2);
        for closure in &found.closures {
            let sum = left_over(&vector(&[0, 0, 0]), &steps, closure);
            assert!(sum.is_empty(), "{closure:?}");
        }
        // 6·(A→B) + 3·(2B→2C) − 2·(3A→3C) = 0, and 2·(A→B) + (2B→2A) = 0, by hand.
        assert_eq!(found.closures[0], vector(&[6, 3, -2, 0]));
        assert_eq!(found.closures[1], vector(&[2, 0, 0, 1]));
    }

    #[test]
    fn what_no_step_supplies_is_left_over_by_name() {
        // C + 2 H2 → CH4 from the combustions of methane and graphite, that of hydrogen missing.
        // Species: CH4, C, H2, O2, CO2, H2O.
        let target = vector(&[1, -1, -2, 0, 0, 0]);
        let steps = [vector(&[-1, 0, 0, -2, 1, 2]), vector(&[0, -1, 0, -1, 1, 0])];
        let fault = multipliers(&target, &steps).unwrap_err();
        // What is left is −2 H2 − O2 + 2 H2O: the reaction whose heat is missing, by hand.
        let left = [(2, -2), (3, -1), (5, 2)].map(|(s, n)| (s, Exact::from_integer(n.into())));
        assert_eq!(fault, NoMultipliers::LeftOver(left.to_vec()));
        let nothing = multipliers(&target, &[]).unwrap_err();
        assert!(matches!(nothing, NoMultipliers::LeftOver(left) if left.len() == 3));
    }

    #[test]
    fn the_work_is_bounded() {
        let many = vec![vector(&[1]); MOST_STEPS + 1];
        assert_eq!(
            multipliers(&vector(&[1]), &many),
            Err(NoMultipliers::TooLarge)
        );
        let long = vec![Exact::from_integer(BigInt::from(1) << 65)];
        assert_eq!(
            multipliers(&long, &[vector(&[1])]),
            Err(NoMultipliers::TooLarge)
        );
        let wide = vec![Exact::one(); MOST_SPECIES + 1];
        assert_eq!(multipliers(&wide, &[]), Err(NoMultipliers::TooLarge));
    }
}
