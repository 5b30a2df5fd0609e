//! Participants of an equation: a declared name or a species.
//!
//! What a declared name stands for is left to the caller.

use std::fmt;

use super::equation_fault::EquationFault;
use super::error::NotationError;
use super::formula_parse::is_electron;
use super::species::Species;

/// What takes part in a reaction.
#[derive(Clone, Debug, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub enum Participant {
    /// An id that the caller declares: lower-case letters, digits and hyphens.
    Declared(String),
    /// A formula in a phase.
    Species(Species),
}

/// The one word that is no id: it marks an exact number.
const RESERVED: &str = "exact";

impl Participant {
    /// Reads an id, which begins with a lower-case letter, or a species.
    ///
    /// # Errors
    /// The first fault of the id or the species.
    pub fn parse(text: &str) -> Result<Self, NotationError> {
        let body = text.trim();
        if !begins_id(body) {
            return Species::parse(text).map(Self::Species);
        }
        let fits = |c: char| c.is_ascii_lowercase() || c.is_ascii_digit() || c == '-';
        if body.chars().all(fits) && body != RESERVED {
            return Ok(Self::Declared(body.to_owned()));
        }
        let start = text.len() - text.trim_start().len();
        let id = body.to_owned();
        Err(NotationError::new(
            start..start + body.len(),
            EquationFault::NotAnId { id },
        ))
    }

    /// What tells this participant from others of an equation.
    pub(super) fn key(&self) -> String {
        match self {
            Self::Declared(id) => id.clone(),
            Self::Species(species) => species.key(),
        }
    }
}

/// Whether a text begins as an id: the electron and its phase aside.
pub(super) fn begins_id(text: &str) -> bool {
    let name = text.split('(').next().unwrap_or(text);
    text.starts_with(|c: char| c.is_ascii_lowercase()) && !is_electron(name.trim_end())
}

impl fmt::Display for Participant {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        match self {
            Self::Declared(id) => f.write_str(id),
            Self::Species(species) => species.fmt(f),
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn ids_and_species_are_told_apart() {
        let id = |text: &str| matches!(Participant::parse(text), Ok(Participant::Declared(_)));
        for text in ["nitrobenzene", "n-butane", "e", "a1", " aniline "] {
            assert!(id(text), "{text}");
        }
        for text in ["e-", "e⁻", "e-(g)", "H2O(l)", "Na+(aq)"] {
            assert!(matches!(
                Participant::parse(text),
                Ok(Participant::Species(_))
            ));
        }
    }

    #[test]
    fn what_is_no_id_is_refused() {
        for text in ["exact", "n_butane", "nacl(cr)", "aB"] {
            let error = Participant::parse(text).unwrap_err();
            assert_eq!(error.span, 0..text.len(), "{text}");
        }
    }
}
