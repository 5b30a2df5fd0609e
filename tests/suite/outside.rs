//! The program held against outsiders: published heats, an independent thermochemistry library,
//! worked examples of standards, constants of another package, and other readers of the file.
//!
//! No expected value here was computed by the program. What is held against what, and how far
//! each figure was verified, stands in `tests/outside/README.md`.

mod cantera;
mod case;
mod correlation;
mod cycles;
mod ferric_chloride;
mod heating_values;
mod hydrogenation;
mod janaf;
mod judges;
mod published;
mod random_heats;
mod rational;
mod rounding;
mod solution;
mod tools;
mod units;
mod water;
