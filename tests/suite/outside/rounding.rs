//! Rounding and significant digits after ASTM E29, through the whole program.

use super::case::{Folder, one_reaction, source};

/// A sum of two invented values, stated to 0.1 kJ/mol.
fn stated_to_a_tenth(left: &str, right: &str) -> (String, String) {
    let folder = Folder::new();
    folder.write(
        "given.toml",
        &source("kJ/mol", &[("H2O(l)", left), ("H2O(g)", right)], ""),
    );
    let rounding = "[rounding]\n\"r.heat\" = \"0.1 kJ/mol\"";
    let case = one_reaction(&["given.toml"], "H2O(l) -> H2O(g)", rounding);
    let results = folder.results(&case).expect("a case that can be worked");
    let text = |key| results.text("r.heat", key).to_string();
    (text("exact"), text("stated"))
}

/// The examples that ASTM E29 gives for rounding to the nearest 0.1, as a field testing manual
/// quotes them (transcription; the standard was not seen). A tie goes to the even digit.
#[test]
fn ties_go_to_the_even_digit_and_nothing_else_does() {
    let examples = [
        ("-40.0000", "5.7500", "45.75", "45.8"),
        ("-40.0000", "5.4500", "45.45", "45.4"),
        ("-40.00000", "5.45001", "45.45001", "45.5"),
        ("-40.00", "5.74", "45.74", "45.7"),
    ];
    for (left, right, exact, stated) in examples {
        let expected = (exact.to_string(), stated.to_string());
        assert_eq!(stated_to_a_tenth(left, right), expected);
        // Turned round, the sum has the other sign and the same digits.
        let negative = |text: &str| format!("-{text}");
        let (left, right) = (left.trim_start_matches('-'), negative(right));
        let expected = (negative(exact), negative(stated));
        assert_eq!(stated_to_a_tenth(left, &right), expected);
    }
}

/// In one step 1.4501 is nearer to 1.5; by way of 1.45 it would become 1.4 (worked by hand).
#[test]
fn nothing_is_rounded_twice() {
    let expected = ("1.4501".to_string(), "1.5".to_string());
    assert_eq!(stated_to_a_tenth("-1.0000", "0.4501"), expected);
}

/// ASTM E29-02, 3.1 (an excerpt was seen): 1270. and 32.00 have four significant digits each, and
/// 1.40 × 10^5 is to the nearest 1000. The values are invented enthalpies in J/mol.
#[test]
fn printed_digits_are_counted_as_the_standard_counts_them() {
    let examples = [("1270.", "1.270"), ("32.00", "0.03200"), ("1.40e5", "140")];
    for (printed, stated) in examples {
        let folder = Folder::new();
        folder.write("given.toml", &source("J/mol", &[("H2O(g)", printed)], ""));
        let case = one_reaction(&["given.toml"], "H2(g) + 1/2 O2(g) -> H2O(g)", "");
        let results = folder.results(&case).expect("a case that can be worked");
        assert_eq!(results.text("r.heat", "stated"), stated, "{printed} J/mol");
    }
}
