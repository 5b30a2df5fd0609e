//! Small constructors for rows and columns of the working's tables.

use super::pages::{Column, ColumnKind};
use super::rich::{Rich, Run};

pub(super) fn column(head: Rich, kind: ColumnKind) -> Column {
    Column { head, kind }
}

pub(super) fn text(head: &str) -> Column {
    column(Rich::plain(head), ColumnKind::Text)
}

pub(super) fn number(head: Rich) -> Column {
    column(head, ColumnKind::Number)
}

pub(super) fn mark(head: &str) -> Column {
    column(Rich::plain(head), ColumnKind::Mark)
}

/// Δ_f H° or Δ_r H° as runs.
pub(super) fn enthalpy(of: &str) -> Rich {
    Rich::plain("Δ")
        .run(Run::Sub(of.to_string()))
        .run(Run::Italic("H".to_string()))
        .and("°")
}
