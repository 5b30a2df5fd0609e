//! Reading `[cycles]`.

use indexmap::IndexMap;
use num_traits::One;

use crate::document::{Table, notation_fault, number, one_of, value_fault};
use crate::finding::{FaultCode, Located};
use crate::notation::Equation;
use crate::quantity::{Dimension, Exact, Quantity};

use super::cycle::{Cycle, CycleStep, StepCorrelation, StepHeat};
use super::cycle_steps::StepReader;
use super::ids::Ids;
use super::model::{DeclaredSubstance, Input};
use super::results::{ResultQuantity, Results};

/// The most steps of a cycle.
pub(super) const MOST_STEPS: usize = 60;

/// The result that a cycle has.
pub(super) fn result_quantities() -> [ResultQuantity; 1] {
    [ResultQuantity {
        name: "heat",
        dimension: Dimension::ENERGY.over(Dimension::AMOUNT),
        needs: None,
    }]
}

/// What the cycles of a case may refer to.
pub(super) struct Surroundings<'a> {
    pub(super) ids: &'a Ids,
    pub(super) inputs: &'a IndexMap<String, Input>,
    pub(super) substances: &'a IndexMap<String, DeclaredSubstance>,
    pub(super) results: &'a Results,
}

pub(super) fn read_cycles(
    table: Option<&Table<'_, '_>>,
    around: &Surroundings<'_>,
) -> IndexMap<String, Cycle> {
    let mut cycles = IndexMap::new();
    for (id, value) in table.map_or_else(Vec::new, Table::entries) {
        let Some(table) = value.table() else { continue };
        if let Some(cycle) = read_cycle(&table, id, around) {
            cycles.insert(cycle.id.value.clone(), cycle);
        }
    }
    cycles
}

fn read_cycle(
    table: &Table<'_, '_>,
    id: Located<String>,
    around: &Surroundings<'_>,
) -> Option<Cycle> {
    table.only(&["target", "steps", "correlations", "inflate"]);
    let advice = "write target = \"7 C(cr, graphite) + 3 H2(g) + O2(g) -> benzoic-acid\"";
    let target = table.required_string("target", advice);
    let target = target.and_then(|text| read_equation(table, around, &text));
    let inflate = table.string("inflate");
    let inflate =
        inflate.filter(|text| one_of(table.reader(), text, &[("birge-ratio", ())]).is_some());
    let steps = read_steps(table, around)?;
    let correlations = read_correlations(table, &steps);
    Some(Cycle {
        id,
        target: target?,
        steps,
        correlations,
        inflate: inflate.map(|text| text.span),
    })
}

/// An equation whose participants are known.
pub(super) fn read_equation(
    table: &Table<'_, '_>,
    around: &Surroundings<'_>,
    text: &Located<String>,
) -> Option<Located<Equation>> {
    match Equation::parse(&text.value) {
        Ok(equation) => {
            let equation = Located::new(equation, text.span.clone());
            let (ids, substances) = (around.ids, around.substances);
            super::reactions::check_participants(table.reader(), ids, substances, &equation, text);
            Some(equation)
        }
        Err(errors) => {
            for error in &errors {
                notation_fault(table.reader(), text, error);
            }
            None
        }
    }
}

/// The steps; none where one of them could not be read, because the others alone would answer
/// differently.
fn read_steps(table: &Table<'_, '_>, around: &Surroundings<'_>) -> Option<Vec<CycleStep>> {
    let advice = "add steps = [{ equation = \"…\", heat = \"…\", measured = \"enthalpy\" }]";
    let Some(value) = table.get("steps") else {
        table.missing("steps", advice);
        return None;
    };
    let count = value.count();
    let tables = value.tables();
    let read = |table: &Table<'_, '_>| StepReader { table, around }.read();
    let steps: Vec<Option<CycleStep>> = tables.iter().map(read).collect();
    let steps: Vec<CycleStep> = steps.into_iter().flatten().collect();
    check_ids(table, &steps);
    if count == 0 || count > MOST_STEPS {
        value_fault(
            table.reader(),
            &value.span(),
            format!("{count} steps"),
            format!("from 1 to {MOST_STEPS} steps"),
            if count == 0 {
                advice
            } else {
                "divide the cycle into several"
            },
        );
        return None;
    }
    (steps.len() == count).then_some(steps)
}

