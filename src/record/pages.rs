//! What the pages of a record say, as data: the contract between the record and a template.
//!
//! A template receives exactly this structure as JSON (field names in kebab case) and decides
//! nothing but layout. Numbers arrive as the text that is to be printed. The version of the
//! contract is [`CONTRACT`]; it rises when a field changes its meaning or disappears.

use serde::{Deserialize, Serialize};

use super::math::Math;
use super::rich::Rich;

/// The version of the data that templates receive.
pub const CONTRACT: u32 = 1;

/// Everything that a record's pages say.
#[derive(Clone, Debug, Serialize, Deserialize)]
#[serde(rename_all = "kebab-case")]
pub struct Pages {
    pub contract: u32,
    pub title_block: TitleBlock,
    pub stamp: Stamp,
    pub history: Vec<Revision>,
    /// Prose that stands before the working (purpose, scope, method).
    pub opening: Vec<ProseSection>,
    /// Prose that stands after the results (discussion, conclusion).
    pub closing: Vec<ProseSection>,
    pub results: Vec<ResultRow>,
    pub basis: Basis,
    pub values_used: Vec<ValueRow>,
    /// The heat-capacity functions among the values used.
    pub functions: Vec<FunctionRow>,
    pub comparisons: Vec<ComparisonRow>,
    pub working: Vec<WorkingSection>,
    pub budgets: Vec<Budget>,
    pub findings: Vec<FindingRow>,
    /// The cautions that stand in every record.
    pub cautions: Vec<String>,
    pub references: Vec<Reference>,
    pub attachments: Vec<AttachmentRow>,
    pub program: Program,
}

/// Identification of the record; stands on the front sheet and, in short, on every page.
#[derive(Clone, Debug, Serialize, Deserialize)]
#[serde(rename_all = "kebab-case")]
pub struct TitleBlock {
    pub number: String,
    pub revision: String,
    pub title: String,
    pub facility: Option<String>,
    pub equipment: Vec<String>,
    pub related: Vec<String>,
    /// ISO 8601 date of the record.
    pub date: String,
    pub preparer: String,
    /// `preliminary`, `for-check` or `issued`.
    pub status: String,
    /// The status explained in a sentence (what it means that no signature is there, and so on).
    pub status_sentence: String,
    /// Roles that sign, in order; empty for a preliminary record.
    pub signatures: Vec<SignaturePlace>,
}

#[derive(Clone, Debug, Serialize, Deserialize)]
#[serde(rename_all = "kebab-case")]
pub struct SignaturePlace {
    /// `preparer`, `checker` or `approver`.
    pub role: String,
    /// Printed name where the case knows it (the preparer's).
    pub name: Option<String>,
}

/// The SHA-256 that stands for everything the record was computed from.
#[derive(Clone, Debug, Serialize, Deserialize)]
#[serde(rename_all = "kebab-case")]
pub struct Stamp {
    /// 64 hexadecimal digits.
    pub full: String,
    /// The first 16 of them, for the footer.
    pub short: String,
}

#[derive(Clone, Debug, Serialize, Deserialize)]
#[serde(rename_all = "kebab-case")]
pub struct Revision {
    pub revision: String,
    pub date: String,
    pub change: String,
}

/// A section of the case's prose.
#[derive(Clone, Debug, Serialize, Deserialize)]
#[serde(rename_all = "kebab-case")]
pub struct ProseSection {
    pub heading: String,
    pub blocks: Vec<Block>,
}

/// A block of prose.
#[derive(Clone, Debug, PartialEq, Eq, Serialize, Deserialize)]
#[serde(tag = "block", rename_all = "kebab-case")]
pub enum Block {
    Paragraph {
        text: Rich,
    },
    /// A heading inside the prose; `level` 1 is the highest that prose can have.
    Heading {
        level: u8,
        text: Rich,
    },
    List {
        ordered: bool,
        start: u64,
        items: Vec<Vec<Block>>,
    },
    Quote {
        blocks: Vec<Block>,
    },
    Code {
        text: String,
    },
    Table {
        head: Vec<Rich>,
        rows: Vec<Vec<Rich>>,
    },
    Rule,
}

