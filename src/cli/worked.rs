//! Reading a case for a command.

use std::path::Path;

use crate::calculation::Calculation;
use crate::case::CASE_NAME;
use crate::document::read_text;
use crate::finding::Fault;
use crate::folder::CaseFolder;

/// A worked case with the folder it came from.
pub struct Worked {
    pub calculation: Calculation,
    pub folder: CaseFolder,
}

/// Reads and works a case file.
pub fn work_file(path: &Path) -> Result<Worked, Vec<Fault>> {
    let text = read_text(path, CASE_NAME).map_err(|fault| vec![fault])?;
    let folder = CaseFolder::of(path, &text);
    let calculation = Calculation::of(text, &folder)?;
    Ok(Worked {
        calculation,
        folder,
    })
}