fn check_ids(table: &Table<'_, '_>, steps: &[CycleStep]) {
    for (index, step) in steps.iter().enumerate() {
        let Some(id) = &step.id else { continue };
        let mut earlier = steps[..index].iter().filter_map(|s| s.id.as_ref());
        if earlier.any(|other| other.value == id.value) {
            table.reader().fault(
                FaultCode::DuplicateId,
                &id.span,
                format!("the id `{}` a second time", id.value),
                "an id of its own for each step of the cycle",
                "rename one of the two",
            );
        }
    }
}

fn read_correlations(table: &Table<'_, '_>, steps: &[CycleStep]) -> Vec<StepCorrelation> {
    let tables = table.tables("correlations");
    let read = |table: &Table<'_, '_>| read_correlation(table, steps);
    tables.iter().filter_map(read).collect()
}

fn read_correlation(table: &Table<'_, '_>, steps: &[CycleStep]) -> Option<StepCorrelation> {
    table.only(&["between", "coefficient", "source", "locator"]);
    let text = table.required_string("coefficient", "write it as \"0.5\"");
    let coefficient = text.and_then(|text| read_coefficient(table, &text));
    if table.get("between").is_none() {
        table.missing(
            "between",
            "name two steps: between = [\"run-1\", \"run-2\"]",
        );
        return None;
    }
    let names = table.strings("between");
    let places: Option<Vec<usize>> = names
        .iter()
        .map(|name| step_of(table, steps, name))
        .collect();
    let places = places?;
    let [a, b] = places[..] else {
        return refuse_pair(table, format!("{} names", places.len()));
    };
    if a == b {
        return refuse_pair(table, "one step twice".to_string());
    }
    Some(StepCorrelation {
        between: [a, b],
        coefficient: coefficient?,
        source: table.string("source").map(|t| t.value),
        locator: table.string("locator").map(|t| t.value),
        span: table.span.clone(),
    })
}

fn refuse_pair<T>(table: &Table<'_, '_>, found: String) -> Option<T> {
    value_fault(
        table.reader(),
        &table.span,
        found,
        "two different steps of this cycle",
        "write between = [\"run-1\", \"run-2\"]",
    );
    None
}

fn read_coefficient(table: &Table<'_, '_>, text: &Located<String>) -> Option<Quantity> {
    let number = number(table.reader(), text)?.value;
    let coefficient = number.decimal.value();
    let one = Exact::one();
    if coefficient <= one && coefficient >= -one {
        return Some(number);
    }
    value_fault(
        table.reader(),
        &text.span,
        format!("the coefficient {}", text.value),
        "a coefficient from -1 to 1",
        "check it against the report",
    );
    None
}

/// The step that a correlation names. Only heats that the case states have correlations to be
/// stated: those of results follow from the values that they share.
fn step_of(table: &Table<'_, '_>, steps: &[CycleStep], name: &Located<String>) -> Option<usize> {
    let place = steps
        .iter()
        .position(|step| step.id.as_ref().is_some_and(|id| id.value == name.value));
    let Some(place) = place else {
        let ids = steps.iter().filter_map(|s| s.id.as_ref());
        let ids: Vec<&str> = ids.map(|id| id.value.as_str()).collect();
        table.reader().fault(
            FaultCode::UnknownId,
            &name.span,
            format!("`{}`", name.value),
            format!("the id of a step of this cycle: {}", ids.join(", ")),
            "give the step an id: { id = \"run-1\", … }",
        );
        return None;
    };
    let stated = match &steps[place].heat {
        StepHeat::Given(given) => !matches!(given, super::given::Given::Result(_)),
        StepHeat::CombustionOf(_) => false,
    };
    if !stated {
        value_fault(
            table.reader(),
            &name.span,
            format!("`{}`, whose heat the case does not state", name.value),
            "steps whose heat is stated in the case",
            "leave it out: results are correlated through the values that they share",
        );
        return None;
    }
    Some(place)
}
