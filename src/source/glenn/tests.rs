//! The embedded file against readings that this program did not make.

use std::collections::{BTreeMap, BTreeSet};

use sha2::{Digest, Sha256};

use super::*;

/// Written by `tests/outside/glenn/parse_thermo.py`, an independent reading of the same file.
const SUMMARY: &str = include_str!("../../../tests/outside/glenn/summary.tsv");

/// One row of the summary, the cells in the order of its heading.
struct Row {
    phase: u8,
    name: &'static str,
    enthalpy: &'static str,
    ranges: usize,
    low: &'static str,
    high: &'static str,
    hill: &'static str,
    h298: Option<f64>,
}

/// The independent reading by line of the file.
fn summary() -> BTreeMap<usize, Row> {
    let rows = SUMMARY.lines().skip(1).map(|line| {
        let cells: Vec<&str> = line.split('\t').collect();
        let row = Row {
            phase: cells[2].parse().unwrap(),
            name: cells[3],
            enthalpy: cells[4],
            ranges: cells[5].parse().unwrap(),
            low: cells[6],
            high: cells[7],
            hill: cells[8],
            h298: cells[9].parse().ok(),
        };
        (cells[0].parse().unwrap(), row)
    });
    rows.collect()
}

fn printed(record: &GlennRecord) -> &str {
    match &record.enthalpy {
        GlennEnthalpy::At298 { printed }
        | GlennEnthalpy::AtOther { printed, .. }
        | GlennEnthalpy::NotAt298 { printed } => printed,
    }
}

fn by_name(name: &str) -> GlennRecord {
    let mut records = GlennIndex::build().by_name(name);
    assert_eq!(records.len(), 1, "{name}");
    records.remove(0)
}

fn by_species(key: &str, species: &str) -> GlennRecord {
    let records = find(key);
    records.into_iter().find(|r| r.species == species).unwrap()
}

fn at_298(printed: &str) -> GlennEnthalpy {
    let printed = printed.to_owned();
    GlennEnthalpy::At298 { printed }
}

#[test]
fn the_file_is_the_one_we_pinned() {
    let digest = Sha256::digest(bytes());
    let hex: String = digest.iter().map(|byte| format!("{byte:02x}")).collect();
    assert_eq!(hex, SHA256);
}

#[test]
fn every_row_of_names_is_served() {
    let rows = NAMES.lines().skip(1).count();
    let records: Vec<_> = GlennIndex::build().all().collect();
    assert_eq!(records.len(), rows);
    assert_eq!(rows, 2065);
    let gases = records.iter().filter(|r| r.species.ends_with("(g)"));
    // 1262 gases among the products, one of them the electron, and ClO3F and JP-10(g).
    assert_eq!(gases.count(), 1262 - 1 + 2);
    assert_eq!(
        records.iter().filter(|r| r.ranges.is_empty()).count(),
        11 + 23,
        "without a function: 11 at 298.15 K, 23 at other temperatures"
    );
    assert!(records.iter().all(|r| !r.glenn_name.starts_with("Inert")));
}

#[test]
fn agrees_with_the_independent_reading_row_by_row() {
    let mut summary = summary();
    assert_eq!(summary.len(), 2111);
    for named in NAMES.lines().filter_map(names::Named::read) {
        let records = GlennIndex::build().by_name(named.glenn_name);
        let lines: Vec<usize> = named.lines().map(|line| line as usize).collect();
        let record = records.iter().find(|r| r.line == lines[0]).unwrap();
        let rows: Vec<Row> = lines.iter().map(|l| summary.remove(l).unwrap()).collect();
        let first = &rows[0];
        assert_eq!(record.glenn_name, first.name);
        assert_eq!(printed(record), first.enthalpy, "{}", first.name);
        let bound = |pick: fn(&Row) -> &'static str| rows.iter().map(pick).collect::<Vec<_>>();
        let upside_down = upside_down_at(lines[0]);
        let count: usize = rows.iter().map(|row| row.ranges).sum();
        assert_eq!(record.ranges.len() + upside_down, count, "{}", first.name);
        if let (Some(low), Some(high)) = (record.ranges.first(), record.ranges.last()) {
            assert_eq!(high.high, *bound(|r| r.high).last().unwrap());
            assert!(upside_down == 1 || low.low == bound(|r| r.low)[0]);
        }
    }
    let left_out: Vec<&str> = summary.values().map(|row| row.name).collect();
    assert_eq!(left_out.len(), 36, "{left_out:?}");
}

