//! Reading `[units]` and `[rounding]`: how results are given.

use num_traits::One;

use crate::document::{Reader, Table, quantity, unit, value_fault};
use crate::finding::{FaultCode, Located};
use crate::quantity::{Exact, Unit, order_of_magnitude, power_of_ten};

use super::ids::Ids;
use super::model::{ResultUnits, RoundingRule};
use super::results::Results;

pub(super) fn read_units(table: Option<&Table<'_, '_>>) -> ResultUnits {
    if let Some(table) = table {
        table.only(&["energy", "temperature", "mass", "volume", "amount", "time"]);
    }
    ResultUnits {
        energy: read_unit(table, "energy", "kJ"),
        temperature: read_unit(table, "temperature", "K"),
        mass: read_unit(table, "mass", "kg"),
        volume: read_unit(table, "volume", "m3"),
        amount: read_unit(table, "amount", "mol"),
        time: read_unit(table, "time", "s"),
    }
}

/// The unit of a key, of the same kind as the default.
fn read_unit(table: Option<&Table<'_, '_>>, key: &str, default: &str) -> Unit {
    // The defaults are words of the unit table; its own test reads each of them.
    let default = Unit::parse(default).expect("a default unit is known");
    let Some(table) = table else { return default };
    let Some(text) = table.string(key) else {
        return default;
    };
    let Some(given) = unit(table.reader(), &text) else {
        return default;
    };
    if given.dimension() == default.dimension() {
        return simple(table.reader(), &text, given).unwrap_or(default);
    }
    table.reader().fault(
        FaultCode::Quantity,
        &text.span,
        format!("\"{}\", a unit of {}", text.value, given.dimension()),
        format!("a unit of {}", default.dimension()),
        format!("write it as \"{}\"", default.symbol()),
    );
    default
}

/// Results are given in quotients of these units, so each has to be one symbol.
fn simple(reader: &Reader<'_>, text: &Located<String>, given: Unit) -> Option<Unit> {
    let compound = |c: char| matches!(c, '/' | ' ' | '(' | '·' | '^') || c.is_ascii_digit();
    // A cubed length is one factor, and can stand in a quotient.
    let symbol = given.symbol().strip_suffix('3').unwrap_or(given.symbol());
    if !symbol.contains(compound) {
        return Some(given);
    }
    reader.fault(
        FaultCode::Quantity,
        &text.span,
        format!("\"{}\", a unit made of several", text.value),
        "one symbol, such as kJ, kcal_th, Btu_IT, mol, kg",
        "results are given in quotients of it: choose a unit with a symbol of its own",
    );
    None
}

pub(super) fn read_rounding(
    table: Option<&Table<'_, '_>>,
    ids: &Ids,
    results: &Results,
) -> Vec<RoundingRule> {
    let Some(table) = table else {
        return Vec::new();
    };
    let mut rules = Vec::new();
    for (result, value) in table.entries() {
        if value.is_table() {
            dotted(table, &result);
            continue;
        }
        let reader = table.reader();
        results.check(reader, &result, ids, NAME_ADVICE);
        let text = value.string();
        rules.extend(text.and_then(|text| read_rule(reader, results, result, &text)));
    }
    rules
}

const NAME_ADVICE: &str = "write it as in \"hydrogenation.heat\" = \"0.1 kJ/mol\"";

/// `hydrogenation.heat` without quotes is a table to TOML.
fn dotted(table: &Table<'_, '_>, result: &Located<String>) {
    value_fault(
        table.reader(),
        &result.span,
        format!("`{}` and a point without quotes", result.value),
        "the name of a result in \"quotes\"",
        NAME_ADVICE,
    );
}

fn read_rule(
    reader: &Reader<'_>,
    results: &Results,
    result: Located<String>,
    text: &Located<String>,
) -> Option<RoundingRule> {
    let place = quantity(reader, text)?.value;
    let Some(power) = as_power(&place.decimal.value()) else {
        value_fault(
            reader,
            &text.span,
            format!("\"{}\"", text.value),
            "a place: 1, 0.1, 0.01, 10 … with its unit",
            "write \"0.1 kJ/mol\" for one decimal",
        );
        return None;
    };
    let dimension = results.dimension(&result.value);
    if let Some(dimension) = dimension.filter(|d| place.unit.dimension() != *d) {
        reader.fault(
            FaultCode::Quantity,
            &text.span,
            format!(
                "\"{}\", a place in a unit of {}",
                text.value,
                place.unit.dimension()
            ),
            format!("a unit of {dimension}"),
            "write the place in the unit of the result",
        );
        return None;
    }
    Some(RoundingRule {
        result,
        place: power,
        unit: place.unit,
        span: text.span.clone(),
    })
}

fn as_power(value: &Exact) -> Option<i64> {
    let order = order_of_magnitude(value)?;
    let digits = power_of_ten(-order) * value;
    digits.is_one().then_some(order)
}
