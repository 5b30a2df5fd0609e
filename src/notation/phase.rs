//! Phases: the label in parentheses after a formula.
//!
//! Knows the labels and how a form or a dilution is written beside them. Which forms a
//! substance has is left to the sources.

use std::fmt;
use std::ops::Range;

use super::dilution::Dilution;
use super::error::{Bounded, NotationError};
use super::phase_fault::PhaseFault;
use super::piece::{Piece, push_all, push_text};

/// The longest name of a form, in bytes.
const MAX_FORM: usize = 64;

/// The state of a substance, as the IUPAC Green Book labels it (from memory), and
/// `stable` for the condensed form that a source gives at the temperature in question.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub enum PhaseLabel {
    /// `g`: gas.
    Gas,
    /// `l`: liquid.
    Liquid,
    /// `s`: the one solid form that a source lists.
    Solid,
    /// `cr`: crystalline, perhaps in a named form.
    Crystal,
    /// `am`: amorphous solid.
    Amorphous,
    /// `vit`: vitreous, a glass.
    Vitreous,
    /// `aq`: aqueous solution, infinitely dilute where no water is stated.
    Aqueous,
    /// `stable`: the condensed form that is stable at the temperature in question.
    Stable,
}

/// A phase: a label, and for solids perhaps the name of a form (`cr, calcite`), for
/// solutions perhaps the water that the solute is dissolved in (`aq, 100 H2O`).
#[derive(Clone, Debug, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub struct Phase {
    /// The state.
    pub label: PhaseLabel,
    /// The form of a solid, such as `calcite`.
    pub form: Option<String>,
    /// The dilution of a solution; none stands for infinite dilution.
    pub dilution: Option<Dilution>,
}

impl PhaseLabel {
    /// Every label, in the order in which errors list them.
    pub const ALL: [Self; 8] = [
        Self::Gas,
        Self::Liquid,
        Self::Solid,
        Self::Crystal,
        Self::Amorphous,
        Self::Vitreous,
        Self::Aqueous,
        Self::Stable,
    ];

    /// The label as it is written, such as `cr`.
    pub fn symbol(self) -> &'static str {
        match self {
            Self::Gas => "g",
            Self::Liquid => "l",
            Self::Solid => "s",
            Self::Crystal => "cr",
            Self::Amorphous => "am",
            Self::Vitreous => "vit",
            Self::Aqueous => "aq",
            Self::Stable => "stable",
        }
    }

    /// What the label stands for, in words.
    pub fn name(self) -> &'static str {
        match self {
            Self::Gas => "gas",
            Self::Liquid => "liquid",
            Self::Solid => "solid",
            Self::Crystal => "crystalline",
            Self::Amorphous => "amorphous",
            Self::Vitreous => "vitreous",
            Self::Aqueous => "aqueous solution",
            Self::Stable => "stable condensed form",
        }
    }

    /// The label with exactly this symbol, or `None`.
    pub fn from_symbol(symbol: &str) -> Option<Self> {
        Self::ALL.into_iter().find(|label| label.symbol() == symbol)
    }

    fn has_forms(self) -> bool {
        matches!(
            self,
            Self::Solid | Self::Crystal | Self::Amorphous | Self::Vitreous
        )
    }

    /// The label that a word in other letters or another word stands for.
    pub(super) fn nearest(word: &str) -> Option<Self> {
        let word = word.to_lowercase();
        Self::from_symbol(&word).or(match word.as_str() {
            "gas" | "gaseous" | "v" | "vap" | "vapor" | "vapour" => Some(Self::Gas),
            "liq" | "liquid" => Some(Self::Liquid),
            "sol" | "solid" => Some(Self::Solid),
            "c" | "cryst" | "crystal" | "crystalline" => Some(Self::Crystal),
            "a" | "amorph" | "amorphous" => Some(Self::Amorphous),
            "glass" | "glassy" | "vitreous" => Some(Self::Vitreous),
            "aqueous" | "ao" | "ai" => Some(Self::Aqueous),
            _ => None,
        })
    }
}

impl Phase {
    /// Whether it stands for a solute at infinite dilution.
    pub fn is_infinite_dilution(&self) -> bool {
        self.label == PhaseLabel::Aqueous && self.dilution.is_none()
    }

    /// The phase with a label alone.
    pub fn plain(label: PhaseLabel) -> Self {
        Self {
            label,
            form: None,
            dilution: None,
        }
    }

    /// Reads what stands between the parentheses: `g`, `cr, calcite`, `aq, 100 H2O`.
    ///
    /// `aq, ∞ H2O` is plain `aq`.
    ///
    /// # Errors
    /// An unknown label, a form where the label has none, a dilution that is none.
    pub fn parse(text: &str) -> Result<Self, NotationError> {
        let (word, qualifier) = match text.split_once(',') {
            Some((word, qualifier)) => (word, Some(qualifier)),
            None => (text, None),
        };
        let Some(label) = PhaseLabel::from_symbol(word.trim()) else {
            let fault = PhaseFault::unknown(word.trim());
            return Err(NotationError::new(0..text.len(), fault));
        };
        let mut phase = Self::plain(label);
        if let Some(qualifier) = qualifier {
            let at = text.len() - qualifier.len();
            phase
                .qualify(qualifier)
                .map_err(|error| error.shifted(at))?;
        }
        Ok(phase)
    }

