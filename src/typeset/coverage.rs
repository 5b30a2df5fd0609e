//! Which characters a record can show, so that a case is told of the others before typesetting.

use super::fonts::{FACES, SERIF_FACES};

/// The first character of a text that must not or cannot stand in a record, and its byte offset.
///
/// Refused are control characters except line feed and tab, characters that are invisible or
/// change the order of others (they would let a page say something other than its data), private
/// use and noncharacters, the replacement character (text that was decoded wrongly), and whatever
/// no offered font shows in every style that text may be set in. A combining mark is refused where
/// no font has both it and what it combines with.
pub fn uncovered(text: &str) -> Option<(usize, char)> {
    let mut cluster = ALL;
    for (offset, c) in text.char_indices() {
        if matches!(c, ' '..='~' | '\n' | '\t') {
            cluster = ALL;
            continue;
        }
        cluster = faces(c) & if is_mark(c) { cluster } else { ALL };
        if must_not_stand(c) || !shows(cluster) {
            return Some((offset, c));
        }
    }
    None
}

/// A set of faces: bit n is the face n.
type FaceSet = u32;

const ALL: FaceSet = FaceSet::MAX;
const SERIF: FaceSet = (1 << SERIF_FACES) - 1;

fn faces(c: char) -> FaceSet {
    FACES
        .iter()
        .enumerate()
        .filter(|(_, face)| face.info().coverage.contains(u32::from(c)))
        .fold(0, |set, (index, _)| set | (1 << index))
}

/// Text comes upright, bold, italic and both; the faces that are not serif stand in for any style.
fn shows(set: FaceSet) -> bool {
    set & SERIF == SERIF || set & !SERIF != 0
}

/// Combining marks outside scripts that compose in ways of their own.
fn is_mark(c: char) -> bool {
    matches!(c,
        '\u{300}'..='\u{36f}' | '\u{483}'..='\u{489}' | '\u{1ab0}'..='\u{1aff}'
        | '\u{1dc0}'..='\u{1dff}' | '\u{20d0}'..='\u{20ff}' | '\u{fe20}'..='\u{fe2f}')
}

fn must_not_stand(c: char) -> bool {
    c.is_control() || is_invisible(c) || is_private_or_no_character(c) || c == '\u{fffd}'
}

/// Unicode's default ignorable characters, line and paragraph separators, and the interlinear
/// annotation marks: bidirectional controls and byte order marks are among them.
fn is_invisible(c: char) -> bool {
    matches!(c,
        '\u{ad}' | '\u{34f}' | '\u{61c}' | '\u{115f}'..='\u{1160}' | '\u{17b4}'..='\u{17b5}'
        | '\u{180b}'..='\u{180f}' | '\u{200b}'..='\u{200f}' | '\u{2028}'..='\u{202e}'
        | '\u{2060}'..='\u{206f}' | '\u{3164}' | '\u{fe00}'..='\u{fe0f}' | '\u{feff}'
        | '\u{ffa0}' | '\u{fff0}'..='\u{fffb}' | '\u{1bca0}'..='\u{1bca3}'
        | '\u{1d173}'..='\u{1d17a}' | '\u{e0000}'..='\u{e0fff}')
}

fn is_private_or_no_character(c: char) -> bool {
    let code = u32::from(c);
    matches!(code, 0xe000..=0xf8ff | 0xf0000.. | 0xfdd0..=0xfdef) || code & 0xfffe == 0xfffe
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn text_of_the_trade_is_covered() {
        let text =
            "ΔᵣH° = −552.56 ± 0.42 kJ/mol\tCuSO4·5H2O → ⇌ ≤ ≥ × ∑ √ µ Å η λ ν\n“é” naïve Ωя €";
        assert_eq!(uncovered(text), None);
    }

    #[test]
    fn what_hides_or_reorders_is_refused_where_it_stands() {
        for c in [
            '\0',
            '\r',
            '\u{7f}',
            '\u{85}',
            '\u{ad}',
            '\u{200b}',
            '\u{200e}',
            '\u{202a}',
            '\u{202e}',
            '\u{2028}',
            '\u{2066}',
            '\u{2069}',
            '\u{feff}',
            '\u{fffd}',
            '\u{e000}',
            '\u{ffff}',
            '\u{10ffff}',
        ] {
            assert_eq!(uncovered(&format!("é{c}x")), Some((2, c)), "{c:?}");
        }
    }

    #[test]
    fn what_no_font_shows_is_refused() {
        assert_eq!(uncovered("heat 熱"), Some((5, '熱')));
        assert_eq!(uncovered("\u{378}"), Some((0, '\u{378}')));
    }

    #[test]
    fn marks_need_a_font_that_has_their_base_too() {
        assert_eq!(uncovered("e\u{301}"), None);
        assert_eq!(uncovered("ש\u{20d7}"), Some((2, '\u{20d7}')));
    }
}
