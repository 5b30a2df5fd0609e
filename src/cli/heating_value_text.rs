//! The compact working of a heating value.

use super::terminal::wrap;
use crate::calculation::Calculation;
use crate::engine::{HeatingValueWorking, Worked};
use crate::quantity::{exact_text, working_text};

/// Each component with its mole fraction and its molar gross heating value in J/mol, and the sums.
pub(super) fn shown(calculation: &Calculation, worked: &HeatingValueWorking) -> String {
    let fuel = &calculation.problem.heating_values[worked.heating_value];
    let at = exact_text(&fuel.kelvin);
    let mut text = wrap(
        &format!("{}: ", fuel.id),
        &format!("heating value at {at} K"),
    );
    let Some(mixture) = &worked.mixture else {
        return text + "  not worked, see the findings\n";
    };
    for (component, worked) in fuel.components.iter().zip(&mixture.components) {
        let line = format!(
            "x = {}, gross {} J/mol",
            number(&worked.mole_fraction),
            number(&worked.gross)
        );
        text += &wrap(&format!("  {}  ", component.label), &line);
    }
    for (name, sum) in [("gross", &mixture.gross), ("net", &mixture.net)] {
        text += &wrap(&format!("  {name} "), &format!("{} J/mol", number(sum)));
    }
    let mass = format!("{} kg/mol", number(&mixture.molar_mass));
    text += &wrap("  molar mass ", &mass);
    if let Some(volume) = &worked.volume {
        let ideal = format!("{} m3/mol, ideal gas", number(&volume.ideal));
        text += &wrap("  molar volume ", &ideal);
        if let Some(compression) = &volume.compression {
            text += &wrap("  compression factor ", &number(&compression.factor));
        }
    }
    text
}

fn number(worked: &Worked) -> String {
    working_text(&worked.value, worked.significance)
}
