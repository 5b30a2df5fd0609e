//! The sample's working: a step of each kind, and equations of each shape and of too great a length.

use super::{s, sulfate, water};
use crate::record::Math;
use crate::record::*;
use crate::record::{Rich, Run};

fn symbol(text: &str) -> Math {
    Math::Symbol { text: s(text) }
}

fn upright(text: &str) -> Math {
    Math::Upright { text: s(text) }
}

fn heat_symbol() -> Math {
    Math::Row {
        of: vec![
            Math::Attach {
                base: Box::new(upright("Δ")),
                sub: Some(Box::new(upright("r"))),
                sup: None,
            },
            Math::Attach {
                base: Box::new(symbol("H")),
                sub: None,
                sup: Some(Box::new(upright("°"))),
            },
        ],
    }
}

fn definition() -> Math {
    Math::Row {
        of: vec![
            heat_symbol(),
            upright("="),
            Math::Sum {
                index: Box::new(symbol("i")),
            },
            Math::Attach {
                base: Box::new(symbol("ν")),
                sub: Some(Box::new(symbol("i"))),
                sup: None,
            },
            upright("·"),
            Math::Fraction {
                over: Box::new(symbol("H")),
                under: Box::new(Math::Root {
                    of: Box::new(symbol("n")),
                }),
            },
            upright("+"),
            Math::Integral {
                from: Box::new(symbol("a")),
                to: Box::new(symbol("T")),
            },
        ],
    }
}

/// A sum of so many terms that it does not fit one line.
fn long_sum() -> Math {
    let mut of = vec![heat_symbol(), upright("=")];
    for _ in 0..9 {
        of.extend([
            upright("2"),
            upright("·"),
            upright("(−285.830 kJ/mol)"),
            upright("+"),
        ]);
    }
    of.push(upright("0"));
    Math::Row { of }
}

/// One term that is wider than a line by itself.
fn wide_fraction() -> Math {
    Math::Fraction {
        over: Box::new(long_sum()),
        under: Box::new(upright("2")),
    }
}

fn equation(math: Math, alt: &str) -> Step {
    Step::Equation { math, alt: s(alt) }
}

pub(super) fn sections() -> Vec<WorkingSection> {
    vec![WorkingSection {
        id: s("hydrogenation"),
        heading: s("Hydrogenation at 298.15 K"),
        steps: vec![
            Step::Reaction {
                text: Rich::plain("nitrobenzene + 3 H")
                    .run(Run::Sub(s("2")))
                    .and("(g) → aniline + 2 ")
                    .with(water()),
            },
            Step::Heading {
                text: s("Hess sum"),
            },
            Step::Text {
                text: Rich::plain("The heat of reaction is the weighted sum of the values used."),
            },
            equation(definition(), "the heat of reaction is a sum"),
            equation(long_sum(), "a sum of nine terms"),
            equation(wide_fraction(), "a wide fraction"),
            Step::Table(sum_table()),
            Step::Result {
                text: Rich::plain("Heat of reaction −552.6 kJ/mol ± 0.8 kJ/mol: released."),
            },
        ],
    }]
}

fn sum_table() -> Table {
    let column = |head: Rich, kind: ColumnKind| Column { head, kind };
    let row = |what: Rich, coefficient: &str, value: &str, mark: &str| {
        vec![
            what,
            Rich::plain(coefficient),
            Rich::plain(value).run(Run::ValueUsed(2)),
            Rich::plain(mark),
        ]
    };
    Table {
        caption: s("Terms of the sum, kJ/mol"),
        columns: vec![
            column(Rich::plain("Substance"), ColumnKind::Text),
            column(Rich::plain("Coefficient"), ColumnKind::Number),
            column(
                Rich::plain("Value").run(Run::ValueUsed(1)),
                ColumnKind::Number,
            ),
            column(Rich::plain("Covered"), ColumnKind::Mark),
        ],
        rows: vec![
            row(water(), "+2", "−285.830 ± 0.040", "yes"),
            row(sulfate(), "−1", "12.5", "no"),
            row(Rich::plain("H2(g)"), "−3/2", "0", "yes"),
        ],
        total: Some(vec![
            Rich::plain("Sum"),
            Rich::default(),
            Rich::plain("−552.6"),
            Rich::default(),
        ]),
    }
}
