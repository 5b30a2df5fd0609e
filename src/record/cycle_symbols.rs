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

/// m_k = Σ_j n_jk q_j
pub(super) fn misclosure() -> Math {
    row(vec![
        with_sub(symbol("m"), symbol("k")),
        upright("="),
        sum("j"),
        with_sub(symbol("n"), row(vec![symbol("j"), symbol("k")])),
        with_sub(symbol("q"), symbol("j")),
    ])
}

/// S = NᵀVN
pub(super) fn spread() -> Math {
    row(vec![
        symbol("S"),
        upright("="),
        transposed("N"),
        symbol("V"),
        symbol("N"),
    ])
}

/// y = S⁻¹ m
pub(super) fn correlates() -> Math {
    row(vec![symbol("y"), upright("="), inverse("S"), symbol("m")])
}

/// v = V N y
pub(super) fn residuals() -> Math {
    row(vec![
        symbol("v"),
        upright("="),
        symbol("V"),
        symbol("N"),
        symbol("y"),
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
