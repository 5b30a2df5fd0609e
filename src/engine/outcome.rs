//! A result: its value, what is known of it, and how it is stated.

use num_traits::Signed;

use crate::quantity::{
    Combined, Dimension, Exact, LinearForm, Real, Significance, Stated, Unit, combine, exact_text,
    order_of_magnitude, power_of_ten, to_f64,
};
use crate::source::Problem;

use super::bounds::AdverseBound;
use super::work::WorkOptions;
use super::worked::Worked;

/// The coverage factor of expanded uncertainties (about 95 % where the distribution is about
/// normal; JCGM 100:2008, 6.2.2 and 6.3.3).
pub const COVERAGE: u32 = 2;

/// Whether heat is given off or taken up.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Direction {
    Released,
    Absorbed,
    Neither,
    /// Counted positive, as heating values are.
    GivenOff,
}

impl Direction {
    pub fn word(self) -> &'static str {
        match self {
            Direction::Released => "released",
            Direction::Absorbed => "absorbed",
            Direction::GivenOff => "given off",
            Direction::Neither => "neither released nor absorbed",
        }
    }
}

/// Which rule decided the stated digits.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum StatedBy {
    /// The expanded uncertainty, which covers every value used (JCGM 100 7.2.6).
    Uncertainty,
    /// The significant digits of the values used (ASTM E29).
    Significance,
    /// The house place for tables with a fixed number of decimals.
    FixedDecimals,
    /// `[rounding]` of the case.
    Rounding,
}

/// A result of the working.
#[derive(Clone, Debug)]
pub struct Outcome {
    /// `hydrogenation.heat`
    pub id: String,
    pub value: Real,
    pub unit: Unit,
    pub significance: Significance,
    pub form: LinearForm,
    pub combined: Combined,
    /// Half-width at k = 2, in `unit`; none where no value used states an uncertainty.
    pub expanded: Option<f64>,
    pub stated: Stated,
    pub stated_by: StatedBy,
    /// The value as the other rule would state it.
    pub remark: Option<Stated>,
    /// What `combined` was multiplied by beyond the uncertainties stated; one where nothing was.
    pub inflation: f64,
    /// Whether heat given off counts positive, as for heating values (ISO 6976).
    pub given_off_is_positive: bool,
    /// The bounds of heat capacities that it was worked with.
    pub adverse: Vec<AdverseBound>,
    /// What its uncertainty does not cover although it covers all values used.
    pub not_covered: Vec<String>,
}

impl Outcome {
    /// Combines the uncertainty and decides the stated digits.
    pub fn new(
        problem: &Problem,
        options: &WorkOptions,
        id: String,
        worked: Worked,
        unit: Unit,
    ) -> Outcome {
        Outcome::inflated(problem, options, id, worked, unit, 1.0)
    }

    /// The same with the combined uncertainty multiplied by a factor, where the case asks for it.
    pub fn inflated(
        problem: &Problem,
        options: &WorkOptions,
        id: String,
        worked: Worked,
        unit: Unit,
        inflation: f64,
    ) -> Outcome {
        let Worked {
            value,
            significance,
            form,
        } = worked;
        let uncertainty = |index: usize| problem.values[index].uncertainty;
        let mut combined = combine(&form, &uncertainty, &problem.correlations);
        combined.standard = combined.standard.map(|u| u * inflation);
        let expanded = combined.standard.map(|u| u * f64::from(COVERAGE));
        let rules = Rules {
            value: &value,
            significance: limited(significance, &unit, &form, problem),
            fixed: rests_on_fixed_decimals(&form, problem),
            expanded,
            complete: combined.stated == combined.of && combined.of > 0,
        };
        let (stated, stated_by, remark) = rules.decide(options.place_for(&id, &unit));
        Outcome {
            id,
            unit,
            significance,
            form,
            combined,
            expanded,
            stated,
            stated_by,
            remark,
            inflation,
            given_off_is_positive: false,
            value,
            adverse: Vec::new(),
            not_covered: Vec::new(),
        }
    }

    /// The same value with heat given off counted positive.
    #[must_use]
    pub(super) fn given_off(mut self) -> Outcome {
        self.given_off_is_positive = true;
        self
    }

