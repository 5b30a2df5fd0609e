//! From a world to a document to a PDF, under both standards.

use typst::diag::SourceResult;
use typst::foundations::{Datetime, Smart};
use typst_layout::PagedDocument;
use typst_pdf::{PdfOptions, PdfStandard, PdfStandards, Timestamp};

use super::error::{Refusal, TypesetError};
use super::world::RecordWorld;
use super::{Pages, TYPESETTER};

/// Lays the pages out.
pub(super) fn compile(world: &RecordWorld) -> Result<PagedDocument, TypesetError> {
    translated(world, typst::compile::<PagedDocument>(world).output)
}

/// Writes the laid-out pages as a PDF.
pub(super) fn pdf(
    world: &RecordWorld,
    document: &PagedDocument,
    options: &PdfOptions,
) -> Result<Vec<u8>, TypesetError> {
    translated(world, typst_pdf::pdf(document, options))
}

fn translated<T>(world: &RecordWorld, result: SourceResult<T>) -> Result<T, TypesetError> {
    result.map_err(|diagnostics| {
        TypesetError::Refused(
            diagnostics
                .iter()
                .map(|diagnostic| Refusal::new(world, diagnostic))
                .collect(),
        )
    })
}

/// Everything about the file that the pages do not show. The date is given here and left out of
/// the template, because only a timestamp carries a time zone.
pub(super) fn options(pages: &Pages) -> Result<PdfOptions, TypesetError> {
    let about = &pages.title_block;
    let program = &pages.program;
    Ok(PdfOptions {
        ident: Smart::Custom(format!(
            "{} {} {}",
            about.number, about.revision, pages.stamp.full
        )),
        creator: Smart::Custom(Some(format!("{} {}", program.name, program.version))),
        timestamp: Some(Timestamp::new_utc(midnight(&about.date)?)),
        page_ranges: None,
        standards: standards()?,
        tagged: true,
        pretty: false,
    })
}

fn standards() -> Result<PdfStandards, TypesetError> {
    PdfStandards::new(&[PdfStandard::A_3a, PdfStandard::Ua_1]).map_err(|error| {
        TypesetError::Refused(vec![Refusal {
            message: error.message().to_string(),
            hints: error.hints().iter().map(ToString::to_string).collect(),
            place: Some(TYPESETTER.to_owned()),
        }])
    })
}

/// `2026-03-05` as midnight in UTC.
fn midnight(date: &str) -> Result<Datetime, TypesetError> {
    parts(date)
        .and_then(|(year, month, day)| Datetime::from_ymd_hms(year, month, day, 0, 0, 0))
        .ok_or_else(|| TypesetError::Date(date.to_owned()))
}

fn parts(date: &str) -> Option<(i32, u8, u8)> {
    let mut numbers = date.split('-');
    let mut next = |length: usize| {
        numbers
            .next()
            .filter(|part| part.len() == length && part.bytes().all(|byte| byte.is_ascii_digit()))
    };
    let date = (
        next(4)?.parse().ok()?,
        next(2)?.parse().ok()?,
        next(2)?.parse().ok()?,
    );
    numbers.next().is_none().then_some(date)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn only_calendar_dates_are_dates() {
        assert!(midnight("2024-02-29").is_ok());
        for date in [
            "2023-02-29",
            "2024-2-9",
            "2024-02-29T00:00",
            "+024-02-02",
            "2024-13-01",
            "",
        ] {
            assert_eq!(midnight(date), Err(TypesetError::Date(date.to_owned())));
        }
    }
}
