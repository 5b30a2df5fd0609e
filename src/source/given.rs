//! Heat capacities that the case gives: taken before those of the sources.
//!
//! A constant one is integrated along the way from 298.15 K. What the case gives per mass, in
//! another unit or by an input becomes a molar function made of other values used. Leaves to
//! others: which of two bounds is adverse (the engine).

use crate::case::{CaseHeatCapacity, Given, HeatCapacityStatement};
use crate::finding::Span;
use crate::quantity::{
    Decimal, Dimension, Exact, InputUncertainty, Quantity, Significance, StatedUncertainty,
    order_of_magnitude, round_to_place, terminating_decimal,
};

use super::case_values::{CaseValue, NO_SOURCE};
use super::heat_capacity::{Form, HeatCapacity};
use super::path::reference_kelvin;
use super::path_values::zero_error;
use super::problem::{BoundedPath, EnthalpyPath, Leg, Start, ValueKind, ValueUsed};
use super::resolve::Resolver;

/// Digits that a converted heat capacity is given where its decimal does not end.
const DIGITS: i64 = 25;

impl Resolver<'_> {
    /// Whether the case gives a heat capacity per mass, which needs atomic weights.
    pub(super) fn gives_specific_heat_capacity(&self) -> bool {
        let specific = |value: &Given| {
            let quantity = value.quantity(&self.case.inputs);
            quantity.is_some_and(|q| q.unit.dimension() != molar_heat_capacity())
        };
        self.statements().any(|statement| match statement {
            HeatCapacityStatement::Value { value, .. } => specific(value),
            HeatCapacityStatement::Bounds { low, high, .. } => specific(low) || specific(high),
            HeatCapacityStatement::Kopp => false,
        })
    }

    /// Whether the case estimates a heat capacity by Kopp's rule.
    pub(super) fn estimates_heat_capacity(&self) -> bool {
        let kopp =
            |statement: &HeatCapacityStatement| matches!(statement, HeatCapacityStatement::Kopp);
        self.statements().any(kopp)
    }

    fn statements(&self) -> impl Iterator<Item = &HeatCapacityStatement> {
        let declared = self.case.substances.values();
        let given = declared.filter_map(|declared| declared.heat_capacity.as_ref());
        given.map(|given| &given.statement)
    }

    /// The path along the heat capacity that the case gives. None where it gives none; none inside
    /// where it does not reach, as a `stop` then says. Of two bounds the path of the low one.
    pub(super) fn given_path(
        &mut self,
        substance: usize,
        kelvin: &Exact,
        span: &Span,
    ) -> Option<Option<usize>> {
        let label = &self.substances[substance].label;
        let given = self.case.substances.get(label)?.heat_capacity.clone()?;
        let start = self.substances[substance].value?;
        if *kelvin == reference_kelvin() {
            return None;
        }
        if !self.given_reaches(substance, &given, kelvin, span) {
            return Some(None);
        }
        let functions = self.given_functions(substance, &given)?;
        let low = self.along_given(substance, start, functions[0], kelvin);
        if let Some(function) = functions.get(1) {
            let high = self.along_given(substance, start, *function, kelvin);
            self.bounded.push(BoundedPath { low, high });
        }
        self.check_given(substance, functions[0], kelvin, span);
        Some(Some(low))
    }

    /// A path where no choice between two bounds can be made: there is a `stop` where it would be
    /// needed.
    pub(super) fn one_path(
        &mut self,
        substance: usize,
        kelvin: &Exact,
        span: &Span,
    ) -> Option<usize> {
        let path = self.path(substance, kelvin, span)?;
        if self.bounded.binary_search_by_key(&path, |b| b.low).is_ok() {
            self.say_bounds_refused(substance, span);
        }
        Some(path)
    }

    fn along_given(
        &mut self,
        substance: usize,
        start: usize,
        function: usize,
        kelvin: &Exact,
    ) -> usize {
        self.paths.push(EnthalpyPath {
            substance,
            kelvin: kelvin.clone(),
            start: Start::Printed { value: start },
            legs: vec![Leg::Heating {
                value: function,
                from: reference_kelvin(),
                to: kelvin.clone(),
            }],
            end: Some(function),
        });
        self.paths.len() - 1
    }

    /// One function, or those of the low and the high bound; indices of values used.
    fn given_functions(
        &mut self,
        substance: usize,
        given: &CaseHeatCapacity,
    ) -> Option<Vec<usize>> {
        let mut stated = |value: &Given, range: &[Quantity; 2], which| {
            let stated = Stated {
                substance,
                given,
                range,
                which,
            };
            self.stated_function(value, &stated)
        };
        match &given.statement {
            HeatCapacityStatement::Value { value, range } => Some(vec![stated(value, range, "")?]),
            HeatCapacityStatement::Bounds { low, high, range } => Some(vec![
                stated(low, range, "low bound")?,
                stated(high, range, "high bound")?,
            ]),
            HeatCapacityStatement::Kopp => Some(vec![self.kopp_function(substance, given)?]),
        }
    }

    fn stated_function(&mut self, value: &Given, stated: &Stated<'_>) -> Option<usize> {
        let quantity = value.quantity(&self.case.inputs)?.clone();
        let printed = self.printed_value(value, &quantity, stated)?;
        if !stated.which.is_empty() && self.values[printed].uncertainty == NOT_STATED {
            // The result is worked with the adverse bound, which is none of a spread.
            self.values[printed].uncertainty = InputUncertainty::Exact;
        }
        let one = Exact::from_integer(1.into());
        let molar = quantity.unit.dimension() == molar_heat_capacity();
        if molar && *quantity.unit.factor() == one && matches!(value, Given::Stated(_)) {
            let mut function = constant(quantity.decimal, Some(stated.range.clone()));
            function.uncertainty = quantity.uncertainty.as_ref().and_then(half_width);
            self.values[printed].function = Some(function);
            return Some(printed);
        }
        self.converted_function(printed, &quantity, molar, stated)
    }

    /// The row of the number as the case prints it.
    fn printed_value(
        &mut self,
        value: &Given,
        quantity: &Quantity,
        stated: &Stated<'_>,
    ) -> Option<usize> {
        if let Given::Input(id) = value {
            return self.input_value(&id.value);
        }
        let named = &self.substances[stated.substance];
        let (label, species) = (named.label.clone(), named.species.clone());
        let which = stated.suffix();
        let source = stated.given.source.as_deref().unwrap_or(NO_SOURCE);
        let index = self.case_value(CaseValue {
            kind: ValueKind::HeatCapacity,
            locator: format!("substances.{label}, heat-capacity{which}; {source}"),
            label: format!("{label}{which}"),
            species: Some(species),
            quantity: quantity.clone(),
            note: None,
            span: &stated.given.span,
        });
        if !stated.which.is_empty() {
            self.values[index].name = Some(stated.which.to_string());
        }
        Some(index)
    }

    /// Cp in J/(mol K) made of the printed number, and of the molar mass where it is per mass.
    fn converted_function(
        &mut self,
        printed: usize,
        quantity: &Quantity,
        molar: bool,
        stated: &Stated<'_>,
    ) -> Option<usize> {
        let si = quantity.value_in_si();
        let factor = quantity.unit.factor().clone();
        let mut made_of = vec![(printed, factor.clone())];
        let mut sum = si.clone();
        if !molar {
            let species = self.substances[stated.substance].species.clone();
            let weights = self.weights(&species, &stated.given.span);
            let thousand = Exact::from_integer(1000.into());
            let weight = |index: &usize| self.values[*index].printed.decimal.value();
            // kg/mol
            let mass: Exact = weights.iter().map(|(w, n)| weight(w) * n).sum::<Exact>() / &thousand;
            sum = &si * &mass;
            made_of[0].1 = &factor * &mass;
            let parts = weights.into_iter().map(|(w, n)| (w, &si * n / &thousand));
            made_of.extend(parts);
        }
        // A bound is where the working is put on purpose: it limits no digits.
        let significance = match stated.which {
            "" => quantity
                .significance_in_si()
                .times_exact(&si, &(&sum / &si)),
            _ => Significance::Unlimited,
        };
        let function = constant(decimal(&sum)?, Some(stated.range.clone()));
        let row = &self.values[printed];
        let of = &self.substances[stated.substance];
        let value = ValueUsed {
            kind: ValueKind::HeatCapacity,
            source: self.case_source,
            substance: format!("{}{}", of.label, stated.suffix()),
            species: Some(of.species.clone()),
            printed: zero_error(),
            significance,
            uncertainty: InputUncertainty::Exact,
            function: Some(function),
            made_of,
            note: Some(format!("worked from row {}", printed + 1)),
            ..row.clone()
        };
        Some(self.enter_value(value, "converted"))
    }
}

