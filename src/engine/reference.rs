//! What it costs to mix sources of different reference temperature, pressure or reference state.

use std::collections::BTreeSet;

use num_traits::Zero;

use crate::finding::{Finding, FindingCode, Severity, Span, Text};
use crate::notation::{Element, PhaseLabel, Species};
use crate::quantity::{Exact, exact_text, to_f64, two_digits};
use crate::source::{ComponentHeat, Problem, ProblemTerm, ValueKind, ValueUsed};

use super::work::Working;

/// The temperature of the conventions, K.
fn conventional_temperature() -> Exact {
    Exact::new(29815.into(), 100.into())
}

/// All findings about mixed references, one for each reaction and kind.
pub(super) fn check(problem: &Problem, working: &Working, text: &Text) -> Vec<Finding> {
    let mut findings = pressure(problem, text);
    let mut said = BTreeSet::new();
    for reaction in &sums(problem, working) {
        let place = text.place(reaction.span.start);
        for (severity, code, message) in temperature(problem, reaction)
            .into_iter()
            .chain(charge_in_water(problem, reaction))
            .chain(free_electrons(problem, reaction))
            .chain(states(problem, reaction))
        {
            let finding = Finding {
                severity,
                code,
                message,
                at: place.clone(),
            };
            // Components of one fuel can have the same to say.
            if said.insert(finding.message.clone()) {
                findings.push(finding);
            }
        }
    }
    findings
}

/// A sum of formation enthalpies: a reaction, or the combustion of a component of a fuel.
struct Sum<'a> {
    id: &'a str,
    terms: &'a [ProblemTerm],
    span: &'a Span,
}

fn sums<'a>(problem: &'a Problem, working: &Working) -> Vec<Sum<'a>> {
    let worked = working.reactions.iter().filter(|r| r.is_worked());
    let reactions = worked.map(|reaction| {
        let reaction = &problem.reactions[reaction.reaction];
        Sum {
            id: &reaction.id,
            terms: &reaction.terms,
            span: &reaction.span,
        }
    });
    let fuels = working
        .heating_values
        .iter()
        .filter(|f| f.mixture.is_some());
    let fuels = fuels.map(|fuel| &problem.heating_values[fuel.heating_value]);
    let combustions = fuels.flat_map(|fuel| {
        let heats = fuel.components.iter().map(|component| &component.heat);
        heats.filter_map(|heat| match heat {
            ComponentHeat::Hess { terms } => Some(Sum {
                id: &fuel.id,
                terms,
                span: &fuel.span,
            }),
            ComponentHeat::Nothing | ComponentHeat::Printed { .. } => None,
        })
    });
    reactions.chain(combustions).collect()
}

type Said = (Severity, FindingCode, String);

/// Enthalpies of ideal gases do not depend on pressure; those of condensed substances by about
/// V·Δp (from (∂H/∂p)_T = V − T(∂V/∂T)_p). 100 cm³/mol stands for a large molar volume.
fn pressure(problem: &Problem, text: &Text) -> Vec<Finding> {
    let pressures = standard_pressures(problem);
    let by_pressure = |a: &&Standard<'_>, b: &&Standard<'_>| a.pressure.cmp(&b.pressure);
    let lowest = pressures.iter().min_by(by_pressure);
    let highest = pressures.iter().max_by(by_pressure);
    let (Some(lowest), Some(highest)) = (lowest, highest) else {
        return Vec::new();
    };
    let pascal = &highest.pressure - &lowest.pressure;
    if pascal.is_zero() {
        return Vec::new();
    }
    let (first, second) = match lowest.used_at <= highest.used_at {
        true => (lowest, highest),
        false => (highest, lowest),
    };
    let cost = to_f64(&pascal) * 1e-4 / 1000.0;
    vec![Finding {
        severity: Severity::Note,
        code: FindingCode::ReferencePressure,
        message: format!(
            "{} and {} have standard pressures {} Pa apart. That moves no enthalpy of an ideal \
             gas, and one of a condensed substance of 100 cm³/mol by about {} kJ/mol.",
            first.source,
            second.source,
            exact_text(&pascal),
            two_digits(cost),
        ),
        at: text.place(second.used_at),
    }]
}

/// A standard pressure in Pa, with the source that states it and the first use of a value of it.
struct Standard<'a> {
    pressure: Exact,
    source: &'a str,
    used_at: usize,
}

