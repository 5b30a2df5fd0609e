//! The terminal: width, colour, wrapping. Colour only where a person looks.

use std::io::{self, IsTerminal, Write};

use crate::finding::visible;

/// Widest lines that are written for people.
pub const WIDTH: usize = 80;

/// Which stream is written to, and whether it takes colour.
#[derive(Clone, Copy)]
pub struct Style {
    colour: bool,
}

/// How a word stands out.
#[derive(Clone, Copy)]
pub enum Tone {
    Strong,
    Stop,
    Caution,
    Quiet,
}

impl Style {
    pub fn stdout() -> Style {
        Style::of(io::stdout().is_terminal())
    }

    pub fn stderr() -> Style {
        Style::of(io::stderr().is_terminal())
    }

    fn of(is_terminal: bool) -> Style {
        let plain = std::env::var_os("NO_COLOR").is_some_and(|value| !value.is_empty());
        Style {
            colour: is_terminal && !plain,
        }
    }

    /// A text in a tone; plain where the stream is not a terminal.
    pub fn paint(self, tone: Tone, text: &str) -> String {
        if !self.colour {
            return text.to_string();
        }
        let code = match tone {
            Tone::Strong => "1",
            Tone::Stop => "1;31",
            Tone::Caution => "33",
            Tone::Quiet => "2",
        };
        format!("\u{1b}[{code}m{text}\u{1b}[0m")
    }
}

/// Writes to standard output; a reader that has gone away is no fault.
pub fn print(text: &str) {
    let _ = io::stdout().lock().write_all(text.as_bytes());
}

/// Writes to standard error.
pub fn tell(text: &str) {
    let _ = io::stderr().lock().write_all(text.as_bytes());
}

/// A text broken into lines of at most `WIDTH` characters; `first` begins the first line and the
/// others are indented as far. A word that is longer stays whole.
pub fn wrap(first: &str, text: &str) -> String {
    let indent = first.chars().count();
    let mut lines = vec![first.to_string()];
    let mut width = indent;
    let mut empty = true;
    for word in text.split_whitespace() {
        let length = word.chars().count();
        if !empty && width + 1 + length > WIDTH {
            lines.push(" ".repeat(indent));
            width = indent;
            empty = true;
        }
        // `lines` holds at least one line.
        if let Some(line) = lines.last_mut() {
            if !empty {
                line.push(' ');
                width += 1;
            }
            line.push_str(word);
        }
        width += length;
        empty = false;
    }
    lines
        .iter()
        .map(|line| format!("{}\n", line.trim_end()))
        .collect()
}

/// Text from a file without what would move the cursor or change the order of characters.
pub fn plain(text: &str) -> String {
    let shown = |c: char| if c == '\n' { c } else { visible(c) };
    text.chars().map(shown).collect()
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn lines_are_broken_between_words_and_indented() {
        let text = wrap("note  ", &"word ".repeat(30));
        for line in text.lines() {
            assert!(line.chars().count() <= WIDTH);
        }
        assert!(
            text.lines()
                .nth(1)
                .is_some_and(|line| line.starts_with("      word"))
        );
    }
}
