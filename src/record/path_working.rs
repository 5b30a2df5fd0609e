//! The molar enthalpy of one participant, from 298.15 K to the temperature, leg by leg.

use crate::engine::{HeatTerm, Worked};
use crate::quantity::{Exact, Real, Significance, cut_text, exact_text, order_of_magnitude};
use crate::source::{Form, FunctionTerm, HeatCapacity, Leg, Problem, Start};

use super::given_working::{concentration_step, made_of_steps};
use super::heat_working::shown;
use super::numerals::minus;
use super::pages::{Step, Table};
use super::rich::{Rich, Run};
use super::tables::{number, text};

/// How the increment of a participant comes about; nothing for one that stays at 298.15 K.
pub(super) fn path_steps(problem: &Problem, term: &HeatTerm) -> Vec<Step> {
    let path = &problem.paths[term.path];
    let substance = &problem.substances[term.substance];
    let mut steps = Vec::new();
    if path.legs.is_empty() && matches!(path.start, Start::Printed { .. }) {
        return steps;
    }
    let name = Rich::from(substance.species.pieces());
    if let Start::Function { value, constant } = path.start {
        let at = [None, Some(&path.kelvin)];
        steps.push(Step::Text {
            text: name
                .clone()
                .and(": the function ")
                .run(Run::ValueUsed(value + 1))
                .and(format!(
                    " carries its integration constant, so it gives the enthalpy at {} K on the \
                     scale of formation enthalpies itself; changes of phase at lower temperatures \
                     are contained in that constant, value ",
                    kelvin(&path.kelvin)
                ))
                .run(Run::ValueUsed(constant + 1))
                .and("."),
        });
        let said = name
            .clone()
            .and(", function ")
            .run(Run::ValueUsed(value + 1));
        steps.extend(function_steps(problem, value, at, said, &term.start));
    }
    for (leg, worked) in path.legs.iter().zip(&term.legs) {
        steps.extend(leg_steps(problem, leg, worked, &name));
    }
    steps
}

fn leg_steps(problem: &Problem, leg: &Leg, worked: &Worked, name: &Rich) -> Vec<Step> {
    match leg {
        Leg::Heating { value, from, to } => {
            let said = name
                .clone()
                .and(format!(
                    ", {} K to {} K, function ",
                    kelvin(from),
                    kelvin(to)
                ))
                .run(Run::ValueUsed(value + 1));
            let mut steps = made_of_steps(problem, *value);
            let along = [Some(from), Some(to)];
            steps.extend(function_steps(problem, *value, along, said, worked));
            steps
        }
        Leg::Concentration { value } => vec![concentration_step(problem, *value, worked, name)],
        Leg::Scale {
            from_value,
            from,
            to_value,
            to,
        } => scale_steps(problem, (*from_value, from), (*to_value, to), worked, name),
        Leg::Transition { value, .. } => vec![Step::Text {
            text: transition(problem, *value, leg, worked),
        }],
    }
}

fn transition(problem: &Problem, value: usize, leg: &Leg, worked: &Worked) -> Rich {
    let turned = match leg {
        Leg::Transition { forward: false, .. } => ", turned",
        _ => "",
    };
    Rich::plain(format!("{}{turned}: ", problem.values[value].substance))
        .run(Run::ValueUsed(value + 1))
        .and(format!(" {} J/mol", shown(worked)))
}

/// From one function to another whose integration constants share a scale: H(T) of both.
fn scale_steps(
    problem: &Problem,
    from: (usize, &Exact),
    to: (usize, &Exact),
    worked: &Worked,
    name: &Rich,
) -> Vec<Step> {
    let mut steps = Vec::new();
    for (value, at) in [to, from] {
        let said = name
            .clone()
            .and(format!(
                ", on the scale of its source at {} K, function ",
                kelvin(at)
            ))
            .run(Run::ValueUsed(value + 1));
        let Some(total) = on_scale(problem, value, at) else {
            continue;
        };
        steps.extend(function_steps(
            problem,
            value,
            [None, Some(at)],
            said,
            &total,
        ));
    }
    steps.push(Step::Text {
        text: name.clone().and(format!(
            ": the difference of the two, {} J/mol, is the increment from {} K to {} K.",
            shown(worked),
            kelvin(from.1),
            kelvin(to.1)
        )),
    });
    steps
}

