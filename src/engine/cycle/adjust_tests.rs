//! The adjustment against hand calculation, laws that hold for any cycle, and simulation.

use num_traits::Signed;
use proptest::prelude::*;

use super::super::multipliers::multipliers;
use super::*;
use crate::quantity::Decimal;

fn exact(text: &str) -> Exact {
    Decimal::parse(text).unwrap().value()
}

fn whole(numbers: &[i64]) -> Vec<Exact> {
    numbers
        .iter()
        .map(|n| Exact::from_integer((*n).into()))
        .collect()
}

/// Standard uncertainties in tenths, without correlation.
fn independent(tenths: &[i64]) -> Vec<Vec<Exact>> {
    let entry = |a: usize, b: usize| match a == b {
        true => Exact::new((tenths[a] * tenths[a]).into(), 100.into()),
        false => Exact::zero(),
    };
    let size = tenths.len();
    (0..size)
        .map(|a| (0..size).map(|b| entry(a, b)).collect())
        .collect()
}

fn near(a: f64, b: f64) -> bool {
    (a - b).abs() <= 1e-12 * a.abs().max(b.abs()).max(1.0)
}

/// 10.0 with u = 1 and 13.0 with u = 2 of one reaction, by hand: weights 4/5 and 1/5, mean 10.6,
/// χ² = 3²/(1 + 4) = 1.8, residuals −0.6 and 2.4, each scattering by 1²/√5 and 2²/√5.
#[test]
fn two_determinations_give_the_weighted_mean() {
    let steps = [whole(&[1]), whole(&[1])];
    let found = multipliers(&whole(&[1]), &steps).unwrap();
    let heats = [exact("10.0"), exact("13.0")];
    let adjusted = adjust(&heats, &independent(&[10, 20]), &found).unwrap();
    assert_eq!(adjusted.weights, [exact("0.8"), exact("0.2")]);
    assert_eq!(dot(&adjusted.weights, &heats), exact("10.6"));
    assert_eq!(adjusted.residuals, [exact("-0.6"), exact("2.4")]);
    assert!(near(adjusted.chi_square, 1.8));
    assert_eq!(adjusted.degrees_of_freedom, 1);
    assert!(near(adjusted.birge_ratio(), libm::sqrt(1.8)));
    // With two of them nobody can say which is off: both are as large as √χ².
    for size in &adjusted.normalised {
        assert!(near(size.unwrap().abs(), libm::sqrt(1.8)));
    }
    assert!(near(adjusted.redundancy[0], 0.2) && near(adjusted.redundancy[1], 0.8));
    // e/u², and √(1/5) of both; the mean has u² = 0.64 + 0.04·4 = 0.8, times 1.8 it is 1.2².
    assert!(near(adjusted.gradients[0], -0.6) && near(adjusted.gradients[1], 0.6));
    for scatter in &adjusted.gradient_uncertainty {
        assert!(near(*scatter, libm::sqrt(0.2)));
    }
    assert!(near(adjusted.checked.standard, libm::sqrt(0.8)));
    assert!(near(adjusted.checked.inflated, 1.2));
}

/// The same with r = 0.5, by hand: weights (4 − 1)/(1 + 4 − 2) = 1 and 0: the worse one adds
/// nothing. Its residual is 3 and the scatter of the difference √3.
#[test]
fn correlation_is_honoured() {
    let steps = [whole(&[1]), whole(&[1])];
    let found = multipliers(&whole(&[1]), &steps).unwrap();
    let mut covariance = independent(&[10, 20]);
    covariance[0][1] = exact("1");
    covariance[1][0] = exact("1");
    let adjusted = adjust(&[exact("10.0"), exact("13.0")], &covariance, &found).unwrap();
    assert_eq!(adjusted.weights, whole(&[1, 0]));
    assert_eq!(adjusted.residuals, whole(&[0, 3]));
    assert!(near(adjusted.chi_square, 3.0));
}

