//! What is refused, where the fault is said to be, and the exact text.

use crate::notation::{Equation, Formula, NotationError};

fn formula_fault(text: &str) -> NotationError {
    match Formula::parse(text) {
        Ok(formula) => panic!("{text} was read as {formula}"),
        Err(error) => error,
    }
}

fn equation_faults(text: &str) -> Vec<NotationError> {
    match Equation::parse(text) {
        Ok(equation) => panic!("{text} was read as {equation}"),
        Err(errors) => errors,
    }
}

#[test]
fn faults_of_formulas_say_what_to_do() {
    for (text, span, message) in [
        (
            "Fe3+",
            0..4,
            "found `Fe3+`, which can be read in two ways; expected `Fe^3+` (charge number) or \
             `Fe3^+` (count, then a single charge); write the one that is meant",
        ),
        (
            "SO42-",
            0..5,
            "found `SO42-`, which can be read in two ways; expected `SO4^2-` (charge number) or \
             `SO42^-` (count, then a single charge); write the one that is meant",
        ),
        (
            "SO4-2",
            3..5,
            "found the charge `-2`; expected the number and then the sign, after `^`; \
             write `SO4^2-` if that is meant",
        ),
        (
            "SO4^2",
            3..5,
            "found `^2` as a charge; expected a number and then a sign after `^`; \
             write it as in SO4^2- or Na+, or leave it out for a neutral formula",
        ),
        (
            "CuSO4.5H2O",
            4..7,
            "found the point in `O4.5` before more symbols; expected `O4·5` (an added part) or \
             `(O4.5)` (a decimal count); write the one that is meant",
        ),
        (
            "NaCl.2H2O",
            4..5,
            "found `.` within a formula; expected `·` between the parts of an addition \
             compound; write CuSO4·5H2O with a raised dot (U+00B7)",
        ),
        (
            "NACL",
            1..2,
            "found `A`, which is no element; expected the symbol of an element; \
             write `Na` if that is meant",
        ),
        (
            "C02",
            1..3,
            "found the count `02` with a zero before it; expected a number without leading \
             zeros; write the letter O if oxygen is meant",
        ),
        (
            "C0",
            1..2,
            "found a count of zero; expected a number above zero; \
             write the letter O if oxygen is meant, or leave the part out",
        ),
        (
            "Ca(OH]2",
            2..6,
            "found `(` closed by `]`; expected brackets in pairs of one kind; \
             correct one of them",
        ),
        (
            "H2O(l)",
            4..5,
            "found the phase `(l)` within a formula; expected a phase at the end of a species, \
             and none in a formula by itself; part participants by ` + `, or state the phase \
             apart from the formula",
        ),
        (
            "",
            0..0,
            "found no formula; expected a formula such as `H2O`; write one",
        ),
    ] {
        let error = formula_fault(text);
        assert_eq!(error.to_string(), message);
        assert_eq!(error.span, span, "{text}");
    }
}

#[test]
fn the_three_parts_stand_alone() {
    let error = formula_fault("Ca++");
    assert_eq!(error.found(), "the charge `++`");
    assert_eq!(error.expected(), "the number and then the sign, after `^`");
    assert_eq!(error.advice(), "write `Ca^2+` if that is meant");
}

#[test]
fn ambiguous_charges_offer_both_readings() {
    for (text, charged, counted) in [
        ("Ca2+", "`Ca^2+`", "`Ca2^+`"),
        ("I3-", "`I^3-`", "`I3^-`"),
        ("O2-", "`O^2-`", "`O2^-`"),
        ("[Fe(CN)6]4-", "`[Fe(CN)6]^4-`", "`[Fe(CN)6]4^-`"),
        ("Cr2O72-", "`Cr2O7^2-`", "`Cr2O72^-`"),
        ("UO22+", "`UO2^2+`", "`UO22^+`"),
    ] {
        let expected = formula_fault(text).expected();
        let readings =
            format!("{charged} (charge number) or {counted} (count, then a single charge)");
        assert_eq!(expected, readings);
        for reading in [charged, counted] {
            assert!(Formula::parse(reading.trim_matches('`')).is_ok());
        }
    }
}

#[test]
fn advised_spellings_are_accepted() {
    for (text, advised) in [
        ("Ca+2", "Ca^2+"),
        ("SO4^-2", "SO4^2-"),
        ("Ca++", "Ca^2+"),
        ("O--", "O^2-"),
        ("PO4---", "PO4^3-"),
    ] {
        let advice = formula_fault(text).advice();
        assert_eq!(advice, format!("write `{advised}` if that is meant"));
        assert!(Formula::parse(advised).is_ok());
    }
}

