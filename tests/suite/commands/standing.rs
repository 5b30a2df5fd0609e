//! What keeps a record from being issued, and what is merely said.

use serde_json::Value;

use crate::program::{Folder, Ran};

use super::{WATER, case, sheet};

/// The severity of the finding with a code; none where there is no such finding.
fn severity(ran: &Ran, code: &str) -> Option<String> {
    let document = ran.json();
    let findings = document["findings"].as_array().cloned().unwrap_or_default();
    let found = findings.into_iter().find(|finding| finding["code"] == code);
    found.map(|finding| finding["severity"].as_str().unwrap_or_default().to_string())
}

fn compute(folder: &Folder) -> Ran {
    folder.run(&["compute", "a.toml", "--json"])
}

#[test]
fn a_stop_ends_with_one_and_is_issued_as_preliminary_alone() {
    let folder = Folder::new();
    let hot = format!("{WATER}temperature = \"80 °C\"\n");
    folder.write("a.toml", case("for-check", &["codata-1989"], &hot));
    let computed = compute(&folder);
    assert_eq!(computed.status, 1);
    assert_eq!(
        severity(&computed, "heat-capacity-missing").as_deref(),
        Some("stop")
    );
    let refused = folder.run(&["issue", "a.toml", "--json"]);
    assert_eq!(refused.status, 1, "{}", refused.err);
    assert!(refused.json()["error"].is_string());
    assert!(!folder.has("out"), "{:?}", folder.names("out"));

    folder.write("a.toml", case("preliminary", &["codata-1989"], &hot));
    assert_eq!(folder.run(&["issue", "a.toml"]).status, 1);
    assert_eq!(folder.names("out"), ["T-0001-A.pdf"]);
}

#[test]
fn sources_that_differ_stop_the_case_until_it_chooses() {
    let folder = Folder::new();
    folder
        .write("one.toml", sheet("one", "-285.8 ± 0.1"))
        .write("two.toml", sheet("two", "-290.0 ± 0.1"));
    folder.write(
        "a.toml",
        case("for-check", &["one.toml", "two.toml"], WATER),
    );
    let open = compute(&folder);
    assert_eq!(open.status, 1);
    assert_eq!(severity(&open, "sources-differ").as_deref(), Some("stop"));

    let choice =
        "[sources.choose]\n\"H2O(l)\" = { source = \"two\", because = \"measured here\" }\n\n";
    folder.write(
        "a.toml",
        case(
            "for-check",
            &["one.toml", "two.toml"],
            &format!("{choice}{WATER}"),
        ),
    );
    let chosen = compute(&folder);
    assert_eq!(chosen.status, 0, "{}", chosen.out);
    assert_eq!(
        severity(&chosen, "choice-overrides").as_deref(),
        Some("note")
    );
    assert_eq!(chosen.json()["results"]["water.heat"]["exact"], "-580");

    folder.write("two.toml", sheet("two", "-285.9 ± 0.1"));
    folder.write(
        "a.toml",
        case("for-check", &["one.toml", "two.toml"], WATER),
    );
    let within = compute(&folder);
    assert_eq!(within.status, 0);
    assert_eq!(severity(&within, "sources-differ"), None);
}

#[test]
fn an_uncertainty_that_is_not_stated_is_null_and_never_zero() {
    let folder = Folder::new();
    folder.write("one.toml", sheet("one", "-285.8"));
    folder.write("a.toml", case("for-check", &["one.toml"], WATER));
    let ran = compute(&folder);
    let document = ran.json();
    let heat = &document["results"]["water.heat"];
    assert_eq!(heat["standard-uncertainty"], Value::Null);
    assert_eq!(heat["covers"], serde_json::json!({ "stated": 0, "of": 1 }));
    assert_eq!(heat["stated"], "-571.6");
    assert_eq!(
        severity(&ran, "uncertainty-incomplete").as_deref(),
        Some("caution")
    );
    let text = folder.run(&["compute", "a.toml"]).out;
    assert!(
        text.contains("uncertainty not stated by any of 1 values used"),
        "{text}"
    );
}

#[test]
fn an_open_hold_keeps_a_record_from_issued_unless_it_is_accepted_by_name() {
    let folder = Folder::new();
    let held = |status: &str, accepted: &str| {
        let hold = format!("hold = {{ owner = \"shift\", closed-by = \"analysis\"{accepted} }}");
        let assumption =
            format!("[[assumptions]]\ntext = \"Pure.\"\nconfirmed = false\n{hold}\n\n");
        case(status, &["codata-1989"], &format!("{assumption}{WATER}"))
    };
    folder.write("a.toml", held("for-check", ""));
    let checked = compute(&folder);
    assert_eq!((checked.status, severity(&checked, "hold-open")), (0, None));

    folder.write("a.toml", held("issued", ""));
    let open = compute(&folder);
    assert_eq!(
        (open.status, severity(&open, "hold-open").as_deref()),
        (1, Some("stop"))
    );
    assert_eq!(folder.run(&["issue", "a.toml"]).status, 1);
    assert!(!folder.has("out"));

    folder.write(
        "a.toml",
        held("issued", ", accepted-by = \"works manager\""),
    );
    let accepted = compute(&folder);
    assert_eq!(
        (accepted.status, severity(&accepted, "hold-open").as_deref()),
        (0, Some("caution"))
    );
    assert_eq!(folder.run(&["issue", "a.toml"]).status, 0);
}

#[test]
fn what_is_not_confirmed_and_not_held_either_keeps_a_record_from_issued() {
    let folder = Folder::new();
    let input = format!("[inputs]\ncharge = {{ value = \"12.0 kg\" }}\n\n{WATER}");
    for (status, exit, weight) in [("for-check", 0, "caution"), ("issued", 1, "stop")] {
        folder.write("a.toml", case(status, &["codata-1989"], &input));
        let ran = compute(&folder);
        assert_eq!(
            (ran.status, severity(&ran, "unconfirmed").as_deref()),
            (exit, Some(weight))
        );
    }
}