/// A ring A→B→C→A of heats 1.0, 2.0 and −2.4, equally uncertain: the misclosure 0.6 is shared out
/// evenly, and A→C becomes 1.0 + 2.0 − 0.4 (by hand).
#[test]
fn a_ring_shares_out_its_misclosure() {
    let steps = [whole(&[-1, 1, 0]), whole(&[0, -1, 1]), whole(&[1, 0, -1])];
    let found = multipliers(&whole(&[-1, 0, 1]), &steps).unwrap();
    let heats = [exact("1.0"), exact("2.0"), exact("-2.4")];
    let adjusted = adjust(&heats, &independent(&[1, 1, 1]), &found).unwrap();
    assert_eq!(adjusted.misclosures, [exact("0.6")]);
    assert_eq!(adjusted.residuals, vec![exact("0.2"); 3]);
    // 0.6/(3·0.1²) = 20, and 20·0.1² is the residual.
    assert!(near(adjusted.correlates[0], 20.0));
    assert_eq!(dot(&adjusted.weights, &heats), exact("2.6"));
    // 0.6²/(3·0.1²) = 12, and the uncertainty of the sum of three is 0.1·√3.
    assert!(near(adjusted.chi_square, 12.0));
    assert!(near(
        adjusted.misclosure_uncertainty[0],
        0.1 * libm::sqrt(3.0)
    ));
}

#[test]
fn heats_that_leave_no_room_close_or_contradict() {
    let steps = [whole(&[1]), whole(&[1]), whole(&[1])];
    let found = multipliers(&whole(&[1]), &steps).unwrap();
    // The first two are one value used twice: fully correlated, and equal.
    let mut covariance = independent(&[2, 2, 1]);
    covariance[0][1] = exact("0.04");
    covariance[1][0] = exact("0.04");
    let equal = [exact("5.0"), exact("5.0"), exact("5.3")];
    let adjusted = adjust(&equal, &covariance, &found).unwrap();
    assert_eq!(adjusted.degrees_of_freedom, 1);
    // Weights 1/5 and 4/5 for 5.0 ± 0.2 and 5.3 ± 0.1, by hand.
    assert_eq!(dot(&adjusted.weights, &equal), exact("5.24"));
    let unequal = [exact("5.0"), exact("5.1"), exact("5.3")];
    let refused = adjust(&unequal, &covariance, &found).unwrap_err();
    assert!(matches!(refused, NoAdjustment::Contradictory { .. }));
    let exact_ones = adjust(&unequal, &independent(&[0, 0, 1]), &found).unwrap_err();
    assert!(matches!(exact_ones, NoAdjustment::Contradictory { .. }));
}

#[test]
fn the_work_is_bounded() {
    let steps = vec![whole(&[1]); MOST_CLOSURES + 2];
    let found = multipliers(&whole(&[1]), &steps).unwrap();
    let size = vec![1; steps.len()];
    let refused = adjust(&whole(&size), &independent(&size), &found);
    assert_eq!(refused, Err(NoAdjustment::TooMany));
}

/// Five determinations over four species, of rank three; the target is the second to the fourth.
fn cycle() -> impl Strategy<Value = (Vec<Vec<Exact>>, Vec<Exact>, Vec<Vec<Exact>>)> {
    let numbers = prop::collection::vec(prop::collection::vec(-3i64..4, 3), 2);
    let heats = prop::collection::vec(-99_999i64..100_000, 5);
    let spreads = prop::collection::vec(1i64..50, 5);
    let shared = prop::collection::vec(-20i64..21, 5);
    (numbers, heats, spreads, shared).prop_map(|(numbers, heats, spreads, shared)| {
        let mut steps = vec![
            whole(&[-1, 1, 0, 0]),
            whole(&[0, -1, 1, 0]),
            whole(&[0, 0, -1, 1]),
        ];
        for by in &numbers {
            let by = whole(by);
            let sum = (0..4).map(|species| column_dot(&steps[..3], species, &by));
            steps.push(sum.collect());
        }
        let heats = heats.iter().map(|q| Exact::new((*q).into(), 100.into()));
        // A value shared by all of them beside what each has of its own.
        let mut covariance = independent(&spreads);
        for (a, row) in covariance.iter_mut().enumerate() {
            for (b, entry) in row.iter_mut().enumerate() {
                *entry += Exact::new((shared[a] * shared[b]).into(), 100.into());
            }
        }
        (steps, heats.collect(), covariance)
    })
}

