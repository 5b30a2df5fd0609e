//! Heating values among the results.

use crate::calculation::Calculation;
use crate::case::{Constant, HEATING_VALUE_QUANTITIES, Moisture};
use crate::quantity::exact_text;
use crate::source::ProblemHeatingValue;

use super::numerals::minus;
use super::pages::ResultRow;
use super::result_rows::{not_worked, result_row};

/// `first` is the index of the first section of the working that is of a heating value.
pub(super) fn heating_value_rows(calculation: &Calculation, first: usize) -> Vec<ResultRow> {
    let mut rows = Vec::new();
    for (index, worked) in calculation.working.heating_values.iter().enumerate() {
        let id = &calculation.problem.heating_values[worked.heating_value].id;
        let section = first + index;
        let own = HEATING_VALUE_QUANTITIES
            .iter()
            .filter_map(|quantity| calculation.working.outcome(&format!("{id}.{quantity}")));
        rows.extend(own.map(|outcome| result_row(calculation, outcome, section)));
        if worked.mixture.is_none() {
            rows.push(not_worked(&format!("{id}.gross"), "Heating value", section));
        }
    }
    rows
}

/// What a heating value is, in words; none where the id is not one.
pub(super) fn heating_value_what(
    calculation: &Calculation,
    id: &str,
    quantity: &str,
) -> Option<String> {
    let mut fuels = calculation.problem.heating_values.iter();
    let fuel = fuels.find(|fuel| fuel.id == id)?;
    let kind = match quantity.starts_with("net") {
        true => "Net",
        false => "Gross",
    };
    let at = match fuel.at {
        Constant::Pressure => "",
        Constant::Volume => " and constant volume",
    };
    let state = match fuel.state {
        Moisture::Dry => ", dry",
        Moisture::Wet => "",
    };
    let kelvin = minus(&exact_text(&fuel.kelvin));
    Some(format!(
        "{kind} heating value at {kelvin} K{at}, {}{state}",
        per(fuel, quantity)
    ))
}

fn per(fuel: &ProblemHeatingValue, quantity: &str) -> String {
    let gas = match quantity {
        _ if quantity.ends_with("-real") => "real",
        _ if quantity.ends_with("-volume") => "ideal",
        _ if quantity.ends_with("-mass") => return "per mass".to_string(),
        _ => return "per mole of the mixture".to_string(),
    };
    let conditions = fuel.metering.as_ref().map_or(String::new(), |metering| {
        let [kelvin, pascal] = [&metering.kelvin, &metering.pascal].map(exact_text);
        format!(" at {kelvin} K and {pascal} Pa")
    });
    format!("per volume of the {gas} gas{conditions}")
}
