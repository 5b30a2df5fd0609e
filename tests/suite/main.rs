//! Whole-program tests, in one binary because each links the typesetter.

mod commands;
mod cycles;
mod faults;
mod laws;
mod outside;
mod program;
mod record;
mod temperature;
