//! `compute CASE`: work the case, show results and findings.

use std::path::PathBuf;

use clap::Args;

use super::exit::Exit;
use super::terminal::{Style, print};
use super::worked::work_file;
use super::{faults, working_text};
use crate::record::results_json;

#[derive(Args)]
pub struct Compute {
    /// The case to work
    case: PathBuf,
    /// Print results, values used and findings as one JSON document
    #[arg(long)]
    json: bool,
}

impl Compute {
    pub fn run(&self) -> Exit {
        let worked = match work_file(&self.case) {
            Ok(worked) => worked,
            Err(found) => return faults::report(&self.case, &found, self.json),
        };
        let calculation = &worked.calculation;
        if self.json {
            print(&results_json(calculation));
        } else {
            print(&working_text::shown(
                &self.case,
                calculation,
                Style::stdout(),
            ));
        }
        match calculation.is_stopped() {
            true => Exit::DoesNotHold,
            false => Exit::Well,
        }
    }
}
