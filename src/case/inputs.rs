//! Reading `[inputs]`.

use indexmap::IndexMap;

use crate::document::{Table, quantity, value_fault};
use crate::finding::{FaultCode, Located};
use crate::quantity::Quantity;

use super::assumptions::read_standing;
use super::model::Input;

pub(super) fn read_inputs(table: &Table<'_, '_>) -> IndexMap<String, Input> {
    let mut inputs = IndexMap::new();
    for (id, value) in table.entries() {
        let input = value.table().and_then(|table| read_input(&table, id));
        if let Some(input) = input {
            inputs.insert(input.id.value.clone(), input);
        }
    }
    inputs
}

fn read_input(table: &Table<'_, '_>, id: Located<String>) -> Option<Input> {
    table.only(&["value", "tolerance", "source", "confirmed", "hold"]);
    let reader = table.reader();
    let value = table.required_string("value", "give the value with its unit");
    let value = value.and_then(|text| quantity(reader, &text));
    let tolerance = table
        .string("tolerance")
        .and_then(|text| quantity(reader, &text));
    let source = table.string("source").map(|t| t.value);
    let (confirmed, hold) = read_standing(table);
    let value = value?;
    if let Some(tolerance) = &tolerance {
        check_tolerance(table, &value.value, tolerance);
    }
    Some(Input {
        id,
        value,
        tolerance: tolerance.map(|t| t.value),
        source,
        confirmed,
        hold,
    })
}

fn check_tolerance(table: &Table<'_, '_>, value: &Quantity, tolerance: &Located<Quantity>) {
    let reader = table.reader();
    if value.unit.dimension() != tolerance.value.unit.dimension() {
        reader.fault(
            FaultCode::Quantity,
            &tolerance.span,
            format!("a tolerance in {}", tolerance.value.unit.symbol()),
            format!(
                "a tolerance of the same kind as the value, in {}",
                value.unit.symbol()
            ),
            "write the tolerance in the unit of the value",
        );
    }
    if tolerance.value.value_in_si() < num_traits::Zero::zero() {
        let found = table.reader().text().slice(&tolerance.span).to_string();
        let expected = "a half-width of zero or more";
        value_fault(
            reader,
            &tolerance.span,
            found,
            expected,
            "write it without a sign",
        );
    }
}
