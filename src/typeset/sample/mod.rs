//! An invented record that uses every field and variant of the contract. Its numbers are made up
//! for layout and stand for nothing.

use crate::record::*;
use crate::record::{Rich, Run};

mod working;

pub(super) const STAMP: &str = "0123456789abcdef00112233445566778899aabbccddeeff0f1e2d3c4b5a6978";

fn s(text: &str) -> String {
    text.to_owned()
}

fn rich(runs: &[Run]) -> Rich {
    Rich(runs.to_vec())
}

fn water() -> Rich {
    rich(&[Run::Plain(s("H")), Run::Sub(s("2")), Run::Plain(s("O(l)"))])
}

fn sulfate() -> Rich {
    rich(&[
        Run::Plain(s("SO")),
        Run::Sub(s("4")),
        Run::Sup(s("2−")),
        Run::Plain(s("(aq)")),
    ])
}

/// The sample in full.
pub(super) fn pages() -> Pages {
    Pages {
        contract: CONTRACT,
        title_block: title_block(),
        stamp: Stamp {
            full: s(STAMP),
            short: s(&STAMP[..16]),
        },
        history: vec![
            revision("A", "2026-02-11", "First issue for comment."),
            revision(
                "B",
                "2026-03-05",
                "Charge confirmed; second source compared.",
            ),
        ],
        opening: opening(),
        closing: closing(),
        results: results(),
        basis: basis(),
        values_used: values_used(),
        functions: functions(),
        comparisons: comparisons(),
        working: working::sections(),
        budgets: budgets(),
        findings: findings(),
        cautions: vec![
            s(
                "Phase and solution effects beyond those entered are not in the result; local codes and licensed practice govern.",
            ),
            s("Secondary decomposition is not seen by a sum of formation enthalpies."),
        ],
        references: references(),
        attachments: attachment_rows(),
        program: program(),
    }
}

fn revision(revision: &str, date: &str, change: &str) -> Revision {
    Revision {
        revision: s(revision),
        date: s(date),
        change: s(change),
    }
}

fn title_block() -> TitleBlock {
    let place = |role: &str, name: Option<&str>| SignaturePlace {
        role: s(role),
        name: name.map(s),
    };
    TitleBlock {
        number: s("INV-0042"),
        revision: s("B"),
        title: s("Heat of an invented hydrogenation and duty of its reactor"),
        facility: Some(s("Invented works, unit 3")),
        equipment: vec![s("R-301 reactor"), s("E-302 cooler")],
        related: vec![s("INV-0017 (relief sizing)")],
        date: s("2026-03-05"),
        preparer: s("A. Preparer"),
        status: s("for-check"),
        status_sentence: s(
            "For check: the figures are complete; the record is in force only when it carries the three signatures below.",
        ),
        signatures: vec![
            place("preparer", Some("A. Preparer")),
            place("checker", None),
            place("approver", None),
        ],
    }
}

fn opening() -> Vec<ProseSection> {
    let paragraph = |text: &str| Block::Paragraph {
        text: Rich::plain(text),
    };
    vec![
        ProseSection {
            heading: s("Purpose"),
            blocks: vec![
                paragraph(
                    "The record states the heat that an invented hydrogenation releases at 25 °C and 1 bar, so that the duty of the cooler can be checked against it.",
                ),
                Block::Heading {
                    level: 3,
                    text: Rich::plain("A heading that skips levels"),
                },
                Block::Paragraph {
                    text: rich(&[
                        Run::Plain(s("Runs: ")),
                        Run::Strong(s("strong")),
                        Run::Plain(s(", ")),
                        Run::Emphasis(s("emphasis")),
                        Run::Plain(s(", ")),
                        Run::Italic(s("T")),
                        Run::Plain(s(", ")),
                        Run::Code(s("hydrogenation.heat")),
                        Run::Plain(s(", water H")),
                        Run::Sub(s("2")),
                        Run::Plain(s("O")),
                        Run::ValueUsed(2),
                        Run::Plain(s(".")),
                    ]),
                },
            ],
        },
        ProseSection {
            heading: s("Method"),
            blocks: vec![
                Block::List {
                    ordered: true,
                    start: 3,
                    items: vec![
                        vec![paragraph("Sum the formation enthalpies.")],
                        vec![
                            paragraph("Carry the uncertainty:"),
                            Block::List {
                                ordered: false,
                                start: 1,
                                items: vec![
                                    vec![paragraph("stated,")],
                                    vec![paragraph("not stated.")],
                                ],
                            },
                        ],
                    ],
                },
                Block::Quote {
                    blocks: vec![paragraph("An invented sentence that somebody else wrote.")],
                },
                Block::Code {
                    text: s(
                        "[reactions.hydrogenation]\n  equation = \"A + 3 H2(g) -> B + 2 H2O(l)\"",
                    ),
                },
                Block::Table {
                    head: vec![Rich::plain("Item"), Rich::plain("Amount")],
                    rows: vec![vec![water(), Rich::plain("2 mol")]],
                },
                Block::Rule,
                paragraph("After the rule."),
            ],
        },
    ]
}

