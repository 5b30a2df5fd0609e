//! The equations that the working of a cycle shows in symbols.

use super::math::Math;
use super::symbols::{enthalpy, row, sum, symbol, upright, with_sub};

fn squared(base: Math) -> Math {
    let (base, sub) = match base {
        Math::Attach { base, sub, .. } => (base, sub),
        other => (Box::new(other), None),
    };
    Math::Attach {
        base,
        sub,
        sup: Some(Box::new(upright("2"))),
    }
}

fn inverse(base: &str) -> Math {
    Math::Attach {
        base: Box::new(symbol(base)),
        sub: None,
        sup: Some(Box::new(upright("\u{2212}1"))),
    }
}

fn transposed(base: &str) -> Math {
    Math::Attach {
        base: Box::new(symbol(base)),
        sub: None,
        sup: Some(Box::new(upright("T"))),
    }
}

/// Δ_rH° = Σ_j w_j Δ_rH°_j
pub(super) fn cycle_sum() -> Math {
    row(vec![
        enthalpy("r", None),
        upright("="),
        sum("j"),
        with_sub(symbol("w"), symbol("j")),
        enthalpy("r", Some("j")),
    ])
}

/// ν_i = Σ_j w_j ν_ij
pub(super) fn multiplier_condition() -> Math {
    row(vec![
        with_sub(symbol("ν"), symbol("i")),
        upright("="),
        sum("j"),
        with_sub(symbol("w"), symbol("j")),
        with_sub(symbol("ν"), row(vec![symbol("i"), symbol("j")])),
    ])
}

/// Δ_rH° = Δ_rU° + Δn_gas R T
pub(super) fn bomb_to_enthalpy() -> Math {
    let internal_energy = Math::Attach {
        base: Box::new(symbol("U")),
        sub: None,
        sup: Some(Box::new(upright("°"))),
    };
    row(vec![
        enthalpy("r", None),
        upright("="),
        with_sub(upright("Δ"), upright("r")),
        internal_energy,
        upright("+"),
        upright("Δ"),
        with_sub(symbol("n"), upright("gas")),
        symbol("R"),
        symbol("T"),
    ])
}

/// m_k = Σ_j b_jk q_j
pub(super) fn misclosure() -> Math {
    row(vec![
        with_sub(symbol("m"), symbol("k")),
        upright("="),
        sum("j"),
        with_sub(symbol("b"), row(vec![symbol("j"), symbol("k")])),
        with_sub(symbol("q"), symbol("j")),
    ])
}

/// S = BᵀVB
pub(super) fn spread() -> Math {
    row(vec![
        symbol("S"),
        upright("="),
        transposed("B"),
        symbol("V"),
        symbol("B"),
    ])
}

/// y = S⁻¹ m
pub(super) fn correlates() -> Math {
    row(vec![symbol("y"), upright("="), inverse("S"), symbol("m")])
}

/// λ = B y
pub(super) fn gradients() -> Math {
    row(vec![symbol("λ"), upright("="), symbol("B"), symbol("y")])
}

/// e = V λ
pub(super) fn residuals() -> Math {
    row(vec![symbol("e"), upright("="), symbol("V"), symbol("λ")])
}

/// One entry of the diagonal of a product of matrices.
fn diagonal(product: Vec<Math>) -> Math {
    let brackets = [vec![upright("(")], product, vec![upright(")")]].concat();
    with_sub(row(brackets), row(vec![symbol("i"), symbol("i")]))
}

/// t_i = λ_i/s_i
pub(super) fn normalised() -> Math {
    row(vec![
        with_sub(symbol("t"), symbol("i")),
        upright("="),
        Math::Fraction {
            over: Box::new(with_sub(symbol("λ"), symbol("i"))),
            under: Box::new(with_sub(symbol("s"), symbol("i"))),
        },
    ])
}

/// s_i = √(B S⁻¹ Bᵀ)_ii
pub(super) fn scatter() -> Math {
    row(vec![
        with_sub(symbol("s"), symbol("i")),
        upright("="),
        Math::Root {
            of: Box::new(diagonal(vec![symbol("B"), inverse("S"), transposed("B")])),
        },
    ])
}

/// ρ_i = (V B S⁻¹ Bᵀ)_ii
pub(super) fn checked_part() -> Math {
    row(vec![
        with_sub(symbol("ρ"), symbol("i")),
        upright("="),
        diagonal(vec![
            symbol("V"),
            symbol("B"),
            inverse("S"),
            transposed("B"),
        ]),
    ])
}

/// share_i = c_i u_i Σ_j r_ij c_j u_j / u²
pub(super) fn share() -> Math {
    let product = |index: &str| {
        row(vec![
            with_sub(symbol("c"), symbol(index)),
            with_sub(symbol("u"), symbol(index)),
        ])
    };
    row(vec![
        with_sub(upright("share"), symbol("i")),
        upright("="),
        Math::Fraction {
            over: Box::new(product("i")),
            under: Box::new(squared(symbol("u"))),
        },
        sum("j"),
        with_sub(symbol("r"), row(vec![symbol("i"), symbol("j")])),
        product("j"),
    ])
}

/// χ² = Σ_k m_k y_k
pub(super) fn chi_square() -> Math {
    row(vec![
        squared(symbol("χ")),
        upright("="),
        sum("k"),
        with_sub(symbol("m"), symbol("k")),
        with_sub(symbol("y"), symbol("k")),
    ])
}

/// R_B = √(χ²/f)
pub(super) fn birge_ratio() -> Math {
    row(vec![
        with_sub(symbol("R"), upright("B")),
        upright("="),
        Math::Root {
            of: Box::new(Math::Fraction {
                over: Box::new(squared(symbol("χ"))),
                under: Box::new(symbol("f")),
            }),
        },
    ])
}
