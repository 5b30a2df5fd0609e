//! The working of each fuel: combustion of the components, mixture, net value, mass, volume.

use crate::calculation::Calculation;
use crate::case::{Constant, Moisture};
use crate::engine::{HeatingValueWorking, Mixture, Outcome, Worked};
use crate::quantity::{Exact, FractionBasis, Unit, exact_text};
use crate::source::ProblemHeatingValue;

use super::heat_working::shown;
use super::heating_value_components::{
    component_steps, composition_table, mass_steps, substitution,
};
use super::heating_value_symbols::{gross_sum, mole_fractions, net_difference};
use super::heating_value_volume::volume_steps;
use super::numerals::{minus, unit};
use super::pages::{Step, WorkingSection};
use super::result_rows::{in_words, what};
use super::rich::{Rich, Run};
use super::stating::stating;
use super::working::displayed;

pub(super) fn heating_value_sections(calculation: &Calculation) -> Vec<WorkingSection> {
    let worked = calculation.working.heating_values.iter();
    worked.map(|worked| section(calculation, worked)).collect()
}

fn section(calculation: &Calculation, worked: &HeatingValueWorking) -> WorkingSection {
    let fuel = &calculation.problem.heating_values[worked.heating_value];
    let mut steps = vec![plain(conditions(fuel))];
    match &worked.mixture {
        Some(mixture) => {
            let page = Page {
                calculation,
                fuel,
                mixture,
            };
            steps.extend(component_steps(&page));
            steps.extend(mixture_steps(&page));
            steps.extend(net_steps(&page));
            steps.extend(mass_steps(&page));
            steps.extend(volume_steps(&page, worked.volume.as_ref()));
        }
        None => steps.push(plain("Not worked: see the findings.".to_string())),
    }
    WorkingSection {
        id: fuel.id.clone(),
        heading: format!("Heating value {}", fuel.id),
        steps,
    }
}

/// What the parts of a working look at.
pub(super) struct Page<'a> {
    pub(super) calculation: &'a Calculation,
    pub(super) fuel: &'a ProblemHeatingValue,
    pub(super) mixture: &'a Mixture,
}

impl Page<'_> {
    pub(super) fn outcome(&self, quantity: &str) -> Option<&Outcome> {
        let id = format!("{}.{quantity}", self.fuel.id);
        self.calculation.working.outcome(&id)
    }

    /// A heat per mole in the unit of the results.
    pub(super) fn molar(&self, worked: &Worked) -> String {
        let factor = self.outcome("gross").map(|o| o.unit.factor().recip());
        shown(&worked.times_exact(&factor.unwrap_or_else(|| Exact::from_integer(1.into()))))
    }

    pub(super) fn molar_unit(&self) -> String {
        self.outcome("gross")
            .map_or(String::new(), |o| unit(&o.unit))
    }

    /// Digits and result of a quantity.
    pub(super) fn result(&self, quantity: &str) -> Vec<Step> {
        let Some(outcome) = self.outcome(quantity) else {
            return Vec::new();
        };
        let text = Rich::plain(format!("{}: ", what(self.calculation, outcome)))
            .run(Run::Strong(in_words(outcome)))
            .and(format!(", {}", outcome.direction().word()));
        vec![
            Step::Text {
                text: stating(outcome),
            },
            Step::Result { text },
        ]
    }
}

pub(super) fn plain(text: String) -> Step {
    Step::Text {
        text: Rich::plain(text),
    }
}

pub(super) fn heading(text: &str) -> Step {
    Step::Heading {
        text: text.to_string(),
    }
}

pub(super) fn kelvin(value: &Exact) -> String {
    minus(&exact_text(value))
}

/// What the results refer to, in words.
fn conditions(fuel: &ProblemHeatingValue) -> String {
    let at = match fuel.at {
        Constant::Pressure => "at constant pressure",
        Constant::Volume => "at constant volume",
    };
    let basis = match fuel.basis {
        FractionBasis::Amount => "mole",
        FractionBasis::Mass => "mass",
        FractionBasis::Volume => "volume",
    };
    let moisture = |moisture, wet: &'static str| match moisture {
        Moisture::Dry => "dry",
        Moisture::Wet => wet,
    };
    let source = fuel.source.as_deref().unwrap_or("not stated");
    format!(
        "Combustion {at}, all reactants and products at {} K. Composition by {basis}, {}; its \
         source: {source}. The results are per amount of the fuel {}. Heat given off is counted \
         positive here, as is usual for heating values.",
        kelvin(&fuel.kelvin),
        moisture(fuel.moisture, "with its water"),
        moisture(fuel.state, "as received"),
    )
}

