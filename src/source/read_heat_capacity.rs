//! Reading the heat-capacity functions of an entry. What could not be meant is refused here, so
//! that a function that was read can be worked with at any temperature of its range.

use num_traits::Signed;

use crate::document::{Reader, Table, Value, one_of, value_fault};
use crate::finding::{Located, Span};
use crate::quantity::{Decimal, Exact, Quantity, to_f64};

use super::heat_capacity::{Form, HeatCapacity, MOST_POWERS};
use super::read_quantity::{above_zero_kelvin, read_decimal, read_temperature};

/// No table prints more points for one substance; it bounds the work.
const MOST_POINTS: usize = 1000;

/// Cp of a mole beyond this is a slip of the pen or of the unit, J/(mol K): the largest molecules
/// that tables list have some thousands.
const LARGEST: f64 = 1e5;

/// Good enough an R for judging whether a heat capacity can be meant.
const NEAR_GAS_CONSTANT: f64 = 8.314;

const KEYS: [&str; 5] = ["form", "range", "coefficients", "points", "uncertainty"];

/// The functions of an entry. `aqueous` says that its Cp is a partial molar one, which may be
/// negative.
pub(super) fn read_heat_capacities(entry: &Table<'_, '_>, aqueous: bool) -> Vec<HeatCapacity> {
    let tables = entry.tables("heat-capacity");
    let read = |table: &Table<'_, '_>| {
        let function = read_heat_capacity(table)?;
        check_size(table, &function, aqueous);
        Some((table.span.clone(), function))
    };
    let functions: Vec<_> = tables.iter().filter_map(read).collect();
    refuse_overlaps(entry.reader(), &functions);
    functions
        .into_iter()
        .map(|(_, function)| function)
        .collect()
}

fn read_heat_capacity(table: &Table<'_, '_>) -> Option<HeatCapacity> {
    table.only(&KEYS);
    let reader = table.reader();
    let form = table.required_string("form", "name the form of the function")?;
    let choices = Form::ALL.map(|form| (form.word(), form));
    let form = Located::new(one_of(reader, &form, &choices)?, form.span);
    let coefficients = table.strings("coefficients");
    let points = table.get("points");
    let given = match form.value {
        Form::Table => points.as_ref().map_or(0, Value::count),
        _ => coefficients.len(),
    };
    let read = HeatCapacity {
        form: form.value,
        range: read_range(table),
        coefficients: coefficients
            .iter()
            .filter_map(|c| read_decimal(reader, c))
            .collect(),
        points: points.as_ref().map_or_else(Vec::new, read_points),
        uncertainty: read_uncertainty(table),
    };
    let counted = count_coefficients(table, &form, given);
    let ranged = read.range.is_some() || table.get("range").is_none();
    let complete = match form.value {
        Form::Table => read.points.len() == given && check_points(points.as_ref()?, &read),
        _ => read.coefficients.len() == given,
    };
    (counted && complete && ranged).then_some(read)
}

/// A function without the number of coefficients that its form has would be read wrongly.
fn count_coefficients(table: &Table<'_, '_>, form: &Located<Form>, given: usize) -> bool {
    let (what, other, least, most) = match (form.value, form.value.coefficients()) {
        (Form::Table, _) => ("points", "coefficients", 2, MOST_POINTS),
        (_, Some(count)) => ("coefficients", "points", count, count),
        (_, None) => ("coefficients", "points", 1, MOST_POWERS),
    };
    let word = form.value.word();
    if let Some(value) = table.get(other) {
        value_fault(
            table.reader(),
            &value.key_span,
            format!("`{other}` of a {word}"),
            format!("`{what}` alone"),
            "remove the key, or name the form that it belongs to",
        );
    }
    let fits = (least..=most).contains(&given);
    if !fits {
        let expected = match (least == most, given < least) {
            (true, _) => format!("{least} {what}"),
            (false, true) => format!("at least {least} {what}"),
            (false, false) => format!("at most {most} {what}"),
        };
        value_fault(
            table.reader(),
            &form.span,
            format!("{what} of a {word}: {given}"),
            expected,
            "copy them from the table in the order that the form names",
        );
    }
    fits
}

fn read_range(table: &Table<'_, '_>) -> Option<[Quantity; 2]> {
    let value = table.get("range")?;
    let reader = table.reader();
    let bounds = value.strings();
    let bounds: Vec<_> = bounds
        .iter()
        .filter_map(|b| read_temperature(reader, b))
        .collect();
    if bounds.len() < value.count() {
        return None;
    }
    let rising = bounds.len() == 2 && bounds[0].value_in_si() < bounds[1].value_in_si();
    if !rising {
        value_fault(
            reader,
            &value.span(),
            reader.text().slice(&value.span()),
            "two temperatures, the lower first",
            "write range = [\"298.15 K\", \"1000 K\"]",
        );
        return None;
    }
    <[Quantity; 2]>::try_from(bounds).ok()
}

fn read_points(points: &Value<'_, '_>) -> Vec<[Decimal; 2]> {
    let points = points.elements("a list of pairs", "write it as [[\"T\", \"Cp\"], …]");
    points.iter().filter_map(read_point).collect()
}

