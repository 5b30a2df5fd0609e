//! Issuing: from a calculation to the record's PDF in its place.

mod characters;
mod place;

use std::path::PathBuf;

use crate::calculation::Calculation;
use crate::case::Status;
use crate::finding::Fault;
use crate::record::{Record, Typesetting, assemble};
use crate::source::SourceFiles;
use crate::typeset::{TYPESETTER, TypesetError, fonts, template_sha256, typeset};

pub use place::{PlaceError, Placed, place};

/// A record that is typeset and not yet written.
#[derive(Debug)]
pub struct Issue {
    pub record: Record,
    pub pdf: Vec<u8>,
    /// `NUMBER-REVISION.pdf`
    pub file_name: PathBuf,
}

/// Why a calculation is not issued.
#[derive(Debug)]
pub enum IssueError {
    /// A finding stops it, and its status is not preliminary.
    Stopped,
    /// The pages would hold characters that the fonts cannot show.
    Characters(Vec<Fault>),
    Typeset(TypesetError),
}

/// Typesets the record of a calculation. A stopped one is issued as preliminary alone.
pub fn issue(calculation: &Calculation, files: &dyn SourceFiles) -> Result<Issue, IssueError> {
    let head = &calculation.case.record;
    if calculation.is_stopped() && head.status.value != Status::Preliminary {
        return Err(IssueError::Stopped);
    }
    let record = assemble(calculation, &typesetting());
    let faults = characters::faults(&record.pages, calculation, files);
    if !faults.is_empty() {
        return Err(IssueError::Characters(faults));
    }
    let pdf = typeset(&record.pages, &record.attachments).map_err(IssueError::Typeset)?;
    let file_name = format!("{}-{}.pdf", head.number.value, head.revision.value);
    Ok(Issue {
        record,
        pdf,
        file_name: file_name.into(),
    })
}

/// What the typesetter brings to a record: its version, the template and the fonts.
pub fn typesetting() -> Typesetting {
    let fonts = fonts()
        .into_iter()
        .map(|font| (font.name.to_string(), font.sha256.to_string()));
    Typesetting {
        version: TYPESETTER.to_string(),
        template_sha256: template_sha256(),
        fonts: fonts.collect(),
    }
}
