//! Unit expressions: `kJ/(kg K)`, `kJ mol^-1`, `kJ·mol⁻¹`, `1/h`.
//!
//! One solidus, then one factor or brackets: `J/mol/K` and `J/mol K` are ambiguous (SI brochure,
//! 9th edition, 5.2, from memory) and are refused with the right spelling.
//! Leaves to others: what a symbol means.

use std::ops::Range;

use num_traits::{One, Pow};

use super::dimension::Dimension;
use super::exact::Exact;
use super::unit::{Unit, UnitKind};
use super::unit_error::UnitError;
use super::unit_lookup::look_up;
use super::unit_tokens::{Token, tokens};

/// No unit needs a longer text; it bounds the work that a text can ask for.
const LONGEST: usize = 80;

impl Unit {
    /// Reads a unit. `1` is the unit of pure numbers.
    ///
    /// # Errors
    /// A symbol that is unknown or has several meanings, `°C` or a percentage in a compound
    /// unit, an ambiguous solidus, or text that is no unit.
    pub fn parse(text: &str) -> Result<Self, UnitError> {
        let span = 0..text.len();
        if text.trim().is_empty() {
            return Err(UnitError::Missing { span });
        }
        if text.len() > LONGEST {
            let (found, limit) = (text.len(), LONGEST);
            return Err(UnitError::TooLong { span, found, limit });
        }
        let factors = factors(text)?;
        match factors.as_slice() {
            [single] if single.power == 1 => look_up(&single.text, single.span.clone()),
            _ => compound(&factors),
        }
    }
}

/// A symbol and the power that it stands in; below a solidus the power is negative.
struct Factor {
    text: String,
    span: Range<usize>,
    power: i32,
}

/// Where the reader stands in the expression.
#[derive(Clone, Copy, PartialEq)]
enum Side {
    Over,
    /// The solidus was read, and nothing after it.
    JustUnder,
    /// Inside the brackets after the solidus.
    Bracket,
    /// The denominator is complete.
    Done,
}

fn factors(text: &str) -> Result<Vec<Factor>, UnitError> {
    let tokens = tokens(text)?;
    let mut factors: Vec<Factor> = Vec::new();
    let mut side = Side::Over;
    for (at, (token, span)) in tokens.iter().enumerate() {
        side = match (token, side) {
            (Token::Symbol(symbol), Side::Over | Side::JustUnder | Side::Bracket) => {
                let power = if side == Side::Over { 1 } else { -1 };
                let (text, span) = (symbol.clone(), span.clone());
                factors.push(Factor { text, span, power });
                if side == Side::JustUnder {
                    Side::Done
                } else {
                    side
                }
            }
            (Token::Exponent(exponent), _) if follows_symbol(&tokens, at) => {
                if let Some(factor) = factors.last_mut() {
                    factor.power *= exponent;
                }
                side
            }
            (Token::Solidus, Side::Over) if !factors.is_empty() => Side::JustUnder,
            (Token::Open, Side::JustUnder) => Side::Bracket,
            (Token::Close, Side::Bracket) if follows_factor(&tokens, at) => Side::Done,
            (Token::Solidus | Token::Symbol(_), Side::Done) => {
                return Err(ambiguous(text, &tokens));
            }
            _ => return Err(unexpected(text, span.clone())),
        };
    }
    match side {
        Side::Over | Side::Done => Ok(factors),
        Side::JustUnder | Side::Bracket => Err(unexpected(text, 0..text.len())),
    }
}

/// Whether the token follows a symbol without a space.
fn follows_symbol(tokens: &[(Token, Range<usize>)], at: usize) -> bool {
    at > 0
        && matches!(tokens[at - 1].0, Token::Symbol(_))
        && tokens[at - 1].1.end == tokens[at].1.start
}

fn follows_factor(tokens: &[(Token, Range<usize>)], at: usize) -> bool {
    at > 0 && matches!(tokens[at - 1].0, Token::Symbol(_) | Token::Exponent(_))
}

