//! Records of the NASA Glenn file as entries of a source.

use crate::notation::Species;
use crate::quantity::{Coverage, Decimal, Quantity, Unit};

use super::glenn::{self, GlennEnthalpy, GlennIndex, GlennRange, GlennRecord};
use super::heat_capacity::{Form, HeatCapacity};
use super::model::{Digits, Entry, SourceHead, Subject};
use super::standing::Standing;

/// The file as a source. Its entries are machine-read from the original, so they stand as
/// compared with it.
pub(super) fn head(id: &str) -> SourceHead {
    SourceHead {
        id: id.to_string(),
        title: glenn::TITLE.to_string(),
        authors: Some(glenn::AUTHORS.join("; ")),
        year: Some(glenn::YEAR.to_string()),
        publisher: Some(glenn::PUBLISHER.to_string()),
        report: Some(glenn::REPORT.to_string()),
        edition: Some(format!("{} ({})", glenn::EDITION, glenn::DISTRIBUTION)),
        doi: None,
        licence: Some(glenn::LICENCE.to_string()),
        note: None,
        temperature: Quantity::parse(glenn::TEMPERATURE).ok(),
        pressure: Quantity::parse(glenn::PRESSURE).ok(),
        energy_unit: Unit::parse("J/mol").ok(),
        coverage: Coverage::default(),
        coverage_text: None,
        gas_constant: Decimal::parse(glenn::GAS_CONSTANT).ok(),
        digits: Digits::FixedDecimals,
        standing: Standing::ComparedWithOriginal,
        reference_states: Vec::new(),
        sha256: glenn::SHA256.to_string(),
    }
}

pub(super) fn of_composition(hill: &str) -> Vec<Entry> {
    glenn::find(hill).iter().filter_map(entry).collect()
}

pub(super) fn all() -> Vec<Entry> {
    GlennIndex::build()
        .all()
        .filter_map(|r| entry(&r))
        .collect()
}

/// None where the record's own notation cannot be read, which a test excludes.
fn entry(record: &GlennRecord) -> Option<Entry> {
    let (formation_enthalpy, note) = enthalpy(record);
    Some(Entry {
        subject: Subject::Species(Species::parse(&record.species).ok()?),
        also: Vec::new(),
        name: record.name.clone(),
        cas: record.cas.clone(),
        locator: format!(
            "record {} at line {}; code {}; {}",
            record.glenn_name, record.line, record.reference_code, record.comment
        ),
        note,
        standing: Standing::ComparedWithOriginal,
        reference_for: None,
        formation_enthalpy,
        combustion_enthalpy: None,
        atomic_weight: None,
        value: None,
        heat_capacity: record.ranges.iter().filter_map(heat_capacity).collect(),
        transitions: Vec::new(),
    })
}

/// The formation enthalpy at 298.15 K where the record prints one; otherwise what it prints.
fn enthalpy(record: &GlennRecord) -> (Option<Quantity>, Option<String>) {
    match &record.enthalpy {
        GlennEnthalpy::At298 { printed } => (in_joules(printed), None),
        GlennEnthalpy::AtOther {
            temperature,
            printed,
        } => (
            None,
            Some(format!(
                "the file gives {printed} J/mol at {temperature} K, not at 298.15 K"
            )),
        ),
        GlennEnthalpy::NotAt298 { .. } => (
            None,
            Some("the file gives this form by its function alone, at other temperatures".into()),
        ),
    }
}

fn in_joules(printed: &str) -> Option<Quantity> {
    let unit = Unit::parse("J/mol").ok()?;
    Some(Quantity::parse_number(printed).ok()?.with_unit(unit))
}

fn heat_capacity(range: &GlennRange) -> Option<HeatCapacity> {
    let kelvin = |text: &str| Quantity::parse(&format!("{text} K")).ok();
    let coefficients = range.coefficients.iter().map(|c| Decimal::parse(c).ok());
    Some(HeatCapacity {
        form: Form::Nasa9,
        range: Some([kelvin(&range.low)?, kelvin(&range.high)?]),
        coefficients: coefficients.collect::<Option<Vec<_>>>()?,
        points: Vec::new(),
        uncertainty: None,
    })
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn every_record_becomes_an_entry_whose_key_is_its_own() {
        let index = GlennIndex::build();
        let mut count = 0;
        for key in index.keys() {
            for record in glenn::find(key) {
                let entry = entry(&record).unwrap_or_else(|| panic!("{}", record.glenn_name));
                let hill = entry.species().map(|s| s.formula.hill());
                assert_eq!(hill.as_deref(), Some(key), "{}", record.glenn_name);
                assert_eq!(entry.heat_capacity.len(), record.ranges.len());
                count += 1;
            }
        }
        assert!(count > 2000, "{count}");
    }
}
