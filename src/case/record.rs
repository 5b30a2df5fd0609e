//! Reading `[record]`.

use chrono::NaiveDate;

use crate::document::{Reader, Table, filled, is_file_word, one_of, value_fault};
use crate::finding::Located;

use super::model::{RecordHead, Revision, Role, Status};

const KEYS: [&str; 11] = [
    "number",
    "revision",
    "title",
    "facility",
    "equipment",
    "related",
    "date",
    "preparer",
    "status",
    "history",
    "signatures",
];

const STATUSES: [(&str, Status); 3] = [
    ("preliminary", Status::Preliminary),
    ("for-check", Status::ForCheck),
    ("issued", Status::Issued),
];

const ROLES: [(&str, Role); 3] = [
    ("preparer", Role::Preparer),
    ("checker", Role::Checker),
    ("approver", Role::Approver),
];

/// Reads the head. What is at fault in it is reported and left empty.
pub(super) fn read_record(table: &Table<'_, '_>) -> RecordHead {
    table.only(&KEYS);
    let reader = table.reader();
    let number = table.required_string("number", "give the record's number: number = \"C-1001\"");
    let revision = table.required_string("revision", "give the revision: revision = \"A\"");
    let title = table.required_string("title", "say what is calculated: title = \"…\"");
    let preparer = table.required_string("preparer", "name who answers for the case");
    let status = table.required_string(
        "status",
        "status = \"preliminary\", \"for-check\" or \"issued\"",
    );
    let date = required_date(table, "date");
    let title = title.and_then(|text| fitting(reader, text, LONGEST_TITLE));
    let preparer = preparer.and_then(|text| fitting(reader, text, LONGEST_NAME));
    let number = number.and_then(|text| file_word(reader, text));
    let revision = revision.and_then(|text| file_word(reader, text));
    let status =
        status.and_then(|text| Some(Located::new(one_of(reader, &text, &STATUSES)?, text.span)));
    let texts = |key| table.strings(key).into_iter().map(|t| t.value).collect();
    let history = table.tables("history");
    let history: Vec<_> = history.iter().map(read_revision).collect();
    let signatures = read_signatures(table);
    let facility = table.string("facility").map(|t| t.value);
    let (equipment, related) = (texts("equipment"), texts("related"));
    let empty = || Located::new(String::new(), table.span.clone());
    let preliminary = || Located::new(Status::Preliminary, table.span.clone());
    RecordHead {
        number: number.unwrap_or_else(empty),
        revision: revision.unwrap_or_else(empty),
        title: title.unwrap_or_else(empty).value,
        facility,
        equipment,
        related,
        date: date.unwrap_or_default(),
        preparer: preparer.unwrap_or_else(empty).value,
        status: status.unwrap_or_else(preliminary),
        history: history.into_iter().flatten().collect(),
        signatures,
    }
}

fn required_date(table: &Table<'_, '_>, key: &str) -> Option<NaiveDate> {
    match table.get(key) {
        Some(value) => value.date().map(|date| date.value),
        None => {
            table.missing(key, "write the date without quotes: date = 2026-12-01");
            None
        }
    }
}

/// Numbers and revisions become part of a file name.
fn file_word(reader: &Reader<'_>, text: Located<String>) -> Option<Located<String>> {
    if is_file_word(&text.value) {
        return Some(text);
    }
    value_fault(
        reader,
        &text.span,
        format!("\"{}\"", text.value),
        "letters, digits, points, underscores and hyphens, begun by a letter or digit, at most 64",
        "write it with these characters alone: it becomes part of a file name",
    );
    None
}

/// The front sheet has places of fixed size for a title and a name.
const LONGEST_TITLE: usize = 200;
const LONGEST_NAME: usize = 80;

fn fitting(reader: &Reader<'_>, text: Located<String>, longest: usize) -> Option<Located<String>> {
    let text = filled(reader, text)?;
    let count = text.value.chars().count();
    if count > longest {
        value_fault(
            reader,
            &text.span,
            format!("{count} characters"),
            format!("at most {longest} characters"),
            "shorten it; what is longer belongs into the prose",
        );
        return None;
    }
    Some(text)
}

fn read_revision(table: &Table<'_, '_>) -> Option<Revision> {
    table.only(&["revision", "date", "change"]);
    let advice = "a revision has revision, date and change";
    let revision = table.required_string("revision", advice);
    let change = table.required_string("change", advice);
    let date = required_date(table, "date");
    Some(Revision {
        revision: revision?.value,
        date: date?,
        change: change?.value,
    })
}

fn read_signatures(table: &Table<'_, '_>) -> Vec<Role> {
    let Some(value) = table.get("signatures") else {
        return ROLES.map(|(_, role)| role).to_vec();
    };
    let mut roles = Vec::new();
    for text in value.strings() {
        let Some(role) = one_of(table.reader(), &text, &ROLES) else {
            continue;
        };
        if roles.contains(&role) {
            let found = format!("\"{}\" a second time", text.value);
            value_fault(
                table.reader(),
                &text.span,
                found,
                "each role once",
                "remove one",
            );
        }
        roles.push(role);
    }
    roles
}
