//! Species: a formula in a phase.
//!
//! Tells the phase from a bracket of the formula. Isomers have one formula; the names
//! that tell them apart are left to the caller.

use std::fmt;

use super::error::NotationError;
use super::formula::Formula;
use super::phase::{Phase, PhaseLabel};
use super::phase_fault::PhaseFault;
use super::piece::{Piece, push_all};

/// A formula in a phase, such as `CaCO3(cr, calcite)` or `Na+(aq)`.
#[derive(Clone, Debug, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub struct Species {
    /// The formula with its charge.
    pub formula: Formula,
    /// None for the electron alone.
    pub phase: Option<Phase>,
}

impl Species {
    /// Reads a species. Only the electron may stand without a phase.
    ///
    /// # Errors
    /// The first fault of the phase, or else of the formula.
    pub fn parse(text: &str) -> Result<Self, NotationError> {
        let body = text.trim_start();
        let indent = text.len() - body.len();
        parse_trimmed(body.trim_end()).map_err(|error| error.shifted(indent))
    }

    /// Composition, charge and phase as one text: equal for species that only differ in
    /// how the formula is written, `Ca(OH)2(cr)` and `CaO2H2(cr)`.
    pub fn key(&self) -> String {
        format!("{}{}", self.formula.hill(), self.phase_text())
    }

    /// The species for typesetting.
    pub fn pieces(&self) -> Vec<Piece> {
        let mut pieces = self.formula.pieces();
        if let Some(phase) = &self.phase {
            push_all(&mut pieces, phase.pieces());
        }
        pieces
    }

    fn phase_text(&self) -> String {
        self.phase
            .as_ref()
            .map(Phase::to_string)
            .unwrap_or_default()
    }
}

fn parse_trimmed(text: &str) -> Result<Species, NotationError> {
    let Some((head, inner)) = last_group(text) else {
        return without_phase(text);
    };
    if is_part_of_formula(inner) {
        return without_phase(text);
    }
    let phase = Phase::parse(inner).map_err(|error| error.shifted(head.len() + 1))?;
    let formula = Formula::parse(head.trim_end())?;
    Ok(Species {
        formula,
        phase: Some(phase),
    })
}

/// The text before the parentheses at the end, and the text within them.
pub(super) fn last_group(text: &str) -> Option<(&str, &str)> {
    text.strip_suffix(')')?.rsplit_once('(')
}

/// Whether parentheses at the end hold symbols rather than a label in other letters.
fn is_part_of_formula(inner: &str) -> bool {
    let (word, _) = inner.split_once(',').unwrap_or((inner, ""));
    PhaseLabel::nearest(word.trim()).is_none() && Formula::parse(inner).is_ok()
}

fn without_phase(text: &str) -> Result<Species, NotationError> {
    let formula = Formula::parse(text)?;
    if formula.is_electron() {
        return Ok(Species {
            formula,
            phase: None,
        });
    }
    let species = text.to_owned();
    Err(NotationError::new(
        0..text.len(),
        PhaseFault::Missing { species },
    ))
}

impl fmt::Display for Species {
    /// The canonical plain text: reading it gives an equal species.
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        write!(f, "{}{}", self.formula, self.phase_text())
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn species_are_written_canonically() {
        for (text, canonical) in [
            ("H2O(l)", "H2O(l)"),
            (" CaCO3(cr,calcite) ", "CaCO3(cr, calcite)"),
            ("C(cr, graphite)", "C(cr, graphite)"),
            ("Ca(OH)2(cr)", "Ca(OH)2(cr)"),
            ("Ca(OH)2 (cr)", "Ca(OH)2(cr)"),
            ("Na+(aq)", "Na+(aq)"),
            ("SO₄²⁻(aq)", "SO4^2-(aq)"),
            ("HCl(aq, 100 H2O)", "HCl(aq, 100 H2O)"),
            ("CuSO4•5H2O(cr)", "CuSO4·5H2O(cr)"),
            ("CaCO3(stable)", "CaCO3(stable)"),
            ("D2O(g)", "D2O(g)"),
            ("e-", "e-"),
            ("e−", "e-"),
            ("e-(g)", "e-(g)"),
            ("Ca(OH)+(aq)", "Ca(OH)+(aq)"),
        ] {
            assert_eq!(Species::parse(text).unwrap().to_string(), canonical);
        }
    }

    #[test]
    fn keys_join_spellings_and_part_phases() {
        let key = |text: &str| Species::parse(text).unwrap().key();
        assert_eq!(key("Ca(OH)2(cr)"), "CaH2O2(cr)");
        assert_eq!(key("Ca(OH)2(cr)"), key("CaO2H2(cr)"));
        assert_ne!(key("H2O(l)"), key("H2O(g)"));
        assert_ne!(key("Fe^2+(aq)"), key("Fe^3+(aq)"));
    }

    #[test]
    fn a_missing_phase_lists_the_labels() {
        let error = Species::parse("Fe(CN)(CO)").unwrap_err();
        assert_eq!(
            error.to_string(),
            "found `Fe(CN)(CO)` without a phase; expected one of (g), (l), (s), (cr), (am), \
             (vit), (aq), (stable) after the formula; add the phase that the substance is in"
        );
        assert_eq!(error.span, 0..10);
    }

    #[test]
    fn misspelt_phases_are_recognised() {
        let advice = |text| Species::parse(text).unwrap_err().advice();
        assert_eq!(advice("CO2(G)"), "write (g) if gas is meant");
        assert_eq!(advice("H2O(gas)"), "write (g) if gas is meant");
        assert_eq!(advice("NaCl(S)"), "write (s) if solid is meant");
        assert_eq!(advice("Al(OH)3(a)"), "write (am) if amorphous is meant");
        assert_eq!(
            advice("C(graphite)"),
            "write the name of a form after a label, as in (cr, graphite)"
        );
    }

    #[test]
    fn errors_point_into_the_whole_text() {
        assert_eq!(Species::parse("  CO2(G)").unwrap_err().span, 6..7);
        assert_eq!(Species::parse("  XxO2(g)").unwrap_err().span, 2..4);
        assert_eq!(Species::parse("HCl(aq, 0 H2O)").unwrap_err().span, 8..9);
    }
}