const NOT_STATED: InputUncertainty = InputUncertainty::NotStated;

/// What is stated, and of what.
struct Stated<'a> {
    substance: usize,
    given: &'a CaseHeatCapacity,
    range: &'a [Quantity; 2],
    /// Which bound; empty for a value.
    which: &'static str,
}

impl Stated<'_> {
    /// What follows the name of the substance.
    fn suffix(&self) -> String {
        match self.which {
            "" => String::new(),
            which => format!(", {which}"),
        }
    }
}

/// The half-width at k = 2, the coverage of a case, for which `±` stands in its values.
fn half_width(uncertainty: &StatedUncertainty) -> Option<Decimal> {
    match uncertainty {
        StatedUncertainty::Expanded { half_width, .. } => decimal(half_width),
        StatedUncertainty::StandardLastDigits { standard, .. } => {
            decimal(&(standard * Exact::from_integer(2.into())))
        }
        StatedUncertainty::Tolerance { .. } => None,
    }
}

fn molar_heat_capacity() -> Dimension {
    Dimension::ENERGY
        .over(Dimension::AMOUNT)
        .over(Dimension::TEMPERATURE)
}

pub(super) fn constant(value: Decimal, range: Option<[Quantity; 2]>) -> HeatCapacity {
    HeatCapacity {
        form: Form::Constant,
        range,
        coefficients: vec![value],
        points: Vec::new(),
        uncertainty: None,
    }
}

/// A number as a decimal; one that does not end is cut far behind all that is known.
pub(super) fn decimal(value: &Exact) -> Option<Decimal> {
    let text = terminating_decimal(value).or_else(|| {
        let place = order_of_magnitude(value)? - DIGITS;
        Some(round_to_place(value, place).text)
    })?;
    Decimal::parse(&text).ok()
}
