//! The propagated uncertainty of a mixture held against Monte Carlo (JCGM 101:2008), with a model
//! and random numbers of this test's own.

use super::super::case::source;
use super::fuel;

/// SplitMix64 (Steele, Lea, Flood 2014; constants from memory) and the sum of twelve uniform
/// numbers less six, which is normal enough for a standard deviation.
struct Random(u64);

impl Random {
    fn uniform(&mut self) -> f64 {
        self.0 = self.0.wrapping_add(0x9e37_79b9_7f4a_7c15);
        let mut z = self.0;
        z = (z ^ (z >> 30)).wrapping_mul(0xbf58_476d_1ce4_e5b9);
        z = (z ^ (z >> 27)).wrapping_mul(0x94d0_49bb_1331_11eb);
        ((z ^ (z >> 31)) >> 11) as f64 / (1u64 << 53) as f64
    }

    fn normal(&mut self, mean: f64, u: f64) -> f64 {
        let sum: f64 = (0..12).map(|_| self.uniform()).sum();
        mean + u * (sum - 6.0)
    }
}

const DRAWS: usize = 40_000;

/// Mean and standard deviation of a model's results.
fn spread(mut model: impl FnMut(&mut Random) -> f64) -> (f64, f64) {
    let mut random = Random(20_261_201);
    let drawn: Vec<f64> = (0..DRAWS).map(|_| model(&mut random)).collect();
    let mean = drawn.iter().sum::<f64>() / DRAWS as f64;
    let squares: f64 = drawn.iter().map(|y| (y - mean) * (y - mean)).sum();
    (mean, libm::sqrt(squares / (DRAWS - 1) as f64))
}

/// Relative standard deviation of a standard deviation from so many draws is about 0.35 %.
fn assert_spread(results: &super::super::case::Results, name: &str, drawn: (f64, f64)) {
    let (value, u) = (
        results.number(name, "value"),
        results.number(name, "standard-uncertainty"),
    );
    assert!(
        (drawn.1 / u - 1.0).abs() < 0.02,
        "{name}: {} drawn, {u}",
        drawn.1
    );
    assert!(
        (drawn.0 - value).abs() < 0.05 * u,
        "{name}: {} drawn, {value}",
        drawn.0
    );
}

/// Formation enthalpies with uncertainties (k = 2), invented but for their size.
const FORMATION: [(&str, &str); 5] = [
    ("CH4(g)", "-74.6 ± 0.3"),
    ("C2H6(g)", "-84.0 ± 0.4"),
    ("CO2(g)", "-393.51 ± 0.13"),
    ("H2O(l)", "-285.830 ± 0.040"),
    ("H2O(g)", "-241.826 ± 0.040"),
];

/// The molar gross values of methane and ethane, and what vaporises, from drawn enthalpies.
struct Drawn {
    methane: f64,
    ethane: f64,
    latent: f64,
}

fn drawn(random: &mut Random) -> Drawn {
    let methane = random.normal(-74.6, 0.15);
    let ethane = random.normal(-84.0, 0.2);
    let carbon = random.normal(-393.51, 0.065);
    let liquid = random.normal(-285.830, 0.020);
    let vapour = random.normal(-241.826, 0.020);
    Drawn {
        methane: methane - carbon - 2.0 * liquid,
        ethane: ethane - 2.0 * carbon - 3.0 * liquid,
        latent: vapour - liquid,
    }
}

#[test]
fn a_balance_takes_what_the_others_leave() {
    let table = "composition = { basis = \"mole\", \"CH4(g)\" = \"0.900 ± 0.006\", \
                 \"C2H6(g)\" = \"0.060 ± 0.004\", \"N2(g)\" = \"balance\" }\n\
                 temperature = \"25 °C\"\nsource = \"invented\"";
    let given = source("kJ/mol", &FORMATION, "");
    let results = fuel(&["given.toml"], Some(&given), table, "");
    let model = |random: &mut Random, net: bool, mass: bool| {
        let h = drawn(random);
        let x = random.normal(0.900, 0.003);
        let y = random.normal(0.060, 0.002);
        // The uncertainty of the atomic weights is small beside these and is left out here.
        let kilograms = (x * 16.043 + y * 30.07 + (1.0 - x - y) * 28.014) / 1000.0;
        let gross = x * h.methane + y * h.ethane;
        let water = if net {
            (2.0 * x + 3.0 * y) * h.latent
        } else {
            0.0
        };
        (gross - water) / if mass { kilograms } else { 1.0 }
    };
    assert_spread(&results, "f.gross", spread(|r| model(r, false, false)));
    assert_spread(&results, "f.net", spread(|r| model(r, true, false)));
    assert_spread(
        &results,
        "f.gross-per-mass",
        spread(|r| model(r, false, true)),
    );
}

/// Without a balance the fractions are made to add up to one.
#[test]
fn fractions_without_a_balance_are_shares_of_their_sum() {
    let table = "composition = { basis = \"mole\", \"CH4(g)\" = \"0.900 ± 0.006\", \
                 \"C2H6(g)\" = \"0.060 ± 0.004\", \"N2(g)\" = \"0.040 ± 0.003\" }\n\
                 temperature = \"25 °C\"\nsource = \"invented\"";
    let given = source("kJ/mol", &FORMATION, "");
    let results = fuel(&["given.toml"], Some(&given), table, "");
    let model = |random: &mut Random| {
        let h = drawn(random);
        let (x, y, z) = (
            random.normal(0.900, 0.003),
            random.normal(0.060, 0.002),
            random.normal(0.040, 0.0015),
        );
        (x * h.methane + y * h.ethane) / (x + y + z)
    };
    assert_spread(&results, "f.gross", spread(model));
}

/// By mass, with a compression factor: a model with quotients of drawn numbers.
#[test]
fn a_composition_by_mass_and_a_compression_factor() {
    let table = "composition = { basis = \"mass\", \"CH4(g)\" = \"0.80 ± 0.02\", \
                 \"C2H6(g)\" = \"balance\" }\ntemperature = \"25 °C\"\nsource = \"invented\"\n\
                 [heating-values.f.metering]\ntemperature = \"15 °C\"\npressure = \"101.325 kPa\"\n\
                 compression-factor = \"0.9975 ± 0.0010\"\nsource = \"invented\"";
    let given = source("kJ/mol", &FORMATION, "");
    let results = fuel(&["given.toml"], Some(&given), table, "");
    let volume = 8.314_462_618_153_24 * 288.15 / 101_325.0;
    let model = |random: &mut Random, real: bool| {
        let h = drawn(random);
        let w = random.normal(0.80, 0.01);
        let (a, b) = (w / 16.043, (1.0 - w) / 30.07);
        let molar = (a * h.methane + b * h.ethane) / (a + b);
        let z = if real {
            random.normal(0.9975, 0.0005)
        } else {
            1.0
        };
        molar / (volume * z)
    };
    assert_spread(&results, "f.gross-per-volume", spread(|r| model(r, false)));
    assert_spread(
        &results,
        "f.gross-per-volume-real",
        spread(|r| model(r, true)),
    );
}
