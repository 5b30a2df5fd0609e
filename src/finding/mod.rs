//! What the program has to say about a case: faults, which stop the reading, and findings, which
//! judge a finished working. Both name a place in a file. Rendering is left to the command line.

mod fault;
mod literal;
mod nearest;
mod place;
mod severity;
mod text;
mod visible;

pub use fault::{Fault, FaultCode, Faults};
pub use nearest::{nearest, shorten, shorten_words};
pub use place::{Located, Place, Span};
pub use severity::{Finding, FindingCode, Severity};
pub use text::Text;
pub use visible::visible;
