//! What the typesetter may see: the template's parts, the pages as one data file, the offered
//! fonts. No files, no packages, no clock.

use std::sync::LazyLock;

use typst::diag::{FileError, FileResult};
use typst::foundations::{Bytes, Datetime, Duration};
use typst::syntax::{FileId, Source};
use typst::text::{Font, FontBook};
use typst::utils::LazyHash;
use typst::{Library, LibraryExt, World};

use super::attachment;
use super::fonts::{BOOK, FACES};
use super::template::{MAIN, SOURCES, file_id};
use super::{Pages, TypesetError};
use crate::record::Attachment;

/// The file that the template reads its data from.
const DATA: &str = "pages.json";

static MAIN_ID: LazyLock<FileId> = LazyLock::new(|| file_id(MAIN));
static DATA_ID: LazyLock<FileId> = LazyLock::new(|| file_id(DATA));

/// The surroundings of one record.
pub(super) struct RecordWorld {
    library: LazyHash<Library>,
    data: Bytes,
}

impl RecordWorld {
    pub(super) fn new(
        pages: &Pages,
        attachments: &[Attachment],
    ) -> Result<RecordWorld, TypesetError> {
        let data =
            serde_json::to_vec(pages).map_err(|error| TypesetError::Data(error.to_string()))?;
        let library = Library::builder()
            .with_inputs(attachment::inputs(attachments))
            .build();
        Ok(RecordWorld {
            library: LazyHash::new(library),
            data: Bytes::new(data),
        })
    }

    /// Other data for the template than any pages would give.
    #[cfg(test)]
    pub(super) fn set_data(&mut self, data: Vec<u8>) {
        self.data = Bytes::new(data);
    }
}

fn part(id: FileId) -> FileResult<&'static Source> {
    let missing = || FileError::NotFound(id.vpath().get_without_slash().into());
    SOURCES
        .iter()
        .find(|source| source.id() == id)
        .ok_or_else(missing)
}

impl World for RecordWorld {
    fn library(&self) -> &LazyHash<Library> {
        &self.library
    }

    fn book(&self) -> &LazyHash<FontBook> {
        &BOOK
    }

    fn main(&self) -> FileId {
        *MAIN_ID
    }

    fn source(&self, id: FileId) -> FileResult<Source> {
        part(id).cloned()
    }

    fn file(&self, id: FileId) -> FileResult<Bytes> {
        if id == *DATA_ID {
            return Ok(self.data.clone());
        }
        part(id).map(|source| Bytes::from_string(source.text().to_owned()))
    }

    fn font(&self, index: usize) -> Option<Font> {
        FACES.get(index).cloned()
    }

    fn today(&self, _offset: Option<Duration>) -> Option<Datetime> {
        None
    }
}
