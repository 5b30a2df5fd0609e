//! Sources: published tables and what they say, and the case's substances resolved against them.
//!
//! From here on every number carries where it came from. The built-in sources are data in
//! `source/data/`; a user's own come from files in the same format. Reading a case is not done
//! here, working it neither.

mod allowances;
mod builtin;
mod case_values;
mod choose;
mod combustion;
mod combustion_equation;
mod compare;
mod constant_findings;
mod consult;
mod correlations;
mod cycle;
mod cycle_heats;
mod entry_value;
mod excerpt;
mod excerpt_text;
mod fuel_component;
mod fuel_metering;
mod gas_constant;
mod given;
mod given_findings;
mod given_kopp;
mod glenn;
mod glenn_entries;
mod heat_capacity;
mod heating_value;
mod identity_findings;
mod index;
#[cfg(test)]
mod index_tests;
mod instability;
mod kopp;
mod matching;
mod model;
mod molar_mass;
mod outside_range;
mod path;
mod path_findings;
mod path_values;
mod problem;
mod read;
mod read_correlation;
mod read_entry;
mod read_head;
mod read_heat_capacity;
mod read_quantity;
mod reference_states;
mod resolve;
mod resolve_cycle;
mod resolve_heating_value;
mod resolve_participant;
mod resolve_reaction;
mod route;
mod say;
mod search;
mod sha256;
mod solution;
mod species_list;
mod stable;
mod standing;
mod store;
mod suggest;
mod transitions;
mod unbalanced;
mod vapour;
mod walk;

pub use builtin::{BUILT_IN, KOPP, built_in};
pub use case_values::NO_SOURCE;
pub use combustion_equation::Combustion;
pub use consult::{Consultation, SourceFiles, consult};
pub use cycle::{
    Basis, Bomb, CycleSpecies, ProblemCycle, ProblemStep, StatedCorrelation, StepSource,
};
pub use excerpt::{attachment_name, excerpts};
pub use heat_capacity::{Form, FunctionTerm, HeatCapacity};
pub use heating_value::{
    ComponentHeat, FuelComponent, FuelShare, ProblemCompression, ProblemHeatingValue,
    ProblemMetering,
};
pub use model::{Digits, Entry, SourceHead, Subject};
pub use path::reference_kelvin;
pub use problem::{
    BoundedPath, Comparison, EnthalpyPath, Judgement, Leg, Problem, ProblemReaction, ProblemTerm,
    Start, Substance, ValueKind, ValueUsed,
};
pub use read::{Provenance, read_source};
pub use reference_states::ReferenceStates;
pub use resolve::resolve;
pub use search::{Hit, search};
pub use sha256::sha256_hex;
pub use standing::Standing;
pub use store::{CASE, Source};
