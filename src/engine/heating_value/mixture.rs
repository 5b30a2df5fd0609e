//! The heating values of a mixture per mole and per mass.

use num_traits::{One, Zero};

use crate::case::{Constant, Moisture};
use crate::quantity::{Exact, FractionBasis, LinearForm, Significance, Unit};
use crate::source::{ComponentHeat, FuelComponent, FuelShare, Problem, ProblemHeatingValue};

use super::super::kirchhoff::{HeatAt, heat_at};
use super::super::worked::Worked;

/// A component as it was worked.
#[derive(Clone, Debug)]
pub struct ComponentWorking {
    /// The combustion as a sum of molar enthalpies, in J/mol, where it was worked as one.
    pub combustion: Option<HeatAt>,
    /// Heat given off by one mole with liquid water as product, J/mol.
    pub gross: Worked,
    /// kg/mol
    pub molar_mass: Worked,
    /// The fraction as stated, of the basis of the composition.
    pub fraction: Worked,
    /// Mole fraction in the fuel that the results are of, with its digits alone.
    pub mole_fraction: Worked,
}

/// A mixture as it was worked.
#[derive(Clone, Debug)]
pub struct Mixture {
    pub components: Vec<ComponentWorking>,
    /// Moles of each component in what the fractions are of.
    pub(super) amounts: Vec<Worked>,
    /// Their sum.
    pub(super) total: Worked,
    /// Heat of vaporisation of water at the combustion temperature, J/mol: at constant pressure
    /// the enthalpy, at constant volume the internal energy.
    pub latent: Option<Worked>,
    /// The enthalpies of gaseous and liquid water that it comes from, in J/mol.
    pub vaporisation: Option<HeatAt>,
    /// Moles of water formed or held by one mole of the mixture, with its digits alone.
    pub water: Worked,
    /// J/mol
    pub gross: Worked,
    /// J/mol
    pub net: Worked,
    /// kg/mol, with its digits alone.
    pub molar_mass: Worked,
    /// J/kg
    pub gross_per_mass: Worked,
    /// J/kg
    pub net_per_mass: Worked,
}

/// Works a fuel of which everything was found. None where nothing of it is left in the state
/// asked for, which the reading of the case refuses.
///
/// ISO 6976:2016, clauses 6 and 7 (from memory): the molar heating value of a mixture is the sum
/// over its components of mole fraction times molar heating value, gas and water formed being at
/// the combustion temperature; the net one is less by the heat of vaporisation L0 for half the
/// hydrogen atoms. Water vapour that the fuel holds counts L0 to the gross value, as in that
/// standard's table of components; liquid water counts nothing. Per mass the sum is divided by
/// that of the molar masses.
///
/// At constant volume the heat is that of the internal energy, -ΔU = -ΔH + Δn·R·T, with Δn the gas
/// formed less the gas consumed, gases being ideal and the volume of liquids and solids neglected
/// (IUPAC Green Book, 3rd ed. 2007, section 2.11, from memory).
///
/// Fractions that were measured one by one are made to add up to one: a larger share of one
/// component is a smaller one of all others. Each sensitivity is therefore to the fraction of the
/// whole; where one component is the balance, to what it is exchanged for.
///
/// Limits: complete combustion to CO2, H2O, N2 and SO2; ideal mixing; no water stays vapour in the
/// gross value, whatever its partial pressure.
pub(super) fn mixture(problem: &Problem, fuel: &ProblemHeatingValue) -> Option<Mixture> {
    let each = &fuel.components;
    let fractions = fractions(problem, fuel);
    let masses: Vec<Worked> = each.iter().map(|c| molar_mass(problem, c)).collect();
    let amounts = amounts(fuel, &fractions, &masses)?;
    let combustions: Vec<Option<HeatAt>> = each.iter().map(|c| combustion(problem, c)).collect();
    let gross = each.iter().zip(&combustions);
    let gross: Vec<Worked> = gross
        .map(|(component, heat)| component_gross(problem, fuel, component, heat.as_ref()))
        .collect::<Option<_>>()?;
    let total = whole(Worked::sum(&amounts));
    let mass = whole(pairs(&amounts, &masses));
    let heat = pairs(&amounts, &gross);
    let water = water(fuel, &amounts);
    let vaporisation = vaporisation(problem, fuel);
    let latent = match &vaporisation {
        Some(vaporisation) => Some(latent(problem, fuel, vaporisation)?),
        None => None,
    };
    let net_heat = net_heat(&heat, &water, latent.as_ref());
    let components = amounts.iter().zip(combustions).zip(gross).zip(masses);
    let components = components.zip(fractions).map(|(worked, fraction)| {
        let (((amount, combustion), gross), molar_mass) = worked;
        Some(ComponentWorking {
            combustion,
            gross,
            molar_mass,
            fraction,
            mole_fraction: bare(amount).over(&bare(&total))?,
        })
    });
    Some(Mixture {
        components: components.collect::<Option<_>>()?,
        latent,
        vaporisation,
        water: bare(&water).over(&bare(&total))?,
        gross: heat.over(&total)?,
        net: net_heat.over(&total)?,
        molar_mass: bare(&mass).over(&bare(&total))?,
        gross_per_mass: heat.over(&mass)?,
        net_per_mass: net_heat.over(&mass)?,
        amounts,
        total,
    })
}

