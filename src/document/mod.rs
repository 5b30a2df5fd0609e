//! Strict reading of TOML documents: every value with its place, every fault reported.
//!
//! The case and the source files are read through this module. It knows TOML and nothing of what
//! the keys mean. A reader asks a [`Table`] for keys; what is missing, of the wrong type or
//! unknown becomes a fault in the [`Reader`], and reading goes on.

mod cas;
mod file;
mod reader;
mod syntax;
mod table;
mod value;
mod words;

pub use cas::cas_number;
pub use file::{read_text, unread};
pub use reader::{Document, Reader, with_document};
pub use table::Table;
pub use value::Value;
pub use words::{
    filled, is_file_word, is_id, notation_fault, number, one_of, quantity, species, unit,
    value_fault,
};
