//! A file's text, with its name and the starts of its lines.

use super::literal::Decoder;
use super::place::{Place, Span};

/// The text of a case or a source file, so that byte offsets can be told as lines and columns.
#[derive(Clone, Debug)]
pub struct Text {
    name: String,
    text: String,
    line_starts: Vec<usize>,
}

impl Text {
    /// `name` is what messages call the file; it is never a path of the machine in a record.
    pub fn new(name: impl Into<String>, text: impl Into<String>) -> Text {
        let text = text.into();
        let newlines = text.match_indices('\n').map(|(at, _)| at + 1);
        let line_starts = std::iter::once(0).chain(newlines).collect();
        Text {
            name: name.into(),
            line_starts,
            text,
        }
    }

    pub fn name(&self) -> &str {
        &self.name
    }

    pub fn as_str(&self) -> &str {
        &self.text
    }

    /// The line (from 1) and column (in characters, from 1) of a byte offset. An offset beyond
    /// the end counts as the end.
    pub fn place(&self, offset: usize) -> Place {
        let offset = self.floor_char_boundary(offset);
        let line = self.line_starts.partition_point(|start| *start <= offset);
        let start = self.line_starts[line - 1];
        Place {
            file: self.name.clone(),
            line,
            column: self.text[start..offset].chars().count() + 1,
        }
    }

    /// The text of a line (from 1), without its line ending; empty where there is no such line.
    pub fn line(&self, line: usize) -> &str {
        let Some(start) = line.checked_sub(1).and_then(|i| self.line_starts.get(i)) else {
            return "";
        };
        let end = self.line_starts.get(line).map_or(self.text.len(), |e| *e);
        self.text[*start..end].trim_end_matches(['\n', '\r'])
    }

    /// The text of a span; empty where the span does not lie in this text.
    pub fn slice(&self, span: &Span) -> &str {
        self.text.get(span.clone()).unwrap_or("")
    }

    /// Where a part of a decoded string stands in the file, given the span of its literal.
    pub fn inside(&self, literal: &Span, within: &Span) -> Span {
        let mut decoder = Decoder::new(self.slice(literal));
        literal.start + decoder.pass(within.start)..literal.start + decoder.pass(within.end)
    }

    /// The same for many parts that follow each other, in one pass: a long text can hold
    /// thousands.
    pub fn inside_each<'s>(
        &self,
        literal: &Span,
        parts: impl IntoIterator<Item = &'s Span>,
    ) -> Vec<Span> {
        let mut decoder = Decoder::new(self.slice(literal));
        let place = |part: &Span| {
            literal.start + decoder.pass(part.start)..literal.start + decoder.pass(part.end)
        };
        parts.into_iter().map(place).collect()
    }

    fn floor_char_boundary(&self, offset: usize) -> usize {
        let mut offset = offset.min(self.text.len());
        while !self.text.is_char_boundary(offset) {
            offset -= 1;
        }
        offset
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn places_count_lines_and_characters_from_one() {
        let text = Text::new("a", "°C\nxy\n");
        assert_eq!((text.place(0).line, text.place(0).column), (1, 1));
        assert_eq!((text.place(2).line, text.place(2).column), (1, 2));
        assert_eq!((text.place(5).line, text.place(5).column), (2, 2));
        assert_eq!((text.place(99).line, text.place(99).column), (3, 1));
    }

    #[test]
    fn an_offset_inside_a_character_belongs_to_it() {
        let text = Text::new("a", "°C");
        assert_eq!(text.place(1).column, 1);
    }

    #[test]
    fn lines_come_without_their_ending() {
        let text = Text::new("a", "one\r\ntwo");
        assert_eq!(text.line(1), "one");
        assert_eq!(text.line(2), "two");
        assert_eq!(text.line(3), "");
        assert_eq!(text.line(0), "");
    }

    #[test]
    fn a_part_of_a_string_is_found_inside_its_literal() {
        let text = Text::new("a", "k = \"60 °X\"");
        let span = text.inside(&(4..12), &(3..6));
        assert_eq!(text.slice(&span), "°X");
        let text = Text::new("a", "k = \"60\\u0020°X\"");
        let span = text.inside(&(4..17), &(3..6));
        assert_eq!(text.slice(&span), "°X");
    }
}
