//! Reading `heat-capacity` of a declared substance: a value, two bounds, or an estimate.
//!
//! What the case states itself goes where no source has a function. How it enters a heat is the
//! business of the engine.

use indexmap::IndexMap;
use num_traits::Signed;

use crate::document::{Table, filled, is_id, one_of, quantity, value_fault};
use crate::notation::{Formula, Phase, PhaseLabel};
use crate::quantity::{Dimension, Exact, Quantity, UnitKind};

use super::given::{Given, Wanted, read_given};
use super::ids::Ids;
use super::model::Input;

/// No substance has as much in J/(mol K) or J/(kg K); sources are held to the same.
const MOST: i64 = 100_000;

/// A heat capacity that the case states.
#[derive(Clone, Debug)]
pub struct CaseHeatCapacity {
    /// The key `heat-capacity`, where findings point.
    pub span: crate::finding::Span,
    pub statement: HeatCapacityStatement,
    /// Where the value or the bounds come from; an estimate names its method instead.
    pub source: Option<String>,
}

/// What a case says of a heat capacity; molar or specific, at constant pressure.
#[derive(Clone, Debug)]
pub enum HeatCapacityStatement {
    /// One value, taken as constant over the range of temperature.
    Value { value: Given, range: [Quantity; 2] },
    /// Between two values; each result is worked with the one that is adverse for it.
    Bounds {
        low: Given,
        high: Given,
        range: [Quantity; 2],
    },
    /// Estimated from the formula of a solid by Kopp's rule.
    Kopp,
}

const KEYS: [&str; 6] = ["value", "low", "high", "range", "estimate", "source"];

/// Reads `heat-capacity = { … }` of a compound in a phase.
pub(super) struct HeatCapacityReader<'a> {
    pub(super) ids: &'a Ids,
    pub(super) inputs: &'a IndexMap<String, Input>,
    /// None where they could not be read.
    pub(super) formula: Option<&'a Formula>,
    pub(super) phase: Option<&'a Phase>,
}

impl HeatCapacityReader<'_> {
    pub(super) fn read(&self, compound: &Table<'_, '_>) -> Option<CaseHeatCapacity> {
        let value = compound.get("heat-capacity")?;
        let table = value.table()?;
        table.only(&KEYS);
        let source = table.string("source");
        let source = source.and_then(|text| filled(table.reader(), text));
        let statement = match kind_of(&table)? {
            Kind::Value => self.read_value(&table),
            Kind::Bounds => self.read_bounds(&table),
            Kind::Estimate => read_estimate(&table, self.phase),
        };
        let estimate = table.get("estimate").is_some();
        let needed = statement.as_ref().map_or(!estimate, needs_source);
        if needed && table.get("source").is_none() {
            table.missing("source", "say where the heat capacity comes from");
        }
        Some(CaseHeatCapacity {
            span: value.key_span.clone(),
            statement: statement?,
            source: source.map(|text| text.value),
        })
    }

    fn read_value(&self, table: &Table<'_, '_>) -> Option<HeatCapacityStatement> {
        let range = read_range(table);
        let value = self.read_one(table, "value");
        Some(HeatCapacityStatement::Value {
            value: value?,
            range: range?,
        })
    }

    fn read_bounds(&self, table: &Table<'_, '_>) -> Option<HeatCapacityStatement> {
        let range = read_range(table);
        let low = self.read_one(table, "low");
        let high = self.read_one(table, "high");
        let (low, high) = (low?, high?);
        let (below, above) = (low.quantity(self.inputs)?, high.quantity(self.inputs)?);
        let same = below.unit.dimension() == above.unit.dimension();
        if !same || below.value_in_si() >= above.value_in_si() {
            value_fault(
                table.reader(),
                high.span(),
                format!("bounds from {below} to {above}"),
                "a low and a high bound, both molar or both specific",
                "state the lower as `low`; one number alone is a `value`",
            );
            return None;
        }
        Some(HeatCapacityStatement::Bounds {
            low,
            high,
            range: range?,
        })
    }

    /// A number of the statement; its uncertainty, if any, is for k = 2 as everywhere in a case.
    fn read_one(&self, table: &Table<'_, '_>, key: &str) -> Option<Given> {
        let reader = table.reader();
        let advice = "give it with its unit: \"191.9 J/(mol K)\"";
        let text = table.required_string(key, advice)?;
        let molar = Dimension::ENERGY.over(Dimension::AMOUNT);
        let specific = Dimension::ENERGY.over(Dimension::MASS);
        let per_mass = specific.over(Dimension::TEMPERATURE);
        let wanted = Wanted {
            dimension: match self.dimension(&text.value) == Some(per_mass) {
                true => per_mass,
                false => molar.over(Dimension::TEMPERATURE),
            },
            results: false,
            expected: "a heat capacity per mole or per mass",
            advice: "write it as \"191.9 J/(mol K)\" or \"2.06 kJ/(kg K)\"",
        };
        let read = read_given(reader, self.ids, self.inputs, &text, &wanted)?;
        let value = read.quantity(self.inputs)?;
        let charged = self.formula.is_some_and(|formula| formula.charge() != 0);
        if charged && value.unit.dimension() == per_mass {
            value_fault(
                reader,
                &text.span,
                format!("\"{}\" of an ion", text.value),
                "a heat capacity per mole: no mass of an ion alone is weighed",
                "write it in J/(mol K)",
            );
            return None;
        }
        if !may_be_negative(self.phase) && !value.value_in_si().is_positive() {
            value_fault(
                reader,
                &text.span,
                format!("\"{}\"", text.value),
                "a heat capacity above zero",
                "only a partial molar heat capacity in solution can be below zero",
            );
            return None;
        }
        if value.value_in_si() >= Exact::from_integer(MOST.into()) {
            value_fault(
                reader,
                &text.span,
                format!("\"{}\"", text.value),
                "a heat capacity that a substance can have: below 1e5 J/(mol K) or J/(kg K)",
                "compare the number, its exponent and its unit with the source",
            );
            return None;
        }
        Some(read)
    }

    /// What a text measures, where it says so.
    fn dimension(&self, text: &str) -> Option<Dimension> {
        let stated = match is_id(text) {
            true => self.inputs.get(text).map(|input| input.value.value.clone()),
            false => Quantity::parse(text).ok(),
        };
        stated.map(|quantity| quantity.unit.dimension())
    }
}