fn on_scale(problem: &Problem, value: usize, at: &Exact) -> Option<Worked> {
    let used = &problem.values[value];
    let function = used.function.as_ref()?;
    Some(Worked {
        value: function.enthalpy(at, &gas_constant(problem, value))?,
        significance: Significance::Unlimited,
        form: Default::default(),
    })
}

fn gas_constant(problem: &Problem, value: usize) -> Exact {
    let head = &problem.sources[problem.values[value].source].head;
    let stated = head.gas_constant.as_ref();
    stated.map_or_else(|| Exact::from_integer(0.into()), |r| r.value())
}

/// The terms of a function, each with its coefficient, its factor and their product.
fn function_steps(
    problem: &Problem,
    value: usize,
    bounds: [Option<&Exact>; 2],
    said: Rich,
    total: &Worked,
) -> Vec<Step> {
    let used = &problem.values[value];
    let ([from, Some(to)], Some(function)) = (bounds, used.function.as_ref()) else {
        return Vec::new();
    };
    if let (Form::Constant, Some(from)) = (function.form, from) {
        return vec![Step::Text {
            text: said.and(constant(function, from, to, total)),
        }];
    }
    let r = gas_constant(problem, value);
    let terms = function.terms(from, to, &r);
    vec![
        Step::Text {
            text: said.and(explained(function, &r)),
        },
        Step::Table(terms_table(&terms, total)),
    ]
}

/// 191.9·(333.15 − 298.15) = 6716.5 J/mol
fn constant(function: &HeatCapacity, from: &Exact, to: &Exact, total: &Worked) -> String {
    let constant = function.coefficients.first();
    let constant = constant.map_or(String::new(), |c| minus(c.printed()));
    format!(
        ": heat capacity {constant} J/(mol K), constant; {constant} · ({} − {}) = {} J/mol.",
        kelvin(to),
        kelvin(from),
        shown(total)
    )
}

fn explained(function: &HeatCapacity, r: &Exact) -> String {
    let form = function.form.word();
    match function.form {
        Form::Nasa7 | Form::Nasa9 => format!(
            " ({form}): each coefficient times its factor and R = {} J/(mol K), which the source \
             states for its functions; b2 or a7 belongs to the entropy.",
            exact_text(r)
        ),
        Form::Shomate => format!(
            " ({form}): each coefficient times its factor, with t = T/1000 K; kJ/mol become J/mol."
        ),
        Form::Table => format!(" ({form}): straight lines between the printed points."),
        _ => format!(" ({form}): each coefficient times its factor."),
    }
}

/// Products are shown to this place, so that large ones that cancel still give the sum.
const PRODUCT_PLACE: i64 = -4;

/// Digits of a factor.
const FACTOR_DIGITS: i64 = 14;

fn factor(value: &Real) -> String {
    let order = value
        .to_exact()
        .and_then(|exact| order_of_magnitude(&exact));
    let place = order.map_or(0, |order| order + 1 - FACTOR_DIGITS);
    cut_text(value, place.min(PRODUCT_PLACE))
}

fn terms_table(terms: &[FunctionTerm], total: &Worked) -> Table {
    let cell = |text: String| Rich::plain(minus(&text));
    let rows = terms.iter().map(|term| {
        vec![
            Rich::plain(term.name.clone()),
            Rich::plain(minus(&term.coefficient)),
            cell(factor(&term.factor)),
            cell(cut_text(&term.product, PRODUCT_PLACE)),
        ]
    });
    Table {
        caption: "Terms of the function".to_string(),
        columns: vec![
            text("Term"),
            number(Rich::plain("Coefficient")),
            number(Rich::plain("Factor")),
            number(Rich::plain("Product, J/mol")),
        ],
        rows: rows.collect(),
        total: Some(vec![
            Rich::plain("Sum"),
            Rich::default(),
            Rich::default(),
            Rich::plain(shown(total)),
        ]),
    }
}

fn kelvin(value: &Exact) -> String {
    minus(&exact_text(value))
}
