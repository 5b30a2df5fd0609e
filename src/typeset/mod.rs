//! Pages as data become one PDF: the one place that knows the typesetter.
//!
//! Responsible for the templates, the fonts, the attachments and the archival and accessibility
//! standards that are enforced (PDF/A-3a, ISO 19005-3, and PDF/UA-1, ISO 14289-1). What the pages
//! say is decided by [`crate::record`]; signatures and form fields come later and elsewhere.
//! The result depends on the arguments alone: no clock, no files, no fonts of the machine.

mod attachment;
mod coverage;
mod error;
mod export;
mod fonts;
mod places;
mod template;
mod world;

#[cfg(test)]
mod sample;
#[cfg(test)]
mod tests;

pub use coverage::uncovered;
pub use error::{Refusal, TypesetError};
pub use fonts::{FontIdentity, fonts};
pub use places::{SignatureBox, signature_boxes};
pub use template::template_sha256;

use crate::record::{Attachment, Pages};
use world::RecordWorld;

/// The typesetter, as the manifest and the pages name it.
pub const TYPESETTER: &str = "typst 0.15.1";

/// Sets the pages and attaches the files.
///
/// Equal arguments give equal bytes. The creation date is the record's date at 00:00 UTC.
///
/// # Errors
///
/// [`TypesetError`] where the pages name no calendar date, an attachment has no flat name or two
/// share one, or the typesetter refuses (a character that no font shows, say).
pub fn typeset(pages: &Pages, attachments: &[Attachment]) -> Result<Vec<u8>, TypesetError> {
    attachment::check(attachments)?;
    let options = export::options(pages)?;
    // Layouts of earlier records are of no use to this one; without this a long run would keep all.
    comemo::evict(0);
    let world = RecordWorld::new(pages, attachments)?;
    let document = export::compile(&world)?;
    export::pdf(&world, &document, &options)
}
