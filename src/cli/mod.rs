//! The command line: a file per command, which parses, calls the library, and shows what it
//! returned. What is for people goes to standard error, except the working that `compute` prints
//! and the listings of `source`; with `--json` standard output holds JSON and nothing else.

mod compute;
mod cycle_text;
mod draft;
mod draft_text;
mod exit;
mod extract;
mod faults;
mod findings;
mod heating_value_text;
mod issue;
mod source;
mod terminal;
mod worked;
mod working_text;

use std::path::PathBuf;

use clap::{Parser, Subcommand};

pub use exit::Exit;

/// Works heats of reaction exactly from cited values and issues them as PDF calculation records.
#[derive(Parser)]
#[command(name = "hesswright", version, max_term_width = 80)]
struct Arguments {
    #[command(subcommand)]
    command: Command,
}

#[derive(Subcommand)]
enum Command {
    /// Write a new case to fill in
    Draft(draft::Draft),
    /// Work the case, show results and findings
    Compute(compute::Compute),
    /// Work the case and write the record, out/NUMBER-REVISION.pdf
    Issue(issue::Issue),
    /// Write a record's attachments as files
    Extract(extract::Extract),
    /// List, show, find and validate sources
    Source(source::SourceCommand),
}

/// Where files go and what standard output holds.
#[derive(clap::Args, Clone)]
struct Output {
    /// Folder for files that are written
    #[arg(long, value_name = "DIR", default_value = "out")]
    out: PathBuf,
    /// Print one JSON document on standard output
    #[arg(long)]
    json: bool,
}

/// Parses the arguments and runs the command that they name.
pub fn run() -> Exit {
    match Arguments::parse().command {
        Command::Draft(command) => command.run(),
        Command::Compute(command) => command.run(),
        Command::Issue(command) => command.run(),
        Command::Extract(command) => command.run(),
        Command::Source(command) => command.run(),
    }
}