fn closing() -> Vec<ProseSection> {
    vec![ProseSection {
        heading: s("Conclusion"),
        blocks: vec![Block::Paragraph {
            text: Rich::plain("The cooler takes the heat of −552.6 kJ/mol with a margin."),
        }],
    }]
}

fn results() -> Vec<ResultRow> {
    let row = |id: &str, what: &str, stated: Option<&str>, expanded: Option<&str>| ResultRow {
        id: s(id),
        what: s(what),
        equation: (id == "hydrogenation.heat").then(sulfate),
        section: 0,
        stated: stated.map(s),
        expanded: expanded.map(s),
        unit: s("kJ/mol"),
        direction: stated.map(|_| s("released")),
        coverage: s("k = 2, about 95 %; covers 3 of 4 values"),
    };
    vec![
        row(
            "hydrogenation.heat",
            "Heat of reaction as written, per mole of reaction",
            Some("−552.6"),
            Some("0.8"),
        ),
        row(
            "reactor.duty",
            "Duty of the reactor",
            Some("−1234.56"),
            None,
        ),
        row("reactor.losses", "Losses", None, None),
    ]
}

fn basis() -> Basis {
    Basis {
        inputs: vec![
            InputRow {
                id: s("charge"),
                value: s("1.200e3 kg"),
                tolerance: Some(s("12 kg")),
                source: s("Batch sheet 7, invented"),
                confirmed: true,
                hold: None,
            },
            InputRow {
                id: s("inlet-temperature"),
                value: s("60 °C"),
                tolerance: None,
                source: s("Operator's note, invented"),
                confirmed: false,
                hold: Some(1),
            },
        ],
        assumptions: vec![AssumptionRow {
            number: 1,
            text: s("All of the nitro group reacts."),
            basis: None,
            confirmed: false,
            hold: Some(2),
        }],
        holds: vec![
            hold(1, "inlet-temperature", "Operations", "reading of TI-301"),
            hold(
                2,
                "All of the nitro group reacts.",
                "Laboratory",
                "analysis of three batches",
            ),
        ],
    }
}

fn hold(number: usize, what: &str, owner: &str, closed_by: &str) -> HoldRow {
    HoldRow {
        number,
        what: s(what),
        owner: s(owner),
        closed_by: s(closed_by),
    }
}

fn functions() -> Vec<FunctionRow> {
    vec![FunctionRow {
        value_used: 2,
        substance: water(),
        form: s("nasa-9"),
        range: s("273.150 K to 373.150 K"),
        equation: s("Cp/R = a1/T² + a2/T + a3 + a4·T"),
        numbers: vec![
            (s("a1"), s("1.326371304\u{a0}×\u{a0}10⁹")),
            (s("a2"), s("−2.448295388\u{a0}×\u{a0}10⁷")),
        ],
    }]
}