/// A result, as stated.
#[derive(Clone, Debug, Serialize, Deserialize)]
#[serde(rename_all = "kebab-case")]
pub struct ResultRow {
    /// `hydrogenation.heat`
    pub id: String,
    /// "Heat of reaction as written, per mole of reaction"
    pub what: String,
    /// The reaction, with the first of its results.
    pub equation: Option<Rich>,
    /// Section of the working that made it (index into `working`).
    pub section: usize,
    /// Stated value with a true minus, e.g. `−552.6`; absent where it was not worked.
    pub stated: Option<String>,
    /// Stated expanded uncertainty without sign, where one is stated.
    pub expanded: Option<String>,
    pub unit: String,
    /// "released" or "absorbed" or "neither".
    pub direction: Option<String>,
    /// "k = 2, about 95 %; covers 4 of 4 values"
    pub coverage: String,
}

/// What the calculation rests on.
#[derive(Clone, Debug, Serialize, Deserialize)]
#[serde(rename_all = "kebab-case")]
pub struct Basis {
    pub inputs: Vec<InputRow>,
    pub assumptions: Vec<AssumptionRow>,
    pub holds: Vec<HoldRow>,
}

#[derive(Clone, Debug, Serialize, Deserialize)]
#[serde(rename_all = "kebab-case")]
pub struct InputRow {
    pub id: String,
    pub value: String,
    pub tolerance: Option<String>,
    pub source: String,
    pub confirmed: bool,
    /// Number of its hold (1-based into `holds`), where it is not confirmed.
    pub hold: Option<usize>,
}

#[derive(Clone, Debug, Serialize, Deserialize)]
#[serde(rename_all = "kebab-case")]
pub struct AssumptionRow {
    pub number: usize,
    pub text: String,
    pub basis: Option<String>,
    pub confirmed: bool,
    pub hold: Option<usize>,
}

#[derive(Clone, Debug, Serialize, Deserialize)]
#[serde(rename_all = "kebab-case")]
pub struct HoldRow {
    pub number: usize,
    /// What is held: the assumption's text or the input's id.
    pub what: String,
    pub owner: String,
    pub closed_by: String,
}

/// A row of the table of values used.
#[derive(Clone, Debug, Serialize, Deserialize)]
#[serde(rename_all = "kebab-case")]
pub struct ValueRow {
    pub number: usize,
    pub substance: Rich,
    /// Name of the substance in words where one is known; of a measured heat, of what it is.
    pub name: Option<Rich>,
    pub cas: Option<String>,
    /// "formation enthalpy"
    pub quantity: String,
    /// As printed in the source, with a true minus and its uncertainty.
    pub printed: String,
    pub unit: String,
    /// Number of the source in the reference list.
    pub reference: usize,
    pub source: String,
    pub locator: String,
    pub standing: String,
    /// First 16 hexadecimal digits of the source's SHA-256 (in full in the reference list).
    pub sha256: String,
}

/// A heat-capacity function with what the source prints of it.
#[derive(Clone, Debug, Serialize, Deserialize)]
#[serde(rename_all = "kebab-case")]
pub struct FunctionRow {
    /// Number of the value used.
    pub value_used: usize,
    pub substance: Rich,
    /// `nasa-9`
    pub form: String,
    /// "200 K to 1000 K", or nothing.
    pub range: String,
    /// The equation of the form, in plain characters.
    pub equation: String,
    /// Name and number of each coefficient, or temperature and heat capacity of each point.
    pub numbers: Vec<(String, String)>,
}

/// The same value in another source that the case consults.
#[derive(Clone, Debug, Serialize, Deserialize)]
#[serde(rename_all = "kebab-case")]
pub struct ComparisonRow {
    pub substance: Rich,
    /// Number of the value used.
    pub value_used: usize,
    pub used: String,
    pub other: String,
    pub unit: String,
    /// Number of the other source in the reference list.
    pub reference: usize,
    pub locator: String,
    pub difference: String,
    /// How the difference compares with the combined expanded uncertainty, in words.
    pub judgement: String,
}

/// One part of the working: usually one reaction.
#[derive(Clone, Debug, Serialize, Deserialize)]
#[serde(rename_all = "kebab-case")]
pub struct WorkingSection {
    pub id: String,
    pub heading: String,
    pub steps: Vec<Step>,
}