    fn qualify(&mut self, qualifier: &str) -> Result<(), NotationError> {
        let words: Vec<_> = qualifier.split_whitespace().collect();
        let text = words.join(" ");
        let span = 0..qualifier.len();
        let label = self.label;
        if text.is_empty() {
            return Err(NotationError::new(span, PhaseFault::EmptyQualifier));
        }
        if label == PhaseLabel::Aqueous {
            self.dilution = Dilution::read(qualifier)?;
        } else if label.has_forms() {
            self.form = Some(read_form(text, span)?);
        } else {
            let fault = PhaseFault::FormNotAllowed { label, form: text };
            return Err(NotationError::new(span, fault));
        }
        Ok(())
    }

    /// The phase for typesetting, in parentheses.
    pub fn pieces(&self) -> Vec<Piece> {
        let mut pieces = Vec::new();
        push_text(&mut pieces, "(");
        push_text(&mut pieces, &self.label_and_form());
        if let Some(dilution) = &self.dilution {
            push_text(&mut pieces, ", ");
            push_all(&mut pieces, dilution.pieces());
        }
        push_text(&mut pieces, ")");
        pieces
    }

    fn label_and_form(&self) -> String {
        match &self.form {
            Some(form) => format!("{}, {form}", self.label.symbol()),
            None => self.label.symbol().to_owned(),
        }
    }
}

/// A form is named by letters, digits, spaces, and the marks within words.
fn read_form(text: String, span: Range<usize>) -> Result<String, NotationError> {
    Bounded::Form.check(text.len(), MAX_FORM, span.clone())?;
    let fits = |c: char| c.is_alphanumeric() || matches!(c, ' ' | '-' | '\'' | '.');
    match text.chars().find(|c| !fits(*c)) {
        None => Ok(text),
        Some(character) => Err(NotationError::new(
            span,
            PhaseFault::UnreadableForm { character },
        )),
    }
}

impl fmt::Display for Phase {
    /// The canonical text, in parentheses.
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        write!(f, "({}", self.label_and_form())?;
        if let Some(dilution) = &self.dilution {
            write!(f, ", {dilution}")?;
        }
        f.write_str(")")
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn phases_are_written_canonically() {
        for (text, canonical) in [
            ("g", "(g)"),
            (" l ", "(l)"),
            ("s", "(s)"),
            ("cr,calcite", "(cr, calcite)"),
            ("cr,  alpha  quartz ", "(cr, alpha quartz)"),
            ("s, II", "(s, II)"),
            ("vit", "(vit)"),
            ("am, β", "(am, β)"),
            ("aq", "(aq)"),
            ("aq, 100 H2O", "(aq, 100 H2O)"),
            ("aq,100.0H₂O", "(aq, 100 H2O)"),
            ("aq, 5/2 H2O", "(aq, 2.5 H2O)"),
            ("aq, ∞ H2O", "(aq)"),
            ("stable", "(stable)"),
        ] {
            assert_eq!(Phase::parse(text).unwrap().to_string(), canonical, "{text}");
        }
    }

    #[test]
    fn faults_name_the_label_that_was_meant() {
        let error = |text| Phase::parse(text).unwrap_err().to_string();
        assert_eq!(
            error("G"),
            "found the phase `(G)`; expected one of (g), (l), (s), (cr), (am), (vit), (aq), \
             (stable); write (g) if gas is meant"
        );
        assert_eq!(
            error("l, wet"),
            "found the form `wet` of a phase (l); expected a form beside s, cr, am or vit \
             alone; leave it out, or declare the substance under a name of its own"
        );
        assert_eq!(
            error("aq, 3 HCl"),
            "found the dilution `3 HCl`; expected moles of water, as in (aq, 100 H2O); \
             write (aq) alone for infinite dilution"
        );
        assert_eq!(
            error("aq, 0 H2O"),
            "found an amount of water of zero; expected a number above zero; \
             give the substance another phase, such as (l) or (g)"
        );
    }

    #[test]
    fn faults_point_at_the_qualifier() {
        assert_eq!(Phase::parse("g, x").unwrap_err().span, 2..4);
        assert_eq!(Phase::parse("aq, 0 H2O").unwrap_err().span, 4..5);
        assert_eq!(Phase::parse("cr, a/b").unwrap_err().span, 3..7);
    }

    #[test]
    fn dilutions_are_typeset_with_subscripts() {
        assert_eq!(
            Phase::parse("aq, 100 H2O").unwrap().pieces(),
            [
                Piece::Text("(aq, 100 H".into()),
                Piece::Sub("2".into()),
                Piece::Text("O)".into())
            ]
        );
    }
}
