//! Reading `[inputs]`.

use indexmap::IndexMap;

use crate::document::{Table, quantity};
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

/// The tolerance has to fit the value that it stands beside.
fn check_tolerance(table: &Table<'_, '_>, value: &Quantity, tolerance: &Located<Quantity>) {
    if let Err(error) = value.clone().with_tolerance(&tolerance.value) {
        table.reader().fault(
            FaultCode::Quantity,
            &tolerance.span,
            error.found(),
            error.expected(),
            error.advice(),
        );
    }
}