/// Σ a_j·b_j
pub(super) fn pairs(a: &[Worked], b: &[Worked]) -> Worked {
    let products: Vec<Worked> = a.iter().zip(b).map(|(a, b)| a.times(b)).collect();
    Worked::sum(&products)
}

/// a − b
pub(super) fn minus(a: &Worked, b: &Worked) -> Worked {
    Worked::sum([a, &b.times_exact(&-Exact::one())])
}

/// The number with its digits, for the pages: sensitivities of what is no result are many, and
/// nobody looks at them.
fn bare(worked: &Worked) -> Worked {
    Worked {
        form: LinearForm::default(),
        ..worked.clone()
    }
}

pub(super) fn one() -> Worked {
    Worked::exact(Exact::one())
}

/// A sum that is one because its terms were made so has no last digit; its sensitivities stay.
fn whole(mut sum: Worked) -> Worked {
    if sum.value.exact().is_some_and(One::is_one) {
        sum.significance = Significance::Exact;
    }
    sum
}

/// A value used, in coherent SI units.
pub(super) fn value(problem: &Problem, index: usize) -> Worked {
    Worked::printed(problem, index, 1)
}

/// The fractions as stated, the balance among them; the moisture content last.
fn fractions(problem: &Problem, fuel: &ProblemHeatingValue) -> Vec<Worked> {
    let stated = |component: &FuelComponent| match component.share {
        FuelShare::Stated(index) | FuelShare::Moisture(index) => Some(value(problem, index)),
        FuelShare::Balance => None,
    };
    let all: Vec<Option<Worked>> = fuel.components.iter().map(stated).collect();
    let in_sum = fuel.components.iter().zip(&all);
    let sum = in_sum
        .filter(|(component, _)| !matches!(component.share, FuelShare::Moisture(_)))
        .filter_map(|(_, fraction)| fraction.as_ref());
    let balance = minus(&one(), &Worked::sum(sum));
    all.into_iter()
        .map(|fraction| fraction.unwrap_or_else(|| balance.clone()))
        .collect()
}

/// M = Σ n_i·A_r(i)·(1 g/mol), from standard atomic weights (IUPAC/CIAAW), in kg/mol.
fn molar_mass(problem: &Problem, component: &FuelComponent) -> Worked {
    let atoms = component.molar_mass.iter();
    let atoms: Vec<Worked> = atoms
        .map(|(index, count)| value(problem, *index).times_exact(count))
        .collect();
    Worked::sum(&atoms).times_exact(&Exact::new(1.into(), 1000.into()))
}

