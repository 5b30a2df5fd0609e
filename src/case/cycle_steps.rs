//! Reading the steps of a cycle.

use crate::document::{Table, is_id, one_of, value_fault};
use crate::finding::Located;
use crate::notation::Equation;
use crate::quantity::{Dimension, Quantity};

use super::cycle::{CycleStep, Measured, StepHeat};
use super::cycles::{Surroundings, read_equation};
use super::given::{Given, Wanted, read_given, read_temperature};
use super::ids::IdKind;

const MEASURED: [(&str, Measured); 2] = [
    ("enthalpy", Measured::Enthalpy),
    ("internal energy", Measured::InternalEnergy),
];

const HEAT: &str = "write heat = \"-3226.9 ± 0.5 kJ/mol\", or the name of a result";

/// One step with what it may refer to.
pub(super) struct StepReader<'a, 'r, 'd> {
    pub(super) table: &'a Table<'r, 'd>,
    pub(super) around: &'a Surroundings<'a>,
}

impl StepReader<'_, '_, '_> {
    pub(super) fn read(&self) -> Option<CycleStep> {
        let table = self.table;
        table.only(&[
            "id",
            "equation",
            "heat",
            "combustion-of",
            "per",
            "measured",
            "reduced-to-standard-states",
            "temperature",
            "source",
            "locator",
        ]);
        let id = table.string("id").and_then(|id| self.check_id(id));
        let equation = table.string("equation");
        let has_equation = equation.is_some();
        let equation = equation.and_then(|text| read_equation(table, self.around, &text));
        let per = table.string("per");
        let per = per.and_then(|text| self.participant(equation.as_ref(), &text));
        let heat = self.heat(equation.as_ref());
        let measured = self.measured(heat.as_ref());
        let reduced = table.boolean("reduced-to-standard-states");
        let temperature = table.string("temperature");
        let temperature = temperature.and_then(|text| {
            let Surroundings { ids, inputs, .. } = self.around;
            read_temperature(table.reader(), ids, inputs, &text)
        });
        let of_result = heat.as_ref().is_some_and(is_result);
        if !has_equation && !of_result {
            table.missing("equation", "write the reaction whose heat was measured");
        }
        if let Some(heat) = &heat {
            self.refuse_beside(heat);
        }
        if equation.is_none() && (has_equation || !of_result) {
            return None;
        }
        Some(CycleStep {
            id,
            equation,
            heat: heat?,
            per,
            measured: measured?,
            reduced: reduced.is_some_and(|r| r.value),
            temperature,
            source: table.string("source").map(|t| t.value),
            locator: table.string("locator").map(|t| t.value),
            span: table.span.clone(),
        })
    }

    fn check_id(&self, id: Located<String>) -> Option<Located<String>> {
        if is_id(&id.value) {
            return Some(id);
        }
        value_fault(
            self.table.reader(),
            &id.span,
            format!("the id `{}`", id.value),
            "lower-case letters, digits and hyphens, begun by a letter; not `exact`",
            "rename the step",
        );
        None
    }

    fn heat(&self, equation: Option<&Located<Equation>>) -> Option<StepHeat> {
        let table = self.table;
        match (table.get("heat"), table.get("combustion-of")) {
            (Some(_), Some(other)) => {
                value_fault(
                    table.reader(),
                    &other.key_span,
                    "`combustion-of` beside `heat`",
                    "one of the two",
                    "remove the one that does not apply",
                );
                None
            }
            (None, Some(_)) => {
                let text = table.string("combustion-of")?;
                let of = self.participant(equation, &text)?;
                Some(StepHeat::CombustionOf(of))
            }
            (None, None) => {
                table.missing("heat", HEAT);
                None
            }
            (Some(_), None) => {
                let text = table.string("heat")?;
                self.given(&text).map(StepHeat::Given)
            }
        }
    }

    fn given(&self, text: &Located<String>) -> Option<Given> {
        let Surroundings { ids, inputs, .. } = self.around;
        let per_mass = Dimension::ENERGY.over(Dimension::MASS);
        let input = inputs
            .get(&text.value)
            .map(|i| i.value.value.unit.dimension());
        let stated = || {
            Quantity::parse(&text.value)
                .ok()
                .map(|q| q.unit.dimension())
        };
        let by_mass = input.or_else(stated) == Some(per_mass);
        let wanted = Wanted {
            dimension: match by_mass {
                true => per_mass,
                false => Dimension::ENERGY.over(Dimension::AMOUNT),
            },
            results: true,
            expected: "a heat per mole, or per mass of the substance named in `per`",
            advice: HEAT,
        };
        let given = read_given(self.table.reader(), ids, inputs, text, &wanted)?;
        if let Given::Result(name) = &given {
            self.check_result(name);
        }
        if by_mass && self.table.get("per").is_none() {
            let advice = "name the substance whose mass it is";
            self.table.missing("per", advice);
            return None;
        }
        Some(given)
    }

    /// A result has to be there, and to be a heat of a reaction.
    fn check_result(&self, name: &Located<String>) {
        let Surroundings { ids, results, .. } = self.around;
        let reader = self.table.reader();
        let advice = "write it as in heat = \"water-formation.heat\"";
        results.check(reader, name, ids, advice);
        let Some(dimension) = results.dimension(&name.value) else {
            return;
        };
        let kind = name.value.split_once('.').and_then(|(id, _)| ids.kind(id));
        let of_reaction = matches!(kind, Some(IdKind::Reaction | IdKind::Cycle));
        if !of_reaction || dimension != Dimension::ENERGY.over(Dimension::AMOUNT) {
            value_fault(
                reader,
                &name.span,
                format!("`{}`", name.value),
                "a heat of a reaction or of another cycle, per mole",
                "use its `heat`",
            );
        }
    }

    /// A bomb gives an internal energy: what was measured has to be said where it was measured.
    fn measured(&self, heat: Option<&StepHeat>) -> Option<Measured> {
        let table = self.table;
        let tabulated = match heat {
            Some(heat) => is_result(heat) || matches!(heat, StepHeat::CombustionOf(_)),
            None => true,
        };
        let Some(text) = table.string("measured") else {
            if tabulated {
                return Some(Measured::Enthalpy);
            }
            let advice = "write measured = \"enthalpy\", or \"internal energy\" for a bomb";
            table.missing("measured", advice);
            return None;
        };
        let measured = one_of(table.reader(), &text, &MEASURED)?;
        if tabulated && measured == Measured::InternalEnergy && heat.is_some() {
            value_fault(
                table.reader(),
                &text.span,
                "an internal energy from a table or a result",
                "an enthalpy: results and combustion enthalpies are no internal energies",
                "remove `measured`",
            );
            return None;
        }
        Some(measured)
    }

    /// The participant of the equation that `per` or `combustion-of` names.
    fn participant(
        &self,
        equation: Option<&Located<Equation>>,
        text: &Located<String>,
    ) -> Option<Located<String>> {
        let equation = &equation?.value;
        super::reactions::named_participant(self.table.reader(), equation, text)
    }

    /// What comes from elsewhere brings its own reference and temperature.
    fn refuse_beside(&self, heat: &StepHeat) {
        let (what, expected) = match heat {
            StepHeat::Given(Given::Result(_)) => (
                "a result",
                "a result as it is: per mole of its own reaction, at its own temperature",
            ),
            StepHeat::CombustionOf(_) => (
                "`combustion-of`",
                "a table's value as it is: per mole of the substance, at the table's temperature",
            ),
            StepHeat::Given(_) => return,
        };
        for key in ["per", "temperature"] {
            let Some(value) = self.table.get(key) else {
                continue;
            };
            let found = format!("`{key}` beside {what}");
            let advice = format!("remove `{key}`");
            value_fault(
                self.table.reader(),
                &value.key_span,
                found,
                expected,
                advice,
            );
        }
    }
}

fn is_result(heat: &StepHeat) -> bool {
    matches!(heat, StepHeat::Given(Given::Result(_)))
}
