//! The finished record, read back from its bytes alone: is it the archive file and the accessible
//! document that it claims to be, and does it say all that a calculation record has to say?
//!
//! `docs/pdf-clauses.md` lists the clauses and names these tests.

mod accessible;
mod archive;
mod contents;
mod heating_values;
mod hostile;
mod issued;
mod reader;
mod tree;
mod words;