/// Moles of each component in what the fractions are of, in the state that the results are of.
/// None where that holds nothing.
fn amounts(
    fuel: &ProblemHeatingValue,
    fractions: &[Worked],
    masses: &[Worked],
) -> Option<Vec<Worked>> {
    let moisture = fuel.components.iter().zip(fractions);
    let moisture = moisture
        .filter(|(component, _)| matches!(component.share, FuelShare::Moisture(_)))
        .map(|(_, content)| content.clone())
        .next();
    let dry = moisture.map(|content| minus(&one(), &content));
    let leaves_out = (fuel.moisture, fuel.state) == (Moisture::Wet, Moisture::Dry);
    let each = fuel.components.iter().zip(fractions).zip(masses);
    let each = each.map(|((component, fraction), mass)| {
        if leaves_out && is_water(component) {
            return Some(Worked::exact(Exact::zero()));
        }
        let fraction = match (&dry, component.share) {
            (Some(dry), FuelShare::Stated(_) | FuelShare::Balance) => fraction.times(dry),
            _ => fraction.clone(),
        };
        match fuel.basis {
            FractionBasis::Mass => fraction.over(mass),
            // Ideal gases of equal volume hold equal amounts.
            FractionBasis::Amount | FractionBasis::Volume => Some(fraction),
        }
    });
    let amounts: Vec<Worked> = each.collect::<Option<_>>()?;
    let holds_something = amounts.iter().any(|amount| !amount.value.is_zero());
    holds_something.then_some(amounts)
}

pub(crate) fn is_water(component: &FuelComponent) -> bool {
    component.species.formula.hill() == "H2O"
}

/// The combustion of a component as a sum of molar enthalpies. None where it is none, or a path
/// is missing, as a `stop` says.
fn combustion(problem: &Problem, component: &FuelComponent) -> Option<HeatAt> {
    let ComponentHeat::Hess { terms } = &component.heat else {
        return None;
    };
    let terms = terms.iter().map(|term| Some((term.path?, term.nu.clone())));
    let unit = Unit::parse("J/mol").ok()?;
    Some(heat_at(problem, &terms.collect::<Option<Vec<_>>>()?, &unit))
}

/// The heat that one mole of a component gives off, liquid water being formed, J/mol.
fn component_gross(
    problem: &Problem,
    fuel: &ProblemHeatingValue,
    component: &FuelComponent,
    combustion: Option<&HeatAt>,
) -> Option<Worked> {
    let released = match &component.heat {
        ComponentHeat::Nothing => Worked::exact(Exact::zero()),
        ComponentHeat::Printed { value } => Worked::printed(problem, *value, -1),
        ComponentHeat::Hess { .. } => combustion?.sum.times_exact(&-Exact::one()),
    };
    if fuel.at == Constant::Pressure {
        return Some(released);
    }
    let change = component.combustion.gas_change();
    let expansion = thermal(problem, fuel)?.times_exact(&change);
    Some(Worked::sum([&released, &expansion]))
}

/// R·T at the combustion temperature, J/mol.
fn thermal(problem: &Problem, fuel: &ProblemHeatingValue) -> Option<Worked> {
    Some(value(problem, fuel.gas_constant?).times_exact(&fuel.kelvin))
}

/// The water formed or held, half the hydrogen atoms of all components.
fn water(fuel: &ProblemHeatingValue, amounts: &[Worked]) -> Worked {
    let half = Exact::new(1.into(), 2.into());
    let each = fuel.components.iter().zip(amounts);
    let each = each.map(|(component, amount)| {
        let molecules = &component.combustion.hydrogen * &half;
        amount.times_exact(&molecules)
    });
    Worked::sum(&each.collect::<Vec<_>>())
}

fn net_heat(gross: &Worked, water: &Worked, latent: Option<&Worked>) -> Worked {
    match latent {
        Some(latent) => minus(gross, &water.times(latent)),
        None => gross.clone(),
    }
}

/// H(H2O, g) − H(H2O, l)
fn vaporisation(problem: &Problem, fuel: &ProblemHeatingValue) -> Option<HeatAt> {
    let [liquid, gas] = fuel.water?;
    let unit = Unit::parse("J/mol").ok()?;
    let terms = [(gas, Exact::one()), (liquid, -Exact::one())];
    Some(heat_at(problem, &terms, &unit))
}

/// L0, at constant volume less R·T.
fn latent(problem: &Problem, fuel: &ProblemHeatingValue, enthalpy: &HeatAt) -> Option<Worked> {
    match fuel.at {
        Constant::Pressure => Some(enthalpy.sum.clone()),
        Constant::Volume => Some(minus(&enthalpy.sum, &thermal(problem, fuel)?)),
    }
}