/// The ranges whose bounds stand the wrong way round, by line of their record.
fn upside_down_at(line: usize) -> usize {
    let lines = [
        11552, 11769, 12226, 12249, 12330, 12996, 13521, 14432, 15043, 15171,
    ];
    usize::from(lines.contains(&line))
}

#[test]
fn keys_are_those_of_the_independent_reading() {
    let summary = summary();
    let index = GlennIndex::build();
    for key in index.keys().collect::<BTreeSet<_>>() {
        for record in find(key) {
            let hill = match summary[&record.line].hill {
                // The element field has two decimals; the name is followed.
                "Fe0.95O" => "Fe0.947O",
                "^-" => "e^-",
                hill => hill,
            };
            assert_eq!(key, hill, "{}", record.glenn_name);
        }
    }
}

#[test]
fn the_functions_give_the_printed_enthalpy_where_it_is_said_to_hold() {
    let summary = summary();
    for record in GlennIndex::build().all() {
        let row = &summary[&record.line];
        let stated: f64 = printed(&record).parse().unwrap();
        match (&record.enthalpy, row.h298) {
            (GlennEnthalpy::At298 { .. }, Some(worked)) => {
                assert!((worked - stated).abs() < 1.0, "{}", row.name);
            }
            (GlennEnthalpy::At298 { .. } | GlennEnthalpy::AtOther { .. }, None) => {
                assert!(record.ranges.is_empty(), "{}", row.name);
            }
            (GlennEnthalpy::NotAt298 { .. }, None) => assert_ne!(row.phase, 0, "{}", row.name),
            other => panic!("{}: {other:?}", row.name),
        }
    }
}

#[test]
fn a_lambda_transition_does_not_make_two_entries() {
    let iron = by_species("Fe", "Fe(cr, alpha)");
    let bounds: Vec<&str> = iron.ranges.iter().map(|r| r.low.as_str()).collect();
    assert_eq!(bounds, ["300.000", "500.000", "800.000", "1042.000"]);
    assert_eq!(iron.ranges[3].high, "1184.000");
    assert_eq!(iron.ranges[3].line, 12193);
}

#[test]
fn one_name_of_the_file_can_be_two_forms() {
    let species: Vec<String> = GlennIndex::build()
        .by_name("SnS(cr)")
        .into_iter()
        .map(|r| r.species)
        .collect();
    assert_eq!(species, ["SnS(cr, rhombic)", "SnS(cr, cubic)"]);
}

#[test]
fn a_heading_is_not_taken_for_what_it_is_not() {
    let not_at_298 = |printed: &str| GlennEnthalpy::NotAt298 {
        printed: printed.to_owned(),
    };
    assert_eq!(by_name("AL2O3(L)").enthalpy, not_at_298("-1675700.000"));
    assert_eq!(by_name("H2O(cr)").enthalpy, not_at_298("-299108.000"));
    let oxygen = GlennEnthalpy::AtOther {
        temperature: "90.170".to_owned(),
        printed: "-12979.000".to_owned(),
    };
    assert_eq!(by_name("O2(L)").enthalpy, oxygen);
    assert_eq!(by_name("HNO3(L)").enthalpy, at_298("-173013.000"));
}

/// The 2004 file prints -1059104.288 J/mol (read in pyglenn 0.2.0, data/thermo.inp, line 4855).
#[test]
fn iron_chloride_has_the_corrected_value() {
    assert_eq!(by_name("FeCL3").enthalpy, at_298("-253130.000"));
}

