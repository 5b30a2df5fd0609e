//! Putting an issued record in its place without losing what is there.

use std::fmt;
use std::fs;
use std::io;
use std::path::Path;

use crate::output::{why, write_whole};
use crate::pdf::RecordFile;
use crate::record::MANIFEST_NAME;
use crate::source::sha256_hex;

use super::Issue;

/// What became of a record's place.
#[derive(Clone, Debug, PartialEq, Eq)]
pub enum Placed {
    New,
    /// The very same bytes were there.
    Unchanged,
    /// An unsigned record with this stamp was replaced.
    Replaced {
        stamp: String,
    },
    /// A signed record of the same content was left alone.
    SignedKept,
}

/// Why a record was not put in its place.
#[derive(Debug)]
pub enum PlaceError {
    /// A signed record with another stamp is there.
    Signed {
        stamp: String,
    },
    /// Something is there that is not a record.
    Foreign(String),
    Io(io::Error),
}

impl fmt::Display for PlaceError {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        match self {
            PlaceError::Signed { stamp } => write!(
                f,
                "a signed record of other content is there (stamp {stamp}); raise the revision"
            ),
            PlaceError::Foreign(what) => write!(f, "{what} is there; move it away first"),
            PlaceError::Io(error) => f.write_str(&why(error)),
        }
    }
}

/// Writes a record to `path`. An unsigned record is replaced, a signed one never.
pub fn place(issue: &Issue, path: &Path) -> Result<Placed, PlaceError> {
    let existing = match fs::read(path) {
        Ok(bytes) => bytes,
        Err(error) if error.kind() == io::ErrorKind::NotFound => {
            write_whole(path, &issue.pdf).map_err(PlaceError::Io)?;
            return Ok(Placed::New);
        }
        Err(error) => return Err(PlaceError::Io(error)),
    };
    if existing == issue.pdf {
        return Ok(Placed::Unchanged);
    }
    let file = RecordFile::read(existing).map_err(|e| PlaceError::Foreign(e.to_string()))?;
    let stamp = file.get(MANIFEST_NAME).map_or_else(String::new, sha256_hex);
    match (file.is_signed, stamp == issue.record.stamp()) {
        (true, true) => Ok(Placed::SignedKept),
        (true, false) => Err(PlaceError::Signed { stamp }),
        (false, _) => {
            write_whole(path, &issue.pdf).map_err(PlaceError::Io)?;
            Ok(Placed::Replaced { stamp })
        }
    }
}
