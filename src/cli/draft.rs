//! `draft NUMBER`: write a new case to fill in.

use clap::Args;
use serde_json::json;

use super::Output;
use super::draft_text::draft_text;
use super::exit::Exit;
use super::terminal::{print, tell};
use crate::document::is_file_word;
use crate::output::{why, write_new};

#[derive(Args)]
pub struct Draft {
    /// Number of the record
    number: String,
    #[command(flatten)]
    output: Output,
}

impl Draft {
    pub fn run(&self) -> Exit {
        if !is_file_word(&self.number) {
            return self.refused(format!(
                "\"{}\" is no number for a record: use letters, digits, points, underscores and \
                 hyphens, begun by a letter or digit",
                self.number
            ));
        }
        let path = self.output.out.join(format!("{}.toml", self.number));
        let text = draft_text(&self.number, today());
        if let Err(error) = write_new(&path, text.as_bytes()) {
            return self.refused(format!("{}: not written: {}", path.display(), why(&error)));
        }
        let shown = path.display();
        tell(&format!(
            "{shown}\n  work it:   hesswright compute {shown}\n  issue it:  hesswright issue {shown}\n"
        ));
        if self.output.json {
            print(&format!("{}\n", json!({ "file": path })));
        }
        Exit::Well
    }

    fn refused(&self, message: String) -> Exit {
        tell(&format!("{message}\n"));
        if self.output.json {
            print(&format!("{}\n", json!({ "error": message })));
        }
        Exit::NotDone
    }
}

/// The day in UTC: a draft is a proposal, and its date is there to be changed.
#[expect(clippy::disallowed_methods, reason = "a proposal, no result")]
fn today() -> chrono::NaiveDate {
    let since = std::time::SystemTime::now().duration_since(std::time::UNIX_EPOCH);
    let days = since.map_or(0, |since| since.as_secs() / 86_400);
    let epoch = chrono::NaiveDate::from_ymd_opt(1970, 1, 1).unwrap_or_default();
    epoch
        .checked_add_days(chrono::Days::new(days))
        .unwrap_or(epoch)
}
