//! The built-in source `nasa-glenn-2021`: NASA's Glenn coefficients, read from the embedded file.
//!
//! Responsible for finding the records of a composition in `thermo.inp` and for handing over what
//! they print, digit for digit, with our own table of species, names and CAS numbers beside it
//! (`names.tsv`). Leaves to others what an entry of a source is, the arithmetic of the
//! nine-coefficient function, and which of several isomers or forms a case means.
//!
//! Format: S. Gordon and B. J. McBride, NASA RP-1311 (1994, 1996); B. J. McBride, M. J. Zehe and
//! S. Gordon, NASA/TP-2002-211556 (2002). What we found in the file itself, its traps included,
//! is in `data/nasa-glenn-2021/README.md`.

mod columns;
mod index;
mod key;
mod names;
mod record;
#[cfg(test)]
mod tests;

pub use index::{GlennIndex, find};
pub use record::{GlennEnthalpy, GlennRange, GlennRecord};

/// The id under which a case consults this source.
pub const ID: &str = "nasa-glenn-2021";
/// Title of the report that documents the data.
pub const TITLE: &str =
    "NASA Glenn Coefficients for Calculating Thermodynamic Properties of Individual Species";
/// Authors of the report.
pub const AUTHORS: [&str; 3] = ["Bonnie J. McBride", "Michael J. Zehe", "Sanford Gordon"];
/// Year of the report.
pub const YEAR: i64 = 2002;
/// Publisher of the report.
pub const PUBLISHER: &str = "National Aeronautics and Space Administration";
/// Number of the report.
pub const REPORT: &str = "NASA/TP-2002-211556";
/// Edition of the file: the date of its last general revision, from its own list of changes.
pub const EDITION: &str = "2021-09-09";
/// Where the file was taken from.
pub const DISTRIBUTION: &str = "thermo.inp of the source distribution of NASA's cea 3.3.4";
/// Licence of the file, as its distribution states it (SPDX identifier).
pub const LICENCE: &str = "Apache-2.0";
/// The molar gas constant with which the functions were fitted, in J/(mol K).
pub const GAS_CONSTANT: &str = "8.31451";
/// Temperature to which the enthalpies of formation refer.
pub const TEMPERATURE: &str = "298.15 K";
/// Standard pressure of the tables.
pub const PRESSURE: &str = "100000 Pa";
/// SHA-256 of the embedded file.
pub const SHA256: &str = "fa7746572952d74e249e818a82a35c113829742fb421a308e167185528884363";

static THERMO: &str = include_str!("../data/nasa-glenn-2021/thermo.inp");
static NAMES: &str = include_str!("../data/nasa-glenn-2021/names.tsv");

#[cfg(test)]
/// The embedded `thermo.inp`, byte for byte as NASA distributes it.
pub fn bytes() -> &'static [u8] {
    THERMO.as_bytes()
}
