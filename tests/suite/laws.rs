//! What holds for every case, whatever it says, and cases small enough to be worked by hand.
//!
//! All of it goes through `Calculation::of`, the way that every command takes. Source files here
//! are invented; where a built-in source is consulted, no figure of it is repeated.

mod balance;
mod digits;
mod given;
pub mod heating_values;
mod invented;
mod order;
mod references;
mod rerun;
mod sums;
pub mod support;

pub use rerun::assert_reruns;
