//! Redundant determinations adjusted to each other.
//!
//! Leaves to others: the multipliers and closures (`multipliers`), where heats and covariances
//! come from, and what is said about the outcome.

use num_bigint::BigInt;
use num_integer::Integer;
use num_traits::{One, Zero};

use crate::quantity::{Exact, to_f64};

use super::chi_square::exceedance;
use super::multipliers::Multipliers;
use super::{CRITICAL_RESIDUAL, SIGNIFICANCE_LEVEL};

/// The most closures of one cycle, a bound on the work.
pub const MOST_CLOSURES: usize = 40;
/// A closure keeps less than 10^-this of its variance beside the others where it adds nothing to
/// them: covariances come from floating-point numbers, which carry about 16 digits.
const NEGLIGIBLE: usize = 12;

/// What the adjustment of redundant determinations gives.
#[derive(Clone, Debug, PartialEq)]
pub struct Adjustment {
    /// For each step the standard uncertainty of its heat.
    pub standard: Vec<f64>,
    /// Pairs of steps whose heats are correlated, with the coefficient.
    pub correlated: Vec<(usize, usize, f64)>,
    /// For each step what it counts in the target: the multipliers of least variance.
    pub weights: Vec<Exact>,
    /// For each closure the sum of the measured heats, which would be zero if they agreed.
    pub misclosures: Vec<Exact>,
    /// The standard uncertainty of each misclosure.
    pub misclosure_uncertainty: Vec<f64>,
    /// For each closure S⁻¹m, in one over the unit of the heats: its part in χ² is m times that.
    pub correlates: Vec<f64>,
    /// For each step the measured less the adjusted heat.
    pub residuals: Vec<Exact>,
    /// For each step λ = B·S⁻¹m, in one over the unit of the heats: for a heat that is correlated
    /// with no other, its residual over its variance.
    pub gradients: Vec<f64>,
    /// The standard uncertainty of each gradient, √(B·S⁻¹Bᵀ)_ii.
    pub gradient_uncertainty: Vec<f64>,
    /// For each step its gradient over what the gradient may scatter by, which for a heat that is
    /// correlated with no other is its residual over what the residual may scatter by; none for
    /// a heat that no other determination checks.
    pub normalised: Vec<Option<f64>>,
    /// For each step which part of an error in it shows in its residual, from 0 to 1.
    pub redundancy: Vec<f64>,
    pub checked: Checked,
    pub chi_square: f64,
    /// Closures that are independent and carry an uncertainty.
    pub degrees_of_freedom: usize,
    /// Of a χ² as large as this or larger, if the stated uncertainties are right.
    pub probability: f64,
}

fn birge_ratio(chi_square: f64, degrees_of_freedom: usize) -> f64 {
    match degrees_of_freedom {
        0 => 1.0,
        freedom => libm::sqrt(chi_square / freedom as f64),
    }
}

fn is_misfit(normalised: f64) -> bool {
    normalised.abs() > CRITICAL_RESIDUAL
}

impl Adjustment {
    /// √(χ²/f), R. T. Birge, Phys. Rev. 40 (1932) 207 (from memory): the factor by which all
    /// uncertainties would have to grow for χ² to be what is expected.
    pub fn birge_ratio(&self) -> f64 {
        birge_ratio(self.chi_square, self.degrees_of_freedom)
    }

    /// Whether the determinations differ by more than their uncertainties explain: all of them
    /// together, or one of them.
    pub fn disagrees(&self) -> bool {
        let misfit = self.most_deviant().is_some_and(|(_, t)| is_misfit(t));
        self.degrees_of_freedom > 0 && (self.probability < SIGNIFICANCE_LEVEL || misfit)
    }

    /// The steps whose normalised residual is as large as the largest. Among several of them the
    /// data cannot say which is off.
    pub fn most_deviant_alike(&self) -> Vec<usize> {
        let Some((_, most)) = self.most_deviant() else {
            return Vec::new();
        };
        let like =
            |t: &Option<f64>| t.is_some_and(|t| (t.abs() - most.abs()).abs() < 1e-9 * most.abs());
        let sizes = self.normalised.iter().enumerate();
        sizes
            .filter(|(_, t)| like(t))
            .map(|(step, _)| step)
            .collect()
    }

