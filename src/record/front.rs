//! The title block, the revision history and the findings.

use crate::calculation::Calculation;
use crate::case::{Case, Role, Status};
use crate::finding::Finding;

use super::numerals::minus;
use super::pages::{FindingRow, Revision, SignaturePlace, TitleBlock};

pub(super) fn title_block(case: &Case) -> TitleBlock {
    let head = &case.record;
    let status = head.status.value;
    TitleBlock {
        number: head.number.value.clone(),
        revision: head.revision.value.clone(),
        title: head.title.clone(),
        facility: head.facility.clone(),
        equipment: head.equipment.clone(),
        related: head.related.clone(),
        date: head.date.to_string(),
        preparer: head.preparer.clone(),
        status: status.word().to_string(),
        status_sentence: status_sentence(status).to_string(),
        signatures: signatures(case),
    }
}

fn status_sentence(status: Status) -> &'static str {
    match status {
        Status::Preliminary => {
            "Preliminary: released for information under the preparer's name on the date above. It \
             carries no signatures and is not to be used for construction, operation or filing."
        }
        Status::ForCheck => {
            "For check: complete in the preparer's view and not yet verified by a second person. \
             It is not in force."
        }
        Status::Issued => {
            "Issued: in force only while every signature named below is in this file and verifies. \
             A PDF reader's signature panel shows whether that is so; a paper copy does not."
        }
    }
}

/// A preliminary record has no places for signatures.
fn signatures(case: &Case) -> Vec<SignaturePlace> {
    if case.record.status.value == Status::Preliminary {
        return Vec::new();
    }
    let place = |role: &Role| SignaturePlace {
        role: role.word().to_string(),
        name: (*role == Role::Preparer).then(|| case.record.preparer.clone()),
    };
    case.record.signatures.iter().map(place).collect()
}

pub(super) fn history(case: &Case) -> Vec<Revision> {
    let row = |revision: &crate::case::Revision| Revision {
        revision: revision.revision.clone(),
        date: revision.date.to_string(),
        change: revision.change.clone(),
    };
    case.record.history.iter().map(row).collect()
}

pub(super) fn findings(calculation: &Calculation) -> Vec<FindingRow> {
    let row = |finding: &Finding| FindingRow {
        severity: finding.severity.to_string(),
        code: finding.code.word().to_string(),
        message: with_minus(&finding.message),
        at: format!("{}, line {}", finding.at.file, finding.at.line),
    };
    calculation.working.findings.iter().map(row).collect()
}

/// A hyphen before a digit that follows a space or a bracket is a minus.
fn with_minus(text: &str) -> String {
    let characters: Vec<char> = text.chars().collect();
    let is_minus = |i: usize| {
        let before = i.checked_sub(1).map(|b| characters[b]);
        let after = characters.get(i + 1);
        characters[i] == '-'
            && before.is_none_or(|c| c == ' ' || c == '(')
            && after.is_some_and(char::is_ascii_digit)
    };
    let set = |(i, c): (usize, &char)| match is_minus(i) {
        true => minus(&c.to_string()),
        false => c.to_string(),
    };
    characters.iter().enumerate().map(set).collect()
}
