//! `source list|show|find|validate`: what the sources hold.

use std::path::{Path, PathBuf};

use clap::{Args, Subcommand};
use serde_json::{Value, json};

use super::exit::Exit;
use super::faults;
use super::terminal::{plain, print, tell, wrap};
use crate::document::read_text;
use crate::finding::Fault;
use crate::notation::Species;
use crate::source::{
    BUILT_IN, Entry, Hit, Provenance, Source, Subject, built_in, read_source, search,
};

#[derive(Args)]
pub struct SourceCommand {
    #[command(subcommand)]
    action: Action,
    /// Print one JSON document on standard output
    #[arg(long, global = true)]
    json: bool,
}

#[derive(Subcommand)]
enum Action {
    /// The built-in sources
    List,
    /// One source: its citation and its entries
    Show {
        /// Id of a built-in source or path of a source file
        source: String,
    },
    /// Entries by formula, species, name or CAS number
    Find {
        /// What to look for: H2O, H2O(l), water, 7732-18-5
        word: String,
        /// Also look in these source files
        files: Vec<String>,
    },
    /// Read a source file and report every fault in it
    Validate {
        /// Path of the source file
        file: PathBuf,
    },
}

impl SourceCommand {
    pub fn run(&self) -> Exit {
        match &self.action {
            Action::List => self.list(),
            Action::Show { source } => self.show(source),
            Action::Find { word, files } => self.find(word, files),
            Action::Validate { file } => self.validate(file),
        }
    }

    fn list(&self) -> Exit {
        let sources: Vec<Source> = BUILT_IN.iter().filter_map(|id| built_in(id)).collect();
        if self.json {
            let documents: Vec<Value> = sources.iter().map(head_json).collect();
            print(&format!("{}\n", json!({ "sources": documents })));
            return Exit::Well;
        }
        let width = BUILT_IN.iter().map(|id| id.len()).max().unwrap_or(0);
        for source in &sources {
            print(&wrap(
                &format!("{:<width$}  ", source.id()),
                &source.head.citation(),
            ));
        }
        Exit::Well
    }

    fn show(&self, name: &str) -> Exit {
        let source = match load(name) {
            Ok(source) => source,
            Err(found) => return faults::report(name.as_ref(), &found, self.json),
        };
        let entries = source.all();
        if self.json {
            let mut document = head_json(&source);
            document["entries"] = entries.iter().map(|e| entry_json(source.id(), e)).collect();
            print(&format!("{document}\n"));
            return Exit::Well;
        }
        print(&wrap("", &source.head.citation()));
        print(&format!(
            "SHA-256 {}\n{} entries\n",
            source.head.sha256,
            entries.len()
        ));
        for entry in &entries {
            print(&entry_text(None, entry));
        }
        Exit::Well
    }

    fn find(&self, word: &str, files: &[String]) -> Exit {
        let mut sources: Vec<Source> = BUILT_IN.iter().filter_map(|id| built_in(id)).collect();
        for file in files {
            match load(file) {
                Ok(source) => sources.push(source),
                Err(found) => return faults::report(file.as_ref(), &found, self.json),
            }
        }
        let hits = search(&sources, word);
        if self.json {
            let hit = |hit: &Hit| entry_json(&hit.source, &hit.entry);
            let hits: Vec<Value> = hits.iter().map(hit).collect();
            print(&format!("{}\n", json!({ "entries": hits })));
        } else {
            for hit in &hits {
                print(&entry_text(Some(&hit.source), &hit.entry));
            }
        }
        if hits.is_empty() {
            tell(&format!("nothing found for \"{}\"\n", plain(word)));
            return Exit::DoesNotHold;
        }
        Exit::Well
    }

    fn validate(&self, file: &Path) -> Exit {
        let name = file.display().to_string();
        match load_file(&name) {
            Ok(source) => {
                if self.json {
                    print(&format!("{}\n", head_json(&source)));
                }
                let count = source.all().len();
                let entries = if count == 1 { "entry" } else { "entries" };
                tell(&format!("{name}: {count} {entries}, no fault\n"));
                Exit::Well
            }
            Err(found) => faults::report(file, &found, self.json),
        }
    }
}

fn load(name: &str) -> Result<Source, Vec<Fault>> {
    match built_in(name) {
        Some(source) => Ok(source),
        None => load_file(name),
    }
}

fn load_file(name: &str) -> Result<Source, Vec<Fault>> {
    let text = read_text(name.as_ref(), name).map_err(|fault| vec![fault])?;
    let (source, faults) = read_source(&text, Provenance::Original);
    source.ok_or_else(|| faults.into_sorted())
}

fn head_json(source: &Source) -> Value {
    json!({
        "id": source.head.id,
        "citation": source.head.citation(),
        "sha256": source.head.sha256,
    })
}

fn entry_json(source: &str, entry: &Entry) -> Value {
    json!({
        "source": source,
        "substance": subject(entry),
        "name": entry.name,
        "cas": entry.cas,
        "formation-enthalpy": entry.formation_enthalpy.as_ref().map(|q| q.to_string()),
        "atomic-weight": entry.atomic_weight.as_ref().map(|q| q.to_string()),
        "value": entry.value.as_ref().map(|q| q.to_string()),
        "heat-capacity-functions": entry.heat_capacity.len(),
        "locator": entry.locator,
        "note": entry.note,
        "standing": entry.standing.word(),
    })
}

fn subject(entry: &Entry) -> String {
    match &entry.subject {
        Subject::Species(species) => Species::to_string(species),
        Subject::Symbol(symbol) => symbol.clone(),
    }
}

/// One entry on a line or two.
fn entry_text(source: Option<&str>, entry: &Entry) -> String {
    let values = [
        &entry.formation_enthalpy,
        &entry.atomic_weight,
        &entry.value,
    ];
    let value = values.into_iter().flatten().next();
    let value = value.map_or_else(|| no_value(entry), |q| q.to_string());
    let name = [&entry.name, &entry.cas]
        .into_iter()
        .flatten()
        .cloned()
        .collect::<Vec<_>>();
    let place = match source {
        Some(source) => format!("{source}: {}", entry.locator),
        None => entry.locator.clone(),
    };
    let mut text = wrap(
        "  ",
        &format!("{}  {value}  {}", subject(entry), name.join(", ")),
    );
    text += &wrap(
        "      ",
        &format!("{} ({})", plain(&place), entry.standing.word()),
    );
    text
}

fn no_value(entry: &Entry) -> String {
    match (&entry.note, entry.heat_capacity.is_empty()) {
        (Some(note), _) => format!("no formation enthalpy at 298.15 K: {note}"),
        (None, false) => "heat capacity only".to_string(),
        (None, true) => "no value".to_string(),
    }
}
