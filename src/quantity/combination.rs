//! Combined standard uncertainty (JCGM 100:2008, 5.1.2 equation 10 and 5.2.2 equations 13 and
//! 16): u² = Σ cᵢ² uᵢ² + 2 ΣΣ cᵢ cⱼ uᵢ uⱼ rᵢⱼ, to first order.
//!
//! Leaves to others: the sensitivities, coverage, and how the result is stated.

use std::collections::BTreeMap;

use super::correlation::Correlations;
use super::linear_form::LinearForm;

/// What is known of the uncertainty of one value used.
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum InputUncertainty {
    /// The value is exact, and does not count.
    Exact,
    /// Nobody stated one; it is not zero.
    NotStated,
    /// The standard uncertainty, in the unit that the sensitivity is per. One that is negative
    /// or not finite counts as not stated.
    Standard(f64),
}

/// The uncertainty of a result, and what it covers.
#[derive(Debug, Clone, PartialEq)]
pub struct Combined {
    /// The combined standard uncertainty in the unit of the result, of the values that state
    /// one; `None` where no value does. Infinite where it exceeds all floating-point numbers.
    pub standard: Option<f64>,
    /// How many values state an uncertainty.
    pub stated: usize,
    /// How many values the result depends on, exact ones left out.
    pub of: usize,
    /// By rising index, each of those values with its fraction of the variance; half of a
    /// correlated pair's term goes to each. `None` where no uncertainty is stated or the
    /// variance is no finite number; zero where the variance is zero.
    pub shares: Vec<(usize, Option<f64>)>,
}

/// Combines the uncertainties of the values that a result depends on.
pub fn combine(
    form: &LinearForm,
    uncertainty: &dyn Fn(usize) -> InputUncertainty,
    correlations: &Correlations,
) -> Combined {
    let contributions: Vec<(usize, Option<f64>)> = form
        .iter()
        .filter_map(|(index, sensitivity)| {
            let stated = match uncertainty(index) {
                InputUncertainty::Exact => return None,
                InputUncertainty::Standard(u) if u.is_finite() && u >= 0.0 => Some(u),
                InputUncertainty::Standard(_) | InputUncertainty::NotStated => None,
            };
            Some((index, stated.map(|u| sensitivity.to_f64() * u)))
        })
        .collect();
    let known: Vec<(usize, f64)> = contributions
        .iter()
        .filter_map(|(index, contribution)| Some((*index, (*contribution)?)))
        .collect();
    let variance = Variance::of(&known, correlations);
    let shares = contributions
        .iter()
        .map(|(index, stated)| (*index, stated.and_then(|_| variance.share(*index))))
        .collect();
    Combined {
        standard: (!known.is_empty()).then(|| variance.standard()),
        stated: known.len(),
        of: contributions.len(),
        shares,
    }
}

/// A variance in parts, in units of 2^(2·`exponent`), so that no square leaves the range of
/// floating-point numbers.
struct Variance {
    exponent: Option<i32>,
    parts: BTreeMap<usize, f64>,
    total: f64,
}

impl Variance {
    /// The variance of the sum of `contributions` cᵢuᵢ, added up by rising index.
    fn of(contributions: &[(usize, f64)], correlations: &Correlations) -> Self {
        let largest = contributions
            .iter()
            .fold(0.0, |largest: f64, (_, c)| largest.max(c.abs()));
        let finite = contributions.iter().all(|(_, c)| c.is_finite());
        let exponent = finite.then(|| {
            if largest > 0.0 {
                libm::ilogb(largest)
            } else {
                0
            }
        });
        let scaled: BTreeMap<usize, f64> = contributions
            .iter()
            .map(|(index, c)| (*index, libm::scalbn(*c, -exponent.unwrap_or(0))))
            .collect();
        let parts = parts(&scaled, correlations);
        // Coefficients printed with few digits can leave less than nothing.
        let total = parts.values().sum::<f64>().max(0.0);
        Self {
            exponent,
            parts,
            total,
        }
    }

    fn standard(&self) -> f64 {
        match self.exponent {
            Some(exponent) => libm::scalbn(libm::sqrt(self.total), exponent),
            None => f64::INFINITY,
        }
    }

    fn share(&self, index: usize) -> Option<f64> {
        self.exponent?;
        let part = self.parts.get(&index)?;
        Some(if self.total > 0.0 {
            part / self.total
        } else {
            0.0
        })
    }
}

/// What each value adds to the variance: its own square, and half of each pair that it is in.
fn parts(scaled: &BTreeMap<usize, f64>, correlations: &Correlations) -> BTreeMap<usize, f64> {
    let mut parts: BTreeMap<usize, f64> = scaled.iter().map(|(index, c)| (*index, c * c)).collect();
    for (a, c_a) in scaled {
        for (b, r) in correlations.partners_above(*a) {
            let Some(c_b) = scaled.get(&b) else {
                continue;
            };
            for index in [a, &b] {
                if let Some(part) = parts.get_mut(index) {
                    *part += c_a * c_b * r;
                }
            }
        }
    }
    parts
}

#[cfg(test)]
#[path = "combination_tests.rs"]
mod tests;
