//! Small cases and sources, worked by the program in a folder of their own.

use std::path::{Path, PathBuf};
use std::process::{Command, Output};

use num_rational::BigRational;
use serde_json::Value;
use tempfile::TempDir;

use super::rational::rational;

pub const RECORD: &str = r#"[record]
number = "OUT-1"
revision = "A"
title = "Held against an outside value"
date = 2026-11-24
preparer = "A. Nother"
status = "preliminary"
"#;

/// A folder with the files of one case.
pub struct Folder(TempDir);

/// A reaction at 298.15 K, called `r`, with whatever tables the case needs beside it.
pub fn one_reaction(consult: &[&str], equation: &str, more: &str) -> String {
    let reaction = format!("[reactions.r]\nequation = \"{equation}\"\ntemperature = \"298.15 K\"");
    format!("{RECORD}[sources]\nconsult = {consult:?}\n{reaction}\n{more}\n")
}

/// Reactions called `r0`, `r1`, … with their temperatures, whatever else the case needs behind them.
pub fn reactions(consult: &[&str], list: &[(&str, &str)], more: &str) -> String {
    let tables = list.iter().enumerate().map(|(i, (equation, temperature))| {
        format!("[reactions.r{i}]\nequation = \"{equation}\"\ntemperature = \"{temperature}\"\n")
    });
    let tables: String = tables.collect();
    format!("{RECORD}[sources]\nconsult = {consult:?}\n{tables}{more}\n")
}

/// A case with tables of its own.
pub fn without_reactions(consult: &[&str], tables: &str) -> String {
    format!("{RECORD}[sources]\nconsult = {consult:?}\n{tables}")
}

/// A source `given` in one unit, with entries (substance, formation enthalpy).
pub fn source(unit: &str, entries: &[(&str, &str)], more: &str) -> String {
    let mut text = format!(
        "[source]\nid = \"given\"\ntitle = \"Values given by a test\"\ntemperature = \"298.15 K\"\n\
         energy-unit = \"{unit}\"\ncoverage = \"2\"\n"
    );
    for (substance, value) in entries {
        text += &format!(
            "[[entry]]\nsubstance = \"{substance}\"\nlocator = \"row {substance}\"\n\
             formation-enthalpy = \"{value}\"\n"
        );
    }
    text + more
}

impl Folder {
    pub fn new() -> Folder {
        Folder(TempDir::new().expect("a temporary folder"))
    }

    pub fn path(&self) -> &Path {
        self.0.path()
    }

    pub fn write(&self, name: &str, text: &str) -> PathBuf {
        let path = self.path().join(name);
        std::fs::write(&path, text).expect("a file in a temporary folder");
        path
    }

    /// The results of a case, or what the program says against it.
    pub fn results(&self, case: &str) -> Result<Results, String> {
        self.write("case.toml", case);
        let output = run(self.path(), &["compute", "case.toml", "--json"]);
        if output.status.code() == Some(2) {
            return Err(String::from_utf8_lossy(&output.stderr).into_owned());
        }
        serde_json::from_slice(&output.stdout)
            .map(Results)
            .map_err(|error| error.to_string())
    }
}

/// Runs the program in a folder.
pub fn run(folder: &Path, arguments: &[&str]) -> Output {
    let mut program = Command::new(env!("CARGO_BIN_EXE_hesswright"));
    program
        .current_dir(folder)
        .args(arguments)
        .output()
        .expect("the program starts")
}

/// What `compute --json` printed.
#[derive(Debug)]
pub struct Results(Value);

impl Results {
    pub fn of_json(bytes: &[u8]) -> Results {
        Results(serde_json::from_slice(bytes).expect("compute --json prints JSON"))
    }

    pub fn all(&self) -> &serde_json::Map<String, Value> {
        self.0["results"].as_object().expect("an object of results")
    }

    pub fn values_used(&self) -> &[Value] {
        self.0["values-used"]
            .as_array()
            .expect("an array of values used")
    }

    /// A field of the record that is text.
    pub fn record(&self, key: &str) -> &str {
        self.0["record"][key].as_str().unwrap_or_default()
    }

    fn field(&self, result: &str, key: &str) -> &Value {
        &self.0["results"][result][key]
    }

    /// A field that is text; empty where it is not.
    pub fn text(&self, result: &str, key: &str) -> &str {
        self.field(result, key).as_str().unwrap_or_default()
    }

    /// A field that is a number; NaN, which equals and is near to nothing, where it is not.
    pub fn number(&self, result: &str, key: &str) -> f64 {
        self.field(result, key).as_f64().unwrap_or(f64::NAN)
    }

    /// The codes of the findings.
    pub fn codes(&self) -> Vec<String> {
        let findings = self.0["findings"].as_array().into_iter().flatten();
        let codes = findings.filter_map(|finding| finding["code"].as_str());
        codes.map(str::to_string).collect()
    }

    pub fn exact(&self, result: &str) -> BigRational {
        rational(self.text(result, "exact"))
    }
}
