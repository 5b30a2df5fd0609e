//! Reading `[reactions]`.

use indexmap::IndexMap;

use crate::document::{Reader, Table, is_id, notation_fault, value_fault};
use crate::finding::{FaultCode, Located};
use crate::notation::{Equation, Participant, Phase};
use crate::quantity::Dimension;

use super::given::{Given, read_temperature};
use super::ids::{IdKind, Ids};
use super::model::{DeclaredKind, DeclaredSubstance, Input, Reaction};
use super::molality::MolalityReader;
use super::results::ResultQuantity;

/// The results that a reaction can have.
pub const RESULT_QUANTITIES: [&str; 3] = ["heat", "heat-per", "heat-per-mass"];

/// What they measure, and what they need.
pub(super) fn result_quantities() -> [ResultQuantity; 3] {
    let quantity = |name, per, needs| ResultQuantity {
        name,
        dimension: Dimension::ENERGY.over(per),
        needs,
    };
    let [heat, per, mass] = RESULT_QUANTITIES;
    [
        quantity(heat, Dimension::AMOUNT, None),
        quantity(per, Dimension::AMOUNT, Some("per")),
        quantity(mass, Dimension::MASS, Some("per")),
    ]
}

pub(super) fn read_reactions(
    table: &Table<'_, '_>,
    ids: &Ids,
    inputs: &IndexMap<String, Input>,
    substances: &IndexMap<String, DeclaredSubstance>,
) -> IndexMap<String, Reaction> {
    let mut reactions = IndexMap::new();
    for (id, value) in table.entries() {
        let Some(table) = value.table() else { continue };
        let context = Context {
            table: &table,
            ids,
            inputs,
            substances,
        };
        if let Some(reaction) = context.read_reaction(id) {
            reactions.insert(reaction.id.value.clone(), reaction);
        }
    }
    reactions
}

struct Context<'a, 'r, 'd> {
    table: &'a Table<'r, 'd>,
    ids: &'a Ids,
    inputs: &'a IndexMap<String, Input>,
    substances: &'a IndexMap<String, DeclaredSubstance>,
}

impl Context<'_, '_, '_> {
    fn read_reaction(&self, id: Located<String>) -> Option<Reaction> {
        self.table
            .only(&["equation", "temperature", "per", "molality"]);
        let temperature = self.read_temperature();
        let per = self.table.string("per");
        let advice = "write equation = \"N2(g) + 3 H2(g) -> 2 NH3(g)\"";
        let text = self.table.required_string("equation", advice)?;
        let equation = Equation::parse(&text.value);
        if let Err(errors) = &equation {
            for error in errors {
                notation_fault(self.table.reader(), &text, error);
            }
        }
        let equation = Located::new(equation.ok()?, text.span.clone());
        check_participants(
            self.table.reader(),
            self.ids,
            self.substances,
            &equation,
            &text,
        );
        let says_per = per.is_some();
        let per =
            per.and_then(|text| named_participant(self.table.reader(), &equation.value, &text));
        let molalities = MolalityReader {
            ids: self.ids,
            inputs: self.inputs,
        };
        let molalities = molalities.read(self.table, |name| self.dissolved(&equation.value, name));
        Some(Reaction {
            id,
            equation,
            temperature,
            per,
            says_per,
            molalities,
        })
    }

    /// A temperature, or the id of an input that is one.
    fn read_temperature(&self) -> Option<Given> {
        let text = self.table.string("temperature")?;
        read_temperature(self.table.reader(), self.ids, self.inputs, &text)
    }

    /// The aqueous participant at infinite dilution that a name stands for.
    fn dissolved(&self, equation: &Equation, name: &Located<String>) -> Option<String> {
        let terms = equation.left.iter().chain(&equation.right);
        let aqueous: Vec<String> = terms
            .filter(|term| self.is_dissolved(&term.participant))
            .map(|term| term.participant.to_string())
            .collect();
        let wanted = canonical_participant(&name.value);
        if aqueous.contains(&wanted) {
            return Some(wanted);
        }
        let expected = match aqueous.is_empty() {
            true => "no molality: the equation has no solute at infinite dilution".to_string(),
            false => format!("a solute of the equation: {}", aqueous.join(", ")),
        };
        value_fault(
            self.table.reader(),
            &name.span,
            format!("`{}`", name.value),
            expected,
            "a molality belongs to a participant in (aq) without water of its own",
        );
        None
    }

    fn is_dissolved(&self, participant: &Participant) -> bool {
        let phase = match participant {
            Participant::Species(species) => species.phase.as_ref(),
            Participant::Declared(id) => match self.substances.get(id).map(|s| &s.kind) {
                Some(DeclaredKind::Compound { phase, .. }) => Some(phase),
                _ => None,
            },
        };
        phase.is_some_and(Phase::is_infinite_dilution)
    }
}

/// Reports participants that are not declared, or that have no formula.
pub(super) fn check_participants(
    reader: &Reader<'_>,
    ids: &Ids,
    substances: &IndexMap<String, DeclaredSubstance>,
    equation: &Located<Equation>,
    text: &Located<String>,
) {
    for term in equation.value.left.iter().chain(&equation.value.right) {
        let Participant::Declared(id) = &term.participant else {
            continue;
        };
        let span = reader.text().inside(&text.span, &term.span);
        match substances.get(id).map(|s| &s.kind) {
            Some(DeclaredKind::Compound { .. }) => {}
            Some(DeclaredKind::Inert) => value_fault(
                reader,
                &span,
                format!("`{id}`, which is declared inert"),
                "substances with a formula",
                "give it a formula and a phase, or leave it out of the equation",
            ),
            None if ids.kind(id) == Some(IdKind::Substance) => {}
            None => ids.unknown(reader, id, &span, &[IdKind::Substance]),
        }
    }
}

/// The participant that a text names, as it is written in the equation.
pub(super) fn named_participant(
    reader: &Reader<'_>,
    equation: &Equation,
    text: &Located<String>,
) -> Option<Located<String>> {
    let terms = equation.left.iter().chain(&equation.right);
    let names: Vec<String> = terms.map(|term| term.participant.to_string()).collect();
    let wanted = canonical_participant(&text.value);
    if names.contains(&wanted) {
        return Some(Located::new(wanted, text.span.clone()));
    }
    reader.fault(
        FaultCode::Value,
        &text.span,
        format!("\"{}\"", text.value),
        format!("a participant of the equation: {}", names.join(", ")),
        "write it as it stands in the equation",
    );
    None
}

/// A participant in the one way that equations print it.
fn canonical_participant(text: &str) -> String {
    match crate::notation::Species::parse(text) {
        Ok(species) if !is_id(text) => species.to_string(),
        _ => text.to_string(),
    }
}
