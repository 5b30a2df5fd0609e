//! What can be wrong with a unit, as read or as used.

use std::ops::Range;

use super::message::{explained_error, quoted};
use super::unit::{Unit, UnitKind};

/// Why a unit cannot be read, or a value not be converted. Spans are byte ranges in the text
/// that was parsed.
#[derive(Debug, Clone, PartialEq, Eq)]
pub enum UnitError {
    /// No unit where one belongs.
    Missing { span: Range<usize> },
    /// A longer text than any unit needs.
    TooLong {
        span: Range<usize>,
        found: usize,
        limit: usize,
    },
    /// A symbol that is not in the table; the nearest one that is.
    Unknown {
        span: Range<usize>,
        text: String,
        nearest: Option<String>,
    },
    /// A word that means several things.
    SeveralMeanings {
        span: Range<usize>,
        word: String,
        choices: &'static str,
    },
    /// More than one factor follows a solidus without brackets: `J/mol/K`, `J/mol K`.
    AmbiguousSolidus {
        span: Range<usize>,
        text: String,
        spelling: String,
    },
    /// `°C` or `°F` in a compound unit.
    ReadingInCompound {
        span: Range<usize>,
        symbol: String,
        difference: &'static str,
    },
    /// `wt%` and the like in a compound unit.
    FractionInCompound { span: Range<usize>, symbol: String },
    /// An exponent that is not a whole number between -9 and 9, or is zero.
    BadExponent { span: Range<usize>, text: String },
    /// A character or a bracket that does not belong there.
    Unexpected { span: Range<usize>, text: String },
    /// The two units measure different things.
    Dimensions { from: Box<Unit>, to: Box<Unit> },
    /// A reading against a difference, or fractions of different basis.
    Kinds { from: Box<Unit>, to: Box<Unit> },
}

impl UnitError {
    /// The byte range of the fault in the text that was parsed; `None` for a failed conversion.
    pub fn span(&self) -> Option<Range<usize>> {
        match self {
            Self::Missing { span }
            | Self::TooLong { span, .. }
            | Self::Unknown { span, .. }
            | Self::SeveralMeanings { span, .. }
            | Self::AmbiguousSolidus { span, .. }
            | Self::ReadingInCompound { span, .. }
            | Self::FractionInCompound { span, .. }
            | Self::BadExponent { span, .. }
            | Self::Unexpected { span, .. } => Some(span.clone()),
            Self::Dimensions { .. } | Self::Kinds { .. } => None,
        }
    }

    /// What stands there.
    pub fn found(&self) -> String {
        match self {
            Self::Missing { .. } => "no unit".to_owned(),
            Self::TooLong { found, .. } => format!("a unit of {found} bytes"),
            Self::BadExponent { text, .. } => format!("the exponent {}", quoted(text)),
            Self::Unknown { text, .. }
            | Self::AmbiguousSolidus { text, .. }
            | Self::Unexpected { text, .. } => quoted(text),
            Self::SeveralMeanings { word, .. } => quoted(word),
            Self::ReadingInCompound { symbol, .. } | Self::FractionInCompound { symbol, .. } => {
                format!("{} in a compound unit", quoted(symbol))
            }
            Self::Dimensions { from, .. } => format!("{from}, {}", from.dimension()),
            Self::Kinds { from, .. } => format!("{from}, {}", kind_words(from.kind())),
        }
    }

    /// What should stand there.
    pub fn expected(&self) -> String {
        match self {
            Self::Missing { .. } => "a unit such as kJ/mol",
            Self::TooLong { limit, .. } => return format!("at most {limit} bytes"),
            Self::Unknown { .. } => "a known unit",
            Self::SeveralMeanings { .. } => "a unit with one meaning",
            Self::AmbiguousSolidus { .. } => "one solidus, with one factor or brackets after it",
            Self::ReadingInCompound { .. } => "a temperature difference",
            Self::FractionInCompound { .. } => "a unit that can be multiplied",
            Self::BadExponent { .. } => "a whole number from -9 to 9, not 0",
            Self::Unexpected { .. } => "unit symbols, one solidus, brackets after it",
            Self::Dimensions { to, .. } => return format!("{to}, {}", to.dimension()),
            Self::Kinds { to, .. } => return format!("{to}, {}", kind_words(to.kind())),
        }
        .to_owned()
    }

    /// What to do about it.
    pub fn advice(&self) -> String {
        match self {
            Self::Missing { .. } => {
                "write the unit after the value, with a space between".to_owned()
            }
            Self::TooLong { .. } => "leave only the unit there".to_owned(),
            Self::Unknown { nearest, .. } => match nearest {
                Some(nearest) => format!("did you mean {nearest}?"),
                None => "use SI units, or Btu_IT, lb, ft, °F and the like".to_owned(),
            },
            Self::SeveralMeanings { choices, .. } => format!("write {choices}"),
            Self::AmbiguousSolidus { spelling, .. } => format!("write {spelling}"),
            Self::ReadingInCompound { difference, .. } => format!("use K or {difference}"),
            Self::FractionInCompound { .. } => "use a quotient such as kg/kg or mol/mol".to_owned(),
            Self::BadExponent { .. } => "write mol^-1, m3 or s⁻²".to_owned(),
            Self::Unexpected { .. } => "write units as in kJ/(kg K) or kJ mol^-1".to_owned(),
            Self::Dimensions { to, .. } => {
                format!("give the value in a unit of {}", to.dimension())
            }
            Self::Kinds { from, .. } => kind_advice(from.kind()).to_owned(),
        }
    }

    /// The same fault in a longer text, in which the unit begins at byte `by`.
    pub(super) fn shifted(mut self, by: usize) -> Self {
        match &mut self {
            Self::Missing { span }
            | Self::TooLong { span, .. }
            | Self::Unknown { span, .. }
            | Self::SeveralMeanings { span, .. }
            | Self::AmbiguousSolidus { span, .. }
            | Self::ReadingInCompound { span, .. }
            | Self::FractionInCompound { span, .. }
            | Self::BadExponent { span, .. }
            | Self::Unexpected { span, .. } => *span = span.start + by..span.end + by,
            Self::Dimensions { .. } | Self::Kinds { .. } => {}
        }
        self
    }
}

explained_error!(UnitError);

fn kind_words(kind: UnitKind) -> &'static str {
    match kind {
        UnitKind::Plain => "a plain unit",
        UnitKind::Reading => "a reading",
        UnitKind::Difference => "a temperature difference",
        UnitKind::Fraction(basis) => basis.words(),
    }
}

fn kind_advice(kind: UnitKind) -> &'static str {
    match kind {
        UnitKind::Fraction(_) => "give the fraction on the basis that is asked for",
        _ => "give a temperature in K, °C or °F, and a difference in K, Δ°C or Δ°F",
    }
}
