//! Reading the correlations that a source file states.

use std::collections::BTreeSet;

use crate::document::{Table, species, value_fault};
use crate::quantity::Exact;

use super::model::StatedCorrelation;
use super::read_quantity::read_decimal;

/// Each pair once, and of two different values.
pub(super) fn read_correlations(root: &Table<'_, '_>) -> Vec<StatedCorrelation> {
    let mut seen = BTreeSet::new();
    let mut read = Vec::new();
    for table in root.tables("correlation") {
        let Some(stated) = read_correlation(&table) else {
            continue;
        };
        let mut pair = stated.between.each_ref().map(|species| species.to_string());
        pair.sort();
        if pair[0] == pair[1] || !seen.insert(pair) {
            value_fault(
                root.reader(),
                &table.span,
                "a correlation of a value with itself, or a second one for the same pair",
                "one coefficient for each pair of values",
                "remove one of the two, or mend its `between`",
            );
        }
        read.push(stated);
    }
    read
}

fn read_correlation(table: &Table<'_, '_>) -> Option<StatedCorrelation> {
    table.only(&["between", "coefficient", "locator", "note"]);
    let reader = table.reader();
    let between: Vec<_> = table
        .strings("between")
        .iter()
        .filter_map(|s| species(reader, s))
        .collect();
    let coefficient = table.required_string("coefficient", "state r, between -1 and 1")?;
    let decimal = read_decimal(reader, &coefficient)?;
    let one = Exact::from_integer(1.into());
    if decimal.value() > one || decimal.value() < -one {
        value_fault(
            reader,
            &coefficient.span,
            format!("\"{}\"", coefficient.value),
            "a correlation coefficient from -1 to 1",
            "check the number in the source",
        );
        return None;
    }
    let Ok(between) = <[_; 2]>::try_from(between) else {
        table.missing(
            "between",
            "name the two substances: between = [\"H2O(l)\", \"H2O(g)\"]",
        );
        return None;
    };
    Some(StatedCorrelation {
        between,
        coefficient: decimal,
    })
}
