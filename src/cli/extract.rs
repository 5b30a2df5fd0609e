//! `extract RECORD DIR`: the attachments of a record, as files.

use std::path::PathBuf;

use clap::Args;
use serde_json::json;

use super::exit::Exit;
use super::terminal::{print, tell};
use crate::document::unread;
use crate::output::{why, write_new};
use crate::pdf::RecordFile;

#[derive(Args)]
pub struct Extract {
    /// The record
    record: PathBuf,
    /// Folder to write the attachments to; files of the same names must not be there
    dir: PathBuf,
    /// Print one JSON document on standard output
    #[arg(long)]
    json: bool,
}

impl Extract {
    pub fn run(&self) -> Exit {
        match self.extract() {
            Ok(names) => {
                if self.json {
                    let document =
                        json!({ "record": self.record, "folder": self.dir, "files": names });
                    print(&format!("{document}\n"));
                }
                tell(&format!(
                    "{} files in {}\n",
                    names.len(),
                    self.dir.display()
                ));
                Exit::Well
            }
            Err(message) => {
                if self.json {
                    print(&format!("{}\n", json!({ "error": message })));
                }
                tell(&format!("{message}\n"));
                Exit::NotDone
            }
        }
    }

    fn extract(&self) -> Result<Vec<String>, String> {
        let record = self.record.display();
        let bytes =
            std::fs::read(&self.record).map_err(|error| format!("{record}: {}", unread(&error)))?;
        let file = RecordFile::read(bytes).map_err(|error| format!("{record}: {error}"))?;
        self.refuse_existing(&file)?;
        for embedded in &file.attachments {
            let path = self.dir.join(&embedded.name);
            let said =
                |error: std::io::Error| format!("{}: not written: {}", path.display(), why(&error));
            write_new(&path, &embedded.bytes).map_err(said)?;
        }
        Ok(file.attachments.into_iter().map(|file| file.name).collect())
    }

    /// Nothing is written where something would be in the way.
    fn refuse_existing(&self, file: &RecordFile) -> Result<(), String> {
        let mut there = file
            .attachments
            .iter()
            .map(|embedded| self.dir.join(&embedded.name));
        match there.find(|path| path.symlink_metadata().is_ok()) {
            Some(path) => Err(format!(
                "{} is there already; extract to a folder of its own",
                path.display()
            )),
            None => Ok(()),
        }
    }
}
