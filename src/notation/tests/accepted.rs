//! What is accepted, with its canonical form.

use crate::notation::{Element, Equation, Formula};

/// Formulas with their canonical text.
const FORMULAS: [(&str, &str); 34] = [
    // Examples of the IUPAC Red Book (2005), chapter IR-4, from memory.
    ("K4[Fe(CN)6]", "K4[Fe(CN)6]"),
    ("[Co(NH3)6]Cl3", "[Co(NH3)6]Cl3"),
    ("[PtCl2(NH3)2]", "[PtCl2(NH3)2]"),
    ("[Al(OH2)6]^3+", "[Al(OH2)6]^3+"),
    ("Na2CO3·10H2O", "Na2CO3·10H2O"),
    ("Al2(SO4)3·K2SO4·24H2O", "Al2(SO4)3·K2SO4·24H2O"),
    ("CaCl2·8NH3", "CaCl2·8NH3"),
    ("BF3·2H2O", "BF3·2H2O"),
    ("Hg2^2+", "Hg2^2+"),
    ("N3^-", "N3^-"),
    // Unicode spellings.
    ("H₂O", "H2O"),
    ("SO₄²⁻", "SO4^2-"),
    ("Fe³⁺", "Fe^3+"),
    ("I₃⁻", "I3^-"),
    ("I₃-", "I3^-"),
    ("Cl\u{2212}", "Cl-"),
    ("CuSO4•5H2O", "CuSO4·5H2O"),
    ("CuSO4⋅5H₂O", "CuSO4·5H2O"),
    // A charge of one.
    ("Na^+", "Na+"),
    ("Na^1+", "Na+"),
    ("NO3-", "NO3-"),
    ("NH4+", "NH4+"),
    ("H3O+", "H3O+"),
    ("HCO3-", "HCO3-"),
    ("(Fe3)+", "(Fe3)+"),
    ("Fe3^+", "Fe3^+"),
    ("C60-", "C60-"),
    // Counts and multipliers.
    ("CaSO4·0.5H2O", "CaSO4·0.5H2O"),
    ("CaSO4·1/2H2O", "CaSO4·0.5H2O"),
    ("Fe0.9470O", "Fe0.947O"),
    ("La1.85Sr0.15CuO4", "La1.85Sr0.15CuO4"),
    ("YBa2Cu3O6.5", "YBa2Cu3O6.5"),
    ("(O4.5)H2O", "(O4.5)H2O"),
    ("{[(CH3)2]2}2", "{[(CH3)2]2}2"),
];

#[test]
fn formulas_have_one_canonical_text() {
    for (text, canonical) in FORMULAS {
        let formula = Formula::parse(text).unwrap_or_else(|error| panic!("{text}: {error}"));
        assert_eq!(formula.to_string(), canonical, "{text}");
        assert_eq!(Formula::parse(canonical), Ok(formula), "{text}");
    }
}

#[test]
fn charges_are_read_with_their_sign() {
    for (text, charge) in [
        ("SO4^2-", -2),
        ("Fe^3+", 3),
        ("NO3-", -1),
        ("Na^12+", 12),
        ("[Fe(CN)6]^4-", -4),
        ("H2O", 0),
        ("e-", -1),
    ] {
        assert_eq!(Formula::parse(text).unwrap().charge(), charge, "{text}");
    }
}

#[test]
fn deuterium_is_no_hydrogen() {
    let formula = Formula::parse("HDO").unwrap();
    let symbols: Vec<_> = formula.counts().keys().map(|e| e.symbol()).collect();
    assert_eq!(symbols, ["H", "D", "O"]);
}

#[test]
fn every_element_is_read_alone_and_all_together() {
    let all: String = Element::all().map(Element::symbol).collect();
    assert_eq!(Formula::parse(&all).unwrap().counts().len(), 120);
}

#[test]
fn equations_have_one_canonical_text() {
    for (text, canonical) in [
        (
            "nitrobenzene + 3 H2(g) -> aniline + 2 H2O(l)",
            "nitrobenzene + 3 H2(g) -> aniline + 2 H2O(l)",
        ),
        ("2H2(g)+O2(g)→2H2O(l)", "2 H2(g) + O2(g) -> 2 H2O(l)"),
        ("CO(g) + 1/2 O2(g) = CO2(g)", "CO(g) + 1/2 O2(g) -> CO2(g)"),
        ("CO(g) + 0.5 O2(g) ⟶ CO2(g)", "CO(g) + 1/2 O2(g) -> CO2(g)"),
        (
            "Na+(aq)+Cl-(aq) = NaCl(cr, halite)",
            "Na+(aq) + Cl-(aq) -> NaCl(cr, halite)",
        ),
        (
            "Ca(OH)+(aq) + OH-(aq) -> Ca(OH)2(cr)",
            "Ca(OH)+(aq) + OH-(aq) -> Ca(OH)2(cr)",
        ),
        (
            "2(NH4)2SO4(cr)+(Fe3)+(aq) -> n-butane",
            "2 (NH4)2SO4(cr) + (Fe3)+(aq) -> n-butane",
        ),
        ("Cu^2+(aq) + 2e- -> Cu(cr)", "Cu^2+(aq) + 2 e- -> Cu(cr)"),
        ("e-->a", "e- -> a"),
        ("\ta +\n2.50 b = c\u{2003}", "a + 5/2 b -> c"),
    ] {
        let equation = Equation::parse(text).unwrap_or_else(|errors| panic!("{errors:?}"));
        assert_eq!(equation.to_string(), canonical);
    }
}

#[test]
fn terms_know_their_place_in_the_text() {
    let text = "  2 H2(g) +O2(g) → 2 H₂O(l) ";
    let equation = Equation::parse(text).unwrap();
    let terms = equation.left.iter().chain(&equation.right);
    let texts: Vec<_> = terms.map(|term| &text[term.span.clone()]).collect();
    assert_eq!(texts, ["2 H2(g)", "O2(g)", "2 H₂O(l)"]);
}
