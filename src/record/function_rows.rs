//! The heat-capacity functions among the values used, coefficient by coefficient.

use crate::quantity::Quantity;
use crate::source::{Form, HeatCapacity, Problem};

use super::numerals::minus;
use super::pages::FunctionRow;
use super::value_rows::substance;

pub(super) fn function_rows(problem: &Problem) -> Vec<FunctionRow> {
    let mut rows = Vec::new();
    for (index, value) in problem.values.iter().enumerate() {
        // A constant stands in the table of values itself.
        let function = value.function.as_ref();
        let Some(function) = function.filter(|f| f.form != Form::Constant) else {
            continue;
        };
        rows.push(FunctionRow {
            value_used: index + 1,
            substance: substance(value),
            form: function.form.word().to_string(),
            range: range(function),
            equation: equation(function.form).to_string(),
            numbers: numbers(function),
        });
    }
    rows
}

/// "200.000 K to 1000.000 K"; nothing where the source states none.
pub(super) fn range(function: &HeatCapacity) -> String {
    function.range.as_ref().map_or(String::new(), |range| {
        let [low, high] = range.each_ref().map(Quantity::to_string);
        minus(&format!("{low} to {high}"))
    })
}

fn numbers(function: &HeatCapacity) -> Vec<(String, String)> {
    let names = function.form.coefficient_names();
    let name = |index: usize| {
        let known = names.get(index);
        known.map_or_else(|| format!("a{index}"), ToString::to_string)
    };
    let coefficients = function.coefficients.iter().enumerate();
    let coefficients = coefficients.map(|(i, c)| (name(i), minus(c.printed())));
    let points = function.points.iter();
    let points = points.map(|[t, cp]| (format!("{} K", t.printed()), minus(cp.printed())));
    coefficients.chain(points).collect()
}

fn equation(form: Form) -> &'static str {
    match form {
        Form::Constant => "Cp = c",
        Form::Polynomial => "Cp = a0 + a1·T + a2·T² + …",
        Form::MaierKelley => "Cp = a + b·T + c/T²",
        Form::Shomate => {
            "Cp = A + B·t + C·t² + D·t³ + E/t², t = T/1000 K; \
             H in kJ/mol = A·t + B·t²/2 + C·t³/3 + D·t⁴/4 − E/t + F"
        }
        Form::Nasa7 => {
            "Cp/R = a1 + a2·T + a3·T² + a4·T³ + a5·T⁴; \
             H/R = a1·T + a2·T²/2 + a3·T³/3 + a4·T⁴/4 + a5·T⁵/5 + a6"
        }
        Form::Nasa9 => {
            "Cp/R = a1/T² + a2/T + a3 + a4·T + a5·T² + a6·T³ + a7·T⁴; \
             H/R = −a1/T + a2·ln T + a3·T + a4·T²/2 + a5·T³/3 + a6·T⁴/4 + a7·T⁵/5 + b1"
        }
        Form::Table => "Cp on straight lines between the points",
    }
}
