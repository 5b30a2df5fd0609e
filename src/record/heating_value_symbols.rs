//! The equations of heating values in symbols (those of ISO 6976, from memory).

use super::math::Math;
use super::symbols::{row, sum, symbol, upright, with_sub};

fn fraction(over: Math, under: Math) -> Math {
    Math::Fraction {
        over: Box::new(over),
        under: Box::new(under),
    }
}

/// H_G = Σ_j x_j H_j
pub(super) fn gross_sum() -> Math {
    row(vec![
        with_sub(symbol("H"), upright("G")),
        upright("="),
        sum("j"),
        with_sub(symbol("x"), symbol("j")),
        with_sub(symbol("H"), symbol("j")),
    ])
}

/// H_N = H_G − L Σ_j x_j b_j/2
pub(super) fn net_difference() -> Math {
    row(vec![
        with_sub(symbol("H"), upright("N")),
        upright("="),
        with_sub(symbol("H"), upright("G")),
        upright("−"),
        symbol("L"),
        sum("j"),
        with_sub(symbol("x"), symbol("j")),
        fraction(with_sub(symbol("b"), symbol("j")), upright("2")),
    ])
}

/// M = Σ_j x_j M_j; h = H/M
pub(super) fn per_mass() -> Math {
    row(vec![
        symbol("M"),
        upright("="),
        sum("j"),
        with_sub(symbol("x"), symbol("j")),
        with_sub(symbol("M"), symbol("j")),
    ])
}

/// x_j = (w_j/M_j)/Σ_k w_k/M_k
pub(super) fn mole_fractions() -> Math {
    let part = |index: &str| {
        fraction(
            with_sub(symbol("w"), symbol(index)),
            with_sub(symbol("M"), symbol(index)),
        )
    };
    row(vec![
        with_sub(symbol("x"), symbol("j")),
        upright("="),
        part("j"),
        upright("/"),
        sum("k"),
        part("k"),
    ])
}

/// V = R T_2/p_2
pub(super) fn molar_volume() -> Math {
    row(vec![
        symbol("V"),
        upright("="),
        fraction(
            row(vec![symbol("R"), with_sub(symbol("T"), upright("2"))]),
            with_sub(symbol("p"), upright("2")),
        ),
    ])
}

/// Z = 1 − (p_2/p_0)(Σ_j x_j s_j)²
pub(super) fn summation() -> Math {
    let squared = Math::Attach {
        base: Box::new(upright(")")),
        sub: None,
        sup: Some(Box::new(upright("2"))),
    };
    row(vec![
        symbol("Z"),
        upright("="),
        upright("1"),
        upright("−"),
        fraction(
            with_sub(symbol("p"), upright("2")),
            with_sub(symbol("p"), upright("0")),
        ),
        upright("("),
        sum("j"),
        with_sub(symbol("x"), symbol("j")),
        with_sub(symbol("s"), symbol("j")),
        squared,
    ])
}

/// Z = 1 + B/V
pub(super) fn virial() -> Math {
    row(vec![
        symbol("Z"),
        upright("="),
        upright("1"),
        upright("+"),
        fraction(symbol("B"), symbol("V")),
    ])
}
