//! What can be wrong with the text of a number.

use std::ops::Range;

use super::message::{explained_error, quoted};

/// Why a text is not a printed decimal. Spans are byte ranges in the text that was parsed.
#[derive(Debug, Clone, PartialEq, Eq)]
pub enum DecimalError {
    /// The text, or the part before its exponent, has no digit.
    NoDigits { span: Range<usize>, text: String },
    /// A character that no number contains at this place.
    Unexpected { span: Range<usize>, character: char },
    /// `e` is not followed by a whole number.
    BadExponent { span: Range<usize>, text: String },
    /// More digits than any table prints.
    TooManyDigits {
        span: Range<usize>,
        found: usize,
        limit: usize,
    },
    /// A power of ten outside the range that the program works with.
    ExponentTooLarge {
        span: Range<usize>,
        text: String,
        limit: i64,
    },
}

impl DecimalError {
    /// The byte range of the fault in the text that was parsed.
    pub fn span(&self) -> Range<usize> {
        match self {
            Self::NoDigits { span, .. }
            | Self::Unexpected { span, .. }
            | Self::BadExponent { span, .. }
            | Self::TooManyDigits { span, .. }
            | Self::ExponentTooLarge { span, .. } => span.clone(),
        }
    }

    /// What stands there.
    pub fn found(&self) -> String {
        match self {
            Self::NoDigits { text, .. } if text.is_empty() => "nothing".to_owned(),
            Self::NoDigits { text, .. } => quoted(text),
            Self::Unexpected { character, .. } => quoted(&character.to_string()),
            Self::BadExponent { text, .. } => format!("the exponent {}", quoted(text)),
            Self::TooManyDigits { found, .. } => format!("{found} digits"),
            Self::ExponentTooLarge { text, .. } => format!("the exponent {}", quoted(text)),
        }
    }

    /// What should stand there.
    pub fn expected(&self) -> String {
        match self {
            Self::NoDigits { .. } => "a number such as -285.830 or 1.200e3".to_owned(),
            Self::Unexpected { .. } => "digits with at most one decimal point".to_owned(),
            Self::BadExponent { .. } => "a whole number after e".to_owned(),
            Self::TooManyDigits { limit, .. } => format!("at most {limit} digits"),
            Self::ExponentTooLarge { limit, .. } => {
                format!("an exponent between -{limit} and {limit}")
            }
        }
    }

    /// What to do about it.
    pub fn advice(&self) -> String {
        match self {
            Self::Unexpected { character, .. } => advice_on(*character),
            Self::BadExponent { .. } => "write a power of ten as 1.200e3 or 4.5e-6",
            Self::TooManyDigits { .. } => "give the digits that the source prints",
            Self::NoDigits { .. } => "write the value with the digits that its source prints",
            Self::ExponentTooLarge { .. } => "check the exponent, or choose another unit",
        }
        .to_owned()
    }

    /// The same fault in a longer text, in which the number begins at byte `by`.
    pub(super) fn shifted(mut self, by: usize) -> Self {
        match &mut self {
            Self::NoDigits { span, .. }
            | Self::Unexpected { span, .. }
            | Self::BadExponent { span, .. }
            | Self::TooManyDigits { span, .. }
            | Self::ExponentTooLarge { span, .. } => *span = span.start + by..span.end + by,
        }
        self
    }
}

explained_error!(DecimalError);

/// The likely intention behind a character that no number contains.
fn advice_on(character: char) -> &'static str {
    match character {
        ' ' | ',' | '\'' | '_' => {
            "use a decimal point, and nothing between groups of digits: 1234.5"
        }
        '×' | '*' | '^' | 'd' | 'D' => "write a power of ten as 1.200e3",
        '.' => "leave one decimal point",
        _ => "put a space between a number and its unit, and nothing inside the number",
    }
}
