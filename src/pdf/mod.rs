//! Reading a record's PDF: its attachments and whether it is signed.
//!
//! What is read here is handed out as bytes; nothing is trusted for being in the file. Verifying
//! a record is not done here.

mod attachments;

pub use attachments::{Embedded, PdfError, RecordFile};
