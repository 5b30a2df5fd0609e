//! Reading the metering conditions of a gas, and what is known of its compression factor.

use num_traits::{One, Signed};

use crate::document::{Reader, Table, Value, value_fault};
use crate::finding::{Located, Span};
use crate::notation::Participant;
use crate::quantity::{Dimension, Exact, Quantity};

use super::composition::{Context, read_substance};
use super::given::{Given, Wanted, read_given, read_temperature};

/// The conditions that a gas volume refers to.
#[derive(Clone, Debug)]
pub struct Metering {
    pub temperature: Given,
    pub pressure: Given,
    pub compression: Option<Compression>,
    /// Where the data on compression come from.
    pub source: Option<String>,
}

/// What the compression factor of the real gas comes from.
#[derive(Clone, Debug)]
pub enum Compression {
    Factor(Given),
    /// Summation factors of the components (ISO 6976).
    Summation(Vec<(Located<Participant>, Given)>),
    SecondVirial(Given),
}

const METERING_KEYS: [&str; 6] = [
    "temperature",
    "pressure",
    "compression-factor",
    "summation-factors",
    "second-virial",
    "source",
];

const COMPRESSION_KEYS: [&str; 3] = ["compression-factor", "summation-factors", "second-virial"];

pub(super) fn read_metering(table: &Table<'_, '_>, context: &Context<'_>) -> Option<Metering> {
    table.only(&METERING_KEYS);
    let reader = table.reader();
    let advice = "give the temperature that the volume refers to: temperature = \"15 °C\"";
    let temperature = table.required_string("temperature", advice);
    let temperature =
        temperature.and_then(|text| read_temperature(reader, context.ids, context.inputs, &text));
    let advice = "give the pressure that the volume refers to: pressure = \"101.325 kPa\"";
    let pressure = table.required_string("pressure", advice);
    let pressure = pressure.and_then(|text| read_pressure(reader, &text, context));
    let compression = read_compression(table, context);
    let source = table.string("source").map(|text| text.value);
    let metering = Metering {
        temperature: temperature?,
        pressure: pressure?,
        compression: compression?,
        source,
    };
    let stated = [&metering.temperature, &metering.pressure];
    let exact = stated.map(|given| conventional(reader, given, context));
    exact.iter().all(|exact| *exact).then_some(metering)
}

/// What a volume refers to is agreed, not measured.
fn conventional(reader: &Reader<'_>, given: &Given, context: &Context<'_>) -> bool {
    let uncertain = |quantity: &Quantity| quantity.uncertainty.is_some();
    let tolerance = match given {
        Given::Input(id) => context
            .inputs
            .get(&id.value)
            .is_some_and(|i| i.tolerance.is_some()),
        _ => false,
    };
    if !tolerance && !given.quantity(context.inputs).is_some_and(uncertain) {
        return true;
    }
    value_fault(
        reader,
        given.span(),
        "a metering condition with an uncertainty",
        "the conditions that a volume refers to, which are agreed and exact",
        "leave the uncertainty out; a volume measured at other conditions is converted before",
    );
    false
}

fn read_pressure(
    reader: &Reader<'_>,
    text: &Located<String>,
    context: &Context<'_>,
) -> Option<Given> {
    let wanted = Wanted {
        dimension: Dimension::PRESSURE,
        results: false,
        expected: "a pressure",
        advice: "write it as \"101.325 kPa\" or \"14.696 psia\"",
    };
    let given = read_given(reader, context.ids, context.inputs, text, &wanted)?;
    let positive = given.quantity(context.inputs)?.value_in_si().is_positive();
    if !positive {
        value_fault(
            reader,
            &text.span,
            quoted(text),
            "an absolute pressure above zero",
            "check the number and its unit",
        );
    }
    positive.then_some(given)
}

/// None where something is wrong, `Some(None)` where nothing is stated.
#[allow(clippy::option_option)]
fn read_compression(table: &Table<'_, '_>, context: &Context<'_>) -> Option<Option<Compression>> {
    let reader = table.reader();
    let stated = COMPRESSION_KEYS.iter().filter_map(|key| table.get(key));
    let stated: Vec<_> = stated.collect();
    if let [_, second, ..] = &stated[..] {
        value_fault(
            reader,
            &second.key_span,
            format!("{} kinds of data on the compression factor", stated.len()),
            format!("one of: {}", COMPRESSION_KEYS.join(", ")),
            "keep the one that the record is to rest on",
        );
        return None;
    }
    if stated.is_empty() {
        return Some(None);
    }
    if let Some(factors) = table.get("summation-factors") {
        let factors = read_summation(&factors.table()?, context)?;
        return Some(Some(Compression::Summation(factors)));
    }
    if let Some(text) = table.string("compression-factor") {
        let given = read_number(reader, &text, Dimension::ONE, COMPRESSION_ADVICE, context)?;
        if !given.quantity(context.inputs)?.value_in_si().is_positive() {
            let expected = "a compression factor above zero";
            value_fault(
                reader,
                &text.span,
                quoted(&text),
                expected,
                COMPRESSION_ADVICE,
            );
            return None;
        }
        return Some(Some(Compression::Factor(given)));
    }
    let text = table.string("second-virial")?;
    let dimension = Dimension::VOLUME.over(Dimension::AMOUNT);
    let given = read_number(reader, &text, dimension, "write \"-43.1 cm3/mol\"", context)?;
    Some(Some(Compression::SecondVirial(given)))
}

const COMPRESSION_ADVICE: &str = "write \"0.99773\" or \"0.99773 ± 0.00050\"";

fn read_number(
    reader: &Reader<'_>,
    text: &Located<String>,
    dimension: Dimension,
    advice: &'static str,
    context: &Context<'_>,
) -> Option<Given> {
    let wanted = Wanted {
        dimension,
        results: false,
        expected: match dimension == Dimension::ONE {
            true => "a plain number",
            false => "a volume per amount of substance",
        },
        advice,
    };
    read_given(reader, context.ids, context.inputs, text, &wanted)
}

fn read_summation(
    table: &Table<'_, '_>,
    context: &Context<'_>,
) -> Option<Vec<(Located<Participant>, Given)>> {
    let reader = table.reader();
    let read = |(key, value): (Located<String>, Value<'_, '_>)| {
        let substance = read_substance(reader, &key, context);
        let text = value.string()?;
        let advice = "write \"0.0436\", as the standard prints it";
        let given = read_number(reader, &text, Dimension::ONE, advice, context)?;
        if given.quantity(context.inputs)?.value_in_si().abs() >= Exact::one() {
            let expected = "a summation factor between -1 and 1";
            value_fault(
                reader,
                &text.span,
                quoted(&text),
                expected,
                "check the number",
            );
            return None;
        }
        Some((substance?, given))
    };
    let factors: Vec<Option<_>> = table.entries().into_iter().map(read).collect();
    factors.into_iter().collect()
}

fn quoted(text: &Located<String>) -> String {
    format!("\"{}\"", text.value)
}

impl Compression {
    /// Where it is stated.
    pub fn span(&self) -> Option<&Span> {
        match self {
            Compression::Factor(given) | Compression::SecondVirial(given) => Some(given.span()),
            Compression::Summation(factors) => factors.first().map(|(name, _)| &name.span),
        }
    }
}
