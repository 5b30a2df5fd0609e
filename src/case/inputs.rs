//! Reading `[inputs]`.

use indexmap::IndexMap;

use crate::document::{Table, quantity};
use crate::finding::{FaultCode, Located};
use crate::quantity::{Dimension, Quantity};

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
    table.only(&[
        "value",
        "tolerance",
        "reference",
        "source",
        "confirmed",
        "hold",
    ]);
    let reader = table.reader();
    let value = table.required_string("value", "give the value with its unit");
    let value = value.and_then(|text| quantity(reader, &text));
    let tolerance = table
        .string("tolerance")
        .and_then(|text| quantity(reader, &text));
    let source = table.string("source").map(|t| t.value);
    let (confirmed, hold) = read_standing(table);
    let reference = table.string("reference");
    let reference = reference.and_then(|text| read_reference(table, value.as_ref(), text));
    let value = value?;
    if let Some(tolerance) = &tolerance {
        check_tolerance(table, &value.value, tolerance);
    }
    Some(Input {
        id,
        value,
        tolerance: tolerance.map(|t| t.value),
        reference,
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

/// The temperature and pressure that a gas volume refers to: `"0 °C, 101.325 kPa"`.
fn read_reference(
    table: &Table<'_, '_>,
    value: Option<&Located<Quantity>>,
    text: Located<String>,
) -> Option<String> {
    let volume = value.is_none_or(|value| value.value.unit.dimension() == Dimension::VOLUME);
    let parts: Vec<_> = text
        .value
        .split(',')
        .map(|part| Quantity::parse(part.trim()))
        .collect();
    let dimensions: Vec<_> = parts.iter().flatten().map(|q| q.unit.dimension()).collect();
    if volume && dimensions == [Dimension::TEMPERATURE, Dimension::PRESSURE] {
        return Some(text.value);
    }
    table.reader().fault(
        FaultCode::Quantity,
        &text.span,
        format!("reference = \"{}\"", text.value),
        "beside a gas volume its temperature and pressure",
        "write reference = \"0 °C, 101.325 kPa\" beside value = \"650 m3\"",
    );
    None
}