fn unexpected(text: &str, span: Range<usize>) -> UnitError {
    let text = text[span.clone()].to_owned();
    UnitError::Unexpected { span, text }
}

/// Several factors after a solidus without brackets: everything after the first solidus is taken
/// as the denominator, and the spelling that says so is offered.
fn ambiguous(text: &str, tokens: &[(Token, Range<usize>)]) -> UnitError {
    let first = tokens
        .iter()
        .position(|(token, _)| *token == Token::Solidus);
    let (over, under) = tokens.split_at(first.unwrap_or(0));
    UnitError::AmbiguousSolidus {
        span: 0..text.len(),
        text: text.to_owned(),
        spelling: format!("{}/({})", spelt(over), spelt(under)),
    }
}

/// The symbols among the tokens with their exponents.
fn spelt(tokens: &[(Token, Range<usize>)]) -> String {
    let mut written = String::new();
    for (token, _) in tokens {
        match token {
            Token::Symbol(symbol) if written.is_empty() => written.push_str(symbol),
            Token::Symbol(symbol) => written = format!("{written} {symbol}"),
            Token::Exponent(exponent) if *exponent > 0 => written = format!("{written}{exponent}"),
            Token::Exponent(exponent) => written = format!("{written}^{exponent}"),
            Token::Solidus | Token::Open | Token::Close => {}
        }
    }
    written
}

/// Multiplies the factors, and writes the one spelling.
fn compound(factors: &[Factor]) -> Result<Unit, UnitError> {
    let mut dimension = Dimension::ONE;
    let mut product = Exact::one();
    let mut powers: Vec<(String, i32)> = Vec::new();
    for factor in factors {
        let unit = look_up(&factor.text, factor.span.clone())?;
        multiplicable(&unit, &factor.span)?;
        dimension = dimension.times(unit.dimension().to_power(factor.power));
        product *= Pow::pow(unit.factor().clone(), factor.power);
        // `kg/kg` keeps both: it says what the fraction is of.
        let same = |(symbol, power): &&mut (String, i32)| {
            symbol == unit.symbol() && (*power > 0) == (factor.power > 0)
        };
        match powers.iter_mut().find(same) {
            Some((_, power)) => *power += factor.power,
            None => powers.push((unit.symbol().to_owned(), factor.power)),
        }
    }
    Ok(Unit::plain(canonical(&powers), dimension, product))
}

fn multiplicable(unit: &Unit, span: &Range<usize>) -> Result<(), UnitError> {
    let (span, symbol) = (span.clone(), unit.symbol().to_owned());
    match unit.kind() {
        UnitKind::Reading => Err(UnitError::ReadingInCompound {
            span,
            difference: if symbol == "°C" { "Δ°C" } else { "Δ°F" },
            symbol,
        }),
        UnitKind::Fraction(_) => Err(UnitError::FractionInCompound { span, symbol }),
        UnitKind::Plain | UnitKind::Difference => Ok(()),
    }
}

/// `kJ/(kg K)`, `m3`, `1/h`.
fn canonical(powers: &[(String, i32)]) -> String {
    let side = |sign: i32| -> Vec<String> {
        powers
            .iter()
            .filter(|(symbol, power)| power * sign > 0 && symbol != "1")
            .map(|(symbol, power)| match power.abs() {
                1 => symbol.clone(),
                size => format!("{symbol}{size}"),
            })
            .collect()
    };
    let (over, under) = (side(1), side(-1));
    let over = if over.is_empty() {
        "1".to_owned()
    } else {
        over.join(" ")
    };
    match under.as_slice() {
        [] => over,
        [single] => format!("{over}/{single}"),
        several => format!("{over}/({})", several.join(" ")),
    }
}

#[cfg(test)]
#[path = "unit_parse_tests.rs"]
mod tests;
