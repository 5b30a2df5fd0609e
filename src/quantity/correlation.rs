//! Correlation coefficients between values used, as their sources state them.
//!
//! Leaves to others: which values a coefficient belongs to.

use std::collections::{BTreeMap, BTreeSet};

use super::message::explained_error;

/// The work of the consistency check grows with the cube of this.
const MOST_CORRELATED: usize = 300;
/// What floating-point arithmetic may leave of a zero in matrices of that size.
const NEGLIGIBLE: f64 = 1e-9;

/// Coefficients by unordered pair of indices; a pair that is not stated has zero.
#[derive(Debug, Clone, PartialEq, Default)]
pub struct Correlations(BTreeMap<(usize, usize), f64>);

impl Correlations {
    /// None stated.
    pub fn new() -> Self {
        Self::default()
    }

    /// The pairs for which a coefficient is stated, in order.
    pub fn pairs(&self) -> impl Iterator<Item = (usize, usize)> {
        self.0.keys().copied()
    }

    /// States the coefficient between two values.
    ///
    /// # Errors
    /// The two are one, the coefficient lies outside [-1, 1], or another was stated before.
    pub fn state(&mut self, a: usize, b: usize, r: f64) -> Result<(), CorrelationError> {
        if a == b {
            return Err(CorrelationError::WithItself { index: a });
        }
        if !(-1.0..=1.0).contains(&r) {
            return Err(CorrelationError::OutOfRange { coefficient: r });
        }
        let stated = *self.0.entry(ordered(a, b)).or_insert(r);
        if stated != r {
            return Err(CorrelationError::StatedTwice {
                first: stated,
                second: r,
            });
        }
        Ok(())
    }

    /// The coefficient between two values: one for a value with itself.
    pub fn get(&self, a: usize, b: usize) -> f64 {
        if a == b {
            return 1.0;
        }
        self.0.get(&ordered(a, b)).copied().unwrap_or(0.0)
    }

    /// The stated pairs whose lower index is `a`, by rising other index.
    pub(super) fn partners_above(&self, a: usize) -> impl Iterator<Item = (usize, f64)> {
        self.0
            .range((a, 0)..=(a, usize::MAX))
            .map(|((_, b), r)| (*b, *r))
    }

    /// Whether the coefficients among the values `used` can be true together: their matrix is
    /// positive semi-definite, within what rounding leaves.
    ///
    /// # Errors
    /// More values are correlated than can be checked.
    pub fn is_consistent(&self, used: &[usize]) -> Result<bool, CorrelationError> {
        let used: BTreeSet<usize> = used.iter().copied().collect();
        let correlated: BTreeSet<usize> = self
            .0
            .iter()
            .filter(|((a, b), r)| **r != 0.0 && used.contains(a) && used.contains(b))
            .flat_map(|((a, b), _)| [*a, *b])
            .collect();
        let found = correlated.len();
        if found > MOST_CORRELATED {
            let limit = MOST_CORRELATED;
            return Err(CorrelationError::TooMany { found, limit });
        }
        let matrix = correlated
            .iter()
            .map(|a| correlated.iter().map(|b| self.get(*a, *b)).collect())
            .collect();
        Ok(is_positive_semi_definite(matrix))
    }
}

fn ordered(a: usize, b: usize) -> (usize, usize) {
    (a.min(b), a.max(b))
}

/// Elimination on the largest remaining diagonal: the matrix is positive semi-definite where no
/// diagonal turns negative, and what remains below the last one is zero.
fn is_positive_semi_definite(mut matrix: Vec<Vec<f64>>) -> bool {
    let mut left: Vec<usize> = (0..matrix.len()).collect();
    loop {
        let largest = left
            .iter()
            .copied()
            .max_by(|a, b| matrix[*a][*a].total_cmp(&matrix[*b][*b]));
        let Some(pivot) = largest.filter(|pivot| matrix[*pivot][*pivot] > NEGLIGIBLE) else {
            return left
                .iter()
                .all(|a| left.iter().all(|b| matrix[*a][*b].abs() <= NEGLIGIBLE));
        };
        left.retain(|index| *index != pivot);
        eliminate(&mut matrix, &left, pivot);
    }
}

/// Subtracts from the rows `left` what the row `pivot` accounts for.
fn eliminate(matrix: &mut [Vec<f64>], left: &[usize], pivot: usize) {
    let row = matrix[pivot].clone();
    for a in left {
        let share = row[*a] / row[pivot];
        for b in left {
            matrix[*a][*b] -= share * row[*b];
        }
    }
}

