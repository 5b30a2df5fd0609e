//! Reading `[heating-values]`: fuels, and the conditions that their heating values refer to.

use indexmap::IndexMap;
use num_traits::One;

use crate::document::{Table, one_of, value_fault};
use crate::finding::Located;
use crate::quantity::{Dimension, Exact};

use super::composition::{Composition, Context, Moisture, read_composition};
use super::fraction::read_fraction;
use super::fuel::check_fuel;
use super::given::{Given, read_temperature};
use super::ids::Ids;
use super::metering::{Metering, read_metering};
use super::model::{DeclaredSubstance, Input};
use super::results::ResultQuantity;

/// A fuel and what its heating values refer to.
#[derive(Clone, Debug)]
pub struct HeatingValue {
    pub id: Located<String>,
    pub composition: Composition,
    /// Whether the results are per amount of the fuel without its water or with it.
    pub state: Moisture,
    /// Water in the fuel as received, of the basis of the composition, where that is dry.
    pub moisture_content: Option<Given>,
    /// Combustion reference temperature.
    pub temperature: Given,
    pub at: Constant,
    pub metering: Option<Metering>,
    /// Where the composition was measured.
    pub source: Option<String>,
}

/// What stays constant while the fuel burns.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Constant {
    Pressure,
    Volume,
}

/// The results that a heating value can have.
pub const HEATING_VALUE_QUANTITIES: [&str; 8] = [
    "gross",
    "net",
    "gross-per-mass",
    "net-per-mass",
    "gross-per-volume",
    "net-per-volume",
    "gross-per-volume-real",
    "net-per-volume-real",
];

const KEYS: [&str; 8] = [
    "composition",
    "basis",
    "state",
    "moisture-content",
    "temperature",
    "at",
    "metering",
    "source",
];

const STATES: [(&str, Moisture); 2] = [("dry", Moisture::Dry), ("as received", Moisture::Wet)];

const CONSTANTS: [(&str, Constant); 2] = [
    ("constant pressure", Constant::Pressure),
    ("constant volume", Constant::Volume),
];

/// What the results measure, and what they need.
pub(super) fn result_quantities() -> Vec<ResultQuantity> {
    let quantity = |name: &'static str| {
        let (per, needs) = match name {
            _ if name.ends_with("-real") => {
                (Dimension::VOLUME, Some("metering.compression-factor"))
            }
            _ if name.ends_with("-volume") => (Dimension::VOLUME, Some("metering")),
            _ if name.ends_with("-mass") => (Dimension::MASS, None),
            _ => (Dimension::AMOUNT, None),
        };
        ResultQuantity {
            name,
            dimension: Dimension::ENERGY.over(per),
            needs,
        }
    };
    HEATING_VALUE_QUANTITIES.map(quantity).to_vec()
}

impl HeatingValue {
    /// The keys that it states and that results need.
    pub(super) fn states(&self) -> Vec<&'static str> {
        let Some(metering) = &self.metering else {
            return Vec::new();
        };
        match metering.compression {
            Some(_) => vec!["metering", "metering.compression-factor"],
            None => vec!["metering"],
        }
    }
}

pub(super) fn read_heating_values(
    table: &Table<'_, '_>,
    ids: &Ids,
    inputs: &IndexMap<String, Input>,
    substances: &IndexMap<String, DeclaredSubstance>,
) -> IndexMap<String, HeatingValue> {
    let context = Context {
        ids,
        inputs,
        substances,
    };
    let mut read = IndexMap::new();
    for (id, value) in table.entries() {
        let Some(table) = value.table() else { continue };
        if let Some(fuel) = read_one(&table, id, &context) {
            read.insert(fuel.id.value.clone(), fuel);
        }
    }
    read
}

fn read_one(
    table: &Table<'_, '_>,
    id: Located<String>,
    context: &Context<'_>,
) -> Option<HeatingValue> {
    table.only(&KEYS);
    let reader = table.reader();
    let basis = table.string("basis");
    let composition = read_fuel(table, basis, context);
    let advice = "give the combustion reference temperature: temperature = \"25 °C\"";
    let temperature = table.required_string("temperature", advice);
    let temperature =
        temperature.and_then(|text| read_temperature(reader, context.ids, context.inputs, &text));
    let at = table.string("at");
    let at = at.map_or(Some(Constant::Pressure), |text| {
        one_of(reader, &text, &CONSTANTS)
    });
    let metering = table.get("metering").map(|value| {
        let metering = value.table()?;
        read_metering(&metering, context)
    });
    let source = table.string("source").map(|text| text.value);
    let composition = composition?;
    let (state, moisture_content) = read_moisture(table, &composition, context)?;
    let fuel = HeatingValue {
        id,
        composition,
        state,
        moisture_content,
        temperature: temperature?,
        at: at?,
        metering: match metering {
            Some(metering) => Some(metering?),
            None => None,
        },
        source,
    };
    check_fuel(reader, &fuel, context).then_some(fuel)
}

fn read_fuel(
    table: &Table<'_, '_>,
    basis: Option<Located<String>>,
    context: &Context<'_>,
) -> Option<Composition> {
    let Some(value) = table.get("composition") else {
        let advice = "write composition = { basis = \"mole\", \"CH4(g)\" = \"0.950\", … }";
        table.missing("composition", advice);
        return None;
    };
    read_composition(&value.table()?, basis, context)
}

/// What the results are per amount of, and the water that a dry composition leaves out.
fn read_moisture(
    table: &Table<'_, '_>,
    composition: &Composition,
    context: &Context<'_>,
) -> Option<(Moisture, Option<Given>)> {
    let reader = table.reader();
    let state = match table.string("state") {
        Some(text) => one_of(reader, &text, &STATES)?,
        None => composition.moisture,
    };
    let text = table.string("moisture-content");
    let wanted = (composition.moisture, state) == (Moisture::Dry, Moisture::Wet);
    match (text, wanted) {
        (Some(text), true) => {
            let content = read_fraction(reader, &text, Some(composition.basis.value), context)?;
            let value = content.quantity(context.inputs)?.value_in_si();
            if value >= Exact::one() {
                let expected = "a moisture content below 1";
                value_fault(
                    reader,
                    &text.span,
                    format!("\"{}\"", text.value),
                    expected,
                    "check the number",
                );
                return None;
            }
            Some((state, Some(content)))
        }
        (Some(text), false) => {
            value_fault(
                reader,
                &text.span,
                format!("a moisture content of \"{}\"", text.value),
                "one only where the composition is dry and the state is as received",
                "leave it out, or write moisture = \"dry\" in the composition and state = \"as \
                 received\"",
            );
            None
        }
        (None, true) => {
            table.missing(
                "moisture-content",
                "say how much water the fuel as received holds, on the basis of the composition",
            );
            None
        }
        (None, false) => Some((state, None)),
    }
}
