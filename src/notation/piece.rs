//! Notation cut into pieces for typesetting.
//!
//! Says which characters are subscripts, superscripts or italic; how these look is left
//! to whoever sets them.

/// A run of characters that is set in one way.
#[derive(Clone, Debug, PartialEq, Eq, Hash)]
pub enum Piece {
    /// Upright, on the line.
    Text(String),
    /// Below the line: the counts of a formula.
    Sub(String),
    /// Above the line: the charge, with a true minus sign (U+2212).
    Sup(String),
    /// Italic: symbols of quantities. Formulas and phases hold none.
    Italic(String),
}

/// Appends upright text, joining it to upright text before it.
pub(super) fn push_text(pieces: &mut Vec<Piece>, text: &str) {
    match pieces.last_mut() {
        _ if text.is_empty() => {}
        Some(Piece::Text(last)) => last.push_str(text),
        _ => pieces.push(Piece::Text(text.to_owned())),
    }
}

/// Appends pieces, joining upright text where the two lists meet.
pub(super) fn push_all(pieces: &mut Vec<Piece>, more: Vec<Piece>) {
    for piece in more {
        match piece {
            Piece::Text(text) => push_text(pieces, &text),
            other => pieces.push(other),
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn neighbouring_text_is_joined() {
        let mut pieces = vec![Piece::Text("H".into())];
        push_text(&mut pieces, "");
        push_all(
            &mut pieces,
            vec![Piece::Text("O".into()), Piece::Sub("2".into())],
        );
        assert_eq!(pieces, [Piece::Text("HO".into()), Piece::Sub("2".into())]);
    }
}
