//! Whole-program tests, in one binary because each links the typesetter.

mod laws;
mod outside;
mod record;
