//! The commands as people and scripts run them: what is written, what is said on which stream,
//! and how a run ends.

mod compute;
mod draft;
mod ends;
mod extract;
mod issue;
mod place;
mod source;
mod standing;

/// A case of the tests with a status and whatever else it states after `[sources]`.
fn case(status: &str, consult: &[&str], rest: &str) -> String {
    format!(
        "[record]\nnumber = \"T-0001\"\nrevision = \"A\"\ntitle = \"A case of the tests\"\n\
         date = 2026-01-02\npreparer = \"N. N.\"\nstatus = \"{status}\"\n\n\
         [sources]\nconsult = {consult:?}\n\n{rest}"
    )
}

/// The formation of water, which needs one cited value.
const WATER: &str = "[reactions.water]\nequation = \"2 H2(g) + O2(g) -> 2 H2O(l)\"\n";

/// An invented source with one value for water.
fn sheet(id: &str, value: &str) -> String {
    format!(
        "# Invented.\n[source]\nid = \"{id}\"\ntitle = \"Sheet {id} (invented)\"\n\
         temperature = \"298.15 K\"\nenergy-unit = \"kJ/mol\"\ncoverage = \"2\"\n\n\
         [[entry]]\nsubstance = \"H2O(l)\"\nformation-enthalpy = \"{value}\"\n\
         locator = \"sheet 1 (invented)\"\n"
    )
}