    /// The step whose normalised residual is largest.
    pub fn most_deviant(&self) -> Option<(usize, f64)> {
        let sizes = self.normalised.iter().enumerate();
        let sizes = sizes.filter_map(|(step, size)| Some((step, (*size)?)));
        sizes.reduce(|most, next| {
            if next.1.abs() > most.1.abs() {
                next
            } else {
                most
            }
        })
    }
}

/// What the heats that others check have to do with the uncertainty of the target.
#[derive(Clone, Debug, PartialEq)]
pub struct Checked {
    /// Standard uncertainty of the target from these heats alone.
    pub standard: f64,
    /// Standard uncertainty of the target with those of these heats times the Birge ratio.
    pub inflated: f64,
}

/// Why there is no adjustment.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum NoAdjustment {
    /// This closure has no uncertainty left to close in, and does not close.
    Contradictory { closure: usize },
    /// More closures than can be worked.
    TooMany,
}

/// Generalised least squares, A. C. Aitken, Proc. Roy. Soc. Edinburgh 55 (1935) 42, in the form of
/// condition equations (F. R. Helmert, 1872); normalised residuals after W. Baarda, A Testing
/// Procedure for Use in Geodetic Networks (1968); all from memory.
///
/// `heats` q and `covariance` V are of the steps, in one unit and its square. With closures B,
/// misclosures m = Bᵀq and S = BᵀVB:
///
///   residuals e = VB·S⁻¹m,  χ² = mᵀS⁻¹m,  weights w = x − B·S⁻¹BᵀVx,
///
/// x being any multipliers that give the target. Of all multipliers that do, w·q has the least
/// variance. V itself is never inverted, so exact heats and shared values need no exception. All
/// of it is solved over the rational numbers: no order of the steps, and no platform, can change
/// a digit.
///
/// # Errors
/// A closure without uncertainty does not close; there are too many closures.
pub fn adjust(
    heats: &[Exact],
    covariance: &[Vec<Exact>],
    multipliers: &Multipliers,
) -> Result<Adjustment, NoAdjustment> {
    let closures = &multipliers.closures;
    if closures.len() > MOST_CLOSURES {
        return Err(NoAdjustment::TooMany);
    }
    let misclosures: Vec<Exact> = closures.iter().map(|n| dot(n, heats)).collect();
    let spread: Vec<Vec<Exact>> = closures.iter().map(|n| times(covariance, n)).collect();
    let s: Vec<Vec<Exact>> = closures
        .iter()
        .map(|n| spread.iter().map(|vn| dot(n, vn)).collect())
        .collect();
    let inverse = invert(&s, &misclosures)?;
    let solved = inverse.times(&misclosures);
    let varied = times(covariance, &multipliers.particular);
    let variation: Vec<Exact> = closures.iter().map(|n| dot(n, &varied)).collect();
    let shift = inverse.times(&variation);
    let weights = multipliers.particular.iter().enumerate();
    let weights: Vec<Exact> = weights
        .map(|(step, x)| x - column_dot(closures, step, &shift))
        .collect();
    let chi_square = to_f64(&dot(&misclosures, &solved));
    let degrees_of_freedom = inverse.kept.len();
    let scatter = (0..heats.len()).map(|step| {
        let own = column(closures, step);
        libm::sqrt(to_f64(&dot(&own, &inverse.times(&own))))
    });
    let gradient_uncertainty: Vec<f64> = scatter.collect();
    let gradients = (0..heats.len()).map(|step| to_f64(&column_dot(closures, step, &solved)));
    let gradients: Vec<f64> = gradients.collect();
    let birge = birge_ratio(chi_square, degrees_of_freedom);
    let standard = standard_uncertainties(covariance);
    Ok(Adjustment {
        correlated: correlated(covariance, &standard),
        standard,
        misclosure_uncertainty: standard_uncertainties(&s),
        residuals: (0..heats.len())
            .map(|step| column_dot(&spread, step, &solved))
            .collect(),
        normalised: normalised(&gradients, &gradient_uncertainty),
        checked: checked(covariance, &weights, &gradient_uncertainty, birge),
        gradients,
        gradient_uncertainty,
        weights,
        redundancy: (0..heats.len())
            .map(|step| redundancy(closures, &spread, step, &inverse))
            .collect(),
        probability: exceedance(chi_square, degrees_of_freedom),
        correlates: solved.iter().map(to_f64).collect(),
        misclosures,
        chi_square,
        degrees_of_freedom,
    })
}