fn standard_pressures(problem: &Problem) -> Vec<Standard<'_>> {
    let enthalpies = problem
        .values
        .iter()
        .filter(|v| v.kind == ValueKind::FormationEnthalpy);
    let mut seen = BTreeSet::new();
    let of_source = |value: &ValueUsed| {
        let head = &problem.sources[value.source].head;
        let pressure = head.pressure.as_ref()?.value_in_si();
        seen.insert(value.source).then(|| Standard {
            pressure,
            source: problem.sources[value.source].id(),
            used_at: value.used_at.start,
        })
    };
    enthalpies
        .filter(|v| !v.printed.exact)
        .filter_map(of_source)
        .collect()
}

/// Enthalpies of ions in water rest on the convention that H+(aq) is zero, which cancels only
/// where the ions on the two sides carry the same charge (IUPAC Green Book, from memory).
fn charge_in_water(problem: &Problem, reaction: &Sum<'_>) -> Option<Said> {
    let charge: Exact = reaction
        .terms
        .iter()
        .map(|term| {
            let species = &problem.substances[term.substance].species;
            let phase = species.phase.as_ref();
            let in_water = phase.is_some_and(|phase| phase.label == PhaseLabel::Aqueous);
            let charge = if in_water {
                species.formula.charge()
            } else {
                0
            };
            &term.nu * Exact::from_integer(charge.into())
        })
        .sum();
    if charge.is_zero() {
        return None;
    }
    Some((
        Severity::Caution,
        FindingCode::ChargeInWater,
        format!(
            "{}: the charge of the ions in water is not the same on both sides (right less left: \
             {}). The heat then rests on the convention that H+(aq) is zero, and cannot be \
             measured as such.",
            reaction.id,
            exact_text(&charge)
        ),
    ))
}

/// Tables of gas ions differ in whether the electron is at rest or in thermal motion: 5/2·R·T, or
/// 6.197 kJ/mol at 298.15 K, for each electron (NASA/TP-2002-211556 prints 6197.428 J/mol).
fn free_electrons(problem: &Problem, reaction: &Sum<'_>) -> Option<Said> {
    let species = |term: &ProblemTerm| &problem.substances[term.substance].species;
    let electron = reaction
        .terms
        .iter()
        .any(|t| species(t).formula.is_electron());
    let gas_ion = reaction.terms.iter().any(|term| {
        let phase = species(term).phase.as_ref();
        let in_gas = phase.is_some_and(|phase| phase.label == PhaseLabel::Gas);
        in_gas && species(term).formula.charge() != 0
    });
    (electron && gas_ion).then(|| {
        (
            Severity::Caution,
            FindingCode::FreeElectron,
            format!(
                "{}: the electron is zero by the convention for ions in water, while tables of gas \
                 ions differ in how they count it, by 6.2 kJ/mol for each electron.",
                reaction.id
            ),
        )
    })
}

/// A formation enthalpy at another temperature is off by ΔCp of the formation reaction times the
/// difference (Kirchhoff); the heat capacities come from whatever source consulted has them.
fn temperature(problem: &Problem, reaction: &Sum<'_>) -> Option<Said> {
    let mut cost = 0.0;
    let mut names = Vec::new();
    let mut unknown = Vec::new();
    for term in reaction.terms {
        let Some(value) = problem.substances[term.substance].value else {
            continue;
        };
        let value = &problem.values[value];
        let head = &problem.sources[value.source].head;
        let Some(reference) = head.temperature.as_ref() else {
            continue;
        };
        let kelvin = conventional_temperature() - reference.value_in_si();
        if kelvin.is_zero() || value.printed.exact {
            continue;
        }
        if !names.contains(&format!("{} ({reference})", head.id)) {
            names.push(format!("{} ({reference})", head.id));
        }
        let species = &problem.substances[term.substance].species;
        match formation_heat_capacity(problem, species) {
            Some(cp) => cost += to_f64(&term.nu) * cp * to_f64(&kelvin),
            None => unknown.push(species.to_string()),
        }
    }
    if names.is_empty() {
        return None;
    }
    let size = match unknown.is_empty() {
        true => format!(
            "moves the heat by about {} kJ/mol",
            two_digits(cost / 1000.0)
        ),
        false => format!(
            "moves the heat by an amount not known here, because no consulted source gives the \
             heat capacities that the formation of {} needs (100 J/(mol K) would make {} kJ/mol \
             for each kelvin)",
            unknown.join(", "),
            two_digits(0.1)
        ),
    };
    // A heat that is off by an unknown amount does not hold.
    let severity = match unknown.is_empty() {
        true => Severity::Caution,
        false => Severity::Stop,
    };
    Some((
        severity,
        FindingCode::ReferenceTemperature,
        format!(
            "{}: {} gives values for another reference temperature than 298.15 K. They are used \
             as printed; referring them to 298.15 K {size}.",
            reaction.id,
            names.join(", ")
        ),
    ))
}

