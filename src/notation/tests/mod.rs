//! The notation as a whole: what is accepted, what is refused and how, and its laws.

mod accepted;
mod laws;
mod refused;
mod trees;
