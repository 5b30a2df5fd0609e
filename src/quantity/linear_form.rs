//! How a result depends on the values used: one sensitivity per value, to first order.
//!
//! A value used twice has one sensitivity, the sum of both uses, and is thereby fully correlated
//! with itself (JCGM 100:2008 5.2). Leaves to others: what the indices stand for.

use std::collections::BTreeMap;

use super::real::Real;

/// Sensitivities ∂y/∂x by the index of the value used; one that is zero is not kept.
#[derive(Debug, Clone, PartialEq, Default)]
pub struct LinearForm(BTreeMap<usize, Real>);

impl LinearForm {
    /// A result that depends on no value.
    pub fn new() -> Self {
        Self::default()
    }

    /// Adds `sensitivity` to that of the value `index`.
    pub fn add_scaled(&mut self, index: usize, sensitivity: &Real) {
        let sum = match self.0.get(&index) {
            Some(present) => present.plus(sensitivity),
            None => sensitivity.clone(),
        };
        if sum.is_zero() {
            self.0.remove(&index);
        } else {
            self.0.insert(index, sum);
        }
    }

    /// Adds `factor` times another form.
    pub fn add_form(&mut self, other: &Self, factor: &Real) {
        for (index, sensitivity) in other.iter() {
            self.add_scaled(index, &sensitivity.times(factor));
        }
    }

    /// The form of the sum of two results.
    #[must_use]
    pub fn plus(&self, other: &Self) -> Self {
        let mut sum = self.clone();
        for (index, sensitivity) in other.iter() {
            sum.add_scaled(index, sensitivity);
        }
        sum
    }

    /// The form of the result times `factor`.
    #[must_use]
    pub fn scaled(&self, factor: &Real) -> Self {
        let mut scaled = Self::new();
        scaled.add_form(self, factor);
        scaled
    }

    /// The sensitivity to the value `index`; `None` where the result does not depend on it.
    pub fn get(&self, index: usize) -> Option<&Real> {
        self.0.get(&index)
    }

    /// The sensitivities by rising index.
    pub fn iter(&self) -> impl Iterator<Item = (usize, &Real)> {
        self.0
            .iter()
            .map(|(index, sensitivity)| (*index, sensitivity))
    }

    /// How many values the result depends on.
    pub fn len(&self) -> usize {
        self.0.len()
    }

    /// Whether the result depends on no value.
    pub fn is_empty(&self) -> bool {
        self.0.is_empty()
    }
}
