//! `results.json`: what `compute --json` prints and what travels with a record.

use serde::Serialize;
use serde_json::{Map, Value, json};

use super::cycle_json::adjustments;
use crate::calculation::Calculation;
use crate::engine::{AdverseBound, COVERAGE, Outcome};
use crate::finding::{Finding, Place};
use crate::quantity::{Real, exact_text};
use crate::source::{Problem, ValueUsed};

/// The results of a calculation as a JSON document, ending in a line feed. Numbers are unrounded
/// and in the unit that stands beside them; `stated` is the rounded text.
pub fn results_json(calculation: &Calculation) -> String {
    let document = Document {
        record: record(calculation),
        results: results(calculation),
        values_used: values_used(&calculation.problem),
        findings: calculation.working.findings.iter().map(finding).collect(),
        criteria: Map::new(),
    };
    // Maps with string keys and finite numbers always have a JSON form.
    let text = serde_json::to_string_pretty(&document).expect("a document of plain values");
    text + "\n"
}

#[derive(Serialize)]
#[serde(rename_all = "kebab-case")]
struct Document {
    record: Value,
    results: Map<String, Value>,
    values_used: Vec<Value>,
    findings: Vec<Value>,
    /// Criteria are not worked by this version; the key is there so that readers find it.
    criteria: Map<String, Value>,
}

fn record(calculation: &Calculation) -> Value {
    let head = &calculation.case.record;
    json!({
        "number": head.number.value,
        "revision": head.revision.value,
        "title": head.title,
        "facility": head.facility,
        "equipment": head.equipment,
        "related": head.related,
        "date": head.date.to_string(),
        "preparer": head.preparer,
        "status": head.status.value.word(),
    })
}

fn results(calculation: &Calculation) -> Map<String, Value> {
    let outcomes = calculation.working.outcomes.iter();
    let mut results: Map<String, Value> = outcomes
        .map(|outcome| (outcome.id.clone(), result(&calculation.problem, outcome)))
        .collect();
    for (id, adjustment) in adjustments(calculation) {
        if let Some(Value::Object(result)) = results.get_mut(&id) {
            result.insert("adjustment".into(), adjustment);
        }
    }
    results
}

fn result(problem: &Problem, outcome: &Outcome) -> Value {
    let mut map = Map::new();
    map.insert("value".into(), json!(outcome.value.to_f64()));
    if let Some(exact) = outcome.value.exact() {
        map.insert("exact".into(), json!(exact_text(exact)));
    }
    map.insert("unit".into(), json!(outcome.unit.symbol()));
    map.insert("stated".into(), json!(outcome.stated.value_text));
    map.insert(
        "standard-uncertainty".into(),
        json!(outcome.combined.standard),
    );
    map.insert("expanded".into(), json!(outcome.expanded));
    map.insert("coverage".into(), json!(COVERAGE));
    map.insert(
        "covers".into(),
        json!({ "stated": outcome.combined.stated, "of": outcome.combined.of }),
    );
    map.insert("budget".into(), json!(budget(outcome)));
    if !outcome.not_covered.is_empty() {
        map.insert("not-covered".into(), json!(outcome.not_covered));
    }
    if !outcome.adverse.is_empty() {
        map.insert("adverse".into(), json!(adverse(problem, outcome)));
    }
    Value::Object(map)
}

/// The bound of each heat capacity that the result was worked with.
fn adverse(problem: &Problem, outcome: &Outcome) -> Vec<Value> {
    let row = |bound: &AdverseBound| {
        json!({
            "substance": problem.substances[bound.substance].label,
            "bound": bound.bound.word(),
        })
    };
    outcome.adverse.iter().map(row).collect()
}

fn budget(outcome: &Outcome) -> Vec<Value> {
    let shares = &outcome.combined.shares;
    let row = |(index, sensitivity): (usize, &Real)| {
        let share = shares
            .iter()
            .find(|(of, _)| *of == index)
            .and_then(|(_, share)| *share);
        json!({
            "value-used": index + 1,
            "sensitivity": sensitivity.to_f64(),
            "share": share,
        })
    };
    outcome.form.iter().map(row).collect()
}

fn values_used(problem: &Problem) -> Vec<Value> {
    problem
        .values
        .iter()
        .enumerate()
        .map(|(i, v)| value_used(problem, i, v))
        .collect()
}

fn value_used(problem: &Problem, index: usize, value: &ValueUsed) -> Value {
    let head = &problem.sources[value.source].head;
    json!({
        "number": index + 1,
        "substance": value.substance,
        "quantity": value.kind.word(),
        "printed": value.printed_text(),
        "unit": value.printed.unit.symbol(),
        "source": head.id,
        "locator": value.locator,
        "standing": value.standing.word(),
        "sha256": head.sha256,
    })
}

fn finding(finding: &Finding) -> Value {
    json!({
        "severity": finding.severity.to_string(),
        "code": finding.code.word(),
        "message": finding.message,
        "at": place(&finding.at),
    })
}

fn place(place: &Place) -> Value {
    json!({ "file": place.file, "line": place.line, "column": place.column })
}
