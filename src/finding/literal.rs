//! The way back from a decoded string to the TOML literal that it was written as.

/// The byte of a literal at which byte `wanted` of the string begins that it stands for. A literal
/// that is none, or ends before, counts as its own end.
pub(super) fn undecoded(literal: &str, wanted: usize) -> usize {
    let quotes = ["\"\"\"", "'''", "\"", "'"]
        .into_iter()
        .find(|q| literal.starts_with(q));
    let quotes = quotes.unwrap_or("");
    let mut at = quotes.len();
    if quotes.len() == 3 {
        let rest = &literal[at..];
        // A line end right after three quotes does not belong to the string.
        at += rest
            .strip_prefix("\r\n")
            .or(rest.strip_prefix('\n'))
            .map_or(0, |left| rest.len() - left.len());
    }
    let escapes = quotes.starts_with('"');
    let mut decoded = 0;
    while decoded < wanted {
        let Some((raw, bytes)) = next(&literal[at..], escapes) else {
            return literal.len();
        };
        at += raw;
        decoded += bytes;
    }
    at
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
    use super::undecoded;

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
