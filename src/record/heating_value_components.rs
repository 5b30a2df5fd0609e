//! The components of a fuel on the pages: their combustion, their heats, their masses.

use num_traits::Signed;

use crate::case::Constant;
use crate::engine::{ComponentWorking, HeatAt, Worked};
use crate::quantity::Exact;
use crate::source::{ComponentHeat, FuelComponent, FuelShare};

use super::heat_working::shown;
use super::heating_value_symbols::per_mass;
use super::heating_value_working::{Page, conversion, heading, kelvin, plain};
use super::numerals::{coefficient, exact_fraction, printed, signed, unit};
use super::pages::{Step, Table};
use super::path_working::path_steps;
use super::rich::{Rich, Run};
use super::tables::{mark, number, text};
use super::working::displayed;

/// Each component's combustion with its molar gross heating value.
pub(super) fn component_steps(page: &Page<'_>) -> Vec<Step> {
    let mut steps = vec![heading("Combustion of the components")];
    let said = "Products: CO2(g), H2O(l), N2(g) and SO2(g), in their standard states. Water vapour \
         that the fuel brings condenses too, and gives off its heat of vaporisation; noble gases \
         and what is burnt already give off nothing.";
    steps.push(plain(said.to_string()));
    steps.extend(enthalpies(page));
    steps.extend(thermal(page));
    for (component, worked) in pairs(page) {
        steps.extend(combustion_steps(page, component, worked));
    }
    steps
}

fn pairs<'a>(
    page: &'a Page<'_>,
) -> impl Iterator<Item = (&'a FuelComponent, &'a ComponentWorking)> {
    page.fuel.components.iter().zip(&page.mixture.components)
}

/// R·T, which each mole of gas counts at constant volume.
fn thermal(page: &Page<'_>) -> Option<Step> {
    let index = page.fuel.gas_constant?;
    if page.fuel.at == Constant::Pressure {
        return None;
    }
    let constant = Worked::printed(&page.calculation.problem, index, 1);
    let value = &page.calculation.problem.values[index];
    Some(Step::Text {
        text: Rich::plain(format!("R·T = {} ", printed(&value.printed)))
            .run(Run::ValueUsed(index + 1))
            .and(format!(
                " · {} K = {} {}",
                kelvin(&page.fuel.kelvin),
                page.molar(&constant.times_exact(&page.fuel.kelvin)),
                page.molar_unit()
            )),
    })
}

/// The way of each substance from 298.15 K to the combustion temperature, once.
fn enthalpies(page: &Page<'_>) -> Vec<Step> {
    let problem = &page.calculation.problem;
    let mut shown_paths = Vec::new();
    let mut steps = Vec::new();
    let combustions = page.mixture.components.iter();
    let combustions = combustions.filter_map(|c| c.combustion.as_ref());
    let heats = combustions.chain(&page.mixture.vaporisation);
    for term in heats.flat_map(|heat| &heat.terms) {
        if !shown_paths.contains(&term.path) {
            shown_paths.push(term.path);
            steps.extend(path_steps(problem, term));
        }
    }
    steps
}

fn combustion_steps(
    page: &Page<'_>,
    component: &FuelComponent,
    worked: &ComponentWorking,
) -> Vec<Step> {
    if component.combustion.is_nothing() {
        return Vec::new();
    }
    let mut steps = vec![Step::Reaction {
        text: equation(component),
    }];
    let name = Rich::from(component.species.pieces());
    let constant_volume = page.fuel.at == Constant::Volume;
    let value = match &component.heat {
        ComponentHeat::Printed { value } => name
            .and(": the source prints the combustion enthalpy ")
            .run(Run::ValueUsed(value + 1)),
        _ => name.and(": ").with(
            worked
                .combustion
                .as_ref()
                .map_or_else(Rich::default, |heat| substitution(page, heat)),
        ),
    };
    let gas = match constant_volume {
        true => format!(
            "; at constant volume with ({}) mol of gas formed, R·T each",
            signed(&component.combustion.gas_change())
        ),
        false => String::new(),
    };
    steps.push(Step::Text {
        text: value.and(format!(
            "{gas}. Given off: {} {}",
            page.molar(&worked.gross),
            page.molar_unit()
        )),
    });
    steps
}

/// CH4(g) + 2 O2(g) → CO2(g) + 2 H2O(l)
fn equation(component: &FuelComponent) -> Rich {
    let side = |negative: bool| {
        let terms = component.combustion.terms.iter();
        let terms = terms.filter(|(number, _)| number.is_negative() == negative);
        terms
            .enumerate()
            .fold(Rich::default(), |text, (i, (number, species))| {
                let plus = if i == 0 { "" } else { " + " };
                text.and(format!("{plus}{}", coefficient(&number.abs())))
                    .with(Rich::from(species.pieces()))
            })
    };
    side(true).and(" → ").with(side(false))
}

