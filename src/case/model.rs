//! A case as typed data.

use chrono::NaiveDate;
use indexmap::IndexMap;

use super::cycle::Cycle;
use super::given::Given;
use super::heating_values::HeatingValue;
use crate::finding::Located;
use crate::notation::{Equation, Formula, Phase};
use crate::quantity::{Quantity, Unit};

use super::allowances::Allowance;
use super::heat_capacity::CaseHeatCapacity;
use super::molality::Molality;

/// Everything that a case states.
#[derive(Clone, Debug)]
pub struct Case {
    pub record: RecordHead,
    pub prose: Vec<ProseText>,
    pub assumptions: Vec<Assumption>,
    /// Ids of built-in sources and paths beside the case, in order of preference.
    pub consult: Vec<Located<String>>,
    pub choices: Vec<Choice>,
    pub substances: IndexMap<String, DeclaredSubstance>,
    pub inputs: IndexMap<String, Input>,
    pub reactions: IndexMap<String, Reaction>,
    pub cycles: IndexMap<String, Cycle>,
    pub heating_values: IndexMap<String, HeatingValue>,
    pub rounding: Vec<RoundingRule>,
    pub units: ResultUnits,
}

/// Identification of the record.
#[derive(Clone, Debug)]
pub struct RecordHead {
    pub number: Located<String>,
    pub revision: Located<String>,
    pub title: String,
    pub facility: Option<String>,
    pub equipment: Vec<String>,
    pub related: Vec<String>,
    pub date: NaiveDate,
    pub preparer: String,
    pub status: Located<Status>,
    pub history: Vec<Revision>,
    pub signatures: Vec<Role>,
}

/// What the case says of its own standing; superseded and void are said by the register alone.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Status {
    Preliminary,
    ForCheck,
    Issued,
}

impl Status {
    pub fn word(self) -> &'static str {
        match self {
            Status::Preliminary => "preliminary",
            Status::ForCheck => "for-check",
            Status::Issued => "issued",
        }
    }
}

/// In what role a person signs.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Role {
    Preparer,
    Checker,
    Approver,
}

impl Role {
    pub fn word(self) -> &'static str {
        match self {
            Role::Preparer => "preparer",
            Role::Checker => "checker",
            Role::Approver => "approver",
        }
    }
}

#[derive(Clone, Debug)]
pub struct Revision {
    pub revision: String,
    pub date: NaiveDate,
    pub change: String,
}

/// A part of the prose that a record can have.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum ProsePart {
    Purpose,
    Scope,
    Method,
    Discussion,
    Conclusion,
}

#[derive(Clone, Debug)]
pub struct ProseText {
    pub part: ProsePart,
    pub markdown: Located<String>,
}

#[derive(Clone, Debug)]
pub struct Assumption {
    pub text: Located<String>,
    pub basis: Option<String>,
    pub confirmed: bool,
    pub hold: Option<Hold>,
    pub allows: Vec<Allowance>,
}

/// Something not yet confirmed on which the record rests.
#[derive(Clone, Debug)]
pub struct Hold {
    pub owner: String,
    pub closed_by: String,
    /// Who accepts that the record is issued while the hold is open.
    pub accepted_by: Option<String>,
}

/// Which source serves for a substance where several hold it, and why.
#[derive(Clone, Debug)]
pub struct Choice {
    pub substance: Located<String>,
    pub source: Located<String>,
    pub because: String,
}

#[derive(Clone, Debug)]
pub struct DeclaredSubstance {
    pub id: Located<String>,
    pub kind: DeclaredKind,
    pub name: Option<String>,
    pub cas: Option<String>,
    /// What the case itself says of its heat capacity.
    pub heat_capacity: Option<CaseHeatCapacity>,
}

/// What a declared substance is made of.
#[derive(Clone, Debug)]
pub enum DeclaredKind {
    Compound {
        formula: Formula,
        phase: Phase,
    },
    /// Known by its heat capacity alone; takes no part in reactions.
    Inert,
}

#[derive(Clone, Debug)]
pub struct Input {
    pub id: Located<String>,
    pub value: Located<Quantity>,
    pub tolerance: Option<Quantity>,
    /// Temperature and pressure that a gas volume refers to, as written.
    pub reference: Option<String>,
    pub source: Option<String>,
    pub confirmed: bool,
    pub hold: Option<Hold>,
}

#[derive(Clone, Debug)]
pub struct Reaction {
    pub id: Located<String>,
    pub equation: Located<Equation>,
    pub temperature: Option<Given>,
    pub per: Option<Located<String>>,
    /// Whether the case says `per`, be it rightly or not.
    pub says_per: bool,
    /// How concentrated aqueous participants are, where the case says it.
    pub molalities: Vec<Molality>,
}

/// A place that a result is to be stated to.
#[derive(Clone, Debug)]
pub struct RoundingRule {
    pub result: Located<String>,
    /// Power of ten of the last stated digit.
    pub place: i64,
    pub unit: Unit,
    pub span: crate::finding::Span,
}

/// The units in which results are given.
#[derive(Clone, Debug)]
pub struct ResultUnits {
    pub energy: Unit,
    pub temperature: Unit,
    pub mass: Unit,
    pub volume: Unit,
    pub amount: Unit,
    pub time: Unit,
}
