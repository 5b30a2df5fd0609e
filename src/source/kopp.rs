//! Kopp's rule: the heat capacity of a solid from its formula.
//!
//! Sums what the atoms contribute. When an estimate may serve, and for what, is decided elsewhere.

use std::f64::consts::FRAC_PI_2;

use crate::notation::Formula;
use crate::quantity::{Exact, Quantity, Significance, exact_text, to_f64};

use super::model::Entry;
use super::store::Source;

/// The row for elements that have none of their own.
const OTHER: &str = "other";
/// The row of the rule's published error.
const ERROR: &str = "error";

/// A heat capacity estimated from a formula.
#[derive(Clone, Debug)]
pub struct KoppEstimate {
    /// Rows of the source with the counts of atoms, in the order of the elements.
    pub terms: Vec<KoppTerm>,
    /// Cp at 298 K, J/(mol K).
    pub sum: Exact,
    /// By the digits of the contributions (ASTM E29).
    pub significance: Significance,
    /// Standard uncertainty of the sum, J/(mol K).
    pub standard: f64,
    /// The row of the published error, and the fraction that it prints.
    pub error: Entry,
    pub error_printed: Quantity,
}

impl KoppEstimate {
    /// The sum as a checker adds it up: `1 × 26.19 (Na) + 1 × 24.69 (Cl)`.
    pub fn sum_text(&self) -> String {
        let term = |term: &KoppTerm| {
            let count = exact_text(&term.count);
            let printed = term.printed.printed_number();
            format!("{count} × {printed} ({})", term.symbol)
        };
        let terms: Vec<String> = self.terms.iter().map(term).collect();
        terms.join(" + ")
    }
}

/// What the atoms of one element contribute.
#[derive(Clone, Debug)]
pub struct KoppTerm {
    pub symbol: String,
    pub entry: Entry,
    /// Per atom, J/(mol K).
    pub printed: Quantity,
    pub count: Exact,
}

/// Cp = Σ n_i·c_i over the atoms of a formula unit: the modified Kopp's rule of J. E. Hurst and
/// B. K. Harrison, Chem. Eng. Commun. 112 (1992) 21, for solids at 298 K, in J/(mol K). Water of
/// hydrates counts with its atoms, as the rule has it.
///
/// The published error is an average of absolute errors, 9 %. Errors that are normally distributed
/// have the standard deviation √(π/2) times that average, so u(Cp) = 0.09·√(π/2)·Cp, about
/// 11.3 %. Limits: solids; 298 K, above which heat capacities of solids mostly rise; single
/// compounds can be farther off.
///
/// None where the source lacks a row that is needed, which a built-in source does not.
pub fn kopp_estimate(source: &Source, formula: &Formula) -> Option<KoppEstimate> {
    let counts = formula.counts().iter();
    let terms = counts.map(|(element, count)| kopp_term(source, element.symbol(), count));
    let terms = terms.collect::<Option<Vec<KoppTerm>>>()?;
    let contribution = |term: &KoppTerm| term.printed.value_in_si() * &term.count;
    let sum: Exact = terms.iter().map(contribution).sum();
    let digits = |term: &KoppTerm| {
        let printed = &term.printed;
        printed
            .significance()
            .times_exact(&printed.decimal.value(), &term.count)
    };
    let error = source.of_symbol(ERROR)?;
    let error_printed = error.value.clone()?;
    let absolute = error_printed.value_in_si() * &sum;
    Some(KoppEstimate {
        significance: Significance::sum(terms.iter().map(digits)),
        terms,
        sum,
        standard: to_f64(&absolute) * libm::sqrt(FRAC_PI_2),
        error,
        error_printed,
    })
}

fn kopp_term(source: &Source, symbol: &str, count: &Exact) -> Option<KoppTerm> {
    let entry = source.of_symbol(symbol);
    let entry = entry.or_else(|| source.of_symbol(OTHER))?;
    Some(KoppTerm {
        symbol: symbol.to_string(),
        printed: entry.value.clone()?,
        entry,
        count: count.clone(),
    })
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::source::builtin::{KOPP, built_in};

    fn estimate(formula: &str) -> KoppEstimate {
        let source = built_in(KOPP).expect("a built-in source");
        let formula = Formula::parse(formula).expect("a formula");
        kopp_estimate(&source, &formula).expect("rows for all elements")
    }

    /// The worked example that goes with the rule, GdF3: 105.1 J/(mol K) (as repeated in the
    /// tests of a public transcription; the paper was not seen). Gadolinium has no row.
    #[test]
    fn the_published_example_is_met() {
        assert_eq!(estimate("GdF3").sum, Exact::new(10511.into(), 100.into()));
    }

    /// Measured at 298.15 K, from memory of the NIST-JANAF and NBS tables: the rule is within
    /// twice its standard uncertainty of each.
    #[test]
    fn measured_heat_capacities_of_solids_lie_within_the_uncertainty() {
        let measured = [
            ("NaCl", 50.5),
            ("SiO2", 44.4),
            ("CaCO3", 83.5),
            ("Al2O3", 79.0),
            ("NH4Cl", 84.1),
            ("CuSO4·5H2O", 280.0),
        ];
        for (formula, measured) in measured {
            let kopp = estimate(formula);
            let apart = to_f64(&kopp.sum) - measured;
            assert!(apart.abs() < 2.0 * kopp.standard, "{formula}: {apart}");
        }
    }

    #[test]
    fn the_standard_uncertainty_is_the_average_error_times_1_2533() {
        let kopp = estimate("NaCl");
        let relative = kopp.standard / to_f64(&kopp.sum);
        assert!((relative - 0.09 * 1.253_314_137).abs() < 1e-9);
    }
}