fn mixture_steps(page: &Page<'_>) -> Vec<Step> {
    let mut steps = vec![heading("Gross heating value of the mixture")];
    if page.fuel.basis == FractionBasis::Mass {
        steps.push(displayed(mole_fractions()));
    }
    if page.fuel.basis == FractionBasis::Volume {
        steps.push(plain(
            "Volume fractions are taken as mole fractions: ideal gases of equal volume hold equal \
             amounts."
                .to_string(),
        ));
    }
    steps.extend(state(page.fuel).map(plain));
    steps.push(displayed(gross_sum()));
    steps.push(Step::Table(composition_table(page)));
    steps.push(plain(fractions_said(page.fuel).to_string()));
    steps.extend(page.result("gross"));
    steps
}

/// How the state of the results differs from that of the composition.
fn state(fuel: &ProblemHeatingValue) -> Option<String> {
    let text = match (fuel.moisture, fuel.state) {
        (Moisture::Wet, Moisture::Dry) => {
            "Dry: the fractions of water are left out, and the others divided by what they add up \
             to."
        }
        (Moisture::Dry, Moisture::Wet) => {
            "As received: the fractions of the dry composition are multiplied by 1 less the \
             moisture content, and the water is added."
        }
        _ => return None,
    };
    Some(text.to_string())
}

/// How the sensitivities to the fractions are to be read.
fn fractions_said(fuel: &ProblemHeatingValue) -> &'static str {
    let balance = |c: &crate::source::FuelComponent| c.share == crate::source::FuelShare::Balance;
    match fuel.components.iter().any(balance) {
        true => {
            "The balance is 1 less the other fractions: what one of these is more, the balance is \
             less, and the uncertainty follows from that."
        }
        false => {
            "The fractions add up to 1; for the uncertainty each is taken as its share of their \
             sum, so that an error of one is made up for by all others."
        }
    }
}

fn net_steps(page: &Page<'_>) -> Vec<Step> {
    let mut steps = vec![heading("Net heating value"), displayed(net_difference())];
    let (symbol, mixture) = (page.molar_unit(), page.mixture);
    steps.extend(latent(page));
    let latent = mixture
        .latent
        .as_ref()
        .map_or("0".to_string(), |l| page.molar(l));
    steps.push(Step::Text {
        text: Rich::plain(
            "b is the number of hydrogen atoms in a component; the sum is the water \
             that one mole of the fuel forms or holds, ",
        )
        .and(format!("{} mol. ", shown(&mixture.water)))
        .run(Run::Italic("H".to_string()))
        .run(Run::Sub("N".to_string()))
        .and(format!(
            " = {} − {latent} · {} = {} {symbol}",
            page.molar(&mixture.gross),
            shown(&mixture.water),
            page.molar(&mixture.net),
        )),
    });
    steps.extend(page.result("net"));
    steps
}

/// L = H(H2O, g) − H(H2O, l)
fn latent(page: &Page<'_>) -> Option<Step> {
    let latent = page.mixture.latent.as_ref()?;
    let enthalpy = page.mixture.vaporisation.as_ref()?;
    let text = Rich::default()
        .run(Run::Italic("L".to_string()))
        .and(format!(
            ", the heat of vaporisation of water at {} K, gas less liquid: ",
            kelvin(&page.fuel.kelvin)
        ))
        .with(substitution(page, enthalpy));
    let text = match page.fuel.at {
        Constant::Pressure => text,
        Constant::Volume => text.and(format!(
            "; less R·T for the gas at constant volume: {} {}",
            page.molar(latent),
            page.molar_unit()
        )),
    };
    Some(Step::Text { text })
}

/// The factor between the unit that a result is per and the one that the working is in.
pub(super) fn conversion(outcome: &Outcome, coherent: &str) -> Option<Step> {
    let (_, under) = outcome.unit.symbol().split_once('/')?;
    if under == coherent {
        return None;
    }
    let factor = Unit::parse(under).ok()?;
    let factor = exact_text(factor.factor());
    Some(plain(format!(
        "By definition, 1 {under} = {factor} {coherent}."
    )))
}
