//! The case: what the preparer states, read from a TOML file with the place of every value.
//!
//! Reading is complete in one go: all faults of the file are reported together. What the names in
//! the case mean in the sources is the business of [`crate::source`], not of this module.

mod allowances;
mod assumptions;
mod composition;
mod composition_sum;
mod cycle;
mod cycle_references;
mod cycle_steps;
mod cycles;
mod fraction;
mod fuel;
mod given;
mod heat_capacity;
mod heating_values;
mod ids;
mod inputs;
mod metering;
mod model;
mod molality;
mod output;
mod prose;
mod reactions;
mod read;
mod record;
mod results;
mod sources;
mod substances;

pub use allowances::{Allowance, AllowedKind};
pub use composition::{Composition, Moisture, Part, Share};
pub use cycle::{Cycle, CycleStep, Measured, StepCorrelation, StepHeat, step_name};
pub(crate) use cycle_references::Order;
pub use given::Given;
pub use heat_capacity::{CaseHeatCapacity, HeatCapacityStatement};
pub use heating_values::{Constant, HEATING_VALUE_QUANTITIES, HeatingValue};
pub use ids::IdKind;
pub use metering::{Compression, Metering};
pub use model::{
    Assumption, Case, Choice, DeclaredKind, DeclaredSubstance, Hold, Input, ProsePart, ProseText,
    Reaction, RecordHead, ResultUnits, Revision, Role, RoundingRule, Status,
};
pub use molality::Molality;
pub use prose::{Binding, MARKDOWN, bindings, is_escaped};
pub use reactions::RESULT_QUANTITIES;
pub use read::{CASE_NAME, read_case};
