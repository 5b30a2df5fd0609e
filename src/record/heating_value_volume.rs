//! The heating values per volume on the pages: molar volume, compression factor, quotients.

use crate::engine::{CompressionWorking, Outcome, SUMMATION_PRESSURE, VolumeWorking, Worked};
use crate::quantity::{Exact, exact_text};
use crate::source::{ProblemCompression, ProblemMetering};

use super::heat_working::shown;
use super::heating_value_symbols::{molar_volume, summation, virial};
use super::heating_value_working::{Page, conversion, heading, kelvin, plain};
use super::numerals::{minus, printed, unit};
use super::pages::Step;
use super::rich::{Rich, Run};
use super::working::displayed;

/// Nothing where no metering conditions are given; a finding says where they cannot be worked.
pub(super) fn volume_steps(page: &Page<'_>, volume: Option<&VolumeWorking>) -> Vec<Step> {
    let Some((metering, volume)) = page.fuel.metering.as_ref().zip(volume) else {
        return Vec::new();
    };
    let mut steps = vec![heading("Per volume"), displayed(molar_volume())];
    steps.push(Step::Text {
        text: ideal(page, metering, volume),
    });
    let per_volume = page.outcome("gross-per-volume");
    steps.extend(per_volume.and_then(|outcome| conversion(outcome, "m3")));
    let ideal = shown(&volume.ideal);
    for (quantity, molar) in [
        ("gross-per-volume", &page.mixture.gross),
        ("net-per-volume", &page.mixture.net),
    ] {
        steps.extend(quotient(page, quantity, molar, &format!("{ideal} m3/mol")));
    }
    let Some((data, worked)) = metering
        .compression
        .as_ref()
        .zip(volume.compression.as_ref())
    else {
        return steps;
    };
    steps.extend(compression(page, metering, data, worked));
    for (quantity, molar) in [
        ("gross-per-volume-real", &page.mixture.gross),
        ("net-per-volume-real", &page.mixture.net),
    ] {
        let under = format!("{} · {ideal} m3/mol", shown(&worked.factor));
        steps.extend(quotient(page, quantity, molar, &under));
    }
    steps
}

/// V = 8.314… · 288.15/101325 = 0.0236… m3/mol
fn ideal(page: &Page<'_>, metering: &ProblemMetering, volume: &VolumeWorking) -> Rich {
    let text = Rich::default().run(Run::Italic("V".to_string()));
    let text = text.and(" = R · ");
    let text = text.and(format!(
        "({} K)/({} Pa)",
        kelvin(&metering.kelvin),
        minus(&exact_text(&metering.pascal))
    ));
    let text = match page.fuel.gas_constant {
        Some(index) => {
            let value = &page.calculation.problem.values[index];
            text.and(format!(" with R = {} ", printed(&value.printed)))
                .run(Run::ValueUsed(index + 1))
        }
        None => text,
    };
    text.and(format!(
        ": {} m3/mol. The volume refers to these conditions, which are agreed and exact; the \
         combustion temperature above is another matter.",
        shown(&volume.ideal)
    ))
}

fn quotient(page: &Page<'_>, quantity: &str, molar: &Worked, under: &str) -> Vec<Step> {
    let Some(outcome) = page.outcome(quantity) else {
        return Vec::new();
    };
    let mut steps = vec![plain(format!(
        "({} {})/({under}) = {} {}",
        page.molar(molar),
        page.molar_unit(),
        in_full(outcome),
        unit(&outcome.unit)
    ))];
    steps.extend(page.result(quantity));
    steps
}

fn in_full(outcome: &Outcome) -> String {
    shown(&Worked {
        value: outcome.value.clone(),
        significance: outcome.significance,
        form: outcome.form.clone(),
    })
}

fn compression(
    page: &Page<'_>,
    metering: &ProblemMetering,
    data: &ProblemCompression,
    worked: &CompressionWorking,
) -> Vec<Step> {
    let values = &page.calculation.problem.values;
    let text = Rich::default().run(Run::Italic("Z".to_string()));
    let factor = shown(&worked.factor);
    match data {
        ProblemCompression::Factor(index) => vec![Step::Text {
            text: text
                .and(" as stated ")
                .run(Run::ValueUsed(index + 1))
                .and(format!(": {factor}")),
        }],
        ProblemCompression::SecondVirial(index) => vec![
            displayed(virial()),
            Step::Text {
                text: text
                    .and(format!(" = 1 + ({} ", printed(&values[*index].printed)))
                    .run(Run::ValueUsed(index + 1))
                    .and(format!(")/V = {factor}")),
            },
        ],
        ProblemCompression::Summation(factors) => {
            vec![
                displayed(summation()),
                Step::Text {
                    text: text.with(summation_text(page, metering, factors, worked)),
                },
            ]
        }
    }
}

fn summation_text(
    page: &Page<'_>,
    metering: &ProblemMetering,
    factors: &[usize],
    worked: &CompressionWorking,
) -> Rich {
    let values = &page.calculation.problem.values;
    let parts = page.mixture.components.iter().zip(factors).enumerate();
    let sum = parts.fold(Rich::plain(": Σ = "), |text, (i, (component, index))| {
        let plus = if i == 0 { "" } else { " + " };
        let (x, s) = (
            shown(&component.mole_fraction),
            printed(&values[*index].printed),
        );
        text.and(format!("{plus}{x} · {s} "))
            .run(Run::ValueUsed(index + 1))
    });
    let total = worked.sum.as_ref().map_or(String::new(), shown);
    let reference = Exact::from_integer(SUMMATION_PRESSURE.into());
    sum.and(format!(
        " = {total}; Z = 1 − ({}/{})·({total})² = {}",
        minus(&exact_text(&metering.pascal)),
        exact_text(&reference),
        shown(&worked.factor)
    ))
}