fn values_used() -> Vec<ValueRow> {
    let row = |number: usize, substance: Rich, name: Option<&str>, printed: &str| ValueRow {
        number,
        substance,
        name: name.map(Rich::plain),
        cas: name.map(|_| s("7732-18-5")),
        quantity: s("formation enthalpy"),
        printed: s(printed),
        unit: s("kJ/mol"),
        reference: 1,
        source: s("invented-table-2026"),
        locator: s("Table 5, p. 12"),
        standing: s("double-entered"),
        sha256: s(&STAMP[..16]),
    };
    vec![
        row(
            1,
            Rich::plain("nitrobenzene"),
            Some("nitrobenzene"),
            "12.5 ± 0.5",
        ),
        row(2, water(), Some("water"), "−285.830 ± 0.040"),
        row(3, sulfate(), None, "−909.34"),
        row(4, Rich::plain("H2(g)"), Some("hydrogen"), "0"),
    ]
}

fn comparisons() -> Vec<ComparisonRow> {
    vec![ComparisonRow {
        substance: water(),
        value_used: 2,
        used: s("−285.830"),
        other: s("−285.8"),
        unit: s("kJ/mol"),
        reference: 2,
        locator: s("p. 3"),
        difference: s("0.030"),
        judgement: s("within the combined expanded uncertainty"),
    }]
}

fn budgets() -> Vec<Budget> {
    let row = |value_used: usize, share: Option<u32>| BudgetRow {
        value_used,
        substance: water(),
        standard: share.map_or(s("not stated"), |_| s("0.020")),
        sensitivity: s("2"),
        contribution: share.map_or(s("–"), |_| s("0.040")),
        share: share.map_or(s("–"), |share| s(&(share / 10).to_string())),
        share_permille: share,
    };
    vec![Budget {
        result: s("hydrogenation.heat"),
        unit: s("kJ/mol"),
        rows: vec![row(1, Some(720)), row(2, Some(280)), row(3, None)],
        standard: Some(s("0.42")),
        expanded: Some(s("0.84")),
        coverage: s("k = 2, about 95 %; covers 3 of 4 values"),
        remark: Some(s(
            "One value states no uncertainty, which is not an uncertainty of zero.",
        )),
    }]
}

fn findings() -> Vec<FindingRow> {
    ["stop", "caution", "note"]
        .into_iter()
        .map(|severity| FindingRow {
            severity: s(severity),
            code: s("uncertainty-incomplete"),
            message: s("one of the four values used states no uncertainty"),
            at: s("case.toml, line 12"),
        })
        .collect()
}

fn references() -> Vec<Reference> {
    let reference = |number: usize, id: &str, licence: Option<&str>| Reference {
        number,
        id: s(id),
        text: s(
            "Inventor, A. N.: An Invented Table of Formation Enthalpies. Invented Press, 2026.",
        ),
        temperature: s("298.15 K"),
        pressure: s("1 bar"),
        licence: licence.map(s),
        sha256: s(STAMP),
        attachment: format!("source-{id}.toml"),
    };
    vec![
        reference(1, "invented-table-2026", Some("public domain")),
        reference(2, "other-table", None),
    ]
}

fn attachment_rows() -> Vec<AttachmentRow> {
    attachments()
        .iter()
        .map(|file| AttachmentRow {
            name: file.name.clone(),
            description: file.description.clone(),
            relationship: format!("{:?}", file.relationship),
            media_type: s(file.media_type),
        })
        .collect()
}

/// Files that a record of the sample's kind carries.
pub(super) fn attachments() -> Vec<Attachment> {
    let file = |name: &str, relationship, media_type, description: &str| Attachment {
        name: s(name),
        bytes: format!("# {name}\n").into_bytes(),
        relationship,
        media_type,
        description: s(description),
    };
    vec![
        file(
            "case.toml",
            Relationship::Source,
            "application/toml",
            "The case as the preparer wrote it",
        ),
        file(
            "results.json",
            Relationship::Data,
            "application/json",
            "Results, unrounded",
        ),
    ]
}

fn program() -> Program {
    Program {
        name: s("hesswright"),
        version: s("0.1.0"),
        typesetter: s(super::TYPESETTER),
        verification: vec![s(
            "The method is verified against outside values within stated limits.",
        )],
        rerun: s("The attachments are all that a re-run needs."),
    }
}
