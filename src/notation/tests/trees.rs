//! Random notation, well-formed by construction.

use proptest::prelude::*;

use crate::notation::Element;

/// The symbol of an element.
fn symbol() -> impl Strategy<Value = String> {
    let symbols: Vec<_> = Element::all().map(Element::symbol).collect();
    prop::sample::select(symbols).prop_map(str::to_owned)
}

/// A count as it is written. Decimals from 2 are left to the tables: where they may stand
/// depends on what follows.
fn count() -> impl Strategy<Value = String> {
    prop_oneof![
        4 => Just(String::new()),
        4 => (2u32..200).prop_map(|count| count.to_string()),
        1 => (1u32..1000).prop_map(|part| format!("0.{part:03}")),
        1 => (1u32..1000).prop_map(|part| format!("1.{part:03}")),
        1 => (2u32..100).prop_map(subscript),
    ]
}

fn subscript(count: u32) -> String {
    let digits = ['₀', '₁', '₂', '₃', '₄', '₅', '₆', '₇', '₈', '₉'];
    let text = count.to_string();
    text.bytes()
        .map(|digit| digits[usize::from(digit - b'0')])
        .collect()
}

fn items() -> impl Strategy<Value = String> {
    let item = (symbol(), count()).prop_map(|(symbol, count)| symbol + &count);
    item.prop_recursive(4, 16, 4, |inner| {
        let bracket = prop::sample::select(vec![("(", ")"), ("[", "]"), ("{", "}")]);
        (prop::collection::vec(inner, 1..4), count(), bracket).prop_map(
            |(items, count, (open, close))| format!("{open}{}{close}{count}", items.concat()),
        )
    })
}

/// Elements and groups, without added parts and charge.
pub(super) fn part() -> impl Strategy<Value = String> {
    prop::collection::vec(items(), 1..4).prop_map(|items| items.concat())
}

fn charge() -> impl Strategy<Value = String> {
    prop_oneof![
        3 => Just(String::new()),
        1 => Just("^+".to_owned()),
        1 => Just("^-".to_owned()),
        2 => (1u32..100, prop::bool::ANY)
            .prop_map(|(number, plus)| format!("^{number}{}", if plus { '+' } else { '-' })),
    ]
}

/// A formula as it could be typed.
pub(super) fn formula() -> impl Strategy<Value = String> {
    let multiplier = prop_oneof![
        Just(String::new()),
        (1u32..30).prop_map(|number| number.to_string()),
        (1u32..30, 1u32..30).prop_map(|(p, q)| format!("{p}/{q}")),
    ];
    let added = (multiplier, part()).prop_map(|(number, part)| format!("·{number}{part}"));
    let parts = (part(), prop::collection::vec(added, 0..2), charge());
    parts.prop_map(|(first, added, charge)| format!("{first}{}{charge}", added.concat()))
}

fn phase() -> impl Strategy<Value = String> {
    let plain = prop::sample::select(vec!["g", "l", "s", "cr", "am", "vit", "aq", "stable"]);
    prop_oneof![
        plain.prop_map(str::to_owned),
        "(cr|s|am|vit),[ ]?[a-zA-Zα-ω0-9][a-z0-9'. -]{0,10}",
        "aq, ?[1-9][0-9]{0,3} H2O",
    ]
}

fn participant() -> impl Strategy<Value = String> {
    prop_oneof![
        2 => (formula(), phase()).prop_map(|(formula, phase)| format!("{formula}({phase})")),
        1 => "[a-df-z][a-z0-9-]{0,8}",
        1 => Just("e-".to_owned()),
    ]
}

fn term() -> impl Strategy<Value = String> {
    let coefficient = prop_oneof![
        Just(String::new()),
        "[1-9][0-9]{0,3} ",
        "[1-9][0-9]{0,2}\\.[0-9]{1,3} ",
        "[1-9]/[1-9] ",
    ];
    (coefficient, participant()).prop_map(|(number, participant)| number + &participant)
}

/// An equation as it could be typed; participants may repeat.
pub(super) fn equation() -> impl Strategy<Value = String> {
    let side = || prop::collection::vec(term(), 1..4).prop_map(|terms| terms.join(" + "));
    let arrow = prop::sample::select(vec![" -> ", " → ", " = ", "\n⟶ "]);
    (side(), arrow, side()).prop_map(|(left, arrow, right)| format!("{left}{arrow}{right}"))
}
