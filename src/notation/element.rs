//! The chemical elements: symbols, English names, atomic numbers.
//!
//! Deuterium and tritium have symbols of their own and balance apart from hydrogen.
//! Atomic masses are left to others.

use std::cmp::Ordering;
use std::fmt;

/// A chemical element, or one of the hydrogen isotopes `D` and `T`.
///
/// Ordered by atomic number, with H before D before T.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub struct Element(u8);

/// Places of hydrogen-2 and hydrogen-3 in the table: they shift what follows them.
const ISOTOPES: u8 = 2;

/// Symbols and IUPAC names by atomic number, from memory; D and T stand after H.
const TABLE: [(&str, &str); 120] = [
    ("H", "hydrogen"),
    ("D", "deuterium"),
    ("T", "tritium"),
    ("He", "helium"),
    ("Li", "lithium"),
    ("Be", "beryllium"),
    ("B", "boron"),
    ("C", "carbon"),
    ("N", "nitrogen"),
    ("O", "oxygen"),
    ("F", "fluorine"),
    ("Ne", "neon"),
    ("Na", "sodium"),
    ("Mg", "magnesium"),
    ("Al", "aluminium"),
    ("Si", "silicon"),
    ("P", "phosphorus"),
    ("S", "sulfur"),
    ("Cl", "chlorine"),
    ("Ar", "argon"),
    ("K", "potassium"),
    ("Ca", "calcium"),
    ("Sc", "scandium"),
    ("Ti", "titanium"),
    ("V", "vanadium"),
    ("Cr", "chromium"),
    ("Mn", "manganese"),
    ("Fe", "iron"),
    ("Co", "cobalt"),
    ("Ni", "nickel"),
    ("Cu", "copper"),
    ("Zn", "zinc"),
    ("Ga", "gallium"),
    ("Ge", "germanium"),
    ("As", "arsenic"),
    ("Se", "selenium"),
    ("Br", "bromine"),
    ("Kr", "krypton"),
    ("Rb", "rubidium"),
    ("Sr", "strontium"),
    ("Y", "yttrium"),
    ("Zr", "zirconium"),
    ("Nb", "niobium"),
    ("Mo", "molybdenum"),
    ("Tc", "technetium"),
    ("Ru", "ruthenium"),
    ("Rh", "rhodium"),
    ("Pd", "palladium"),
    ("Ag", "silver"),
    ("Cd", "cadmium"),
    ("In", "indium"),
    ("Sn", "tin"),
    ("Sb", "antimony"),
    ("Te", "tellurium"),
    ("I", "iodine"),
    ("Xe", "xenon"),
    ("Cs", "caesium"),
    ("Ba", "barium"),
    ("La", "lanthanum"),
    ("Ce", "cerium"),
    ("Pr", "praseodymium"),
    ("Nd", "neodymium"),
    ("Pm", "promethium"),
    ("Sm", "samarium"),
    ("Eu", "europium"),
    ("Gd", "gadolinium"),
    ("Tb", "terbium"),
    ("Dy", "dysprosium"),
    ("Ho", "holmium"),
    ("Er", "erbium"),
    ("Tm", "thulium"),
    ("Yb", "ytterbium"),
    ("Lu", "lutetium"),
    ("Hf", "hafnium"),
    ("Ta", "tantalum"),
    ("W", "tungsten"),
    ("Re", "rhenium"),
    ("Os", "osmium"),
    ("Ir", "iridium"),
    ("Pt", "platinum"),
    ("Au", "gold"),
    ("Hg", "mercury"),
    ("Tl", "thallium"),
    ("Pb", "lead"),
    ("Bi", "bismuth"),
    ("Po", "polonium"),
    ("At", "astatine"),
    ("Rn", "radon"),
    ("Fr", "francium"),
    ("Ra", "radium"),
    ("Ac", "actinium"),
    ("Th", "thorium"),
    ("Pa", "protactinium"),
    ("U", "uranium"),
    ("Np", "neptunium"),
    ("Pu", "plutonium"),
    ("Am", "americium"),
    ("Cm", "curium"),
    ("Bk", "berkelium"),
    ("Cf", "californium"),
    ("Es", "einsteinium"),
    ("Fm", "fermium"),
    ("Md", "mendelevium"),
    ("No", "nobelium"),
    ("Lr", "lawrencium"),
    ("Rf", "rutherfordium"),
    ("Db", "dubnium"),
    ("Sg", "seaborgium"),
    ("Bh", "bohrium"),
    ("Hs", "hassium"),
    ("Mt", "meitnerium"),
    ("Ds", "darmstadtium"),
    ("Rg", "roentgenium"),
    ("Cn", "copernicium"),
    ("Nh", "nihonium"),
    ("Fl", "flerovium"),
    ("Mc", "moscovium"),
    ("Lv", "livermorium"),
    ("Ts", "tennessine"),
    ("Og", "oganesson"),
];

