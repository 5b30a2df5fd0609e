//! `source list|show|find|validate`.

use crate::program::Folder;

use super::sheet;

#[test]
fn the_built_in_sources_are_listed_and_shown() {
    let folder = Folder::new();
    let listed = folder.run(&["source", "list"]);
    assert_eq!((listed.status, listed.err.as_str()), (0, ""));
    let json = folder.run(&["source", "list", "--json"]).json();
    let sources = json["sources"].as_array().cloned().unwrap_or_default();
    assert!(sources.len() >= 4, "{json}");
    for source in sources {
        let id = source["id"].as_str().expect("an id").to_string();
        assert!(listed.out.contains(&id), "{id}");
        let shown = folder.run(&["source", "show", &id]);
        assert_eq!((shown.status, shown.err.as_str()), (0, ""), "{id}");
        let document = folder.run(&["source", "show", &id, "--json"]).json();
        assert!(
            document["entries"]
                .as_array()
                .is_some_and(|entries| !entries.is_empty()),
            "{id}"
        );
    }
}

#[test]
fn entries_are_found_by_formula_species_name_and_cas_number() {
    let folder = Folder::new();
    for word in ["H2O", "H2O(l)", "water", "7732-18-5", "OH2"] {
        let found = folder.run(&["source", "find", word, "--json"]);
        assert_eq!(found.status, 0, "{word}");
        let document = found.json();
        let entries = document["entries"].as_array().cloned().unwrap_or_default();
        let water = entries
            .iter()
            .find(|e| e["source"] == "codata-1989" && e["substance"] == "H2O(l)");
        let value = water.and_then(|entry| entry["formation-enthalpy"].as_str());
        assert_eq!(value, Some("-285.830 ± 0.040 kJ/mol"), "{word}: {document}");
    }
    let none = folder.run(&["source", "find", "unobtainium"]);
    assert_eq!((none.status, none.out.as_str()), (1, ""));
    folder.write("own.toml", sheet("own-sheet", "-285.8 ± 0.1"));
    let own = folder.run(&["source", "find", "H2O", "own.toml"]);
    assert!(own.out.contains("own-sheet"), "{}", own.out);
}

#[test]
fn a_source_file_is_validated_and_its_faults_carry_its_name() {
    let folder = Folder::new();
    folder.write("own.toml", sheet("own-sheet", "-285.8 ± 0.1"));
    let good = folder.run(&["source", "validate", "own.toml", "--json"]);
    assert_eq!(good.status, 0, "{}", good.err);
    assert_eq!(good.json()["id"], "own-sheet");
    folder.write("own.toml", sheet("own-sheet", "-285,8"));
    let bad = folder.run(&["source", "validate", "own.toml", "--json"]);
    assert_eq!(bad.status, 2);
    assert_eq!(bad.json()["faults"][0]["at"]["file"], "own.toml");
    assert!(bad.err.starts_with("own.toml:11:"), "{}", bad.err);
    for action in ["show", "validate"] {
        assert_eq!(folder.run(&["source", action, "missing.toml"]).status, 2);
    }
}
