//! The case that `draft` writes: it computes as it stands and teaches the format.

use chrono::NaiveDate;

/// A new case for a record of this number and date.
pub fn draft_text(number: &str, date: NaiveDate) -> String {
    TEMPLATE
        .replace("{{number}}", number)
        .replace("{{date}}", &date.to_string())
}

const TEMPLATE: &str = include_str!("draft.toml");

#[cfg(test)]
mod tests {
    use super::*;
    use crate::calculation::Calculation;
    use crate::finding::{Fault, Text};
    use crate::source::SourceFiles;

    struct NoFiles;

    impl SourceFiles for NoFiles {
        fn text(&self, _name: &str) -> Option<Result<Text, Fault>> {
            None
        }
    }

    #[test]
    fn a_draft_computes_as_it_stands() {
        let date = NaiveDate::from_ymd_opt(2026, 2, 3).expect("a day of the calendar");
        let text = draft_text("C-0001", date);
        assert!(text.contains("date = 2026-02-03"));
        let calculation = Calculation::of(Text::new("case.toml", text), &NoFiles);
        let calculation = calculation.unwrap_or_else(|faults| panic!("{faults:#?}"));
        assert!(
            !calculation.is_stopped(),
            "{:#?}",
            calculation.working.findings
        );
    }
}
