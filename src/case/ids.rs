//! Ids: each names one thing in the whole case.

use std::cell::Cell;

use indexmap::IndexMap;

use crate::document::{Reader, Table, is_id};
use crate::finding::{FaultCode, Located, Span, nearest};

/// What an id can name.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum IdKind {
    Substance,
    Input,
    Reaction,
    Cycle,
    HeatingValue,
}

impl IdKind {
    /// The kinds of which a case has results.
    pub(super) const WITH_RESULTS: [IdKind; 3] =
        [IdKind::Reaction, IdKind::Cycle, IdKind::HeatingValue];

    pub(super) fn has_results(self) -> bool {
        IdKind::WITH_RESULTS.contains(&self)
    }

    /// The word with its article.
    fn word(self) -> &'static str {
        match self {
            IdKind::Substance => "a substance",
            IdKind::Input => "an input",
            IdKind::Reaction => "a reaction",
            IdKind::Cycle => "a cycle",
            IdKind::HeatingValue => "a heating value",
        }
    }
}

/// All ids of a case, with what they name and where.
#[derive(Default)]
pub(super) struct Ids {
    taken: IndexMap<String, (IdKind, Span)>,
    /// How many unknown ids were compared with all others.
    searched: Cell<usize>,
}

/// How many unknown ids are helped by a search through all others, so that a long case that is
/// wrong everywhere is answered as soon as one that is right.
const MOST_SEARCHED: usize = 50;

impl Ids {
    /// Takes the ids of a table of named things.
    pub(super) fn take(&mut self, table: Option<&Table<'_, '_>>, kind: IdKind) {
        for (id, _) in table.map_or_else(Vec::new, Table::entries) {
            // A table is there, so its reader is.
            if let Some(table) = table {
                self.take_one(table.reader(), &id, kind);
            }
        }
    }

    fn take_one(&mut self, reader: &Reader<'_>, id: &Located<String>, kind: IdKind) {
        if !is_id(&id.value) {
            reader.fault(
                FaultCode::Value,
                &id.span,
                format!("the id `{}`", id.value),
                "lower-case letters, digits and hyphens, begun by a letter; not `exact`",
                "rename it, and where it is used",
            );
        }
        if let Some((other, first)) = self.taken.get(&id.value) {
            let line = reader.text().place(first.start).line;
            reader.fault(
                FaultCode::DuplicateId,
                &id.span,
                format!("the id `{}` for {}", id.value, kind.word()),
                format!("an id of its own: line {line} has it for {}", other.word()),
                "rename one of the two, and where it is used",
            );
            return;
        }
        self.taken.insert(id.value.clone(), (kind, id.span.clone()));
    }

    pub(super) fn kind(&self, id: &str) -> Option<IdKind> {
        self.taken.get(id).map(|(kind, _)| *kind)
    }

    /// Reports an id that nothing has, with the nearest one of the kind that was asked for.
    pub(super) fn unknown(&self, reader: &Reader<'_>, id: &str, span: &Span, wanted: &[IdKind]) {
        let advice = match self.nearest(id, wanted) {
            Some(near) => format!("did you mean `{near}`?"),
            None if wanted.contains(&IdKind::Substance) => format!(
                "declare it: [substances] {id} = {{ formula = \"…\", phase = \"l\", cas = \"…\" }}"
            ),
            None => "define it, or use one that is defined".to_string(),
        };
        let words: Vec<&str> = wanted.iter().map(|kind| kind.word()).collect();
        reader.fault(
            FaultCode::UnknownId,
            span,
            format!("`{id}`"),
            format!("the id of {} of this case", words.join(" or ")),
            advice,
        );
    }

    fn nearest(&self, id: &str, wanted: &[IdKind]) -> Option<&str> {
        self.searched.set(self.searched.get() + 1);
        if self.searched.get() > MOST_SEARCHED {
            return None;
        }
        let fitting = self
            .taken
            .iter()
            .filter(|(_, (kind, _))| wanted.contains(kind));
        let candidates = fitting.map(|(id, _)| id.as_str());
        nearest(id, candidates, 1).first().copied()
    }
}