/// CODATA key values (Cox, Wagman and Medvedev 1989): H2O(l) -285.830 ± 0.040, H2O(g)
/// -241.826 ± 0.040, CO2(g) -393.51 ± 0.13, NH3(g) -45.94 ± 0.35, HCl(g) -92.31 ± 0.10 kJ/mol
/// (codata-1989, entered from a transcription).
#[test]
fn codata_key_values_are_met() {
    for (key, species, codata, expanded) in [
        ("H2O", "H2O(l)", -285.830, 0.040),
        ("H2O", "H2O(g)", -241.826, 0.040),
        ("CO2", "CO2(g)", -393.51, 0.13),
        ("H3N", "NH3(g)", -45.94, 0.35),
        ("ClH", "HCl(g)", -92.31, 0.10),
    ] {
        let record = by_species(key, species);
        assert!(matches!(record.enthalpy, GlennEnthalpy::At298 { .. }));
        let joules: f64 = printed(&record).parse().unwrap();
        let off: f64 = joules / 1000.0 - codata;
        assert!(off.abs() <= expanded + 1e-9, "{species}: {off}");
    }
}

/// The water of the file, every cell as printed (read by eye in `thermo.inp`).
#[test]
fn reads_every_column() {
    let water = by_name("H2O(L)");
    assert_eq!(water.species, "H2O(l)");
    assert_eq!(water.name.as_deref(), Some("water"));
    assert_eq!(water.cas.as_deref(), Some("7732-18-5"));
    assert_eq!(water.reference_code, "g 8/01");
    assert_eq!(water.molar_mass, "18.0152800");
    assert!(water.comment.starts_with("Liquid. Cox,1989. Haar,1984."));
    assert_eq!(water.line, 12481);
    assert_eq!(water.ranges.len(), 2);
    let range = &water.ranges[0];
    assert_eq!((&*range.low, &*range.high), ("273.150", "373.150"));
    assert_eq!(range.h_difference, "13278.000");
    assert_eq!(
        range.coefficients,
        [
            "1.326371304e+09",
            "-2.448295388e+07",
            "1.879428776e+05",
            "-7.678995050e+02",
            "1.761556813e+00",
            "-2.151167128e-03",
            "1.092570813e-06",
            "1.101760476e+08",
            "-9.779700970e+05",
        ]
    );
}

#[test]
fn gases_of_one_composition_differ_by_name() {
    let index = GlennIndex::build();
    for key in index.keys().collect::<BTreeSet<_>>() {
        let records = find(key);
        let gases = records.iter().filter(|r| r.species.ends_with("(g)"));
        let names: Vec<_> = gases.map(|r| r.name.as_deref()).collect();
        let distinct: BTreeSet<_> = names.iter().flatten().collect();
        assert!(
            names.len() < 2 || distinct.len() == names.len(),
            "{key}: {names:?}"
        );
    }
}

#[test]
fn species_are_canonical_and_lead_back_to_their_key() {
    use crate::notation::Species;
    let index = GlennIndex::build();
    for key in index.keys().collect::<BTreeSet<_>>() {
        for record in find(key) {
            let species = Species::parse(&record.species).unwrap();
            assert_eq!(species.to_string(), record.species);
            assert_eq!(species.formula.hill(), key, "{}", record.species);
        }
    }
}

#[test]
fn an_unknown_composition_finds_nothing() {
    let index = GlennIndex::build();
    for key in ["", "Xx", "C60", "H2O^+^", "zzz"] {
        assert!(find(key).is_empty(), "{key}");
    }
    assert!(index.by_name("FeCL4").is_empty());
}

#[test]
fn a_row_that_does_not_fit_the_file_is_passed_over() {
    let rows = "H2O(L)\tH2O(l)\t\t\t298.15\t99999\nH2O(L)\tH2O(l)\t\t\t298.15\t12476\n\
                H2O(L)\tH2O(l)\t\t\t298.15\t\nH2O(L)\tH2O(l)\t\t\t298.15\t12481\nshort\trow\n";
    assert_eq!(GlennIndex::of(rows).all().count(), 1);
}
