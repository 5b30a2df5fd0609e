//! Reading `molality` of a reaction: how concentrated its aqueous participants are.

use indexmap::IndexMap;
use num_traits::Signed;

use crate::document::{Table, Value, filled, value_fault};
use crate::finding::Located;
use crate::quantity::Dimension;

use super::given::{Given, Wanted, read_given};
use super::ids::Ids;
use super::model::Input;

/// The stated concentration of an aqueous participant.
#[derive(Clone, Debug)]
pub struct Molality {
    /// As the equation writes it.
    pub participant: Located<String>,
    /// Amount of the solute per mass of water.
    pub molality: Given,
    /// Relative apparent molar enthalpy L_φ at this molality: the enthalpy of the solute in the
    /// solution less that at infinite dilution, h = h∞ + L_φ. It is the enthalpy of dilution to
    /// infinite dilution with the other sign, so positive where dilution gives off heat.
    pub relative_enthalpy: Option<Given>,
    /// Where the relative enthalpy comes from.
    pub source: Option<String>,
}

const KEYS: [&str; 3] = ["value", "relative-enthalpy", "source"];

const MOLALITY: Wanted = Wanted {
    dimension: Dimension::AMOUNT.over(Dimension::MASS),
    results: false,
    expected: "a molality: amount of the solute per mass of water",
    advice: "write it as \"0.80 mol/kg\"",
};

const RELATIVE_ENTHALPY: Wanted = Wanted {
    dimension: Dimension::ENERGY.over(Dimension::AMOUNT),
    results: false,
    expected: "a relative enthalpy per mole of the solute",
    advice: "write it as \"0.53 kJ/mol\"",
};

/// Reads the molalities of one reaction.
pub(super) struct MolalityReader<'a> {
    pub(super) ids: &'a Ids,
    pub(super) inputs: &'a IndexMap<String, Input>,
}

impl MolalityReader<'_> {
    /// Reads `molality = { "H+(aq)" = "0.80 mol/kg", … }`. `dissolved` finds the name under which
    /// the equation has an aqueous participant at infinite dilution, or reports that it has none.
    pub(super) fn read(
        &self,
        reaction: &Table<'_, '_>,
        dissolved: impl Fn(&Located<String>) -> Option<String>,
    ) -> Vec<Molality> {
        let mut read: Vec<Molality> = Vec::new();
        let entries = reaction.table("molality");
        for (name, value) in entries.map_or_else(Vec::new, |table| table.entries()) {
            let participant = dissolved(&name);
            let Some(molality) = self.read_one(&value, &name, participant) else {
                continue;
            };
            let same = |other: &Molality| other.participant.value == molality.participant.value;
            if read.iter().any(same) {
                value_fault(
                    value.reader(),
                    &name.span,
                    format!("a second molality of `{}`", molality.participant.value),
                    "one molality of a participant",
                    "keep one of the two",
                );
                continue;
            }
            read.push(molality);
        }
        read
    }

    fn read_one(
        &self,
        value: &Value<'_, '_>,
        name: &Located<String>,
        participant: Option<String>,
    ) -> Option<Molality> {
        if value.is_string() {
            let molality = self.read_molality(value);
            return Some(Molality {
                participant: Located::new(participant?, name.span.clone()),
                molality: molality?,
                relative_enthalpy: None,
                source: None,
            });
        }
        let table = value.table()?;
        table.only(&KEYS);
        let molality = match table.get("value") {
            Some(value) => self.read_molality(&value),
            None => {
                table.missing("value", "give the molality: value = \"0.80 mol/kg\"");
                None
            }
        };
        let relative = table.get("relative-enthalpy");
        let relative_enthalpy = relative
            .as_ref()
            .map(|v| self.read_as(v, &RELATIVE_ENTHALPY));
        let source = table.string("source");
        let source = source.and_then(|text| filled(table.reader(), text));
        // An input has a source of its own.
        let stated = !matches!(relative_enthalpy, Some(Some(Given::Input(_))));
        if relative.is_some() && stated && table.get("source").is_none() {
            table.missing("source", "say where the relative enthalpy comes from");
        }
        Some(Molality {
            participant: Located::new(participant?, name.span.clone()),
            molality: molality?,
            relative_enthalpy: match relative_enthalpy {
                Some(read) => Some(read?),
                None => None,
            },
            source: source.map(|text| text.value),
        })
    }

    fn read_molality(&self, value: &Value<'_, '_>) -> Option<Given> {
        let read = self.read_as(value, &MOLALITY)?;
        let molality = read.quantity(self.inputs)?;
        if !molality.value_in_si().is_positive() {
            value_fault(
                value.reader(),
                read.span(),
                format!("\"{molality}\""),
                "a molality above zero",
                "leave it out where nothing is dissolved yet",
            );
            return None;
        }
        Some(read)
    }

    fn read_as(&self, value: &Value<'_, '_>, wanted: &Wanted) -> Option<Given> {
        let text = value.string()?;
        read_given(value.reader(), self.ids, self.inputs, &text, wanted)
    }
}
