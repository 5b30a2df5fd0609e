//! Sources and their entries, as typed data.

use crate::notation::{Element, Species};
use crate::quantity::{Coverage, Decimal, Quantity, Unit};

use super::heat_capacity::HeatCapacity;
use super::standing::Standing;

/// What the table says with its digits.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
pub enum Digits {
    /// The printed digits are significant (ASTM E29).
    #[default]
    Significant,
    /// The table prints a fixed number of decimals whatever is known.
    FixedDecimals,
}

/// A published table, report, standard or laboratory sheet: what is said once for all entries.
#[derive(Clone, Debug, Default)]
pub struct SourceHead {
    pub id: String,
    pub title: String,
    pub authors: Option<String>,
    pub year: Option<String>,
    pub publisher: Option<String>,
    pub report: Option<String>,
    pub edition: Option<String>,
    pub doi: Option<String>,
    pub licence: Option<String>,
    pub note: Option<String>,
    /// Reference temperature of the formation enthalpies.
    pub temperature: Option<Quantity>,
    /// Standard-state pressure.
    pub pressure: Option<Quantity>,
    pub energy_unit: Option<Unit>,
    /// What the stated uncertainties (±) cover.
    pub coverage: Coverage,
    /// `coverage` as written, for the excerpt that travels with a record.
    pub coverage_text: Option<String>,
    /// The R that `nasa-7` and `nasa-9` functions were fitted with.
    pub gas_constant: Option<Decimal>,
    pub digits: Digits,
    pub standing: Standing,
    /// Reference states that differ from the conventional ones.
    pub reference_states: Vec<(Element, Species)>,
    /// SHA-256 of the whole file that the entries came from.
    pub sha256: String,
}

impl SourceHead {
    /// The citation as it stands in a reference list.
    pub fn citation(&self) -> String {
        let mut parts = Vec::new();
        parts.extend(self.authors.as_ref().map(|authors| format!("{authors}:")));
        parts.push(format!("{}.", self.title.trim_end_matches('.')));
        let edition = self
            .edition
            .as_ref()
            .map(|edition| match edition.contains("edition") {
                true => edition.clone(),
                false => format!("Edition {edition}"),
            });
        for part in [&self.report, &edition, &self.publisher, &self.year] {
            parts.extend(part.as_ref().map(|p| format!("{p},")));
        }
        parts.extend(self.doi.as_ref().map(|doi| format!("doi:{doi},")));
        format!("{}.", parts.join(" ").trim_end_matches([',', '.']))
    }
}

/// What an entry is about.
#[derive(Clone, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum Subject {
    Species(Species),
    /// An element (atomic weights) or a constant, by its symbol.
    Symbol(String),
}

/// What one source says of one substance.
#[derive(Clone, Debug)]
pub struct Entry {
    pub subject: Subject,
    /// Other notations of the same form.
    pub also: Vec<Species>,
    pub name: Option<String>,
    pub cas: Option<String>,
    pub locator: String,
    pub note: Option<String>,
    pub standing: Standing,
    /// The element whose reference state this is.
    pub reference_for: Option<Element>,
    pub formation_enthalpy: Option<Quantity>,
    pub combustion_enthalpy: Option<Quantity>,
    pub atomic_weight: Option<Quantity>,
    pub value: Option<Quantity>,
    pub heat_capacity: Vec<HeatCapacity>,
    pub transitions: Vec<Transition>,
}

impl Entry {
    pub fn species(&self) -> Option<&Species> {
        match &self.subject {
            Subject::Species(species) => Some(species),
            Subject::Symbol(_) => None,
        }
    }

    /// The entry's own notation and the others for the same form.
    pub fn notations(&self) -> impl Iterator<Item = &Species> {
        self.species().into_iter().chain(&self.also)
    }
}

/// A change of phase at a temperature, with its heat per mole.
#[derive(Clone, Debug)]
pub struct Transition {
    pub to: Species,
    pub temperature: Quantity,
    pub enthalpy: Quantity,
    /// Where it stands, if elsewhere than the rest of the entry.
    pub locator: Option<String>,
    pub note: Option<String>,
}

/// A correlation between two values that the source states.
#[derive(Clone, Debug)]
pub struct StatedCorrelation {
    pub between: [Species; 2],
    pub coefficient: Decimal,
}

/// A correction of the source: what, when, on what authority.
#[derive(Clone, Debug)]
pub struct Erratum {
    pub text: String,
    pub date: Option<String>,
    pub authority: Option<String>,
}