fn solved(steps: &[Vec<Exact>], heats: &[Exact], covariance: &[Vec<Exact>]) -> (Exact, Adjustment) {
    let found = multipliers(&whole(&[0, -1, 0, 1]), steps).unwrap();
    let adjusted = adjust(heats, covariance, &found).unwrap();
    (dot(&adjusted.weights, heats), adjusted)
}

proptest! {
    #[test]
    fn weights_give_the_target_and_the_least_variance((steps, heats, covariance) in cycle()) {
        let (_, adjusted) = solved(&steps, &heats, &covariance);
        let target = whole(&[0, -1, 0, 1]);
        for (species, wanted) in target.iter().enumerate() {
            prop_assert_eq!(&column_dot(&steps, species, &adjusted.weights), wanted);
        }
        // The result is uncorrelated with every misclosure, so no closure can improve it.
        let found = multipliers(&target, &steps).unwrap();
        for closure in &found.closures {
            prop_assert!(dot(closure, &times(&covariance, &adjusted.weights)).is_zero());
        }
        let redundancy: f64 = adjusted.redundancy.iter().sum();
        prop_assert!((redundancy - 2.0).abs() < 1e-9);
    }

    #[test]
    fn adjusted_heats_close((steps, heats, covariance) in cycle()) {
        let (value, adjusted) = solved(&steps, &heats, &covariance);
        let closed: Vec<Exact> =
            heats.iter().zip(&adjusted.residuals).map(|(q, v)| q - v).collect();
        let found = multipliers(&whole(&[0, -1, 0, 1]), &steps).unwrap();
        for closure in &found.closures {
            prop_assert!(dot(closure, &closed).is_zero());
        }
        prop_assert_eq!(dot(&found.particular, &closed), value);
    }

    #[test]
    fn the_order_of_steps_changes_nothing(
        (steps, heats, covariance) in cycle(),
        order in Just((0..5usize).collect::<Vec<_>>()).prop_shuffle(),
    ) {
        let (value, adjusted) = solved(&steps, &heats, &covariance);
        let moved = |v: &[Exact]| order.iter().map(|i| v[*i].clone()).collect::<Vec<_>>();
        let steps: Vec<_> = order.iter().map(|i| steps[*i].clone()).collect();
        let rows = order.iter().map(|i| moved(&covariance[*i]));
        let (again, other) = solved(&steps, &moved(&heats), &rows.collect::<Vec<_>>());
        prop_assert_eq!(value, again);
        prop_assert_eq!(moved(&adjusted.weights), other.weights);
        prop_assert_eq!(moved(&adjusted.residuals), other.residuals);
        prop_assert!(near(adjusted.chi_square, other.chi_square));
        for (at, from) in order.iter().enumerate() {
            let (one, two) = (adjusted.normalised[*from], other.normalised[at]);
            prop_assert!(near(one.unwrap_or(9.0), two.unwrap_or(9.0)));
        }
    }

    #[test]
    fn a_multiple_of_a_step_says_the_same(
        (steps, heats, covariance) in cycle(), which in 0usize..5, n in 1i64..9, d in 1i64..9,
    ) {
        let (value, adjusted) = solved(&steps, &heats, &covariance);
        let by = -Exact::new(n.into(), d.into());
        let (mut steps, mut heats, mut covariance) = (steps, heats, covariance);
        steps[which].iter_mut().for_each(|nu| *nu *= &by);
        heats[which] *= &by;
        covariance[which].iter_mut().for_each(|v| *v *= &by);
        covariance.iter_mut().for_each(|row| row[which] *= &by);
        let (again, other) = solved(&steps, &heats, &covariance);
        prop_assert_eq!(value, again);
        prop_assert_eq!(&adjusted.weights[which] / &by, other.weights[which].clone());
        prop_assert!(near(adjusted.chi_square, other.chi_square));
    }
}

