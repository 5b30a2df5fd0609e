//! Covariances between the heats of steps, from the values that they share.

use std::collections::{BTreeMap, BTreeSet};

use num_traits::Zero;

use crate::quantity::{Exact, InputUncertainty, LinearForm, Real};
use crate::source::Problem;

/// Values whose uncertainty decides how determinations are weighed and that state none: those
/// that do not cancel in a closure.
pub(super) fn silent(
    problem: &Problem,
    forms: &[&LinearForm],
    closures: &[Vec<Exact>],
) -> Vec<usize> {
    let mut silent = BTreeSet::new();
    for closure in closures {
        let mut form = LinearForm::new();
        for (of_step, by) in forms.iter().zip(closure).filter(|(_, by)| !by.is_zero()) {
            form.add_form(of_step, &Real::Exact(by.clone()));
        }
        let indices = form.iter().map(|(index, _)| index);
        silent.extend(indices.filter(|index| standard(problem, *index).is_none()));
    }
    silent.into_iter().collect()
}

/// The standard uncertainty of a value used; none where none is stated.
fn standard(problem: &Problem, index: usize) -> Option<Exact> {
    match problem.values[index].uncertainty {
        InputUncertainty::Exact => Some(Exact::zero()),
        InputUncertainty::Standard(u) if u >= 0.0 => Exact::from_float(u),
        InputUncertainty::Standard(_) | InputUncertainty::NotStated => None,
    }
}

/// What the covariances of a cycle rest on.
pub(super) struct Covariances {
    /// Squares of standard uncertainties by value. What nobody stated is taken as zero here: it
    /// cancels wherever determinations are weighed, or `silent` names it.
    variances: BTreeMap<usize, Exact>,
    /// Covariances of different values, each pair in both orders.
    between: Vec<(usize, usize, Exact)>,
}

impl Covariances {
    pub(super) fn of(problem: &Problem, forms: &[&LinearForm]) -> Covariances {
        let used: BTreeSet<usize> = forms
            .iter()
            .flat_map(|form| form.iter().map(|(index, _)| index))
            .collect();
        let known = |index: &usize| Some((*index, standard(problem, *index)?));
        let standards: BTreeMap<usize, Exact> = used.iter().filter_map(known).collect();
        let mut between = Vec::new();
        for (a, b) in problem.correlations.pairs() {
            let both = standards.get(&a).zip(standards.get(&b));
            let r = Exact::from_float(problem.correlations.get(a, b));
            if let (Some((u, v)), Some(r)) = (both, r) {
                let covariance = u * v * r;
                between.extend([(a, b, covariance.clone()), (b, a, covariance)]);
            }
        }
        let squares = standards.into_iter().map(|(index, u)| (index, &u * &u));
        Covariances {
            variances: squares.collect(),
            between,
        }
    }

    /// The matrix over all steps, exactly; none where a sensitivity is no finite number.
    pub(super) fn matrix(&self, forms: &[&LinearForm]) -> Option<Vec<Vec<Exact>>> {
        let exact: Option<Vec<BTreeMap<usize, Exact>>> =
            forms.iter().map(|form| sensitivities(form)).collect();
        let exact = exact?;
        let row = |a: &BTreeMap<usize, Exact>| exact.iter().map(|b| self.between(a, b)).collect();
        Some(exact.iter().map(row).collect())
    }

    /// Σ c_k c_l u_k u_l r_kl to first order (JCGM 100:2008, F.1.2.3, from memory).
    fn between(&self, a: &BTreeMap<usize, Exact>, b: &BTreeMap<usize, Exact>) -> Exact {
        let shared = a
            .iter()
            .filter_map(|(index, c)| Some(c * b.get(index)? * self.variances.get(index)?));
        let correlated = self
            .between
            .iter()
            .filter_map(|(k, l, covariance)| Some(a.get(k)? * b.get(l)? * covariance));
        shared.chain(correlated).sum()
    }
}

fn sensitivities(form: &LinearForm) -> Option<BTreeMap<usize, Exact>> {
    form.iter()
        .map(|(index, c)| Some((index, c.to_exact()?)))
        .collect()
}
