//! The composition key: the elements of a record in Hill order, by which a formula finds it.

use super::columns::field;

/// Element fields in the second line of a record: five, of two letters and a number.
const FIELDS: usize = 5;
const FIRST_COLUMN: usize = 10;
const SYMBOL_WIDTH: usize = 2;
const FIELD_WIDTH: usize = 8;
/// The symbol under which a record counts electrons: one more is a charge of -1.
const ELECTRON: &str = "E";

/// An element field: the symbol in capitals, and its count as printed.
type Counted<'t> = (&'t str, &'t str);

/// The composition that the element fields of a record's second line state, in Hill order.
///
/// Carbon first and then hydrogen, without carbon everything by the alphabet; deuterium (`D`)
/// is an element of its own; the charge follows as `^+`, `^2-`; the electron is `e^-`. `None`
/// where a count cannot be read.
pub(super) fn composition(name: &str, second: &str) -> Option<String> {
    let mut elements = [("", ""); FIELDS];
    let mut used = 0;
    let mut charge = 0_i32;
    for (symbol, count) in fields(second) {
        if symbol == ELECTRON {
            charge = trimmed(count).parse::<i32>().ok()?.checked_neg()?;
        } else {
            *elements.get_mut(used)? = (symbol, count);
            used += 1;
        }
    }
    let elements = elements.get_mut(..used)?;
    let with_carbon = elements.iter().any(|(symbol, _)| *symbol == "C");
    elements.sort_unstable_by_key(|(symbol, _)| rank(symbol, with_carbon));
    let mut key = String::with_capacity(16);
    for (symbol, count) in elements.iter() {
        push_in_normal_case(&mut key, symbol);
        push_subscript(&mut key, name, symbol, count);
    }
    if used == 0 {
        key.push('e');
    }
    push_charge(&mut key, charge);
    Some(key)
}

/// The element fields that are in use.
fn fields(second: &str) -> impl Iterator<Item = Counted<'_>> {
    let columns = (0..FIELDS).map(|index| FIRST_COLUMN + index * FIELD_WIDTH);
    columns.filter_map(|at| {
        let symbol = field(second, at, at + SYMBOL_WIDTH);
        let count = field(second, at + SYMBOL_WIDTH, at + FIELD_WIDTH);
        (!symbol.is_empty() && trimmed(count) != "0").then_some((symbol, count))
    })
}

/// Hill order as a sort key.
fn rank(symbol: &str, with_carbon: bool) -> (u8, &str) {
    match (with_carbon, symbol) {
        (true, "C") => (0, symbol),
        (true, "H") => (1, symbol),
        _ => (2, symbol),
    }
}

/// `AL` as `Al`.
fn push_in_normal_case(key: &mut String, symbol: &str) {
    let mut letters = symbol.chars();
    key.extend(letters.next());
    key.extend(letters.map(|letter| letter.to_ascii_lowercase()));
}

/// A count as a subscript: without trailing zeros, and left out where it is 1.
///
/// The field has two decimals, so it prints 0.95 for wustite, whose name (and source, Pankratz
/// 1983) says 0.947. The name is followed there.
fn push_subscript(key: &mut String, name: &str, symbol: &str, count: &str) {
    if symbol == "FE" && name.starts_with("Fe.947O") {
        return key.push_str("0.947");
    }
    match trimmed(count) {
        "1" => {}
        bare => {
            if bare.starts_with('.') {
                key.push('0');
            }
            key.push_str(bare);
        }
    }
}

/// A printed number without the zeros that end its decimals.
fn trimmed(count: &str) -> &str {
    if !count.contains('.') {
        return count;
    }
    count.trim_end_matches('0').trim_end_matches('.')
}

/// The charge number as the key's ending.
fn push_charge(key: &mut String, number: i32) {
    if number == 0 {
        return;
    }
    key.push('^');
    if number.unsigned_abs() > 1 {
        key.push_str(&number.unsigned_abs().to_string());
    }
    key.push(if number < 0 { '-' } else { '+' });
}

#[cfg(test)]
mod tests {
    use super::*;

    /// A second line with these element fields.
    fn second(fields: &str) -> String {
        format!(" 1 tpis96 {fields:<40} 0")
    }

    #[test]
    fn orders_by_hill() {
        let key = |fields: &str| composition("x", &second(fields)).unwrap_or_default();
        assert_eq!(key("AL  1.00O   3.00H   3.00"), "AlH3O3");
        assert_eq!(key("C   2.00H   6.00O   1.00"), "C2H6O");
        assert_eq!(key("N   2.00H   4.00O   3.00"), "H4N2O3");
        assert_eq!(key("C   1.00BR  1.00CL  3.00"), "CBrCl3");
        assert_eq!(key("C   6.00D   6.00"), "C6D6");
        assert_eq!(key("H   1.00D   1.00O   1.00"), "DHO");
        assert_eq!(key("H  10.00    0.00    0.00"), "H10");
    }

    #[test]
    fn appends_the_charge() {
        let key = |fields: &str| composition("x", &second(fields)).unwrap_or_default();
        assert_eq!(key("AG  1.00E  -1.00"), "Ag^+");
        assert_eq!(key("O   2.00E   1.00"), "O2^-");
        assert_eq!(key("BE  1.00E  -2.00"), "Be^2+");
        assert_eq!(key("E   1.00"), "e^-");
    }

    #[test]
    fn follows_the_name_of_wustite() {
        let line = second("FE  0.95O   1.00");
        assert_eq!(
            composition("Fe.947O(cr)", &line).as_deref(),
            Some("Fe0.947O")
        );
        assert_eq!(composition("x", &line).as_deref(), Some("Fe0.95O"));
    }

    #[test]
    fn refuses_a_charge_that_is_no_integer() {
        assert_eq!(composition("x", &second("H   1.00E  -0.50")), None);
    }
}
