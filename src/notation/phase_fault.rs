//! What can be wrong with a phase, and what is said of it.

use super::error::{Message, quoted};
use super::phase::PhaseLabel;

/// What can be wrong with a phase.
#[derive(Clone, Debug, PartialEq, Eq)]
pub enum PhaseFault {
    /// A species without one.
    Missing { species: String },
    /// No label, though perhaps another word or spelling for one.
    Unknown {
        written: String,
        nearest: Option<PhaseLabel>,
    },
    /// A comma with nothing after it.
    EmptyQualifier,
    /// A form beside a label that has none.
    FormNotAllowed { label: PhaseLabel, form: String },
    /// A character that the name of a form cannot have.
    UnreadableForm { character: char },
    /// Something else than moles of water beside `aq`.
    MalformedDilution { written: String },
}

impl PhaseFault {
    pub(super) fn unknown(word: &str) -> Self {
        Self::Unknown {
            written: word.to_owned(),
            nearest: PhaseLabel::nearest(word),
        }
    }

    pub(super) fn message(&self) -> Message {
        match self {
            Self::Missing { species } => Message::new(
                format!("{} without a phase", quoted(species)),
                format!("one of {} after the formula", labels()),
                "add the phase that the substance is in",
            ),
            Self::Unknown { written, nearest } => Message::new(
                format!("the phase {}", quoted(&format!("({written})"))),
                format!("one of {}", labels()),
                unknown_advice(*nearest),
            ),
            Self::EmptyQualifier => Message::new(
                "a comma with nothing after it in a phase",
                "the name of a form, as in (cr, calcite), or moles of water",
                "complete it or leave the comma out",
            ),
            Self::FormNotAllowed { label, form } => Message::new(
                format!("the form {} of a phase ({})", quoted(form), label.symbol()),
                "a form beside s, cr, am or vit alone",
                "leave it out, or declare the substance under a name of its own",
            ),
            Self::UnreadableForm { character } => Message::new(
                format!("{} in the name of a form", quoted(&character.to_string())),
                "letters, digits, spaces, hyphens, points and apostrophes",
                "write the name without it",
            ),
            Self::MalformedDilution { written } => Message::new(
                format!("the dilution {}", quoted(written)),
                "moles of water, as in (aq, 100 H2O)",
                "write (aq) alone for infinite dilution",
            ),
        }
    }
}

fn labels() -> String {
    let all = PhaseLabel::ALL.map(|label| format!("({})", label.symbol()));
    all.join(", ")
}

fn unknown_advice(nearest: Option<PhaseLabel>) -> String {
    match nearest {
        Some(label) => format!("write ({}) if {} is meant", label.symbol(), label.name()),
        None => "write the name of a form after a label, as in (cr, graphite)".to_owned(),
    }
}
