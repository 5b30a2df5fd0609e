//! The tokens of a unit expression: symbols, exponents in three notations, solidus, brackets.
//!
//! Leaves to others: in which order they may stand, and what a symbol means.

use std::iter::Peekable;
use std::ops::Range;
use std::str::CharIndices;

use super::unit_error::UnitError;

const LARGEST_EXPONENT: i32 = 9;

/// One token; separators (a space, `·`, `*`) make none.
#[derive(Debug, Clone, PartialEq)]
pub(super) enum Token {
    Symbol(String),
    Exponent(i32),
    Solidus,
    Open,
    Close,
}

/// The tokens of `text` with their byte ranges.
pub(super) fn tokens(text: &str) -> Result<Vec<(Token, Range<usize>)>, UnitError> {
    let mut tokens = Vec::new();
    let mut characters = text.char_indices().peekable();
    while let Some((start, character)) = characters.peek().copied() {
        let token = match character {
            '/' => single(&mut characters, Token::Solidus),
            '(' => single(&mut characters, Token::Open),
            ')' => single(&mut characters, Token::Close),
            _ if is_separator(character) => {
                characters.next();
                continue;
            }
            '1' if !follows_directly(&tokens, start) => {
                single(&mut characters, Token::Symbol("1".to_owned()))
            }
            _ if is_exponent(character) => exponent(text, &mut characters)?,
            _ => Token::Symbol(take_while(&mut characters, |c| !ends_symbol(c))),
        };
        let end = characters.peek().map_or(text.len(), |(at, _)| *at);
        tokens.push((token, start..end));
    }
    Ok(tokens)
}

/// Whether byte `start` follows a token without a space: the `1` of `kg1`, not of `1/h`.
fn follows_directly(tokens: &[(Token, Range<usize>)], start: usize) -> bool {
    matches!(tokens.last(), Some((Token::Symbol(_), span)) if span.end == start)
}

fn single(characters: &mut Peekable<CharIndices<'_>>, token: Token) -> Token {
    characters.next();
    token
}

fn take_while(characters: &mut Peekable<CharIndices<'_>>, accept: impl Fn(char) -> bool) -> String {
    let mut taken = String::new();
    while let Some((_, character)) = characters.next_if(|(_, character)| accept(*character)) {
        taken.push(character);
    }
    taken
}

fn is_separator(character: char) -> bool {
    character.is_whitespace() || matches!(character, '·' | '⋅' | '*')
}

fn is_exponent(character: char) -> bool {
    character.is_ascii_digit()
        || matches!(character, '^' | '-' | '\u{2212}' | '⁻')
        || superscript_digit(character).is_some()
}

fn ends_symbol(character: char) -> bool {
    matches!(character, '/' | '(' | ')') || is_separator(character) || is_exponent(character)
}

fn superscript_digit(character: char) -> Option<char> {
    let at = "⁰¹²³⁴⁵⁶⁷⁸⁹".chars().position(|digit| digit == character)?;
    char::from_digit(at as u32, 10)
}

/// `^-1`, `-1`, `⁻¹`, `3`.
fn exponent(text: &str, characters: &mut Peekable<CharIndices<'_>>) -> Result<Token, UnitError> {
    let start = characters.peek().map_or(text.len(), |(at, _)| *at);
    let written = take_while(characters, is_exponent);
    let plain: String = written
        .strip_prefix('^')
        .unwrap_or(&written)
        .chars()
        .map(|character| match character {
            '\u{2212}' | '⁻' => '-',
            _ => superscript_digit(character).unwrap_or(character),
        })
        .collect();
    match plain.parse::<i32>() {
        Ok(exponent) if exponent != 0 && exponent.abs() <= LARGEST_EXPONENT => {
            Ok(Token::Exponent(exponent))
        }
        _ => Err(UnitError::BadExponent {
            span: start..start + written.len(),
            text: written,
        }),
    }
}