/// (−1)·(−74.6) + (−2)·(0) + (+1)·(−393.51) + (+2)·(−285.83) = −890.57
pub(super) fn substitution(page: &Page<'_>, combustion: &HeatAt) -> Rich {
    let problem = &page.calculation.problem;
    let terms = combustion.terms.iter().enumerate();
    let terms = terms.fold(Rich::default(), |text, (i, term)| {
        let plus = if i == 0 { "" } else { " + " };
        let number = format!(
            "{plus}({})·({}) ",
            signed(&term.nu),
            page.molar(&term.molar)
        );
        let values = problem.paths[term.path].values();
        let marks = values.into_iter().map(|value| Run::ValueUsed(value + 1));
        marks.fold(text.and(number), Rich::run)
    });
    terms.and(format!(
        " = {} {}",
        page.molar(&combustion.sum),
        page.molar_unit()
    ))
}

/// Component, row, fraction, mole fraction, molar heat, product.
pub(super) fn composition_table(page: &Page<'_>) -> Table {
    let blank = Rich::default;
    let symbol = |text: &str, sub: &str| {
        Rich::default()
            .run(Run::Italic(text.to_string()))
            .run(Run::Sub(sub.to_string()))
    };
    Table {
        caption: format!("The mixture, heats in {}", page.molar_unit()),
        columns: vec![
            text("Component"),
            mark("Row"),
            number(Rich::plain("As stated")),
            number(symbol("x", "j")),
            number(symbol("b", "j")),
            number(symbol("H", "j")),
            number(symbol("x", "j").with(symbol("H", "j"))),
        ],
        rows: pairs(page)
            .map(|(component, worked)| row(page, component, worked))
            .collect(),
        total: Some(vec![
            Rich::plain("Sum"),
            blank(),
            blank(),
            blank(),
            blank(),
            blank(),
            Rich::plain(page.molar(&page.mixture.gross)),
        ]),
    }
}

fn row(page: &Page<'_>, component: &FuelComponent, worked: &ComponentWorking) -> Vec<Rich> {
    let share = match component.share {
        FuelShare::Stated(value) | FuelShare::Moisture(value) => {
            Rich::default().run(Run::ValueUsed(value + 1))
        }
        FuelShare::Balance => Rich::plain("balance"),
    };
    vec![
        Rich::from(component.species.pieces()),
        share,
        Rich::plain(shown(&worked.fraction)),
        Rich::plain(shown(&worked.mole_fraction)),
        Rich::plain(exact_fraction(&component.combustion.hydrogen)),
        Rich::plain(page.molar(&worked.gross)),
        Rich::plain(page.molar(&worked.mole_fraction.times(&worked.gross))),
    ]
}

/// Molar masses and the heating values per mass.
pub(super) fn mass_steps(page: &Page<'_>) -> Vec<Step> {
    let mut steps = vec![heading("Per mass")];
    for (component, worked) in pairs(page).filter(|(_, w)| !w.mole_fraction.value.is_zero()) {
        steps.push(Step::Text {
            text: molar_mass(page, component, worked),
        });
    }
    steps.push(displayed(per_mass()));
    let gram = |worked: &Worked| shown(&worked.times_exact(&thousand()));
    let mixture = page.mixture;
    steps.push(Step::Text {
        text: Rich::default()
            .run(Run::Italic("M".to_string()))
            .and(format!(
                " = {} g/mol; each heat per mole divided by it:",
                gram(&mixture.molar_mass)
            )),
    });
    let per_mass = page.outcome("gross-per-mass");
    steps.extend(per_mass.and_then(|outcome| conversion(outcome, "kg")));
    for (quantity, molar) in [
        ("gross-per-mass", &mixture.gross),
        ("net-per-mass", &mixture.net),
    ] {
        let Some(outcome) = page.outcome(quantity) else {
            continue;
        };
        let worked = Worked {
            value: outcome.value.clone(),
            significance: outcome.significance,
            form: outcome.form.clone(),
        };
        steps.push(plain(format!(
            "({} {})/({} g/mol) = {} {}",
            page.molar(molar),
            page.molar_unit(),
            gram(&mixture.molar_mass),
            shown(&worked),
            unit(&outcome.unit)
        )));
        steps.extend(page.result(quantity));
    }
    steps
}

fn thousand() -> Exact {
    Exact::from_integer(1000.into())
}

/// M(CH4) = 1 · 12.011 + 4 · 1.008 = 16.043 g/mol
fn molar_mass(page: &Page<'_>, component: &FuelComponent, worked: &ComponentWorking) -> Rich {
    let values = &page.calculation.problem.values;
    let parts = component.molar_mass.iter().enumerate();
    let name = Rich::default()
        .run(Run::Italic("M".to_string()))
        .and("(")
        .with(Rich::from(component.species.formula.pieces()))
        .and(") = ");
    let sum = parts.fold(name, |text, (i, (index, count))| {
        let plus = if i == 0 { "" } else { " + " };
        let weight = values[*index].printed.decimal.printed();
        text.and(format!("{plus}{} · {weight} ", exact_fraction(count)))
            .run(Run::ValueUsed(index + 1))
    });
    sum.and(format!(
        " = {} g/mol",
        shown(&worked.molar_mass.times_exact(&thousand()))
    ))
}
