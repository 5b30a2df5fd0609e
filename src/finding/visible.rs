//! Characters that are safe to show on a terminal.

/// The character, or U+FFFD where it would move the cursor, change colours, or change the order
/// in which the characters around it are shown.
pub fn visible(c: char) -> char {
    let reorders = matches!(c,
        '\u{61c}' | '\u{200e}' | '\u{200f}' | '\u{202a}'..='\u{202e}' | '\u{2066}'..='\u{2069}');
    let breaks = matches!(c, '\u{2028}' | '\u{2029}');
    match c.is_control() || reorders || breaks {
        true => '\u{fffd}',
        false => c,
    }
}
