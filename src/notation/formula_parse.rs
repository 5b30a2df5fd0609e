//! Reading formulas.
//!
//! One pass over the text, without backtracking. What a formula means once it is read is
//! left to `formula`.

use num_rational::BigRational;
use num_traits::{One, Zero};

use super::charge_parse;
use super::cursor::{Cursor, Script};
use super::element::Element;
use super::error::{Bounded, NotationError};
use super::formula::Formula;
use super::formula_fault::{BracketFault, FormulaFault};
use super::formula_tree::{Bracket, Item, Part, Unit};
use super::number::{NumberFault, NumberRole, Scanned, scan_decimal, scan_positive};
use super::phase::PhaseLabel;

/// The longest formula, in bytes.
const MAX_BYTES: usize = 1024;

/// The deepest nesting of brackets.
const MAX_NESTING: usize = 16;

type Parsed<T> = Result<T, NotationError>;

pub(super) fn parse(text: &str) -> Parsed<Formula> {
    Bounded::Formula.check(text.len(), MAX_BYTES, 0..text.len())?;
    if is_electron(text) {
        return Ok(Formula::electron());
    }
    let mut parser = Parser {
        cursor: Cursor::new(text),
        last_script: Script::Plain,
    };
    let parts = parser.parts()?;
    if parts.iter().all(|part| part.items.is_empty()) {
        return Err(parser.unexpected());
    }
    let items = parts.last().map_or(&[][..], |part| &part.items);
    let charge = charge_parse::scan(&mut parser.cursor, items, parser.last_script)?;
    match parser.cursor.peek() {
        None => Ok(Formula::new(parts, charge)),
        Some(_) => Err(parser.unexpected()),
    }
}

/// Whether the text is a spelling of the electron.
pub(super) fn is_electron(text: &str) -> bool {
    matches!(text, "e-" | "e^-" | "e⁻" | "e\u{2212}" | "e^\u{2212}")
}

fn is_dot(character: char) -> bool {
    matches!(character, '·' | '⋅' | '•')
}

struct Parser<'a> {
    cursor: Cursor<'a>,
    /// How the last count was written: a subscript cannot be mistaken for a charge.
    last_script: Script,
}

