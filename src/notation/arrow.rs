//! Finding the arrow of an equation.
//!
//! A heat belongs to one direction, so arrows that show none or the other are refused.

use std::ops::Range;

use super::equation_fault::EquationFault;
use super::error::NotationError;

/// Arrows from left to right.
const ACCEPTED: [&str; 4] = ["->", "→", "⟶", "="];

/// Arrows that are recognised to be refused, each before any that it begins with.
const REFUSED: [&str; 17] = [
    "<-->", "<->", "<=>", "<==>", "<--", "<-", "<=", "==>", "=>", "==", "⇌", "⇋", "⇄", "⇆", "↔",
    "←", "⟷",
];

/// The place of the one arrow.
///
/// # Errors
/// No arrow, or every arrow that is one too many or of the wrong kind.
pub(super) fn find(text: &str) -> Result<Range<usize>, Vec<NotationError>> {
    let mut found = None;
    let mut errors = Vec::new();
    let mut at = 0;
    while let Some(next) = text[at..].chars().next() {
        let Some((arrow, accepted)) = arrow_at(&text[at..]) else {
            at += next.len_utf8();
            continue;
        };
        let span = at..at + arrow.len();
        at = span.end;
        let written = arrow.to_owned();
        if !accepted {
            let fault = EquationFault::WrongArrow { arrow: written };
            errors.push(NotationError::new(span, fault));
        } else if found.is_some() {
            let fault = EquationFault::SecondArrow { arrow: written };
            errors.push(NotationError::new(span, fault));
        } else {
            found = Some(span);
        }
    }
    match found {
        _ if !errors.is_empty() => Err(errors),
        Some(span) => Ok(span),
        None => Err(vec![NotationError::new(
            0..text.len(),
            EquationFault::NoArrow,
        )]),
    }
}

/// The arrow at the start of a text, and whether it is accepted.
fn arrow_at(text: &str) -> Option<(&'static str, bool)> {
    let begins = |arrow: &&str| text.starts_with(*arrow);
    let refused = REFUSED.into_iter().find(begins);
    let accepted = ACCEPTED.into_iter().find(begins);
    refused
        .map(|arrow| (arrow, false))
        .or(accepted.map(|arrow| (arrow, true)))
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn arrows_to_the_right_are_found() {
        for arrow in ACCEPTED {
            assert_eq!(find(&format!("ä {arrow} b")), Ok(3..3 + arrow.len()));
        }
        assert_eq!(find("e-->b"), Ok(2..4));
    }

    #[test]
    fn other_arrows_are_named() {
        for arrow in REFUSED {
            let errors = find(&format!("a {arrow} b")).unwrap_err();
            let fault = EquationFault::WrongArrow {
                arrow: arrow.to_owned(),
            };
            assert_eq!(errors, [NotationError::new(2..2 + arrow.len(), fault)]);
        }
    }

    #[test]
    fn one_arrow_is_needed_and_no_more() {
        assert_eq!(
            find("a b").unwrap_err()[0].kind,
            EquationFault::NoArrow.into()
        );
        let errors = find("a -> b = c → d").unwrap_err();
        assert_eq!(errors.len(), 2);
        assert_eq!(errors[0].span, 7..8);
    }
}
