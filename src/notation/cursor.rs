//! A place in a text, moving forward character by character.
//!
//! Knows the Unicode subscripts and superscripts and what they stand for; the grammar is
//! left to the parsers.

use std::ops::Range;

/// A place in a text. Spans are byte ranges in that text.
#[derive(Clone, Debug)]
pub(super) struct Cursor<'a> {
    text: &'a str,
    at: usize,
}

impl<'a> Cursor<'a> {
    pub(super) fn new(text: &'a str) -> Self {
        Self { text, at: 0 }
    }

    /// The byte offset of the next character.
    pub(super) fn at(&self) -> usize {
        self.at
    }

    /// What has not been read yet.
    pub(super) fn rest(&self) -> &'a str {
        &self.text[self.at..]
    }

    /// What has been read.
    pub(super) fn read(&self) -> &'a str {
        &self.text[..self.at]
    }

    pub(super) fn peek(&self) -> Option<char> {
        self.rest().chars().next()
    }

    /// The character after the next.
    pub(super) fn peek_second(&self) -> Option<char> {
        self.rest().chars().nth(1)
    }

    pub(super) fn bump(&mut self) {
        if let Some(next) = self.peek() {
            self.at += next.len_utf8();
        }
    }

    /// Moves over the next character if it fits.
    pub(super) fn eat(&mut self, fits: impl Fn(char) -> bool) -> Option<char> {
        let next = self.peek().filter(|next| fits(*next))?;
        self.bump();
        Some(next)
    }

    /// Moves over all characters that fit, and returns them.
    pub(super) fn eat_while(&mut self, fits: impl Fn(char) -> bool) -> &'a str {
        let start = self.at;
        while self.eat(&fits).is_some() {}
        &self.text[start..self.at]
    }

    /// From `start` to here.
    pub(super) fn span_from(&self, start: usize) -> Range<usize> {
        start..self.at
    }

    /// The next character's span; empty at the end.
    pub(super) fn next_span(&self) -> Range<usize> {
        let width = self.peek().map_or(0, char::len_utf8);
        self.at..self.at + width
    }
}

/// How digits are written.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(super) enum Script {
    Plain,
    Subscript,
    Superscript,
}

impl Script {
    /// The ASCII digit that the character stands for in this script.
    pub(super) fn digit(self, character: char) -> Option<char> {
        match self {
            Self::Plain => Some(character).filter(char::is_ascii_digit),
            Self::Subscript => digit_after('₀', character),
            Self::Superscript => match character {
                '¹' => Some('1'),
                '²' => Some('2'),
                '³' => Some('3'),
                _ => digit_after('⁰', character),
            },
        }
    }
}

fn digit_after(zero: char, character: char) -> Option<char> {
    let value = u32::from(character).checked_sub(u32::from(zero))?;
    char::from_digit(value, 10)
}

/// The ASCII sign that a sign of charge stands for, on the line or above it.
pub(super) fn sign(character: char) -> Option<char> {
    match character {
        '+' | '⁺' => Some('+'),
        '-' | '\u{2212}' | '⁻' => Some('-'),
        _ => None,
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn scripts_read_their_own_digits() {
        let read = |script: Script, text: &str| -> Vec<Option<char>> {
            text.chars().map(|c| script.digit(c)).collect()
        };
        let digits: Vec<_> = "0123456789".chars().map(Some).collect();
        assert_eq!(read(Script::Plain, "0123456789"), digits);
        assert_eq!(read(Script::Subscript, "₀₁₂₃₄₅₆₇₈₉"), digits);
        assert_eq!(read(Script::Superscript, "⁰¹²³⁴⁵⁶⁷⁸⁹"), digits);
        assert_eq!(Script::Plain.digit('₂'), None);
        assert_eq!(Script::Subscript.digit('2'), None);
        assert_eq!(Script::Superscript.digit('⁺'), None);
    }

    #[test]
    fn spans_count_bytes() {
        let mut cursor = Cursor::new("₂x");
        assert_eq!(cursor.next_span(), 0..3);
        cursor.bump();
        assert_eq!(cursor.next_span(), 3..4);
        cursor.bump();
        assert_eq!(cursor.next_span(), 4..4);
        cursor.bump();
        assert_eq!(cursor.at(), 4);
    }
}
