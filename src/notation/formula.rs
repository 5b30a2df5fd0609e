//! Chemical formulas: what they are made of, their charge, and how they are written.
//!
//! A formula keeps its structure as written. Reading one is left to `formula_parse`;
//! which substance it means (isomers, phases) is left to species and to the caller.

use std::collections::BTreeMap;
use std::fmt;

use num_rational::BigRational;

use super::element::Element;
use super::error::NotationError;
use super::formula_tree::{Item, Part, Unit, add_counts, count_text, sign_is_ambiguous_after};
use super::piece::{Piece, push_text};

/// A chemical formula with its charge, such as `Ca(OH)2`, `[Fe(CN)6]^4-`,
/// `CuSO4·5H2O`, `Fe0.947O` or the electron `e-`.
///
/// Two formulas are equal if they are built alike; [`Formula::hill`] compares what they
/// consist of.
#[derive(Clone, Debug, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub struct Formula {
    parts: Vec<Part>,
    charge: i32,
    counts: BTreeMap<Element, BigRational>,
}

impl Formula {
    /// Reads a formula.
    ///
    /// Subscripts and superscripts may be Unicode characters (`SO₄²⁻`). A charge number
    /// follows `^`; a sign alone is a charge of one. `·` joins the parts of an addition
    /// compound.
    ///
    /// # Errors
    /// The first fault, among them notation that can be read in two ways (`Fe3+`).
    pub fn parse(text: &str) -> Result<Self, NotationError> {
        super::formula_parse::parse(text)
    }

    pub(super) fn new(parts: Vec<Part>, charge: i32) -> Self {
        let mut counts = BTreeMap::new();
        for part in &parts {
            add_counts(&mut counts, &part.items, &part.multiplier);
        }
        Self {
            parts,
            charge,
            counts,
        }
    }

    pub(super) fn electron() -> Self {
        Self::new(Vec::new(), -1)
    }

    /// Whether this is the electron, `e-`.
    pub fn is_electron(&self) -> bool {
        self.parts.is_empty()
    }

    /// Whether this is an addition compound, written with `·`.
    pub(super) fn has_parts(&self) -> bool {
        self.parts.len() > 1
    }

    /// How many atoms of each element the formula has, D and T apart from H.
    pub fn counts(&self) -> &BTreeMap<Element, BigRational> {
        &self.counts
    }

    /// The charge number: -2 for `SO4^2-`.
    pub fn charge(&self) -> i32 {
        self.charge
    }

    /// The composition in the order of the Hill system, with the charge: equal for
    /// formulas of the same composition and charge. `CaH2O2` for `Ca(OH)2`.
    pub fn hill(&self) -> String {
        let with_carbon = self.counts.keys().any(|element| element.symbol() == "C");
        let mut counts: Vec<_> = self.counts.iter().collect();
        counts.sort_by(|(a, _), (b, _)| a.hill_cmp(**b, with_carbon));
        let mut key = if self.is_electron() { "e" } else { "" }.to_owned();
        for (element, count) in counts {
            key.push_str(element.symbol());
            key.push_str(&count_text(count));
        }
        match charge_text(self.charge, '-') {
            Some(charge) => format!("{key}^{charge}"),
            None => key,
        }
    }

    /// The formula for typesetting: counts as subscripts, the charge as a superscript.
    pub fn pieces(&self) -> Vec<Piece> {
        let mut pieces = Vec::new();
        self.write_body(&mut |script, text| match script {
            Place::Line => push_text(&mut pieces, text),
            Place::Below => pieces.push(Piece::Sub(text.to_owned())),
        });
        pieces.extend(charge_text(self.charge, '\u{2212}').map(Piece::Sup));
        pieces
    }

    /// Writes all but the charge.
    fn write_body(&self, sink: &mut dyn FnMut(Place, &str)) {
        if self.is_electron() {
            sink(Place::Line, "e");
        }
        for (index, part) in self.parts.iter().enumerate() {
            if index > 0 {
                sink(Place::Line, "·");
            }
            sink(Place::Line, &count_text(&part.multiplier));
            write_items(&part.items, sink);
        }
    }

