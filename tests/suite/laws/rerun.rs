//! A record can be run again from what is attached to it, and gives the same bytes.

use std::fs;
use std::path::Path;

use hesswright::calculation::Calculation;
use hesswright::finding::Text;
use hesswright::folder::CaseFolder;
use hesswright::record::{Attachment, MANIFEST_NAME, Manifest, Record, Typesetting, assemble};
use proptest::prelude::*;

use super::invented::{SOURCE, balanced, compounds, equation, numbers, source};
use super::support::{Files, calculation, case, reaction, worked};

/// Typesetting that stands for any: the attachments name it and do not depend on it.
fn typesetting() -> Typesetting {
    Typesetting {
        version: "none".to_string(),
        template_sha256: "0".repeat(64),
        fonts: Vec::new(),
    }
}

fn attached<'a>(files: &'a [Attachment], name: &str) -> &'a str {
    let file = files.iter().find(|file| file.name == name);
    let bytes = &file
        .unwrap_or_else(|| panic!("{name} is not attached"))
        .bytes;
    std::str::from_utf8(bytes).expect("attachments are text")
}

/// The attachments as the sources that the case consults.
fn sources_of(record: &Record) -> Files {
    let manifest: Manifest =
        serde_json::from_str(attached(&record.attachments, MANIFEST_NAME)).expect("a manifest");
    let became = manifest.consult.iter().map(|(name, file)| {
        let file = file.as_str().expect("the manifest names attachments");
        (
            name.clone(),
            attached(&record.attachments, file).to_string(),
        )
    });
    Files::extracted(became)
}

fn assert_same_record(first: &Record) {
    let text = attached(&first.attachments, "case.toml").to_string();
    let again = worked(&text, &sources_of(first));
    let again = assemble(&again, &typesetting());
    for (one, other) in first.attachments.iter().zip(&again.attachments) {
        assert_eq!(one.name, other.name);
        let texts = [one, other].map(|file| String::from_utf8_lossy(&file.bytes).into_owned());
        assert_eq!(texts[0], texts[1], "{}", one.name);
    }
    assert_eq!(first.attachments.len(), again.attachments.len());
    let pages = [first, &again].map(|r| serde_json::to_string_pretty(&r.pages).expect("pages"));
    assert_eq!(pages[0], pages[1]);
}

/// A record of the case, run again from its attachments alone, has the same attachments and
/// says the same on its pages.
pub fn assert_reruns(case: &str, files: &Files) {
    assert_same_record(&assemble(&worked(case, files), &typesetting()));
}

#[test]
fn the_shipped_cases() {
    let folder = Path::new(env!("CARGO_MANIFEST_DIR")).join("cases");
    for name in [
        "nitrobenzene-hydrogenation.toml",
        "acid-neutralisation.toml",
        "formation-from-combustion.toml",
    ] {
        let path = folder.join(name);
        let text = Text::new(
            "case.toml",
            fs::read_to_string(&path).expect("a shipped case"),
        );
        let door = CaseFolder::of(&path, &text);
        let calculation = Calculation::of(text, &door).expect("a shipped case works");
        assert_same_record(&assemble(&calculation, &typesetting()));
    }
}

/// Reactions of the built-in sources; what they rest on differs in kind.
const BUILT_IN: [&str; 10] = [
    "2 H2(g) + O2(g) -> 2 H2O(l)",
    "CaCO3(cr, calcite) -> CaO(cr) + CO2(g)",
    "CH4(g) + 2 O2(g) -> CO2(g) + 2 H2O(g)",
    "H+(aq) + OH-(aq) -> H2O(l)",
    "Ag+(aq) + Cl-(aq) -> AgCl(cr)",
    "N2(g) + 3 H2(g) -> 2 NH3(g)",
    "C(cr, graphite) + CO2(g) -> 2 CO(g)",
    "SO2(g) + 1/2 O2(g) -> SO3(g)",
    "H2O(g) -> H2O(l)",
    "CaCO3(stable) + SiO2(cr, quartz) -> CaSiO3(stable) + CO2(g)",
];

proptest! {
    #![proptest_config(ProptestConfig::with_cases(48))]

    #[test]
    fn cases_of_built_in_sources(
        some in prop::sample::subsequence(BUILT_IN.to_vec(), 1..6),
        order in Just(["codata-1989", "nasa-glenn-2021"]).prop_shuffle(),
        energy in prop::sample::select(vec!["kJ", "kcal_th", "J"]),
        consulted in 1usize..3,
    ) {
        let reactions = some.iter().enumerate();
        let rest = reactions.map(|(i, equation)| reaction(&format!("r{i}"), equation));
        let units = format!("[units]\nenergy = \"{energy}\"\n");
        let text = case(&order[..consulted], &(rest.collect::<String>() + &units));
        // One source alone does not list everything; refusing is right then.
        if calculation(&text, &Files::of(&[])).is_ok() {
            assert_reruns(&text, &Files::of(&[]));
        }
    }

    #[test]
    fn cases_of_source_files(
        all in compounds(),
        nu in numbers(),
        fixed in any::<bool>(),
        temperature in prop::sample::select(vec!["298.15 K", "25 °C", "291.15 K"]),
        r in -99i32..100,
    ) {
        let digits = if fixed { "fixed-decimals" } else { "significant" };
        let text = source(&all)
            .replace("coverage", &format!("digits = \"{digits}\"\nstanding = \"from memory\"\ncoverage"))
            .replace("298.15 K", temperature);
        let correlation = format!(
            "\n[[correlation]]\nbetween = [\"{}\", \"{}\"]\ncoefficient = \"{}{}.{:02}\"\n",
            all[0].species(), all[1].species(), if r < 0 { "-" } else { "" }, 0, r.abs()
        );
        let files = Files::of(&[(SOURCE, &(text + &correlation))]);
        let terms = balanced(&all, &nu);
        let rest = reaction("a", &equation(&terms)).trim_end().to_string();
        let rest = format!("{rest}\nper = \"{}\"\n", terms[0].0);
        assert_reruns(&case(&[SOURCE, "nasa-glenn-2021"], &rest), &files);
    }
}
