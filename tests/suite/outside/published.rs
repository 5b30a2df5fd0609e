//! Published heats of reaction, met by the built-in sources within the two sides' uncertainties.

use num_traits::Signed;
use serde::Deserialize;

use super::case::{Folder, one_reaction};
use super::rational::rational;
use super::tools::outside;

#[derive(Deserialize)]
struct Heats {
    heat: Vec<Heat>,
}

/// One row of published-heats.toml, which says what its fields mean.
#[derive(Deserialize)]
struct Heat {
    equation: String,
    consult: Vec<String>,
    temperature: String,
    published: String,
    unit: String,
    tolerance: String,
    source: String,
}

#[test]
fn published_heats_are_met_within_their_tolerance() {
    let text = std::fs::read_to_string(outside("published-heats.toml")).expect("the list");
    let heats: Heats = toml::from_str(&text).expect("a list of heats");
    let folder = Folder::new();
    let missed: Vec<String> = heats
        .heat
        .iter()
        .filter_map(|heat| missed(&folder, heat))
        .collect();
    assert!(missed.is_empty(), "{}", missed.join("\n"));
    assert!(
        heats.heat.len() >= 26,
        "rows were lost: {}",
        heats.heat.len()
    );
}

/// What is wrong with the program's heat; none where it is met.
fn missed(folder: &Folder, heat: &Heat) -> Option<String> {
    assert_eq!(
        (heat.temperature.as_str(), heat.unit.as_str()),
        ("298.15 K", "kJ/mol")
    );
    let consult: Vec<&str> = heat.consult.iter().map(String::as_str).collect();
    let results = match folder.results(&one_reaction(&consult, &heat.equation, "")) {
        Ok(results) => results,
        Err(said) => return Some(format!("{}: {said}", heat.equation)),
    };
    let apart = (results.exact("r.heat") - rational(&heat.published)).abs();
    let met = apart <= rational(&heat.tolerance) && results.text("r.heat", "unit") == "kJ/mol";
    (!met).then(|| {
        let (equation, source) = (&heat.equation, &heat.source);
        let worked = results.text("r.heat", "exact");
        format!(
            "{equation}: {worked}, not {} ± {} ({source})",
            heat.published, heat.tolerance
        )
    })
}
