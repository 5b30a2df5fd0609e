//! The common shape of this module's messages: what was found, what was expected, what to do.
//!
//! Leaves to others: where the message is shown and how it is laid out.

/// The longest piece of foreign text that a message repeats, in characters.
const LONGEST_REPEATED: usize = 60;

/// `text` in quotation marks, cut where it would drown the message.
pub(super) fn quoted(text: &str) -> String {
    let mut shown: String = text.chars().take(LONGEST_REPEATED).collect();
    if shown.len() < text.len() {
        shown.push('…');
    }
    format!("“{shown}”")
}

/// Implements `Display` and `Error` from `found()`, `expected()` and `advice()`.
macro_rules! explained_error {
    ($error:ty) => {
        impl std::fmt::Display for $error {
            fn fmt(&self, f: &mut std::fmt::Formatter<'_>) -> std::fmt::Result {
                let (found, expected) = (self.found(), self.expected());
                write!(f, "found {found}; expected {expected}; {}", self.advice())
            }
        }

        impl std::error::Error for $error {}
    };
}
pub(super) use explained_error;