impl Parser<'_> {
    fn parts(&mut self) -> Parsed<Vec<Part>> {
        let first = Part {
            multiplier: BigRational::one(),
            items: self.items(0)?,
        };
        let mut parts = vec![first];
        while !parts[0].items.is_empty() && self.cursor.eat(is_dot).is_some() {
            let multiplier = scan_positive(&mut self.cursor, NumberRole::Multiplier)?;
            let items = self.items(0)?;
            if items.is_empty() {
                return Err(self.unexpected());
            }
            let multiplier = multiplier.map_or_else(BigRational::one, |number| number.value);
            parts.push(Part { multiplier, items });
        }
        Ok(parts)
    }

    /// Items up to something that is none.
    fn items(&mut self, depth: usize) -> Parsed<Vec<Item>> {
        let mut items = Vec::new();
        while let Some(next) = self.cursor.peek() {
            let start = self.cursor.at();
            let unit = match Bracket::opened_by(next) {
                Some(bracket) => self.group(bracket, depth + 1)?,
                None if next.is_ascii_uppercase() => self.element()?,
                None => break,
            };
            let count = self.count(start)?;
            items.push(Item { unit, count });
        }
        Ok(items)
    }

    fn group(&mut self, bracket: Bracket, depth: usize) -> Parsed<Unit> {
        let start = self.cursor.at();
        Bounded::Nesting.check(depth, MAX_NESTING, self.cursor.next_span())?;
        self.cursor.bump();
        let items = self.items(depth)?;
        let open = bracket.open();
        let Some(next) = self.cursor.peek() else {
            let span = start..start + open.len_utf8();
            return Err(NotationError::new(span, BracketFault::Unclosed { open }));
        };
        if Bracket::closed_by(next).is_none() {
            return Err(self.unexpected());
        }
        self.cursor.bump();
        let span = self.cursor.span_from(start);
        let close = bracket.close();
        if next != close {
            let fault = BracketFault::Mismatched { open, close: next };
            return Err(NotationError::new(span, fault));
        }
        if items.is_empty() {
            return Err(NotationError::new(
                span,
                BracketFault::Empty { open, close },
            ));
        }
        Ok(Unit::Group(bracket, items))
    }

    fn element(&mut self) -> Parsed<Unit> {
        let start = self.cursor.at();
        let rest = self.cursor.rest();
        self.cursor.bump();
        self.cursor.eat_while(|c| c.is_ascii_lowercase());
        let span = self.cursor.span_from(start);
        let symbol = &rest[..span.len()];
        match Element::from_symbol(symbol) {
            Some(element) => Ok(Unit::Element(element)),
            None => {
                let before = self.cursor.read()[..start].chars().next_back();
                let meant = other_reading(symbol, before, self.cursor.peek());
                let symbol = symbol.to_owned();
                let fault = FormulaFault::UnknownElement { symbol, meant };
                Err(NotationError::new(span, fault))
            }
        }
    }

    /// The count after the item that began at `start`: one where none is written.
    fn count(&mut self, start: usize) -> Parsed<BigRational> {
        self.last_script = Script::Plain;
        for script in [Script::Plain, Script::Subscript] {
            let number = scan_decimal(&mut self.cursor, script, NumberRole::Count)?;
            if let Some(number) = number {
                self.refuse_zero(&number)?;
                self.refuse_ambiguous_decimal(&number, start)?;
                self.last_script = number.script;
                return Ok(number.value);
            }
        }
        Ok(BigRational::one())
    }

    fn refuse_zero(&self, number: &Scanned<'_>) -> Parsed<()> {
        let role = NumberRole::Count;
        match number.value.is_zero() {
            true => Err(NotationError::new(
                number.span.clone(),
                NumberFault::Zero { role },
            )),
            false => Ok(()),
        }
    }

    /// `O4.5H2O` is a hydrate with a plain dot more often than a decimal count. `1` is
    /// never written as a count, no added part begins with 0, and `(O4.5)H2O` says what
    /// it means: these are read.
    fn refuse_ambiguous_decimal(&self, number: &Scanned<'_>, start: usize) -> Parsed<()> {
        let goes_on = self
            .cursor
            .peek()
            .is_some_and(|next| next.is_ascii_uppercase() || Bracket::opened_by(next).is_some());
        let dotted_count = number.value >= BigRational::from_integer(2.into())
            && number.value.fract() >= BigRational::new(1.into(), 10.into());
        let item = &self.cursor.read()[start..];
        let Some((count, added)) = item.rsplit_once('.').filter(|_| goes_on && dotted_count) else {
            return Ok(());
        };
        let fault = FormulaFault::AmbiguousDecimal {
            written: item.to_owned(),
            dotted: format!("{count}·{added}"),
            bracketed: format!("({item})"),
        };
        Err(NotationError::new(number.span.clone(), fault))
    }

    /// The fault of the next character, where no formula can go on.
    fn unexpected(&self) -> NotationError {
        let span = self.cursor.next_span();
        let Some(next) = self.cursor.peek() else {
            return NotationError::new(span, FormulaFault::Missing);
        };
        if Bracket::closed_by(next).is_some() {
            return NotationError::new(span, BracketFault::Unopened { close: next });
        }
        if next.is_ascii_lowercase() || next.is_ascii_digit() {
            return self.unexpected_word(next);
        }
        let fault = match next {
            '.' | '*' => FormulaFault::PlainDot { character: next },
            _ if next.is_whitespace() => FormulaFault::Space,
            _ => FormulaFault::Unreadable { character: next },
        };
        NotationError::new(span, fault)
    }

    fn unexpected_word(&self, first: char) -> NotationError {
        let mut ahead = self.cursor.clone();
        let start = ahead.at();
        let fault = if first.is_ascii_digit() {
            let number = ahead.eat_while(|c| c.is_ascii_digit()).to_owned();
            FormulaFault::LeadingNumber { number }
        } else {
            let word = ahead.eat_while(|c| c.is_ascii_lowercase()).to_owned();
            match PhaseLabel::from_symbol(&word) {
                Some(_) if self.cursor.read().ends_with('(') => {
                    FormulaFault::PhaseWithin { label: word }
                }
                _ => FormulaFault::LowerCase { word },
            }
        };
        NotationError::new(ahead.span_from(start), fault)
    }
}

/// Symbols that the letters would give in another case: `Na` for the `A` of `NA`, `CH` for
/// `Ch`.
fn other_reading(symbol: &str, before: Option<char>, next: Option<char>) -> Option<String> {
    let known = |text: &String| Element::from_symbol(text).is_some();
    let pair = |first: char, second: char| {
        let letters = first.is_ascii_uppercase() && second.is_ascii_uppercase();
        let text: String = [first, second.to_ascii_lowercase()].into_iter().collect();
        Some(text).filter(|text| letters && known(text))
    };
    let mut letters = symbol.chars();
    match (letters.next()?, letters.next(), letters.next()) {
        (only, None, _) => before
            .and_then(|before| pair(before, only))
            .or_else(|| next.and_then(|next| pair(only, next))),
        (first, Some(second), None) => {
            let split = [first, second.to_ascii_uppercase()].map(String::from);
            split.iter().all(known).then(|| split.concat())
        }
        _ => None,
    }
}
