//! The probability of a χ² as large as the one found, or larger.

/// Q(χ²|ν), the probability that a χ² of ν degrees of freedom exceeds `chi_square`, in closed
/// form for whole ν: M. Abramowitz and I. A. Stegun, Handbook of Mathematical Functions (1964),
/// 26.4.4 and 26.4.5 (from memory). One where `chi_square` is not positive or ν is zero.
pub fn exceedance(chi_square: f64, degrees_of_freedom: usize) -> f64 {
    if chi_square.is_nan() || chi_square <= 0.0 || degrees_of_freedom == 0 {
        return 1.0;
    }
    let half = chi_square / 2.0;
    let odd = degrees_of_freedom % 2 == 1;
    // Terms half^k/Γ(k+1) for k = 0, 1, … or half^(k−1/2)/Γ(k+1/2) for k = 1, 2, …
    let (start, mut term, mut at) = if odd {
        let root = libm::sqrt(half);
        let first = 2.0 * root / libm::sqrt(core::f64::consts::PI);
        (libm::erfc(root), first, 1.5)
    } else {
        (0.0, 1.0, 1.0)
    };
    let decay = libm::exp(-half);
    let mut sum = 0.0;
    for _ in 0..degrees_of_freedom / 2 {
        sum += term;
        term *= half / at;
        at += 1.0;
    }
    // Beyond all exponents nothing is left, and a product with an infinite sum would be no number.
    let rest = if decay == 0.0 { 0.0 } else { decay * sum };
    (start + rest).min(1.0)
}

/// The χ² that is exceeded with this probability, by halving an interval; to more digits than
/// anyone prints.
pub fn critical(probability: f64, degrees_of_freedom: usize) -> f64 {
    let mut low = 0.0;
    let mut high = 1.0;
    // Doubled at most a thousand times before it would be no number.
    while exceedance(high, degrees_of_freedom) > probability && high < f64::MAX / 4.0 {
        low = high;
        high *= 2.0;
    }
    for _ in 0..60 {
        let middle = (low + high) / 2.0;
        match exceedance(middle, degrees_of_freedom) > probability {
            true => low = middle,
            false => high = middle,
        }
    }
    high
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Upper critical values of χ² as every table of statistics prints them (from memory; read
    /// once more with scipy 1.17.1, `scipy.stats.chi2.isf`).
    #[test]
    fn printed_critical_values() {
        for (dof, chi_square, probability) in [
            (1, 3.841, 0.05),
            (2, 5.991, 0.05),
            (3, 7.815, 0.05),
            (4, 9.488, 0.05),
            (5, 11.070, 0.05),
            (10, 18.307, 0.05),
            (30, 43.773, 0.05),
            (1, 6.635, 0.01),
            (2, 9.210, 0.01),
            (7, 18.475, 0.01),
            (1, 10.828, 0.001),
            (6, 22.458, 0.001),
            (9, 3.325, 0.95),
        ] {
            let found = exceedance(chi_square, dof);
            // Half a unit of the third decimal moves the probability by less than this.
            assert!(
                (found / probability - 1.0).abs() < 1e-3,
                "{dof} {chi_square}: {found}"
            );
            let back = critical(probability, dof);
            assert!(
                (back - chi_square).abs() < 6e-4,
                "{dof} {probability}: {back}"
            );
        }
    }

    #[test]
    fn the_edges_are_probabilities() {
        for dof in [1, 2, 59, 60] {
            assert_eq!(exceedance(0.0, dof), 1.0);
            assert_eq!(exceedance(f64::INFINITY, dof), 0.0);
            assert_eq!(exceedance(1e5, dof), 0.0);
            let small = exceedance(1e-9, dof);
            assert!(small > 0.9999 && small <= 1.0, "{dof}: {small}");
        }
        assert_eq!(exceedance(5.0, 0), 1.0);
        assert!(critical(0.05, 0).is_finite());
    }
}
