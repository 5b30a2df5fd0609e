//! hesswright works heats of reaction exactly from cited values and issues them as PDF
//! calculation records that carry all that is needed to run them again.
//!
//! A case goes one way through the modules, and never backwards:
//!
//! | step | module | from → to |
//! | --- | --- | --- |
//! | read | [`case`] (through [`document`]) | text → case |
//! | resolve | [`source`] | case and sources → problem |
//! | work | [`engine`], [`basis`] | problem → working |
//! | write | [`record`] | working → what the pages say, and the attachments |
//! | typeset | [`typeset`] | pages → PDF |
//! | issue | [`issue`] | PDF → its place, without losing what is there |
//!
//! [`calculation`] walks the first three steps in one call. Underneath stand [`notation`]
//! (formulas, phases, equations), [`quantity`] (printed decimals, exact numbers, units,
//! significance, uncertainty) and [`finding`] (places, faults, findings): small, pure, usable on
//! their own. [`pdf`] reads a record's attachments back, [`folder`] and [`output`] are the doors
//! to the file system, and [`cli`] is what people type.

pub mod basis;
pub mod calculation;
pub mod case;
pub mod cli;
pub mod document;
mod elimination;
pub mod engine;
pub mod finding;
pub mod folder;
pub mod issue;
pub mod notation;
pub mod output;
pub mod pdf;
pub mod quantity;
pub mod record;
pub mod source;
pub mod typeset;
