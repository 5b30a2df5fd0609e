//! `issue CASE…`: work the cases and write their records.

use std::path::{Path, PathBuf};

use clap::Args;
use serde_json::{Value, json};

use super::exit::Exit;
use super::terminal::{Style, print, tell};
use super::worked::{Worked, work_file};
use super::{Output, faults, findings};
use crate::issue::{IssueError, Placed, issue, place};

#[derive(Args)]
pub struct Issue {
    /// The cases to issue
    #[arg(required = true)]
    cases: Vec<PathBuf>,
    #[command(flatten)]
    output: Output,
}

impl Issue {
    pub fn run(&self) -> Exit {
        let exits = self.cases.iter().map(|case| self.one(case));
        exits.max().unwrap_or(Exit::Well)
    }

    fn one(&self, case: &Path) -> Exit {
        let worked = match work_file(case) {
            Ok(worked) => worked,
            Err(found) => return faults::report(case, &found, self.output.json),
        };
        tell(&findings::shown(
            case,
            &worked.calculation.working.findings,
            Style::stderr(),
        ));
        self.write(case, &worked)
    }

    fn write(&self, case: &Path, worked: &Worked) -> Exit {
        let issued = match issue(&worked.calculation, &worked.folder) {
            Ok(issued) => issued,
            Err(error) => return self.refused(case, error),
        };
        let path = self.output.out.join(&issued.file_name);
        let stamp = issued.record.stamp();
        let placed = match place(&issued, &path) {
            Ok(placed) => placed,
            Err(error) => {
                tell(&format!("{}: not written: {error}\n", path.display()));
                self.json(json!({ "case": case, "file": path, "error": error.to_string() }));
                return Exit::NotDone;
            }
        };
        tell(&format!(
            "{}\n  stamp {stamp}\n{}",
            path.display(),
            said(&placed)
        ));
        self.json(json!({
            "case": case,
            "file": path,
            "number": worked.calculation.case.record.number.value,
            "revision": worked.calculation.case.record.revision.value,
            "stamp": stamp,
            "replaced": replaced(&placed),
        }));
        match worked.calculation.is_stopped() {
            true => Exit::DoesNotHold,
            false => Exit::Well,
        }
    }

    fn refused(&self, case: &Path, error: IssueError) -> Exit {
        match error {
            IssueError::Characters(found) => faults::report(case, &found, self.output.json),
            IssueError::Stopped => {
                tell(&format!(
                    "{}: not issued: a stop allows it only with status = \"preliminary\".\n",
                    case.display()
                ));
                self.json(
                    json!({ "case": case, "error": "a stop allows only a preliminary record" }),
                );
                Exit::DoesNotHold
            }
            IssueError::Typeset(error) => {
                tell(&format!("{}: not issued: {error}\n", case.display()));
                self.json(json!({ "case": case, "error": error.to_string() }));
                Exit::NotDone
            }
        }
    }

    fn json(&self, value: Value) {
        if self.output.json {
            print(&format!("{value}\n"));
        }
    }
}

fn said(placed: &Placed) -> String {
    match placed {
        Placed::New => String::new(),
        Placed::Unchanged => "  the same record was there already\n".to_string(),
        Placed::Replaced { stamp } => format!("  replaces the unsigned record {stamp}\n"),
        Placed::SignedKept => {
            "  the signed record there has this content; left alone\n".to_string()
        }
    }
}

fn replaced(placed: &Placed) -> Option<&str> {
    match placed {
        Placed::Replaced { stamp } => Some(stamp),
        _ => None,
    }
}
