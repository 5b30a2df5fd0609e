//! The record: what the pages say, as data, and the attachments that travel with them.
//!
//! Nothing here knows how pages are laid out or how a PDF is made.

mod assemble;
mod attachments;
mod basis_rows;
mod budget;
mod cautions;
mod cycle_adjustment;
mod cycle_checks;
mod cycle_equation;
mod cycle_heats;
mod cycle_json;
mod cycle_symbols;
mod cycle_tables;
mod cycle_verdict;
mod cycle_working;
mod formation_table;
mod front;
mod function_rows;
mod given_working;
mod heat_working;
mod heating_value_components;
mod heating_value_rows;
mod heating_value_symbols;
mod heating_value_volume;
mod heating_value_working;
mod hess_working;
mod manifest;
mod mass_working;
mod math;
mod numerals;
mod pages;
mod path_working;
mod prose;
mod references;
mod result_rows;
mod results_json;
mod rich;
mod speak;
mod stating;
mod symbols;
mod tables;
mod value_rows;
mod working;

pub use assemble::{Record, assemble};
pub use attachments::{Attachment, Relationship};
pub use manifest::{MANIFEST_NAME, Manifest, Typesetting};
pub use math::Math;
pub use numerals::minus;
pub use pages::*;
pub use result_rows::coverage;
pub use results_json::results_json;
pub use rich::{Rich, Run};
