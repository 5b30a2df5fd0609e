//! One entry of the file as it is printed: identity, enthalpy and the ranges of its function.

use super::columns::{field, range_count};
use super::names::Named;

/// One form of one substance, every number kept as the file prints it.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct GlennRecord {
    /// The file's own name, at most 18 characters: `AL2O3(a)`, `C2H4O,ethylen-o`.
    pub glenn_name: String,
    /// The species in this program's notation: `Al2O3(cr, alpha)`.
    pub species: String,
    /// English name, where one is established.
    pub name: Option<String>,
    /// CAS Registry Number, where one is established.
    pub cas: Option<String>,
    /// The file's own comment: where the data come from.
    pub comment: String,
    /// The six-character code of reference and date: `g 8/89`.
    pub reference_code: String,
    /// Line of `thermo.inp` at which the record begins, counted from 1.
    pub line: usize,
    /// Molar mass in g/mol.
    pub molar_mass: String,
    /// The enthalpy that the record states, with what it stands for.
    pub enthalpy: GlennEnthalpy,
    /// The ranges of the nine-coefficient function, by rising temperature.
    ///
    /// Ranges whose lower bound is not below their upper one (eleven of them, an oversight in
    /// the file) hold at no temperature and are left out.
    pub ranges: Vec<GlennRange>,
}

/// What the enthalpy in a record's heading stands for, in J/mol.
#[derive(Debug, Clone, PartialEq, Eq)]
pub enum GlennEnthalpy {
    /// The standard enthalpy of formation of this very form at 298.15 K.
    At298 {
        /// As printed.
        printed: String,
    },
    /// The enthalpy of this form at another temperature, on the scale on which the elements
    /// are zero at 298.15 K. Not an enthalpy of formation at 298.15 K.
    AtOther {
        /// Temperature in K, as printed.
        temperature: String,
        /// As printed.
        printed: String,
    },
    /// Repeats the value of the form that is stable at 298.15 K (for ice: the value at 0 K).
    /// It says nothing of this form, whose enthalpies come from its function alone.
    NotAt298 {
        /// As printed.
        printed: String,
    },
}

/// One range of the nine-coefficient function.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct GlennRange {
    /// Lower bound in K.
    pub low: String,
    /// Upper bound in K.
    pub high: String,
    /// a1 … a7, b1, b2, with the exponent written `e`.
    ///
    /// Cp/R = a1·T⁻² + a2·T⁻¹ + a3 + … + a7·T⁴ (NASA/TP-2002-211556).
    pub coefficients: [String; 9],
    /// H(298.15 K) − H(0 K) in J/mol.
    pub h_difference: String,
    /// Line of `thermo.inp` at which the range begins, counted from 1.
    pub line: usize,
}

impl GlennRecord {
    /// Reads the record that begins with `text`; `None` where the text is no whole record.
    pub(super) fn read(named: &Named, line: usize, text: &str) -> Option<Self> {
        let mut lines = text.lines();
        let (first, second) = (lines.next()?, lines.next()?);
        Some(GlennRecord {
            glenn_name: named.glenn_name.to_owned(),
            species: named.species.to_owned(),
            name: stated(named.name),
            cas: stated(named.cas),
            comment: field(first, 18, first.len()).to_owned(),
            reference_code: field(second, 3, 9).to_owned(),
            line,
            molar_mass: field(second, 52, 65).to_owned(),
            enthalpy: named.enthalpy(field(second, 65, 80)),
            ranges: ranges(line, text)?,
        })
    }
}

fn stated(cell: &str) -> Option<String> {
    (!cell.is_empty()).then(|| cell.to_owned())
}

/// The usable ranges of the record that begins with `text`, at this line of the file.
pub(super) fn ranges(line: usize, text: &str) -> Option<Vec<GlennRange>> {
    let mut lines = text.lines().skip(1);
    let count = range_count(lines.next()?)?;
    let mut ranges = Vec::with_capacity(count);
    for index in 0..count {
        let at = line + 2 + 3 * index;
        let range = GlennRange::read(at, [lines.next()?, lines.next()?, lines.next()?])?;
        if range.holds_somewhere() {
            ranges.push(range);
        }
    }
    Some(ranges)
}

impl GlennRange {
    fn read(line: usize, [bounds, first, second]: [&str; 3]) -> Option<Self> {
        let coefficient = |text, from| {
            let printed = field(text, from, from + 16);
            (!printed.is_empty()).then(|| printed.replace('D', "e"))
        };
        Some(GlennRange {
            low: field(bounds, 0, 11).to_owned(),
            high: field(bounds, 11, 22).to_owned(),
            coefficients: [
                coefficient(first, 0)?,
                coefficient(first, 16)?,
                coefficient(first, 32)?,
                coefficient(first, 48)?,
                coefficient(first, 64)?,
                coefficient(second, 0)?,
                coefficient(second, 16)?,
                coefficient(second, 48)?,
                coefficient(second, 64)?,
            ],
            h_difference: field(bounds, 65, 80).to_owned(),
            line,
        })
    }

    fn holds_somewhere(&self) -> bool {
        match (self.low.parse::<f64>(), self.high.parse::<f64>()) {
            (Ok(low), Ok(high)) => low < high,
            _ => false,
        }
    }
}
