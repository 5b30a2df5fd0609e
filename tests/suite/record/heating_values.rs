//! What the pages say of a fuel: every step that a checker needs with a pencil.

use hesswright::finding::Text;

use super::issued::{Issued, reissued};
use super::words::{body, plain};
use crate::laws::heating_values::NATURAL_GAS;
use crate::laws::support::Files;

#[test]
fn a_fuel_can_be_followed_on_the_pages_and_is_issued_again_to_the_byte() {
    let text = Text::new("case.toml", NATURAL_GAS);
    let record = Issued::of(text, &Files::of(&[]));
    let body = body(&record.pdf());
    let expected = [
        // The combustion, and who brings the oxygen.
        "CH4(g) + 2 O2(g) → CO2(g) + 2 H2O(l)",
        "H2S(g) + 3/2 O2(g) → H2O(l) + SO2(g)",
        // Conditions of combustion and of metering.
        "at constant pressure, all reactants and products at 288.15 K",
        "at constant volume, all reactants and products at 298.15 K",
        "(273.15 K)/(101325 Pa) with R = exact 8.31446261815324 J/(mol K)",
        // The state, the balance, the source of the composition.
        "multiplied by 1 less the moisture content",
        "what one of these is more, the balance is less",
        "analysis (invented)",
        // Masses and the compression factor.
        "= 16.043 g/mol",
        "Z = 1 − (101325/101325)·(",
        // Heats are given off, by convention positive, also in the prose.
        "Heat given off is counted positive here",
        "(given off) gross",
        "Gross heating value at 288.15 K, per volume of the real gas at 273.15 K and 101325 Pa",
        "Net heating value at 298.15 K and constant volume, per mass",
        // Liquid and gaseous water both come to the temperature.
        "H2O(g), 298.15 K to 288.15 K",
    ];
    for words in expected {
        assert!(
            body.contains(&plain(words)),
            "{words:?} is not on the pages"
        );
    }
    for id in record.calculation.working.outcomes.iter().map(|o| &o.id) {
        assert!(body.contains(&plain(id)), "{id} is not on the pages");
    }
    assert!(reissued(&record.issue.pdf) == record.issue.pdf);
}
