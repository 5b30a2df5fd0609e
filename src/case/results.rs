//! The results that a case will have, so that prose, rounding and other results can name them.

use indexmap::IndexMap;

use crate::document::{Reader, Table, is_id};
use crate::finding::{FaultCode, Located, Span, nearest};
use crate::quantity::Dimension;

use super::heating_values::HeatingValue;
use super::ids::{IdKind, Ids};
use super::model::Reaction;

/// A quantity that a kind of result has.
#[derive(Clone, Copy, Debug)]
pub(super) struct ResultQuantity {
    pub(super) name: &'static str,
    pub(super) dimension: Dimension,
    /// The key without which it is not worked.
    pub(super) needs: Option<&'static str>,
}

/// What one id of the case has.
#[derive(Clone, Debug)]
struct Having {
    word: &'static str,
    table: &'static str,
    quantities: Vec<ResultQuantity>,
    /// Keys that the case states and that results depend on.
    states: Vec<&'static str>,
}

/// All results of a case by the id that has them.
#[derive(Clone, Debug, Default)]
pub(super) struct Results {
    by_id: IndexMap<String, Having>,
}

impl Results {
    pub(super) fn add_reactions(&mut self, reactions: &IndexMap<String, Reaction>) {
        for (id, reaction) in reactions {
            let states = if reaction.says_per {
                vec!["per"]
            } else {
                Vec::new()
            };
            let quantities = super::reactions::result_quantities().to_vec();
            self.add(id, "a reaction", "reactions", quantities, states);
        }
    }

    /// Cycles can rest on each other, so they are known before they are read.
    pub(super) fn add_cycles(&mut self, table: Option<&Table<'_, '_>>) {
        for (id, _) in table.map_or_else(Vec::new, Table::entries) {
            let quantities = super::cycles::result_quantities().to_vec();
            self.add(&id.value, "a cycle", "cycles", quantities, Vec::new());
        }
    }

    pub(super) fn add_heating_values(&mut self, fuels: &IndexMap<String, HeatingValue>) {
        for (id, fuel) in fuels {
            let quantities = super::heating_values::result_quantities();
            let states = fuel.states();
            self.add(id, "a heating value", "heating-values", quantities, states);
        }
    }

    pub(super) fn add(
        &mut self,
        id: &str,
        word: &'static str,
        table: &'static str,
        quantities: Vec<ResultQuantity>,
        states: Vec<&'static str>,
    ) {
        let having = Having {
            word,
            table,
            quantities,
            states,
        };
        self.by_id.insert(id.to_string(), having);
    }

    /// What a result measures; none where there is no such result.
    pub(super) fn dimension(&self, name: &str) -> Option<Dimension> {
        let (id, quantity) = name.split_once('.')?;
        let mut having = self.by_id.get(id)?.quantities.iter();
        having.find(|q| q.name == quantity).map(|q| q.dimension)
    }

    /// Reports a name that is not the name of a result of this case.
    pub(super) fn check(
        &self,
        reader: &Reader<'_>,
        name: &Located<String>,
        ids: &Ids,
        advice: &str,
    ) {
        let Located { value: name, span } = name;
        let (id, quantity) = name.split_once('.').unwrap_or((name.as_str(), ""));
        if !is_id(id) || quantity.is_empty() {
            reader.fault(
                FaultCode::Value,
                span,
                format!("`{name}`"),
                "the name of a result: id.quantity",
                advice,
            );
        } else if !ids.kind(id).is_some_and(IdKind::has_results) {
            ids.unknown(reader, id, span, &IdKind::WITH_RESULTS);
        } else if let Some(having) = self.by_id.get(id) {
            having.check(reader, id, quantity, span);
        }
    }
}

impl Having {
    fn check(&self, reader: &Reader<'_>, id: &str, quantity: &str, span: &Span) {
        match self.quantities.iter().find(|q| q.name == quantity) {
            Some(found) => self.check_needs(reader, id, found, span),
            None => self.unknown(reader, id, quantity, span),
        }
    }

    fn check_needs(&self, reader: &Reader<'_>, id: &str, found: &ResultQuantity, span: &Span) {
        let Some(key) = found.needs.filter(|key| !self.states.contains(key)) else {
            return;
        };
        reader.fault(
            FaultCode::Value,
            span,
            format!("`{id}.{}`", found.name),
            format!("{} that states `{key}`", self.word),
            format!("add {key} = \"…\" to [{}.{id}]", self.table),
        );
    }

    fn unknown(&self, reader: &Reader<'_>, id: &str, quantity: &str, span: &Span) {
        let names: Vec<&str> = self.quantities.iter().map(|q| q.name).collect();
        let advice = match nearest(quantity, names.iter().copied(), 1).first() {
            Some(near) => format!("did you mean `{id}.{near}`?"),
            None => "use one of these".to_string(),
        };
        reader.fault(
            FaultCode::UnknownId,
            span,
            format!("`{quantity}` of {}", self.word),
            format!("one of: {}", names.join(", ")),
            advice,
        );
    }
}