#[test]
fn other_formulas_are_refused() {
    for text in [
        "e",
        "e+",
        "nacl",
        "Xx",
        "2H2O",
        "H2 O",
        " H2O",
        "H2O)",
        "(H2O",
        "()",
        "·H2O",
        "H2O·",
        "H2O··H2O",
        "H2O·0H2O",
        "Na+·H2O",
        "Na^0+",
        "Na^02+",
        "Na^",
        "Na+2-",
        "Na^+-",
        "[13C]O2",
        "^13CO2",
        "CH3–CH3",
        "H2.O",
        "Ca(NO3)2.4H2O",
        "Fe2.5O4",
        "H½",
    ] {
        formula_fault(text);
    }
}

#[test]
fn faults_of_equations_say_what_to_do() {
    for (text, span, message) in [
        (
            "H2(g) ⇌ D2(g)",
            6..9,
            "found the arrow `⇌`; expected `->`, `→` or `=`: a heat belongs to one direction; \
             write what is consumed, `->`, and what is formed",
        ),
        (
            "a + b -> c -> d",
            11..13,
            "found a second arrow, `->`; expected one arrow; \
             write each step as an equation of its own, and no bonds in formulas",
        ),
        (
            "a b",
            0..3,
            "found no arrow; expected `->`, `→` or `=` between what is consumed and what is \
             formed; add it",
        ),
        (
            "a -> ",
            5..5,
            "found nothing on the right of the arrow; expected at least one participant on \
             each side; complete the equation",
        ),
        (
            "a + -> b",
            4..4,
            "found a `+` without a participant beside it; expected a participant on each side \
             of ` + `; complete the term or leave the `+` out",
        ),
        (
            "2nitrobenzene -> a",
            0..13,
            "found the number in `2nitrobenzene` without a space after it; expected a space \
             between a coefficient and a declared name; write `2 nitrobenzene` if that is meant",
        ),
        (
            "3CdSO4·8H2O(cr) -> a",
            0..16,
            "found a number close before an addition compound; expected `3 CdSO4·8H2O(cr)` or \
             `(CdSO4)3·8H2O(cr)`; write the one that is meant",
        ),
        (
            "H2(g) + H2(g) -> a",
            8..13,
            "found `H2(g)` twice on the left; expected every participant once; \
             add the coefficients up; tell isomers apart by declared names",
        ),
        (
            "Ca(OH)2(cr) -> CaO2H2(cr)",
            15..25,
            "found `CaO2H2(cr)` on both sides; expected every participant once; \
             cancel it; tell isomers apart by declared names",
        ),
        (
            "-2 H2(g) -> a",
            0..2,
            "found the coefficient `-2`; expected a number above zero; \
             move the term to the other side",
        ),
        (
            "1,5 O2(g) -> a",
            0..3,
            "found the coefficient `1,5`; expected an integer, a decimal such as `1.5` or a \
             fraction such as `3/2`; write a point before decimals and a bar between two integers",
        ),
        (
            "1/0 O2(g) -> a",
            0..3,
            "found `1/0`, which divides by zero; expected a number below the bar that is above \
             zero; correct the fraction",
        ),
    ] {
        let errors = equation_faults(text);
        assert_eq!(errors.len(), 1, "{text}: {errors:?}");
        assert_eq!(errors[0].to_string(), message);
        assert_eq!(errors[0].span, span, "{text}");
    }
}

#[test]
fn every_bad_term_is_reported_in_order() {
    let text = "0 H2(g) + CO2(G) -> Fe3+(aq) + exact + aniline";
    let errors = equation_faults(text);
    let places: Vec<_> = errors.iter().map(|e| &text[e.span.clone()]).collect();
    assert_eq!(places, ["0", "G", "Fe3+", "exact"]);
}

#[test]
fn sizes_are_bounded_with_length_and_limit() {
    let long = formula_fault(&"H".repeat(1025));
    assert_eq!(long.found(), "a formula of 1025 bytes");
    assert_eq!(long.expected(), "at most 1024 bytes");
    let deep = formula_fault(&format!("{}H{}", "(".repeat(17), ")".repeat(17)));
    assert_eq!(deep.found(), "brackets of 17 levels");
    assert!(Formula::parse(&format!("{}H{}", "(".repeat(16), ")".repeat(16))).is_ok());
    let digits = formula_fault(&format!("H{}", "1".repeat(65)));
    assert_eq!(digits.expected(), "at most 64 digits");
    assert_eq!(formula_fault("Na^1000+").expected(), "at most 3 digits");
    let text = format!("{} -> b", " ".repeat(64 * 1024));
    assert_eq!(equation_faults(&text)[0].expected(), "at most 65536 bytes");
}

#[test]
fn the_limit_of_terms_is_200() {
    let equation = |terms: usize| {
        let left: Vec<_> = (1..terms).map(|at| format!("a{at}")).collect();
        format!("{} -> b", left.join(" + "))
    };
    assert!(Equation::parse(&equation(200)).is_ok());
    let errors = equation_faults(&equation(201));
    assert_eq!(errors[0].found(), "an equation of 201 terms");
    assert_eq!(errors[0].expected(), "at most 200 terms");
}
