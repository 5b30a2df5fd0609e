//! What can go wrong between pages and PDF, in sentences of our own.

use std::fmt;

use typst::World;
use typst::WorldExt;
use typst::diag::SourceDiagnostic;

/// Why no PDF came out.
#[derive(Clone, Debug, PartialEq, Eq)]
pub enum TypesetError {
    /// The pages could not be written as data.
    Data(String),
    /// The record's date is not a calendar date.
    Date(String),
    /// An attachment's name is empty or not flat.
    AttachmentName(String),
    /// Two attachments have the same name.
    AttachmentTwice(String),
    /// The typesetter refused, for one or more reasons.
    Refused(Vec<Refusal>),
}

/// One reason of the typesetter.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Refusal {
    pub message: String,
    pub hints: Vec<String>,
    /// Part and line of the template, where the typesetter says so.
    pub place: Option<String>,
}

impl Refusal {
    pub(super) fn new(world: &dyn World, diagnostic: &SourceDiagnostic) -> Refusal {
        Refusal {
            message: diagnostic.message.to_string(),
            hints: diagnostic
                .hints
                .iter()
                .map(|hint| hint.v.to_string())
                .collect(),
            place: place(world, diagnostic),
        }
    }
}

fn place(world: &dyn World, diagnostic: &SourceDiagnostic) -> Option<String> {
    let source = world.source(diagnostic.span.id()?).ok()?;
    let range = world.range(diagnostic.span)?;
    let line = source.lines().byte_to_line(range.start)?;
    let id = source.id();
    let part = id.vpath().get_without_slash();
    Some(format!("template {part}, line {}", line + 1))
}

impl fmt::Display for Refusal {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        write!(f, "the typesetter refuses the pages: {}", self.message)?;
        for hint in &self.hints {
            write!(f, "; {hint}")?;
        }
        match &self.place {
            Some(place) => write!(f, " ({place})."),
            None => f.write_str("."),
        }
    }
}

impl fmt::Display for TypesetError {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        match self {
            TypesetError::Data(reason) => {
                write!(f, "the pages cannot be written as data: {reason}.")
            }
            TypesetError::Date(date) => {
                write!(f, "the record's date `{date}` is not a calendar date.")
            }
            TypesetError::AttachmentName(name) => {
                write!(f, "`{name}` cannot be the name of an attachment.")
            }
            TypesetError::AttachmentTwice(name) => {
                write!(f, "two attachments are named `{name}`.")
            }
            TypesetError::Refused(refusals) => lines(f, refusals),
        }
    }
}

fn lines(f: &mut fmt::Formatter<'_>, refusals: &[Refusal]) -> fmt::Result {
    for (index, refusal) in refusals.iter().enumerate() {
        if index > 0 {
            f.write_str("\n")?;
        }
        write!(f, "{refusal}")?;
    }
    Ok(())
}

impl std::error::Error for TypesetError {}
