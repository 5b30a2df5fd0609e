//! Which compositions can be fuels: what heating values are worked for, and what is refused.

use num_traits::Signed;

use crate::document::{Reader, value_fault};
use crate::finding::Located;
use crate::notation::{Formula, Participant, Phase, PhaseLabel};
use crate::quantity::FractionBasis;

use super::composition::{Context, Moisture, Share};
use super::given::Given;
use super::heating_values::HeatingValue;
use super::metering::Compression;
use super::model::DeclaredKind;

/// Reports what heating values cannot be worked for.
pub(super) fn check_fuel(reader: &Reader<'_>, fuel: &HeatingValue, context: &Context<'_>) -> bool {
    let parts = fuel.composition.parts.iter();
    let fits: Vec<bool> = parts
        .map(|part| check_substance(reader, &part.substance, fuel, context))
        .collect();
    fits.iter().all(|fits| *fits)
        && check_gases(reader, fuel, context)
        && check_stable(reader, fuel, context)
        && check_something_left(reader, fuel, context)
        && check_factors(reader, fuel)
}

fn check_substance(
    reader: &Reader<'_>,
    substance: &Located<Participant>,
    fuel: &HeatingValue,
    context: &Context<'_>,
) -> bool {
    let refuse = |found: &str, expected: &str, advice: &str| {
        let found = format!("`{}`, {found}", substance.value);
        value_fault(reader, &substance.span, found, expected, advice);
        false
    };
    let Some(made) = context.made(&substance.value) else {
        return refuse(
            "which is declared inert",
            "components with a formula",
            "give it a formula and a phase: without its molar mass no heat per mole follows",
        );
    };
    let label = made.phase.map(|phase| phase.label);
    if made.formula.charge() != 0 || matches!(label, Some(PhaseLabel::Aqueous) | None) {
        return refuse(
            "an ion or a solute",
            "gases, liquids and solids",
            "name the substances that the fuel consists of",
        );
    }
    if fuel.composition.moisture == Moisture::Dry && made.is_water() {
        return refuse(
            "water in a composition that is dry",
            "a dry composition without water, or moisture = \"wet\"",
            "write moisture = \"wet\", or give the water as moisture-content",
        );
    }
    true
}

/// A volume, as a fraction or as a result, is that of a gas.
fn check_gases(reader: &Reader<'_>, fuel: &HeatingValue, context: &Context<'_>) -> bool {
    let by_volume = fuel.composition.basis.value == FractionBasis::Volume;
    if !by_volume && fuel.metering.is_none() {
        return true;
    }
    let parts = fuel.composition.parts.iter();
    let mut names = parts.map(|part| &part.substance);
    let Some(other) = names.find(|name| !context.is_gas(&name.value)) else {
        return true;
    };
    let (expected, advice) = match by_volume {
        true => (
            "gases alone in a composition by volume",
            "give the composition by mass or by mole",
        ),
        false => (
            "gases alone where a heating value per volume is asked for",
            "leave `metering` out: a fuel that is not all gas has heating values per mole and mass",
        ),
    };
    let found = format!("`{}`, which is not a gas", other.value);
    value_fault(reader, &other.span, found, expected, advice);
    false
}

/// Whether a vapour condenses in a gas mixture depends on its partial pressure, which no range of
/// a table knows.
fn check_stable(reader: &Reader<'_>, fuel: &HeatingValue, context: &Context<'_>) -> bool {
    let names = || fuel.composition.parts.iter().map(|part| &part.substance);
    let stable = |name: &&Located<Participant>| {
        let phase = context.made(&name.value).and_then(|made| made.phase);
        phase.is_some_and(|phase| phase.label == PhaseLabel::Stable)
    };
    let gas = names().any(|name| context.is_gas(&name.value));
    let Some(found) = names().find(stable).filter(|_| gas) else {
        return true;
    };
    value_fault(
        reader,
        &found.span,
        format!("`{}` beside gases", found.value),
        "the phase of each component of a mixture with gases",
        "name it: (g), (l) or (cr); whether a vapour condenses depends on its partial pressure",
    );
    false
}

/// Without its water something of the fuel has to be left.
fn check_something_left(reader: &Reader<'_>, fuel: &HeatingValue, context: &Context<'_>) -> bool {
    let left = fuel.composition.parts.iter().any(|part| {
        let made = context.made(&part.substance.value);
        let some = match &part.share {
            Share::Balance => true,
            Share::Fraction(given) => given
                .quantity(context.inputs)
                .is_some_and(|quantity| quantity.value_in_si().is_positive()),
        };
        some && made.is_some_and(|made| !made.is_water())
    });
    if left || fuel.state == Moisture::Wet {
        return true;
    }
    value_fault(
        reader,
        &fuel.composition.span,
        "a composition of water alone in the dry state",
        "something that is left without the water",
        "write state = \"as received\", or check the composition",
    );
    false
}

/// Summation factors are those of the components, one for each.
fn check_factors(reader: &Reader<'_>, fuel: &HeatingValue) -> bool {
    let compression = fuel.metering.as_ref().and_then(|m| m.compression.as_ref());
    let Some(Compression::Summation(factors)) = compression else {
        return true;
    };
    let names: Vec<&Located<Participant>> = factors.iter().map(|(name, _)| name).collect();
    let parts = fuel.composition.parts.iter().map(|part| &part.substance);
    // The water that the moisture content adds has one as well.
    let added = fuel.moisture_content.as_ref().map(added_water);
    let parts: Vec<&Located<Participant>> = parts.chain(added.iter().flatten()).collect();
    let lacks = |all: &[&Located<Participant>], name: &Located<Participant>| {
        !all.iter().any(|other| other.value == name.value)
    };
    let missing = parts.iter().find(|name| lacks(&names, name));
    let foreign = names.iter().find(|name| lacks(&parts, name));
    if let Some(name) = missing {
        value_fault(
            reader,
            &name.span,
            format!("`{}` without a summation factor", name.value),
            "a summation factor for each component",
            "add it to summation-factors, at the temperature of metering",
        );
    }
    if let Some(name) = foreign {
        value_fault(
            reader,
            &name.span,
            format!("a summation factor of `{}`", name.value),
            "summation factors of the components alone",
            "remove it, or write it as in the composition",
        );
    }
    missing.is_none() && foreign.is_none()
}

/// Water vapour, at the place of the moisture content.
fn added_water(content: &Given) -> Option<Located<Participant>> {
    let water = Participant::parse("H2O(g)").ok()?;
    Some(Located::new(water, content.span().clone()))
}

/// What a participant is made of.
pub(super) struct Made<'a> {
    pub(super) formula: &'a Formula,
    pub(super) phase: Option<&'a Phase>,
}

impl Made<'_> {
    fn is_water(&self) -> bool {
        self.formula.charge() == 0 && self.formula.hill() == "H2O"
    }
}

impl Context<'_> {
    /// The formula and phase of a participant; none for what is inert.
    fn made<'p>(&'p self, participant: &'p Participant) -> Option<Made<'p>> {
        match participant {
            Participant::Species(species) => Some(Made {
                formula: &species.formula,
                phase: species.phase.as_ref(),
            }),
            Participant::Declared(id) => match &self.substances.get(id)?.kind {
                DeclaredKind::Compound { formula, phase } => Some(Made {
                    formula,
                    phase: Some(phase),
                }),
                DeclaredKind::Inert => None,
            },
        }
    }

    fn is_gas(&self, participant: &Participant) -> bool {
        let phase = self.made(participant).and_then(|made| made.phase);
        phase.is_some_and(|phase| phase.label == PhaseLabel::Gas)
    }
}
