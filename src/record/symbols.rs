//! The equations that the working shows in symbols.

use super::math::Math;

pub(super) fn symbol(text: &str) -> Math {
    Math::Symbol { text: text.into() }
}

pub(super) fn upright(text: &str) -> Math {
    Math::Upright { text: text.into() }
}

pub(super) fn row(of: Vec<Math>) -> Math {
    Math::Row { of }
}

pub(super) fn with_sub(base: Math, sub: Math) -> Math {
    Math::Attach {
        base: Box::new(base),
        sub: Some(Box::new(sub)),
        sup: None,
    }
}

fn with_both(base: Math, sub: Math, sup: Math) -> Math {
    Math::Attach {
        base: Box::new(base),
        sub: Some(Box::new(sub)),
        sup: Some(Box::new(sup)),
    }
}

/// Δ_x H°_i
pub(super) fn enthalpy(of: &str, index: Option<&str>) -> Math {
    let h = match index {
        Some(index) => with_both(symbol("H"), symbol(index), upright("°")),
        None => Math::Attach {
            base: Box::new(symbol("H")),
            sub: None,
            sup: Some(Box::new(upright("°"))),
        },
    };
    row(vec![with_sub(upright("Δ"), upright(of)), h])
}

pub(super) fn sum(index: &str) -> Math {
    Math::Sum {
        index: Box::new(symbol(index)),
    }
}

/// Δ_rH° = Σ_i ν_i Δ_fH°_i
pub(super) fn hess_law() -> Math {
    row(vec![
        enthalpy("r", None),
        upright("="),
        sum("i"),
        with_sub(symbol("ν"), symbol("i")),
        enthalpy("f", Some("i")),
    ])
}

/// H_i(T) = Δ_fH°_i + ∫ C_p,i dT, and + Σ Δ_trsH_i where a change of phase is crossed.
pub(super) fn enthalpy_at_temperature(crossed: bool) -> Math {
    let mut of = vec![
        with_sub(symbol("H"), symbol("i")),
        upright("("),
        symbol("T"),
        upright(")"),
        upright("="),
        enthalpy("f", Some("i")),
        upright("+"),
        Math::Integral {
            from: Box::new(with_sub(symbol("T"), upright("0"))),
            to: Box::new(symbol("T")),
        },
        with_sub(
            symbol("C"),
            row(vec![symbol("p"), upright(","), symbol("i")]),
        ),
        upright("d"),
        symbol("T"),
    ];
    if crossed {
        of.extend([
            upright("+"),
            upright("Σ"),
            with_sub(upright("Δ"), upright("trs")),
            with_sub(symbol("H"), symbol("i")),
        ]);
    }
    row(of)
}

/// Δ_rH°(T) = Σ_i ν_i H_i(T)
pub(super) fn heat_at_temperature() -> Math {
    row(vec![
        enthalpy("r", None),
        upright("("),
        symbol("T"),
        upright(")"),
        upright("="),
        sum("i"),
        with_sub(symbol("ν"), symbol("i")),
        with_sub(symbol("H"), symbol("i")),
        upright("("),
        symbol("T"),
        upright(")"),
    ])
}

/// u²(y) = Σ_i (c_i u_i)² + Σ_i≠j r_ij c_i c_j u_i u_j; U = 2 u
pub(super) fn combined_uncertainty() -> Math {
    let indexed = |base: &str, index: &str| with_sub(symbol(base), symbol(index));
    row(vec![
        Math::Attach {
            base: Box::new(symbol("u")),
            sub: None,
            sup: Some(Box::new(upright("2"))),
        },
        upright("="),
        sum("i"),
        with_both(symbol("c"), symbol("i"), upright("2")),
        with_both(symbol("u"), symbol("i"), upright("2")),
        upright("+"),
        upright("2"),
        Math::Sum {
            index: Box::new(row(vec![symbol("i"), upright("<"), symbol("j")])),
        },
        with_sub(symbol("r"), row(vec![symbol("i"), symbol("j")])),
        indexed("c", "i"),
        indexed("c", "j"),
        indexed("u", "i"),
        indexed("u", "j"),
    ])
}

/// M = Σ_k n_k A_k
pub(super) fn molar_mass_sum() -> Math {
    row(vec![
        symbol("M"),
        upright("="),
        sum("k"),
        with_sub(symbol("n"), symbol("k")),
        with_sub(symbol("A"), symbol("k")),
    ])
}

/// Δ_rh = Δ_rH° / (|ν| M)
pub(super) fn per_mass_quotient() -> Math {
    row(vec![
        with_sub(upright("Δ"), upright("r")),
        symbol("h"),
        upright("="),
        Math::Fraction {
            over: Box::new(enthalpy("r", None)),
            under: Box::new(row(vec![
                upright("|"),
                symbol("ν"),
                upright("|"),
                symbol("M"),
            ])),
        },
    ])
}