#[derive(Clone, Copy)]
enum Kind {
    Value,
    Bounds,
    Estimate,
}

/// Exactly one of the three ways of stating it.
fn kind_of(table: &Table<'_, '_>) -> Option<Kind> {
    let has = |key: &str| table.get(key).is_some();
    let ways = [
        (has("value"), Kind::Value),
        (has("low") || has("high"), Kind::Bounds),
        (has("estimate"), Kind::Estimate),
    ];
    let mut found = ways.iter().filter(|(there, _)| *there);
    if let (Some((_, kind)), None) = (found.next(), found.next()) {
        return Some(*kind);
    }
    if ways.iter().all(|(there, _)| !there) {
        table.missing(
            "value",
            "give a value, bounds `low` and `high`, or estimate = \"kopp\" for a solid",
        );
        return None;
    }
    value_fault(
        table.reader(),
        &table.span,
        "a heat capacity that is stated in several ways",
        "either `value`, or `low` and `high`, or `estimate`",
        "keep the one that you have a source for",
    );
    None
}

/// An estimate names its method, and an input has a source of its own.
fn needs_source(statement: &HeatCapacityStatement) -> bool {
    let stated = |given: &Given| !matches!(given, Given::Input(_));
    match statement {
        HeatCapacityStatement::Value { value, .. } => stated(value),
        HeatCapacityStatement::Bounds { low, high, .. } => stated(low) || stated(high),
        HeatCapacityStatement::Kopp => false,
    }
}

/// Partial molar heat capacities of solutes are differences, and those of most ions are negative.
fn may_be_negative(phase: Option<&Phase>) -> bool {
    phase.is_none_or(|phase| phase.label == PhaseLabel::Aqueous)
}

fn read_range(table: &Table<'_, '_>) -> Option<[Quantity; 2]> {
    let reader = table.reader();
    let Some(value) = table.get("range") else {
        table.missing(
            "range",
            "say where it holds: range = [\"280 K\", \"350 K\"]",
        );
        return None;
    };
    let bounds = value.strings();
    let bounds: Vec<Quantity> = bounds
        .iter()
        .filter_map(|text| Some(quantity(reader, text)?.value))
        .collect();
    if bounds.len() < value.count() {
        return None;
    }
    let absolute = |q: &Quantity| {
        q.unit.dimension() == Dimension::TEMPERATURE
            && q.unit.kind() != UnitKind::Difference
            && q.value_in_si().is_positive()
    };
    let rising = |low: &Quantity, high: &Quantity| low.value_in_si() < high.value_in_si();
    match <[Quantity; 2]>::try_from(bounds) {
        Ok([low, high]) if absolute(&low) && absolute(&high) && rising(&low, &high) => {
            Some([low, high])
        }
        _ => {
            value_fault(
                reader,
                &value.span(),
                reader.text().slice(&value.span()),
                "two temperatures above absolute zero, the lower first",
                "write range = [\"280 K\", \"350 K\"]",
            );
            None
        }
    }
}

fn read_estimate(table: &Table<'_, '_>, phase: Option<&Phase>) -> Option<HeatCapacityStatement> {
    let reader = table.reader();
    let text = table.string("estimate")?;
    one_of(reader, &text, &[("kopp", ())])?;
    if let Some(range) = table.get("range") {
        value_fault(
            reader,
            &range.key_span,
            "a range of an estimate",
            "no range: the rule is for 298 K, and the working says how far it is used",
            "leave it out",
        );
    }
    let solid = |phase: &Phase| {
        matches!(
            phase.label,
            PhaseLabel::Solid | PhaseLabel::Crystal | PhaseLabel::Amorphous | PhaseLabel::Vitreous
        )
    };
    // A phase that could not be read has its fault already.
    if !solid(phase?) {
        value_fault(
            reader,
            &text.span,
            "Kopp's rule for what is not a solid",
            "a solid: the rule adds up what atoms contribute in solids",
            "give a `value` with its source, or bounds `low` and `high`",
        );
        return None;
    }
    Some(HeatCapacityStatement::Kopp)
}
