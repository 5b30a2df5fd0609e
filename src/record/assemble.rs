//! Putting a record together from a calculation.

use crate::calculation::Calculation;
use crate::source::sha256_hex;

use super::attachments::{Attachment, attached_files};
use super::manifest::Typesetting;
use super::pages::{AttachmentRow, CONTRACT, Pages, Program, Stamp};
use super::working::working_sections;
use super::{
    basis_rows, budget, cautions, front, function_rows, prose, references, result_rows, value_rows,
};

/// A record ready to be typeset.
#[derive(Clone, Debug)]
pub struct Record {
    pub pages: Pages,
    pub attachments: Vec<Attachment>,
}

impl Record {
    /// The stamp, 64 hexadecimal digits.
    pub fn stamp(&self) -> &str {
        &self.pages.stamp.full
    }
}

/// What the pages say and what is attached, for a finished calculation.
pub fn assemble(calculation: &Calculation, typesetting: &Typesetting) -> Record {
    let attachments = attached_files(calculation, typesetting);
    let manifest = attachments.last().map_or(&[][..], |file| &file.bytes);
    let stamp = sha256_hex(manifest);
    let pages = Pages {
        contract: CONTRACT,
        title_block: front::title_block(&calculation.case),
        stamp: Stamp {
            short: stamp[..16].to_string(),
            full: stamp,
        },
        history: front::history(&calculation.case),
        opening: prose::opening(calculation),
        closing: prose::closing(calculation),
        results: result_rows::result_rows(calculation),
        basis: basis_rows::basis(&calculation.case),
        values_used: value_rows::value_rows(&calculation.problem),
        functions: function_rows::function_rows(&calculation.problem),
        comparisons: value_rows::comparison_rows(&calculation.problem),
        working: working_sections(calculation),
        budgets: budget::budgets(calculation),
        findings: front::findings(calculation),
        cautions: cautions::ALWAYS.map(str::to_string).to_vec(),
        references: references::references(&calculation.problem),
        attachments: attachments.iter().map(attachment_row).collect(),
        program: program(typesetting),
    };
    Record { pages, attachments }
}

fn attachment_row(file: &Attachment) -> AttachmentRow {
    AttachmentRow {
        name: file.name.clone(),
        description: file.description.clone(),
        relationship: file.relationship.word().to_string(),
        media_type: file.media_type.to_string(),
    }
}

fn program(typesetting: &Typesetting) -> Program {
    Program {
        name: env!("CARGO_PKG_NAME").to_string(),
        version: env!("CARGO_PKG_VERSION").to_string(),
        typesetter: typesetting.version.clone(),
        verification: cautions::VERIFICATION.map(str::to_string).to_vec(),
        rerun: cautions::RERUN.to_string(),
    }
}