/// One step of a working.
#[derive(Clone, Debug, Serialize, Deserialize)]
#[serde(tag = "step", rename_all = "kebab-case")]
pub enum Step {
    /// A small heading inside the section.
    Heading {
        text: String,
    },
    Text {
        text: Rich,
    },
    /// A reaction equation, set on a line of its own.
    Reaction {
        text: Rich,
    },
    /// A displayed equation with its alternative text.
    Equation {
        math: Math,
        alt: String,
    },
    Table(Table),
    /// The result that the section ends on.
    Result {
        text: Rich,
    },
}

/// A table of the working.
#[derive(Clone, Debug, Serialize, Deserialize)]
#[serde(rename_all = "kebab-case")]
pub struct Table {
    pub caption: String,
    pub columns: Vec<Column>,
    pub rows: Vec<Vec<Rich>>,
    /// A last row set off by a rule, where the columns are summed.
    pub total: Option<Vec<Rich>>,
}

#[derive(Clone, Debug, Serialize, Deserialize)]
#[serde(rename_all = "kebab-case")]
pub struct Column {
    pub head: Rich,
    /// `text` (left), `number` (aligned at the decimal marker) or `mark` (centred).
    pub kind: ColumnKind,
}

#[derive(Clone, Copy, Debug, PartialEq, Eq, Serialize, Deserialize)]
#[serde(rename_all = "kebab-case")]
pub enum ColumnKind {
    Text,
    Number,
    Mark,
}

/// Which values carry the uncertainty of a result.
#[derive(Clone, Debug, Serialize, Deserialize)]
#[serde(rename_all = "kebab-case")]
pub struct Budget {
    pub result: String,
    pub unit: String,
    pub rows: Vec<BudgetRow>,
    /// Combined standard uncertainty, to two digits; absent where no value states one.
    pub standard: Option<String>,
    pub expanded: Option<String>,
    pub coverage: String,
    /// A sentence on the values that state no uncertainty, where there are any.
    pub remark: Option<String>,
}

#[derive(Clone, Debug, Serialize, Deserialize)]
#[serde(rename_all = "kebab-case")]
pub struct BudgetRow {
    pub value_used: usize,
    pub substance: Rich,
    /// Standard uncertainty as text, or "not stated".
    pub standard: String,
    pub sensitivity: String,
    /// |sensitivity|·u as text, or "–".
    pub contribution: String,
    /// Share of the variance in per cent, as text, or "–".
    pub share: String,
    /// Share between 0 and 1000 in thousandths, for a bar; none where not stated.
    pub share_permille: Option<u32>,
}

#[derive(Clone, Debug, Serialize, Deserialize)]
#[serde(rename_all = "kebab-case")]
pub struct FindingRow {
    /// `stop`, `caution` or `note`
    pub severity: String,
    pub code: String,
    pub message: String,
    /// "case.toml, line 12"
    pub at: String,
}

/// A source in the reference list.
#[derive(Clone, Debug, Serialize, Deserialize)]
#[serde(rename_all = "kebab-case")]
pub struct Reference {
    pub number: usize,
    pub id: String,
    /// "Cox, J. D.; Wagman, D. D.; Medvedev, V. A.: CODATA Key Values for Thermodynamics. Hemisphere, 1989."
    pub text: String,
    pub temperature: String,
    pub pressure: String,
    pub licence: Option<String>,
    /// 64 hexadecimal digits of the file that the values came from.
    pub sha256: String,
    /// Name of the attachment that carries the entries.
    pub attachment: String,
}

#[derive(Clone, Debug, Serialize, Deserialize)]
#[serde(rename_all = "kebab-case")]
pub struct AttachmentRow {
    pub name: String,
    pub description: String,
    /// `Source` or `Data` (AFRelationship, ISO 19005-3)
    pub relationship: String,
    pub media_type: String,
}

/// The program's identity and the evidence that it is verified.
#[derive(Clone, Debug, Serialize, Deserialize)]
#[serde(rename_all = "kebab-case")]
pub struct Program {
    pub name: String,
    pub version: String,
    pub typesetter: String,
    /// How the method is verified and within which limits, in sentences.
    pub verification: Vec<String>,
    /// What the record needs to be run again, in a sentence.
    pub rerun: String,
}
