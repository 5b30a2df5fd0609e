//! Heating values held against ISO 6976, a value in Btu per cubic foot, a script that works the
//! same mixture another way, and Monte Carlo.

mod iso_6976;
mod mixture;
mod monte_carlo;
mod volume;

use super::case::{Folder, Results};

/// A case with one heating value `f` that consults `sources`, with the file `given.toml` beside it.
fn fuel(sources: &[&str], given: Option<&str>, table: &str, more: &str) -> Results {
    let folder = Folder::new();
    if let Some(given) = given {
        folder.write("given.toml", given);
    }
    let case = format!(
        "{}[sources]\nconsult = {sources:?}\n[heating-values.f]\n{table}\n{more}\n",
        super::case::RECORD
    );
    folder
        .results(&case)
        .unwrap_or_else(|said| panic!("{said}\n{case}"))
}