/// Which part of an error in a heat shows in its residual: the diagonal of VN·S⁻¹Nᵀ.
fn redundancy(
    closures: &[Vec<Exact>],
    spread: &[Vec<Exact>],
    step: usize,
    inverse: &Inverse,
) -> f64 {
    let shows = inverse.times(&column(closures, step));
    to_f64(&dot(&column(spread, step), &shows))
}

fn standard_uncertainties(covariance: &[Vec<Exact>]) -> Vec<f64> {
    let variances = covariance.iter().enumerate().map(|(at, row)| &row[at]);
    variances.map(|v| libm::sqrt(to_f64(v))).collect()
}

fn correlated(covariance: &[Vec<Exact>], standard: &[f64]) -> Vec<(usize, usize, f64)> {
    let pairs = (0..standard.len()).flat_map(|a| (a + 1..standard.len()).map(move |b| (a, b)));
    let pairs = pairs.filter(|(a, b)| !covariance[*a][*b].is_zero());
    pairs
        .map(|(a, b)| {
            (
                a,
                b,
                to_f64(&covariance[a][b]) / (standard[a] * standard[b]),
            )
        })
        .collect()
}

fn normalised(gradients: &[f64], scatter: &[f64]) -> Vec<Option<f64>> {
    let each = gradients.iter().zip(scatter);
    each.map(|(size, scatter)| (*scatter > 0.0).then(|| size / scatter))
        .collect()
}

/// The variance wᵀVw of the target, in the parts that inflating some heats would grow apart. A
/// heat is checked where its gradient can be anything but zero.
fn checked(covariance: &[Vec<Exact>], weights: &[Exact], scatter: &[f64], birge: f64) -> Checked {
    let part = |of: bool| -> Vec<Exact> {
        let each = weights.iter().zip(scatter);
        each.map(|(w, s)| match (*s > 0.0) == of {
            true => w.clone(),
            false => Exact::zero(),
        })
        .collect()
    };
    let (inner, outer) = (part(true), part(false));
    let between = |a: &[Exact], b: &[Exact]| to_f64(&dot(a, &times(covariance, b)));
    let own = between(&inner, &inner);
    let inflated =
        birge * birge * own + 2.0 * birge * between(&inner, &outer) + between(&outer, &outer);
    Checked {
        standard: libm::sqrt(own.max(0.0)),
        inflated: libm::sqrt(inflated.max(0.0)),
    }
}

fn dot(a: &[Exact], b: &[Exact]) -> Exact {
    let terms = a
        .iter()
        .zip(b)
        .filter(|(a, b)| !a.is_zero() && !b.is_zero());
    terms.map(|(a, b)| a * b).sum()
}

fn times(matrix: &[Vec<Exact>], vector: &[Exact]) -> Vec<Exact> {
    matrix.iter().map(|row| dot(row, vector)).collect()
}

fn column(rows: &[Vec<Exact>], at: usize) -> Vec<Exact> {
    rows.iter().map(|row| row[at].clone()).collect()
}

fn column_dot(rows: &[Vec<Exact>], at: usize, by: &[Exact]) -> Exact {
    dot(&column(rows, at), by)
}