/// Cp of a species less that of its elements at 298.15 K, J/(mol K).
fn formation_heat_capacity(problem: &Problem, species: &Species) -> Option<f64> {
    let mut sum = heat_capacity(problem, species)?;
    for (element, count) in species.formula.counts() {
        let state = problem.reference_states.of_element(*element)?;
        let atoms = state.formula.counts().get(element)?;
        sum -= to_f64(&(count / atoms)) * heat_capacity(problem, state)?;
    }
    Some(sum)
}

fn heat_capacity(problem: &Problem, species: &Species) -> Option<f64> {
    let kelvin = conventional_temperature();
    for source in &problem.sources[..problem.consulted] {
        let r = source.head.gas_constant.as_ref();
        let r = r.map_or(8.314_462_618_153_24, |r| to_f64(&r.value()));
        for entry in source.of_composition(&species.formula.hill()) {
            let same = entry.notations().any(|other| other == species);
            let function = entry.heat_capacity.iter().find(|f| f.serves(&kelvin));
            if let (true, Some(function)) = (same, function) {
                return function.at(to_f64(&kelvin), r);
            }
        }
    }
    None
}

/// Sources that count an element from another form do not add up with the others unless the
/// atoms of that element cancel within them.
fn states(problem: &Problem, reaction: &Sum<'_>) -> Vec<Said> {
    let mut said = Vec::new();
    for (index, source) in problem.sources.iter().enumerate() {
        for (element, state) in &source.head.reference_states {
            let Some(usual) = problem.reference_states.of_element(*element) else {
                continue;
            };
            let atoms = net_atoms(problem, reaction, index, *element);
            if usual != state && !atoms.is_zero() {
                said.push(mixed_state(
                    problem, reaction, index, *element, state, &atoms,
                ));
            }
        }
    }
    said
}

/// Σ ν·n of an element over the terms whose value comes from one source.
fn net_atoms(problem: &Problem, reaction: &Sum<'_>, source: usize, element: Element) -> Exact {
    let atoms = reaction.terms.iter().map(|term| {
        let substance = &problem.substances[term.substance];
        let count = substance.species.formula.counts().get(&element);
        match (substance.source == source, count) {
            (true, Some(count)) => &term.nu * count,
            _ => Exact::zero(),
        }
    });
    atoms.sum()
}

fn mixed_state(
    problem: &Problem,
    reaction: &Sum<'_>,
    source: usize,
    element: Element,
    state: &Species,
    atoms: &Exact,
) -> Said {
    let id = problem.sources[source].id();
    let symbol = element.symbol();
    let cost = match state_enthalpy(problem, state) {
        Some(kilojoule) => {
            let per_atom = state.formula.counts().get(&element).cloned();
            let total =
                kilojoule * atoms / per_atom.unwrap_or_else(|| Exact::from_integer(1.into()));
            format!("moves the heat by {} kJ/mol", two_digits(to_f64(&total)))
        }
        None => format!(
            "moves the heat by {} times the enthalpy of {state}, which no consulted \
                         source gives",
            exact_text(atoms)
        ),
    };
    (
        Severity::Stop,
        FindingCode::ReferenceState,
        format!(
            "{}: {id} counts {symbol} from {state}, the others from its usual reference state. \
             {} mol of {symbol} does not cancel within {id}: that {cost}. Take all substances with \
             {symbol} from one source.",
            reaction.id,
            exact_text(atoms)
        ),
    )
}

/// The formation enthalpy of an unusual reference state on the conventional scale, kJ/mol.
fn state_enthalpy(problem: &Problem, state: &Species) -> Option<Exact> {
    let kilo = Exact::from_integer(1000.into());
    problem.sources[..problem.consulted]
        .iter()
        .find_map(|source| {
            let counted_from_it = source.head.reference_states.iter().any(|(_, s)| s == state);
            let entries = source.of_composition(&state.formula.hill());
            let entry = entries.iter().find(|e| e.notations().any(|s| s == state))?;
            let value = entry.formation_enthalpy.as_ref()?;
            (!counted_from_it).then(|| value.value_in_si() / &kilo)
        })
}