impl Element {
    /// The element with exactly this symbol (`Na`, not `NA`), or `None`.
    pub fn from_symbol(symbol: &str) -> Option<Self> {
        let row = TABLE.iter().position(|(known, _)| *known == symbol)?;
        u8::try_from(row).ok().map(Self)
    }

    /// Every element in order of atomic number.
    pub fn all() -> impl Iterator<Item = Self> {
        (0u8..).take(TABLE.len()).map(Self)
    }

    /// The symbol, such as `Na`.
    pub fn symbol(self) -> &'static str {
        TABLE[usize::from(self.0)].0
    }

    /// The English name, such as `sodium`.
    pub fn name(self) -> &'static str {
        TABLE[usize::from(self.0)].1
    }

    /// The number of protons: 1 for H, D and T.
    pub fn atomic_number(self) -> u8 {
        match self.0 {
            row if row <= ISOTOPES => 1,
            row => row + 1 - ISOTOPES,
        }
    }

    /// The order of the Hill system (E. A. Hill, J. Am. Chem. Soc. 22 (1900) 478, from
    /// memory): alphabetical by symbol; where the formula has carbon, C and then H come
    /// first. D and T stand in the alphabetical part.
    pub fn hill_cmp(self, other: Self, with_carbon: bool) -> Ordering {
        self.hill_rank(with_carbon)
            .cmp(&other.hill_rank(with_carbon))
    }

    fn hill_rank(self, with_carbon: bool) -> (u8, &'static str) {
        let group = match self.symbol() {
            "C" if with_carbon => 0,
            "H" if with_carbon => 1,
            _ => 2,
        };
        (group, self.symbol())
    }
}

impl fmt::Display for Element {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.write_str(self.symbol())
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn element(symbol: &str) -> Element {
        Element::from_symbol(symbol).unwrap()
    }

    /// Atomic numbers from the IUPAC periodic table, from memory.
    #[test]
    fn atomic_numbers_hold_along_the_table() {
        let known = [
            ("H", 1),
            ("D", 1),
            ("T", 1),
            ("He", 2),
            ("Ne", 10),
            ("Ca", 20),
            ("Zn", 30),
            ("Zr", 40),
            ("Sn", 50),
            ("Nd", 60),
            ("Yb", 70),
            ("Hg", 80),
            ("Th", 90),
            ("Fm", 100),
            ("Ds", 110),
            ("Og", 118),
        ];
        for (symbol, number) in known {
            assert_eq!(element(symbol).atomic_number(), number, "{symbol}");
        }
    }

    #[test]
    fn every_symbol_finds_its_own_element_and_no_other() {
        assert_eq!(Element::all().count(), 120);
        for element in Element::all() {
            assert_eq!(Element::from_symbol(element.symbol()), Some(element));
        }
        for wrong in ["", "h", "NA", "na", "J", "Hydrogen", "Uuo"] {
            assert_eq!(Element::from_symbol(wrong), None, "{wrong}");
        }
    }

    #[test]
    fn names_follow_iupac_spelling() {
        assert_eq!(element("Al").name(), "aluminium");
        assert_eq!(element("S").name(), "sulfur");
        assert_eq!(element("Cs").name(), "caesium");
        assert_eq!(element("Og").name(), "oganesson");
    }

    #[test]
    fn hill_order_puts_carbon_and_hydrogen_first_only_beside_carbon() {
        let order = |with_carbon| {
            let mut elements = ["O", "H", "Cl", "C", "D", "Br"].map(element);
            elements.sort_by(|a, b| a.hill_cmp(*b, with_carbon));
            elements.map(Element::symbol).join(" ")
        };
        assert_eq!(order(true), "C H Br Cl D O");
        assert_eq!(order(false), "Br C Cl D H O");
    }
}
