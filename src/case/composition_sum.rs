//! What the fractions of a composition have to be together.

use num_traits::{One, Signed};

use crate::document::{Reader, Table, value_fault};
use crate::finding::FaultCode;
use crate::quantity::{Exact, Quantity, exact_text};

use super::composition::{Composition, Context, Share};

/// A substance that stands twice (`CH4(g)` and `CH4( g )`), and a second balance.
pub(super) fn refuse_repeated(reader: &Reader<'_>, composition: &Composition) -> bool {
    let mut names: Vec<String> = Vec::new();
    let mut balances = 0;
    let mut single = true;
    for part in &composition.parts {
        let name = part.substance.value.to_string();
        let again = names.contains(&name);
        let is_balance = matches!(part.share, Share::Balance);
        balances += usize::from(is_balance);
        let second_balance = is_balance && balances > 1;
        if again || second_balance {
            single = false;
            value_fault(
                reader,
                &part.substance.span,
                match again {
                    true => format!("`{name}` a second time"),
                    false => format!("`{name}` as a second balance"),
                },
                "each substance once, and at most one \"balance\"",
                match again {
                    true => "remove one of the two",
                    false => "give the fractions of all substances but one",
                },
            );
        }
        names.push(name);
    }
    single
}

/// The fractions add up to one exactly; with a balance they leave something for it.
pub(super) fn check_sum(
    table: &Table<'_, '_>,
    composition: &Composition,
    context: &Context<'_>,
) -> bool {
    let fractions = composition
        .parts
        .iter()
        .filter_map(|part| match &part.share {
            Share::Fraction(given) => given.quantity(context.inputs),
            Share::Balance => None,
        });
    let sum: Exact = fractions.map(Quantity::value_in_si).sum();
    let balance = composition.balance().is_some();
    let holds = match balance {
        true => sum < Exact::one(),
        false => sum == Exact::one(),
    };
    if holds {
        return true;
    }
    let (expected, advice) = wrong_sum(&(Exact::one() - &sum), balance);
    table.reader().fault(
        FaultCode::Value,
        &table.span,
        format!("fractions that add up to {}", exact_text(&sum)),
        expected,
        advice,
    );
    false
}

/// What is expected of the fractions, and what to do, where `left` remains for what is not named.
fn wrong_sum(left: &Exact, balance: bool) -> (&'static str, String) {
    if balance {
        return (
            "a sum below 1, so that something is left for the balance",
            "check the fractions, or leave the balance out".to_string(),
        );
    }
    let advice = match left.is_positive() {
        true => format!(
            "{} is missing: name it, or make one \"balance\"",
            exact_text(left)
        ),
        false => format!(
            "{} is too much: check, or make one \"balance\"",
            exact_text(&-left)
        ),
    };
    ("fractions that add up to 1 exactly", advice)
}
