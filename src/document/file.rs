//! From a file to its text: size and encoding are checked before anything reads it.

use std::fs::File;
use std::io::{self, Read};
use std::path::Path;

use crate::finding::{Fault, FaultCode, Text};

/// The largest case or source file that is read, in bytes. A case of 10,000 reactions has some
/// two million.
pub const LARGEST: u64 = 16 * 1024 * 1024;

/// Reads a case or source file as text. `name` is what messages call it.
pub fn read_text(path: &Path, name: &str) -> Result<Text, Fault> {
    let bytes = read_bytes(path).map_err(|error| unreadable(name, &error))?;
    if bytes.len() as u64 > LARGEST {
        return Err(too_large(path, name));
    }
    match String::from_utf8(bytes) {
        Ok(text) => Ok(Text::new(
            name,
            text.strip_prefix('\u{feff}').unwrap_or(&text),
        )),
        Err(error) => Err(not_utf8(name, &error)),
    }
}

/// One byte more than the limit is enough to know that a file is too large.
fn read_bytes(path: &Path) -> io::Result<Vec<u8>> {
    let mut bytes = Vec::new();
    File::open(path)?
        .take(LARGEST + 1)
        .read_to_end(&mut bytes)?;
    Ok(bytes)
}

/// Why a file could not be read, in words.
pub fn unread(error: &io::Error) -> String {
    match error.kind() {
        io::ErrorKind::NotFound => "no file of this name".to_string(),
        io::ErrorKind::PermissionDenied => "a file that may not be read".to_string(),
        io::ErrorKind::IsADirectory => "a folder".to_string(),
        _ => error.to_string(),
    }
}

fn unreadable(name: &str, error: &io::Error) -> Fault {
    Fault::of_file(
        name,
        unread(error),
        "a file of TOML text that can be read",
        "check the name and the folder it is relative to",
    )
}

fn too_large(path: &Path, name: &str) -> Fault {
    let size = std::fs::metadata(path).map_or(LARGEST + 1, |m| m.len());
    Fault::of_file(
        name,
        format!("a file of {size} bytes"),
        format!("at most {LARGEST} bytes"),
        "check that this is the file you meant; split a case that is really this large",
    )
}

fn not_utf8(name: &str, error: &std::string::FromUtf8Error) -> Fault {
    let valid = error.utf8_error().valid_up_to();
    let bytes = error.as_bytes();
    let readable = String::from_utf8_lossy(&bytes[..valid]);
    let text = Text::new(name, format!("{readable}\u{fffd}"));
    Fault::new(
        FaultCode::File,
        &text,
        &(readable.len()..readable.len() + '\u{fffd}'.len_utf8()),
        format!("byte 0x{:02X}, which is not UTF-8 here", bytes[valid]),
        "text encoded as UTF-8",
        "save the file as UTF-8 in your editor (it may be Windows-1252 or UTF-16 now)",
    )
}