fn read_point(point: &Value<'_, '_>) -> Option<[Decimal; 2]> {
    let reader = point.reader();
    let texts = point.strings();
    if let [temperature, capacity] = texts.as_slice() {
        let read = (
            read_decimal(reader, temperature),
            read_decimal(reader, capacity),
        );
        let (kelvin, capacity) = (read.0?, read.1?);
        return above_zero_kelvin(reader, temperature, &kelvin.value())
            .then_some([kelvin, capacity]);
    }
    value_fault(
        reader,
        &point.span(),
        reader.text().slice(&point.span()),
        "a temperature in K and a heat capacity in J/(mol K)",
        "write each point as [\"300\", \"75.3\"]",
    );
    None
}

/// The points of a table rise in temperature and reach the ends of its range.
fn check_points(points: &Value<'_, '_>, table: &HeatCapacity) -> bool {
    let kelvin: Vec<Exact> = table.points.iter().map(|point| point[0].value()).collect();
    let falling = kelvin.windows(2).position(|pair| pair[0] >= pair[1]);
    if let Some(at) = falling {
        let [first, second] = [at, at + 1].map(|i| table.points[i][0].printed());
        value_fault(
            points.reader(),
            &points.span(),
            format!("a point at {second} K after one at {first} K"),
            "points in rising order of temperature",
            "put each temperature once; a jump of Cp at a transition begins another form",
        );
        return false;
    }
    let (Some(first), Some(last)) = (kelvin.first(), kelvin.last()) else {
        return false;
    };
    let within = table.range.as_ref().is_none_or(|range| {
        let [low, high] = range.each_ref().map(Quantity::value_in_si);
        *first <= low && high <= *last
    });
    if !within {
        let [first, last] = [table.points.first(), table.points.last()];
        let ends = [first, last].map(|point| point.map_or("", |p| p[0].printed()));
        value_fault(
            points.reader(),
            &points.span(),
            format!("points from {} K to {} K", ends[0], ends[1]),
            "points that reach both ends of the range",
            "state the range that the points have, or leave it out",
        );
    }
    within
}

/// A standard or expanded uncertainty of Cp, as the source's coverage says.
fn read_uncertainty(table: &Table<'_, '_>) -> Option<Decimal> {
    let text = table.string("uncertainty")?;
    let read = read_decimal(table.reader(), &text)?;
    if read.value().is_positive() {
        return Some(read);
    }
    value_fault(
        table.reader(),
        &text.span,
        format!("\"{}\"", text.value),
        "a positive uncertainty of Cp in J/(mol K)",
        "leave the key out where the source states none",
    );
    None
}

/// Cp at the ends and in the middle of the range is finite, of a size that substances have, and
/// positive but for solutes.
fn check_size(table: &Table<'_, '_>, function: &HeatCapacity, aqueous: bool) {
    for kelvin in judged_at(function) {
        let value = function.at(kelvin, NEAR_GAS_CONSTANT).unwrap_or(f64::NAN);
        let lowest = if aqueous { -LARGEST } else { 0.0 };
        if value > lowest && value <= LARGEST {
            continue;
        }
        value_fault(
            table.reader(),
            &table.span,
            format!("Cp = {} J/(mol K) at {kelvin} K", in_short(value)),
            "a heat capacity that a substance can have: positive (but for solutes), below 1e5",
            "compare coefficients, their order, exponents and unit with the source",
        );
        return;
    }
}

fn judged_at(function: &HeatCapacity) -> Vec<f64> {
    match function.range_kelvin() {
        Some(range) => {
            let [low, high] = range.each_ref().map(to_f64);
            vec![low, (low + high) / 2.0, high]
        }
        None => vec![298.15],
    }
}

/// A number for a message.
fn in_short(value: f64) -> String {
    let size = value.abs();
    if (0.001..1e6).contains(&size) || size == 0.0 {
        format!("{value:.3}")
    } else {
        format!("{value:.1e}")
    }
}

/// Two functions for one temperature would leave the choice to chance. They may touch.
fn refuse_overlaps(reader: &Reader<'_>, functions: &[(Span, HeatCapacity)]) {
    for (at, (span, function)) in functions.iter().enumerate() {
        let Some((first, other)) = functions[..at]
            .iter()
            .find(|(_, earlier)| overlap(earlier, function))
        else {
            continue;
        };
        let place = reader.text().place(first.start);
        value_fault(
            reader,
            span,
            format!(
                "a {} {} beside a {} {} (line {}, column {})",
                function.form.word(),
                range_words(function),
                other.form.word(),
                range_words(other),
                place.line,
                place.column
            ),
            "one function for each temperature: ranges that touch, and do not overlap",
            "keep the function that the source means for that range, or mend the range",
        );
    }
}

fn overlap(one: &HeatCapacity, other: &HeatCapacity) -> bool {
    match (one.range_kelvin(), other.range_kelvin()) {
        (Some(one), Some(other)) => one[0] < other[1] && other[0] < one[1],
        // A function without a range is stated for every temperature.
        _ => true,
    }
}

fn range_words(function: &HeatCapacity) -> String {
    match (
        &function.range,
        function.points.first(),
        function.points.last(),
    ) {
        (Some([low, high]), _, _) => format!("from {low} to {high}"),
        (None, Some(first), Some(last)) => {
            format!("from {} K to {} K", first[0].printed(), last[0].printed())
        }
        _ => "without a range".into(),
    }
}
