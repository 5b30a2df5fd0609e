//! The bare program that `issue` is measured against: it reads prepared pages and attachments,
//! has the typesetter compile and export them, and writes the PDF. No case, no sources, no working.
//!
//!     bare prepare CASE FOLDER     writes pages.json and the attachments
//!     bare typeset FOLDER FILE     the program that is timed

use std::error::Error;
use std::fs;
use std::path::Path;

use hesswright::calculation::Calculation;
use hesswright::document::read_text;
use hesswright::folder::CaseFolder;
use hesswright::issue::typesetting;
use hesswright::record::{Attachment, Pages, Relationship, assemble};
use hesswright::typeset::typeset;

fn main() -> Result<(), Box<dyn Error>> {
    let arguments: Vec<String> = std::env::args().skip(1).collect();
    let words: Vec<&str> = arguments.iter().map(String::as_str).collect();
    match words[..] {
        ["prepare", case, folder] => prepare(Path::new(case), Path::new(folder)),
        ["typeset", folder, file] => bare(Path::new(folder), Path::new(file)),
        // `cargo bench` adds words of its own; there is nothing to do then.
        _ => Ok(()),
    }
}

fn prepare(case: &Path, folder: &Path) -> Result<(), Box<dyn Error>> {
    let text = read_text(case, "case.toml").map_err(|fault| fault.found)?;
    let files = CaseFolder::of(case, &text);
    let calculation = Calculation::of(text, &files).map_err(|faults| format!("{faults:?}"))?;
    let record = assemble(&calculation, &typesetting());
    fs::create_dir_all(folder)?;
    fs::write(folder.join("pages"), serde_json::to_vec(&record.pages)?)?;
    for file in &record.attachments {
        fs::write(folder.join(&file.name), &file.bytes)?;
    }
    Ok(())
}

fn bare(folder: &Path, file: &Path) -> Result<(), Box<dyn Error>> {
    let pages: Pages = serde_json::from_slice(&fs::read(folder.join("pages"))?)?;
    let mut attachments = Vec::new();
    for row in &pages.attachments {
        attachments.push(Attachment {
            name: row.name.clone(),
            bytes: fs::read(folder.join(&row.name))?,
            relationship: match row.relationship.as_str() {
                "Source" => Relationship::Source,
                _ => Relationship::Data,
            },
            media_type: match row.media_type.as_str() {
                "application/toml" => "application/toml",
                _ => "application/json",
            },
            description: row.description.clone(),
        });
    }
    fs::write(file, typeset(&pages, &attachments)?)?;
    Ok(())
}
