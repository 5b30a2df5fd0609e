//! Writing files so that none is ever half there.

use std::fs::{self, File};
use std::io::{self, Write};
use std::path::Path;

use tempfile::NamedTempFile;

/// Writes a file through a temporary one beside it: written, synced, renamed. An existing file is
/// replaced whole or not at all.
pub fn write_whole(path: &Path, bytes: &[u8]) -> io::Result<()> {
    let file = prepared(path, bytes)?;
    file.persist(path).map_err(|error| error.error)?;
    sync_folder(path)
}

/// Writes a file that must not be there yet.
pub fn write_new(path: &Path, bytes: &[u8]) -> io::Result<()> {
    let file = prepared(path, bytes)?;
    file.persist_noclobber(path).map_err(|error| error.error)?;
    sync_folder(path)
}

/// Why a file could not be written, in words.
pub fn why(error: &io::Error) -> String {
    match error.kind() {
        io::ErrorKind::AlreadyExists => "something of this name is there already",
        io::ErrorKind::NotADirectory => "a file is where a folder should be",
        io::ErrorKind::IsADirectory => "a folder of this name is there",
        io::ErrorKind::PermissionDenied => "the folder may not be written to",
        io::ErrorKind::ReadOnlyFilesystem => "the file system is read-only",
        io::ErrorKind::StorageFull => "no space is left",
        _ => return error.to_string(),
    }
    .to_string()
}

fn prepared(path: &Path, bytes: &[u8]) -> io::Result<NamedTempFile> {
    let folder = folder_of(path);
    let in_the_way = |error| match folder.is_file() {
        true => io::Error::from(io::ErrorKind::NotADirectory),
        false => error,
    };
    fs::create_dir_all(folder).map_err(in_the_way)?;
    let mut file = NamedTempFile::new_in(folder)?;
    file.write_all(bytes)?;
    readable(file.as_file())?;
    file.as_file().sync_all()?;
    Ok(file)
}

fn folder_of(path: &Path) -> &Path {
    match path.parent() {
        Some(folder) if !folder.as_os_str().is_empty() => folder,
        _ => Path::new("."),
    }
}

/// Temporary files are private at first; a record is as readable as other files.
#[cfg(unix)]
fn readable(file: &File) -> io::Result<()> {
    use std::os::unix::fs::PermissionsExt;
    file.set_permissions(fs::Permissions::from_mode(0o644))
}

#[cfg(not(unix))]
fn readable(_file: &File) -> io::Result<()> {
    Ok(())
}

/// The new name is on disk only when its folder is.
fn sync_folder(path: &Path) -> io::Result<()> {
    if cfg!(unix) {
        File::open(folder_of(path))?.sync_all()?;
    }
    Ok(())
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_file_is_replaced_whole_and_no_other_is_left() {
        // The folder for temporary files of the machine; nothing else is in this one.
        let folder = tempfile::tempdir().expect("a temporary folder");
        let path = folder.path().join("deep").join("a.txt");
        write_whole(&path, b"one").expect("written");
        write_whole(&path, b"two").expect("replaced");
        assert_eq!(fs::read(&path).expect("readable"), b"two");
        assert!(write_new(&path, b"three").is_err());
        let names = fs::read_dir(path.parent().expect("a folder")).expect("listed");
        assert_eq!(names.count(), 1);
    }
}