/// JCGM 101: heats drawn at random about the truth, adjusted each time; the scatter of the results
/// is the uncertainty that the weights give, and the mean of χ² is its degrees of freedom.
#[test]
fn simulation_agrees_with_propagation() {
    let steps = [&[-1, 1, 0][..], &[0, -1, 1], &[-1, 0, 1], &[-2, 2, 0]].map(whole);
    let target = whole(&[-1, 0, 1]);
    let found = multipliers(&target, &steps).unwrap();
    let truth = [-100.0, -40.0, -140.0, -200.0];
    let (own, shared) = ([3.0, 2.0, 4.0, 5.0], [1.0, 0.0, 1.0, 2.0]);
    let float = |x: f64| Exact::from_float(x).unwrap();
    let entry =
        |a: usize, b: usize| shared[a] * shared[b] + if a == b { own[a] * own[a] } else { 0.0 };
    let covariance: Vec<Vec<Exact>> = (0..4)
        .map(|a| (0..4).map(|b| float(entry(a, b))).collect())
        .collect();
    let mut draw = Normal(1);
    let trials = 4000;
    let (mut sum, mut squares, mut chi_square) = (0.0, 0.0, 0.0);
    for _ in 0..trials {
        let common = draw.next();
        let heat = |k: usize, own_error: f64| truth[k] + own[k] * own_error + shared[k] * common;
        let heats: Vec<Exact> = (0..4).map(|k| float(heat(k, draw.next()))).collect();
        let adjusted = adjust(&heats, &covariance, &found).unwrap();
        let error = to_f64(&dot(&adjusted.weights, &heats)) + 140.0;
        sum += error;
        squares += error * error;
        chi_square += adjusted.chi_square;
    }
    let n = f64::from(trials);
    let adjusted = adjust(&truth.map(float), &covariance, &found).unwrap();
    let variance = to_f64(&dot(
        &adjusted.weights,
        &times(&covariance, &adjusted.weights),
    ));
    // The standard deviation of a standard deviation from 4000 trials is 1.1 %.
    let scatter = libm::sqrt((squares - sum * sum / n) / (n - 1.0));
    assert!(
        (scatter / libm::sqrt(variance) - 1.0).abs() < 0.04,
        "{scatter} {variance}"
    );
    assert!((sum / n).abs() < 4.0 * libm::sqrt(variance / n));
    // χ² of two degrees of freedom scatters by 2: its mean by 2/√4000 = 0.032.
    assert!((chi_square / n - 2.0).abs() < 0.13, "{}", chi_square / n);
    assert!(adjusted.residuals.iter().all(|v| v.abs() < exact("1e-12")));
}

/// Normal deviates from a linear congruence (D. E. Knuth, MMIX) by the method of Box and Muller.
struct Normal(u64);

impl Normal {
    fn uniform(&mut self) -> f64 {
        self.0 = self
            .0
            .wrapping_mul(6_364_136_223_846_793_005)
            .wrapping_add(1_442_695_040_888_963_407);
        ((self.0 >> 11) as f64 + 0.5) / 9_007_199_254_740_992.0
    }

    fn next(&mut self) -> f64 {
        let radius = libm::sqrt(-2.0 * libm::log(self.uniform()));
        radius * libm::cos(2.0 * core::f64::consts::PI * self.uniform())
    }
}
