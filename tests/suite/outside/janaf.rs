//! Formation enthalpies at temperature of six species of the NIST-JANAF tables, 4th edition (M. W.
//! Chase, J. Phys. Chem. Ref. Data, Monograph 9, 1998), from the heat capacities that the same
//! tables print.
//!
//! The tables were read in the data files of the Python package janaf 1.4.0, which transcribe
//! them; they were not compared with the printed original. The heat capacities are in
//! `tests/outside/janaf-4.toml`, the formation enthalpies here.

use super::case::{Folder, Results, reactions};
use super::tools::{outside, python};

const KELVIN: [&str; 4] = ["298.15 K", "500 K", "1000 K", "1500 K"];

/// A species: the reaction that forms it, Δ_fH° at the four temperatures as printed, kJ/mol, and by
/// how much NASA's nine coefficients (edition of 2021) differ there.
struct Species {
    forms: &'static str,
    printed: [f64; 4],
    nasa: [f64; 4],
}

/// NASA's record of ammonia names L. V. Gurvich, 1989, and L. Haar, 1968: its increment to 1500 K is
/// 0.288 kJ/mol below JANAF's. For methane see the test.
const SPECIES: [Species; 6] = [
    Species {
        forms: "H2(g) + 1/2 O2(g) -> H2O(g)",
        printed: [-241.826, -243.826, -247.857, -250.265],
        nasa: [0.000, -0.001, 0.002, 0.052],
    },
    Species {
        forms: "C(cr, graphite) + 1/2 O2(g) -> CO(g)",
        printed: [-110.527, -110.003, -111.983, -115.229],
        nasa: [-0.008, -0.010, -0.014, -0.019],
    },
    Species {
        forms: "C(cr, graphite) + O2(g) -> CO2(g)",
        printed: [-393.522, -393.666, -394.623, -395.668],
        nasa: [0.012, 0.011, 0.010, 0.003],
    },
    Species {
        forms: "C(cr, graphite) + 2 H2(g) -> CH4(g)",
        printed: [-74.873, -80.802, -89.849, -92.553],
        nasa: [0.273, 0.296, 0.780, 2.314],
    },
    Species {
        forms: "1/2 N2(g) + 3/2 H2(g) -> NH3(g)",
        printed: [-45.898, -49.857, -55.013, -55.954],
        nasa: [-0.042, -0.051, -0.108, -0.325],
    },
    Species {
        forms: "1/2 H2(g) + 1/2 Cl2(g) -> HCl(g)",
        printed: [-92.312, -92.913, -94.388, -95.160],
        nasa: [0.002, 0.002, 0.004, 0.016],
    },
];

fn worked(folder: &Folder, source: &str) -> Results {
    let list = SPECIES.iter().flat_map(|s| KELVIN.map(|t| (s.forms, t)));
    let list: Vec<_> = list.collect();
    folder
        .results(&reactions(&[source], &list, ""))
        .expect("a case that can be worked")
}

/// How far a source's Δ_fH° of a species lies above the printed ones.
fn above(results: &Results, species: usize) -> [f64; 4] {
    [0, 1, 2, 3].map(|at| {
        let id = format!("r{}.heat", species * KELVIN.len() + at);
        results.number(&id, "value") - SPECIES[species].printed[at]
    })
}

fn assert_within(results: &Results, tolerance: impl Fn(usize) -> f64) {
    for (index, species) in SPECIES.iter().enumerate() {
        let above = above(results, index);
        assert!(above[0].abs() < 1e-9, "{}: {above:?}", species.forms);
        for apart in above {
            assert!(
                apart.abs() <= tolerance(index),
                "{}: {above:?}",
                species.forms
            );
        }
    }
}

/// Straight lines between points 100 K apart do not reach the printed digit: an interval of h is off
/// by h²·ΔCp'/12, which adds up to 0.03 kJ/mol for carbon dioxide and to 0.02 kJ/mol for graphite up to
/// 1500 K, as their Cp bends down all the way. The printed formation enthalpies do follow from the
/// printed H - H(298.15) to 0.001 kJ/mol (a script's sum), so the lines are the cause.
#[test]
fn straight_lines_between_printed_points_come_within_0_025() {
    let folder = Folder::new();
    let text = std::fs::read_to_string(outside("janaf-4.toml")).expect("the table");
    folder.write("janaf-4.toml", &text);
    assert_within(&worked(&folder, "janaf-4.toml"), |_| 0.025);
}

/// A curve through the same points does: to the printed digit for four species. The heat
/// capacities, printed to 0.001 J/(mol K), leave up to 0.6 J/mol over 1200 K each. For the oxides of
/// carbon 0.0025 kJ/mol remain: between 200 K and 500 K their Cp bends more sharply than points
/// 100 K apart can say.
#[test]
fn a_spline_through_the_printed_points_meets_the_printed_digit() {
    let folder = Folder::new();
    let made = python("janaf_spline.py");
    folder.write(
        "spline.toml",
        made["source"].as_str().expect("a source file"),
    );
    assert_within(&worked(&folder, "spline.toml"), |species| {
        let oxide_of_carbon = SPECIES[species].forms.contains("CO");
        if oxide_of_carbon { 0.0025 } else { 0.001 }
    });
}

/// The two collections differ, and by how much is known; a record has to name its source.
///
/// Methane is the largest: 2.314 kJ/mol at 1500 K, of which 0.273 are there at 298.15 K (-74.600
/// against -74.873), 2.034 are the increment of methane itself, and 0.007 those of the elements
/// (differences of H - H(298.15) by a script from both files). JANAF's methane is a table of 1961
/// for a rigid rotor and harmonic oscillator (from memory); NASA's is L. V. Gurvich's of 1991, as
/// its record says, with anharmonicity.
#[test]
fn where_nasa_differs_from_janaf_it_is_by_this_much() {
    let results = worked(&Folder::new(), "nasa-glenn-2021");
    for (index, species) in SPECIES.iter().enumerate() {
        let above = above(&results, index);
        for (above, expected) in above.into_iter().zip(species.nasa) {
            // Both are rounded to 0.001.
            assert!(
                (above - expected).abs() < 0.001,
                "{}: {above}",
                species.forms
            );
        }
    }
}