/// The inverse of a covariance matrix within the closures that are independent; zero elsewhere.
struct Inverse {
    kept: Vec<usize>,
    entries: Vec<Vec<Exact>>,
}

impl Inverse {
    fn times(&self, vector: &[Exact]) -> Vec<Exact> {
        times(&self.entries, vector)
    }
}

/// Elimination without fractions (E. H. Bareiss, Math. Comp. 22 (1968) 565, from memory) on the
/// diagonal entry that keeps most of its variance, until what remains carries none.
fn invert(s: &[Vec<Exact>], misclosures: &[Exact]) -> Result<Inverse, NoAdjustment> {
    let size = s.len();
    let (mut rows, scale) = whole_rows(s, misclosures);
    let variance: Vec<BigInt> = (0..size).map(|k| rows[k][k].clone()).collect();
    let mut kept: Vec<usize> = Vec::new();
    let mut before = BigInt::one();
    while let Some(pivot) = next_pivot(&rows, &variance, &kept, &before) {
        let row = rows[pivot].clone();
        for (index, other) in rows.iter_mut().enumerate() {
            if index != pivot {
                clear(other, &row, pivot, &before);
            }
        }
        before = row[pivot].clone();
        kept.push(pivot);
    }
    if let Some(closure) = (0..size).find(|k| !kept.contains(k) && !rows[*k][size].is_zero()) {
        return Err(NoAdjustment::Contradictory { closure });
    }
    let entry = |a: usize, b: usize| match kept.contains(&a) && kept.contains(&b) {
        true => Exact::new(&rows[a][size + 1 + b] * &scale, before.clone()),
        false => Exact::zero(),
    };
    let entries = (0..size).map(|a| (0..size).map(|b| entry(a, b)).collect());
    Ok(Inverse {
        entries: entries.collect(),
        kept,
    })
}

/// Matrix, misclosures and a unit matrix side by side, in whole numbers; and the factor that the
/// matrix was multiplied by.
fn whole_rows(s: &[Vec<Exact>], misclosures: &[Exact]) -> (Vec<Vec<BigInt>>, BigInt) {
    let common = |numbers: &mut dyn Iterator<Item = &Exact>| {
        numbers.fold(BigInt::one(), |common, n| common.lcm(n.denom()))
    };
    let scale = common(&mut s.iter().flatten());
    let other = common(&mut misclosures.iter());
    let whole = |n: &Exact, scale: &BigInt| n.numer() * (scale / n.denom());
    let row = |(k, entries): (usize, &Vec<Exact>)| -> Vec<BigInt> {
        let unit = (0..s.len()).map(|at| BigInt::from(u8::from(at == k)));
        let matrix = entries.iter().map(|n| whole(n, &scale));
        matrix
            .chain([whole(&misclosures[k], &other)])
            .chain(unit)
            .collect()
    };
    (s.iter().enumerate().map(row).collect(), scale)
}

/// The closure that keeps the largest part of its variance beside those already taken; none where
/// all have lost theirs.
fn next_pivot(
    rows: &[Vec<BigInt>],
    variance: &[BigInt],
    kept: &[usize],
    before: &BigInt,
) -> Option<usize> {
    let ten = BigInt::from(10).pow(NEGLIGIBLE as u32);
    let lives = |k: &usize| &rows[*k][*k] * &ten > &variance[*k] * before;
    (0..rows.len())
        .filter(|k| !kept.contains(k) && lives(k))
        .reduce(|best, k| {
            let more = &rows[k][k] * &variance[best] > &rows[best][best] * &variance[k];
            if more { k } else { best }
        })
}

/// One step of the elimination; the division leaves no remainder.
fn clear(row: &mut [BigInt], pivot: &[BigInt], at: usize, before: &BigInt) {
    let own = row[at].clone();
    for (entry, taken) in row.iter_mut().zip(pivot) {
        *entry = (&*entry * &pivot[at] - taken * &own) / before;
    }
}

#[cfg(test)]
#[path = "adjust_tests.rs"]
mod tests;
