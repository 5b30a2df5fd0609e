//! The files embedded in a PDF.

use std::fmt;

use hayro_syntax::Pdf;
use hayro_syntax::object::{Dict, Name, Object, Stream, String as PdfString};

/// A file embedded in a PDF, under its flat name.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Embedded {
    pub name: String,
    pub bytes: Vec<u8>,
}

/// Why a PDF cannot be read as a record.
#[derive(Clone, Debug, PartialEq, Eq)]
pub enum PdfError {
    /// The bytes are not a PDF that can be read.
    NotPdf,
    /// It embeds no `manifest.json`, so it is not a record of this program.
    NotRecord,
    /// An embedded file cannot be decoded.
    Damaged(String),
    /// An embedded file's name is not flat, or it stands there twice.
    Name(String),
}

impl fmt::Display for PdfError {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        match self {
            PdfError::NotPdf => f.write_str("not a PDF that can be read"),
            PdfError::NotRecord => f.write_str("a PDF without manifest.json, so not a record"),
            PdfError::Damaged(name) => write!(f, "a PDF whose attachment {name} is damaged"),
            PdfError::Name(name) => write!(f, "a PDF with an attachment named {name:?}"),
        }
    }
}

impl std::error::Error for PdfError {}

const BYTE_RANGE: &[u8] = b"/ByteRange";

/// What a record's PDF holds.
#[derive(Clone, Debug)]
pub struct RecordFile {
    pub attachments: Vec<Embedded>,
    /// Whether the file holds a signature, valid or not.
    pub is_signed: bool,
}

impl RecordFile {
    /// Reads the attachments of a record.
    pub fn read(bytes: Vec<u8>) -> Result<RecordFile, PdfError> {
        // A signature dictionary stands in plain text, for its bytes to be counted; one within
        // another dictionary is no object of its own.
        let mut is_signed = bytes.windows(BYTE_RANGE.len()).any(|at| at == BYTE_RANGE);
        let pdf = Pdf::new(bytes).map_err(|_| PdfError::NotPdf)?;
        let mut attachments: Vec<Embedded> = Vec::new();
        for object in pdf.objects() {
            let Object::Dict(dict) = object else { continue };
            is_signed |= is_signature(&dict);
            if let Some(embedded) = embedded(&dict)? {
                if attachments.iter().any(|other| other.name == embedded.name) {
                    return Err(PdfError::Name(embedded.name));
                }
                attachments.push(embedded);
            }
        }
        let file = RecordFile {
            attachments,
            is_signed,
        };
        file.get("manifest.json").ok_or(PdfError::NotRecord)?;
        Ok(file)
    }

    /// The bytes of an attachment.
    pub fn get(&self, name: &str) -> Option<&[u8]> {
        let file = self.attachments.iter().find(|file| file.name == name);
        file.map(|file| file.bytes.as_slice())
    }
}

/// A signature dictionary (ISO 32000-2, 12.8.1).
fn is_signature(dict: &Dict<'_>) -> bool {
    dict.contains_key("ByteRange") && dict.contains_key("Contents")
}

/// A file specification with its embedded file (ISO 32000-2, 7.11).
fn embedded(dict: &Dict<'_>) -> Result<Option<Embedded>, PdfError> {
    let is_specification = dict
        .get::<Name<'_>>("Type")
        .is_some_and(|t| t.as_str() == "Filespec");
    let files = dict.get::<Dict<'_>>("EF");
    let (true, Some(files)) = (is_specification, files) else {
        return Ok(None);
    };
    let name = dict.get::<PdfString<'_>>("UF").or_else(|| dict.get("F"));
    let name = name.map_or_else(String::new, |name| text(name.as_bytes()));
    if !is_flat(&name) {
        return Err(PdfError::Name(name));
    }
    let stream = files.get::<Stream<'_>>("UF").or_else(|| files.get("F"));
    let bytes = stream.and_then(|stream| stream.decoded().ok().map(|bytes| bytes.to_vec()));
    match bytes {
        Some(bytes) => Ok(Some(Embedded { name, bytes })),
        None => Err(PdfError::Damaged(name)),
    }
}

/// A text string: UTF-16 with a byte order mark, UTF-8 with one, or ASCII (ISO 32000-2, 7.9.2.2).
fn text(bytes: &[u8]) -> String {
    match bytes {
        [0xFE, 0xFF, rest @ ..] => {
            let units = rest
                .chunks_exact(2)
                .map(|pair| u16::from_be_bytes([pair[0], pair[1]]));
            String::from_utf16_lossy(&units.collect::<Vec<_>>())
        }
        [0xEF, 0xBB, 0xBF, rest @ ..] => String::from_utf8_lossy(rest).into_owned(),
        other => String::from_utf8_lossy(other).into_owned(),
    }
}

/// A name that stays in the folder it is written to.
fn is_flat(name: &str) -> bool {
    let separators = |c: char| matches!(c, '/' | '\\' | ':') || c.is_control();
    !name.is_empty() && name != "." && name != ".." && !name.contains(separators)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn what_is_no_pdf_is_said_to_be_none() {
        assert_eq!(
            RecordFile::read(b"hello".to_vec()).err(),
            Some(PdfError::NotPdf)
        );
    }

    #[test]
    fn names_that_leave_the_folder_are_not_flat() {
        for bad in ["", ".", "..", "a/b", "..\\x", "c:x", "a\nb"] {
            assert!(!is_flat(bad), "{bad:?}");
        }
        assert!(is_flat("case.toml"));
    }

    #[test]
    fn text_strings_are_decoded() {
        assert_eq!(text(b"case.toml"), "case.toml");
        assert_eq!(text(&[0xFE, 0xFF, 0, b'a', 0x20, 0xAC]), "a€");
    }
}