/// Why a correlation cannot be taken as stated.
#[derive(Debug, Clone, PartialEq)]
pub enum CorrelationError {
    /// A value is fully correlated with itself, and nothing is to be stated.
    WithItself { index: usize },
    /// Not between -1 and 1.
    OutOfRange { coefficient: f64 },
    /// Two coefficients for one pair.
    StatedTwice { first: f64, second: f64 },
    /// More correlated values than can be checked together.
    TooMany { found: usize, limit: usize },
}

impl CorrelationError {
    /// What stands there.
    pub fn found(&self) -> String {
        match self {
            Self::WithItself { .. } => "a correlation of a value with itself".to_owned(),
            Self::OutOfRange { coefficient } => format!("the coefficient {coefficient}"),
            Self::StatedTwice { first, second } => {
                format!("the coefficients {first} and {second} for one pair")
            }
            Self::TooMany { found, .. } => format!("{found} correlated values"),
        }
    }

    /// What should stand there.
    pub fn expected(&self) -> String {
        match self {
            Self::WithItself { .. } => "two different values".to_owned(),
            Self::OutOfRange { .. } => "a coefficient from -1 to 1".to_owned(),
            Self::StatedTwice { .. } => "one coefficient for a pair".to_owned(),
            Self::TooMany { limit, .. } => format!("at most {limit} in one result"),
        }
    }

    /// What to do about it.
    pub fn advice(&self) -> String {
        match self {
            Self::WithItself { .. } => "name two values",
            Self::OutOfRange { .. } => "check it against the source",
            Self::StatedTwice { .. } => "keep the one that the source prints",
            Self::TooMany { .. } => "divide the result, or leave out correlations near zero",
        }
        .to_owned()
    }
}

explained_error!(CorrelationError);

#[cfg(test)]
mod tests {
    use super::*;

    fn stated(pairs: &[(usize, usize, f64)]) -> Correlations {
        let mut correlations = Correlations::new();
        for (a, b, r) in pairs {
            correlations.state(*a, *b, *r).unwrap();
        }
        correlations
    }

    #[test]
    fn a_pair_has_one_coefficient() {
        let mut correlations = stated(&[(3, 1, 0.5)]);
        assert_eq!(correlations.get(1, 3), 0.5);
        assert_eq!(correlations.get(3, 3), 1.0);
        assert_eq!(correlations.get(3, 4), 0.0);
        assert_eq!(correlations.state(1, 3, 0.5), Ok(()));
        assert!(correlations.state(1, 3, 0.6).is_err());
        assert!(correlations.state(1, 1, 1.0).is_err());
        assert!(correlations.state(1, 2, 1.01).is_err());
        assert!(correlations.state(1, 2, f64::NAN).is_err());
    }

    #[test]
    fn consistency() {
        // The determinant of three is 1 + 2abc - a² - b² - c². GUM H.2: 0.111 (by hand).
        let gum = stated(&[(0, 1, -0.36), (0, 2, 0.86), (1, 2, -0.65)]);
        assert_eq!(gum.is_consistent(&[0, 1, 2]), Ok(true));
        // 1 - 2·0.729 - 3·0.81 = -2.888 (by hand).
        let impossible = stated(&[(0, 1, -0.9), (0, 2, -0.9), (1, 2, -0.9)]);
        assert_eq!(impossible.is_consistent(&[0, 1, 2]), Ok(false));
        assert_eq!(impossible.is_consistent(&[0, 1]), Ok(true));
        // Full correlation is singular, and possible; two ones and a 0.5 are not.
        let full = stated(&[(0, 1, 1.0), (0, 2, 1.0), (1, 2, 1.0)]);
        assert_eq!(full.is_consistent(&[0, 1, 2]), Ok(true));
        let half = stated(&[(0, 1, 1.0), (0, 2, 1.0), (1, 2, 0.5)]);
        assert_eq!(half.is_consistent(&[0, 1, 2]), Ok(false));
    }

    #[test]
    fn the_check_is_bounded() {
        let pairs: Vec<_> = (1..=300).map(|index| (0, index, 0.01)).collect();
        let used: Vec<_> = (0..=300).collect();
        let error = stated(&pairs).is_consistent(&used).unwrap_err();
        assert_eq!(error.found(), "301 correlated values");
    }
}