    /// Whether a charge of one needs `^` to be told from a count and a charge number.
    fn needs_caret(&self) -> bool {
        let last = self.parts.last();
        last.is_some_and(|part| sign_is_ambiguous_after(&part.items))
    }
}

/// Where a run of characters stands.
#[derive(Clone, Copy)]
enum Place {
    Line,
    Below,
}

fn write_items(items: &[Item], sink: &mut dyn FnMut(Place, &str)) {
    for item in items {
        match &item.unit {
            Unit::Element(element) => sink(Place::Line, element.symbol()),
            Unit::Group(bracket, inner) => {
                sink(Place::Line, bracket.open().encode_utf8(&mut [0; 4]));
                write_items(inner, sink);
                sink(Place::Line, bracket.close().encode_utf8(&mut [0; 4]));
            }
        }
        let count = count_text(&item.count);
        if !count.is_empty() {
            sink(Place::Below, &count);
        }
    }
}

/// `2-`, `+`, or nothing where there is no charge.
fn charge_text(charge: i32, minus: char) -> Option<String> {
    let sign = if charge < 0 { minus } else { '+' };
    match charge.unsigned_abs() {
        0 => None,
        1 => Some(sign.to_string()),
        number => Some(format!("{number}{sign}")),
    }
}

impl fmt::Display for Formula {
    /// The canonical plain text: reading it gives an equal formula.
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        let mut text = String::new();
        self.write_body(&mut |_, run| text.push_str(run));
        let caret = match self.charge.unsigned_abs() {
            1 if !self.needs_caret() => "",
            _ => "^",
        };
        match charge_text(self.charge, '-') {
            Some(charge) => write!(f, "{text}{caret}{charge}"),
            None => f.write_str(&text),
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn formula(text: &str) -> Formula {
        Formula::parse(text).unwrap()
    }

    #[test]
    fn hill_keys_follow_composition_not_structure() {
        for (text, key) in [
            ("C6H5NO2", "C6H5NO2"),
            ("Ca(OH)2", "CaH2O2"),
            ("CaO2H2", "CaH2O2"),
            ("CH3COOH", "C2H4O2"),
            ("CuSO4·5H2O", "CuH10O9S"),
            ("SO4^2-", "O4S^2-"),
            ("Na+", "Na^+"),
            ("D2O", "D2O"),
            ("CHD3", "CHD3"),
            ("Fe0.947O", "Fe0.947O"),
            ("CaSO4·1/3H2O", "CaH2/3O13/3S"),
            ("e-", "e^-"),
        ] {
            assert_eq!(formula(text).hill(), key, "{text}");
        }
    }

    #[test]
    fn counts_run_through_brackets_and_multipliers() {
        let alum = formula("KAl(SO4)2·12H2O");
        let count = |symbol| alum.counts()[&Element::from_symbol(symbol).unwrap()].to_integer();
        assert_eq!(count("O"), 20.into());
        assert_eq!(count("H"), 24.into());
        assert_eq!(count("S"), 2.into());
        assert_eq!(alum.counts().len(), 5);
    }

    #[test]
    fn pieces_carry_scripts_and_a_true_minus() {
        let text = |text: &str| Piece::Text(text.into());
        let sub = |text: &str| Piece::Sub(text.into());
        let sup = |text: &str| Piece::Sup(text.into());
        assert_eq!(
            formula("[Fe(CN)6]^4-").pieces(),
            [text("[Fe(CN)"), sub("6"), text("]"), sup("4\u{2212}")]
        );
        assert_eq!(
            formula("CuSO4·5H2O").pieces(),
            [text("CuSO"), sub("4"), text("·5H"), sub("2"), text("O")]
        );
        assert_eq!(formula("Na+").pieces(), [text("Na"), sup("+")]);
        assert_eq!(formula("e-").pieces(), [text("e"), sup("\u{2212}")]);
    }

    #[test]
    fn structure_decides_equality() {
        assert_ne!(formula("Ca(OH)2"), formula("CaO2H2"));
        assert_eq!(formula("H₂O"), formula("H2O"));
        assert_eq!(formula("Na1Cl1"), formula("NaCl"));
    }
}
