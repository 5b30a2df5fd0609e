//! Whether an equation balances, and which coefficients would make it.
//!
//! Elements and charge are counted exactly, D and T apart from H. Where the coefficients
//! come from, and what to say of a fault, is left to the caller.

use std::collections::{BTreeMap, BTreeSet};

use num_bigint::BigInt;
use num_integer::Integer;
use num_rational::BigRational;
use num_traits::{One, Signed, Zero};

use crate::elimination::eliminate;

use super::element::Element;
use super::formula::Formula;

/// The most species for which a balanced form is sought.
const MAX_SPECIES: usize = 60;

/// The longest count, in bits, with which a balanced form is sought.
const MAX_COUNT_BITS: u64 = 256;

/// What a reaction conserves.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub enum Conserved {
    /// The atoms of an element.
    Element(Element),
    /// The electric charge.
    Charge,
}

/// Something that an equation does not conserve, with what each side has of it.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Surplus {
    /// What is off.
    pub of: Conserved,
    /// How much of it is consumed.
    pub left: BigRational,
    /// How much of it is formed.
    pub right: BigRational,
}

/// What the terms do not conserve, by atomic number and the charge last; empty where the
/// equation balances. Coefficients are positive for what is formed.
pub fn imbalance(terms: &[(BigRational, &Formula)]) -> Vec<Surplus> {
    let coefficients: Vec<_> = terms.iter().map(|(number, _)| number.clone()).collect();
    let (coefficients, scale) = over_common_denominator(&coefficients);
    let contents: Vec<_> = terms.iter().map(|(_, formula)| content(formula)).collect();
    let conserved: BTreeSet<_> = contents.iter().flat_map(BTreeMap::keys).copied().collect();
    conserved
        .into_iter()
        .filter_map(|of| surplus(of, &coefficients, &scale, &contents))
        .collect()
}

/// What one conserved thing is off by. The sums are of integers, over one denominator:
/// sums of fractions would look for common divisors at every step.
fn surplus(
    of: Conserved,
    coefficients: &[BigInt],
    scale: &BigInt,
    contents: &[BTreeMap<Conserved, BigRational>],
) -> Option<Surplus> {
    let (counts, count_scale) = over_common_denominator(&row_of(of, contents));
    let (mut left, mut right) = (BigInt::zero(), BigInt::zero());
    for (coefficient, count) in coefficients.iter().zip(counts) {
        match coefficient.is_negative() {
            true => left -= coefficient * count,
            false => right += coefficient * count,
        }
    }
    let denominator = scale * count_scale;
    (left != right).then(|| Surplus {
        of,
        left: BigRational::new(left, denominator.clone()),
        right: BigRational::new(right, denominator),
    })
}

/// How much of one conserved thing each formula has.
fn row_of(of: Conserved, contents: &[BTreeMap<Conserved, BigRational>]) -> Vec<BigRational> {
    contents
        .iter()
        .map(|content| content.get(&of).cloned().unwrap_or_default())
        .collect()
}

/// What a formula has of everything that is conserved.
fn content(formula: &Formula) -> BTreeMap<Conserved, BigRational> {
    let mut content: BTreeMap<_, _> = formula
        .counts()
        .iter()
        .map(|(element, count)| (Conserved::Element(*element), count.clone()))
        .collect();
    if formula.charge() != 0 {
        let charge = BigRational::from_integer(formula.charge().into());
        content.insert(Conserved::Charge, charge);
    }
    content
}

/// The smallest positive integer coefficients that balance the reaction, left side first,
/// where there is exactly one such set.
///
/// `None` where there is no set or more than one, and beyond 60 species or counts of 256
/// bits. The null space of the matrix of counts, by exact elimination (Smith and Missen,
/// Chemical Reaction Equilibrium Analysis, 1982, chapter 2, from memory).
pub fn balanced_form(left: &[&Formula], right: &[&Formula]) -> Option<Vec<BigInt>> {
    let species = left.len() + right.len();
    if left.is_empty() || right.is_empty() || species > MAX_SPECIES {
        return None;
    }
    let mut matrix = signed_counts(left, right)?;
    let pivots = eliminate(&mut matrix, species);
    let free: Vec<_> = (0..species).filter(|at| !pivots.contains(at)).collect();
    let [free] = free.as_slice() else {
        return None;
    };
    let mut ratios = vec![BigRational::one(); species];
    for (row, pivot) in matrix.iter().zip(&pivots) {
        ratios[*pivot] = BigRational::new(-&row[*free], row[*pivot].clone());
    }
    smallest_integers(&ratios)
}

/// A row for everything conserved, a column for every species; right-hand ones negative.
/// `None` where a count is too long.
fn signed_counts(left: &[&Formula], right: &[&Formula]) -> Option<Vec<Vec<BigInt>>> {
    let contents: Vec<_> = left.iter().chain(right).map(|f| content(f)).collect();
    let conserved: BTreeSet<_> = contents.iter().flat_map(BTreeMap::keys).copied().collect();
    let rows = conserved.into_iter().map(|of| {
        let mut row = whole_row(&row_of(of, &contents))?;
        row[left.len()..].iter_mut().for_each(|count| *count *= -1);
        Some(row)
    });
    rows.collect()
}

