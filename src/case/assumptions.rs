//! Reading assumptions and holds.

use crate::document::{Table, filled, value_fault};

use super::allowances::read_allowances;
use super::ids::Ids;
use super::model::{Assumption, Hold};

pub(super) fn read_assumptions(root: &Table<'_, '_>, ids: &Ids) -> Vec<Assumption> {
    let tables = root.tables("assumptions");
    tables
        .iter()
        .filter_map(|table| read_assumption(table, ids))
        .collect()
}

fn read_assumption(table: &Table<'_, '_>, ids: &Ids) -> Option<Assumption> {
    table.only(&["text", "basis", "confirmed", "hold", "allows"]);
    let text = table.required_string("text", "say what is assumed");
    let text = text.and_then(|text| filled(table.reader(), text));
    let basis = table.string("basis").map(|t| t.value);
    let (confirmed, hold) = read_standing(table);
    let allows = read_allowances(table, ids);
    Some(Assumption {
        text: text?,
        basis,
        confirmed,
        hold,
        allows,
    })
}

/// Whether an assumption or an input is confirmed, and the hold on it where it is not.
pub(super) fn read_standing(table: &Table<'_, '_>) -> (bool, Option<Hold>) {
    let confirmed = table.boolean("confirmed").is_some_and(|b| b.value);
    let hold_table = table.table("hold");
    let hold = hold_table.as_ref().and_then(read_hold);
    if let (true, Some(hold_table)) = (confirmed, &hold_table) {
        value_fault(
            table.reader(),
            &hold_table.span,
            "a hold on what is confirmed",
            "a hold only while something is not confirmed",
            "remove the hold, or write confirmed = false",
        );
    }
    (confirmed, hold)
}

fn read_hold(table: &Table<'_, '_>) -> Option<Hold> {
    table.only(&["owner", "closed-by", "accepted-by"]);
    let owner = table.required_string("owner", "name who will close the hold");
    let closed_by = table.required_string("closed-by", "say what will close the hold");
    let owner = owner.and_then(|text| filled(table.reader(), text));
    let closed_by = closed_by.and_then(|text| filled(table.reader(), text));
    let accepted_by = table
        .string("accepted-by")
        .and_then(|text| filled(table.reader(), text));
    let accepted_by = accepted_by.map(|text| text.value);
    Some(Hold {
        owner: owner?.value,
        closed_by: closed_by?.value,
        accepted_by,
    })
}
