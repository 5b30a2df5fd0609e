//! What a calculation record has to say, looked for in the text of its pages (R1, R4, R6, R9 to
//! R12 of the ledger as far as they concern pages).

use std::path::Path;

use hesswright::finding::Text;
use hesswright::folder::CaseFolder;
use hesswright::record::minus;

use super::issued::{Issued, shipped};
use super::words::{PageText, body, pages, plain};

fn sheets(record: &Issued) -> Vec<PageText> {
    pages(&record.pdf())
}

/// Asserts that the body says each of these, in words of any setting.
fn says(body: &str, texts: impl IntoIterator<Item = String>) {
    for text in texts {
        assert!(body.contains(&plain(&text)), "{text:?} is not on the pages");
    }
}

fn with_minus(text: &str) -> String {
    text.replace('-', "−")
}

#[test]
fn every_sheet_says_what_it_belongs_to() {
    for record in shipped() {
        let head = &record.calculation.case.record;
        let sheets = sheets(record);
        let count = sheets.len();
        for (index, sheet) in sheets.iter().enumerate() {
            let said = [
                format!("{} · Revision {}", head.number.value, head.revision.value),
                "FOR CHECK".to_string(),
                head.title.clone(),
                format!("Sheet {} of {count}", index + 1),
                format!("Prepared: {}, {}", head.preparer, head.date),
                "Checked:".to_string(),
                format!("Stamp {}", &record.issue.record.stamp()[..16]),
                format!("hesswright {}", env!("CARGO_PKG_VERSION")),
            ];
            says(&sheet.sheet, said);
        }
    }
}

#[test]
fn every_value_used_is_there_as_printed_with_its_origin() {
    for record in shipped() {
        let body = body(&record.pdf());
        let problem = &record.calculation.problem;
        for value in &problem.values {
            let head = &problem.sources[value.source].head;
            let numbers: Vec<String> = match &value.function {
                Some(function) => function
                    .coefficients
                    .iter()
                    .map(|c| minus(c.printed()))
                    .collect(),
                None => vec![with_minus(value.printed.printed_number())],
            };
            says(&body, numbers.into_iter().map(|n| n.replace("exact ", "")));
            says(
                &body,
                [
                    match value.species {
                        Some(_) => with_minus(&value.substance.replace('^', "")),
                        None => value.substance.clone(),
                    },
                    value.locator.clone(),
                    value.standing.word().to_string(),
                    head.sha256[..16].to_string(),
                    head.sha256.clone(),
                    head.id.clone(),
                    head.title.clone(),
                ]
                .map(|text| text.replace("exact ", "")),
            );
        }
    }
}

#[test]
fn results_are_there_as_stated() {
    for record in shipped() {
        let body = body(&record.pdf());
        for outcome in &record.calculation.working.outcomes {
            let value = with_minus(&outcome.stated.value_text);
            says(
                &body,
                [
                    outcome.id.clone(),
                    value,
                    outcome.direction().word().to_string(),
                ],
            );
        }
    }
}

#[test]
fn findings_inputs_assumptions_and_holds_are_there() {
    for record in shipped() {
        let body = body(&record.pdf());
        let case = &record.calculation.case;
        for finding in &record.calculation.working.findings {
            let at = format!("case.toml, line {}", finding.at.line);
            says(&body, [finding.code.word().to_string(), at]);
            // A minus is set as one, so the message is compared without hyphens and minus signs.
            let bare = |text: &str| plain(text).replace(['-', '−'], "");
            assert!(
                bare(&body).contains(&bare(&finding.message)),
                "{}",
                finding.message
            );
        }
        for input in case.inputs.values() {
            let value = input.value.value.printed_number().replace("exact ", "");
            // 1.200e3 is set as 1.200·10³.
            let value = value.split('e').next().unwrap_or_default().to_string();
            says(&body, [input.id.value.clone(), value]);
            says(&body, input.source.clone());
        }
        for assumption in &case.assumptions {
            says(&body, [assumption.text.value.clone()]);
            says(&body, assumption.basis.clone());
            if let Some(hold) = &assumption.hold {
                says(&body, [hold.owner.clone(), hold.closed_by.clone()]);
            }
        }
    }
}

#[test]
fn cautions_references_program_and_attachments_are_there() {
    for record in shipped() {
        let body = body(&record.pdf());
        let head = &record.calculation.case.record;
        let pages = &record.issue.record.pages;
        assert!(pages.cautions.len() >= 7 && pages.attachments.len() >= 5);
        says(&body, pages.cautions.clone());
        says(
            &body,
            pages
                .references
                .iter()
                .map(|reference| reference.text.clone()),
        );
        for file in &record.issue.record.attachments {
            says(
                &body,
                [
                    file.name.clone(),
                    file.description.clone(),
                    file.media_type.to_string(),
                ],
            );
        }
        says(
            &body,
            [
                format!(
                    "hesswright {}; pages set by typst",
                    env!("CARGO_PKG_VERSION")
                ),
                record.issue.record.stamp().to_string(),
                head.facility.clone().unwrap_or_default(),
                "It is not in force.".to_string(),
            ],
        );
        says(
            &body,
            head.history.iter().map(|revision| revision.change.clone()),
        );
        says(&body, head.equipment.iter().chain(&head.related).cloned());
    }
}

#[test]
fn a_part_without_rows_keeps_its_heading() {
    let text = Text::new(
        "case.toml",
        "[record]\nnumber = \"T-2\"\nrevision = \"A\"\ntitle = \"Nothing but a reaction\"\n\
         date = 2026-01-02\npreparer = \"N. N.\"\nstatus = \"for-check\"\n\
         [sources]\nconsult = [\"codata-1989\"]\n\
         [reactions.water]\nequation = \"2 H2(g) + O2(g) -> 2 H2O(l)\"\n",
    );
    let folder = CaseFolder::of(Path::new("case.toml"), &text);
    let body = body(&Issued::of(text, &folder).pdf());
    let headings = [
        "Inputs",
        "Assumptions",
        "Holds",
        "Comparison with other sources",
    ];
    says(&body, headings.map(str::to_string));
}
