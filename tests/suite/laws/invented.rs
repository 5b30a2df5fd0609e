//! Invented substances with invented values, and balanced reactions among them.

use std::collections::BTreeMap;

use hesswright::quantity::{Exact, exact_text};
use num_traits::{Signed, Zero};
use proptest::prelude::*;

use super::support::Files;

/// The name under which cases consult the invented source.
pub const SOURCE: &str = "invented.toml";

/// A compound of carbon, hydrogen and oxygen with its printed formation enthalpy.
#[derive(Clone, Debug)]
pub struct Compound {
    pub atoms: [u32; 3],
    pub enthalpy: String,
}

impl Compound {
    pub fn species(&self) -> String {
        let part = |(symbol, count): (&str, u32)| match count {
            0 => String::new(),
            1 => symbol.to_string(),
            more => format!("{symbol}{more}"),
        };
        let parts = ["C", "H", "O"].into_iter().zip(self.atoms);
        format!("{}(l)", parts.map(part).collect::<String>())
    }
}

/// How many compounds an invented source has.
pub const COMPOUNDS: usize = 5;

/// An enthalpy as tables print it: some with an uncertainty, some without.
fn enthalpy() -> impl Strategy<Value = String> {
    let number = (-999_999i64..999_999, 0usize..4).prop_map(|(digits, places)| {
        let size = format!("{:0width$}", digits.abs(), width = places + 1);
        let (whole, rest) = size.split_at(size.len() - places);
        let sign = if digits < 0 { "-" } else { "" };
        let point = if places == 0 { "" } else { "." };
        format!("{sign}{whole}{point}{rest}")
    });
    let uncertainty = prop_oneof![
        Just(String::new()),
        (1u32..500).prop_map(|u| format!(" ± {}.{:02}", u / 100, u % 100)),
    ];
    (number, uncertainty).prop_map(|(number, uncertainty)| number + &uncertainty)
}

/// Compounds of different formulas; none has the composition of an element.
pub fn compounds() -> impl Strategy<Value = Vec<Compound>> {
    let one = |carbons: u32| {
        (1u32..9, 0u32..5, enthalpy()).prop_map(move |(hydrogens, oxygens, enthalpy)| Compound {
            atoms: [carbons, hydrogens, oxygens],
            enthalpy,
        })
    };
    (1..=COMPOUNDS as u32).map(one).collect::<Vec<_>>()
}

/// The source file of some compounds.
pub fn source(compounds: &[Compound]) -> String {
    let mut text = String::from(
        "[source]\nid = \"invented\"\ntitle = \"Invented data\"\ntemperature = \"298.15 K\"\n\
         pressure = \"1 bar\"\nenergy-unit = \"kJ/mol\"\ncoverage = \"2\"\n",
    );
    for (row, compound) in compounds.iter().enumerate() {
        text += &format!(
            "\n[[entry]]\nsubstance = \"{}\"\nlocator = \"row {row}\"\nformation-enthalpy = \"{}\"\n",
            compound.species(),
            compound.enthalpy
        );
    }
    text
}

pub fn files(compounds: &[Compound]) -> Files {
    Files::of(&[(SOURCE, &source(compounds))])
}

/// Stoichiometric numbers of the compounds; the elements that balance them are not listed.
pub type Numbers = Vec<Exact>;

pub fn ratio(numerator: i64, denominator: i64) -> Exact {
    Exact::new(numerator.into(), denominator.into())
}

/// A positive rational such as people write as a coefficient.
pub fn positive() -> impl Strategy<Value = Exact> {
    (1i64..40, 1i64..12).prop_map(|(n, d)| ratio(n, d))
}

/// Stoichiometric numbers of which at least one is not zero.
pub fn numbers() -> impl Strategy<Value = Numbers> {
    let one = prop_oneof![
        1 => Just(ratio(0, 1)),
        3 => (-9i64..10, 1i64..5).prop_map(|(n, d)| ratio(n, d)),
    ];
    let several = prop::collection::vec(one, COMPOUNDS);
    several.prop_filter("nothing reacts", |all| all.iter().any(|nu| !nu.is_zero()))
}

/// The reaction as species with stoichiometric numbers, balanced by the elements.
pub fn balanced(compounds: &[Compound], numbers: &[Exact]) -> Vec<(String, Exact)> {
    let mut terms: Vec<(String, Exact)> = Vec::new();
    let elements = [("C(cr, graphite)", 1), ("H2(g)", 2), ("O2(g)", 2)];
    for (compound, nu) in compounds.iter().zip(numbers) {
        terms.push((compound.species(), nu.clone()));
    }
    for (position, (element, atoms)) in elements.into_iter().enumerate() {
        let counts = compounds.iter().zip(numbers);
        let sum: Exact = counts
            .map(|(c, nu)| nu * ratio(c.atoms[position].into(), 1))
            .sum();
        terms.push((element.to_string(), -sum / ratio(atoms, 1)));
    }
    terms.retain(|(_, nu)| !nu.is_zero());
    terms
}

/// An equation in the order of the terms.
pub fn equation(terms: &[(String, Exact)]) -> String {
    let side = |negative: bool| {
        let own = terms.iter().filter(|(_, nu)| nu.is_negative() == negative);
        let texts = own.map(|(species, nu)| format!("{} {species}", coefficient(&nu.abs())));
        texts.collect::<Vec<_>>().join(" + ")
    };
    format!("{} -> {}", side(true), side(false))
}

/// A fraction: not every coefficient is a decimal.
fn coefficient(nu: &Exact) -> String {
    match nu.is_integer() {
        true => exact_text(nu),
        false => format!("{}/{}", nu.numer(), nu.denom()),
    }
}

/// The heat by the definition of a formation enthalpy, from the texts alone.
pub fn expected(compounds: &[Compound], numbers: &[Exact]) -> Exact {
    let parts = compounds.iter().zip(numbers).map(|(compound, nu)| {
        let text = compound.enthalpy.split(' ').next().unwrap_or_default();
        nu * decimal(text)
    });
    parts.sum()
}

/// A plain decimal read without the program.
fn decimal(text: &str) -> Exact {
    let places = text.split_once('.').map_or(0, |(_, rest)| rest.len());
    let digits: i64 = text.replace('.', "").parse().expect("a generated decimal");
    ratio(digits, 10i64.pow(places as u32))
}

/// The standard uncertainty by JCGM 100:2008 equation 10, from the texts alone; none where no
/// compound that takes part states one.
pub fn expected_uncertainty(compounds: &[Compound], numbers: &[Exact]) -> Option<f64> {
    let mut squares = BTreeMap::new();
    for (row, (compound, nu)) in compounds.iter().zip(numbers).enumerate() {
        let stated = compound.enthalpy.split_once(" ± ");
        if let (Some((_, half_width)), false) = (stated, nu.is_zero()) {
            // Coverage 2.
            let product = nu * decimal(half_width) / ratio(2, 1);
            squares.insert(row, &product * &product);
        }
    }
    let sum: Exact = squares.values().cloned().sum();
    (!squares.is_empty()).then(|| libm::sqrt(hesswright::quantity::to_f64(&sum)))
}