/// A row in integers, or `None` where one is too long.
fn whole_row(counts: &[BigRational]) -> Option<Vec<BigInt>> {
    let is_short = |value: &BigInt| value.bits() <= MAX_COUNT_BITS;
    let short = |count: &BigRational| is_short(count.numer()) && is_short(count.denom());
    if !counts.iter().all(short) {
        return None;
    }
    let (row, _) = over_common_denominator(counts);
    row.iter().all(is_short).then_some(row)
}

/// The values as integers over one denominator, and that denominator.
fn over_common_denominator(values: &[BigRational]) -> (Vec<BigInt>, BigInt) {
    let denominator = values.iter().fold(BigInt::one(), |common, value| {
        // The remainder first: the divisor algorithm is slow on numbers of unlike length.
        let shared = (&common % value.denom()).gcd(value.denom());
        common * (value.denom() / shared)
    });
    let whole = |value: &BigRational| value.numer() * (&denominator / value.denom());
    (values.iter().map(whole).collect(), denominator)
}

/// The ratios as integers without a common divisor, if all are positive.
fn smallest_integers(ratios: &[BigRational]) -> Option<Vec<BigInt>> {
    if !ratios.iter().all(BigRational::is_positive) {
        return None;
    }
    let (whole, _) = over_common_denominator(ratios);
    let shared = whole
        .iter()
        .fold(BigInt::zero(), |gcd, value| gcd.gcd(value));
    Some(whole.into_iter().map(|value| value / &shared).collect())
}

#[cfg(test)]
mod tests {
    use super::*;

    fn formulas(texts: &str) -> Vec<Formula> {
        texts
            .split(" + ")
            .map(|text| Formula::parse(text).unwrap())
            .collect()
    }

    fn form(left: &str, right: &str) -> Option<String> {
        let (left, right) = (formulas(left), formulas(right));
        let form = balanced_form(
            &left.iter().collect::<Vec<_>>(),
            &right.iter().collect::<Vec<_>>(),
        )?;
        let texts: Vec<_> = form.iter().map(BigInt::to_string).collect();
        Some(texts.join(" "))
    }

    /// Equations of general knowledge, from memory; each can be counted by hand.
    #[test]
    fn unique_balanced_forms_are_found() {
        for (left, right, coefficients) in [
            ("C6H5NO2 + H2", "C6H7N + H2O", "1 3 1 2"),
            ("C2H6 + O2", "CO2 + H2O", "2 7 4 6"),
            ("Fe2O3 + Al", "Fe + Al2O3", "1 2 2 1"),
            ("NH3 + O2", "NO + H2O", "4 5 4 6"),
            ("MnO4- + Fe^2+ + H+", "Mn^2+ + Fe^3+ + H2O", "1 5 8 1 5 4"),
            ("Na + H2O", "Na+ + OH- + H2", "2 2 2 2 1"),
            ("Zn", "Zn^2+ + e-", "1 1 2"),
            ("D2 + O2", "D2O", "2 1 2"),
            ("Fe0.95O + O2", "Fe2O3", "80 17 38"),
        ] {
            assert_eq!(form(left, right).as_deref(), Some(coefficients), "{left}");
        }
    }

    #[test]
    fn no_form_is_given_where_none_or_many_exist() {
        assert_eq!(form("H2 + O2", "NaCl"), None);
        assert_eq!(form("D2 + O2", "H2O"), None);
        assert_eq!(form("C + O2", "CO + CO2"), None);
        assert_eq!(form("H2O + H2", "O2"), None);
    }

    #[test]
    fn what_is_off_is_listed_with_both_sides() {
        let (permanganate, manganese) = (formulas("MnO4-"), formulas("Mn^2+"));
        let one = BigRational::one();
        let terms = [(-one.clone(), &permanganate[0]), (one, &manganese[0])];
        let off = imbalance(&terms);
        let texts: Vec<_> = off
            .iter()
            .map(|s| format!("{:?}: {} to {}", s.of, s.left, s.right))
            .collect();
        let oxygen = Conserved::Element(Element::from_symbol("O").unwrap());
        assert_eq!(
            texts,
            [format!("{oxygen:?}: 4 to 0"), "Charge: -1 to 2".to_owned()]
        );
    }

    #[test]
    fn a_form_is_not_sought_without_bounds() {
        let many: Vec<_> = (0..61).map(|_| Formula::parse("H2").unwrap()).collect();
        let refs: Vec<_> = many.iter().collect();
        assert_eq!(balanced_form(&refs[..60], &refs[60..]), None);
        let long = format!("H{}", "9".repeat(64));
        let nested = format!("(({long}){}){}", "9".repeat(64), "9".repeat(64));
        assert_eq!(form(&nested, &nested), None);
    }
}
