//! The way back from a decoded string to the TOML literal that it was written as.

/// Passes through a literal from its beginning to its end.
pub(super) struct Decoder<'a> {
    literal: &'a str,
    escapes: bool,
    /// Where it is in the literal.
    at: usize,
    /// How many bytes of the string it has passed.
    decoded: usize,
}

impl<'a> Decoder<'a> {
    pub(super) fn new(literal: &'a str) -> Decoder<'a> {
        let quotes = ["\"\"\"", "'''", "\"", "'"];
        let quotes = quotes
            .into_iter()
            .find(|quotes| literal.starts_with(quotes));
        let quotes = quotes.unwrap_or("");
        let rest = &literal[quotes.len()..];
        // A line end right after three quotes does not belong to the string.
        let line_end = ["\r\n", "\n"].into_iter().find(|end| rest.starts_with(end));
        let passed = match quotes.len() {
            3 => line_end.map_or(0, str::len),
            _ => 0,
        };
        Decoder {
            literal,
            escapes: quotes.starts_with('"'),
            at: quotes.len() + passed,
            decoded: 0,
        }
    }

    /// Goes on to byte `wanted` of the string, and says where it begins in the literal. A literal
    /// that is none, or ends before, counts as its own end.
    pub(super) fn pass(&mut self, wanted: usize) -> usize {
        while self.decoded < wanted {
            let Some((raw, bytes)) = next(&self.literal[self.at..], self.escapes) else {
                self.at = self.literal.len();
                break;
            };
            self.at += raw;
            self.decoded += bytes;
        }
        self.at
    }
}

/// How many bytes the next character takes in the literal, and in the string.
fn next(rest: &str, escapes: bool) -> Option<(usize, usize)> {
    let first = rest.chars().next()?;
    if first != '\\' || !escapes {
        return Some((first.len_utf8(), first.len_utf8()));
    }
    let kind = rest[1..].chars().next()?;
    let digits = match kind {
        'x' => 2,
        'u' => 4,
        'U' => 8,
        // A backslash at the end of a line takes the white space after it away.
        c if c.is_whitespace() => return Some((rest.len() - rest[1..].trim_start().len(), 0)),
        c => return Some((1 + c.len_utf8(), 1)),
    };
    let code = rest.get(2..2 + digits)?;
    let code = u32::from_str_radix(code, 16)
        .ok()
        .and_then(char::from_u32)?;
    Some((2 + digits, code.len_utf8()))
}

#[cfg(test)]
mod tests {
    use super::Decoder;

    fn undecoded(literal: &str, wanted: usize) -> usize {
        Decoder::new(literal).pass(wanted)
    }

    #[test]
    fn escapes_take_more_room_than_what_they_stand_for() {
        let literal = r#""a\\b\u00b0c\nd""#;
        let places = [0, 1, 2, 3, 5, 6, 7].map(|at| &literal[undecoded(literal, at)..]);
        assert!(places[0].starts_with("a\\\\b"));
        assert!(places[2].starts_with("b\\u"));
        assert!(places[4].starts_with("c\\n"));
        assert!(places[6].starts_with("d\""));
    }

    #[test]
    fn line_ends_that_do_not_count_are_passed_over() {
        let literal = "\"\"\"\nab\\\n   c\"\"\"";
        assert!(literal[undecoded(literal, 0)..].starts_with("ab"));
        assert!(literal[undecoded(literal, 3)..].starts_with("\"\"\""));
        assert_eq!(undecoded("'a\\b'", 2), 3);
    }

    #[test]
    fn what_is_no_literal_ends_somewhere_in_it() {
        for text in ["", "\"", "\"\\", "\"\\u12", "\"\\uD800\"", "abc", "'''"] {
            assert!(undecoded(text, 9) <= text.len(), "{text}");
        }
    }
}
