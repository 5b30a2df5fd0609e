//! The combustion equation of a component of a fuel: what it takes of oxygen and what it becomes.
//!
//! Leaves to others: heats, and whether the products are known to the sources.

use num_traits::{One, Zero};

use crate::notation::{Element, Species};
use crate::quantity::Exact;

/// One mole of a component burnt with oxygen to gaseous carbon dioxide, liquid water, nitrogen and
/// sulfur dioxide, all in their standard states: the products of the gross heating value
/// (ISO 6976:2016, clause 3, from memory; SO2 as there, where bomb calorimetry of solid fuels
/// refers to sulfuric acid).
#[derive(Clone, Debug, PartialEq)]
pub struct Combustion {
    /// Stoichiometric numbers: the component first, with -1, then oxygen, then the products.
    /// What stands on both sides is cancelled; empty where nothing burns or condenses.
    pub terms: Vec<(Exact, Species)>,
    /// Atoms of hydrogen in the component.
    pub hydrogen: Exact,
}

/// The element, atoms of it in one mole of the product, oxygen in it, and the product.
const PRODUCTS: [(&str, i64, i64, &str); 4] = [
    ("C", 1, 2, "CO2(g)"),
    ("H", 2, 1, "H2O(l)"),
    ("N", 2, 0, "N2(g)"),
    ("S", 1, 2, "SO2(g)"),
];

/// Elements that stay as they are.
const NOBLE: [&str; 6] = ["He", "Ne", "Ar", "Kr", "Xe", "Rn"];

impl Combustion {
    /// The combustion of a species.
    ///
    /// # Errors
    /// The elements whose product the method does not fix.
    pub fn of(species: &Species) -> Result<Combustion, Vec<Element>> {
        let counts = species.formula.counts();
        let known = |element: &&Element| {
            let symbol = element.symbol();
            symbol == "O" || NOBLE.contains(&symbol) || PRODUCTS.iter().any(|p| p.0 == symbol)
        };
        let others: Vec<Element> = counts.keys().filter(|e| !known(e)).copied().collect();
        if !others.is_empty() {
            return Err(others);
        }
        let count = |symbol: &str| {
            let found = counts
                .iter()
                .find(|(element, _)| element.symbol() == symbol);
            found.map_or_else(Exact::zero, |(_, count)| count.clone())
        };
        let mut products = Vec::new();
        let mut oxygen = -count("O");
        for (symbol, atoms, oxygens, product) in PRODUCTS {
            let number = count(symbol) / whole(atoms);
            oxygen += &number * whole(oxygens);
            products.push((number, product.to_string()));
        }
        for symbol in NOBLE {
            products.push((count(symbol), format!("{symbol}(g)")));
        }
        let mut terms = vec![(-Exact::one(), species.clone())];
        add(&mut terms, -oxygen / whole(2), "O2(g)");
        for (number, product) in products {
            add(&mut terms, number, &product);
        }
        terms.retain(|(number, _)| !number.is_zero());
        Ok(Combustion {
            terms,
            hydrogen: count("H"),
        })
    }

    /// Whether it gives off no heat because nothing changes.
    pub fn is_nothing(&self) -> bool {
        self.terms.is_empty()
    }

    /// Gas formed less gas consumed, mol per mole of the component, the water formed being liquid.
    pub fn gas_change(&self) -> Exact {
        let gas = |(_, species): &&(Exact, Species)| {
            let phase = species.phase.as_ref();
            phase.is_some_and(|phase| phase.label == crate::notation::PhaseLabel::Gas)
        };
        self.terms
            .iter()
            .filter(gas)
            .map(|(number, _)| number)
            .sum()
    }
}

fn whole(number: i64) -> Exact {
    Exact::from_integer(number.into())
}

/// Adds to the term of the same species, which can be the component itself.
fn add(terms: &mut Vec<(Exact, Species)>, number: Exact, product: &str) {
    // The products above are species.
    let Ok(species) = Species::parse(product) else {
        return;
    };
    match terms.iter_mut().find(|(_, other)| *other == species) {
        Some((sum, _)) => *sum += number,
        None => terms.push((number, species)),
    }
}

/// What the products would be of an element that heating values are not worked for (common
/// practice in combustion calorimetry, no source).
pub fn would_be(element: Element) -> &'static str {
    match element.symbol() {
        "F" => "hydrogen fluoride in water, and carbon tetrafluoride",
        "Cl" => "hydrogen chloride in water, and chlorine",
        "Br" => "bromine, and hydrogen bromide in water",
        "I" => "iodine",
        "P" => "phosphoric acid in water, or phosphorus(V) oxide",
        "Si" => "silicon dioxide, amorphous",
        "B" => "boric acid, or boron oxide",
        "D" | "T" => "water of that isotope",
        _ => "an oxide, a carbonate or a sulfate",
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn shown(text: &str) -> String {
        let species = Species::parse(text).expect("a species");
        let combustion = Combustion::of(&species).expect("known products");
        let terms = combustion.terms.iter();
        let terms: Vec<String> = terms.map(|(n, s)| format!("{n} {s}")).collect();
        terms.join(", ")
    }

    #[test]
    fn combustion_equations_balance() {
        // By hand from the formulas.
        assert_eq!(shown("CH4(g)"), "-1 CH4(g), -2 O2(g), 1 CO2(g), 2 H2O(l)");
        assert_eq!(
            shown("NH3(g)"),
            "-1 NH3(g), -3/4 O2(g), 3/2 H2O(l), 1/2 N2(g)"
        );
        assert_eq!(
            shown("CH4O(l)"),
            "-1 CH3OH(l), -3/2 O2(g), 1 CO2(g), 2 H2O(l)".replace("CH3OH", "CH4O")
        );
        assert_eq!(shown("H2S(g)"), "-1 H2S(g), -3/2 O2(g), 1 H2O(l), 1 SO2(g)");
        assert_eq!(shown("H2O(g)"), "-1 H2O(g), 1 H2O(l)");
    }

    #[test]
    fn what_does_not_burn_leaves_nothing() {
        for text in [
            "N2(g)", "CO2(g)", "O2(g)", "Ar(g)", "He(g)", "H2O(l)", "SO2(g)",
        ] {
            assert_eq!(shown(text), "", "{text}");
        }
    }

    #[test]
    fn gas_is_counted() {
        let change = |text: &str| {
            let species = Species::parse(text).expect("a species");
            Combustion::of(&species)
                .expect("known products")
                .gas_change()
        };
        assert_eq!(change("CH4(g)"), whole(-2));
        assert_eq!(change("C(cr, graphite)"), whole(0));
        assert_eq!(change("H2O(g)"), whole(-1));
    }

    #[test]
    fn other_elements_are_named() {
        let species = Species::parse("CHCl3(l)").expect("a species");
        let others = Combustion::of(&species).expect_err("chlorine");
        assert_eq!(
            others.iter().map(|e| e.symbol()).collect::<Vec<_>>(),
            ["Cl"]
        );
    }
}