    pub fn direction(&self) -> Direction {
        let Some(value) = self.value.to_exact() else {
            return Direction::Neither;
        };
        match (
            value.is_positive(),
            value.is_negative(),
            self.given_off_is_positive,
        ) {
            (true, _, true) => Direction::GivenOff,
            (true, _, false) | (_, true, true) => Direction::Absorbed,
            (_, true, false) => Direction::Released,
            _ => Direction::Neither,
        }
    }

    /// Whether every value used that is not exact states an uncertainty.
    pub fn is_complete(&self) -> bool {
        self.combined.stated == self.combined.of
    }
}

/// What decides the stated digits.
struct Rules<'a> {
    value: &'a Real,
    significance: Significance,
    fixed: bool,
    expanded: Option<f64>,
    complete: bool,
}

impl Rules<'_> {
    /// The expanded uncertainty where it is complete, otherwise ASTM E29; a place that the case
    /// names goes before both. The rule that did not decide is the remark.
    fn decide(&self, place: Option<i64>) -> (Stated, StatedBy, Option<Stated>) {
        let by_digits = Stated::by_significance(self.value, self.significance);
        let by_digits = by_digits.unwrap_or_else(|| unrounded(self.value));
        let by_uncertainty = self
            .expanded
            .and_then(|u| Stated::by_uncertainty(self.value, u));
        if let Some(stated) = place.and_then(|place| self.at_place(place, by_uncertainty.as_ref()))
        {
            return (
                stated,
                StatedBy::Rounding,
                by_uncertainty.or(Some(by_digits)),
            );
        }
        match by_uncertainty {
            Some(stated) if self.complete => (stated, StatedBy::Uncertainty, Some(by_digits)),
            _ if self.fixed => (by_digits, StatedBy::FixedDecimals, by_uncertainty),
            _ => (by_digits, StatedBy::Significance, by_uncertainty),
        }
    }
}

impl Rules<'_> {
    /// At a place that the case names; the uncertainty keeps at most two digits there too
    /// (JCGM 100:2008, 7.2.6).
    fn at_place(&self, place: i64, by_uncertainty: Option<&Stated>) -> Option<Stated> {
        let mut stated = Stated::at_place(self.value, place, self.expanded)?;
        let half_place = power_of_ten(place) / Exact::from_integer(2.into());
        if self
            .expanded
            .is_some_and(|expanded| to_f64(&half_place) > expanded)
        {
            // The rounding then hides more than the uncertainty says.
            stated.uncertainty_text = None;
        }
        if let Some(other) = by_uncertainty
            && other.place > Some(place)
        {
            stated.uncertainty_text = other.uncertainty_text.clone();
        }
        Some(stated)
    }
}

/// A value that no rule limits, in full.
fn unrounded(value: &Real) -> Stated {
    let text = value
        .to_exact()
        .map_or_else(|| value.to_f64().to_string(), |v| exact_text(&v));
    Stated {
        value_text: text,
        uncertainty_text: None,
        place: None,
    }
}

fn rests_on_fixed_decimals(form: &LinearForm, problem: &Problem) -> bool {
    form.iter()
        .any(|(index, _)| problem.values[index].significance == Significance::Unlimited)
}

/// Where a table with a fixed number of decimals is among the values, its printed zeros claim
/// nothing: the result is stated to 0.1 kJ/mol (or the same in its own unit) at the finest.
fn limited(
    significance: Significance,
    unit: &Unit,
    form: &LinearForm,
    problem: &Problem,
) -> Significance {
    if !rests_on_fixed_decimals(form, problem) {
        return significance;
    }
    let house = Significance::Place(house_place(unit));
    Significance::sum([significance, house])
}

/// The place of 0.1 kJ/mol (0.1 kJ per 0.018 kg would be no rule: per mass it is 1 kJ/kg).
fn house_place(unit: &Unit) -> i64 {
    let per_mole = Dimension::ENERGY.over(Dimension::AMOUNT) == unit.dimension();
    let coherent = Exact::from_integer(if per_mole { 100 } else { 1000 }.into());
    place_of(&(coherent / unit.factor())).unwrap_or(0)
}

/// A place in the unit of a result, given in another unit of the same kind; never a finer one.
pub fn place_in(place: i64, from: &Unit, to: &Unit) -> Option<i64> {
    place_of(&(power_of_ten(place) * from.factor() / to.factor()))
}

/// The finest place that is not finer than a size.
fn place_of(size: &Exact) -> Option<i64> {
    let order = order_of_magnitude(size)?;
    Some(if *size > power_of_ten(order) {
        order + 1
    } else {
        order
    })
}
