//! CAS numbers, which check themselves.

use super::reader::Reader;
use super::words::value_fault;
use crate::finding::Located;

/// A CAS number. It has its own check digit: the digits before it, weighted 1, 2, 3 … from the
/// right, add up to it modulo 10 (CAS Registry, check digit verification).
pub fn cas_number(reader: &Reader<'_>, text: &Located<String>) -> Option<String> {
    if is_cas(&text.value) {
        return Some(text.value.clone());
    }
    value_fault(
        reader,
        &text.span,
        format!("\"{}\"", text.value),
        "a CAS number such as 7732-18-5, whose last digit checks the others",
        "compare it with the sheet that it comes from",
    );
    None
}

fn is_cas(text: &str) -> bool {
    let parts: Vec<&str> = text.split('-').collect();
    let [first, second, check] = parts[..] else {
        return false;
    };
    let all_digits = parts.iter().all(|p| p.bytes().all(|b| b.is_ascii_digit()));
    let lengths = (2..=7).contains(&first.len()) && second.len() == 2 && check.len() == 1;
    if !all_digits || !lengths {
        return false;
    }
    let digits = first
        .bytes()
        .chain(second.bytes())
        .map(|b| u32::from(b - b'0'));
    let digits: Vec<u32> = digits.collect();
    let weighted = digits
        .iter()
        .rev()
        .zip(1..)
        .map(|(digit, weight)| digit * weight);
    weighted.sum::<u32>() % 10 == u32::from(check.as_bytes()[0] - b'0')
}

#[cfg(test)]
mod tests {
    use super::is_cas;

    /// Water, aniline and nitrobenzene as their suppliers print them.
    #[test]
    fn the_check_digit_decides() {
        for good in ["7732-18-5", "62-53-3", "98-95-3"] {
            assert!(is_cas(good), "{good}");
        }
        for bad in ["7732-18-4", "62-53", "98-95-33", "a2-53-3", "", "--"] {
            assert!(!is_cas(bad), "{bad}");
        }
    }
}
