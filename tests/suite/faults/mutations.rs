//! Damaged copies of the shipped cases: whatever stands in a file, the library answers with a
//! calculation or with faults, and never ends otherwise.

use std::panic::{AssertUnwindSafe, catch_unwind};

use hesswright::calculation::Calculation;
use hesswright::finding::{Fault, Text};
use hesswright::source::SourceFiles;

const CASES: [&str; 3] = [
    include_str!("../../../cases/formation-from-combustion.toml"),
    include_str!("../../../cases/nitrobenzene-hydrogenation.toml"),
    include_str!("../../../cases/acid-neutralisation.toml"),
];
const SOURCES: [(&str, &str); 2] = [
    (
        "sources/organic-liquids.toml",
        include_str!("../../../cases/sources/organic-liquids.toml"),
    ),
    (
        "sources/organic-liquids-crc.toml",
        include_str!("../../../cases/sources/organic-liquids-crc.toml"),
    ),
];

/// What people, editors and transfers put where it does not belong.
const PIECES: [&str; 40] = [
    "\"",
    "'",
    "\"\"\"",
    "'''",
    "[",
    "]",
    "{",
    "}",
    "=",
    ".",
    ",",
    "#",
    "\n",
    "\r",
    "\t",
    "\0",
    "\\",
    "\\u0000",
    "\u{202e}",
    "é",
    "e\u{301}",
    "🙂",
    "漢",
    "-",
    "+",
    "->",
    "=",
    "(g)",
    "(",
    ")",
    "^",
    "·",
    "0",
    "9999999999999999999999",
    "1e400",
    "1/0",
    "±",
    "exact ",
    "[[entry]]\n",
    "H2O(l)",
];

/// Sources, one of them damaged.
struct Files {
    damaged: Option<(usize, String)>,
}

impl SourceFiles for Files {
    fn text(&self, name: &str) -> Option<Result<Text, Fault>> {
        let index = SOURCES.iter().position(|(known, _)| *known == name)?;
        let text = match &self.damaged {
            Some((which, text)) if *which == index => text.clone(),
            _ => SOURCES[index].1.to_string(),
        };
        Some(Ok(Text::new(name, text)))
    }
}

/// A sequence that is the same everywhere (Knuth's 64-bit linear congruential generator, MMIX).
struct Dice(u64);

impl Dice {
    fn below(&mut self, limit: usize) -> usize {
        self.0 = self
            .0
            .wrapping_mul(6_364_136_223_846_793_005)
            .wrapping_add(1_442_695_040_888_963_407);
        ((self.0 >> 33) as usize) % limit.max(1)
    }
}

/// One to four changes: a piece put in, taken out, put elsewhere, or written over.
fn damaged(text: &str, dice: &mut Dice) -> String {
    let mut characters: Vec<char> = text.chars().collect();
    for _ in 0..=dice.below(4) {
        let at = dice.below(characters.len());
        let end = (at + dice.below(12)).min(characters.len());
        let piece: Vec<char> = match dice.below(4) {
            0 => Vec::new(),
            1 => {
                let from = dice.below(characters.len());
                let to = (from + dice.below(60)).min(characters.len());
                characters[from..to].to_vec()
            }
            _ => PIECES[dice.below(PIECES.len())].chars().collect(),
        };
        characters.splice(at..end, piece);
    }
    characters.into_iter().collect()
}

#[test]
fn two_thousand_damaged_cases_are_worked_or_refused() {
    let mut dice = Dice(1789);
    let mut refused = 0;
    for round in 0..2_000 {
        let mut case = CASES[round % CASES.len()].to_string();
        let mut files = Files { damaged: None };
        match dice.below(4) {
            0 => {
                let which = dice.below(SOURCES.len());
                files.damaged = Some((which, damaged(SOURCES[which].1, &mut dice)));
            }
            _ => case = damaged(&case, &mut dice),
        }
        let worked = catch_unwind(AssertUnwindSafe(|| {
            Calculation::of(Text::new("case.toml", case.clone()), &files).map(drop)
        }));
        match worked {
            Ok(Ok(())) => {}
            Ok(Err(faults)) => {
                refused += 1;
                check(&faults, &case);
            }
            Err(_) => panic!("round {round}: a panic on\n{case}\n{:?}", files.damaged),
        }
    }
    assert!((500..2_000).contains(&refused), "{refused} of 2000 refused");
}

/// Faults are there, in order, complete, and mark what is shown.
fn check(faults: &[Fault], case: &str) {
    assert!(!faults.is_empty(), "no fault and no calculation:\n{case}");
    let sorted = faults.windows(2).all(|pair| pair[0].place <= pair[1].place);
    assert!(sorted, "not in the order of places:\n{case}");
    for fault in faults {
        let complete = [&fault.found, &fault.expected, &fault.advice]
            .iter()
            .all(|text| !text.is_empty());
        assert!(complete, "{fault:?}");
        let (start, length) = fault.mark;
        let shown = fault.line.chars().count();
        assert!(
            fault.line.is_empty() || start + length <= shown + 1,
            "{fault:?}"
        );
    }
}
